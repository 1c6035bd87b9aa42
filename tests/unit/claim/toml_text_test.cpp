#include "claim/toml_text.hpp"

#include <gtest/gtest.h>

namespace sumwright::claim {
namespace {

TEST(StringLiteral, ReadsAllFourKinds) {
  EXPECT_EQ(string_literal("\"a\\tb\"", 0)->text, "a\tb");
  EXPECT_EQ(string_literal("'a\\tb'", 0)->text, "a\\tb");
  EXPECT_EQ(string_literal("\"\"\"\na\"\"b\"\"\"", 0)->text, "a\"\"b");
  EXPECT_EQ(string_literal("'''\r\na\r\nb'''", 0)->text, "a\nb");
  EXPECT_EQ(string_literal("\"\"", 0)->text, "");
}

TEST(StringLiteral, QuotesBeforeTheClosingOnes) {
  EXPECT_EQ(string_literal("\"\"\"a\"\"\"\"\"", 0)->text, "a\"\"");
  EXPECT_EQ(string_literal("'''a''''", 0)->text, "a'");
}

TEST(StringLiteral, Escapes) {
  EXPECT_EQ(string_literal("\"\\b\\t\\n\\f\\r\\\"\\\\\"", 0)->text, "\b\t\n\f\r\"\\");
  EXPECT_EQ(string_literal("\"\\u00e9\\U0001F600\"", 0)->text, "\xC3\xA9\xF0\x9F\x98\x80");
  EXPECT_EQ(string_literal("\"\"\"a\\  \n  \n  b\"\"\"", 0)->text, "ab");
}

TEST(StringLiteral, NothingWhereNoneIs) {
  for (const std::string_view bad : {"", "a", "\"a", "\"a\nb\"", "\"\\x\"", "\"\\u12\"", "\"\\",
                                     "\"\"\"a\"\"", "'a\n'", "\"\\u00zz\"", "\"\\\n\""}) {
    EXPECT_FALSE(string_literal(bad, 0).has_value()) << bad;
  }
  EXPECT_FALSE(string_literal("\"a\"", 99).has_value());
}

TEST(StringLiteral, PlacesOfEachByte) {
  const std::string text = "k = \"a\\u0062\\\\c\"";
  const auto literal = string_literal(text, 4);
  ASSERT_TRUE(literal);
  EXPECT_EQ(literal->text, "ab\\c");
  EXPECT_EQ(literal->place.offset, 5U);
  EXPECT_EQ(literal->place.length, 10U);
  EXPECT_EQ(literal->span(0, 1).offset, 5U);
  EXPECT_EQ(literal->span(1, 2).offset, 6U);
  EXPECT_EQ(literal->span(1, 2).length, 6U);
  EXPECT_EQ(literal->span(2, 4).offset, 12U);
  EXPECT_EQ(literal->span(2, 4).length, 3U);
  EXPECT_EQ(literal->span(4, 4).offset, 15U);
  EXPECT_EQ(literal->span(4, 4).length, 0U);
  EXPECT_EQ(literal->span(99, 120).offset, 15U);
}

TEST(PlainText, IsTheSpanItself) {
  const Source source{"f", "abcdef"};
  const MappedText text = plain_text(source, {2, 3});
  EXPECT_EQ(text.text, "cde");
  EXPECT_EQ(text.span(1, 2).offset, 3U);
  EXPECT_EQ(plain_text(source, {4, 99}).text, "ef");
  EXPECT_EQ(plain_text(source, {99, 1}).text, "");
}

void expect_refused(const std::string& text, std::string_view message) {
  try {
    check_toml_text({"f", text});
    ADD_FAILURE() << "was accepted: " << text.substr(0, 80);
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find(message), std::string::npos) << error.what();
  }
}

TEST(CheckTomlText, RefusesDepth) {
  expect_refused("a = " + std::string(17, '['), "f:1:21: error: brackets nested deeper");
  expect_refused("a = " + std::string(17, '{'), "f:1:21: error: brackets nested deeper");
  std::string dots = "a";
  for (int i = 0; i < 17; ++i) dots += ".a";
  expect_refused(dots + " = 1", "f:1:34: error: more than 16 dots");
  expect_refused("b = 1 # ''' \"\n" + dots, "f:2:34");
  expect_refused("b = '''\n'' ]]'''\n[" + dots, "f:3:35");
}

TEST(CheckTomlText, RefusesFaultsOfStrings) {
  expect_refused("a = \"b\nc", "f:1:5: error: this string is not closed on its line");
  expect_refused("a = 'b", "f:1:5: error: this string is not closed");
  expect_refused("a = '''b\n''", "f:1:5: error: this string is not closed");
  expect_refused("a = \"b\\", "f:1:5: error: this string is not closed");
  expect_refused("a = \"\\alpha\"", "f:1:6: error: unknown escape");
  expect_refused("a = \"\\alpha\"", "in '...' it stands for itself");
  expect_refused("a = \"\\\xC3\xA9\"", "f:1:6: error: unknown escape");
  expect_refused("a = \"\"\"\\\xC3\xA9\"\"\"", "f:1:8: error: unknown escape");
  expect_refused("a = \"\\u12x4\"", "f:1:6: error: \\u takes four");
  expect_refused("a = \"\\ud800\"", "f:1:6: error: this escape is no Unicode character");
  expect_refused("a = \"\\U00110000\"", "f:1:6: error: this escape is no Unicode character");
}

TEST(CheckTomlText, RefusesOtherCharactersOutsideStrings) {
  expect_refused("title = \xC3\xA9", "f:1:9: error: '\xC3\xA9' may stand only in strings");
  expect_refused(
      "\xEF\xBB\xBF"
      "a = 1\n\xC2\xA0"
      "b = 2",
      "f:2:1: error: ");
  expect_refused("a\xEF\xBB\xBF = 1", "f:1:2: error: '\\u{feff}' may stand");
  check_toml_text({"f",
                   "\xEF\xBB\xBF"
                   "a = '\xC3\xA9' # \xC3\xA9"});
}

TEST(AsciiShadow, KeepsLinesAndColumns) {
  EXPECT_EQ(ascii_shadow("\xEF\xBB\xBF"
                         "a\xC3\xA9\r\n\xF0\x9F\x98\x80z"),
            "a?\r\n?z");
  EXPECT_EQ(ascii_shadow(""), "");
}

TEST(CheckTomlText, SkipsStringsAndComments) {
  check_toml_text({"f", "a = '" + std::string(99, '[') + "'\n# " + std::string(99, '.')});
  check_toml_text({"f", "a = \"\"\"\n\\\"" + std::string(99, '[') + "\n\"\"\"\nb = [[[[]]]]"});
  check_toml_text({"f", "# comment at the end"});
  check_toml_text({"f", ""});
  std::string shallow;
  for (int i = 0; i < 100; ++i) shallow += "[a.b]\n";
  check_toml_text({"f", shallow});
}

}  // namespace
}  // namespace sumwright::claim
