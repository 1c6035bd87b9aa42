// Readable forms of right sides: from base term and rational factor to factorials of larger
// arguments.

#include "term/simplify.hpp"

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

/// One atom moved by one; false when none can be.
bool raise_one(const RingPtr& ring, Factored& rational, Product& product) {
  for (const auto& [atom, e] : product.atoms) {
    const bool factorial = atom.kind == AtomKind::factorial;
    if (!factorial && atom.kind != AtomKind::reciprocal_factorial) continue;
    if (!take(rational, (atom.argument + 1).polynomial(ring), factorial ? 1 : -1)) continue;
    Atom raised = atom;
    raised.argument = atom.argument + 1;
    const Atom old = atom;
    Product out;
    out.coefficient = product.coefficient;
    for (const auto& [other, count] : product.atoms)
      out.multiply(other, other == old ? count - 1 : count);
    out.multiply(raised);
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
    if (!raise_one(ring, rational, product)) return;
}

}  // namespace sumwright::term
