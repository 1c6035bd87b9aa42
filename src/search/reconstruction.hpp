// From values at points modulo primes to polynomials over Z: one variable after the other, then
// the primes.
//
// The unknown is a vector of rational functions in some variables, known up to a common factor and
// given by a black box that returns it with one entry (the unit) normalised to 1. At each level a
// common denominator is found from one random combination of the entries (Cauchy interpolation),
// the numerators by interpolation; the list of all coefficients, with the unit's leading one equal
// to 1, is the vector of the next level. Degrees are learnt once and then reused.
#pragma once

#include <gmpxx.h>

#include <functional>
#include <optional>
#include <random>
#include <vector>

#include "algebra/limits.hpp"
#include "search/field.hpp"

namespace sumwright::search {

/// What one entry of the reconstructed vector is the coefficient of.
struct Coefficient {
  std::size_t entry;                     ///< of the black box's vector
  std::vector<unsigned long> exponents;  ///< one per ring variable
};

/// Reconstruction in `variables` (ring indices, innermost first).
class ModularReconstruction {
 public:
  /// Values of all ring variables to the vector; nothing at an unlucky point.
  using BlackBox = std::function<std::optional<WordVector>(const WordVector& point)>;

  /// Entries 0 .. first_group-1 hold the unit and usually have its common denominator alone.
  ModularReconstruction(std::size_t ring_size, std::vector<std::size_t> variables,
                        std::size_t entries, std::size_t first_group, std::size_t unit,
                        unsigned long seed);

  /// The coefficient vector modulo the field's prime; nothing when the prime is unlucky.
  [[nodiscard]] std::optional<WordVector> image(const Field& field, const BlackBox& box,
                                                const algebra::Deadline& deadline);
  /// What the entries of `image` stand for (after the first image).
  [[nodiscard]] const std::vector<Coefficient>& layout() const { return layout_; }

 private:
  struct Level {
    std::size_t variable = 0;
    Word start = 0;
    std::size_t entries = 0;
    std::size_t first_group = 0;
    std::size_t unit = 0;
    bool known = false;
    std::size_t points = 4;          // samples taken
    std::vector<std::size_t> sizes;  // coefficients per entry
    std::size_t out_entries = 0;
    std::size_t extra_degree = 0;  // of the denominator beyond the first group's
    WordVector weights;            // random combination
    // Of the last sampling:
    WordVector at;
    WordVector master;
    std::vector<WordVector> matrix;
  };
  struct Samples {
    std::vector<WordVector> vectors;
    WordVector at;
  };

  [[nodiscard]] std::optional<WordVector> run(std::size_t level, WordVector& point);
  [[nodiscard]] bool sample(std::size_t level, WordVector& point, std::size_t count, Samples& into);
  [[nodiscard]] std::optional<WordVector> denominator(Level& level, const Samples& samples,
                                                      WordVector& at_samples);
  [[nodiscard]] std::optional<WordVector> numerators(std::size_t index, const Samples& samples,
                                                     const WordVector& denominator,
                                                     const WordVector& at_samples);
  void learn(std::size_t index, const std::vector<WordVector>& polynomials,
             std::size_t denominator_size);
  void set_points(Level& level, const WordVector& at);
  void start_level(std::size_t index, std::size_t entries, std::size_t first_group,
                   std::size_t unit);

  std::vector<Level> levels_;
  std::vector<Coefficient> layout_;
  std::size_t ring_size_;
  std::mt19937_64 random_;
  const Field* field_ = nullptr;
  const BlackBox* box_ = nullptr;
  const algebra::Deadline* deadline_ = nullptr;
};

/// Collects images modulo several primes into integers with a common denominator.
class IntegerLift {
 public:
  explicit IntegerLift(unsigned long seed) : random_(seed) {}
  void add(Word prime, const WordVector& image);
  /// The vector over Z (times its least common denominator) when the images determine it; a
  /// guess to be verified.
  [[nodiscard]] std::optional<std::vector<mpz_class>> vector();

 private:
  std::mt19937_64 random_;
  std::vector<mpz_class> values_;
  mpz_class modulus_ = 1;
};

}  // namespace sumwright::search
