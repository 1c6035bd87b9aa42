// From formulas in pieces to displays of amsmath.
//
// A formula that fits goes on one line; else lines are filled greedily, groups of pieces are kept
// together while they fit a line, and only what does not is broken further inside.
#include "writers/latex_layout.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace sumwright::writers {

namespace {

constexpr double kRelation = 1.4;
constexpr double kIndent = 2.2;          // continuation lines: \quad, and a sign
constexpr double kShortLeft = 9.0;       // left sides up to this width align what follows
constexpr std::size_t kPageBreaks = 10;  // displays of more lines may be broken over pages
constexpr double kSign = 1.3;            // a multiplication sign that starts a line

// What a line starts with when it starts at the piece.
[[nodiscard]] std::string opening(const Piece& piece) {
  switch (piece.join) {
    case Join::product:
      return "{}\\times ";
    case Join::quotient:
      return "{}\\big/";
    default:
      return "{}";
  }
}

[[nodiscard]] double sign_width(const Piece& piece) {
  return piece.join == Join::product || piece.join == Join::quotient ? kSign : 0;
}

class LineFiller {
 public:
  LineFiller(double first_room, double room) : room_(room), left_(first_room) {}

  std::vector<std::string> fill(const Formula& formula) {
    place(formula, 0, formula.size(), 0);
    lines_.push_back(line_);
    return lines_;
  }
  /// Room left on the last line.
  [[nodiscard]] double left() const { return left_; }

 private:
  // Pieces [from, to), whose inner places are at `depth` or deeper.
  void place(const Formula& formula, std::size_t from, std::size_t to, int depth) {
    for (std::size_t begin = from; begin < to;) {
      std::size_t end = begin + 1;
      while (end < to && formula[end].depth > depth) ++end;
      double width = 0;
      for (std::size_t i = begin; i < end; ++i) {
        width += formula[i].width + (i == begin ? 0 : formula[i].glue_width);
      }
      const double glue = fresh_ ? 0 : formula[begin].glue_width;
      if (width + glue <= left_) {
        add(formula, begin, end, width + glue);
      } else if (width <= room_ - sign_width(formula[begin]) || end - begin == 1) {
        new_line(formula[begin]);
        add(formula, begin, end, width);
      } else {
        const bool term = depth == 0 && formula[begin].join == Join::sum;
        if (term || left_ < room_ / 3) new_line(formula[begin]);
        place(formula, begin, end, depth + 1);
      }
      begin = end;
    }
  }

  void add(const Formula& formula, std::size_t begin, std::size_t end, double width) {
    for (std::size_t i = begin; i < end; ++i) {
      if (!fresh_) line_ += formula[i].glue;
      line_ += formula[i].tex;
      fresh_ = false;
    }
    left_ -= width;
  }

  // Nothing when a line has just been started.
  void new_line(const Piece& piece) {
    if (fresh_) return;
    lines_.push_back(line_);
    line_ = opening(piece);
    left_ = room_ - sign_width(piece);
    fresh_ = true;
  }

  double room_;
  double left_;
  bool fresh_ = true;  ///< the line has no piece yet
  std::string line_;
  std::vector<std::string> lines_;
};

// A sign behind an alignment mark would be spaced as a binary one.
[[nodiscard]] std::string first_line(const std::string& line) {
  return line.starts_with('-') ? "{-}" + line.substr(1) : line;
}

// Rows of an align environment for one equation.
[[nodiscard]] std::vector<std::string> rows_of(const Formula& left, const Formula& right,
                                               double room) {
  std::vector<std::string> rows;
  const double left_width = width_of(left);
  if (left_width <= kShortLeft && !right.empty()) {
    const double own = room - left_width - kRelation;
    const auto lines = broken_lines(right, own, own - kIndent);
    for (std::size_t i = 0; i < lines.size(); ++i) {
      rows.push_back(i == 0 ? inline_tex(left) + " ={}& " + first_line(lines[i])
                            : "&\\quad " + lines[i]);
    }
    return rows;
  }
  LineFiller filler(room, room - kIndent);
  for (const std::string& line : filler.fill(left)) {
    rows.push_back(rows.empty() ? "&" + first_line(line) : "&\\quad " + line);
  }
  if (right.empty()) return rows;
  if (width_of(right) + kRelation <= std::min(filler.left(), room / 4)) {
    rows.back() += " = " + inline_tex(right);
    return rows;
  }
  const double inner = room - 2 - kRelation;
  bool first = true;
  for (const std::string& line : broken_lines(right, inner, inner - kIndent)) {
    rows.push_back((first ? "&\\qquad = " : "&\\qquad\\quad ") + line);
    first = false;
  }
  return rows;
}

[[nodiscard]] std::string joined(const std::vector<std::string>& rows, const std::string& label,
                                 const std::string& end) {
  const bool numbered = !label.empty();
  std::string out;
  for (std::size_t i = 0; i < rows.size(); ++i) {
    const bool last = i + 1 == rows.size();
    out += rows[i];
    if (last) out += end;
    if (numbered) out += i == 0 ? fmt::format(" \\label{{{}}}", label) : " \\notag";
    if (!last) out += rows.size() > kPageBreaks ? "\\\\[0pt plus 2pt]" : "\\\\";
    out += "\n";
  }
  const std::string environment = numbered ? "align" : "align*";
  std::string text = fmt::format("\\begin{{{0}}}\n{1}\\end{{{0}}}\n", environment, out);
  // A blank behind the brace would indent what follows the display.
  if (rows.size() > kPageBreaks) text = "{\\allowdisplaybreaks\n" + text + "}\\ignorespaces\n";
  return text;
}

}  // namespace

std::vector<std::string> broken_lines(const Formula& formula, double first_room, double room) {
  return LineFiller(first_room, room).fill(formula);
}

std::string display(const Formula& left, const Formula& right, const std::string& label,
                    const std::string& end) {
  const double room = label.empty() ? kRoom : kNumberedRoom;
  const double whole = width_of(left) + (right.empty() ? 0 : kRelation + width_of(right));
  if (whole > room) return joined(rows_of(left, right, room), label, end);
  const std::string body =
      inline_tex(left) + (right.empty() ? "" : " = " + inline_tex(right)) + end;
  if (label.empty()) return "\\[\n" + body + "\n\\]\n";
  return fmt::format("\\begin{{equation}}\\label{{{}}}\n{}\n\\end{{equation}}\n", label, body);
}

std::string display_list(const std::vector<DisplayRow>& rows, const std::string& end) {
  std::vector<std::string> lines;
  double left = 0;
  for (const DisplayRow& row : rows) left = std::max(left, width_of(row.left));
  const bool aligned = left <= kRoom / 2;
  for (std::size_t r = 0; r < rows.size(); ++r) {
    std::vector<std::string> own;
    if (aligned) {
      const double room = kRoom - left - kRelation;
      bool first = true;
      for (const std::string& line : broken_lines(rows[r].right, room, room - kIndent)) {
        own.push_back(first ? inline_tex(rows[r].left) + " &= " + line : "&\\quad " + line);
        first = false;
      }
    } else {
      own = rows_of(rows[r].left, rows[r].right, kRoom);
    }
    if (r + 1 < rows.size()) own.back() += ",";
    lines.insert(lines.end(), own.begin(), own.end());
  }
  return lines.empty() ? "" : joined(lines, "", end);
}

}  // namespace sumwright::writers
