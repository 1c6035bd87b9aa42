#include "claim/shapes.hpp"

#include <gtest/gtest.h>

#include <functional>
#include <string>
#include <vector>

namespace sumwright::claim {
namespace {

// n runs, k and j are indices, m is an integer and x a rational parameter.
Scope scope() { return {"n", {"j", "k"}, {"m"}, {"x"}}; }

using Check = std::function<void(const Shapes&, const Expression&)>;

const Check kTerm = [](const Shapes& s, const Expression& e) { s.check_term(e); };
const Check kRational = [](const Shapes& s, const Expression& e) { s.check_rational(e, "it"); };
const Check kBound = [](const Shapes& s, const Expression& e) { s.check_bound(e); };

void run(const Check& check, const std::string& text) {
  const Source source{"e", text};
  const Limits limits;
  const Scope names = scope();
  const ExpressionPtr tree =
      parse_expression(source, {0, text.size()}, {"j", "k", "m", "n", "x"}, limits);
  check(Shapes(source, limits, names), *tree);
}

void expect_read(const Check& check, const std::vector<std::string>& texts) {
  for (const std::string& text : texts) {
    EXPECT_NO_THROW(run(check, text)) << text;
  }
}

struct Row {
  std::string text;
  std::size_t column;
  std::string message;
};

void expect_refused(const Check& check, const std::vector<Row>& rows) {
  for (const Row& row : rows) {
    SCOPED_TRACE(row.text);
    try {
      run(check, row.text);
      ADD_FAILURE() << "was accepted";
    } catch (const InputError& error) {
      const std::string what = error.what();
      const std::string head = "e:1:" + std::to_string(row.column) + ": error: ";
      EXPECT_EQ(what.substr(0, head.size()), head) << what;
      EXPECT_NE(what.find(row.message), std::string::npos) << what;
    }
  }
}

TEST(CheckTerm, Accepts) {
  expect_read(
      kTerm, {"binomial(n, k)^2*(-1)^k", "x^k/factorial(k)", "rising(1/2, k)", "rising(x, 2*n - k)",
              "falling(x + n, m)", "1/(2*k + 1)", "n^3*k^-2", "binomial(x/2, k)", "2^(2*n - k)",
              "m^k", "(x + m)^(n - 2*k)", "x^(1 + 1)", "binomial(n, k) + binomial(n, k - 1)",
              "binomial(m, 2)^k", "0^n", "binomial(n, 1000000)", "x^-1000", "factorial(n)^-2"});
}

TEST(CheckTerm, RefusesArgumentsThatAreNotAffine) {
  expect_refused(kTerm,
                 {{"binomial(n, k^2)", 13, "the second argument of 'binomial' must be an integer"},
                  {"binomial(n, k/2)", 13, "the second argument of 'binomial'"},
                  {"binomial(n, x)", 13, "'x' is a rational parameter"},
                  {"factorial(n*k)", 11, "the argument of 'factorial'"},
                  {"factorial(factorial(n))", 11, "the argument of 'factorial'"},
                  {"factorial(x)", 11, "'x' is a rational parameter"},
                  {"factorial(1/2)", 11, "the argument of 'factorial'"},
                  {"rising(x, n*m)", 11, "the second argument of 'rising'"},
                  {"falling(x, 2^k)", 12, "the second argument of 'falling'"},
                  {"1 + 2*factorial(k*k)", 17, "the argument of 'factorial'"},
                  {"factorial(1000001)", 11, "beyond 1000000"},
                  {"factorial(1000001*n)", 11, "beyond 1000000"},
                  {"factorial(1000*1000*1000*n)", 11, "beyond 1000000"},
                  {"factorial(10^30)", 11, "beyond 1000000"}});
}

TEST(CheckTerm, RefusesPowersOutsideTheRule) {
  expect_refused(kTerm, {{"n^k", 1, "'n' may not stand in the base"},
                         {"(x + k)^n", 6, "'k' may not stand in the base"},
                         {"n^(1 + 1)", 1, "'n' may not stand in the base"},
                         {"factorial(k)^m", 11, "'k' may not stand in the base"},
                         {"x^(k^2)", 4, "an exponent must be a literal integer"},
                         {"x^x", 3, "an exponent must be a literal integer"},
                         {"x^(1/2)", 4, "an exponent must be a literal integer"},
                         {"2^(n*k)", 4, "an exponent must be a literal integer"},
                         {"2^2^n", 3, "an exponent must be a literal integer"},
                         {"n^1001", 3, "an exponent beyond 1000"},
                         {"n^-1001", 3, "an exponent beyond 1000"},
                         {"2^(1001*n)", 4, "an exponent beyond 1000"},
                         {"2^(n + 1001)", 4, "an exponent beyond 1000"},
                         {"9^9^9^9", 3, "an exponent beyond 1000"},
                         {"9^9^9", 3, "an exponent beyond 1000"}});
}

TEST(CheckTerm, RefusesFunctionsOfBoundsAndZeroDivisors) {
  expect_refused(kTerm, {{"floor(n/2)", 1, "'floor' may stand only in bounds"},
                         {"1 + min(n, k)", 5, "'min' may stand only in bounds"},
                         {"max(n, k)", 1, "'max' may stand only in bounds"},
                         {"binomial(n, floor(k/2))", 13, "the second argument"},
                         {"1/0", 3, "division by zero"},
                         {"k/(2 - 2)", 4, "division by zero"},
                         {"0^-1", 1, "division by zero"},
                         {"((x^99)^99)^99", 1, "too large"}});
}

TEST(CheckRational, Accepts) {
  expect_read(kRational, {"0", "n/(k + x)", "-2*(2*n + 1)", "(n + 1 - k)^-2", "x^3 - 1/2",
                          "2^(1 + 1)*n", "(n + x)^1000"});
}

TEST(CheckRational, Refuses) {
  expect_refused(kRational, {{"factorial(n)", 1, "it must be a rational function; 'factorial'"},
                             {"n + binomial(n, 2)", 5, "'binomial' may not stand in it"},
                             {"floor(n/2)", 1, "'floor' may not stand in it"},
                             {"2^n", 3, "its exponents are integers"},
                             {"x^m", 3, "its exponents are integers"},
                             {"n^k", 1, "'n' may not stand in the base"},
                             {"n^1001", 3, "an exponent beyond 1000"},
                             {"n/(3 - 3)", 4, "division by zero"}});
}

TEST(CheckBound, Accepts) {
  expect_read(kBound, {"0", "n", "-m", "2*n - 3*j + 1", "floor(n/2)", "floor((2*n - 1)/3) + 1",
                       "min(n, m)", "max(0, n - m, 2)", "2*floor(n/2)", "-min(n, floor(m/3))",
                       "floor(max(n, m)/2)", "n*2^3", "1000000", "floor(floor(n/2)/2)"});
}

TEST(CheckBound, Refuses) {
  expect_refused(kBound, {{"x", 1, "'x' is a rational parameter; bounds are integers"},
                          {"n/2", 2, "/ may stand only directly inside 'floor'"},
                          {"4/2", 2, "/ may stand only directly inside 'floor'"},
                          {"n*m", 1, "one factor of a product must be an integer"},
                          {"n^2", 1, "powers may not stand in it"},
                          {"2^n", 1, "powers may not stand in it"},
                          {"binomial(n, 2)", 1, "'binomial' may not stand in a bound"},
                          {"min(n, factorial(m))", 8, "'factorial' may not stand in a bound"},
                          {"floor(n)", 7, "a quotient by a positive literal"},
                          {"floor(n/0)", 7, "a quotient by a positive literal"},
                          {"floor(n/-2)", 7, "a quotient by a positive literal"},
                          {"floor(n/m)", 7, "a quotient by a positive literal"},
                          {"floor(n/2 + 1/2)", 7, "a quotient by a positive literal"},
                          {"floor((n/2)/2)", 9, "/ may stand only directly inside 'floor'"},
                          {"floor(x/2)", 7, "'x' is a rational parameter"},
                          {"floor(n/1000001)", 9, "beyond 1000000"},
                          {"min(n, m)*min(n, m)", 1, "one factor of a product"},
                          {"1000001", 1, "beyond 1000000"},
                          {"1000*1000*1000*n", 1, "beyond 1000000"},
                          {"2*1000*1000*floor(n/2)", 1, "beyond 1000000"},
                          {"10^30", 1, "powers may not stand in it"}});
}

bool compare(const std::string& text) {
  const Source source{"e", text};
  const Limits limits;
  const Scope names = scope();
  Symbols symbols;
  symbols.allowed = {"j", "k", "m", "n", "x"};
  const auto parsed =
      parse_comparison(source, plain_text(source, {0, text.size()}), symbols, limits);
  return Shapes(source, limits, names).check_comparison(parsed);
}

TEST(CheckComparison, SaysWhetherItIsBetweenIntegers) {
  for (const char* text : {"m >= 0", "n < 2*m - 1", "m != 2", "n*m != 0", "-m <= 1"}) {
    EXPECT_TRUE(compare(text)) << text;
  }
  for (const char* text : {"x != 0", "x != m/2", "m^2 != 2", "x + n != 1/2", "1/m != x"}) {
    EXPECT_FALSE(compare(text)) << text;
  }
}

TEST(CheckComparison, Refuses) {
  const auto refused = [](const std::string& text, const std::string& start,
                          const std::string& message) {
    try {
      (void)compare(text);
      ADD_FAILURE() << "was accepted: " << text;
    } catch (const InputError& error) {
      const std::string what = error.what();
      EXPECT_EQ(what.substr(0, start.size()), start) << what;
      EXPECT_NE(what.find(message), std::string::npos) << what;
    }
  };
  refused("x >= 0", "e:1:1: ", "'x' is a rational parameter; only !=");
  refused("m >= 1/2", "e:1:7: ", "/ may not stand in a condition");
  refused("m^2 >= 1", "e:1:2: ", "^ may not stand in a condition");
  refused("m*n >= 1", "e:1:1: ", "each side of the condition must be an integer-affine");
  refused("m >= factorial(n)", "e:1:6: ", "'factorial' may not stand in a condition");
  refused("m >= min(n, 2)", "e:1:6: ", "'min' may not stand in a condition");
  refused("m >= 1000001", "e:1:6: ", "beyond 1000000");
  refused("x != factorial(2)", "e:1:6: ", "must be a rational function");
  refused("x != 1/0", "e:1:8: ", "division by zero");
  refused("x != 2^m", "e:1:8: ", "its exponents are integers");
}

TEST(ShapesConstant, GivesTheValue) {
  const std::string text = "-1/2 + 2";
  const Source source{"e", text};
  const Limits limits;
  const Scope none;
  const Shapes shapes(source, limits, none);
  EXPECT_EQ(shapes.constant(*parse_expression(source, {0, text.size()}, {}), "it"),
            mpq_class(3, 2));
  const Source large{"e", "9^999"};
  EXPECT_THROW(
      (void)Shapes(large, limits, none).constant(*parse_expression(large, {0, 5}, {}), "it"),
      InputError);
}

TEST(ShapesConstant, ZeroConstants) {
  const Limits limits;
  const Scope names = scope();
  const auto zero = [&](const std::string& text) {
    const Source source{"e", text};
    return Shapes(source, limits, names)
        .is_zero_constant(*parse_expression(source, {0, text.size()}, {"n"}));
  };
  EXPECT_TRUE(zero("0"));
  EXPECT_TRUE(zero("2 - 4/2"));
  EXPECT_FALSE(zero("1"));
  EXPECT_FALSE(zero("n - n"));
}

}  // namespace
}  // namespace sumwright::claim
