// Formulas in pieces with estimated widths, and displays that never run over the margin.
//
// Widths are in em of a ten-point roman font, estimated from above; an amsart line holds 36 em.
#pragma once

#include <string>
#include <vector>

namespace sumwright::writers {

/// What stays on one line. A line may be broken before a piece, the less deep the better.
struct Piece {
  std::string tex;
  double width = 0;
  int depth = 0;         ///< nesting of the place before it
  bool product = false;  ///< a multiplication sign is put in front when a line starts here
};
using Formula = std::vector<Piece>;

[[nodiscard]] double width_of(const Formula& formula);
/// All pieces in a row, for `$...$`.
[[nodiscard]] std::string inline_tex(const Formula& formula);
/// One piece of known text.
[[nodiscard]] Formula piece(std::string tex, double width);
/// `more` behind `out`, its places `deeper` levels down.
void append(Formula& out, const Formula& more, int deeper = 0);
/// `tex` in front of the first or behind the last piece.
void prepend_tex(Formula& formula, const std::string& tex, double width);
void append_tex(Formula& formula, const std::string& tex, double width);
/// Round brackets around the formula: plain ones, between which lines can be broken; or, when
/// `tall`, growing ones around a single piece.
[[nodiscard]] Formula bracketed(const Formula& formula, bool tall = false);

/// The same with brackets one size larger, for sums that contain brackets; lines can be broken.
[[nodiscard]] Formula big_bracketed(const Formula& formula);

/// Width of a text in the given number of em per character.
[[nodiscard]] double digits_width(const std::string& digits);

/// `left = right` (or `left` alone when `right` is empty) as a display. `label` empty: no number.
/// `end` is the punctuation behind it. Broken over lines, and over pages, as needed.
[[nodiscard]] std::string display(const Formula& left, const Formula& right,
                                  const std::string& label, const std::string& end);

/// One row of an aligned list.
struct DisplayRow {
  Formula left;
  Formula right;
};
/// Rows `left = right` under one another, aligned at the relation.
[[nodiscard]] std::string display_list(const std::vector<DisplayRow>& rows, const std::string& end);

/// The widest piece: what cannot be broken.
[[nodiscard]] double widest(const Formula& formula);

/// Room on a line of a display with a number, and without.
inline constexpr double kNumberedRoom = 30.5;
inline constexpr double kRoom = 33.5;

}  // namespace sumwright::writers
