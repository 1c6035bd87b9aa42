// From polynomials and products of atoms to formulas in pieces.
//
// rfact stands below the fraction bar, ip(a; i, j) is printed as the rising factorial of a + i with
// j - i factors.
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

[[nodiscard]] proof::Affine difference(const proof::Affine& a, const proof::Affine& b) {
  proof::Affine out = a;
  out.coefficients.resize(std::max(a.coefficients.size(), b.coefficients.size()), 0);
  for (std::size_t i = 0; i < b.coefficients.size(); ++i) out.coefficients[i] -= b.coefficients[i];
  out.constant -= b.constant;
  return out;
}

[[nodiscard]] bool is_zero(const proof::Affine& a) {
  return a.constant == 0 && std::all_of(a.coefficients.begin(), a.coefficients.end(),
                                        [](long c) { return c == 0; });
}

// Short polynomials start with a positive term where they have one: 2k - 3n - 3.
[[nodiscard]] std::size_t leading_position(const proof::Polynomial& value) {
  if (value.terms.size() > 6) return 0;
  for (std::size_t i = 0; i < value.terms.size(); ++i) {
    if (value.terms[i].coefficient > 0) return i;
  }
  return 0;
}

// One symbol, or one nonnegative number: needs no brackets.
[[nodiscard]] bool is_simple(const proof::Affine& a) {
  long ones = 0;
  long others = 0;
  for (const long c : a.coefficients) {
    ones += c == 1 ? 1 : 0;
    others += c != 0 && c != 1 ? 1 : 0;
  }
  if (others > 0) return false;
  return ones == 0 ? a.constant >= 0 : ones == 1 && a.constant == 0;
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
  if (out.empty() && value.constant > 0) append_term(out, integer_formula(mpz_class(value.constant)));
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
  Formula out = writers::is_symbol(base, &which) ? Formula{symbol(which)} : bracketed(polynomial(base));
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

Formula LatexValues::interval(const proof::Atom& value) {
  proof::Affine length = difference(value.high, value.low);
  Formula base;
  mpz_class number;
  const bool numeric = writers::is_integer(value.base, &number) && value.base_scale == 1;
  proof::Affine low = value.low;
  if (numeric && number.fits_slong_p()) {
    low.constant += number.get_si();
    base = affine(low);
    if (!is_simple(low)) base = bracketed(base);
  } else {
    Formula top = polynomial(value.base);
    if (value.base_scale != 1) {
      const std::string scale = value.base_scale.get_str();
      top = piece("\\tfrac{" + inline_tex(top) + "}{" + scale + "}", 0.8 * width_of(top) + 0.4);
    }
    const bool bare = top.size() == 1 && is_zero(low);
    if (!is_zero(low)) append_term(top, affine(low));
    base = bare && value.base_scale == 1 ? top : bracketed(top);
  }
  Formula out = piece(inline_tex(base), width_of(base));
  const Formula exponent = affine(length);
  append_tex(out, "^{\\overline{" + inline_tex(exponent) + "}}", kScript * width_of(exponent) + 0.1);
  return out;
}

Formula LatexValues::power(const proof::Atom& value) {
  std::size_t which = 0;
  mpz_class number;
  const bool bare = writers::is_symbol(value.base, &which) ||
                    (writers::is_integer(value.base, &number) && number >= 0);
  Formula base = polynomial(value.base);
  if (!bare) base = bracketed(base);
  Formula out = piece(inline_tex(base), width_of(base));
  const Piece exponent = script("^", affine(value.argument));
  append_tex(out, exponent.tex, exponent.width);
  return out;
}

Formula LatexValues::atom(const proof::Atom& value) {
  switch (value.kind) {
    case proof::AtomKind::factorial:
    case proof::AtomKind::reciprocal_factorial: {
      Formula argument = affine(value.argument);
      if (!is_simple(value.argument)) argument = bracketed(argument);
      append_tex(argument, "!", 0.3);
      return piece(inline_tex(argument), width_of(argument));
    }
    case proof::AtomKind::power:
      return power(value);
    case proof::AtomKind::interval_product:
    case proof::AtomKind::reciprocal_interval_product:
      return interval(value);
    case proof::AtomKind::reciprocal:
      break;
  }
  return bracketed(polynomial(value.base));
}

void LatexValues::add_atom(Fraction& out, const proof::Atom& value, unsigned exponent) {
  const bool below = value.kind == proof::AtomKind::reciprocal_factorial ||
                     value.kind == proof::AtomKind::reciprocal_interval_product ||
                     value.kind == proof::AtomKind::reciprocal;
  Formula next = atom(value);
  if (exponent != 1) {
    const bool nested = value.kind == proof::AtomKind::power ||
                        value.kind == proof::AtomKind::interval_product ||
                        value.kind == proof::AtomKind::reciprocal_interval_product;
    if (nested) next = bracketed(next);
    const std::string text = std::to_string(exponent);
    append_tex(next, "^{" + text + "}", kScript * digits_width(text));
  }
  Formula& side = below ? out.below : out.above;
  if (!side.empty()) append_tex(side, "\\,", 0.2);
  append(side, next);
  side.back().product = true;
}

Formula LatexValues::product(const proof::Product& value) {
  if (value.coefficient.constant == 0) return piece("0", 0.52);
  Fraction fraction;
  for (const auto& [atom, exponent] : value.atoms) add_atom(fraction, atom, exponent);
  Formula out;
  const bool unit = value.coefficient.factors.empty() && abs(value.coefficient.constant) == 1;
  if (!unit || value.atoms.empty()) {
    out = factored(value.coefficient, value.atoms.empty());
    if (value.atoms.empty()) return out;
  } else if (value.coefficient.constant < 0) {
    out = piece("-", 0.8);
  }
  if (fraction.below.empty()) {
    Formula above = fraction.above;
    if (!out.empty() && !unit) prepend_tex(above, "\\cdot ", 0.8);
    append(out, above);
    return out;
  }
  if (fraction.above.empty()) fraction.above = piece("1", 0.52);
  const double width = std::max(width_of(fraction.above), width_of(fraction.below)) + 0.4;
  if (width <= kNumberedRoom - 9) {
    if (!out.empty() && !unit) append_tex(out, "\\,", 0.2);
    append(out, piece("\\frac{" + inline_tex(fraction.above) + "}{" + inline_tex(fraction.below) + "}", width));
    return out;
  }
  Formula wide = fraction.above;  // too wide for a bar
  append_tex(wide, "\\,\\bigm/", 1);
  append(wide, bracketed(fraction.below), 0);
  if (!out.empty() && !unit) prepend_tex(wide, "\\cdot ", 0.8);
  append(out, wide);
  return out;
}

}  // namespace sumwright::writers
