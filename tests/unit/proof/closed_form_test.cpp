// Candidates for closed forms: what they look like, and that they are the sums.
// The identities are in every handbook (binomial theorem, Vandermonde, Dixon, Gauss): common
// practice.
#include "proof/closed_form.hpp"

#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof {
namespace {

using testing::ClaimParts;
using testing::decide;

struct Row {
  const char* summand;
  const char* high;
  const char* candidate;
  const char* parameters = "";
};

constexpr const char* kIntegers =
    "m = { in = \"integers\", at_least = 0 }\np = { in = \"integers\", at_least = 0 }";
constexpr const char* kRationals =
    "x = { in = \"rationals\", not = [\"nonpositive integers\"] }\ny = { in = \"rationals\" }";

ClaimParts parts_of(const Row& row) {
  ClaimParts parts;
  parts.summand = row.summand;
  parts.high = row.high;
  parts.parameters = row.parameters;
  return parts;
}

TEST(ClosedForm, CandidatesAreTheSums) {
  const Row rows[] = {
      {"binomial(n, k)", "n", "(2)^n"},
      {"binomial(n, k)^2", "n", "factorial(2*n)/(factorial(n)^2)"},
      {"(-1)^k*binomial(2*n, k)^3", "2*n", "(-1)^n*factorial(3*n)/(factorial(n)^3)"},
      {"(-1)^k*binomial(n, k)/(2*k + 1)", "n",
       "2*(4)^n*factorial(n + 1)*factorial(n)/(factorial(2*(n + 1)))"},
      {"binomial(m, k)*binomial(p, n - k)", "n", "binomial(m + p, n)", kIntegers},
      {"binomial(m + k, k)", "n", "factorial(n + m + 1)/(factorial(m + 1)*factorial(n))",
       kIntegers},
      {"binomial(x, k)*binomial(y, n - k)", "n", "binomial(x + y, n)", kRationals},
      {"(-1)^k*binomial(n, k)/(x + k)", "n", "factorial(n)/((x)*rising(x + 1, n))", kRationals},
      {"rising(-n, k)*rising(y, k)/(factorial(k)*rising(x, k))", "n",
       "rising(x - y, n)/(rising(x, n))", kRationals},
      {"k*factorial(k)", "n", "factorial(n + 1) - 1"},
      {"x^k*(x - 1)", "n", "x*x^n - 1", kRationals},
  };
  for (const Row& row : rows) {
    SCOPED_TRACE(row.summand);
    ClaimParts parts = parts_of(row);
    const Proof question = decide(parts);
    ASSERT_EQ(testing::name_of(question.verdict), "established") << question.reason;
    const std::optional<std::string> candidate = closed_form_candidate(question);
    ASSERT_TRUE(candidate);
    EXPECT_EQ(*candidate, row.candidate);
    parts.closed = *candidate;
    const Proof proved = decide(parts);
    EXPECT_EQ(testing::name_of(proved.verdict), "established") << proved.reason;
  }
}

TEST(ClosedForm, NoneForHigherOrdersAndUndecidedSums) {
  for (const Row& row : {Row{"binomial(n, k)^3", "n", ""}, Row{"binomial(n - k, k)", "n", ""},
                         Row{"binomial(m, k)", "m", "", kIntegers}})
    EXPECT_FALSE(closed_form_candidate(decide(parts_of(row)))) << row.summand;
}

}  // namespace
}  // namespace sumwright::proof
