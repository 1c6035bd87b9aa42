// The key equation at one point of n and the parameters, modulo a prime.
//
// Not solved for the coefficients of y: from y(k0) = y0 (unknown) and each right-hand column the
// recursion y(k+1) = (down(k) y(k) + right(k)) / up(k) gives values y(k0), y(k0+1), ...; y is a
// polynomial of degree <= d exactly when the (d+1)-th differences vanish. That is a system with as
// many unknowns as columns, plus one.
#pragma once

#include <optional>
#include <vector>

#include "algebra/limits.hpp"
#include "search/field.hpp"
#include "search/key_equation.hpp"

namespace sumwright::search {

/// Which unknowns are free (entry 0 the start value y0, then the columns).
struct SolutionPattern {
  std::vector<bool> free;
  bool full_rows = true;  ///< whether all equations are needed to see this pattern
  friend bool operator==(const SolutionPattern& a, const SolutionPattern& b) {
    return a.free == b.free;
  }
  /// The last free column, which is normalised to 1; nothing when all x_i must be 0.
  [[nodiscard]] std::optional<std::size_t> unit_column() const;
};

/// Images of one key equation modulo one prime.
/// With `given` coefficients the columns are first summed up to one: sum_i given[i] columns[i].
class KeyImage {
 public:
  KeyImage(const KeyEquation& equation, const std::vector<algebra::Polynomial>& given,
           const Field& field, Word start);

  /// Solves with all equations at a point (one value per ring variable; k's is not used); nothing
  /// when `up` has a zero in the range.
  [[nodiscard]] std::optional<SolutionPattern> explore(const WordVector& point,
                                                       const algebra::Deadline& deadline);
  /// The solution (x_0, ..., x_J, coefficients of y) with unit column 1 and other free columns 0;
  /// nothing at a point where the pattern is another one.
  [[nodiscard]] std::optional<WordVector> solve(const WordVector& point,
                                                const SolutionPattern& pattern,
                                                const algebra::Deadline& deadline);

 private:
  struct Term {
    Word coefficient;
    std::vector<unsigned long> exponents;
  };
  using Terms = std::vector<Term>;
  struct Product {
    Word constant = 1;
    std::vector<std::pair<std::size_t, long>> factors;  // index into factors_, exponent
  };

  [[nodiscard]] Product compile(const algebra::Factored& value);
  [[nodiscard]] Terms compile(const algebra::Polynomial& value) const;
  void fill_values(const WordVector& point, std::size_t count);
  [[nodiscard]] WordVector value_of(const Terms& terms, const WordVector& point) const;
  void multiply_in(WordVector& into, const Product& product) const;
  [[nodiscard]] bool run_recursion(const WordVector& point, std::size_t rows,
                                   const algebra::Deadline& deadline);
  [[nodiscard]] SolutionPattern eliminate(std::size_t rows, const algebra::Deadline& deadline);
  [[nodiscard]] WordVector back_substitute(const SolutionPattern& pattern) const;
  [[nodiscard]] WordVector coefficients_of(const WordVector& values) const;
  void prepare_differences();
  void prepare_interpolation();
  [[nodiscard]] std::size_t full_rows() const;
  [[nodiscard]] std::size_t few_rows() const;

  const KeyEquation& equation_;
  Field field_;
  Word start_;
  std::vector<algebra::Polynomial> bases_;  // distinct factors
  std::vector<Terms> factors_;              // the same, modulo the prime
  std::vector<WordVector> tables_;          // values of the factors at start_, start_ + 1, ...
  Product up_;
  Product down_;
  std::vector<Product> columns_;
  std::vector<Terms> given_;
  WordVector differences_;             // weights of the (degree+1)-th difference
  std::vector<WordVector> to_powers_;  // values at start_ + j -> coefficients of k^i
  std::vector<WordVector> sequences_;  // per unknown, values of y
  std::vector<WordVector> matrix_;     // reduced rows
  std::vector<std::size_t> pivots_;    // pivot column of each reduced row
};

}  // namespace sumwright::search
