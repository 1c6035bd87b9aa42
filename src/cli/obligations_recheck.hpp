// Re-verification of an obligation file from its own text.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "cli/decision.hpp"

namespace sumwright::cli {

/// Whether the file begins as obligation files do. Throws Unusable when it cannot be read.
[[nodiscard]] bool is_obligations_file(const std::filesystem::path& path);

/// What a re-check found.
struct Recheck {
  std::string stated;                    ///< the verdict that the file states
  bool identities_hold = false;          ///< its polynomial identities, by themselves
  bool has_identities = false;           ///< whether it states any
  std::string identities_open;           ///< why they could not be decided, if so
  Decision rebuilt;                      ///< from the claim's text and the file's evidence
  std::vector<std::string> differences;  ///< what the file says otherwise than `rebuilt`

  [[nodiscard]] Status status() const;
};

/// Throws claim::InputError when the file is not one.
[[nodiscard]] Recheck recheck_obligations(const Options& options, const Watch& watch,
                                          Progress& progress);

[[nodiscard]] std::string recheck_text(const Recheck& recheck);
[[nodiscard]] std::string recheck_json(const Recheck& recheck);

}  // namespace sumwright::cli
