#include "claim/text.hpp"

#include <gtest/gtest.h>

namespace sumwright::claim {
namespace {

TEST(Decode, ReadsEachLength) {
  EXPECT_EQ(decode("a", 0).code, U'a');
  EXPECT_EQ(decode("\xC3\xA9", 0).code, 0xE9U);
  EXPECT_EQ(decode("\xE2\x82\xAC", 0).length, 3U);
  EXPECT_EQ(decode("\xF0\x9F\x98\x80", 0).code, 0x1F600U);
}

TEST(Decode, RefusesWhatIsNotUtf8) {
  for (const std::string_view bad :
       {"\x80", "\xC0\x80", "\xC1\xBF", "\xE0\x80\x80", "\xED\xA0\x80", "\xF0\x80\x80\x80",
        "\xF4\x90\x80\x80", "\xF5\x80\x80\x80", "\xFF", "\xE2\x82", "\xE2\x28\xA1", "\xC3"}) {
    const Character character = decode(bad, 0);
    EXPECT_FALSE(character.valid) << printable(bad);
    EXPECT_EQ(character.length, 1U);
  }
}

TEST(FirstInvalidUtf8, GivesTheOffset) {
  EXPECT_FALSE(first_invalid_utf8("").has_value());
  EXPECT_FALSE(first_invalid_utf8("a\xC3\xA9").has_value());
  EXPECT_EQ(first_invalid_utf8("a\xC3\xA9\xFFz"), 3U);
  EXPECT_EQ(first_invalid_utf8("ab\xE2\x82"), 2U);
}

TEST(Printable, EscapesWhatDrivesTerminals) {
  EXPECT_EQ(printable("a\x1b[31mb"), "a\\x1b[31mb");
  EXPECT_EQ(printable("\x7f\x01"), "\\x7f\\x01");
  EXPECT_EQ(printable("\xC2\x9B"), "\\u{9b}");
  EXPECT_EQ(printable("\xE2\x80\xAE"), "\\u{202e}");
  EXPECT_EQ(printable("\xFFz"), "\\xffz");
  EXPECT_EQ(printable("\xC3\xA9"), "\xC3\xA9");
}

TEST(InQuotes, CutsLongTexts) {
  EXPECT_EQ(in_quotes("ab"), "'ab'");
  const std::string cut = in_quotes(std::string(10000, 'x'));
  EXPECT_LT(cut.size(), 80U);
  EXPECT_NE(cut.find("..."), std::string::npos);
}

TEST(Nearest, FindsNearMissesOnly) {
  const std::vector<std::string> words = {"summand", "over", "closed", "k"};
  EXPECT_EQ(nearest("sumand", words), "summand");
  EXPECT_EQ(nearest("smumand", words), "summand");
  EXPECT_EQ(nearest("ovr", words), "over");
  EXPECT_EQ(nearest("closde", words), "closed");
  EXPECT_FALSE(nearest("zebra", words).has_value());
  EXPECT_FALSE(nearest("q", words).has_value());
  EXPECT_FALSE(nearest("", words).has_value());
  EXPECT_FALSE(nearest(std::string(100000, 's'), words).has_value());
  EXPECT_EQ(suggestion("sumand", words), "did you mean 'summand'?");
  EXPECT_EQ(suggestion("zebra", words), "");
}

TEST(Alternatives, JoinsWithOr) {
  EXPECT_EQ(alternatives({"a"}), "'a'");
  EXPECT_EQ(alternatives({"a", "b", "c"}), "'a', 'b' or 'c'");
  EXPECT_EQ(listing({"a"}), "'a'");
  EXPECT_EQ(listing({"a", "b", "c"}), "'a', 'b' and 'c'");
}

TEST(Suggested, ReadsWhatSuggestionWrites) {
  EXPECT_EQ(suggested(suggestion("sumand", {"summand"})), "summand");
  for (const char* other : {"", "write a*b", "did you mean ?", "did you mean '?", "did you mean x?",
                            "did you mean 'x'? or not"}) {
    EXPECT_FALSE(suggested(other).has_value()) << other;
  }
}

}  // namespace
}  // namespace sumwright::claim
