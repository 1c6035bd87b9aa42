// Evidence in the text of a claim file: a copy with it, everything else byte for byte.
#pragma once

#include <string>
#include <string_view>

#include "claim/claim.hpp"
#include "proof/proof.hpp"

namespace sumwright::cli {

/// Texts in the claim language, as a proof states what it found.
struct EvidenceTexts {
  std::vector<std::string> recurrence;
  std::string right_side;  ///< "0" when there is none
  std::string index;       ///< empty: no certificate
  std::string certificate;
};

[[nodiscard]] EvidenceTexts evidence_of(const proof::Proof& proof);

/// `recurrence  = [...]`, `right_side  = "..."` (unless 0), `certificate = {...}`, each with
/// `line_end`.
[[nodiscard]] std::string evidence_lines(const EvidenceTexts& evidence, std::string_view line_end);

/// The text of `source`, a claim file that was read before, with this evidence: values that are
/// there are replaced, what is missing is added. Comments, layout, line ends and a byte-order mark
/// stay. Throws Fault when the outcome does not read back as the same claim with this evidence.
[[nodiscard]] std::string with_evidence(const claim::Source& source, const EvidenceTexts& evidence);

}  // namespace sumwright::cli
