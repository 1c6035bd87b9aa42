// All claims that differ from a given one in one place.
#pragma once

#include <string>
#include <vector>

#include "claim/claim.hpp"

namespace sumwright::testing {

/// Which part of a claim file a mutant changes.
enum class Part { recurrence, certificate, right_side, closed, range, from };
inline constexpr std::size_t kParts = 6;
[[nodiscard]] const char* name_of(Part part);

struct Mutant {
  Part part = Part::recurrence;
  std::string change;  ///< "a_1: literal 2 + 1"
  claim::Claim claim;
  claim::ExpressionPtr before;  ///< the changed expression; null when it was absent, or for `from`
  claim::ExpressionPtr after;
};

/// One change each: a coefficient, a sign, an exponent, a shift of a symbol, a bound, `from`, the
/// right side or the closed form by a constant or a factor. Deterministic order.
[[nodiscard]] std::vector<Mutant> mutants_of(const claim::Claim& claim);

}  // namespace sumwright::testing
