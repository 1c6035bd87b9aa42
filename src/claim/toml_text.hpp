// TOML at the level of bytes: what must be known before and beside the TOML parser.
#pragma once

#include <cstddef>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "claim/source.hpp"

namespace sumwright::claim {

/// A string value together with where each of its bytes stands in the file.
struct MappedText {
  /// The bytes of the file that one byte of the value was written as.
  struct Unit {
    std::size_t offset = 0;
    std::size_t length = 1;
  };
  std::string text;
  std::vector<Unit> units;  ///< as many as bytes in `text`
  Place place;              ///< what stands between the delimiters

  /// The place in the file of the bytes [begin, end) of the value. An empty span at the
  /// end stands just behind the last byte.
  [[nodiscard]] Place span(std::size_t begin, std::size_t end) const;
};

/// The text `where` of `source` as it stands, without escapes.
[[nodiscard]] MappedText plain_text(const Source& source, Place where);

/// Decodes the TOML 1.0 string literal (any of the four kinds) that starts at `offset`.
/// Nothing when none starts there or it is not closed.
[[nodiscard]] std::optional<MappedText> string_literal(std::string_view text, std::size_t offset);

/// Refuses what a TOML parser should not be given: strings that are not closed or have a
/// wrong escape, characters beyond ASCII outside strings and comments, brackets nested deeper than
/// a claim needs, and long dotted keys (each dot makes a table). Throws InputError.
void check_toml_text(const Source& source);

/// The text with `?` for each character beyond ASCII and without a byte-order mark: the same
/// lines and columns for a parser that need not know Unicode.
[[nodiscard]] std::string ascii_shadow(std::string_view text);

}  // namespace sumwright::claim
