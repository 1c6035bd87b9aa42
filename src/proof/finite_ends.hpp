// Infinite ranges: finite ends beyond which every term of the sum is 0.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/region.hpp"
#include "term/setting.hpp"

namespace sumwright::proof::building {

/// The range with its infinite ends replaced; `below` and `above` say why F(n, k) = 0 beyond them.
struct FiniteEnds {
  claim::Range range;
  std::optional<VanishingDraft> below;
  std::optional<VanishingDraft> above;
};

/// Ends of the support, found among the arguments of the reciprocal factorials; every one is proved
/// by linear arithmetic on `region` (hypotheses, n >= from, the finite ends). Nothing, with `why`,
/// when an infinite end has none.
[[nodiscard]] std::optional<FiniteEnds> finite_ends(const term::Setting& setting,
                                                    const term::Facts& region,
                                                    const claim::Range& written,
                                                    const std::vector<term::Product>& summand,
                                                    std::string& why);

}  // namespace sumwright::proof::building
