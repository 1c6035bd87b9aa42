// Terms that must add up to 0: true ones balance, false ones do not, and their values say the same.
#include "proof/balancing.hpp"

#include <gtest/gtest.h>

#include "proof/region.hpp"
#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

std::vector<TermDraft> terms_from(const term::Setting& setting, const std::string& text) {
  std::vector<TermDraft> out;
  for (const term::Product& p : testing::convert(setting, text).products) {
    TermDraft t;
    t.product = p;
    out.push_back(t);
  }
  return out;
}

TEST(Balancing, TrueBalancesHold) {
  const term::Setting setting = testing::usual_setting();
  for (const char* text : {"binomial(n, k) - factorial(n)/factorial(k)/factorial(n - k)",
                           "binomial(n + 1, k + 1) - binomial(n, k) - binomial(n, k + 1)",
                           "(n + 1)*factorial(n) - factorial(n + 1)",
                           "2^(n + 1) - 2*2^n + factorial(k + 1) - k*factorial(k) - factorial(k)",
                           "rising(x, k + 1) - (x + k)*rising(x, k)", "x^(k + 1) - x*x^k",
                           "1/factorial(n - k)*(n - k) - 1/factorial(n - k - 1)", "0", "n - n"}) {
    std::string why;
    const auto made =
        balance(setting, testing::usual_facts(setting), terms_from(setting, text), why);
    ASSERT_TRUE(made) << text << ": " << why;
    EXPECT_TRUE(made->holds()) << text;
    EXPECT_TRUE(all_hold(setting, testing::usual_facts(setting), made->needs(), &why))
        << text << ": " << why;
  }
}

TEST(Balancing, FalseBalancesDoNot) {
  const term::Setting setting = testing::usual_setting();
  for (const char* text :
       {"binomial(n, k)", "binomial(n + 1, k + 1) - binomial(n, k) + binomial(n, k + 1)",
        "2^(n + 1) - 2^n", "2^n - 3^n", "(n + 2)*factorial(n) - factorial(n + 1)",
        "rising(x, k + 1) - x*rising(x, k)", "1", "k", "factorial(n) - factorial(k)"}) {
    std::string why;
    const auto made =
        balance(setting, testing::usual_facts(setting), terms_from(setting, text), why);
    ASSERT_TRUE(made) << text << ": " << why;
    EXPECT_FALSE(made->holds()) << text;
  }
}

// Where the factor is 0 the term is, and where it is not the reciprocal factorial is.
TEST(Balancing, AFactorBesideItsReciprocalFactorial) {
  const term::Setting setting = testing::usual_setting();
  const term::Facts facts = testing::usual_facts(setting);
  const auto first = [&](const std::string& text) {
    std::string why;
    return balance(setting, facts, terms_from(setting, text), why)->terms.at(0);
  };
  const TermDraft zero = first("m/factorial(-m)");
  ASSERT_TRUE(zero.zero_atom);
  ASSERT_TRUE(zero.zero_factor);
  EXPECT_EQ(term::text(setting, *zero.zero_factor), "m");
  EXPECT_TRUE(first("(n - k)/factorial(k - n)").zero_factor);
  EXPECT_FALSE(first("m/factorial(m)").zero_atom);
  EXPECT_FALSE(first("(m - 1)/factorial(-m)").zero_atom) << "1 at m = 0";
  EXPECT_FALSE(first("x/factorial(-m)").zero_atom) << "a rational parameter";
}

// A term with an rfact of negative argument is 0, and is said to be so.
TEST(Balancing, SupportMakesZero) {
  const term::Setting setting = testing::usual_setting();
  std::string why;
  const auto made = balance(setting, testing::usual_facts(setting),
                            terms_from(setting, "5/factorial(k - n - 1)"), why);
  ASSERT_TRUE(made);
  EXPECT_TRUE(made->holds());
  ASSERT_EQ(made->terms.size(), 1U);
  EXPECT_TRUE(made->terms[0].zero_atom);
  EXPECT_TRUE(made->groups.empty());
  // One step nearer it need not be.
  const auto not_zero = balance(setting, testing::usual_facts(setting),
                                terms_from(setting, "5/factorial(k - n)"), why);
  ASSERT_TRUE(not_zero);
  EXPECT_FALSE(not_zero->holds());
}

// The total of a class times its base is the sum of its members, as numbers.
TEST(Balancing, TotalsAreSums) {
  const term::Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(150); ++i) {
    const term::Product p = make.product(3);
    std::vector<TermDraft> terms(3);
    terms[0].product = p;
    terms[1].product = term::shift(p, testing::kN, 1);
    terms[2].product = make.product(2);
    std::string why;
    const auto made = balance(setting, setting.from(0), terms, why);
    if (!made) continue;
    for (int j = 0; j < 20; ++j) {
      const testing::Point at = make.point(6);
      if (at[0] < 0 || !testing::all_met(made->needs(), at)) continue;
      mpq_class sum = 0;
      mpq_class groups = 0;
      bool defined = true;
      for (const TermDraft& t : terms) {
        const testing::Number value = testing::value_of(t.product, at);
        defined = defined && value;
        if (value) sum += *value;
      }
      for (const GroupDraft& g : made->groups) {
        const testing::Number value = testing::value_of(g.base, at);
        defined = defined && value;
        if (value)
          groups += *value * g.total.numerator().evaluate_rational(at) /
                    g.total.denominator().evaluate_rational(at);
      }
      if (!defined) continue;
      ASSERT_EQ(sum, groups) << "seed " << testing::random_seed();
      ++compared;
    }
  }
  EXPECT_GT(compared, testing::effort(150));
}

}  // namespace
}  // namespace sumwright::proof::building
