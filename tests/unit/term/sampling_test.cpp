// Parameter values that satisfy a claim's hypotheses.
#include <gtest/gtest.h>

#include <algorithm>
#include <set>
#include <stdexcept>
#include <string>

#include "claim/reader.hpp"
#include "term/evaluation.hpp"

namespace sumwright::term {
namespace {

claim::Claim claim_with(const std::string& parameters, const std::string& assume = "",
                        const std::string& summand = "1", const std::string& closed = "n + 1") {
  std::string text = "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 2\n";
  if (!assume.empty()) text += "assume = [" + assume + "]\n";
  text += "[sum]\nsummand = \"" + summand +
          "\"\nover = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n";
  text += "[equals]\nclosed = \"" + closed + "\"\n[parameters]\n" + parameters + "\n";
  return claim::read_claim_text("test", text).claim;
}

std::string values_of(const claim::Claim& claim, const std::string& name, std::size_t count) {
  std::string text;
  for (const Assignment& at : sample_parameters(claim, count)) {
    text += (text.empty() ? "" : " ") + at.at(name).get_str();
  }
  return text;
}

TEST(SampleParameters, WithoutParametersIsOneEmptyAssignment) {
  const auto samples = sample_parameters(claim_with(""), 5);
  ASSERT_EQ(samples.size(), 1U);
  EXPECT_TRUE(samples[0].empty());
}

TEST(SampleParameters, SmallValuesFirst) {
  EXPECT_EQ(values_of(claim_with("m = { in = \"integers\", at_least = 3 }"), "m", 5), "3 4 5 6 7");
  EXPECT_EQ(values_of(claim_with("m = { in = \"integers\", at_least = -2 }"), "m", 3), "-2 -1 0");
  EXPECT_EQ(values_of(claim_with("m = { in = \"integers\" }"), "m", 5), "0 1 -1 2 -2");
  EXPECT_EQ(values_of(claim_with("x = { in = \"rationals\" }"), "x", 8),
            "0 1 -1 2 1/2 -1/2 3 -3/2");
  EXPECT_EQ(values_of(claim_with("x = { in = \"rationals\" }"), "x", 0), "");
}

TEST(SampleParameters, ExcludedValuesAreSkipped) {
  const auto first = [](const std::string& exclusions) {
    return values_of(claim_with("x = { in = \"rationals\", not = [" + exclusions + "] }"), "x", 4);
  };
  EXPECT_EQ(first("\"0\", \"1/2\""), "1 -1 2 -1/2");
  EXPECT_EQ(first("\"integers\""), "1/2 -1/2 -3/2 1/3");
  EXPECT_EQ(first("\"positive integers\""), "0 -1 1/2 -1/2");
  EXPECT_EQ(first("\"negative integers\""), "0 1 2 1/2");
  EXPECT_EQ(first("\"nonnegative integers\""), "-1 1/2 -1/2 -3/2");
  EXPECT_EQ(first("\"nonpositive integers\""), "1 2 1/2 -1/2");
}

TEST(SampleParameters, ZerosOfTheClaimComeEarly) {
  const claim::Claim claim =
      claim_with("x = { in = \"rationals\" }", "", "3*x + 22", "(n + 1)*(x^2 - 9)");
  EXPECT_EQ(values_of(claim, "x", 6), "0 1 -22/3 3 -3 -1");
}

TEST(SampleParameters, ThresholdsOfFunctionsComeEarly) {
  const std::string x = "x = { in = \"rationals\", not = [\"0\", \"-1\"] }";
  EXPECT_EQ(values_of(claim_with(x, "", "1/rising(x, k)"), "x", 2), "1 -2");
  EXPECT_EQ(values_of(claim_with(x, "", "binomial(x + 3, 12)"), "x", 3), "1 -3 9");
}

TEST(SampleParameters, SeveralParametersAreMixed) {
  const claim::Claim claim = claim_with(
      "a = { in = \"integers\" }\nb = { in = \"rationals\", not = [\"0\"] }\nc = { in = "
      "\"integers\", at_least = 1 }");
  const auto samples = sample_parameters(claim, 12);
  ASSERT_EQ(samples.size(), 12U);
  EXPECT_EQ(samples[0], (Assignment{{"a", 0}, {"b", 1}, {"c", 1}}));
  std::set<Assignment> distinct(samples.begin(), samples.end());
  EXPECT_EQ(distinct.size(), 12U);
  EXPECT_TRUE(std::any_of(samples.begin(), samples.end(), [](const Assignment& at) {
    return at.at("a") != at.at("b") && at.at("b") != at.at("c") && at.at("a") != at.at("c") &&
           at.at("a") != 0;
  }));
  for (const Assignment& at : samples) EXPECT_TRUE(satisfies_hypotheses(claim, at));
  EXPECT_EQ(sample_parameters(claim, 12), samples);
}

TEST(SampleParameters, AssumptionsAreMet) {
  const claim::Claim claim = claim_with(
      "a = { in = \"integers\" }\nb = { in = \"integers\", at_least = 2 }\nc = { in = \"integers\" "
      "}",
      "\"a >= b + 1\", \"c > 2*a\", \"a != 5\"");
  const auto samples = sample_parameters(claim, 10);
  ASSERT_EQ(samples.size(), 10U);
  EXPECT_EQ(samples[0].at("a"), 3);  // the boundary
  EXPECT_EQ(samples[0].at("b"), 2);
  for (const Assignment& at : samples) {
    EXPECT_GE(at.at("a"), at.at("b") + 1);
    EXPECT_GT(at.at("c"), 2 * at.at("a"));
    EXPECT_NE(at.at("a"), 5);
  }
}

TEST(SampleParameters, AssumptionsOnTheRunningVariableAreLeftToTheCaller) {
  EXPECT_EQ(
      values_of(claim_with("m = { in = \"integers\", at_least = 0 }", "\"m <= n - 3\""), "m", 3),
      "0 1 2");
}

TEST(SampleParameters, FarAssumptionsAreMet) {
  const claim::Claim far = claim_with("m = { in = \"integers\" }\np = { in = \"integers\" }",
                                      "\"m >= 1000\", \"p < m\"");
  const auto samples = sample_parameters(far, 3);
  ASSERT_EQ(samples.size(), 3U);
  for (const Assignment& at : samples) EXPECT_GE(at.at("m"), 1000);
  const claim::Claim unequal =
      claim_with("x = { in = \"rationals\" }\ny = { in = \"rationals\" }", "\"x != y\"");
  for (const Assignment& at : sample_parameters(unequal, 8)) EXPECT_NE(at.at("x"), at.at("y"));
}

TEST(SatisfiesHypotheses, RunningVariable) {
  const claim::Claim claim = claim_with("m = { in = \"integers\" }", "\"m <= n\"");
  EXPECT_TRUE(satisfies_hypotheses(claim, {{"n", 3}, {"m", 3}}));
  EXPECT_FALSE(satisfies_hypotheses(claim, {{"n", 3}, {"m", 4}}));
  EXPECT_FALSE(satisfies_hypotheses(claim, {{"n", 1}, {"m", 0}}));  // from = 2
  EXPECT_FALSE(satisfies_hypotheses(claim, {{"n", mpq_class(5, 2)}, {"m", 0}}));
  EXPECT_THROW((void)satisfies_hypotheses(claim, {{"m", 0}}), std::invalid_argument);
  EXPECT_THROW((void)satisfies_hypotheses(claim, {{"n", 3}}), std::invalid_argument);
}

TEST(SatisfiesHypotheses, EveryComparison) {
  const auto allows = [](const std::string& comparison, long m) {
    return satisfies_hypotheses(
        claim_with("m = { in = \"integers\" }", "\"m " + comparison + " 4\""), {{"m", m}});
  };
  for (long m = 3; m <= 5; ++m) {
    EXPECT_EQ(allows("<=", m), m <= 4);
    EXPECT_EQ(allows("<", m), m < 4);
    EXPECT_EQ(allows(">=", m), m >= 4);
    EXPECT_EQ(allows(">", m), m > 4);
    EXPECT_EQ(allows("!=", m), m != 4);
  }
}

TEST(SatisfiesHypotheses, RingsAndExclusions) {
  const claim::Claim integers = claim_with("m = { in = \"integers\", at_least = 1 }");
  EXPECT_TRUE(satisfies_hypotheses(integers, {{"m", 1}}));
  EXPECT_FALSE(satisfies_hypotheses(integers, {{"m", 0}}));
  EXPECT_FALSE(satisfies_hypotheses(integers, {{"m", mpq_class(3, 2)}}));
  const claim::Claim rationals =
      claim_with("x = { in = \"rationals\", not = [\"-1/2\", \"nonpositive integers\"] }");
  EXPECT_TRUE(satisfies_hypotheses(rationals, {{"x", mpq_class(1, 2)}}));
  EXPECT_FALSE(satisfies_hypotheses(rationals, {{"x", mpq_class(-1, 2)}}));
  EXPECT_FALSE(satisfies_hypotheses(rationals, {{"x", -7}}));
}

}  // namespace
}  // namespace sumwright::term
