// The plain data of a Proof at points: affine forms, polynomials, atoms, products.
#pragma once

#include "audit/numbers.hpp"
#include "proof/value.hpp"

namespace sumwright::audit {

/// An affine form at a point whose integer symbols hold integers. Throws TooLarge.
[[nodiscard]] long value_of(const proof::Affine& form, const Point& at);
[[nodiscard]] numeric value_of(const proof::Polynomial& polynomial, const Point& at);
/// A factored polynomial (exponents >= 0; a negative one gives no value at a zero of its factor).
[[nodiscard]] Value value_of(const proof::Factored& factored, const Point& at);
/// fact(L) has a value for L >= 0, ip(a; i, j) for i <= j, powers of 0 for exponents >= 0.
[[nodiscard]] Value value_of(const proof::Atom& atom, const Point& at);
[[nodiscard]] Value value_of(const proof::Product& product, const Point& at);

/// Same data (not only same value).
[[nodiscard]] bool identical(const proof::Polynomial& left, const proof::Polynomial& right);
[[nodiscard]] bool identical(const proof::Atom& left, const proof::Atom& right);

}  // namespace sumwright::audit
