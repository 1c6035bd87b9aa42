// Factorials, powers and interval products as formulas; products of them as fractions.
//
// rfact stands below the fraction bar, ip(a; i, j) is printed as the rising factorial of a + i with
// j - i factors.
#include <fmt/format.h>

#include <algorithm>

#include "writers/latex_values.hpp"
#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

constexpr double kScript = 0.75;    // size of exponents
constexpr double kWidestAtom = 16;  // wider ones may be broken

[[nodiscard]] proof::Affine difference(const proof::Affine& a, const proof::Affine& b) {
  proof::Affine out = a;
  out.coefficients.resize(std::max(a.coefficients.size(), b.coefficients.size()), 0);
  for (std::size_t i = 0; i < b.coefficients.size(); ++i) out.coefficients[i] -= b.coefficients[i];
  out.constant -= b.constant;
  return out;
}

[[nodiscard]] bool is_zero(const proof::Affine& a) {
  return a.constant == 0 &&
         std::all_of(a.coefficients.begin(), a.coefficients.end(), [](long c) { return c == 0; });
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
  Formula out = width_of(base) > kWidestAtom ? base : unbroken(base);
  const Formula exponent = affine(length);
  append_tex(out, "^{\\overline{" + inline_tex(exponent) + "}}",
             kScript * width_of(exponent) + 0.1);
  return out;
}

Formula LatexValues::power(const proof::Atom& value) {
  std::size_t which = 0;
  mpz_class number;
  const bool bare = writers::is_symbol(value.base, &which) ||
                    (writers::is_integer(value.base, &number) && number >= 0);
  Formula base = polynomial(value.base);
  if (!bare) base = bracketed(base);
  Formula out = width_of(base) > kWidestAtom ? base : unbroken(base);
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
      return width_of(argument) > kWidestAtom ? argument : unbroken(argument);
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
  const bool reciprocal = value.kind == proof::AtomKind::reciprocal;
  Formula next = reciprocal ? factor(value.base, static_cast<long>(exponent)) : atom(value);
  if (!reciprocal && exponent != 1) {
    const bool nested = value.kind == proof::AtomKind::power ||
                        value.kind == proof::AtomKind::interval_product ||
                        value.kind == proof::AtomKind::reciprocal_interval_product;
    if (nested) next = bracketed(next);
    const std::string text = std::to_string(exponent);
    append_tex(next, "^{" + text + "}", kScript * digits_width(text));
  }
  multiply(below ? out.below : out.above, next, true);
}

Formula LatexValues::product(const proof::Product& value) {
  if (value.coefficient.constant == 0) return piece("0", 0.52);
  if (value.atoms.empty()) return factored(value.coefficient);
  Fraction fraction;
  for (const auto& [atom, exponent] : value.atoms) add_atom(fraction, atom, exponent);
  const bool alone =
      value.atoms.size() == 1 || (value.atoms.size() == 2 && !fraction.above.empty());
  for (const auto& [atom, exponent] : value.atoms) {  // a sum alone below needs no brackets
    if (alone && exponent == 1 && atom.kind == proof::AtomKind::reciprocal) {
      fraction.below = unbroken(polynomial(atom.base));
    }
  }
  proof::Factored coefficient = value.coefficient;
  coefficient.constant = abs(coefficient.constant);
  Formula out;
  if (fraction.above.empty() && coefficient.constant.get_den() == 1) {
    fraction.above = factored(coefficient);  // one fraction
  } else {
    if (fraction.above.empty()) fraction.above = piece("1", 0.52);
    if (coefficient.constant != 1 || !coefficient.factors.empty()) {
      out = factored(coefficient, false);
    }
  }
  const double width = std::max(width_of(fraction.above), width_of(fraction.below)) + 0.4;
  if (fraction.below.empty()) {
    multiply(out, fraction.above);
  } else if (width <= kNumberedRoom - 9) {
    multiply(out,
             piece("\\frac{" + inline_tex(fraction.above) + "}{" + inline_tex(fraction.below) + "}",
                   width),
             true);
  } else {  // too wide for a bar
    multiply(out, out.empty() && is_sum(coefficient) ? bracketed(fraction.above) : fraction.above);
    divide(out, bracketed(fraction.below));
  }
  if (value.coefficient.constant < 0) prepend_tex(out, "-", 0.8);
  return out;
}

}  // namespace sumwright::writers
