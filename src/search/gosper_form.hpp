// The Gosper-Petkovsek normal form of a shift quotient.
// R. W. Gosper, PNAS 75 (1978); M. Petkovsek, H. Wilf, D. Zeilberger, A = B (1996), section 5.3.
#pragma once

#include "algebra/limits.hpp"
#include "algebra/polynomial.hpp"

namespace sumwright::search {

/// ratio = a(k)/b(k) * c(k+1)/c(k), all three polynomials (exponents >= 0, integer constants) and
/// a(k), b(k+h) without common factor for every integer h >= 0.
struct GosperForm {
  algebra::Factored a;
  algebra::Factored b;
  algebra::Factored c;
};

/// `ratio` in irreducible factors. Throws algebra::TimeUp when c would have an absurd degree.
[[nodiscard]] GosperForm gosper_form(const algebra::Factored& ratio,
                                     const algebra::Deadline& deadline);

}  // namespace sumwright::search
