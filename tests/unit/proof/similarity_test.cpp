// Instances of base terms: product = polynomial * base, as numbers, wherever the needs are met.
#include "proof/similarity.hpp"

#include <gtest/gtest.h>

#include <iostream>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::kK;
using testing::kN;
using testing::Number;
using testing::Point;
using testing::RandomTerms;
using testing::value_of;

class SimilarityTest : public ::testing::Test {
 protected:
  term::Setting setting_ = testing::usual_setting();
  RandomTerms make_{setting_, testing::random_seed()};
  const algebra::RingPtr& ring_ = setting_.ring;

  /// left * left units = right * right units at the point, once `cancelled` is multiplied in.
  void compare(const Bringing& b, std::size_t& compared, std::size_t& left_out) {
    for (int j = 0; j < 25; ++j) {
      const Point at = make_.point(7);
      if (!testing::all_met(b.needs(), at)) {
        ++left_out;
        continue;
      }
      const Number left = value_of(b.product, at);
      const Number base = value_of(b.base, at);
      const Number polynomial = value_of(b.polynomial, at);
      if (!left || !base || !polynomial) {
        ++left_out;
        continue;
      }
      ASSERT_EQ(*left, *polynomial * *base) << "seed " << testing::random_seed();
      ++compared;
    }
  }
};

// Random products and their shifts are brought to one base; values agree, zeros of 1/L! included.
TEST_F(SimilarityTest, InstancesAgreeAsNumbers) {
  std::size_t brought = 0;
  std::size_t compared = 0;
  std::size_t left_out = 0;
  for (unsigned long i = 0; i < testing::effort(250); ++i) {
    const term::Product p = make_.product(4);
    const std::vector<term::Product> shifts{p, term::shift(p, kN, 1), term::shift(p, kN, 2)};
    std::string why;
    const auto base = common_base(ring_, shifts, why);
    if (!base) {
      EXPECT_FALSE(why.empty());
      continue;
    }
    for (const term::Product& s : shifts) {
      const auto b = bring(ring_, s, *base, why);
      ASSERT_TRUE(b) << why << ", seed " << testing::random_seed();
      for (const auto& [factor, exponent] : b->polynomial.factors)
        EXPECT_GT(exponent, 0) << "a polynomial has no denominator";
      compare(*b, compared, left_out);
      ++brought;
    }
    if (::testing::Test::HasFailure()) return;
  }
  std::cout << brought << " instances, " << compared << " values compared, " << left_out
            << " points outside the needs\n";
  EXPECT_GE(brought, testing::effort(250));
  EXPECT_GE(compared, testing::effort(250) * 4);
}

TEST_F(SimilarityTest, ClassesAreThoseOfRationalQuotients) {
  const auto product = [&](const char* text) {
    return testing::convert(setting_, text).products.at(0);
  };
  const std::vector<term::Product> all{
      product("binomial(n, k)"), product("2^n"),         product("binomial(n + 1, k)*(k + 1)"),
      product("n + 1"),          product("2^(n + 3)*n"), product("1")};
  const auto classes = similarity_classes(ring_, all);
  ASSERT_EQ(classes.size(), 3U);
  EXPECT_EQ(classes[0], (std::vector<std::size_t>{0, 2}));
  EXPECT_EQ(classes[1], (std::vector<std::size_t>{1, 4}));
  EXPECT_EQ(classes[2], (std::vector<std::size_t>{3, 5}));
}

TEST_F(SimilarityTest, WhatIsOutOfReachIsSaid) {
  const auto product = [&](const char* text) {
    return testing::convert(setting_, text).products.at(0);
  };
  std::string why;
  EXPECT_FALSE(bring(ring_, product("factorial(n)"), product("factorial(n + 1)"), why));
  EXPECT_NE(why.find("factorials of n"), std::string::npos) << why;
  EXPECT_FALSE(bring(ring_, product("2^n"), product("2^(n + 1)"), why));
  EXPECT_NE(why.find("powers of 2"), std::string::npos) << why;
  EXPECT_FALSE(bring(ring_, product("1/(k + 1)"), product("1"), why));
  EXPECT_NE(why.find("denominator k + 1"), std::string::npos) << why;
  EXPECT_FALSE(bring(ring_, product("rising(x, k)"), product("rising(x, k + 1)"), why));
  EXPECT_FALSE(why.empty());
}

// The needs of a step are those of its law: fact only where its smaller argument is >= 0, rfact
// always.
TEST_F(SimilarityTest, NeedsAreThoseOfTheLaws) {
  const auto product = [&](const term::Atom& atom) {
    term::Product out;
    out.multiply(atom);
    return out;
  };
  const auto fact = [&](const char* text) {
    return product(term::factorial_atom(ring_, testing::affine(setting_, text)));
  };
  const auto rfact = [&](const char* text) {
    return product(term::reciprocal_factorial_atom(ring_, testing::affine(setting_, text)));
  };
  std::string why;
  const auto down = bring(ring_, fact("k + 2"), fact("k"), why);
  ASSERT_TRUE(down);
  ASSERT_EQ(down->needs().size(), 1U);
  EXPECT_EQ(*down->needs()[0].nonnegative, testing::affine(setting_, "k"));
  const auto up = bring(ring_, rfact("k"), rfact("k + 2"), why);
  ASSERT_TRUE(up);
  EXPECT_TRUE(up->needs().empty());
  EXPECT_EQ(up->polynomial.to_string(), down->polynomial.to_string());
}

}  // namespace
}  // namespace sumwright::proof::building
