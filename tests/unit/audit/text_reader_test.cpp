// Shown texts read back: expressions, comparisons, regions.
#include "audit/text_reader.hpp"

#include <gtest/gtest.h>

#include "audit/evaluator.hpp"
#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

const std::vector<std::string> kNames{"n", "k", "x"};

TEST(AuditTextReader, ExpressionsRoundTrip) {
  for (const char* text :
       {"n + k*x - 3", "-2*(2*n + 1)", "2^-k", "a", "(n + 1)^2/(k - 1)", "binomial(2*n, n)^2",
        "rising(x, k)/factorial(n)", "-n^2", "(-n)^2", "n - (k - 1)", "min(n, floor(k/2))"}) {
    const claim::ExpressionPtr tree = read_expression(text, {"n", "k", "x", "a"});
    ASSERT_TRUE(tree) << text;
    EXPECT_EQ(claim::to_text(*tree), text);
  }
}

TEST(AuditTextReader, WhatIsNoExpression) {
  for (const char* text : {"", "n +", "2 n", "m", "(n", "n)", "binomial(n)", "factorial(n, k)",
                           "sin(n)", "1.5", "n^^2", "*n", "binomial", "min()"})
    EXPECT_FALSE(read_expression(text, kNames)) << text;
  EXPECT_FALSE(read_expression(std::string(100000, '(') + "n" + std::string(100000, ')'), kNames));
  EXPECT_FALSE(read_expression(std::string(100000, '-') + "n", kNames));
}

TEST(AuditTextReader, Comparisons) {
  EXPECT_EQ(read_comparisons("n >= 2, 0 <= k <= n + 1", kNames).size(), 3U);
  EXPECT_EQ(read_comparisons("n + 1 != 0", kNames).size(), 1U);
  EXPECT_EQ(read_comparisons("n >= 0 and k < n", kNames).size(), 2U);
  EXPECT_EQ(read_comparisons("0 <= k <= min(n, 2*x)", kNames).size(), 2U);
  EXPECT_TRUE(read_comparisons("F(n, k) = 0 between the ends", kNames).empty());
  EXPECT_TRUE(read_comparisons("n", kNames).empty());
  EXPECT_TRUE(read_comparisons("", kNames).empty());
}

TEST(AuditTextReader, ComparisonsHold) {
  const Point at{kNames, {numeric(3), numeric(2), numeric(1, 2)}};
  const auto value = [&](const std::string& text) {
    return holds(read_comparisons(text, kNames).at(0), at);
  };
  EXPECT_EQ(value("n > k"), true);
  EXPECT_EQ(value("n < k"), false);
  EXPECT_EQ(value("n <= 3"), true);
  EXPECT_EQ(value("k >= 3"), false);
  EXPECT_EQ(value("2*x = 1"), true);
  EXPECT_EQ(value("2*x != 1"), false);
  EXPECT_EQ(value("1/(k - 2) != 1"), std::nullopt);
}

TEST(AuditTextReader, Domains) {
  const testing::Notation w(kNames);
  const auto at = [](long n, long k) {
    return Point{kNames, {numeric(n), numeric(k), numeric(0)}};
  };
  proof::Region region;
  EXPECT_FALSE(Domain(region, kNames).delimited());
  EXPECT_TRUE(Domain(region, kNames).contains(at(-5, 9)));
  region.text = "n >= 2, 0 <= k <= n";
  EXPECT_TRUE(Domain(region, kNames).delimited());
  EXPECT_TRUE(Domain(region, kNames).contains(at(2, 2)));
  EXPECT_FALSE(Domain(region, kNames).contains(at(2, 3)));
  region.nonnegative = {w.affine("k - 1")};  // text and data must both hold
  EXPECT_FALSE(Domain(region, kNames).contains(at(2, 0)));
  EXPECT_TRUE(Domain(region, kNames).contains(at(2, 1)));
}

}  // namespace
}  // namespace sumwright::audit
