// From a term and its evidence to the telescoping part of the argument: base term, polynomials,
// equality.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "algebra/rational_function.hpp"
#include "proof/similarity.hpp"
#include "term/setting.hpp"

namespace sumwright::proof::building {

/// weight * sum_i coefficients[i] p[i] = up * c(k+1) - down * c, with everything brought to `base`.
struct TelescopingDraft {
  term::Product base;
  std::vector<algebra::Polynomial> coefficients;
  algebra::Factored weight;                   ///< free of the index
  std::vector<std::vector<Bringing>> shifts;  ///< [i][j]: F_j(n+i, k) = p B
  std::vector<algebra::Factored> p;
  algebra::Polynomial certificate;  ///< c
  IndexShift index;
  std::vector<Need> needs;         ///< what the argument needs on its region
  algebra::RationalFunction left;  ///< the left side of the equality
  algebra::Polynomial residue;     ///< left - right of the equality: 0 when right

  [[nodiscard]] bool holds() const { return residue.is_zero(); }
};

/// Builds the draft for F = sum of `summand` (similar products), coefficients a_i and certificate
/// R. The equality may fail (wrong evidence): see `residue`. Nothing, with `why`, when the laws do
/// not reach a polynomial form.
[[nodiscard]] std::optional<TelescopingDraft> draft_telescoping(
    const term::Setting& setting, const std::vector<term::Product>& summand,
    const std::vector<algebra::Polynomial>& coefficients,
    const algebra::RationalFunction& certificate, std::string& why);

}  // namespace sumwright::proof::building
