// TOML strings byte by byte, so that faults inside a string point into the file.
//
// The TOML parser gives values; this gives the place of each byte of a value. Both
// must agree: the caller compares the texts and trusts places only when they do. Faults of
// strings are found here, since here they have places.
#include "claim/toml_text.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::size_t kDeepestBrackets = 16;
constexpr std::size_t kDotsPerLine = 16;
constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

void append_utf8(std::string& out, char32_t code) {
  const auto put = [&out](char32_t byte) {
    out += static_cast<char>(static_cast<unsigned char>(byte));
  };
  if (code < 0x80) {
    put(code);
  } else if (code < 0x800) {
    put(0xC0U | (code >> 6U));
    put(0x80U | (code & 0x3FU));
  } else if (code < 0x10000) {
    put(0xE0U | (code >> 12U));
    put(0x80U | ((code >> 6U) & 0x3FU));
    put(0x80U | (code & 0x3FU));
  } else {
    put(0xF0U | (code >> 18U));
    put(0x80U | ((code >> 12U) & 0x3FU));
    put(0x80U | ((code >> 6U) & 0x3FU));
    put(0x80U | (code & 0x3FU));
  }
}

// Reads one literal; the current byte is text_[at_].
class StringReader {
 public:
  StringReader(std::string_view text, std::size_t offset) : text_(text), at_(offset) {}

  [[nodiscard]] std::optional<MappedText> read() {
    if (at_ >= text_.size() || (text_[at_] != '"' && text_[at_] != '\'')) return std::nullopt;
    start_ = at_;
    quote_ = text_[at_];
    several_lines_ = text_.substr(at_, 3) == std::string(3, quote_);
    at_ += several_lines_ ? 3 : 1;
    if (several_lines_) at_ += newline_length(at_);
    out_.place.offset = at_;
    while (at_ < text_.size()) {
      if (text_[at_] == quote_ && closes()) return std::move(out_);
      if (!step()) return std::nullopt;
    }
    (void)fail({start_, 1}, "this string is not closed");
    return std::nullopt;
  }

  /// Just behind the closing delimiter, once read.
  [[nodiscard]] std::size_t end() const { return at_; }

  /// Where and why reading failed.
  [[nodiscard]] Place fault_place() const { return fault_place_; }
  [[nodiscard]] std::string_view fault() const { return fault_; }

 private:
  [[nodiscard]] std::size_t newline_length(std::size_t at) const {
    if (text_.substr(at, 1) == "\n") return 1;
    return text_.substr(at, 2) == "\r\n" ? 2 : 0;
  }

  void put(std::string_view bytes, std::size_t length) {
    out_.text += bytes;
    out_.units.insert(out_.units.end(), bytes.size(), {at_, length});
    at_ += length;
  }

  // Up to two quotes may stand directly before the three that close.
  [[nodiscard]] bool closes() {
    std::size_t run = 1;
    while (several_lines_ && run < 5 && text_.substr(at_ + run, 1) == std::string(1, quote_)) ++run;
    if (several_lines_ && run < 3) return false;
    while (several_lines_ && run > 3) {
      put(std::string_view(&quote_, 1), 1);
      --run;
    }
    out_.place.length = at_ - out_.place.offset;
    at_ += run;
    return true;
  }

  [[nodiscard]] bool step() {
    if (const std::size_t newline = newline_length(at_); newline > 0) {
      if (!several_lines_) return fail({start_, 1}, "this string is not closed on its line");
      put("\n", newline);
      return true;
    }
    if (quote_ == '"' && text_[at_] == '\\') return escape();
    put(text_.substr(at_, 1), 1);
    return true;
  }

  bool fail(Place place, std::string_view message) {
    fault_place_ = place;
    fault_ = message;
    return false;
  }

  [[nodiscard]] bool escape() {
    if (at_ + 1 >= text_.size()) return fail({start_, 1}, "this string is not closed");
    const char letter = text_[at_ + 1];
    constexpr std::string_view letters = "btnfr\"\\";
    constexpr std::string_view meanings = "\b\t\n\f\r\"\\";
    if (const std::size_t found = letters.find(letter); found != std::string_view::npos) {
      put(meanings.substr(found, 1), 2);
      return true;
    }
    if (letter == 'u') return code_point(4);
    if (letter == 'U') return code_point(8);
    if (several_lines_ && line_end()) return true;
    return fail({at_, 1 + decode(text_, at_ + 1).length}, "unknown escape in a string");
  }

  [[nodiscard]] bool code_point(std::size_t digits) {
    const std::string_view hex = text_.substr(at_ + 2, digits);
    char32_t code = 0;
    std::size_t read = 0;
    for (; read < hex.size(); ++read) {
      constexpr std::string_view values = "0123456789abcdef";
      const char c = hex[read];
      const char lower = c >= 'A' && c <= 'F' ? static_cast<char>(c - 'A' + 'a') : c;
      const std::size_t value = values.find(lower);
      if (value == std::string_view::npos) break;
      code = code * 16 + static_cast<char32_t>(value);
    }
    const Place place = {at_, 2 + read};
    if (read < digits) return fail(place, "\\u takes four hexadecimal digits, and \\U eight");
    if (code > 0x10FFFF || (code >= 0xD800 && code <= 0xDFFF)) {
      return fail(place, "this escape is no Unicode character");
    }
    std::string bytes;
    append_utf8(bytes, code);
    put(bytes, digits + 2);
    return true;
  }

  // A backslash at the end of a line swallows the blanks and line breaks that follow.
  [[nodiscard]] bool line_end() {
    const std::size_t line = text_.find_first_not_of(" \t", at_ + 1);
    if (line == std::string_view::npos || newline_length(line) == 0) return false;
    at_ = std::min(text_.find_first_not_of(" \t\r\n", line), text_.size());
    return true;
  }

  std::string_view text_;
  std::size_t at_;
  char quote_ = '"';
  bool several_lines_ = false;
  std::size_t start_ = 0;
  MappedText out_;
  Place fault_place_;
  std::string_view fault_;
};

// Just behind the string that starts at `at`.
[[nodiscard]] std::size_t string_end(const Source& source, std::size_t at) {
  StringReader reader(source.text, at);
  if (reader.read()) return reader.end();
  std::string_view note;
  if (reader.fault_place().offset != at) {
    note = "in \"...\" a backslash starts an escape; in '...' it stands for itself";
  }
  throw InputError(source, reader.fault_place(), reader.fault(), note);
}

}  // namespace

Place MappedText::span(std::size_t begin, std::size_t end) const {
  if (begin >= units.size()) {
    if (units.empty()) return {place.offset, 0};
    return {units.back().offset + units.back().length, 0};
  }
  end = std::clamp(end, begin, units.size());
  if (end == begin) return {units[begin].offset, 0};
  const std::size_t last = units[end - 1].offset + units[end - 1].length;
  return {units[begin].offset, last - units[begin].offset};
}

MappedText plain_text(const Source& source, Place where) {
  MappedText out;
  const std::size_t begin = std::min(where.offset, source.text.size());
  out.text = source.text.substr(begin, where.length);
  out.place = {begin, out.text.size()};
  out.units.reserve(out.text.size());
  for (std::size_t i = 0; i < out.text.size(); ++i) out.units.push_back({begin + i, 1});
  return out;
}

std::optional<MappedText> string_literal(std::string_view text, std::size_t offset) {
  return StringReader(text, offset).read();
}

void check_toml_text(const Source& source) {
  const std::string_view text = source.text;
  std::size_t depth = 0;
  std::size_t dots = 0;
  const std::size_t start = text.starts_with(kByteOrderMark) ? kByteOrderMark.size() : 0;
  for (std::size_t at = start; at < text.size(); ++at) {
    const char c = text[at];
    if (c == '"' || c == '\'') {
      at = string_end(source, at) - 1;
    } else if (c == '#') {
      at = std::min(text.find('\n', at), text.size()) - 1;
    } else if (c == '\n') {
      dots = 0;
    } else if (c == '[' || c == '{') {
      if (++depth > kDeepestBrackets) {
        throw InputError(source, {at, 1},
                         fmt::format("brackets nested deeper than {}", kDeepestBrackets));
      }
    } else if ((c == ']' || c == '}') && depth > 0) {
      --depth;
    } else if (c == '.' && ++dots > kDotsPerLine) {
      throw InputError(source, {at, 1},
                       fmt::format("more than {} dots outside strings in one line", kDotsPerLine));
    } else if (static_cast<unsigned char>(c) >= 0x80) {
      const std::size_t length = decode(text, at).length;
      throw InputError(source, {at, length},
                       fmt::format("{} may stand only in strings and comments",
                                   in_quotes(text.substr(at, length))));
    }
  }
}

std::string ascii_shadow(std::string_view text) {
  std::string out;
  out.reserve(text.size());
  std::size_t at = text.starts_with(kByteOrderMark) ? kByteOrderMark.size() : 0;
  while (at < text.size()) {
    const std::size_t length = decode(text, at).length;
    out += static_cast<unsigned char>(text[at]) < 0x80 ? text[at] : '?';
    at += length;
  }
  return out;
}

}  // namespace sumwright::claim
