// Polynomials with rational coefficients for re-checking an obligation file: small, sparse, GMP
// only.
//
// Deliberately not the fast arithmetic that finds certificates: a checker does not rest on it.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <map>
#include <stdexcept>
#include <vector>

#include "proof/value.hpp"

namespace sumwright::writers {

/// Work left, in multiplications of 64-bit limbs or so. Passed along; running out throws.
class Budget {
 public:
  struct Exhausted : std::length_error {
    Exhausted() : std::length_error("too large to be checked by expansion or evaluation") {}
  };
  explicit Budget(std::size_t units) : left_(units) {}
  void spend(std::size_t units) {
    if (units > left_) throw Exhausted();
    left_ -= units;
  }

 private:
  std::size_t left_;
};

/// Exponents to coefficient; no zero coefficients.
using ExactPolynomial = std::map<std::vector<unsigned long>, mpq_class>;

[[nodiscard]] ExactPolynomial expand(const proof::Polynomial& value);
/// Product of nonnegative powers; throws std::invalid_argument at a negative one.
[[nodiscard]] ExactPolynomial expand(const proof::Factored& value, std::size_t symbols,
                                     Budget& budget);
[[nodiscard]] ExactPolynomial product(const ExactPolynomial& a, const ExactPolynomial& b,
                                      Budget& budget);
void add_to(ExactPolynomial& sum, const ExactPolynomial& term, const mpq_class& factor);
/// symbol := symbol + 1, by the binomial theorem.
[[nodiscard]] ExactPolynomial shifted(const ExactPolynomial& value, std::size_t symbol,
                                      Budget& budget);

/// Values at an integer point.
[[nodiscard]] mpz_class evaluate(const proof::Polynomial& value, const std::vector<long>& point);
[[nodiscard]] mpq_class evaluate(const proof::Factored& value, const std::vector<long>& point);

/// Upper bound of the degree in one symbol, from the factors.
[[nodiscard]] unsigned long degree_bound(const proof::Polynomial& value, std::size_t symbol);
[[nodiscard]] unsigned long degree_bound(const proof::Factored& value, std::size_t symbol);

}  // namespace sumwright::writers
