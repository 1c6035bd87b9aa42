// Shared by the tests of the proof stage: a claim's terms, verdicts on short claims.
#pragma once

#include <memory>
#include <string>

#include "../term/term_support.hpp"
#include "proof/argument.hpp"
#include "proof/build.hpp"
#include "proof/evidence.hpp"

namespace sumwright::testing {

/// What the ladder of `build` works on.
inline proof::building::Terms terms_of(const ClaimParts& parts) {
  const auto claim = read_claim(parts);
  term::Setting setting = term::make_setting(claim);
  std::optional<proof::building::AuthorRange> range;
  const long from = claim->from.get_si();
  term::Facts region = setting.from(from);
  if (setting.has_index) {
    range = proof::building::AuthorRange{*term::make_end(setting, claim->sum.over[0].low, false),
                                         *term::make_end(setting, claim->sum.over[0].high, true)};
    for (const term::End* end : {&range->low, &range->high})
      if (end->inside.size() == 1)
        for (const term::Affine& form : end->inside[0]) region.add(form);
  }
  term::Conversion summand = term::convert(setting, region, claim->sum.summand);
  std::optional<term::Conversion> closed;
  if (claim->closed) closed = term::convert(setting, setting.from(from), claim->closed);
  return {std::move(setting), range, region, from, std::move(summand), std::move(closed)};
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
