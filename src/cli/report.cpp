// From a Decision to what the user reads.
#include "cli/report.hpp"

#include <fmt/format.h>

#include <nlohmann/json.hpp>

#include "claim/text.hpp"
#include "cli/evidence_text.hpp"
#include "cli/readable.hpp"
#include "cli/table.hpp"
#include "writers/claim_text.hpp"
#include "writers/print_text.hpp"
#include "writers/writers.hpp"

namespace sumwright::cli {

namespace {

using Json = nlohmann::ordered_json;

[[nodiscard]] std::string point_text(const proof::Counterexample& point) {
  std::string out;
  for (const auto& [name, value] : point.values) {
    out += fmt::format("{}{} = {}", out.empty() ? "" : ", ", name, value.get_str());
  }
  return out;
}

[[nodiscard]] std::string line(std::string_view label, const std::string& text) {
  return text.empty() ? "" : labelled(label, claim::printable(text));
}

// Long texts are for files, and for the lines that `find` prints.
[[nodiscard]] std::string shortened(const std::string& text) {
  constexpr std::size_t kShown = 400;
  if (text.size() <= 2 * kShown) return text;
  return fmt::format("{} ... ({} characters; `sumwright find` prints them all)",
                     text.substr(0, kShown), text.size());
}

// Whether the text is a sum, which needs brackets as a factor.
[[nodiscard]] bool is_sum(std::string_view text) {
  int depth = 0;
  for (std::size_t at = 0; at < text.size(); ++at) {
    if (text[at] == '(') ++depth;
    if (text[at] == ')') --depth;
    if (depth == 0 && at > 1 && text[at - 1] == ' ' && (text[at] == '+' || text[at] == '-')) {
      return true;
    }
  }
  return false;
}

[[nodiscard]] std::string times(const std::string& coefficient, const std::string& value) {
  if (coefficient == "1") return value;
  if (coefficient == "-1") return "-" + value;
  return (is_sum(coefficient) ? "(" + coefficient + ")" : coefficient) + "*" + value;
}

// What is claimed of the sum, without the recurrence.
[[nodiscard]] std::string claimed_text(const proof::Proof& proof) {
  if (proof.claim->is_equality()) return writers::statement_text(proof);
  return fmt::format("S({}) = {} for every integer {} >= {}", proof.claim->running,
                     writers::sum_text(proof.claim->sum), proof.claim->running,
                     proof.claim->from.get_str());
}

[[nodiscard]] std::string remark_text(const proof::Proof& proof) {
  std::string out = writers::stated_recurrence(proof).brought ? "brought by the author" : "found";
  if (proof.claim->is_equality()) {
    out = fmt::format("for S({}), the sum on the left; {}", proof.claim->running, out);
  }
  if (proof.verdict == proof::Verdict::undecided) return out + "; not proved";
  if (proof.threshold > proof.from) {
    out += fmt::format("; for {} >= {}, smaller {} checked one by one", proof.claim->running,
                       proof.threshold, proof.claim->running);
  }
  return out;
}

// The recurrence under the name that it deserves. Beside a refuted claim stands only what the
// author wrote.
[[nodiscard]] std::string recurrence_text(const proof::Proof& proof) {
  const std::string text = shortened(recurrence_line(proof));
  if (text.empty()) return "";
  switch (proof.verdict) {
    case proof::Verdict::established:
      return line("recurrence", text) + line("", remark_text(proof)) +
             line("certificate", shortened(writers::stated_recurrence(proof).certificate));
    case proof::Verdict::refuted:
      return writers::stated_recurrence(proof).brought ? line("recurrence", text) : "";
    case proof::Verdict::undecided:
      break;
  }
  return line("candidate", text) + line("", remark_text(proof)) +
         line("certificate", shortened(writers::stated_recurrence(proof).certificate));
}

[[nodiscard]] std::string audit_text(const audit::AuditReport& report) {
  std::size_t cases = 0;
  for (const audit::Finding& finding : report.findings) cases += finding.cases;
  return fmt::format("{} checks by other arithmetic, {} cases: all agree", report.findings.size(),
                     cases);
}

}  // namespace

std::string recurrence_line(const proof::Proof& proof) {
  const writers::StatedRecurrence stated = writers::stated_recurrence(proof);
  const std::vector<std::string>& coefficients = stated.coefficients;
  std::string out;
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    const std::string shift = i == 0 ? "" : fmt::format(" + {}", i);
    const std::string term =
        times(coefficients[i], fmt::format("S({}{})", proof.claim->running, shift));
    if (out.empty()) {
      out = term;
    } else if (term.starts_with('-')) {
      out += " - " + term.substr(1);
    } else {
      out += " + " + term;
    }
  }
  if (out.empty()) return out;
  return stated.right_side.empty() ? out + ", right side not known"
                                   : out + " = " + stated.right_side;
}

std::string verdict_text(const Decision& decision) {
  const proof::Proof& proof = decision.proof;
  std::string verdict = writers::word(proof.verdict);
  if (proof.verdict == proof::Verdict::refuted) {
    verdict += proof.subject == proof::Subject::claim ? " (the claim is false)"
                                                      : " (the evidence is wrong)";
  }
  std::string out = line("verdict", verdict);
  out += line("claim", proof.claim->title);
  out += line("", claimed_text(proof));
  out += recurrence_text(proof);
  if (!decision.closed_form.empty())
    out += line("closed form", fmt::format("S({}) = {}, proved as a claim of its own",
                                           proof.claim->running, decision.closed_form));
  out += line("reason", readable_inequalities(proof.reason));
  if (proof.counterexample) {
    out += line("point", fmt::format("{} fails at {}", proof.counterexample->what,
                                     point_text(*proof.counterexample)));
    out += line("left side", proof.counterexample->left);
    out += line("right side", proof.counterexample->right);
  }
  out += line("residue", proof.residue);
  if (proof.verdict == proof::Verdict::refuted && proof.subject == proof::Subject::evidence &&
      proof.claim->is_equality()) {
    out += line("note",
                "the equality itself is not decided by this; `sumwright find` may give "
                "evidence that settles it");
  }
  out += line("would settle", readable_inequalities(proof.would_settle));
  if (decision.audit) out += line("audit", audit_text(*decision.audit));
  return out;
}

std::string conditions_text(const proof::Proof& proof) {
  if (proof.conditions.empty()) return "";
  std::vector<std::vector<std::string>> rows{{"id", "side condition", "where", "settled"},
                                             {"--", "--------------", "-----", "-------"}};
  for (const proof::Condition& condition : proof.conditions) {
    std::string settled = writers::word(condition.settled);
    if (!condition.method.empty()) settled += ": " + condition.method;
    rows.push_back({condition.id,
                    claim::printable(readable_inequalities(condition.text)) + " [" +
                        writers::word(condition.kind) + "]",
                    claim::printable(readable_inequalities(condition.region)),
                    claim::printable(settled)});
  }
  return table({4, 30, 20, 20}, rows);
}

std::string evidence_toml(const proof::Proof& proof) {
  return "[evidence]\n" + evidence_lines(evidence_of(proof), "\n");
}

std::string decision_json(const Decision& decision) {
  Json out = Json::parse(writers::record_json(decision.proof, {}));
  out.erase("files");
  if (decision.audit) {
    out["audit"] = Json::array();
    for (const audit::Finding& finding : decision.audit->findings) {
      out["audit"].push_back(
          {{"check", finding.check}, {"cases", finding.cases}, {"agrees", finding.agrees}});
    }
  }
  if (!decision.closed_form.empty()) out["closed_form"] = decision.closed_form;
  out["exit_status"] = static_cast<int>(decision.status());
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace sumwright::cli
