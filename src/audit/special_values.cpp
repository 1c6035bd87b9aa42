// From the author's expressions to parameter values that generic samples would never meet: the
// zeros of whatever stands under a fraction line or a power.
#include "audit/special_values.hpp"

#include <algorithm>

#include "audit/evaluator.hpp"
#include "audit/hypotheses.hpp"

namespace sumwright::audit {

std::optional<numeric> linear_root(const std::function<Value(const numeric&)>& value) {
  const Value at_0 = value(0);
  const Value at_1 = value(1);
  if (!at_0.exists() || !at_1.exists()) return std::nullopt;
  const numeric slope = at_1.number - at_0.number;
  if (slope.is_zero()) return std::nullopt;
  for (const long x : {2, 5})
    if (!same(value(x), Value::of(at_0.number + numeric(x) * slope))) return std::nullopt;
  return -at_0.number / slope;
}

namespace {

constexpr std::size_t kMostDivisors = 40;

void collect(const claim::Expression& node, std::vector<const claim::Expression*>& out) {
  if (out.size() >= kMostDivisors) return;
  if (node.operation == claim::Operation::divide) out.push_back(node.children.at(1).get());
  if (node.operation == claim::Operation::power) out.push_back(node.children.at(0).get());
  for (const claim::ExpressionPtr& child : node.children) collect(*child, out);
}

std::vector<const claim::Expression*> divisors(const claim::Claim& claim) {
  std::vector<const claim::Expression*> out;
  collect(*claim.sum.summand, out);
  if (claim.closed) collect(*claim.closed, out);
  if (claim.other_sum) collect(*claim.other_sum->summand, out);
  for (const claim::ExpressionPtr& one : claim.evidence.recurrence) collect(*one, out);
  if (claim.evidence.right_side) collect(*claim.evidence.right_side, out);
  return out;
}

struct Search {
  const claim::Claim& claim;
  const Point& base;
  std::size_t most;
  std::vector<Point> found;

  void keep(const std::string& parameter, const numeric& value, const Point& where) {
    if (found.size() >= most || !admits(claim, where)) return;
    const bool known = std::any_of(found.begin(), found.end(), [&](const Point& old) {
      return old.at(parameter).is_equal(value);
    });
    if (known) return;
    found.push_back(base);
    found.back().set(parameter, value);
  }

  void at(const claim::Expression& divisor, const Point& point) {
    for (const claim::Parameter& parameter : claim.parameters) {
      if (parameter.ring != claim::Parameter::Ring::rationals || !mentions(divisor, parameter.name))
        continue;
      Point moved = point;
      const std::optional<numeric> root = linear_root([&](const numeric& x) {
        moved.set(parameter.name, x);
        return evaluate(divisor, moved);
      });
      if (!root) continue;
      moved.set(parameter.name, *root);
      keep(parameter.name, *root, moved);
    }
  }
};

}  // namespace

std::vector<Point> special_points(const claim::Claim& claim, const Point& base, std::size_t most) {
  Search search{claim, base, most, {}};
  const std::vector<const claim::Expression*> all = divisors(claim);
  for (const long d : {0, 1, 3})
    for (const long k : {0, 1, 2})
      for (const claim::Expression* divisor : all) {
        if (search.found.size() >= most) return search.found;
        Point point = base;
        point.set(claim.running, to_numeric(claim.from) + numeric(d));
        for (const claim::Range& range : claim.sum.over) point.set(range.index, numeric(k));
        if (claim.other_sum)
          for (const claim::Range& range : claim.other_sum->over)
            point.set(range.index, numeric(k));
        try {
          search.at(*divisor, point);
        } catch (const TooLarge&) {
          continue;  // no root from here
        }
      }
  return search.found;
}

}  // namespace sumwright::audit
