// Real balls (midpoint and proved radius) at one precision, by Arb.
//
// Arb: F. Johansson, IEEE Trans. Computers 66 (2017) 1281-1292; its hypergeometric functions: ACM
// Trans. Math. Software 45 (2019) 30. The program under test does not use it.
#pragma once

#include <arb.h>
#include <gmpxx.h>

#include <functional>
#include <map>
#include <string>
#include <vector>

namespace sumwright::testing {

/// Values of the running variable and of parameters.
using Values = std::map<std::string, mpq_class>;

/// An arb_t that frees itself.
class Ball {
 public:
  Ball() { arb_init(ball_); }
  Ball(const Ball& other) : Ball() { arb_set(ball_, other.ball_); }
  Ball(Ball&& other) noexcept : Ball() { arb_swap(ball_, other.ball_); }
  Ball& operator=(Ball other) noexcept {
    arb_swap(ball_, other.ball_);
    return *this;
  }
  ~Ball() { arb_clear(ball_); }

  [[nodiscard]] arb_ptr get() { return ball_; }
  [[nodiscard]] arb_srcptr get() const { return ball_; }

  [[nodiscard]] bool contains_zero() const { return arb_contains_zero(ball_) != 0; }
  [[nodiscard]] bool contains(const mpq_class& number) const;
  /// Finite, without 0 in it.
  [[nodiscard]] bool is_nonzero() const { return arb_is_finite(ball_) != 0 && !contains_zero(); }
  /// Whether the radius is at most 2^-bits times the smallest absolute value in `scale`.
  [[nodiscard]] bool is_narrow(const Ball& scale, long bits) const;
  /// Midpoint and radius, for messages.
  [[nodiscard]] std::string text() const;

 private:
  arb_t ball_;
};

/// Arithmetic and functions at `bits` bits. Arguments are exact rational numbers; a function
/// without a value there gives a ball that is not finite.
class Balls {
 public:
  explicit Balls(long bits) : bits_(bits) {}

  [[nodiscard]] Ball number(const mpq_class& q) const;
  [[nodiscard]] Ball sum(const Ball& a, const Ball& b) const;
  [[nodiscard]] Ball difference(const Ball& a, const Ball& b) const;
  [[nodiscard]] Ball product(const Ball& a, const Ball& b) const;
  [[nodiscard]] Ball quotient(const Ball& a, const Ball& b) const;
  [[nodiscard]] Ball power(const Ball& a, const mpz_class& exponent) const;
  [[nodiscard]] Ball square_root(const Ball& a) const;
  [[nodiscard]] Ball exponential(const mpq_class& q) const;
  [[nodiscard]] Ball pi() const;

  [[nodiscard]] Ball gamma(const mpq_class& x) const;
  /// 1/Gamma(x), 0 at the poles.
  [[nodiscard]] Ball reciprocal_gamma(const mpq_class& x) const;
  /// Gamma(a+1)/(Gamma(b+1) Gamma(a-b+1)); DLMF 1.2.6 with 5.2.
  [[nodiscard]] Ball binomial(const mpq_class& a, const mpq_class& b) const;
  /// Gamma(x+m)/Gamma(x); DLMF 5.2.5.
  [[nodiscard]] Ball rising(const mpq_class& x, const mpq_class& m) const;
  /// Gamma(x+1)/Gamma(x-m+1).
  [[nodiscard]] Ball falling(const mpq_class& x, const mpq_class& m) const;

  [[nodiscard]] Ball fibonacci(const mpz_class& n) const;
  [[nodiscard]] Ball legendre_p(const mpq_class& n, const Ball& x) const;
  [[nodiscard]] Ball jacobi_p(const mpq_class& n, const mpq_class& a, const mpq_class& b,
                              const mpq_class& x) const;
  [[nodiscard]] Ball gegenbauer_c(const mpq_class& n, const mpq_class& m, const mpq_class& x) const;
  [[nodiscard]] Ball laguerre_l(const mpq_class& n, const mpq_class& a, const mpq_class& x) const;
  [[nodiscard]] Ball bessel_k(const mpq_class& order, const mpq_class& x) const;
  /// Gamma(s, x), not regularized.
  [[nodiscard]] Ball gamma_upper(const mpq_class& s, const mpq_class& x) const;
  /// I_x(a, b), regularized; DLMF 8.17.2.
  [[nodiscard]] Ball beta_regularized(const mpq_class& a, const mpq_class& b,
                                      const mpq_class& x) const;
  [[nodiscard]] Ball hypergeometric_2f1(const mpq_class& a, const mpq_class& b, const mpq_class& c,
                                        const mpq_class& z) const;
  /// pFq(a; b; z); DLMF 16.2.1.
  [[nodiscard]] Ball hypergeometric(const std::vector<mpq_class>& a,
                                    const std::vector<mpq_class>& b, const mpq_class& z) const;
  /// The first `terms` terms of sum_k (a_1)_k ... / ((b_1)_k ...) z^k; the k! of pFq is a b = 1.
  [[nodiscard]] Ball partial_sum(const std::vector<mpq_class>& a, const std::vector<mpq_class>& b,
                                 const mpq_class& z, const mpz_class& terms) const;

 private:
  long bits_;
};

/// A sum's value as a known function, at n and parameters.
using Formula = std::function<Ball(const Balls&, const mpz_class& n, const Values&)>;

}  // namespace sumwright::testing
