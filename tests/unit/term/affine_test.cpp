// Integer-affine forms: laws, substitution, the way to polynomials and back, no silent wrapping.
#include "term/affine.hpp"

#include <gtest/gtest.h>

#include <limits>
#include <stdexcept>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using testing::affine;

TEST(Affine, SubstitutionIsComposition) {
  const Setting setting = testing::usual_setting();
  testing::RandomTerms make(setting, testing::random_seed());
  for (unsigned long i = 0; i < testing::effort(300); ++i) {
    const Affine a = make.form(5);
    const Affine b = make.form(5);
    const testing::Point at = make.point(6);
    testing::Point moved = at;
    moved[testing::kK] = testing::value_of(b, at);
    EXPECT_EQ(testing::value_of(a.substitute(testing::kK, b), at), testing::value_of(a, moved));
    EXPECT_EQ(a.shift(testing::kN, 3).shift(testing::kN, -3), a);
    EXPECT_EQ(testing::value_of(a + b, at), testing::value_of(a, at) + testing::value_of(b, at));
    EXPECT_EQ(a - a, Affine::zero(setting.size()));
    EXPECT_EQ(-1 * a, -a);
    Affine back;
    ASSERT_TRUE(to_affine(a.polynomial(setting.ring), back));
    EXPECT_EQ(back, a);
  }
}

TEST(Affine, OtherPolynomialsAreNone) {
  const Setting setting = testing::usual_setting();
  Affine out;
  for (const char* text : {"n^2", "n*k + 1", "100000000000000000000*n", "100000000000000000000"})
    EXPECT_FALSE(to_affine(testing::polynomial_of(setting, text), out)) << text;
  ASSERT_TRUE(to_affine(testing::polynomial_of(setting, "2*n - 3*k - 7"), out));
  EXPECT_EQ(out, affine(setting, "2*n - 3*k - 7"));
  ASSERT_TRUE(to_affine(testing::polynomial_of(setting, "0"), out));
  EXPECT_EQ(out, Affine::zero(setting.size()));
}

TEST(Affine, NeverWrapsAround) {
  const long most = std::numeric_limits<long>::max();
  const Affine big = Affine::of(2, most);
  EXPECT_THROW((void)(big + 1), std::overflow_error);
  EXPECT_THROW((void)(2 * big), std::overflow_error);
  EXPECT_THROW((void)(-big - 2), std::overflow_error);
  Affine steep = Affine::symbol(2, 0);
  steep.coefficients[0] = most;
  EXPECT_THROW((void)steep.shift(0, 2), std::overflow_error);
  EXPECT_THROW((void)steep.substitute(0, Affine::of(2, 2)), std::overflow_error);
}

}  // namespace
}  // namespace sumwright::term
