// Constants inside expressions, and how large an expression can grow.
#pragma once

#include <gmpxx.h>

#include <optional>
#include <set>
#include <string>

#include "claim/affine.hpp"
#include "claim/expression.hpp"
#include "claim/reader.hpp"
#include "claim/source.hpp"

namespace sumwright::claim {

/// What is known of an expression from its constants.
struct Folded {
  std::optional<mpq_class> value;  ///< set for a constant of at most a thousand bits or so
  double size = 1;  ///< estimate of its bits or its degree once all powers are multiplied out
};

/// Folds the constants of `expression`, bottom up; `integer_symbols` may stand in exponents.
/// Throws InputError at a division by a constant 0 and where the estimated size passes
/// `limits.power_bits`.
[[nodiscard]] Folded fold_constants(const Source& source, const Limits& limits,
                                    const std::set<std::string>& integer_symbols,
                                    const Expression& expression);

/// Sum of the absolute values of the coefficients and the constant.
[[nodiscard]] double magnitude(const AffineView& form);

}  // namespace sumwright::claim
