// Whether a sum of products of polynomials is identically zero, decided by GiNaC or by evaluation.
#pragma once

#include <cstddef>
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "proof/value.hpp"

namespace sumwright::audit {

/// sign * product of the parts, in some of which the index k stands for k + 1.
struct IdentityTerm {
  struct Part {
    const proof::Factored* value = nullptr;
    bool index_shifted = false;
  };
  int sign = 1;
  std::vector<Part> parts;
};

struct IdentityResult {
  bool zero = false;
  std::size_t cases = 0;  ///< terms expanded, or points evaluated
  std::string how;        ///< "expanded", "grid of 12 x 7 points", ...
  std::string
      detail;  ///< when not zero: leading monomials of the residue, or a point with its value
};

/// Decides whether the terms add up to 0 as polynomials in the symbols (`names` by position; the
/// index is position 1). Expands when the estimated number of monomials is at most `expand_up_to`;
/// else evaluates on a full grid of more points per variable than its degree (proof by
/// interpolation); when even that is too large, at random points with the probability of error
/// told. An exponent below 0 throws std::logic_error.
[[nodiscard]] IdentityResult decide_identity(const std::vector<IdentityTerm>& terms,
                                             const std::vector<std::string>& names,
                                             std::size_t expand_up_to,
                                             const std::function<void()>& check_time);

/// The number of monomials that the expansion is estimated to have at most.
[[nodiscard]] std::size_t estimated_size(const std::vector<IdentityTerm>& terms,
                                         std::size_t symbols);

}  // namespace sumwright::audit
