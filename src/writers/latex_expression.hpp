// The author's expressions, and short mathematical texts of a proof, as formulas.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "claim/claim.hpp"
#include "writers/latex_layout.hpp"
#include "writers/latex_names.hpp"

namespace sumwright::writers {

/// How tightly a formula holds together: decides where brackets are needed. A quotient is one in a
/// row, with a stroke.
enum class Strength { sum, quotient, product, signed_product, power, primary };

struct ExpressionFormula {
  Formula formula;
  Strength strength = Strength::primary;
  bool tall = false;  ///< contains fractions or binomials
};

/// Prints parse trees node by node. Expressions that are too long or too deep for a page are the
/// caller's business: see `fits`.
class LatexExpressions {
 public:
  explicit LatexExpressions(const LatexNames& names) : names_(names) {}

  [[nodiscard]] ExpressionFormula print(const claim::Expression& expression) const;
  /// The formula alone, in brackets when it is a sum and `as_factor`.
  [[nodiscard]] Formula formula(const claim::Expression& expression, bool as_factor = false) const;
  /// `\sum_{k=0}^{n}` for each range, outermost first, then the summand.
  [[nodiscard]] Formula sum(const claim::Sum& sum) const;
  /// Whether the expression can be set as a formula at all: not too long, deep or wide.
  [[nodiscard]] bool fits(const claim::Expression& expression) const;

  /// An expression of the claim language in a text; nothing when it is too large for a page or does
  /// not parse.
  [[nodiscard]] std::optional<ExpressionFormula> parsed(
      const std::string& text, const std::vector<std::string>& symbols) const;

  /// Text of a proof such as `n >= 0, 0 <= k <= n + 1` or `a_1 F(n + 1, n + 1)`: names, numbers and
  /// operators become mathematics, other words stay words.
  [[nodiscard]] std::string mixed(const std::string& text) const;

  /// What stands in `mixed` as one formula without dollars, for displays; its width.
  [[nodiscard]] Formula math(const std::string& text) const;

 private:
  [[nodiscard]] ExpressionFormula binary(const claim::Expression& expression) const;
  [[nodiscard]] ExpressionFormula quotient(const claim::Expression& expression) const;
  [[nodiscard]] ExpressionFormula power(const claim::Expression& expression) const;
  [[nodiscard]] ExpressionFormula call(const claim::Expression& expression) const;
  [[nodiscard]] Formula at_least(const claim::Expression& expression, Strength needed) const;
  [[nodiscard]] Formula bound(const claim::Bound& bound) const;

  const LatexNames& names_;
};

}  // namespace sumwright::writers
