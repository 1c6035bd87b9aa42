// The one polynomial equality of the telescoping argument, and its normal form.
//
//   weight * sum_i a_i p_i = up * c(n,k+1) - down * c(n,k),   left side = scale * normal form,
// from the factored data to yes or no, for all values of the symbols.
#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/polynomial_identity.hpp"

namespace sumwright::audit {

namespace {

proof::Factored as_factored(const proof::Polynomial& polynomial) {
  proof::Factored out;
  out.factors.emplace_back(polynomial, 1);
  return out;
}

std::vector<IdentityTerm> left_side(const proof::Telescoping& telescoping) {
  std::vector<IdentityTerm> out;
  for (std::size_t i = 0; i < telescoping.coefficients.size() && i < telescoping.p.size(); ++i)
    out.push_back({1,
                   {{&telescoping.weight.polynomial, false},
                    {&telescoping.coefficients[i], false},
                    {&telescoping.p[i], false}}});
  return out;
}

void report(Check& check, const IdentityResult& result) {
  check.count(result.cases);
  if (result.zero)
    check.remark(result.how);
  else
    check.fail(result.how + ": " + result.detail);
}

/// Primitive, positive leading coefficient, descending lexicographic order, no zero coefficient.
bool is_normal(const proof::Polynomial& polynomial) {
  mpz_class content = 0;
  for (std::size_t i = 0; i < polynomial.terms.size(); ++i) {
    const proof::Monomial& monomial = polynomial.terms[i];
    if (monomial.coefficient == 0) return false;
    content = gcd(content, monomial.coefficient);
    if (i > 0 && !(polynomial.terms[i - 1].exponents > monomial.exponents)) return false;
  }
  return polynomial.terms.empty() || (content == 1 && polynomial.terms.front().coefficient > 0);
}

bool free_of_index(const proof::Factored& value) {
  for (const auto& [factor, exponent] : value.factors)
    for (const proof::Monomial& monomial : factor.terms)
      if (monomial.exponents.size() > 1 && monomial.exponents[1] != 0) return false;
  return true;
}

}  // namespace

void check_equality(const Context& context, std::vector<Finding>& findings) {
  if (!context.proof.telescoping) return;
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  const std::size_t limit = context.options.expand_up_to;
  const proof::Factored certificate = as_factored(telescoping.certificate);

  Check equality("polynomial equality");
  std::vector<IdentityTerm> terms = left_side(telescoping);
  terms.push_back({-1, {{&telescoping.up, false}, {&certificate, true}}});
  terms.push_back({1, {{&telescoping.down, false}, {&certificate, false}}});
  bool free = free_of_index(telescoping.weight.polynomial);
  for (const proof::Factored& one : telescoping.coefficients) free = free && free_of_index(one);
  if (!free) equality.fail("a coefficient or the weight contains the index");
  report(equality, decide_identity(terms, context.names, limit, context.options.check_time));
  findings.push_back(equality.finding());

  Check normal("normal form");
  const proof::Factored form = as_factored(telescoping.normal_form);
  proof::Factored scale;
  scale.constant = telescoping.normal_scale;
  terms = left_side(telescoping);
  terms.push_back({-1, {{&scale, false}, {&form, false}}});
  report(normal, decide_identity(terms, context.names, limit, context.options.check_time));
  if (!is_normal(telescoping.normal_form))
    normal.fail("not primitive with positive leading coefficient in descending order");
  findings.push_back(normal.finding());
}

}  // namespace sumwright::audit
