// A plain-text table with wrapped cells.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>
#include <vector>

namespace sumwright::cli {

/// `text` in lines of at most `width` columns: broken at blanks, words longer than a line anywhere.
/// Bytes outside ASCII count as one column per character.
[[nodiscard]] std::vector<std::string> wrapped(std::string_view text, std::size_t width);

/// Columns of fixed width, two blanks between them; cells are wrapped. No line has blanks at its
/// end, every line ends with a line feed.
[[nodiscard]] std::string table(const std::vector<std::size_t>& widths,
                                const std::vector<std::vector<std::string>>& rows);

/// `label:  text`, wrapped at 80 columns, further lines indented under the text.
[[nodiscard]] std::string labelled(std::string_view label, std::string_view text);

}  // namespace sumwright::cli
