// Factored values: canonical form, products, substitution, text.
#include <gtest/gtest.h>

#include "algebra/polynomial.hpp"
#include "text_support.hpp"

namespace sumwright::testing {
namespace {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});
Polynomial p(const std::string& text) { return polynomial(kRing, text); }

void expect_canonical(const Factored& value) {
  for (std::size_t i = 0; i < value.factors.size(); ++i) {
    const auto& [base, exponent] = value.factors[i];
    EXPECT_FALSE(base.is_constant());
    EXPECT_EQ(base, base.primitive_part());
    EXPECT_NE(exponent, 0);
    if (i > 0) {
      EXPECT_LT(compare(value.factors[i - 1].first, base), 0);
    }
  }
}

TEST(Factored, FactorsIntoIrreducibles) {
  EXPECT_EQ(factor(p("-6*(n - k)^2*(n^2 + k^2)")).to_string(), "-6*(n - k)^2*(n^2 + k^2)");
  EXPECT_EQ(factor(p("k - n")).to_string(), "-(n - k)");
  EXPECT_EQ(factor(p("12")).constant, 12);
  EXPECT_TRUE(factor(p("12")).factors.empty());
  EXPECT_TRUE(factor(Polynomial(kRing)).is_zero());
  EXPECT_EQ(factor(p("4*n^2 - 9*x^2")).factors.size(), 2U);
  EXPECT_EQ(factor(p("n^2 - 2*x^2")).factors.size(), 1U) << "irreducible over Q";
}

TEST(Factored, PutsSignsAndContentsIntoTheConstant) {
  Factored value;
  value.multiply(p("2*k - 2*n"), -3);
  EXPECT_EQ(value.constant, mpq_class(-1, 8));
  EXPECT_EQ(value.to_string(), "-1/(8*(n - k)^3)");
  value.multiply(p("n - k"), 3);
  EXPECT_TRUE(value.factors.empty());
  EXPECT_EQ(value.to_string(), "-1/8");
  value.multiply(p("-4"), 1);
  EXPECT_EQ(value.to_string(), "1/2");
  EXPECT_THROW(value.multiply(Polynomial(kRing), 1), std::domain_error);
}

TEST(Factored, GivesNumeratorAndDenominator) {
  Factored value;
  value.constant = mpq_class(-3, 4);
  value.multiply(p("n + 1"), 2);
  value.multiply(p("k"), -1);
  EXPECT_EQ(value.numerator(kRing), p("-3*(n+1)^2"));
  EXPECT_EQ(value.denominator(kRing), p("4*k"));
  EXPECT_EQ(value.to_string(), "-3*(n + 1)^2/(4*k)");
  EXPECT_EQ(value.inverse().numerator(kRing), p("-4*k"));
  Factored square = value;
  square.multiply(square);
  EXPECT_EQ(square.numerator(kRing), p("9*(n+1)^4"));
}

TEST(Factored, SubstitutesAndFactorsAnew) {
  const Factored value = factor(p("(n + k)*(n*x + 1)"));
  EXPECT_EQ(value.substitute(0, p("2*k")).to_string(), "3*k*(2*k*x + 1)");
  EXPECT_TRUE(value.substitute(0, p("-k")).is_zero());
  EXPECT_THROW((void)value.inverse().substitute(0, p("-k")), std::domain_error);
  EXPECT_EQ(factor(p("n^2 - 2*x")).substitute(2, p("2*k^2")).factors.size(), 2U);
}

TEST(FactoredProperty, ProductsShiftsAndText) {
  std::mt19937_64 random(test_seed());
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  for (unsigned long i = 0; i < cases(40); ++i) {
    const auto a = random_polynomial(kRing, random, 3, 2, 5);
    const auto b = random_polynomial(kRing, random, 3, 1, 5);
    if (a.is_zero() || b.is_zero()) continue;
    Factored value = factor(a * b);
    expect_canonical(value);
    EXPECT_EQ(value.numerator(kRing), a * b);
    value.multiply(factor(b), -2);
    expect_canonical(value);
    const RationalFunction quotient(a, b);
    EXPECT_EQ(RationalFunction(kRing, value), quotient);
    EXPECT_EQ(rational(kRing, value.to_string()), quotient);
    EXPECT_EQ(RationalFunction(kRing, value.shift(1, 4)), quotient.shift(1, 4));
    expect_canonical(value.shift(1, 4));
    Factored one = value;
    one.multiply(value.inverse());
    EXPECT_TRUE(one.factors.empty());
    EXPECT_EQ(one.constant, 1);
  }
}

}  // namespace
}  // namespace sumwright::testing
