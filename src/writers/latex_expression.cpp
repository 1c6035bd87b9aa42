// From the author's parse tree to a formula, node by node.
//
// Nothing is simplified: quotients become fractions, products are juxtaposed, and brackets appear
// exactly where precedence needs them.
#include "writers/latex_expression.hpp"

#include <algorithm>

#include "claim/reader.hpp"
#include "writers/latex_text.hpp"
#include "writers/latex_values.hpp"

namespace sumwright::writers {

namespace {

using claim::Expression;
using claim::Operation;

constexpr double kScript = 0.75;
constexpr double kWidestFraction = 20;
constexpr std::size_t kLongest = 3000;  // characters of an expression set as a formula
constexpr std::size_t kDeepest = 40;    // braces inside one another; TeX has 255 group levels

[[nodiscard]] std::size_t deepest_brace(const std::string& tex) {
  std::size_t depth = 0;
  std::size_t most = 0;
  for (const char c : tex) {
    if (c == '{') most = std::max(most, ++depth);
    if (c == '}' && depth > 0) --depth;
  }
  return most;
}

}  // namespace

Formula LatexExpressions::at_least(const Expression& expression, Strength needed) const {
  const ExpressionFormula printed = print(expression);
  if (printed.strength >= needed) return printed.formula;
  return bracketed(printed.formula, printed.tall);
}

// A fraction; in a row with breaks when that would be too wide.
ExpressionFormula LatexExpressions::quotient(const Expression& expression) const {
  const Formula above = formula(*expression.children[0]);
  const Formula below = formula(*expression.children[1]);
  ExpressionFormula out;
  out.strength = Strength::product;
  if (std::max(width_of(above), width_of(below)) <= kWidestFraction) {
    out.tall = true;
    out.formula = piece("\\frac{" + inline_tex(above) + "}{" + inline_tex(below) + "}",
                        std::max(width_of(above), width_of(below)) + 0.3);
    return out;
  }
  Formula factor = formula(*expression.children[0], true);
  if (width_of(below) <= kWidestFraction) {
    const bool negative = starts_with_minus(factor);  // of a product: of the whole fraction
    if (negative) factor.front().tex.erase(0, 1);
    out.tall = true;
    out.formula = piece(std::string(negative ? "-" : "") + "\\frac{1}{" + inline_tex(below) + "}",
                        width_of(below) + 1.2);
    multiply(out.formula, factor, true);
    return out;
  }
  out.strength = Strength::quotient;
  out.formula = factor;
  divide(out.formula, bracketed(below));
  return out;
}

ExpressionFormula LatexExpressions::binary(const Expression& expression) const {
  if (expression.operation == Operation::divide) return quotient(expression);
  const bool product = expression.operation == Operation::multiply;
  const ExpressionFormula left = print(*expression.children[0]);
  const ExpressionFormula right = print(*expression.children[1]);
  ExpressionFormula out;
  out.tall = left.tall || right.tall;
  out.strength = product ? Strength::product : Strength::sum;
  out.formula = left.strength >= out.strength ? left.formula : bracketed(left.formula, left.tall);
  const bool fraction = expression.children[1]->operation == Operation::divide;
  const Strength needed = !product   ? Strength::quotient
                          : fraction ? Strength::product
                                     : Strength::signed_product;
  const bool brackets = right.strength < needed || starts_with_minus(right.formula);
  const Formula second = brackets ? bracketed(right.formula, right.tall) : right.formula;
  if (product) {
    multiply(out.formula, second, out.tall);
  } else if (expression.operation == Operation::add) {
    append_term(out.formula, second);
  } else {
    subtract(out.formula, second);
  }
  return out;
}

ExpressionFormula LatexExpressions::power(const Expression& expression) const {
  const Expression& u = *expression.children[0];
  ExpressionFormula out;
  const ExpressionFormula base = print(u);
  const bool rising = u.operation == Operation::call && (u.name == "rising" || u.name == "falling");
  out.tall = base.tall;
  out.formula = base.strength == Strength::primary && !rising ? base.formula
                                                              : bracketed(base.formula, base.tall);
  const Piece exponent = script("^", formula(*expression.children[1]));
  append_tex(out.formula, exponent.tex, exponent.width);
  out.strength = Strength::power;
  return out;
}

ExpressionFormula LatexExpressions::call(const Expression& expression) const {
  ExpressionFormula out;
  const Expression& u = *expression.children[0];
  if (expression.name == "binomial") {
    const Formula above = formula(u);
    const Formula below = formula(*expression.children[1]);
    out.formula = piece("\\binom{" + inline_tex(above) + "}{" + inline_tex(below) + "}",
                        std::max(width_of(above), width_of(below)) + 1.5);
    out.tall = true;
  } else if (expression.name == "factorial") {
    out.formula = unbroken(at_least(u, Strength::primary));
    append_tex(out.formula, "!", 0.3);
    if (u.operation == Operation::call && u.name == "factorial") {
      out.formula = piece("(" + inline_tex(formula(u)) + ")!", width_of(formula(u)) + 1.1);
    }
  } else if (expression.name == "rising" || expression.name == "falling") {
    const bool nested = u.operation == Operation::call && u.name != "binomial";
    out.formula = unbroken(nested ? bracketed(formula(u)) : at_least(u, Strength::primary));
    const Formula length = formula(*expression.children[1]);
    const std::string line = expression.name == "rising" ? "\\overline" : "\\underline";
    append_tex(out.formula, "^{" + line + "{" + inline_tex(length) + "}}",
               kScript * width_of(length) + 0.1);
    out.strength = Strength::power;
  } else if (expression.name == "floor") {
    out.formula =
        piece("\\lfloor " + inline_tex(formula(u)) + "\\rfloor ", width_of(formula(u)) + 1);
  } else {
    Formula inside;
    for (const claim::ExpressionPtr& child : expression.children) {
      if (!inside.empty()) append_tex(inside, ",", 0.45);
      append(inside, formula(*child));
    }
    const std::string name = expression.name == "min" || expression.name == "max"
                                 ? "\\" + expression.name
                                 : "\\mathrm{" + latex_text(expression.name) + "}";
    out.formula = unbroken(bracketed(inside));
    prepend_tex(out.formula, name, 2);
  }
  return out;
}

ExpressionFormula LatexExpressions::print(const Expression& expression) const {
  ExpressionFormula out;
  switch (expression.operation) {
    case Operation::literal:
      out.formula = integer_formula(expression.value);
      if (expression.value < 0) out.strength = Strength::signed_product;
      return out;
    case Operation::symbol:
      out.formula = names_.is_symbol(expression.name)
                        ? Formula{names_.symbol(expression.name)}
                        : piece("\\mathit{" + latex_text(expression.name, 24) + "}", 10);
      return out;
    case Operation::negate: {
      const ExpressionFormula inner = print(*expression.children[0]);
      out.tall = inner.tall;
      out.strength = Strength::signed_product;
      const bool plain = inner.strength != Strength::sum && !starts_with_minus(inner.formula);
      out.formula = plain ? inner.formula : bracketed(inner.formula, inner.tall);
      prepend_tex(out.formula, "-", 0.8);
      return out;
    }
    case Operation::power:
      return power(expression);
    case Operation::call:
      return call(expression);
    default:
      return binary(expression);
  }
}

Formula LatexExpressions::formula(const Expression& expression, bool as_factor) const {
  const ExpressionFormula printed = print(expression);
  if (!as_factor || printed.strength >= Strength::product) return printed.formula;
  return bracketed(printed.formula, printed.tall);
}

Formula LatexExpressions::bound(const claim::Bound& bound) const {
  switch (bound.kind) {
    case claim::Bound::Kind::minus_infinity:
      return piece("-\\infty", 1.8);
    case claim::Bound::Kind::plus_infinity:
      return piece("\\infty", 1);
    case claim::Bound::Kind::finite:
      break;
  }
  return formula(*bound.value);
}

Formula LatexExpressions::sum(const claim::Sum& sum) const {
  Formula out;
  for (const claim::Range& range : sum.over) {
    const Piece index = names_.symbol(range.index);
    const Formula low = bound(range.low);
    const Formula high = bound(range.high);
    const double width =
        kScript * std::max(index.width + 0.8 + width_of(low), width_of(high)) + 0.5;
    append(out,
           piece("\\sum_{" + index.tex + "=" + inline_tex(low) + "}^{" + inline_tex(high) + "} ",
                 std::max(width, 1.7)));
  }
  Formula summand = formula(*sum.summand, !sum.over.empty());
  append(out, summand, out.empty() ? 0 : 1);
  for (std::size_t i = 1; i < sum.over.size(); ++i) out[i].depth = 3;
  if (!sum.over.empty()) out[sum.over.size()].depth = 3;  // a sum sign never ends a line
  return out;
}

bool LatexExpressions::fits(const Expression& expression) const {
  if (to_text(expression).size() > kLongest) return false;
  const Formula printed = formula(expression);
  return widest(printed) <= kNumberedRoom - 8 && deepest_brace(inline_tex(printed)) <= kDeepest;
}

std::optional<ExpressionFormula> LatexExpressions::parsed(
    const std::string& text, const std::vector<std::string>& symbols) const {
  if (text.size() > kLongest) return std::nullopt;
  try {
    const claim::Source source{"value", text};
    const claim::ExpressionPtr tree = parse_expression(source, {0, text.size()}, symbols);
    if (!fits(*tree)) return std::nullopt;
    return print(*tree);
  } catch (const claim::InputError&) {
    return std::nullopt;
  }
}

}  // namespace sumwright::writers
