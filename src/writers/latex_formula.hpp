// Formulas in pieces with estimated widths: the parts between which a line can be broken.
//
// Widths are in em of a ten-point roman font, estimated from above.
#pragma once

#include <string>
#include <vector>

namespace sumwright::writers {

/// How a piece is tied to the piece before it.
enum class Join {
  none,      ///< stands right behind it: digits of one number, an argument, a summand
  sum,       ///< a term of a sum: the piece itself starts with its sign
  product,   ///< a factor; a line that starts with it starts with a multiplication sign
  quotient,  ///< the divisor; a line that starts with it starts with the stroke
};

/// What stays on one line. A line may be broken before a piece, the less deep the better.
struct Piece {
  std::string tex;
  double width = 0;
  int depth = 0;  ///< nesting of the place before it
  Join join = Join::none;
  /// Product and quotient: what stands before the piece in the middle of a line (nothing, a space,
  /// a dot, a stroke). Where a line starts, the sign of the join takes its place.
  std::string glue = {};
  double glue_width = 0;
};

/// The first piece of a complete formula has no join and no glue.
using Formula = std::vector<Piece>;

[[nodiscard]] double width_of(const Formula& formula);
/// The widest piece: what cannot be broken.
[[nodiscard]] double widest(const Formula& formula);
/// All pieces in a row, for `$...$`.
[[nodiscard]] std::string inline_tex(const Formula& formula);
/// One piece of known text.
[[nodiscard]] Formula piece(std::string tex, double width);
/// The formula as one piece, which no line is broken in.
[[nodiscard]] Formula unbroken(const Formula& formula);
/// `more` right behind `out`, without any sign between; its places `deeper` levels down.
void append(Formula& out, const Formula& more, int deeper = 0);
/// `tex` in front of the first or behind the last piece.
void prepend_tex(Formula& formula, const std::string& tex, double width);
void append_tex(Formula& formula, const std::string& tex, double width);

/// `more` as a further term of the sum `out`: with a plus sign unless it has a minus sign.
void append_term(Formula& out, const Formula& more);
/// `out` minus `more`; `more` is no sum. A minus sign of its own goes into brackets.
void subtract(Formula& out, const Formula& more);
/// `out` times `more`, neither a sum: juxtaposed with a dot before digits, with a thin space beside
/// names of several letters or when `spaced`. A minus sign of `more` goes into brackets.
void multiply(Formula& out, const Formula& more, bool spaced = false);
/// `number` times `more`, with no place to break a line between them.
[[nodiscard]] Formula held(const Formula& number, const Formula& more);
/// Minus the formula, which is no sum; a minus sign of its own goes into brackets.
[[nodiscard]] Formula negative(const Formula& formula);
/// `factor`, which is no sum, times a function such as B(n,k), which stays on its line.
[[nodiscard]] Formula of_function(const Formula& factor, const Formula& function);
/// `out` divided by `more` in a row, with a stroke; `out` is no sum, `more` has its brackets
/// already. The result needs brackets as a factor.
void divide(Formula& out, const Formula& more);

/// Round brackets around the formula: plain ones, between which lines can be broken; or, when
/// `tall`, growing ones around a single piece.
[[nodiscard]] Formula bracketed(const Formula& formula, bool tall = false);
/// The same with brackets one size larger, for sums that contain brackets; lines can be broken.
[[nodiscard]] Formula big_bracketed(const Formula& formula);

[[nodiscard]] bool starts_with_minus(const Formula& formula);
/// Whether the text starts with a name of several letters, set as a word.
[[nodiscard]] bool is_word(const std::string& tex);
/// Width of a row of digits.
[[nodiscard]] double digits_width(const std::string& digits);
/// `formula` as an exponent or index: `^{...}`.
[[nodiscard]] Piece script(const std::string& mark, const Formula& formula);

}  // namespace sumwright::writers
