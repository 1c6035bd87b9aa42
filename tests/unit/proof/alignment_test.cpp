// Matching factorial constants: the common form is reachable from every part.
#include "proof/alignment.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <random>

#include "../term/term_support.hpp"

namespace sumwright::proof::building {
namespace {

class Random {
 public:
  explicit Random(std::uint64_t seed) : random_(seed) {}
  long pick(long low, long high) { return std::uniform_int_distribution<long>(low, high)(random_); }
  /// `net` more factorials than reciprocals.
  FactorialConstants part(long net) {
    FactorialConstants out;
    const long pairs = pick(0, 3);
    for (long i = 0; i < pairs + std::max(net, 0L); ++i) out.fact.push_back(pick(-4, 4));
    for (long i = 0; i < pairs + std::max(-net, 0L); ++i) out.rfact.push_back(pick(-4, 4));
    std::sort(out.fact.begin(), out.fact.end());
    std::sort(out.rfact.begin(), out.rfact.end());
    return out;
  }

 private:
  std::mt19937_64 random_;
};

std::vector<long> sorted(std::vector<long> list) {
  std::sort(list.begin(), list.end());
  return list;
}

/// What the alignment says about the atoms adds up: part + inserted - cancelled -> base.
void expect_consistent(const FactorialConstants& part, const FactorialConstants& base,
                       const Alignment& a) {
  std::vector<long> sources;
  std::vector<long> targets;
  for (const auto& [from, to] : a.fact) {
    EXPECT_GE(from, to) << "fact moves down";
    sources.push_back(from);
    targets.push_back(to);
  }
  for (const auto& [fact, rfact] : a.cancelled) {
    EXPECT_GE(fact, rfact);
    sources.push_back(fact);
  }
  std::vector<long> given = part.fact;
  given.insert(given.end(), a.inserted.begin(), a.inserted.end());
  EXPECT_EQ(sorted(sources), sorted(given));
  EXPECT_EQ(sorted(targets), base.fact);

  sources.clear();
  targets.clear();
  for (const auto& [from, to] : a.rfact) {
    EXPECT_LE(from, to) << "rfact moves up";
    sources.push_back(from);
    targets.push_back(to);
  }
  for (const auto& [fact, rfact] : a.cancelled) sources.push_back(rfact);
  given = part.rfact;
  given.insert(given.end(), a.inserted.begin(), a.inserted.end());
  EXPECT_EQ(sorted(sources), sorted(given));
  EXPECT_EQ(sorted(targets), base.rfact);
}

TEST(Alignment, TheCommonFormIsReachable) {
  Random random(testing::random_seed());
  std::size_t inserted = 0;
  std::size_t cancelled = 0;
  for (unsigned long i = 0; i < testing::effort(3000); ++i) {
    const long net = random.pick(-2, 2);
    std::vector<FactorialConstants> parts;
    for (long j = random.pick(1, 4); j > 0; --j) parts.push_back(random.part(net));
    const FactorialConstants base = common_constants(parts);
    EXPECT_TRUE(std::is_sorted(base.fact.begin(), base.fact.end()));
    EXPECT_TRUE(std::is_sorted(base.rfact.begin(), base.rfact.end()));
    for (const FactorialConstants& part : parts) {
      const auto aligned = align(part, base);
      ASSERT_TRUE(aligned) << "seed " << testing::random_seed();
      expect_consistent(part, base, *aligned);
      inserted += aligned->inserted.size();
      cancelled += aligned->cancelled.size();
    }
    // The common form of a common form and its parts is itself.
    EXPECT_TRUE(align(base, base));
    EXPECT_EQ(common_constants({base, base}).fact, base.fact);
    EXPECT_EQ(common_constants({base, base}).rfact, base.rfact);
    ASSERT_FALSE(::testing::Test::HasFailure()) << "seed " << testing::random_seed();
  }
  EXPECT_GT(inserted, 0U);
  EXPECT_GT(cancelled, 0U);
}

TEST(Alignment, KnownCases) {
  // binomial(n, k) and binomial(n + 1, k) in n: n! and (n+1)!.
  const FactorialConstants base = common_constants({{{0}, {}}, {{1}, {}}});
  EXPECT_EQ(base.fact, std::vector<long>{0});
  EXPECT_EQ(common_constants({{{}, {0}}, {{}, {1}}}).rfact, std::vector<long>{1});
  // fact(2) rfact(0) is a polynomial; beside nothing it is cancelled.
  const FactorialConstants none = common_constants({{{2}, {0}}, {{}, {}}});
  EXPECT_TRUE(none.fact.empty());
  EXPECT_TRUE(none.rfact.empty());
  // fact(0) rfact(2) = 1/((m+1)(m+2)) is not: the other part gets a unit.
  const FactorialConstants pair = common_constants({{{0}, {2}}, {{}, {}}});
  EXPECT_EQ(pair.fact, std::vector<long>{0});
  EXPECT_EQ(pair.rfact, std::vector<long>{2});
}

// A unit's factorial may lie above the part's own: the base goes down with it.
TEST(Alignment, UnitsAboveTheOwnFactorials) {
  const FactorialConstants wide{{5, 10}, {12}};
  const FactorialConstants narrow{{3}, {}};
  const FactorialConstants base = common_constants({wide, narrow});
  EXPECT_EQ(base.fact, (std::vector<long>{3, 3}));
  EXPECT_TRUE(align(wide, base));
  EXPECT_TRUE(align(narrow, base));
}

TEST(Alignment, RefusesWhatTheLawsDoNotReach) {
  EXPECT_FALSE(align({{0}, {}}, {{1}, {}})) << "fact does not move up";
  EXPECT_FALSE(align({{}, {1}}, {{}, {0}})) << "rfact does not move down";
  EXPECT_FALSE(align({{0}, {}}, {{}, {}})) << "different net exponents";
  EXPECT_FALSE(align({{0}, {2}}, {{}, {}})) << "no polynomial";
  EXPECT_TRUE(align({{1}, {}}, {{0}, {}}));
  EXPECT_TRUE(align({{}, {}}, {{0}, {0}}));
}

}  // namespace
}  // namespace sumwright::proof::building
