// Rational functions: reduced form, field laws, substitution, text.
#include "algebra/rational_function.hpp"

#include <gtest/gtest.h>

#include "text_support.hpp"

namespace sumwright::testing {
namespace {

using algebra::Polynomial;
using algebra::RationalFunction;

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});
Polynomial p(const std::string& text) { return polynomial(kRing, text); }
RationalFunction r(const std::string& text) { return rational(kRing, text); }

TEST(RationalFunction, IsReducedWithPositiveDenominator) {
  const RationalFunction a(p("4*(n^2 - k^2)"), p("-6*(n + k)"));
  EXPECT_EQ(a.numerator(), p("-2*(n - k)"));
  EXPECT_EQ(a.denominator(), p("3"));
  EXPECT_EQ(RationalFunction(p("0"), p("7*k")).denominator(), p("1"));
  EXPECT_THROW(RationalFunction(p("1"), p("0")), std::domain_error);
  EXPECT_THROW((void)(r("1") / r("0")), std::domain_error);
}

TEST(RationalFunction, PrintsInTheClaimLanguage) {
  EXPECT_EQ(r("1/2").to_string(), "1/2");
  EXPECT_EQ(r("(n+1)/k").to_string(), "(n + 1)/k");
  EXPECT_EQ(r("-3*n").to_string(), "-3*n");
  EXPECT_EQ(r("n*k^2/(2*x)").to_string(), "n*k^2/(2*x)");
}

TEST(RationalFunction, SubstitutesUnlessTheDenominatorVanishes) {
  EXPECT_EQ(r("1/(n - k)").substitute(0, p("k + x")), r("1/x"));
  EXPECT_THROW((void)r("1/(n - k)").substitute(0, p("k")), std::domain_error);
}

TEST(RationalFunctionProperty, FieldLaws) {
  std::mt19937_64 random(test_seed());
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  auto any = [&] {
    Polynomial below(kRing);
    while (below.is_zero()) below = random_polynomial(kRing, random, 3, 1, 6);
    return RationalFunction(random_polynomial(kRing, random, 3, 2, 6), below);
  };
  for (unsigned long i = 0; i < cases(40); ++i) {
    const auto a = any();
    const auto b = any();
    const auto c = any();
    EXPECT_EQ((a + b) * c, a * c + b * c);
    EXPECT_EQ(a - b, -(b - a));
    EXPECT_EQ((a + b) - b, a);
    if (!b.is_zero()) {
      EXPECT_EQ(a / b * b, a);
      EXPECT_EQ(b.power(-2) * b * b, r("1"));
    }
    EXPECT_EQ(r(a.to_string()), a);
    EXPECT_EQ(RationalFunction(kRing, a.factored()), a);
    EXPECT_EQ((a * b).shift(1, 2), a.shift(1, 2) * b.shift(1, 2));
    EXPECT_TRUE(gcd(a.numerator(), a.denominator()).is_one());
    EXPECT_GT(a.denominator().leading_coefficient(), 0);
  }
}

}  // namespace
}  // namespace sumwright::testing
