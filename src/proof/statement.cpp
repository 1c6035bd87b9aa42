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

/// The author's range, added to the region where it is a conjunction.
std::optional<AuthorRange> author_range(const term::Setting& setting, term::Facts& region,
                                        Proof& proof) {
  const claim::Range& r = setting.claim->sum.over[0];
  for (const claim::Bound* b : {&r.low, &r.high})
    if (b->kind != claim::Bound::Kind::finite) {
      undecided(proof, "a range without a finite end needs a proved finite one",
                "a rule for infinite ranges, at " + place_text(*setting.claim, b->place));
      return std::nullopt;
    }
  const std::optional<term::End> low = term::make_end(setting, r.low, false);
  const std::optional<term::End> high = term::make_end(setting, r.high, true);
  if (!low || !high) {
    undecided(proof, "an end of the range nests floor in a way that is not linear",
              "a rule for nested floors in an end, at " + place_text(*setting.claim, r.place));
    return std::nullopt;
  }
  for (const term::End* end : {&*low, &*high})
    if (end->inside.size() == 1)
      for (const term::Affine& form : end->inside[0]) region.add(form);
  return AuthorRange{*low, *high};
}

bool settled(const Terms& terms, Proof& proof) {
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

std::unique_ptr<Terms> convert_terms(const std::shared_ptr<const claim::Claim>& claim,
                                     Proof& proof) {
  term::Setting setting = term::make_setting(claim);
  proof.symbols = setting.symbols;
  std::optional<AuthorRange> range;
  term::Facts region = setting.from(proof.from);
  if (setting.has_index) {
    range = author_range(setting, region, proof);
    if (!range) return nullptr;
  }
  term::Conversion summand = term::convert(setting, region, claim->sum.summand);
  std::optional<term::Conversion> closed;
  if (claim->closed) closed = term::convert(setting, setting.from(proof.from), claim->closed);
  auto out = std::make_unique<Terms>(
      Terms{std::move(setting), range, region, proof.from, std::move(summand), std::move(closed)});
  if (!settled(*out, proof)) return nullptr;
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
