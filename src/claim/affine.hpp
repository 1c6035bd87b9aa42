// Integer-affine forms: c + sum of c_s * s with integer coefficients.
#pragma once

#include <map>
#include <optional>
#include <set>
#include <string>

#include "claim/expression.hpp"

namespace sumwright::claim {

/// An integer-affine form. Only nonzero coefficients are kept.
struct AffineView {
  std::map<std::string, long> coefficients;
  long constant = 0;

  [[nodiscard]] bool is_constant() const { return coefficients.empty(); }
};

/// Why an expression is no affine form.
struct AffineFault {
  const Expression* where = nullptr;  ///< the innermost part that does not fit
  bool too_large = false;             ///< a number left the range of long
};

/// The expression as an affine form in `names`: integer literals, those symbols, signs,
/// `+ - *` with one factor constant, and powers of constants with exponents >= 0. Nothing
/// when it is not of that form, or when a number on the way does not fit a long;
/// `fault`, when given, then says where.
[[nodiscard]] std::optional<AffineView> as_affine(const Expression& expression,
                                                  const std::set<std::string>& names,
                                                  AffineFault* fault = nullptr);

/// The value of `c` or `-c` with a literal c (one sign), as an exponent must be written.
[[nodiscard]] std::optional<mpz_class> as_literal(const Expression& expression);

}  // namespace sumwright::claim
