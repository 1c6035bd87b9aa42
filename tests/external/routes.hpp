// Ways to count, each from a definition: Pascal's triangle, lattice paths, products of polynomials.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <functional>
#include <vector>

namespace sumwright::testing::routes {

using Terms = std::vector<mpz_class>;

/// binomial(n, k), 0 outside 0 <= k <= n; from Pascal's triangle.
[[nodiscard]] mpz_class binomial(std::size_t n, std::size_t k);
[[nodiscard]] mpz_class factorial(std::size_t n);

/// value(0), value(1), ...
[[nodiscard]] Terms each(std::size_t count, const std::function<mpz_class(std::size_t n)>& value);
/// sum over 0 <= k <= n of term(n, k)
[[nodiscard]] Terms sums(std::size_t count,
                         const std::function<mpz_class(std::size_t n, std::size_t k)>& term);

/// Paths from (0, 0) to (n, m) by steps (1, 0), (0, 1), (1, 1).
[[nodiscard]] mpz_class delannoy(std::size_t n, std::size_t m);
/// The same paths to (n, n) that never go above the diagonal.
[[nodiscard]] mpz_class schroeder(std::size_t n);
/// Paths from height 0 to height 0 by n steps up, down or level, never below 0 unless `free`.
[[nodiscard]] mpz_class level_paths(std::size_t n, bool free);
/// Ballot paths: n steps up, n steps down, never below 0.
[[nodiscard]] mpz_class catalan(std::size_t n);
/// The coefficient of t^n in (a + bt + ct^2)^n.
[[nodiscard]] mpz_class central_coefficient(std::size_t n, long a, long b, long c);
/// Sum of the squares of all multinomial coefficients of n with `parts` parts.
[[nodiscard]] mpz_class multinomial_squares(std::size_t n, std::size_t parts);
/// Permutations of n things without a fixed point, by inclusion and exclusion.
[[nodiscard]] mpz_class derangements(std::size_t n);
/// Placements of any number of rooks on an n by m board, no two in one line.
[[nodiscard]] mpz_class rooks(std::size_t n, std::size_t m);

}  // namespace sumwright::testing::routes
