// From obligations.txt to a verdict on it: the identities that it states by themselves, then the
// whole proof rebuilt from the claim's text with the file's evidence, compared item by item.
#include "cli/obligations_recheck.hpp"

#include <fmt/format.h>

#include <nlohmann/json.hpp>

#include "claim/reader.hpp"
#include "claim/text.hpp"
#include "cli/report.hpp"
#include "cli/table.hpp"
#include "writers/obligations_reader.hpp"
#include "writers/print_text.hpp"

namespace sumwright::cli {

namespace {

constexpr std::size_t kDifferencesShown = 10;
constexpr std::string_view kEstablished = "established";

[[nodiscard]] claim::ExpressionPtr parsed(const std::string& name, const std::string& text,
                                          const std::vector<std::string>& symbols) {
  const claim::Source source{name, text};
  return claim::parse_expression(source, {0, text.size()}, symbols);
}

// The evidence of the file as the author's: it is checked like any other.
[[nodiscard]] claim::Evidence evidence_of_file(const writers::ObligationsFile& file,
                                               const claim::Claim& claim) {
  std::vector<std::string> symbols{claim.running};
  for (const claim::Parameter& parameter : claim.parameters) symbols.push_back(parameter.name);
  claim::Evidence out;
  for (const std::string& text : file.recurrence) {
    out.recurrence.push_back(parsed("recurrence", text, symbols));
  }
  out.right_side = parsed("right side", file.right_side, symbols);
  if (!file.certificate.empty() && claim.sum.over.size() == 1) {
    symbols.push_back(claim.sum.over[0].index);
    out.certificate[claim.sum.over[0].index] = parsed("certificate", file.certificate, symbols);
  }
  return out;
}

[[nodiscard]] bool says_brought(const writers::ObligationsFile& file) {
  for (const writers::ObligationsEntry& entry : file.entries) {
    if (entry.section == "recurrence" && entry.key == "evidence") {
      return entry.value == "brought by the author";
    }
  }
  return false;
}

// The proof rebuilt from the claim's text, and what the file says otherwise.
struct Rebuilt {
  Decision decision;
  std::vector<std::string> differences;

  [[nodiscard]] bool agrees() const {
    return decision.status() == Status::established && differences.empty();
  }
};

class Rebuilder {
 public:
  Rebuilder(const writers::ObligationsFile& file, const Options& options, const Watch& watch,
            Progress& progress)
      : file_(file), options_(options), watch_(watch), progress_(progress) {}

  // The evidence of the claim's own text is what the author claims or brought. Evidence that was
  // found is taken from the file; an equality whose proof looks different then is searched for
  // again, as the file was made.
  Rebuilt run() {
    const claim::ReadClaim read =
        claim::read_claim_text("claim of " + options_.input.filename().string(), file_.claim_text);
    const auto claim = std::make_shared<const claim::Claim>(read.claim);
    const bool own = !claim->evidence.recurrence.empty() && says_brought(file_);
    if (file_.verdict != kEstablished || file_.recurrence.empty() || own) return decided(claim);
    Rebuilt with_evidence = with_evidence_of_file(*claim);
    if (with_evidence.agrees() || !claim->is_equality()) return with_evidence;
    Rebuilt searched = decided(claim);
    const bool known = searched.decision.status() != Status::undecided;
    return known ? std::move(searched) : std::move(with_evidence);
  }

 private:
  Rebuilt decided(const std::shared_ptr<const claim::Claim>& claim) {
    Rebuilt out;
    out.decision = decide(claim, options_, watch_, progress_);
    compare(out);
    return out;
  }

  Rebuilt with_evidence_of_file(const claim::Claim& claim) {
    auto changed = std::make_shared<claim::Claim>(claim);
    changed->evidence = evidence_of_file(file_, claim);
    Rebuilt out;
    out.decision = decide(changed, options_, watch_, progress_);
    out.decision.proof.question = claim.is_question();
    out.decision.proof.evidence_brought = says_brought(file_);
    compare(out);
    return out;
  }

  // How far an undecided claim got depends on limits; there is nothing to compare.
  void compare(Rebuilt& rebuilt) {
    if (rebuilt.decision.status() == Status::undecided) return;
    if (writers::word(rebuilt.decision.proof.verdict) != file_.verdict) return;
    progress_.show("comparison");
    rebuilt.differences = writers::differences(file_, rebuilt.decision.proof);
  }

  const writers::ObligationsFile& file_;
  const Options& options_;
  const Watch& watch_;
  Progress& progress_;
};

[[nodiscard]] std::string identities_line(const Recheck& recheck) {
  if (!recheck.identities_open.empty()) return "not decided: " + recheck.identities_open;
  if (!recheck.has_identities) return "none stated";
  return recheck.identities_hold ? "hold, by the file's own text" : "DO NOT HOLD";
}

[[nodiscard]] std::string verdict_words(const Recheck& recheck) {
  switch (recheck.outcome()) {
    case Recheck::Outcome::holds:
      return "the file holds";
    case Recheck::Outcome::confirmed:
      return "the file's verdict is confirmed: the claim is " + recheck.stated;
    case Recheck::Outcome::fails:
      return recheck.stated == "undecided" ? "the file is out of date" : "the file does not hold";
    case Recheck::Outcome::undecided:
      break;
  }
  return "undecided: what the file says could not be decided again";
}

[[nodiscard]] std::string comparison_line(const Recheck& recheck) {
  const std::string again = writers::word(recheck.rebuilt.proof.verdict);
  if (recheck.rebuilt.status() == Status::undecided) {
    return "no item: how far an undecided claim gets depends on limits and version";
  }
  if (again != recheck.stated) {
    return fmt::format("the file says {}, the claim decided again is {}: export it again",
                       recheck.stated, again);
  }
  const std::size_t count = recheck.differences.size();
  if (count == 0) {
    return recheck.stated == kEstablished
               ? "every item agrees with the proof rebuilt from the claim's text"
               : "every item agrees with the refutation made again from the claim's text";
  }
  return count == 1 ? "1 item does not agree" : fmt::format("{} items do not agree", count);
}

[[nodiscard]] std::string stated_line(const Recheck& recheck) {
  if (recheck.stated_point.empty()) return recheck.stated;
  return recheck.stated + ": " + recheck.stated_point;
}

}  // namespace

Recheck::Outcome Recheck::outcome() const {
  const bool established = stated == kEstablished;
  if (!identities_open.empty()) return Outcome::undecided;
  if (established && has_identities && !identities_hold) return Outcome::fails;
  const bool same = writers::word(rebuilt.proof.verdict) == stated;
  if (rebuilt.status() == Status::undecided) {
    return same ? Outcome::confirmed : Outcome::undecided;
  }
  if (!same || !differences.empty()) return Outcome::fails;
  return established ? Outcome::holds : Outcome::confirmed;
}

Status Recheck::status() const {
  switch (outcome()) {
    case Outcome::holds:
    case Outcome::confirmed:
      return rebuilt.status();
    case Outcome::fails:
      return Status::refuted;
    case Outcome::undecided:
      break;
  }
  return Status::undecided;
}

Recheck recheck_obligations(const Options& options, const Watch& watch, Progress& progress) {
  progress.show("reading");
  const writers::ObligationsFile file = writers::read_obligations_file(options.input);
  Recheck out;
  out.stated = file.verdict;
  for (const writers::ObligationsEntry& entry : file.entries) {
    if (entry.section.empty() && entry.key == "counterexample") out.stated_point = entry.value;
  }
  out.has_identities = file.has_equality || !file.classes.empty();
  progress.show("identities");
  try {
    out.identities_hold = writers::equality_holds(file);
  } catch (const std::length_error& reason) {
    out.identities_open = reason.what();
  }
  Rebuilt rebuilt = Rebuilder(file, options, watch, progress).run();
  out.rebuilt = std::move(rebuilt.decision);
  out.differences = std::move(rebuilt.differences);
  return out;
}

std::string recheck_text(const Recheck& recheck) {
  std::string out = labelled("verdict", verdict_words(recheck));
  out += labelled("file says", claim::printable(stated_line(recheck)));
  out += labelled("identities", claim::printable(identities_line(recheck)));
  out += labelled("compared", comparison_line(recheck));
  const std::size_t count = recheck.differences.size();
  for (std::size_t i = 0; i < std::min(count, kDifferencesShown); ++i) {
    out += labelled("", claim::printable(recheck.differences[i]));
  }
  if (count > kDifferencesShown) {
    out += labelled("", fmt::format("and {} more", count - kDifferencesShown));
  }
  return out + "\nThe claim of the file, decided again:\n" + verdict_text(recheck.rebuilt);
}

std::string recheck_json(const Recheck& recheck) {
  using Json = nlohmann::ordered_json;
  Json out = {{"verdict", verdict_words(recheck)},
              {"file_says", recheck.stated},
              {"identities", identities_line(recheck)},
              {"differences", recheck.differences},
              {"rebuilt", Json::parse(decision_json(recheck.rebuilt))},
              {"exit_status", static_cast<int>(recheck.status())}};
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace sumwright::cli
