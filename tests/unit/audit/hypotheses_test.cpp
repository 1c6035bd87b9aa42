// Parameter samples satisfy the claim's hypotheses and reach its boundaries.
#include "audit/hypotheses.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <set>

#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

std::shared_ptr<const claim::Claim> with(const std::string& assume, const std::string& parameters) {
  return testing::read_claim(R"(
format = 1
title = "t"
running = "n"
from = 2
)" + assume + R"(
[sum]
summand = "1"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = "n + 1"
)" + parameters);
}

std::vector<Point> samples(const claim::Claim& claim, std::size_t count) {
  std::vector<std::string> names{"n", "k"};
  for (const claim::Parameter& one : claim.parameters) names.push_back(one.name);
  return sample_parameters(claim, names, count, 12);
}

std::set<std::string> values(const std::vector<Point>& points, const std::string& name) {
  std::set<std::string> out;
  for (const Point& point : points) out.insert(text_of(point.at(name)));
  return out;
}

TEST(AuditHypotheses, WithoutParametersThereIsOnePoint) {
  const auto claim = with("", "");
  EXPECT_EQ(samples(*claim, 4).size(), 1U);
}

TEST(AuditHypotheses, LowerBoundsAreReached) {
  const auto claim = with("", "[parameters]\nm = { in = \"integers\", at_least = 3 }\n");
  const std::set<std::string> found = values(samples(*claim, 4), "m");
  EXPECT_EQ(found.size(), 4U);
  EXPECT_EQ(found.count("3"), 1U);
  for (const std::string& text : found) EXPECT_GE(std::stoi(text), 3);
}

TEST(AuditHypotheses, ExclusionsAreRespected) {
  const auto claim = with(
      "", "[parameters]\nx = { in = \"rationals\", not = [\"1/2\", \"nonnegative integers\"] }\n");
  const std::vector<Point> found = samples(*claim, 12);
  EXPECT_GE(found.size(), 6U);
  for (const Point& point : found) {
    EXPECT_FALSE(point.at("x").is_nonneg_integer()) << text_of(point);
    EXPECT_FALSE(point.at("x").is_equal(numeric(1, 2)));
  }
  EXPECT_EQ(values(found, "x").count("-1"), 1U);
}

TEST(AuditHypotheses, EveryKindOfExclusion) {
  using Kind = claim::Exclusion::Kind;
  const auto excluded = [](Kind kind, const numeric& value) {
    claim::Exclusion one;
    one.kind = kind;
    one.value = mpq_class(-3, 2);
    return excludes(one, value);
  };
  const numeric half(1, 2);
  struct Row {
    Kind kind;
    bool minus_one, zero, one;
  };
  for (const Row& row :
       {Row{Kind::integers, true, true, true}, Row{Kind::positive_integers, false, false, true},
        Row{Kind::negative_integers, true, false, false},
        Row{Kind::nonnegative_integers, false, true, true},
        Row{Kind::nonpositive_integers, true, true, false}}) {
    EXPECT_EQ(excluded(row.kind, -1), row.minus_one);
    EXPECT_EQ(excluded(row.kind, 0), row.zero);
    EXPECT_EQ(excluded(row.kind, 1), row.one);
    EXPECT_FALSE(excluded(row.kind, half));
  }
  EXPECT_TRUE(excluded(Kind::constant, numeric(-3, 2)));
  EXPECT_FALSE(excluded(Kind::constant, 0));
}

TEST(AuditHypotheses, AssumptionsBetweenParameters) {
  const auto claim = with("assume = [\"a >= b + 2\", \"a != 5\"]",
                          "[parameters]\na = { in = \"integers\", at_least = 0 }\n"
                          "b = { in = \"integers\", at_least = 0 }\n");
  const std::vector<Point> found = samples(*claim, 6);
  EXPECT_GE(found.size(), 4U);
  for (const Point& point : found) {
    EXPECT_TRUE(point.at("a") >= point.at("b") + numeric(2)) << text_of(point);
    EXPECT_FALSE(point.at("a").is_equal(5));
  }
}

TEST(AuditHypotheses, AssumptionsWithTheRunningVariable) {
  const auto claim =
      with("assume = [\"m >= n\"]", "[parameters]\nm = { in = \"integers\", at_least = 0 }\n");
  const std::vector<Point> found = samples(*claim, 4);
  ASSERT_FALSE(found.empty());
  for (const Point& point : found) EXPECT_TRUE(point.at("m") >= 2) << text_of(point);  // from = 2
  Point point = found.front();
  point.set("m", 4);
  point.set("n", 4);
  EXPECT_TRUE(admits(*claim, point));
  point.set("n", 5);
  EXPECT_FALSE(admits(*claim, point));
  point.set("n", 1);
  EXPECT_FALSE(admits(*claim, point));
}

TEST(AuditHypotheses, SeveralParametersGetDifferentValues) {
  const auto claim = with("",
                          "[parameters]\na = { in = \"integers\", at_least = 0 }\n"
                          "b = { in = \"integers\", at_least = 0 }\n"
                          "c = { in = \"integers\", at_least = 0 }\n");
  const Point generic = samples(*claim, 4).front();
  EXPECT_FALSE(generic.at("a").is_equal(generic.at("b")));
  EXPECT_FALSE(generic.at("b").is_equal(generic.at("c")));
  for (const char* name : {"a", "b", "c"}) EXPECT_TRUE(generic.at(name) >= 2) << text_of(generic);
}

TEST(AuditHypotheses, Texts) {
  const auto claim = with("assume = [\"a >= b\"]",
                          "[parameters]\na = { in = \"integers\", at_least = 0 }\n"
                          "b = { in = \"integers\" }\n"
                          "x = { in = \"rationals\", not = [\"-1/2\", \"integers\"] }\n");
  EXPECT_EQ(hypothesis_texts(*claim),
            (std::vector<std::string>{"n>=2", "a>=0", "x!=-1/2", "xnot", "a>=b"}));
}

}  // namespace
}  // namespace sumwright::audit
