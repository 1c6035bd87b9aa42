// Factored values: from polynomials to constant * product of primitive factors, kept canonical
// (sign and content in the constant, factors sorted and different, exponents nonzero).
#include <flint/fmpz_mpoly_factor.h>

#include <algorithm>
#include <stdexcept>

#include "algebra/integer.hpp"
#include "algebra/limits.hpp"
#include "algebra/polynomial.hpp"
#include "algebra/size_guard.hpp"

namespace sumwright::algebra {
namespace {

mpq_class rational_power(const mpq_class& base, long exponent) {
  if (exponent < 0 && base == 0) throw std::domain_error("zero has no inverse");
  const auto e = static_cast<unsigned long>(exponent < 0 ? -exponent : exponent);
  const double bits = static_cast<double>(mpz_sizeinbase(base.get_num_mpz_t(), 2) +
                                          mpz_sizeinbase(base.get_den_mpz_t(), 2));
  if (base != 1 && base != -1 && bits * static_cast<double>(e) > 1.0e8) {
    throw TimeUp("size limit reached: power of a constant");
  }
  if (base == 1 || base == -1) return e % 2 == 0 ? mpq_class(1) : base;
  mpq_class out;
  mpz_pow_ui(out.get_num_mpz_t(), base.get_num_mpz_t(), e);
  mpz_pow_ui(out.get_den_mpz_t(), base.get_den_mpz_t(), e);
  if (exponent < 0) out = 1 / out;
  return out;
}

// Exponents stay far below overflow, so that sums and products of two of them are safe.
long checked(long exponent) {
  constexpr long kMaxExponent = 1L << 30;
  if (exponent > kMaxExponent || exponent < -kMaxExponent) {
    throw TimeUp("size limit reached: exponent of a factor");
  }
  return exponent;
}

// Inserts a canonical factor (primitive, leading coefficient > 0, not constant).
void insert(Factored& into, const Polynomial& base, long exponent) {
  auto& list = into.factors;
  const auto at = std::lower_bound(
      list.begin(), list.end(), base,
      [](const auto& entry, const Polynomial& b) { return compare(entry.first, b) < 0; });
  if (at == list.end() || compare(at->first, base) != 0) {
    list.insert(at, {base, exponent});
    return;
  }
  at->second = checked(at->second + exponent);
  if (at->second == 0) list.erase(at);
}

Polynomial product(const RingPtr& ring, const Factored& value, int sign, const mpz_class& start) {
  Polynomial out(ring, start);
  for (const auto& [base, exponent] : value.factors) {
    if (exponent * sign > 0) out *= base.power(static_cast<unsigned long>(exponent * sign));
  }
  return out;
}

class FactorList {
 public:
  explicit FactorList(const Ring& ring) : ring_(ring) {
    fmpz_mpoly_factor_init(list_, ring_.context());
  }
  ~FactorList() { fmpz_mpoly_factor_clear(list_, ring_.context()); }
  FactorList(const FactorList&) = delete;
  FactorList& operator=(const FactorList&) = delete;
  fmpz_mpoly_factor_struct* raw() { return list_; }

 private:
  const Ring& ring_;
  fmpz_mpoly_factor_t list_;
};

}  // namespace

void Factored::multiply(const Polynomial& base, long exponent) {
  if (checked(exponent) == 0 || is_zero()) return;
  if (base.is_zero()) throw std::domain_error("factor 0 of a factored value");
  const Polynomial primitive = base.primitive_part();
  mpq_class unit = base.content();
  if (base.leading_coefficient() < 0) unit = -unit;
  constant *= rational_power(unit, exponent);
  if (!primitive.is_one()) insert(*this, primitive, exponent);
}

void Factored::multiply(const Factored& other, long exponent) {
  if (checked(exponent) == 0) return;
  constant *= rational_power(other.constant, exponent);
  if (is_zero()) {
    factors.clear();
    return;
  }
  // A copy first: `other` may be this value.
  const auto list = other.factors;
  for (const auto& [base, e] : list) insert(*this, base, checked(e * exponent));
}

Factored Factored::inverse() const {
  Factored out;
  out.multiply(*this, -1);
  return out;
}

Polynomial Factored::numerator(const RingPtr& ring) const {
  if (is_zero()) return Polynomial(ring);
  return product(ring, *this, 1, constant.get_num());
}

Polynomial Factored::denominator(const RingPtr& ring) const {
  return product(ring, *this, -1, constant.get_den());
}

// An irreducible factor may split after the substitution, so each is factored anew.
Factored Factored::substitute(std::size_t variable, const Polynomial& value) const {
  Factored out;
  out.constant = constant;
  if (is_zero()) return out;
  Factored zero;
  zero.constant = 0;
  bool vanishes = false;
  for (const auto& [base, exponent] : factors) {
    if (!base.depends_on(variable)) {
      out.multiply(base, exponent);
      continue;
    }
    const Polynomial image = base.substitute(variable, value);
    if (image.is_zero()) {
      if (exponent < 0) throw std::domain_error("a denominator becomes 0");
      vanishes = true;
      continue;
    }
    out.multiply(factor(image), exponent);
  }
  return vanishes ? zero : out;
}

// A shift keeps factors irreducible, primitive and their leading coefficients.
Factored Factored::shift(std::size_t variable, long by) const {
  Factored out;
  out.constant = constant;
  for (const auto& [base, exponent] : factors) {
    if (base.depends_on(variable)) {
      out.multiply(base.shift(variable, by), exponent);
    } else {
      insert(out, base, exponent);
    }
  }
  return out;
}

Factored factor(const Polynomial& polynomial) {
  Factored out;
  if (polynomial.is_constant()) {
    out.constant = polynomial.constant();
    return out;
  }
  if (polynomial.total_degree() == 1) {  // irreducible over Q
    out.multiply(polynomial, 1);
    return out;
  }
  guard_factorisation(polynomial);
  const RingPtr& ring = polynomial.ring();
  FactorList list(*ring);
  if (!fmpz_mpoly_factor(list.raw(), polynomial.raw(), ring->context())) {
    throw std::runtime_error("factorisation failed");
  }
  Fmpz constant;
  fmpz_mpoly_factor_get_constant_fmpz(constant.raw(), list.raw(), ring->context());
  out.constant = constant.get();
  const slong length = fmpz_mpoly_factor_length(list.raw(), ring->context());
  for (slong i = 0; i < length; ++i) {
    Polynomial base(ring);
    fmpz_mpoly_factor_get_base(base.raw(), list.raw(), i, ring->context());
    out.multiply(base, fmpz_mpoly_factor_get_exp_si(list.raw(), i, ring->context()));
  }
  return out;
}

}  // namespace sumwright::algebra
