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

constexpr double kScript = 0.75;     // size of exponents
constexpr double kLongest = 700;     // em of one polynomial: most of a page
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

[[nodiscard]] bool shorter(const std::string& a, const std::string& b) {
  return a.size() < b.size();
}

}  // namespace

Formula integer_formula(const mpz_class& value) {
  const std::string digits = value.get_str();
  Formula out;
  for (std::size_t at = 0; at < digits.size(); at += kDigits) {
    const std::string part = digits.substr(at, kDigits);
    out.push_back({part, digits_width(part), at == 0 ? 0 : 9});
  }
  return out;
}

Piece LatexValues::symbol(std::size_t position) const {
  const std::string& name = symbols_[position].name;
  if (names_.is_symbol(name)) return names_.symbol(name);
  return {"\\mathit{?}", 1};
}

Formula LatexValues::monomial(const proof::Monomial& value) const {
  Formula out;
  bool powers = false;
  for (const unsigned long e : value.exponents) powers = powers || e != 0;
  const bool written = !powers || abs(value.coefficient) != 1;
  if (written) out = integer_formula(abs(value.coefficient));
  bool word = false;  // what stands last is one
  for (std::size_t i = 0; i < value.exponents.size(); ++i) {
    if (value.exponents[i] == 0) continue;
    const Piece name = symbol(i);
    if (!out.empty() && (word || is_word(name.tex))) append_tex(out, "\\,", 0.2);
    word = is_word(name.tex);
    append_tex(out, name.tex, name.width);
    if (value.exponents[i] == 1) continue;
    const std::string exponent = std::to_string(value.exponents[i]);
    append_tex(out, "^{" + exponent + "}", kScript * digits_width(exponent));
  }
  if (value.coefficient < 0) prepend_tex(out, "-", 0.8);
  return out;
}

Formula LatexValues::shortened(const proof::Polynomial& value) const {
  constexpr std::size_t kFirst = 6;
  constexpr std::size_t kLast = 2;
  Formula out;
  for (std::size_t i = 0; i < value.terms.size(); ++i) {
    if (i >= kFirst && i + kLast < value.terms.size()) continue;
    if (i + kLast == value.terms.size()) append_term(out, piece("\\cdots", 1.3));
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
  if (width > std::min(kLongest, room_)) {
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
    Formula term;
    if (c != 1 && c != -1) term = integer_formula(abs(mpz_class(c)));
    if (!term.empty() && is_word(name.tex)) append_tex(term, "\\,", 0.2);
    append_tex(term, name.tex, name.width);
    if (c < 0) prepend_tex(term, "-", 0.8);
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
  const bool single = base.terms.size() == 1 && base.terms[0].coefficient > 0 && exponent == 1;
  Formula out = writers::is_symbol(base, &which) ? Formula{symbol(which)}
                : single                         ? monomial(base.terms[0])
                                                 : bracketed(polynomial(base));
  if (exponent != 1) {
    const std::string text = std::to_string(exponent);
    append_tex(out, "^{" + text + "}", kScript * digits_width(text));
  }
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
  const mpz_class numerator = abs(value.constant.get_num());
  const std::string denominator = value.constant.get_den().get_str();
  if (denominator != "1") {
    out = piece("\\tfrac{" + numerator.get_str() + "}{" + denominator + "}",
                0.75 * digits_width(std::max(numerator.get_str(), denominator, shorter)) + 0.5);
  } else if (value.factors.empty() || numerator != 1) {
    out = integer_formula(numerator);
  }
  for (const auto& [base, exponent] : value.factors) {
    if (out.size() == 1 && &base == &value.factors.front().first) {
      out = held(out, factor(base, exponent));  // the coefficient stays with the first factor
    } else {
      multiply(out, factor(base, exponent));
    }
  }
  if (value.constant < 0) prepend_tex(out, "-", 0.8);
  return out;
}

}  // namespace sumwright::writers
