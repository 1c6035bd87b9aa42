// From a claim to a Proof: the ladder of the whole argument.
#pragma once

#include <functional>
#include <memory>

#include "algebra/limits.hpp"
#include "claim/claim.hpp"
#include "proof/proof.hpp"

namespace sumwright::proof {

struct BuildOptions {
  unsigned max_order = 8;
  algebra::Deadline deadline;
  std::function<void(const std::string& stage)> progress;  ///< for a terminal; may be empty
};

/// Decides the claim as far as the rules go. Never `established` unless every part of the argument
/// is there. Throws claim::InputError for claims that cannot be used (not hypergeometric,
/// contradictory hypotheses) and algebra::TimeUp.
[[nodiscard]] Proof build(std::shared_ptr<const claim::Claim> claim,
                          const BuildOptions& options = {});

}  // namespace sumwright::proof
