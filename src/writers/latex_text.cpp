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
      return "{\\normalfont\\textbackslash}";
    case '{':
    case '}':
    case '&':
    case '%':
    case '#':
    case '_':
      return std::string("\\") + c;
    case '$':
      return "{\\normalfont\\$}";
    case '^':
      return "{\\normalfont\\textasciicircum}";
    case '~':
      return "{\\normalfont\\textasciitilde}";
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

// Bytes up to the next blank.
[[nodiscard]] std::size_t word_length(std::string_view text, std::size_t at) {
  return std::min(text.find_first_of(" \n\t\r", at), text.size()) - at;
}

}  // namespace

bool has_long_word(std::string_view text) {
  for (std::size_t at = 0; at < text.size(); at += word_length(text, at) + 1) {
    if (word_length(text, at) > 2 * kWord) return true;
  }
  return false;
}

std::string latex_text(std::string_view text, std::size_t limit) {
  std::string out;
  std::size_t word = 0;
  std::size_t count = 0;
  bool blank = false;
  bool long_word = false;
  for (std::size_t at = 0; at < text.size(); ++count) {
    if (count >= limit) return out + "\\ldots{}";
    const claim::Character c = claim::decode(text, at);
    const bool space =
        c.valid && (c.code == ' ' || c.code == '\n' || c.code == '\t' || c.code == '\r');
    if (space) {
      blank = true;
      word = 0;
    } else {
      if (blank && !out.empty()) out += ' ';
      blank = false;
      if (word == 0) long_word = word_length(text, at) > 2 * kWord;
      if (long_word && word > 0 && word % kWord == 0) out += "\\allowbreak{}";
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
