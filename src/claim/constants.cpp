// Constants of an expression, evaluated bottom up, and an estimate of its size.
//
// Invariant: no number of more than kFoldedBits is ever computed; the rest is estimated,
// so that 9^9^9^9 costs nothing.
#include "claim/constants.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <utility>

namespace sumwright::claim {

namespace {

// Constants larger than this are left to the exact stages.
constexpr std::size_t kFoldedBits = 1024;

[[nodiscard]] std::size_t bits(const mpz_class& value) {
  return mpz_sizeinbase(value.get_mpz_t(), 2);
}

[[nodiscard]] std::size_t bits(const mpq_class& value) {
  return bits(value.get_num()) + bits(value.get_den());
}

[[nodiscard]] std::optional<mpq_class> small(mpq_class value) {
  if (bits(value) > kFoldedBits) return std::nullopt;
  return value;
}

[[nodiscard]] std::optional<mpq_class> power_of(const mpq_class& base, const mpz_class& exponent) {
  const mpz_class size = abs(exponent);
  if (base == 0 || abs(base) == 1) {
    if (exponent == 0) return mpq_class(1);
    return mpz_even_p(exponent.get_mpz_t()) != 0 ? mpq_class(base * base) : base;
  }
  if (size > kFoldedBits || bits(base) * size.get_ui() > kFoldedBits) return std::nullopt;
  mpz_class numerator;
  mpz_class denominator;
  mpz_pow_ui(numerator.get_mpz_t(), base.get_num_mpz_t(), size.get_ui());
  mpz_pow_ui(denominator.get_mpz_t(), base.get_den_mpz_t(), size.get_ui());
  if (exponent < 0) std::swap(numerator, denominator);
  mpq_class value(numerator, denominator);
  value.canonicalize();
  return value;
}

class Folder {
 public:
  Folder(const Source& source, const Limits& limits, const std::set<std::string>& integer_symbols)
      : source_(source), limits_(limits), integer_symbols_(integer_symbols) {}

  [[nodiscard]] Folded fold(const Expression& e) const {
    if (e.operation == Operation::literal) {
      return {small(mpq_class(e.value)), static_cast<double>(bits(e.value))};
    }
    if (e.operation == Operation::symbol) return {};
    if (e.operation == Operation::power) return fold_power(e);
    if (e.operation == Operation::call) {
      Folded out;
      for (const ExpressionPtr& argument : e.children) out.size += fold(*argument).size;
      return out;
    }
    Folded left = fold(*e.children[0]);
    if (e.operation == Operation::negate) {
      if (left.value) left.value = -*left.value;
      return left;
    }
    const Folded right = fold(*e.children[1]);
    const bool sum = e.operation == Operation::add || e.operation == Operation::subtract;
    if (e.operation == Operation::divide && right.value && *right.value == 0) {
      refuse(e.children[1]->place, "division by zero");
    }
    Folded out;
    out.size = sum ? std::max(left.size, right.size) + 1 : left.size + right.size;
    if (!left.value || !right.value) return out;
    if (e.operation == Operation::add) out.value = small(*left.value + *right.value);
    if (e.operation == Operation::subtract) out.value = small(*left.value - *right.value);
    if (e.operation == Operation::multiply) out.value = small(*left.value * *right.value);
    if (e.operation == Operation::divide) out.value = small(*left.value / *right.value);
    return out;
  }

  [[nodiscard]] Folded fold_power(const Expression& e) const {
    const Folded base = fold(*e.children[0]);
    const Folded exponent = fold(*e.children[1]);
    Folded out;
    double factor = 1;
    if (exponent.value) {
      factor = std::max(1.0, std::abs(exponent.value->get_d()));
    } else if (const auto form = as_affine(*e.children[1], integer_symbols_)) {
      factor = std::max(1.0, magnitude(*form));
    }
    out.size = base.size * factor;
    // Powers of 0 and 1 do not grow, but nobody needs huge ones.
    if (out.size > static_cast<double>(limits_.power_bits)) {
      refuse(e.place, "this power is too large",
             fmt::format("about {:.0f} bits or degrees; at most {} are read", out.size,
                         limits_.power_bits));
    }
    if (!base.value || !exponent.value || exponent.value->get_den() != 1) return out;
    if (*base.value == 0 && *exponent.value < 0) {
      refuse(e.place, "division by zero", "zero has no negative power");
    }
    out.value = power_of(*base.value, exponent.value->get_num());
    return out;
  }

 private:
  [[noreturn]] void refuse(Place place, std::string_view message,
                           std::string_view note = {}) const {
    throw InputError(source_, place, message, note);
  }

  const Source& source_;
  const Limits& limits_;
  const std::set<std::string>& integer_symbols_;
};

}  // namespace

double magnitude(const AffineView& form) {
  double sum = std::abs(static_cast<double>(form.constant));
  for (const auto& [name, coefficient] : form.coefficients) {
    sum += std::abs(static_cast<double>(coefficient));
  }
  return sum;
}

Folded fold_constants(const Source& source, const Limits& limits,
                      const std::set<std::string>& integer_symbols, const Expression& expression) {
  Folded out = Folder(source, limits, integer_symbols).fold(expression);
  if (out.size > static_cast<double>(limits.power_bits)) {
    throw InputError(source, expression.place, "this expression is too large",
                     fmt::format("about {:.0f} bits or degrees; at most {} are read", out.size,
                                 limits.power_bits));
  }
  return out;
}

}  // namespace sumwright::claim
