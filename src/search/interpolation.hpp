// Interpolation by polynomials and by rational functions modulo a prime.
#pragma once

#include <optional>
#include <vector>

#include "search/field.hpp"

namespace sumwright::search {

/// Row i gives the coefficient of z^i of the interpolating polynomial as weights of its values at
/// the (distinct) points.
[[nodiscard]] std::vector<WordVector> interpolation_matrix(const Field& field,
                                                           const WordVector& points);

/// Product of (z - points[j]), coefficients ascending.
[[nodiscard]] WordVector master_polynomial(const Field& field, const WordVector& points);

struct ModularFraction {
  WordVector numerator;    ///< coefficients ascending, no leading zeros; empty for 0
  WordVector denominator;  ///< monic
};

/// The fraction of small degree with the given interpolating polynomial modulo `master`, by the
/// remainder sequence's largest quotient (degree at least 2, so that one value confirms it);
/// nothing when no quotient stands out: more points are needed.
[[nodiscard]] std::optional<ModularFraction> recover_fraction(const Field& field,
                                                              const WordVector& master,
                                                              WordVector interpolant);

/// Product of two polynomials modulo the prime.
[[nodiscard]] WordVector multiply(const Field& field, const WordVector& a, const WordVector& b);
[[nodiscard]] Word evaluate(const Field& field, const WordVector& polynomial, Word at);

}  // namespace sumwright::search
