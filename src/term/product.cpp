// Products of atoms: canonical order, shifts, substitution, quotients as rational functions.
// Invariant: atoms sorted by `compare`, pairwise different, exponents > 0; at most one power per
// base. Quotients: every factorial and interval product is a quotient of Gamma values at arguments
// a + lambda + c (a: non-integer part, lambda: linear part); two products are similar when the net
// exponents of each (a, lambda) agree and the exponents of powers differ by constants.

#include "term/product.hpp"

#include <algorithm>
#include <map>
#include <stdexcept>

namespace sumwright::term {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;

namespace {

constexpr long largest_gap = 20000;  // shifts beyond this would make unusable polynomials

/// Gamma(a + lambda + c): a = base / scale.
struct GammaKey {
  Polynomial base;
  mpz_class scale;
  std::vector<long> linear;

  bool operator<(const GammaKey& other) const {
    if (int c = algebra::compare(base, other.base); c != 0) return c < 0;
    if (scale != other.scale) return scale < other.scale;
    return linear < other.linear;
  }
};

using GammaExponents = std::map<GammaKey, std::map<long, long>>;  // key -> constant c -> exponent

struct PolynomialLess {
  bool operator()(const Polynomial& a, const Polynomial& b) const {
    return algebra::compare(a, b) < 0;
  }
};

/// A product at the level of functions.
struct Signature {
  Factored rational;  ///< what is plainly rational
  GammaExponents gammas;
  std::map<Polynomial, Affine, PolynomialLess> powers;
};

void add_gamma(Signature& s, const Polynomial& base, const mpz_class& scale, const Affine& at,
               long exponent) {
  long& entry = s.gammas[GammaKey{base, scale, at.coefficients}][at.constant];
  entry += exponent;
}

void add_atom(const RingPtr& ring, Signature& s, const Atom& atom, long e) {
  switch (atom.kind) {
    case AtomKind::factorial:
      add_gamma(s, Polynomial(ring), 1, atom.argument + 1, e);
      return;
    case AtomKind::reciprocal_factorial:
      add_gamma(s, Polynomial(ring), 1, atom.argument + 1, -e);
      return;
    case AtomKind::power: {
      auto [it, fresh] = s.powers.try_emplace(atom.base, e * atom.argument);
      if (!fresh) it->second = it->second + e * atom.argument;
      return;
    }
    case AtomKind::interval_product:
    case AtomKind::reciprocal_interval_product: {
      const long sign = atom.kind == AtomKind::interval_product ? e : -e;
      add_gamma(s, atom.base, atom.scale, atom.high, sign);
      add_gamma(s, atom.base, atom.scale, atom.low, -sign);
      return;
    }
    case AtomKind::reciprocal:
      s.rational.multiply(atom.base, -e);
      return;
  }
}

void add_product(const RingPtr& ring, Signature& s, const Product& product, long sign) {
  s.rational.multiply(product.coefficient, sign);
  for (const auto& [atom, exponent] : product.atoms)
    add_atom(ring, s, atom, sign * static_cast<long>(exponent));
}

/// Gamma(z + from) -> Gamma(z + to): multiplies by the product of (z + t), from <= t < to (or its
/// inverse).
void multiply_gap(const RingPtr& ring, Factored& out, const GammaKey& key, long from, long to,
                  long exponent) {
  if (from > to) {
    std::swap(from, to);
    exponent = -exponent;
  }
  if (to - from > largest_gap) throw std::length_error("factorial arguments too far apart");
  for (long t = from; t < to; ++t) {
    const Polynomial integer_part = Affine{key.linear, t}.polynomial(ring);
    out.multiply(key.base + Polynomial(ring, key.scale) * integer_part, exponent);
    if (key.scale != 1) out.multiply(Polynomial(ring, key.scale), -exponent);
  }
}

/// The rational function that a signature is, if all transcendental parts cancel.
std::optional<Factored> rational_value(const RingPtr& ring, const Signature& s) {
  Factored out = s.rational;
  for (const auto& [base, exponent] : s.powers) {
    if (!exponent.is_constant()) return std::nullopt;
    if (exponent.constant != 0) out.multiply(base, exponent.constant);
  }
  for (const auto& [key, exponents] : s.gammas) {
    long net = 0;
    for (const auto& [constant, e] : exponents) net += e;
    const bool numeric =
        std::all_of(key.linear.begin(), key.linear.end(), [](long c) { return c == 0; }) &&
        key.base.is_zero();
    if (net != 0 && !numeric) return std::nullopt;
    // Walk up the constants, carrying the running exponent across each gap.
    long carried = 0;
    long previous = exponents.begin()->first;
    if (numeric) {
      // Gamma(c) = (c-1)! relative to Gamma(1) = 1. At c <= 0 only quotients have values: those are
      // taken relative to c = 0, and their exponents must add up to 0.
      long below = 0;
      for (const auto& [constant, e] : exponents) {
        if (e == 0) continue;
        if (constant <= 0) below += e;
        multiply_gap(ring, out, key, constant <= 0 ? 0 : 1, constant, e);
      }
      if (below != 0) return std::nullopt;
      continue;
    }
    for (const auto& [constant, e] : exponents) {
      if (carried != 0) multiply_gap(ring, out, key, previous, constant, -carried);
      carried += e;
      previous = constant;
    }
  }
  return out;
}

Affine zero_like(const RingPtr& ring) { return Affine::zero(ring->size()); }

}  // namespace

Atom factorial_atom(const RingPtr& ring, const Affine& argument) {
  return {AtomKind::factorial, argument, Polynomial(ring), 1, zero_like(ring), zero_like(ring)};
}

Atom reciprocal_factorial_atom(const RingPtr& ring, const Affine& argument) {
  return {AtomKind::reciprocal_factorial,
          argument,
          Polynomial(ring),
          1,
          zero_like(ring),
          zero_like(ring)};
}

Atom power_atom(const Polynomial& base, const Affine& exponent) {
  return {AtomKind::power, exponent, base, 1, zero_like(base.ring()), zero_like(base.ring())};
}

Atom interval_atom(const Polynomial& base, const mpz_class& scale, const Affine& low,
                   const Affine& high, bool reciprocal) {
  return {reciprocal ? AtomKind::reciprocal_interval_product : AtomKind::interval_product,
          zero_like(base.ring()),
          base,
          scale,
          low,
          high};
}

Atom reciprocal_atom(const RingPtr& ring, const Polynomial& p) {
  return {AtomKind::reciprocal, zero_like(ring), p, 1, zero_like(ring), zero_like(ring)};
}

int compare(const Atom& a, const Atom& b) {
  if (a.kind != b.kind) return a.kind < b.kind ? -1 : 1;
  if (int c = algebra::compare(a.base, b.base); c != 0) return c;
  if (a.scale != b.scale) return a.scale < b.scale ? -1 : 1;
  const auto forms = [](const Atom& x) { return std::tie(x.argument, x.low, x.high); };
  if (forms(a) < forms(b)) return -1;
  if (forms(b) < forms(a)) return 1;
  return 0;
}

bool operator==(const Atom& a, const Atom& b) { return compare(a, b) == 0; }

namespace {

void insert(std::vector<std::pair<Atom, unsigned>>& atoms, const Atom& atom, unsigned exponent) {
  const auto place = std::lower_bound(
      atoms.begin(), atoms.end(), atom,
      [](const auto& entry, const Atom& value) { return compare(entry.first, value) < 0; });
  if (place != atoms.end() && place->first == atom)
    place->second += exponent;
  else
    atoms.insert(place, {atom, exponent});
}

/// One power per base, its exponent all in the argument: (b^L)^e is b^(e L).
void insert_power(std::vector<std::pair<Atom, unsigned>>& atoms, Atom atom, unsigned exponent) {
  atom.argument = static_cast<long>(exponent) * atom.argument;
  const auto known = std::find_if(atoms.begin(), atoms.end(), [&](const auto& entry) {
    return entry.first.kind == AtomKind::power && entry.first.base == atom.base;
  });
  if (known != atoms.end()) {
    atom.argument = static_cast<long>(known->second) * known->first.argument + atom.argument;
    atoms.erase(known);
    if (atom.argument.is_constant() && atom.argument.constant == 0) return;
  }
  insert(atoms, atom, 1);
}

}  // namespace

void Product::multiply(const Atom& atom, unsigned exponent) {
  if (exponent == 0) return;
  if (atom.kind == AtomKind::power)
    insert_power(atoms, atom, exponent);
  else
    insert(atoms, atom, exponent);
}

void Product::multiply(const Product& other, unsigned exponent) {
  if (exponent == 0) return;
  coefficient.multiply(other.coefficient, exponent);
  const auto copy = other.atoms;  // other may be *this
  for (const auto& [atom, e] : copy) multiply(atom, e * exponent);
}

Atom shift(const Atom& atom, std::size_t symbol, long by) {
  Atom out = atom;
  out.argument = atom.argument.shift(symbol, by);
  out.low = atom.low.shift(symbol, by);
  out.high = atom.high.shift(symbol, by);
  if (atom.kind == AtomKind::reciprocal) out.base = atom.base.shift(symbol, by);
  return out;
}

Product shift(const Product& product, std::size_t symbol, long by) {
  Product out;
  out.coefficient = product.coefficient.shift(symbol, by);
  for (const auto& [atom, exponent] : product.atoms)
    out.multiply(shift(atom, symbol, by), exponent);
  return out;
}

Atom substitute(const RingPtr& ring, const Atom& atom, std::size_t symbol, const Affine& value) {
  Atom out = atom;
  out.argument = atom.argument.substitute(symbol, value);
  out.low = atom.low.substitute(symbol, value);
  out.high = atom.high.substitute(symbol, value);
  if (atom.kind == AtomKind::reciprocal)
    out.base = atom.base.substitute(symbol, value.polynomial(ring));
  return out;
}

Product substitute(const RingPtr& ring, const Product& product, std::size_t symbol,
                   const Affine& value) {
  Product out;
  out.coefficient = product.coefficient.substitute(symbol, value.polynomial(ring));
  for (const auto& [atom, exponent] : product.atoms)
    out.multiply(substitute(ring, atom, symbol, value), exponent);
  return out;
}

Polynomial interval_factor(const Atom& atom, const Affine& t) {
  const RingPtr& ring = atom.base.ring();
  return atom.base + Polynomial(ring, atom.scale) * t.polynomial(ring);
}

std::optional<Factored> ratio(const RingPtr& ring, const Product& a, const Product& b) {
  Signature s;
  add_product(ring, s, a, 1);
  add_product(ring, s, b, -1);
  return rational_value(ring, s);
}

Factored shift_quotient(const RingPtr& ring, const Product& product, std::size_t symbol) {
  Signature s;
  add_product(ring, s, shift(product, symbol, 1), 1);
  add_product(ring, s, product, -1);
  const std::optional<Factored> value = rational_value(ring, s);
  if (!value) throw std::logic_error("a product of atoms must be hypergeometric");
  return *value;
}

}  // namespace sumwright::term
