#include "claim/lexer.hpp"

#include <gtest/gtest.h>

#include <cctype>
#include <string>
#include <vector>

namespace sumwright::claim {
namespace {

using Kind = Token::Kind;

std::vector<Kind> kinds_of(const std::string& text) {
  const Source source{"e", text};
  const MappedText mapped = plain_text(source, {0, text.size()});
  const Limits limits;
  Lexer lexer(source, mapped, limits);
  std::vector<Kind> out;
  for (Token token = lexer.next(); token.kind != Kind::end; token = lexer.next()) {
    out.push_back(token.kind);
  }
  return out;
}

TEST(Lexer, EveryKindOfToken) {
  EXPECT_EQ(kinds_of("12 ab_3+-*/^(),<=<>=>!="),
            (std::vector<Kind>{Kind::integer, Kind::name, Kind::plus, Kind::minus, Kind::times,
                               Kind::over, Kind::caret, Kind::open, Kind::close, Kind::comma,
                               Kind::less_equal, Kind::less, Kind::greater_equal, Kind::greater,
                               Kind::not_equal}));
  EXPECT_TRUE(kinds_of(" \t\r\n").empty());
}

TEST(Lexer, PlacesThroughEscapes) {
  const Source source{"e", "s = \"\\u006b + 12\""};
  const auto literal = string_literal(source.text, 4);
  ASSERT_TRUE(literal);
  const Limits limits;
  Lexer lexer(source, *literal, limits);
  const Token k = lexer.next();
  EXPECT_EQ(k.text, "k");
  EXPECT_EQ(k.place.offset, 5U);
  EXPECT_EQ(k.place.length, 6U);
  EXPECT_EQ(lexer.next().place.offset, 12U);
  const Token number = lexer.next();
  EXPECT_EQ(number.text, "12");
  EXPECT_EQ(number.place.offset, 14U);
  EXPECT_EQ(lexer.next().kind, Kind::end);
  EXPECT_EQ(lexer.next().place.offset, 16U);
}

TEST(Lexer, RefusesEveryOtherAsciiCharacter) {
  const std::string known = " \t\r\n+-*/^(),<>";
  for (int code = 0; code < 128; ++code) {
    const char c = static_cast<char>(code);
    if (std::isalnum(code) != 0 || known.find(c) != std::string::npos) continue;
    EXPECT_THROW((void)kinds_of(std::string("1 ") + c), InputError) << code;
  }
}

TEST(Lexer, SuperscriptsAreNamed) {
  try {
    (void)kinds_of("n\xC2\xB2");
    FAIL();
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find("note: write ^2"), std::string::npos) << error.what();
  }
}

TEST(Lexer, AnIncompleteNotEqualIsRefused) { EXPECT_THROW((void)kinds_of("a ! = b"), InputError); }

}  // namespace
}  // namespace sumwright::claim
