// Hypergeometric terms as products of atoms, and what can be read off them as functions.
//
// Atoms are the functions of the design: fact(L), rfact(L), powers, interval products
// ip(a; i, j) = product of (a + t), i <= t < j, their reciprocals, and 1/P. At the level of
// rational functions (this file) fact(L) rfact(L) = 1 always; at integer points the proof stage
// adds conditions.
#pragma once

#include <optional>
#include <utility>
#include <vector>

#include "algebra/polynomial.hpp"
#include "algebra/rational_function.hpp"
#include "proof/value.hpp"
#include "term/affine.hpp"

namespace sumwright::term {

using proof::AtomKind;

struct Atom {
  AtomKind kind = AtomKind::factorial;
  Affine argument;           ///< L, or the exponent of a power
  algebra::Polynomial base;  ///< power: base; reciprocal: P; interval products: numerator of a
  mpz_class scale = 1;       ///< interval products: a = base / scale
  Affine low;                ///< interval products: i
  Affine high;               ///< interval products: j
};

[[nodiscard]] Atom factorial_atom(const algebra::RingPtr& ring, const Affine& argument);
[[nodiscard]] Atom reciprocal_factorial_atom(const algebra::RingPtr& ring, const Affine& argument);
[[nodiscard]] Atom power_atom(const algebra::Polynomial& base, const Affine& exponent);
[[nodiscard]] Atom interval_atom(const algebra::Polynomial& base, const mpz_class& scale,
                                 const Affine& low, const Affine& high, bool reciprocal);
[[nodiscard]] Atom reciprocal_atom(const algebra::RingPtr& ring, const algebra::Polynomial& p);

/// Total order on atoms, for canonical sorting and equality.
[[nodiscard]] int compare(const Atom& a, const Atom& b);
[[nodiscard]] bool operator==(const Atom& a, const Atom& b);

/// coefficient * product of atoms; the coefficient is a polynomial in factored form over Z
/// (exponents >= 0, integer constant). Atoms sorted, different, exponents > 0.
struct Product {
  algebra::Factored coefficient;
  std::vector<std::pair<Atom, unsigned>> atoms;

  /// Multiplies by atom ^ exponent and keeps the canonical order. Powers of equal base merge.
  void multiply(const Atom& atom, unsigned exponent = 1);
  void multiply(const Product& other, unsigned exponent = 1);
  [[nodiscard]] bool is_zero() const { return coefficient.constant == 0; }
};

/// symbol := symbol + by in every atom and in the coefficient.
[[nodiscard]] Atom shift(const Atom& atom, std::size_t symbol, long by);
[[nodiscard]] Product shift(const Product& product, std::size_t symbol, long by);
/// symbol := value.
[[nodiscard]] Atom substitute(const algebra::RingPtr& ring, const Atom& atom, std::size_t symbol,
                              const Affine& value);
[[nodiscard]] Product substitute(const algebra::RingPtr& ring, const Product& product,
                                 std::size_t symbol, const Affine& value);

/// a + t as a polynomial with its scale: (base + scale * t) / scale.
[[nodiscard]] algebra::Polynomial interval_factor(const Atom& atom, const Affine& t);

/// a / b as a rational function in factored form when the two are similar (their quotient is
/// rational), else nothing. Neither may be 0.
[[nodiscard]] std::optional<algebra::Factored> ratio(const algebra::RingPtr& ring, const Product& a,
                                                     const Product& b);

/// The quotient product(symbol + 1) / product, a rational function in factored form.
[[nodiscard]] algebra::Factored shift_quotient(const algebra::RingPtr& ring, const Product& product,
                                               std::size_t symbol);

}  // namespace sumwright::term
