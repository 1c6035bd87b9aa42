// Function calls and powers of the claim as atoms: the tactics of the lemma for each of them.
#pragma once

#include <fmt/format.h>

#include <string>

#include "claim/expression.hpp"
#include "writers/coq_comments.hpp"
#include "writers/coq_power_leaf.hpp"

namespace sumwright::writers::coq {

/// Base of the conversion writer: what a leaf is, and the script that shows it.
class LeafText : protected PowerLeafText {
 protected:
  explicit LeafText(const proof::Proof& proof) : PowerLeafText(proof) {}

  [[nodiscard]] std::string leaf_text(const proof::Leaf& l) const {
    return l.rule == proof::LeafRule::reciprocal_factorial ? reciprocal_text(proof_, *l.expression)
                                                           : field_text(proof_, *l.expression);
  }

  /// Why the leaf is these atoms, for readers.
  [[nodiscard]] std::string leaf_words(const proof::Leaf& l) const {
    using proof::LeafRule;
    const std::string leaf = comment_formula(claim::to_text(*l.expression));
    if (is_identity(l)) return leaf + " is an atom already.";
    switch (l.rule) {
      case LeafRule::binomial_factorials:
        return leaf + " by factorials: the upper argument is not negative.";
      case LeafRule::binomial_interval:
        return leaf + " by a product of consecutive factors: the upper argument is arbitrary.";
      case LeafRule::factorial:
        return leaf + ", with its argument in normal form.";
      case LeafRule::reciprocal_factorial:
        return "1/" + leaf + ", with its argument in normal form.";
      case LeafRule::rising_factorials:
        return leaf + " by factorials: its first factor is positive.";
      case LeafRule::rising_reflected:
        return leaf +
               " by factorials: its first factor is not positive, so the signs are taken out.";
      case LeafRule::falling_factorials:
        return leaf + " by factorials: its first factor is not negative.";
      case LeafRule::rising_interval:
      case LeafRule::falling_interval:
        return leaf + " as a product of consecutive factors.";
      case LeafRule::power:
        break;
    }
    return leaf + " by powers of irreducible bases.";
  }

  [[nodiscard]] const proof::Atom* interval(const proof::Leaf& l) const {
    for (const auto& [a, e] : l.value.atoms)
      if (a.kind == proof::AtomKind::interval_product) return &a;
    return nullptr;
  }

  /// The leaf is an atom already, as written.
  [[nodiscard]] bool is_identity(const proof::Leaf& l) const {
    return same_term(leaf_text(l), product(l.value, scope_));
  }

  std::string leaf_script(const proof::Leaf& l) {
    if (l.rule == proof::LeafRule::power) return power_script(l);
    const claim::Expression& e = *l.expression;
    const std::string close = " by first [index | pq | pqf].\n  inj_norm. ring.\n";
    const auto rewrite = [&](const std::string& law) { return "  rewrite (" + law + ")" + close; };
    const proof::Affine a = affine_of(*e.children[0]);
    if (l.rule == proof::LeafRule::factorial || l.rule == proof::LeafRule::reciprocal_factorial)
      return rewrite(fmt::format("leaf_{} K {} {}",
                                 l.rule == proof::LeafRule::factorial ? "factorial" : "rfactorial",
                                 integer_text(proof_, *e.children[0]), z(a)));
    const proof::Affine b = affine_of(*e.children[1]);
    const std::string second = integer_text(proof_, *e.children[1]);
    const auto field = [&] { return field_text(proof_, *e.children[0]) + "%K"; };
    switch (l.rule) {
      case proof::LeafRule::binomial_factorials:
        if (!is_integer_argument(proof_, *e.children[0])) break;
        return rewrite(fmt::format("leaf_binomial K {} {} {} {} {}",
                                   integer_text(proof_, *e.children[0]), second, z(a), z(b),
                                   z(combine(a, -1, b, 0))));
      case proof::LeafRule::binomial_interval:
        return binomial_interval(l, second, b, rewrite);
      case proof::LeafRule::rising_factorials:
        return rewrite(fmt::format("leaf_rising_factorials K {} {} {} {} {}", field(), z(a), second,
                                   z(combine(a, 1, b, -1)), z(combine(a, 0, b, -1))));
      case proof::LeafRule::rising_reflected: {
        proof::Affine zero = a;
        for (long& c : zero.coefficients) c = 0;
        zero.constant = 0;
        const proof::Affine minus = combine(zero, -1, a, 0);
        return rewrite(fmt::format("leaf_rising_reflected K {} {} {} {} {} {}", field(), z(a),
                                   second, z(b), z(minus), z(combine(minus, -1, b, 0))));
      }
      case proof::LeafRule::falling_factorials:
        return rewrite(fmt::format("leaf_falling_factorials K {} {} {} {} {}", field(), z(a),
                                   second, z(a), z(combine(a, -1, b, 0))));
      case proof::LeafRule::rising_interval:
      case proof::LeafRule::falling_interval:
        if (const proof::Atom* ip = interval(l))
          return rewrite(fmt::format(
              "leaf_{}_ip K {} {} {} {} {}",
              l.rule == proof::LeafRule::rising_interval ? "rising" : "falling", field(),
              interval_base(*ip, scope_) + "%K", second, z(ip->low), z(ip->high)));
        break;
      default:
        break;
    }
    return "  values. inj_norm. field.\n";
  }

  template <typename Rewrite>
  std::string binomial_interval(const proof::Leaf& l, const std::string& second,
                                const proof::Affine& b, const Rewrite& rewrite) {
    const claim::Expression& upper = *l.expression->children[0];
    const proof::Atom* ip = interval(l);
    if (ip == nullptr) return "  values. inj_norm. field.\n";
    if (is_integer_argument(proof_, upper))
      return rewrite(fmt::format("leaf_binomial_ip K {} {} {} {} {}", integer_text(proof_, upper),
                                 second, z(ip->low), z(ip->high), z(b)));
    return rewrite(fmt::format("leaf_gbinomial_ip K {}%K {}%K {} {} {} {}",
                               field_text(proof_, upper), interval_base(*ip, scope_), second,
                               z(ip->low), z(ip->high), z(b)));
  }
};

}  // namespace sumwright::writers::coq
