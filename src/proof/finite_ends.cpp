// From a range that reaches to infinity to one with finite ends outside of which the summand, as a
// sum of products, vanishes. Invariant: an end is given only with a reciprocal factorial per
// product whose argument is negative everywhere beyond it.

#include "proof/finite_ends.hpp"

#include <fmt/format.h>

#include <cstdlib>

#include "claim/reader.hpp"

namespace sumwright::proof::building {

using claim::Expression;
using claim::ExpressionPtr;
using claim::Operation;
using term::Affine;

namespace {

ExpressionPtr parse(const term::Setting& setting, const Affine& form) {
  std::vector<std::string> names;
  for (const proof::Symbol& s : setting.symbols) names.push_back(s.name);
  const std::string text = term::text(setting, form);
  const claim::Source source{"end of the support", text};
  return claim::parse_expression(source, {0, text.size()}, names);
}

/// floor(form/divisor).
ExpressionPtr floor_of(const term::Setting& setting, const Affine& form, long divisor) {
  if (divisor == 1) return parse(setting, form);
  if (form.is_constant())
    return parse(setting, Affine::of(setting.size(), term::floor_quotient(form.constant, divisor)));
  Expression literal;
  literal.value = divisor;
  Expression quotient;
  quotient.operation = Operation::divide;
  quotient.children = {parse(setting, form), std::make_shared<Expression>(literal)};
  Expression call;
  call.operation = Operation::call;
  call.name = "floor";
  call.children = {std::make_shared<Expression>(quotient)};
  return std::make_shared<Expression>(call);
}

/// k <= floor(bound/steep), or k >= ceil(bound/steep).
claim::Bound end_of_support(const term::Setting& setting, const SupportEnd& support, bool upper) {
  claim::Bound out;
  out.value =
      floor_of(setting, upper ? support.bound : support.bound + (support.steep - 1), support.steep);
  return out;
}

struct Candidate {
  claim::Bound bound;
  term::End end;
  VanishingDraft reason;
};

/// Every end on one side beyond which all products vanish.
std::vector<Candidate> candidates(const term::Setting& setting, const term::Facts& region,
                                  const std::vector<term::Product>& summand, bool upper) {
  std::vector<Candidate> out;
  for (const SupportEnd& support : support_ends(summand, upper)) {
    const claim::Bound bound = end_of_support(setting, support, upper);
    std::optional<term::End> end = term::make_end(setting, bound, upper);
    if (!end) continue;
    std::optional<VanishingDraft> reason = vanishing(region, end->outside, summand);
    if (reason) out.push_back({bound, std::move(*end), std::move(*reason)});
  }
  return out;
}

/// The author's own end, where it is finite.
std::vector<Candidate> ends(const term::Setting& setting, const term::Facts& region,
                            const std::vector<term::Product>& summand, const claim::Bound& written,
                            bool upper) {
  if (written.kind != claim::Bound::Kind::finite)
    return candidates(setting, region, summand, upper);
  return {{written, *term::make_end(setting, written, upper), {}}};
}

bool never_empty(const term::Facts& region, const Candidate& low, const Candidate& high) {
  return low.end.affine && high.end.affine && region.implies(*high.end.affine - *low.end.affine);
}

}  // namespace

std::optional<FiniteEnds> finite_ends(const term::Setting& setting, const term::Facts& region,
                                      const claim::Range& written,
                                      const std::vector<term::Product>& summand, std::string& why) {
  const std::vector<Candidate> lows = ends(setting, region, summand, written.low, false);
  const std::vector<Candidate> highs = ends(setting, region, summand, written.high, true);
  if (lows.empty() || highs.empty()) {
    why = fmt::format("no finite {} end beyond which every term vanishes",
                      lows.empty() ? "lower" : "upper");
    return std::nullopt;
  }
  const Candidate* low = &lows.front();
  const Candidate* high = &highs.front();
  for (const Candidate& l : lows)
    for (const Candidate& h : highs)
      if (!never_empty(region, *low, *high) && never_empty(region, l, h)) {
        low = &l;
        high = &h;
      }
  FiniteEnds out{written, std::nullopt, std::nullopt};
  const auto take = [](const Candidate& from, claim::Bound& to,
                       std::optional<VanishingDraft>& reason) {
    if (from.reason.empty()) return;
    const claim::Place place = to.place;
    to = from.bound;
    to.place = place;
    reason = from.reason;
  };
  take(*low, out.range.low, out.below);
  take(*high, out.range.high, out.above);
  return out;
}

}  // namespace sumwright::proof::building
