// The author's summand, closed form and right side against the atoms they were turned into.
//
// At points of the region: the expression has a value, every leaf and every denominator has the
// value of its product, and the products add up to the expression. Where the argument needs the
// conversion, the region must contain the point.
#include <algorithm>

#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/terms.hpp"
#include "audit/text_reader.hpp"

namespace sumwright::audit {

namespace {

class Comparison {
 public:
  Comparison(Context& context, const proof::Conversion& conversion, const std::string& name)
      : context_(context),
        conversion_(conversion),
        domain_(conversion.region, context.names),
        check_(name) {}

  [[nodiscard]] Finding finding() const { return check_.finding(); }

  /// The summand at its range for n .. n + order, and a little beyond it.
  void over_the_range() {
    for (const Place& place : context_.running_places())
      for (const unsigned shift : {0U, context_.proof.order})
        if (shift == 0 || context_.proof.order > 0)
          check_.attempt([&] { range_at(place.sample, place.n + static_cast<long>(shift)); });
  }

  /// An expression without the index, at n .. n + last for n >= threshold.
  void at_running(unsigned last) {
    for (const Place& place : context_.running_places())
      for (unsigned shift = 0; shift <= last; ++shift)
        check_.attempt([&] {
          const long n = place.n + static_cast<long>(shift);
          if (context_.admits(place.sample, n)) at({place.sample, n, 0}, true);
        });
  }

 private:
  void range_at(std::size_t sample, long n) {
    if (!context_.admits(sample, n)) return;
    if (context_.claim.sum.over.empty()) return at({sample, n, 0}, true);
    const Interval range = context_.author.range(sample, n);
    for (const long k : spread(range.low, range.high, sample == 0 ? 12 : 6))
      at({sample, n, k}, true);
    if (!domain_.delimited()) return;  // nothing is said beyond the range
    for (const long k : {range.low - 2, range.low - 1, range.high + 1, range.high + 2})
      at({sample, n, k}, false);
  }

  void at(const Place& place, bool needed) {
    context_.tick();
    const Point point = context_.at(place);
    if (!domain_.contains(point)) {
      if (needed)
        check_.fail("the region " + conversion_.region.text + " leaves out " + text_of(point));
      return;
    }
    const Value written = &conversion_ == &context_.proof.summand
                              ? context_.author.term(place.sample, place.n, place.k)
                              : evaluate(*conversion_.expression, point);
    check_.expect_same(written, products_at(context_, conversion_, place),
                       "expression against atoms", point);
    leaves_at(point);
    denominators_at(point);
  }

  void leaves_at(const Point& point) {
    for (const proof::Leaf& leaf : conversion_.leaves) {
      const bool reciprocal = leaf.rule == proof::LeafRule::reciprocal_factorial;
      const Value written = evaluate(*leaf.expression, point, reciprocal);
      if (!written.exists()) continue;  // beside a factor 0, else the whole has no value
      check_.expect_same(written, value_of(leaf.value, point), to_text(*leaf.expression), point);
    }
  }

  /// The c of u^-c with a literal c, whose divisor is u^c; 1 for quotients.
  static unsigned long written_exponent(const proof::Denominator& one) {
    const claim::Expression& node = *one.node;
    if (node.operation != claim::Operation::power || node.children[0] != one.expression) return 1;
    const claim::Expression& exponent = *node.children[1];
    if (exponent.operation != claim::Operation::negate) return 1;
    return exponent.children[0]->value.get_ui();
  }

  void denominators_at(const Point& point) {
    for (const proof::Denominator& one : conversion_.denominators) {
      const Value base = evaluate(*one.expression, point);
      Value written = base;
      for (unsigned long i = 1; i < written_exponent(one); ++i) written = times(written, base);
      const std::string text = "the denominator " + to_text(*one.expression);
      check_.expect_same(written, value_of(one.as_product, point), text, point);
      check_.expect_same(times(written, value_of(one.reciprocal, point)), Value::of(1),
                         text + " times its reciprocal", point);
    }
  }

  Context& context_;
  const proof::Conversion& conversion_;
  Domain domain_;
  Check check_;
};

}  // namespace

void check_conversions(Context& context, std::vector<Finding>& findings) {
  Comparison summand(context, context.proof.summand, "summand as atoms");
  summand.over_the_range();
  findings.push_back(summand.finding());
  if (context.proof.closed) {
    Comparison closed(context, *context.proof.closed, "closed form as atoms");
    closed.at_running(context.proof.order);
    findings.push_back(closed.finding());
  }
  if (context.proof.right_side) {
    Comparison right(context, *context.proof.right_side, "right side as atoms");
    right.at_running(0);
    findings.push_back(right.finding());
  }
}

}  // namespace sumwright::audit
