// Rational functions over Q in several variables, reduced.
#pragma once

#include <string>

#include "algebra/polynomial.hpp"

namespace sumwright::algebra {

/// numerator / denominator, coprime over Z (contents too), leading coefficient of the denominator >
/// 0.
class RationalFunction {
 public:
  explicit RationalFunction(const Polynomial& numerator);
  RationalFunction(const Polynomial& numerator,
                   const Polynomial& denominator);  ///< denominator != 0
  explicit RationalFunction(const RingPtr& ring, const mpq_class& value);
  explicit RationalFunction(const RingPtr& ring, const Factored& value);

  /// The fraction of two polynomials known to be coprime over Z (contents too); not checked, except
  /// that the sign is normalised.
  [[nodiscard]] static RationalFunction from_coprime(const Polynomial& numerator,
                                                     const Polynomial& denominator);

  [[nodiscard]] const Polynomial& numerator() const { return numerator_; }
  [[nodiscard]] const Polynomial& denominator() const { return denominator_; }
  [[nodiscard]] const RingPtr& ring() const { return numerator_.ring(); }
  [[nodiscard]] bool is_zero() const { return numerator_.is_zero(); }
  [[nodiscard]] bool is_polynomial() const { return denominator_.is_one(); }

  friend RationalFunction operator+(const RationalFunction& a, const RationalFunction& b);
  friend RationalFunction operator-(const RationalFunction& a, const RationalFunction& b);
  friend RationalFunction operator*(const RationalFunction& a, const RationalFunction& b);
  friend RationalFunction operator/(const RationalFunction& a,
                                    const RationalFunction& b);  ///< b != 0
  friend RationalFunction operator-(const RationalFunction& a);
  friend bool operator==(const RationalFunction& a, const RationalFunction& b);

  [[nodiscard]] RationalFunction power(long exponent) const;  ///< negative: value must not be 0
  /// variable := value; throws std::domain_error when the denominator becomes 0.
  [[nodiscard]] RationalFunction substitute(std::size_t variable, const Polynomial& value) const;
  [[nodiscard]] RationalFunction shift(std::size_t variable, long by) const;
  [[nodiscard]] Factored factored() const;
  [[nodiscard]] std::string to_string() const;

 private:
  void reduce();
  void make_denominator_positive();
  Polynomial numerator_;
  Polynomial denominator_;
};

}  // namespace sumwright::algebra
