// The right side against the remainder, starting values and the induction.

#include <fmt/format.h>

#include "writers/coq_comments.hpp"
#include "writers/coq_section_text.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

using Origin = proof::BalanceTerm::Origin;

namespace {

class ConclusionText : private SectionText {
 public:
  explicit ConclusionText(const proof::Proof& proof) : SectionText(proof) {}

  std::string conclusion() {
    out_ += heading("The right side against the remainder");
    balance();
    if (equality_) leading();
    for (const proof::InitialValue& v : proof_.initial) initial(v);
    final_lemma();
    return out_;
  }

 private:
  // ---------------------------------------------------------------- the right side

  void balance() {
    const proof::Balance& b = equality_ ? *proof_.closed_recurrence : *proof_.ends;
    std::vector<std::string> texts;
    out_ += balance_lemmas(proof_, b, beyond_, texts);
    std::string total;
    for (const std::string& t : texts) total += (total.empty() ? "(" : " + (") + t + ")";
    if (total.empty()) total = "inj 0";
    std::string rewrites;
    std::string goal;
    if (equality_) {
      for (unsigned i = 0; i < coefficients_; ++i)
        rewrites += fmt::format("  rewrite (right_side_terms {}) by lia.\n", shifted(names_.n, i));
      goal = combination("right_side");
    } else {
      rewrites = fmt::format("  rewrite (right_side_terms {}) by lia.\n", names_.n);
      goal = names_.index ? fmt::format("weight (inj {0}) * right_side {0}", names_.n)
                          : "right_side " + names_.n;
    }
    out_ += note(equality_ ? "The right side satisfies the same recurrence: class by class, the "
                             "polynomials add up to 0."
                           : "What remains is the claimed right side: class by class, the "
                             "polynomials add up to 0.");
    out_ += fmt::format(
        "Lemma right_recurrence ({0} : Z) : {1}\n  ({2} = remainder {0})%K.\nProof.\n  intros "
        "Hn.\n{3}"
        "  assert (total : ({4} = inj 0)%K).\n  {{ {5}inj_norm. {6}. }}\n"
        "  symmetry. apply (eq_of_sub K). transitivity ({4})%K; [unfold remainder; ring|].\n"
        "  exact (eq_trans total (inj_0 K)).\nQed.\n\n",
        names_.n, beyond_, goal, rewrites, total,
        inside(balance_rewrites(proof_, b, " " + names_.n + " Hn")), balance_closing(b));
  }

  /// Lines of a script after an opening brace.
  static std::string inside(const std::string& lines) {
    std::string out;
    for (const char ch : lines) out += ch == '\n' ? "\n  " : std::string(1, ch);
    return out.empty() ? out : out.substr(2) + "  ";
  }

  void leading() {
    std::string text = scale(coefficients_ - 1);
    std::string script = "  unfold ";
    script += names_.index ? "weight, " : "";
    script += fmt::format("a{}.\n", coefficients_ - 1);
    if (names_.index) {
      const proof::Nonzero& w = proof_.telescoping->weight;
      script += fmt::format("  apply (mul_neq0 K).\n  - {}.\n  - {}.\n",
                            nonzero_tactic(proof_, w, scope_),
                            nonzero_tactic(proof_, *proof_.leading, scope_));
    } else {
      script += "  apply inj_neq0; lia.\n";
    }
    out_ += note("The leading coefficient is not 0, so the recurrence determines the next value.");
    out_ +=
        fmt::format("Lemma leading ({} : Z) : {}\n  ({} <> 0)%K.\nProof.\n  intros Hn.\n{}Qed.\n\n",
                    names_.n, beyond_, text, script);
  }

  // ---------------------------------------------------------------- starting values

  [[nodiscard]] std::string value_name(long at) const {
    return at < 0 ? fmt::format("value_minus_{}", -at) : fmt::format("value_{}", at);
  }

  void initial(const proof::InitialValue& v) {
    std::vector<std::string> texts;
    proof::Balance b = v.balance;
    out_ += balance_lemmas(proof_, b, "", texts);
    std::string script;
    for (const proof::LiteralSum& s : v.sums) literal_sum(v, s, script);
    std::string total;
    for (const std::string& t : texts) total += (total.empty() ? "(" : " + (") + t + ")";
    if (total.empty()) total = "inj 0";
    const std::string at = bracketed(std::to_string(v.at));
    std::string statement;
    std::string rewrites;
    for (std::size_t i = 0; i < v.sums.size(); ++i) {
      const std::string where = bracketed(std::to_string(v.sums[i].at));
      rewrites += fmt::format("  rewrite literal_{}_{}.\n", tag(v.at), i);
      statement += equality_ ? fmt::format("left_side {}", where)
                             : fmt::format("{}a{} (inj {}) * left_side {}",
                                           statement.empty() ? "" : " + ", i, at, where);
    }
    rewrites += fmt::format("  rewrite (right_side_terms {}) by lia.\n", at);
    out_ += script;
    out_ += note(fmt::format("{} at {} = {}.",
                             equality_ ? "The two sides are equal" : "The recurrence holds",
                             names_.n, v.at));
    out_ += fmt::format(
        "Lemma {0} : ({1} = right_side {2})%K.\nProof.\n{3}"
        "  assert (total : ({4} = inj 0)%K).\n  {{ {5}inj_norm. {6}. }}\n"
        "  apply (eq_of_sub K). transitivity ({4})%K; [ring|].\n"
        "  exact (eq_trans total (inj_0 K)).\nQed.\n\n",
        value_name(v.at), statement, at, rewrites, total, inside(balance_rewrites(proof_, b, "")),
        balance_closing(b));
  }

  static std::string tag(long at) { return at < 0 ? fmt::format("m{}", -at) : std::to_string(at); }

  /// S at a literal n, term by term.
  void literal_sum(const proof::InitialValue& v, const proof::LiteralSum& s,
                   std::string& out) const {
    const std::size_t i = static_cast<std::size_t>(&s - v.sums.data());
    const std::string at = bracketed(std::to_string(s.at));
    out += note(fmt::format("S({}) term by term.", s.at));
    if (!names_.index) {
      out += fmt::format(
          "Lemma literal_{}_{} : (left_side {} = {})%K.\nProof. unfold left_side. apply "
          "summand_terms; lia. Qed.\n\n",
          tag(v.at), i, at, f_pieces(at, ""));
      return;
    }
    const claim::Range& author = proof_.summed_range();
    const std::string lo = replace_word(integer_text(proof_, *author.low.value), names_.n, at);
    const std::string hi = replace_word(integer_text(proof_, *author.high.value), names_.n, at);
    const std::string f = fmt::format("(fun {} : Z => {})%K", names_.k, f_pieces(at, names_.k));
    std::string points;
    std::string right;
    const auto point = [&](long offset) {
      return bracketed(affine(s.point(proof_.symbols.size(), offset), scope_));
    };
    for (long k = s.low; k <= s.high; ++k) {
      points += (points.empty() ? "" : "; ") + point(k);
      right += fmt::format("{}({})", right.empty() ? "" : " + ", f_pieces(at, point(k)));
    }
    if (right.empty()) right = "inj 0";
    const std::string low = point(s.low);
    const std::string high = point(s.high);
    out += fmt::format(
        "Lemma literal_{0}_{1} : (left_side {2} = {3})%K.\nProof.\n  unfold left_side.\n"
        "  transitivity (sum {4} {5} {6}).\n"
        "  {{ apply (sum_ext K); [lia | lia |]. intros {7} Hk. apply (summand_terms {2} {7}); "
        "index. }}\n",
        tag(v.at), i, at, right, lo, hi, f, names_.k);
    if (s.below || s.above)
      out +=
          fmt::format("  rewrite (sum_same K {0} {1} {2} {3} {4}).\n  2:{{ {5} }}\n  2:{{ {5} }}\n",
                      lo, hi, low, high, f, literal_outside(s));
    else
      out += fmt::format(
          "  transitivity (sum {0} {1} {2}); [apply (sum_ext K); [index | index | "
          "reflexivity]|].\n",
          low, high, f);
    if (s.high < s.low)
      out += fmt::format(
          "  rewrite (sum_empty K {} {}) by lia. rewrite (inj_0 K). reflexivity.\nQed.\n\n", low,
          high);
    else
      out += fmt::format(
          "  rewrite (sum_explicit K {} {} [{}] {}) by list_range. sum_terms_cbn. "
          "cbv beta. ring.\nQed.\n\n",
          low, high, points, f);
  }

  [[nodiscard]] std::string literal_outside(const proof::LiteralSum& s) const {
    const Scope scope = with(scope_, 0, std::to_string(s.at));
    const proof::Affine n = running(0, s.at);
    return fmt::format("intros {} Hk Ho. destruct Ho as [Ho|Ho]; [{}|{}].", names_.k,
                       vanish(s.below, n, scope), vanish(s.above, n, scope));
  }

  // ---------------------------------------------------------------- conclusion

  void final_lemma() {
    out_ += heading("Conclusion");
    if (equality_)
      equality_lemma();
    else
      recurrence_lemma();
  }

  /// destruct on n = v for each literal value, the rest by `rest`.
  [[nodiscard]] std::string cases(long first, long last, const std::string& rest) const {
    std::string out;
    for (long v = first; v <= last; ++v)
      out += fmt::format("  destruct (Z.eq_dec {0} {1}) as [->|]; [exact {2}|].\n", names_.n,
                         bracketed(std::to_string(v)), value_name(v));
    return out + rest;
  }

  void equality_lemma() {
    const long last = proof_.threshold + static_cast<long>(coefficients_) - 2;
    std::string list;
    for (unsigned i = 0; i < coefficients_; ++i)
      list += fmt::format("{}fun {} : Z => ({})%K", i == 0 ? "" : "; ", names_.n, scale(i));
    out_ += note(proof_.from <= last
                     ? "The values with which the induction begins, and those before the threshold."
                     : "The recurrence has order 0: no values are needed to begin with.");
    out_ += fmt::format(
        "Lemma initial ({0} : Z) : {1} <= {0} <= {2} -> left_side {0} = right_side {0}.\n"
        "Proof.\n  intros Hn.\n{3}Qed.\n\n",
        names_.n, from_, bracketed(std::to_string(last)),
        cases(proof_.from, last, "  exfalso; lia.\n"));
    out_ +=
        note("Two sequences with one recurrence and the same first values are equal (induction).");
    out_ += fmt::format(
        "Lemma from_threshold : forall {0} : Z, {1} <= {0} -> left_side {0} = right_side {0}.\n"
        "Proof.\n  apply (same_recurrence K [{2}] {1} remainder).\n"
        "  - exact left_recurrence.\n  - exact right_recurrence.\n  - exact leading.\n"
        "  - intros {0} Hn. apply initial. cbn [length Z.of_nat Pos.of_succ_nat Pos.succ] in Hn. "
        "lia.\nQed.\n\n",
        names_.n, threshold_, list);
    out_ += note("The values below the threshold one by one, the others by induction.");
    out_ += fmt::format(
        "Lemma conclusion ({0} : Z) : {1} <= {0} -> left_side {0} = right_side {0}.\nProof.\n"
        "  intros Hn. destruct (Z_lt_le_dec {0} {2}) as [Hs|Hs].\n"
        "  - apply initial. lia.\n  - exact (from_threshold {0} Hs).\nQed.\n\n",
        names_.n, from_, threshold_);
  }

  [[nodiscard]] std::string claimed(const std::string& side) const {
    const claim::Evidence& evidence = proof_.claim->evidence;
    std::string left;
    for (std::size_t i = 0; i < evidence.recurrence.size(); ++i)
      left += fmt::format("{}{} * {} {}", left.empty() ? "" : " + ",
                          field_text(proof_, *evidence.recurrence[i]), side,
                          shifted(names_.n, static_cast<unsigned>(i)));
    return left;
  }

  void recurrence_lemma() {
    std::string unfold = names_.index ? "weight" : "";
    for (unsigned i = 0; i < coefficients_; ++i)
      unfold += fmt::format("{}a{}", unfold.empty() ? "" : ", ", i);
    std::string script;
    if (names_.index) {
      script = fmt::format(
          "  apply (mul_cancel K (weight (inj {0}))).\n  - unfold weight. {1}.\n"
          "  - rewrite (right_recurrence {0} Hs), <- (left_recurrence {0} Hs).\n"
          "    unfold {2}. inj_norm. ring.\n",
          names_.n, nonzero_tactic(proof_, proof_.telescoping->weight, scope_), unfold);
    } else {
      script = fmt::format(
          "  rewrite (right_recurrence {0} Hs), <- (left_recurrence {0} Hs).\n"
          "  unfold {1}. inj_norm. ring.\n",
          names_.n, unfold);
    }
    out_ += note("The claimed recurrence, where the argument holds.");
    out_ += fmt::format(
        "Lemma from_threshold ({0} : Z) : {1} <= {0} ->\n  ({2} = right_side {0})%K.\nProof.\n"
        "  intros Hs.\n{3}Qed.\n\n",
        names_.n, threshold_, claimed("left_side"), script);
    std::string small;
    for (long v = proof_.from; v < proof_.threshold; ++v) small += value_case(v);
    out_ += note("The values below the threshold one by one.");
    out_ += fmt::format(
        "Lemma conclusion ({0} : Z) : {1} <= {0} ->\n  ({2} = right_side {0})%K.\nProof.\n"
        "  intros Hn. destruct (Z_lt_le_dec {0} {3}) as [Hs|Hs]; "
        "[|exact (from_threshold {0} Hs)].\n{4}  exfalso; lia.\nQed.\n\n",
        names_.n, from_, claimed("left_side"), threshold_, small);
  }

  [[nodiscard]] std::string value_case(long v) const {
    std::string unfold;
    for (unsigned i = 0; i < coefficients_; ++i)
      unfold += fmt::format("{}a{}", i == 0 ? "" : ", ", i);
    std::string shifts;
    for (unsigned i = 1; i < coefficients_; ++i)
      shifts += fmt::format("change ({} + {}) with ({}); ", v, i, v + static_cast<long>(i));
    return fmt::format(
        "  destruct (Z.eq_dec {0} {1}) as [->|]; [{4}rewrite <- {2}; unfold {3}; inj_norm; "
        "ring|].\n",
        names_.n, bracketed(std::to_string(v)), value_name(v), unfold, shifts);
  }
};

}  // namespace

std::string conclusion_section(const proof::Proof& proof) {
  return ConclusionText(proof).conclusion();
}

}  // namespace sumwright::writers::coq
