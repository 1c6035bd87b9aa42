// TOML strings byte by byte, so that faults inside a string point into the file.
//
// The TOML parser gives values; this gives the place of each byte of a value. Both
// must agree: the caller compares the texts and trusts places only when they do.
#include "claim/toml_text.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::size_t kDeepestBrackets = 16;
constexpr std::size_t kDotsPerLine = 16;

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
    quote_ = text_[at_];
    several_lines_ = text_.substr(at_, 3) == std::string(3, quote_);
    at_ += several_lines_ ? 3 : 1;
    if (several_lines_) at_ += newline_length(at_);
    out_.place.offset = at_;
    while (at_ < text_.size()) {
      if (text_[at_] == quote_ && closes()) return std::move(out_);
      if (!step()) return std::nullopt;
    }
    return std::nullopt;
  }

  /// Just behind the closing delimiter, once read.
  [[nodiscard]] std::size_t end() const { return at_; }

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
      if (!several_lines_) return false;
      put("\n", newline);
      return true;
    }
    if (quote_ == '"' && text_[at_] == '\\') return escape();
    put(text_.substr(at_, 1), 1);
    return true;
  }

  [[nodiscard]] bool escape() {
    if (at_ + 1 >= text_.size()) return false;
    const char letter = text_[at_ + 1];
    constexpr std::string_view letters = "btnfr\"\\";
    constexpr std::string_view meanings = "\b\t\n\f\r\"\\";
    if (const std::size_t found = letters.find(letter); found != std::string_view::npos) {
      put(meanings.substr(found, 1), 2);
      return true;
    }
    if (letter == 'u') return code_point(4);
    if (letter == 'U') return code_point(8);
    return several_lines_ && line_end();
  }

  [[nodiscard]] bool code_point(std::size_t digits) {
    const std::string_view hex = text_.substr(at_ + 2, digits);
    if (hex.size() < digits) return false;
    char32_t code = 0;
    for (const char digit : hex) {
      constexpr std::string_view values = "0123456789abcdef";
      const char lower =
          digit >= 'A' && digit <= 'F' ? static_cast<char>(digit - 'A' + 'a') : digit;
      const std::size_t value = values.find(lower);
      if (value == std::string_view::npos) return false;
      code = code * 16 + static_cast<char32_t>(value);
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
  MappedText out_;
};

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

void check_toml_nesting(const Source& source) {
  const std::string_view text = source.text;
  std::size_t depth = 0;
  std::size_t dots = 0;
  for (std::size_t at = 0; at < text.size(); ++at) {
    const char c = text[at];
    if (c == '"' || c == '\'') {
      StringReader reader(text, at);
      if (!reader.read()) return;  // not closed, or a wrong escape: the TOML parser stops there too
      at = reader.end() - 1;
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
    }
  }
}

}  // namespace sumwright::claim
