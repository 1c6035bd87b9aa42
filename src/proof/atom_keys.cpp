// Sorting a product's atoms into groups that the laws can bring together, and the base of such
// groups: rfact at its largest shift, fact at its smallest, powers at the smallest exponent,
// interval products at the shortest, reciprocal interval products at the longest, denominators at
// the highest power.

#include "proof/atom_keys.hpp"

#include <algorithm>
#include <stdexcept>

namespace sumwright::proof::building {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;
using term::Affine;
using term::Atom;
using term::AtomKind;
using term::Product;

namespace {

constexpr long largest_literal = 5000;
constexpr long longest_expanded = 40;

IntervalKey interval_key(const Atom& atom) {
  return {atom.base, atom.scale, atom.low.coefficients, atom.high.coefficients,
          atom.kind == AtomKind::reciprocal_interval_product};
}

void check_literal(const mpz_class& size) {
  if (abs(size) > largest_literal) throw std::length_error("a literal factorial is too large");
}

template <typename Map>
std::set<typename Map::key_type, typename Map::key_compare> all_keys(
    const std::vector<AtomGroups>& groups, Map AtomGroups::*member) {
  std::set<typename Map::key_type, typename Map::key_compare> out;
  for (const AtomGroups& g : groups)
    for (const auto& [key, value] : g.*member) out.insert(key);
  return out;
}

bool base_factorials(const RingPtr& ring, const std::vector<AtomGroups>& groups, Product& base,
                     std::string& why) {
  for (const std::vector<long>& key : all_keys(groups, &AtomGroups::factorials)) {
    std::vector<FactorialConstants> parts;
    for (const AtomGroups& g : groups) parts.push_back(g.constants(key));
    for (const FactorialConstants& part : parts)
      if (static_cast<long>(part.fact.size()) - static_cast<long>(part.rfact.size()) !=
          static_cast<long>(parts[0].fact.size()) - static_cast<long>(parts[0].rfact.size())) {
        why = "terms that are similar only through a relation between different factorials";
        return false;
      }
    const FactorialConstants common = common_constants(parts);
    for (long c : common.fact) base.multiply(term::factorial_atom(ring, Affine{key, c}));
    for (long c : common.rfact)
      base.multiply(term::reciprocal_factorial_atom(ring, Affine{key, c}));
  }
  return true;
}

bool base_powers(const std::vector<AtomGroups>& groups, Product& base, std::string& why) {
  for (const Polynomial& b : all_keys(groups, &AtomGroups::powers)) {
    std::optional<Affine> least;
    for (const AtomGroups& g : groups) {
      const auto it = g.powers.find(b);
      if (it == g.powers.end()) {
        why = "powers of " + b.to_string() + " occur in one of two similar terms only";
        return false;
      }
      if (!least || it->second.constant < least->constant) least = it->second;
    }
    base.multiply(term::power_atom(b, *least));
  }
  return true;
}

bool base_intervals(const std::vector<AtomGroups>& groups, Product& base, std::string& why) {
  for (const IntervalKey& key : all_keys(groups, &AtomGroups::intervals)) {
    std::vector<Atom> common;
    for (const AtomGroups& g : groups) {
      const auto it = g.intervals.find(key);
      if (it == g.intervals.end() || (!common.empty() && it->second.size() != common.size())) {
        why = "interval products occur in one of two similar terms only";
        return false;
      }
      if (common.empty()) common = it->second;
      for (std::size_t i = 0; i < common.size(); ++i) {
        const Atom& atom = it->second[i];
        long& low = common[i].low.constant;
        long& high = common[i].high.constant;
        low = key.reciprocal ? std::min(low, atom.low.constant) : std::max(low, atom.low.constant);
        high = key.reciprocal ? std::max(high, atom.high.constant)
                              : std::min(high, atom.high.constant);
      }
    }
    for (const Atom& atom : common) base.multiply(atom);
  }
  return true;
}

}  // namespace

namespace {

bool has_literal_length(const Atom& atom) {
  if (atom.kind != AtomKind::reciprocal_interval_product) return false;
  const Affine length = atom.high - atom.low;
  return length.is_constant() && length.constant > 0 && length.constant <= longest_expanded;
}

}  // namespace

AtomGroups::AtomGroups(const RingPtr& ring, const Product& product) {
  (void)ring;
  for (const auto& [atom, exponent] : product.atoms) {
    if (is_literal(atom)) {
      literals.emplace_back(atom, exponent);
      continue;
    }
    if (has_literal_length(atom)) {
      expanded.emplace_back(atom, exponent);
      for (const Atom& one : expanded_reciprocal(atom).reciprocals)
        reciprocals[one.base] += exponent;
      continue;
    }
    switch (atom.kind) {
      case AtomKind::factorial: {
        auto& list = factorials[atom.argument.coefficients].fact;
        list.insert(list.end(), exponent, atom.argument.constant);
        std::sort(list.begin(), list.end());
        break;
      }
      case AtomKind::reciprocal_factorial: {
        auto& list = factorials[atom.argument.coefficients].rfact;
        list.insert(list.end(), exponent, atom.argument.constant);
        std::sort(list.begin(), list.end());
        break;
      }
      case AtomKind::power:
        powers.emplace(atom.base, static_cast<long>(exponent) * atom.argument);
        break;
      case AtomKind::interval_product:
      case AtomKind::reciprocal_interval_product: {
        auto& list = intervals[interval_key(atom)];
        list.insert(list.end(), exponent, atom);
        break;
      }
      case AtomKind::reciprocal:
        reciprocals[atom.base] += exponent;
        break;
    }
  }
}

FactorialConstants AtomGroups::constants(const std::vector<long>& key) const {
  const auto it = factorials.find(key);
  return it == factorials.end() ? FactorialConstants{} : it->second;
}

bool is_literal(const Atom& atom) {
  switch (atom.kind) {
    case AtomKind::factorial:
    case AtomKind::reciprocal_factorial:
      return atom.argument.is_constant();
    case AtomKind::power:
      return atom.argument.is_constant() &&
             (atom.base.is_constant() || atom.argument.constant >= 0);
    case AtomKind::interval_product: {
      const Affine length = atom.high - atom.low;
      return length.is_constant() && length.constant >= 0;
    }
    case AtomKind::reciprocal_interval_product:
      return atom.high == atom.low;
    case AtomKind::reciprocal:
      return atom.base.is_constant();
  }
  return false;
}

Factored literal_value(const RingPtr& ring, const Atom& atom) {
  Factored out;
  const long c = atom.argument.constant;
  switch (atom.kind) {
    case AtomKind::factorial:
    case AtomKind::reciprocal_factorial: {
      if (c < 0) {
        if (atom.kind == AtomKind::factorial)
          throw std::logic_error("factorial of a negative number");
        out.constant = 0;
        return out;
      }
      check_literal(c);
      const mpz_class value = mpz_class::factorial(static_cast<unsigned long>(c));
      out.constant = atom.kind == AtomKind::factorial ? mpq_class(value) : mpq_class(1, value);
      return out;
    }
    case AtomKind::power:
      check_literal(c);
      out.multiply(atom.base, c);
      return out;
    case AtomKind::interval_product: {
      const long length = (atom.high - atom.low).constant;
      check_literal(length);
      for (long t = 0; t < length; ++t) {
        const Polynomial factor = term::interval_factor(atom, atom.low + t);
        if (factor.is_zero()) {
          out.constant = 0;
          return out;
        }
        out.multiply(factor, 1);
        out.constant /= atom.scale;
      }
      return out;
    }
    case AtomKind::reciprocal_interval_product:
      return out;
    case AtomKind::reciprocal:
      if (atom.base.is_zero()) throw std::domain_error("a denominator vanishes");
      out.multiply(atom.base, -1);
      return out;
  }
  (void)ring;
  return out;
}

Expanded expanded_reciprocal(const Atom& atom) {
  Expanded out;
  for (Affine t = atom.low; t.constant < atom.high.constant; t = t + 1) {
    const Polynomial factor = term::interval_factor(atom, t);
    if (factor.is_zero()) throw std::domain_error("a denominator vanishes");
    const Polynomial primitive = factor.primitive_part();
    mpq_class scale(atom.scale * primitive.leading_coefficient(), factor.leading_coefficient());
    scale.canonicalize();
    out.constant *= scale;
    if (!primitive.is_constant())
      out.reciprocals.push_back(term::reciprocal_atom(factor.ring(), primitive));
  }
  return out;
}

Factored rising_factors(const RingPtr& ring, const Affine& form, long count) {
  Factored out;
  for (long t = 1; t <= count; ++t) out.multiply((form + t).polynomial(ring), 1);
  return out;
}

Factored interval_factors(const Atom& atom, const Affine& from, const Affine& to) {
  Factored out;
  for (Affine t = from; t.constant < to.constant; t = t + 1) {
    out.multiply(term::interval_factor(atom, t), 1);
    out.constant /= atom.scale;
  }
  return out;
}

std::optional<Product> base_of(const RingPtr& ring, const std::vector<AtomGroups>& groups,
                               std::string& why) {
  Product base;
  if (!base_factorials(ring, groups, base, why) || !base_powers(groups, base, why) ||
      !base_intervals(groups, base, why))
    return std::nullopt;
  for (const Polynomial& p : all_keys(groups, &AtomGroups::reciprocals)) {
    unsigned most = 0;
    for (const AtomGroups& g : groups) {
      const auto it = g.reciprocals.find(p);
      if (it != g.reciprocals.end()) most = std::max(most, it->second);
    }
    base.multiply(term::reciprocal_atom(ring, p), most);
  }
  return base;
}

}  // namespace sumwright::proof::building
