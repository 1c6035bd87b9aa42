// What an expression contains.
#pragma once

#include "claim/expression.hpp"

namespace sumwright::claim {

/// A call of `factorial` anywhere: a divisor that has one is read as reciprocal factorials.
[[nodiscard]] bool has_factorial(const Expression& expression);

}  // namespace sumwright::claim
