// From the author's expression to a sum of products of atoms: the canonical form of a term.
//
// Each function call or symbolic power is a leaf with a rule and the conditions under which the
// rule holds; each author's denominator gets its reciprocal. What is not hypergeometric is refused,
// naming the factor. Canonical: binomial(n,k) and factorial(n)/(factorial(k)*factorial(n-k)) give
// one product.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "algebra/rational_function.hpp"
#include "claim/claim.hpp"
#include "proof/proof.hpp"
#include "term/product.hpp"
#include "term/setting.hpp"

namespace sumwright::term {

/// A condition met on the way: a form >= 0, or a polynomial != 0, and whether the facts settle it.
struct Requirement {
  proof::ConditionKind kind = proof::ConditionKind::factorial_argument;
  std::optional<Affine> nonnegative;
  std::optional<algebra::Factored> nonzero;
  std::optional<proof::Nonzero> why;  ///< set when a nonvanishing is settled
  bool settled = false;
  claim::Place place;  ///< of the expression that needs it
};

struct Leaf {
  claim::ExpressionPtr expression;
  proof::LeafRule rule = proof::LeafRule::factorial;
  Product value;
  std::vector<Requirement> requirements;
};

/// Two atoms whose product is 1, `exponent` times; for 1/P: left unused, right = 1/P.
struct Unit {
  Atom left;
  Atom right;
  unsigned exponent = 1;
  Requirement requirement;
};

struct Denominator {
  claim::ExpressionPtr node;
  claim::ExpressionPtr expression;
  Product as_product;
  Product reciprocal;
  std::vector<Unit> units;
};

/// Two powers of one base that met in a product: base^sum = base^first * base^second.
struct PowerMerge {
  algebra::Polynomial base;
  Affine first;
  Affine second;
  std::vector<Requirement>
      requirements;  ///< none for numeric bases; else both exponents >= 0, or base != 0
};

struct Conversion {
  claim::ExpressionPtr expression;
  std::vector<PowerMerge> merges;  ///< in the order in which they happened
  std::vector<Leaf> leaves;
  std::vector<Denominator> denominators;
  std::vector<Product> products;             ///< not similar in general (closed forms)
  std::vector<std::vector<Unit>> cancelled;  ///< per product
  std::vector<Requirement> definedness;      ///< domains of calls and nonzero denominators

  /// The first condition that the facts do not settle.
  [[nodiscard]] const Requirement* open() const;
};

/// Converts on the region given by `facts`. Throws claim::InputError for expressions that are not
/// sums of hypergeometric terms; std::length_error when the expansion grows past its limits.
[[nodiscard]] Conversion convert(const Setting& setting, const Facts& facts,
                                 const claim::ExpressionPtr& expression);

/// A rational function of the symbols: literals, symbols, + - * / and literal powers only; nothing
/// when the expression is of another kind. Throws claim::InputError on a division by 0.
[[nodiscard]] std::optional<algebra::RationalFunction> to_rational_function(
    const Setting& setting, const claim::Expression& expression);

/// constant / divisor as atoms: integer constants become negative powers of primes.
void divide_by_constant(Product& product, const algebra::RingPtr& ring, const mpz_class& divisor);

/// Plain copies for the Proof value.
[[nodiscard]] proof::Atom plain(const Atom& atom);
[[nodiscard]] proof::Product plain(const Product& product);

}  // namespace sumwright::term
