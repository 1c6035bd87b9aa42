// Where the forms of a range's ends meet: values of the running variable, far out perhaps, that a
// sample of small ones would never show.
#pragma once

#include <cstddef>
#include <vector>

#include "audit/numbers.hpp"
#include "claim/claim.hpp"

namespace sumwright::audit {

/// The integers n >= `from` next to a root of u(n) = v(n), ascending, at most `most` (the
/// smallest); u and v run over the ends of the outermost ranges, an entry of `min` and `max` each
/// for itself and `floor(u)` as u; of u and v those are taken that depend on n linearly. `base`
/// fixes the parameters. Nothing beyond 2^40.
[[nodiscard]] std::vector<long> crossings(const claim::Claim& claim, const Point& base,
                                          std::size_t most);

}  // namespace sumwright::audit
