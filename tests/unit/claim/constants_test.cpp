#include "claim/constants.hpp"

#include <gtest/gtest.h>

#include <string>

namespace sumwright::claim {
namespace {

const std::set<std::string> kIntegers = {"k", "n"};

Folded folded(const std::string& text) {
  const Source source{"e", text};
  const ExpressionPtr tree = parse_expression(source, {0, text.size()}, {"k", "n", "x"});
  return fold_constants(source, {}, kIntegers, *tree);
}

void expect_refused(const std::string& text, const std::string& place, const std::string& message) {
  try {
    (void)folded(text);
    ADD_FAILURE() << "was accepted: " << text;
  } catch (const InputError& error) {
    const std::string what = error.what();
    const std::string head = "e:" + place + ": error: ";
    EXPECT_EQ(what.substr(0, head.size()), head) << what;
    EXPECT_NE(what.find(message), std::string::npos) << what;
  }
}

TEST(FoldConstants, Values) {
  EXPECT_EQ(folded("1 + 2*3 - 4").value, mpq_class(3));
  EXPECT_EQ(folded("-1/2").value, mpq_class(-1, 2));
  EXPECT_EQ(folded("2/4 + 1/2").value, mpq_class(1));
  EXPECT_EQ(folded("(2/3)^-2").value, mpq_class(9, 4));
  EXPECT_EQ(folded("(-1)^3").value, mpq_class(-1));
  EXPECT_EQ(folded("(-1)^-2").value, mpq_class(1));
  EXPECT_EQ(folded("0^0").value, mpq_class(1));
  EXPECT_EQ(folded("0^3").value, mpq_class(0));
  EXPECT_EQ(folded("2^(1 + 1)").value, mpq_class(4));
  EXPECT_FALSE(folded("n").value.has_value());
  EXPECT_FALSE(folded("n - n").value.has_value());
  EXPECT_FALSE(folded("9^999").value.has_value());
  EXPECT_FALSE(folded("factorial(3)").value.has_value());
}

TEST(FoldConstants, DivisionByZero) {
  expect_refused("n/0", "1:3", "division by zero");
  expect_refused("1 + x/(1 - 1)", "1:8", "division by zero");
  expect_refused("n/(2^3 - 8)", "1:4", "division by zero");
  expect_refused("0^-1", "1:1", "division by zero");
  expect_refused("n*(1 - 1)^-2", "1:3", "division by zero");
  expect_refused("factorial(n/0)", "1:13", "division by zero");
  EXPECT_NO_THROW((void)folded("0/n"));
}

TEST(FoldConstants, SizesAreEstimatedNotComputed) {
  expect_refused("(9^999)^99", "1:1", "this power is too large");
  expect_refused("1 + ((((n + 1)^99)^99)^99)", "1:6", "this power is too large");
  expect_refused(std::string(1000, '9') + "^(999*n)", "1:1", "this power is too large");
  std::string product = "n";
  for (int i = 0; i < 40; ++i) product += "*9^999";
  expect_refused(product, "1:1", "this expression is too large");
  EXPECT_NO_THROW((void)folded("9^999*(n + k + x)^99"));
  EXPECT_NO_THROW((void)folded("2^(999*n)"));
}

TEST(Magnitude, SumsAbsoluteValues) {
  EXPECT_EQ(magnitude(AffineView{{{"k", -2}, {"n", 3}}, -4}), 9);
}

}  // namespace
}  // namespace sumwright::claim
