// The sections of a generated proof, in the order of the file.
#pragma once

#include <string>

#include "proof/proof.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

/// The header: imports, section, parameters, hypotheses.
[[nodiscard]] std::string header_section(const proof::Proof& proof);
/// Sides of the claim, terms as products of atoms, the leaf lemmas and the conversions.
[[nodiscard]] std::string terms_section(const proof::Proof& proof);
/// One conversion: `what` is "summand", "closed" or "right_side"; the pieces are called `piece`_1,
/// ...
[[nodiscard]] std::string conversion_text(const proof::Proof& proof, const proof::Conversion& c,
                                          const std::string& what, const std::string& piece,
                                          bool with_index);
/// Ranges with an infinite end: the sum as a sum between finite ends.
[[nodiscard]] std::string finite_range_section(const proof::Proof& proof);
/// `k < low \/ high < k` for the ends that stand for infinite ones.
[[nodiscard]] std::string beyond_support(const proof::Proof& proof);
/// The claim of a recurrence with infinite ends, inside the section; empty for all others.
[[nodiscard]] std::string infinite_claim_section(const proof::Proof& proof);
/// `low <= k <= high -> ` with the author's finite ends; empty when he has none.
[[nodiscard]] std::string index_premise(const proof::Proof& proof);
/// Base term, polynomials, shifts, the equality, the telescoping identity and its sum.
[[nodiscard]] std::string telescoping_section(const proof::Proof& proof);
/// Ranges, ends, explicit points: the recurrence of the sum with its remainder.
[[nodiscard]] std::string recurrence_section(const proof::Proof& proof);
/// Closed form or right side against the remainder, leading coefficient, starting values,
/// conclusion.
[[nodiscard]] std::string conclusion_section(const proof::Proof& proof);
/// After the section: Theorem claim, Theorem claim_defined.
[[nodiscard]] std::string theorem_section(const proof::Proof& proof);

/// What several sections share.
struct Names {
  std::string n;  ///< the running variable in the file
  std::string k;  ///< the index
  bool index = false;
};
[[nodiscard]] Names names(const proof::Proof& proof);

/// `F (n + 2) k`-like application of the pieces of the summand, their sum for several.
[[nodiscard]] std::string shifted(const std::string& n, unsigned by);
/// Lemmas for the terms of a balance: each equals polynomial * base or 0. `term_texts` receives how
/// each is written. `definitions` are unfolded.
[[nodiscard]] std::string balance_lemmas(const proof::Proof& proof, const proof::Balance& balance,
                                         const std::string& region,
                                         std::vector<std::string>& term_texts);
/// rewrites all terms of the balance by their lemmas.
[[nodiscard]] std::string balance_rewrites(const proof::Proof& proof, const proof::Balance& balance,
                                           const std::string& arguments);
/// Whether the balance's polynomials have fractions (then `field` closes it).
[[nodiscard]] std::string balance_closing(const proof::Balance& balance);

}  // namespace sumwright::writers::coq
