// Planted certificates: choose G, derive the summand, and the search must find what was planted;
// random proper terms, each answer re-checked by evaluation.
#include <gtest/gtest.h>

#include <iostream>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

using algebra::Polynomial;
using algebra::RationalFunction;

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});

std::string small(std::mt19937_64& random, long low, long high) {
  return std::to_string(std::uniform_int_distribution<long>(low, high)(random));
}

// T with T(k+1)/T(k) not rational-summable noise: a product of a few simple things.
TermBuilder random_term(std::mt19937_64& random) {
  TermBuilder t(kRing);
  if (random() % 2 == 0) t.binomial("n+" + small(random, 0, 2), "k");
  if (random() % 3 == 0) t.factorial("n+k+" + small(random, 0, 2), random() % 2 == 0 ? 1 : -1);
  if (random() % 3 == 0) t.rising("x", "k", random() % 2 == 0 ? 1 : -1);
  if (random() % 2 == 0) t.power(random() % 2 == 0 ? "x" : "-2/3", "k");
  if (random() % 3 == 0) t.factorial("2*k+" + small(random, 0, 1), -1);
  return t;
}

TEST(PlantedProperty, SummandsWithAPlantedCertificateAreSummable) {
  std::mt19937_64 random(test_seed());
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  unsigned decided = 0;
  for (unsigned long i = 0; i < cases(25); ++i) {
    const TermBuilder t = random_term(random);
    Polynomial below(kRing);
    while (below.is_zero()) below = random_polynomial(kRing, random, 2, 1, 3);
    Polynomial above(kRing);
    while (above.is_zero()) above = random_polynomial(kRing, random, 3, 2, 4);
    const RationalFunction planted(above, below);
    const RationalFunction ratio(kRing, t.build().by_index);
    const RationalFunction difference = planted.shift(1, 1) * ratio - planted;  // F / T
    if (difference.is_zero()) continue;
    TermBuilder f = t;
    f.factor(difference);
    const auto certificate = search::find_certificate(kRing, f.build(), {Polynomial(kRing, 1)}, {});
    ASSERT_TRUE(certificate.has_value()) << planted.to_string() << " times " << ratio.to_string();
    EXPECT_EQ(identity_defect(kRing, f.build(), {Polynomial(kRing, 1)}, *certificate,
                              random_point(kRing, random)),
              0);
    search::SearchOptions options;
    const auto found = search::find_telescoper(kRing, f.build(), options);
    ASSERT_TRUE(found.has_value());
    EXPECT_EQ(text_of(found->coefficients), "1");
    ++decided;
  }
  EXPECT_GT(decided, 0U);
  std::cout << "decided: " << decided << "\n";
}

TEST(PlantedProperty, RandomTermsGiveTrueIdentities) {
  std::mt19937_64 random(test_seed() + 1);
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  unsigned found_count = 0;
  unsigned none = 0;
  for (unsigned long i = 0; i < cases(25); ++i) {
    TermBuilder t = random_term(random);
    t.binomial("n", "k");
    if (random() % 3 == 0) t.factor("2*k+" + small(random, -3, 3));
    search::SearchOptions options;
    options.max_order = 4;
    options.deadline = algebra::Deadline(std::chrono::seconds(20));
    const auto found = search::find_telescoper(kRing, t.build(), options);
    if (!found) {
      ++none;
      continue;
    }
    ++found_count;
    const auto& a = found->coefficients;
    EXPECT_FALSE(a.back().is_zero());
    EXPECT_GT(a.back().leading_coefficient(), 0);
    Polynomial common(kRing);
    mpz_class content = 0;
    for (const auto& c : a) {
      EXPECT_FALSE(c.depends_on(1));
      common = gcd(common, c);
      content = gcd(content, c.content());
    }
    EXPECT_TRUE(common.is_one());
    EXPECT_EQ(content, 1);
    const auto& r = found->certificate;
    EXPECT_TRUE(gcd(r.numerator(), r.denominator()).is_one() || r.is_zero());
    EXPECT_EQ(r, RationalFunction(r.numerator(), r.denominator())) << "reduced";
    EXPECT_EQ(identity_defect(kRing, t.build(), a, r, random_point(kRing, random)), 0);
    // The certificate alone, for these coefficients.
    EXPECT_TRUE(search::find_certificate(kRing, t.build(), a, {}).has_value());
    // Wrong evidence is refused, with a residue.
    auto wrong = a;
    wrong[random() % wrong.size()] += Polynomial(kRing, 1);
    const auto check = search::verify_identity(kRing, t.build(), wrong, r);
    EXPECT_FALSE(check.holds);
    EXPECT_FALSE(check.residue.is_zero());
    const auto other = r + rational(kRing, "k/(k+7)");
    EXPECT_FALSE(search::verify_identity(kRing, t.build(), a, other).holds);
  }
  EXPECT_GT(found_count, 0U);
  std::cout << "found: " << found_count << ", none: " << none << "\n";
}

}  // namespace
}  // namespace sumwright::testing
