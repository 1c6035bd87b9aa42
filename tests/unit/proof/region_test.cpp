// The common range: where it lies, which points are left over, what is refused.
#include "proof/region.hpp"

#include <gtest/gtest.h>

#include "proof/telescoping.hpp"
#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::ClaimParts;

struct Chosen {
  std::optional<RegionDraft> region;
  std::string why;
  std::string text;  ///< "low .. high; shift: low points, high points[ v v]; ..."
};

Chosen choose(const ClaimParts& parts, unsigned order, const std::vector<std::string>& needs,
              long threshold = 0) {
  const Terms terms = testing::terms_of(parts);
  std::vector<Need> list;
  for (const std::string& form : needs)
    list.push_back(
        {ConditionKind::factorial_argument, testing::affine(terms.setting, form), std::nullopt});
  Chosen out;
  out.region = choose_region(terms.setting, *terms.range, terms.summand.products, order, list,
                             threshold, out.why);
  if (!out.region) return out;
  out.text = term::text(terms.setting, out.region->low) + " .. " +
             term::text(terms.setting, out.region->high);
  for (const RangeDraft& r : out.region->ranges)
    out.text += "; " + std::to_string(r.low_points) + (r.below ? "v" : "") + " " +
                std::to_string(r.high_points) + (r.above ? "v" : "");
  return out;
}

TEST(Region, NaturalEndsReachAsFarAsTheLastShift) {
  EXPECT_EQ(choose({}, 1, {}).text, "0 .. n + 1; 0 0v; 0 0");
  EXPECT_EQ(choose({}, 2, {}).text, "0 .. n + 2; 0 0v; 0 0v; 0 0");
}

TEST(Region, OtherEndsLeavePointsOver) {
  ClaimParts parts;
  parts.summand = "binomial(2*n, k)";  // the end n is not natural
  EXPECT_EQ(choose(parts, 1, {}).text, "0 .. n; 0 0; 0 1");
  parts.high = "2*n";
  EXPECT_EQ(choose(parts, 1, {}).text, "0 .. 2*n + 2; 0 0v; 0 0");
  parts.low = "n";
  EXPECT_EQ(choose(parts, 1, {}).text.substr(0, 5), "n + 1");
}

TEST(Region, NeedsNarrowTheRange) {
  EXPECT_EQ(choose({}, 0, {"k - 1"}, 1).text, "1 .. n; 1 0");
  EXPECT_EQ(choose({}, 0, {"n - k - 2"}, 2).text, "0 .. n - 2; 0 2");
  const Chosen far = choose({}, 0, {"n - 2*k"});
  EXPECT_FALSE(far.region);
  EXPECT_EQ(far.why, "n - 2*k >= 0");
  const Chosen free = choose({}, 0, {"n - 3"});
  EXPECT_FALSE(free.region);
  EXPECT_EQ(free.why, "n - 3 >= 0") << "a larger threshold is asked for first";
  EXPECT_TRUE(choose({}, 0, {"n - 3"}, 3).region);
}

TEST(Region, FloorsNeedASupport) {
  ClaimParts parts;
  parts.summand = "binomial(n - k, k)";
  parts.high = "floor(n/2)";
  const Chosen natural = choose(parts, 1, {});
  ASSERT_TRUE(natural.region) << natural.why;
  parts.summand = "binomial(n, k)";
  const Chosen other = choose(parts, 1, {});
  EXPECT_FALSE(other.region);
  EXPECT_NE(other.why.find("upper end of the range is not natural"), std::string::npos)
      << other.why;
}

TEST(Region, EmptyRangesAreNotTelescoped) {
  ClaimParts parts;
  parts.summand = "2^k";
  parts.low = "3";
  parts.high = "n";
  const Chosen early = choose(parts, 0, {}, 0);
  EXPECT_FALSE(early.region);
  EXPECT_EQ(early.why, "the common range may be empty");
  EXPECT_EQ(choose(parts, 0, {}, 3).text, "3 .. n; 0 0");
}

/// The author's sum at n + i is the sum over the common range plus the points: brute force.
void expect_same_sums(const ClaimParts& parts, unsigned order, long threshold,
                      const std::vector<std::string>& needs = {}) {
  const Chosen chosen = choose(parts, order, needs, threshold);
  ASSERT_TRUE(chosen.region) << chosen.why;
  const Terms terms = testing::terms_of(parts);
  for (long n = threshold; n <= threshold + 7; ++n)
    for (unsigned i = 0; i <= order; ++i) {
      testing::Point at(terms.setting.size(), mpq_class(2));
      at[0] = n;
      const RangeDraft& r = chosen.region->ranges[i];
      const mpz_class low = testing::value_of(chosen.region->low, at) - r.low_points;
      const mpz_class high = testing::value_of(chosen.region->high, at) + r.high_points;
      at[0] = n + static_cast<long>(i);
      mpq_class sum = 0;
      for (mpz_class k = low; k <= high; ++k) {
        at[1] = k;
        const testing::Number f = testing::value_of(terms.summand.products, at);
        ASSERT_TRUE(f) << "no value at n = " << at[0] << ", k = " << k;
        sum += *f;
      }
      term::Assignment where = testing::assignment(terms.setting, at);
      const term::Value direct = term::evaluate_sum(terms.setting.claim->sum, where);
      ASSERT_TRUE(direct.number);
      EXPECT_EQ(*direct.number, sum) << parts.summand << " n = " << n << ", i = " << i;
    }
}

TEST(Region, TheSumsStayTheSame) {
  ClaimParts parts;
  expect_same_sums(parts, 2, 0);
  expect_same_sums(parts, 1, 1, {"k - 1"});
  parts.summand = "binomial(2*n, k)";
  expect_same_sums(parts, 1, 0);
  parts.high = "2*n";
  expect_same_sums(parts, 2, 0);
  parts.low = "n";
  expect_same_sums(parts, 1, 1);
  parts = {};
  parts.summand = "binomial(n - k, k)";
  parts.high = "floor(n/2)";
  expect_same_sums(parts, 2, 2, {"n - k"});
  parts = {};
  parts.summand = "binomial(n, 2*k)";
  expect_same_sums(parts, 2, 0);
  parts.summand = "2^k";
  parts.low = "3";
  expect_same_sums(parts, 1, 4);
}

}  // namespace
}  // namespace sumwright::proof::building
