// From a recurrence as written to the numbers of the cleared recurrence at one point.
//
// Fractions are kept as pairs: the value of the numerator, and the divisors met on the way with
// their values, never divided by. So nothing is lost where a divisor is 0.
#include "term/clearing.hpp"

#include <algorithm>
#include <utility>

#include "claim/affine.hpp"

namespace sumwright::term::exact {

namespace {

using claim::Expression;
using claim::Operation;

[[nodiscard]] bool has_division(const Expression& node) {
  if (node.operation == Operation::divide) return true;
  if (node.operation == Operation::power) {
    const auto exponent = claim::as_literal(*node.children[1]);
    if (exponent && *exponent < 0) return true;
  }
  return std::any_of(node.children.begin(), node.children.end(),
                     [](const auto& child) { return has_division(*child); });
}

[[nodiscard]] Outcome number(const mpq_class& value) {
  Outcome outcome;
  outcome.number = value;
  return outcome;
}

}  // namespace

ClearedRecurrence::ClearedRecurrence(const std::vector<claim::ExpressionPtr>& coefficients,
                                     const Expression* right_side, const Symbols& symbols)
    : coefficients_(coefficients), right_side_(right_side), symbols_(symbols) {
  as_written_ = std::none_of(coefficients_.begin(), coefficients_.end(),
                             [](const auto& written) { return has_division(*written); });
}

ClearedRecurrence::Row ClearedRecurrence::at(const Slots& slots, Machine& machine) {
  slots_ = &slots;
  machine_ = &machine;
  std::vector<Fraction> fractions;
  const auto read = [this](const Expression& written) {
    return as_written_ ? atom(written, false) : split(written);
  };
  for (const auto& coefficient : coefficients_) fractions.push_back(read(*coefficient));
  fractions.push_back(right_side_ == nullptr ? Fraction{} : read(*right_side_));
  Divisors all;
  for (const Fraction& fraction : fractions) join(all, fraction.divisors);
  Row row;
  for (Fraction& fraction : fractions) {
    expand(fraction, all);
    row.coefficients.push_back(std::move(fraction.numerator));
  }
  row.right_side = std::move(row.coefficients.back());
  row.coefficients.pop_back();
  return row;
}

// all := the least common multiple of all and more.
void ClearedRecurrence::join(Divisors& all, const Divisors& more) {
  for (const auto& [text, divisor] : more) {
    const auto [place, is_new] = all.emplace(text, divisor);
    if (!is_new) place->second.power = std::max(place->second.power, divisor.power);
  }
}

// Brings the fraction to the denominator `all`, a multiple of its own.
void ClearedRecurrence::expand(Fraction& fraction, const Divisors& all) {
  for (const auto& [text, divisor] : all) {
    const auto own = fraction.divisors.find(text);
    const mpz_class missing =
        own == fraction.divisors.end() ? divisor.power : divisor.power - own->second.power;
    Outcome factor = number(divisor.value);
    raise(factor, missing, {});
    multiply(fraction.numerator, factor);
  }
  fraction.divisors = all;
}

void ClearedRecurrence::times(Fraction& left, const Fraction& right) {
  multiply(left.numerator, right.numerator);
  for (const auto& [text, divisor] : right.divisors) {
    const auto [place, is_new] = left.divisors.emplace(text, divisor);
    if (!is_new) place->second.power += divisor.power;
  }
}

void ClearedRecurrence::to_power(Fraction& fraction, const mpz_class& exponent,
                                 claim::Place place) {
  raise(fraction.numerator, exponent, place);
  for (auto& [text, divisor] : fraction.divisors) divisor.power *= exponent;
}

ClearedRecurrence::Fraction ClearedRecurrence::atom(const Expression& node, bool reciprocal) {
  auto& programs = reciprocal ? reciprocals_ : programs_;
  auto found = programs.find(&node);
  if (found == programs.end()) {
    found = programs.emplace(&node, Program(node, symbols_, reciprocal)).first;
  }
  return {found->second.run(*slots_, *machine_), {}};
}

ClearedRecurrence::Fraction ClearedRecurrence::split(const Expression& node) {
  switch (node.operation) {
    case Operation::negate: {
      Fraction fraction = split(*node.children[0]);
      multiply(fraction.numerator, number(-1));
      return fraction;
    }
    case Operation::add:
    case Operation::subtract: {
      Fraction left = split(*node.children[0]);
      Fraction right = split(*node.children[1]);
      Divisors all = left.divisors;
      join(all, right.divisors);
      expand(left, all);
      expand(right, all);
      if (node.operation == Operation::subtract) multiply(right.numerator, number(-1));
      add(left.numerator, right.numerator);
      return left;
    }
    case Operation::multiply:
    case Operation::divide: {
      Fraction left = split(*node.children[0]);
      const Expression& right = *node.children[1];
      times(left, node.operation == Operation::divide ? split_reciprocal(right) : split(right));
      return left;
    }
    case Operation::power:
      return split_power(node);
    default:
      return atom(node, false);
  }
}

ClearedRecurrence::Fraction ClearedRecurrence::split_power(const Expression& node) {
  const auto exponent = claim::as_literal(*node.children[1]);
  if (!exponent) return atom(node, false);
  const Expression& base = *node.children[0];
  Fraction fraction = *exponent < 0 ? split_reciprocal(base) : split(base);
  to_power(fraction, abs(*exponent), node.place);
  return fraction;
}

// R(node) as in term/evaluator, and the factors of a product as divisors of their own.
ClearedRecurrence::Fraction ClearedRecurrence::split_reciprocal(const Expression& node) {
  switch (node.operation) {
    case Operation::negate: {
      Fraction fraction = split_reciprocal(*node.children[0]);
      multiply(fraction.numerator, number(-1));
      return fraction;
    }
    case Operation::multiply:
    case Operation::divide: {
      Fraction left = split_reciprocal(*node.children[0]);
      const Expression& right = *node.children[1];
      times(left, node.operation == Operation::multiply ? split_reciprocal(right) : split(right));
      return left;
    }
    case Operation::power:
      if (const auto exponent = claim::as_literal(*node.children[1]); exponent && *exponent >= 0) {
        Fraction fraction = split_reciprocal(*node.children[0]);
        to_power(fraction, *exponent, node.place);
        return fraction;
      }
      break;
    case Operation::literal:
      return atom(node, true);
    case Operation::call:
      if (node.name == "factorial") return atom(node, true);
      break;
    default:
      break;
  }
  return split_inverse(node);
}

// 1/node, with node's own numerator as the divisor.
ClearedRecurrence::Fraction ClearedRecurrence::split_inverse(const Expression& node) {
  const Fraction inner = split(node);
  if (!inner.numerator.is_number()) return {inner.numerator, {}};
  Fraction fraction{number(1), {}};
  expand(fraction, inner.divisors);
  fraction.divisors = {{to_text(node), {inner.numerator.number, 1}}};
  return fraction;
}

}  // namespace sumwright::term::exact
