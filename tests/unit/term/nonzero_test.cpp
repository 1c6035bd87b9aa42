// Why a polynomial is nonzero: which reason is found, and that none is ever wrong.
#include <gtest/gtest.h>

#include <iostream>

#include "term/setting.hpp"
#include "term_support.hpp"

namespace sumwright::term {
namespace {

using Method = proof::NonzeroFactor::Method;
using testing::ClaimParts;

struct Reason {
  std::optional<proof::Nonzero> why;
  std::string undecided;
};

Reason decide(const Setting& setting, const Facts& facts, const std::string& text) {
  Reason out;
  out.why = decide_nonzero(setting, facts, algebra::factor(testing::polynomial_of(setting, text)),
                           &out.undecided);
  return out;
}

TEST(Nonzero, NamesTheMethod) {
  ClaimParts parts = testing::usual_parts();
  parts.parameters =
      "m = { in = \"integers\", at_least = 0 }\n"
      "x = { in = \"rationals\", not = [\"1/2\", \"negative integers\"] }\n"
      "y = { in = \"rationals\", not = [\"nonnegative integers\"] }\n";
  parts.assume = "\"x != y\"";
  const Setting setting = make_setting(testing::read_claim(parts));
  const Facts facts = testing::usual_facts(setting);
  const std::vector<std::pair<std::string, Method>> rows{
      {"n + 1", Method::linear},         {"2*k + 1", Method::linear},
      {"n - k + 1", Method::linear},     {"n^2 + n + 1", Method::positive},
      {"n*k + m + 1", Method::positive}, {"2*x - 1", Method::excluded},
      {"x + n + 1", Method::excluded},   {"x + k + 3", Method::excluded},
      {"y - n", Method::excluded},       {"3*x - 3*y", Method::assumed},
  };
  for (const auto& [text, method] : rows) {
    const Reason r = decide(setting, facts, text);
    ASSERT_TRUE(r.why) << text << ": " << r.undecided;
    ASSERT_EQ(r.why->factors.size(), 1U) << text;
    EXPECT_EQ(r.why->factors[0].method, method) << text;
  }
  for (const auto& [text, named] :
       std::vector<std::pair<std::string, std::string>>{{"n", "n"},
                                                        {"(n + 1)*(k - 2)", "k - 2"},
                                                        {"x", "x"},
                                                        {"x - 1", "x - 1"},
                                                        {"x + n", "n + x"},
                                                        {"2*x + 1", "2*x + 1"},
                                                        {"y + n", "n + y"},
                                                        {"x + y", "x + y"},
                                                        {"x^2 + 1", "x^2 + 1"},
                                                        {"n^2 - 2", "n^2 - 2"},
                                                        {"x*n + 1", "n*x + 1"},
                                                        {"0", "0"}}) {
    const Reason r = decide(setting, facts, text);
    EXPECT_FALSE(r.why) << text;
    EXPECT_EQ(r.undecided, named);
  }
}

TEST(Nonzero, ConstantsNeedNoFactor) {
  const Setting setting = testing::usual_setting();
  const Reason r = decide(setting, setting.from(0), "-6");
  ASSERT_TRUE(r.why);
  EXPECT_TRUE(r.why->factors.empty());
  EXPECT_TRUE(involves_rational_parameter(setting, testing::polynomial_of(setting, "x + n")));
  EXPECT_FALSE(involves_rational_parameter(setting, testing::polynomial_of(setting, "m + n")));
}

// A positive factor's witness is what it says: the shifted polynomial with coefficients >= 0.
TEST(Nonzero, PositiveWitnesses) {
  const Setting setting = testing::usual_setting();
  for (const auto& [text, from] : std::vector<std::pair<std::string, long>>{
           {"n^2 - 3*n + 1", 3}, {"-n^2 - n - 1", 0}, {"n^3 - 100", 5}, {"7*n^2 + 21*n + 16", 0}}) {
    const Facts facts = setting.from(from);
    const Reason r = decide(setting, facts, text);
    ASSERT_TRUE(r.why) << text;
    const proof::NonzeroFactor& f = r.why->factors.at(0);
    ASSERT_EQ(f.method, Method::positive) << text;
    EXPECT_EQ(f.shift.at(0), from);
    for (const proof::Monomial& m : f.shifted.terms) EXPECT_GE(m.coefficient, 0) << text;
    EXPECT_FALSE(decide(setting, setting.from(-1), "n^2 - 2").why);
  }
  EXPECT_FALSE(decide(setting, setting.from(2), "n^2 - 3*n + 1").why) << "negative at 2, not later";
}

// Brute force: wherever a reason is given, no admitted point of the box is a zero.
TEST(Nonzero, IsNeverWrong) {
  ClaimParts parts;
  parts.parameters =
      "m = { in = \"integers\", at_least = 1 }\n"
      "x = { in = \"rationals\", not = [\"3/2\", \"positive integers\"] }\n";
  const Setting setting = make_setting(testing::read_claim(parts));
  const Facts facts = testing::usual_facts(setting);
  std::mt19937_64 random(testing::random_seed());
  const auto pick = [&](long low, long high) {
    return std::uniform_int_distribution<long>(low, high)(random);
  };
  std::size_t decided = 0;
  std::size_t open = 0;
  for (unsigned long i = 0; i < testing::effort(600); ++i) {
    algebra::Polynomial p(setting.ring, pick(-4, 4));
    for (const char* name : {"n", "k", "m", "x", "n^2", "k*n"}) {
      const bool rational = std::string(name) == "x";
      if (pick(0, rational ? 2 : 1) != 0) continue;
      p += algebra::Polynomial(setting.ring, pick(-2, 3)) * testing::polynomial_of(setting, name);
    }
    if (p.is_zero()) continue;
    const algebra::Factored factored = algebra::factor(p);
    if (!decide_nonzero(setting, facts, factored)) {
      ++open;
      continue;
    }
    ++decided;
    for (long n = 0; n <= 5; ++n)
      for (long k = 0; k <= n; ++k)
        for (long m = 1; m <= 4; ++m)
          for (long x = -12; x <= 12; ++x) {
            const mpq_class value(x, 2);
            mpq_class canonical = value;
            canonical.canonicalize();
            const bool excluded =
                canonical == mpq_class(3, 2) || (canonical.get_den() == 1 && canonical > 0);
            if (excluded) continue;
            ASSERT_NE(p.evaluate_rational({n, k, m, canonical}), 0)
                << p.to_string() << " at " << n << " " << k << " " << m << " " << canonical
                << ", seed " << testing::random_seed();
          }
  }
  std::cout << decided << " decided, " << open << " open\n";
  EXPECT_GT(decided, 10U);
  EXPECT_GT(open, 10U);
}

}  // namespace
}  // namespace sumwright::term
