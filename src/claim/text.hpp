// Small functions on untrusted text: UTF-8, display, nearest names.
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

namespace sumwright::claim {

/// One character of a text that need not be valid UTF-8.
struct Character {
  char32_t code = 0;       ///< the code point; unspecified when not valid
  std::size_t length = 1;  ///< bytes it takes; 1 for a byte that starts no valid sequence
  bool valid = true;
};

/// Decodes the character that starts at `offset` (< text.size()). Overlong forms,
/// surrogates and code points past U+10FFFF are not valid (RFC 3629).
[[nodiscard]] Character decode(std::string_view text, std::size_t offset);

/// The offset of the first byte that is not valid UTF-8.
[[nodiscard]] std::optional<std::size_t> first_invalid_utf8(std::string_view text);

/// Whether the code point must not reach a terminal or a typeset page as it stands: C0 and
/// C1 controls, line and paragraph separators, and the invisible characters that
/// reorder or hide text.
[[nodiscard]] bool is_unprintable(char32_t code);

/// `text` with unprintable characters and invalid bytes written as `\x1b`, `\u{202e}`.
[[nodiscard]] std::string printable(std::string_view text);

/// `text` in single quotes, printable, and cut to a length that suits a message.
[[nodiscard]] std::string in_quotes(std::string_view text);

/// The candidate nearest to `word` by edit distance (insert, delete, replace, swap
/// neighbours), if it is near enough to be worth suggesting. The first of equals wins.
[[nodiscard]] std::optional<std::string> nearest(std::string_view word,
                                                 const std::vector<std::string>& candidates);

/// `did you mean 'x'?`
[[nodiscard]] std::string did_you_mean(std::string_view name);

/// `did you mean 'x'?` for the nearest candidate, or an empty text.
[[nodiscard]] std::string suggestion(std::string_view word,
                                     const std::vector<std::string>& candidates);

/// The x of a note that is `did you mean 'x'?`; nothing when it is another note.
[[nodiscard]] std::optional<std::string> suggested(std::string_view note);

/// `'a', 'b' or 'c'`.
[[nodiscard]] std::string alternatives(const std::vector<std::string>& names);

/// `'a', 'b' and 'c'`.
[[nodiscard]] std::string listing(const std::vector<std::string>& names);

}  // namespace sumwright::claim
