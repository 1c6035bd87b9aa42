// The commands; each in a file of its own.
#pragma once

#include "cli/options.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

/// A recurrence and its certificate for the sum of a claim, proved and audited.
[[nodiscard]] Status find(const Options& options);

/// The verdict on a claim file or an obligation file, with the side conditions.
[[nodiscard]] Status check(const Options& options);

/// The verdict, and the files that carry the proof.
[[nodiscard]] Status export_claim(const Options& options);

/// Runs the proof assistant over an export.
[[nodiscard]] Status replay(const Options& options);

}  // namespace sumwright::cli
