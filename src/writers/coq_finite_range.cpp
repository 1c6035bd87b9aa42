// Infinite ranges: the sum between any ends beyond which all terms are 0 is the sum between the
// ends of the support.

#include <fmt/format.h>

#include "writers/coq_comments.hpp"
#include "writers/coq_section_text.hpp"
#include "writers/coq_statement.hpp"

namespace sumwright::writers::coq {

namespace {

class FiniteRangeText : private SectionText {
 public:
  explicit FiniteRangeText(const proof::Proof& proof) : SectionText(proof) {}

  std::string run() {
    out_ += heading("An infinite range is a finite one");
    outside_support();
    finite_sum();
    if (!equality_) recurrence();
    return out_;
  }

  /// The claim of a recurrence, inside the section.
  std::string infinite_claim() {
    out_ += note("The recurrence of a sum with infinite ends.");
    out_ += fmt::format(
        "Lemma infinite_range{0} (s : Z -> K) :\n{1}"
        "  forall {2} : Z, {3} <= {2} ->\n  {4}.\nProof.\n"
        "  intros Hs Ho {2} Hn. rewrite !(finite_sequence{5} s Hs Ho) by lia.\n"
        "  exact (conclusion {2} Hn).\nQed.\n\n",
        end_binders(proof_, "Z -> Z"), sequence_premises(), names_.n, from_,
        recurrence_equation(proof_, "K"), end_arguments(proof_));
    return out_;
  }

 private:
  [[nodiscard]] std::string term() const {
    return fmt::format("summand {} {}", names_.n, names_.k);
  }

  /// The ends that are functions of the running variable, applied to it.
  [[nodiscard]] std::string ends_here() const {
    const claim::Range& author = proof_.claim->sum.over[0];
    std::string out;
    if (!author.low.value) out += " " + end_text(proof_, false);
    if (!author.high.value) out += " " + end_text(proof_, true);
    return out;
  }

  /// What is assumed of the sequence s and of the ends.
  [[nodiscard]] std::string sequence_premises() const {
    const std::string low = end_text(proof_, false);
    const std::string high = end_text(proof_, true);
    return fmt::format(
        "  (forall {0} : Z, s {0} = sum {1} {2} (fun {3} : Z => {4})) ->\n"
        "  (forall {0} : Z, {5} <= {0} -> {6}) ->\n",
        names_.n, low, high, names_.k, term(), from_, vanishing_text(proof_, term(), low, high));
  }

  void outside_support() {
    const proof::FiniteRange& finite = *proof_.finite_range;
    const proof::Affine n = running(1, 0);
    out_ += note("Beyond these ends every term is 0, being over (-m)! with m > 0.");
    out_ += fmt::format(
        "Lemma outside_support ({0} {1} : Z) : {2} <= {0} -> {3}{4} ->\n  summand {0} {1} = 0%K.\n"
        "Proof.\n  intros Hn {5}Ho. rewrite (summand_terms {0} {1}) by index.\n"
        "  {6}.\nQed.\n\n",
        names_.n, names_.k, from_, index_premise(proof_), beyond_support(proof_),
        index_premise(proof_).empty() ? "" : "Hk ", either(finite, n));
  }

  [[nodiscard]] std::string either(const proof::FiniteRange& finite, const proof::Affine& n) const {
    if (!finite.below) return vanish(finite.above, n, scope_);
    if (!finite.above) return vanish(finite.below, n, scope_);
    return fmt::format("destruct Ho as [Ho|Ho]; [{}|{}]", vanish(finite.below, n, scope_),
                       vanish(finite.above, n, scope_));
  }

  void finite_sum() {
    const proof::FiniteRange& finite = *proof_.finite_range;
    const std::string low = integer_text(proof_, *finite.range.low.value);
    const std::string high = integer_text(proof_, *finite.range.high.value);
    const std::string lo = end_name(proof_, false);
    const std::string hi = end_name(proof_, true);
    out_ += note(
        "Ends beyond which all terms are 0, whatever they are, and those of the support give the "
        "same sum.");
    out_ += fmt::format(
        "Lemma finite_sum ({0} : Z){1} : {2} <= {0} ->\n  {3} ->\n"
        "  sum {4} {5} (fun {6} : Z => {7}) = left_side {0}.\nProof.\n"
        "  intros Hn Hv. unfold left_side.\n"
        "  apply (sum_same K {4} {5} {8} {9} (fun {6} : Z => {7})).\n"
        "  - intros {6} Hk Ho. cbv beta. apply outside_support; index.\n"
        "  - intros {6} Hk Ho. cbv beta. first [apply Hv; lia | exfalso; index].\nQed.\n\n",
        names_.n, end_binders(proof_, "Z"), from_, vanishing_text(proof_, term(), lo, hi), lo, hi,
        names_.k, term(), low, high);
  }

  void recurrence() {
    out_ += note("The sum as a sequence.");
    out_ += fmt::format(
        "Lemma finite_sequence{0} (s : Z -> K) :\n{1}"
        "  forall {2} : Z, {3} <= {2} -> s {2} = left_side {2}.\nProof.\n"
        "  intros Hs Ho {2} Hn. rewrite Hs. exact (finite_sum {2}{4} Hn (Ho {2} Hn)).\nQed.\n\n",
        end_binders(proof_, "Z -> Z"), sequence_premises(), names_.n, from_, ends_here());
  }
};

}  // namespace

std::string beyond_support(const proof::Proof& proof) {
  const proof::FiniteRange& finite = *proof.finite_range;
  const std::string k = names(proof).k;
  std::string out;
  if (finite.below) out = fmt::format("{} < {}", k, integer_text(proof, *finite.range.low.value));
  if (finite.above)
    out += fmt::format("{}{} < {}", out.empty() ? "" : " \\/ ",
                       integer_text(proof, *finite.range.high.value), k);
  return out;
}

std::string finite_range_section(const proof::Proof& proof) { return FiniteRangeText(proof).run(); }

std::string infinite_claim_section(const proof::Proof& proof) {
  if (!proof.finite_range || proof.claim->is_equality()) return "";
  return FiniteRangeText(proof).infinite_claim();
}

std::string index_premise(const proof::Proof& proof) {
  const claim::Range& r = proof.claim->sum.over.at(0);
  if (!r.low.value && !r.high.value) return "";
  const std::string low = r.low.value ? integer_text(proof, *r.low.value) + " <= " : "";
  const std::string high = r.high.value ? " <= " + integer_text(proof, *r.high.value) : "";
  return low + name_of(r.index) + high + " -> ";
}

}  // namespace sumwright::writers::coq
