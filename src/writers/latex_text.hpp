// Text from outside as LaTeX text: nothing in it is ever read as a command.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace sumwright::writers {

/// The character as LaTeX, without packages; empty when there is no known way.
[[nodiscard]] std::string_view latex_letter(char32_t code);

/// The text, escaped; runs of blanks are one; characters without a way to be set appear as
/// `[U+4E2D]`; long words may be broken; cut after `limit` characters, with an ellipsis.
[[nodiscard]] std::string latex_text(std::string_view text, std::size_t limit = 600);

/// Whether a word is so long that a justified paragraph may not hold it well.
[[nodiscard]] bool has_long_word(std::string_view text);

/// Source text in typewriter type, with breaks allowed behind operators, commas and brackets.
[[nodiscard]] std::string latex_code(std::string_view text, std::size_t limit = 1500);

}  // namespace sumwright::writers
