// From `linear form >= 0` to `left <= right` with positive terms on both sides.
//
// Invariant: what is not taken apart completely comes out unchanged.
#include "cli/readable.hpp"

#include <algorithm>
#include <optional>
#include <vector>

namespace sumwright::cli {

namespace {

struct Term {
  bool negative = false;
  std::string_view text;  // `k`, `2*n`, `5`
};

[[nodiscard]] bool is_digit(char c) { return c >= '0' && c <= '9'; }

// A number, a name, or number*name.
[[nodiscard]] bool is_plain(std::string_view text) {
  const auto letter = [](char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || is_digit(c) || c == '_';
  };
  const std::size_t star = std::min(text.find('*'), text.size());
  const std::string_view name = star < text.size() ? text.substr(star + 1) : text;
  const std::string_view number = star < text.size() ? text.substr(0, star) : std::string_view("1");
  return !name.empty() && !number.empty() && std::all_of(name.begin(), name.end(), letter) &&
         std::all_of(number.begin(), number.end(), is_digit);
}

[[nodiscard]] bool is_number(std::string_view text) {
  return std::all_of(text.begin(), text.end(), is_digit);
}

// The terms of `-a + b - c`; nothing for any other text.
[[nodiscard]] std::optional<std::vector<Term>> terms_of(std::string_view text) {
  std::vector<Term> out;
  bool negative = text.starts_with('-');
  if (negative) text.remove_prefix(1);
  while (true) {
    const std::size_t end = std::min(text.find(' '), text.size());
    out.push_back({negative, text.substr(0, end)});
    if (!is_plain(out.back().text)) return std::nullopt;
    text.remove_prefix(end);
    if (text.empty()) return out;
    if (!text.starts_with(" + ") && !text.starts_with(" - ")) return std::nullopt;
    negative = text[1] == '-';
    text.remove_prefix(3);
  }
}

void append(std::string& out, const Term& term) {
  if (out.empty()) {
    out = (term.negative ? "-" : "") + std::string(term.text);
  } else {
    out += (term.negative ? " - " : " + ") + std::string(term.text);
  }
}

// The inequality `form >= 0`, its form given; nothing when the form is to stay as it is.
[[nodiscard]] std::optional<std::string> readable(std::string_view form) {
  const auto terms = terms_of(form);
  if (!form.starts_with('-') || !terms || is_number(terms->front().text)) return std::nullopt;
  std::string left;
  std::string right;
  for (const Term& term : *terms) {
    const bool moves = term.negative && !is_number(term.text);
    append(moves ? left : right, {term.negative && !moves, term.text});
  }
  return left + " <= " + (right.empty() ? "0" : right);
}

// Where the linear form starts that ends where the text does.
[[nodiscard]] std::size_t form_start(std::string_view text) {
  std::size_t end = text.size();
  while (true) {
    const std::size_t blank = text.rfind(' ', end - 1);
    const std::size_t start = blank == std::string_view::npos ? 0 : blank + 1;
    const bool more =
        start >= 3 && (text.substr(start - 3, 3) == " + " || text.substr(start - 3, 3) == " - ");
    if (!more) return start;
    end = start - 3;
    if (end == 0) return start;
  }
}

}  // namespace

std::string readable_inequalities(std::string_view text) {
  constexpr std::string_view sign = " >= 0";
  std::string out;
  while (true) {
    const std::size_t at = text.find(sign);
    if (at == std::string_view::npos || at == 0) return out + std::string(text);
    const std::size_t next = at + sign.size();
    const bool whole = next == text.size() || text[next] == ' ' || text[next] == ',' ||
                       text[next] == ';' || text[next] == ')';
    const std::size_t start = form_start(text.substr(0, at));
    const auto better = whole ? readable(text.substr(start, at - start)) : std::nullopt;
    out +=
        better ? std::string(text.substr(0, start)) + *better : std::string(text.substr(0, next));
    text.remove_prefix(next);
  }
}

}  // namespace sumwright::cli
