// Size estimates before calls that cannot be interrupted: a product or power that would not fit
// into memory, or not end in reasonable time, is refused with TimeUp.
#pragma once

#include "algebra/polynomial.hpp"

namespace sumwright::algebra {

void guard_product(const Polynomial& a, const Polynomial& b);
void guard_power(const Polynomial& base, unsigned long exponent);
void guard_substitution(const Polynomial& a, std::size_t variable, const Polynomial& value);
void guard_gcd(const Polynomial& a, const Polynomial& b);
void guard_factorisation(const Polynomial& a);

}  // namespace sumwright::algebra
