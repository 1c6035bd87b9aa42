// The operations of the claim language on exact numbers and on what has no value.
//
// Invariant: numbers are in lowest terms and stay below kMaxBits bits; sizes are estimated
// before the work is done.
#include "term/outcome.hpp"

#include <algorithm>
#include <stdexcept>
#include <utility>

namespace sumwright::term::exact {

namespace {

using State = Outcome::State;

constexpr std::size_t kCachedFactorials = 1024;
constexpr std::size_t kCachedProducts = 1024;

[[noreturn]] void too_large() { throw std::length_error("a number grows too large"); }

[[nodiscard]] std::size_t bits(const mpz_class& number) {
  return mpz_sizeinbase(number.get_mpz_t(), 2);
}

[[nodiscard]] std::size_t bits(const mpq_class& number) {
  return bits(number.get_num()) + bits(number.get_den());
}

void check_size(const mpq_class& number) {
  if (bits(number) > kMaxBits) too_large();
}

[[nodiscard]] bool is_integer(const mpq_class& number) { return number.get_den() == 1; }

[[nodiscard]] std::size_t product_size(std::size_t factors, std::size_t each) {
  return factors > kMaxBits ? kMaxBits + 1 : factors * each;
}

[[nodiscard]] mpz_class factorial(unsigned long argument) {
  thread_local std::vector<mpz_class> table = {mpz_class(1)};
  if (argument < kCachedFactorials) {
    while (table.size() <= argument) table.push_back(table.back() * table.size());
    return table[argument];
  }
  if (product_size(argument, bits(mpz_class(argument))) > kMaxBits) too_large();
  mpz_class result;
  mpz_fac_ui(result.get_mpz_t(), argument);
  return result;
}

[[nodiscard]] unsigned long to_count(const mpz_class& number) {
  if (!number.fits_ulong_p()) too_large();
  return number.get_ui();
}

// binomial(upper, lower) for upper, lower >= 0.
[[nodiscard]] mpz_class natural_binomial(const mpz_class& upper, const mpz_class& lower) {
  if (lower > upper) return 0;
  const mpz_class other = upper - lower;
  const unsigned long shorter = to_count(std::min(lower, other));
  if (product_size(shorter, bits(upper)) > kMaxBits) too_large();
  mpz_class result;
  mpz_bin_ui(result.get_mpz_t(), upper.get_mpz_t(), shorter);
  return result;
}

// Whether an integer 0 is among start, start + step, ..., start + (count-1)*step; step = 1, -1.
[[nodiscard]] bool passes_zero(const mpq_class& start, const mpz_class& count, int step) {
  if (!is_integer(start)) return false;
  const mpq_class distance = -step * start;
  return distance >= 0 && distance < count;
}

void power_of(mpz_class& base, unsigned long exponent) {
  mpz_pow_ui(base.get_mpz_t(), base.get_mpz_t(), exponent);
}

void raise_number(mpq_class& base, const mpz_class& exponent) {
  if (exponent < 0) base = 1 / base;
  const mpz_class count = abs(exponent);
  if (base == 0 || base == 1) {
    if (count == 0) base = 1;
    return;
  }
  if (base == -1) {
    if (mpz_even_p(count.get_mpz_t()) != 0) base = 1;
    return;
  }
  const unsigned long times = to_count(count);
  if (product_size(times, bits(base)) > kMaxBits) too_large();
  power_of(base.get_num(), times);  // stays in lowest terms
  power_of(base.get_den(), times);
}

}  // namespace

Value Outcome::value() const {
  Value result;
  if (is_number()) {
    result.number = number;
  } else {
    result.why_not = reason->text;
    result.place = reason->place;
  }
  return result;
}

void multiply(Outcome& a, const Outcome& b) {
  if (a.is_number() && b.is_number()) {
    a.number *= b.number;
    check_size(a.number);
    return;
  }
  const bool has_zero = (a.is_number() && a.number == 0) || (b.is_number() && b.number == 0);
  (void)take_worse(a, b);
  if (has_zero && a.state == State::undefined) a = Outcome{};
}

void add(Outcome& a, const Outcome& b) {
  if (!take_worse(a, b)) return;
  a.number += b.number;
  check_size(a.number);
}

void subtract(Outcome& a, const Outcome& b) {
  if (!take_worse(a, b)) return;
  a.number -= b.number;
  check_size(a.number);
}

void invert(Outcome& a, claim::Place place) {
  if (!a.is_number()) return;
  if (a.number == 0) {
    lose_value(a, State::division_by_zero, "division by 0", place);
    return;
  }
  mpq_inv(a.number.get_mpq_t(), a.number.get_mpq_t());
}

void raise(Outcome& a, const mpz_class& exponent, claim::Place place) {
  if (!a.is_number()) return;
  if (a.number == 0 && exponent < 0) {
    lose_value(a, State::division_by_zero, "the power " + exponent.get_str() + " of 0", place);
    return;
  }
  raise_number(a.number, exponent);
}

void lose_value(Outcome& outcome, State state, std::string text, claim::Place place) {
  outcome.state = state;
  outcome.number = 0;
  outcome.reason = std::make_shared<const Outcome::Reason>(Outcome::Reason{std::move(text), place});
}

bool take_worse(Outcome& a, const Outcome& b) {
  if (b.state > a.state) {
    a.state = b.state;
    a.reason = b.reason;
    a.number = 0;
  }
  return a.is_number();
}

void round_down(Outcome& outcome) {
  mpz_class quotient;
  mpz_fdiv_q(quotient.get_mpz_t(), outcome.number.get_num_mpz_t(), outcome.number.get_den_mpz_t());
  outcome.number = quotient;
}

void take_extreme(Outcome& outcome, const Outcome& other, bool smaller) {
  if (!take_worse(outcome, other)) return;
  const bool take = smaller ? other.number < outcome.number : other.number > outcome.number;
  if (take) outcome.number = other.number;
}

void to_factorial(Outcome& outcome, bool reciprocal, claim::Place place) {
  if (!outcome.is_number()) return;
  const mpq_class argument = outcome.number;
  if (!is_integer(argument) || (argument < 0 && !reciprocal)) {
    return lose_value(outcome, State::undefined, "factorial of " + argument.get_str(), place);
  }
  if (argument < 0) {
    outcome.number = 0;
    return;
  }
  outcome.number = factorial(to_count(argument.get_num()));
  if (reciprocal) invert(outcome, place);
}

void to_binomial(Outcome& a, const mpz_class& lower) {
  const mpz_class upper = a.number.get_num();
  if (upper >= 0) {
    a.number = natural_binomial(upper, lower);
    return;
  }
  // A negative upper argument is reflected.
  a.number = natural_binomial(lower - upper - 1, lower);
  if (mpz_odd_p(lower.get_mpz_t()) != 0) a.number = -a.number;
}

void PrefixProducts::apply(Outcome& a, const mpz_class& length, const std::function<void()>& tick) {
  const int step = kind_ == Kind::rising ? 1 : -1;
  if (passes_zero(a.number, length, step)) {
    a.number = 0;
    return;
  }
  const unsigned long count = to_count(length);
  if (product_size(count, bits(a.number) + bits(length)) > kMaxBits) too_large();
  if (products_.empty() || start_ != a.number) {
    start_ = a.number;
    products_.assign(1, mpq_class(1));
  }
  std::size_t reached = std::min<std::size_t>(count, products_.size() - 1);
  mpq_class factor = start_ + step * mpq_class(mpz_class(reached));
  a.number = products_[reached];
  for (; reached < count; ++reached, factor += step) {
    tick();
    a.number *= factor;
    if (kind_ == Kind::binomial) a.number /= mpz_class(reached + 1);
    if (reached + 1 == products_.size() && reached < kCachedProducts) products_.push_back(a.number);
  }
}

}  // namespace sumwright::term::exact
