// The second opinion: everything a Proof rests on, recomputed by other arithmetic (GiNaC on CLN).
//
// Links neither algebra, search nor proof: it reads the plain data of Proof and the author's parse
// tree, and trusts nothing else. A disagreement is a fault of Sumwright, never of the author.
#pragma once

#include <functional>
#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::audit {

struct AuditOptions {
  /// The claim as read from the author's file, when Proof::claim has been completed with a
  /// recurrence that was found, or cleared of denominators: the two are then compared. Null: not
  /// compared.
  const claim::Claim* original = nullptr;
  std::size_t expand_up_to =
      3000;            ///< expand the equality when its estimated size is below this; else points
  long sum_span = 12;  ///< n = from .. from + span - 1 for direct summation
  std::size_t parameter_samples = 4;
  std::function<void()> check_time;  ///< called often; may throw to stop
};

/// One check made: what, how many points or terms, and whether it agreed.
struct Finding {
  std::string check;  ///< "polynomial equality", "term identity at points", "sums added up", ...
  std::size_t cases = 0;
  bool agrees = true;
  std::string detail;  ///< the first disagreement, with its point and both values
};

struct AuditReport {
  std::vector<Finding> findings;
  [[nodiscard]] bool agrees() const {
    for (const Finding& finding : findings)
      if (!finding.agrees) return false;
    return !findings.empty();
  }
};

/// Audits an established Proof.
[[nodiscard]] AuditReport audit(const proof::Proof& proof, const AuditOptions& options = {});

/// Looks for a point where the claim itself fails, from the claim alone (used beside any verdict):
/// empty text when none is found in twice the span, else the point and both values.
[[nodiscard]] std::string find_counterexample(const claim::Claim& claim,
                                              const AuditOptions& options = {});

}  // namespace sumwright::audit
