// What expressions contain.

#include "claim/parts.hpp"

#include <gtest/gtest.h>

#include "claim/reader.hpp"

namespace sumwright::claim {
namespace {

ExpressionPtr parse(const std::string& text) {
  const Source source{"test", text};
  return parse_expression(source, {0, text.size()}, {"n", "k"});
}

TEST(Parts, FactorialsAreFoundAnywhere) {
  EXPECT_TRUE(has_factorial(*parse("factorial(n)")));
  EXPECT_TRUE(has_factorial(*parse("1 + n/(2*factorial(k)^3)")));
  EXPECT_FALSE(has_factorial(*parse("binomial(n, k)*rising(n, k)/2^k")));
}

}  // namespace
}  // namespace sumwright::claim
