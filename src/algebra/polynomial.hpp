// Exact multivariate polynomials over Z: RAII over FLINT's fmpz_mpoly.
//
// All values of one computation share a Ring. Ring order is lexicographic with the
// variables in the order given (the project uses running variable, index, parameters),
// which is also the documented term order of every normal form Sumwright prints.
#pragma once

#include <flint/fmpz_mpoly.h>
#include <gmpxx.h>

#include <cstddef>
#include <memory>
#include <string>
#include <utility>
#include <vector>

namespace sumwright::algebra {

/// Z[x_0, ..., x_{m-1}], m >= 1, with names for printing. Immutable.
class Ring {
 public:
  explicit Ring(std::vector<std::string> names);
  ~Ring();
  Ring(const Ring&) = delete;
  Ring& operator=(const Ring&) = delete;

  [[nodiscard]] std::size_t size() const { return names_.size(); }
  [[nodiscard]] const std::vector<std::string>& names() const { return names_; }
  [[nodiscard]] const fmpz_mpoly_ctx_struct* context() const { return context_; }

 private:
  std::vector<std::string> names_;
  fmpz_mpoly_ctx_t context_;
};
using RingPtr = std::shared_ptr<const Ring>;

/// One term of a polynomial: coefficient times the product of x_i^exponents[i].
struct Monomial {
  mpz_class coefficient;
  std::vector<unsigned long> exponents;
};

/// An element of the ring. Value semantics; operands must share the ring.
class Polynomial {
 public:
  explicit Polynomial(RingPtr ring);  ///< 0
  Polynomial(RingPtr ring, const mpz_class& constant);
  static Polynomial variable(RingPtr ring, std::size_t index);
  /// The affine form sum coefficients[i] x_i + constant (coefficients may be shorter than the
  /// ring).
  static Polynomial affine(RingPtr ring, const std::vector<long>& coefficients, long constant);
  static Polynomial from_terms(RingPtr ring, const std::vector<Monomial>& terms);

  Polynomial(const Polynomial& other);
  Polynomial(Polynomial&& other) noexcept;
  Polynomial& operator=(const Polynomial& other);
  Polynomial& operator=(Polynomial&& other) noexcept;
  ~Polynomial();

  [[nodiscard]] const RingPtr& ring() const { return ring_; }
  [[nodiscard]] const fmpz_mpoly_struct* raw() const { return value_; }
  [[nodiscard]] fmpz_mpoly_struct* raw() { return value_; }

  Polynomial& operator+=(const Polynomial& other);
  Polynomial& operator-=(const Polynomial& other);
  Polynomial& operator*=(const Polynomial& other);
  friend Polynomial operator+(Polynomial a, const Polynomial& b) { return a += b; }
  friend Polynomial operator-(Polynomial a, const Polynomial& b) { return a -= b; }
  friend Polynomial operator*(const Polynomial& a, const Polynomial& b);
  friend Polynomial operator-(Polynomial a);
  friend bool operator==(const Polynomial& a, const Polynomial& b);
  [[nodiscard]] Polynomial power(unsigned long exponent) const;

  [[nodiscard]] bool is_zero() const;
  [[nodiscard]] bool is_one() const;
  [[nodiscard]] bool is_constant() const;
  [[nodiscard]] mpz_class constant() const;               ///< value of a constant polynomial
  [[nodiscard]] std::size_t terms() const;                ///< number of monomials
  [[nodiscard]] long degree(std::size_t variable) const;  ///< -1 for 0
  [[nodiscard]] long total_degree() const;                ///< -1 for 0
  [[nodiscard]] bool depends_on(std::size_t variable) const { return degree(variable) > 0; }
  [[nodiscard]] mpz_class leading_coefficient() const;   ///< in the ring's order; 0 for 0
  [[nodiscard]] mpz_class content() const;               ///< gcd of coefficients, >= 0
  [[nodiscard]] std::vector<Monomial> to_terms() const;  ///< descending in the ring's order
  /// Coefficients as a polynomial in one variable: entry j multiplies variable^j.
  [[nodiscard]] std::vector<Polynomial> coefficients_in(std::size_t variable) const;

  /// variable := value (any polynomial of the ring).
  [[nodiscard]] Polynomial substitute(std::size_t variable, const Polynomial& value) const;
  /// variable := variable + by.
  [[nodiscard]] Polynomial shift(std::size_t variable, long by) const;
  /// Value at a point (one integer per variable).
  [[nodiscard]] mpz_class evaluate(const std::vector<mpz_class>& point) const;
  [[nodiscard]] mpq_class evaluate_rational(const std::vector<mpq_class>& point) const;

  /// Exact quotient; `exact` tells whether the division left no remainder (then *this == q *
  /// divisor).
  [[nodiscard]] std::pair<Polynomial, bool> divide(const Polynomial& divisor) const;
  [[nodiscard]] Polynomial primitive_part() const;  ///< over Z, leading coefficient > 0; 0 stays 0
  [[nodiscard]] std::string to_string() const;      ///< `3*n^2*k - 1`, in the claim language

 private:
  RingPtr ring_;
  fmpz_mpoly_t value_;
};

[[nodiscard]] Polynomial gcd(const Polynomial& a, const Polynomial& b);  ///< primitive, leading > 0
[[nodiscard]] Polynomial lcm(const Polynomial& a, const Polynomial& b);
/// A total order (by terms), for canonical sorting.
[[nodiscard]] int compare(const Polynomial& a, const Polynomial& b);

/// constant * product of factors[i].first ^ factors[i].second.
/// Canonical: factors non-constant, primitive, leading coefficient > 0, irreducible when made by
/// `factor`, pairwise different, sorted by `compare`, exponents nonzero (negative: denominator).
struct Factored {
  mpq_class constant = 1;
  std::vector<std::pair<Polynomial, long>> factors;

  void multiply(const Polynomial& base, long exponent);  ///< merges; base any nonzero polynomial
  void multiply(const Factored& other, long exponent = 1);
  [[nodiscard]] bool is_zero() const { return constant == 0; }
  [[nodiscard]] Factored inverse() const;
  /// Product of the factors with positive exponent, times the constant's numerator; and the rest.
  [[nodiscard]] Polynomial numerator(const RingPtr& ring) const;
  [[nodiscard]] Polynomial denominator(const RingPtr& ring) const;  ///< leading coefficient > 0
  [[nodiscard]] Factored substitute(std::size_t variable, const Polynomial& value) const;
  [[nodiscard]] Factored shift(std::size_t variable, long by) const;
  [[nodiscard]] std::string to_string() const;
};

/// Factorisation into irreducibles over Q (FLINT). The polynomial may be 0 (constant 0).
/// Throws std::runtime_error when FLINT cannot.
[[nodiscard]] Factored factor(const Polynomial& polynomial);

}  // namespace sumwright::algebra
