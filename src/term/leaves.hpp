// Function calls and symbolic powers as atoms: one rule each (proof::LeafRule).
#pragma once

#include <vector>

#include "term/conversion.hpp"

namespace sumwright::term {

/// The leaf for a call or a power with a symbolic exponent. `reciprocal` asks for 1/factorial(a).
/// Appends what must hold for the author's text to have a value to `definedness`.
/// Throws claim::InputError naming the factor when it is not hypergeometric.
[[nodiscard]] Leaf make_leaf(const Setting& setting, const Facts& facts,
                             const claim::ExpressionPtr& expression, bool reciprocal,
                             std::vector<Requirement>& definedness);

/// The atom with atom * inverse = 1 (under inverse conditions).
[[nodiscard]] Atom inverse_atom(const algebra::RingPtr& ring, const Atom& atom);

/// Every factor of an interval product is nonzero on the region.
[[nodiscard]] Requirement interval_nonvanishing(const Setting& setting, const Facts& facts,
                                                const Atom& atom, claim::Place place);

}  // namespace sumwright::term
