// Plain, prover-neutral data that a Proof is made of: polynomials, affine forms, atoms, products.
//
// Nothing here computes; writers print these values and the audit re-derives them with other
// arithmetic. Symbols are referred to by position in Proof::symbols: 0 is the running variable,
// 1 the summation index (unused when the claim has none), the rest the parameters in file order.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <optional>
#include <string>
#include <utility>
#include <vector>

namespace sumwright::proof {

enum class SymbolKind { running, index, integer_parameter, rational_parameter };

struct Symbol {
  std::string name;
  SymbolKind kind = SymbolKind::running;
};

/// coefficient * product of symbol_i ^ exponents[i]; exponents has one entry per symbol.
struct Monomial {
  mpz_class coefficient;
  std::vector<unsigned long> exponents;
};

/// A polynomial over Z, terms in descending lexicographic order of exponents; empty: 0.
struct Polynomial {
  std::vector<Monomial> terms;
};

/// constant * product of factors; factors are irreducible over Q unless said otherwise.
/// Negative exponents occur only where a rational function is meant.
struct Factored {
  mpq_class constant = 1;
  std::vector<std::pair<Polynomial, long>> factors;
};

/// sum coefficients[i] symbol_i + constant; only integer symbols have nonzero coefficients.
struct Affine {
  std::vector<long> coefficients;
  long constant = 0;
};

/// The building blocks of base terms. L, i, j are affine.
enum class AtomKind {
  factorial,             ///< fact(L): L!, used only where L >= 0
  reciprocal_factorial,  ///< rfact(L): 1/L! for L >= 0, 0 for L < 0
  power,             ///< base ^ L (zpow); base a prime, -1, or irreducible in rational parameters
  interval_product,  ///< ip(a; i, j) = product of (a+t) for i <= t < j
  reciprocal_interval_product,  ///< 1 / ip(a; i, j)
  reciprocal                    ///< 1 / P, P a polynomial in any symbols
};

struct Atom {
  AtomKind kind = AtomKind::factorial;
  Affine argument;           ///< L: factorial, reciprocal_factorial; the exponent for power
  Polynomial base;           ///< power: the base; reciprocal: P; interval products: numerator of a
  mpz_class base_scale = 1;  ///< interval products: a = base / base_scale
  Affine low;                ///< interval products: i
  Affine high;               ///< interval products: j
};

/// coefficient * product of atom ^ exponent (exponents > 0, atoms pairwise different).
/// The coefficient has only nonnegative exponents.
struct Product {
  Factored coefficient;
  std::vector<std::pair<Atom, unsigned>> atoms;
};

/// Where a statement is claimed: the listed affine forms are all >= 0 (besides the hypotheses of
/// the claim), as text for readers and as data for provers.
struct Region {
  std::vector<Affine> nonnegative;
  std::string text;  ///< "n >= 2, 0 <= k <= n + 1"
};

/// Why a polynomial is nonzero on a region, factor by factor.
struct NonzeroFactor {
  enum class Method {
    constant,  ///< a nonzero number
    linear,    ///< affine in integer symbols; linear integer arithmetic on the region
    positive,  ///< every coefficient is >= 0 and the constant one > 0 after symbol := symbol +
               ///< shift
    excluded,  ///< scale * (x - value): excluded by entry `exclusion` of rational parameter x
    assumed    ///< entry `assumption` of `assume`, u != v: u - v = scale * factor
  };
  Polynomial factor;
  long exponent = 1;
  Method method = Method::linear;
  std::vector<long> shift;  ///< positive: per symbol, its lower bound
  Polynomial shifted;    ///< positive: +-factor in the variables symbol - shift, coefficients >= 0
  bool negated = false;  ///< positive: the factor is minus a positive polynomial
  std::size_t parameter = 0;  ///< excluded: symbol position of x
  std::size_t exclusion = 0;  ///< excluded: index in Parameter::excluded
  Affine value;               ///< excluded by an integer word: factor = scale * (x - value)
  mpz_class scale = 1;
  std::size_t assumption = 0;
};

struct Nonzero {
  Factored polynomial;  ///< what is nonzero: constant * product of the factors
  std::vector<NonzeroFactor> factors;
  std::string condition;  ///< id of the Condition that records it
};

/// A pair of atoms whose product is 1 where its condition holds: fact(L) rfact(L) with L >= 0;
/// ip * 1/ip, P * 1/P with a nonvanishing condition; b^L b^-L with b nonzero.
struct Unit {
  Atom left;
  Atom right;  ///< for `reciprocal` in `right`, the left side is the polynomial right.base
  unsigned exponent = 1;
  std::string condition;           ///< id of the Condition
  std::optional<Nonzero> nonzero;  ///< when the condition is a nonvanishing one
};

}  // namespace sumwright::proof
