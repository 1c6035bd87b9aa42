// Ranges that move with n: for every shift, the author's sum at n+i against the common range plus
// explicit points, added up; and the reason why F vanishes where the two ranges differ.
#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/terms.hpp"

namespace sumwright::audit {

namespace {

constexpr long kMostTerms = 400;  // of one sum added up here

struct Step {
  Context& context;
  Check& check;
  const proof::RangeStep& step;
  Place place;

  /// Per product an rfact with a negative argument at k.
  void vanishes(const std::optional<proof::Vanishing>& reason, long k) {
    const Point point = context.at({place.sample, place.n, k});
    const std::string where = "F(n+" + std::to_string(step.shift) + ",k) at " + text_of(point);
    if (!reason) return check.fail("no reason why " + where + " may be left out or added");
    check.expect(reason->atoms.size() == context.proof.summand.products.size(),
                 [&] { return std::string("not one vanishing atom per product"); });
    for (const proof::Atom& atom : reason->atoms)
      check.expect(
          atom.kind == proof::AtomKind::reciprocal_factorial && value_of(atom.argument, point) < 0,
          [&] { return "the atom does not vanish: " + where; });
  }

  void run() {
    context.tick();
    const proof::Telescoping& telescoping = *context.proof.telescoping;
    const Point point = context.at(place);
    const long shifted_n = place.n + static_cast<long>(step.shift);
    const Interval author = context.author.range(place.sample, shifted_n);
    const long low = value_of(telescoping.low, point) - static_cast<long>(step.low_points);
    const long high = value_of(telescoping.high, point) + static_cast<long>(step.high_points);
    if (high - low > kMostTerms) throw TooLarge("a long sum");
    Value sum = Value::of(0);
    for (long k = low; k <= high; ++k)
      sum = plus(sum, products_at(context, context.proof.summand, {place.sample, place.n, k},
                                  static_cast<long>(step.shift)));
    check.expect_same(context.author.sum(place.sample, shifted_n), sum,
                      "S(n+" + std::to_string(step.shift) + ") against the common range", point);
    const auto between = [&](const std::optional<proof::Vanishing>& reason, long a, long b) {
      for (const long k : spread(a, b)) vanishes(reason, k);
    };
    // Points of the one range that the other's end leaves out; the author's range may be empty.
    if (!author.windowed_low) {
      between(step.below, low, std::min(author.low - 1, high));
      between(step.below, author.low, low - 1);
    }
    if (!author.windowed_high) {
      between(step.above, std::max(author.high + 1, low), high);
      between(step.above, high + 1, author.high);
    }
  }
};

}  // namespace

void check_ranges(Context& context, std::vector<Finding>& findings) {
  if (!context.proof.telescoping) return;
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  Check check("ranges");
  for (const Place& place : context.running_places())
    check.attempt([&] {
      const Point point = context.at(place);
      check.expect(value_of(telescoping.low, point) <= value_of(telescoping.high, point) + 1, [&] {
        return "telescoping over a range that is shorter than empty at " + text_of(point);
      });
    });
  for (const proof::RangeStep& step : context.proof.ranges)
    for (const Place& place : context.running_places())
      if (context.admits(place.sample, place.n + static_cast<long>(step.shift)))
        check.attempt([&] { Step{context, check, step, place}.run(); });
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
