// The audit: from a Proof to findings, one check after the other; and counterexamples from a claim
// alone. GiNaC and CLN are not safe in several threads at once, so one audit runs at a time.
#include "audit/audit.hpp"

#include <mutex>
#include <stdexcept>

#include "audit/checks.hpp"
#include "audit/claim_sides.hpp"
#include "audit/hypotheses.hpp"
#include "audit/special_values.hpp"

namespace sumwright::audit {

namespace {

std::mutex& one_at_a_time() {
  static std::mutex mutex;
  return mutex;
}

/// All checks in order; findings made so far stay when one cannot be made.
void run_checks(const proof::Proof& proof, const AuditOptions& options, AuditReport& report) {
  Context context(proof, options);
  check_structure(context, report.findings);
  if (!report.agrees()) return;  // the numbers of parts are relied on below
  check_hypotheses(context, report.findings);
  check_equality(context, report.findings);
  check_conversions(context, report.findings);
  check_terms(context, report.findings);
  check_ranges(context, report.findings);
  check_balances(context, report.findings);
  check_nonzero(context, report.findings);
  check_initial_values(context, report.findings);
  check_claimed_recurrence(context, report.findings);
  check_sums(context, report.findings);
}

}  // namespace

AuditReport audit(const proof::Proof& proof, const AuditOptions& options) {
  if (!proof.claim) throw std::invalid_argument("audit: a proof without its claim");
  const std::lock_guard<std::mutex> lock(one_at_a_time());
  AuditReport report;
  try {
    run_checks(proof, options, report);
  } catch (const TooLarge& reason) {
    report.findings.push_back({"audit", 0, false, std::string("not made: ") + reason.what()});
  } catch (const NotAnInteger& flaw) {
    report.findings.push_back({"audit", 0, false, flaw.what()});
  }
  return report;
}

namespace {

std::string difference_at(const claim::Claim& claim, Author& author, std::size_t sample, long n) {
  const Point point = author.point(sample, n);
  if (!admits(claim, point)) return "";
  const Sides sides = sides_at(claim, author, sample, n);
  if (!sides.comparable || same(sides.left, sides.right)) return "";
  return text_of(point) + ": " + text_of(sides.left) + " against " + text_of(sides.right);
}

}  // namespace

std::string find_counterexample(const claim::Claim& claim, const AuditOptions& options) {
  const std::lock_guard<std::mutex> lock(one_at_a_time());
  std::vector<std::string> names{claim.running};
  for (const claim::Parameter& parameter : claim.parameters) names.push_back(parameter.name);
  // cheaper per point than an audit, so more of them: twice the span, four times the samples
  const long span = 2 * options.sum_span;
  std::vector<Point> samples = sample_parameters(claim, names, 4 * options.parameter_samples, span);
  if (!claim.parameters.empty() && !samples.empty())
    for (const Point& point : special_points(claim, samples.front(), 8)) samples.push_back(point);
  Author author(claim, samples, options.check_time);
  if (!claim.from.fits_slong_p()) return "";
  for (long n = claim.from.get_si(); n < claim.from.get_si() + span; ++n)
    for (std::size_t sample = 0; sample < samples.size(); ++sample) {
      if (options.check_time) options.check_time();
      try {
        std::string found = difference_at(claim, author, sample, n);
        if (!found.empty()) return found;
      } catch (const TooLarge&) {
        continue;  // beyond what is evaluated: no opinion at this point
      }
    }
  return "";
}

}  // namespace sumwright::audit
