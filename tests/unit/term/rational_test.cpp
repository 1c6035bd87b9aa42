// Rational expressions, integer constants as prime powers, plain copies.
#include <gtest/gtest.h>

#include "term/conversion.hpp"
#include "term_support.hpp"

namespace sumwright::term {
namespace {

std::string shown(const Setting& setting, const char* text) {
  const auto value = to_rational_function(setting, *testing::parse(setting, text));
  return value ? value->to_string() : "none";
}

TEST(Rational, ReducesToLowestTerms) {
  const Setting setting = testing::usual_setting();
  EXPECT_EQ(shown(setting, "(n^2 - k^2)/(n - k)"), "n + k");
  EXPECT_EQ(shown(setting, "1/2 + 1/3"), "5/6");
  EXPECT_EQ(shown(setting, "(n/k)^-2"), shown(setting, "k^2/n^2"));
  EXPECT_EQ(shown(setting, "-(x - 1)"), "-x + 1");
  EXPECT_EQ(shown(setting, "n^0"), "1");
  EXPECT_EQ(shown(setting, "factorial(n)"), "none");
  EXPECT_EQ(shown(setting, "2^k"), "none");
  EXPECT_EQ(shown(setting, "1 + k*binomial(n, k)"), "none");
}

TEST(Rational, DivisionByZeroIsRefusedAtTheDivisor) {
  const Setting setting = testing::usual_setting();
  for (const char* text : {"1/(k - k)", "(n - n)^-1", "k/((n + 1)^2 - n^2 - 2*n - 1)"})
    EXPECT_THROW((void)to_rational_function(setting, *testing::parse(setting, text)),
                 claim::InputError)
        << text;
}

TEST(Rational, DegreesAreLimited) {
  const Setting setting = testing::usual_setting();
  EXPECT_THROW((void)to_rational_function(setting, *testing::parse(setting, "((n^900)^900)")),
               claim::InputError);
}

// The value of the rational function is the value of the expression.
TEST(Rational, KeepsValues) {
  const Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  std::size_t compared = 0;
  for (const char* text : {"(n - 3*k)^3/(2*k + 1) - x/(m + 1)", "1/(1/(x + 1) + 1/(n + 1))",
                           "(k + 1)^-3*(n - k)^2", "-(1/3)*n + x^2*k/7"}) {
    const claim::ExpressionPtr e = testing::parse(setting, text);
    const auto f = to_rational_function(setting, *e);
    ASSERT_TRUE(f);
    for (unsigned long i = 0; i < testing::effort(60); ++i) {
      const testing::Point at = make.point(9);
      const Value value = evaluate(*e, testing::assignment(setting, at));
      if (!value.number) continue;
      EXPECT_EQ(f->numerator().evaluate_rational(at),
                *value.number * f->denominator().evaluate_rational(at));
      ++compared;
    }
  }
  EXPECT_GT(compared, testing::effort(60));
}

TEST(Rational, ConstantsBecomePrimePowers) {
  const Setting setting = testing::usual_setting();
  const auto atoms = [&](const mpz_class& divisor) {
    Product p;
    divide_by_constant(p, setting.ring, divisor);
    std::string out;
    for (const auto& [atom, e] : p.atoms)
      out += atom.base.to_string() + "^" + term::text(setting, atom.argument) + " ";
    EXPECT_EQ(*testing::value_of(p, testing::Point(setting.size())), mpq_class(1, divisor));
    return out;
  };
  EXPECT_EQ(atoms(1), "");
  EXPECT_EQ(atoms(360), "2^-3 3^-2 5^-1 ");
  EXPECT_EQ(atoms(97), "97^-1 ");
  EXPECT_EQ(atoms(mpz_class("4295098369")), "4295098369^-1 ")
      << "65537^2 is above the primes tried";
}

TEST(Rational, PlainCopiesSayTheSame) {
  const Setting setting = testing::usual_setting();
  const Conversion c = testing::convert(setting, "(2*k + 1)^2*binomial(n, k)*rising(1/2, k)/3^k");
  ASSERT_EQ(c.products.size(), 1U);
  const proof::Product copy = plain(c.products[0]);
  ASSERT_EQ(copy.atoms.size(), c.products[0].atoms.size());
  for (std::size_t i = 0; i < copy.atoms.size(); ++i) {
    const Atom& atom = c.products[0].atoms[i].first;
    EXPECT_EQ(copy.atoms[i].first.kind, atom.kind);
    EXPECT_EQ(copy.atoms[i].first.argument.coefficients, atom.argument.coefficients);
    EXPECT_EQ(copy.atoms[i].first.argument.constant, atom.argument.constant);
    EXPECT_EQ(copy.atoms[i].first.base_scale, atom.scale);
    EXPECT_EQ(copy.atoms[i].first.high.constant, atom.high.constant);
    EXPECT_EQ(copy.atoms[i].second, c.products[0].atoms[i].second);
  }
  ASSERT_EQ(copy.coefficient.factors.size(), 1U);
  EXPECT_EQ(copy.coefficient.factors[0].second, 2);
  ASSERT_EQ(copy.coefficient.factors[0].first.terms.size(), 2U);
  EXPECT_EQ(copy.coefficient.factors[0].first.terms[0].coefficient, 2);
}

}  // namespace
}  // namespace sumwright::term
