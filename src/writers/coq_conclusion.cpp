// Ranges and ends, the recurrence of the sum, the right side, starting values and the induction.

#include <fmt/format.h>

#include <algorithm>

#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

using Origin = proof::BalanceTerm::Origin;

namespace {

class ConclusionText {
 public:
  explicit ConclusionText(const proof::Proof& proof)
      : proof_(proof), scope_(plain_scope(proof)), names_(names(proof)) {
    threshold_ = bracketed(std::to_string(proof.threshold));
    from_ = bracketed(std::to_string(proof.from));
    beyond_ = fmt::format("{} <= {} ->", threshold_, names_.n);
    equality_ = proof.claim->is_equality();
    coefficients_ = proof.order + 1;
  }

  std::string recurrence() {
    if (names_.index) {
      out_ += "(** ** Ranges: the sum at n, n + 1, ... over one common range *)\n\n";
      for (const proof::RangeStep& r : proof_.ranges) range(r);
    } else {
      coefficient_definitions();
    }
    remainder();
    return out_;
  }

  std::string conclusion() {
    out_ += "(** ** The right side against the remainder *)\n\n";
    balance();
    if (equality_) leading();
    for (const proof::InitialValue& v : proof_.initial) initial(v);
    final_lemma();
    return out_;
  }

 private:
  [[nodiscard]] std::string pieces(const std::string& name, std::size_t count,
                                   const std::string& arguments) const {
    std::string out;
    for (std::size_t j = 0; j < count; ++j)
      out += fmt::format("{}{}{} {}", out.empty() ? "" : " + ", name, j + 1, arguments);
    return out.empty() ? "inj 0" : out;
  }

  [[nodiscard]] std::string f_pieces(const std::string& n, const std::string& k) const {
    return pieces("F", proof_.summand.products.size(),
                  names_.index ? fmt::format("{}%Z {}", n, k) : n + "%Z");
  }

  void coefficient_definitions() {
    const Scope polynomials = polynomial_scope(proof_);
    const claim::Evidence& evidence = proof_.claim->evidence;
    if (equality_) {
      out_ += fmt::format("Definition a0 ({} : K) : K := inj 1.\n\n", names_.n);
      return;
    }
    // Without an index the coefficients are the claim's own.
    for (std::size_t i = 0; i < evidence.recurrence.size(); ++i)
      out_ += fmt::format("Definition a{} ({} : K) : K := ({})%K.\n", i, names_.n,
                          polynomial_coefficient(*evidence.recurrence[i], polynomials));
    out_ += "\n";
  }

  /// The author's coefficient as a polynomial in a variable of type K.
  [[nodiscard]] std::string polynomial_coefficient(const claim::Expression& e, const Scope&) const {
    std::string text = field_text(proof_, e);
    const std::string old = fmt::format("(inj {})", names_.n);
    for (std::size_t at = text.find(old); at != std::string::npos; at = text.find(old, at))
      text.replace(at, old.size(), names_.n);
    return text;
  }

  [[nodiscard]] std::string moved(proof::Affine form, long by) const {
    form.constant += by;
    return affine(form, scope_);
  }

  // ---------------------------------------------------------------- ranges

  void range(const proof::RangeStep& r) {
    const proof::Telescoping& t = *proof_.telescoping;
    const claim::Range& author = proof_.claim->sum.over[0];
    const std::string n = shifted(names_.n, r.shift);
    const std::string low = affine(t.low, scope_);
    const std::string high = affine(t.high, scope_);
    const std::string lo = at_shift(*author.low.value, r.shift);
    const std::string hi = at_shift(*author.high.value, r.shift);
    const std::string wide_low = moved(t.low, -static_cast<long>(r.low_points));
    const std::string wide_high = moved(t.high, static_cast<long>(r.high_points));
    const std::string f = fmt::format("(fun {} : Z => {})%K", names_.k, f_pieces(n, names_.k));
    std::string right = fmt::format("sum ({}) ({}) {}", low, high, f);
    std::string split;
    for (unsigned p = r.high_points; p >= 1; --p) {
      const std::string rest_high = moved(t.high, static_cast<long>(p) - 1);
      const std::string here = moved(t.high, static_cast<long>(p));
      split += fmt::format("  rewrite (sum_last K ({0}) ({1}) ({2}) ({1}) {3}) by lia.\n", wide_low, here,
                           rest_high, f);
      right += fmt::format(" + ({})", f_pieces(n, bracketed(here)));
    }
    for (unsigned p = r.low_points; p >= 1; --p) {
      const std::string rest_low = moved(t.low, 1 - static_cast<long>(p));
      const std::string here = moved(t.low, -static_cast<long>(p));
      split += fmt::format("  rewrite (sum_first K ({0}) ({1}) ({2}) ({0}) {3}) by lia.\n", here, high,
                           rest_low, f);
      right += fmt::format(" + ({})", f_pieces(n, bracketed(here)));
    }
    out_ += fmt::format("Lemma range_{0} ({1} : Z) : {2}\n  (left_side {3}%Z = {4})%K.\nProof.\n"
                        "  intros Hn. unfold left_side.\n"
                        "  transitivity (sum {5} {6} {7}).\n"
                        "  {{ apply (sum_ext K); [lia | lia |]. intros {8} Hk. "
                        "apply (summand_terms {3} {8}); index. }}\n",
                        r.shift, names_.n, beyond_, n, right, lo, hi, f, names_.k);
    if (r.below || r.above)
      out_ += fmt::format("  rewrite (sum_same K {0} {1} ({2}) ({3}) {4}).\n  2:{{ {5} }}\n  2:{{ {6} }}\n",
                          lo, hi, wide_low, wide_high, f, outside(r), outside(r));
    else
      out_ += fmt::format("  transitivity (sum ({0}) ({1}) {2}); [apply (sum_ext K); [lia | lia | "
                          "reflexivity]|].\n", wide_low, wide_high, f);
    out_ += split;
    out_ += "  cbv beta. ring.\nQed.\n\n";
  }

  /// The author's bound with n shifted, as text.
  [[nodiscard]] std::string at_shift(const claim::Expression& bound, unsigned by) const {
    const std::string text = integer_text(proof_, bound);
    if (by == 0) return text;
    return replace_word(text, names_.n, shifted(names_.n, by));
  }

  static std::string replace_word(const std::string& text, const std::string& word,
                                  const std::string& with) {
    std::string out;
    std::string token;
    const auto flush = [&] {
      out += token == word ? with : token;
      token.clear();
    };
    for (char ch : text) {
      if (std::isalnum(static_cast<unsigned char>(ch)) != 0 || ch == '_') {
        token += ch;
        continue;
      }
      flush();
      out += ch;
    }
    flush();
    return out;
  }

  /// A point in one range but not in the other: below or above, F vanishes or there is none.
  [[nodiscard]] std::string outside(const proof::RangeStep& r) const {
    return fmt::format("intros {} Hk Ho. destruct Ho as [Ho|Ho]; [{}|{}].", names_.k,
                       vanish(r.below, r.shift), vanish(r.above, r.shift));
  }

  [[nodiscard]] std::string vanish(const std::optional<proof::Vanishing>& v, unsigned shift) const {
    if (!v) return "exfalso; index";
    std::string unfold;
    std::string rewrites;
    const Scope scope = shift == 0 ? scope_ : with(scope_, 0, fmt::format("{} + {}", names_.n, shift));
    for (std::size_t j = 0; j < v->atoms.size(); ++j) {
      unfold += fmt::format("{}F{}", j == 0 ? "" : ", ", j + 1);
      const std::string argument = original_argument(v->atoms[j], j, shift, scope);
      rewrites += fmt::format("rewrite (rfact_neg K {}) by index; ", argument);
    }
    return fmt::format("unfold {}; {}ring", unfold, rewrites);
  }

  /// The text that the shifted atom's argument has after unfolding the piece.
  [[nodiscard]] std::string original_argument(const proof::Atom& image, std::size_t piece,
                                              unsigned shift, const Scope& scope) const {
    proof::Affine n;
    n.coefficients.assign(proof_.symbols.size(), 0);
    n.coefficients[0] = 1;
    n.constant = static_cast<long>(shift);
    for (const auto& [a, e] : proof_.summand.products[piece].atoms) {
      if (a.kind != proof::AtomKind::reciprocal_factorial) continue;
      const proof::Affine moved = substitute(a.argument, {{0, n}});
      if (moved.coefficients == image.argument.coefficients && moved.constant == image.argument.constant)
        return bracketed(affine(a.argument, scope));
    }
    return bracketed(affine(image.argument, scope_));
  }

  // ---------------------------------------------------------------- the recurrence of the sum

  [[nodiscard]] std::string scale(unsigned i) const {
    if (!names_.index) return fmt::format("a{} (inj {})", i, names_.n);
    return fmt::format("weight (inj {0}) * a{1} (inj {0})", names_.n, i);
  }

  [[nodiscard]] std::string combination(const std::string& side) const {
    std::string out;
    for (unsigned i = 0; i < coefficients_; ++i)
      out += fmt::format("{}{} * {} {}{}", out.empty() ? "" : " + ", scale(i), side,
                         shifted(names_.n, i), i == 0 ? "" : "%Z");
    return out;
  }

  [[nodiscard]] std::vector<std::string> explicit_texts() const {
    std::vector<std::string> out;
    if (!names_.index) {
      for (unsigned i = 0; i < coefficients_; ++i)
        out.push_back(fmt::format("{} * ({})", scale(i), f_pieces(shifted(names_.n, i), "")));
      return out;
    }
    const proof::Telescoping& t = *proof_.telescoping;
    for (const proof::RangeStep& r : proof_.ranges) {
      const std::string n = shifted(names_.n, r.shift);
      for (unsigned p = 1; p <= r.low_points; ++p)
        out.push_back(fmt::format("{} * ({})", scale(r.shift),
                                  f_pieces(n, bracketed(moved(t.low, -static_cast<long>(p))))));
      for (unsigned p = 1; p <= r.high_points; ++p)
        out.push_back(fmt::format("{} * ({})", scale(r.shift),
                                  f_pieces(n, bracketed(moved(t.high, static_cast<long>(p))))));
    }
    return out;
  }

  void remainder() {
    out_ += "(** ** The recurrence of the sum, with what remains at the ends *)\n\n";
    std::string body;
    const bool ends = names_.index && !proof_.telescoping->certificate.terms.empty();
    if (ends) {
      const std::string low = bracketed(affine(proof_.telescoping->low, scope_));
      const std::string high = bracketed(affine(proof_.telescoping->high, scope_));
      body = fmt::format("up (inj {0}) (inj {1}) * c (inj {0}) (inj {1} + inj 1) * base {0} {1} - "
                         "down (inj {0}) (inj {2}) * c (inj {0}) (inj {2}) * base {0} {2}",
                         names_.n, high, low);
    }
    for (const std::string& t : explicit_texts()) body += (body.empty() ? "" : "\n   + ") + t;
    if (body.empty()) body = "inj 0";
    out_ += fmt::format("Definition remainder ({} : Z) : K :=\n  ({})%K.\n\n", names_.n, body);
    std::string script;
    if (names_.index) {
      std::string summed;
      std::string more;
      for (const proof::RangeStep& r : proof_.ranges) {
        script += fmt::format("  rewrite (range_{} {} Hn).\n", r.shift, names_.n);
        summed += fmt::format("{}{} * sum ({}) ({}) (fun {} : Z => {})", summed.empty() ? "" : " + ",
                              scale(r.shift), affine(proof_.telescoping->low, scope_),
                              affine(proof_.telescoping->high, scope_), names_.k,
                              f_pieces(shifted(names_.n, r.shift), names_.k));
      }
      for (const std::string& t : explicit_texts()) more += " + " + t;
      script += fmt::format("  transitivity ({}{})%K; [ring|].\n  rewrite (summed {} Hn). unfold "
                            "remainder{}. ring.\n", summed, more, names_.n, ends ? "" : ", c");
    } else {
      script = "  unfold left_side, remainder.\n";
      for (unsigned i = 0; i < coefficients_; ++i)
        script += fmt::format("  rewrite (summand_terms {}) by lia.\n", shifted(names_.n, i));
      script += "  ring.\n";
    }
    out_ += fmt::format("Lemma left_recurrence ({0} : Z) : {1}\n  ({2} = remainder {0})%K.\nProof.\n"
                        "  intros Hn.\n{3}Qed.\n\n",
                        names_.n, beyond_, combination("left_side"), script);
  }

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
    out_ += fmt::format(
        "Lemma right_recurrence ({0} : Z) : {1}\n  ({2} = remainder {0})%K.\nProof.\n  intros Hn.\n{3}"
        "  assert (total : ({4} = inj 0)%K).\n  {{\n{5}  inj_norm. {6}. }}\n"
        "  symmetry. apply (eq_of_sub K). transitivity ({4})%K; [unfold remainder; ring|].\n"
        "  rewrite total. exact (inj_0 K).\nQed.\n\n",
        names_.n, beyond_, goal, rewrites, total,
        balance_rewrites(proof_, b, " " + names_.n + " Hn"), balance_closing(b));
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
    out_ += fmt::format("Lemma leading ({} : Z) : {}\n  ({} <> 0)%K.\nProof.\n  intros Hn.\n{}Qed.\n\n",
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
    out_ += fmt::format("Lemma {0} : ({1} = right_side {2})%K.\nProof.\n{3}"
                        "  assert (total : ({4} = inj 0)%K).\n  {{\n{5}  inj_norm. {6}. }}\n"
                        "  apply (eq_of_sub K). transitivity ({4})%K; [ring|].\n"
                        "  rewrite total. exact (inj_0 K).\nQed.\n\n",
                        value_name(v.at), statement, at, rewrites, total,
                        balance_rewrites(proof_, b, ""), balance_closing(b));
  }

  static std::string tag(long at) { return at < 0 ? fmt::format("m{}", -at) : std::to_string(at); }

  /// S at a literal n, term by term.
  void literal_sum(const proof::InitialValue& v, const proof::LiteralSum& s, std::string& out) const {
    const std::size_t i = static_cast<std::size_t>(&s - v.sums.data());
    const std::string at = bracketed(std::to_string(s.at));
    if (!names_.index) {
      out += fmt::format("Lemma literal_{}_{} : (left_side {} = {})%K.\nProof. unfold left_side. apply "
                         "summand_terms; lia. Qed.\n\n", tag(v.at), i, at, f_pieces(at, ""));
      return;
    }
    const claim::Range& author = proof_.claim->sum.over[0];
    const std::string lo = replace_word(integer_text(proof_, *author.low.value), names_.n, at);
    const std::string hi = replace_word(integer_text(proof_, *author.high.value), names_.n, at);
    const std::string f = fmt::format("(fun {} : Z => {})%K", names_.k, f_pieces(at, names_.k));
    std::string points;
    std::string right;
    for (long k = s.low; k <= s.high; ++k) {
      points += fmt::format("{}{}", points.empty() ? "" : "; ", k);
      right += fmt::format("{}({})", right.empty() ? "" : " + ",
                           f_pieces(at, bracketed(std::to_string(k))));
    }
    if (right.empty()) right = "inj 0";
    const std::string low = bracketed(std::to_string(s.low));
    const std::string high = bracketed(std::to_string(s.high));
    out += fmt::format("Lemma literal_{0}_{1} : (left_side {2} = {3})%K.\nProof.\n  unfold left_side.\n"
                       "  transitivity (sum {4} {5} {6}).\n"
                       "  {{ apply (sum_ext K); [lia | lia |]. intros {7} Hk. apply (summand_terms {2} {7}); "
                       "index. }}\n",
                       tag(v.at), i, at, right, lo, hi, f, names_.k);
    if (s.below || s.above)
      out += fmt::format("  rewrite (sum_same K {0} {1} {2} {3} {4}).\n  2:{{ {5} }}\n  2:{{ {5} }}\n", lo,
                         hi, low, high, f, literal_outside(s));
    else
      out += fmt::format("  transitivity (sum {0} {1} {2}); [apply (sum_ext K); [index | index | "
                         "reflexivity]|].\n", low, high, f);
    if (s.high < s.low)
      out += fmt::format("  rewrite (sum_empty K {} {}) by lia. rewrite (inj_0 K). reflexivity.\nQed.\n\n",
                         low, high);
    else
      out += fmt::format("  rewrite (sum_explicit K {} {} [{}] {}) by list_range. sum_terms_cbn. "
                         "cbv beta. ring.\nQed.\n\n", low, high, points, f);
  }

  [[nodiscard]] std::string literal_outside(const proof::LiteralSum& s) const {
    return fmt::format("intros {} Hk Ho. destruct Ho as [Ho|Ho]; [{}|{}].", names_.k,
                       literal_vanish(s.below, s.at), literal_vanish(s.above, s.at));
  }

  [[nodiscard]] std::string literal_vanish(const std::optional<proof::Vanishing>& v, long at) const {
    if (!v) return "exfalso; index";
    std::string unfold;
    std::string rewrites;
    const Scope scope = with(scope_, 0, std::to_string(at));
    proof::Affine n;
    n.coefficients.assign(proof_.symbols.size(), 0);
    n.constant = at;
    for (std::size_t j = 0; j < v->atoms.size(); ++j) {
      unfold += fmt::format("{}F{}", j == 0 ? "" : ", ", j + 1);
      for (const auto& [a, e] : proof_.summand.products[j].atoms) {
        if (a.kind != proof::AtomKind::reciprocal_factorial) continue;
        const proof::Affine moved = substitute(a.argument, {{0, n}});
        if (moved.coefficients != v->atoms[j].argument.coefficients ||
            moved.constant != v->atoms[j].argument.constant)
          continue;
        rewrites += fmt::format("rewrite (rfact_neg K {}) by index; ",
                                bracketed(affine(a.argument, scope)));
        break;
      }
    }
    return fmt::format("unfold {}; {}ring", unfold, rewrites);
  }

  // ---------------------------------------------------------------- conclusion

  void final_lemma() {
    out_ += "(** ** Conclusion *)\n\n";
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
    out_ += fmt::format("Lemma initial ({0} : Z) : {1} <= {0} <= {2} -> left_side {0} = right_side {0}.\n"
                        "Proof.\n  intros Hn.\n{3}Qed.\n\n",
                        names_.n, from_, bracketed(std::to_string(last)),
                        cases(proof_.from, last, "  exfalso; lia.\n"));
    out_ += fmt::format("Lemma from_threshold : forall {0} : Z, {1} <= {0} -> left_side {0} = right_side {0}.\n"
                        "Proof.\n  apply (same_recurrence K [{2}] {1} remainder).\n"
                        "  - exact left_recurrence.\n  - exact right_recurrence.\n  - exact leading.\n"
                        "  - intros {0} Hn. apply initial. cbn [length Z.of_nat Pos.of_succ_nat Pos.succ] in Hn. "
                        "lia.\nQed.\n\n",
                        names_.n, threshold_, list);
    out_ += fmt::format("Lemma conclusion ({0} : Z) : {1} <= {0} -> left_side {0} = right_side {0}.\nProof.\n"
                        "  intros Hn. destruct (Z_lt_le_dec {0} {2}) as [Hs|Hs].\n"
                        "  - apply initial. lia.\n  - exact (from_threshold {0} Hs).\nQed.\n\n",
                        names_.n, from_, threshold_);
  }

  [[nodiscard]] std::string claimed(const std::string& side) const {
    const claim::Evidence& evidence = proof_.claim->evidence;
    std::string left;
    for (std::size_t i = 0; i < evidence.recurrence.size(); ++i)
      left += fmt::format("{}{} * {} {}{}", left.empty() ? "" : " + ",
                          field_text(proof_, *evidence.recurrence[i]), side,
                          shifted(names_.n, static_cast<unsigned>(i)), i == 0 ? "" : "%Z");
    return left;
  }

  void recurrence_lemma() {
    std::string unfold = names_.index ? "weight" : "";
    for (unsigned i = 0; i < coefficients_; ++i)
      unfold += fmt::format("{}a{}", unfold.empty() ? "" : ", ", i);
    std::string script;
    if (names_.index) {
      script = fmt::format("  apply (mul_cancel K (weight (inj {0}))).\n  - unfold weight. {1}.\n"
                           "  - rewrite (right_recurrence {0} Hs), <- (left_recurrence {0} Hs).\n"
                           "    unfold {2}. inj_norm. ring.\n",
                           names_.n, nonzero_tactic(proof_, proof_.telescoping->weight, scope_), unfold);
    } else {
      script = fmt::format("  rewrite (right_recurrence {0} Hs), <- (left_recurrence {0} Hs).\n"
                           "  unfold {1}. inj_norm. ring.\n", names_.n, unfold);
    }
    out_ += fmt::format("Lemma from_threshold ({0} : Z) : {1} <= {0} ->\n  ({2} = right_side {0})%K.\nProof.\n"
                        "  intros Hs.\n{3}Qed.\n\n",
                        names_.n, threshold_, claimed("left_side"), script);
    std::string small;
    for (long v = proof_.from; v < proof_.threshold; ++v) small += value_case(v);
    out_ += fmt::format("Lemma conclusion ({0} : Z) : {1} <= {0} ->\n  ({2} = right_side {0})%K.\nProof.\n"
                        "  intros Hn. destruct (Z_lt_le_dec {0} {3}) as [Hs|Hs]; "
                        "[|exact (from_threshold {0} Hs)].\n{4}  exfalso; lia.\nQed.\n\n",
                        names_.n, from_, claimed("left_side"), threshold_, small);
  }

  [[nodiscard]] std::string value_case(long v) const {
    std::string unfold;
    for (unsigned i = 0; i < coefficients_; ++i) unfold += fmt::format("{}a{}", i == 0 ? "" : ", ", i);
    return fmt::format("  destruct (Z.eq_dec {0} {1}) as [->|]; [rewrite <- {2}; unfold {3}; cbn [Z.add]; "
                       "inj_norm; ring|].\n",
                       names_.n, bracketed(std::to_string(v)), value_name(v), unfold);
  }

  const proof::Proof& proof_;
  Scope scope_;
  Names names_;
  std::string threshold_;
  std::string from_;
  std::string beyond_;
  bool equality_ = false;
  unsigned coefficients_ = 1;
  std::string out_;
};

}  // namespace

std::string recurrence_section(const proof::Proof& proof) { return ConclusionText(proof).recurrence(); }
std::string conclusion_section(const proof::Proof& proof) { return ConclusionText(proof).conclusion(); }

}  // namespace sumwright::writers::coq
