// `export`: from a claim to a folder that carries its proof, or what is left open of it.
//
// Invariant: a theorem, an appendix or a script is written for an established claim only, and what
// an earlier run left of these does not survive a later verdict.
#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"
#include "cli/commands.hpp"
#include "cli/decision.hpp"
#include "cli/export_folder.hpp"
#include "cli/output.hpp"
#include "cli/report.hpp"
#include "cli/run_record.hpp"
#include "writers/output_folder.hpp"

namespace sumwright::cli {

namespace {

using writers::NamedText;

[[nodiscard]] bool wants(const Options& options, const std::string& target) {
  return std::find(options.targets.begin(), options.targets.end(), target) != options.targets.end();
}

void append(std::vector<NamedText>& files, std::vector<NamedText> more) {
  std::move(more.begin(), more.end(), std::back_inserter(files));
}

// The deterministic files but record.json.
[[nodiscard]] std::vector<NamedText> target_files(const Options& options,
                                                  const proof::Proof& proof) {
  const bool established = proof.verdict == proof::Verdict::established;
  std::vector<NamedText> files;
  if (wants(options, "obligations") || !established) {
    files.push_back({"obligations.txt", writers::obligations_text(proof)});
  }
  if (!established) return files;
  if (wants(options, "latex")) append(files, writers::latex_files(proof));
  if (wants(options, "coq")) append(files, writers::coq_files(proof, options.coq_prefix));
  return files;
}

// Before the work: a place that is taken is better known now than in ten minutes. What is written
// depends on the verdict, and is looked at again then.
void check_places(const Options& options) {
  check_export_folder(options.out);
  std::vector<std::string> paths{"record.json", "run.json", "obligations.txt"};
  if (wants(options, "latex"))
    paths.insert(paths.end(), {"appendix.tex", "appendix-standalone.tex"});
  check_nothing_is_lost(options.out, paths);
}

[[nodiscard]] std::string files_text(const Options& options, const std::vector<NamedText>& files) {
  std::string out = fmt::format("\nwritten to {}:\n", claim::printable(options.out.string()));
  for (const NamedText& file : files) {
    out += fmt::format("  {:<34} {:>8} bytes\n", file.path, file.text.size());
  }
  return out;
}

}  // namespace

Status export_claim(const Options& options) {
  const std::string started = utc_now();
  const std::shared_ptr<const claim::Claim> claim = read_claim(options.input);
  check_places(options);
  Decision decision;
  std::vector<NamedText> files;
  {
    const Watch watch(options);
    Progress progress;
    decision = decide(claim, options, watch, progress);
    progress.show("writing");
    files = target_files(options, decision.proof);
    files.push_back({"record.json", writers::record_json(decision.proof, files)});
    files.push_back({"run.json", run_json(options, decision, started)});
  }
  {
    const SignalShield shield;
    write_export(options.out, files);
  }
  if (options.json) {
    print_result(decision_json(decision));
  } else {
    print_result(verdict_text(decision) + files_text(options, files));
  }
  return decision.status();
}

}  // namespace sumwright::cli
