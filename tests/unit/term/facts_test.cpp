// Linear arithmetic: what it affirms is true at every integer point of a box (brute force).
#include "term/facts.hpp"

#include <gtest/gtest.h>

#include <functional>
#include <iostream>
#include <random>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

constexpr std::size_t kSymbols = 3;
constexpr long kBox = 6;

long at(const Affine& form, const std::vector<long>& point) {
  long out = form.constant;
  for (std::size_t i = 0; i < kSymbols; ++i) out += form.coefficients[i] * point[i];
  return out;
}

/// Every point of the box at which the facts hold.
std::vector<std::vector<long>> points(const Facts& facts) {
  std::vector<std::vector<long>> out;
  for (long a = -kBox; a <= kBox; ++a)
    for (long b = -kBox; b <= kBox; ++b)
      for (long c = -kBox; c <= kBox; ++c) {
        const std::vector<long> point{a, b, c};
        bool inside = true;
        for (const Affine& fact : facts.all()) inside = inside && at(fact, point) >= 0;
        if (inside) out.push_back(point);
      }
  return out;
}

class Random {
 public:
  explicit Random(std::uint64_t seed) : random_(seed) {}
  long pick(long low, long high) { return std::uniform_int_distribution<long>(low, high)(random_); }
  Affine form() {
    Affine out = Affine::of(kSymbols, pick(-4, 4));
    for (long& c : out.coefficients) c = pick(0, 2) == 0 ? 0 : pick(-3, 3);
    return out;
  }

 private:
  std::mt19937_64 random_;
};

TEST(Facts, AffirmsNothingFalse) {
  Random random(testing::random_seed());
  std::size_t yes = 0;
  std::size_t no = 0;
  std::size_t bounds = 0;
  for (unsigned long i = 0; i < testing::effort(400); ++i) {
    Facts facts(kSymbols);
    for (long j = random.pick(0, 4); j > 0; --j) facts.add(random.form());
    const auto inside = points(facts);
    if (facts.contradictory()) {
      EXPECT_TRUE(inside.empty()) << "seed " << testing::random_seed();
    }
    for (int j = 0; j < 4; ++j) {
      // Half of them sums of facts, so that "yes" occurs.
      Affine form = random.form();
      if (!facts.all().empty() && j % 2 == 0)
        form = facts.all()[0] + random.pick(0, 2) * facts.all().back() + random.pick(-1, 2);
      const auto all = [&](const std::function<bool(long)>& holds) {
        for (const auto& point : inside)
          if (!holds(at(form, point))) return false;
        return true;
      };
      const bool implied = facts.implies(form);
      (implied ? yes : no)++;
      if (implied) {
        EXPECT_TRUE(all([](long v) { return v >= 0; }));
      }
      if (facts.implies_zero(form)) {
        EXPECT_TRUE(all([](long v) { return v == 0; }));
      }
      if (facts.implies_nonzero(form)) {
        EXPECT_TRUE(all([](long v) { return v != 0; }));
      }
      if (const auto bound = facts.lower_bound(form)) {
        EXPECT_TRUE(all([&](long v) { return v >= *bound; }));
        ++bounds;
      }
    }
  }
  std::cout << yes << " implied, " << no << " not, " << bounds << " bounds\n";
  EXPECT_GT(yes, testing::effort(400) / 4);
  EXPECT_GT(no, testing::effort(400) / 4);
  EXPECT_GT(bounds, 0U);
}

TEST(Facts, DecidesWhatClaimsNeed) {
  const Setting setting = testing::usual_setting();
  const Facts facts = testing::usual_facts(setting);
  const auto form = [&](const char* text) { return testing::affine(setting, text); };
  for (const char* text : {"n", "k", "n - k", "2*n - k", "n + m", "3*n - 2*k", "0", "5"})
    EXPECT_TRUE(facts.implies(form(text))) << text;
  for (const char* text : {"n - 1", "k - n", "n - 2*k", "-n", "-1", "m - n"})
    EXPECT_FALSE(facts.implies(form(text))) << text;
  for (const char* text : {"n + 1", "-n - 1", "2*k + 1", "2*n - 4*k + 1", "7", "3*m - 6*k + 2"})
    EXPECT_TRUE(facts.implies_nonzero(form(text))) << text;
  for (const char* text : {"n", "2*k - 4", "n - k", "0", "3*m - 6*k + 3"})
    EXPECT_FALSE(facts.implies_nonzero(form(text))) << text;
  EXPECT_TRUE(facts.with(form("-n")).implies_zero(form("k")));
  EXPECT_FALSE(facts.implies_zero(form("k")));
}

// Integer tightening: 2a <= 2b + 1 gives a <= b; gaps between rational and integer points.
TEST(Facts, TightensOverTheIntegers) {
  const Affine a = Affine::symbol(2, 0);
  const Affine b = Affine::symbol(2, 1);
  Facts facts(2);
  facts.add(2 * b + 1 - 2 * a);
  EXPECT_TRUE(facts.implies(b - a));
  Facts gap(2);
  gap.add(2 * a - 1);
  gap.add(Affine::of(2, 1) - 2 * a);
  EXPECT_TRUE(gap.contradictory());
  Facts none(2);
  EXPECT_FALSE(none.contradictory());
  EXPECT_FALSE(none.lower_bound(a));
  none.add(a - 3);
  EXPECT_EQ(none.lower_bound(2 * a - 1), 5);
  EXPECT_FALSE(none.lower_bound(-a));
  none.add(-a + 2);
  EXPECT_TRUE(none.contradictory());
  EXPECT_TRUE(none.implies(-1 * Affine::of(2, 1))) << "everything follows";
}

// Coefficients near the ends of long: an answer or an exception, never a wrong yes.
TEST(Facts, LargeNumbers) {
  const long big = 4'000'000'000'000'000'000L;
  Facts facts(1);
  facts.add(Affine::symbol(1, 0) - big);
  EXPECT_TRUE(facts.implies(Affine::symbol(1, 0)));
  EXPECT_TRUE(facts.implies_nonzero(Affine::symbol(1, 0)));
  EXPECT_FALSE(facts.implies(-Affine::symbol(1, 0)));
}

}  // namespace
}  // namespace sumwright::term
