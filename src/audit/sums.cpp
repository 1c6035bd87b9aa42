// The claim itself, with nothing of the proof: the sums added up for the first n, and for those
// at which ends of the range meet.
#include <set>

#include "audit/checks.hpp"
#include "audit/claim_sides.hpp"
#include "audit/hypotheses.hpp"

namespace sumwright::audit {

void check_sums(Context& context, std::vector<Finding>& findings) {
  Check check("sums added up");
  if (context.samples.empty()) check.fail("no parameter values found that the hypotheses admit");
  const long from = context.proof.from;
  for (std::size_t sample = 0; sample < context.samples.size(); ++sample) {
    std::set<long> places(context.crossings(sample).begin(), context.crossings(sample).end());
    for (long n = from; n < from + context.options.sum_span; ++n) places.insert(n);
    for (const long n : places)
      check.attempt([&] {
        context.tick();
        if (!context.admits(sample, n)) return;
        const Sides sides = sides_at(context.claim, context.author, sample, n);
        if (sides.comparable)
          check.expect_same(sides.left, sides.right, "the claim", context.at({sample, n, 0}));
      });
  }
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
