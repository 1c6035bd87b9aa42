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
#include "search/key_system.hpp"

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

/// Images of one key equation modulo one prime, with k0 = start. Keeps a reference to the system.
class KeyImage {
 public:
  KeyImage(const KeySystem& system, const Field& field, Word start);

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
    const std::vector<unsigned long>* exponents;  // in the system
  };
  using Terms = std::vector<Term>;

  [[nodiscard]] Terms reduce(const std::vector<algebra::Monomial>& terms) const;
  [[nodiscard]] Word reduce(const mpz_class& value) const;
  [[nodiscard]] WordVector in_index(const Terms& terms, const WordVector& point) const;
  void tabulate(const WordVector& point, std::size_t count);
  void tabulate_base(const WordVector& in_k, WordVector& table) const;
  [[nodiscard]] WordVector values_of(const KeySystem::Product& product, std::size_t count) const;
  [[nodiscard]] std::vector<WordVector> right_sides(const WordVector& point, std::size_t count,
                                                    const algebra::Deadline& deadline) const;
  [[nodiscard]] bool run_recursion(const WordVector& point, std::size_t rows,
                                   const algebra::Deadline& deadline);
  [[nodiscard]] SolutionPattern eliminate(std::size_t rows, const algebra::Deadline& deadline);
  [[nodiscard]] WordVector back_substitute(const SolutionPattern& pattern) const;
  void remove_homogeneous(WordVector& y) const;
  [[nodiscard]] WordVector coefficients_of(const Word* values) const;
  void prepare_differences();
  void prepare_interpolation();
  [[nodiscard]] std::size_t full_rows() const;
  [[nodiscard]] std::size_t few_rows() const;

  const KeySystem& system_;
  Field field_;
  Word start_;
  std::vector<Terms> bases_;  // of the factor powers, modulo the prime
  std::vector<Terms> given_;
  std::vector<WordVector> tables_;     // factor powers at k0, k0 + 1, ...; one entry if free of k
  WordVector differences_;             // weights of the (degree+1)-th difference
  std::vector<WordVector> to_powers_;  // values at k0 + j -> coefficients of k^i
  std::vector<WordVector> sequences_;  // per unknown, values of y
  std::vector<WordVector> matrix_;     // reduced rows
  std::vector<std::size_t> pivots_;    // pivot column of each reduced row
};

}  // namespace sumwright::search
