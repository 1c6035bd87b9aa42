// Balances: from a list of products to classes of similar ones, each with a base and polynomials
// whose sum must vanish (rule R8).

#include "proof/balancing.hpp"

#include <algorithm>

#include "proof/atom_keys.hpp"

namespace sumwright::proof::building {

using algebra::RationalFunction;
using term::Facts;
using term::Product;
using term::Setting;

namespace {

/// An rfact whose argument is negative on the region, if any.
std::optional<term::Atom> vanishing_atom(const Facts& facts, const Product& product) {
  for (const auto& [atom, e] : product.atoms)
    if (atom.kind == AtomKind::reciprocal_factorial && facts.implies(-atom.argument - 1))
      return atom;
  return std::nullopt;
}

struct ZeroPair {
  term::Affine factor;
  term::Atom atom;
};

/// A factor L of the coefficient, affine in integer symbols, and an rfact that is 0 wherever L is
/// not: m/(-m)! for m >= 0.
std::optional<ZeroPair> vanishing_pair(const Setting& setting, const Facts& facts,
                                       const Product& product) {
  for (const auto& [p, e] : product.coefficient.factors) {
    term::Affine form;
    if (e <= 0 || term::involves_rational_parameter(setting, p) || !term::to_affine(p, form))
      continue;
    const auto unit = [](long c) { return c == 1 || c == -1; };
    if (std::none_of(form.coefficients.begin(), form.coefficients.end(), unit)) continue;
    for (const auto& [atom, count] : product.atoms) {
      if (atom.kind != AtomKind::reciprocal_factorial) continue;
      const term::Affine negative = -atom.argument - 1;
      if (facts.with(form - 1).implies(negative) && facts.with(-form - 1).implies(negative))
        return ZeroPair{form, atom};
    }
  }
  return std::nullopt;
}

bool literal_zero(const algebra::RingPtr& ring, const Product& product) {
  for (const auto& [atom, e] : product.atoms)
    if (atom.kind == AtomKind::interval_product && is_literal(atom) &&
        (atom.high - atom.low).constant >= 0 && literal_value(ring, atom).is_zero())
      return true;
  return false;
}

}  // namespace

bool BalanceDraft::holds() const {
  for (const GroupDraft& group : groups)
    if (!group.total.is_zero()) return false;
  return true;
}

std::vector<Need> BalanceDraft::needs() const {
  std::vector<Need> out;
  for (const TermDraft& term : terms)
    if (term.bringing) {
      const std::vector<Need> more = term.bringing->needs();
      out.insert(out.end(), more.begin(), more.end());
    }
  return out;
}

std::optional<BalanceDraft> balance(const Setting& setting, const Facts& facts,
                                    std::vector<TermDraft> terms, std::string& why) {
  const algebra::RingPtr& ring = setting.ring;
  BalanceDraft out;
  std::vector<Product> live;
  std::vector<std::size_t> position;
  for (std::size_t i = 0; i < terms.size(); ++i) {
    TermDraft& term = terms[i];
    term.zero_coefficient = term.product.is_zero() || literal_zero(ring, term.product);
    if (term.zero_coefficient) continue;
    term.zero_atom = vanishing_atom(facts, term.product);
    if (term.zero_atom) continue;
    if (const std::optional<ZeroPair> pair = vanishing_pair(setting, facts, term.product)) {
      term.zero_atom = pair->atom;
      term.zero_factor = pair->factor;
      continue;
    }
    live.push_back(term.product);
    position.push_back(i);
  }
  for (const std::vector<std::size_t>& members : similarity_classes(ring, live)) {
    std::vector<Product> similar;
    for (std::size_t m : members) similar.push_back(live[m]);
    std::optional<Product> base = common_base(ring, similar, why);
    if (!base) return std::nullopt;
    GroupDraft group{*base, {}, RationalFunction(ring, mpq_class(0))};
    for (std::size_t m : members) {
      TermDraft& term = terms[position[m]];
      term.group = out.groups.size();
      term.bringing = bring(ring, term.product, *base, why);
      if (!term.bringing) return std::nullopt;
      group.total = group.total + RationalFunction(ring, term.bringing->polynomial);
      group.members.push_back(position[m]);
    }
    out.groups.push_back(std::move(group));
  }
  out.terms = std::move(terms);
  return out;
}

}  // namespace sumwright::proof::building
