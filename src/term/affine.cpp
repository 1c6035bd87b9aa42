// Integer-affine forms: checked arithmetic, substitution, and the way to and from polynomials.

#include "term/affine.hpp"

#include <stdexcept>

namespace sumwright::term {
namespace {

long add(long a, long b) {
  long out = 0;
  if (__builtin_add_overflow(a, b, &out)) throw std::overflow_error("affine form out of range");
  return out;
}

long multiply(long a, long b) {
  long out = 0;
  if (__builtin_mul_overflow(a, b, &out)) throw std::overflow_error("affine form out of range");
  return out;
}

}  // namespace

Affine Affine::symbol(std::size_t symbols, std::size_t position) {
  Affine out = zero(symbols);
  out.coefficients.at(position) = 1;
  return out;
}

bool Affine::is_constant() const {
  for (long c : coefficients)
    if (c != 0) return false;
  return true;
}

Affine Affine::substitute(std::size_t position, const Affine& value) const {
  Affine rest = *this;
  const long factor = rest.coefficients.at(position);
  rest.coefficients[position] = 0;
  return rest + factor * value;
}

Affine Affine::shift(std::size_t position, long by) const {
  return *this + multiply(coefficients.at(position), by);
}

algebra::Polynomial Affine::polynomial(const algebra::RingPtr& ring) const {
  return algebra::Polynomial::affine(ring, coefficients, constant);
}

Affine operator+(const Affine& a, const Affine& b) {
  Affine out = a;
  for (std::size_t i = 0; i < b.coefficients.size(); ++i)
    out.coefficients.at(i) = add(out.coefficients.at(i), b.coefficients[i]);
  out.constant = add(out.constant, b.constant);
  return out;
}

Affine operator-(const Affine& a) { return -1 * a; }
Affine operator-(const Affine& a, const Affine& b) { return a + (-1) * b; }

Affine operator*(long factor, const Affine& a) {
  Affine out = a;
  for (long& c : out.coefficients) c = multiply(c, factor);
  out.constant = multiply(out.constant, factor);
  return out;
}

Affine operator+(const Affine& a, long constant) {
  Affine out = a;
  out.constant = add(out.constant, constant);
  return out;
}

Affine operator-(const Affine& a, long constant) { return a + multiply(-1, constant); }

long floor_quotient(long numerator, long denominator) {
  return numerator >= 0 ? numerator / denominator : -((-numerator + denominator - 1) / denominator);
}

bool to_affine(const algebra::Polynomial& polynomial, Affine& out) {
  if (polynomial.total_degree() > 1) return false;
  out = Affine::zero(polynomial.ring()->size());
  for (const algebra::Monomial& m : polynomial.to_terms()) {
    if (!m.coefficient.fits_slong_p()) return false;
    bool placed = false;
    for (std::size_t i = 0; i < m.exponents.size(); ++i)
      if (m.exponents[i] == 1) {
        out.coefficients[i] = m.coefficient.get_si();
        placed = true;
      }
    if (!placed) out.constant = m.coefficient.get_si();
  }
  return true;
}

}  // namespace sumwright::term
