// The claim's terms, and the recurrence as the theorem states it.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "proof/argument.hpp"
#include "proof/evidence.hpp"

namespace sumwright::proof::building {

/// Converts summand and closed form on the claim's own region. Null when something is not settled:
/// then proof.verdict is undecided, with the reason and the place, and `suspects` gets the values
/// of the running variable at which the open condition fails or may fail. Fills proof.symbols.
/// Throws claim::InputError when a factor is not hypergeometric.
[[nodiscard]] std::unique_ptr<Terms> convert_terms(const std::shared_ptr<const claim::Claim>& claim,
                                                   Proof& proof, std::vector<mpz_class>& suspects);

/// The claim with this recurrence, read back from the text that is printed for it.
[[nodiscard]] std::shared_ptr<const claim::Claim> with_recurrence(
    const claim::Claim& claim, const std::vector<algebra::Polynomial>& coefficients,
    const std::string& right_side);

/// A claimed recurrence with denominators is stated with them cleared: the claim so stated
/// (evidence's right side is converted anew), or null when it is stated as written.
[[nodiscard]] std::shared_ptr<const claim::Claim> cleared_statement(const Terms& terms,
                                                                    const claim::Claim& claim,
                                                                    BroughtEvidence& brought);

/// `file:line:column` of a place in the claim.
[[nodiscard]] std::string place_text(const claim::Claim& claim, claim::Place place);

/// Whether the expression mentions the symbol.
[[nodiscard]] bool names_symbol(const claim::Expression& expression, const std::string& name);

}  // namespace sumwright::proof::building
