// A run that ends without a verdict on its claim, as JSON for machines.
#pragma once

#include <string>

#include "claim/source.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

/// Verdict `refused` (2), `undecided` (3) or `fault` (4), the exit status, and why.
[[nodiscard]] std::string failure_json(Status status, const std::string& message);

/// Verdict `refused` with file, line, column and message; `suggestion` is the word that may have
/// been meant, `expected` what may stand there instead.
[[nodiscard]] std::string failure_json(const claim::InputError::Parts& parts);

}  // namespace sumwright::cli
