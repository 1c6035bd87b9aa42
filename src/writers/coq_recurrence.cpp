// Ranges and ends: the sum at n, n + 1, ... over one common range, explicit points, and the
// recurrence of the sum with what remains.

#include <fmt/format.h>

#include "writers/coq_comments.hpp"
#include "writers/coq_section_text.hpp"
#include "writers/coq_statement.hpp"

namespace sumwright::writers::coq {
namespace {

class RecurrenceText : private SectionText {
 public:
  explicit RecurrenceText(const proof::Proof& proof) : SectionText(proof) {}

  std::string run() {
    if (names_.index) {
      out_ += heading("Ranges: the sum at n, n + 1, ... over one common range");
      for (const proof::RangeStep& r : proof_.ranges) range(r);
    } else {
      coefficient_definitions();
    }
    remainder();
    return out_;
  }

 private:
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
    const claim::Range& author = proof_.summed_range();
    const std::string n = shifted(names_.n, r.shift);
    const std::string low = bracketed(affine(t.low, scope_));
    const std::string high = bracketed(affine(t.high, scope_));
    const std::string lo = at_shift(*author.low.value, r.shift);
    const std::string hi = at_shift(*author.high.value, r.shift);
    const std::string wide_low = bracketed(moved(t.low, -static_cast<long>(r.low_points)));
    const std::string wide_high = bracketed(moved(t.high, static_cast<long>(r.high_points)));
    const std::string f = fmt::format("(fun {} : Z => {})%K", names_.k, f_pieces(n, names_.k));
    std::string right = fmt::format("sum {} {} {}", low, high, f);
    std::string split;
    for (unsigned p = r.high_points; p >= 1; --p) {
      const std::string rest_high = bracketed(moved(t.high, static_cast<long>(p) - 1));
      const std::string here = bracketed(moved(t.high, static_cast<long>(p)));
      split += fmt::format("  rewrite (sum_last K {0} {1} {2} {1} {3}) by lia.\n", wide_low, here,
                           rest_high, f);
      right += fmt::format(" + ({})", f_pieces(n, here));
    }
    for (unsigned p = r.low_points; p >= 1; --p) {
      const std::string rest_low = bracketed(moved(t.low, 1 - static_cast<long>(p)));
      const std::string here = bracketed(moved(t.low, -static_cast<long>(p)));
      split += fmt::format("  rewrite (sum_first K {0} {1} {2} {0} {3}) by lia.\n", here, high,
                           rest_low, f);
      right += fmt::format(" + ({})", f_pieces(n, here));
    }
    out_ += note(range_words(r));
    out_ += fmt::format(
        "Lemma range_{0} ({1} : Z) : {2}\n  (left_side {3} = {4})%K.\nProof.\n"
        "  intros Hn. unfold left_side.\n"
        "  transitivity (sum {5} {6} {7}).\n"
        "  {{ apply (sum_ext K); [lia | lia |]. intros {8} Hk. "
        "apply (summand_terms {3} {8}); index. }}\n",
        r.shift, names_.n, beyond_, n, right, lo, hi, f, names_.k);
    if (r.below || r.above)
      out_ +=
          fmt::format("  rewrite (sum_same K {0} {1} {2} {3} {4}).\n  2:{{ {5} }}\n  2:{{ {6} }}\n",
                      lo, hi, wide_low, wide_high, f, outside(r), outside(r));
    else
      out_ += fmt::format(
          "  transitivity (sum {0} {1} {2}); [apply (sum_ext K); [lia | lia | "
          "reflexivity]|].\n",
          wide_low, wide_high, f);
    out_ += split;
    out_ += "  cbv beta. ring.\nQed.\n\n";
  }

  [[nodiscard]] std::string range_words(const proof::RangeStep& r) const {
    std::string out = fmt::format("S({}) over the common range", argument(names_.n, r.shift));
    if (r.below || r.above)
      out += "; the terms in one range only vanish, being over (-m)! with m > 0";
    if (r.low_points + r.high_points > 0) out += "; the points outside stand by themselves";
    return out + ".";
  }

  /// `n + 2`, for readers.
  static std::string argument(const std::string& n, unsigned by) {
    return by == 0 ? n : fmt::format("{} + {}", n, by);
  }

  /// The range's bound with n shifted, as text.
  [[nodiscard]] std::string at_shift(const claim::Expression& bound, unsigned by) const {
    std::string text = integer_text(proof_, bound);
    if (by == 0) return text;
    return replace_word(text, names_.n, shifted(names_.n, by));
  }

  /// A point in one range but not in the other: below or above, F vanishes or there is none.
  [[nodiscard]] std::string outside(const proof::RangeStep& r) const {
    const Scope scope =
        r.shift == 0 ? scope_ : with(scope_, 0, fmt::format("{} + {}", names_.n, r.shift));
    const proof::Affine n = running(1, static_cast<long>(r.shift));
    return fmt::format("intros {} Hk Ho. destruct Ho as [Ho|Ho]; [{}|{}].", names_.k,
                       vanish(r.below, n, scope), vanish(r.above, n, scope));
  }

  // ---------------------------------------------------------------- the recurrence of the sum

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
    out_ += heading("The recurrence of the sum, with what remains at the ends");
    std::string body;
    const bool ends = names_.index && !proof_.telescoping->certificate.terms.empty();
    if (ends) body = fmt::format("right_end {0} - left_end {0}", names_.n);
    for (const std::string& t : explicit_texts()) body += (body.empty() ? "" : "\n   + ") + t;
    if (body.empty()) body = "inj 0";
    out_ +=
        note(names_.index
                 ? "What the sum's recurrence has on its right: the ends, and the points outside."
                 : "The combination of the left side.");
    out_ += fmt::format("Definition remainder ({} : Z) : K :=\n  ({})%K.\n\n", names_.n, body);
    std::string script;
    if (names_.index) {
      std::string summed;
      std::string more;
      for (const proof::RangeStep& r : proof_.ranges) {
        script += fmt::format("  rewrite (range_{} {} Hn).\n", r.shift, names_.n);
        summed += fmt::format("{}{} * sum {} {} (fun {} : Z => {})", summed.empty() ? "" : " + ",
                              scale(r.shift), bracketed(affine(proof_.telescoping->low, scope_)),
                              bracketed(affine(proof_.telescoping->high, scope_)), names_.k,
                              f_pieces(shifted(names_.n, r.shift), names_.k));
      }
      for (const std::string& t : explicit_texts()) more += " + " + t;
      script += fmt::format(
          "  transitivity ({}{})%K; [ring|].\n  rewrite (summed {} Hn). unfold "
          "remainder{}. ring.\n",
          summed, more, names_.n, ends ? "" : ", right_end, left_end, c");
    } else {
      script = "  unfold left_side, remainder.\n";
      for (unsigned i = 0; i < coefficients_; ++i)
        script += fmt::format("  rewrite (summand_terms {}) by lia.\n", shifted(names_.n, i));
      script += "  ring.\n";
    }
    out_ +=
        note(names_.index
                 ? "The recurrence of the sum: the ranges are made common and the sums telescope."
                 : "The left side at n, n + 1, ... by its terms.");
    out_ += fmt::format(
        "Lemma left_recurrence ({0} : Z) : {1}\n  ({2} = remainder {0})%K.\nProof.\n"
        "  intros Hn.\n{3}Qed.\n\n",
        names_.n, beyond_, combination("left_side"), script);
  }
};

}  // namespace

std::string recurrence_section(const proof::Proof& proof) { return RecurrenceText(proof).run(); }

}  // namespace sumwright::writers::coq
