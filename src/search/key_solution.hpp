// An exact solution of a key equation over Z[n, parameters].
#pragma once

#include <functional>
#include <optional>
#include <vector>

#include "algebra/limits.hpp"
#include "search/key_equation.hpp"

namespace sumwright::search {

/// up(k) y(k+1) - down(k) y(k) = sum_i x[i] columns[i](k); x[i] in Z[n, parameters], y in
/// Z[n, k, parameters]; no common factor of all of them.
struct KeySolution {
  std::vector<algebra::Polynomial> x;
  algebra::Polynomial y;
};

/// The solution whose last free x is normalised (see SolutionPattern), or nothing when all x are 0
/// in every solution. With `given`, the right side is x[0] * sum_i given[i] columns[i].
/// Candidates are made modulo primes; `accept` checks one exactly and says whether it is right:
/// nothing is returned that it has refused. Throws TimeUp.
[[nodiscard]] std::optional<KeySolution> solve_key_equation(
    const KeyEquation& equation, const std::vector<algebra::Polynomial>& given,
    const std::function<bool(const KeySolution&)>& accept, const algebra::Deadline& deadline);

}  // namespace sumwright::search
