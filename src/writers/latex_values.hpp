// Values of a proof as formulas: polynomials, affine forms, products of factorials.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "writers/latex_layout.hpp"
#include "writers/latex_names.hpp"

namespace sumwright::writers {

/// Prints values of one proof. Polynomials past the room that is left are abbreviated: the first
/// and last terms are shown and `abbreviated()` counts it.
class LatexValues {
 public:
  LatexValues(const std::vector<proof::Symbol>& symbols, const LatexNames& names)
      : symbols_(symbols), names_(names) {}

  [[nodiscard]] Formula polynomial(const proof::Polynomial& value);
  /// A product; without brackets when it is one polynomial and `as_sum`.
  [[nodiscard]] Formula factored(const proof::Factored& value, bool as_sum = true);
  [[nodiscard]] Formula affine(const proof::Affine& value) const;
  /// A fraction of factorials and powers times the coefficient.
  [[nodiscard]] Formula product(const proof::Product& value);
  [[nodiscard]] Formula atom(const proof::Atom& value);

  /// Whether a factored value prints as a sum of several terms (and needs brackets as a factor).
  [[nodiscard]] static bool is_sum(const proof::Factored& value);

  /// How many polynomials were abbreviated so far.
  [[nodiscard]] std::size_t abbreviated() const { return abbreviated_; }

 private:
  /// Factors of a fraction: what stands above and below.
  struct Fraction {
    Formula above;
    Formula below;
  };

  [[nodiscard]] Piece symbol(std::size_t position) const;
  [[nodiscard]] Formula monomial(const proof::Monomial& value) const;
  [[nodiscard]] Formula shortened(const proof::Polynomial& value) const;
  [[nodiscard]] Formula factor(const proof::Polynomial& base, long exponent);
  [[nodiscard]] Formula interval(const proof::Atom& value);
  [[nodiscard]] Formula power(const proof::Atom& value);
  void add_atom(Fraction& out, const proof::Atom& value, unsigned exponent);

  const std::vector<proof::Symbol>& symbols_;
  const LatexNames& names_;
  double room_ = 1200;  ///< em of long polynomials still to be shown in full: about two pages
  std::size_t abbreviated_ = 0;
};

/// An integer; long ones in pieces between which lines may be broken.
[[nodiscard]] Formula integer_formula(const mpz_class& value);

}  // namespace sumwright::writers
