// Base term, shifts, the polynomial equality, the telescoping identity and its sum over the common
// range.

#include <fmt/format.h>

#include "writers/coq_comments.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {
namespace {

class TelescopingText {
 public:
  explicit TelescopingText(const proof::Proof& proof)
      : proof_(proof),
        t_(*proof.telescoping),
        scope_(plain_scope(proof)),
        polynomials_(polynomial_scope(proof)),
        names_(names(proof)) {
    low_ = affine(t_.low, scope_);
    high_ = affine(t_.high, scope_);
    region_ =
        fmt::format("{} <= {} -> {} <= {} <= {} ->", bracketed(std::to_string(proof.threshold)),
                    names_.n, bracketed(low_), names_.k, bracketed(high_));
  }

  std::string run() {
    definitions();
    for (std::size_t i = 0; i < t_.shifts.size(); ++i)
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j) shift(i, j);
    index_shift();
    equality();
    telescoping();
    summed();
    return out_;
  }

 private:
  void define(const std::string& name, const std::string& body, bool index) {
    out_ += fmt::format("Definition {} ({}{} : K) : K := {}%K.\n", name, names_.n,
                        index ? " " + names_.k : "", enclosed(body));
  }

  void definitions() {
    out_ += heading("The base term, the recurrence and the certificate");
    out_ += note(
        "Every term of the summand, at n + i and at the next index too, is a polynomial times "
        "this.");
    out_ += fmt::format("Definition base ({} {} : Z) : K :=\n  {}%K.\n\n", names_.n, names_.k,
                        enclosed(product(t_.base.product, scope_)));
    out_ += note("Polynomials: coefficients and weight, terms over base, certificate.");
    for (std::size_t i = 0; i < t_.coefficients.size(); ++i)
      define(fmt::format("a{}", i), factored(t_.coefficients[i], polynomials_), false);
    define("weight", factored(t_.weight.polynomial, polynomials_), false);
    for (std::size_t i = 0; i < t_.shifts.size(); ++i)
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j)
        define(p_name(i, j), factored(t_.shifts[i][j].right.coefficient, polynomials_), true);
    define("c", polynomial(t_.certificate, polynomials_), true);
    define("down", factored(t_.down, polynomials_), true);
    define("up", factored(t_.up, polynomials_), true);
    out_ += "\n";
  }

  static std::string p_name(std::size_t i, std::size_t j) {
    return fmt::format("p{}_{}", i, j + 1);
  }

  void shift(std::size_t i, std::size_t j) {
    const proof::Instance& instance = t_.shifts[i][j];
    const std::string n = shifted(names_.n, static_cast<unsigned>(i));
    Unfolded left{&proof_.summand.products[j], {}, scope_};
    if (i > 0) {
      left.scope = with(scope_, 0, fmt::format("{} + {}", names_.n, i));
      left.by = {{0, shift_form(static_cast<long>(i))}};
    }
    out_ += note(fmt::format(
        "F{} {} {} is a polynomial times the base.  Each line moves one atom by its law, "
        "(m + 1)! = (m + 1) m! for instance.",
        j + 1, n, names_.k));
    out_ += fmt::format(
        "Lemma term_shift_{}_{} ({} {} : Z) : {}\n  F{} {} {} = ({} (inj {}) (inj {}) * "
        "base {} {})%K.\nProof.\n  intros Hn Hk. unfold F{}, base, {}.\n{}Qed.\n\n",
        i, j + 1, names_.n, names_.k, region_, j + 1, n, names_.k, p_name(i, j), names_.n, names_.k,
        names_.n, names_.k, j + 1, p_name(i, j),
        instance_tactics(proof_, instance, left, {}, scope_));
  }

  [[nodiscard]] proof::Affine shift_form(long by, std::size_t symbol = 0) const {
    proof::Affine form;
    form.coefficients.assign(proof_.symbols.size(), 0);
    form.coefficients[symbol] = 1;
    form.constant = by;
    return form;
  }

  void index_shift() {
    if (!t_.index_shift) return;
    const Unfolded left{&t_.base.product,
                        {{1, shift_form(1, 1)}},
                        with(scope_, 1, fmt::format("{} + 1", names_.k))};
    out_ += note("The base at the next index: the same laws.");
    out_ += fmt::format(
        "Lemma index_shift ({0} {1} : Z) : {2}\n  (down (inj {0}) (inj {1} + inj 1) * base {0} "
        "({1} + 1) = "
        "up (inj {0}) (inj {1}) * base {0} {1})%K.\nProof.\n  intros Hn Hk. unfold down, up, "
        "base.\n{3}Qed.\n\n",
        names_.n, names_.k, region_, instance_tactics(proof_, *t_.index_shift, left, {}, scope_));
  }

  [[nodiscard]] std::string combination(const std::string& n, const std::string& k) const {
    std::string out;
    for (std::size_t i = 0; i < t_.shifts.size(); ++i)
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j)
        out +=
            fmt::format("{}a{} {} * {} {} {}", out.empty() ? "" : " + ", i, n, p_name(i, j), n, k);
    return out;
  }

  void equality() {
    out_ += heading("The polynomial equality");
    out_ += note(
        "Both sides are polynomials; they are expanded and compared.  Everything else is "
        "bookkeeping.");
    bool fraction =
        has_fraction(t_.up) || has_fraction(t_.down) || has_fraction(t_.weight.polynomial);
    std::string unfold = "c, down, up, weight";
    for (std::size_t i = 0; i < t_.shifts.size(); ++i) {
      unfold += fmt::format(", a{}", i);
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j) {
        unfold += ", " + p_name(i, j);
        fraction = fraction || has_fraction(t_.shifts[i][j].right.coefficient);
      }
    }
    out_ += fmt::format(
        "Lemma equality ({0} {1} : K) :\n  (weight {0} * ({2}) =\n   up {0} {1} * c {0} ({1} + "
        "inj 1) - down {0} {1} * c {0} {1})%K.\nProof. unfold {3}. {4}. Qed.\n\n",
        names_.n, names_.k, combination(names_.n, names_.k), unfold, fraction ? "field" : "ring");
  }

  [[nodiscard]] std::string weighted_terms(const std::string& k) const {
    std::string out;
    for (std::size_t i = 0; i < t_.shifts.size(); ++i) {
      std::string f;
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j)
        f += fmt::format("{}F{} {} {}", f.empty() ? "" : " + ", j + 1,
                         shifted(names_.n, static_cast<unsigned>(i)), k);
      out += fmt::format("{}weight (inj {}) * a{} (inj {}) * ({})", out.empty() ? "" : " + ",
                         names_.n, i, names_.n, f);
    }
    return out;
  }

  [[nodiscard]] std::string upper(const std::string& k) const {
    return fmt::format("up (inj {0}) (inj {1}) * c (inj {0}) (inj {1} + inj 1) * base {0} {1}",
                       names_.n, k);
  }
  [[nodiscard]] std::string lower(const std::string& k) const {
    return fmt::format("down (inj {0}) (inj {1}) * c (inj {0}) (inj {1}) * base {0} {1}", names_.n,
                       k);
  }

  void telescoping() {
    std::string rewrites;
    for (std::size_t i = 0; i < t_.shifts.size(); ++i)
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j)
        rewrites += fmt::format("  rewrite (term_shift_{}_{} {} {} Hn Hk).\n", i, j + 1, names_.n,
                                names_.k);
    const std::string n = fmt::format("(inj {})", names_.n);
    const std::string k = fmt::format("(inj {})", names_.k);
    out_ += note(
        "The equality times the base: the combination of terms is a difference of values of G.");
    out_ += fmt::format(
        "Lemma telescoping ({0} {1} : Z) : {2}\n  ({3} =\n   {4} -\n   {5})%K.\nProof.\n"
        "  intros Hn Hk.\n{6}"
        "  transitivity ((weight {7} * ({8})) * base {0} {1})%K; [ring|].\n"
        "  rewrite (equality {7} {9}). ring.\nQed.\n\n",
        names_.n, names_.k, region_, weighted_terms(names_.k), upper(names_.k), lower(names_.k),
        rewrites, n, combination(n, k), k);
  }

  void summed() {
    std::string sums;
    for (std::size_t i = 0; i < t_.shifts.size(); ++i) {
      std::string f;
      for (std::size_t j = 0; j < t_.shifts[i].size(); ++j)
        f += fmt::format("{}F{} {} {}", f.empty() ? "" : " + ", j + 1,
                         shifted(names_.n, static_cast<unsigned>(i)), names_.k);
      sums += fmt::format("{0}weight (inj {1}) * a{2} (inj {1}) * sum {3} {4} (fun {5} : Z => {6})",
                          sums.empty() ? "" : " + ", names_.n, i, bracketed(low_), bracketed(high_),
                          names_.k, f);
    }
    const std::string shift_case =
        t_.index_shift
            ? fmt::format(
                  "transitivity (c (inj {0}) (inj {1} + inj 1) * (down (inj {0}) (inj {1} + inj 1) "
                  "* base {0} ({1} + 1)%Z))%K; [rewrite (inj_add K {1} 1); ring|].\n"
                  "    rewrite (index_shift {0} {1}) by lia. ring.",
                  names_.n, names_.k)
            : std::string("unfold c; ring.");
    out_ += note("G after the last index of the common range, and G at the first one.");
    out_ += fmt::format(
        "Definition right_end ({0} : Z) : K :=\n  ({1})%K.\n"
        "Definition left_end ({0} : Z) : K :=\n  ({2})%K.\n\n",
        names_.n, upper(bracketed(high_)), lower(bracketed(low_)));
    out_ += note("Summed over the common range, the differences leave the two ends.");
    out_ += fmt::format(
        "Lemma summed ({0} : Z) : {1} <= {0} ->\n  ({2} =\n   right_end {0} - left_end {0})%K.\n"
        "Proof.\n  intros Hn. unfold right_end, left_end.\n"
        "  rewrite !sum_scal, ?sum_add.\n"
        "  refine (sum_tele_ends K {3} {4} _\n    (fun {5} : Z => {6})%K\n    (fun {5} : Z => "
        "{7})%K\n"
        "    {3} {4} _ _ _ _ _).\n"
        "  - lia.\n  - reflexivity.\n  - reflexivity.\n"
        "  - intros {5} Hk. exact (telescoping {0} {5} Hn Hk).\n"
        "  - intros {5} Hk. {8}\nQed.\n\n",
        names_.n, bracketed(std::to_string(proof_.threshold)), sums, bracketed(low_),
        bracketed(high_), names_.k, upper(names_.k), lower(names_.k), shift_case);
  }

  const proof::Proof& proof_;
  const proof::Telescoping& t_;
  Scope scope_;
  Scope polynomials_;
  Names names_;
  std::string low_;
  std::string high_;
  std::string region_;
  std::string out_;
};

}  // namespace

std::string telescoping_section(const proof::Proof& proof) { return TelescopingText(proof).run(); }

}  // namespace sumwright::writers::coq
