// Every export target: a Proof in, named texts out. Writers print; they do no mathematics.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers {

/// A file to be written below the output folder; `path` is relative, with '/' separators.
struct NamedText {
  std::string path;
  std::string text;
};

/// obligations.txt (grammar: templates/obligations.ebnf). Any verdict.
[[nodiscard]] std::string obligations_text(const proof::Proof& proof);

/// appendix.tex and appendix-standalone.tex. Established proofs only.
[[nodiscard]] std::vector<NamedText> latex_files(const proof::Proof& proof);

/// coq/: _CoqProject, the support library, Claim.v, ClaimOverQc.v, ClaimOverR.v, ... Established
/// only. `prefix` is the logical name of the generated files' library.
[[nodiscard]] std::vector<NamedText> coq_files(const proof::Proof& proof,
                                               const std::string& prefix);

/// The text of Claim.v alone.
[[nodiscard]] std::string coq_claim_text(const proof::Proof& proof);

/// Corollaries over fields of the standard library: (file name, text). ClaimOverQc.v (with the
/// claim over Z when its two sides are integers as written), ClaimOverR.v (the axioms of R appear
/// there only). `library` is the logical name of the library that holds Claim.
[[nodiscard]] std::vector<NamedText> coq_corollaries(const proof::Proof& proof,
                                                     const std::string& library);

/// record.json: verdict, subject, sizes, conditions, format versions, hashes of `files`.
/// Deterministic.
[[nodiscard]] std::string record_json(const proof::Proof& proof,
                                      const std::vector<NamedText>& files);

}  // namespace sumwright::writers
