// From the atoms of a Proof to exact values.
//
// The meanings are those that the data's own comments give: rfact is 0 at negative integers, an
// interval product runs over i <= t < j. Symbols are positions of the point.
#include "audit/atoms.hpp"

#include <cstdlib>

namespace sumwright::audit {

long value_of(const proof::Affine& form, const Point& at) {
  numeric out = form.constant;
  for (std::size_t i = 0; i < form.coefficients.size(); ++i)
    if (form.coefficients[i] != 0) out = out + numeric(form.coefficients[i]) * at.values.at(i);
  return to_machine(out);
}

numeric value_of(const proof::Polynomial& polynomial, const Point& at) {
  std::vector<std::vector<numeric>> powers(at.values.size());
  numeric out = 0;
  for (const proof::Monomial& monomial : polynomial.terms) {
    numeric term = to_numeric(monomial.coefficient);
    for (std::size_t i = 0; i < monomial.exponents.size() && !term.is_zero(); ++i) {
      const std::size_t exponent = monomial.exponents[i];
      if (exponent == 0) continue;
      std::vector<numeric>& known = powers.at(i);
      if (known.empty()) known.emplace_back(1);
      while (known.size() <= exponent) known.push_back(known.back() * at.values[i]);
      term = term * known[exponent];
    }
    out = out + term;
  }
  return out;
}

Value value_of(const proof::Factored& factored, const Point& at) {
  Value out = Value::of(to_numeric(factored.constant));
  for (const auto& [factor, exponent] : factored.factors) {
    const numeric base = value_of(factor, at);
    if (exponent < 0 && base.is_zero()) return Value::divided_by_zero("a factor is 0");
    const numeric power = natural_power(base, std::labs(exponent));
    out = times(out, Value::of(exponent < 0 ? numeric(1) / power : power));
  }
  return out;
}

namespace {

Value interval_product(const proof::Atom& atom, const Point& at) {
  const long low = value_of(atom.low, at);
  const long high = value_of(atom.high, at);
  if (low > high) return Value::outside("an interval product of negative length");
  const numeric a = value_of(atom.base, at) / to_numeric(atom.base_scale);
  return Value::of(progression_product(a + numeric(low), 1, high - low));
}

Value inverted(const Value& value, const char* what) {
  if (!value.exists()) return value;
  if (value.number.is_zero()) return Value::divided_by_zero(what);
  return Value::of(numeric(1) / value.number);
}

}  // namespace

Value value_of(const proof::Atom& atom, const Point& at) {
  using proof::AtomKind;
  if (atom.kind == AtomKind::interval_product) return interval_product(atom, at);
  if (atom.kind == AtomKind::reciprocal_interval_product)
    return inverted(interval_product(atom, at), "the reciprocal of an interval product that is 0");
  if (atom.kind == AtomKind::reciprocal)
    return inverted(Value::of(value_of(atom.base, at)), "the reciprocal of 0");
  const long m = value_of(atom.argument, at);
  if (atom.kind == AtomKind::power) {
    const Value power = Value::of(natural_power(value_of(atom.base, at), std::labs(m)));
    return m < 0 ? inverted(power, "0 to a negative power") : power;
  }
  if (atom.kind == AtomKind::reciprocal_factorial)
    return Value::of(m < 0 ? numeric(0) : numeric(1) / factorial_of(m));
  if (m < 0) return Value::outside("fact(" + std::to_string(m) + ")");
  return Value::of(factorial_of(m));
}

Value value_of(const proof::Product& product, const Point& at) {
  // Numerators and denominators apart, so that common factors are looked for once, at the end.
  Value above = value_of(product.coefficient, at);
  numeric below = 1;
  if (above.exists()) {
    below = above.number.denom();
    above.number = above.number.numer();
  }
  for (const auto& [atom, exponent] : product.atoms) {
    Value value = value_of(atom, at);
    if (value.exists()) {
      below = below * natural_power(value.number.denom(), static_cast<long>(exponent));
      value.number = value.number.numer();
    }
    above = times(above, raised(value, static_cast<long>(exponent)));
  }
  if (above.exists()) above.number = above.number / below;
  return above;
}

bool identical(const proof::Polynomial& left, const proof::Polynomial& right) {
  if (left.terms.size() != right.terms.size()) return false;
  for (std::size_t i = 0; i < left.terms.size(); ++i)
    if (left.terms[i].coefficient != right.terms[i].coefficient ||
        left.terms[i].exponents != right.terms[i].exponents)
      return false;
  return true;
}

namespace {

bool identical(const proof::Affine& left, const proof::Affine& right) {
  if (left.constant != right.constant) return false;
  const std::size_t size = std::max(left.coefficients.size(), right.coefficients.size());
  const auto entry = [](const proof::Affine& form, std::size_t i) {
    return i < form.coefficients.size() ? form.coefficients[i] : 0;
  };
  for (std::size_t i = 0; i < size; ++i)
    if (entry(left, i) != entry(right, i)) return false;
  return true;
}

}  // namespace

bool identical(const proof::Atom& left, const proof::Atom& right) {
  return left.kind == right.kind && identical(left.argument, right.argument) &&
         identical(left.base, right.base) && left.base_scale == right.base_scale &&
         identical(left.low, right.low) && identical(left.high, right.high);
}

}  // namespace sumwright::audit
