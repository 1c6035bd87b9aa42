// A Claim value as the text of a claim file, so that a changed claim goes through the whole reader.
#pragma once

#include <string>

#include "claim/claim.hpp"

namespace sumwright::testing {

/// The claim as a claim file of format 1. `comment` stands above it, one line.
[[nodiscard]] std::string claim_file_text(const claim::Claim& claim, const std::string& comment);

}  // namespace sumwright::testing
