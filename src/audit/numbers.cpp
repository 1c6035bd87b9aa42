// Exact numbers of the audit.
//
// Everything is a GiNaC numeric that is rational; no floating point anywhere. Sizes are bounded
// before the work is done, so that one point can never take long.
#include "audit/numbers.hpp"

#include <cln/integer.h>

#include <algorithm>
#include <sstream>
#include <utility>

namespace sumwright::audit {

namespace {

constexpr long kLongestProduct = 4000;  // factors of one factorial, rising, falling, binomial
constexpr long kPowerBits = 400000;     // bits of one power
constexpr std::size_t kShownDigits = 60;

}  // namespace

numeric to_numeric(const mpz_class& value) {
  if (value.fits_slong_p()) return numeric(value.get_si());
  cln::cl_I out = 0;
  const cln::cl_I word_size = cln::cl_I(1UL << 32U);
  const mpz_class magnitude = abs(value);
  std::vector<unsigned int> words((mpz_sizeinbase(magnitude.get_mpz_t(), 2) + 31) / 32);
  std::size_t count = 0;
  mpz_export(words.data(), &count, 1, sizeof(unsigned int), 0, 0, magnitude.get_mpz_t());
  for (std::size_t i = 0; i < count; ++i)
    out = out * word_size + cln::cl_I(static_cast<unsigned long>(words[i]));
  return numeric(sgn(value) < 0 ? -out : out);
}

numeric to_numeric(const mpq_class& value) {
  if (value.get_den() == 1) return to_numeric(value.get_num());
  return to_numeric(value.get_num()) / to_numeric(value.get_den());
}

long to_machine(const numeric& value) {
  if (!value.is_integer()) throw NotAnInteger("an integer was expected: " + text_of(value));
  if (value.int_length() > 40) throw TooLarge("an integer beyond 2^40");
  return value.to_long();
}

std::string text_of(const numeric& value) {
  std::ostringstream out;
  out << value;
  std::string text = out.str();
  if (text.size() > kShownDigits)
    text = text.substr(0, kShownDigits / 2) + "..." + text.substr(text.size() - 8) + " (" +
           std::to_string(text.size()) + " characters)";
  return text;
}

numeric natural_power(const numeric& base, long exponent) {
  const long bits = std::max<long>(1, base.numer().int_length() + base.denom().int_length());
  const bool stays_small = base.is_zero() || base.is_equal(1) || base.is_equal(-1);
  if (!stays_small && exponent > kPowerBits / bits) throw TooLarge("a large power");
  if (!base.is_integer())  // no common factors to look for on the way
    return natural_power(base.numer(), exponent) / natural_power(base.denom(), exponent);
  numeric out = 1;
  numeric square = base;
  for (; exponent > 0; exponent /= 2) {
    if (exponent % 2 == 1) out = out * square;
    if (exponent > 1) square = square * square;
  }
  return out;
}

numeric factorial_of(long m) {
  static std::vector<numeric> table{numeric(1)};  // guarded by the lock that audits hold
  if (m > kLongestProduct) throw TooLarge("a large factorial");
  while (std::cmp_less_equal(table.size(), m))
    table.push_back(table.back() * numeric(static_cast<long>(table.size())));
  return table[static_cast<std::size_t>(m)];
}

numeric progression_product(const numeric& start, long step, long length) {
  if (length > kLongestProduct) throw TooLarge("a long product");
  numeric out = 1;
  numeric factor = start;
  for (long i = 0; i < length; ++i) {
    if (factor.is_zero()) return 0;
    out = out * factor;
    factor = factor + numeric(step);
  }
  return out;
}

std::string text_of(const Value& value) {
  return value.exists() ? text_of(value.number) : "no value (" + value.why + ")";
}

Value times(const Value& left, const Value& right) {
  if (left.state == Value::State::division_by_zero) return left;
  if (right.state == Value::State::division_by_zero) return right;
  if (left.is_zero() || right.is_zero()) return Value::of(0);
  if (!left.exists()) return left;
  if (!right.exists()) return right;
  return Value::of(left.number * right.number);
}

Value plus(const Value& left, const Value& right) {
  if (left.state == Value::State::division_by_zero) return left;
  if (right.state == Value::State::division_by_zero) return right;
  if (!left.exists()) return left;
  if (!right.exists()) return right;
  return Value::of(left.number + right.number);
}

Value minus(const Value& left, const Value& right) {
  return plus(left, times(Value::of(-1), right));
}

Value raised(const Value& value, long exponent) {
  if (!value.exists()) return value;
  return Value::of(natural_power(value.number, exponent));
}

bool same(const Value& left, const Value& right) {
  return left.exists() && right.exists() && left.number.is_equal(right.number);
}

const numeric& Point::at(const std::string& name) const {
  for (std::size_t i = 0; i < names.size(); ++i)
    if (names[i] == name) return values[i];
  throw std::logic_error("audit: symbol without a value: " + name);
}

void Point::set(const std::string& name, const numeric& value) {
  for (std::size_t i = 0; i < names.size(); ++i)
    if (names[i] == name) {
      values[i] = value;
      return;
    }
  names.push_back(name);
  values.push_back(value);
}

std::string text_of(const Point& point) {
  std::string out;
  for (std::size_t i = 0; i < point.names.size(); ++i) {
    if (point.names[i].empty()) continue;
    if (!out.empty()) out += ", ";
    out += point.names[i] + " = " + text_of(point.values[i]);
  }
  return out;
}

}  // namespace sumwright::audit
