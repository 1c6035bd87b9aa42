// Integer-affine forms in the symbols of a claim.
#pragma once

#include <compare>
#include <cstddef>
#include <vector>

#include "algebra/polynomial.hpp"

namespace sumwright::term {

/// sum coefficients[i] x_i + constant over Z. All forms of one computation have one coefficient per
/// ring variable. Operations throw std::overflow_error instead of wrapping around.
struct Affine {
  std::vector<long> coefficients;
  long constant = 0;

  static Affine zero(std::size_t symbols) { return {std::vector<long>(symbols, 0), 0}; }
  static Affine of(std::size_t symbols, long constant) {
    return {std::vector<long>(symbols, 0), constant};
  }
  static Affine symbol(std::size_t symbols, std::size_t position);

  [[nodiscard]] bool is_constant() const;
  /// The same form without its constant.
  [[nodiscard]] Affine linear_part() const { return {coefficients, 0}; }
  /// symbol := value.
  [[nodiscard]] Affine substitute(std::size_t position, const Affine& value) const;
  /// symbol := symbol + by.
  [[nodiscard]] Affine shift(std::size_t position, long by) const;
  [[nodiscard]] algebra::Polynomial polynomial(const algebra::RingPtr& ring) const;

  auto operator<=>(const Affine&) const = default;  // NOLINT(modernize-use-nullptr): a false alarm
  bool operator==(const Affine&) const = default;
};

[[nodiscard]] Affine operator+(const Affine& a, const Affine& b);
[[nodiscard]] Affine operator-(const Affine& a, const Affine& b);
[[nodiscard]] Affine operator-(const Affine& a);
[[nodiscard]] Affine operator*(long factor, const Affine& a);
[[nodiscard]] Affine operator+(const Affine& a, long constant);
[[nodiscard]] Affine operator-(const Affine& a, long constant);

/// The largest integer <= numerator/denominator, denominator > 0.
[[nodiscard]] long floor_quotient(long numerator, long denominator);

/// The affine form that a polynomial is, if it is one with coefficients that fit.
[[nodiscard]] bool to_affine(const algebra::Polynomial& polynomial, Affine& out);

}  // namespace sumwright::term
