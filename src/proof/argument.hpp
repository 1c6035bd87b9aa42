// The working form of a whole argument, between the claim's terms and the plain Proof.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "algebra/limits.hpp"
#include "proof/conclusion.hpp"
#include "proof/finite_ends.hpp"
#include "term/conversion.hpp"

namespace sumwright::proof::building {

/// The claim's terms converted on its own region.
struct Terms {
  term::Setting setting;
  std::optional<AuthorRange> range;  ///< with finite ends; none: no index
  std::optional<FiniteEnds> finite;  ///< where the author's range has an infinite end
  term::Facts region;  ///< hypotheses, n >= from, index within the author's finite ends
  long from = 0;
  term::Conversion summand;
  std::optional<term::Conversion> closed;
};

/// A recurrence with its certificate, as rational functions; right side as products.
struct EvidenceDraft {
  std::vector<algebra::Polynomial> coefficients;
  std::optional<algebra::RationalFunction> certificate;  ///< none: no index
  std::optional<term::Conversion> right_side;            ///< claimed b, when given and not 0
  bool brought = false;
};

struct ArgumentDraft {
  EvidenceDraft evidence;
  std::optional<TelescopingDraft> telescoping;
  std::optional<RegionDraft> region;
  long threshold = 0;
  std::optional<BalanceDraft> ends;
  std::optional<BalanceDraft> closed_recurrence;
  std::optional<algebra::Factored> leading;
  std::vector<InitialDraft> initial;
  std::vector<term::Product> boundary;  ///< b as products, for printing
  std::string right_side_text = "0";
};

/// What became of an attempt.
struct Attempt {
  enum class Outcome { complete, identity_fails, ends_fail, closed_fails, initial_fails, stuck };
  Outcome outcome = Outcome::stuck;
  std::string why;   ///< stuck: what is missing
  std::string rule;  ///< stuck: the rule that would settle it
  long at = 0;       ///< initial_fails: the n
  ArgumentDraft draft;
};

/// Tries to complete the argument with the given evidence.
/// `as_equality`: conclude the closed form; otherwise the recurrence with its right side.
[[nodiscard]] Attempt attempt(const Terms& terms, const EvidenceDraft& evidence, bool as_equality,
                              const algebra::Deadline& deadline);

/// The plain Proof parts of a complete argument.
void assemble(const Terms& terms, const ArgumentDraft& draft, bool as_equality, Proof& proof);

/// Adds a not-established proof's conversion conditions (open ones included) for the report.
void assemble_conversion(const Terms& terms, Proof& proof);

}  // namespace sumwright::proof::building
