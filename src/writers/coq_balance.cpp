// Balances: one lemma for each term (a polynomial times its base term, or 0), then one line of
// algebra.

#include <fmt/format.h>

#include "writers/coq_comments.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

using Origin = proof::BalanceTerm::Origin;

namespace {

/// The balance's id as an identifier: a minus sign becomes "m".
std::string identifier(std::string id) {
  for (char& ch : id)
    if (ch == '-') ch = 'm';
  return id;
}

class BalanceText {
 public:
  BalanceText(const proof::Proof& proof, const proof::Balance& balance, std::string region)
      : proof_(proof),
        balance_(balance),
        region_(std::move(region)),
        scope_(plain_scope(proof)),
        names_(names(proof)) {
    literal_ = balance.id.starts_with("initial");
  }

  std::string run(std::vector<std::string>& texts) {
    bases();
    for (std::size_t i = 0; i < balance_.terms.size(); ++i) {
      texts.push_back(written(balance_.terms[i]));
      lemma(i, texts.back());
    }
    return out_;
  }

 private:
  void bases() {
    for (const proof::BalanceGroup& g : balance_.groups)
      out_ += note("A class of similar terms: each is a polynomial times this.") +
              fmt::format("Definition {} ({} : Z) : K :=\n  ({})%K.\n\n", g.base.id, names_.n,
                          product(g.base.product, scope_));
  }

  [[nodiscard]] std::string at(const proof::Affine& point) const {
    return bracketed(affine(point, scope_));
  }

  [[nodiscard]] std::string scale(unsigned i) const {
    if (!proof_.telescoping) return fmt::format("a{} (inj {})", i, names_.n);
    return fmt::format("weight (inj {0}) * a{1} (inj {0})", names_.n, i);
  }

  [[nodiscard]] std::string piece_at(const proof::BalanceTerm& t, const std::string& n) const {
    if (names_.index) return fmt::format("F{} {} {}", t.piece + 1, n, at(t.point));
    return fmt::format("F{} {}", t.piece + 1, n);
  }

  /// The term as it stands in the recurrence.
  [[nodiscard]] std::string written(const proof::BalanceTerm& t) const {
    const std::string& n = names_.n;
    switch (t.origin) {
      case Origin::upper_end:
        return "right_end " + n;
      case Origin::lower_end:
        return "- left_end " + n;
      case Origin::explicit_point:
        return fmt::format("{} * {}", scale(t.shift), piece_at(t, shifted(n, t.shift)));
      case Origin::right_side:
        if (literal_) return fmt::format("- b{} {}", t.piece + 1, point_of_value(t));
        return fmt::format(
            "- ({}b{} {})",
            proof_.telescoping ? fmt::format("weight (inj {}) * ", n) : std::string(), t.piece + 1,
            n);
      case Origin::closed_form:
        if (literal_) return fmt::format("- C{} {}", t.piece + 1, point_of_value(t));
        return fmt::format("- ({} * C{} {})", scale(t.shift), t.piece + 1, shifted(n, t.shift));
      case Origin::value:
        break;
    }
    const std::string where =
        bracketed(std::to_string(std::stol(balance_.id.substr(8)) + static_cast<long>(t.shift)));
    std::string f = names_.index ? fmt::format("F{} {} {}", t.piece + 1, where, at(t.point))
                                 : fmt::format("F{} {}", t.piece + 1, where);
    if (proof_.claim->is_equality()) return f;
    return fmt::format("a{} (inj {}) * {}", t.shift, point_of_value(t), f);
  }

  [[nodiscard]] std::string point_of_value(const proof::BalanceTerm&) const {
    return bracketed(balance_.id.substr(8));
  }

  [[nodiscard]] proof::Affine constant(long value) const {
    proof::Affine out;
    out.coefficients.assign(proof_.symbols.size(), 0);
    out.constant = value;
    return out;
  }

  /// What the definition behind the term is unfolded to.
  [[nodiscard]] Unfolded unfolded(const proof::BalanceTerm& t) const {
    Unfolded u{nullptr, {}, scope_};
    const long value = literal_ ? std::stol(balance_.id.substr(8)) : 0;
    proof::Affine n = constant(static_cast<long>(t.shift));
    n.coefficients[0] = 1;
    std::string n_text = t.shift == 0 ? names_.n : fmt::format("{} + {}", names_.n, t.shift);
    if (literal_) {
      const long where = value + (t.origin == Origin::value ? static_cast<long>(t.shift) : 0);
      n = constant(where);
      n_text = std::to_string(where);
    }
    switch (t.origin) {
      case Origin::upper_end:
      case Origin::lower_end:
        u.original = &proof_.telescoping->base.product;
        u.by = {{1, t.point}};
        u.scope = with(scope_, 1, affine(t.point, scope_));
        return u;
      case Origin::right_side:
        u.original = &proof_.right_side->products[t.piece];
        break;
      case Origin::closed_form:
        u.original = &proof_.closed->products[t.piece];
        break;
      default:
        u.original = &proof_.summand.products[t.piece];
        break;
    }
    if (t.shift != 0 || literal_) {
      u.by[0] = n;
      u.scope = with(u.scope, 0, n_text);
    }
    if (names_.index && (t.origin == Origin::explicit_point || t.origin == Origin::value)) {
      u.by[1] = t.point;
      // Simultaneous: the point is already written in n.
      u.scope = with(u.scope, 1, affine(t.point, scope_));
    }
    return u;
  }

  [[nodiscard]] std::string definitions(const proof::BalanceTerm& t) const {
    const std::string factors =
        proof_.telescoping ? fmt::format("weight, a{}, ", t.shift) : fmt::format("a{}, ", t.shift);
    switch (t.origin) {
      case Origin::upper_end:
        return "right_end, up, c, base";
      case Origin::lower_end:
        return "left_end, down, c, base";
      case Origin::explicit_point:
        return factors + fmt::format("F{}", t.piece + 1);
      case Origin::closed_form:
        return (literal_ ? std::string() : factors) + fmt::format("C{}", t.piece + 1);
      case Origin::right_side:
        return (proof_.telescoping && !literal_ ? std::string("weight, ") : std::string()) +
               fmt::format("b{}", t.piece + 1);
      case Origin::value:
        return (proof_.claim->is_equality() ? std::string() : fmt::format("a{}, ", t.shift)) +
               fmt::format("F{}", t.piece + 1);
    }
    return "";
  }

  void lemma(std::size_t i, const std::string& text) {
    const proof::BalanceTerm& t = balance_.terms[i];
    std::string right = "inj 0";
    std::string script =
        fmt::format("  intros{}. unfold {}.\n", region_.empty() ? "" : " Hn", definitions(t));
    if (t.zero) {
      script += zero_script(t);
    } else {
      const proof::BalanceGroup& g = balance_.groups[t.group];
      right = fmt::format("{} * {} {}", enclosed(factored(t.instance->right.coefficient, scope_)),
                          g.base.id, literal_ ? "0" : names_.n);
      script = fmt::format("  intros{}. unfold {}, {}.\n", region_.empty() ? "" : " Hn",
                           definitions(t), g.base.id);
      script += instance_tactics(proof_, *t.instance, unfolded(t), {}, scope_);
    }
    out_ += note(words(t));
    out_ += fmt::format("Lemma {}_term_{} {}: {}\n  ({} = {})%K.\nProof.\n{}Qed.\n\n",
                        identifier(balance_.id), i + 1,
                        literal_ ? std::string() : fmt::format("({} : Z) ", names_.n), region_,
                        text, right, script);
  }

  /// What the lemma says, for readers.
  [[nodiscard]] std::string words(const proof::BalanceTerm& t) const {
    const std::string text = comment_formula(t.text);
    if (t.zero_factor)
      return text +
             ": 0, for a factor is 0, and where it is not, the term is over (-m)! with m > 0.";
    if (t.zero_atom) return text + ": 0, for it is over (-m)! with m > 0.";
    if (t.zero) return text + ": 0, for a factor of its polynomial vanishes.";
    return fmt::format("{}: a polynomial times {}.", text, balance_.groups[t.group].base.id);
  }

  std::string zero_script(const proof::BalanceTerm& t) const {
    const std::string start = respell(unfolded(t), scope_);
    if (!t.zero_atom) return start + "  inj_norm. " + zero_closing(t);
    const std::string by_atom = fmt::format("rewrite (rfact_neg K {}) by lia. ring.\n",
                                            bracketed(affine(t.zero_atom->argument, scope_)));
    if (!t.zero_factor) return start + "  " + by_atom;
    return start +
           fmt::format("  destruct (Z.eq_dec {} 0) as [E|E].\n  - {}  - ",
                       bracketed(affine(*t.zero_factor, scope_)), by_factor(*t.zero_factor)) +
           by_atom;
  }

  /// The factor is 0: one of its symbols is written through the others.
  [[nodiscard]] std::string by_factor(const proof::Affine& factor) const {
    std::size_t symbol = 0;
    while (std::abs(factor.coefficients[symbol]) != 1) ++symbol;
    proof::Affine rest = factor;
    rest.coefficients[symbol] = 0;
    if (factor.coefficients[symbol] == 1) {
      for (long& c : rest.coefficients) c = -c;
      rest.constant = -rest.constant;
    }
    proof::Affine alone = constant(0);
    alone.coefficients[symbol] = 1;
    return fmt::format("assert (V : {} = {}) by lia. rewrite !V. inj_norm. ring.\n",
                       affine(alone, scope_), affine(rest, scope_));
  }

  [[nodiscard]] std::string zero_closing(const proof::BalanceTerm&) const { return "ring.\n"; }

  const proof::Proof& proof_;
  const proof::Balance& balance_;
  std::string region_;
  Scope scope_;
  Names names_;
  bool literal_ = false;
  std::string out_;
};

}  // namespace

std::string balance_lemmas(const proof::Proof& proof, const proof::Balance& balance,
                           const std::string& region, std::vector<std::string>& term_texts) {
  return BalanceText(proof, balance, region).run(term_texts);
}

std::string balance_rewrites(const proof::Proof&, const proof::Balance& balance,
                             const std::string& arguments) {
  std::string out;
  for (std::size_t i = 0; i < balance.terms.size(); ++i)
    out += fmt::format("  rewrite ({}_term_{}{}).\n", identifier(balance.id), i + 1, arguments);
  return out;
}

std::string balance_closing(const proof::Balance& balance) {
  bool fraction = false;
  for (const proof::BalanceTerm& t : balance.terms)
    fraction = fraction || (t.instance && has_fraction(t.instance->right.coefficient));
  return fraction ? "field" : "ring";
}

}  // namespace sumwright::writers::coq
