// Both sides of the claim as numbers, from the claim alone.
#pragma once

#include "audit/author.hpp"

namespace sumwright::audit {

/// Left and right side of the claim at n. `comparable` is false where a denominator of a claimed
/// coefficient vanishes (the cleared recurrence is the claim, and it is not formed here).
struct Sides {
  Value left;
  Value right;
  bool comparable = true;
};

/// Equality: S(n) and the right side. Recurrence: sum_i a_i S(n+i) and b. Question: S(n) twice.
/// Throws TooLarge.
[[nodiscard]] Sides sides_at(const claim::Claim& claim, Author& author, std::size_t sample, long n);

}  // namespace sumwright::audit
