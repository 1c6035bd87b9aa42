// Arithmetic modulo a prime below 2^60, for images of exact computations.
#pragma once

#include <flint/nmod_vec.h>
#include <flint/ulong_extras.h>

#include <cstddef>
#include <vector>

namespace sumwright::search {

using Word = mp_limb_t;
using WordVector = std::vector<Word>;

/// The field of p elements, 2^59 < p < 2^60. Elements are words 0 <= x < p.
class Field {
 public:
  explicit Field(Word prime) { nmod_init(&mod_, prime); }

  [[nodiscard]] Word prime() const { return mod_.n; }
  [[nodiscard]] Word add(Word a, Word b) const { return nmod_add(a, b, mod_); }
  [[nodiscard]] Word sub(Word a, Word b) const { return nmod_sub(a, b, mod_); }
  [[nodiscard]] Word neg(Word a) const { return nmod_neg(a, mod_); }
  [[nodiscard]] Word mul(Word a, Word b) const { return nmod_mul(a, b, mod_); }
  [[nodiscard]] Word inverse(Word a) const { return n_invmod(a, mod_.n); }  ///< a != 0
  [[nodiscard]] Word power(Word a, Word e) const {
    Word out = 1;
    for (; e > 0; e >>= 1) {
      if ((e & 1) != 0) out = mul(out, a);
      if (e > 1) a = mul(a, a);
    }
    return out;
  }
  [[nodiscard]] Word reduce(Word a) const {
    Word out;
    NMOD_RED(out, a, mod_);
    return out;
  }
  [[nodiscard]] Word from_signed(long a) const {
    return a >= 0 ? reduce(static_cast<Word>(a)) : neg(reduce(-static_cast<Word>(a)));
  }
  /// sum over i < count of a[i] * b[i * stride]. Products are below 2^120, so 128 bits hold 256.
  [[nodiscard]] Word dot(const Word* a, const Word* b, std::size_t count,
                         std::size_t stride = 1) const;

  /// Inverses of all values with one inversion; false when one of them is 0 (then unchanged).
  [[nodiscard]] bool invert_all(WordVector& values) const;

 private:
  nmod_t mod_;
};

/// The i-th prime of a fixed descending list below 2^60 (made on demand, shared by all threads).
[[nodiscard]] Word search_prime(std::size_t i);

}  // namespace sumwright::search
