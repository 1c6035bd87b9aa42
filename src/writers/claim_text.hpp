// The claim itself in words and plain text, for obligations.txt and record.json.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers {

/// `sum(k = 0..n, binomial(n, k)^2)`; nested when there are several indices.
[[nodiscard]] std::string sum_text(const claim::Sum& sum);

/// `0`, `floor(n/2)`, `-inf`, `inf`.
[[nodiscard]] std::string bound_text(const claim::Bound& bound);

/// `<=`, `<`, `>=`, `>`, `!=`.
[[nodiscard]] std::string comparison_text(claim::Comparison comparison);

/// What one exclusion says of the parameter: `x != -1/2`, `x is not a negative integer`.
[[nodiscard]] std::string exclusion_text(const std::string& name,
                                         const claim::Exclusion& exclusion);

/// The hypotheses of the theorem, in its order: exclusions, lower bounds, assumptions, `n >= from`.
[[nodiscard]] std::vector<std::string> hypothesis_texts(const claim::Claim& claim);

/// The statement in one sentence: what is proved, or, while nothing is, what the author wrote. A
/// question that is not answered asks for a recurrence and states none.
[[nodiscard]] std::string statement_text(const proof::Proof& proof);

/// A recurrence in the claim language, as far as it may be shown: empty right side: not known.
struct StatedRecurrence {
  std::vector<std::string> coefficients;  ///< empty: no recurrence
  std::string right_side;
  std::string certificate;  ///< empty: none
  bool brought = false;     ///< by the author, as the claim or as evidence
};

/// That of an established proof; else the author's, as written; else a candidate that was found and
/// is not proved, without a right side.
[[nodiscard]] StatedRecurrence stated_recurrence(const proof::Proof& proof);

/// The kind of claim: `equality`, `recurrence`, `question`.
[[nodiscard]] std::string claim_kind(const proof::Proof& proof);

/// `<=`, `<`, `>=`, `>`, `!=`.
[[nodiscard]] std::string comparison_text(claim::Comparison comparison);

}  // namespace sumwright::writers
