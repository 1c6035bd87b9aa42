// Size estimates: from degrees, numbers of terms and coefficient bits of the operands to an upper
// bound of the result. The bounds are generous; they stop hostile inputs, not large honest ones.
#include "algebra/size_guard.hpp"

#include <algorithm>
#include <cmath>
#include <cstdlib>

#include "algebra/limits.hpp"

namespace sumwright::algebra {
namespace {

constexpr double kMaxBytes = 1.0e9;     // of one result
constexpr double kMaxWork = 4.0e10;     // word products in one call
constexpr double kMaxExponent = 1.0e6;  // of one variable
constexpr std::size_t kMaxTermsToFactor = 20000;
constexpr std::size_t kMaxTermsOfGcd = 500000;

double bits(const Polynomial& a) {
  return static_cast<double>(std::labs(fmpz_mpoly_max_bits(a.raw())));
}

// Number of monomials in the degree box of the result; `scale(v)` is its degree in variable v.
template <typename DegreeOf>
double box(const Polynomial& a, DegreeOf degree_of) {
  double monomials = 1;
  for (std::size_t v = 0; v < a.ring()->size(); ++v) {
    const double degree = degree_of(v);
    if (degree > kMaxExponent) throw TimeUp("size limit reached: degree of a polynomial");
    monomials *= degree + 1;
  }
  return monomials;
}

void refuse_large(double terms, double coefficient_bits) {
  if (terms * (24 + coefficient_bits / 8) > kMaxBytes) {
    throw TimeUp("size limit reached: terms of a polynomial");
  }
}

double degree_of(const Polynomial& a, std::size_t v) {
  return static_cast<double>(std::max(a.degree(v), 0L));
}

// Monomials of degree e in t letters: binomial(t + e - 1, e), by logarithms.
double multisets(std::size_t letters, double e) {
  const double t = std::max(static_cast<double>(letters), 1.0);
  return std::exp(std::lgamma(t + e) - std::lgamma(e + 1) - std::lgamma(t));
}

}  // namespace

void guard_product(const Polynomial& a, const Polynomial& b) {
  const double pairs = static_cast<double>(a.terms()) * static_cast<double>(b.terms());
  if (pairs < 1.0e4 && bits(a) + bits(b) < 1.0e5) {
    // Small: only the exponents could run away, by repeated multiplication of single terms.
    box(a, [&](std::size_t v) { return degree_of(a, v) + degree_of(b, v); });
    return;
  }
  const double monomials =
      std::min(pairs, box(a, [&](std::size_t v) { return degree_of(a, v) + degree_of(b, v); }));
  refuse_large(monomials, bits(a) + bits(b));
  if (pairs * (1 + bits(a) / 64) * (1 + bits(b) / 64) > kMaxWork) {
    throw TimeUp("size limit reached: product of polynomials");
  }
}

void guard_power(const Polynomial& base, unsigned long exponent) {
  const double e = static_cast<double>(exponent);
  const double t = static_cast<double>(base.terms());
  const double monomials = std::min(
      multisets(base.terms(), e), box(base, [&](std::size_t v) { return e * degree_of(base, v); }));
  refuse_large(monomials, e * (bits(base) + std::log2(t + 1)));
}

void guard_substitution(const Polynomial& a, std::size_t variable, const Polynomial& value) {
  const double d = degree_of(a, variable);
  const double monomials = box(a, [&](std::size_t v) {
    return (v == variable ? 0 : degree_of(a, v)) + d * degree_of(value, v);
  });
  const double growth = d * (bits(value) + std::log2(static_cast<double>(value.terms()) + 1));
  const double choices = static_cast<double>(a.terms()) * multisets(value.terms(), d);
  refuse_large(std::min(monomials, choices), bits(a) + growth);
}

void guard_gcd(const Polynomial& a, const Polynomial& b) {
  if (std::min(a.terms(), b.terms()) > kMaxTermsToFactor ||
      std::max(a.terms(), b.terms()) > kMaxTermsOfGcd) {
    throw TimeUp("size limit reached: greatest common divisor");
  }
}

void guard_factorisation(const Polynomial& a) {
  if (a.terms() > kMaxTermsToFactor) throw TimeUp("size limit reached: factorisation");
}

}  // namespace sumwright::algebra
