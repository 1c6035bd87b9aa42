// From obligations.txt to a verdict on it: the identities that it states by themselves, then the
// whole proof rebuilt from the claim's text with the file's evidence, compared item by item.
#include "cli/obligations_recheck.hpp"

#include <fmt/format.h>

#include <fstream>
#include <nlohmann/json.hpp>

#include "claim/reader.hpp"
#include "claim/text.hpp"
#include "cli/report.hpp"
#include "cli/table.hpp"
#include "writers/obligations_document.hpp"
#include "writers/obligations_reader.hpp"

namespace sumwright::cli {

namespace {

constexpr std::size_t kDifferencesShown = 10;

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
    if (file_.recurrence.empty() || own) return decided(claim);
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

  void compare(Rebuilt& rebuilt) {
    if (rebuilt.decision.status() != Status::established) return;
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

}  // namespace

bool is_obligations_file(const std::filesystem::path& path) {
  std::ifstream in(path, std::ios::binary);
  std::string start(writers::kObligationsFirstLine.size(), '\0');
  in.read(start.data(), static_cast<std::streamsize>(start.size()));
  return in && start == writers::kObligationsFirstLine;
}

Status Recheck::status() const {
  if (!identities_open.empty()) return Status::undecided;
  if (has_identities && !identities_hold) return Status::refuted;
  if (rebuilt.status() == Status::refuted) return Status::refuted;
  if (rebuilt.status() == Status::established && stated != "established") return Status::refuted;
  if (rebuilt.status() == Status::established && !differences.empty()) return Status::refuted;
  return rebuilt.status();
}

Recheck recheck_obligations(const Options& options, const Watch& watch, Progress& progress) {
  progress.show("reading");
  const writers::ObligationsFile file = writers::read_obligations_file(options.input);
  Recheck out;
  out.stated = file.verdict;
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
  static constexpr std::string_view words[] = {"the file holds", "the file does not hold", "",
                                               "undecided"};
  std::string out = labelled("verdict", words[static_cast<std::size_t>(recheck.status())]);
  out += labelled("file says", claim::printable(recheck.stated));
  out += labelled("identities", claim::printable(identities_line(recheck)));
  const std::size_t count = recheck.differences.size();
  if (recheck.rebuilt.status() == Status::established) {
    out += labelled("compared", count == 0 ? "every item agrees with the proof rebuilt from the "
                                             "claim's text"
                                           : fmt::format("{} items do not agree", count));
  }
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
  Json out = {{"file_says", recheck.stated},
              {"identities", identities_line(recheck)},
              {"differences", recheck.differences},
              {"rebuilt", Json::parse(decision_json(recheck.rebuilt))},
              {"exit_status", static_cast<int>(recheck.status())}};
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace sumwright::cli
