// From the author's vocabulary to products of atoms: one lemma per function call, one per
// denominator, and the conversion that puts them together.

#include <fmt/format.h>

#include <algorithm>
#include <map>
#include <set>
#include <vector>

#include "claim/affine.hpp"
#include "writers/coq_comments.hpp"
#include "writers/coq_leaf.hpp"
#include "writers/coq_merged_powers.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

using claim::Expression;
using claim::Operation;
using proof::AtomKind;
using proof::LeafRule;

namespace {

class ConversionText : private LeafText {
 public:
  ConversionText(const proof::Proof& proof, const proof::Conversion& c, std::string what,
                 std::string piece, bool with_index)
      : LeafText(proof),
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
      const std::string premise = index_premise(proof);
      premises_ += premise;
      if (!premise.empty()) hypotheses_ += " Hk";
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
    if (!c_.products.empty())
      out_ += note(fmt::format("The terms of the {}.", what_ == "summand" ? what_ : "right side"));
    for (std::size_t j = 0; j < c_.products.size(); ++j)
      out_ += fmt::format("Definition {}{} {} : K :=\n  ({})%K.\n", piece_, j + 1, type,
                          product(c_.products[j], scope_));
    out_ += "\n";
  }

  void lemma(const std::string& words, const std::string& name, const std::string& statement,
             const std::string& script) {
    out_ += note(words) + fmt::format("Lemma {} {} : {}\n  {}.\nProof.\n  intros {}.\n{}Qed.\n\n",
                                      name, variables_, premises_, statement, hypotheses_, script);
  }

  void leaf(std::size_t i) {
    const proof::Leaf& l = c_.leaves[i];
    lemma(leaf_words(l), leaf_name(i),
          fmt::format("{}%K = ({})%K", leaf_text(l), product(l.value, scope_)),
          is_identity(l) ? "  reflexivity.\n" : leaf_script(l));
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

  /// The recorded denominator at this node, if any.
  [[nodiscard]] const proof::Denominator* recorded(const Expression& node) const {
    for (const proof::Denominator& d : c_.denominators)
      if (d.node.get() == &node) return &d;
    return nullptr;
  }

  static bool is_leaf(const Expression& e) {
    return e.operation == Operation::call ||
           (e.operation == Operation::power && !claim::as_literal(*e.children[1]));
  }

  /// The leaves in `e`, those of its divisors included. `reciprocal`: `e` is written as R(e).
  void collect(const Expression& e, std::set<std::string>& out, bool reciprocal) const {
    if (is_leaf(e)) {
      out.insert(claim::to_text(e) + (reciprocal && e.name == "factorial" ? "|r" : ""));
      return;
    }
    const bool divided = recorded(e) != nullptr;
    if (e.operation == Operation::divide) {
      collect(*e.children[0], out, reciprocal);
      collect(*e.children[1], out, !divided && !reciprocal);
      return;
    }
    if (e.operation == Operation::power) {
      const bool inverse = *claim::as_literal(*e.children[1]) < 0;
      collect(*e.children[0], out, !divided && reciprocal != inverse);
      return;
    }
    for (const claim::ExpressionPtr& c : e.children) collect(*c, out, !divided && reciprocal);
  }

  [[nodiscard]] std::vector<std::size_t> leaves_in(const Expression& e) const {
    std::set<std::string> found;
    collect(e, found, false);
    std::vector<std::size_t> out;
    for (std::size_t i = 0; i < c_.leaves.size(); ++i) {
      const proof::Leaf& l = c_.leaves[i];
      const std::string key =
          claim::to_text(*l.expression) + (l.rule == LeafRule::reciprocal_factorial ? "|r" : "");
      if (found.contains(key) && !is_identity(l)) out.push_back(i);
    }
    return out;
  }

  static bool contains(const Expression& e, const Expression* node) {
    if (&e == node) return true;
    return std::any_of(e.children.begin(), e.children.end(),
                       [&](const claim::ExpressionPtr& c) { return contains(*c, node); });
  }

  [[nodiscard]] bool is_quotient(const proof::Denominator& d) const {
    return d.node->operation == Operation::divide && d.expression == d.node->children[1];
  }

  /// The divisors in `within` that stand in no other one, different ones once, those with a longer
  /// text first: it may contain a shorter one.
  [[nodiscard]] std::vector<std::size_t> divisors_in(const Expression& within,
                                                     const proof::Denominator* self) const {
    std::vector<std::size_t> out;
    for (std::size_t i = c_.denominators.size(); i-- > 0;)
      if (&c_.denominators[i] != self && contains(within, c_.denominators[i].node.get()))
        out.push_back(i);
    const auto nested = [&](std::size_t i) {
      return std::any_of(out.begin(), out.end(), [&](std::size_t j) {
        return j != i && contains(*c_.denominators[j].expression, c_.denominators[i].node.get());
      });
    };
    std::vector<std::size_t> outer;
    std::set<std::string> known;
    for (const std::size_t i : out) {
      const proof::Denominator& d = c_.denominators[i];
      if (!nested(i) && known.insert((is_quotient(d) ? "/" : "") + divisor_text(d)).second)
        outer.push_back(i);
    }
    std::stable_sort(outer.begin(), outer.end(), [&](std::size_t a, std::size_t b) {
      return divisor_text(c_.denominators[a]).size() > divisor_text(c_.denominators[b]).size();
    });
    return outer;
  }

  /// An inverse that is its own atom needs no rewriting.
  [[nodiscard]] bool is_own_atom(const proof::Denominator& d) const {
    return !is_quotient(d) && d.reciprocal.atoms.size() == 1 && d.reciprocal.atoms[0].second == 1 &&
           same_term("/ " + divisor_text(d), product(d.reciprocal, scope_));
  }

  /// Leaves and divisions of `within`, which stands in the goal as written, become products of
  /// atoms. Leaves first (a base may contain a division), in the divisors' lemmas too.
  [[nodiscard]] std::string rewrites(const Expression& within,
                                     const proof::Denominator* self) const {
    std::string out;
    std::string divisions;
    std::map<std::size_t, std::vector<std::string>> inside;
    for (const std::size_t i : divisors_in(within, self)) {
      const proof::Denominator& d = c_.denominators[i];
      if (is_own_atom(d)) continue;
      std::string lemma =
          fmt::format("({}_denominator_{} {} {})", what_, i + 1, arguments_, hypotheses_);
      const std::vector<std::size_t> leaves = leaves_in(*d.expression);
      if (!leaves.empty()) {
        const std::string name = fmt::format("divisor_{}", i + 1);
        out += fmt::format("  pose proof {} as {}.\n", lemma, name);
        for (const std::size_t at : leaves) inside[at].push_back(name);
        divisions += fmt::format("  rewrite {}.\n",
                                 is_quotient(d) ? fmt::format("!(divide_by K _ _ {})", name)
                                                : fmt::format("(invert_by K _ _ {})", name));
        continue;
      }
      divisions += fmt::format("  rewrite {}({} K {}%K ({})%K {}).\n", is_quotient(d) ? "!" : "",
                               is_quotient(d) ? "divide_by" : "invert_by", divisor_text(d),
                               product(d.reciprocal, scope_), lemma);
    }
    for (const std::size_t at : leaves_in(within)) {
      const std::string lemma = fmt::format("({} {} {})", leaf_name(at), arguments_, hypotheses_);
      out += fmt::format("  rewrite {}.\n", lemma);
      for (const std::string& name : inside[at])
        out += fmt::format("  rewrite {} in {}.\n", lemma, name);
    }
    return out + divisions;
  }

  void denominator(std::size_t i) {
    const proof::Denominator& d = c_.denominators[i];
    std::string script = rewrites(*d.expression, &d);
    const bool polynomial = script.empty() && !has_leaf(*d.expression);
    const bool by_bases = !polynomial && mixes_powers(d);
    std::string pairs;
    std::string uses;
    if (!by_bases) constant_unit(d, script, pairs, uses);
    for (std::size_t u = 0; u < d.units.size(); ++u) {
      if (by_bases && is_numeric_power(d.units[u].right)) continue;
      std::string pair;
      const std::string name = fmt::format("unit{}", u + 1);
      script += unit_assertion(proof_, d.units[u], name, scope_, pair);
      pairs += fmt::format("{}({}) ^ {}", pairs.empty() ? "" : " * ", pair, d.units[u].exponent);
      uses += fmt::format("rewrite {}. ", name);
    }
    if (pairs.empty()) pairs = "inj 1";
    MergedPowers powers{"", "", "ring"};
    if (by_bases)
      powers = merged_powers(proof_, c_, scope_, {&d.as_product, &d.reciprocal});
    else if (!polynomial)
      powers = merged_powers(proof_, c_, scope_, {});
    script += powers.setup;
    script += fmt::format("  transitivity ({})%K; [{}inj_norm; {}|].\n  {}ring.\n", pairs,
                          powers.split, powers.close, uses);
    lemma(fmt::format("The divisor {} has an inverse, so it is not 0.",
                      comment_formula(claim::to_text(*d.expression))),
          fmt::format("{}_denominator_{}", what_, i + 1),
          fmt::format("({} * ({}))%K = inj 1", divisor_text(d), product(d.reciprocal, scope_)),
          script);
  }

  static bool has_leaf(const Expression& e) {
    return is_leaf(e) || std::any_of(e.children.begin(), e.children.end(),
                                     [](const claim::ExpressionPtr& c) { return has_leaf(*c); });
  }

  static bool is_numeric_power(const proof::Atom& a) {
    return a.kind == AtomKind::power && is_constant(a.base);
  }

  [[nodiscard]] bool has_unit(const proof::Denominator& d, const proof::Atom& a) const {
    return std::any_of(d.units.begin(), d.units.end(), [&](const proof::Unit& u) {
      return u.right.kind == AtomKind::power && atom(u.right, scope_) == atom(a, scope_);
    });
  }

  /// Powers of one number met in the divisor, or its constant and its powers in the reciprocal.
  [[nodiscard]] bool mixes_powers(const proof::Denominator& d) const {
    return std::any_of(d.reciprocal.atoms.begin(), d.reciprocal.atoms.end(), [&](const auto& e) {
      const proof::Atom& a = e.first;
      if (!is_numeric_power(a)) return false;
      return !c_.merges.empty() || (!is_constant(a.argument) && !has_unit(d, a));
    });
  }

  /// The numeric part: constant of the divisor times the literal powers of its reciprocal.
  void constant_unit(const proof::Denominator& d, std::string& script, std::string& pairs,
                     std::string& uses) const {
    std::string text = fmt::format("{} * {}", rational(d.as_product.coefficient.constant),
                                   rational(d.reciprocal.coefficient.constant));
    bool powers = false;
    for (const auto& entry : d.reciprocal.atoms) {
      const proof::Atom& a = entry.first;
      if (!is_numeric_power(a) || !is_constant(a.argument) || has_unit(d, a)) continue;
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
    script += rewrites(*c_.expression, nullptr);
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
    const MergedPowers powers = merged_powers(proof_, c_, scope_, {});
    script += powers.setup;
    if (any)
      script += fmt::format("  transitivity ({})%K; [{}; {}inj_norm; {}|].\n  {}ring.\n",
                            with_units, unfold.substr(2), powers.split, powers.close, uses);
    else
      script += "  " + (c_.products.empty() ? "" : unfold.substr(2) + "; ") + powers.split +
                "inj_norm; " + powers.close + ".\n";
    lemma(fmt::format("The {} as a sum of products of atoms.",
                      what_ == "summand" ? what_ : "right side"),
          what_ + "_terms", fmt::format("{} {} = ({})%K", what_, arguments_, sum), script);
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
