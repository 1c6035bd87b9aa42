// Corollaries of the theorem: over Qc and R, and over Z when both sides are integers as written.

#include <fmt/format.h>

#include <algorithm>

#include "claim/affine.hpp"
#include "writers/coq_comments.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_text.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {

using claim::Expression;
using claim::Operation;

namespace {

/// Integers, + - *, literal powers, binomials, factorials, and powers whose exponent was shown to
/// be >= 0.
class IntegerSides {
 public:
  explicit IntegerSides(const proof::Proof& proof) : proof_(proof) {}

  [[nodiscard]] bool qualifies() const {
    const claim::Claim& c = *proof_.claim;
    if (c.closed == nullptr) return false;
    for (const claim::Parameter& p : c.parameters)
      if (p.ring == claim::Parameter::Ring::rationals) return false;
    for (const claim::Range& r : c.sum.over)
      for (const claim::Bound* b : {&r.low, &r.high})
        if (!b->value || has_call(*b->value)) return false;
    return integral(*c.sum.summand, proof_.summand) && integral(*c.closed, *proof_.closed);
  }

  [[nodiscard]] std::string text(const Expression& e) const {
    const auto child = [&](std::size_t i) { return text(*e.children[i]); };
    switch (e.operation) {
      case Operation::literal:
      case Operation::symbol:
        return coq::integer_text(proof_, e);
      case Operation::negate:
        return fmt::format("(Z.opp {})", child(0));
      case Operation::add:
        return fmt::format("({} + {})", child(0), child(1));
      case Operation::subtract:
        return fmt::format("({} - {})", child(0), child(1));
      case Operation::multiply:
        return fmt::format("({} * {})", child(0), child(1));
      case Operation::power:
        return fmt::format("({} ^ {})", child(0), coq::integer_text(proof_, *e.children[1]));
      default:
        break;
    }
    std::string out = "(z" + e.name;
    for (const claim::ExpressionPtr& c : e.children) out += " " + coq::integer_text(proof_, *c);
    return out + ")";
  }

 private:
  static bool has_call(const Expression& e) {
    return e.operation == Operation::call ||
           std::any_of(e.children.begin(), e.children.end(),
                       [](const claim::ExpressionPtr& c) { return has_call(*c); });
  }

  [[nodiscard]] bool exponent_shown(const Expression& e, const proof::Conversion& c) const {
    for (const proof::Leaf& l : c.leaves) {
      if (l.rule != proof::LeafRule::power || claim::to_text(*l.expression) != claim::to_text(e))
        continue;
      for (const std::string& id : l.conditions)
        for (const proof::Condition& condition : proof_.conditions)
          if (condition.id == id && condition.text.ends_with(">= 0")) return true;
    }
    return false;
  }

  [[nodiscard]] bool integral(const Expression& e, const proof::Conversion& c) const {
    if (e.operation == Operation::divide) return false;
    if (e.operation == Operation::call)
      return (e.name == "binomial" || e.name == "factorial") &&
             coq::is_integer_argument(proof_, *e.children[0]);
    if (e.operation == Operation::power) {
      const auto exponent = claim::as_literal(*e.children[1]);
      if (exponent ? *exponent < 0 : !exponent_shown(e, c)) return false;
      return integral(*e.children[0], c);
    }
    return std::all_of(e.children.begin(), e.children.end(),
                       [&](const claim::ExpressionPtr& x) { return integral(*x, c); });
  }

  const proof::Proof& proof_;
};

std::string integer_claim(const proof::Proof& proof) {
  const IntegerSides sides(proof);
  if (!sides.qualifies()) return "";
  const claim::Claim& c = *proof.claim;
  const coq::Names n = coq::names(proof);
  std::string left = sides.text(*c.sum.summand);
  if (n.index)
    left = fmt::format("zsum {} {} (fun {} : Z => {})",
                       coq::integer_text(proof, *c.sum.over[0].low.value),
                       coq::integer_text(proof, *c.sum.over[0].high.value), n.k, left);
  std::string hypotheses;
  std::string names;
  std::string binders;
  for (const std::string& p : coq::parameter_names(proof)) {
    binders += fmt::format("({} : Z) ", p);
    names += " " + p;
  }
  std::string intros = names + " " + n.n;
  std::string given;
  for (const coq::Hypothesis& h : coq::hypotheses(proof)) {
    hypotheses += fmt::format("  {} ->\n", h.text);
    given += " " + h.name;
  }
  return fmt::format(
      "(** Both sides are integers as written, and equal in Qc, hence as integers: [zsum], "
      "[zbinomial], ... are the functions of Integers.v, and powers those of Z. *)\nTheorem "
      "claim_over_Z : forall {}({} : Z),\n{}  {} <= {} ->\n  {} "
      "=\n  {}.\n"
      "Proof.\n  intros{}{} Hn.\n  refine (between_integers Qc_field _ _ _ _ _ _ (claim "
      "Qc_field{}{} Hn)); "
      "integer.\nQed.\n",
      binders, n.n, hypotheses, coq::bracketed(std::to_string(proof.from)), n.n, left,
      sides.text(*c.closed), intros, given, intros, given);
}

}  // namespace

std::vector<NamedText> coq_corollaries(const proof::Proof& proof, const std::string& library) {
  const auto text = [&](const std::string& field, const std::string& suffix,
                        const std::string& imports, const std::string& modules,
                        const std::string& words) {
    return fmt::format(
        "(** * {6}\n\n    Generated by Sumwright.  SPDX-License-Identifier: 0BSD\n\n    {7} *)\n\n"
        "Require Import {1}.\nFrom Sumwright Require Import Statement {2}.\nFrom {3} Require "
        "Import Claim.\nLocal Open Scope Z_scope.\n\n"
        "(** The theorem of Claim.v with this field for K; what it says stands there in words. *)\n"
        "Corollary claim_over_{0} : {4}.\nProof. exact (claim {5}). Qed.\n",
        suffix, imports, modules, library, coq::statement_text(proof, field), field,
        coq::comment_text(proof.claim->title), words);
  };
  std::string rationals = text(
      "Qc_field", "Qc", "ZArith Lia QArith Qcanon", "Support Integers OverQc",
      "The theorem over the rational numbers: [Qc_field] is the type Qc of the standard library "
      "with its operations (OverQc.v).  No axioms are used.");
  const std::string integers = integer_claim(proof);
  if (!integers.empty()) rationals += "\n" + integers;
  const std::string reals = text(
      "R_field", "R", "ZArith Reals", "OverR",
      "The theorem over the real numbers: [R_field] is the type R of the standard library with its "
      "operations (OverR.v).  The axioms of that library about R are used here, and nowhere else.");
  return {{"ClaimOverQc.v", coq::wrapped(rationals)}, {"ClaimOverR.v", coq::wrapped(reals)}};
}

}  // namespace sumwright::writers
