// The outer grammar of templates/obligations.ebnf: headings, remarks, entries, the claim's block.
//
// Invariant: every byte of the source belongs to a heading, a remark, an entry, the block or a
// blank line; nothing is skipped silently.
#include "writers/obligations_lines.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <set>

#include "claim/text.hpp"
#include "writers/obligations_document.hpp"

namespace sumwright::writers {

namespace {

constexpr std::string_view kContinuation = "    ";
constexpr const char* kChangedNote =
    "a mail program or an editor may have changed the file; get it again, packed or attached";

[[nodiscard]] bool key_character(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '_' ||
         c == ' ';
}

class LineReader {
 public:
  LineReader(const claim::Source& source, const ObligationsLimits& limits)
      : source_(source), limits_(limits) {}

  ReadLines read() {
    first_line();
    while (next_line()) {
      if (line_.starts_with("| ")) {
        block_line();
        continue;
      }
      check_plain();
      if (line_.empty() || line_ == "#" || line_.starts_with("# ")) {
        open_entry_ = false;
      } else if (line_.starts_with("== ")) {
        heading();
      } else if (line_.starts_with(kContinuation)) {
        continuation();
      } else {
        entry();
      }
    }
    close_section();
    require_last_section();
    return std::move(out_);
  }

 private:
  [[noreturn]] void refuse(const std::string& message, std::size_t column = 0,
                           std::size_t length = 1, const std::string& note = {}) const {
    throw claim::InputError(source_, {line_start_ + column, length}, message, note);
  }

  bool next_line() {
    const std::string_view text = source_.text;
    if (next_ >= text.size()) return false;
    const std::size_t end = text.find('\n', next_);
    line_start_ = next_;
    if (end == std::string_view::npos) {
      line_ = text.substr(next_);
      refuse("the last line has no line break: the file may have been cut off", 0, line_.size());
    }
    line_ = text.substr(next_, end - next_);
    next_ = end + 1;
    return true;
  }

  void first_line() {
    const bool any = next_line();
    if (any && line_ == kObligationsFirstLine) return;
    const std::size_t last = line_.find_last_not_of(" \t\r");
    if (any && line_.substr(0, last + 1) == kObligationsFirstLine) refuse_trailing(last + 1);
    if (any && line_.starts_with(kObligationsTitle)) {
      refuse("an obligation file of another format", 0, line_.size(),
             fmt::format("this version reads `{}`", kObligationsFirstLine));
    }
    refuse(fmt::format("expected `{}` as the first line", kObligationsFirstLine), 0, line_.size());
  }

  [[noreturn]] void refuse_trailing(std::size_t column) const {
    refuse("blanks at the end of a line", column, line_.size() - column, kChangedNote);
  }

  void check_plain() const {
    for (std::size_t at = 0; at < line_.size();) {
      const claim::Character character = claim::decode(line_, at);
      if (!character.valid || claim::is_unprintable(character.code)) {
        refuse("a character that does not belong here", at, character.length);
      }
      at += character.length;
    }
    if (line_.ends_with(' ')) refuse_trailing(line_.find_last_not_of(' ') + 1);
  }

  void block_line() {
    if (section().name != "claim") refuse("the claim's text stands in the section `claim` only");
    if (out_.block.empty()) out_.block_place = {line_start_, line_.size()};
    if (!out_.block.empty() && !block_open_) refuse("the claim's text is not in one piece");
    block_open_ = true;
    open_entry_ = false;
    out_.block += line_.substr(2);
    out_.block += '\n';
  }

  void heading() {
    const std::size_t end = line_.find(" =", 3);
    const std::string_view name =
        end == std::string_view::npos ? line_.substr(3) : line_.substr(3, end - 3);
    std::string expected = "== " + std::string(name) + " ";
    if (expected.size() < kObligationsColumns) {
      expected.append(kObligationsColumns - expected.size(), '=');
    }
    if (line_ != expected) refuse("a heading is `== name ===` up to column 80", 0, line_.size());
    close_section();
    const auto& rows = obligations_sections();
    for (std::size_t i = 1; i < rows.size(); ++i) {
      if (rows[i].name != name) continue;
      if (i <= section_) refuse("sections are out of order or repeated", 3, name.size());
      section_ = i;
      section_start_ = line_start_;
      return;
    }
    refuse("no section has the name " + claim::in_quotes(name), 3, name.size(), suggest(name));
  }

  [[nodiscard]] static std::string suggest(std::string_view name) {
    std::vector<std::string> names;
    for (const SectionRow& row : obligations_sections()) names.push_back(row.name);
    return claim::suggestion(name, names);
  }

  void entry() {
    if (block_open_ && line_ == "|") {
      refuse("the blank behind the bar is gone", 0, line_.size(), kChangedNote);
    }
    block_open_ = false;
    std::size_t end = 0;
    while (end < line_.size() && key_character(line_[end])) ++end;
    std::string_view key = line_.substr(0, end);
    const bool statement = line_.substr(end).starts_with(": ");
    const bool definition = key.ends_with(' ') && line_.substr(end).starts_with("= ");
    if (definition) key.remove_suffix(1);
    if (key.empty() || (!statement && !definition)) {
      refuse("expected a heading, a remark, `key: value` or `key = value`", 0, line_.size());
    }
    ReadEntry read;
    read.section = &section();
    read.key = key;
    read.place = {line_start_, key.size()};
    read.row = find_row(key, statement ? ':' : '=');
    if (!keys_.insert(read.key).second) refuse("this key is given twice", 0, key.size());
    if (out_.entries.size() >= limits_.entries) refuse("too many entries");
    out_.entries.push_back(std::move(read));
    append_value(end + 2);
    open_entry_ = true;
  }

  [[nodiscard]] const KeyRow* find_row(std::string_view key, char separator) const {
    for (const KeyRow& row : section().keys) {
      if (!matches(row.pattern, key)) continue;
      if (row.separator == separator) return &row;
      refuse(fmt::format("expected `{}` after this key", row.separator), 0, key.size());
    }
    refuse(fmt::format("{} is not a key of this section", claim::in_quotes(key)), 0, key.size());
  }

  void continuation() {
    if (!open_entry_) refuse("a continuation line must follow its entry at once", 0, line_.size());
    PlacedValue& value = out_.entries.back().value;
    value.text += ' ';
    value.offsets.push_back(line_start_ + kContinuation.size() - 1);
    append_value(kContinuation.size());
  }

  void append_value(std::size_t column) {
    const std::string_view text = line_.substr(column);
    if (text.empty() || text.front() == ' ' || text.find("  ") != std::string_view::npos) {
      refuse("words of a value are separated by one blank", std::min(column, line_.size()),
             text.size());
    }
    PlacedValue& value = out_.entries.back().value;
    value.text += text;
    for (std::size_t i = 0; i < text.size(); ++i) value.offsets.push_back(line_start_ + column + i);
  }

  // Whether an entry of the row was given in the section just read.
  [[nodiscard]] bool given(const KeyRow& row) const {
    return std::any_of(keys_.begin(), keys_.end(),
                       [&](const std::string& key) { return matches(row.pattern, key); });
  }

  void close_section() {
    for (const KeyRow& row : section().keys) {
      if (!row.required || given(row)) continue;
      throw claim::InputError(source_, {section_start_, 1},
                              fmt::format("`{}` is missing in this section", row.pattern));
    }
    if (section().name == "claim" && out_.block.empty()) {
      throw claim::InputError(source_, {section_start_, 1}, "the claim's text is missing");
    }
    keys_.clear();
    open_entry_ = false;
    block_open_ = false;
  }

  void require_last_section() const {
    if (section_ + 1 == obligations_sections().size()) return;
    throw claim::InputError(source_, {source_.text.size(), 1},
                            "the section `conclusion` is missing: the file may have been cut off");
  }

  [[nodiscard]] const SectionRow& section() const { return obligations_sections()[section_]; }

  const claim::Source& source_;
  const ObligationsLimits& limits_;
  ReadLines out_;
  std::string_view line_;
  std::size_t line_start_ = 0;
  std::size_t next_ = 0;
  std::size_t section_ = 0;
  std::size_t section_start_ = 0;
  std::set<std::string> keys_;
  bool open_entry_ = false;
  bool block_open_ = false;
};

}  // namespace

ReadLines read_lines(const claim::Source& source, const ObligationsLimits& limits) {
  return LineReader(source, limits).read();
}

}  // namespace sumwright::writers
