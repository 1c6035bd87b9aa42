// Why a polynomial is nonzero on a region: factor by factor, each by one of the methods that an
// assistant can replay (proof::NonzeroFactor::Method).

#include <fmt/format.h>

#include "term/conversion.hpp"
#include "term/setting.hpp"

namespace sumwright::term {

using algebra::Polynomial;
using proof::NonzeroFactor;
using proof::SymbolKind;

namespace {

bool uses_rational(const Setting& setting, const Polynomial& p) {
  for (std::size_t i = 0; i < setting.size(); ++i)
    if (!setting.is_integer(i) && p.depends_on(i)) return true;
  return false;
}

/// After symbol := symbol + lower bound all coefficients have one sign and the constant is not 0.
std::optional<NonzeroFactor> positive(const Setting& setting, const Facts& facts,
                                      const Polynomial& p) {
  NonzeroFactor out;
  out.method = NonzeroFactor::Method::positive;
  out.shift.assign(setting.size(), 0);
  Polynomial shifted = p;
  for (std::size_t i = 0; i < setting.size(); ++i) {
    if (!p.depends_on(i)) continue;
    const std::optional<long> bound = facts.lower_bound(Affine::symbol(setting.size(), i));
    if (!bound) return std::nullopt;
    out.shift[i] = *bound;
    shifted = shifted.shift(i, *bound);
  }
  int sign = 0;
  bool constant = false;
  for (const algebra::Monomial& m : shifted.to_terms()) {
    const int s = sgn(m.coefficient);
    if (sign != 0 && s != sign) return std::nullopt;
    sign = s;
    constant = true;
    for (unsigned long e : m.exponents) constant = constant && e == 0;
  }
  if (!constant) return std::nullopt;
  out.negated = sign < 0;
  out.shifted = plain(sign < 0 ? -shifted : shifted);
  return out;
}

bool word_excludes(claim::Exclusion::Kind kind, const Facts& facts, const Affine& value) {
  using Kind = claim::Exclusion::Kind;
  switch (kind) {
    case Kind::constant:
      return false;
    case Kind::integers:
      return true;
    case Kind::positive_integers:
      return facts.implies(value - 1);
    case Kind::negative_integers:
      return facts.implies(-value - 1);
    case Kind::nonnegative_integers:
      return facts.implies(value);
    case Kind::nonpositive_integers:
      return facts.implies(-value);
  }
  return false;
}

/// p = scale * (x - value) with value excluded for the rational parameter x.
std::optional<NonzeroFactor> excluded(const Setting& setting, const Facts& facts,
                                      const Polynomial& p) {
  if (p.total_degree() != 1) return std::nullopt;
  Affine form;
  if (!to_affine(p, form)) return std::nullopt;
  std::optional<std::size_t> x;
  for (std::size_t i = 0; i < setting.size(); ++i) {
    if (setting.is_integer(i) || form.coefficients[i] == 0) continue;
    if (x) return std::nullopt;
    x = i;
  }
  if (!x) return std::nullopt;
  const long scale = form.coefficients[*x];
  Affine rest = form;
  rest.coefficients[*x] = 0;
  bool divisible = rest.constant % scale == 0;
  for (long c : rest.coefficients) divisible = divisible && c % scale == 0;
  const auto& entries = setting.claim->parameters.at(*x - 2).excluded;
  for (std::size_t e = 0; e < entries.size(); ++e) {
    NonzeroFactor out;
    out.method = NonzeroFactor::Method::excluded;
    out.parameter = *x;
    out.exclusion = e;
    out.scale = scale;
    if (entries[e].kind == claim::Exclusion::Kind::constant) {
      mpq_class value(-rest.constant, scale);
      value.canonicalize();
      if (rest.is_constant() && value == entries[e].value) return out;
      continue;
    }
    if (!divisible) continue;
    Affine value = -rest;
    for (long& c : value.coefficients) c /= scale;
    value.constant /= scale;
    if (!word_excludes(entries[e].kind, facts, value)) continue;
    out.value = plain(value);
    return out;
  }
  return std::nullopt;
}

/// A polynomial as written: what cancels in a quotient may not be read off an assumption.
bool divides(const claim::Expression& e) {
  if (e.operation == claim::Operation::divide)
    return e.children[1]->operation != claim::Operation::literal;
  if (e.operation == claim::Operation::power &&
      e.children[1]->operation == claim::Operation::negate)
    return true;
  for (const claim::ExpressionPtr& c : e.children)
    if (divides(*c)) return true;
  return false;
}

/// An assumption u != v with u - v a constant multiple of p.
std::optional<NonzeroFactor> assumed(const Setting& setting, const Polynomial& p) {
  const auto& assumptions = setting.claim->assumptions;
  for (std::size_t i = 0; i < assumptions.size(); ++i) {
    if (assumptions[i].comparison != claim::Comparison::not_equal) continue;
    if (divides(*assumptions[i].left) || divides(*assumptions[i].right)) continue;
    const auto left = to_rational_function(setting, *assumptions[i].left);
    const auto right = to_rational_function(setting, *assumptions[i].right);
    if (!left || !right) continue;
    const algebra::RationalFunction difference = *left - *right;
    if (!difference.is_polynomial()) continue;
    const auto [scale, exact] = difference.numerator().divide(p);
    if (!exact || !scale.is_constant()) continue;
    NonzeroFactor out;
    out.method = NonzeroFactor::Method::assumed;
    out.assumption = i;
    out.scale = scale.constant();
    return out;
  }
  return std::nullopt;
}

std::optional<NonzeroFactor> reason(const Setting& setting, const Facts& facts,
                                    const Polynomial& p) {
  if (p.is_constant()) {
    NonzeroFactor out;
    out.method = NonzeroFactor::Method::constant;
    return out;
  }
  if (!uses_rational(setting, p)) {
    Affine form;
    if (to_affine(p, form) && facts.implies_nonzero(form)) {
      NonzeroFactor out;
      out.method = NonzeroFactor::Method::linear;
      return out;
    }
    if (auto out = positive(setting, facts, p)) return out;
  } else if (auto out = excluded(setting, facts, p)) {
    return out;
  }
  return assumed(setting, p);
}

}  // namespace

bool involves_rational_parameter(const Setting& setting, const Polynomial& polynomial) {
  return uses_rational(setting, polynomial);
}

std::optional<proof::Nonzero> decide_nonzero(const Setting& setting, const Facts& facts,
                                             const algebra::Factored& polynomial,
                                             std::string* undecided) {
  proof::Nonzero out;
  out.polynomial = plain(polynomial);
  if (polynomial.is_zero()) {
    if (undecided != nullptr) *undecided = "0";
    return std::nullopt;
  }
  for (const auto& [p, exponent] : polynomial.factors) {
    std::optional<NonzeroFactor> factor = reason(setting, facts, p);
    if (!factor) {
      if (undecided != nullptr) *undecided = p.to_string();
      return std::nullopt;
    }
    factor->factor = plain(p);
    factor->exponent = exponent;
    out.factors.push_back(*factor);
  }
  return out;
}

}  // namespace sumwright::term
