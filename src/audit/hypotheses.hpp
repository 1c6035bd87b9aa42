// What the claim assumes, and values of its parameters that satisfy it.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "audit/audit.hpp"
#include "audit/numbers.hpp"
#include "claim/claim.hpp"

namespace sumwright::audit {

/// Whether `value` is one that the entry excludes.
[[nodiscard]] bool excludes(const claim::Exclusion& exclusion, const numeric& value);

/// Whether the parameters' values satisfy `not`, `at_least` and those of `assume` that do not
/// mention the running variable.
[[nodiscard]] bool admits_parameters(const claim::Claim& claim, const Point& at);

/// Whether the point, running variable included, satisfies every hypothesis: `from` as well.
[[nodiscard]] bool admits(const claim::Claim& claim, const Point& at);

/// Up to `count` admissible points (names in the order given; running variable and index 0), each
/// with an admissible n among from .. from + span - 1: half of them generic (different, not small),
/// the others small and boundary values. Deterministic. With no parameter: one point.
[[nodiscard]] std::vector<Point> sample_parameters(const claim::Claim& claim,
                                                   const std::vector<std::string>& names,
                                                   std::size_t count, long span);

/// The claim's hypotheses as plain text without spaces: "m>=0", "x!=-1/2", "n>=0", "a>=b".
[[nodiscard]] std::vector<std::string> hypothesis_texts(const claim::Claim& claim);

}  // namespace sumwright::audit
