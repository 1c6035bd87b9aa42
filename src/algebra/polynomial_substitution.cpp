// Polynomials as functions: coefficients in one variable, substitution, shifts, values at points.
#include <algorithm>

#include "algebra/integer.hpp"
#include "algebra/polynomial.hpp"
#include "algebra/size_guard.hpp"

namespace sumwright::algebra {

// Terms of one bucket keep their relative order when the common exponent is removed (the order is
// lexicographic), so no sorting is needed.
std::vector<Polynomial> Polynomial::coefficients_in(std::size_t variable) const {
  const long top = degree(variable);
  std::vector<Polynomial> out(static_cast<std::size_t>(top + 1), Polynomial(ring_));
  std::vector<ulong> exponents(ring_->size());
  Fmpz coefficient;
  for (slong i = 0; i < value_->length; ++i) {
    fmpz_mpoly_get_term_coeff_fmpz(coefficient.raw(), value_, i, ring_->context());
    fmpz_mpoly_get_term_exp_ui(exponents.data(), value_, i, ring_->context());
    const ulong at = exponents[variable];
    exponents[variable] = 0;
    fmpz_mpoly_push_term_fmpz_ui(out[at].value_, coefficient.raw(), exponents.data(),
                                 ring_->context());
  }
  return out;
}

Polynomial Polynomial::substitute(std::size_t variable, const Polynomial& value) const {
  if (!depends_on(variable)) return *this;
  guard_substitution(*this, variable, value);
  const std::vector<Polynomial> parts = coefficients_in(variable);
  Polynomial out = parts.back();
  for (std::size_t j = parts.size() - 1; j-- > 0;) {
    out *= value;
    out += parts[j];
  }
  return out;
}

Polynomial Polynomial::shift(std::size_t variable, long by) const {
  if (by == 0 || !depends_on(variable)) return *this;
  Polynomial moved = Polynomial::variable(ring_, variable);
  fmpz_mpoly_add_si(moved.value_, moved.value_, by, ring_->context());
  return substitute(variable, moved);
}

mpz_class Polynomial::evaluate(const std::vector<mpz_class>& point) const {
  std::vector<Fmpz> values(ring_->size());
  std::vector<fmpz*> pointers;
  for (std::size_t i = 0; i < values.size(); ++i) {
    fmpz_set_mpz(values[i].raw(), point.at(i).get_mpz_t());
    pointers.push_back(values[i].raw());
  }
  Fmpz out;
  if (!fmpz_mpoly_evaluate_all_fmpz(out.raw(), value_, pointers.data(), ring_->context())) {
    throw std::runtime_error("evaluation of a polynomial failed");
  }
  return out.get();
}

// Over the common denominator prod den_i^degree_i, so that only integers are multiplied.
mpq_class Polynomial::evaluate_rational(const std::vector<mpq_class>& point) const {
  if (is_zero()) return 0;
  const std::size_t size = ring_->size();
  std::vector<std::vector<mpz_class>> up(size);
  std::vector<std::vector<mpz_class>> down(size);
  mpz_class common = 1;
  for (std::size_t v = 0; v < size; ++v) {
    const auto top = static_cast<std::size_t>(degree(v));
    up[v].assign(1, 1);
    down[v].assign(1, 1);
    for (std::size_t e = 1; e <= top; ++e) {
      up[v].push_back(up[v].back() * point.at(v).get_num());
      down[v].push_back(down[v].back() * point.at(v).get_den());
    }
    common *= down[v][top];
  }
  mpz_class sum = 0;
  for (const Monomial& term : to_terms()) {
    mpz_class product = term.coefficient;
    for (std::size_t v = 0; v < size; ++v) {
      product *= up[v][term.exponents[v]];
      product *= down[v][down[v].size() - 1 - term.exponents[v]];
    }
    sum += product;
  }
  mpq_class out(sum, common);
  out.canonicalize();
  return out;
}

}  // namespace sumwright::algebra
