// Evidence: taken from the author, or found.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/argument.hpp"
#include "search/search.hpp"
#include "term/evaluation.hpp"

namespace sumwright::proof::building {

/// F(n+1,k)/F(n,k) and F(n,k+1)/F(n,k) of a sum of similar products.
/// Throws claim::InputError when the products are not similar: not a hypergeometric term.
[[nodiscard]] search::ShiftQuotients shift_quotients(const Terms& terms);

/// What the claim brings, as rational functions.
struct BroughtEvidence {
  EvidenceDraft draft;
  bool has_certificate = false;
  /// The least common denominator that was cleared (1 when none).
  algebra::Polynomial cleared;
};

/// Reads claim.evidence: coefficients cleared of denominators, right side converted (times the
/// cleared denominator), certificate. Throws claim::InputError.
[[nodiscard]] BroughtEvidence read_evidence(const Terms& terms, const claim::Claim& claim);

/// Fills proof.reason, residue and counterexample for a certificate whose identity fails: says
/// which part is wrong as far as that can be told.
void diagnose_identity(const Terms& terms, const claim::Claim& claim,
                       const BroughtEvidence& brought, const algebra::Polynomial& residue,
                       const algebra::Deadline& deadline, Proof& proof);

/// A difference found by evaluation, as part of a Proof.
[[nodiscard]] Counterexample from_difference(const term::Difference& difference,
                                             const std::string& what);

/// Whether sum_i a_i C(n+i) = b is shown for the closed form C and every n >= from: with the
/// equality, the author's recurrence then holds, whatever its certificate. `false` decides nothing.
[[nodiscard]] bool holds_for_closed_form(const Terms& terms, const EvidenceDraft& evidence);

/// The claim with this recurrence as its claim (no equality), for evaluation at points.
[[nodiscard]] claim::Claim as_recurrence_claim(const claim::Claim& claim);

}  // namespace sumwright::proof::building
