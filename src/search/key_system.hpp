// A key equation made ready for many evaluations: distinct factor powers listed once.
#pragma once

#include <vector>

#include "algebra/polynomial.hpp"
#include "search/key_equation.hpp"

namespace sumwright::search {

/// Factored polynomials as lists of indices into one table of powers of irreducible factors.
struct KeySystem {
  struct FactorPower {
    std::vector<algebra::Monomial> terms;  ///< of the base
    long exponent;
    bool uses_index;  ///< whether the base depends on k
  };
  struct Product {
    mpz_class constant;
    std::vector<std::size_t> powers;  ///< indices into `powers`
  };

  /// With `given` coefficients the columns are summed up to one: sum_i given[i] columns[i].
  KeySystem(const KeyEquation& equation, const std::vector<algebra::Polynomial>& given);

  long degree;
  long equation_degree;
  std::optional<long> homogeneous_degree;
  std::vector<FactorPower> powers;
  Product up;
  Product down;
  std::vector<Product> columns;
  std::vector<std::vector<algebra::Monomial>> given;
  [[nodiscard]] std::size_t unknown_columns() const { return given.empty() ? columns.size() : 1; }
};

}  // namespace sumwright::search
