// Terms for search tests: shift quotients built from factorials, powers and rational functions,
// and checks of identities by exact evaluation that use nothing of the search.
#pragma once

#include "../algebra/text_support.hpp"
#include "search/search.hpp"

namespace sumwright::testing {

/// F as a product; quotients by definition of the factorial.
class TermBuilder {
 public:
  explicit TermBuilder(algebra::RingPtr ring) : ring_(std::move(ring)) {}

  /// factorial(argument)^exponent, argument affine with integer slopes in n and k.
  TermBuilder& factorial(const std::string& argument, long exponent = 1) {
    const auto a = polynomial(ring_, argument);
    rise(quotients_.by_running, a, slope(a, 0), exponent);
    rise(quotients_.by_index, a, slope(a, 1), exponent);
    return *this;
  }
  TermBuilder& binomial(const std::string& a, const std::string& b, long exponent = 1) {
    return factorial(a, exponent).factorial(b, -exponent).factorial(a + "-(" + b + ")", -exponent);
  }
  /// rising(argument, length) = (argument + length - 1)! / (argument - 1)!
  TermBuilder& rising(const std::string& argument, const std::string& length, long exponent = 1) {
    return factorial(argument + "+(" + length + ")-1", exponent)
        .factorial(argument + "-1", -exponent);
  }
  /// base^exponent, base free of n and k.
  TermBuilder& power(const std::string& base, const std::string& exponent) {
    const auto b = rational(ring_, base).factored();
    const auto e = polynomial(ring_, exponent);
    quotients_.by_running.multiply(b, slope(e, 0));
    quotients_.by_index.multiply(b, slope(e, 1));
    return *this;
  }
  TermBuilder& factor(const algebra::RationalFunction& value) {
    quotients_.by_running.multiply((value.shift(0, 1) / value).factored());
    quotients_.by_index.multiply((value.shift(1, 1) / value).factored());
    return *this;
  }
  TermBuilder& factor(const std::string& text) { return factor(rational(ring_, text)); }

  [[nodiscard]] const search::ShiftQuotients& build() const { return quotients_; }

 private:
  static long slope(const algebra::Polynomial& a, std::size_t v) {
    return (a.shift(v, 1) - a).constant().get_si();
  }
  static void rise(algebra::Factored& into, const algebra::Polynomial& a, long slope,
                   long exponent) {
    const algebra::RingPtr ring = a.ring();
    for (long j = 1; j <= slope; ++j) into.multiply(a + algebra::Polynomial(ring, j), exponent);
    for (long j = 0; j < -slope; ++j) into.multiply(a - algebra::Polynomial(ring, j), -exponent);
  }

  algebra::RingPtr ring_;
  search::ShiftQuotients quotients_;
};

inline mpq_class value_at(const algebra::RationalFunction& f, const std::vector<mpq_class>& point) {
  return f.numerator().evaluate_rational(point) / f.denominator().evaluate_rational(point);
}

/// Left minus right of the telescoping identity, divided by F, at one rational point.
inline mpq_class identity_defect(const algebra::RingPtr& ring,
                                 const search::ShiftQuotients& summand,
                                 const std::vector<algebra::Polynomial>& coefficients,
                                 const algebra::RationalFunction& certificate,
                                 std::vector<mpq_class> point) {
  const algebra::RationalFunction by_running(ring, summand.by_running);
  const algebra::RationalFunction by_index(ring, summand.by_index);
  mpq_class left = 0;
  mpq_class quotient = 1;
  auto moved = point;
  for (const auto& coefficient : coefficients) {
    left += coefficient.evaluate_rational(point) * quotient;
    quotient *= value_at(by_running, moved);
    moved[0] += 1;
  }
  auto next = point;
  next[1] += 1;
  return left -
         (value_at(certificate, next) * value_at(by_index, point) - value_at(certificate, point));
}

/// A point with large random coordinates, so that no pole is met.
inline std::vector<mpq_class> random_point(const algebra::RingPtr& ring, std::mt19937_64& random) {
  std::vector<mpq_class> out;
  for (std::size_t v = 0; v < ring->size(); ++v) {
    out.emplace_back(static_cast<long>(random() % 1000003) + 1000, 7919 + static_cast<long>(v));
    out.back().canonicalize();
  }
  return out;
}

inline std::string text_of(const std::vector<algebra::Polynomial>& coefficients) {
  std::string out;
  for (const auto& coefficient : coefficients) {
    if (!out.empty()) out += ", ";
    out += coefficient.to_string();
  }
  return out;
}

}  // namespace sumwright::testing
