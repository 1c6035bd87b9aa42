// A term in a form to be read: denominators and linear factors taken into the factorials they
// belong to.
#pragma once

#include "term/product.hpp"

namespace sumwright::term {

/// rational * product as functions, rewritten: 1/P joins the rational part, factors L+1 of the
/// numerator raise a factorial fact(L), factors L+1 of the denominator raise a reciprocal factorial
/// rfact(L), factors L of the numerator lower it, and L!/L! is cancelled. Equal as functions; at
/// single points it may have a value where the first form has none.
void simplify(const algebra::RingPtr& ring, algebra::Factored& rational, Product& product);

}  // namespace sumwright::term
