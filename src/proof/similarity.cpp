// Base terms and the instances that rest on them (design, section 2).
// From a class of similar products to their base, and from a product and a base to the polynomial
// between them, law by law. Invariant: every polynomial returned equals the quotient as a rational
// function, computed a second time through Gamma quotients; a mismatch is a fault of Sumwright.

#include "proof/similarity.hpp"

#include <algorithm>
#include <map>
#include <stdexcept>

#include "proof/alignment.hpp"
#include "proof/atom_keys.hpp"

namespace sumwright::proof::building {

using term::AtomKind;

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;
using term::Affine;
using term::Atom;
using term::Product;

namespace {

Need at_least_zero(const Affine& form, ConditionKind kind = ConditionKind::factorial_argument) {
  return {kind, form, std::nullopt};
}

Need not_zero(const Factored& polynomial, ConditionKind kind = ConditionKind::nonvanishing) {
  return {kind, std::nullopt, polynomial};
}

Factored single(const Polynomial& p, long exponent = 1) {
  Factored out;
  out.multiply(p, exponent);
  return out;
}

Step step_from(const Atom& atom) {
  return Step{AtomStep::Side::left, atom, std::nullopt, 0, 1, {}, {}};
}

class Bringer {
 public:
  Bringer(const RingPtr& ring, const Product& product, const Product& base, std::string& why)
      : ring_(ring), why_(why) {
    out_.product = product;
    out_.base = base;
    out_.right = base;
  }

  std::optional<Bringing> run() {
    AtomGroups left(ring_, out_.product);
    AtomGroups right(ring_, out_.base);
    literals(left);
    expansions(left);
    if (!factorials(left, right) || !powers(left, right) || !intervals(left, right) ||
        !reciprocals(left, right))
      return std::nullopt;
    return finish();
  }

 private:
  bool fail(const std::string& why) {
    why_ = why;
    return false;
  }

  void literals(AtomGroups& groups) {
    for (const auto& [atom, exponent] : groups.literals) {
      Step step = step_from(atom);
      step.multiplicity = exponent;
      step.factor = literal_value(ring_, atom);
      out_.steps.push_back(step);
    }
  }

  /// Reciprocal interval products of literal length become reciprocals of their factors.
  void expansions(const AtomGroups& groups) {
    for (const auto& [atom, exponent] : groups.expanded) {
      const Expanded value = expanded_reciprocal(atom);
      Step step = step_from(atom);
      step.multiplicity = exponent;
      step.factor.constant = value.constant;
      step.reciprocals = value.reciprocals;
      Factored denominator;
      for (const Atom& one : value.reciprocals) denominator.multiply(one.base, 1);
      if (!denominator.factors.empty())
        step.needs.push_back(not_zero(denominator, ConditionKind::definedness));
      out_.steps.push_back(step);
    }
  }

  bool factorials(const AtomGroups& left, const AtomGroups& right) {
    for (const std::vector<long>& key : merged_keys(left.factorials, right.factorials)) {
      const Affine linear{key, 0};
      const std::optional<Alignment> aligned = align(left.constants(key), right.constants(key));
      if (!aligned)
        return fail("factorials of " + linear.polynomial(ring_).to_string() +
                    " are not brought together by the laws of factorials");
      for (const auto& [fact, rfact] : aligned->cancelled) cancel_pair(linear, fact, rfact);
      for (long c : aligned->inserted) unit_pair(linear + c, out_.left_units);
      // Order: a rewritten atom must never be the source of a later step.
      for (const auto& [from, to] : aligned->fact) factorial_step(linear, from, to);
      for (auto it = aligned->rfact.rbegin(); it != aligned->rfact.rend(); ++it)
        reciprocal_step(linear, it->first, it->second);
    }
    return true;
  }

  void unit_pair(const Affine& at, std::vector<UnitDraft>& units) {
    for (UnitDraft& unit : units)
      if (unit.left.kind == AtomKind::factorial && unit.left.argument == at) {
        ++unit.exponent;
        return;
      }
    units.push_back({term::factorial_atom(ring_, at), term::reciprocal_factorial_atom(ring_, at), 1,
                     at_least_zero(at)});
  }

  void cancel_pair(const Affine& linear, long fact, long rfact) {
    unit_pair(linear + fact, out_.right_units);
    reciprocal_step(linear, rfact, fact);
  }

  void add(Step step) {
    for (Step& known : out_.steps)
      if (known.side == step.side && known.from == step.from && known.to == step.to) {
        ++known.multiplicity;
        return;
      }
    out_.steps.push_back(std::move(step));
  }

  void factorial_step(const Affine& linear, long from, long to) {
    if (from == to) return;
    Step step = step_from(term::factorial_atom(ring_, linear + from));
    step.to = term::factorial_atom(ring_, linear + to);
    step.steps = static_cast<unsigned>(from - to);
    step.factor = rising_factors(ring_, linear + to, from - to);
    step.needs.push_back(at_least_zero(linear + to));
    add(step);
  }

  void reciprocal_step(const Affine& linear, long from, long to) {
    if (from == to) return;
    Step step = step_from(term::reciprocal_factorial_atom(ring_, linear + from));
    step.to = term::reciprocal_factorial_atom(ring_, linear + to);
    step.steps = static_cast<unsigned>(to - from);
    step.factor = rising_factors(ring_, linear + from, to - from);
    add(step);
  }

  bool powers(const AtomGroups& left, const AtomGroups& right) {
    for (const Polynomial& base : merged_keys(left.powers, right.powers)) {
      const auto l = left.powers.find(base);
      const auto r = right.powers.find(base);
      if (l == left.powers.end() || r == right.powers.end())
        return fail("powers of " + base.to_string() + " occur in one of two similar terms only");
      const Affine gap = l->second - r->second;
      if (!gap.is_constant() || gap.constant < 0)
        return fail("powers of " + base.to_string() + " have different exponents");
      if (gap.constant == 0) continue;
      Step step = step_from(term::power_atom(base, l->second));
      step.to = term::power_atom(base, r->second);
      step.steps = static_cast<unsigned>(gap.constant);
      step.factor = single(base, gap.constant);
      step.needs = power_needs(base, r->second);
      add(step);
    }
    return true;
  }

  bool intervals(const AtomGroups& left, const AtomGroups& right) {
    for (const IntervalKey& key : merged_keys(left.intervals, right.intervals)) {
      const auto l = left.intervals.find(key);
      const auto r = right.intervals.find(key);
      if (l == left.intervals.end() || r == right.intervals.end() ||
          l->second.size() != r->second.size())
        return fail("interval products are not brought together by their laws");
      for (std::size_t i = 0; i < l->second.size(); ++i)
        if (!interval_step(l->second[i], r->second[i])) return false;
    }
    return true;
  }

  bool interval_step(const Atom& from, const Atom& to) {
    if (from == to) return true;
    const bool reciprocal = from.kind == AtomKind::reciprocal_interval_product;
    const Atom& longer = reciprocal ? to : from;
    const Atom& shorter = reciprocal ? from : to;
    const long below = (shorter.low - longer.low).constant;
    const long above = (longer.high - shorter.high).constant;
    if (below < 0 || above < 0) return fail("interval products overlap without containment");
    Step step = step_from(from);
    step.to = to;
    step.steps = static_cast<unsigned>(below + above);
    step.factor = interval_factors(from, longer.low, shorter.low);
    step.factor.multiply(interval_factors(from, shorter.high, longer.high));
    step.needs.push_back(at_least_zero(shorter.high - shorter.low, ConditionKind::range));
    if (reciprocal) step.needs.push_back(not_zero(step.factor));
    add(step);
    return true;
  }

  bool reciprocals(const AtomGroups& left, const AtomGroups& right) {
    for (const Polynomial& p : merged_keys(left.reciprocals, right.reciprocals)) {
      const auto l = left.reciprocals.find(p);
      const auto r = right.reciprocals.find(p);
      const unsigned have = l == left.reciprocals.end() ? 0 : l->second;
      const unsigned want = r == right.reciprocals.end() ? 0 : r->second;
      const Atom atom = term::reciprocal_atom(ring_, p);
      if (have > want) return fail("the denominator " + p.to_string() + " is missing in the base");
      if (want > have)
        out_.left_units.push_back(
            {atom, atom, want - have, not_zero(single(p), ConditionKind::definedness)});
    }
    return true;
  }

  std::optional<Bringing> finish() {
    Factored p = out_.product.coefficient;
    for (const Step& step : out_.steps) p.multiply(step.factor, step.multiplicity);
    for (const UnitDraft& unit : out_.left_units)
      if (unit.right.kind == AtomKind::reciprocal)
        p.multiply(unit.right.base, static_cast<long>(unit.exponent));
    out_.polynomial = p;
    if (out_.product.is_zero()) return out_;
    std::optional<Factored> quotient = term::ratio(ring_, out_.product, out_.base);
    if (quotient) quotient->multiply(p, -1);
    if (!quotient || quotient->constant != 1 || !quotient->factors.empty())
      throw std::logic_error("an instance of a base term does not agree with its quotient");
    return out_;
  }

  const RingPtr& ring_;
  std::string& why_;
  Bringing out_;
};

}  // namespace

std::vector<Need> power_needs(const Polynomial& base, const Affine& exponent) {
  if (base.is_constant()) return {};
  Need need = at_least_zero(exponent);
  need.or_nonzero = single(base);
  return {need};
}

std::vector<Need> Bringing::needs() const {
  std::vector<Need> out;
  for (const Step& step : steps) out.insert(out.end(), step.needs.begin(), step.needs.end());
  for (const auto* units : {&left_units, &right_units})
    for (const UnitDraft& unit : *units) out.push_back(unit.need);
  if (cancelled) out.push_back(not_zero(*cancelled));
  return out;
}

std::optional<Product> common_base(const RingPtr& ring, const std::vector<Product>& products,
                                   std::string& why) {
  std::vector<AtomGroups> groups;
  for (const Product& p : products) groups.emplace_back(ring, p);
  return base_of(ring, groups, why);
}

std::optional<Bringing> bring(const RingPtr& ring, const Product& product, const Product& base,
                              std::string& why) {
  return Bringer(ring, product, base, why).run();
}

std::vector<std::vector<std::size_t>> similarity_classes(const RingPtr& ring,
                                                         const std::vector<Product>& products) {
  std::vector<std::vector<std::size_t>> classes;
  for (std::size_t i = 0; i < products.size(); ++i) {
    bool placed = false;
    for (auto& members : classes)
      if (term::ratio(ring, products[i], products[members.front()])) {
        members.push_back(i);
        placed = true;
        break;
      }
    if (!placed) classes.push_back({i});
  }
  return classes;
}

}  // namespace sumwright::proof::building
