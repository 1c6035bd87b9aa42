// From entries to the typed parts of obligations.txt.
//
// Invariant: what is returned is what the file says; nothing is filled in. Numbered entries run
// without gaps, the claim's text has the stated length and SHA-256.
#include "writers/obligations_reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <optional>
#include <utility>

#include "claim/regular_file.hpp"
#include "claim/text.hpp"
#include "writers/obligations_lines.hpp"
#include "writers/sha256.hpp"

namespace sumwright::writers {

namespace {

constexpr std::string_view kNotEstablished = "NOT ESTABLISHED, ";

constexpr const char* kConvertedNote =
    "the line ends of the file were converted on its way; get it again, packed or attached";

// The text if it has that many bytes, with its last line end or without.
[[nodiscard]] std::optional<std::string> of_size(std::string text, std::string_view line_end,
                                                 long bytes) {
  if (std::cmp_equal(text.size(), bytes)) return text;
  if (!text.ends_with(line_end)) return std::nullopt;
  text.resize(text.size() - line_end.size());
  if (std::cmp_equal(text.size(), bytes)) return text;
  return std::nullopt;
}

[[nodiscard]] std::string with_crlf(std::string_view text) {
  std::string out;
  for (const char c : text) {
    if (c == '\n') out += '\r';
    out += c;
  }
  return out;
}

// Version control and mail give text files the line ends of the machine, and editors put a
// byte-order mark before them; neither says anything. Gives whether line ends were converted.
bool normalise(std::string& text) {
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  if (text.starts_with(mark)) text.erase(0, mark.size());
  const std::size_t first = text.find('\n');
  if (first == std::string::npos || first == 0 || text[first - 1] != '\r') return false;
  std::string out;
  out.reserve(text.size());
  for (std::size_t at = 0; at < text.size(); ++at) {
    const bool pair = text[at] == '\r' && at + 1 < text.size() && text[at + 1] == '\n';
    if (!pair) out += text[at];
  }
  text = std::move(out);
  return true;
}

class FileBuilder {
 public:
  // `converted`: the line ends are not those that were written.
  FileBuilder(const claim::Source& source, const ObligationsLimits& limits, bool converted)
      : limits_(limits),
        source_(source),
        converted_(converted),
        lines_(read_lines(source, limits)) {
    for (const ReadEntry& entry : lines_.entries) {
      index_[{entry.section->name, entry.key}] = &entry;
    }
  }

  ObligationsFile build() {
    for (const ReadEntry& entry : lines_.entries) {
      out_.entries.push_back({entry.section->name, entry.key, entry.value.text, entry.place});
    }
    front();
    claim_text();
    symbols();
    check_forms();
    recurrence();
    if (has("base term", "B") != has("equality", "normal form")) {
      refuse(lines_.entries.back().place, "`base term` and `equality` come together");
    }
    if (has("base term", "B")) equality();
    classes();
    return std::move(out_);
  }

 private:
  [[noreturn]] void refuse(claim::Place place, const std::string& message) const {
    throw claim::InputError(source_, place, message);
  }

  [[nodiscard]] bool has(const std::string& section, const std::string& key) const {
    return index_.contains({section, key});
  }
  [[nodiscard]] const ReadEntry& at(const std::string& section, const std::string& key) const {
    const auto found = index_.find({section, key});
    if (found == index_.end()) {
      refuse({source_.text.size(), 1}, fmt::format("section `{}`: `{}` is missing", section, key));
    }
    return *found->second;
  }
  [[nodiscard]] std::string text(const std::string& section, const std::string& key) const {
    return at(section, key).value.text;
  }
  [[nodiscard]] ValueReader values() const { return {source_, out_.symbols, limits_}; }

  // The entries prefix0, prefix1, ... (from `first` on), which must have no gaps.
  [[nodiscard]] std::vector<const ReadEntry*> numbered(const std::string& section,
                                                       const std::string& prefix,
                                                       std::size_t first) const {
    std::vector<const ReadEntry*> out;
    while (has(section, prefix + std::to_string(first + out.size()))) {
      out.push_back(&at(section, prefix + std::to_string(first + out.size())));
    }
    const auto count = static_cast<std::size_t>(
        std::count_if(lines_.entries.begin(), lines_.entries.end(), [&](const ReadEntry& entry) {
          return entry.section->name == section && matches(prefix + "#", entry.key);
        }));
    if (count != out.size()) {
      refuse({source_.text.size(), 1},
             fmt::format("section `{}`: the entries `{}...` are not numbered {}, {}, ...", section,
                         prefix, first, first + 1));
    }
    return out;
  }

  void front() {
    const ReadEntry& entry = at("", "verdict");
    out_.verdict = entry.value.text;
    const bool denied = out_.verdict.starts_with(kNotEstablished);
    if (denied) out_.verdict.erase(0, kNotEstablished.size());
    const bool established = out_.verdict == "established";
    if (established == denied ||
        (!established && out_.verdict != "refuted" && out_.verdict != "undecided")) {
      refuse(entry.place, "no such verdict");
    }
    if (text("conclusion", "verdict") != out_.verdict) {
      refuse(at("conclusion", "verdict").place, "not the verdict that the file starts with");
    }
    if (established && has("", "open 1")) {
      refuse(at("", "open 1").place, "an established claim has no open conditions");
    }
    out_.title = text("", "title");
  }

  void claim_text() {
    const long bytes = values().small_integer(at("claim", "bytes").value);
    out_.claim_sha256 = text("claim", "sha256");
    std::optional<std::string> found = of_size(lines_.block, "\n", bytes);
    // A conversion of line ends may have taken or left those of the claim's text: the hash decides.
    if (converted_ && (!found || sha256(*found) != out_.claim_sha256)) {
      if (auto other = of_size(with_crlf(lines_.block), "\r\n", bytes)) found = std::move(other);
    }
    const std::string note = converted_ ? kConvertedNote : "";
    if (!found) {
      throw claim::InputError(source_, at("claim", "bytes").place,
                              fmt::format("the claim's text has {} bytes", lines_.block.size()),
                              note);
    }
    out_.claim_text = *std::move(found);
    if (sha256(out_.claim_text) != out_.claim_sha256) {
      throw claim::InputError(source_, at("claim", "sha256").place,
                              "this is not the SHA-256 of the claim's text below", note);
    }
  }

  void symbols() {
    static const std::map<std::string, proof::SymbolKind> kinds = {
        {"running variable, integer", proof::SymbolKind::running},
        {"summation index, integer", proof::SymbolKind::index},
        {"parameter, integer", proof::SymbolKind::integer_parameter},
        {"parameter, any number of a field of characteristic zero",
         proof::SymbolKind::rational_parameter}};
    for (const ReadEntry* entry : numbered("symbols", "symbol ", 1)) {
      const std::string& value = entry->value.text;
      const std::size_t comma = std::min(value.find(", "), value.size());
      const auto kind = kinds.find(value.substr(std::min(comma + 2, value.size())));
      const std::string name = value.substr(0, comma);
      const bool repeated =
          std::any_of(out_.symbols.begin(), out_.symbols.end(),
                      [&](const proof::Symbol& symbol) { return symbol.name == name; });
      if (kind == kinds.end() || repeated)
        refuse(entry->place, "not a symbol and what it ranges over");
      out_.symbols.push_back({name, kind->second});
    }
  }

  // Every polynomial and number has its form, also those that are only compared.
  void check_forms() {
    ValueReader reader = values();
    for (const ReadEntry& entry : lines_.entries) {
      switch (entry.row->kind) {
        case ValueKind::text:
          break;
        case ValueKind::integer:
          static_cast<void>(reader.integer(entry.value));
          break;
        case ValueKind::polynomial:
          static_cast<void>(reader.polynomial(entry.value));
          break;
        case ValueKind::factored:
          static_cast<void>(reader.factored(entry.value));
          break;
      }
    }
  }

  void recurrence() {
    for (const ReadEntry* entry : numbered("recurrence", "coefficient ", 0)) {
      out_.recurrence.push_back(entry->value.text);
    }
    if (out_.recurrence.empty()) return;
    if (out_.verdict == "established") {  // a candidate may lack both
      static_cast<void>(at("recurrence", "threshold"));
      static_cast<void>(at("recurrence", "right side"));
    }
    if (has("recurrence", "right side")) out_.right_side = text("recurrence", "right side");
    if (has("recurrence", "certificate")) out_.certificate = text("recurrence", "certificate");
  }

  void equality() {
    ValueReader reader = values();
    out_.has_equality = true;
    out_.base = text("base term", "B");
    for (const ReadEntry* entry : numbered("base term", "a_", 0)) {
      out_.coefficients.push_back(reader.factored(entry->value));
    }
    for (const ReadEntry* entry : numbered("base term", "p_", 0)) {
      out_.p.push_back(reader.factored(entry->value));
    }
    if (out_.p.size() != out_.coefficients.size()) {
      refuse(at("base term", "B").place, "as many p_i as a_i are needed");
    }
    out_.weight = reader.factored(at("base term", "weight").value);
    out_.down = reader.factored(at("base term", "down").value);
    out_.up = reader.factored(at("base term", "up").value);
    out_.certificate_polynomial = reader.polynomial(at("base term", "c").value);
    out_.normal_form = reader.polynomial(at("equality", "normal form").value);
    const proof::Factored scale = reader.factored(at("equality", "scale").value);
    if (!scale.factors.empty()) refuse(at("equality", "scale").place, "the scale is a number");
    out_.normal_scale = scale.constant;
    check_equation();
    out_.terms = static_cast<std::size_t>(reader.small_integer(at("equality", "terms").value));
    out_.degree = reader.small_integer(at("equality", "degree").value);
    out_.bits = static_cast<std::size_t>(reader.small_integer(at("equality", "bits").value));
    for (const ReadEntry* entry : numbered("equality", "degree in symbol ", 1)) {
      out_.degrees.push_back(reader.small_integer(entry->value));
    }
    if (out_.degrees.size() != out_.symbols.size()) {
      refuse(at("equality", "degree").place, "a degree in each symbol is needed");
    }
  }

  // The two sides are always the same expressions in the entries of the base term.
  void check_equation() const {
    std::string left;
    for (std::size_t i = 0; i < out_.p.size(); ++i) {
      left += fmt::format("{}a_{}*p_{}", i == 0 ? "" : " + ", i, i);
    }
    if (text("equality", "left") != "weight*(" + left + ")") {
      refuse(at("equality", "left").place, "expected weight*(" + left + ")");
    }
    if (text("equality", "right") != "up*c(k + 1) - down*c(k)") {
      refuse(at("equality", "right").place, "expected up*c(k + 1) - down*c(k)");
    }
  }

  void classes() {
    ValueReader reader = values();
    for (const ReadEntry& entry : lines_.entries) {
      const std::size_t at_share = entry.key.find(" share ");
      if (at_share == std::string::npos) continue;
      const std::string key = entry.key.substr(0, at_share);
      if (out_.classes.empty() || out_.classes.back().key != key ||
          out_.classes.back().section != entry.section->name) {
        out_.classes.push_back(
            {entry.section->name, key, text(entry.section->name, key + " base"), {}});
      }
      out_.classes.back().shares.push_back(reader.factored(entry.value));
    }
  }

  const ObligationsLimits& limits_;
  const claim::Source& source_;
  bool converted_;
  ReadLines lines_;
  std::map<std::pair<std::string, std::string>, const ReadEntry*> index_;
  ObligationsFile out_;
};

}  // namespace

ObligationsFile read_obligations_text(std::string name, std::string text,
                                      const ObligationsLimits& limits) {
  if (text.size() > limits.file_bytes) {
    throw claim::InputError(name,
                            fmt::format("the file is larger than {} bytes", limits.file_bytes));
  }
  const bool converted = normalise(text);
  const claim::Source source{std::move(name), std::move(text)};
  return FileBuilder(source, limits, converted).build();
}

ObligationsFile read_obligations_file(const std::filesystem::path& path,
                                      const ObligationsLimits& limits) {
  return read_obligations_text(path.string(), claim::read_regular_file(path, limits.file_bytes),
                               limits);
}

}  // namespace sumwright::writers
