// The ladder: terms, refutation, evidence, argument, Proof.
// Invariant: `established` is set in one place, after a complete attempt; everything else is
// refuted with a point, or undecided with a reason.

#include "proof/build.hpp"

#include <fmt/format.h>

#include <stdexcept>

#include "proof/argument.hpp"
#include "proof/evidence.hpp"
#include "proof/statement.hpp"
#include "term/evaluation.hpp"
#include "term/text.hpp"

namespace sumwright::proof {

using namespace building;
using Poly = algebra::Polynomial;
using algebra::RationalFunction;

namespace {

constexpr long first_values = 12;

class Builder {
 public:
  Builder(std::shared_ptr<const claim::Claim> claim, const BuildOptions& options)
      : claim_(std::move(claim)), evaluated_(claim_), options_(options) {}

  Proof run() {
    proof_.claim = claim_;
    if (!claim_->from.fits_slong_p()) return undecided("`from` is too large", "");
    proof_.from = claim_->from.get_si();
    if (!claim_->is_question() && refuted_by_values({})) return proof_;
    if (claim_->sum.over.size() > 1)
      return undecided("sums over several indices are not decided yet",
                       "a rule for the boundary of a range in two or more indices");
    if (claim_->other_sum)
      return undecided("an equality of two sums needs a common recurrence of both sides",
                       "sum = sum: a common left multiple of the recurrences of both sides");
    if (!make_terms()) return proof_;
    if (terms_->finite && refuted_with_finite_ends()) return proof_;
    for (const claim::Assumption& a : claim_->assumptions)
      if (names_symbol(*a.left, claim_->running) || names_symbol(*a.right, claim_->running))
        return undecided(
            "a condition on the running variable itself, at " + place_text(*claim_, a.place),
            "an induction that stays inside the condition");
    if (claim_->is_question()) return answer_question();
    if (claim_->is_equality()) return prove_equality();
    return prove_recurrence();
  }

 private:
  void stage(const std::string& name) const {
    options_.deadline.check();
    if (options_.progress) options_.progress(name);
  }

  Proof undecided(const std::string& reason, const std::string& settle) {
    proof_.verdict = Verdict::undecided;
    // What the ends would give is not known before the argument is complete.
    if (claim_->is_equality() || claim_->is_question()) proof_.right_side_text.clear();
    proof_.reason = reason;
    proof_.would_settle = settle;
    return proof_;
  }

  /// Values of the claim itself at small n and at the places where the argument met something
  /// special.
  bool refuted_by_values(const std::vector<mpz_class>& also) {
    stage("values");
    const bool equality = claim_->is_equality();
    std::optional<term::Difference> d;
    try {
      d = term::refute(*evaluated_, first_values, 6, also, options_.deadline);
    } catch (const std::length_error&) {
      return false;  // values too large to compute decide nothing
    }
    if (!d) return false;
    proof_.verdict = Verdict::refuted;
    proof_.subject = Subject::claim;
    proof_.counterexample =
        from_difference(*d, equality ? "the claimed equality" : "the claimed recurrence");
    proof_.reason = "the two sides of the claim differ at a point";
    if (!d->left.number || !d->right.number)
      proof_.reason = "a side of the claim has no value at a point";
    return true;
  }

  /// An infinite sum has values once it is known to be a finite one.
  bool refuted_with_finite_ends() {
    auto finite = std::make_shared<claim::Claim>(*claim_);
    finite->sum.over[0] = terms_->finite->range;
    evaluated_ = std::move(finite);
    return !claim_->is_question() && refuted_by_values({});
  }

  bool make_terms() {
    stage("terms");
    std::vector<mpz_class> suspects;
    terms_ = convert_terms(claim_, proof_, suspects);
    if (!terms_ && !suspects.empty() && !claim_->is_question()) {
      std::erase_if(suspects, [&](const mpz_class& n) { return n < claim_->from; });
      refuted_by_values(suspects);
    }
    return terms_ != nullptr;
  }

  // ------------------------------------------------------------ the three kinds of claim

  Proof prove_equality() {
    if (!claim_->evidence.recurrence.empty()) return with_brought_evidence(true);
    return search_and_prove(true);
  }

  Proof prove_recurrence() { return with_brought_evidence(false); }

  Proof with_brought_evidence(bool equality) {
    stage("evidence");
    BroughtEvidence brought = read_evidence(*terms_, *claim_);
    proof_.evidence_brought = true;
    if (brought.draft.right_side)
      if (const term::Requirement* open = brought.draft.right_side->open())
        return undecided("the right side needs a condition at " + place_text(*claim_, open->place),
                         "a hypothesis of the author");
    while (equality && brought.draft.coefficients.size() > 1 &&
           brought.draft.coefficients.back().is_zero())
      brought.draft.coefficients.pop_back();
    if (terms_->range && !brought.has_certificate) {
      stage("certificate");
      brought.draft.certificate =
          search::find_certificate(terms_->setting.ring, shift_quotients(*terms_),
                                   brought.draft.coefficients, options_.deadline);
      if (!brought.draft.certificate) {
        if (equality) return recurrence_settled(brought.draft) ? search_and_prove(true) : proof_;
        return undecided("the claimed recurrence is not a telescoper of the summand",
                         "sum = sum: deducing it from the recurrence that `find` gives");
      }
    }
    if (terms_->range && brought.has_certificate) {
      const search::IdentityCheck check = identity(brought.draft);
      if (!check.holds && !belongs_to_cleared(brought)) {
        diagnose_identity(*terms_, *evaluated_, brought, check.residue, options_.deadline, proof_);
        return proof_;
      }
    }
    if (equality) return equality_from(brought.draft);
    if (const auto stated = cleared_statement(*terms_, *claim_, brought)) proof_.claim = stated;
    const Attempt tried = attempt(*terms_, brought.draft, false, options_.deadline);
    return report(tried, false);
  }

  /// An equality that is proved without the author's recurrence says nothing of it: it must follow
  /// from the closed form. Otherwise the proof says that it fails, or that it is not decided.
  bool recurrence_settled(const EvidenceDraft& brought) {
    const auto point =
        term::refute(as_recurrence_claim(*evaluated_), first_values, 6, {}, options_.deadline);
    if (!point && holds_for_closed_form(*terms_, brought)) return true;
    if (!point) {
      undecided(
          "the recurrence brought as evidence is not shown by the summand or by the closed form",
          "leaving the evidence out: the equality may be decided without it");
      return false;
    }
    proof_.verdict = Verdict::refuted;
    proof_.subject = Subject::evidence;
    proof_.counterexample = from_difference(*point, "the recurrence of the sum");
    proof_.reason = fmt::format("the recurrence is wrong: it fails at {} = {}",
                                point->at.front().first, point->at.front().second.get_str());
    return false;
  }

  /// The author's recurrence is checked as a claim of its own, right side included; then the
  /// equality is proved from it without its common factor, or from a recurrence that is found.
  Proof equality_from(const EvidenceDraft& brought) {
    const Attempt checked = attempt(*terms_, brought, false, options_.deadline);
    if (checked.outcome == Attempt::Outcome::ends_fail ||
        checked.outcome == Attempt::Outcome::initial_fails)
      return ends_fail(checked, true);
    if (checked.outcome != Attempt::Outcome::complete && !recurrence_settled(brought))
      return proof_;
    EvidenceDraft reduced = brought;
    reduced.right_side.reset();
    Poly common(terms_->setting.ring);
    for (const Poly& a : reduced.coefficients) common = gcd(common, a);
    for (Poly& a : reduced.coefficients) a = a.divide(common).first;
    if (reduced.certificate) reduced.certificate = *reduced.certificate / RationalFunction(common);
    const Attempt tried = attempt(*terms_, reduced, true, options_.deadline);
    if (tried.outcome != Attempt::Outcome::stuck) return report(tried, true);
    Proof found = search_and_prove(true);
    if (found.verdict != Verdict::undecided) return found;
    return report(tried, true);
  }

  Proof answer_question() {
    proof_.question = true;
    return search_and_prove(false);
  }

  Proof search_and_prove(bool equality) {
    const search::ShiftQuotients quotients =
        terms_->range ? shift_quotients(*terms_) : pointwise_quotients();
    std::optional<Attempt> first;
    if (!terms_->range) return pointwise(equality);
    for (EvidenceDraft& evidence : candidates(quotients)) {
      const Attempt tried = try_found(evidence, equality);
      if (tried.outcome == Attempt::Outcome::complete) return report(tried, equality);
      if (!first) first = tried;
    }
    if (!first)
      return undecided(fmt::format("no recurrence of order up to {} was found", options_.max_order),
                       "a larger --max-order, or another representation of the sum");
    return report(*first, equality);
  }

  [[nodiscard]] search::ShiftQuotients pointwise_quotients() const {
    return {term::shift_quotient(terms_->setting.ring, terms_->summand.products[0], term::running),
            {}};
  }

  /// Candidates, best first: the telescoper of least order; for summands free of n the difference
  /// S(n+1) - S(n), whose certificate is 0 and whose leading coefficient never vanishes; the next
  /// order.
  std::vector<EvidenceDraft> candidates(const search::ShiftQuotients& quotients) {
    stage("search");
    const algebra::RingPtr& ring = terms_->setting.ring;
    std::vector<EvidenceDraft> out;
    search::SearchOptions options;
    options.max_order = options_.max_order;
    options.deadline = options_.deadline;
    if (options_.progress)
      options.progress = [this](unsigned order) {
        options_.progress(fmt::format("search, order {}", order));
      };
    const auto found = search::find_telescoper(ring, quotients, options);
    if (found) out.push_back({found->coefficients, found->certificate, std::nullopt, false});
    const bool free_of_n =
        quotients.by_running.factors.empty() && quotients.by_running.constant == 1;
    if (free_of_n)
      out.push_back({{Poly(ring, mpz_class(-1)), Poly(ring, mpz_class(1))},
                     RationalFunction(ring, mpq_class(0)),
                     std::nullopt,
                     false});
    return out;
  }

  Attempt try_found(const EvidenceDraft& evidence, bool equality) {
    stage("argument");
    if (equality) return attempt(*terms_, evidence, true, options_.deadline);
    return question_attempt(evidence);
  }

  /// A found recurrence becomes the claim: its right side is what the ends give.
  Attempt question_attempt(const EvidenceDraft& evidence) {
    // A first pass tells the right side; it fails at the ends when that is not 0.
    Attempt probe = attempt(*terms_, evidence, false, options_.deadline);
    if (probe.outcome == Attempt::Outcome::complete && probe.draft.right_side_text == "0") {
      proof_.claim = with_recurrence(*claim_, evidence.coefficients, "0");
      return probe;
    }
    if (probe.outcome == Attempt::Outcome::ends_fail || probe.outcome == Attempt::Outcome::complete)
      return with_right_side(evidence, probe);
    return probe;
  }

  Attempt with_right_side(EvidenceDraft evidence, const Attempt& probe) {
    const algebra::RingPtr& ring = terms_->setting.ring;
    if (probe.draft.telescoping && !probe.draft.telescoping->weight.factors.empty()) {
      // Clear the weight into the coefficients, so that the right side has no denominator to lose.
      const Poly weight = probe.draft.telescoping->weight.numerator(ring);
      for (Poly& a : evidence.coefficients) a *= weight;
      evidence.certificate = *evidence.certificate * RationalFunction(weight);
      Attempt again = attempt(*terms_, evidence, false, options_.deadline);
      if (again.draft.right_side_text == "0") return again;
      return conclude_question(evidence, again.draft.right_side_text);
    }
    return conclude_question(evidence, probe.draft.right_side_text);
  }

  Attempt conclude_question(EvidenceDraft evidence, const std::string& right_side) {
    const auto stated = with_recurrence(*claim_, evidence.coefficients, right_side);
    evidence.right_side = term::convert(terms_->setting, terms_->setting.from(proof_.from),
                                        stated->evidence.right_side);
    if (evidence.right_side->open() != nullptr) {
      Attempt stuck;
      stuck.why = "the right side " + right_side + " has no value on the whole range";
      stuck.rule = "a recurrence from a later n on";
      return stuck;
    }
    proof_.claim = stated;
    return attempt(*terms_, evidence, false, options_.deadline);
  }

  /// Without an index the sum is the summand: order 0, or the order-1 recurrence of a question.
  Proof pointwise(bool equality) {
    const algebra::RingPtr& ring = terms_->setting.ring;
    EvidenceDraft evidence;
    evidence.coefficients = {Poly(ring, mpz_class(1))};
    if (!equality) {
      if (terms_->summand.products.size() != 1)
        return undecided("a question needs one hypergeometric term", "");
      const algebra::Factored q = pointwise_quotients().by_running;
      evidence.coefficients = {-q.numerator(ring), q.denominator(ring)};
      proof_.claim = with_recurrence(*claim_, evidence.coefficients, "0");
    }
    return report(attempt(*terms_, evidence, equality, options_.deadline), equality);
  }

  // ------------------------------------------------------------ verdicts

  Proof report(const Attempt& tried, bool equality) {
    describe_evidence(tried.draft);
    switch (tried.outcome) {
      case Attempt::Outcome::complete:
        assemble(*terms_, tried.draft, equality, proof_);
        return established();
      case Attempt::Outcome::identity_fails:
        diagnose_identity(*terms_, *evaluated_,
                          {tried.draft.evidence, true, Poly(terms_->setting.ring, mpz_class(1))},
                          tried.draft.telescoping->residue, options_.deadline, proof_);
        return proof_;
      case Attempt::Outcome::ends_fail:
        return ends_fail(tried, equality);
      case Attempt::Outcome::closed_fails:
      case Attempt::Outcome::initial_fails:
        return false_somewhere(tried);
      case Attempt::Outcome::stuck:
        break;
    }
    if (!claim_->is_question() && refuted_by_values(special_values(tried))) return proof_;
    assemble_conversion(*terms_, proof_);
    return undecided(tried.why, tried.rule);
  }

  [[nodiscard]] search::IdentityCheck identity(const EvidenceDraft& draft) const {
    return search::verify_identity(terms_->setting.ring, shift_quotients(*terms_),
                                   draft.coefficients, *draft.certificate);
  }

  /// A recurrence with denominators stands for the one with them cleared, and its certificate may
  /// be given for either: taken as the other one, if that is right.
  [[nodiscard]] bool belongs_to_cleared(BroughtEvidence& brought) const {
    if (brought.cleared.is_one()) return false;
    EvidenceDraft other = brought.draft;
    other.certificate = *other.certificate / RationalFunction(brought.cleared);
    if (!identity(other).holds) return false;
    brought.draft = std::move(other);
    return true;
  }

  Proof established() {
    for (const Condition& c : proof_.conditions)
      if (c.settled == Settled::open)
        return undecided(fmt::format("the condition {} ({}) is open", c.id, c.text), "");
    proof_.verdict = Verdict::established;
    return proof_;
  }

  void describe_evidence(const ArgumentDraft& draft) {
    proof_.evidence_brought = draft.evidence.brought;
    proof_.recurrence_text.clear();
    for (const Poly& a : draft.evidence.coefficients)
      proof_.recurrence_text.push_back(term::claim_text(algebra::factor(a)));
    // A claimed right side is printed as the theorem states it, else as the ends give it.
    const claim::ExpressionPtr& stated = proof_.claim->evidence.right_side;
    const bool claimed = !claim_->is_equality() && !claim_->is_question();
    proof_.right_side_text = draft.right_side_text;
    if (!proof_.claim->is_equality() && stated) proof_.right_side_text = claim::to_text(*stated);
    if (claimed && !stated) proof_.right_side_text = "0";
    if (draft.evidence.certificate)
      proof_.certificate_text = draft.evidence.certificate->is_zero()
                                    ? "0"
                                    : term::claim_text(draft.evidence.certificate->factored());
  }

  /// The identity is right, but sum a_i S(n+i) is not b.
  Proof ends_fail(const Attempt& tried, bool equality) {
    const claim::Claim recurrence = as_recurrence_claim(*evaluated_);
    std::vector<mpz_class> also;
    if (tried.outcome == Attempt::Outcome::initial_fails) also.emplace_back(tried.at);
    const auto point = term::refute(recurrence, first_values, 6, also, options_.deadline);
    if (!point)
      return undecided("the ends of the sum do not give the claimed right side",
                       "a rule for terms that are similar but written differently");
    proof_.verdict = Verdict::refuted;
    proof_.subject = equality ? Subject::evidence : Subject::claim;
    proof_.counterexample = from_difference(*point, "the recurrence of the sum");
    proof_.reason =
        tried.outcome == Attempt::Outcome::initial_fails
            ? fmt::format(
                  "the certificate is right as an identity, but the recurrence of the sum fails "
                  "at {} = {}",
                  claim_->running, tried.at)
            : fmt::format(
                  "the certificate is right as an identity, but the right side of the recurrence "
                  "is not; the ends give {}",
                  tried.draft.right_side_text);
    return proof_;
  }

  Proof false_somewhere(const Attempt& tried) {
    std::vector<mpz_class> also;
    for (long n = 0; n < 60; ++n) also.emplace_back(proof_.from + n);
    for (long n = tried.at - 2; n <= tried.at + 2; ++n)
      if (n >= proof_.from) also.emplace_back(n);
    if (refuted_by_values(also)) return proof_;
    return undecided(tried.outcome == Attempt::Outcome::initial_fails
                         ? fmt::format("the values at {} do not agree as written", tried.at)
                         : "the closed form does not satisfy the recurrence as written",
                     "a rule for terms that are similar but written differently");
  }

  [[nodiscard]] std::vector<mpz_class> special_values(const Attempt& tried) const {
    std::vector<mpz_class> out;
    for (long n = 0; n < 40; ++n) out.emplace_back(proof_.from + n);
    if (tried.at >= proof_.from) out.emplace_back(tried.at);
    return out;
  }

  std::shared_ptr<const claim::Claim> claim_;
  std::shared_ptr<const claim::Claim> evaluated_;  ///< with finite ends, for values
  const BuildOptions& options_;
  std::unique_ptr<Terms> terms_;
  Proof proof_;
};

}  // namespace

Proof build(std::shared_ptr<const claim::Claim> claim, const BuildOptions& options) {
  Proof undecided;
  undecided.claim = claim;
  try {
    return Builder(std::move(claim), options).run();
  } catch (const std::overflow_error&) {
    undecided.reason = "an argument has a number that is too large";
    undecided.would_settle = "numbers below 2^63 in arguments, bounds and exponents";
  }
  return undecided;
}

}  // namespace sumwright::proof
