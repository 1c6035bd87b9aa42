// The author's expressions at integer points, by the meaning of the claim format.
#pragma once

#include <functional>
#include <optional>
#include <string>

#include "audit/numbers.hpp"
#include "claim/claim.hpp"
#include "claim/expression.hpp"

namespace sumwright::audit {

/// Value of an expression, or of its reciprocal: a factorial read as a reciprocal is 0 at negative
/// integers. Integer symbols of the point hold integers. Throws TooLarge.
[[nodiscard]] Value evaluate(const claim::Expression& expression, const Point& at,
                             bool reciprocal = false);

/// Whether a symbol of that name occurs.
[[nodiscard]] bool mentions(const claim::Expression& expression, const std::string& name);

/// The ends of a range at a point. An infinite end is replaced by one that lies beyond every
/// integer symbol's reach by a margin; `windowed` tells so.
struct Interval {
  long low = 0;
  long high = -1;
  bool windowed_low = false;
  bool windowed_high = false;
  [[nodiscard]] bool contains(long k) const { return low <= k && k <= high; }
};
[[nodiscard]] Interval interval_at(const claim::Range& range, const Point& at);

/// The sum at a point (running variable and parameters set). Where an end is infinite, the
/// outermost terms of the window must vanish, else TooLarge. `check_time` is called once per term
/// when set. Throws TooLarge when there are too many terms.
[[nodiscard]] Value evaluate_sum(const claim::Sum& sum, const Point& at,
                                 const std::function<void()>& check_time);

}  // namespace sumwright::audit
