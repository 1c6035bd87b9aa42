// Products of atoms: one canonical form, and quotients that agree with values at integer points.
#include "term/product.hpp"

#include <gtest/gtest.h>

#include <iostream>
#include <stdexcept>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using algebra::Factored;
using algebra::Polynomial;
using testing::kK;
using testing::kM;
using testing::kN;
using testing::Number;
using testing::Point;
using testing::RandomTerms;
using testing::value_of;

bool canonical(const Product& p) {
  for (std::size_t i = 0; i < p.atoms.size(); ++i) {
    if (p.atoms[i].second == 0) return false;
    if (i > 0 && compare(p.atoms[i - 1].first, p.atoms[i].first) >= 0) return false;
    if (p.atoms[i].first.kind != AtomKind::power) continue;
    if (p.atoms[i].second != 1) return false;
    for (std::size_t j = 0; j < i; ++j)
      if (p.atoms[j].first.kind == AtomKind::power &&
          p.atoms[j].first.base == p.atoms[i].first.base)
        return false;
  }
  return true;
}

bool same(const Product& a, const Product& b) {
  return a.atoms == b.atoms && a.coefficient.constant == b.coefficient.constant &&
         a.coefficient.factors == b.coefficient.factors;
}

class ProductTest : public ::testing::Test {
 protected:
  Setting setting_ = testing::usual_setting();
  RandomTerms make_{setting_, testing::random_seed()};
  const algebra::RingPtr& ring_ = setting_.ring;
};

TEST_F(ProductTest, OneFormWhateverTheOrder) {
  std::size_t cases = 0;
  for (unsigned long i = 0; i < testing::effort(300); ++i) {
    std::vector<Atom> atoms;
    for (int j = 0; j < 5; ++j) atoms.push_back(make_.atom());
    Product forward;
    Product backward;
    for (std::size_t j = 0; j < atoms.size(); ++j) {
      forward.multiply(atoms[j]);
      backward.multiply(atoms[atoms.size() - 1 - j]);
    }
    ASSERT_TRUE(canonical(forward));
    ASSERT_TRUE(same(forward, backward)) << "seed " << testing::random_seed();
    Product squared = forward;
    squared.multiply(squared, 1);
    Product twice;
    twice.multiply(forward, 2);
    ASSERT_TRUE(canonical(twice));
    ASSERT_TRUE(same(squared, twice)) << "seed " << testing::random_seed();
    ++cases;
  }
  EXPECT_GT(cases, 0U);
}

TEST_F(ProductTest, PowersOfOneBaseMerge) {
  const Polynomial two(ring_, 2);
  Product p;
  p.multiply(power_atom(two, testing::affine(setting_, "n")));
  p.multiply(power_atom(two, testing::affine(setting_, "k - 2")), 3);
  ASSERT_EQ(p.atoms.size(), 1U);
  EXPECT_EQ(p.atoms[0].first.argument, testing::affine(setting_, "n + 3*k - 6"));
  p.multiply(power_atom(two, testing::affine(setting_, "6 - n - 3*k")));
  EXPECT_TRUE(p.atoms.empty());
  p.multiply(factorial_atom(ring_, testing::affine(setting_, "n")), 0);
  EXPECT_TRUE(p.atoms.empty());
}

// product(s + 1) / product as a rational function has the values that the atoms' definitions give.
TEST_F(ProductTest, ShiftQuotientsHaveTheRightValues) {
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(400); ++i) {
    const Product p = make_.product(4);
    for (const std::size_t symbol : {kN, kK, kM}) {
      const Factored quotient = shift_quotient(ring_, p, symbol);
      for (int j = 0; j < 12; ++j) {
        const Point at = make_.point(9);
        Point next = at;
        next[symbol] += 1;
        const Number here = value_of(p, at);
        const Number there = value_of(p, next);
        const Number q = value_of(quotient, at);
        if (!here || !there || !q || *here == 0) continue;
        ASSERT_EQ(*here * *q, *there) << "seed " << testing::random_seed();
        ++compared;
      }
    }
  }
  std::cout << compared << " values compared\n";
  EXPECT_GE(compared, testing::effort(400) * 2);
}

TEST_F(ProductTest, RatiosHaveTheRightValues) {
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(300); ++i) {
    const Product a = make_.product(4);
    Product b = shift(shift(a, kN, make_.pick(-3, 3)), kK, make_.pick(-3, 3));
    b.coefficient.multiply(testing::polynomial_of(setting_, "2*n - k + 3"), 1);
    const auto q = ratio(ring_, a, b);
    ASSERT_TRUE(q);
    const auto inverse = ratio(ring_, b, a);
    ASSERT_TRUE(inverse);
    Factored one = *q;
    one.multiply(*inverse);
    EXPECT_EQ(one.constant, 1);
    EXPECT_TRUE(one.factors.empty());
    for (int j = 0; j < 12; ++j) {
      const Point at = make_.point(9);
      const Number x = value_of(a, at);
      const Number y = value_of(b, at);
      const Number z = value_of(*q, at);
      if (!x || !y || !z || *y == 0) continue;
      ASSERT_EQ(*y * *z, *x) << "seed " << testing::random_seed();
      ++compared;
    }
  }
  EXPECT_GE(compared, testing::effort(300));
}

TEST_F(ProductTest, DissimilarProductsHaveNoRatio) {
  const auto factorial = [&](const char* form) {
    Product p;
    p.multiply(factorial_atom(ring_, testing::affine(setting_, form)));
    return p;
  };
  const auto power = [&](long base, const char* form) {
    Product p;
    p.multiply(power_atom(Polynomial(ring_, base), testing::affine(setting_, form)));
    return p;
  };
  EXPECT_FALSE(ratio(ring_, factorial("n"), factorial("k")));
  EXPECT_FALSE(ratio(ring_, factorial("n"), factorial("2*n")));
  EXPECT_FALSE(ratio(ring_, power(2, "n"), power(3, "n")));
  EXPECT_FALSE(ratio(ring_, power(2, "n"), power(2, "2*n")));
  EXPECT_FALSE(ratio(ring_, power(2, "n"), Product{}));
  EXPECT_TRUE(ratio(ring_, power(2, "n + 3"), power(2, "n - 1")));
  EXPECT_EQ(ratio(ring_, power(2, "n + 3"), power(2, "n - 1"))->constant, 16);
  EXPECT_EQ(ratio(ring_, factorial("5"), factorial("3"))->constant, 20);
  EXPECT_FALSE(ratio(ring_, factorial("-1"), factorial("3"))) << "no value";
  // (-9)(-8)(-7) has one, although Gamma has none at either end; (-1)(0)(1) is no quotient.
  Product negative;
  negative.multiply(interval_atom(Polynomial(ring_), 1, testing::affine(setting_, "-9"),
                                  testing::affine(setting_, "-6"), false));
  ASSERT_TRUE(ratio(ring_, negative, Product{}));
  EXPECT_EQ(ratio(ring_, negative, Product{})->constant, -504);
  Product zero;
  zero.multiply(interval_atom(Polynomial(ring_), 1, testing::affine(setting_, "-1"),
                              testing::affine(setting_, "2"), false));
  EXPECT_FALSE(ratio(ring_, zero, Product{}));
}

TEST_F(ProductTest, FarApartIsRefused) {
  Product a;
  a.multiply(factorial_atom(ring_, testing::affine(setting_, "n + 900000")));
  Product b;
  b.multiply(factorial_atom(ring_, testing::affine(setting_, "n")));
  EXPECT_THROW((void)ratio(ring_, a, b), std::length_error);
}

TEST_F(ProductTest, SubstitutionIsComposition) {
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(400); ++i) {
    const Product p = make_.product(4);
    const Affine value = make_.form(2);
    const Product q = substitute(ring_, p, kK, value);
    ASSERT_TRUE(canonical(q));
    const Product moved = shift(p, kK, 2);
    ASSERT_TRUE(canonical(moved));
    ASSERT_TRUE(same(shift(moved, kK, -2), p)) << "seed " << testing::random_seed();
    for (int j = 0; j < 6; ++j) {
      const Point at = make_.point(5);
      Point there = at;
      there[kK] = value_of(value, at);
      const Number x = value_of(q, at);
      const Number y = value_of(p, there);
      if (!x || !y) continue;
      ASSERT_EQ(*x, *y) << "seed " << testing::random_seed();
      ++compared;
    }
  }
  EXPECT_GE(compared, testing::effort(400));
}

// The quotient after two shifts is the product of the quotients.
TEST_F(ProductTest, QuotientsCompose) {
  for (unsigned long i = 0; i < testing::effort(200); ++i) {
    const Product p = make_.product(4);
    Factored twice = shift_quotient(ring_, p, kN);
    twice.multiply(shift_quotient(ring_, shift(p, kN, 1), kN));
    const auto direct = ratio(ring_, shift(p, kN, 2), p);
    ASSERT_TRUE(direct);
    twice.multiply(*direct, -1);
    EXPECT_EQ(twice.constant, 1);
    EXPECT_TRUE(twice.factors.empty());
  }
}

}  // namespace
}  // namespace sumwright::term
