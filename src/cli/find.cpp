// `find`: from a claim to a proved recurrence for its sum, and to a copy of the claim that carries
// it.
#include <fmt/format.h>

#include "claim/reader.hpp"
#include "claim/text.hpp"
#include "cli/commands.hpp"
#include "cli/decision.hpp"
#include "cli/evidence_text.hpp"
#include "cli/output.hpp"
#include "cli/report.hpp"
#include "cli/single_file.hpp"
#include "proof/closed_form.hpp"

namespace sumwright::cli {

namespace {

namespace fs = std::filesystem;

constexpr std::size_t kLongestClosedForm = 1000;  // characters; a longer one helps nobody

// FILE may be the claim itself when it is written as the claim was; another name for the same file
// is more likely a mistake.
void check_target(const Options& options) {
  std::error_code code;
  if (*options.write != options.input && fs::equivalent(*options.write, options.input, code)) {
    throw Unusable(claim::printable(options.write->string()) +
                   ": is the claim file under another name");
  }
}

// The copy must say what was found: read again, its evidence is checked as a claim of its own.
void check_copy(const claim::Source& source, const std::string& text, const Options& options,
                const Watch& watch, Progress& progress) {
  const claim::ReadClaim read = claim::read_claim_text(source.name, text);
  auto recurrence = std::make_shared<claim::Claim>(read.claim);
  recurrence->closed = nullptr;
  recurrence->other_sum.reset();
  const Decision decision = decide(recurrence, options, watch, progress);
  if (decision.status() != Status::established) {
    throw Fault("the evidence found does not pass when it is read back: " + decision.proof.reason);
  }
}

/// The closed form that the recurrence suggests, when its equality is proved within the limits.
[[nodiscard]] std::string proved_closed_form(const proof::Proof& question, const Options& options,
                                             const Watch& watch, Progress& progress) {
  const std::optional<std::string> candidate = proof::closed_form_candidate(question);
  if (!candidate || candidate->size() > kLongestClosedForm) return "";
  std::vector<std::string> names{question.claim->running};
  for (const claim::Parameter& parameter : question.claim->parameters) {
    names.push_back(parameter.name);
  }
  // The recurrence that was found is the evidence: nothing is searched for again.
  auto equality = std::make_shared<claim::Claim>(*question.claim);
  const auto parse = [&](const std::string& text) {
    return claim::parse_expression(claim::Source{"closed form", text}, {0, text.size()}, names);
  };
  try {
    equality->closed = parse(*candidate);
    const std::string& index = question.claim->sum.over.at(0).index;
    names.push_back(index);
    equality->evidence.certificate = {{index, parse(question.certificate_text)}};
    const Decision decision = decide(equality, options, watch, progress);
    if (decision.status() != Status::established) return "";
  } catch (const claim::InputError&) {
    return "";  // not an expression that a claim may have: nothing to say
  }
  return claim::to_text(*equality->closed);
}

[[nodiscard]] std::string found_text(const claim::Claim& claim, const Decision& decision) {
  std::string out = verdict_text(decision);
  if (decision.status() != Status::established) return out;
  out += "\n" + evidence_toml(decision.proof);
  if (claim.is_equality()) {
    out += "\n# This is proved of the sum alone; `sumwright check` decides the equality.\n";
  }
  return out;
}

void write_copy(const claim::Claim& claim, const Options& options, const Decision& decision,
                const std::string& copy) {
  if (decision.status() != Status::established) {
    say("sumwright: nothing found, nothing written\n");
    return;
  }
  write_single_file(*options.write, copy);
  say(fmt::format("sumwright: evidence written to {}\n",
                  claim::printable(options.write->string())));
  if (!claim.is_equality() && !claim.is_question()) {
    say("sumwright: it replaces the recurrence that the file claimed\n");
  }
}

}  // namespace

Status find(const Options& options) {
  if (options.write) check_target(options);
  const std::shared_ptr<const claim::Claim> claim = read_claim(options.input);
  Decision decision;
  std::string copy;
  {
    const Watch watch(options);
    Progress progress;
    decision = decide(as_question(*claim), options, watch, progress);
    if (!claim->is_equality()) {
      decision.closed_form = proved_closed_form(decision.proof, options, watch, progress);
    }
    if (options.write && decision.status() == Status::established) {
      copy = with_evidence(*claim->source, evidence_of(decision.proof));
      check_copy(*claim->source, copy, options, watch, progress);
    }
  }
  // For people first what was found, should the copy fail; for machines one object for all.
  if (!options.json) print_result(found_text(*claim, decision));
  if (options.write) write_copy(*claim, options, decision, copy);
  if (options.json) print_result(decision_json(decision));
  return decision.status();
}

}  // namespace sumwright::cli
