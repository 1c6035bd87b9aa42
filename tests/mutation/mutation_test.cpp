// True claims with true evidence, changed in one place: none may be established unless it is true.
//
// Every mutant is printed as a claim file and read again. An established one must be shown true by
// exact values (oracle.hpp) and pass the audit; a refuted one must come with a point that shows it.
#include <gtest/gtest.h>

#include <algorithm>
#include <array>
#include <chrono>
#include <cstdlib>
#include <filesystem>
#include <iostream>
#include <map>
#include <random>
#include <set>

#include "audit/audit.hpp"
#include "claim/reader.hpp"
#include "claim_file_text.hpp"
#include "mutants.hpp"
#include "oracle.hpp"
#include "proof/build.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;
using proof::Proof;
using proof::Subject;
using proof::Verdict;

constexpr std::size_t kFewestMutants = 4000;
constexpr std::size_t kFewestClaims = 80;

std::uint64_t seed() {
  static const std::uint64_t value = [] {
    const char* text = std::getenv("SUMWRIGHT_TEST_SEED");
    if (text != nullptr) return static_cast<std::uint64_t>(std::strtoull(text, nullptr, 10));
    return static_cast<std::uint64_t>(std::chrono::system_clock::now().time_since_epoch().count());
  }();
  return value;
}

/// Mutants of this run: never fewer than one, so that nothing passes by running nothing.
std::size_t wanted() {
  const char* text = std::getenv("SUMWRIGHT_TEST_EFFORT");
  const double factor = text == nullptr ? 1.0 : std::strtod(text, nullptr);
  return std::max<std::size_t>(1, static_cast<std::size_t>(factor * kFewestMutants));
}

std::vector<fs::path> true_claims() {
  std::vector<fs::path> out;
  for (const char* folder : {"exemplars", "tests/corpus"})
    for (const auto& entry :
         fs::recursive_directory_iterator(fs::path(SUMWRIGHT_SOURCE_DIR) / folder))
      if (entry.path().extension() == ".toml") out.push_back(entry.path());
  std::sort(out.begin(), out.end());
  return out;
}

std::shared_ptr<const claim::Claim> read(const std::string& text) {
  return std::make_shared<claim::Claim>(claim::read_claim_text("mutant.toml", text).claim);
}

Proof decide(const std::shared_ptr<const claim::Claim>& claim) {
  proof::BuildOptions options;
  options.max_order = 3;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(10000));
  return proof::build(claim, options);
}

claim::ExpressionPtr parse(const claim::Claim& claim, const std::string& text) {
  std::vector<std::string> names{claim.running};
  for (const claim::Range& r : claim.sum.over) names.push_back(r.index);
  for (const claim::Parameter& p : claim.parameters) names.push_back(p.name);
  const claim::Source source{"evidence", text};
  return claim::parse_expression(source, {0, text.size()}, names);
}

/// The claim with the evidence of its proof in the file; a question becomes a claimed recurrence.
claim::Claim with_evidence(const Proof& proof) {
  claim::Claim out = *proof.claim;
  if (out.evidence.recurrence.empty() || proof.question) {
    out.evidence.recurrence.clear();
    for (const std::string& a : proof.recurrence_text)
      out.evidence.recurrence.push_back(parse(out, a));
    out.evidence.right_side =
        proof.right_side_text == "0" ? nullptr : parse(out, proof.right_side_text);
  }
  if (out.evidence.certificate.empty() && !out.sum.over.empty() && !proof.certificate_text.empty())
    out.evidence.certificate[out.sum.over[0].index] = parse(out, proof.certificate_text);
  return out;
}

/// A true claim and the parts that are changed in it.
struct Original {
  std::string name;
  claim::Claim claim;
  std::set<Part> parts;
};

const std::set<Part> kAllParts{Part::recurrence, Part::certificate, Part::right_side,
                               Part::closed,     Part::range,       Part::from};

/// The claim with less beside it: the certificate, or all evidence for an equality, left out.
void add_shorter(const Original& full, std::vector<Original>& out) {
  if (!full.claim.evidence.certificate.empty()) {
    out.push_back(
        {full.name + " without its certificate", full.claim, {Part::recurrence, Part::right_side}});
    out.back().claim.evidence.certificate.clear();
  }
  if (!full.claim.closed) return;
  out.push_back({full.name + " without evidence", full.claim, {Part::closed, Part::range}});
  out.back().claim.evidence = {};
}

/// Claims whose proof, written into the file as evidence, is established again.
std::vector<Original> originals(std::vector<std::string>& without) {
  std::vector<Original> out;
  for (const fs::path& path : true_claims()) {
    const std::string name = fs::relative(path, SUMWRIGHT_SOURCE_DIR).string();
    const auto claim = std::make_shared<claim::Claim>(claim::read_claim_file(path).claim);
    const Proof proof = decide(claim);
    if (proof.verdict != Verdict::established) {
      without.push_back(name + ": " + proof.reason);
      continue;
    }
    const claim::Claim complete = with_evidence(proof);
    const std::string text = claim_file_text(complete, name);
    const Proof again = decide(read(text));
    if (again.verdict == Verdict::established)
      out.push_back({name, complete, kAllParts});
    else
      without.push_back(name + " with its own evidence: " + again.reason);
  }
  return out;
}

/// The mutants of one claim in a random order that takes the parts in turn.
std::vector<Mutant> shuffled(const Original& original, std::mt19937_64& random) {
  std::array<std::vector<Mutant>, kParts> by_part;
  std::size_t total = 0;
  for (Mutant& m : mutants_of(original.claim)) {
    if (!original.parts.contains(m.part)) continue;
    by_part.at(static_cast<std::size_t>(m.part)).push_back(std::move(m));
    ++total;
  }
  for (auto& list : by_part) std::shuffle(list.begin(), list.end(), random);
  std::vector<Mutant> out;
  while (out.size() < total)
    for (auto& list : by_part) {
      if (list.empty()) continue;
      out.push_back(std::move(list.back()));
      list.pop_back();
    }
  std::reverse(out.begin(), out.end());  // taken from the back
  return out;
}

class Judge {
 public:
  explicit Judge(std::mt19937_64& random) : random_(random) {}

  void judge(const Original& original, const Mutant& mutant) {
    ++judged_;
    const std::string name = original.name + ", " + mutant.change;
    const std::string text = claim_file_text(mutant.claim, name);
    std::shared_ptr<const claim::Claim> claim;
    try {
      claim = read(text);
      const Proof proof = decide(claim);
      if (proof.verdict == Verdict::undecided)
        undecided(mutant, proof);
      else if (proof.verdict == Verdict::refuted)
        refuted(mutant, *claim, proof, name, text);
      else
        established(mutant, *claim, proof, name, text);
    } catch (const claim::InputError&) {
      count(mutant, "not a claim");
    } catch (const algebra::TimeUp& limit) {
      count(mutant, "undecided");
      ++reasons_[limit.what()];
    } catch (const std::exception& fault) {
      fail(std::string("a fault: ") + fault.what(), name, text);
    }
  }

  [[nodiscard]] std::size_t judged() const { return judged_; }
  [[nodiscard]] std::size_t refused() const { return refused_; }
  [[nodiscard]] const std::vector<std::string>& true_mutants() const { return true_; }

  void print(std::ostream& out) const {
    out << judged_ << " mutants, " << refused_ << " refused, " << true_.size()
        << " established and true\n";
    for (const auto& [part, outcomes] : table_) {
      out << "  " << part << ":";
      for (const auto& [outcome, times] : outcomes) out << "  " << outcome << " " << times;
      out << "\n";
    }
    out << "undecided because:\n";
    for (const auto& [reason, times] : reasons_) out << "  " << times << "  " << reason << "\n";
    out << "established and true:\n";
    for (const std::string& line : true_) out << "  " << line << "\n";
  }

 private:
  void count(const Mutant& mutant, const std::string& outcome) {
    ++table_[name_of(mutant.part)][outcome];
    if (outcome != "true") ++refused_;
  }

  static void fail(const std::string& why, const std::string& name, const std::string& text) {
    ADD_FAILURE() << why << "\nmutant: " << name << "\nseed: " << seed()
                  << "\n---- as a claim file ----\n"
                  << text << "------------------------";
  }

  void undecided(const Mutant& mutant, const Proof& proof) {
    count(mutant, "undecided");
    ++reasons_[proof.would_settle.empty() ? proof.reason : proof.would_settle];
    if (proof.reason.empty()) ADD_FAILURE() << "undecided without a reason: " << mutant.change;
  }

  void refuted(const Mutant& mutant, const claim::Claim& claim, const Proof& proof,
               const std::string& name, const std::string& text) {
    const bool evidence = proof.subject == Subject::evidence;
    if (proof.reason.empty()) fail("refuted without a reason", name, text);
    if (!proof.counterexample) {
      count(mutant, "refuted (evidence, no point)");
      if (!evidence) fail("the claim is refuted without a point", name, text);
      if (certificate_holds(claim, random_).state != Opinion::State::differs)
        fail("no point is given, and the identity agrees at every value tried", name, text);
      return;
    }
    count(mutant, evidence ? "refuted (evidence)" : "refuted (claim)");
    const std::string wrong = check_counterexample(claim, proof);
    if (!wrong.empty())
      fail("the point does not show '" + proof.reason + "': " + wrong, name, text);
  }

  void established(const Mutant& mutant, const claim::Claim& claim, const Proof& proof,
                   const std::string& name, const std::string& text) {
    count(mutant, "true");
    std::string why = agrees(claim_holds(claim), "the claim", name, text);
    if (!claim.evidence.recurrence.empty())
      why += agrees(recurrence_holds(claim), ", its recurrence", name, text);
    if (!claim.evidence.certificate.empty())
      why += agrees(certificate_holds(claim, random_), ", its certificate", name, text);
    audit::AuditOptions options;
    options.original = &claim;
    for (const audit::Finding& finding : audit::audit(proof, options).findings)
      if (!finding.agrees)
        fail("the audit disagrees: " + finding.check + ": " + finding.detail, name, text);
    if (mutant.before && mutant.after &&
        equal_values(claim, *mutant.before, *mutant.after, random_))
      why = "the changed expression has the same values";
    true_.push_back(name + ": " + why);
  }

  static std::string agrees(const Opinion& opinion, const std::string& what,
                            const std::string& name, const std::string& text) {
    if (opinion.state == Opinion::State::agrees)
      return what + " at " + std::to_string(opinion.cases) + " points";
    fail(
        "established, but " + what +
            (opinion.state == Opinion::State::differs ? " is false at " : " could not be tried: ") +
            opinion.where,
        name, text);
    return {};
  }

  std::mt19937_64& random_;
  std::size_t judged_ = 0;
  std::size_t refused_ = 0;
  std::map<std::string, std::map<std::string, std::size_t>> table_;
  std::map<std::string, std::size_t> reasons_;
  std::vector<std::string> true_;
};

TEST(Mutation, NoFalseMutantIsEstablished) {
  algebra::install_abort_hook();
  std::cout << "SUMWRIGHT_TEST_SEED=" << seed() << "\n";
  std::mt19937_64 random(seed());
  std::vector<std::string> without;
  std::vector<Original> all = originals(without);
  for (const std::string& line : without) std::cout << "not used: " << line << "\n";
  std::cout << all.size() << " true claims with their evidence\n";
  EXPECT_GE(all.size(), kFewestClaims);
  std::vector<Original> shorter;
  for (const Original& original : all) add_shorter(original, shorter);
  all.insert(all.end(), shorter.begin(), shorter.end());

  std::vector<std::vector<Mutant>> queues;
  for (const Original& original : all) queues.push_back(shuffled(original, random));
  Judge judge(random);
  bool more = true;
  while (judge.judged() < wanted() && more) {
    more = false;
    for (std::size_t i = 0; i < all.size() && judge.judged() < wanted(); ++i) {
      if (queues[i].empty()) continue;
      more = true;
      judge.judge(all[i], queues[i].back());
      queues[i].pop_back();
    }
  }
  judge.print(std::cout);
  if (!more) std::cout << "these are all mutants there are\n";
  EXPECT_GE(judge.judged(), std::min(wanted(), kFewestMutants)) << "too few mutants";
  // A generator that makes true claims only would prove nothing.
  if (judge.judged() >= 100) {
    EXPECT_GE(judge.refused() * 2, judge.judged());
  }
}

// The judge itself: it must be able to say no.
TEST(Mutation, TheOracleTellsFalseFromTrue) {
  std::mt19937_64 random(seed());
  const std::string good = R"toml(format  = 1
title   = "t"
running = "n"
from    = 0
[sum]
summand = "binomial(n, k)^2"
over    = [ { index = "k", low = "0", high = "n" } ]
[equals]
closed  = "binomial(2*n, n)"
[evidence]
recurrence  = ["-2*(2*n + 1)", "n + 1"]
certificate = { k = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2" }
)toml";
  const auto changed = [&](const std::string& what, const std::string& by) {
    std::string text = good;
    text.replace(text.find(what), what.size(), by);
    return *read(text);
  };
  const claim::Claim right = *read(good);
  EXPECT_EQ(claim_holds(right).state, Opinion::State::agrees);
  EXPECT_EQ(recurrence_holds(right).state, Opinion::State::agrees);
  EXPECT_EQ(certificate_holds(right, random).state, Opinion::State::agrees);
  EXPECT_GE(certificate_holds(right, random).cases, 10U);
  EXPECT_EQ(claim_holds(changed("(2*n, n)", "(2*n, n + 1)")).state, Opinion::State::differs);
  EXPECT_EQ(recurrence_holds(changed("\"n + 1\"", "\"n + 2\"")).state, Opinion::State::differs);
  EXPECT_EQ(certificate_holds(changed("2*k - 3*n", "2*k - 2*n"), random).state,
            Opinion::State::differs);
}

// What is printed is read back as the same claim.
TEST(Mutation, PrintedClaimsReadBack) {
  std::size_t cases = 0;
  for (const fs::path& path : true_claims()) {
    const claim::Claim claim = claim::read_claim_file(path).claim;
    const std::string text = claim_file_text(claim, "x");
    EXPECT_EQ(claim_file_text(*read(text), "x"), text) << path;
    ++cases;
  }
  EXPECT_GE(cases, kFewestClaims);
}

}  // namespace
}  // namespace sumwright::testing
