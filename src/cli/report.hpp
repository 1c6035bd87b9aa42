// A verdict as text for people and as JSON for machines.
#pragma once

#include <string>
#include <vector>

#include "cli/decision.hpp"

namespace sumwright::cli {

/// `(n + 1)*S(n + 1) - ... = 0`: the recurrence of the proof with S(n) for the sum; empty when
/// there is none. Of a candidate that is not proved, the right side may be unknown.
[[nodiscard]] std::string recurrence_line(const proof::Proof& proof);

/// Verdict, reason, counterexample, residue: a few lines within 80 columns.
[[nodiscard]] std::string verdict_text(const Decision& decision);

/// The side conditions as a table within 80 columns; empty when there are none.
[[nodiscard]] std::string conditions_text(const proof::Proof& proof);

/// What was found as lines of a claim file's [evidence].
[[nodiscard]] std::string evidence_toml(const proof::Proof& proof);

/// Everything that record.json says of the proof, the audit's findings, and the exit status.
[[nodiscard]] std::string decision_json(const Decision& decision);

}  // namespace sumwright::cli
