// Rational functions over Q: from a fraction of integer polynomials to the reduced one
// (numerator and denominator coprime over Z, leading coefficient of the denominator > 0).
#include "algebra/rational_function.hpp"

#include <stdexcept>

#include "algebra/size_guard.hpp"

namespace sumwright::algebra {
namespace {

// Divides both by their greatest common divisor over Z, contents included.
void cancel(Polynomial& a, Polynomial& b) {
  guard_gcd(a, b);
  const auto* context = a.ring()->context();
  Polynomial common(a.ring());
  Polynomial u(a.ring());
  Polynomial v(a.ring());
  if (!fmpz_mpoly_gcd_cofactors(common.raw(), u.raw(), v.raw(), a.raw(), b.raw(), context)) {
    throw std::runtime_error("greatest common divisor failed");
  }
  a = std::move(u);
  b = std::move(v);
}

}  // namespace

RationalFunction::RationalFunction(const Polynomial& numerator)
    : numerator_(numerator), denominator_(numerator.ring(), 1) {}

RationalFunction::RationalFunction(const Polynomial& numerator, const Polynomial& denominator)
    : numerator_(numerator), denominator_(denominator) {
  reduce();
}

RationalFunction::RationalFunction(const RingPtr& ring, const mpq_class& value)
    : numerator_(ring, value.get_num()), denominator_(ring, value.get_den()) {}

RationalFunction::RationalFunction(const RingPtr& ring, const Factored& value)
    : numerator_(value.numerator(ring)), denominator_(value.denominator(ring)) {
  reduce();
}

RationalFunction RationalFunction::from_coprime(const Polynomial& numerator,
                                                const Polynomial& denominator) {
  if (denominator.is_zero()) throw std::domain_error("denominator 0");
  if (numerator.is_zero()) return RationalFunction(numerator);
  RationalFunction out(numerator);
  out.denominator_ = denominator;
  out.make_denominator_positive();
  return out;
}

void RationalFunction::make_denominator_positive() {
  if (denominator_.leading_coefficient() > 0) return;
  numerator_ = -std::move(numerator_);
  denominator_ = -std::move(denominator_);
}

void RationalFunction::reduce() {
  if (denominator_.is_zero()) throw std::domain_error("denominator 0");
  if (numerator_.is_zero()) {
    denominator_ = Polynomial(ring(), 1);
    return;
  }
  if (!denominator_.is_one()) cancel(numerator_, denominator_);
  make_denominator_positive();
}

RationalFunction operator+(const RationalFunction& a, const RationalFunction& b) {
  if (a.is_polynomial() && b.is_polynomial()) {
    return RationalFunction(a.numerator_ + b.numerator_);
  }
  if (a.denominator_ == b.denominator_) {
    return {a.numerator_ + b.numerator_, a.denominator_};
  }
  Polynomial p = a.denominator_;
  Polynomial q = b.denominator_;
  cancel(p, q);
  return {a.numerator_ * q + b.numerator_ * p, a.denominator_ * q};
}

RationalFunction operator-(const RationalFunction& a) {
  RationalFunction out = a;
  out.numerator_ = -std::move(out.numerator_);
  return out;
}

RationalFunction operator-(const RationalFunction& a, const RationalFunction& b) {
  return a + (-b);
}

RationalFunction operator*(const RationalFunction& a, const RationalFunction& b) {
  return {a.numerator_ * b.numerator_, a.denominator_ * b.denominator_};
}

RationalFunction operator/(const RationalFunction& a, const RationalFunction& b) {
  if (b.is_zero()) throw std::domain_error("division by the zero function");
  return {a.numerator_ * b.denominator_, a.denominator_ * b.numerator_};
}

bool operator==(const RationalFunction& a, const RationalFunction& b) {
  return a.numerator_ == b.numerator_ && a.denominator_ == b.denominator_;
}

RationalFunction RationalFunction::power(long exponent) const {
  const auto e = static_cast<unsigned long>(exponent < 0 ? -exponent : exponent);
  const Polynomial above = numerator_.power(e);
  const Polynomial below = denominator_.power(e);
  return exponent < 0 ? RationalFunction(below, above) : RationalFunction(above, below);
}

RationalFunction RationalFunction::substitute(std::size_t variable, const Polynomial& value) const {
  return {numerator_.substitute(variable, value), denominator_.substitute(variable, value)};
}

// A shift is an automorphism: the result is reduced already.
RationalFunction RationalFunction::shift(std::size_t variable, long by) const {
  RationalFunction out = *this;
  out.numerator_ = numerator_.shift(variable, by);
  out.denominator_ = denominator_.shift(variable, by);
  return out;
}

Factored RationalFunction::factored() const {
  Factored out = factor(numerator_);
  out.multiply(factor(denominator_), -1);
  return out;
}

std::string RationalFunction::to_string() const {
  if (is_polynomial()) return numerator_.to_string();
  const std::string above =
      numerator_.terms() == 1 ? numerator_.to_string() : '(' + numerator_.to_string() + ')';
  // A number or a variable divides without brackets; `2*n` would not.
  const bool plain = denominator_.is_constant() ||
                     (denominator_.terms() == 1 && denominator_.total_degree() == 1 &&
                      denominator_.content() == 1);
  const std::string below = denominator_.to_string();
  return above + (plain ? '/' + below : "/(" + below + ')');
}

}  // namespace sumwright::algebra
