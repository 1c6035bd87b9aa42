// From the text of an expression to tokens with places.
#pragma once

#include <cstddef>
#include <string_view>

#include "claim/reader.hpp"
#include "claim/source.hpp"
#include "claim/toml_text.hpp"

namespace sumwright::claim {

struct Token {
  enum class Kind {
    integer,
    name,
    plus,
    minus,
    times,
    over,
    caret,
    open,
    close,
    comma,
    less_equal,
    less,
    greater_equal,
    greater,
    not_equal,
    end
  };
  Kind kind = Kind::end;
  std::string_view text;  ///< as written
  Place place;            ///< in the file
};

/// Reads tokens one at a time. The text must outlive the lexer and its tokens.
class Lexer {
 public:
  Lexer(const Source& source, const MappedText& text, const Limits& limits)
      : source_(source), text_(text), limits_(limits) {}

  /// The next token; `end`, repeatedly, when none is left. Throws InputError at
  /// characters that no expression has, and at integers that are too long.
  [[nodiscard]] Token next();

 private:
  [[nodiscard]] Token token(Token::Kind kind, std::size_t length);
  [[nodiscard]] Token integer();
  [[nodiscard]] Token name();
  [[noreturn]] void refuse_character() const;

  const Source& source_;
  const MappedText& text_;
  const Limits& limits_;
  std::size_t at_ = 0;
};

}  // namespace sumwright::claim
