// From residues to integers: Chinese remainders, then one rational reconstruction of a random
// combination, which gives the common denominator of all entries (largest-quotient rule, M.
// Monagan, Maximal quotient rational reconstruction, ISSAC 2004).
#include <algorithm>

#include "search/reconstruction.hpp"

namespace sumwright::search {
namespace {

constexpr std::size_t kSpareBits = 20;

// Brings `value` into the symmetric range of residues.
void make_symmetric(mpz_class& value, const mpz_class& modulus, const mpz_class& half) {
  mpz_fdiv_r(value.get_mpz_t(), value.get_mpz_t(), modulus.get_mpz_t());
  if (value > half) value -= modulus;
}

std::size_t bits(const mpz_class& value) { return mpz_sizeinbase(value.get_mpz_t(), 2); }

// The denominator at the largest quotient of Euclid's algorithm; 0 when none stands out.
mpz_class common_denominator(const mpz_class& modulus, const mpz_class& residue) {
  mpz_class r0 = modulus;
  mpz_class r1 = residue;
  mpz_class t0 = 0;
  mpz_class t1 = 1;
  mpz_class best = 0;
  std::size_t best_bits = kSpareBits;
  mpz_class quotient;
  mpz_class rest;
  while (r1 != 0) {
    mpz_fdiv_qr(quotient.get_mpz_t(), rest.get_mpz_t(), r0.get_mpz_t(), r1.get_mpz_t());
    if (bits(quotient) > best_bits) {
      best_bits = bits(quotient);
      best = t1;
    }
    t0 -= quotient * t1;
    std::swap(t0, t1);
    std::swap(r0, r1);
    std::swap(r1, rest);
  }
  return abs(best);
}

}  // namespace

void IntegerLift::add(Word prime, const WordVector& image) {
  if (values_.empty()) {
    for (const Word value : image) values_.emplace_back(value);
    modulus_ = prime;
    return;
  }
  const Field field(prime);
  const Word inverse = field.inverse(mpz_fdiv_ui(modulus_.get_mpz_t(), prime));
  for (std::size_t i = 0; i < values_.size(); ++i) {
    const Word old = mpz_fdiv_ui(values_[i].get_mpz_t(), prime);
    const Word step = field.mul(field.sub(image[i], old), inverse);
    mpz_addmul_ui(values_[i].get_mpz_t(), modulus_.get_mpz_t(), step);
  }
  modulus_ *= prime;
}

std::optional<std::vector<mpz_class>> IntegerLift::vector() {
  mpz_class combination = 0;
  for (const mpz_class& value : values_) {
    mpz_addmul_ui(combination.get_mpz_t(), value.get_mpz_t(), random_() % 251 + 1);
  }
  mpz_fdiv_r(combination.get_mpz_t(), combination.get_mpz_t(), modulus_.get_mpz_t());
  mpz_class denominator =
      combination == 0 ? mpz_class(1) : common_denominator(modulus_, combination);
  if (denominator == 0) return std::nullopt;
  std::vector<mpz_class> out = values_;
  const mpz_class half = modulus_ / 2;
  const std::size_t limit = bits(modulus_) - kSpareBits / 2;
  for (mpz_class& value : out) {
    value *= denominator;
    make_symmetric(value, modulus_, half);
    if (bits(value) > limit) return std::nullopt;
  }
  return out;
}

}  // namespace sumwright::search
