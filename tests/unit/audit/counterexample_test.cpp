// Counterexamples from the claim alone.
#include <gtest/gtest.h>

#include "audit/audit.hpp"
#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

std::string found(const std::string& summand, const std::string& rest) {
  const auto claim = testing::read_claim(R"(
format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = ")" + summand + R"("
over = [ { index = "k", low = 0, high = "n" } ]
)" + rest);
  return find_counterexample(*claim);
}

TEST(AuditCounterexample, TrueClaims) {
  EXPECT_EQ(found("binomial(n, k)", "[equals]\nclosed = \"2^n\"\n"), "");
  EXPECT_EQ(found("binomial(n, k)", "[evidence]\nrecurrence = [\"-2\", \"1\"]\n"), "");
  EXPECT_EQ(found("binomial(n, k)",
                  "[evidence]\nrecurrence = [\"0\", \"1\"]\nright_side = \"2^(n + 1)\"\n"),
            "");
  EXPECT_EQ(found("binomial(n, k)", ""), "");
  EXPECT_EQ(
      found("binomial(n, k)",
            "[equals]\nsummand = \"1\"\nover = [ { index = \"j\", low = 1, high = \"2\" } ]\n"),
      "n = 0: 1 against 2");
}

TEST(AuditCounterexample, FalseEqualities) {
  EXPECT_EQ(found("binomial(n, k)", "[equals]\nclosed = \"n + 1\"\n"), "n = 2: 4 against 3");
  EXPECT_EQ(
      found("binomial(n, k)*x^k",
            "[equals]\nclosed = \"2^n\"\n[parameters]\nx = { in = \"rationals\", not = [\"1\"] }\n")
          .substr(0, 6),
      "n = 1,");
}

TEST(AuditCounterexample, FalseRecurrences) {
  EXPECT_EQ(found("binomial(n, k)", "[evidence]\nrecurrence = [\"-3\", \"1\"]\n"),
            "n = 0: -1 against 0");
  EXPECT_EQ(
      found("binomial(n, k)", "[evidence]\nrecurrence = [\"-2\", \"1\"]\nright_side = \"n\"\n"),
      "n = 1: 0 against 1");
}

TEST(AuditCounterexample, AVanishingDenominatorOfACoefficientIsNoCounterexample) {
  EXPECT_EQ(found("binomial(n, k)", "[evidence]\nrecurrence = [\"-2/(n - 3)\", \"1/(n - 3)\"]\n"),
            "");
}

TEST(AuditCounterexample, SumsWithoutAValue) {
  EXPECT_EQ(found("1/(k - 4)", "[evidence]\nrecurrence = [\"1\"]\nright_side = \"1\"\n"),
            "n = 0: -1/4 against 1");
  EXPECT_EQ(
      found("factorial(3 - k)", ""),
      "n = 4: no value (factorial of -1 at n = 4, k = 4) against no value (factorial of -1 at "
      "n = 4, k = 4)");
  EXPECT_EQ(found("binomial(n, k)", "[equals]\nclosed = \"2^n*(n - 5)/(n - 5)\"\n"),
            "n = 5: 32 against no value (division by 0)");
}

TEST(AuditCounterexample, FarBeyondWhatIsAddedUpNothingIsSaid) {
  const auto claim = testing::read_claim(R"(
format = 1
title = "t"
running = "n"
from = 900000
[sum]
summand = "1"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = "n"
)");
  EXPECT_EQ(find_counterexample(*claim), "");
}

}  // namespace
}  // namespace sumwright::audit
