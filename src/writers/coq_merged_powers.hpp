// Powers of one base that met in a product, u^m u^e = u^(m+e): how a generated proof sees that the
// written product and the merged one are equal.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

/// Three parts of a script, in the order in which they are used; `setup` is empty when no powers
/// met.
struct MergedPowers {
  std::string setup;  ///< assertions, lines of their own
  std::string split;  ///< "split_powers ...; " on a goal in which both products stand
  std::string close;  ///< the tactic that ends an equation of two such products
};

/// For an equation of the conversion `c`. Powers of numbers in `numeric` are compared by value too,
/// so that 8 * (1/2)^3 is 1.
[[nodiscard]] MergedPowers merged_powers(const proof::Proof& proof, const proof::Conversion& c,
                                         const Scope& scope,
                                         const std::vector<const proof::Product*>& numeric);

}  // namespace sumwright::writers::coq
