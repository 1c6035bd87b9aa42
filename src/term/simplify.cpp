// Readable forms of right sides: from base term and rational factor to factorials of larger
// arguments.

#include "term/simplify.hpp"

#include <algorithm>

namespace sumwright::term {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;

namespace {

constexpr int most_rounds = 64;

/// Takes one factor proportional to `form` out of `rational` (to the power `sign`), if it is there.
bool take(Factored& rational, const Polynomial& form, long sign) {
  if (form.is_constant()) return false;
  const Polynomial primitive = form.primitive_part();
  for (const auto& [p, e] : rational.factors) {
    if (!(p == primitive) || (sign > 0) != (e > 0)) continue;
    rational.multiply(form, -sign);
    return true;
  }
  return false;
}

/// How far one factor of `rational` moves the atom: +1 by L + 1, -1 by L under a reciprocal
/// factorial; 0 when there is none.
long taken_step(const RingPtr& ring, Factored& rational, const Atom& atom) {
  const Polynomial next = (atom.argument + 1).polynomial(ring);
  if (atom.kind == AtomKind::factorial) return take(rational, next, 1) ? 1 : 0;
  if (atom.kind != AtomKind::reciprocal_factorial) return 0;
  if (take(rational, next, -1)) return 1;
  return take(rational, atom.argument.polynomial(ring), 1) ? -1 : 0;
}

/// L!/L! is 1; false when no such pair is there.
bool cancel_one(Product& product) {
  for (const auto& [atom, e] : product.atoms) {
    if (atom.kind != AtomKind::factorial) continue;
    Atom other = atom;
    other.kind = AtomKind::reciprocal_factorial;
    const auto below = std::find_if(product.atoms.begin(), product.atoms.end(),
                                    [&](const auto& entry) { return entry.first == other; });
    if (below == product.atoms.end()) continue;
    const unsigned both = std::min(e, below->second);
    const Atom above = atom;
    Product out;
    out.coefficient = product.coefficient;
    for (const auto& [one, count] : product.atoms)
      out.multiply(one, one == above || one == other ? count - both : count);
    product = std::move(out);
    return true;
  }
  return false;
}

/// One atom moved by one; false when none can be.
bool move_one(const RingPtr& ring, Factored& rational, Product& product) {
  for (const auto& [atom, e] : product.atoms) {
    const long step = taken_step(ring, rational, atom);
    if (step == 0) continue;
    Atom moved = atom;
    moved.argument = atom.argument + step;
    const Atom old = atom;
    Product out;
    out.coefficient = product.coefficient;
    for (const auto& [other, count] : product.atoms)
      out.multiply(other, other == old ? count - 1 : count);
    out.multiply(moved);
    product = std::move(out);
    return true;
  }
  return false;
}

}  // namespace

void simplify(const RingPtr& ring, Factored& rational, Product& product) {
  Product kept;
  kept.coefficient = product.coefficient;
  for (const auto& [atom, e] : product.atoms) {
    if (atom.kind == AtomKind::reciprocal)
      rational.multiply(atom.base, -static_cast<long>(e));
    else
      kept.multiply(atom, e);
  }
  product = std::move(kept);
  for (int round = 0; round < most_rounds; ++round)
    if (!cancel_one(product) && !move_one(ring, rational, product)) return;
}

}  // namespace sumwright::term
