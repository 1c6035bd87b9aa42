#include "claim/expression.hpp"

#include <gtest/gtest.h>

#include <cctype>
#include <cstdio>
#include <memory>
#include <random>
#include <string>
#include <utility>
#include <vector>

#include "claim/reader.hpp"
#include "claim_testing.hpp"

namespace sumwright::claim {
namespace {

const std::vector<std::string> kNames = {"a", "k", "n", "x"};

ExpressionPtr parsed(const std::string& text) {
  return parse_expression({"e", text}, {0, text.size()}, kNames);
}

bool same(const Expression& a, const Expression& b) {
  if (a.operation != b.operation || a.value != b.value || a.name != b.name ||
      a.children.size() != b.children.size()) {
    return false;
  }
  for (std::size_t i = 0; i < a.children.size(); ++i) {
    if (!same(*a.children[i], *b.children[i])) return false;
  }
  return true;
}

ExpressionPtr node(Operation operation, std::vector<ExpressionPtr> children,
                   std::string name = {}) {
  Expression out;
  out.operation = operation;
  out.children = std::move(children);
  out.name = std::move(name);
  return std::make_shared<const Expression>(std::move(out));
}

ExpressionPtr literal(long value) {
  Expression out;
  out.value = value;
  return std::make_shared<const Expression>(std::move(out));
}

class RandomTrees {
 public:
  explicit RandomTrees(std::uint64_t seed) : random_(seed) {}

  ExpressionPtr tree(int depth) {
    if (depth == 0 || below(6) == 0) {
      return below(2) == 0 ? literal(static_cast<long>(below(1000)))
                           : node(Operation::symbol, {}, kNames[below(kNames.size())]);
    }
    const std::vector<Operation> binary = {Operation::add, Operation::subtract, Operation::multiply,
                                           Operation::divide, Operation::power};
    switch (below(8)) {
      case 0:
      case 1:
        return node(Operation::negate, {tree(depth - 1)});
      case 2:
        return node(Operation::call, {tree(depth - 1), tree(depth - 1)}, "binomial");
      default:
        return node(binary[below(binary.size())], {tree(depth - 1), tree(depth - 1)});
    }
  }

  std::size_t below(std::size_t bound) { return random_() % bound; }

 private:
  std::mt19937_64 random_;
};

// Every text that leaves out one pair of brackets that belong together.
std::vector<std::string> with_one_pair_less(const std::string& text) {
  std::vector<std::string> out;
  std::vector<std::size_t> open;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '(') open.push_back(i);
    if (text[i] != ')') continue;
    const std::size_t begin = open.back();
    open.pop_back();
    if (begin > 0 && std::isalpha(static_cast<unsigned char>(text[begin - 1])) != 0) continue;
    std::string shorter = text;
    shorter[i] = ' ';
    shorter[begin] = ' ';
    out.push_back(shorter);
  }
  return out;
}

TEST(ToText, ReadsLikeTheLanguage) {
  for (const char* text : {"binomial(n, k)^2",
                           "-2*(2*n + 1)",
                           "n + 1",
                           "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2",
                           "2^-k",
                           "(-1)^(n - k)",
                           "-1^k",
                           "a - (k - n)",
                           "a/(k*n)",
                           "a*k/n",
                           "(a^k)^n",
                           "a^k^n",
                           "-(a + k)",
                           "--a",
                           "a*-k",
                           "a - -k",
                           "-a*k",
                           "-(a*k)",
                           "a + k*n",
                           "(a + k)*n",
                           "min(a + 1, k, -n)",
                           "a/(k/n)",
                           "2^(-k*n)",
                           "x^-a^k"}) {
    EXPECT_EQ(to_text(*parsed(text)), text);
  }
}

TEST(ToText, LeavesOutBracketsThatDoNothing) {
  EXPECT_EQ(to_text(*parsed("((a))+(k*n)")), "a + k*n");
  EXPECT_EQ(to_text(*parsed("(a + k) + n")), "a + k + n");
  EXPECT_EQ(to_text(*parsed("(-a)*k")), "-a*k");
  EXPECT_EQ(to_text(*parsed("a*(-k)")), "a*-k");
  EXPECT_EQ(to_text(*parsed("+a^(-k)")), "a^-k");
  EXPECT_EQ(to_text(*parsed("a^(k^n)")), "a^k^n");
}

TEST(ToText, LiteralsBelowZero) {
  EXPECT_EQ(to_text(*literal(-3)), "-3");
  EXPECT_EQ(to_text(*node(Operation::power, {literal(-3), literal(2)})), "(-3)^2");
  EXPECT_EQ(to_text(*node(Operation::power, {literal(2), literal(-3)})), "2^-3");
}

TEST(ToText, LongSumsNeedNoDeepRecursion) {
  std::string text = "a";
  for (int i = 0; i < 3000; ++i) text += " + k*n";
  EXPECT_EQ(to_text(*parsed(text)), text);
}

TEST(ToText, ParsesBackToTheSameTreeWithFewestBrackets) {
  const std::uint64_t seed = test::test_seed(20240501);
  RandomTrees trees(seed);
  const std::size_t cases = test::test_effort(3000);
  std::size_t brackets = 0;
  for (std::size_t i = 0; i < cases; ++i) {
    const ExpressionPtr tree = trees.tree(1 + static_cast<int>(trees.below(6)));
    const std::string text = to_text(*tree);
    ASSERT_TRUE(same(*tree, *parsed(text))) << "seed " << seed << " case " << i << ": " << text;
    EXPECT_EQ(to_text(*parsed(text)), text);
    for (const std::string& shorter : with_one_pair_less(text)) {
      ++brackets;
      bool equal = false;
      try {
        equal = same(*tree, *parsed(shorter));
      } catch (const InputError&) {
        equal = false;
      }
      ASSERT_FALSE(equal) << "seed " << seed << ": a pair too many in " << text;
    }
  }
  ASSERT_GT(cases, 0U);
  std::printf("%zu trees, %zu pairs of brackets\n", cases, brackets);
}

}  // namespace
}  // namespace sumwright::claim
