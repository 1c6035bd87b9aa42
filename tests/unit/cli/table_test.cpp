// Wrapping: nothing is lost, nothing is too wide.
#include "cli/table.hpp"

#include <gtest/gtest.h>

namespace sumwright::cli {
namespace {

using Lines = std::vector<std::string>;

TEST(Table, WrapsAtBlanks) {
  EXPECT_EQ(wrapped("one two three", 7), (Lines{"one two", "three"}));
  EXPECT_EQ(wrapped("one two three", 80), (Lines{"one two three"}));
  EXPECT_EQ(wrapped("", 10), (Lines{""}));
  EXPECT_EQ(wrapped("  spaced   out \n here", 80), (Lines{"spaced out here"}));
}

TEST(Table, BreaksLongWords) {
  EXPECT_EQ(wrapped("abcdefgh", 3), (Lines{"abc", "def", "gh"}));
  EXPECT_EQ(wrapped("a bcdefgh", 3), (Lines{"a", "bcd", "efg", "h"}));
}

TEST(Table, CountsCharactersNotBytes) {
  EXPECT_EQ(wrapped("\xC3\xA9\xC3\xA9\xC3\xA9 x", 5), (Lines{"\xC3\xA9\xC3\xA9\xC3\xA9 x"}));
  EXPECT_EQ(wrapped("\xC3\xA9\xC3\xA9\xC3\xA9", 2), (Lines{"\xC3\xA9\xC3\xA9", "\xC3\xA9"}));
}

TEST(Table, Columns) {
  EXPECT_EQ(table({3, 5}, {{"a", "bb cc dd"}, {"", "e"}}), "a    bb cc\n     dd\n     e\n");
  EXPECT_EQ(table({3, 5}, {}), "");
}

TEST(Table, LabelledStaysWithinTheLine) {
  const std::string text = labelled("reason", std::string(200, 'x') + " " + std::string(200, 'y'));
  std::size_t at = 0;
  std::size_t letters = 0;
  while (at < text.size()) {
    const std::size_t end = text.find('\n', at);
    ASSERT_NE(end, std::string::npos);
    EXPECT_LE(end - at, 80U);
    at = end + 1;
  }
  for (const char c : text) letters += c == 'x' || c == 'y' ? 1 : 0;
  EXPECT_EQ(letters, 400U);
}

}  // namespace
}  // namespace sumwright::cli
