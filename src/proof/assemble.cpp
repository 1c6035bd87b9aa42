// From the working form of a complete argument to the plain Proof, recording every side condition.

#include <fmt/format.h>

#include <map>

#include "claim/expression.hpp"
#include "proof/argument.hpp"

namespace sumwright::proof::building {

using term::Facts;
using term::Setting;

namespace {

struct Place {
  const Facts& facts;
  const std::string& region;
};

class Assembler {
 public:
  Assembler(const Terms& terms, Proof& proof)
      : terms_(terms), setting_(terms.setting), proof_(proof) {}

  void conversions(const term::Conversion* right_side) {
    const std::string region = author_region();
    const Facts pointless = setting_.from(terms_.from);
    const std::string parameters = from_text(terms_.from);
    const Place inside{terms_.region, region};
    const Place outside{pointless, parameters};
    proof_.summand = conversion("summand", terms_.summand, inside);
    proof_.summand.region.nonnegative = plain_facts();
    if (terms_.closed) proof_.closed = conversion("closed", *terms_.closed, outside);
    if (right_side != nullptr) proof_.right_side = conversion("right_side", *right_side, outside);
    for (std::optional<Conversion>* c : {&proof_.closed, &proof_.right_side})
      if (*c)
        (*c)->region.nonnegative = {
            term::plain(term::Affine::symbol(setting_.size(), term::running) - terms_.from)};
  }

  void run(const ArgumentDraft& d, bool as_equality) {
    conversions(d.evidence.right_side ? &*d.evidence.right_side : nullptr);
    proof_.threshold = d.threshold;
    proof_.order = static_cast<unsigned>(d.evidence.coefficients.size()) - 1;
    const Facts facts = setting_.from(d.threshold);
    const std::string beyond = from_text(d.threshold);
    const Place here{facts, beyond};
    if (d.threshold > terms_.from)
      condition(ConditionKind::threshold,
                fmt::format("the argument needs {}; smaller values are checked one by one", beyond),
                from_text(terms_.from), Settled::decided, "evaluation");
    if (terms_.finite) finite_range(*terms_.finite);
    if (d.telescoping) telescoping(d, here);
    if (d.region) ranges(*d.region, here);
    if (d.ends && !as_equality) proof_.ends = balance("ends", *d.ends, here);
    if (d.closed_recurrence)
      proof_.closed_recurrence = balance("closed_recurrence", *d.closed_recurrence, here);
    if (d.leading && as_equality)
      proof_.leading = nonzero(*d.leading, here, ConditionKind::leading_coefficient);
    for (const term::Product& b : d.boundary) proof_.boundary.push_back(term::plain(b));
    for (const InitialDraft& value : d.initial) proof_.initial.push_back(initial(value));
  }

 private:
  [[nodiscard]] std::string from_text(long n) const {
    return fmt::format("{} >= {}", setting_.symbols[term::running].name, n);
  }

  [[nodiscard]] std::string author_region() const {
    std::string out = from_text(terms_.from);
    for (const claim::Range& r : setting_.claim->sum.over) {
      if (!r.low.value && !r.high.value) continue;
      const std::string low = r.low.value ? claim::to_text(*r.low.value) + " <= " : "";
      const std::string high = r.high.value ? " <= " + claim::to_text(*r.high.value) : "";
      out += ", " + low + r.index + high;
    }
    return out;
  }

  [[nodiscard]] std::vector<Affine> plain_facts() const {
    std::vector<Affine> out;
    for (std::size_t i = setting_.hypotheses.all().size(); i < terms_.region.all().size(); ++i)
      out.push_back(term::plain(terms_.region.all()[i]));
    return out;
  }

  std::string condition(ConditionKind kind, const std::string& text, const std::string& region,
                        Settled settled, const std::string& method) {
    const std::string key = fmt::format("{}|{}|{}", static_cast<int>(kind), text, region);
    const auto known = ids_.find(key);
    if (known != ids_.end()) return known->second;
    std::string id = fmt::format("c{}", proof_.conditions.size() + 1);
    ids_[key] = id;
    proof_.conditions.push_back({id, kind, text, region, settled, method});
    return id;
  }

  static std::string method_text(const Nonzero& why) {
    bool linear = true;
    bool given = false;
    for (const NonzeroFactor& f : why.factors) {
      linear = linear && (f.method == NonzeroFactor::Method::linear ||
                          f.method == NonzeroFactor::Method::constant);
      given = given || f.method == NonzeroFactor::Method::excluded ||
              f.method == NonzeroFactor::Method::assumed;
    }
    if (given) return "hypothesis of the claim";
    return linear ? "linear arithmetic" : "coefficients of one sign after a shift";
  }

  Nonzero nonzero(const algebra::Factored& value, const Place& place, ConditionKind kind) {
    std::optional<Nonzero> why = term::decide_nonzero(setting_, place.facts, value);
    Nonzero out = why ? *why : Nonzero{term::plain(value), {}, {}};
    if (value.factors.empty()) return out;  // a nonzero constant needs no condition
    const bool given = why && method_text(*why) == "hypothesis of the claim";
    out.condition = condition(kind, value.to_string() + " != 0", place.region,
                              !why ? Settled::open : (given ? Settled::given : Settled::decided),
                              why ? method_text(*why) : "");
    return out;
  }

  std::string nonnegative(const term::Affine& form, const Place& place, ConditionKind kind) {
    const bool holds = place.facts.implies(form);
    return condition(kind, term::text(setting_, form) + " >= 0", place.region,
                     holds ? Settled::decided : Settled::open, holds ? "linear arithmetic" : "");
  }

  /// The argument of the reciprocal factorial is negative, wherever the factor is not 0.
  std::string zero_condition(const TermDraft& t, const Place& place) {
    const term::Affine negative = -t.zero_atom->argument - 1;
    if (!t.zero_factor) return nonnegative(negative, place, ConditionKind::support);
    return condition(ConditionKind::support,
                     fmt::format("{} >= 0 unless {} = 0", term::text(setting_, negative),
                                 term::text(setting_, *t.zero_factor)),
                     place.region, Settled::decided, "linear arithmetic");
  }

  std::string requirement(const term::Requirement& r, const Place& place) {
    if (r.nonnegative) return nonnegative(*r.nonnegative, place, r.kind);
    return nonzero(*r.nonzero, place, r.kind).condition;
  }

  Unit unit(const term::Unit& u, const Place& place) {
    Unit out{term::plain(u.left), term::plain(u.right), u.exponent, "", std::nullopt};
    if (u.requirement.nonzero) {
      out.nonzero = nonzero(*u.requirement.nonzero, place, u.requirement.kind);
      out.condition = out.nonzero->condition;
    } else {
      out.condition = nonnegative(*u.requirement.nonnegative, place, u.requirement.kind);
    }
    return out;
  }

  Conversion conversion(const std::string& id, const term::Conversion& c, const Place& place) {
    Conversion out;
    out.id = id;
    out.expression = c.expression;
    out.region.text = place.region;
    for (const term::Leaf& leaf : c.leaves) {
      Leaf plain{leaf.expression, leaf.rule, term::plain(leaf.value), {}, {}};
      for (const term::Requirement& r : leaf.requirements) {
        plain.conditions.push_back(requirement(r, place));
        if (r.nonzero) plain.nonzero.push_back(nonzero(*r.nonzero, place, r.kind));
      }
      out.leaves.push_back(std::move(plain));
    }
    for (const term::Denominator& d : c.denominators) {
      Denominator plain{
          d.node, d.expression, term::plain(d.as_product), term::plain(d.reciprocal), {}, {}};
      for (const term::Unit& u : d.units) {
        plain.units.push_back(unit(u, place));
        if (!plain.units.back().condition.empty())
          plain.conditions.push_back(plain.units.back().condition);
      }
      out.denominators.push_back(std::move(plain));
    }
    for (const term::PowerMerge& m : c.merges) {
      PowerMerge plain{term::plain(m.base), term::plain(m.first), term::plain(m.second), {}, {}};
      for (const term::Requirement& r : m.requirements) {
        plain.conditions.push_back(requirement(r, place));
        if (r.nonzero) plain.nonzero = nonzero(*r.nonzero, place, r.kind);
      }
      out.merges.push_back(std::move(plain));
    }
    for (const term::Product& p : c.products) out.products.push_back(term::plain(p));
    for (const auto& units : c.cancelled) {
      std::vector<Unit> list;
      for (const term::Unit& u : units) list.push_back(unit(u, place));
      out.units.push_back(std::move(list));
    }
    for (const term::Requirement& r : c.definedness) {
      const std::string made = requirement(r, place);
      if (!made.empty()) out.definedness.push_back(made);
    }
    return out;
  }

  Unit unit(const UnitDraft& u, const Place& place) {
    Unit out{term::plain(u.left), term::plain(u.right), u.exponent, "", std::nullopt};
    if (u.need.nonzero) {
      out.nonzero = nonzero(*u.need.nonzero, place, u.need.kind);
      out.condition = out.nonzero->condition;
    } else {
      out.condition = nonnegative(*u.need.nonnegative, place, u.need.kind);
    }
    return out;
  }

  Instance instance(const std::string& id, const Bringing& b, const Place& place) {
    Instance out;
    out.id = id;
    out.region.text = place.region;
    out.left = term::plain(b.product);
    out.right = term::plain(b.right);
    for (const UnitDraft& u : b.left_units) out.left_units.push_back(unit(u, place));
    for (const UnitDraft& u : b.right_units) out.right_units.push_back(unit(u, place));
    for (const Step& s : b.steps) out.steps.push_back(step(s, place));
    if (b.cancelled) out.cancelled = nonzero(*b.cancelled, place, ConditionKind::nonvanishing);
    return out;
  }

  AtomStep step(const Step& s, const Place& place) {
    AtomStep out;
    out.side = s.side;
    out.from = term::plain(s.from);
    out.to = s.to ? term::plain(*s.to) : out.from;
    out.literal = !s.to.has_value();
    out.steps = s.steps;
    out.multiplicity = s.multiplicity;
    out.factor = term::plain(s.factor);
    for (const term::Atom& one : s.reciprocals) out.reciprocals.push_back(term::plain(one));
    for (const Need& need : s.needs) {
      const bool by_base = need.or_nonzero && !place.facts.implies(*need.nonnegative);
      if (need.nonnegative && !by_base)
        out.conditions.push_back(nonnegative(*need.nonnegative, place, need.kind));
      if (need.nonzero || by_base) {
        out.nonzero = nonzero(by_base ? *need.or_nonzero : *need.nonzero, place,
                              by_base ? ConditionKind::nonvanishing : need.kind);
        if (!out.nonzero->condition.empty()) out.conditions.push_back(out.nonzero->condition);
      }
    }
    return out;
  }

  /// left = polynomial * base, as an instance whose right side carries the polynomial.
  Instance similar(const std::string& id, const Bringing& b, const Place& place) {
    Bringing with = b;
    with.right = b.base;
    with.right.coefficient = b.polynomial;
    return instance(id, with, place);
  }

  Balance balance(const std::string& id, const BalanceDraft& draft, const Place& place) {
    Balance out;
    out.id = id;
    out.region.text = place.region;
    for (std::size_t i = 0; i < draft.terms.size(); ++i) {
      const TermDraft& t = draft.terms[i];
      BalanceTerm made;
      made.origin = t.origin;
      made.text = t.text;
      made.shift = t.shift;
      made.offset = t.offset;
      made.at_upper = t.at_upper;
      made.piece = t.piece;
      made.point = t.point ? term::plain(*t.point) : Affine{};
      made.product = term::plain(t.product);
      made.group = t.group;
      if (t.zero_coefficient) made.zero = "polynomial factor";
      if (t.zero_atom) {
        made.zero_atom = term::plain(*t.zero_atom);
        made.zero = zero_condition(t, place);
        if (t.zero_factor) made.zero_factor = term::plain(*t.zero_factor);
      }
      if (t.bringing)
        made.instance = similar(fmt::format("{}_term_{}", id, i + 1), *t.bringing, place);
      out.terms.push_back(std::move(made));
    }
    for (std::size_t g = 0; g < draft.groups.size(); ++g) {
      BalanceGroup group;
      group.base.id = fmt::format("E{}", ++bases_);
      group.base.product = term::plain(draft.groups[g].base);
      for (std::size_t m : draft.groups[g].members) {
        group.members.push_back(m);
        group.polynomials.push_back(term::plain(draft.terms[m].bringing->polynomial));
      }
      out.groups.push_back(std::move(group));
    }
    return out;
  }

  void telescoping(const ArgumentDraft& d, const Place& beyond) {
    const TelescopingDraft& t = *d.telescoping;
    const Facts facts = d.region->facts(setting_);
    const std::string region =
        fmt::format("{}, {} <= {} <= {}", beyond.region, term::text(setting_, d.region->low),
                    setting_.symbols[term::index].name, term::text(setting_, d.region->high));
    const Place place{facts, region};
    Telescoping out;
    out.base = {"B", term::plain(t.base)};
    for (const algebra::Polynomial& a : t.coefficients)
      out.coefficients.push_back(term::plain(algebra::factor(a)));
    out.weight = nonzero(t.weight, beyond, ConditionKind::nonvanishing);
    out.weight.polynomial = term::plain(t.weight);
    for (std::size_t i = 0; i < t.shifts.size(); ++i) {
      std::vector<Instance> list;
      for (std::size_t j = 0; j < t.shifts[i].size(); ++j)
        list.push_back(similar(fmt::format("term_shift_{}_{}", i, j + 1), t.shifts[i][j], place));
      out.shifts.push_back(std::move(list));
      out.p.push_back(term::plain(t.p[i]));
    }
    out.certificate = term::plain(t.certificate);
    out.down = term::plain(t.index.down);
    out.up = term::plain(t.index.up);
    if (!t.certificate.is_zero())
      out.index_shift = instance("index_shift", t.index.bringing, place);
    out.region.text = region;
    const term::Affine n = term::Affine::symbol(setting_.size(), term::running);
    const term::Affine k = term::Affine::symbol(setting_.size(), term::index);
    for (const term::Affine& form : {n - d.threshold, k - d.region->low, d.region->high - k})
      out.region.nonnegative.push_back(term::plain(form));
    out.low = term::plain(d.region->low);
    out.high = term::plain(d.region->high);
    out.conditions.push_back(
        nonnegative(d.region->high - d.region->low, beyond, ConditionKind::range));
    normal_form(t, out);
    proof_.telescoping = std::move(out);
  }

  static void normal_form(const TelescopingDraft& t, Telescoping& out) {
    const algebra::Polynomial& numerator = t.left.numerator();
    const algebra::Polynomial primitive = numerator.primitive_part();
    out.normal_form = term::plain(primitive);
    if (primitive.is_zero()) return;
    const mpz_class content = numerator.leading_coefficient() / primitive.leading_coefficient();
    out.normal_scale = mpq_class(content, t.left.denominator().constant());
    out.normal_scale.canonicalize();
  }

  Vanishing vanishing(const VanishingDraft& draft, const std::string& text, const Place& place) {
    Vanishing out;
    for (const term::Atom& atom : draft) out.atoms.push_back(term::plain(atom));
    out.condition = condition(ConditionKind::support, text, place.region, Settled::decided,
                              "linear arithmetic");
    return out;
  }

  void finite_range(const FiniteEnds& ends) {
    const std::string region = from_text(terms_.from);
    const Facts facts = setting_.from(terms_.from);
    const Place place{facts, region};
    const std::string f = fmt::format("F({}, {})", setting_.symbols[term::running].name,
                                      setting_.symbols[term::index].name);
    FiniteRange out{ends.range, std::nullopt, std::nullopt};
    if (ends.below)
      out.below =
          vanishing(*ends.below, f + " = 0 below " + claim::to_text(*ends.range.low.value), place);
    if (ends.above)
      out.above =
          vanishing(*ends.above, f + " = 0 above " + claim::to_text(*ends.range.high.value), place);
    proof_.finite_range = std::move(out);
  }

  void ranges(const RegionDraft& region, const Place& place) {
    const std::string& n = setting_.symbols[term::running].name;
    const std::string& k = setting_.symbols[term::index].name;
    for (const RangeDraft& r : region.ranges) {
      RangeStep step;
      step.shift = r.shift;
      step.low_points = r.low_points;
      step.high_points = r.high_points;
      const std::string f = r.shift == 0 ? fmt::format("F({}, {})", n, k)
                                         : fmt::format("F({} + {}, {})", n, r.shift, k);
      if (r.below) step.below = vanishing(*r.below, f + " = 0 between the two lower ends", place);
      if (r.above) step.above = vanishing(*r.above, f + " = 0 between the two upper ends", place);
      if (r.low_points + r.high_points > 0)
        condition(ConditionKind::explicit_point,
                  fmt::format("{} has {} point(s) outside the common range, kept explicitly", f,
                              r.low_points + r.high_points),
                  place.region, Settled::decided, "balance of similar terms");
      proof_.ranges.push_back(std::move(step));
    }
  }

  InitialValue initial(const InitialDraft& draft) {
    InitialValue out;
    out.at = draft.at;
    const std::string region =
        fmt::format("{} = {}", setting_.symbols[term::running].name, draft.at);
    const Place place{setting_.hypotheses, region};
    for (const LiteralSumDraft& s : draft.sums) {
      LiteralSum sum;
      sum.at = s.at;
      sum.low = s.low;
      sum.high = s.high;
      if (s.base) sum.base = term::plain(*s.base);
      const std::string f = fmt::format("F({}, {})", s.at, setting_.symbols[term::index].name);
      if (s.below) sum.below = vanishing(*s.below, f + " = 0 below the literal range", place);
      if (s.above) sum.above = vanishing(*s.above, f + " = 0 above the literal range", place);
      out.sums.push_back(std::move(sum));
    }
    out.balance = balance(fmt::format("initial_{}", draft.at), draft.balance, place);
    out.value = number(draft.balance);
    condition(ConditionKind::initial_value, fmt::format("both sides agree at {}", region), region,
              Settled::decided, "evaluation");
    return out;
  }

  /// The right side's value when it is a number: minus the terms of the right side.
  static std::optional<mpq_class> number(const BalanceDraft& draft) {
    mpq_class total = 0;
    for (const TermDraft& t : draft.terms) {
      if (t.origin == BalanceTerm::Origin::value || t.zero_coefficient || t.zero_atom) continue;
      const term::Product& base = draft.groups[t.group].base;
      if (!base.atoms.empty() || !t.bringing->polynomial.factors.empty()) return std::nullopt;
      total -= t.bringing->polynomial.constant;
    }
    return total;
  }

  const Terms& terms_;
  const Setting& setting_;
  Proof& proof_;
  std::map<std::string, std::string> ids_;
  int bases_ = 0;
};

}  // namespace

void assemble(const Terms& terms, const ArgumentDraft& draft, bool as_equality, Proof& proof) {
  Assembler(terms, proof).run(draft, as_equality);
}

void assemble_conversion(const Terms& terms, Proof& proof) {
  Assembler(terms, proof).conversions(nullptr);
}

}  // namespace sumwright::proof::building
