// The author's sum, term by term and as a whole, with what has been evaluated kept.
#pragma once

#include <functional>
#include <map>
#include <utility>
#include <vector>

#include "audit/evaluator.hpp"
#include "audit/numbers.hpp"
#include "claim/claim.hpp"

namespace sumwright::audit {

/// Evaluates one claim at parameter samples: points whose running variable is set by the caller.
class Author {
 public:
  /// Keeps references; the samples fix the parameters.
  Author(const claim::Claim& claim, const std::vector<Point>& samples,
         const std::function<void()>& check_time);

  /// Sample `sample` with the running variable at n (and the index, when there is one, at k).
  [[nodiscard]] Point point(std::size_t sample, long n) const;
  [[nodiscard]] Point point(std::size_t sample, long n, long k) const;

  /// The range of the index at n; the single point 0 when the claim has no index. One index at
  /// most.
  [[nodiscard]] const Interval& range(std::size_t sample, long n);
  /// The summand at (n, k), in or out of the range.
  [[nodiscard]] const Value& term(std::size_t sample, long n, long k);
  /// S(n) added up.
  [[nodiscard]] const Value& sum(std::size_t sample, long n);
  /// The right side of an equality at n.
  [[nodiscard]] Value right_side(std::size_t sample, long n);

 private:
  const claim::Claim& claim_;
  const std::vector<Point>& samples_;
  const std::function<void()>& check_time_;
  std::map<std::pair<std::size_t, long>, Interval> ranges_;
  std::map<std::pair<std::size_t, std::pair<long, long>>, Value> terms_;
  std::map<std::pair<std::size_t, long>, Value> sums_;
};

}  // namespace sumwright::audit
