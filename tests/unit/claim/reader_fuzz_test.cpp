// Random damage to good claim files: each is read or refused with a place, never worse.
#include <gtest/gtest.h>

#include <algorithm>
#include <cstdio>
#include <random>
#include <string>
#include <vector>

#include "claim/reader.hpp"
#include "claim_testing.hpp"

namespace sumwright::claim {
namespace {

const std::vector<std::string>& good_files() {
  static const std::vector<std::string> files = {
      test::full_claim(),
      "\xEF\xBB\xBF"
      "format = 1\r\ntitle = '''\r\nA \xC3\xA9'''\r\nrunning = \"n\"\r\nfrom = 2\r\n"
      "[sum]\r\nsummand = \"\"\"\r\nrising(1/2, \\\r\n  k)*(-1)^k\"\"\"\r\n"
      "over = [ { index = 'k', low = '-inf', high = 'min(n, floor((n + 1)/2))' } ]\r\n",
      "format = 1\ntitle = 'b'\nrunning = 'n'\nfrom = 0\nassume = ['m > 0', 'm != n']\n"
      "sum.summand = \"x^(n-j)*\\u0062inomial(m, j)/factorial(k)\"\n"
      "[[sum.over]]\nindex = 'j'\nlow = 0\nhigh = 'n'\n[[sum.over]]\nindex = 'k'\nlow = 'j'\n"
      "high = 'n + m'\n[equals]\nsummand = 'j'\nover = [{index = 'j', low = 0, high = 'n'}]\n"
      "[parameters.m]\nin = 'integers'\n[parameters.x]\nin = 'rationals'\nnot = ['1/2']\n"};
  return files;
}

class Damage {
 public:
  explicit Damage(std::uint64_t seed) : random_(seed) {}

  std::string damaged() {
    std::string text = good_files()[below(good_files().size())];
    for (std::size_t changes = 1 + below(4); changes > 0; --changes) change(text);
    return text;
  }

 private:
  std::size_t below(std::size_t bound) { return random_() % std::max<std::size_t>(bound, 1); }

  void change(std::string& text) {
    // Pieces that mean something to one of the readers.
    static const std::vector<std::string> pieces = {"\"",
                                                    "'",
                                                    "\"\"\"",
                                                    "'''",
                                                    "\\",
                                                    "[",
                                                    "]",
                                                    "{",
                                                    "}",
                                                    "(",
                                                    ")",
                                                    "=",
                                                    ",",
                                                    "\n",
                                                    "\r",
                                                    "\r\n",
                                                    "#",
                                                    ".",
                                                    "^",
                                                    "-",
                                                    "9",
                                                    "n",
                                                    "k",
                                                    "inf",
                                                    "\\u0000",
                                                    "\\U0010FFFF",
                                                    "\xFF",
                                                    "\xC3",
                                                    "\x1b",
                                                    "floor(",
                                                    "factorial",
                                                    "1e9",
                                                    "nan",
                                                    "2020-01-01",
                                                    "0x",
                                                    "[[",
                                                    "999999999999999999999"};
    const std::size_t at = below(text.size() + 1);
    switch (below(5)) {
      case 0:
        text.insert(at, pieces[below(pieces.size())]);
        break;
      case 1:
        text.erase(at, 1 + below(12));
        break;
      case 2:
        if (at < text.size()) text[at] = static_cast<char>(below(256));
        break;
      case 3:
        text.insert(at, text.substr(below(text.size()), below(60)));
        break;
      default:
        text.resize(at);
    }
  }

  std::mt19937_64 random_;
};

// `t.toml:<line>:<column>: error: `, printable, and with a line and a caret.
bool is_well_formed(const std::string& what) {
  const auto printable = [](char c) { return c == '\n' || static_cast<unsigned char>(c) >= 0x20; };
  return what.rfind("t.toml:", 0) == 0 && what.find(": error: ") != std::string::npos &&
         what.find("\n  ") != std::string::npos && what.find('^') != std::string::npos &&
         std::all_of(what.begin(), what.end(), printable) && what.size() < 2000;
}

TEST(ReaderFuzz, GoodFilesAreRead) {
  for (const std::string& file : good_files()) {
    const auto what = test::refusal(file);
    EXPECT_FALSE(what) << *what;
  }
}

TEST(ReaderFuzz, DamagedFilesAreReadOrRefused) {
  const std::uint64_t seed = test::test_seed(20240502);
  const std::size_t cases = test::test_effort(5000);
  Damage damage(seed);
  std::size_t refused = 0;
  for (std::size_t i = 0; i < cases; ++i) {
    const std::string text = damage.damaged();
    try {
      const auto what = test::refusal(text);
      if (!what) continue;
      ++refused;
      ASSERT_TRUE(is_well_formed(*what)) << "seed " << seed << " case " << i << "\n" << *what;
    } catch (const std::exception& error) {
      FAIL() << "seed " << seed << " case " << i << ": " << error.what() << "\n" << text;
    }
  }
  EXPECT_GT(refused, 0U);
  std::printf("%zu damaged files, %zu refused, %zu read\n", cases, refused, cases - refused);
}

// Random tokens in the place of each expression, which get past TOML.
TEST(ReaderFuzz, RandomExpressionsAreReadOrRefused) {
  const std::uint64_t seed = test::test_seed(20240503);
  const std::size_t cases = test::test_effort(8000);
  const std::vector<std::string> tokens = {"n",         "k",
                                           "m",         "x",
                                           "0",         "1",
                                           "2",         "1000",
                                           "+",         "-",
                                           "-",         "*",
                                           "/",         "^",
                                           "(",         ")",
                                           ",",         " ",
                                           "binomial(", "factorial(",
                                           "rising(",   "falling(",
                                           "floor(",    "min(",
                                           "max(",      "inf",
                                           "<",         ">=",
                                           "!=",        "k)",
                                           "n/2)",      "(n - k)",
                                           "(-1)^k",    "binomial(n, k)",
                                           "9^9",       "q",
                                           "^2",        "^-1"};
  const std::vector<std::string> places = {"binomial(n, k)^2", "\"0\", high",
                                           "m >= 1",           "n + 1\"]",
                                           "binomial(2*n, n)", "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2",
                                           "0\", \"neg"};
  const std::vector<std::string> ends = {"", "\", high", "", "\"]", "", "", "\", \"neg"};
  std::mt19937_64 random(seed);
  std::size_t refused = 0;
  for (std::size_t i = 0; i < cases; ++i) {
    std::string text;
    for (std::size_t count = 1 + random() % 9; count > 0; --count) {
      text += tokens[random() % tokens.size()];
    }
    const std::size_t place = random() % places.size();
    const std::string start = places[place][0] == '"' ? "\"" : "";
    const auto what = test::refusal(
        test::replaced(test::full_claim(), places[place], start + text + ends[place]));
    if (!what) continue;
    ++refused;
    ASSERT_TRUE(is_well_formed(*what)) << "seed " << seed << " case " << i << "\n" << *what;
  }
  EXPECT_GT(refused, 0U);
  EXPECT_LT(refused, cases);
  std::printf("%zu random expressions, %zu refused, %zu read\n", cases, refused, cases - refused);
}

}  // namespace
}  // namespace sumwright::claim
