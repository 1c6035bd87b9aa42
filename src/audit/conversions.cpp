// The author's summand, closed form and right side against the atoms they were turned into.
//
// At points of the region: the expression has a value, every leaf and every denominator has the
// value of its product, and the products add up to the expression. Where the argument needs the
// conversion, the region must contain the point.
#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/terms.hpp"

namespace sumwright::audit {

namespace {

Value author_value(Context& context, const proof::Conversion& conversion, const Place& place) {
  if (&conversion == &context.proof.summand)
    return context.author.term(place.sample, place.n, place.k);
  return evaluate(*conversion.expression, context.at(place));
}

void check_leaves(const proof::Conversion& conversion, Check& check, const Point& point) {
  for (const proof::Leaf& leaf : conversion.leaves) {
    const bool reciprocal = leaf.rule == proof::LeafRule::reciprocal_factorial;
    const Value written = evaluate(*leaf.expression, point, reciprocal);
    if (!written.exists()) continue;  // beside a factor 0, or the whole has no value: seen elsewhere
    check.expect_same(written, value_of(leaf.value, point), to_text(*leaf.expression), point);
  }
}

void check_denominators(const proof::Conversion& conversion, Check& check, const Point& point) {
  for (const proof::Denominator& one : conversion.denominators) {
    const Value written = evaluate(*one.expression, point);
    const std::string text = "the denominator " + to_text(*one.expression);
    check.expect_same(written, value_of(one.as_product, point), text, point);
    check.expect_same(times(written, value_of(one.reciprocal, point)), Value::of(1),
                      text + " times its reciprocal", point);
  }
}

void check_at(Context& context, const proof::Conversion& conversion, Check& check,
              const Place& place, bool needed) {
  context.tick();
  const Point point = context.at(place);
  if (!holds(conversion.region, point)) {
    if (needed)
      check.fail("the region " + conversion.region.text + " leaves out " + text_of(point));
    return;
  }
  check.expect_same(author_value(context, conversion, place),
                    products_at(context, conversion, place), "expression against atoms", point);
  check_leaves(conversion, check, point);
  check_denominators(conversion, check, point);
}

void check_summand(Context& context, std::vector<Finding>& findings) {
  Check check("summand as atoms");
  const bool indexed = !context.claim.sum.over.empty();
  for (const Place& place : context.running_places())
    for (unsigned shift = 0; shift <= context.proof.order; shift += std::max(1U, context.proof.order))
      check.attempt([&] {
        const long n = place.n + static_cast<long>(shift);
        if (!context.admits(place.sample, n)) return;
        const Interval range = context.author.range(place.sample, n);
        if (!indexed) return check_at(context, context.proof.summand, check, {place.sample, n, 0}, true);
        for (const long k : spread(range.low, range.high))
          check_at(context, context.proof.summand, check, {place.sample, n, k}, true);
        for (const long k : {range.low - 2, range.low - 1, range.high + 1, range.high + 2})
          check_at(context, context.proof.summand, check, {place.sample, n, k}, false);
      });
  findings.push_back(check.finding());
}

/// `needed_to`: the conversion is used at n .. n + needed_to for n >= threshold.
void check_free_of_index(Context& context, const proof::Conversion& conversion,
                         const std::string& name, unsigned needed_to,
                         std::vector<Finding>& findings) {
  Check check(name);
  for (const Place& place : context.running_places())
    for (unsigned shift = 0; shift <= needed_to; ++shift)
      check.attempt([&] {
        const long n = place.n + static_cast<long>(shift);
        if (!context.admits(place.sample, n)) return;
        check_at(context, conversion, check, {place.sample, n, 0}, true);
      });
  findings.push_back(check.finding());
}

}  // namespace

void check_conversions(Context& context, std::vector<Finding>& findings) {
  check_summand(context, findings);
  if (context.proof.closed)
    check_free_of_index(context, *context.proof.closed, "closed form as atoms",
                        context.proof.order, findings);
  if (context.proof.right_side)
    check_free_of_index(context, *context.proof.right_side, "right side as atoms", 0, findings);
}

}  // namespace sumwright::audit
