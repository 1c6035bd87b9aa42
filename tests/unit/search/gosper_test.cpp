// Indefinite summation: published examples, terms with integer-spaced factors, planted "no".
#include <gtest/gtest.h>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

using search::find_certificate;

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});
TermBuilder term() { return TermBuilder(kRing); }

std::optional<algebra::RationalFunction> gosper(const TermBuilder& t) {
  return find_certificate(kRing, t.build(), {polynomial(kRing, "1")}, {});
}
void expect_certificate(const TermBuilder& t, const std::string& expected) {
  const auto found = gosper(t);
  ASSERT_TRUE(found.has_value()) << expected;
  EXPECT_EQ(*found, rational(kRing, expected)) << found->to_string();
}

TEST(Gosper, PublishedExamples) {
  // A = B (1996), section 5.1 and exercises; Concrete Mathematics, section 5.7.
  expect_certificate(term().factor("k").factorial("k"), "1/k");
  expect_certificate(term().binomial("2*k", "k").power("1/4", "k"), "2*k");
  expect_certificate(term().power("-1", "k").binomial("n", "k"), "-k/n");
  expect_certificate(term().power("x", "k"), "1/(x-1)");
  expect_certificate(term().factor("4*k+1").factorial("k").factorial("2*k+1", -1),
                     "-2*(2*k+1)/(4*k+1)");
}

TEST(Gosper, NotSummable) {
  EXPECT_FALSE(gosper(term().factor("1/k")));
  EXPECT_FALSE(gosper(term().factorial("k")));
  EXPECT_FALSE(gosper(term().factorial("2*k").factorial("k", -1)));
  EXPECT_FALSE(gosper(term().binomial("n", "k")));
  EXPECT_FALSE(gosper(term().factor("1/(k^2+1)")));
  EXPECT_FALSE(gosper(term().factor("1/k^2")));
  EXPECT_FALSE(gosper(term().power("x", "k").factor("1/(k+1)")));
}

TEST(Gosper, IntegerSpacedFactors) {
  EXPECT_TRUE(gosper(term().factor("1/(k*(k+2))")));
  EXPECT_TRUE(gosper(term().factor("1/(k*(k+1)*(k+40))")));
  EXPECT_FALSE(gosper(term().factor("1/(k*(k+1)^2)")));
  EXPECT_TRUE(gosper(term().factor("1/(k*(k+40))")));
  EXPECT_TRUE(gosper(term().factor("(2*k+1)/((k^2+1)*(k^2+2*k+2))")));
  EXPECT_FALSE(gosper(term().factor("1/((2*k+1)*(k+1))")));
}

// c1/k - c2/(k+m) is summable exactly when c1 = c2: the residues of one orbit must add up to 0.
TEST(GosperProperty, ResiduesDecideRationalSummability) {
  std::mt19937_64 random(test_seed());
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  for (unsigned long i = 0; i < cases(30); ++i) {
    const std::string m = std::to_string(random() % 9 + 1);
    const long c1 = static_cast<long>(random() % 3) + 1;
    const long c2 = static_cast<long>(random() % 3) + 1;
    const auto f =
        rational(kRing, std::to_string(c1) + "/(k+x) - " + std::to_string(c2) + "/(k+x+" + m + ")");
    EXPECT_EQ(gosper(term().factor(f)).has_value(), c1 == c2) << f.to_string();
  }
}

TEST(FindCertificate, ForGivenCoefficients) {
  const auto t = term().binomial("n", "k", 2).build();
  const auto a0 = polynomial(kRing, "-2*(2*n+1)");
  const auto a1 = polynomial(kRing, "n+1");
  EXPECT_EQ(find_certificate(kRing, t, {a0, a1}, {}), rational(kRing, "k^2*(2*k-3*n-3)/(n+1-k)^2"));
  // A multiple of the recurrence has the multiple of the certificate.
  const auto by = polynomial(kRing, "3*(n+x)*(n-1)");
  EXPECT_EQ(find_certificate(kRing, t, {a0 * by, a1 * by}, {}),
            rational(kRing, "3*(n+x)*(n-1)*k^2*(2*k-3*n-3)/(n+1-k)^2"));
  EXPECT_FALSE(find_certificate(kRing, t, {a0 + polynomial(kRing, "1"), a1}, {}));
  EXPECT_FALSE(find_certificate(kRing, t, {a1, a0}, {}));
  const auto zero = polynomial(kRing, "0");
  EXPECT_EQ(find_certificate(kRing, t, {zero, zero}, {}), rational(kRing, "0"));
  // Zero coefficients at either end: the shifted recurrence.
  EXPECT_TRUE(find_certificate(kRing, t, {zero, a0.shift(0, 1), a1.shift(0, 1), zero}, {}));
  EXPECT_THROW((void)find_certificate(kRing, t, {}, {}), std::invalid_argument);
  EXPECT_THROW((void)find_certificate(kRing, t, {polynomial(kRing, "k")}, {}),
               std::invalid_argument);
}

}  // namespace
}  // namespace sumwright::testing
