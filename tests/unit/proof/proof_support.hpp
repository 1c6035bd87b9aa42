// Shared by the tests of the proof stage: a claim's terms, verdicts on short claims.
#pragma once

#include <memory>
#include <stdexcept>
#include <string>

#include "../term/term_support.hpp"
#include "proof/argument.hpp"
#include "proof/build.hpp"
#include "proof/evidence.hpp"
#include "proof/statement.hpp"

namespace sumwright::testing {

/// What the ladder of `build` works on. Every condition of the terms must be settled.
inline proof::building::Terms terms_of(const ClaimParts& parts) {
  proof::Proof proof;
  std::vector<mpz_class> suspects;
  const auto claim = read_claim(parts);
  proof.from = claim->from.get_si();
  const std::unique_ptr<proof::building::Terms> terms =
      proof::building::convert_terms(claim, proof, suspects);
  if (!terms) throw std::runtime_error(proof.reason);
  return std::move(*terms);
}

inline proof::building::EvidenceDraft evidence_of(const proof::building::Terms& terms) {
  return proof::building::read_evidence(terms, *terms.setting.claim).draft;
}

inline proof::Proof decide(const ClaimParts& parts, unsigned max_order = 4) {
  proof::BuildOptions options;
  options.max_order = max_order;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(20000));
  return proof::build(read_claim(parts), options);
}

inline std::string rational_text(const term::Setting& setting, const std::string& text) {
  return term::to_rational_function(setting, *parse(setting, text))->to_string();
}

inline std::string name_of(proof::Verdict v) {
  switch (v) {
    case proof::Verdict::established:
      return "established";
    case proof::Verdict::refuted:
      return "refuted";
    case proof::Verdict::undecided:
      return "undecided";
  }
  return "?";
}

inline bool has_open_condition(const proof::Proof& proof) {
  for (const proof::Condition& c : proof.conditions)
    if (c.settled == proof::Settled::open) return true;
  return false;
}

/// Whether all needs are met at the point.
inline bool all_met(const std::vector<proof::building::Need>& needs, const Point& at) {
  for (const proof::building::Need& need : needs) {
    if (need.nonnegative && value_of(*need.nonnegative, at) < 0) return false;
    if (need.nonzero) {
      const Number value = value_of(*need.nonzero, at);
      if (!value || *value == 0) return false;
    }
  }
  return true;
}

}  // namespace sumwright::testing
