// down(n,k+1) B(n,k+1) = up(n,k) B(n,k), as numbers, wherever the needs are met.
#include <gtest/gtest.h>

#include <iostream>

#include "proof/similarity.hpp"
#include "proof_support.hpp"
#include "term/text.hpp"

namespace sumwright::proof::building {
namespace {

using testing::kK;
using testing::Number;
using testing::Point;
using testing::value_of;

TEST(IndexShift, AgreesAsNumbers) {
  const term::Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  std::size_t compared = 0;
  std::size_t cancelled = 0;
  for (unsigned long i = 0; i < testing::effort(400); ++i) {
    std::string why;
    const term::Product base = *common_base(setting.ring, {make.product(4)}, why);
    SCOPED_TRACE(term::claim_text(algebra::Factored{}, base));
    const auto shift = index_shift(setting.ring, base, why);
    ASSERT_TRUE(shift) << why;
    for (const auto* side : {&shift->down, &shift->up})
      for (const auto& [factor, exponent] : side->factors) ASSERT_GT(exponent, 0);
    if (shift->bringing.cancelled) ++cancelled;
    for (int j = 0; j < 20; ++j) {
      const Point at = make.point(7);
      Point next = at;
      next[kK] += 1;
      if (!testing::all_met(shift->bringing.needs(), at)) continue;
      const Number here = value_of(base, at);
      const Number there = value_of(base, next);
      const Number down = value_of(shift->down, next);
      const Number up = value_of(shift->up, at);
      if (!here || !there || !down || !up) continue;
      ASSERT_EQ(*down * *there, *up * *here) << "seed " << testing::random_seed();
      ++compared;
    }
  }
  std::cout << compared << " values compared, " << cancelled << " with cancelled factors\n";
  EXPECT_GE(compared, testing::effort(400) * 2);
}

TEST(IndexShift, OfTheSquaresOfARow) {
  const term::Setting setting = testing::usual_setting();
  term::Product base;
  base.multiply(term::factorial_atom(setting.ring, testing::affine(setting, "n")), 2);
  base.multiply(term::reciprocal_factorial_atom(setting.ring, testing::affine(setting, "k")), 2);
  base.multiply(
      term::reciprocal_factorial_atom(setting.ring, testing::affine(setting, "n + 1 - k")), 2);
  std::string why;
  const auto shift = index_shift(setting.ring, base, why);
  ASSERT_TRUE(shift);
  EXPECT_EQ(shift->down.to_string(), "k^2");
  EXPECT_EQ(shift->up.to_string(), "(n - k + 1)^2");
  EXPECT_TRUE(shift->bringing.needs().empty()) << "rfact needs nothing";
}

}  // namespace
}  // namespace sumwright::proof::building
