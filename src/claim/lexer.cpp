// The tokens of the expression language: ASCII integers, names and operators.
//
// Characters that people write by habit (a decimal point, an exclamation mark, signs
// pasted from a paper) are refused with what to write instead.
#include "claim/lexer.hpp"

#include <fmt/format.h>

#include <array>
#include <utility>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

[[nodiscard]] bool is_digit(char c) { return c >= '0' && c <= '9'; }
[[nodiscard]] bool is_letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); }
[[nodiscard]] bool is_name_part(char c) { return is_letter(c) || is_digit(c) || c == '_'; }
[[nodiscard]] bool is_blank(char c) { return c == ' ' || c == '\t' || c == '\n' || c == '\r'; }

struct Operator {
  std::string_view text;
  Token::Kind kind;
};

// The longer ones first.
constexpr std::array<Operator, 13> kOperators = {{{"<=", Token::Kind::less_equal},
                                                  {">=", Token::Kind::greater_equal},
                                                  {"!=", Token::Kind::not_equal},
                                                  {"<", Token::Kind::less},
                                                  {">", Token::Kind::greater},
                                                  {"+", Token::Kind::plus},
                                                  {"-", Token::Kind::minus},
                                                  {"*", Token::Kind::times},
                                                  {"/", Token::Kind::over},
                                                  {"^", Token::Kind::caret},
                                                  {"(", Token::Kind::open},
                                                  {")", Token::Kind::close},
                                                  {",", Token::Kind::comma}}};

struct Habit {
  std::string_view text;
  std::string_view advice;
};

constexpr std::array<Habit, 21> kHabits = {{
    {".", "there are no decimals; write a quotient, such as 3/2"},
    {"!", "write factorial(n)"},
    {"=", "an expression has no equality sign; conditions use <=, <, >=, > or !="},
    {"[", "use round brackets"},
    {"]", "use round brackets"},
    {"{", "use round brackets"},
    {"}", "use round brackets"},
    {"_", "a name starts with a letter"},
    {"\xE2\x88\x92", "write the ASCII sign -"},  // U+2212 minus sign
    {"\xE2\x80\x93", "write the ASCII sign -"},  // U+2013 en dash
    {"\xC2\xB7", "write * for a product"},       // U+00B7 middle dot
    {"\xC3\x97", "write * for a product"},       // U+00D7 multiplication sign
    {"\xE2\x8B\x85", "write * for a product"},   // U+22C5 dot operator
    {"\xE2\x89\xA4", "write <="},                // U+2264
    {"\xE2\x89\xA5", "write >="},                // U+2265
    {"\xC2\xB2", "write ^2"},                    // U+00B2 superscript two
    {"\xC2\xB3", "write ^3"},                    // U+00B3 superscript three
    {"\xE2\x81\xB4", "write ^4"},                // U+2074 superscript four
    {"\xE2\x81\xBF", "write ^n"},                // U+207F superscript n
    {"\xE2\x81\xBB", "write ^(-1)"},             // U+207B superscript minus
    {"\xE2\x88\x9E", "write inf"},               // U+221E infinity
}};

}  // namespace

Token Lexer::token(Token::Kind kind, std::size_t length) {
  Token out{kind, std::string_view(text_.text).substr(at_, length), text_.span(at_, at_ + length)};
  at_ += length;
  return out;
}

Token Lexer::integer() {
  std::size_t length = 1;
  const std::string& text = text_.text;
  while (at_ + length < text.size() && is_digit(text[at_ + length])) ++length;
  const Token out = token(Token::Kind::integer, length);
  if (length > limits_.literal_digits) {
    throw InputError(source_, out.place,
                     fmt::format("an integer of {} digits; at most {} are read", length,
                                 limits_.literal_digits));
  }
  return out;
}

Token Lexer::name() {
  std::size_t length = 1;
  const std::string& text = text_.text;
  while (at_ + length < text.size() && is_name_part(text[at_ + length])) ++length;
  return token(Token::Kind::name, length);
}

Token Lexer::next() {
  const std::string& text = text_.text;
  while (at_ < text.size() && is_blank(text[at_])) ++at_;
  if (at_ == text.size()) return token(Token::Kind::end, 0);
  if (is_digit(text[at_])) return integer();
  if (is_letter(text[at_])) return name();
  for (const Operator& known : kOperators) {
    if (text.compare(at_, known.text.size(), known.text) == 0) {
      return token(known.kind, known.text.size());
    }
  }
  refuse_character();
}

void Lexer::refuse_character() const {
  const std::string_view rest = std::string_view(text_.text).substr(at_);
  const Character character = decode(rest, 0);
  std::string_view advice;
  for (const Habit& habit : kHabits) {
    if (rest.starts_with(habit.text)) advice = habit.advice;
  }
  throw InputError(
      source_, text_.span(at_, at_ + character.length),
      fmt::format("unexpected character {}", in_quotes(rest.substr(0, character.length))), advice);
}

}  // namespace sumwright::claim
