// The meaning of the author's expressions, corner by corner.
#include "audit/evaluator.hpp"

#include <gtest/gtest.h>

#include "audit/text_reader.hpp"

namespace sumwright::audit {
namespace {

Point point(const std::vector<std::pair<std::string, numeric>>& values) {
  Point out;
  for (const auto& [name, value] : values) out.set(name, value);
  return out;
}

Value value(const std::string& text,
            const Point& at = point({{"n", 3}, {"k", 2}, {"x", numeric(1, 2)}})) {
  const claim::ExpressionPtr tree = read_expression(text, at.names);
  if (!tree) throw std::invalid_argument("not an expression: " + text);
  return evaluate(*tree, at);
}

void expect_number(const std::string& text, const numeric& expected) {
  const Value found = value(text);
  ASSERT_TRUE(found.exists()) << text << ": " << found.why;
  EXPECT_EQ(text_of(found.number), text_of(expected)) << text;
}

void expect_none(const std::string& text, Value::State state, const std::string& why) {
  const Value found = value(text);
  EXPECT_EQ(found.state, state) << text << " = " << text_of(found);
  EXPECT_NE(found.why.find(why), std::string::npos) << text << ": " << found.why;
}

TEST(AuditEvaluator, Arithmetic) {
  expect_number("1 + 2*3 - 4/8", numeric(13, 2));
  expect_number("-2^2", -4);
  expect_number("2^-3", numeric(1, 8));
  expect_number("2^3^2", 512);
  expect_number("x^k*(n - 1)", numeric(1, 2));
}

TEST(AuditEvaluator, PowersOfZero) {
  expect_number("0^0", 1);
  expect_number("(k - 2)^(n - 3)", 1);
  expect_number("0^5", 0);
  expect_none("0^-1", Value::State::division_by_zero, "division by 0");
}

TEST(AuditEvaluator, Binomials) {
  expect_number("binomial(5, 2)", 10);
  expect_number("binomial(5, -1)", 0);
  expect_number("binomial(5, 6)", 0);
  expect_number("binomial(-1, 3)", -1);
  expect_number("binomial(-3, 2)", 6);
  expect_number("binomial(x, 2)", numeric(-1, 8));
  expect_number("binomial(x, 0)", 1);
  expect_number("binomial(x, -2)", 0);
  expect_number("binomial(-1, -1)", 0);
  expect_none("1/binomial(2, 3)", Value::State::division_by_zero, "division by 0");
}

TEST(AuditEvaluator, BinomialsAcrossTheTableLimit) {
  // below and above the size at which factorials are taken from the table
  const Point at = point({{"a", 399}, {"b", 400}, {"c", 401}});
  EXPECT_TRUE(same(value("binomial(a, 7) + binomial(a, 8)", at), value("binomial(b, 8)", at)));
  EXPECT_TRUE(same(value("binomial(b, 7) + binomial(b, 8)", at), value("binomial(c, 8)", at)));
}

TEST(AuditEvaluator, Factorials) {
  expect_number("factorial(0)", 1);
  expect_number("factorial(5)", 120);
  expect_none("factorial(-1)", Value::State::outside_domain, "factorial of -1");
  expect_none("factorial(x)", Value::State::outside_domain, "factorial of 1/2");
}

TEST(AuditEvaluator, ReciprocalFactorials) {
  expect_number("1/factorial(-1)", 0);
  expect_number("6/(factorial(-1)*factorial(3))", 0);
  expect_number("factorial(-2)^-3", 0);
  expect_number("1/factorial(3)^2", numeric(1, 36));
  expect_number("1/(1/factorial(3))", 6);
  expect_none("1/(1/factorial(-3))", Value::State::outside_domain, "factorial of -3");
  expect_number("1/(-factorial(-1))", 0);
  // not a factor of the denominator: an ordinary factorial
  expect_none("1/(1 + factorial(-1))", Value::State::outside_domain, "factorial of -1");
}

TEST(AuditEvaluator, RisingAndFalling) {
  expect_number("rising(x, 3)", numeric(15, 8));
  expect_number("falling(x, 3)", numeric(3, 8));
  expect_number("rising(-2, 3)", 0);
  expect_number("rising(-2, 0)", 1);
  expect_number("falling(2, 3)", 0);
  expect_none("rising(x, -1)", Value::State::outside_domain, "rising of length -1");
  expect_none("falling(x, -1)", Value::State::outside_domain, "falling of length -1");
}

TEST(AuditEvaluator, AZeroFactorRepairsTheDomainOnly) {
  expect_number("0*factorial(-1)", 0);
  expect_number("factorial(-1)*(k - 2)", 0);
  expect_number("(n - 3)*rising(x, -1)*5", 0);
  expect_number("0/rising(x, -1)", 0);
  expect_none("factorial(-1)*1", Value::State::outside_domain, "factorial of -1");
  expect_none("0 + factorial(-1)", Value::State::outside_domain, "factorial of -1");
  expect_none("0*(1/0)", Value::State::division_by_zero, "division by 0");
  expect_none("0*(1/(k - 2))", Value::State::division_by_zero, "division by 0");
  expect_none("0*factorial(1/0)", Value::State::division_by_zero, "division by 0");
}

TEST(AuditEvaluator, FloorMinMax) {
  expect_number("floor(7/2)", 3);
  expect_number("floor(-7/2)", -4);
  expect_number("floor(-8/2)", -4);
  expect_number("min(n, k, 5)", 2);
  expect_number("max(n, k, floor(9/2))", 4);
}

TEST(AuditEvaluator, SizesAreBounded) {
  EXPECT_THROW((void)value("factorial(100000)"), TooLarge);
  EXPECT_THROW((void)value("2^1000000000"), TooLarge);
  EXPECT_THROW((void)value("binomial(10^9, 10^8)"), TooLarge);
  EXPECT_THROW((void)value("rising(x, 10^7)"), TooLarge);
  expect_number("(-1)^1000000000", 1);
  expect_number("binomial(10^9, 2)", numeric("499999999500000000"));
}

TEST(AuditEvaluator, Mentions) {
  const std::vector<std::string> names{"n", "k"};
  EXPECT_TRUE(mentions(*read_expression("binomial(n + 1, 2*k)", names), "k"));
  EXPECT_FALSE(mentions(*read_expression("binomial(n + 1, 2*n)", names), "k"));
}

claim::Range range(const std::string& index, const std::string& low, const std::string& high,
                   const std::vector<std::string>& names) {
  claim::Range out;
  out.index = index;
  for (const auto& [bound, text] : {std::pair{&out.low, low}, {&out.high, high}}) {
    if (text == "inf") bound->kind = claim::Bound::Kind::plus_infinity;
    if (text == "-inf") bound->kind = claim::Bound::Kind::minus_infinity;
    if (bound->kind == claim::Bound::Kind::finite) bound->value = read_expression(text, names);
  }
  return out;
}

Value sum(const std::string& summand, const std::vector<std::vector<std::string>>& over, long n) {
  std::vector<std::string> names{"n"};
  claim::Sum out;
  for (const auto& one : over) {
    out.over.push_back(range(one[0], one[1], one[2], names));
    names.push_back(one[0]);
  }
  out.summand = read_expression(summand, names);
  return evaluate_sum(out, point({{"n", n}}), {});
}

TEST(AuditEvaluator, Sums) {
  EXPECT_EQ(text_of(sum("binomial(n, k)^2", {{"k", "0", "n"}}, 5)), "252");
  EXPECT_EQ(text_of(sum("k", {{"k", "n", "0"}}, 3)), "0");  // empty, not reversed
  EXPECT_EQ(text_of(sum("n^2", {}, 3)), "9");
  EXPECT_EQ(text_of(sum("1", {{"r", "0", "n"}, {"s", "r", "n"}}, 3)), "10");
  EXPECT_EQ(text_of(sum("1/k", {{"k", "0", "n"}}, 3)), "no value (division by 0 at n = 3, k = 0)");
}

TEST(AuditEvaluator, InfiniteRanges) {
  EXPECT_EQ(text_of(sum("binomial(n, k)", {{"k", "-inf", "inf"}}, 5)), "32");
  EXPECT_EQ(text_of(sum("binomial(n, k)", {{"k", "1", "inf"}}, 5)), "31");
  EXPECT_EQ(text_of(sum("1/(factorial(k)*factorial(n - k))", {{"k", "-inf", "n"}}, 3)), "4/3");
  EXPECT_THROW((void)sum("1", {{"k", "0", "inf"}}, 5), TooLarge);
}

TEST(AuditEvaluator, LongSumsAreRefused) {
  EXPECT_THROW((void)sum("1", {{"k", "0", "n"}}, 1000000), TooLarge);
}

}  // namespace
}  // namespace sumwright::audit
