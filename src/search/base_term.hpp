// The summand's shifts over one base term: F(n+i,k) = numerators[i](n,k) * H(n,k).
#pragma once

#include <vector>

#include "algebra/limits.hpp"
#include "algebra/polynomial.hpp"
#include "search/search.hpp"

namespace sumwright::search {

inline constexpr std::size_t kRunning = 0;  ///< variable n of every ring
inline constexpr std::size_t kIndex = 1;    ///< variable k of every ring

/// H = F / denominator; all exponents and constants of numerators and denominator are integers >= 0
/// (constants may be negative). ratio = H(n,k+1) / H(n,k).
struct BaseTerm {
  std::vector<algebra::Factored> numerators;  ///< i = 0 .. order
  algebra::Factored denominator;
  algebra::Factored ratio;
};

/// Splits every factor into irreducible ones (they may come as written).
[[nodiscard]] algebra::Factored refined(const algebra::Factored& value);

/// Both quotients refined; throws std::invalid_argument when one is 0.
[[nodiscard]] ShiftQuotients refined(const ShiftQuotients& summand);

/// F(n+i,k) / F(n,k) for i = 0 .. order, in lowest terms as factored values.
[[nodiscard]] std::vector<algebra::Factored> running_quotients(const ShiftQuotients& summand,
                                                               std::size_t order);

/// The base term for orders up to `order`; `summand` refined.
[[nodiscard]] BaseTerm make_base_term(const ShiftQuotients& summand, std::size_t order,
                                      const algebra::Deadline& deadline);

}  // namespace sumwright::search
