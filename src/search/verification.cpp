// The telescoping identity, checked exactly and without regard to how the evidence was found:
// sum_i a_i s_i = R(k+1) q - R, with s_i = F(n+i,k)/F(n,k), q = F(n,k+1)/F(n,k), over the least
// common denominator. Known factors of R are taken out first (found by a hint modulo a prime, then
// divided out exactly), because they cancel against those of the quotients; what remains is one
// polynomial over Z that must be 0.
#include <flint/nmod_poly.h>

#include <algorithm>
#include <stdexcept>

#include "search/base_term.hpp"
#include "search/search.hpp"

namespace sumwright::search {
namespace {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using algebra::RingPtr;

constexpr mp_limb_t kHintPrime = 2147483647;  // 2^31 - 1

// A polynomial in k modulo the hint prime, the other variables at fixed values.
class Hint {
 public:
  explicit Hint(const Polynomial& value) {
    nmod_poly_init(poly_, kHintPrime);
    for (const auto& term : value.to_terms()) {
      mp_limb_t x = mpz_fdiv_ui(term.coefficient.get_mpz_t(), kHintPrime);
      for (std::size_t v = 0; v < term.exponents.size(); ++v) {
        if (v == kIndex) continue;
        const mp_limb_t at = n_powmod2(1234567 + 7654321 * (v + 1),
                                       static_cast<slong>(term.exponents[v]), kHintPrime);
        x = n_mulmod2(x, at, kHintPrime);
      }
      const auto e = static_cast<slong>(term.exponents[kIndex]);
      nmod_poly_set_coeff_ui(poly_, e, n_addmod(nmod_poly_get_coeff_ui(poly_, e), x, kHintPrime));
    }
  }
  ~Hint() { nmod_poly_clear(poly_); }
  Hint(const Hint&) = delete;
  Hint& operator=(const Hint&) = delete;

  // How often `factor` divides; removes it.
  long remove(const Hint& factor) {
    if (nmod_poly_degree(factor.poly_) < 1 || nmod_poly_is_zero(poly_)) return 0;
    return static_cast<long>(nmod_poly_remove(poly_, factor.poly_));
  }

 private:
  nmod_poly_t poly_;
};

void add_index_factors(std::vector<Polynomial>& list, const Factored& value, long shift) {
  for (const auto& entry : value.factors) {
    if (!entry.first.depends_on(kIndex)) continue;
    const Polynomial base = entry.first.shift(kIndex, shift);
    if (std::find(list.begin(), list.end(), base) == list.end()) list.push_back(base);
  }
}

// value = known factors (those in `candidates`) * rest.
struct Split {
  Factored known;
  Polynomial rest;
};

Split split_known(const Polynomial& value, const std::vector<Polynomial>& candidates) {
  Split out{{}, value};
  if (value.is_constant()) return out;
  Hint hint(value);
  for (const Polynomial& candidate : candidates) {
    const long times = hint.remove(Hint(candidate));
    if (times > 0) out.known.multiply(candidate, times);
  }
  auto [quotient, exact] = value.divide(out.known.numerator(value.ring()));
  if (!exact) return {{}, value};  // the hint was wrong: no harm
  out.rest = std::move(quotient);
  return out;
}

// The summands of left minus right, each a polynomial times a factored rational function.
struct Summand {
  Polynomial polynomial;
  Factored factor;
};

// Over a common denominator with common factors removed, added up.
Polynomial sum_over_common_denominator(const RingPtr& ring, std::vector<Summand>& summands) {
  Factored common;  // least exponent of every factor, over all summands
  bool first = true;
  mpz_class denominators = 1;
  for (const Summand& summand : summands) {
    denominators = lcm(denominators, summand.factor.constant.get_den());
    if (first) {
      for (const auto& [base, exponent] : summand.factor.factors) common.multiply(base, exponent);
      first = false;
      continue;
    }
    Factored quotient = summand.factor;
    quotient.multiply(common, -1);
    for (const auto& [base, exponent] : quotient.factors) {
      if (exponent < 0) common.multiply(base, exponent);
    }
    // A factor of `common` that this summand lacks has negative exponent in the quotient, one with
    // a larger exponent here a positive one: so `common` is the minimum, 0 included.
  }
  common.constant = mpq_class(1, denominators);
  Polynomial sum(ring);
  for (Summand& summand : summands) {
    summand.factor.multiply(common, -1);
    sum += summand.polynomial * summand.factor.numerator(ring);
  }
  return sum;
}

}  // namespace

IdentityCheck verify_identity(const RingPtr& ring, const ShiftQuotients& given_summand,
                              const std::vector<Polynomial>& coefficients,
                              const RationalFunction& certificate) {
  for (const Polynomial& coefficient : coefficients) {
    if (coefficient.depends_on(kIndex)) throw std::invalid_argument("coefficient depends on k");
  }
  const ShiftQuotients summand = refined(given_summand);
  const std::size_t order = coefficients.empty() ? 0 : coefficients.size() - 1;
  const std::vector<Factored> quotients = running_quotients(summand, order);

  std::vector<Polynomial> candidates;
  for (const Factored& quotient : quotients) add_index_factors(candidates, quotient, 0);
  add_index_factors(candidates, summand.by_index, 0);
  add_index_factors(candidates, summand.by_index, -1);

  std::vector<Summand> summands;
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    if (!coefficients[i].is_zero()) summands.push_back({coefficients[i], quotients[i]});
  }
  if (!certificate.is_zero()) {
    const Split above = split_known(certificate.numerator(), candidates);
    const Split below = split_known(certificate.denominator(), candidates);
    Factored factor = above.known;
    factor.multiply(below.known, -1);
    factor.multiply(below.rest, -1);
    summands.push_back({above.rest, factor});
    Factored shifted = factor.shift(kIndex, 1);
    shifted.multiply(summand.by_index);
    summands.push_back({-above.rest.shift(kIndex, 1), shifted});
  }
  IdentityCheck out{false, sum_over_common_denominator(ring, summands)};
  out.holds = out.residue.is_zero();
  return out;
}

}  // namespace sumwright::search
