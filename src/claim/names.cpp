// Names and words of a claim file.
//
// Invariant: each name in sight has one meaning, and none is a word of the language.
#include "claim/names.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::size_t kLongestName = 64;

[[nodiscard]] bool is_letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); }
[[nodiscard]] bool is_name_part(char c) {
  return is_letter(c) || (c >= '0' && c <= '9') || c == '_';
}
[[nodiscard]] bool is_blank(char c) { return c == ' ' || c == '\t' || c == '\n' || c == '\r'; }

[[nodiscard]] std::string_view kind_text(Names::Kind kind) {
  switch (kind) {
    case Names::Kind::running:
      return "the running variable";
    case Names::Kind::index:
      return "an index";
    case Names::Kind::integer:
    case Names::Kind::rational:
      break;
  }
  return "a parameter";
}

// Words with single blanks between them.
[[nodiscard]] std::string squeezed(std::string_view text) {
  std::string out;
  for (const char c : text) {
    if (!is_blank(c)) {
      out += c;
    } else if (!out.empty() && out.back() != ' ') {
      out += ' ';
    }
  }
  if (!out.empty() && out.back() == ' ') out.pop_back();
  return out;
}

const std::vector<std::pair<std::string, Exclusion::Kind>>& exclusion_words() {
  static const std::vector<std::pair<std::string, Exclusion::Kind>> words = {
      {"integers", Exclusion::Kind::integers},
      {"positive integers", Exclusion::Kind::positive_integers},
      {"negative integers", Exclusion::Kind::negative_integers},
      {"nonnegative integers", Exclusion::Kind::nonnegative_integers},
      {"nonpositive integers", Exclusion::Kind::nonpositive_integers}};
  return words;
}

}  // namespace

void Names::View::remove_running() {
  const std::string running = std::exchange(scope.running, {});
  std::erase(symbols.allowed, running);
  symbols.elsewhere.insert_or_assign(
      running, "the running variable may stand in a condition only beside [equals]");
}

void Names::declare(const Source& source, const std::string& name, Place place, Kind kind) {
  const std::string_view rule = "a name is an ASCII letter, then letters, digits or _";
  if (name.empty() || !is_letter(name[0]) || !std::all_of(name.begin(), name.end(), is_name_part)) {
    throw InputError(source, place, fmt::format("{} is not a name", in_quotes(name)), rule);
  }
  if (name.size() > kLongestName) {
    throw InputError(
        source, place,
        fmt::format("a name of {} characters; at most {} are read", name.size(), kLongestName));
  }
  if (find_function(name) != nullptr) {
    throw InputError(source, place,
                     fmt::format("{} is a function and cannot be declared", in_quotes(name)));
  }
  if (name == "inf") {
    throw InputError(source, place, "'inf' means infinity and cannot be declared");
  }
  const auto [entry, fresh] = names_.try_emplace(name, Declared{kind, place});
  if (fresh) return;
  const auto where = source.position(entry->second.place.offset);
  throw InputError(
      source, place, fmt::format("{} is declared twice", in_quotes(name)),
      fmt::format("it is {} at {}:{}", kind_text(entry->second.kind), where.line, where.column));
}

Names::View Names::with_indices() const {
  View view;
  for (const auto& [name, declared] : names_) {
    view.symbols.allowed.push_back(name);
    if (declared.kind == Kind::running) view.scope.running = name;
    if (declared.kind == Kind::index) view.scope.indices.insert(name);
    if (declared.kind == Kind::integer) view.scope.integers.insert(name);
    if (declared.kind == Kind::rational) view.scope.rationals.insert(name);
  }
  return view;
}

std::map<std::string, std::string> Names::all(const std::string& reason) const {
  std::map<std::string, std::string> out;
  for (const auto& [name, declared] : names_) out.emplace(name, reason);
  return out;
}

void Names::forget_indices() {
  std::erase_if(names_, [](const auto& entry) { return entry.second.kind == Kind::index; });
}

std::optional<Bound::Kind> infinity(std::string_view text) {
  std::string squeezed_text;
  for (const char c : text.substr(0, std::min<std::size_t>(text.size(), 64))) {
    if (!is_blank(c)) squeezed_text += c;
  }
  if (text.size() > 64) return std::nullopt;
  if (squeezed_text == "inf" || squeezed_text == "+inf") return Bound::Kind::plus_infinity;
  if (squeezed_text == "-inf") return Bound::Kind::minus_infinity;
  return std::nullopt;
}

std::optional<Exclusion::Kind> exclusion_word(const Source& source, const MappedText& text) {
  const std::string word = squeezed(text.text);
  if (word.empty() || !std::all_of(word.begin(), word.end(),
                                   [](char c) { return is_letter(c) || c == ' ' || c == '-'; })) {
    return std::nullopt;
  }
  if (!is_letter(word[0])) return std::nullopt;
  std::vector<std::string> known;
  for (const auto& [name, kind] : exclusion_words()) {
    if (name == word) return kind;
    known.push_back(name);
  }
  std::string note = suggestion(word, known);
  if (note.empty()) note = "the words are " + listing(known);
  throw InputError(
      source, text.place,
      fmt::format("{} is neither a rational constant nor a known set of numbers", in_quotes(word)),
      note);
}

std::string plain_line(const Source& source, const MappedText& text, const std::string& what) {
  std::string out;
  for (std::size_t at = 0; at < text.text.size();) {
    const Character character = decode(text.text, at);
    const std::string_view bytes = std::string_view(text.text).substr(at, character.length);
    const bool newline = bytes == "\n" || std::string_view(text.text).substr(at, 2) == "\r\n";
    if (newline) {
      out += ' ';
    } else if (bytes == "\r" || !character.valid || is_unprintable(character.code)) {
      throw InputError(source, text.span(at, at + character.length),
                       fmt::format("{} has a control character {}", what, in_quotes(bytes)));
    } else {
      out += bytes;
    }
    at += newline && bytes == "\r" ? 2 : character.length;
  }
  const std::size_t first = out.find_first_not_of(' ');
  if (first == std::string::npos) {
    throw InputError(source, text.place, fmt::format("{} is empty", what));
  }
  return out.substr(first, out.find_last_not_of(' ') - first + 1);
}

}  // namespace sumwright::claim
