// From the ends of a range, as written, to the n at which two of their forms meet. Each pair of
// forms gives one root; the integers on both sides of it are where a range turns empty or where
// `min` and `max` change their choice.
#include "audit/crossings.hpp"

#include <optional>
#include <set>

#include "audit/evaluator.hpp"
#include "audit/special_values.hpp"

namespace sumwright::audit {

namespace {

constexpr std::size_t kMostForms = 12;

void collect(const claim::Expression& bound, std::vector<const claim::Expression*>& out) {
  if (out.size() >= kMostForms) return;
  const bool call = bound.operation == claim::Operation::call;
  if (!call) {
    out.push_back(&bound);
    return;
  }
  for (const claim::ExpressionPtr& child : bound.children) collect(*child, out);
}

std::vector<const claim::Expression*> forms(const claim::Claim& claim) {
  std::vector<const claim::Expression*> out;
  const auto take = [&](const claim::Sum& sum) {
    if (sum.over.empty()) return;
    for (const claim::Bound* end : {&sum.over.front().low, &sum.over.front().high})
      if (end->kind == claim::Bound::Kind::finite) collect(*end->value, out);
  };
  take(claim.sum);
  if (claim.other_sum) take(*claim.other_sum);
  return out;
}

std::optional<numeric> meeting(const claim::Claim& claim, const Point& base,
                               const claim::Expression& u, const claim::Expression& v) {
  Point at = base;
  return linear_root([&](const numeric& n) {
    at.set(claim.running, n);
    Value left = evaluate(u, at);
    Value right = evaluate(v, at);
    if (!left.exists()) return left;
    if (!right.exists()) return right;
    return Value::of(left.number - right.number);
  });
}

}  // namespace

std::vector<long> crossings(const claim::Claim& claim, const Point& base, std::size_t most) {
  const std::vector<const claim::Expression*> all = forms(claim);
  std::set<long> found;
  for (std::size_t i = 0; i < all.size(); ++i)
    for (std::size_t j = 0; j < i; ++j) try {
        const std::optional<numeric> root = meeting(claim, base, *all[i], *all[j]);
        if (!root) continue;
        const long below = to_machine(iquo(root->numer(), root->denom()));
        for (long n = below - 1; n <= below + 2; ++n)
          if (numeric(n) >= to_numeric(claim.from)) found.insert(n);
      } catch (const TooLarge&) {
        continue;  // beyond what can be evaluated
      }
  std::vector<long> out(found.begin(), found.end());
  if (out.size() > most) out.resize(most);
  return out;
}

}  // namespace sumwright::audit
