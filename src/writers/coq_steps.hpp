// Tactic text for the recurring steps: nonvanishing, units, atoms brought to a base.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "proof/proof.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

/// A tactic that closes `(goal) <> 0%K`, goal being equal to the polynomial as a polynomial.
[[nodiscard]] std::string nonzero_tactic(const proof::Proof& proof, const proof::Nonzero& why,
                                         const Scope& scope);

/// A tactic that closes `forall t, i <= t < j -> a + inj t <> 0` for an interval product.
[[nodiscard]] std::string interval_nonzero_tactic(const proof::Proof& proof,
                                                  const proof::Atom& atom, const Scope& scope);

/// `assert (name : (left * right = inj 1)%K)` with its proof; the text of `left * right` in `pair`.
[[nodiscard]] std::string unit_assertion(const proof::Proof& proof, const proof::Unit& unit,
                                         const std::string& name, const Scope& scope,
                                         std::string& pair);

/// A definition's product as it appears after unfolding at other arguments.
struct Unfolded {
  const proof::Product* original = nullptr;  ///< as defined
  Substitution by;                           ///< symbol := value
  Scope scope;                               ///< the texts that stand for the symbols
};

/// The tactics that prove an instance after both sides are unfolded; `left`, `right` tell how they
/// stand.
[[nodiscard]] std::string instance_tactics(const proof::Proof& proof,
                                           const proof::Instance& instance, const Unfolded& left,
                                           const Unfolded& right, const Scope& scope);

/// replace ... with ... by lia, for every argument of the product that is written differently after
/// substitution.
[[nodiscard]] std::string respell(const Unfolded& unfolded, const Scope& scope);

}  // namespace sumwright::writers::coq
