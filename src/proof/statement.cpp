// From the claim to its terms, and from a recurrence to the statement that the theorem makes of it.
// Invariant: what a theorem states about a found or cleared recurrence is parsed from the printed
// text.

#include "proof/statement.hpp"

#include <fmt/format.h>

#include "claim/reader.hpp"
#include "term/text.hpp"

namespace sumwright::proof::building {

using Poly = algebra::Polynomial;

namespace {

void undecided(Proof& proof, const std::string& reason, const std::string& settle) {
  proof.verdict = Verdict::undecided;
  proof.reason = reason;
  proof.would_settle = settle;
}

bool is_finite(const claim::Bound& bound) { return bound.kind == claim::Bound::Kind::finite; }

/// The finite ends of the author's range, added to the region where they are a conjunction.
bool add_finite_ends(const term::Setting& setting, term::Facts& region, Proof& proof) {
  const claim::Range& r = setting.claim->sum.over[0];
  for (const claim::Bound* bound : {&r.low, &r.high}) {
    if (!is_finite(*bound)) continue;
    const std::optional<term::End> end = term::make_end(setting, *bound, bound == &r.high);
    if (!end) {
      undecided(proof, "an end of the range nests floor in a way that is not linear",
                "a rule for nested floors in an end, at " + place_text(*setting.claim, r.place));
      return false;
    }
    if (end->inside.size() == 1)
      for (const term::Affine& form : end->inside[0]) region.add(form);
  }
  return true;
}

/// The author's range, or the one that its infinite ends are replaced by.
bool settle_range(Terms& terms, Proof& proof) {
  const term::Setting& setting = terms.setting;
  const claim::Range* r = &setting.claim->sum.over[0];
  if (!is_finite(r->low) || !is_finite(r->high)) {
    std::string why;
    terms.finite = finite_ends(setting, terms.region, *r, terms.summand.products, why);
    if (!terms.finite) {
      undecided(proof, why,
                "a finite end for the range, at " + place_text(*setting.claim, r->place));
      return false;
    }
    r = &terms.finite->range;
  }
  terms.range =
      AuthorRange{*term::make_end(setting, r->low, false), *term::make_end(setting, r->high, true)};
  return true;
}

/// Where c x + d, x the running variable or the index, is 0 or turns negative.
void add_suspect(const term::Affine& form, std::vector<mpz_class>& out) {
  const long by_running = form.coefficients[term::running];
  const long slope = by_running != 0 ? by_running : form.coefficients[term::index];
  if (slope == 0) return;
  mpz_class root;
  mpz_fdiv_q(root.get_mpz_t(), mpz_class(-form.constant).get_mpz_t(), mpz_class(slope).get_mpz_t());
  for (const int beside : {0, 1}) out.emplace_back(root + beside);
}

/// The values of the running variable at which a condition in it or in the index alone may fail (an
/// index reaches a value where the running variable does, or soon after, in most ranges).
std::vector<mpz_class> suspects_of(const term::Requirement& open) {
  std::vector<mpz_class> out;
  if (open.nonnegative) add_suspect(*open.nonnegative, out);
  if (!open.nonzero) return out;
  for (const auto& [p, e] : open.nonzero->factors) {
    term::Affine form;
    if (term::to_affine(p, form)) add_suspect(form, out);
  }
  return out;
}

bool settled(const Terms& terms, Proof& proof, std::vector<mpz_class>& suspects) {
  const term::Requirement* open = terms.summand.open();
  const char* what = "summand";
  if (open == nullptr && terms.closed) {
    open = terms.closed->open();
    what = "closed form";
  }
  if (open == nullptr) {
    if (!terms.summand.products.empty()) return true;
    undecided(proof, "the summand is identically zero", "nothing to sum");
    return false;
  }
  assemble_conversion(terms, proof);
  suspects = suspects_of(*open);
  const std::string condition = open->nonnegative
                                    ? term::text(terms.setting, *open->nonnegative) + " >= 0"
                                    : open->nonzero->to_string() + " != 0";
  undecided(proof,
            fmt::format("the {} needs {} at {}", what, condition,
                        place_text(*terms.setting.claim, open->place)),
            "a hypothesis of the claim that gives it, or the same factor written another way");
  return false;
}

claim::ExpressionPtr parse(const claim::Claim& claim, const std::string& text) {
  std::vector<std::string> names{claim.running};
  for (const claim::Parameter& p : claim.parameters) names.push_back(p.name);
  const claim::Source source{"recurrence", text};
  return claim::parse_expression(source, {0, text.size()}, names);
}

/// A division or a negative power anywhere.
bool has_division(const claim::Expression& e) {
  if (e.operation == claim::Operation::divide) return true;
  if (e.operation == claim::Operation::power &&
      e.children[1]->operation == claim::Operation::negate)
    return true;
  for (const claim::ExpressionPtr& c : e.children)
    if (has_division(*c)) return true;
  return false;
}

}  // namespace

std::string place_text(const claim::Claim& claim, claim::Place place) {
  const claim::Source::Position p = claim.source->position(place.offset);
  return fmt::format("{}:{}:{}", claim.source->name, p.line, p.column);
}

bool names_symbol(const claim::Expression& e, const std::string& name) {
  if (e.operation == claim::Operation::symbol && e.name == name) return true;
  for (const claim::ExpressionPtr& c : e.children)
    if (names_symbol(*c, name)) return true;
  return false;
}

std::unique_ptr<Terms> convert_terms(const std::shared_ptr<const claim::Claim>& claim, Proof& proof,
                                     std::vector<mpz_class>& suspects) {
  term::Setting setting = term::make_setting(claim);
  proof.symbols = setting.symbols;
  term::Facts region = setting.from(proof.from);
  if (setting.has_index && !add_finite_ends(setting, region, proof)) return nullptr;
  if (region.contradictory()) {
    undecided(proof,
              fmt::format("the range is empty for every {}, so that the sum is 0", claim->running),
              fmt::format("a range with terms in it, at {}",
                          place_text(*claim, claim->sum.over.at(0).place)));
    return nullptr;
  }
  term::Conversion summand = term::convert(setting, region, claim->sum.summand);
  std::optional<term::Conversion> closed;
  if (claim->closed) closed = term::convert(setting, setting.from(proof.from), claim->closed);
  auto out = std::make_unique<Terms>(Terms{std::move(setting), std::nullopt, std::nullopt, region,
                                           proof.from, std::move(summand), std::move(closed)});
  if (!settled(*out, proof, suspects)) return nullptr;
  if (out->setting.has_index && !settle_range(*out, proof)) return nullptr;
  return out;
}

std::shared_ptr<const claim::Claim> with_recurrence(const claim::Claim& claim,
                                                    const std::vector<Poly>& coefficients,
                                                    const std::string& right_side) {
  auto stated = std::make_shared<claim::Claim>(claim);
  stated->evidence.recurrence.clear();
  for (const Poly& a : coefficients)
    stated->evidence.recurrence.push_back(parse(claim, term::claim_text(algebra::factor(a))));
  stated->evidence.right_side = parse(claim, right_side);
  return stated;
}

std::shared_ptr<const claim::Claim> cleared_statement(const Terms& terms, const claim::Claim& claim,
                                                      BroughtEvidence& brought) {
  bool divides = false;
  for (const claim::ExpressionPtr& e : claim.evidence.recurrence)
    divides = divides || has_division(*e);
  if (!divides) return nullptr;
  std::string right = "0";
  if (claim.evidence.right_side)
    right = brought.cleared.is_one() ? claim::to_text(*claim.evidence.right_side)
                                     : fmt::format("({})*({})", brought.cleared.to_string(),
                                                   claim::to_text(*claim.evidence.right_side));
  std::shared_ptr<const claim::Claim> stated =
      with_recurrence(claim, brought.draft.coefficients, right);
  brought.draft.right_side =
      term::convert(terms.setting, terms.setting.from(terms.from), stated->evidence.right_side);
  if (brought.draft.right_side->products.empty()) brought.draft.right_side.reset();
  return stated;
}

}  // namespace sumwright::proof::building
