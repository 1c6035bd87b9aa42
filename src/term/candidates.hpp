// Values of one symbol of a claim that are worth trying.
//
// Internal to src/term.
#pragma once

#include <gmpxx.h>

#include <string>
#include <vector>

#include "claim/claim.hpp"

namespace sumwright::term::exact {

/// Whether the symbol occurs in the expression.
[[nodiscard]] bool mentions(const claim::Expression& expression, const std::string& name);

/// Whether the value lies in the parameter's ring and satisfies `not` and `at_least`.
[[nodiscard]] bool admits(const claim::Parameter& parameter, const mpq_class& value);

/// Values of the parameter, each admitted, the most telling first; `running` (may be null) is the
/// running variable's value, near which some are taken.
[[nodiscard]] std::vector<mpq_class> candidates(const claim::Claim& claim,
                                                const claim::Parameter& parameter,
                                                const mpz_class* running);

/// Values n >= from, not far off, at which some part of the claim is special.
[[nodiscard]] std::vector<mpz_class> special_running_values(const claim::Claim& claim);

}  // namespace sumwright::term::exact
