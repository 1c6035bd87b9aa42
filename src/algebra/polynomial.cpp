// Multivariate polynomials over Z: values, ring operations and questions about one polynomial.
// Invariant: `value_` is always a canonical FLINT polynomial of the ring's context.
#include "algebra/polynomial.hpp"

#include <algorithm>
#include <stdexcept>

#include "algebra/integer.hpp"
#include "algebra/limits.hpp"
#include "algebra/size_guard.hpp"

namespace sumwright::algebra {

Ring::Ring(std::vector<std::string> names) : names_(std::move(names)) {
  if (names_.empty()) throw std::invalid_argument("a ring needs a variable");
  install_abort_hook();
  fmpz_mpoly_ctx_init(context_, static_cast<slong>(names_.size()), ORD_LEX);
}

Ring::~Ring() { fmpz_mpoly_ctx_clear(context_); }

Polynomial::Polynomial(RingPtr ring) : ring_(std::move(ring)) {
  fmpz_mpoly_init(value_, ring_->context());
}

Polynomial::Polynomial(RingPtr ring, const mpz_class& constant) : Polynomial(std::move(ring)) {
  const Fmpz value(constant);
  fmpz_mpoly_set_fmpz(value_, value.raw(), ring_->context());
}

Polynomial Polynomial::variable(RingPtr ring, std::size_t index) {
  Polynomial out(std::move(ring));
  fmpz_mpoly_gen(out.value_, static_cast<slong>(index), out.ring_->context());
  return out;
}

Polynomial Polynomial::affine(RingPtr ring, const std::vector<long>& coefficients, long constant) {
  std::vector<Monomial> terms;
  const std::size_t size = ring->size();
  if (coefficients.size() > size) throw std::invalid_argument("more coefficients than variables");
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    Monomial term{coefficients[i], std::vector<unsigned long>(size, 0)};
    term.exponents[i] = 1;
    terms.push_back(std::move(term));
  }
  terms.push_back({constant, std::vector<unsigned long>(size, 0)});
  return from_terms(std::move(ring), terms);
}

Polynomial Polynomial::from_terms(RingPtr ring, const std::vector<Monomial>& terms) {
  Polynomial out(std::move(ring));
  for (const Monomial& term : terms) {
    if (term.exponents.size() != out.ring_->size()) {
      throw std::invalid_argument("a term needs one exponent per variable");
    }
    const Fmpz coefficient(term.coefficient);
    fmpz_mpoly_push_term_fmpz_ui(out.value_, coefficient.raw(), term.exponents.data(),
                                 out.ring_->context());
  }
  fmpz_mpoly_sort_terms(out.value_, out.ring_->context());
  fmpz_mpoly_combine_like_terms(out.value_, out.ring_->context());
  return out;
}

Polynomial::Polynomial(const Polynomial& other) : Polynomial(other.ring_) {
  fmpz_mpoly_set(value_, other.value_, ring_->context());
}

// The ring is shared, not moved: what is moved from stays a polynomial, 0, of its ring.
Polynomial::Polynomial(Polynomial&& other) noexcept
    : ring_(other.ring_) {  // NOLINT(performance-move-constructor-init)
  fmpz_mpoly_init(value_, ring_->context());
  fmpz_mpoly_swap(value_, other.value_, ring_->context());
}

Polynomial& Polynomial::operator=(const Polynomial& other) {
  if (this != &other) *this = Polynomial(other);
  return *this;
}

// The value that is given up is cleared in its own ring by the destructor of `other`.
Polynomial& Polynomial::operator=(Polynomial&& other) noexcept {
  std::swap(ring_, other.ring_);
  std::swap(value_[0], other.value_[0]);
  return *this;
}

Polynomial::~Polynomial() { fmpz_mpoly_clear(value_, ring_->context()); }

Polynomial& Polynomial::operator+=(const Polynomial& other) {
  fmpz_mpoly_add(value_, value_, other.value_, ring_->context());
  return *this;
}

Polynomial& Polynomial::operator-=(const Polynomial& other) {
  fmpz_mpoly_sub(value_, value_, other.value_, ring_->context());
  return *this;
}

Polynomial& Polynomial::operator*=(const Polynomial& other) {
  guard_product(*this, other);
  fmpz_mpoly_mul(value_, value_, other.value_, ring_->context());
  return *this;
}

Polynomial operator*(const Polynomial& a, const Polynomial& b) {
  guard_product(a, b);
  Polynomial out(a.ring_);
  fmpz_mpoly_mul(out.value_, a.value_, b.value_, a.ring_->context());
  return out;
}

Polynomial operator-(Polynomial a) {
  fmpz_mpoly_neg(a.value_, a.value_, a.ring_->context());
  return a;
}

bool operator==(const Polynomial& a, const Polynomial& b) {
  return fmpz_mpoly_equal(a.value_, b.value_, a.ring_->context()) != 0;
}

Polynomial Polynomial::power(unsigned long exponent) const {
  if (exponent == 0) return Polynomial(ring_, 1);
  if (exponent == 1) return *this;
  guard_power(*this, exponent);
  Polynomial out(ring_);
  if (!fmpz_mpoly_pow_ui(out.value_, value_, exponent, ring_->context())) {
    throw TimeUp("size limit reached: power of a polynomial");
  }
  return out;
}

bool Polynomial::is_zero() const { return fmpz_mpoly_is_zero(value_, ring_->context()) != 0; }
bool Polynomial::is_one() const { return fmpz_mpoly_is_one(value_, ring_->context()) != 0; }
bool Polynomial::is_constant() const { return fmpz_mpoly_is_fmpz(value_, ring_->context()) != 0; }

mpz_class Polynomial::constant() const {
  if (!is_constant()) throw std::logic_error("constant() of a polynomial that is not constant");
  Fmpz out;
  fmpz_mpoly_get_fmpz(out.raw(), value_, ring_->context());
  return out.get();
}

std::size_t Polynomial::terms() const {
  return static_cast<std::size_t>(fmpz_mpoly_length(value_, ring_->context()));
}

long Polynomial::degree(std::size_t variable) const {
  return fmpz_mpoly_degree_si(value_, static_cast<slong>(variable), ring_->context());
}

long Polynomial::total_degree() const {
  return fmpz_mpoly_total_degree_si(value_, ring_->context());
}

mpz_class Polynomial::leading_coefficient() const {
  if (is_zero()) return 0;
  Fmpz out;
  fmpz_mpoly_get_term_coeff_fmpz(out.raw(), value_, 0, ring_->context());
  return out.get();
}

mpz_class Polynomial::content() const {
  Fmpz out;
  _fmpz_vec_content(out.raw(), value_->coeffs, value_->length);
  return out.get();
}

std::vector<Monomial> Polynomial::to_terms() const {
  std::vector<Monomial> out(terms());
  Fmpz coefficient;
  for (std::size_t i = 0; i < out.size(); ++i) {
    const auto at = static_cast<slong>(i);
    fmpz_mpoly_get_term_coeff_fmpz(coefficient.raw(), value_, at, ring_->context());
    out[i].coefficient = coefficient.get();
    out[i].exponents.resize(ring_->size());
    fmpz_mpoly_get_term_exp_ui(out[i].exponents.data(), value_, at, ring_->context());
  }
  return out;
}

std::pair<Polynomial, bool> Polynomial::divide(const Polynomial& divisor) const {
  if (divisor.is_zero()) throw std::domain_error("division by the zero polynomial");
  Polynomial quotient(ring_);
  const bool exact =
      fmpz_mpoly_divides(quotient.value_, value_, divisor.value_, ring_->context()) != 0;
  if (!exact) return {Polynomial(ring_), false};
  return {std::move(quotient), true};
}

Polynomial Polynomial::primitive_part() const {
  if (is_zero()) return *this;
  Fmpz divisor(leading_coefficient() < 0 ? mpz_class(-content()) : content());
  Polynomial out(ring_);
  fmpz_mpoly_scalar_divexact_fmpz(out.value_, value_, divisor.raw(), ring_->context());
  return out;
}

Polynomial gcd(const Polynomial& a, const Polynomial& b) {
  if (a.is_constant() || b.is_constant()) {
    if (a.is_zero()) return b.primitive_part();
    if (b.is_zero()) return a.primitive_part();
    return Polynomial(a.ring(), 1);
  }
  guard_gcd(a, b);
  Polynomial out(a.ring());
  if (!fmpz_mpoly_gcd(out.raw(), a.raw(), b.raw(), a.ring()->context())) {
    throw std::runtime_error("greatest common divisor failed");
  }
  return out.primitive_part();
}

Polynomial lcm(const Polynomial& a, const Polynomial& b) {
  if (a.is_zero() || b.is_zero()) return Polynomial(a.ring());
  const mpz_class content = lcm(a.content(), b.content());
  const Polynomial u = a.primitive_part();
  const Polynomial v = b.primitive_part();
  return Polynomial(a.ring(), content) * (u.divide(gcd(u, v)).first * v);
}

int compare(const Polynomial& a, const Polynomial& b) {
  const auto* context = a.ring()->context();
  const slong common =
      std::min(fmpz_mpoly_length(a.raw(), context), fmpz_mpoly_length(b.raw(), context));
  std::vector<ulong> left(a.ring()->size());
  std::vector<ulong> right(a.ring()->size());
  Fmpz x;
  Fmpz y;
  for (slong i = 0; i < common; ++i) {
    fmpz_mpoly_get_term_exp_ui(left.data(), a.raw(), i, context);
    fmpz_mpoly_get_term_exp_ui(right.data(), b.raw(), i, context);
    if (left != right) return left < right ? -1 : 1;
    fmpz_mpoly_get_term_coeff_fmpz(x.raw(), a.raw(), i, context);
    fmpz_mpoly_get_term_coeff_fmpz(y.raw(), b.raw(), i, context);
    const int order = fmpz_cmp(x.raw(), y.raw());
    if (order != 0) return order < 0 ? -1 : 1;
  }
  if (a.terms() == b.terms()) return 0;
  return a.terms() < b.terms() ? -1 : 1;
}

}  // namespace sumwright::algebra
