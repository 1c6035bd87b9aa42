// From polynomials and affine forms to formulas in pieces.
//
// Polynomials keep the order of their terms, short ones start with a positive term; long ones are
// shown in full while they fit the room that is left for them.
#include "writers/latex_values.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>

#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

constexpr double kPlus = 1.25;       // a binary sign with its spaces
constexpr double kScript = 0.75;     // size of exponents
constexpr double kWholePage = 1300;  // em on one page
constexpr double kShort = 100;       // polynomials below are always shown
constexpr std::size_t kDigits = 24;  // digits kept together

// Short polynomials start with a positive term where they have one: 2k - 3n - 3.
[[nodiscard]] std::size_t leading_position(const proof::Polynomial& value) {
  if (value.terms.size() > 6) return 0;
  for (std::size_t i = 0; i < value.terms.size(); ++i) {
    if (value.terms[i].coefficient > 0) return i;
  }
  return 0;
}

}  // namespace

bool starts_with_minus(const Formula& formula) {
  return !formula.empty() && !formula.front().tex.empty() && formula.front().tex[0] == '-';
}

void append_term(Formula& out, const Formula& more) {
  Formula term = more;
  if (!term.empty()) term.front().product = false;
  if (!out.empty() && !starts_with_minus(term)) prepend_tex(term, "+", kPlus);
  append(out, term);
}

Piece script(const std::string& mark, const Formula& formula) {
  return {mark + "{" + inline_tex(formula) + "}", kScript * width_of(formula) + 0.05, 0, false};
}

Formula integer_formula(const mpz_class& value) {
  const std::string digits = value.get_str();
  Formula out;
  for (std::size_t at = 0; at < digits.size(); at += kDigits) {
    const std::string part = digits.substr(at, kDigits);
    out.push_back({part, digits_width(part), at == 0 ? 0 : 9, false});
  }
  return out;
}

Piece LatexValues::symbol(std::size_t position) const {
  const std::string& name = symbols_[position].name;
  if (names_.is_symbol(name)) return names_.symbol(name);
  return {"\\mathit{?}", 1, 0, false};
}

Formula LatexValues::monomial(const proof::Monomial& value) const {
  Formula out;
  bool powers = false;
  for (const unsigned long e : value.exponents) powers = powers || e != 0;
  if (!powers || abs(value.coefficient) != 1) {
    out = integer_formula(value.coefficient);
  } else if (value.coefficient < 0) {
    out = piece("-", 0.8);
  } else {
    out = piece("", 0);
  }
  for (std::size_t i = 0; i < value.exponents.size(); ++i) {
    if (value.exponents[i] == 0) continue;
    const Piece name = symbol(i);
    append_tex(out, name.tex, name.width);
    if (value.exponents[i] == 1) continue;
    const std::string exponent = std::to_string(value.exponents[i]);
    append_tex(out, "^{" + exponent + "}", kScript * digits_width(exponent));
  }
  return out;
}

Formula LatexValues::shortened(const proof::Polynomial& value) const {
  constexpr std::size_t kFirst = 6;
  constexpr std::size_t kLast = 2;
  Formula out;
  for (std::size_t i = 0; i < value.terms.size(); ++i) {
    if (i >= kFirst && i + kLast < value.terms.size()) continue;
    if (i + kLast == value.terms.size()) append(out, piece("+\\cdots", 2.5));
    append_term(out, monomial(value.terms[i]));
  }
  return out;
}

Formula LatexValues::polynomial(const proof::Polynomial& value) {
  if (value.terms.empty()) return piece("0", 0.52);
  const std::size_t first = leading_position(value);
  Formula out = monomial(value.terms[first]);
  for (std::size_t i = 0; i < value.terms.size(); ++i) {
    if (i != first) append_term(out, monomial(value.terms[i]));
  }
  const double width = width_of(out);
  if (width <= kShort || value.terms.size() <= 8) return out;
  if (width > std::min(kWholePage, room_)) {
    ++abbreviated_;
    return shortened(value);
  }
  room_ -= width;
  return out;
}

Formula LatexValues::affine(const proof::Affine& value) const {
  Formula out;
  const auto add = [&](long c, std::size_t position) {
    const Piece name = symbol(position);
    Formula term = c == 1    ? piece("", 0)
                   : c == -1 ? piece("-", 0.8)
                             : integer_formula(mpz_class(c));
    append_tex(term, name.tex, name.width);
    append_term(out, term);
  };
  // Positive parts first, so that 1 - k does not start with a sign.
  for (std::size_t i = 0; i < value.coefficients.size(); ++i) {
    if (value.coefficients[i] > 0) add(value.coefficients[i], i);
  }
  if (out.empty() && value.constant > 0)
    append_term(out, integer_formula(mpz_class(value.constant)));
  const bool constant_done = !out.empty() && value.constant > 0 &&
                             std::none_of(value.coefficients.begin(), value.coefficients.end(),
                                          [](long c) { return c > 0; });
  for (std::size_t i = 0; i < value.coefficients.size(); ++i) {
    if (value.coefficients[i] < 0) add(value.coefficients[i], i);
  }
  if ((value.constant != 0 && !constant_done) || out.empty()) {
    append_term(out, integer_formula(mpz_class(value.constant)));
  }
  return out;
}

Formula LatexValues::factor(const proof::Polynomial& base, long exponent) {
  std::size_t which = 0;
  Formula out =
      writers::is_symbol(base, &which) ? Formula{symbol(which)} : bracketed(polynomial(base));
  if (exponent != 1) {
    const std::string text = std::to_string(exponent);
    append_tex(out, "^{" + text + "}", kScript * digits_width(text));
  }
  out.front().product = true;
  return out;
}

bool LatexValues::is_sum(const proof::Factored& value) {
  return value.constant != 0 && value.factors.size() == 1 && value.factors[0].second == 1 &&
         abs(value.constant) == 1 && value.factors[0].first.terms.size() > 1;
}

Formula LatexValues::factored(const proof::Factored& value, bool as_sum) {
  if (value.constant == 0) return piece("0", 0.52);
  if (as_sum && is_sum(value) && value.constant == 1) return polynomial(value.factors[0].first);
  Formula out;
  const mpz_class& numerator = value.constant.get_num();
  if (value.constant.get_den() != 1) {
    const mpz_class absolute = abs(numerator);
    const std::string text = fmt::format("{}\\tfrac{{{}}}{{{}}}", numerator < 0 ? "-" : "",
                                         absolute.get_str(), value.constant.get_den().get_str());
    out = piece(text, digits_width(absolute.get_str()) + 1);
  } else if (value.factors.empty() || abs(numerator) != 1) {
    out = integer_formula(numerator);
  } else {
    out = piece(numerator < 0 ? "-" : "", numerator < 0 ? 0.8 : 0);
  }
  bool first = true;
  for (const auto& [base, exponent] : value.factors) {
    Formula next = factor(base, exponent);
    if (first) {  // the coefficient stays with the first factor
      prepend_tex(next, inline_tex(out), width_of(out));
      if (widest(out) < width_of(out)) {
        next = factor(base, exponent);
        append(out, next, 1);
        next = out;
      }
      out = next;
      first = false;
    } else {
      append(out, next, 1);
      for (std::size_t i = out.size() - next.size(); i < out.size(); ++i) {
        if (i > out.size() - next.size()) ++out[i].depth;
      }
    }
  }
  return out;
}

}  // namespace sumwright::writers
