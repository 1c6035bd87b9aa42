// From a claim to an audited verdict: the ladder that every command climbs.
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "audit/audit.hpp"
#include "cli/options.hpp"
#include "cli/progress.hpp"
#include "cli/session.hpp"
#include "proof/proof.hpp"

namespace sumwright::cli {

/// A verdict, what stands behind it, and how long each step took.
struct Decision {
  proof::Proof proof;
  std::optional<audit::AuditReport> audit;  ///< of an established proof
  std::vector<std::pair<std::string, double>> seconds;
  /// `find`: a closed form of the sum, proved as a claim of its own; empty when there is none.
  std::string closed_form = {};

  [[nodiscard]] Status status() const;
};

/// Reads a claim file; warnings go to stderr. Throws claim::InputError.
[[nodiscard]] std::shared_ptr<const claim::Claim> read_claim(const std::filesystem::path& path);

/// Builds the proof and has it audited. Time or memory that runs out gives `undecided`. An audit
/// that disagrees throws Fault. Throws claim::InputError as proof::build does.
[[nodiscard]] Decision decide(const std::shared_ptr<const claim::Claim>& claim,
                              const Options& options, const Watch& watch, Progress& progress);

/// The claim without `equals` and evidence: the question which recurrence its sum satisfies.
[[nodiscard]] std::shared_ptr<const claim::Claim> as_question(const claim::Claim& claim);

}  // namespace sumwright::cli
