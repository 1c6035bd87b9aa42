#include "claim/source.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <sstream>

namespace sumwright::claim {
namespace {

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> out;
  std::istringstream stream(text);
  for (std::string line; std::getline(stream, line);) out.push_back(line);
  return out;
}

void expect_position(const Source& source, std::size_t offset, std::size_t line,
                     std::size_t column) {
  const Source::Position position = source.position(offset);
  EXPECT_EQ(position.line, line) << "offset " << offset;
  EXPECT_EQ(position.column, column) << "offset " << offset;
}

TEST(SourcePosition, CountsLinesAndCharacters) {
  const Source source{"f", "ab\n\xC3\xA9x\n"};
  expect_position(source, 0, 1, 1);
  expect_position(source, 2, 1, 3);
  expect_position(source, 3, 2, 1);
  expect_position(source, 5, 2, 2);
  expect_position(source, 7, 3, 1);
  expect_position(source, 1000, 3, 1);
}

TEST(SourcePosition, SkipsTheByteOrderMark) {
  const Source source{"f",
                      "\xEF\xBB\xBF"
                      "ab\r\nc"};
  expect_position(source, 0, 1, 1);
  expect_position(source, 3, 1, 1);
  expect_position(source, 4, 1, 2);
  expect_position(source, 7, 2, 1);
}

TEST(SourcePosition, EmptyText) { expect_position({"f", ""}, 5, 1, 1); }

TEST(SourceLine, HasNoLineBreakAndNoByteOrderMark) {
  const Source source{"f",
                      "\xEF\xBB\xBF"
                      "ab\r\nc\n\n"};
  EXPECT_EQ(source.line(0), "ab");
  EXPECT_EQ(source.line(5), "ab");
  EXPECT_EQ(source.line(7), "c");
  EXPECT_EQ(source.line(9), "");
  EXPECT_EQ(source.line(99), "");
}

TEST(Render, ShowsPlaceLineCaretAndNotes) {
  const Source source{"f.toml", "x\nsummand = \"a b\"\n"};
  EXPECT_EQ(render(source, {13, 3}, "error", "no", "first\nsecond"),
            "f.toml:2:12: error: no\n"
            "  summand = \"a b\"\n"
            "             ^~~\n"
            "note: first\n"
            "note: second");
}

TEST(Render, PlaceAtTheEndOfTheText) {
  EXPECT_EQ(render({"f", "ab"}, {2, 0}, "warning", "m"), "f:1:3: warning: m\n  ab\n    ^");
  EXPECT_EQ(render({"f", ""}, {7, 9}, "error", "m"), "f:1:1: error: m\n  \n  ^");
}

TEST(Render, MarksOnlyTheFirstLineOfAPlace) {
  EXPECT_EQ(render({"f", "ab\ncd"}, {1, 4}, "error", "m"), "f:1:2: error: m\n  ab\n   ^");
}

TEST(Render, CountsCharactersNotBytes) {
  EXPECT_EQ(render({"f", "\xC3\xA9\xC3\xA9x"}, {4, 1}, "error", "m"),
            "f:1:3: error: m\n  \xC3\xA9\xC3\xA9x\n    ^");
}

TEST(Render, WindowsLongLines) {
  for (const std::size_t at : {0U, 40U, 100U, 5000U, 9999U}) {
    std::string text(10000, 'a');
    text[at] = '?';
    const auto lines = lines_of(render({"f", text}, {at, 300}, "error", "m"));
    ASSERT_EQ(lines.size(), 3U);
    EXPECT_LE(lines[1].size(), 80U);
    EXPECT_LE(lines[2].size(), 80U);
    const std::size_t caret = lines[2].find('^');
    ASSERT_LT(caret, lines[1].size());
    EXPECT_EQ(lines[1][caret], '?') << "the caret does not stand under the place " << at;
  }
}

TEST(Render, WindowKeepsTheCaretRightBesideEscapes) {
  std::string text;
  for (int i = 0; i < 200; ++i) text += "\x1b\xC3\xA9\xFF";
  const std::size_t at = text.size();
  text += "?" + text;
  const auto lines = lines_of(render({"f", text}, {at, 1}, "error", "m"));
  const std::size_t caret = lines[2].find('^');
  std::size_t column = 0;
  for (const char c : lines[1]) {
    if ((static_cast<unsigned char>(c) & 0xC0U) == 0x80U) continue;
    if (column == caret) {
      EXPECT_EQ(c, '?');
    }
    ++column;
  }
  EXPECT_LE(column, 80U);
}

TEST(Render, NeverPrintsControlCharacters) {
  const Source source{"f\x1b[0m", "a\x1b]0;title\x07 \xE2\x80\xAE \xFF\tb"};
  const std::string text = render(source, {14, 1}, "error", "m\x1b[2J", "n\x08");
  EXPECT_TRUE(std::all_of(text.begin(), text.end(), [](char c) {
    return c == '\n' || static_cast<unsigned char>(c) >= 0x20;
  })) << text;
  EXPECT_EQ(text.find("\xE2\x80\xAE"), std::string::npos);
  EXPECT_EQ(text.find('\xFF'), std::string::npos);
  EXPECT_NE(text.find("\\x1b]0;title\\x07"), std::string::npos);
}

TEST(InputErrorTest, WhatIsTheRenderedMessage) {
  const Source source{"f", "ab"};
  EXPECT_EQ(std::string(InputError(source, {0, 2}, "m", "n").what()),
            "f:1:1: error: m\n  ab\n  ^~\nnote: n");
  const InputError placed(Source{"g", "ab\ncd"}, {4, 1}, "m", "n");
  EXPECT_EQ(placed.parts().file, "g");
  EXPECT_EQ(placed.parts().position.line, 2U);
  EXPECT_EQ(placed.parts().position.column, 2U);
  EXPECT_EQ(placed.parts().message, "m");
  EXPECT_EQ(placed.parts().note, "n");
  const InputError whole("f\n", "not readable");
  EXPECT_EQ(std::string(whole.what()), "f\\x0a: error: not readable");
  EXPECT_EQ(whole.parts().file, "f\n");
  EXPECT_EQ(whole.parts().position.line, 0U);
  EXPECT_EQ(whole.parts().message, "not readable");
}

}  // namespace
}  // namespace sumwright::claim
