// Tactics for the recurring steps. Each rewriting step names its law and all of its arguments, so
// that a reader sees which factor moves, and a wrong one fails where it stands.

#include "writers/coq_steps.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <stdexcept>

#include "writers/coq_statement.hpp"

namespace sumwright::writers::coq {

using proof::Atom;
using proof::AtomKind;
using proof::AtomStep;
using proof::NonzeroFactor;
using Method = NonzeroFactor::Method;

namespace {

std::string k_text(const std::string& text) { return "(" + text + ")%K"; }

std::string positive_tactic(const NonzeroFactor& f, const Scope& scope) {
  Scope shifted = scope;
  for (std::size_t i = 0; i < f.shift.size(); ++i)
    if (f.shift[i] != 0)
      shifted.integer[i] =
          fmt::format("({} - {})", scope.integer[i], bracketed(std::to_string(f.shift[i])));
  // Constant term first: the form that `positive` takes apart.
  proof::Polynomial reversed = f.shifted;
  std::reverse(reversed.terms.begin(), reversed.terms.end());
  const std::string p = integer_polynomial(reversed, shifted);
  if (f.negated)
    return fmt::format(
        "apply (neq0_by K _ (- ({0}))); [inj_norm; ring | "
        "apply (neq0_neg _ ({0})); [reflexivity | positive]]",
        p);
  return fmt::format("apply (neq0_by K _ ({})); [inj_norm; ring | apply neq0_pos; positive]", p);
}

std::string excluded_tactic(const proof::Proof& proof, const NonzeroFactor& f, const Scope& scope) {
  const claim::Parameter& parameter = proof.claim->parameters[f.parameter - 2];
  const claim::Exclusion& entry = parameter.excluded[f.exclusion];
  const std::string name = exclusion_name(proof, f.parameter, f.exclusion);
  const std::string x = scope.field[f.parameter];
  const std::string scale = fmt::format("(inj {})", bracketed(f.scale.get_str()));
  if (entry.kind == claim::Exclusion::Kind::constant)
    return fmt::format(
        "apply (neq0_scaled K {} {} {}); [apply inj_neq0; lia | exact {} | inj_norm; field]", scale,
        x, k_text(field_text(proof, *entry.written)), name);
  const std::string use = entry.kind == claim::Exclusion::Kind::integers
                              ? fmt::format("apply {}", name)
                              : fmt::format("apply {}; lia", name);
  return fmt::format(
      "apply (neq0_scaled K {} {} (inj ({}))); [apply inj_neq0; lia | {} | inj_norm; ring]", scale,
      x, affine(f.value, scope), use);
}

std::string factor_tactic(const proof::Proof& proof, const NonzeroFactor& f, const Scope& scope) {
  switch (f.method) {
    case Method::constant:
      return "apply inj_neq0; lia";
    case Method::linear:
      return fmt::format("apply (neq0_by K _ ({})); [inj_norm; ring | index]",
                         integer_polynomial(f.factor, scope));
    case Method::positive:
      return positive_tactic(f, scope);
    case Method::excluded:
      return excluded_tactic(proof, f, scope);
    case Method::assumed:
      break;
  }
  const claim::Assumption& a = proof.claim->assumptions[f.assumption];
  if (a.over_integers)
    return fmt::format("apply (neq0_by K _ ({})); [inj_norm; ring | index]",
                       integer_polynomial(f.factor, scope));
  return fmt::format(
      "apply (neq0_eq K _ ((inj 1 / inj {0}) * ({1} - {2}))%K); [inj_norm; field | "
      "apply (neq0_scaled K (inj 1 / inj {0})%K {1}%K {2}%K); "
      "[apply (neq0_by_quotient K _ 1 {0}); [field | lia] | exact {3} | reflexivity]]",
      bracketed(f.scale.get_str()), field_text(proof, *a.left), field_text(proof, *a.right),
      assumption_name(f.assumption));
}

std::string pair_text(const proof::Unit& unit, const Scope& scope) {
  const std::string left = unit.left.kind == AtomKind::reciprocal
                               ? "(" + polynomial(unit.left.base, scope) + ")"
                               : atom(unit.left, scope);
  return fmt::format("{} * {}", left, atom(unit.right, scope));
}

std::string unit_tactic(const proof::Proof& proof, const proof::Unit& unit, const Scope& scope) {
  switch (unit.left.kind) {
    case AtomKind::reciprocal:
      return "apply (unit_inv K); " + nonzero_tactic(proof, *unit.nonzero, scope);
    case AtomKind::factorial:
      return "apply (unit_fact K); index";
    case AtomKind::reciprocal_factorial:
      return "apply (unit_rfact K); index";
    case AtomKind::power:
      return fmt::format("apply (unit_zpow K); [{} | lia]",
                         unit.nonzero && !unit.nonzero->factors.empty()
                             ? nonzero_tactic(proof, *unit.nonzero, scope)
                             : "numeric_neq0");
    case AtomKind::interval_product:
      return "apply (unit_ip K); " + interval_nonzero_tactic(proof, unit.left, scope);
    case AtomKind::reciprocal_interval_product:
      return "apply (unit_rip K); " + interval_nonzero_tactic(proof, unit.left, scope);
  }
  return "";
}

/// The base is not 0, or the exponents are not negative.
std::string power_premise(const proof::Proof& proof, const AtomStep& s, const Scope& scope) {
  if (is_constant(s.from.base)) return "left; numeric_neq0";
  if (s.nonzero) return "left; " + nonzero_tactic(proof, *s.nonzero, scope);
  return "right; lia";
}

/// The law of one step, as a rewrite with all arguments.
std::string step_law(const proof::Proof& proof, const AtomStep& s, const Scope& scope) {
  const std::string p = k_text(factored(s.factor, scope));
  const auto z = [&](const proof::Affine& a) { return bracketed(affine(a, scope)); };
  switch (s.from.kind) {
    case AtomKind::factorial:
      return fmt::format("(fact_to K {} {} {} {}) by first [lia | pq]", s.steps, z(s.to.argument),
                         z(s.from.argument), p);
    case AtomKind::reciprocal_factorial:
      return fmt::format("(rfact_to K {} {} {} {}) by first [lia | pq]", s.steps, z(s.to.argument),
                         z(s.from.argument), p);
    case AtomKind::power:
      return fmt::format("(zpow_to K {} {} {} {} {}) by first [lia | {} | cbn; pq]", s.steps,
                         power_base(s.from.base, scope), z(s.to.argument), z(s.from.argument), p,
                         power_premise(proof, s, scope));
    case AtomKind::interval_product:
    case AtomKind::reciprocal_interval_product:
      break;
    case AtomKind::reciprocal:
      throw std::logic_error("reciprocals move by units");
  }
  const bool plain = s.from.kind == AtomKind::interval_product;
  const Atom& longer = plain ? s.from : s.to;
  const Atom& shorter = plain ? s.to : s.from;
  const long below = shorter.low.constant - longer.low.constant;
  const long above = longer.high.constant - shorter.high.constant;
  const std::string a = interval_base(s.from, scope);
  const std::string law = plain ? "ip_to" : "rip_to";
  std::string premises = "lia | pq | pqf";
  if (!plain) premises = "lia | (" + interval_nonzero_tactic(proof, s.to, scope) + ") | pq | pqf";
  return fmt::format("({} K 0 {} {} {} {} {} {} {} {} {}) by first [{}]", law, below, above, a, a,
                     z(s.to.low), z(s.from.low), z(s.to.high), z(s.from.high), p, premises);
}

/// Where atoms stand while an instance is rewritten: text -> multiplicity, per side.
struct Tracker {
  std::vector<std::string> factors;
  std::map<std::string, unsigned> atoms;

  void load(const proof::Product& p, const Scope& scope) {
    factors.push_back("(" + factored(p.coefficient, scope) + ")");
    for (const auto& [a, e] : p.atoms) atoms[atom(a, scope)] += e;
  }
  [[nodiscard]] unsigned count(const std::string& a) const {
    const auto it = atoms.find(a);
    return it == atoms.end() ? 0 : it->second;
  }
  void move(const std::string& from, const std::string& to, unsigned times) {
    atoms[from] -= times;
    if (atoms[from] == 0) atoms.erase(from);
    atoms[to] += times;
  }
  [[nodiscard]] std::string text() const {
    std::string out = fmt::format("{}", fmt::join(factors, " * "));
    for (const auto& [a, e] : atoms)
      for (unsigned i = 0; i < e; ++i) out += " * " + a;
    return out;
  }
};

class InstanceTactics {
 public:
  InstanceTactics(const proof::Proof& proof, const proof::Instance& instance, const Scope& scope)
      : proof_(proof), instance_(instance), scope_(scope) {
    left_.load(instance.left, scope);
    right_.load(instance.right, scope);
    fraction_ = has_fraction(instance.left.coefficient) || has_fraction(instance.right.coefficient);
  }

  std::string run() {
    units(instance_.left_units, true);
    units(instance_.right_units, false);
    literals();
    for (const AtomStep& s : instance_.steps)
      if (!s.literal) step(s);
    if (instance_.cancelled)
      out_ += fmt::format("  apply (mul_cancel K {}); [{}|].\n",
                          k_text(factored(instance_.cancelled->polynomial, scope_)),
                          nonzero_tactic(proof_, *instance_.cancelled, scope_));
    finish();
    return out_;
  }

 private:
  void units(const std::vector<proof::Unit>& list, bool left) {
    Tracker& side = left ? left_ : right_;
    for (const proof::Unit& unit : list)
      for (unsigned i = 0; i < unit.exponent; ++i) {
        out_ += fmt::format("  apply ({} K {}); [{}|].\n", left ? "left_by" : "right_by",
                            k_text(pair_text(unit, scope_)), unit_tactic(proof_, unit, scope_));
        if (unit.left.kind == AtomKind::reciprocal)
          side.factors.push_back("(" + polynomial(unit.left.base, scope_) + ")");
        else
          ++side.atoms[atom(unit.left, scope_)];
        ++side.atoms[atom(unit.right, scope_)];
      }
  }

  void literals() {
    bool any = false;
    for (const AtomStep& s : instance_.steps) {
      if (!s.literal) continue;
      if (!s.reciprocals.empty()) {
        expansion(s);
        continue;
      }
      // `values` writes 1/m! as the inverse of an integer, 1/1 included.
      fraction_ = fraction_ || has_fraction(s.factor) ||
                  s.from.kind == AtomKind::reciprocal_factorial ||
                  s.from.kind == AtomKind::reciprocal_interval_product ||
                  s.from.kind == AtomKind::reciprocal ||
                  (s.from.kind == AtomKind::power && s.from.argument.constant < 0);
      Tracker& side = s.side == AtomStep::Side::left ? left_ : right_;
      const std::string text = atom(s.from, scope_);
      side.atoms.erase(text);
      side.factors.push_back(fmt::format("({}) ^ {}", factored(s.factor, scope_), s.multiplicity));
      if (s.from.kind == AtomKind::interval_product &&
          !(is_constant(s.from.low) && is_constant(s.from.high))) {
        const long length = s.from.high.constant - s.from.low.constant;
        out_ += fmt::format("  rewrite (ip_value K {} {} {} {}) by lia. cbn [rising_terms].\n",
                            interval_base(s.from, scope_), bracketed(affine(s.from.low, scope_)),
                            bracketed(affine(s.from.high, scope_)), std::max(length, 0L));
        continue;
      }
      if (s.from.kind == AtomKind::power && !is_constant(s.from.argument))
        throw std::logic_error("a literal power has a literal exponent");
      any = true;
    }
    if (any) out_ += "  values.\n";
  }

  /// A reciprocal interval product of literal length as reciprocals of its factors.
  void expansion(const AtomStep& s) {
    fraction_ = true;
    Tracker& side = s.side == AtomStep::Side::left ? left_ : right_;
    const std::string name = fmt::format("step{}", ++named_);
    std::string image = "(" + factored(s.factor, scope_) + ")";
    std::string closing;
    for (std::size_t i = 0; i < s.nonzero->factors.size(); ++i) {
      const NonzeroFactor& f = s.nonzero->factors[i];
      out_ += fmt::format("  assert ({}_{} : ({} <> 0)%K) by ({}).\n", name, i + 1,
                          polynomial(f.factor, scope_), factor_tactic(proof_, f, scope_));
      closing +=
          fmt::format("{}refine ({}_{} (eq_trans _ W)); ring", i == 0 ? "" : " | ", name, i + 1);
    }
    for (const Atom& one : s.reciprocals) image += " * " + atom(one, scope_);
    const long length = s.from.high.constant - s.from.low.constant;
    out_ += fmt::format(
        "  assert ({} : ({} = {})%K).\n  {{ rewrite (rip_at K {} {} {} {}) by lia. cbn "
        "[rising_terms]. inj_norm. field.\n    repeat split; intros W; first [{}]. }}\n"
        "  rewrite {}.\n",
        name, atom(s.from, scope_), image, interval_base(s.from, scope_),
        bracketed(affine(s.from.low, scope_)), bracketed(affine(s.from.high, scope_)), length,
        closing, name);
    side.atoms.erase(atom(s.from, scope_));
    for (unsigned i = 0; i < s.multiplicity; ++i) {
      side.factors.push_back("(" + factored(s.factor, scope_) + ")");
      for (const Atom& one : s.reciprocals) ++side.atoms[atom(one, scope_)];
    }
  }

  void step(const AtomStep& s) {
    Tracker& side = s.side == AtomStep::Side::left ? left_ : right_;
    Tracker& other = s.side == AtomStep::Side::left ? right_ : left_;
    fraction_ = fraction_ || has_fraction(s.factor);
    const std::string from = atom(s.from, scope_);
    const std::string to = atom(s.to, scope_);
    const bool clear = side.count(from) == s.multiplicity && other.count(from) == 0;
    if (clear) {
      out_ += fmt::format("  rewrite {}.\n", step_law(proof_, s, scope_));
    } else {
      const std::string name = fmt::format("step{}", ++named_);
      const std::string image = fmt::format("({} * {})", k_text(factored(s.factor, scope_)), to);
      out_ += fmt::format("  assert ({} : {} = {}%K) by (rewrite {}; reflexivity).\n", name, from,
                          image, step_law(proof_, s, scope_));
      Tracker rest = side;
      rest.atoms[from] -= s.multiplicity;
      if (rest.atoms[from] == 0) rest.atoms.erase(from);
      std::string text = rest.text();
      for (unsigned i = 0; i < s.multiplicity; ++i) text += " * " + image;
      const bool left = s.side == AtomStep::Side::left;
      if (!left) out_ += "  symmetry.\n";
      out_ += fmt::format("  transitivity ({})%K; [rewrite <- {}; inj_norm; {}|].\n", text, name,
                          fraction_ ? generalized() + "field" : std::string("ring"));
      if (!left) out_ += "  symmetry.\n";
    }
    side.move(from, to, s.multiplicity);
    side.factors.push_back(k_text(factored(s.factor, scope_)));
  }

  /// Reciprocals become variables, so that `field` asks for nothing about them.
  [[nodiscard]] std::string generalized() const {
    std::string out;
    std::map<std::string, unsigned> all = left_.atoms;
    all.insert(right_.atoms.begin(), right_.atoms.end());
    for (const auto& [a, e] : all)
      if (a.starts_with("(/ ")) out += fmt::format("generalize {}%K; intro; ", a);
    return out;
  }

  void finish() {
    out_ += "  inj_norm.\n";
    if (!fraction_) {
      out_ += "  ring.\n";
      return;
    }
    out_ += "  " + generalized() + "field.\n";
  }

  const proof::Proof& proof_;
  const proof::Instance& instance_;
  const Scope& scope_;
  Tracker left_;
  Tracker right_;
  bool fraction_ = false;
  int named_ = 0;
  std::string out_;
};

}  // namespace

std::string nonzero_tactic(const proof::Proof& proof, const proof::Nonzero& why,
                           const Scope& scope) {
  const proof::Factored& p = why.polynomial;
  if (p.constant == 1 && why.factors.size() == 1 && why.factors[0].exponent == 1)
    return factor_tactic(proof, why.factors[0], scope);
  if (why.factors.empty()) return "numeric_neq0";
  std::string tactic =
      has_fraction(p) ? fmt::format("apply (neq0_by_quotient K _ ({}) {}); [field | lia]",
                                    p.constant.get_num().get_str(), p.constant.get_den().get_str())
                      : "apply inj_neq0; lia";
  bool first = p.constant == 1;
  for (const NonzeroFactor& f : why.factors) {
    std::string one = factor_tactic(proof, f, scope);
    if (f.exponent > 1) one = "apply (pow_neq0 K); " + one;
    tactic = first ? one : fmt::format("apply (mul_neq0 K); [{} | {}]", tactic, one);
    first = false;
  }
  return fmt::format("apply (neq0_eq K _ {}); [inj_norm; {} | {}]", k_text(factored(p, scope)),
                     has_fraction(p) ? "field" : "ring", tactic);
}

std::string interval_nonzero_tactic(const proof::Proof& proof, const Atom& a, const Scope& scope) {
  if (a.base.terms.empty()) return "intros t Ht; apply (neq0_by K _ t); [pq | index]";
  if (is_constant(a.base))
    return fmt::format(
        "intros t Ht; apply (neq0_by_quotient K _ ({0} + {1} * t) {1}); "
        "[inj_norm; field | index]",
        a.base.terms[0].coefficient.get_str(), a.base_scale.get_str());
  for (std::size_t i = 2; i < proof.symbols.size(); ++i) {
    if (proof.symbols[i].kind != proof::SymbolKind::rational_parameter) continue;
    const auto& excluded = proof.claim->parameters[i - 2].excluded;
    for (std::size_t e = 0; e < excluded.size(); ++e) {
      if (excluded[e].kind == claim::Exclusion::Kind::constant) continue;
      const bool all = excluded[e].kind == claim::Exclusion::Kind::integers;
      return fmt::format(
          "intros t Ht; apply (neq0_scaled K (inj 1) {} (inj (- t))); "
          "[apply inj_neq0; lia | apply {}{} | inj_norm; ring]",
          scope.field[i], exclusion_name(proof, i, e), all ? "" : "; lia");
    }
  }
  return "intros t Ht; fail";
}

std::string unit_assertion(const proof::Proof& proof, const proof::Unit& unit,
                           const std::string& name, const Scope& scope, std::string& pair) {
  pair = pair_text(unit, scope);
  return fmt::format("  assert ({} : ({} = inj 1)%K) by ({}).\n", name, pair,
                     unit_tactic(proof, unit, scope));
}

std::string respell(const Unfolded& unfolded, const Scope& scope) {
  std::map<std::string, std::string> integers;
  std::map<std::string, std::string> fields;
  for (const auto& [a, e] : unfolded.original->atoms) {
    const Atom image = substitute(a, unfolded.by);
    if (a.kind == AtomKind::reciprocal) {
      const std::string old = polynomial(a.base, unfolded.scope);
      const std::string fresh = polynomial(image.base, scope);
      if (old != fresh) fields[old] = fresh;
      continue;
    }
    for (const auto& [old_form, new_form] :
         {std::pair{&a.argument, &image.argument}, std::pair{&a.low, &image.low},
          std::pair{&a.high, &image.high}}) {
      const std::string old = affine(*old_form, unfolded.scope);
      const std::string fresh = affine(*new_form, scope);
      if (old != fresh && old != "(" + fresh + ")") integers[old] = fresh;
    }
  }
  std::vector<std::pair<std::string, std::string>> list(integers.begin(), integers.end());
  // Longest first, so that no replacement spoils a longer one.
  std::stable_sort(list.begin(), list.end(),
                   [](const auto& a, const auto& b) { return a.first.size() > b.first.size(); });
  std::string out;
  for (const auto& [old, fresh] : fields)
    out += fmt::format("  replace (/ ({}))%K with (/ ({}))%K by (apply f_equal; inj_norm; ring).\n",
                       old, fresh);
  for (const auto& [old, fresh] : list)
    out += fmt::format("  replace ({}) with ({}) by lia.\n", old, fresh);
  return out;
}

std::string instance_tactics(const proof::Proof& proof, const proof::Instance& instance,
                             const Unfolded& left, const Unfolded& right, const Scope& scope) {
  std::string out;
  if (left.original != nullptr) out += respell(left, scope);
  if (right.original != nullptr) out += respell(right, scope);
  return out + InstanceTactics(proof, instance, scope).run();
}

}  // namespace sumwright::writers::coq
