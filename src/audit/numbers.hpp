// Exact numbers of the audit: GiNaC numerics (CLN), the conversions into them, and values that may
// not exist.
#pragma once

#include <ginac/ginac.h>
#include <gmpxx.h>

#include <stdexcept>
#include <string>
#include <vector>

namespace sumwright::audit {

using GiNaC::numeric;

/// A value would take more work or memory than the audit spends on one point. Caught only where
/// points are enumerated: the point is then left out and counted.
class TooLarge : public std::runtime_error {
 public:
  explicit TooLarge(const std::string& what) : std::runtime_error(what) {}
};

/// A form of integer symbols that is no integer: the data is wrong. Makes the check disagree.
class NotAnInteger : public std::runtime_error {
 public:
  explicit NotAnInteger(const std::string& what) : std::runtime_error(what) {}
};

[[nodiscard]] numeric to_numeric(const mpz_class& value);
[[nodiscard]] numeric to_numeric(const mpq_class& value);

/// An integer as a machine number. Throws TooLarge beyond 2^40, NotAnInteger.
[[nodiscard]] long to_machine(const numeric& value);

/// Decimal text; long numbers are shortened and their number of digits is told.
[[nodiscard]] std::string text_of(const numeric& value);

/// base ^ exponent for exponent >= 0, 0^0 = 1. Throws TooLarge.
[[nodiscard]] numeric natural_power(const numeric& base, long exponent);

/// m! for m >= 0, from a growing table. Throws TooLarge.
[[nodiscard]] numeric factorial_of(long m);

/// start (start + step) ... (start + (length - 1) step). Throws TooLarge.
[[nodiscard]] numeric progression_product(const numeric& start, long step, long length);

/// A number, or the reason why there is none. What has left the domain of a factorial, `rising` or
/// `falling` is repaired by a factor 0 beside it; a division by zero is not.
struct Value {
  enum class State { number, outside_domain, division_by_zero };
  State state = State::number;
  numeric number = 0;
  std::string why;

  [[nodiscard]] bool exists() const { return state == State::number; }
  [[nodiscard]] bool is_zero() const { return exists() && number.is_zero(); }
  [[nodiscard]] static Value of(const numeric& number) { return {State::number, number, {}}; }
  [[nodiscard]] static Value outside(std::string why) {
    return {State::outside_domain, 0, std::move(why)};
  }
  [[nodiscard]] static Value divided_by_zero(std::string why) {
    return {State::division_by_zero, 0, std::move(why)};
  }
};

/// The number, or "no value (why)".
[[nodiscard]] std::string text_of(const Value& value);

[[nodiscard]] Value times(const Value& left, const Value& right);
[[nodiscard]] Value plus(const Value& left, const Value& right);
[[nodiscard]] Value minus(const Value& left, const Value& right);
/// value ^ exponent, exponent >= 0.
[[nodiscard]] Value raised(const Value& value, long exponent);

/// Both exist and are the same number.
[[nodiscard]] bool same(const Value& left, const Value& right);

/// Symbols with their values, in the order of Proof::symbols (running, index, parameters).
struct Point {
  std::vector<std::string> names;
  std::vector<numeric> values;

  /// The value of a symbol. Throws std::logic_error for an unknown name.
  [[nodiscard]] const numeric& at(const std::string& name) const;
  /// Sets a symbol, adding it when it is new.
  void set(const std::string& name, const numeric& value);
};

/// "n = 2, k = 0, x = 1/2".
[[nodiscard]] std::string text_of(const Point& point);

}  // namespace sumwright::audit
