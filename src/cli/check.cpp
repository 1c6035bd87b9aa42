// `check`: the verdict on a claim file, or on an obligation file by its own text.
#include "cli/commands.hpp"
#include "cli/decision.hpp"
#include "cli/input_file.hpp"
#include "cli/obligations_recheck.hpp"
#include "cli/output.hpp"
#include "cli/report.hpp"

namespace sumwright::cli {

namespace {

[[nodiscard]] Status check_obligations(const Options& options) {
  Recheck recheck;
  {
    const Watch watch(options);
    Progress progress;
    recheck = recheck_obligations(options, watch, progress);
  }
  print_result(options.json ? recheck_json(recheck) : recheck_text(recheck));
  return recheck.status();
}

}  // namespace

Status check(const Options& options) {
  if (is_obligations_file(options.input)) return check_obligations(options);
  const std::shared_ptr<const claim::Claim> claim = read_claim(options.input);
  Decision decision;
  {
    const Watch watch(options);
    Progress progress;
    decision = decide(claim, options, watch, progress);
  }
  if (options.json) {
    print_result(decision_json(decision));
  } else {
    const std::string conditions = conditions_text(decision.proof);
    print_result(verdict_text(decision) + (conditions.empty() ? "" : "\n" + conditions));
  }
  return decision.status();
}

}  // namespace sumwright::cli
