#include "claim/expression_parser.hpp"

#include <gtest/gtest.h>

#include <string>
#include <string_view>
#include <vector>

namespace sumwright::claim {
namespace {

const std::vector<std::string> kNames = {"a", "b", "k", "n", "x"};

ExpressionPtr parsed(const std::string& text, const Limits& limits = {}) {
  return parse_expression({"e", text}, {0, text.size()}, kNames, limits);
}

// The tree with every node in brackets.
std::string shape(const Expression& e) {
  const auto child = [&e](std::size_t i) { return shape(*e.children[i]); };
  switch (e.operation) {
    case Operation::literal:
      return e.value.get_str();
    case Operation::symbol:
      return e.name;
    case Operation::negate:
      return "(- " + child(0) + ")";
    case Operation::call: {
      std::string out = "(" + e.name;
      for (std::size_t i = 0; i < e.children.size(); ++i) out += " " + child(i);
      return out + ")";
    }
    default:
      break;
  }
  const std::string_view signs =
      "??"
      "?+-*/^";
  const auto at = static_cast<std::size_t>(e.operation);
  return "(" + child(0) + " " + std::string(1, signs[at]) + " " + child(1) + ")";
}

void expect_shape(const std::string& text, const std::string& expected) {
  EXPECT_EQ(shape(*parsed(text)), expected) << text;
}

void expect_refused(const std::string& text, const std::string& place, const std::string& message) {
  SCOPED_TRACE(text.substr(0, 100));
  try {
    (void)parsed(text);
    ADD_FAILURE() << "was accepted";
  } catch (const InputError& error) {
    const std::string what = error.what();
    const std::string head = "e:" + place + ": error: ";
    EXPECT_EQ(what.substr(0, head.size()), head) << what;
    EXPECT_NE(what.find(message), std::string::npos) << what;
  }
}

TEST(ParseExpression, SumsAndProductsLeanLeft) {
  expect_shape("a + b - k", "((a + b) - k)");
  expect_shape("a*b/k*n", "(((a * b) / k) * n)");
  expect_shape("a + b*k", "(a + (b * k))");
  expect_shape("(a + b)*k", "((a + b) * k)");
}

TEST(ParseExpression, PowersLeanRightAndBindTightest) {
  expect_shape("a^b^2", "(a ^ (b ^ 2))");
  expect_shape("2*k^2", "(2 * (k ^ 2))");
  expect_shape("(a^b)^2", "((a ^ b) ^ 2)");
}

TEST(ParseExpression, SignsBindBetweenPowersAndProducts) {
  expect_shape("-1^k", "(- (1 ^ k))");
  expect_shape("(-1)^k", "((- 1) ^ k)");
  expect_shape("-a*b", "((- a) * b)");
  expect_shape("a*-b", "(a * (- b))");
  expect_shape("2^-k", "(2 ^ (- k))");
  expect_shape("2^-k*n", "((2 ^ (- k)) * n)");
  expect_shape("2^-k^2", "(2 ^ (- (k ^ 2)))");
  expect_shape("a - -b", "(a - (- b))");
  expect_shape("--a", "(- (- a))");
  expect_shape("-2", "(- 2)");
}

TEST(ParseExpression, ALeadingPlusMakesNoNode) {
  expect_shape("+a", "a");
  expect_shape("+-+a", "(- a)");
  expect_shape("2^+k", "(2 ^ k)");
  expect_shape(std::string(100000, '+') + "a", "a");
}

TEST(ParseExpression, CallsBlanksAndLineBreaks) {
  expect_shape("binomial(n,\r\n\t k)", "(binomial n k)");
  expect_shape("min(a, b, k)", "(min a b k)");
  expect_shape(" factorial ( n ) ", "(factorial n)");
}

TEST(ParseExpression, PlacesOfNodes) {
  const ExpressionPtr e = parsed(" (a + b) * -binomial(n, k)");
  EXPECT_EQ(e->place.offset, 1U);
  EXPECT_EQ(e->place.length, 25U);
  EXPECT_EQ(e->sign.offset, 9U);
  EXPECT_EQ(e->children[0]->place.offset, 2U);  // without the brackets
  EXPECT_EQ(e->children[0]->place.length, 5U);
  EXPECT_EQ(e->children[1]->place.offset, 11U);
  EXPECT_EQ(e->children[1]->sign.length, 1U);
  EXPECT_EQ(e->children[1]->children[0]->sign.offset, 12U);
  EXPECT_EQ(e->children[1]->children[0]->sign.length, 8U);
}

TEST(ParseExpression, StandsAnywhereInTheSource) {
  const Source source{"e", "head\n  k + q\ntail"};
  const ExpressionPtr e = parse_expression(source, {7, 1}, {"k"});
  EXPECT_EQ(e->place.offset, 7U);
  EXPECT_THROW((void)parse_expression(source, {7, 5}, {"k"}), InputError);
}

TEST(ParseExpression, SymbolsNeedNotBeSorted) {
  const Source source{"e", "z + a"};
  EXPECT_EQ(shape(*parse_expression(source, {0, 5}, {"z", "k", "a"})), "(z + a)");
}

TEST(ParseExpression, RefusesWhatIsNoExpression) {
  expect_refused("", "1:1", "the text is empty");
  expect_refused("  ", "1:3", "the text is empty");
  expect_refused("a +", "1:4", "ends where an operand is expected");
  expect_refused("a + *b", "1:5", "an operand is expected, not '*'");
  expect_refused("a**2", "1:3", "a power is written a^b");
  expect_refused("a/*b", "1:3", "an operand is expected");
  expect_refused("()", "1:2", "before this bracket");
  expect_refused("(a", "1:3", "a closing bracket is missing");
  expect_refused("(a", "1:3", "opened at 1:1");
  expect_refused("a)", "1:2", "no bracket is open here");
  expect_refused("a, b", "1:2", "a comma stands only between");
  expect_refused("(a, b)", "1:3", "a comma stands only between");
  expect_refused("a < b", "1:3", "only in 'assume'");
  expect_refused("a^", "1:3", "ends where an operand is expected");
  expect_refused("^a", "1:1", "an operand is expected");
}

TEST(ParseExpression, RefusesImplicitProducts) {
  expect_refused("2n", "1:2", "no implicit products");
  expect_refused("a b", "1:3", "no implicit products");
  expect_refused("(a)(b)", "1:4", "no implicit products");
  expect_refused("2(n)", "1:2", "no implicit products");
  expect_refused("n(k)", "1:1", "write n*(...)");
}

TEST(ParseExpression, RefusesForeignCharacters) {
  expect_refused("1.5", "1:2", "no decimals");
  expect_refused("n!", "1:2", "factorial(n)");
  expect_refused("a = b", "1:3", "no equality sign");
  expect_refused("[a]", "1:1", "round brackets");
  expect_refused("{a}", "1:1", "round brackets");
  expect_refused("_a", "1:1", "starts with a letter");
  expect_refused("a \xE2\x88\x92 b", "1:3", "the ASCII sign -");
  expect_refused(
      "a\xC2\xB7"
      "b",
      "1:2", "write *");
  expect_refused(
      "a\xC3\x97"
      "b",
      "1:2", "write *");
  expect_refused("a \xE2\x89\xA4 b", "1:3", "write <=");
  expect_refused("\xCE\xB1 + 1", "1:1", "unexpected character");
  expect_refused("a\x1b", "1:2", "'\\x1b'");
  expect_refused(std::string("a\0b", 3), "1:2", "'\\x00'");
  expect_refused("a;b", "1:2", "unexpected character ';'");
}

TEST(ParseExpression, RefusesUndeclaredNames) {
  expect_refused("k + q", "1:5", "'q' is not declared");
  expect_refused("facotrial(n)", "1:1", "did you mean 'factorial'?");
  expect_refused("choose(n, k)", "1:1", "did you mean 'binomial'?");
  expect_refused("C(n, k)", "1:1", "did you mean 'binomial'?");
  expect_refused("Binomial(n, k)", "1:1", "did you mean 'binomial'?");
  expect_refused("pochhammer(n, k)", "1:1", "did you mean 'rising'?");
  expect_refused("sqrt(n)", "1:1", "'floor', 'min' and 'max'");
  expect_refused("binomail", "1:1", "did you mean 'binomial'?");
  expect_refused("inf", "1:1", "only as a whole bound");
  expect_refused("n + inf", "1:5", "only as a whole bound");
  expect_refused("N", "1:1", "did you mean 'n'?");
  expect_refused("Q", "1:1", "every symbol is an index");
}

TEST(ParseExpression, SuggestsDeclaredNames) {
  const Source source{"e", "lenght"};
  try {
    (void)parse_expression(source, {0, 6}, {"length", "k"});
    FAIL();
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find("did you mean 'length'?"), std::string::npos);
  }
}

TEST(ParseExpression, SaysWhyADeclaredNameMayNotStandHere) {
  Symbols symbols;
  symbols.allowed = {"n"};
  symbols.elsewhere = {{"k", "because"}};
  const Source source{"e", "n + k"};
  try {
    (void)parse_mapped(source, plain_text(source, {0, 5}), symbols, {});
    FAIL();
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find("e:1:5: error: 'k' may not stand here: because"),
              std::string::npos);
  }
}

TEST(ParseExpression, EachFunctionWithEachNumberOfArguments) {
  ASSERT_FALSE(functions().empty());
  for (const Function& function : functions()) {
    for (std::size_t count = 0; count <= 4; ++count) {
      std::string text = function.name + "(";
      for (std::size_t i = 0; i < count; ++i) text += i == 0 ? "n" : ", n";
      text += ")";
      if (count >= function.least_arguments && count <= function.most_arguments) {
        EXPECT_EQ(parsed(text)->children.size(), count);
      } else {
        expect_refused(text, "1:1", "write " + function.usage);
      }
    }
    expect_refused(function.name, "1:1", "needs its arguments in brackets");
    expect_refused(function.name + "(n", "1:" + std::to_string(function.name.size() + 3),
                   "a closing bracket is missing");
    expect_refused(function.name + "(n,)", "1:" + std::to_string(function.name.size() + 4),
                   "before this bracket");
  }
  EXPECT_EQ(find_function("sqrt"), nullptr);
}

TEST(ParseExpression, DepthIsLimited) {
  const auto deep = [](std::size_t levels) {
    return std::string(levels, '(') + "n" + std::string(levels, ')');
  };
  EXPECT_NO_THROW((void)parsed(deep(199)));
  expect_refused(deep(200), "1:201", "nested too deeply");
  expect_refused(deep(100000), "1:201", "nested too deeply");
  expect_refused(std::string(100000, '-') + "n", "1:200", "too many signs");
  std::string tower = "2";
  for (int i = 0; i < 100000; ++i) tower += "^2";
  expect_refused(tower, "1:400", "nested too deeply");
  std::string calls;
  for (int i = 0; i < 50000; ++i) calls += "factorial(";
  expect_refused(calls, "1:2001", "nested too deeply");
  Limits small;
  small.nesting = 3;
  EXPECT_NO_THROW((void)parsed("((n))", small));
  EXPECT_THROW((void)parsed("(((n)))", small), InputError);
}

TEST(ParseExpression, SizeIsLimited) {
  std::string sum = "1";
  for (int i = 0; i < 3999; ++i) sum += "+1";
  EXPECT_NO_THROW((void)parsed(sum));
  expect_refused(sum + "+1", "1:8000", "one inside the other");
  std::string balanced = "1";
  for (int i = 0; i < 2499; ++i) balanced += "+1";
  std::string product = "(" + balanced + ")";
  for (int i = 0; i < 3; ++i) product += "*(" + balanced + ")";
  EXPECT_NO_THROW((void)parsed(product));
  expect_refused(product + "*(" + balanced + ")", "1:20012", "too long; at most 20000");
  expect_refused(std::string(1001, '7'), "1:1", "an integer of 1001 digits");
  EXPECT_NO_THROW((void)parsed(std::string(1000, '7')));
}

TEST(ParseExpression, RemarksOnSignsBeforePowersOfNumbers) {
  const auto remarks = [](const std::string& text) {
    const Source source{"e", text};
    Symbols symbols;
    symbols.allowed = kNames;
    std::vector<Remark> out;
    (void)parse_mapped(source, plain_text(source, {0, text.size()}), symbols, {}, &out);
    return out;
  };
  ASSERT_EQ(remarks("a*-1^k").size(), 1U);
  EXPECT_EQ(remarks("a*-1^k")[0].message, "-1^k is -(1^k); for a power of -1 write (-1)^...");
  EXPECT_EQ(remarks("a*-1^k")[0].place.offset, 2U);
  EXPECT_EQ(remarks("a*-1^k")[0].place.length, 4U);
  EXPECT_EQ(remarks("-2^n + -3^k").size(), 2U);
  for (const char* text : {"(-1)^k", "-(1^k)", "a - 1^k", "-x^2", "2^-k", "-(1)^k"}) {
    EXPECT_TRUE(remarks(text).empty()) << text;
  }
}

TEST(ParseComparison, ReadsEachSign) {
  const auto compare = [](const std::string& text) {
    const Source source{"e", text};
    Symbols symbols;
    symbols.allowed = kNames;
    return parse_comparison(source, plain_text(source, {0, text.size()}), symbols, {});
  };
  EXPECT_EQ(compare("a <= b").comparison, Comparison::less_equal);
  EXPECT_EQ(compare("a<b").comparison, Comparison::less);
  EXPECT_EQ(compare("a >= b").comparison, Comparison::greater_equal);
  EXPECT_EQ(compare("a>b").comparison, Comparison::greater);
  const ParsedComparison parsed = compare("a + 1 != -b");
  EXPECT_EQ(parsed.comparison, Comparison::not_equal);
  EXPECT_EQ(shape(*parsed.left), "(a + 1)");
  EXPECT_EQ(shape(*parsed.right), "(- b)");
  EXPECT_EQ(parsed.sign.offset, 6U);
  for (const char* bad : {"", "a", "a <", "< a", "a = b", "a == b", "a < b < k", "a ! b", "a =< b",
                          "a < b)", "a, b"}) {
    EXPECT_THROW((void)compare(bad), InputError) << bad;
  }
}

}  // namespace
}  // namespace sumwright::claim
