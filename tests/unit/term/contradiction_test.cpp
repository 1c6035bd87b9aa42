// Hypotheses that nothing satisfies are refused; those that something satisfies are not.
#include "term/contradiction.hpp"

#include <gtest/gtest.h>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

constexpr const char* kTwo =
    "a = { in = \"integers\", at_least = 0 }\nb = { in = \"integers\", at_least = 0 }";

bool refused(const std::string& assume, const std::string& parameters = kTwo) {
  testing::ClaimParts parts;
  parts.assume = assume;
  parts.parameters = parameters;
  try {
    (void)make_setting(testing::read_claim(parts));
  } catch (const claim::InputError& error) {
    EXPECT_NE(std::string(error.what()).find("no values satisfy"), std::string::npos)
        << error.what();
    return true;
  }
  return false;
}

TEST(Contradiction, ByLinearArithmetic) {
  EXPECT_TRUE(refused("\"a < b\", \"b < a\""));
  EXPECT_TRUE(refused("\"a + b < 0\""));
  EXPECT_TRUE(refused("\"a != a\""));
  EXPECT_FALSE(refused("\"a <= b\", \"b <= a\""));
}

TEST(Contradiction, ByIntegersAlone) {
  EXPECT_TRUE(refused("\"5*a - 7*b >= 1\", \"5*a - 7*b <= 1\", \"a < 3\", \"b < 2\""));
  EXPECT_FALSE(refused("\"5*a - 7*b >= 1\", \"5*a - 7*b <= 1\", \"a < 4\", \"b < 3\""))
      << "a = 3, b = 2";
  EXPECT_TRUE(refused("\"a <= 1\", \"a != 0\", \"a != 1\""));
  EXPECT_FALSE(refused("\"a <= 2\", \"a != 0\", \"a != 1\""));
  EXPECT_TRUE(refused("\"2*a >= 1\", \"2*a <= 1\""));
}

TEST(Contradiction, UnboundedOrLargeBoxesAreLeft) {
  EXPECT_FALSE(refused("\"a != 0\""));
  EXPECT_FALSE(refused("\"a <= 900000\", \"b <= 900000\", \"a != b\""));
}

TEST(Contradiction, RationalParametersDoNotCount) {
  EXPECT_TRUE(refused("\"x != x\"", "x = { in = \"rationals\" }"));
  EXPECT_FALSE(refused("\"x != 0\"", "x = { in = \"rationals\" }"));
}

}  // namespace
}  // namespace sumwright::term
