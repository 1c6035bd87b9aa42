// Claim, proof, audit; and what becomes of a run that is stopped on the way.
//
// Invariant: `established` leaves this file only with an audit that agrees.
#include "cli/decision.hpp"

#include <fmt/format.h>

#include <chrono>
#include <new>

#include "claim/reader.hpp"
#include "claim/text.hpp"
#include "cli/input_file.hpp"
#include "cli/output.hpp"
#include "proof/build.hpp"

namespace sumwright::cli {

namespace {

class Stopwatch {
 public:
  [[nodiscard]] double seconds() const {
    return std::chrono::duration<double>(std::chrono::steady_clock::now() - start_).count();
  }

 private:
  std::chrono::steady_clock::time_point start_ = std::chrono::steady_clock::now();
};

// A run that ends before its terms are made has no symbols yet; exports list them all the same.
void complete_symbols(proof::Proof& proof) {
  if (!proof.symbols.empty()) return;
  const claim::Claim& claim = *proof.claim;
  proof.symbols.push_back({claim.running, proof::SymbolKind::running});
  for (const claim::Range& range : claim.sum.over) {
    proof.symbols.push_back({range.index, proof::SymbolKind::index});
  }
  if (claim.sum.over.empty()) proof.symbols.push_back({"", proof::SymbolKind::index});
  for (const claim::Parameter& parameter : claim.parameters) {
    proof.symbols.push_back({parameter.name, parameter.ring == claim::Parameter::Ring::integers
                                                 ? proof::SymbolKind::integer_parameter
                                                 : proof::SymbolKind::rational_parameter});
  }
}

[[nodiscard]] proof::Proof stopped(const std::shared_ptr<const claim::Claim>& claim,
                                   const std::string& reason, const std::string& settle) {
  proof::Proof out;
  out.claim = claim;
  if (claim->from.fits_slong_p()) out.from = claim->from.get_si();
  out.verdict = proof::Verdict::undecided;
  out.reason = reason;
  out.would_settle = settle;
  complete_symbols(out);
  return out;
}

[[nodiscard]] std::string disagreement(const audit::AuditReport& report) {
  std::string out = "the audit does not agree with the proof; nothing is claimed";
  for (const audit::Finding& finding : report.findings) {
    if (!finding.agrees) out += fmt::format("\n  {}: {}", finding.check, finding.detail);
  }
  if (report.findings.empty()) out += "\n  no check was made";
  return out;
}

constexpr std::string_view kSizeLimit = "size limit reached: ";

// Reasons of work that stopped are of two kinds, time and sizes.
[[nodiscard]] std::string size_limit_text(std::string_view reason) {
  if (!reason.starts_with(kSizeLimit)) return std::string(reason);
  return fmt::format("an intermediate result is larger than Sumwright works with ({})",
                     reason.substr(kSizeLimit.size()));
}

[[nodiscard]] std::string what_helps(std::string_view reason) {
  if (!reason.starts_with(kSizeLimit)) return "a larger --time-limit";
  return "a recurrence and a certificate of your own under [evidence], a smaller --max-order, or "
         "fewer parameters; more time or memory changes nothing";
}

class Decider {
 public:
  Decider(const std::shared_ptr<const claim::Claim>& claim, const Options& options,
          const Watch& watch, Progress& progress)
      : claim_(claim), options_(options), watch_(watch), progress_(progress) {}

  Decision run() {
    build();
    if (out_.proof.verdict == proof::Verdict::established) audit();
    if (out_.proof.verdict == proof::Verdict::undecided && !claim_->is_question()) look_for_point();
    if (out_.proof.verdict == proof::Verdict::refuted) out_.proof.would_settle.clear();
    // Statements that are not proved are the author's, not what the work made of them.
    if (out_.proof.verdict != proof::Verdict::established) out_.proof.claim = claim_;
    complete_symbols(out_.proof);
    return std::move(out_);
  }

 private:
  void build() {
    proof::BuildOptions options;
    options.max_order = options_.max_order;
    options.deadline = watch_.deadline();
    options.progress = [this](const std::string& stage) { progress_.show(stage); };
    const Stopwatch time;
    out_.proof = proof::build(claim_, options);
    out_.seconds.emplace_back("proof", time.seconds());
  }

  [[nodiscard]] audit::AuditOptions audit_options() const {
    audit::AuditOptions options;
    options.original = claim_.get();
    options.check_time = [this] { watch_.deadline().check(); };
    return options;
  }

  void audit() {
    progress_.show("audit");
    const Stopwatch time;
    out_.audit = audit::audit(out_.proof, audit_options());
    out_.seconds.emplace_back("audit", time.seconds());
    if (!out_.audit->agrees()) throw Fault(disagreement(*out_.audit));
  }

  // The audit's own evaluation may meet a point that the proof's samples left out.
  void look_for_point() {
    progress_.show("values");
    const Stopwatch time;
    const std::string point = audit::find_counterexample(*claim_, audit_options());
    out_.seconds.emplace_back("values", time.seconds());
    if (point.empty()) return;
    out_.proof.verdict = proof::Verdict::refuted;
    out_.proof.subject = proof::Subject::claim;
    out_.proof.reason = "the two sides of the claim differ at " + point;
    out_.proof.would_settle.clear();
  }

  const std::shared_ptr<const claim::Claim>& claim_;
  const Options& options_;
  const Watch& watch_;
  Progress& progress_;
  Decision out_;
};

}  // namespace

Status Decision::status() const {
  switch (proof.verdict) {
    case proof::Verdict::established:
      return Status::established;
    case proof::Verdict::refuted:
      return Status::refuted;
    case proof::Verdict::undecided:
      break;
  }
  return Status::undecided;
}

std::shared_ptr<const claim::Claim> read_claim(const std::filesystem::path& path) {
  if (is_obligations_file(path)) {
    const std::string shown = claim::printable(path.string());
    throw Unusable(fmt::format(
        "{}: this is an obligation file, not a claim file; `sumwright check` verifies it, and the "
        "claim file that it is about stands in its section `claim`, each line behind a bar",
        shown));
  }
  claim::ReadClaim read = claim::read_claim_file(path);
  for (const std::string& warning : read.warnings) say(warning + "\n");
  return std::make_shared<const claim::Claim>(std::move(read.claim));
}

Decision decide(const std::shared_ptr<const claim::Claim>& claim, const Options& options,
                const Watch& watch, Progress& progress) {
  const auto undecided = [&](const std::string& reason, const std::string& settle) {
    Decision out;
    out.proof = stopped(claim, reason, settle);
    return out;
  };
  try {
    return Decider(claim, options, watch, progress).run();
  } catch (const algebra::TimeUp& reason) {
    if (reason.interrupted) return undecided(reason.what(), "");
    return undecided(size_limit_text(reason.what()), what_helps(reason.what()));
  } catch (const std::bad_alloc&) {
    return undecided("memory limit reached", "a larger --memory-limit");
  } catch (const std::length_error& reason) {
    return undecided(std::string("a value is too large to work with: ") + reason.what(), "");
  }
}

std::shared_ptr<const claim::Claim> as_question(const claim::Claim& claim) {
  auto out = std::make_shared<claim::Claim>(claim);
  out->closed = nullptr;
  out->other_sum.reset();
  out->evidence = claim::Evidence();
  return out;
}

}  // namespace sumwright::cli
