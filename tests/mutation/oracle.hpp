// Whether a claim and the evidence beside it are true, decided by exact values alone.
//
// Nothing here uses the algebra of the search or of the proof stage: sums are added up, and the
// certificate is put into the telescoping identity at random integer points.
#pragma once

#include <random>
#include <string>

#include "claim/claim.hpp"
#include "proof/proof.hpp"

namespace sumwright::testing {

struct Opinion {
  enum class State { agrees, differs, unknown };
  State state = State::unknown;
  std::size_t cases = 0;  ///< points at which both sides had values and were compared
  std::string where;      ///< differs: the point and both values; unknown: why
};

/// The equality, or the recurrence when the claim has no `equals`, at n = from .. from + span - 1.
[[nodiscard]] Opinion claim_holds(const claim::Claim& claim, long span = 24);
/// The recurrence of the evidence, as a statement about the sum.
[[nodiscard]] Opinion recurrence_holds(const claim::Claim& claim, long span = 24);
/// The telescoping identity at random points where every part of it has a value and F is not 0.
[[nodiscard]] Opinion certificate_holds(const claim::Claim& claim, std::mt19937_64& random);

/// Whether the two expressions have equal values at random points.
[[nodiscard]] bool equal_values(const claim::Claim& claim, const claim::Expression& a,
                                const claim::Expression& b, std::mt19937_64& random);

/// Whether the refutation's point shows what it says: empty when it does, else what is wrong.
[[nodiscard]] std::string check_counterexample(const claim::Claim& claim,
                                               const proof::Proof& proof);

}  // namespace sumwright::testing
