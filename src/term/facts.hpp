// What follows from a claim's hypotheses by linear arithmetic.
//
// Decisions are made over the rationals with integer tightening (exact simplex of the Parma
// Polyhedra Library): `implies` is never wrong when it says yes, and everything it affirms is
// provable by a decision procedure for linear integer arithmetic.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "term/affine.hpp"

namespace sumwright::term {

/// A conjunction of `form >= 0` over the integers.
class Facts {
 public:
  explicit Facts(std::size_t symbols) : symbols_(symbols) {}

  void add(const Affine& nonnegative) { facts_.push_back(nonnegative); }
  [[nodiscard]] Facts with(const Affine& nonnegative) const;
  [[nodiscard]] const std::vector<Affine>& all() const { return facts_; }
  [[nodiscard]] std::size_t symbols() const { return symbols_; }

  /// form >= 0 follows.
  [[nodiscard]] bool implies(const Affine& form) const;
  /// form = 0 follows.
  [[nodiscard]] bool implies_zero(const Affine& form) const;
  /// form != 0 follows: from its sign or from a congruence (gcd of the coefficients).
  [[nodiscard]] bool implies_nonzero(const Affine& form) const;
  /// No point satisfies the conjunction (over the integers with tightening; may miss some).
  [[nodiscard]] bool contradictory() const;
  /// The largest integer c with form >= c on all points, when it is bounded below.
  [[nodiscard]] std::optional<long> lower_bound(const Affine& form) const;

 private:
  std::size_t symbols_;
  std::vector<Affine> facts_;
};

}  // namespace sumwright::term
