// The atoms of a product sorted by what can be brought together: the view that similarity works on.
#pragma once

#include <map>
#include <optional>
#include <set>
#include <string>
#include <tuple>
#include <vector>

#include "proof/alignment.hpp"
#include "term/product.hpp"

namespace sumwright::proof::building {

struct PolynomialLess {
  bool operator()(const algebra::Polynomial& a, const algebra::Polynomial& b) const {
    return algebra::compare(a, b) < 0;
  }
};

/// Interval products with one a, one pair of linear parts, one orientation.
struct IntervalKey {
  algebra::Polynomial base;
  mpz_class scale;
  std::vector<long> low;
  std::vector<long> high;
  bool reciprocal = false;
  bool operator<(const IntervalKey& other) const {
    if (int c = algebra::compare(base, other.base); c != 0) return c < 0;
    return std::tie(scale, low, high, reciprocal) <
           std::tie(other.scale, other.low, other.high, other.reciprocal);
  }
};

/// A product's atoms by kind and key. Literal atoms (values known without symbols) are apart.
struct AtomGroups {
  AtomGroups(const algebra::RingPtr& ring, const term::Product& product);

  std::map<std::vector<long>, FactorialConstants> factorials;
  std::map<algebra::Polynomial, term::Affine, PolynomialLess> powers;
  std::map<IntervalKey, std::vector<term::Atom>> intervals;  ///< sorted by (low, high)
  std::map<algebra::Polynomial, unsigned, PolynomialLess> reciprocals;
  std::vector<std::pair<term::Atom, unsigned>> literals;
  /// Reciprocal interval products of literal length > 0; what they stand for is in `reciprocals`.
  std::vector<std::pair<term::Atom, unsigned>> expanded;

  [[nodiscard]] FactorialConstants constants(const std::vector<long>& key) const;
};

/// An atom whose value needs no law: factorials of numbers, numeric bases to literal exponents,
/// interval products of literal length >= 0, reciprocals of constants.
[[nodiscard]] bool is_literal(const term::Atom& atom);
/// Its value: a polynomial with a rational constant (0 for rfact of a negative number).
[[nodiscard]] algebra::Factored literal_value(const algebra::RingPtr& ring, const term::Atom& atom);

/// 1/(a+i) ... 1/(a+j-1) of a reciprocal interval product of literal length as constant * product
/// of reciprocals of primitive polynomials. Throws std::domain_error when a factor is 0.
struct Expanded {
  mpq_class constant = 1;
  std::vector<term::Atom> reciprocals;
};
[[nodiscard]] Expanded expanded_reciprocal(const term::Atom& atom);

/// The linear factors that a law gives when it is applied several times:
/// (form + 1) ... (form + count), and for an interval atom's a: (a + t) for from <= t < to, where
/// from and to differ by a constant.
[[nodiscard]] algebra::Factored rising_factors(const algebra::RingPtr& ring,
                                               const term::Affine& form, long count);
[[nodiscard]] algebra::Factored interval_factors(const term::Atom& atom, const term::Affine& from,
                                                 const term::Affine& to);

/// The base of products grouped so (they must be similar).
[[nodiscard]] std::optional<term::Product> base_of(const algebra::RingPtr& ring,
                                                   const std::vector<AtomGroups>& groups,
                                                   std::string& why);

template <typename Map>
[[nodiscard]] std::vector<typename Map::key_type> merged_keys(const Map& a, const Map& b) {
  std::vector<typename Map::key_type> out;
  for (const auto& [key, value] : a) out.push_back(key);
  for (const auto& [key, value] : b)
    if (!a.contains(key)) out.push_back(key);
  return out;
}

}  // namespace sumwright::proof::building
