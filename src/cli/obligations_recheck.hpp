// Re-verification of an obligation file from its own text.
#pragma once

#include <string>
#include <vector>

#include "cli/decision.hpp"

namespace sumwright::cli {

/// What a re-check found.
struct Recheck {
  enum class Outcome {
    holds,      ///< a proof, and it is right
    confirmed,  ///< a refutation, or a claim left undecided, and so it is
    fails,      ///< it says what is not so
    undecided   ///< the proof or refutation could not be rebuilt
  };

  std::string stated;                    ///< the verdict that the file states
  std::string stated_point;              ///< of a refutation: what fails where, by the file
  bool identities_hold = false;          ///< its polynomial identities, by themselves
  bool has_identities = false;           ///< whether it states any
  std::string identities_open;           ///< why they could not be decided, if so
  Decision rebuilt;                      ///< from the claim's text and the file's evidence
  std::vector<std::string> differences;  ///< what the file says otherwise than `rebuilt`

  [[nodiscard]] Outcome outcome() const;
  /// That of the claim, but for a file that says what is not so: refuted.
  [[nodiscard]] Status status() const;
};

/// Throws claim::InputError when the file is not one.
[[nodiscard]] Recheck recheck_obligations(const Options& options, const Watch& watch,
                                          Progress& progress);

[[nodiscard]] std::string recheck_text(const Recheck& recheck);
[[nodiscard]] std::string recheck_json(const Recheck& recheck);

}  // namespace sumwright::cli
