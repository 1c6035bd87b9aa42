// The parameter values at which the author's own divisors vanish.
#include "audit/special_values.hpp"

#include <gtest/gtest.h>

#include "audit/audit.hpp"
#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

std::shared_ptr<const claim::Claim> with_closed(const std::string& closed,
                                                const std::string& parameter) {
  return testing::read_claim(R"(
format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)*x^k"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = ")" + closed + "\"\n[parameters]\nx = { in = \"rationals\"" +
                             parameter + " }\n");
}

TEST(AuditSpecialValues, LinearRoots) {
  const auto root = [](const std::function<Value(const numeric&)>& f) { return linear_root(f); };
  EXPECT_EQ(
      text_of(*root([](const numeric& x) { return Value::of(numeric(3) * x - numeric(17)); })),
      "17/3");
  EXPECT_FALSE(root([](const numeric& x) { return Value::of(x * x); }));
  EXPECT_FALSE(root([](const numeric&) { return Value::of(4); }));
  EXPECT_FALSE(root([](const numeric&) { return Value::outside("nothing"); }));
}

TEST(AuditSpecialValues, DivisorsOfTheClaim) {
  const auto claim = with_closed("(3*x - 17)*(1 + x)^n/(3*x - 17)", "");
  const Point base{{"n", "x"}, {numeric(0), numeric(2, 7)}};
  const std::vector<Point> found = special_points(*claim, base, 8);
  ASSERT_EQ(found.size(), 3U);  // of x^k, 3x - 17 and 1 + x
  EXPECT_EQ(text_of(found[0].at("x")), "0");
  EXPECT_EQ(text_of(found[1].at("x")), "17/3");
  EXPECT_EQ(text_of(found[2].at("x")), "-1");
  EXPECT_EQ(special_points(*claim, base, 2).size(), 2U);
}

TEST(AuditSpecialValues, ExcludedValuesAreLeftOut) {
  const auto claim = with_closed("(3*x - 17)*(1 + x)^n/(3*x - 17)", ", not = [\"17/3\", \"-1\"]");
  const Point base{{"n", "x"}, {numeric(0), numeric(2, 7)}};
  EXPECT_EQ(special_points(*claim, base, 8).size(), 1U);
  EXPECT_EQ(find_counterexample(*claim), "");
}

TEST(AuditSpecialValues, CounterexamplesAreFoundThere) {
  EXPECT_EQ(find_counterexample(*with_closed("(3*x - 17)*(1 + x)^n/(3*x - 17)", "")),
            "n = 0, x = 17/3: 1 against no value (division by 0)");
}

}  // namespace
}  // namespace sumwright::audit
