// Evidence taken from the claim: read as rational functions, checked, and diagnosed when wrong.
// Never trusted: everything read here goes through the same argument as evidence that was found.

#include "proof/evidence.hpp"

#include <fmt/format.h>

#include "term/evaluation.hpp"
#include "term/text.hpp"

namespace sumwright::proof::building {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using term::Product;

namespace {

RationalFunction rational(const Terms& terms, const claim::ExpressionPtr& e, const char* what) {
  const std::optional<RationalFunction> value = term::to_rational_function(terms.setting, *e);
  if (!value)
    throw claim::InputError(*terms.setting.claim->source, e->place,
                            fmt::format("expected a rational function in {}", what));
  return *value;
}

std::string leading_monomials(const Polynomial& residue) {
  const std::vector<algebra::Monomial> all = residue.to_terms();
  const std::size_t shown = std::min<std::size_t>(3, all.size());
  std::vector<algebra::Monomial> first(all.begin(), all.begin() + static_cast<long>(shown));
  std::string out = Polynomial::from_terms(residue.ring(), first).to_string();
  if (shown < all.size()) out += fmt::format(" + ... ({} terms)", all.size());
  return out;
}

/// a/b when neither is 0 and the index cancels: certificates of proportional recurrences.
std::optional<RationalFunction> quotient_free_of_index(const RationalFunction& a,
                                                       const RationalFunction& b) {
  if (a.is_zero() || b.is_zero()) return std::nullopt;
  RationalFunction out = a / b;
  if (out.numerator().depends_on(term::index) || out.denominator().depends_on(term::index))
    return std::nullopt;
  return out;
}

/// Whether the certificate belongs to another recurrence: the text of that recurrence.
std::string recurrence_of_certificate(const Terms& terms, const EvidenceDraft& evidence,
                                      const algebra::Deadline& deadline) {
  search::SearchOptions options;
  options.max_order = static_cast<unsigned>(evidence.coefficients.size());
  options.deadline = deadline;
  const auto found = search::find_telescoper(terms.setting.ring, shift_quotients(terms), options);
  if (!found) return "";
  const auto factor = quotient_free_of_index(*evidence.certificate, found->certificate);
  if (!factor) return "";
  std::string out;
  for (const Polynomial& a : found->coefficients)
    out += (out.empty() ? "[" : ", ") + (RationalFunction(a) * *factor).to_string();
  return out + "]";
}

}  // namespace

search::ShiftQuotients shift_quotients(const Terms& terms) {
  const algebra::RingPtr& ring = terms.setting.ring;
  const std::vector<Product>& f = terms.summand.products;
  RationalFunction total(ring, mpq_class(1));
  for (std::size_t j = 1; j < f.size(); ++j) {
    const std::optional<Factored> quotient = term::ratio(ring, f[j], f[0]);
    if (!quotient)
      throw claim::InputError(
          *terms.setting.claim->source, terms.summand.expression->place,
          "the summand is not a hypergeometric term: it is a sum of terms whose "
          "quotient is not a rational function",
          "as written, their factorials or powers do not match");
    total = total + RationalFunction(ring, *quotient);
  }
  if (total.is_zero())
    throw claim::InputError(*terms.setting.claim->source, terms.summand.expression->place,
                            "the summand is identically zero: its terms cancel");
  search::ShiftQuotients out{term::shift_quotient(ring, f[0], term::running),
                             term::shift_quotient(ring, f[0], term::index)};
  if (f.size() > 1) {
    const Factored t = total.factored();
    out.by_running.multiply(t.shift(term::running, 1));
    out.by_running.multiply(t, -1);
    out.by_index.multiply(t.shift(term::index, 1));
    out.by_index.multiply(t, -1);
  }
  return out;
}

BroughtEvidence read_evidence(const Terms& terms, const claim::Claim& claim) {
  const algebra::RingPtr& ring = terms.setting.ring;
  BroughtEvidence out{{}, false, Polynomial(ring, mpz_class(1))};
  std::vector<RationalFunction> coefficients;
  for (const claim::ExpressionPtr& e : claim.evidence.recurrence) {
    coefficients.push_back(rational(terms, e, "the recurrence"));
    out.cleared = lcm(out.cleared, coefficients.back().denominator());
  }
  mpz_class constant = 1;
  for (const RationalFunction& a : coefficients)
    constant = lcm(constant, a.denominator().content());
  out.cleared = out.cleared.primitive_part() * Polynomial(ring, constant);
  bool zero = true;
  for (const RationalFunction& a : coefficients) {
    const RationalFunction cleared = a * RationalFunction(out.cleared);
    out.draft.coefficients.push_back(cleared.numerator());
    zero = zero && cleared.is_zero();
  }
  if (zero)
    throw claim::InputError(*claim.source, claim.evidence.place,
                            "every coefficient of this recurrence is zero");
  if (claim.evidence.right_side) {
    term::Conversion b =
        term::convert(terms.setting, terms.setting.from(terms.from), claim.evidence.right_side);
    if (!out.cleared.is_one())
      for (Product& p : b.products) p.coefficient.multiply(out.cleared, 1);
    if (!b.products.empty()) out.draft.right_side = std::move(b);
  }
  if (!claim.evidence.certificate.empty() && terms.range) {
    const auto entry = claim.evidence.certificate.find(terms.setting.symbols[term::index].name);
    if (entry != claim.evidence.certificate.end()) {
      out.draft.certificate =
          rational(terms, entry->second, "the certificate") * RationalFunction(out.cleared);
      out.has_certificate = true;
    }
  }
  out.draft.brought = true;
  return out;
}

Counterexample from_difference(const term::Difference& d, const std::string& what) {
  const auto show = [](const term::Value& v) {
    return v.number ? v.number->get_str() : "no value: " + v.why_not;
  };
  return {d.at, show(d.left), show(d.right), what};
}

bool holds_for_closed_form(const Terms& terms, const EvidenceDraft& evidence) {
  const Factored one;
  std::vector<TermDraft> all =
      closed_terms(terms.setting, one, evidence.coefficients, terms.closed->products);
  for (TermDraft& term : all)
    term.product.coefficient.constant = -term.product.coefficient.constant;
  if (evidence.right_side)
    for (TermDraft& term : right_side_terms(terms.setting, one, evidence.right_side->products))
      all.push_back(std::move(term));
  const term::Facts facts = terms.setting.from(terms.from);
  std::string why;
  const std::optional<BalanceDraft> made = balance(terms.setting, facts, std::move(all), why);
  return made && made->holds() && all_hold(terms.setting, facts, made->needs(), &why);
}

claim::Claim as_recurrence_claim(const claim::Claim& claim) {
  claim::Claim out = claim;
  out.closed = nullptr;
  out.other_sum.reset();
  return out;
}

namespace {

/// How a wrong certificate of a right recurrence is related to the right one; `cleared` times what
/// the author wrote is what both stand for here.
std::string known_certificate(const RationalFunction& right, const RationalFunction& brought,
                              const Polynomial& cleared) {
  const std::string text = term::claim_text((right / RationalFunction(cleared)).factored());
  const auto factor = quotient_free_of_index(brought, right);
  if (!factor) return "; a certificate for it is " + text;
  return fmt::format(
      "; the certificate belongs to this recurrence multiplied by {}; the one for the recurrence "
      "as it stands is {}",
      term::claim_text(factor->factored()), text);
}

}  // namespace

void diagnose_identity(const Terms& terms, const claim::Claim& claim,
                       const BroughtEvidence& brought, const Polynomial& residue,
                       const algebra::Deadline& deadline, Proof& proof) {
  const EvidenceDraft& evidence = brought.draft;
  proof.verdict = Verdict::refuted;
  proof.subject = Subject::evidence;
  proof.residue = leading_monomials(residue);
  const claim::ExpressionPtr& written = claim.evidence.certificate.begin()->second;
  if (const auto point =
          term::refute_certificate(claim, claim.evidence.recurrence, *written, deadline))
    proof.counterexample = from_difference(*point, "the telescoping identity");
  const auto recurrence_point = term::refute(as_recurrence_claim(claim), 12, 3, {}, deadline);
  if (!recurrence_point) {
    const auto other = search::find_certificate(terms.setting.ring, shift_quotients(terms),
                                                evidence.coefficients, deadline);
    proof.reason =
        "the certificate is wrong: it does not prove this recurrence, which holds at every "
        "value tried";
    if (other) proof.reason += known_certificate(*other, *evidence.certificate, brought.cleared);
  } else {
    const std::string belongs = recurrence_of_certificate(terms, evidence, deadline);
    const std::string where = fmt::format("{} = {}", recurrence_point->at.front().first,
                                          recurrence_point->at.front().second.get_str());
    proof.reason = belongs.empty()
                       ? fmt::format(
                             "the recurrence is wrong (it fails at {}), and the certificate "
                             "does not prove it",
                             where)
                       : fmt::format(
                             "the recurrence is wrong (it fails at {}); the certificate "
                             "belongs to the recurrence {}",
                             where, belongs);
  }
}

}  // namespace sumwright::proof::building
