// From a Proof and the files written to record.json: what a machine wants to know about a run.
//
// Deterministic: keys in a fixed order, no times, no paths of this machine.
#include <nlohmann/json.hpp>

#include "writers/claim_text.hpp"
#include "writers/print_text.hpp"
#include "writers/sha256.hpp"
#include "writers/version.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {

namespace {

using Json = nlohmann::ordered_json;

[[nodiscard]] Json counterexample_json(const proof::Counterexample& point) {
  Json values = Json::object();
  for (const auto& [name, value] : point.values) values[name] = value.get_str();
  return {{"what", point.what}, {"values", values}, {"left", point.left}, {"right", point.right}};
}

[[nodiscard]] Json claim_json(const proof::Proof& proof) {
  const claim::Claim& claim = *proof.claim;
  Json out = {{"title", claim.title},
              {"kind", claim_kind(proof)},
              {"statement", statement_text(proof)},
              {"sha256", sha256(claim.source->text)}};
  if (!claim.record.authors.empty()) out["authors"] = claim.record.authors;
  if (!claim.record.source.empty()) out["source"] = claim.record.source;
  if (!claim.record.identifier.empty()) out["identifier"] = claim.record.identifier;
  if (!claim.record.licence.empty()) out["licence"] = claim.record.licence;
  return out;
}

[[nodiscard]] Json recurrence_json(const proof::Proof& proof) {
  const bool established = proof.verdict == proof::Verdict::established;
  const StatedRecurrence stated = stated_recurrence(proof);
  if (stated.coefficients.empty()) return nullptr;
  Json out = {{"order", stated.coefficients.size() - 1}};
  if (established) out["threshold"] = proof.threshold;
  out["brought"] = stated.brought;
  out["coefficients"] = stated.coefficients;
  if (!stated.right_side.empty()) out["right_side"] = stated.right_side;
  if (!stated.certificate.empty()) out["certificate"] = stated.certificate;
  return out;
}

[[nodiscard]] Json size_json(const proof::Polynomial& polynomial, const proof::Proof& proof) {
  const Size size = size_of(polynomial);
  Json degrees = Json::object();
  for (std::size_t i = 0; i < proof.symbols.size(); ++i) {
    if (!proof.symbols[i].name.empty()) degrees[proof.symbols[i].name] = degree_in(polynomial, i);
  }
  return {
      {"terms", size.terms}, {"degree", size.degree}, {"degrees", degrees}, {"bits", size.bits}};
}

[[nodiscard]] Json sizes_json(const proof::Proof& proof) {
  Json out = Json::object();
  if (proof.telescoping) {
    out["normal_form"] = size_json(proof.telescoping->normal_form, proof);
    out["certificate"] = size_json(proof.telescoping->certificate, proof);
  }
  out["initial_values"] = proof.initial.size();
  out["conditions"] = proof.conditions.size();
  return out;
}

[[nodiscard]] Json condition_json(const proof::Condition& condition) {
  return {{"id", condition.id},
          {"kind", word(condition.kind)},
          {"statement", condition.text},
          {"region", condition.region},
          {"settled", word(condition.settled)},
          {"method", condition.method}};
}

}  // namespace

std::string record_json(const proof::Proof& proof, const std::vector<NamedText>& files) {
  Json out = {{"format", kRecordFormat},
              {"tool", {{"name", "Sumwright"}, {"version", kToolVersion}}},
              {"formats", {{"claim", kClaimFormat}, {"obligations", kObligationsFormat}}},
              {"verdict", word(proof.verdict)},
              {"subject", word(proof.subject)},
              {"claim", claim_json(proof)}};
  if (!proof.reason.empty()) out["reason"] = proof.reason;
  if (!proof.would_settle.empty()) out["would_settle"] = proof.would_settle;
  if (!proof.residue.empty()) out["residue"] = proof.residue;
  if (proof.counterexample) out["counterexample"] = counterexample_json(*proof.counterexample);
  if (const Json recurrence = recurrence_json(proof); !recurrence.is_null()) {
    // What is not proved of the sum must not be found where a proved recurrence stands.
    const bool established = proof.verdict == proof::Verdict::established;
    out[established ? "recurrence" : "candidate"] = recurrence;
  }
  out["sizes"] = sizes_json(proof);
  out["conditions"] = Json::array();
  for (const proof::Condition& condition : proof.conditions) {
    out["conditions"].push_back(condition_json(condition));
  }
  out["files"] = Json::array();
  for (const NamedText& file : files) {
    out["files"].push_back(
        {{"path", file.path}, {"bytes", file.text.size()}, {"sha256", sha256(file.text)}});
  }
  // Texts of a proof may quote a claim file; what is not UTF-8 is replaced, never an exception.
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace sumwright::writers
