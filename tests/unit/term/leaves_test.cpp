// One rule per call or power: which one is chosen, and under which conditions.
#include "term/leaves.hpp"

#include <gtest/gtest.h>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using proof::LeafRule;
using testing::Number;
using testing::Point;
using testing::value_of;

Leaf leaf_of(const Setting& setting, const std::string& text, bool reciprocal = false) {
  std::vector<Requirement> definedness;
  return make_leaf(setting, testing::usual_facts(setting), testing::parse(setting, text),
                   reciprocal, definedness);
}

TEST(Leaves, TheRuleDependsOnSigns) {
  const Setting setting = testing::usual_setting();
  const std::vector<std::pair<std::string, LeafRule>> rows{
      {"binomial(n, k)", LeafRule::binomial_factorials},
      {"binomial(n - k, k)", LeafRule::binomial_factorials},
      {"binomial(n - 1, k)", LeafRule::binomial_interval},
      {"binomial(-n, k)", LeafRule::binomial_interval},
      {"binomial(x, k)", LeafRule::binomial_interval},
      {"binomial(1/2, k)", LeafRule::binomial_interval},
      {"factorial(n)", LeafRule::factorial},
      {"rising(k + 1, n)", LeafRule::rising_factorials},
      {"rising(k, n)", LeafRule::rising_interval},
      {"rising(-k, n)", LeafRule::rising_reflected},
      {"rising(0, k)", LeafRule::rising_reflected},
      {"rising(x, n)", LeafRule::rising_interval},
      {"rising(1/2, n)", LeafRule::rising_interval},
      {"falling(n, k)", LeafRule::falling_factorials},
      {"falling(n - 1, k)", LeafRule::falling_interval},
      {"falling(x, k)", LeafRule::falling_interval},
      {"2^k", LeafRule::power},
      {"(x + 1)^(n - k)", LeafRule::power},
  };
  for (const auto& [text, rule] : rows) EXPECT_EQ(leaf_of(setting, text).rule, rule) << text;
  EXPECT_EQ(leaf_of(setting, "factorial(n - 5)", true).rule, LeafRule::reciprocal_factorial);
}

TEST(Leaves, FirstArgumentsAreSplit) {
  const Setting setting = testing::usual_setting();
  const auto interval = [&](const std::string& text) {
    const Leaf leaf = leaf_of(setting, text);
    EXPECT_EQ(leaf.value.atoms.size(), 1U) << text;
    const Atom& a = leaf.value.atoms.at(0).first;
    return a.base.to_string() + "/" + a.scale.get_str() + "; " + term::text(setting, a.low) + ", " +
           term::text(setting, a.high);
  };
  EXPECT_EQ(interval("rising(1/2, k)"), "1/2; 0, k");
  EXPECT_EQ(interval("rising(-1/2, k)"), "1/2; -1, k - 1");
  EXPECT_EQ(interval("rising(n + 7/3, k)"), "1/3; n + 2, n + k + 2");
  EXPECT_EQ(interval("rising(x/2 + n, k)"), "x/2; n, n + k");
  EXPECT_EQ(interval("rising(x + m + 3/2, k)"), "2*x + 1/2; m + 1, k + m + 1");
  EXPECT_EQ(interval("falling(x, k)"), "x/1; -k + 1, 1");
  EXPECT_EQ(interval("rising(k - 2, n)"), "0/1; k - 2, n + k - 2");
}

TEST(Leaves, PowersAreSplitIntoPrimesAndIrreducibleFactors) {
  const Setting setting = testing::usual_setting();
  const auto bases = [&](const std::string& text) {
    std::string out;
    for (const auto& [atom, e] : leaf_of(setting, text).value.atoms)
      out += atom.base.to_string() + ": " + term::text(setting, atom.argument) + "; ";
    return out;
  };
  EXPECT_EQ(bases("12^k"), "2: 2*k; 3: k; ");
  EXPECT_EQ(bases("(-4/9)^n"), "-1: n; 2: 2*n; 3: -2*n; ");
  EXPECT_EQ(bases("(2*x + 2)^k"), "2: k; x + 1: k; ");
  EXPECT_EQ(bases("(x^2/(x + 1))^k"), "x: 2*k; x + 1: -k; ");
  EXPECT_EQ(bases("1^k"), "");
}

TEST(Leaves, InverseAtomsMultiplyToOne) {
  const Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  std::size_t compared = 0;
  for (unsigned long i = 0; i < testing::effort(500); ++i) {
    const Atom atom = make.atom();
    if (atom.kind == AtomKind::reciprocal) continue;
    const Point at = make.point(5);
    const Number a = value_of(atom, at);
    const Number b = value_of(inverse_atom(setting.ring, atom), at);
    if (!a || !b || *a == 0) continue;
    ASSERT_EQ(*a * *b, 1);
    ++compared;
  }
  EXPECT_GT(compared, testing::effort(500) / 4);
}

// "Every factor is nonzero" is never said of a product with a zero factor.
TEST(Leaves, IntervalNonvanishingIsNeverWrong) {
  const Setting setting = testing::usual_setting();
  const Facts facts = testing::usual_facts(setting);
  std::size_t settled = 0;
  std::size_t open = 0;
  for (const char* base : {"0", "1", "x", "2*x", "2*x + 1"})
    for (const char* low : {"0", "1", "-2", "k", "k + 1", "-n", "-n - 1", "k - n", "m"})
      for (const char* high : {"0", "1", "k", "n + 1", "-k", "k - n", "n + k", "m + n"}) {
        const Atom atom =
            interval_atom(testing::polynomial_of(setting, base), std::string(base) == "1" ? 2 : 1,
                          testing::affine(setting, low), testing::affine(setting, high), true);
        const Requirement r = interval_nonvanishing(setting, facts, atom, {});
        (r.settled ? settled : open)++;
        if (!r.settled) continue;
        for (long n = 0; n <= 4; ++n)
          for (long k = 0; k <= n; ++k)
            for (long m = 0; m <= 2; ++m)
              for (const char* x : {"1/2", "-1/2", "-3/2", "-5/2", "1/3", "-7/3", "3/2"}) {
                const Point at{n, k, m, mpq_class(x)};
                const mpq_class a = atom.base.evaluate_rational(at) / atom.scale;
                for (mpz_class t = value_of(atom.low, at); t < value_of(atom.high, at); ++t)
                  ASSERT_NE(a + t, 0) << base << " from " << low << " to " << high << ", n = " << n
                                      << ", k = " << k << ", x = " << x;
              }
      }
  EXPECT_GT(settled, 20U);
  EXPECT_GT(open, 20U);
}

}  // namespace
}  // namespace sumwright::term
