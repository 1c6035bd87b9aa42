// A number or the reason why there is none, and the claim language's operations on it.
//
// Internal to src/term; other stages use term/evaluation.hpp.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <functional>
#include <memory>
#include <string>
#include <vector>

#include "claim/expression.hpp"
#include "term/evaluation.hpp"

namespace sumwright::term::exact {

/// Numbers with more bits than this are refused with std::length_error.
inline constexpr std::size_t kMaxBits = 400'000;

/// A number, or one of two ways of having none. `undefined` (a factorial, rising or falling
/// outside of its domain) gives way to a factor 0 of the same product; `division_by_zero` never.
struct Outcome {
  enum class State : unsigned char { number, undefined, division_by_zero };
  struct Reason {
    std::string text;
    claim::Place place;
  };
  State state = State::number;
  mpq_class number;
  std::shared_ptr<const Reason> reason;  ///< null for a number

  [[nodiscard]] bool is_number() const { return state == State::number; }
  [[nodiscard]] Value value() const;
};

/// a := a * b, a + b, a - b. std::length_error past kMaxBits.
void multiply(Outcome& a, const Outcome& b);
void add(Outcome& a, const Outcome& b);
void subtract(Outcome& a, const Outcome& b);
/// a := 1/a; at 0, no value: the place is that of the divisor.
void invert(Outcome& a, claim::Place place);
/// a := a^e; 0^0 is 1, 0 to a negative power has no value.
void raise(Outcome& a, const mpz_class& exponent, claim::Place place);

/// a := floor(a).
void round_down(Outcome& a);
/// a := the smaller (larger) of a and b.
void take_extreme(Outcome& a, const Outcome& b, bool smaller);
/// a := a!, or the reciprocal factorial: 0 for an integer a < 0.
void to_factorial(Outcome& a, bool reciprocal, claim::Place place);
/// a := binomial(a, lower) for integers a and lower >= 0.
void to_binomial(Outcome& a, const mpz_class& lower);
/// a := no value.
void lose_value(Outcome& a, Outcome::State state, std::string text, claim::Place place);
/// The worse of both states; a's reason where they are equal. True when a is still a number.
bool take_worse(Outcome& a, const Outcome& b);

/// Products a(a+1)...(a+m-1), a(a-1)...(a-m+1) or binomial(a, m) for the last a, by m: a sum asks
/// for one length after the other.
class PrefixProducts {
 public:
  enum class Kind : unsigned char { rising, falling, binomial };
  explicit PrefixProducts(Kind kind) : kind_(kind) {}
  /// a := the product of `length` >= 0 factors; `tick` is called once per factor.
  void apply(Outcome& a, const mpz_class& length, const std::function<void()>& tick);

 private:
  Kind kind_;
  mpq_class start_;
  std::vector<mpq_class> products_;
};

}  // namespace sumwright::term::exact
