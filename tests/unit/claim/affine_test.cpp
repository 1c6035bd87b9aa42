#include "claim/affine.hpp"

#include <gtest/gtest.h>

#include <string>

#include "claim/reader.hpp"

namespace sumwright::claim {
namespace {

const std::set<std::string> kIntegers = {"k", "m", "n"};

ExpressionPtr parsed(const std::string& text) {
  return parse_expression({"e", text}, {0, text.size()}, {"k", "m", "n", "x"});
}

TEST(AsAffine, ReadsAffineForms) {
  const auto form = as_affine(*parsed("2*(n - 3*k) + 7 - n*2^3 - -m"), kIntegers);
  ASSERT_TRUE(form);
  EXPECT_EQ(form->coefficients, (std::map<std::string, long>{{"k", -6}, {"m", 1}, {"n", -6}}));
  EXPECT_EQ(form->constant, 7);
  EXPECT_FALSE(form->is_constant());
}

TEST(AsAffine, DropsCoefficientsThatCancel) {
  const auto form = as_affine(*parsed("n - n + 0*k + 4"), kIntegers);
  ASSERT_TRUE(form);
  EXPECT_TRUE(form->is_constant());
  EXPECT_EQ(form->constant, 4);
}

TEST(AsAffine, PowersOfConstants) {
  EXPECT_EQ(as_affine(*parsed("2^10"), {})->constant, 1024);
  EXPECT_EQ(as_affine(*parsed("0^0"), {})->constant, 1);
  EXPECT_EQ(as_affine(*parsed("0^5"), {})->constant, 0);
  EXPECT_EQ(as_affine(*parsed("(-1)^999999999999"), {})->constant, -1);
  EXPECT_EQ(as_affine(*parsed("(-2)^3"), {})->constant, -8);
}

TEST(AsAffine, SaysWhatDoesNotFit) {
  struct Row {
    const char* text;
    std::size_t offset;
  };
  for (const Row& row :
       {Row{"n + k*n", 4}, Row{"2*x", 2}, Row{"n/2", 0}, Row{"1 + factorial(n)", 4}, Row{"n^2", 0},
        Row{"2^n", 0}, Row{"2^-1", 0}}) {
    AffineFault fault;
    const ExpressionPtr tree = parsed(row.text);
    EXPECT_FALSE(as_affine(*tree, kIntegers, &fault)) << row.text;
    ASSERT_NE(fault.where, nullptr);
    EXPECT_EQ(fault.where->place.offset, row.offset) << row.text;
    EXPECT_FALSE(fault.too_large);
  }
}

TEST(AsAffine, StopsAtOverflow) {
  for (const char* text :
       {"9223372036854775808", "9223372036854775807 + 1", "9223372036854775807*2", "2^63",
        "3^999999999999", "-9223372036854775807 - 2", "9223372036854775807*n + n",
        "4611686018427387904*(2*n)"}) {
    AffineFault fault;
    const ExpressionPtr tree = parsed(text);
    EXPECT_FALSE(as_affine(*tree, kIntegers, &fault)) << text;
    EXPECT_TRUE(fault.too_large) << text;
  }
  EXPECT_EQ(as_affine(*parsed("9223372036854775807"), {})->constant, 9223372036854775807L);
}

TEST(AsLiteral, OneSignAtMost) {
  EXPECT_EQ(as_literal(*parsed("7")), 7);
  EXPECT_EQ(as_literal(*parsed("(-7)")), -7);
  EXPECT_EQ(as_literal(*parsed("+7")), 7);
  for (const char* text : {"--7", "1 + 1", "n", "-n", "2^3"}) {
    EXPECT_FALSE(as_literal(*parsed(text)).has_value()) << text;
  }
}

}  // namespace
}  // namespace sumwright::claim
