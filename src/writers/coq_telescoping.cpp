// Base term, shifts, the polynomial equality, the telescoping identity and its sum over the common
// range.

#include <fmt/format.h>

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
    out_ += fmt::format("Definition {} ({}{} : K) : K := ({})%K.\n", name, names_.n,
                        index ? " " + names_.k : "", body);
  }

  void definitions() {
    out_ += "(** ** The base term, the recurrence and the certificate *)\n\n";
    out_ += fmt::format("Definition base ({} {} : Z) : K :=\n  ({})%K.\n\n", names_.n, names_.k,
                        product(t_.base.product, scope_));
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
    out_ += fmt::format(
        "Lemma index_shift ({0} {1} : Z) : {2}\n  (down (inj {0}) (inj {1} + inj 1) * base {0} "
        "({1} + 1)%Z = "
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
    out_ += "(** ** The polynomial equality *)\n\n";
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
        f += fmt::format("{}F{} {}%Z {}", f.empty() ? "" : " + ", j + 1,
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
        f += fmt::format("{}F{} {}%Z {}", f.empty() ? "" : " + ", j + 1,
                         shifted(names_.n, static_cast<unsigned>(i)), names_.k);
      sums +=
          fmt::format("{0}weight (inj {1}) * a{2} (inj {1}) * sum ({3}) ({4}) (fun {5} : Z => {6})",
                      sums.empty() ? "" : " + ", names_.n, i, low_, high_, names_.k, f);
    }
    const std::string shift_case =
        t_.index_shift
            ? fmt::format(
                  "transitivity (c (inj {0}) (inj {1} + inj 1) * (down (inj {0}) (inj {1} + inj 1) "
                  "* base {0} ({1} + 1)%Z))%K; [rewrite (inj_add K {1} 1); ring|].\n"
                  "    rewrite (index_shift {0} {1}) by lia. ring.",
                  names_.n, names_.k)
            : std::string("unfold c; ring.");
    out_ += fmt::format(
        "Lemma summed ({0} : Z) : {1} <= {0} ->\n  ({2} =\n   {3} -\n   {4})%K.\nProof.\n  intros "
        "Hn.\n"
        "  rewrite !sum_scal, ?sum_add.\n"
        "  refine (sum_tele_ends K ({5}) ({6}) _\n    (fun {7} : Z => {8})%K\n    (fun {7} : Z => "
        "{9})%K\n"
        "    ({5}) ({6}) _ _ _ _ _).\n"
        "  - lia.\n  - reflexivity.\n  - reflexivity.\n"
        "  - intros {7} Hk. exact (telescoping {0} {7} Hn Hk).\n"
        "  - intros {7} Hk. {10}\nQed.\n\n",
        names_.n, bracketed(std::to_string(proof_.threshold)), sums, upper(bracketed(high_)),
        lower(bracketed(low_)), low_, high_, names_.k, upper(names_.k), lower(names_.k),
        shift_case);
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
