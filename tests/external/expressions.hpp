// Values of the claim language's expressions, by the mathematical meaning of its functions.
//
// Nothing of the program's own evaluation is used: exact values follow the definitions, balls go
// through the gamma function.
#pragma once

#include "claim/expression.hpp"
#include "external/balls.hpp"

namespace sumwright::testing {

/// The exact value. Throws std::domain_error where there is none, or none by this simple reading
/// (a lower index or count that is no integer; a binomial coefficient is a product over its lower
/// index).
[[nodiscard]] mpq_class exact_value(const claim::Expression& expression, const Values& at);

/// The value as a ball: arguments and exponents are exact, functions are quotients of gammas.
[[nodiscard]] Ball ball_value(const claim::Expression& expression, const Values& at,
                              const Balls& balls);

}  // namespace sumwright::testing
