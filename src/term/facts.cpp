// Linear arithmetic over a claim's hypotheses by exact simplex (PPL).
// Invariant: every `true` is a theorem of linear integer arithmetic.

#include "term/facts.hpp"

#include <gmpxx.h>

#include <numeric>
#include <ppl.hh>

namespace sumwright::term {
namespace {

namespace ppl = Parma_Polyhedra_Library;

ppl::Linear_Expression expression(const Affine& form) {
  ppl::Linear_Expression out(ppl::Coefficient(form.constant));
  for (std::size_t i = 0; i < form.coefficients.size(); ++i)
    if (form.coefficients[i] != 0)
      ppl::add_mul_assign(out, ppl::Coefficient(form.coefficients[i]), ppl::Variable(i));
  return out;
}

/// Divides by the gcd of the coefficients and rounds the constant down: exact over the integers.
Affine tighten(const Affine& form) {
  long g = 0;
  for (long c : form.coefficients) g = std::gcd(g, c);
  if (g <= 1) return form;
  Affine out = form;
  for (long& c : out.coefficients) c /= g;
  out.constant = floor_quotient(form.constant, g);
  return out;
}

ppl::MIP_Problem problem(std::size_t symbols, const std::vector<Affine>& facts) {
  ppl::MIP_Problem out(symbols);
  for (const Affine& fact : facts) out.add_constraint(expression(tighten(fact)) >= 0);
  return out;
}

}  // namespace

Facts Facts::with(const Affine& nonnegative) const {
  Facts out = *this;
  out.add(nonnegative);
  return out;
}

bool Facts::implies(const Affine& form) const {
  if (form.is_constant() && form.constant >= 0) return true;
  ppl::MIP_Problem p = problem(symbols_, facts_);
  p.add_constraint(expression(tighten(-form - 1)) >= 0);  // the negation over the integers
  return !p.is_satisfiable();
}

bool Facts::implies_zero(const Affine& form) const { return implies(form) && implies(-form); }

bool Facts::implies_nonzero(const Affine& form) const {
  long g = 0;
  for (long c : form.coefficients) g = std::gcd(g, c);
  if (g == 0) return form.constant != 0 || contradictory();
  if (form.constant % g != 0) return true;
  return implies(form - 1) || implies(-form - 1);
}

bool Facts::contradictory() const { return !problem(symbols_, facts_).is_satisfiable(); }

std::optional<long> Facts::lower_bound(const Affine& form) const {
  ppl::MIP_Problem p = problem(symbols_, facts_);
  p.set_objective_function(expression(form));
  p.set_optimization_mode(ppl::MINIMIZATION);
  if (p.solve() != ppl::OPTIMIZED_MIP_PROBLEM) return std::nullopt;
  ppl::Coefficient num;
  ppl::Coefficient den;
  p.optimal_value(num, den);
  mpz_class bound;
  mpz_cdiv_q(bound.get_mpz_t(), num.get_mpz_t(), den.get_mpz_t());
  if (!bound.fits_slong_p()) return std::nullopt;
  return bound.get_si();
}

}  // namespace sumwright::term
