// Displays that never run over the margin: an amsart line holds 36 em.
#pragma once

#include <string>
#include <vector>

#include "writers/latex_formula.hpp"

namespace sumwright::writers {

/// The formula in lines, the first of `first_room` em and the others of `room`: a line that starts
/// at a factor starts with a multiplication sign, one that starts at a term with the term's sign.
[[nodiscard]] std::vector<std::string> broken_lines(const Formula& formula, double first_room,
                                                    double room);

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

/// Room on a line of a display with a number, and without.
inline constexpr double kNumberedRoom = 30.5;
inline constexpr double kRoom = 33.5;

}  // namespace sumwright::writers
