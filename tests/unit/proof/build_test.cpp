// Verdicts on short claims: established, refuted at the expected point, undecided with the rule.
#include "proof/build.hpp"

#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof {
namespace {

using testing::ClaimParts;
using testing::decide;

struct Row {
  const char* summand;
  const char* low = "0";
  const char* high = "n";
  const char* closed = "";
  const char* parameters = "";
  const char* assume = "";
  long from = 0;
};

ClaimParts parts_of(const Row& row) {
  ClaimParts out;
  out.summand = row.summand;
  out.low = row.low;
  out.high = row.high;
  out.closed = row.closed;
  out.parameters = row.parameters;
  out.assume = row.assume;
  out.from = row.from;
  return out;
}

constexpr const char* kIntegerM = "m = { in = \"integers\", at_least = 0 }";
constexpr const char* kRationalX = "x = { in = \"rationals\" }";
constexpr const char* kNoInteger = "x = { in = \"rationals\", not = [\"integers\"] }";

TEST(Build, Established) {
  const Row rows[] = {
      {.summand = "binomial(n, k)", .closed = "2^n"},
      {.summand = "binomial(n, k)^2", .closed = "binomial(2*n, n)"},
      {.summand = "binomial(n, k)", .low = "-3", .high = "n + 5", .closed = "2^n"},
      {.summand = "binomial(2*n, k)", .high = "2*n", .closed = "4^n"},
      {.summand = "binomial(2*n + 1, k)", .closed = "4^n"},
      {.summand = "k", .closed = "n*(n + 1)/2"},
      {.summand = "k*factorial(k)", .closed = "factorial(n + 1) - 1"},
      {.summand = "2^k", .closed = "2^(n + 1) - 1"},
      {.summand = "1/(k*(k + 1))", .low = "1", .closed = "n/(n + 1)"},
      {.summand = "binomial(n + k, k)/2^k", .closed = "2^n"},
      {.summand = "x^k*binomial(n, k)", .closed = "(1 + x)^n", .parameters = kRationalX},
      {.summand = "binomial(m, k)*binomial(n, k)",
       .closed = "binomial(n + m, n)",
       .parameters = kIntegerM},
      {.summand = "rising(x, k)/factorial(k)",
       .closed = "rising(x + 1, n)/factorial(n)",
       .parameters = kNoInteger},
      {.summand = "binomial(n, 2*k)", .closed = "2^(n - 1)", .from = 1},
      {.summand = "(-1)^k*binomial(n, k)", .closed = "0", .from = 1},
      {.summand = "binomial(n, k)", .low = "1", .closed = "2^n - 1"},
      {.summand = "binomial(-n - 1, k)*binomial(n, k)", .closed = "(-1)^n"},
      {.summand = "binomial(n, k)*binomial(-7, 3)", .closed = "-84*2^n"},
      {.summand = "2^n", .low = "", .closed = "4*2^(n - 2)"},
  };
  for (const Row& row : rows) {
    SCOPED_TRACE(std::string(row.summand) + " = " + row.closed);
    const Proof proof = decide(parts_of(row));
    EXPECT_EQ(testing::name_of(proof.verdict), "established") << proof.reason;
    EXPECT_FALSE(testing::has_open_condition(proof));
    EXPECT_FALSE(proof.counterexample);
    EXPECT_EQ(proof.ranges.size(), proof.telescoping ? proof.order + 1 : 0U);
    EXPECT_TRUE(proof.closed_recurrence);
    EXPECT_TRUE(proof.leading);
    EXPECT_EQ(static_cast<long>(proof.initial.size()),
              proof.threshold + static_cast<long>(proof.order) - proof.from);
    for (std::size_t i = 0; i < proof.conditions.size(); ++i)
      EXPECT_EQ(proof.conditions[i].id, "c" + std::to_string(i + 1));
  }
}

struct False {
  Row row;
  const char* point;  ///< "n = 3, x = 1/2: left, right"
};

std::string point_of(const Proof& proof) {
  if (!proof.counterexample) return "none";
  std::string out;
  for (const auto& [name, value] : proof.counterexample->values)
    out += (out.empty() ? "" : ", ") + name + " = " + value.get_str();
  return out + ": " + proof.counterexample->left + ", " + proof.counterexample->right;
}

TEST(Build, RefutedAtTheFirstPoint) {
  const False rows[] = {
      {{.summand = "binomial(n, k)", .closed = "2^n + n*(n - 1)"}, "n = 2: 4, 6"},
      {{.summand = "binomial(n, k)", .closed = "2^n + n*(n - 1)*(n - 2)*(n - 3)"}, "n = 4: 16, 40"},
      {{.summand = "binomial(n, k)", .closed = "3^n"}, "n = 1: 2, 3"},
      {{.summand = "binomial(n, k)", .high = "n - 1", .closed = "2^n"}, "n = 0: 0, 1"},
      {{.summand = "(-1)^k*binomial(n, k)", .closed = "0"}, "n = 0: 1, 0"},
      {{.summand = "k*factorial(k)", .closed = "factorial(n + 1)"}, "n = 0: 0, 1"},
      {{.summand = "binomial(n, 2*k)", .closed = "2^(n - 1)"}, "n = 0: 1, 1/2"},
      {{.summand = "1/(k + 1)/(k + 2)", .closed = "1 - 1/(n + 1)"}, "n = 0: 1/2, 0"},
      {{.summand = "1/k", .closed = "n"}, "n = 0, k = 0: no value: division by 0, 0"},
  };
  for (const False& f : rows) {
    SCOPED_TRACE(std::string(f.row.summand) + " = " + f.row.closed);
    const Proof proof = decide(parts_of(f.row));
    EXPECT_EQ(testing::name_of(proof.verdict), "refuted") << proof.reason;
    EXPECT_EQ(proof.subject, Subject::claim);
    EXPECT_EQ(point_of(proof), f.point);
    EXPECT_FALSE(proof.reason.empty());
  }
}

// Errors that small values do not show: they are found when the argument fails.
TEST(Build, RefutedFarOut) {
  const Proof late = decide(parts_of(
      {.summand = "binomial(n, k)",
       .closed = "2^n + n*(n - 1)*(n - 2)*(n - 3)*(n - 4)*(n - 5)*(n - 6)*(n - 7)*(n - 8)*(n - 9)*"
                 "(n - 10)*(n - 11)*(n - 12)*(n - 13)*(n - 14)"}));
  EXPECT_EQ(testing::name_of(late.verdict), "refuted") << late.reason;
  ASSERT_TRUE(late.counterexample);
  EXPECT_EQ(late.counterexample->values.at(0).second, 15);
}

struct Open {
  Row row;
  const char* settle;  ///< what `would_settle` begins with
  const char* reason;  ///< a part of the reason
};

TEST(Build, UndecidedNamesTheRule) {
  const Open rows[] = {
      {{.summand = "binomial(k, m)",
        .low = "0",
        .high = "inf",
        .closed = "2^n",
        .parameters = kIntegerM},
       "a finite end for the range",
       "no finite upper end"},
      {{.summand = "binomial(n, k)", .high = "floor(max(n, 3)/2)"},
       "a rule for nested floors",
       "nests floor"},
      {{.summand = "factorial(2*k)/(4^k*factorial(k)^2)", .closed = "rising(3/2, n)/factorial(n)"},
       "a rule for terms that are similar",
       ""},
      {{.summand = "binomial(m, k)", .high = "m", .closed = "2^m", .parameters = kIntegerM},
       "an auxiliary claim",
       "length depends on a parameter"},
      {{.summand = "x/(x + 2*k)*binomial(x + 2*k, k)*binomial(y + 2*(n - k), n - k)",
        .closed = "binomial(x + y + 2*n, n)",
        .parameters = "x = { in = \"rationals\", not = [\"nonpositive integers\"] }\n"
                      "y = { in = \"rationals\" }"},
       "continuation in a parameter",
       "of the leading coefficient may vanish"},
      {{.summand = "(-1)^k*binomial(n - k, k)*(2*x)^(n - 2*k)",
        .high = "floor(n/2)",
        .parameters = "x = { in = \"rationals\" }"},
       "a rule for ends at which",
       "the identity is not available on the whole range"},
      {{.summand = "binomial(n, k)",
        .high = "m",
        .closed = "2^n",
        .parameters = kIntegerM,
        .assume = "\"m >= n\""},
       "an induction that stays inside",
       "a condition on the running variable"},
      {{.summand = "factorial(m - k)/factorial(m - k)",
        .closed = "n + 1",
        .parameters = kIntegerM,
        .assume = "\"m >= 60\""},
       "a hypothesis of the claim",
       "needs -k + m >= 0"},
  };
  for (const Open& o : rows) {
    SCOPED_TRACE(std::string(o.row.summand) + " = " + o.row.closed);
    const Proof proof = decide(parts_of(o.row));
    EXPECT_EQ(testing::name_of(proof.verdict), "undecided") << point_of(proof);
    EXPECT_EQ(proof.would_settle.substr(0, std::string(o.settle).size()), o.settle)
        << proof.would_settle << " | " << proof.reason;
    EXPECT_NE(proof.reason.find(o.reason), std::string::npos) << proof.reason;
  }
}

TEST(Build, SeveralIndicesAndSumEqualsSumAreUndecided) {
  const std::string two = R"toml(format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)*binomial(k, j)"
over = [ { index = "k", low = "0", high = "n" }, { index = "j", low = "0", high = "k" } ]
[equals]
closed = "3^n"
)toml";
  const Proof double_sum =
      build(std::make_shared<claim::Claim>(claim::read_claim_text("t.toml", two).claim));
  EXPECT_EQ(testing::name_of(double_sum.verdict), "undecided");
  EXPECT_NE(double_sum.reason.find("several indices"), std::string::npos);
  const std::string other = R"toml(format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)^2"
over = [ { index = "k", low = "0", high = "n" } ]
[equals]
summand = "binomial(n, j)^2"
over = [ { index = "j", low = "0", high = "n" } ]
)toml";
  const Proof sums =
      build(std::make_shared<claim::Claim>(claim::read_claim_text("t.toml", other).claim));
  EXPECT_EQ(testing::name_of(sums.verdict), "undecided");
  EXPECT_NE(sums.would_settle.find("sum = sum"), std::string::npos) << sums.would_settle;
}

// Hostile terms: a refusal or `undecided`, never a fault.
TEST(Build, TermsThatAreZero) {
  for (const char* summand : {"binomial(n, k)*binomial(n, -1)", "binomial(n, k)/factorial(-2)",
                              "rising(1, k) - factorial(k)", "0", "k - k"}) {
    SCOPED_TRACE(summand);
    try {
      const Proof proof = decide(parts_of({.summand = summand}));
      EXPECT_EQ(testing::name_of(proof.verdict), "undecided");
      EXPECT_NE(proof.reason.find("identically zero"), std::string::npos) << proof.reason;
    } catch (const claim::InputError& error) {
      EXPECT_NE(std::string(error.what()).find("identically zero"), std::string::npos)
          << error.what();
    }
  }
}

// The leading coefficient vanishes at n = 0 and n = 3: values up to there are compared.
TEST(Build, Thresholds) {
  ClaimParts parts = parts_of({.summand = "binomial(n, k)", .closed = "2^n"});
  parts.recurrence = "\"-2*n*(n - 3)\", \"n*(n - 3)\"";
  parts.certificate = "-n*(n - 3)*k/(n + 1 - k)";
  const Proof scaled = decide(parts);
  EXPECT_EQ(testing::name_of(scaled.verdict), "established") << scaled.reason;
  // A claim that is wrong only where the leading coefficient hides it.
  parts = parts_of({.summand = "binomial(n, k)*n", .closed = "n*2^n"});
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "established");
  parts.closed = "n*2^n + 0^n";
  try {
    EXPECT_NE(testing::name_of(decide(parts).verdict), "established");
  } catch (const claim::InputError&) {
  }
  // S(n) = 0 for n >= 1 and 1 at 0: n S(n) = 0 says nothing at 0.
  parts = parts_of({.summand = "(-1)^k*binomial(n, k)", .closed = "0"});
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "refuted");
  parts.from = 1;
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "established");
}

TEST(Build, QuestionsAreAnsweredWithARecurrence) {
  for (const char* summand : {"binomial(n, k)^3", "binomial(n, k)*2^k", "binomial(2*n, k)",
                              "binomial(n, 2*k)*factorial(2*k)/(2^k*factorial(k))", "2^k"}) {
    SCOPED_TRACE(summand);
    const Proof proof = decide(parts_of({.summand = summand}));
    ASSERT_EQ(testing::name_of(proof.verdict), "established") << proof.reason;
    EXPECT_TRUE(proof.question);
    EXPECT_FALSE(proof.claim->evidence.recurrence.empty());
    // The recurrence as stated is true at the first values.
    for (long n = 0; n < 8; ++n) {
      const term::Sides sides = term::evaluate_sides(*proof.claim, {{"n", n}});
      ASSERT_TRUE(sides.left.number && sides.right.number);
      EXPECT_EQ(*sides.left.number, *sides.right.number) << "n = " << n;
    }
  }
}

}  // namespace
}  // namespace sumwright::proof
