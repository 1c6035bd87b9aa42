// Which expressions may stand where: terms, rational functions, bounds, conditions.
#pragma once

#include <gmpxx.h>

#include <set>
#include <string>

#include "claim/affine.hpp"
#include "claim/claim.hpp"
#include "claim/constants.hpp"
#include "claim/expression_parser.hpp"
#include "claim/reader.hpp"

namespace sumwright::claim {

/// The symbols that an expression may use, by kind.
struct Scope {
  std::string running;              ///< empty where it may not stand
  std::set<std::string> indices;    ///< the summation indices in sight
  std::set<std::string> integers;   ///< integer parameters
  std::set<std::string> rationals;  ///< rational parameters

  /// Running variable, indices and integer parameters.
  [[nodiscard]] std::set<std::string> integer_symbols() const;
};

/// Checks of one expression. All throw InputError at the part that does not fit.
class Shapes {
 public:
  Shapes(const Source& source, const Limits& limits, const Scope& scope);

  /// A candidate for a hypergeometric term, or a sum of such: arguments that count
  /// are integer-affine, powers follow the rule of the language, nothing is divided by a zero
  /// that can be seen.
  void check_term(const Expression& expression) const;

  /// A rational function of the symbols in scope. `what` names it in messages.
  void check_rational(const Expression& expression, const std::string& what) const;

  /// An end of a range: integer-affine, with floor(u/b), min and max.
  void check_bound(const Expression& expression) const;

  /// A comparison of `assume`; gives whether it is one between integers.
  [[nodiscard]] bool check_comparison(const ParsedComparison& comparison) const;

  /// The value of a rational constant.
  [[nodiscard]] mpq_class constant(const Expression& expression, const std::string& what) const;

  /// Whether the expression is a small constant with the value 0.
  [[nodiscard]] bool is_zero_constant(const Expression& expression) const;

 private:
  [[nodiscard]] Folded fold(const Expression& expression) const;
  void check_exponent_size(const Expression& exponent, const AffineView& form) const;
  void check_term_node(const Expression& expression) const;
  void check_term_power(const Expression& expression) const;
  void check_count(const Expression& argument, const std::string& what) const;
  void check_magnitude(const Expression& where, const AffineView& form, long limit) const;
  [[nodiscard]] double bound_scale(const Expression& expression) const;
  [[nodiscard]] double floor_scale(const Expression& expression) const;
  [[nodiscard]] double product_scale(const Expression& expression) const;
  void check_order(const Expression& expression) const;
  [[nodiscard]] const Expression* moving_symbol(const Expression& expression) const;
  [[noreturn]] void refuse(Place place, std::string_view message, std::string_view note = {}) const;

  const Source& source_;
  const Limits& limits_;
  const Scope& scope_;
  std::set<std::string> integer_symbols_;
};

}  // namespace sumwright::claim
