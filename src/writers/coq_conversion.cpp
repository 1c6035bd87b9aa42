// From the author's vocabulary to products of atoms: one lemma per function call, one per
// denominator, and the conversion that puts them together.

#include <fmt/format.h>

#include <algorithm>
#include <set>

#include "claim/affine.hpp"
#include "writers/coq_power_leaf.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

using claim::Expression;
using claim::Operation;
using proof::AtomKind;
using proof::LeafRule;

namespace {

class ConversionText : private PowerLeafText {
 public:
  ConversionText(const proof::Proof& proof, const proof::Conversion& c, std::string what,
                 std::string piece, bool with_index)
      : PowerLeafText(proof),
        c_(c),
        what_(std::move(what)),
        piece_(std::move(piece)),
        with_index_(with_index),
        names_(names(proof)) {
    variables_ = with_index ? fmt::format("({} {} : Z)", names_.n, names_.k)
                            : fmt::format("({} : Z)", names_.n);
    arguments_ = with_index ? names_.n + " " + names_.k : names_.n;
    premises_ = fmt::format("{} <= {} -> ", bracketed(std::to_string(proof.from)), names_.n);
    hypotheses_ = "Hn";
    if (with_index) {
      const claim::Range& r = proof.claim->sum.over[0];
      premises_ += fmt::format("{} <= {} <= {} -> ", integer_text(proof, *r.low.value), names_.k,
                               integer_text(proof, *r.high.value));
      hypotheses_ += " Hk";
    }
  }

  std::string run() {
    define_pieces();
    for (std::size_t i = 0; i < c_.leaves.size(); ++i) leaf(i);
    for (std::size_t i = 0; i < c_.denominators.size(); ++i) denominator(i);
    conversion();
    return out_;
  }

 private:
  [[nodiscard]] std::string leaf_name(std::size_t i) const {
    return fmt::format("{}_leaf_{}", what_, i + 1);
  }

  void define_pieces() {
    const std::string type = with_index_ ? fmt::format("({} {} : Z)", names_.n, names_.k)
                                         : fmt::format("({} : Z)", names_.n);
    for (std::size_t j = 0; j < c_.products.size(); ++j)
      out_ += fmt::format("Definition {}{} {} : K :=\n  ({})%K.\n", piece_, j + 1, type,
                          product(c_.products[j], scope_));
    out_ += "\n";
  }

  void lemma(const std::string& name, const std::string& statement, const std::string& script) {
    out_ += fmt::format("Lemma {} {} : {}\n  {}.\nProof.\n  intros {}.\n{}Qed.\n\n", name,
                        variables_, premises_, statement, hypotheses_, script);
  }

  // ---------------------------------------------------------------- leaves

  [[nodiscard]] std::string leaf_text(const proof::Leaf& l) const {
    return l.rule == LeafRule::reciprocal_factorial ? reciprocal_text(proof_, *l.expression)
                                                    : field_text(proof_, *l.expression);
  }

  void leaf(std::size_t i) {
    const proof::Leaf& l = c_.leaves[i];
    const std::string left = leaf_text(l);
    const std::string right = product(l.value, scope_);
    lemma(leaf_name(i), fmt::format("{}%K = ({})%K", left, right),
          is_identity(l) ? "  reflexivity.\n" : leaf_script(l));
  }

  [[nodiscard]] const proof::Atom* interval(const proof::Leaf& l) const {
    for (const auto& [a, e] : l.value.atoms)
      if (a.kind == AtomKind::interval_product) return &a;
    return nullptr;
  }

  /// The leaf is an atom already, as written.
  [[nodiscard]] bool is_identity(const proof::Leaf& l) const {
    return bare(leaf_text(l)) == bare(product(l.value, scope_));
  }

  std::string leaf_script(const proof::Leaf& l) {
    if (l.rule == LeafRule::power) return power_script(l);
    const Expression& e = *l.expression;
    const std::string close = " by first [index | pq | pqf].\n  inj_norm. ring.\n";
    const auto rewrite = [&](const std::string& law) { return "  rewrite (" + law + ")" + close; };
    const proof::Affine a = affine_of(*e.children[0]);
    if (l.rule == LeafRule::factorial || l.rule == LeafRule::reciprocal_factorial)
      return rewrite(fmt::format("leaf_{} K {} {}",
                                 l.rule == LeafRule::factorial ? "factorial" : "rfactorial",
                                 integer_text(proof_, *e.children[0]), z(a)));
    const proof::Affine b = affine_of(*e.children[1]);
    const std::string second = integer_text(proof_, *e.children[1]);
    const auto field = [&] { return field_text(proof_, *e.children[0]) + "%K"; };
    switch (l.rule) {
      case LeafRule::binomial_factorials:
        if (!is_integer_argument(proof_, *e.children[0])) break;
        return rewrite(fmt::format("leaf_binomial K {} {} {} {} {}",
                                   integer_text(proof_, *e.children[0]), second, z(a), z(b),
                                   z(combine(a, -1, b, 0))));
      case LeafRule::binomial_interval:
        return binomial_interval(l, second, b, rewrite);
      case LeafRule::rising_factorials:
        return rewrite(fmt::format("leaf_rising_factorials K {} {} {} {} {}", field(), z(a), second,
                                   z(combine(a, 1, b, -1)), z(combine(a, 0, b, -1))));
      case LeafRule::rising_reflected: {
        proof::Affine zero = a;
        for (long& c : zero.coefficients) c = 0;
        zero.constant = 0;
        const proof::Affine minus = combine(zero, -1, a, 0);
        return rewrite(fmt::format("leaf_rising_reflected K {} {} {} {} {} {}", field(), z(a),
                                   second, z(b), z(minus), z(combine(minus, -1, b, 0))));
      }
      case LeafRule::falling_factorials:
        return rewrite(fmt::format("leaf_falling_factorials K {} {} {} {} {}", field(), z(a),
                                   second, z(a), z(combine(a, -1, b, 0))));
      case LeafRule::rising_interval:
      case LeafRule::falling_interval:
        if (const proof::Atom* ip = interval(l))
          return rewrite(fmt::format("leaf_{}_ip K {} {} {} {} {}",
                                     l.rule == LeafRule::rising_interval ? "rising" : "falling",
                                     field(), interval_base(*ip, scope_) + "%K", second, z(ip->low),
                                     z(ip->high)));
        break;
      default:
        break;
    }
    return "  values. inj_norm. field.\n";
  }

  template <typename Rewrite>
  std::string binomial_interval(const proof::Leaf& l, const std::string& second,
                                const proof::Affine& b, const Rewrite& rewrite) {
    const Expression& upper = *l.expression->children[0];
    const proof::Atom* ip = interval(l);
    if (ip == nullptr) return "  values. inj_norm. field.\n";
    if (is_integer_argument(proof_, upper))
      return rewrite(fmt::format("leaf_binomial_ip K {} {} {} {} {}", integer_text(proof_, upper),
                                 second, z(ip->low), z(ip->high), z(b)));
    return rewrite(fmt::format("leaf_gbinomial_ip K {}%K {}%K {} {} {} {}",
                               field_text(proof_, upper), interval_base(*ip, scope_), second,
                               z(ip->low), z(ip->high), z(b)));
  }

  // ---------------------------------------------------------------- denominators

  [[nodiscard]] std::string divisor_text(const proof::Denominator& d) const {
    std::string v = field_text(proof_, *d.expression);
    if (d.node->operation == Operation::power && d.expression == d.node->children[0]) {
      const auto exponent = claim::as_literal(*d.node->children[1]);
      return fmt::format("({} ^ {})", v, mpz_class(abs(*exponent)).get_str());
    }
    return v;
  }

  /// Leaves of `e` that stand outside recorded divisors.
  void collect(const Expression& e, std::set<std::string>& out, bool reciprocal,
               const Expression* root) const {
    if (&e != root)
      for (const proof::Denominator& d : c_.denominators) {
        if (d.node.get() != &e) continue;
        if (e.operation == Operation::divide && d.expression == e.children[1])
          collect(*e.children[0], out, reciprocal, root);
        return;
      }
    if (e.operation == Operation::call ||
        (e.operation == Operation::power && !claim::as_literal(*e.children[1]))) {
      out.insert(claim::to_text(e) + (reciprocal && e.name == "factorial" ? "|r" : ""));
      return;
    }
    if (e.operation == Operation::divide) {
      collect(*e.children[0], out, reciprocal, root);
      collect(*e.children[1], out, !reciprocal, root);
      return;
    }
    if (e.operation == Operation::power) {
      const auto exponent = claim::as_literal(*e.children[1]);
      collect(*e.children[0], out, reciprocal != (*exponent < 0), root);
      return;
    }
    for (const claim::ExpressionPtr& c : e.children) collect(*c, out, reciprocal, root);
  }

  std::string leaf_rewrites(const Expression& within, const Expression* root) const {
    std::set<std::string> found;
    collect(within, found, false, root);
    std::string out;
    for (std::size_t i = 0; i < c_.leaves.size(); ++i) {
      const proof::Leaf& l = c_.leaves[i];
      const std::string key =
          claim::to_text(*l.expression) + (l.rule == LeafRule::reciprocal_factorial ? "|r" : "");
      if (found.contains(key) && !is_identity(l))
        out += fmt::format("  rewrite ({} {} {}).\n", leaf_name(i), arguments_, hypotheses_);
    }
    return out;
  }

  std::string inner_divisions(const proof::Denominator& outer) const {
    std::string out;
    for (std::size_t i = c_.denominators.size(); i-- > 0;)
      if (&c_.denominators[i] != &outer &&
          contains(*outer.expression, c_.denominators[i].node.get()))
        out += division_rewrite(i);
    return out;
  }

  static bool contains(const Expression& e, const Expression* node) {
    if (&e == node) return true;
    return std::any_of(e.children.begin(), e.children.end(),
                       [&](const claim::ExpressionPtr& c) { return contains(*c, node); });
  }

  [[nodiscard]] std::string division_rewrite(std::size_t i) const {
    const proof::Denominator& d = c_.denominators[i];
    const bool quotient =
        d.node->operation == Operation::divide && d.expression == d.node->children[1];
    // An inverse that is its own atom needs no rewriting.
    const bool one_atom = d.reciprocal.atoms.size() == 1 && d.reciprocal.atoms[0].second == 1;
    if (!quotient && one_atom &&
        bare("/ " + divisor_text(d)) == bare(product(d.reciprocal, scope_)))
      return "";
    const std::string law = quotient ? "divide_by" : "invert_by";
    return fmt::format("  rewrite {}({} K {}%K ({})%K ({}_denominator_{} {} {})).\n",
                       quotient ? "!" : "", law, divisor_text(d), product(d.reciprocal, scope_),
                       what_, i + 1, arguments_, hypotheses_);
  }

  void denominator(std::size_t i) {
    const proof::Denominator& d = c_.denominators[i];
    std::string script = inner_divisions(d);
    std::set<std::string> found;
    script += leaf_rewrites(*d.expression, d.expression.get());
    std::string pairs;
    std::string uses;
    constant_unit(d, script, pairs, uses);
    for (std::size_t u = 0; u < d.units.size(); ++u) {
      std::string pair;
      const std::string name = fmt::format("unit{}", u + 1);
      script += unit_assertion(proof_, d.units[u], name, scope_, pair);
      pairs += fmt::format("{}({}) ^ {}", pairs.empty() ? "" : " * ", pair, d.units[u].exponent);
      uses += fmt::format("rewrite {}. ", name);
    }
    const std::string merges = merge_rewrites(script);
    script += fmt::format("  transitivity ({})%K; [{}inj_norm; ring|].\n  {}ring.\n", pairs, merges,
                          uses);
    lemma(fmt::format("{}_denominator_{}", what_, i + 1),
          fmt::format("({} * ({}))%K = inj 1", divisor_text(d), product(d.reciprocal, scope_)),
          script);
  }

  /// The numeric part: constant of the divisor times the literal powers of its reciprocal.
  void constant_unit(const proof::Denominator& d, std::string& script, std::string& pairs,
                     std::string& uses) const {
    std::string text = fmt::format("{} * {}", rational(d.as_product.coefficient.constant),
                                   rational(d.reciprocal.coefficient.constant));
    bool powers = false;
    for (const auto& entry : d.reciprocal.atoms) {
      const proof::Atom& a = entry.first;
      if (a.kind != AtomKind::power || !is_constant(a.argument) || !is_constant(a.base)) continue;
      const bool by_unit = std::any_of(d.units.begin(), d.units.end(), [&](const proof::Unit& u) {
        return u.right.kind == AtomKind::power && atom(u.right, scope_) == atom(a, scope_);
      });
      if (by_unit) continue;
      text += " * " + atom(a, scope_);
      powers = true;
    }
    if (!powers && d.as_product.coefficient.constant == 1 &&
        d.reciprocal.coefficient.constant == 1 && !d.units.empty())
      return;
    script += fmt::format("  assert (unit0 : ({} = inj 1)%K) by (values; field).\n", text);
    pairs = "(" + text + ")";
    uses = "rewrite unit0. ";
  }

  // ---------------------------------------------------------------- the whole expression

  void conversion() {
    std::string script = fmt::format("  unfold {}.\n", what_);
    std::set<std::string> divided;
    for (std::size_t i = c_.denominators.size(); i-- > 0;)
      if (!inside_other(i) && divided.insert(divisor_text(c_.denominators[i])).second)
        script += division_rewrite(i);
    script += leaf_rewrites(*c_.expression, nullptr);
    std::string sum;
    std::string with_units;
    std::string uses;
    bool any = false;
    for (std::size_t j = 0; j < c_.products.size(); ++j) {
      const std::string piece = fmt::format("{}{} {}", piece_, j + 1, arguments_);
      std::string term = piece;
      for (std::size_t u = 0; u < c_.units[j].size(); ++u) {
        std::string pair;
        const std::string name = fmt::format("unit{}_{}", j + 1, u + 1);
        script += unit_assertion(proof_, c_.units[j][u], name, scope_, pair);
        term = fmt::format("({}) ^ {} * {}", pair, c_.units[j][u].exponent, term);
        uses += fmt::format("rewrite {}. ", name);
        any = true;
      }
      sum += (sum.empty() ? "" : " + ") + piece;
      with_units += (with_units.empty() ? "" : " + ") + term;
    }
    if (c_.products.empty()) sum = "inj 0";
    std::string unfold = "  unfold ";
    for (std::size_t j = 0; j < c_.products.size(); ++j)
      unfold += fmt::format("{}{}{}", j == 0 ? "" : ", ", piece_, j + 1);
    const std::string merges = merge_rewrites(script);
    for (std::size_t i = 0; i < c_.merges.size() && c_.products.size() == 1; ++i) {
      const std::string pair = vanishing_merge(i, script);
      if (pair.empty()) continue;
      with_units = fmt::format("({}) * ({})", pair, with_units);
      uses = fmt::format("rewrite power_unit{}. ", i + 1) + uses;
      any = true;
    }
    if (any)
      script += fmt::format("  transitivity ({})%K; [{}; {}inj_norm; ring|].\n  {}ring.\n",
                            with_units, unfold.substr(2), merges, uses);
    else
      script += "  " + (c_.products.empty() ? "" : unfold.substr(2) + "; ") + merges +
                "inj_norm; ring.\n";
    lemma(what_ + "_terms", fmt::format("{} {} = ({})%K", what_, arguments_, sum), script);
  }

  /// Powers of one base that merged are taken apart again, last merge first.
  std::string merge_rewrites(std::string& script) const {
    std::string out;
    for (std::size_t i = c_.merges.size(); i-- > 0;) {
      const proof::PowerMerge& m = c_.merges[i];
      const std::string b = power_base(m.base, scope_);
      const std::string total = z(combine(m.first, 1, m.second, 0));
      std::string side = "right; lia";
      if (is_constant(m.base)) side = "left; numeric_neq0";
      if (m.nonzero) side = "left; " + nonzero_tactic(proof_, *m.nonzero, scope_);
      script += fmt::format(
          "  assert (merge{0} : (zpow {1} {2} = zpow {1} {3} * zpow {1} {4})%K)\n"
          "    by (apply (zpow_add K); [{5} | lia]).\n",
          i + 1, b, total, z(m.first), z(m.second), side);
      out += fmt::format("try rewrite merge{}; ", i + 1);
    }
    return out;
  }

  /// Powers whose exponents cancel leave the product: their product is 1.
  std::string vanishing_merge(std::size_t i, std::string& script) const {
    const proof::PowerMerge& m = c_.merges[i];
    const proof::Affine total = combine(m.first, 1, m.second, 0);
    if (!is_constant(total) || total.constant != 0) return "";
    const std::string b = power_base(m.base, scope_);
    std::string pair = fmt::format("zpow {0} {1} * zpow {0} {2}", b, z(m.first), z(m.second));
    script += fmt::format(
        "  assert (power_unit{0} : ({1} = inj 1)%K) by (rewrite <- merge{0}; exact (zpow_0_r K "
        "{2})).\n",
        i + 1, pair, b);
    return pair;
  }

  [[nodiscard]] bool inside_other(std::size_t i) const {
    for (std::size_t j = 0; j < c_.denominators.size(); ++j)
      if (j != i && contains(*c_.denominators[j].expression, c_.denominators[i].node.get()))
        return true;
    return false;
  }

  const proof::Conversion& c_;
  std::string what_;
  std::string piece_;
  bool with_index_;
  Names names_;
  std::string variables_;
  std::string arguments_;
  std::string premises_;
  std::string hypotheses_;
  std::string out_;
};

}  // namespace

Names names(const proof::Proof& proof) {
  const Scope scope = plain_scope(proof);
  return {scope.integer[0], scope.integer[1], !proof.claim->sum.over.empty()};
}

std::string shifted(const std::string& n, unsigned by) {
  return by == 0 ? n : fmt::format("({} + {})", n, by);
}

std::string conversion_text(const proof::Proof& proof, const proof::Conversion& c,
                            const std::string& what, const std::string& piece, bool with_index) {
  return ConversionText(proof, c, what, piece, with_index).run();
}

}  // namespace sumwright::writers::coq
