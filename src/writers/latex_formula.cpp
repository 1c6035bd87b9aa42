// From parts of formulas to formulas in pieces.
//
// Only here is a piece tied to what stands before it: a sign belongs to the piece of its term, a
// multiplication sign or a stroke to the place before the piece. So a line can be broken anywhere
// without a sign lost or added.
#include "writers/latex_formula.hpp"

#include <algorithm>

namespace sumwright::writers {

namespace {

constexpr double kPlus = 1.25;    // a binary sign with its spaces
constexpr double kMinus = 0.8;    // a sign in front
constexpr double kScript = 0.75;  // size of exponents

[[nodiscard]] bool starts_with_digit(const Formula& formula) {
  const std::string tex = inline_tex(formula);
  return !tex.empty() && tex[0] >= '0' && tex[0] <= '9';
}

// Whether the last factor is a word, perhaps with an exponent.
[[nodiscard]] bool ends_with_word(const Formula& formula) {
  const std::string& tex = formula.back().tex;
  const std::size_t sign = tex.find_first_not_of("+-");
  const std::size_t digits = tex.find_first_not_of("0123456789", std::min(sign, tex.size()));
  return digits != std::string::npos && tex.find('(') == std::string::npos &&
         tex.find("\\math", digits) != std::string::npos;
}

[[nodiscard]] bool is_product(const Formula& formula) {
  return std::any_of(formula.begin(), formula.end(), [](const Piece& part) {
    return part.depth == 1 && part.join == Join::product;
  });
}

[[nodiscard]] Formula in_brackets(const Formula& formula, const std::string& open,
                                  const std::string& close, double width) {
  Formula out;
  append(out, formula, 1);
  if (!out.empty()) out.front().depth = 0;
  prepend_tex(out, open, width);
  append_tex(out, close, width);
  return out;
}

}  // namespace

double width_of(const Formula& formula) {
  double width = 0;
  for (std::size_t i = 0; i < formula.size(); ++i) {
    width += formula[i].width + (i == 0 ? 0 : formula[i].glue_width);
  }
  return width;
}

double widest(const Formula& formula) {
  double width = 0;
  for (const Piece& part : formula) width = std::max(width, part.width);
  return width;
}

std::string inline_tex(const Formula& formula) {
  std::string out;
  for (std::size_t i = 0; i < formula.size(); ++i) {
    if (i > 0) out += formula[i].glue;
    out += formula[i].tex;
  }
  return out;
}

Formula piece(std::string tex, double width) { return {{std::move(tex), width}}; }

Formula unbroken(const Formula& formula) { return piece(inline_tex(formula), width_of(formula)); }

void append(Formula& out, const Formula& more, int deeper) {
  for (const Piece& part : more) {
    out.push_back(part);
    out.back().depth += deeper;
  }
}

void prepend_tex(Formula& formula, const std::string& tex, double width) {
  if (formula.empty()) formula = piece("", 0);
  formula.front().tex = tex + formula.front().tex;
  formula.front().width += width;
}

void append_tex(Formula& formula, const std::string& tex, double width) {
  if (formula.empty()) formula = piece("", 0);
  formula.back().tex += tex;
  formula.back().width += width;
}

void append_term(Formula& out, const Formula& more) {
  if (more.empty()) return;
  if (out.empty()) {
    out = more;
    return;
  }
  const std::size_t place = out.size();
  append(out, more);
  Piece& term = out[place];
  term.join = Join::sum;
  const bool minus = starts_with_minus(more);
  if (!minus) term.tex = "+" + term.tex;
  term.width += minus ? kPlus - kMinus : kPlus;
}

Formula negative(const Formula& formula) {
  Formula out = starts_with_minus(formula) ? bracketed(formula) : formula;
  prepend_tex(out, "-", kMinus);
  return out;
}

void subtract(Formula& out, const Formula& more) { append_term(out, negative(more)); }

Formula of_function(const Formula& factor, const Formula& function) {
  const std::string tex = inline_tex(factor);
  if (tex == "1") return function;
  if (tex == "-1") return negative(function);
  Formula out = factor;
  append_tex(out, "\\," + inline_tex(function), width_of(function) + 0.2);
  return out;
}

void multiply(Formula& out, const Formula& more, bool spaced) {
  if (more.empty()) return;
  if (out.empty()) {
    out = more;
    return;
  }
  const Formula factor = starts_with_minus(more) ? bracketed(more) : more;
  const bool words = ends_with_word(out) || is_word(factor.front().tex);
  if (!is_product(out)) {  // a line is broken between the factors rather than in the first one
    for (std::size_t i = 1; i < out.size(); ++i) ++out[i].depth;
  }
  const std::size_t place = out.size();
  append(out, factor, 1);
  Piece& first = out[place];
  first.join = Join::product;
  if (starts_with_digit(factor)) {
    first.glue = "\\cdot ";
    first.glue_width = 0.8;
  } else if (spaced || words) {
    first.glue = "\\,";
    first.glue_width = 0.2;
  }
}

Formula held(const Formula& number, const Formula& more) {
  if (number.empty()) return more;
  const Formula head = unbroken(number);
  Formula out = head;
  multiply(out, more);
  const Piece& first = out[1];
  Formula joined = starts_with_minus(more) ? bracketed(more) : more;
  prepend_tex(joined, head[0].tex + first.glue, head[0].width + first.glue_width);
  return joined;
}

void divide(Formula& out, const Formula& more) {
  if (more.empty()) return;
  const std::size_t place = out.size();
  append(out, more, 1);
  out[place].join = Join::quotient;
  out[place].glue = "\\,\\big/";
  out[place].glue_width = 1;
}

Formula bracketed(const Formula& formula, bool tall) {
  if (tall) {
    return piece("\\left(" + inline_tex(formula) + "\\right)", width_of(formula) + 1.4);
  }
  return in_brackets(formula, "(", ")", 0.4);
}

Formula big_bracketed(const Formula& formula) {
  return in_brackets(formula, "\\bigl(", "\\bigr)", 0.5);
}

bool starts_with_minus(const Formula& formula) {
  return !formula.empty() && !formula.front().tex.empty() && formula.front().tex[0] == '-';
}

bool is_word(const std::string& tex) {
  return tex.starts_with("\\mathit") || tex.starts_with("\\mathtt");
}

double digits_width(const std::string& digits) { return 0.52 * static_cast<double>(digits.size()); }

Piece script(const std::string& mark, const Formula& formula) {
  return {mark + "{" + inline_tex(formula) + "}", kScript * width_of(formula) + 0.05};
}

}  // namespace sumwright::writers
