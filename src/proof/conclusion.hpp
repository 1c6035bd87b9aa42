// From the telescoped identity to the claim: ends, explicit points, right sides, values at literal
// n.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/balancing.hpp"
#include "proof/region.hpp"
#include "proof/telescoping.hpp"

namespace sumwright::proof::building {

/// The terms that the telescoped sum leaves: value at the upper end, minus the one at the lower
/// end, plus weight * a_i F(n+i, point) for the explicit points.
[[nodiscard]] std::vector<TermDraft> end_terms(const term::Setting& setting,
                                               const TelescopingDraft& telescoping,
                                               const RegionDraft& region,
                                               const std::vector<term::Product>& summand);

/// Without an index: a_i F(n+i).
[[nodiscard]] std::vector<TermDraft> pointwise_terms(
    const term::Setting& setting, const std::vector<algebra::Polynomial>& coefficients,
    const std::vector<term::Product>& summand);

/// - weight * b(n).
[[nodiscard]] std::vector<TermDraft> right_side_terms(const term::Setting& setting,
                                                      const algebra::Factored& weight,
                                                      const std::vector<term::Product>& right_side);

/// - weight * sum_i a_i C(n+i).
[[nodiscard]] std::vector<TermDraft> closed_terms(
    const term::Setting& setting, const algebra::Factored& weight,
    const std::vector<algebra::Polynomial>& coefficients, const std::vector<term::Product>& closed);

struct LiteralSumDraft {
  long at = 0;
  long low = 0;
  long high = -1;
  std::optional<VanishingDraft> below;
  std::optional<VanishingDraft> above;
  std::optional<term::Affine> base = {};  ///< LiteralSum::base
};

struct InitialDraft {
  long at = 0;
  std::vector<LiteralSumDraft> sums;
  BalanceDraft balance;
};

/// Everything that literal values need to be computed from.
struct InitialContext {
  const term::Setting& setting;
  const std::optional<AuthorRange>& range;  ///< none: no index
  const std::vector<term::Product>& summand;
  const std::vector<algebra::Polynomial>& coefficients;  ///< recurrences
  const std::vector<term::Product>& right;               ///< closed form, or b
  bool equality = true;
};

/// The comparison at n = at; nothing, with `why`, when the range does not become literal (rule R10)
/// or the laws do not reach. The balance may fail to hold: then the claim is false there.
[[nodiscard]] std::optional<InitialDraft> initial_value(const InitialContext& context, long at,
                                                        std::string& why);

}  // namespace sumwright::proof::building
