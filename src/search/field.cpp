// Arithmetic modulo a prime: sums of products with one reduction, and many inverses from one.
#include "search/field.hpp"

#include <algorithm>
#include <mutex>

namespace sumwright::search {
namespace {

__extension__ typedef unsigned __int128 DoubleWord;

}  // namespace

Word Field::dot(const Word* a, const Word* b, std::size_t count, std::size_t stride) const {
  Word out = 0;
  for (std::size_t i = 0; i < count;) {
    DoubleWord sum = out;
    const std::size_t end = std::min(count, i + 250);
    for (; i < end; ++i) sum += static_cast<DoubleWord>(a[i]) * b[i * stride];
    NMOD2_RED2(out, static_cast<Word>(sum >> 64), static_cast<Word>(sum), mod_);
  }
  return out;
}

bool Field::invert_all(WordVector& values) const {
  if (values.empty()) return true;
  WordVector prefix(values.size());
  Word product = 1;
  for (std::size_t i = 0; i < values.size(); ++i) {
    prefix[i] = product;
    product = mul(product, values[i]);
  }
  if (product == 0) return false;
  Word rest = inverse(product);
  for (std::size_t i = values.size(); i-- > 0;) {
    const Word value = values[i];
    values[i] = mul(rest, prefix[i]);
    rest = mul(rest, value);
  }
  return true;
}

Word search_prime(std::size_t i) {
  static std::mutex mutex;
  static WordVector primes;
  const std::lock_guard<std::mutex> lock(mutex);
  Word candidate = primes.empty() ? (Word{1} << 60) - 1 : primes.back() - 2;
  while (primes.size() <= i) {
    while (n_is_prime(candidate) == 0) candidate -= 2;
    primes.push_back(candidate);
    candidate -= 2;
  }
  return primes[i];
}

}  // namespace sumwright::search
