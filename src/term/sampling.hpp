// The hypotheses of a claim, and small parameter values that satisfy them.
//
// Internal to src/term.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <vector>

#include "claim/claim.hpp"
#include "term/evaluation.hpp"
#include "term/evaluator.hpp"

namespace sumwright::term::exact {

/// The running variable, then the parameters in file order: the slots used throughout.
[[nodiscard]] Symbols claim_symbols(const claim::Claim& claim);

/// Compiled `in`, `not`, `at_least`, `assume`. The claim must outlive this object.
class Hypotheses {
 public:
  explicit Hypotheses(const claim::Claim& claim);
  /// Whether some entry of `assume` names the running variable.
  [[nodiscard]] bool name_running() const { return names_running_; }
  /// Whether the values satisfy every hypothesis on parameters; entries of `assume` that name
  /// the running variable count only when `with_running`. A comparison with a side that has no
  /// value is not satisfied.
  [[nodiscard]] bool admit(const Slots& slots, bool with_running);

 private:
  struct Compared {
    Program left;
    claim::Comparison comparison;
    Program right;
    bool names_running;
  };
  const claim::Claim& claim_;
  std::vector<Compared> assumptions_;
  Machine machine_;
  bool names_running_ = false;
};

/// Up to `count` distinct assignments of slots (running variable in slot 0: `running` where
/// given, else 0) that satisfy the hypotheses, small values first.
[[nodiscard]] std::vector<Slots> sample_slots(const claim::Claim& claim, Hypotheses& hypotheses,
                                              std::size_t count, const mpz_class* running);

}  // namespace sumwright::term::exact
