// From a claim to the two numbers that it says are equal, for one n.
#include "audit/claim_sides.hpp"

namespace sumwright::audit {

Sides sides_at(const claim::Claim& claim, Author& author, std::size_t sample, long n) {
  Sides out;
  if (claim.is_equality()) {
    out.left = author.sum(sample, n);
    out.right = author.right_side(sample, n);
    return out;
  }
  if (claim.is_question()) {
    out.left = author.sum(sample, n);
    out.right = out.left;
    return out;
  }
  const Point point = author.point(sample, n);
  out.left = Value::of(0);
  for (std::size_t i = 0; i < claim.evidence.recurrence.size(); ++i) {
    const Value coefficient = evaluate(*claim.evidence.recurrence[i], point);
    out.comparable = out.comparable && coefficient.exists();
    const Value& sum = author.sum(sample, n + static_cast<long>(i));
    if (!sum.exists()) {
      out.left = sum;
      out.right = Value::of(0);
      return out;
    }
    out.left = plus(out.left, times(coefficient, sum));
  }
  out.right =
      claim.evidence.right_side ? evaluate(*claim.evidence.right_side, point) : Value::of(0);
  return out;
}

}  // namespace sumwright::audit
