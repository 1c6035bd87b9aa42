// Polynomials: values worked out by hand, ring laws, substitution laws, text.
#include "algebra/polynomial.hpp"

#include <gtest/gtest.h>

#include <climits>

#include "algebra/limits.hpp"
#include "text_support.hpp"

namespace sumwright::testing {
namespace {

using algebra::Polynomial;

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});
Polynomial p(const std::string& text) { return polynomial(kRing, text); }

TEST(Polynomial, PrintsInTheClaimLanguageAndTheRingsOrder) {
  EXPECT_EQ(Polynomial(kRing).to_string(), "0");
  EXPECT_EQ(Polynomial(kRing, -7).to_string(), "-7");
  const auto affine = Polynomial::affine(kRing, {-1, 2}, -3);
  EXPECT_EQ(affine.to_string(), "-n + 2*k - 3");
  EXPECT_EQ((p("3") * p("n^2") * p("k") - p("1")).to_string(), "3*n^2*k - 1");
  EXPECT_EQ(p("k + x^3 + n").to_string(), "n + k + x^3");
}

TEST(Polynomial, AnswersQuestions) {
  const auto a = p("6*n^2*k - 4*k^5 + 2");
  EXPECT_EQ(a.terms(), 3U);
  EXPECT_EQ(a.degree(0), 2);
  EXPECT_EQ(a.degree(1), 5);
  EXPECT_EQ(a.degree(2), 0);
  EXPECT_FALSE(a.depends_on(2));
  EXPECT_EQ(a.total_degree(), 5);
  EXPECT_EQ(a.content(), 2);
  EXPECT_EQ(a.leading_coefficient(), 6);
  EXPECT_EQ((-a).primitive_part(), p("3*n^2*k - 2*k^5 + 1"));
  EXPECT_EQ(a.evaluate({3, -1, 99}), -48);
  EXPECT_EQ(a.evaluate_rational({mpq_class(1, 2), mpq_class(2, 3), 5}), mpq_class(601, 243));
  EXPECT_EQ(Polynomial(kRing).degree(0), -1);
  EXPECT_EQ(Polynomial(kRing).total_degree(), -1);
  EXPECT_EQ(Polynomial(kRing).content(), 0);
  EXPECT_TRUE(Polynomial(kRing).coefficients_in(1).empty());
}

TEST(Polynomial, KeepsLargeIntegersExact) {
  const mpz_class large = (mpz_class(1) << 200) + 1;
  const Polynomial a(kRing, large);
  EXPECT_EQ(a.constant(), large);
  EXPECT_EQ((a * a).constant(), large * large);
  EXPECT_EQ(Polynomial(kRing, LONG_MIN).constant(), mpz_class(LONG_MIN));
  EXPECT_EQ(p("n + k").power(2).evaluate({large, -large + 1, 0}), 1);
}

TEST(Polynomial, DividesExactlyOrSaysThatItDoesNot) {
  const auto [quotient, exact] = p("n^2 - k^2").divide(p("n + k"));
  EXPECT_TRUE(exact);
  EXPECT_EQ(quotient, p("n - k"));
  EXPECT_FALSE(p("n^2 + 1").divide(p("n + k")).second);
  EXPECT_FALSE(p("n + 1").divide(p("2")).second) << "division is over Z";
  EXPECT_THROW((void)p("n").divide(Polynomial(kRing)), std::domain_error);
}

TEST(Polynomial, CommonDivisorsArePrimitiveAndMultiplesKeepContents) {
  EXPECT_EQ(gcd(p("4*(n-k)*(n+1)"), p("-6*(n-k)*(k+x)")), p("n - k"));
  EXPECT_EQ(gcd(p("0"), p("-4*k")), p("k"));
  EXPECT_EQ(gcd(p("4"), p("6*n")), p("1"));
  EXPECT_EQ(lcm(p("4*(n-k)"), p("6*(k-n)*n")), p("12*(n-k)*n"));
}

TEST(Polynomial, SurvivesCopiesAndMovesBetweenRings) {
  const auto other = make_ring({"y"});
  Polynomial a = p("n + 1");
  Polynomial b = Polynomial::variable(other, 0);
  Polynomial c = a;
  b = c;
  EXPECT_EQ(b, p("n + 1"));
  Polynomial moved = std::move(b);
  b = Polynomial::variable(other, 0);
  EXPECT_EQ(b.to_string(), "y");
  EXPECT_EQ(moved, a);
  moved = *&moved;
  EXPECT_EQ(moved, a);
}

TEST(Polynomial, RefusesWhatWouldNotFit) {
  EXPECT_THROW((void)p("n + k + x + 1").power(5000), algebra::TimeUp);
  EXPECT_THROW((void)p("n").power(2000000000), algebra::TimeUp);
  EXPECT_THROW((void)p("n^1000").substitute(0, p("n + k + x + 1")), algebra::TimeUp);
  EXPECT_NO_THROW((void)p("n + k").power(300));
}

TEST(PolynomialProperty, RingLawsSubstitutionAndText) {
  std::mt19937_64 random(test_seed());
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  for (unsigned long i = 0; i < cases(100); ++i) {
    const auto a = random_polynomial(kRing, random, 6, 4, 9);
    const auto b = random_polynomial(kRing, random, 5, 3, 1L << 40);
    const auto c = random_polynomial(kRing, random, 3, 2, 3);
    EXPECT_EQ(a * (b + c), a * b + a * c);
    EXPECT_EQ(a - a, Polynomial(kRing));
    EXPECT_EQ(c.power(3), c * c * c);
    EXPECT_EQ(p(a.to_string()), a);
    EXPECT_EQ(p(b.to_string()), b);
    EXPECT_EQ(Polynomial::from_terms(kRing, a.to_terms()), a);
    EXPECT_EQ(a.shift(1, 5).shift(1, -5), a);
    EXPECT_EQ((a * b).shift(0, -3), a.shift(0, -3) * b.shift(0, -3));
    EXPECT_EQ((a * b).substitute(1, c), a.substitute(1, c) * b.substitute(1, c));
    const std::vector<mpz_class> point = {3, -4, 7};
    EXPECT_EQ((a * b + c).evaluate(point),
              a.evaluate(point) * b.evaluate(point) + c.evaluate(point));
    EXPECT_EQ(a.substitute(2, b).evaluate(point),
              a.evaluate({point[0], point[1], b.evaluate(point)}));
    EXPECT_EQ(a.evaluate_rational({3, -4, 7}), mpq_class(a.evaluate(point)));
    if (!b.is_zero()) {
      EXPECT_EQ((a * b).divide(b), std::make_pair(a, true));
    }
    Polynomial again(kRing);
    const auto parts = a.coefficients_in(1);
    for (std::size_t j = 0; j < parts.size(); ++j) {
      EXPECT_FALSE(parts[j].depends_on(1));
      again += parts[j] * p("k").power(j);
    }
    EXPECT_EQ(again, a);
    EXPECT_EQ(compare(a, b), -compare(b, a));
    EXPECT_EQ(compare(a, a), 0);
  }
}

}  // namespace
}  // namespace sumwright::testing
