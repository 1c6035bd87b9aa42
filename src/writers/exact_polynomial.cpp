// Schoolbook arithmetic on maps from exponents to GMP rationals.
#include "writers/exact_polynomial.hpp"

#include <algorithm>

namespace sumwright::writers {

namespace {

[[nodiscard]] std::size_t limbs(const mpq_class& value) {
  return 1 + mpz_size(value.get_num_mpz_t()) + mpz_size(value.get_den_mpz_t());
}

}  // namespace

ExactPolynomial expand(const proof::Polynomial& value) {
  ExactPolynomial out;
  for (const proof::Monomial& term : value.terms) {
    mpq_class& c = out[term.exponents];
    c += term.coefficient;
    if (c == 0) out.erase(term.exponents);
  }
  return out;
}

ExactPolynomial product(const ExactPolynomial& a, const ExactPolynomial& b, Budget& budget) {
  ExactPolynomial out;
  std::vector<unsigned long> exponents;
  for (const auto& [ea, ca] : a) {
    for (const auto& [eb, cb] : b) {
      budget.spend(limbs(ca) * limbs(cb) + ea.size());
      exponents = ea;
      for (std::size_t i = 0; i < exponents.size(); ++i) exponents[i] += eb[i];
      out[exponents] += ca * cb;
    }
  }
  std::erase_if(out, [](const auto& term) { return term.second == 0; });
  return out;
}

ExactPolynomial expand(const proof::Factored& value, std::size_t symbols, Budget& budget) {
  ExactPolynomial out;
  if (value.constant == 0) return out;
  out[std::vector<unsigned long>(symbols, 0)] = value.constant;
  for (const auto& [factor, exponent] : value.factors) {
    if (exponent < 0) throw std::invalid_argument("a negative power is not a polynomial");
    const ExactPolynomial base = expand(factor);
    for (long i = 0; i < exponent; ++i) out = product(out, base, budget);
  }
  return out;
}

void add_to(ExactPolynomial& sum, const ExactPolynomial& term, const mpq_class& factor) {
  for (const auto& [exponents, coefficient] : term) {
    mpq_class& c = sum[exponents];
    c += factor * coefficient;
    if (c == 0) sum.erase(exponents);
  }
}

ExactPolynomial shifted(const ExactPolynomial& value, std::size_t symbol, Budget& budget) {
  ExactPolynomial out;
  for (const auto& [exponents, coefficient] : value) {
    std::vector<unsigned long> moved = exponents;
    mpz_class binomial = 1;
    const unsigned long degree = exponents[symbol];
    for (unsigned long j = 0; j <= degree; ++j) {
      budget.spend(limbs(coefficient) * (1 + mpz_size(binomial.get_mpz_t())));
      moved[symbol] = j;
      mpq_class& c = out[moved];
      c += coefficient * binomial;
      if (c == 0) out.erase(moved);
      binomial = binomial * (degree - j) / (j + 1);
    }
  }
  return out;
}

mpz_class evaluate(const proof::Polynomial& value, const std::vector<long>& point) {
  mpz_class sum = 0;
  mpz_class power;
  for (const proof::Monomial& term : value.terms) {
    mpz_class product = term.coefficient;
    for (std::size_t i = 0; i < term.exponents.size(); ++i) {
      if (term.exponents[i] == 0) continue;
      const mpz_class base = point[i];
      mpz_pow_ui(power.get_mpz_t(), base.get_mpz_t(), term.exponents[i]);
      product *= power;
    }
    sum += product;
  }
  return sum;
}

mpq_class evaluate(const proof::Factored& value, const std::vector<long>& point) {
  mpq_class product = value.constant;
  for (const auto& [factor, exponent] : value.factors) {
    if (exponent < 0) throw std::invalid_argument("a negative power is not a polynomial");
    mpz_class power;
    const mpz_class base = evaluate(factor, point);
    mpz_pow_ui(power.get_mpz_t(), base.get_mpz_t(), static_cast<unsigned long>(exponent));
    product *= power;
  }
  return product;
}

unsigned long degree_bound(const proof::Polynomial& value, std::size_t symbol) {
  unsigned long degree = 0;
  for (const proof::Monomial& term : value.terms) degree = std::max(degree, term.exponents[symbol]);
  return degree;
}

unsigned long degree_bound(const proof::Factored& value, std::size_t symbol) {
  unsigned long degree = 0;
  for (const auto& [factor, exponent] : value.factors) {
    const auto e = static_cast<unsigned long>(std::max(exponent, 0L));
    degree += degree_bound(factor, symbol) * e;
  }
  return degree;
}

}  // namespace sumwright::writers
