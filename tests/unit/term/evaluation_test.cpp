// Values of expressions, bounds and sums by the meaning of the claim format.
#include "term/evaluation.hpp"

#include <gtest/gtest.h>

#include <stdexcept>
#include <string>

#include "claim/reader.hpp"

namespace sumwright::term {
namespace {

Assignment with(const std::vector<std::pair<std::string, std::string>>& values) {
  Assignment at;
  for (const auto& [name, text] : values) at[name] = mpq_class(text);
  return at;
}

Value value_of(const std::string& text, const Assignment& at) {
  const claim::Source source{"test", text};
  std::vector<std::string> names;
  for (const auto& [name, number] : at) names.push_back(name);
  return evaluate(*claim::parse_expression(source, {0, text.size()}, names), at);
}

// The value as text, or the reason why there is none.
std::string shown(const std::string& text, const Assignment& at = {}) {
  const Value value = value_of(text, at);
  return value.number ? value.number->get_str() : "none: " + value.why_not;
}

TEST(Evaluate, Arithmetic) {
  EXPECT_EQ(shown("1/2 + 1/3*2 - 7"), "-35/6");
  EXPECT_EQ(shown("-2^2"), "-4");
  EXPECT_EQ(shown("(-2)^3"), "-8");
  EXPECT_EQ(shown("2^3^2"), "512");
  EXPECT_EQ(shown("(2/3)^-2"), "9/4");
  EXPECT_EQ(shown("(-2/3)^-3"), "-27/8");
  EXPECT_EQ(shown("0^0"), "1");
  EXPECT_EQ(shown("x^n", with({{"x", "0"}, {"n", "0"}})), "1");
  EXPECT_EQ(shown("x^n", with({{"x", "0"}, {"n", "3"}})), "0");
  EXPECT_EQ(shown("x^n", with({{"x", "-1"}, {"n", "100000000000001"}})), "-1");
  EXPECT_EQ(shown("x^(-n)", with({{"x", "-1/2"}, {"n", "3"}})), "-8");
}

TEST(Evaluate, DivisionByZeroNeverHasAValue) {
  EXPECT_EQ(shown("1/x", with({{"x", "0"}})), "none: division by 0");
  EXPECT_EQ(shown("0*(1/x)", with({{"x", "0"}})), "none: division by 0");
  EXPECT_EQ(shown("x/x", with({{"x", "0"}})), "none: division by 0");
  EXPECT_EQ(shown("binomial(2, 3)/(x - 1)", with({{"x", "1"}})), "none: division by 0");
  EXPECT_EQ(shown("(1/x)^0", with({{"x", "0"}})), "none: division by 0");
  EXPECT_EQ(shown("x^-1", with({{"x", "0"}})), "none: the power -1 of 0");
  EXPECT_EQ(shown("0*x^n", with({{"x", "0"}, {"n", "-2"}})), "none: the power -2 of 0");
  EXPECT_EQ(shown("rising(1/x, 0)", with({{"x", "0"}})), "none: division by 0");
}

TEST(Evaluate, PlaceIsThatOfTheOffender) {
  const Value divisor = value_of("1 + 2/(x - 3)", with({{"x", "3"}}));
  EXPECT_EQ(divisor.place.offset, 7U);
  const Value factorial = value_of("5*factorial(n - 2)", with({{"n", "1"}}));
  EXPECT_EQ(factorial.place.offset, 2U);
  EXPECT_EQ(factorial.place.length, 16U);
}

TEST(Evaluate, Binomials) {
  EXPECT_EQ(shown("binomial(5, 2)"), "10");
  EXPECT_EQ(shown("binomial(5, 0)"), "1");
  EXPECT_EQ(shown("binomial(5, 6)"), "0");
  EXPECT_EQ(shown("binomial(5, -1)"), "0");
  EXPECT_EQ(shown("binomial(-1, -1)"), "0");
  EXPECT_EQ(shown("binomial(0, 0)"), "1");
  EXPECT_EQ(shown("binomial(-1, 3)"), "-1");
  EXPECT_EQ(shown("binomial(-3, 4)"), "15");
  EXPECT_EQ(shown("binomial(1/2, 3)"), "1/16");
  EXPECT_EQ(shown("binomial(-1/2, 2)"), "3/8");
  EXPECT_EQ(shown("binomial(x, 2)", with({{"x", "7/3"}})), "14/9");
  EXPECT_EQ(shown("binomial(100, 50)"), "100891344545564193334812497256");  // from memory
  EXPECT_EQ(shown("binomial(10000000000000, 2)"), "49999999999995000000000000");
  EXPECT_EQ(shown("binomial(3, 1000000000000)"), "0");
}

TEST(Evaluate, BinomialsAgreeWithTheProduct) {
  for (long upper = -6; upper <= 6; ++upper) {
    mpq_class product = 1;
    for (long lower = 0; lower <= 8; ++lower) {
      const std::string text =
          "binomial(" + std::to_string(upper) + ", " + std::to_string(lower) + ")";
      EXPECT_EQ(shown(text), product.get_str()) << text;
      product *= upper - lower;
      product /= lower + 1;
    }
  }
}

TEST(Evaluate, RisingAndFalling) {
  EXPECT_EQ(shown("rising(1/2, 3)"), "15/8");
  EXPECT_EQ(shown("rising(3, 4)"), "360");
  EXPECT_EQ(shown("rising(-2, 2)"), "2");
  EXPECT_EQ(shown("rising(-2, 3)"), "0");
  EXPECT_EQ(shown("rising(-2, 1000000000000)"), "0");
  EXPECT_EQ(shown("rising(0, 0)"), "1");
  EXPECT_EQ(shown("falling(5, 3)"), "60");
  EXPECT_EQ(shown("falling(5, 6)"), "0");
  EXPECT_EQ(shown("falling(-1, 3)"), "-6");
  EXPECT_EQ(shown("falling(1/2, 2)"), "-1/4");
  EXPECT_EQ(shown("rising(x, -1)", with({{"x", "2"}})), "none: rising of length -1");
  EXPECT_EQ(shown("falling(2, n)", with({{"n", "-3"}})), "none: falling of length -3");
}

// A program keeps prefixes of products: lengths down and up, and another start in between.
TEST(Evaluate, ProductsOfOneSumAgreeWithSingleOnes) {
  const claim::ReadClaim read = claim::read_claim_text("test", R"toml(
format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "rising(1/2, n - k)*falling(7/3, k)*binomial(1/3, n - k)"
over = [ { index = "k", low = "0", high = "n" } ]
)toml");
  for (long n = 0; n <= 6; ++n) {
    mpq_class expected = 0;
    for (long k = 0; k <= n; ++k) {
      expected +=
          *value_of("rising(1/2, n - k)*falling(7/3, k)*binomial(1/3, n - k)", {{"n", n}, {"k", k}})
               .number;
    }
    EXPECT_EQ(evaluate_sum(read.claim.sum, {{"n", n}}).number, expected);
  }
}

TEST(Evaluate, Factorials) {
  EXPECT_EQ(shown("factorial(0)"), "1");
  EXPECT_EQ(shown("factorial(5)"), "120");
  EXPECT_EQ(shown("factorial(20)"), "2432902008176640000");  // from memory
  EXPECT_EQ(shown("factorial(-1)"), "none: factorial of -1");
  EXPECT_EQ(shown("factorial(x)", with({{"x", "1/2"}})), "none: factorial of 1/2");
  EXPECT_EQ(shown("factorial(2000)/factorial(1999)"), "2000");  // past the table
  EXPECT_EQ(shown("factorial(1024)/factorial(1023)"), "1024");
}

TEST(Evaluate, AFactorialInADenominatorIsReciprocal) {
  EXPECT_EQ(shown("1/factorial(-1)"), "0");
  EXPECT_EQ(shown("7/factorial(4)"), "7/24");
  EXPECT_EQ(shown("1/(factorial(-2)*3)"), "0");
  EXPECT_EQ(shown("1/(3*factorial(2))"), "1/6");
  EXPECT_EQ(shown("5/factorial(-3)^2"), "0");
  EXPECT_EQ(shown("factorial(-1)^-2"), "0");
  EXPECT_EQ(shown("factorial(3)^-2"), "1/36");
  EXPECT_EQ(shown("1/(-factorial(3))"), "-1/6");
  EXPECT_EQ(shown("(2*factorial(-1))^-1"), "0");
  EXPECT_EQ(shown("1/(factorial(2)/3)"), "3/2");
  EXPECT_EQ(shown("1/(factorial(-2)/3)"), "0");
  EXPECT_EQ(shown("1/(3/factorial(4))"), "8");
  EXPECT_EQ(shown("6/2/factorial(2)"), "3/2");
  // A factorial under two bars stands above again.
  EXPECT_EQ(shown("1/(3/factorial(-1))"), "none: factorial of -1");
  // The other factors of the denominator still count.
  EXPECT_EQ(shown("1/(factorial(-1)*x)", with({{"x", "0"}})), "none: division by 0");
  EXPECT_EQ(shown("1/(factorial(2)/x)", with({{"x", "0"}})), "none: division by 0");
  // In a sum it is no reciprocal factorial.
  EXPECT_EQ(shown("1/(factorial(2) + 1)"), "1/3");
  EXPECT_EQ(shown("1/(factorial(-1) + 1)"), "none: factorial of -1");
}

TEST(Evaluate, AFactorZeroOutweighsWhatHasNoValue) {
  EXPECT_EQ(shown("binomial(3, 4)*factorial(-1)"), "0");
  EXPECT_EQ(shown("factorial(-1)*binomial(3, 4)"), "0");
  EXPECT_EQ(shown("2*factorial(-1)*5*binomial(3, 4)"), "0");
  EXPECT_EQ(shown("(factorial(-1)*2)*(3*binomial(3, 4))"), "0");
  EXPECT_EQ(shown("factorial(-1)/factorial(-2)"), "0");
  EXPECT_EQ(shown("factorial(-1)^2*rising(2, -1)/factorial(-2)"), "0");
  EXPECT_EQ(shown("-factorial(-1)*(1 - 1)"), "0");
  EXPECT_EQ(shown("binomial(3, 4)/rising(2, -1)"), "0");
  EXPECT_EQ(shown("1 + binomial(3, 4)*factorial(-1)"), "1");
  EXPECT_EQ(shown("factorial(-1)/7"), "none: factorial of -1");
  EXPECT_EQ(shown("1 + factorial(-1)"), "none: factorial of -1");
  EXPECT_EQ(shown("factorial(-1) - factorial(-1)"), "none: factorial of -1");
  EXPECT_EQ(shown("factorial(-1)^0"), "none: factorial of -1");
  EXPECT_EQ(shown("binomial(3, 4)*factorial(-1)/x", with({{"x", "0"}})), "none: division by 0");
}

TEST(Evaluate, RefusesNumbersThatGrowTooLarge) {
  EXPECT_THROW((void)shown("2^n", with({{"n", "1000000000"}})), std::length_error);
  EXPECT_THROW((void)shown("2^n", with({{"n", "-100000000000000000000"}})), std::length_error);
  EXPECT_THROW((void)shown("factorial(1000000000)"), std::length_error);
  EXPECT_THROW((void)shown("factorial(100000000000000000000)"), std::length_error);
  EXPECT_THROW((void)shown("1/factorial(1000000)"), std::length_error);
  EXPECT_THROW((void)shown("binomial(2000000000, 1000000000)"), std::length_error);
  EXPECT_THROW((void)shown("binomial(1/2, 1000000000)"), std::length_error);
  EXPECT_THROW((void)shown("rising(1, 1000000000)"), std::length_error);
  EXPECT_THROW((void)shown("((3^1000)^1000)^1000"), std::length_error);
}

TEST(Evaluate, AMissingValueIsAFault) {
  const claim::Source source{"test", "x"};
  const auto expression = claim::parse_expression(source, {0, 1}, {"x"});
  EXPECT_THROW((void)evaluate(*expression, {}), std::invalid_argument);
}

TEST(Evaluate, LongSumsOfTermsAreNoTrouble) {
  std::string text = "1";
  for (int i = 0; i < 3000; ++i) text += " + 1";
  EXPECT_EQ(shown(text), "3001");
}

claim::Claim claim_with_range(const std::string& summand, const std::string& over,
                              const std::string& parameters = "") {
  return claim::read_claim_text("test", "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n" +
                                            parameters + "[sum]\nsummand = \"" + summand +
                                            "\"\nover = [" + over + "]\n")
      .claim;
}

mpz_class bound_at(const std::string& bound, long n) {
  const claim::Claim claim =
      claim_with_range("k", "{ index = \"k\", low = \"0\", high = \"" + bound + "\" }");
  return evaluate_bound(*claim.sum.over[0].high.value, {{"n", n}});
}

TEST(EvaluateBound, FloorsTowardsMinusInfinity) {
  EXPECT_EQ(bound_at("floor(n/2)", 7), 3);
  EXPECT_EQ(bound_at("floor(n/2)", -7), -4);
  EXPECT_EQ(bound_at("floor((2*n + 1)/3)", 4), 3);
  EXPECT_EQ(bound_at("min(n, 5, 2*n)", 3), 3);
  EXPECT_EQ(bound_at("min(n, 5, 2*n)", 9), 5);
  EXPECT_EQ(bound_at("min(n, 5, 2*n)", -1), -2);
  EXPECT_EQ(bound_at("max(0, n - 3)", 1), 0);
  EXPECT_EQ(bound_at("max(0, n - 3)", 8), 5);
  EXPECT_EQ(bound_at("3 - max(n, floor(n/2))", 4), -1);
}

std::string sum_at(const claim::Claim& claim, const Assignment& at) {
  const Value value = evaluate_sum(claim.sum, at);
  return value.number ? value.number->get_str() : "none: " + value.why_not;
}

const char kRow[] = R"({ index = "k", low = "0", high = "n" })";

TEST(EvaluateSum, SumsOneRange) {
  const claim::Claim squares = claim_with_range("binomial(n, k)^2", kRow);
  EXPECT_EQ(sum_at(squares, {{"n", 4}}), "70");
  EXPECT_EQ(sum_at(squares, {{"n", 0}}), "1");
  EXPECT_EQ(sum_at(squares, {{"n", -1}}), "0");  // an empty range
  const claim::Claim apery = claim_with_range("binomial(n, k)^2*binomial(n + k, k)^2", kRow);
  EXPECT_EQ(sum_at(apery, {{"n", 3}}), "1445");   // OEIS A005259, from memory
  EXPECT_EQ(sum_at(apery, {{"n", 4}}), "33001");  // OEIS A005259, from memory
}

TEST(EvaluateSum, SumsLaterRangesInsideEarlierOnes) {
  const claim::Claim triangle = claim_with_range(
      "binomial(n, r)*binomial(r, s)",
      R"({ index = "r", low = "0", high = "n" }, { index = "s", low = "0", high = "r" })");
  EXPECT_EQ(sum_at(triangle, {{"n", 5}}), "243");
}

TEST(EvaluateSum, WithoutARangeIsTheSummand) {
  const claim::Claim single = claim_with_range("binomial(2*n, n)", "");
  EXPECT_EQ(sum_at(single, {{"n", 3}}), "20");
}

TEST(EvaluateSum, HasNoValueWhereTheSummandHasNone) {
  const claim::Claim harmonic = claim_with_range("1/(k - 2)", kRow);
  EXPECT_EQ(sum_at(harmonic, {{"n", 1}}), "-3/2");
  EXPECT_EQ(sum_at(harmonic, {{"n", 2}}), "none: division by 0 at k = 2");
  const claim::Claim factorials = claim_with_range("factorial(3 - k)", kRow);
  EXPECT_EQ(sum_at(factorials, {{"n", 3}}), "10");
  EXPECT_EQ(sum_at(factorials, {{"n", 5}}), "none: factorial of -1 at k = 4");
  const claim::Claim covered = claim_with_range("binomial(3, k)*factorial(3 - k)", kRow);
  EXPECT_EQ(sum_at(covered, {{"n", 9}}), "16");
}

TEST(EvaluateSum, BoundsTheNumberOfTerms) {
  const claim::Claim row = claim_with_range("k", kRow);
  EXPECT_EQ(evaluate_sum(row.sum, {{"n", 9}}, 10).number, mpq_class(45));
  EXPECT_THROW((void)evaluate_sum(row.sum, {{"n", 10}}, 10), std::length_error);
  EXPECT_THROW((void)evaluate_sum(row.sum, {{"n", mpz_class("1000000000000000000000")}}),
               std::length_error);
  // Empty inner ranges count as well.
  const claim::Claim empty = claim_with_range(
      "1", R"({ index = "r", low = "0", high = "n" }, { index = "s", low = "1", high = "0" })");
  EXPECT_THROW((void)evaluate_sum(empty.sum, {{"n", 1000000}}), std::length_error);
}

TEST(EvaluateSum, InfiniteRangesAreRefused) {
  const claim::Claim whole =
      claim_with_range("binomial(n, k)", R"({ index = "k", low = "-inf", high = "inf" })");
  EXPECT_THROW((void)evaluate_sum(whole.sum, {{"n", 3}}), std::invalid_argument);
}

TEST(EvaluateSum, StopsWhenInterrupted) {
  const claim::Claim row = claim_with_range("k*k", kRow);
  algebra::Deadline::interrupt_flag = true;
  EXPECT_THROW((void)evaluate_sum(row.sum, {{"n", 1000}}), algebra::TimeUp);
  algebra::Deadline::interrupt_flag = false;
}

}  // namespace
}  // namespace sumwright::term
