// Values at literal n: the range becomes literal, the balance says what exact summation says.
#include "proof/conclusion.hpp"

#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::ClaimParts;

struct Value {
  std::optional<InitialDraft> draft;
  std::string why;
};

Value value_at(const ClaimParts& parts, long n) {
  const Terms terms = testing::terms_of(parts);
  const std::vector<algebra::Polynomial> none;
  const InitialContext context{terms.setting,          terms.range, terms.summand.products, none,
                               terms.closed->products, true};
  Value out;
  out.draft = initial_value(context, n, out.why);
  return out;
}

TEST(Conclusion, StartingValuesAgreeWithExactSums) {
  ClaimParts parts;
  std::size_t equal = 0;
  std::size_t different = 0;
  for (const auto& [summand, high, closed] :
       std::vector<std::array<const char*, 3>>{{"binomial(n, k)", "n", "2^n"},
                                               {"binomial(n, k)", "n", "n + 1"},
                                               {"binomial(2*n, k)", "n", "4^n"},
                                               {"k", "2*n - 1", "n^2"},
                                               {"binomial(n - k, k)", "floor(n/2)", "n"},
                                               {"binomial(n, 2*k)", "n", "2^(n - 1)"}}) {
    parts.summand = summand;
    parts.high = high;
    parts.closed = closed;
    const auto claim = testing::read_claim(parts);
    for (long n = 0; n <= 5; ++n) {
      SCOPED_TRACE(std::string(summand) + " at " + std::to_string(n));
      const term::Sides sides = term::evaluate_sides(*claim, {{"n", n}});
      const Value value = value_at(parts, n);
      ASSERT_TRUE(value.draft) << value.why;
      EXPECT_EQ(value.draft->at, n);
      EXPECT_EQ(value.draft->balance.holds(), *sides.left.number == *sides.right.number);
      (value.draft->balance.holds() ? equal : different)++;
    }
  }
  EXPECT_GT(equal, 5U);
  EXPECT_GT(different, 5U);
}

// A range of parameter length becomes literal by the support only.
TEST(Conclusion, RangesOfParameterLength) {
  ClaimParts parts;
  parts.parameters = "m = { in = \"integers\", at_least = 0 }";
  parts.summand = "binomial(n, k)*binomial(m, k)";
  parts.high = "n + m";
  parts.closed = "binomial(n + m, n)";
  const Value natural = value_at(parts, 2);
  ASSERT_TRUE(natural.draft) << natural.why;
  EXPECT_TRUE(natural.draft->balance.holds());
  ASSERT_EQ(natural.draft->sums.size(), 1U);
  EXPECT_EQ(natural.draft->sums[0].high, 2);
  EXPECT_TRUE(natural.draft->sums[0].above);
  parts.summand = "binomial(n, k - m)";
  parts.low = "m";
  parts.high = "n + m";
  parts.closed = "2^n";
  const Value moved = value_at(parts, 2);
  ASSERT_TRUE(moved.draft) << moved.why;
  EXPECT_TRUE(moved.draft->balance.holds());
  ASSERT_TRUE(moved.draft->sums[0].base) << "m, m + 1, m + 2";
  EXPECT_EQ(moved.draft->sums[0].low, 0);
  EXPECT_EQ(moved.draft->sums[0].high, 2);
  parts.low = "0";
  const Value support = value_at(parts, 2);
  ASSERT_TRUE(support.draft) << support.why;
  EXPECT_TRUE(support.draft->sums[0].below);
  parts.summand = "binomial(m, k)";
  parts.high = "m";
  const Value open = value_at(parts, 2);
  EXPECT_FALSE(open.draft);
  EXPECT_NE(open.why.find("length depends on a parameter"), std::string::npos) << open.why;
}

TEST(Conclusion, TooManyTermsAreRefused) {
  ClaimParts parts;
  parts.summand = "k";
  parts.high = "n + 5000";
  parts.closed = "n";
  const Value value = value_at(parts, 0);
  EXPECT_FALSE(value.draft);
  EXPECT_EQ(value.why, "too many terms in a starting value");
}

// Signs and weights: right sides and closed forms come with a minus, shifted and multiplied.
TEST(Conclusion, RightSidesAndClosedFormsAreSubtracted) {
  ClaimParts parts;
  parts.closed = "3^n + n";
  parts.recurrence = "\"n + 5\", \"7\"";
  const Terms terms = testing::terms_of(parts);
  const EvidenceDraft evidence = testing::evidence_of(terms);
  algebra::Factored weight;
  weight.constant = 2;
  for (long n = 0; n < 5; ++n) {
    const auto closed = [&](long at) {
      mpz_class power;
      mpz_ui_pow_ui(power.get_mpz_t(), 3, static_cast<unsigned long>(at));
      return mpq_class(power + at);
    };
    mpq_class sum = 0;
    for (const TermDraft& t :
         closed_terms(terms.setting, weight, evidence.coefficients, terms.closed->products))
      sum += *testing::value_of(t.product, {n, 0});
    EXPECT_EQ(sum, -2 * ((n + 5) * closed(n) + 7 * closed(n + 1)));
    sum = 0;
    for (const TermDraft& t : right_side_terms(terms.setting, weight, terms.closed->products))
      sum += *testing::value_of(t.product, {n, 0});
    EXPECT_EQ(sum, -2 * closed(n));
  }
}

}  // namespace
}  // namespace sumwright::proof::building
