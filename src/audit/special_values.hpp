// Values of rational parameters at which something that the author divides by vanishes.
#pragma once

#include <functional>
#include <optional>
#include <vector>

#include "audit/numbers.hpp"
#include "claim/claim.hpp"

namespace sumwright::audit {

/// The root of a function that is linear as far as its values at 0, 1, 2 and 5 tell.
[[nodiscard]] std::optional<numeric> linear_root(const std::function<Value(const numeric&)>& value);

/// Points like `base` with one rational parameter moved to where a divisor or the base of a power
/// in the claim vanishes, for small n and index. Admissible ones only, at most `most`.
[[nodiscard]] std::vector<Point> special_points(const claim::Claim& claim, const Point& base,
                                                std::size_t most);

}  // namespace sumwright::audit
