// Terms as claim text: what is printed reads back as an equal term.
#include "term/text.hpp"

#include <gtest/gtest.h>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using algebra::Factored;
using testing::Number;
using testing::Point;
using testing::value_of;

TEST(Text, RationalFunctions) {
  const Setting setting = testing::usual_setting();
  const auto round = [&](const char* text) {
    return claim_text(to_rational_function(setting, *testing::parse(setting, text))->factored());
  };
  EXPECT_EQ(round("0"), "0");
  EXPECT_EQ(round("1"), "1");
  EXPECT_EQ(round("-1"), "-1");
  EXPECT_EQ(round("1/2"), "1/2");
  EXPECT_EQ(round("-n/2"), "-n/2");
  EXPECT_EQ(round("(n + 1)^2*k/(2*k - 1)^3"), "k*(n + 1)^2/(2*k - 1)^3");
  EXPECT_EQ(round("1/(6*(n + 1)*(n + 2))"), "1/(6*(n + 1)*(n + 2))");
}

TEST(Text, RationalFunctionsReadBack) {
  const Setting setting = testing::usual_setting();
  std::mt19937_64 random(testing::random_seed());
  const auto pick = [&](long low, long high) {
    return std::uniform_int_distribution<long>(low, high)(random);
  };
  for (unsigned long i = 0; i < testing::effort(300); ++i) {
    Factored f;
    f.constant = mpq_class(pick(-9, 9), static_cast<unsigned long>(pick(1, 9)));
    f.constant.canonicalize();
    for (const char* p : {"n", "k - n", "2*k + 1", "n^2 + k*x - 3", "x", "m*x + 1"})
      if (const long e = pick(-2, 2); e != 0) f.multiply(testing::polynomial_of(setting, p), e);
    const std::string text = claim_text(f);
    const auto back = to_rational_function(setting, *testing::parse(setting, text));
    ASSERT_TRUE(back) << text;
    EXPECT_EQ(*back, algebra::RationalFunction(setting.ring, f)) << text;
  }
}

// The text's value by the claim format is the product's value by the atoms' definitions.
TEST(Text, ProductsKeepTheirValues) {
  const Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(400); ++i) {
    const Product p = make.product(4);
    Factored rational;
    rational.constant = mpq_class(make.pick(-4, -1), 3);
    rational.constant.canonicalize();
    rational.multiply(testing::polynomial_of(setting, "n - k + 7"), make.pick(-1, 1));
    const std::string text = claim_text(rational, p);
    const claim::ExpressionPtr e = testing::parse(setting, text);
    for (int j = 0; j < 8; ++j) {
      const Point at = make.point(5);
      const Value value = evaluate(*e, testing::assignment(setting, at));
      const Number a = value_of(rational, at);
      const Number b = value_of(p, at);
      if (!value.number || !a || !b) continue;
      ASSERT_EQ(*value.number, *a * *b) << text << ", seed " << testing::random_seed();
      ++compared;
    }
  }
  EXPECT_GE(compared, testing::effort(400) / 2);
}

// Converted terms read back as similar terms of quotient 1 (the same canonical product where no
// reflection chooses another rule).
TEST(Text, ConvertedTermsReadBack) {
  const Setting setting = testing::usual_setting();
  for (const char* text :
       {"binomial(n, k)^2", "binomial(n + k, 2*k)/(k + 1)", "rising(1/2, k)/factorial(k)",
        "x^k*(1 - x)^(n - k)", "binomial(x + n, k)", "(2/3)^(n - 2*k)", "1/(2*k + 1)^2",
        "1/binomial(n, k)", "rising(-n, k)*(k + 1)", "(-1)^k*binomial(2*n, k)/4^n",
        "1/rising(1/2, k + 1)^2", "1/(3*2^k*(n + 1))", "-falling(x/2, k)"}) {
    SCOPED_TRACE(text);
    const Conversion c = testing::convert(setting, text);
    ASSERT_EQ(c.products.size(), 1U);
    const std::string printed = claim_text(Factored{}, c.products[0]);
    SCOPED_TRACE(printed);
    const Conversion back = testing::convert(setting, printed);
    ASSERT_EQ(back.products.size(), 1U);
    const auto quotient = ratio(setting.ring, c.products[0], back.products[0]);
    ASSERT_TRUE(quotient);
    EXPECT_EQ(quotient->constant, 1);
    EXPECT_TRUE(quotient->factors.empty());
    EXPECT_EQ(c.products[0].atoms, back.products[0].atoms);
  }
}

}  // namespace
}  // namespace sumwright::term
