// Conversions between GMP's C++ integers and FLINT's, and FLINT's integers as values.
#pragma once

#include <flint/fmpz.h>
#include <gmpxx.h>

namespace sumwright::algebra {

/// An fmpz that clears itself; used at the border to FLINT.
class Fmpz {
 public:
  Fmpz() { fmpz_init(value_); }
  explicit Fmpz(const mpz_class& value) {
    fmpz_init(value_);
    fmpz_set_mpz(value_, value.get_mpz_t());
  }
  ~Fmpz() { fmpz_clear(value_); }
  Fmpz(const Fmpz&) = delete;
  Fmpz& operator=(const Fmpz&) = delete;

  [[nodiscard]] fmpz* raw() { return value_; }
  [[nodiscard]] const fmpz* raw() const { return value_; }
  [[nodiscard]] mpz_class get() const {
    mpz_class out;
    fmpz_get_mpz(out.get_mpz_t(), value_);
    return out;
  }

 private:
  fmpz_t value_;
};

}  // namespace sumwright::algebra
