// Symbols, hypotheses and range ends of a claim; the ends against the bounds' own values.
#include "term/setting.hpp"

#include <gtest/gtest.h>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using testing::ClaimParts;
using testing::Point;

TEST(Setting, OneVariablePerSymbol) {
  ClaimParts parts = testing::usual_parts();
  const Setting setting = make_setting(testing::read_claim(parts));
  ASSERT_EQ(setting.size(), 4U);
  EXPECT_EQ(setting.symbols[running].name, "n");
  EXPECT_EQ(setting.symbols[index].name, "k");
  EXPECT_EQ(setting.position.at("x"), 3U);
  EXPECT_TRUE(setting.is_integer(2));
  EXPECT_FALSE(setting.is_integer(3));
  EXPECT_TRUE(setting.has_index);
  EXPECT_TRUE(setting.from(3).implies(testing::affine(setting, "n - 3")));
  EXPECT_FALSE(setting.from(3).implies(testing::affine(setting, "n - 4")));
  EXPECT_TRUE(setting.hypotheses.implies(testing::affine(setting, "m")));
}

TEST(Setting, WithoutAnIndexTheIndexIsAPlaceholder) {
  ClaimParts parts;
  parts.low = "";
  parts.summand = "2^n*k";
  parts.parameters = "k = { in = \"integers\" }";
  const Setting setting = make_setting(testing::read_claim(parts));
  EXPECT_FALSE(setting.has_index);
  EXPECT_EQ(setting.position.at("k"), 2U);
  EXPECT_NE(setting.symbols[index].name, "k");
}

TEST(Setting, AssumptionsBecomeFacts) {
  ClaimParts parts;
  parts.parameters = "a = { in = \"integers\" }\nb = { in = \"integers\" }";
  parts.assume = "\"a < b\", \"b <= 7\", \"a > 2\", \"a != b\"";
  const Setting setting = make_setting(testing::read_claim(parts));
  const auto implies = [&](const char* text) {
    return setting.hypotheses.implies(testing::affine(setting, text));
  };
  EXPECT_TRUE(implies("b - a - 1"));
  EXPECT_TRUE(implies("7 - b"));
  EXPECT_TRUE(implies("a - 3"));
  EXPECT_TRUE(implies("b - 4"));
  EXPECT_TRUE(implies("6 - a"));
  EXPECT_FALSE(implies("5 - a"));
}

TEST(Setting, ClaimsAboutNothingAreRefused) {
  for (const char* assume : {"\"a < b\", \"b < a\"", "\"a >= 5\", \"a <= 4\"",
                             "\"a <= b\", \"b <= a\", \"a != b\"", "\"2*a >= 3\", \"2*a <= 3\""}) {
    ClaimParts parts;
    parts.parameters = "a = { in = \"integers\" }\nb = { in = \"integers\" }";
    parts.assume = assume;
    try {
      (void)make_setting(testing::read_claim(parts));
      ADD_FAILURE() << assume << " was accepted";
    } catch (const claim::InputError& error) {
      EXPECT_NE(std::string(error.what()).find("no values satisfy"), std::string::npos)
          << error.what();
      EXPECT_EQ(std::string(error.what()).substr(0, 9), "t.toml:5:") << error.what();
    }
  }
}

bool holds(const std::vector<Conjunction>& alternatives, const Point& at) {
  for (const Conjunction& c : alternatives) {
    bool all = true;
    for (const Affine& form : c) all = all && testing::value_of(form, at) >= 0;
    if (all) return true;
  }
  return false;
}

// inside and outside are each other's complement, and mean what the bound says.
TEST(Setting, EndsMeanTheirBounds) {
  const char* const bounds[] = {
      "n",         "2*n - m + 1",   "floor(n/2)",        "floor((2*n - m + 1)/3)",
      "min(n, m)", "max(n - 2, m)", "min(n, max(m, 3))", "max(floor(n/2), min(m, n - 1))",
      "5"};
  std::size_t checked = 0;
  for (const char* bound : bounds)
    for (const bool upper : {false, true}) {
      SCOPED_TRACE(std::string(bound) + (upper ? " as upper end" : " as lower end"));
      ClaimParts parts = testing::usual_parts();
      (upper ? parts.high : parts.low) = bound;
      if (!upper) parts.high = "3*n + m + 9";
      const auto claim = testing::read_claim(parts);
      const Setting setting = make_setting(claim);
      const claim::Bound& written = upper ? claim->sum.over[0].high : claim->sum.over[0].low;
      const auto end = make_end(setting, written, upper);
      ASSERT_TRUE(end);
      const End moved = shift(*end, running, 2);
      for (long n = -3; n <= 7; ++n)
        for (long m = 0; m <= 5; ++m) {
          const Point here{n, 0, m, mpq_class(1, 2)};
          Point later = here;
          later[0] += 2;
          const mpz_class value =
              evaluate_bound(*written.value, testing::assignment(setting, here));
          const mpz_class next =
              evaluate_bound(*written.value, testing::assignment(setting, later));
          if (end->affine) {
            EXPECT_EQ(testing::value_of(*end->affine, here), value);
          }
          for (long k = -12; k <= 25; ++k) {
            Point at = here;
            at[1] = k;
            const bool inside = upper ? k <= value : k >= value;
            EXPECT_EQ(holds(end->inside, at), inside) << n << " " << m << " " << k;
            EXPECT_EQ(holds(end->outside, at), !inside) << n << " " << m << " " << k;
            EXPECT_EQ(holds(moved.inside, at), upper ? k <= next : k >= next);
            ++checked;
          }
        }
    }
  EXPECT_GT(checked, 10000U);
}

TEST(Setting, InfiniteAndNestedEnds) {
  ClaimParts parts;
  parts.high = "inf";
  const auto infinite = testing::read_claim(parts);
  EXPECT_FALSE(make_end(make_setting(infinite), infinite->sum.over[0].high, true));
  parts.high = "floor(max(n, 3)/2)";
  const auto nested = testing::read_claim(parts);
  EXPECT_FALSE(make_end(make_setting(nested), nested->sum.over[0].high, true));
}

}  // namespace
}  // namespace sumwright::term
