// The author's sum at points. Only the parse trees of the claim are read; the caches make the
// checks, which ask for the same values again and again, cheap.
#include "audit/author.hpp"

namespace sumwright::audit {

Author::Author(const claim::Claim& claim, const std::vector<Point>& samples,
               const std::function<void()>& check_time)
    : claim_(claim), samples_(samples), check_time_(check_time) {}

Point Author::point(std::size_t sample, long n) const {
  Point out = samples_.at(sample);
  out.set(claim_.running, numeric(n));
  return out;
}

Point Author::point(std::size_t sample, long n, long k) const {
  Point out = point(sample, n);
  if (!claim_.sum.over.empty()) out.set(claim_.sum.over.front().index, numeric(k));
  return out;
}

const Interval& Author::range(std::size_t sample, long n) {
  const auto key = std::pair{sample, n};
  const auto known = ranges_.find(key);
  if (known != ranges_.end()) return known->second;
  Interval out{0, 0, false, false};
  if (!claim_.sum.over.empty()) out = interval_at(claim_.sum.over.front(), point(sample, n));
  return ranges_.emplace(key, out).first->second;
}

const Value& Author::term(std::size_t sample, long n, long k) {
  const auto key = std::pair{sample, std::pair{n, k}};
  const auto known = terms_.find(key);
  if (known != terms_.end()) return known->second;
  if (check_time_) check_time_();
  const Value value = evaluate(*claim_.sum.summand, point(sample, n, k));
  return terms_.emplace(key, value).first->second;
}

const Value& Author::sum(std::size_t sample, long n) {
  const auto key = std::pair{sample, n};
  const auto known = sums_.find(key);
  if (known != sums_.end()) return known->second;
  const Value value = evaluate_sum(claim_.sum, point(sample, n), check_time_);
  return sums_.emplace(key, value).first->second;
}

Value Author::right_side(std::size_t sample, long n) {
  if (claim_.closed) return evaluate(*claim_.closed, point(sample, n));
  if (claim_.other_sum) return evaluate_sum(*claim_.other_sum, point(sample, n), check_time_);
  return Value::of(0);
}

}  // namespace sumwright::audit
