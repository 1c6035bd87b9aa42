// Hostile claim files: each is refused, for the stated reason, in well under a second.
#include <gtest/gtest.h>

#include <ctime>
#include <string>

#include "claim/reader.hpp"
#include "claim_testing.hpp"

namespace sumwright::claim {
namespace {

using test::full_claim;
using test::refusal;
using test::replaced;

std::string repeated(const std::string& text, std::size_t times) {
  std::string out;
  out.reserve(text.size() * times);
  for (std::size_t i = 0; i < times; ++i) out += text;
  return out;
}

std::string with_summand(const std::string& summand) {
  return replaced(full_claim(), "binomial(n, k)^2", summand);
}

// Sanitizers slow everything down.
#if defined(__SANITIZE_ADDRESS__)
constexpr double kSlower = 20;
#else
constexpr double kSlower = 1;
#endif

// Processor time, as other work on the machine is not the reader's fault.
double seconds_since(std::clock_t start) {
  return static_cast<double>(std::clock() - start) / static_cast<double>(CLOCKS_PER_SEC);
}

void expect_refused_quickly(const std::string& text, const std::string& message) {
  const std::clock_t start = std::clock();
  const auto what = refusal(text);
  EXPECT_LT(seconds_since(start), 1.0 * kSlower) << message;
  ASSERT_TRUE(what) << "was read; expected: " << message;
  EXPECT_NE(what->find(message), std::string::npos) << *what;
  EXPECT_LT(what->size(), 1000U);
}

void expect_read_quickly(const std::string& text) {
  const std::clock_t start = std::clock();
  const auto what = refusal(text);
  EXPECT_LT(seconds_since(start), 3.0 * kSlower);
  EXPECT_FALSE(what) << *what;
}

TEST(ReaderLimits, ExpressionsThatExplode) {
  expect_refused_quickly(with_summand("9^9^9^9"), "an exponent beyond 1000");
  expect_refused_quickly(with_summand("((9^999)^999)^999"), "too large");
  expect_refused_quickly(with_summand(repeated("(", 100000) + "1" + repeated(")", 100000)),
                         "nested too deeply");
  expect_refused_quickly(with_summand("1" + repeated(" + 1", 199999)), "one inside the other");
  expect_refused_quickly(with_summand("k" + repeated("*k", 199999)), "one inside the other");
  expect_refused_quickly(with_summand(repeated("-", 500000) + "1"), "too many signs");
  expect_refused_quickly(with_summand("2" + repeated("^2", 300000)), "nested too deeply");
  expect_refused_quickly(with_summand(repeated("factorial(", 80000)), "nested too deeply");
  expect_refused_quickly(with_summand(repeated("7", 900000)), "an integer of 900000 digits");
  expect_refused_quickly(with_summand(repeated("x", 900000)), "is not declared");
  expect_refused_quickly(with_summand("binomial(" + repeated("n, ", 9000) + "k)"),
                         "takes 2 arguments, not 9001");
  expect_refused_quickly(with_summand("factorial(10000000*n)"), "beyond 1000000");
}

TEST(ReaderLimits, ExpressionsThatAreLargeButBalanced) {
  std::string row = "(1" + repeated("+1", 99) + ")";
  std::string wide = row + repeated("*" + row, 99);
  EXPECT_FALSE(refusal(with_summand(wide)));
  expect_refused_quickly(with_summand(wide + "*" + row), "too long");
}

TEST(ReaderLimits, DocumentsThatExplode) {
  expect_refused_quickly(full_claim() + "#" + repeated("x", 10000000), "larger than 1048576 bytes");
  expect_refused_quickly("a = " + repeated("[", 1000000), "nested deeper than 16");
  expect_refused_quickly("a = " + repeated("{a=", 300000), "nested deeper than 16");
  expect_refused_quickly("a" + repeated(".a", 500000) + " = 1", "dots outside strings");
  expect_refused_quickly("[a" + repeated(".a", 500000) + "]", "dots outside strings");
  expect_refused_quickly(repeated("\n", 1000000) + "x", "not valid TOML");
  std::string entries;
  for (int i = 0; i < 60000; ++i) entries += "b" + std::to_string(i) + " = 1, ";
  expect_refused_quickly("a = { " + entries + "z = 1 }", "unknown key 'a'");
  std::string tables;
  for (int i = 0; i < 60000; ++i) tables += "[a" + std::to_string(i) + ".b]\n";
  expect_refused_quickly(tables, "unknown key 'a0'");
  expect_refused_quickly("title = \"" + repeated("\\u0041", 150000) + "\"", "'format' is missing");
  expect_refused_quickly("a = '" + repeated("\xC3\xA9", 400000) + "\xFF'", "not valid UTF-8");
}

TEST(ReaderLimits, TooManyEntries) {
  expect_refused_quickly(replaced(full_claim(), "\"n + 1\"]", repeated("\"n\", ", 1000) + "\"n\"]"),
                         "1002 entries; at most 1000");
  expect_refused_quickly(replaced(full_claim(), "\"m >= 1\",", repeated("\"m >= 1\",", 1000)),
                         "1001 entries; at most 1000");
  expect_refused_quickly(replaced(full_claim(), "[\"0\", ", "[" + repeated("\"0\", ", 1000)),
                         "1001 entries; at most 1000");
  expect_refused_quickly(replaced(full_claim(), "\"B. Author\"", repeated("\"B\", ", 1000)),
                         "1001 entries; at most 1000");
  std::string parameters;
  for (int i = 0; i < 99; ++i) parameters += "p" + std::to_string(i) + " = { in = 'integers' }\n";
  expect_refused_quickly(replaced(full_claim(), "x = { in", parameters + "x = { in"),
                         "101 entries; at most 100");
  std::string ranges;
  for (int i = 0; i < 16; ++i) {
    ranges += "{ index = 'k" + std::to_string(i) + "', low = 0, high = 1 }, ";
  }
  expect_refused_quickly(replaced(full_claim(), "[ { index", "[ " + ranges + "{ index"),
                         "17 entries; at most 16");
}

TEST(ReaderLimits, ManyEntriesOfEachKindStayQuick) {
  std::string parameters;
  for (int i = 0; i < 98; ++i) {
    parameters += "p" + std::to_string(i) + " = { in = 'rationals', not = [" +
                  repeated("'9^99/7^99', ", 700) + "] }\n";
  }
  expect_read_quickly(replaced(full_claim(), "x = { in", parameters + "x = { in"));
  const std::string sum = "'n" + repeated("+n", 490) + "', ";
  expect_read_quickly(replaced(full_claim(), "\"n + 1\"]", repeated(sum, 990) + "\"n\"]"));
  const std::string fraction = "'1/3" + repeated("+9^99/7^99", 95) + "', ";
  expect_read_quickly(replaced(full_claim(), "\"n + 1\"]", repeated(fraction, 990) + "\"n\"]"));
}

TEST(ReaderLimits, CanBeNarrowed) {
  Limits limits;
  limits.file_bytes = 10;
  EXPECT_NE(refusal(full_claim(), limits)->find("larger than 10 bytes"), std::string::npos);
  limits = {};
  limits.exponent = 1;
  EXPECT_NE(refusal(full_claim(), limits)->find("an exponent beyond 1"), std::string::npos);
  limits = {};
  limits.nodes = 4;
  EXPECT_NE(refusal(full_claim(), limits)->find("too long; at most 4"), std::string::npos);
}

}  // namespace
}  // namespace sumwright::claim
