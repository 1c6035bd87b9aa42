// Thin covers over Arb: exact numbers in, balls out.
#include "external/balls.hpp"

#include <acb_hypgeom.h>
#include <arb_hypgeom.h>

namespace sumwright::testing {
namespace {

class ExactRational {
 public:
  explicit ExactRational(const mpq_class& q) {
    fmpq_init(value_);
    fmpq_set_mpq(value_, q.get_mpq_t());
  }
  ExactRational(const ExactRational&) = delete;
  ExactRational& operator=(const ExactRational&) = delete;
  ~ExactRational() { fmpq_clear(value_); }
  [[nodiscard]] const fmpq* get() const { return value_; }

 private:
  fmpq_t value_;
};

class ExactInteger {
 public:
  explicit ExactInteger(const mpz_class& z) {
    fmpz_init(value_);
    fmpz_set_mpz(value_, z.get_mpz_t());
  }
  ExactInteger(const ExactInteger&) = delete;
  ExactInteger& operator=(const ExactInteger&) = delete;
  ~ExactInteger() { fmpz_clear(value_); }
  [[nodiscard]] const fmpz* get() const { return value_; }

 private:
  fmpz_t value_;
};

/// Rational numbers as consecutive balls, the form in which Arb takes lists.
class BallList {
 public:
  BallList(const std::vector<mpq_class>& numbers, long bits)
      : size_(static_cast<slong>(numbers.size())), list_(_arb_vec_init(size_)) {
    for (std::size_t i = 0; i < numbers.size(); ++i) {
      arb_set_fmpq(list_ + i, ExactRational(numbers[i]).get(), bits);
    }
  }
  BallList(const BallList&) = delete;
  BallList& operator=(const BallList&) = delete;
  ~BallList() { _arb_vec_clear(list_, size_); }
  [[nodiscard]] arb_ptr get() const { return list_; }
  [[nodiscard]] slong size() const { return size_; }

 private:
  slong size_;
  arb_ptr list_;
};

/// The same as complex balls with imaginary part 0.
class ComplexList {
 public:
  ComplexList(const std::vector<mpq_class>& numbers, long bits)
      : size_(static_cast<slong>(numbers.size())), list_(_acb_vec_init(size_)) {
    for (std::size_t i = 0; i < numbers.size(); ++i) {
      arb_set_fmpq(acb_realref(list_ + i), ExactRational(numbers[i]).get(), bits);
    }
  }
  ComplexList(const ComplexList&) = delete;
  ComplexList& operator=(const ComplexList&) = delete;
  ~ComplexList() { _acb_vec_clear(list_, size_); }
  [[nodiscard]] acb_ptr get() const { return list_; }
  [[nodiscard]] slong size() const { return size_; }

 private:
  slong size_;
  acb_ptr list_;
};

}  // namespace

bool Ball::contains(const mpq_class& number) const {
  return arb_contains_fmpq(ball_, ExactRational(number).get()) != 0;
}

bool Ball::is_narrow(const Ball& scale, long bits) const {
  if (arb_is_finite(ball_) == 0 || !scale.is_nonzero()) return false;
  arf_t radius;
  arf_t least;
  arf_init(radius);
  arf_init(least);
  arf_set_mag(radius, arb_radref(ball_));
  arb_get_abs_lbound_arf(least, scale.ball_, 64);
  arf_mul_2exp_si(radius, radius, bits);
  const bool narrow = arf_cmp(radius, least) <= 0;
  arf_clear(radius);
  arf_clear(least);
  return narrow;
}

std::string Ball::text() const {
  char* digits = arb_get_str(ball_, 15, 0);
  std::string out(digits);
  flint_free(digits);
  return out;
}

Ball Balls::number(const mpq_class& q) const {
  Ball out;
  arb_set_fmpq(out.get(), ExactRational(q).get(), bits_);
  return out;
}

Ball Balls::sum(const Ball& a, const Ball& b) const {
  Ball out;
  arb_add(out.get(), a.get(), b.get(), bits_);
  return out;
}

Ball Balls::difference(const Ball& a, const Ball& b) const {
  Ball out;
  arb_sub(out.get(), a.get(), b.get(), bits_);
  return out;
}

Ball Balls::product(const Ball& a, const Ball& b) const {
  Ball out;
  arb_mul(out.get(), a.get(), b.get(), bits_);
  return out;
}

Ball Balls::quotient(const Ball& a, const Ball& b) const {
  Ball out;
  arb_div(out.get(), a.get(), b.get(), bits_);
  return out;
}

Ball Balls::power(const Ball& a, const mpz_class& exponent) const {
  Ball out;
  arb_pow_fmpz(out.get(), a.get(), ExactInteger(exponent).get(), bits_);
  return out;
}

Ball Balls::square_root(const Ball& a) const {
  Ball out;
  arb_sqrt(out.get(), a.get(), bits_);
  return out;
}

Ball Balls::exponential(const mpq_class& q) const {
  Ball out;
  arb_exp(out.get(), number(q).get(), bits_);
  return out;
}

Ball Balls::pi() const {
  Ball out;
  arb_const_pi(out.get(), bits_);
  return out;
}

Ball Balls::gamma(const mpq_class& x) const {
  Ball out;
  arb_gamma_fmpq(out.get(), ExactRational(x).get(), bits_);
  return out;
}

Ball Balls::reciprocal_gamma(const mpq_class& x) const {
  Ball out;
  if (x.get_den() == 1 && x <= 0) return out;
  return quotient(number(1), gamma(x));
}

Ball Balls::binomial(const mpq_class& a, const mpq_class& b) const {
  return product(gamma(a + 1), product(reciprocal_gamma(b + 1), reciprocal_gamma(a - b + 1)));
}

Ball Balls::rising(const mpq_class& x, const mpq_class& m) const {
  return product(gamma(x + m), reciprocal_gamma(x));
}

Ball Balls::falling(const mpq_class& x, const mpq_class& m) const {
  return product(gamma(x + 1), reciprocal_gamma(x - m + 1));
}

Ball Balls::fibonacci(const mpz_class& n) const {
  Ball out;
  arb_fib_fmpz(out.get(), ExactInteger(n).get(), bits_);
  return out;
}

Ball Balls::legendre_p(const mpq_class& n, const Ball& x) const {
  Ball out;
  arb_hypgeom_legendre_p(out.get(), number(n).get(), number(0).get(), x.get(), 0, bits_);
  return out;
}

Ball Balls::jacobi_p(const mpq_class& n, const mpq_class& a, const mpq_class& b,
                     const mpq_class& x) const {
  Ball out;
  arb_hypgeom_jacobi_p(out.get(), number(n).get(), number(a).get(), number(b).get(),
                       number(x).get(), bits_);
  return out;
}

Ball Balls::gegenbauer_c(const mpq_class& n, const mpq_class& m, const mpq_class& x) const {
  Ball out;
  arb_hypgeom_gegenbauer_c(out.get(), number(n).get(), number(m).get(), number(x).get(), bits_);
  return out;
}

Ball Balls::laguerre_l(const mpq_class& n, const mpq_class& a, const mpq_class& x) const {
  Ball out;
  arb_hypgeom_laguerre_l(out.get(), number(n).get(), number(a).get(), number(x).get(), bits_);
  return out;
}

Ball Balls::bessel_k(const mpq_class& order, const mpq_class& x) const {
  Ball out;
  arb_hypgeom_bessel_k(out.get(), number(order).get(), number(x).get(), bits_);
  return out;
}

Ball Balls::gamma_upper(const mpq_class& s, const mpq_class& x) const {
  Ball out;
  arb_hypgeom_gamma_upper(out.get(), number(s).get(), number(x).get(), 0, bits_);
  return out;
}

Ball Balls::beta_regularized(const mpq_class& a, const mpq_class& b, const mpq_class& x) const {
  Ball out;
  arb_hypgeom_beta_lower(out.get(), number(a).get(), number(b).get(), number(x).get(), 1, bits_);
  return out;
}

Ball Balls::hypergeometric_2f1(const mpq_class& a, const mpq_class& b, const mpq_class& c,
                               const mpq_class& z) const {
  Ball out;
  arb_hypgeom_2f1(out.get(), number(a).get(), number(b).get(), number(c).get(), number(z).get(), 0,
                  bits_);
  return out;
}

Ball Balls::hypergeometric(const std::vector<mpq_class>& a, const std::vector<mpq_class>& b,
                           const mpq_class& z) const {
  Ball out;
  const BallList upper(a, bits_);
  const BallList lower(b, bits_);
  arb_hypgeom_pfq(out.get(), upper.get(), upper.size(), lower.get(), lower.size(), number(z).get(),
                  0, bits_);
  return out;
}

Ball Balls::partial_sum(const std::vector<mpq_class>& a, const std::vector<mpq_class>& b,
                        const mpq_class& z, const mpz_class& terms) const {
  Ball out;
  const ComplexList upper(a, bits_);
  const ComplexList lower(b, bits_);
  const ComplexList results({0, 0, z}, bits_);
  acb_hypgeom_pfq_sum(results.get(), results.get() + 1, upper.get(), upper.size(), lower.get(),
                      lower.size(), results.get() + 2, terms.get_si(), bits_);
  acb_get_real(out.get(), results.get());
  return out;
}

}  // namespace sumwright::testing
