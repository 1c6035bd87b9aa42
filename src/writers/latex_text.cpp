// From untrusted UTF-8 to LaTeX text, character by character.
//
// Invariant: the result has balanced braces and dollars, contains only commands of this file and
// of the table of letters, and no blank line.
#include "writers/latex_text.hpp"

#include <fmt/format.h>

#include "claim/text.hpp"

namespace sumwright::writers {

namespace {

constexpr std::size_t kWord = 12;  // characters of a word between places where it may break

[[nodiscard]] std::string ascii(char c) {
  switch (c) {
    case '\\':
      return "\\textbackslash{}";
    case '{':
    case '}':
    case '$':
    case '&':
    case '%':
    case '#':
    case '_':
      return std::string("\\") + c;
    case '^':
      return "\\textasciicircum{}";
    case '~':
      return "\\textasciitilde{}";
    case '<':
    case '>':
    case '|':
      return std::string("$") + (c == '|' ? "\\vert" : std::string(1, c)) + "$";
    case '"':
      return "''";
    case '`':
      return "{`}";
    case '\'':
      return "{'}";
    case '-':
      return "{-}";
    default:
      return std::string(1, c);
  }
}

[[nodiscard]] std::string shown(std::string_view text, std::size_t at, const claim::Character& c) {
  if (c.valid && c.code >= 0x20 && c.code < 0x7F) return ascii(text[at]);
  if (!c.valid) return fmt::format("[0x{:02X}]", static_cast<unsigned char>(text[at]));
  const std::string_view known = latex_letter(c.code);
  return known.empty() ? fmt::format("[U+{:04X}]", static_cast<unsigned long>(c.code))
                       : std::string(known);
}

[[nodiscard]] bool breaks_behind(char c) {
  return std::string_view("+-*/^,()=<>!").find(c) != std::string_view::npos;
}

// In typewriter type characters stand for themselves where the font has them.
[[nodiscard]] std::string code_character(std::string_view text, std::size_t at,
                                         const claim::Character& c) {
  if (!c.valid || c.code >= 0x7F || c.code < 0x20) return shown(text, at, c);
  const char ch = text[at];
  switch (ch) {
    case '\\':
    case '{':
    case '}':
    case '^':
    case '~':
    case '_':
    case '"':
    case '|':
      return fmt::format("\\char{}{{}}", static_cast<int>(ch));
    case '<':
    case '>':
      return std::string(1, ch);
    default:
      return ascii(ch);
  }
}

}  // namespace

std::string latex_text(std::string_view text, std::size_t limit) {
  std::string out;
  std::size_t word = 0;
  std::size_t count = 0;
  bool blank = false;
  for (std::size_t at = 0; at < text.size(); ++count) {
    if (count >= limit) return out + "\\ldots{}";
    const claim::Character c = claim::decode(text, at);
    const bool space = c.valid && (c.code == ' ' || c.code == '\n' || c.code == '\t' || c.code == '\r');
    if (space) {
      blank = true;
      word = 0;
    } else {
      if (blank && !out.empty()) out += ' ';
      blank = false;
      if (word > 2 * kWord && word % kWord == 0) out += "\\allowbreak{}";
      out += shown(text, at, c);
      ++word;
    }
    at += c.length;
  }
  return out;
}

std::string latex_code(std::string_view text, std::size_t limit) {
  std::string out = "\\texttt{";
  std::size_t unbroken = 0;
  std::size_t count = 0;
  for (std::size_t at = 0; at < text.size(); ++count) {
    if (count >= limit) {
      out += "\\ldots";
      break;
    }
    const claim::Character c = claim::decode(text, at);
    const bool space = c.valid && c.code == ' ';
    out += space ? " " : code_character(text, at, c);
    ++unbroken;
    if (space || breaks_behind(text[at]) || unbroken >= 2 * kWord) {
      if (!space) out += "\\allowbreak{}";
      unbroken = 0;
    }
    at += c.length;
  }
  return out + "}";
}

}  // namespace sumwright::writers
