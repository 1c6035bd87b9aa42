// Ends for infinite ranges: where they are, that nothing lies beyond, and that none is made up.
#include "proof/finite_ends.hpp"

#include <gtest/gtest.h>

#include "claim/expression.hpp"
#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

struct Row {
  const char* summand;
  const char* low;
  const char* high;
  const char* found;  ///< "low .. high"
};

std::string ends_of(const Row& row) {
  testing::ClaimParts parts;
  parts.summand = row.summand;
  parts.low = row.low;
  parts.high = row.high;
  parts.parameters = "m = { in = \"integers\", at_least = 0 }";
  const Terms terms = testing::terms_of(parts);
  if (!terms.finite) return "none";
  return claim::to_text(*terms.finite->range.low.value) + (terms.finite->below ? " v" : "") +
         " .. " + claim::to_text(*terms.finite->range.high.value) +
         (terms.finite->above ? " v" : "");
}

TEST(FiniteEnds, OfTheSupport) {
  const Row rows[] = {
      {"binomial(n, k)", "-inf", "inf", "0 v .. n v"},
      {"binomial(n, k)", "-inf", "n", "0 v .. n"},
      {"binomial(n, k)", "0", "inf", "0 .. n v"},
      {"binomial(n, 2*k)", "-inf", "inf", "0 v .. floor(n/2) v"},
      {"binomial(n, 3*k + 1)", "-inf", "inf", "0 v .. floor((n - 1)/3) v"},
      {"binomial(2*n, n + k)", "-inf", "inf", "-n v .. n v"},
      {"binomial(m, k)*binomial(n, k)", "-inf", "inf", "0 v .. m v"},
      {"binomial(n, k) + binomial(n + 1, k)", "-inf", "inf", "0 v .. n + 1 v"},
  };
  for (const Row& row : rows) EXPECT_EQ(ends_of(row), row.found) << row.summand;
}

TEST(FiniteEnds, NoneWhereTheTermsGoOn) {
  for (const Row& row : {Row{"2^k", "-inf", "n", ""}, Row{"1/(k + 1)", "0", "inf", ""},
                         Row{"binomial(k, m)", "0", "inf", ""}}) {
    testing::ClaimParts parts;
    parts.summand = row.summand;
    parts.low = row.low;
    parts.high = row.high;
    parts.parameters = "m = { in = \"integers\", at_least = 0 }";
    const Proof proof = testing::decide(parts);
    EXPECT_NE(testing::name_of(proof.verdict), "established") << row.summand;
    EXPECT_FALSE(proof.finite_range) << row.summand;
  }
}

TEST(FiniteEnds, TheClaimKeepsItsInfiniteRange) {
  testing::ClaimParts parts;
  parts.low = "-inf";
  parts.high = "inf";
  parts.closed = "2^n";
  const Proof proof = testing::decide(parts);
  ASSERT_EQ(testing::name_of(proof.verdict), "established") << proof.reason;
  EXPECT_FALSE(proof.claim->sum.over[0].low.value);
  EXPECT_FALSE(proof.claim->sum.over[0].high.value);
  ASSERT_TRUE(proof.finite_range);
  EXPECT_EQ(claim::to_text(*proof.summed_range().high.value), "n");
  for (const auto& vanishing : {proof.finite_range->below, proof.finite_range->above}) {
    ASSERT_TRUE(vanishing);
    EXPECT_EQ(vanishing->atoms.size(), proof.summand.products.size());
  }
}

}  // namespace
}  // namespace sumwright::proof::building
