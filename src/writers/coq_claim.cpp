// The file Claim.v as a whole: header, terms, the sections of the argument, the two theorems.

#include <fmt/format.h>

#include "claim/affine.hpp"
#include "writers/coq_comments.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace coq {
namespace {

/// One obligation that something has a value: its text and the tactic that shows it.
struct Defined {
  std::string text;
  std::string tactic;
};

class DefinedText {
 public:
  DefinedText(const proof::Proof& proof, const proof::Conversion& c, std::string what,
              bool with_index)
      : proof_(proof),
        c_(c),
        what_(std::move(what)),
        scope_(plain_scope(proof)),
        names_(names(proof)) {
    arguments_ = with_index ? fmt::format("{} {} Hn{}", names_.n, names_.k,
                                          index_premise(proof).empty() ? "" : " Hk")
                            : fmt::format("{} Hn", names_.n);
  }

  std::vector<Defined> run() {
    for (const proof::Leaf& l : c_.leaves) leaf(l);
    for (std::size_t i = 0; i < c_.denominators.size(); ++i) {
      const proof::Denominator& d = c_.denominators[i];
      std::string v = field_text(proof_, *d.expression);
      std::string lemma = fmt::format("exact (divisor_neq0 K _ _ ({}_denominator_{} {}))", what_,
                                      i + 1, arguments_);
      if (d.node->operation == claim::Operation::power && d.expression == d.node->children[0]) {
        const auto exponent = claim::as_literal(*d.node->children[1]);
        v = fmt::format("({} ^ {})", v, mpz_class(abs(*exponent)).get_str());
      }
      out_.push_back({fmt::format("{}%K <> 0%K :> K", v), lemma});
    }
    return std::move(out_);
  }

 private:
  void leaf(const proof::Leaf& l) {
    using proof::LeafRule;
    const claim::Expression& e = *l.expression;
    switch (l.rule) {
      case LeafRule::factorial:
        out_.push_back({"0 <= " + integer_text(proof_, *e.children[0]), "index"});
        return;
      case LeafRule::rising_interval:
      case LeafRule::rising_factorials:
      case LeafRule::rising_reflected:
      case LeafRule::falling_interval:
      case LeafRule::falling_factorials:
        out_.push_back({"0 <= " + integer_text(proof_, *e.children[1]), "index"});
        return;
      case LeafRule::power:
        power(l);
        return;
      default:
        return;
    }
  }

  void power(const proof::Leaf& l) {
    bool bases = false;
    for (const proof::Nonzero& why : l.nonzero) {
      if (why.factors.empty()) continue;
      bases = true;
      out_.push_back({fmt::format("({})%K <> 0%K :> K", factored(why.polynomial, scope_)),
                      nonzero_tactic(proof_, why, scope_)});
    }
    bool symbolic = false;
    for (const auto& [a, e] : l.value.atoms) symbolic = symbolic || !is_constant(a.base);
    if (!bases && symbolic)
      out_.push_back({"0 <= " + integer_text(proof_, *l.expression->children[1]), "index"});
  }

  const proof::Proof& proof_;
  const proof::Conversion& c_;
  std::string what_;
  Scope scope_;
  Names names_;
  std::string arguments_;
  std::vector<Defined> out_;
};

std::string conjunction(const std::vector<Defined>& list) {
  std::string out;
  for (const Defined& d : list) out += (out.empty() ? "(" : " /\\ (") + d.text + ")";
  return out.empty() ? "True" : out;
}

std::string conjunction_proof(const std::vector<Defined>& list) {
  if (list.empty()) return "exact I";
  std::string out;
  for (std::size_t i = 0; i + 1 < list.size(); ++i)
    out += fmt::format("split; [{}|", list[i].tactic);
  out += list.back().tactic;
  for (std::size_t i = 0; i + 1 < list.size(); ++i) out += "]";
  return out;
}

struct DefinedStatement {
  std::string words;
  std::string text;
  std::string script;
};

/// What `defined` says, and why a side without obligations has none.
std::string defined_words(bool left_free, bool right_free) {
  const std::string nothing =
      "it has no divisor, no factorial outside divisors, and no rising or falling factorial or "
      "power with a condition; binomials have a value at all arguments, and 1/m! is 0 for m < 0";
  if (left_free && right_free)
    return "Nothing is to be shown, so that [True] stands for each side: " + nothing + ".";
  std::string out =
      "No divisor of the claim is 0, at any point of the ranges; factorials, rising and falling "
      "factorials have arguments for which they are defined, and so have powers.";
  if (left_free) out += " [True] stands for the left side: " + nothing + ".";
  if (right_free) out += " [True] stands for the right side: " + nothing + ".";
  return out;
}

DefinedStatement defined_statement(const proof::Proof& proof) {
  const Names n = names(proof);
  const std::vector<Defined> left = DefinedText(proof, proof.summand, "summand", n.index).run();
  std::vector<Defined> right;
  const proof::Conversion* other = proof.closed ? &*proof.closed : nullptr;
  if (!proof.claim->is_equality()) other = proof.right_side ? &*proof.right_side : nullptr;
  if (other != nullptr) right = DefinedText(proof, *other, "right_side", false).run();
  DefinedStatement out;
  out.words = defined_words(left.empty(), right.empty());
  if (n.index) {
    const std::string premise = index_premise(proof);
    out.text = fmt::format("(forall {} : Z, {}\n    {}) /\\\n  ({})", n.k, premise,
                           conjunction(left), conjunction(right));
    out.script =
        fmt::format("  split.\n  - intros {}{}. {}.\n  - {}.\n", n.k, premise.empty() ? "" : " Hk",
                    conjunction_proof(left), conjunction_proof(right));
  } else {
    out.text = fmt::format("({}) /\\ ({})", conjunction(left), conjunction(right));
    out.script = fmt::format("  split.\n  - {}.\n  - {}.\n", conjunction_proof(left),
                             conjunction_proof(right));
  }
  return out;
}

}  // namespace

std::string header_section(const proof::Proof& proof) {
  std::string out =
      opening_comment(proof) +
      "Require Import ZArith Lia Ring Field.\nFrom Sumwright Require Import Statement Support.\n"
      "Local Open Scope Z_scope.\nSet Default Proof Using \"All\".\n\n" +
      legend(proof) +
      "Section Claim.\nVariable K : char0_field.\nAdd Field K_field : (field_axioms K)\n"
      "  (morphism (inj_morph K), constants [inj_cst],\n"
      "   power_tac (pow_th K) [exponent_cst], completeness (inj_complete K)).\n";
  for (const char* name : {"inj", "zpow", "factorial", "rfactorial", "binomial", "gbinomial",
                           "rising", "falling", "sum"})
    out += fmt::format("Local Notation {0} := (@Statement.{0} K).\n", name);
  out += "Local Notation ip := (@Products.ip K).\nLocal Notation rip := (@Products.rip K).\n\n";
  for (const auto ring : {claim::Parameter::Ring::rationals, claim::Parameter::Ring::integers})
    for (const claim::Parameter& p : proof.claim->parameters)
      if (p.ring == ring)
        out += fmt::format("Variable {} : {}.\n", name_of(p.name),
                           ring == claim::Parameter::Ring::rationals ? "K" : "Z");
  for (const Hypothesis& h : hypotheses(proof))
    out += fmt::format("Hypothesis {} : {}.\n", h.name, h.text);
  return out + "\n";
}

std::string terms_section(const proof::Proof& proof) {
  const Names n = names(proof);
  const claim::Sum& sum = proof.claim->sum;
  std::string out = heading("The two sides, and their terms as products");
  const std::string variables = n.index ? n.n + " " + n.k : n.n;
  out += fmt::format("Definition summand ({} : Z) : K := {}%K.\n", variables,
                     field_text(proof, *sum.summand));
  if (n.index)
    out += fmt::format(
        "Definition left_side ({} : Z) : K :=\n  sum {} {} (fun {} : Z => summand {} {}).\n", n.n,
        integer_text(proof, *proof.summed_range().low.value),
        integer_text(proof, *proof.summed_range().high.value), n.k, n.n, n.k);
  else
    out += fmt::format("Definition left_side ({0} : Z) : K := summand {0}.\n", n.n);
  std::string right = "(inj 0)";
  if (proof.claim->is_equality())
    right = field_text(proof, *proof.claim->closed);
  else if (proof.claim->evidence.right_side)
    right = field_text(proof, *proof.claim->evidence.right_side);
  out += fmt::format("Definition right_side ({} : Z) : K := {}%K.\n\n", n.n, right);
  out += conversion_text(proof, proof.summand, "summand", "F", n.index);
  if (proof.closed)
    out += conversion_text(proof, *proof.closed, "right_side", "C", false);
  else if (proof.right_side)
    out += conversion_text(proof, *proof.right_side, "right_side", "b", false);
  else
    out +=
        note("The right side is 0.") +
        fmt::format(
            "Lemma right_side_terms ({0} : Z) : {1} <= {0} -> right_side {0} = (inj 0)%K.\nProof.\n"
            "  intros Hn. unfold right_side. inj_norm. ring.\nQed.\n\n",
            n.n, bracketed(std::to_string(proof.from)));
  return out;
}

namespace {

/// From the section's conclusion to the theorem; sums with infinite ends become finite first.
std::string claim_script(const proof::Proof& proof, const std::string& parameters,
                         const std::string& hypotheses) {
  const std::string n = names(proof).n;
  const std::string given = parameters + hypotheses;
  const std::string ends = end_arguments(proof);
  if (!proof.claim->is_equality() && ends.empty())
    return fmt::format(
        "  intros K{} s{} Hs {} Hn. rewrite !Hs. exact (conclusion K{} {} Hn).\nQed.\n\n",
        parameters, hypotheses, n, given, n);
  if (!proof.claim->is_equality())
    return fmt::format(
        "  intros K{0}{1} s{2} Hs Ho. exact (infinite_range K{3}{1} s Hs Ho).\nQed.\n\n",
        parameters, ends, hypotheses, given);
  if (ends.empty())
    return fmt::format("  intros K{0} {1}{2} Hn. exact (conclusion K{3} {1} Hn).\nQed.\n\n",
                       parameters, n, hypotheses, given);
  return fmt::format(
      "  intros K{0} {1}{2}{3} Hn Ho.\n"
      "  exact (eq_trans (finite_sum K{4} {1}{2} Hn Ho) (conclusion K{4} {1} Hn)).\nQed.\n\n",
      parameters, n, ends, hypotheses, given);
}

}  // namespace

std::string theorem_section(const proof::Proof& proof) {
  const Names n = names(proof);
  const DefinedStatement defined = defined_statement(proof);
  const std::string from = bracketed(std::to_string(proof.from));
  std::string out = infinite_claim_section(proof) + heading("Everything in the claim has a value") +
                    note(defined.words) +
                    fmt::format(
                        "Lemma defined ({} : Z) : {} <= {} "
                        "->\n  {}.\nProof.\n  intros Hn.\n{}Qed.\n\nEnd Claim.\n\n",
                        n.n, from, n.n, defined.text, defined.script) +
                    heading("The theorem, and that everything in it has a value");
  std::string parameters;
  for (const std::string& p : parameter_names(proof)) parameters += " " + p;
  std::string names_of_hypotheses;
  std::string hypothesis_text;
  for (const Hypothesis& h : hypotheses(proof)) {
    names_of_hypotheses += " " + h.name;
    hypothesis_text += fmt::format("  {} ->\n", h.text);
  }
  out += fmt::format("Theorem claim : {}.\nProof.\n", statement_text(proof));
  out += claim_script(proof, parameters, names_of_hypotheses);
  out += fmt::format(
      "Theorem claim_defined : forall {} ({} : Z),\n{}  {} <= {} ->\n  {}.\nProof.\n  intros K{}"
      " {}{} Hn. exact (defined K{}{} {} Hn).\nQed.\n",
      parameter_binders(proof), n.n, hypothesis_text, from, n.n, defined.text, parameters, n.n,
      names_of_hypotheses, parameters, names_of_hypotheses, n.n);
  if (proof.finite_range) {
    out += "\n" + note("Ends as the theorem asks for: beyond them every term is 0.");
    out += fmt::format(
        "Theorem claim_support : forall {0} ({1} : Z),\n{2}  {3} <= {1} ->\n  forall {4} : Z, "
        "{5}{6} "
        "->\n  {7}%K = 0%K :> K.\nProof.\n  intros K{8} {1}{9} Hn {4}. exact (outside_support "
        "K{8}{9} {1} {4} Hn).\nQed.\n",
        parameter_binders(proof), n.n, hypothesis_text, from, n.k, index_premise(proof),
        beyond_support(proof), field_text(proof, *proof.claim->sum.summand), parameters,
        names_of_hypotheses);
  }
  return out;
}

}  // namespace coq

std::string coq_claim_text(const proof::Proof& proof) {
  using namespace coq;
  std::string out = header_section(proof) + terms_section(proof);
  if (proof.finite_range) out += finite_range_section(proof);
  if (proof.telescoping) out += telescoping_section(proof);
  out += recurrence_section(proof) + conclusion_section(proof) + theorem_section(proof);
  return wrapped(out);
}

}  // namespace sumwright::writers
