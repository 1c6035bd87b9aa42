// A recurrence's coefficients and right side at a point, denominators cleared.
//
// Internal to src/term.
#pragma once

#include <gmpxx.h>

#include <map>
#include <string>
#include <unordered_map>
#include <vector>

#include "claim/claim.hpp"
#include "term/evaluator.hpp"

namespace sumwright::term::exact {

/// a0 S(n) + ... + aJ S(n+J) = b with its denominators cleared.
///
/// Where no coefficient contains a division or a negative power, coefficients and right side
/// are those written. Otherwise each is split into a numerator and a list of divisors, as
/// written, and all are multiplied by the least common multiple of those lists (a divisor
/// counts by its text). That multiple is a polynomial times the least common denominator: the
/// cleared recurrence, where it holds, holds in this form too, at zeros of divisors as well;
/// where equal divisors are written differently, a point at which they vanish says less.
class ClearedRecurrence {
 public:
  /// `right_side` may be null: 0. The expressions must outlive this object.
  ClearedRecurrence(const std::vector<claim::ExpressionPtr>& coefficients,
                    const claim::Expression* right_side, const Symbols& symbols);

  struct Row {
    std::vector<Outcome> coefficients;
    Outcome right_side;
  };
  [[nodiscard]] Row at(const Slots& slots, Machine& machine);

 private:
  /// numerator / product of divisors, each to its power.
  struct Divisor {
    mpq_class value;
    mpz_class power;
  };
  using Divisors = std::map<std::string, Divisor>;
  struct Fraction {
    Outcome numerator;
    Divisors divisors;
  };

  [[nodiscard]] Fraction split(const claim::Expression& node);
  [[nodiscard]] Fraction split_power(const claim::Expression& node);
  [[nodiscard]] Fraction split_reciprocal(const claim::Expression& node);
  [[nodiscard]] Fraction split_inverse(const claim::Expression& node);
  [[nodiscard]] Fraction atom(const claim::Expression& node, bool reciprocal);
  static void join(Divisors& all, const Divisors& more);
  static void expand(Fraction& fraction, const Divisors& all);
  static void times(Fraction& left, const Fraction& right);
  static void to_power(Fraction& fraction, const mpz_class& exponent, claim::Place place);

  std::vector<claim::ExpressionPtr> coefficients_;
  const claim::Expression* right_side_;
  const Symbols& symbols_;
  bool as_written_ = true;
  std::unordered_map<const claim::Expression*, Program> programs_;
  std::unordered_map<const claim::Expression*, Program> reciprocals_;
  const Slots* slots_ = nullptr;
  Machine* machine_ = nullptr;
};

}  // namespace sumwright::term::exact
