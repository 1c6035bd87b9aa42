// The key equation of Gosper's and Zeilberger's algorithms, with its exact degree bound.
#pragma once

#include <optional>
#include <vector>

#include "algebra/limits.hpp"
#include "algebra/polynomial.hpp"
#include "search/base_term.hpp"

namespace sumwright::search {

/// up(k) y(k+1) - down(k) y(k) = sum_i x_i columns[i](k): y a polynomial in k, x_i free of k.
/// Then G = gauge * y * F satisfies G(k+1) - G(k) = sum_i x_i F(n+i,k).
struct KeyEquation {
  algebra::RingPtr ring;
  algebra::Factored up;
  algebra::Factored down;
  std::vector<algebra::Factored> columns;
  algebra::Factored gauge;
  long degree = -1;          ///< every solution y has degree in k <= degree; -1: y = 0
  long equation_degree = 0;  ///< both sides have degree in k <= equation_degree
  std::optional<long> homogeneous_degree;  ///< of solutions with all x_i = 0, if there can be any
};

[[nodiscard]] KeyEquation make_key_equation(const algebra::RingPtr& ring,
                                            const ShiftQuotients& summand, std::size_t order,
                                            const algebra::Deadline& deadline);

/// Degree in k of a factored polynomial.
[[nodiscard]] long index_degree(const algebra::Factored& value);

}  // namespace sumwright::search
