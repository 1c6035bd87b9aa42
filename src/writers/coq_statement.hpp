// The author's expressions in the vocabulary of the formal statement, node by node.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers::coq {

/// An expression as an element of K.
[[nodiscard]] std::string field_text(const proof::Proof& proof, const claim::Expression& e);
/// R(v): the reciprocal of a divisor that contains a factorial.
[[nodiscard]] std::string reciprocal_text(const proof::Proof& proof, const claim::Expression& v);
/// An expression as a term of type Z (arguments, exponents, bounds).
[[nodiscard]] std::string integer_text(const proof::Proof& proof, const claim::Expression& e);
/// Whether a function's first argument is written as an integer (`binomial`) or in K (`gbinomial`).
[[nodiscard]] bool is_integer_argument(const proof::Proof& proof, const claim::Expression& e);

/// A bound variable's or parameter's name in the file.
[[nodiscard]] std::string name_of(const std::string& symbol);

/// The claim's hypotheses in the order of the statement: (name, proposition).
struct Hypothesis {
  std::string name;
  std::string text;
};
[[nodiscard]] std::vector<Hypothesis> hypotheses(const proof::Proof& proof,
                                                 const std::string& field = "K");
/// The hypothesis of entry `exclusion` of the parameter at symbol position `parameter`.
[[nodiscard]] std::string exclusion_name(const proof::Proof& proof, std::size_t parameter,
                                         std::size_t exclusion);
[[nodiscard]] std::string assumption_name(std::size_t assumption);

/// The sum of the claim with its index bound: `sum 0 n (fun k : Z => ...)%K`; variables stand for
/// infinite ends.
[[nodiscard]] std::string sum_text(const proof::Proof& proof);
/// An end of the summed range as it stands in the statement: a variable when it is infinite, of the
/// running variable in a recurrence.
[[nodiscard]] std::string end_text(const proof::Proof& proof, bool upper);
/// The same, the variable by itself in every claim.
[[nodiscard]] std::string end_name(const proof::Proof& proof, bool upper);
/// The variables for infinite ends, low before high: as arguments ` lo_end hi_end` and as binders
/// ` (lo_end : Z) (hi_end : Z)`; empty when both ends are finite.
[[nodiscard]] std::string end_arguments(const proof::Proof& proof);
[[nodiscard]] std::string end_binders(const proof::Proof& proof, const std::string& type);
/// `(forall k : Z, k < lo_end \/ hi_end < k -> summand = 0)`, with the ends that are infinite and
/// `summand` in place of the author's expression; empty when both are finite.
[[nodiscard]] std::string vanishing_text(const proof::Proof& proof, const std::string& summand,
                                         const std::string& low, const std::string& high,
                                         const std::string& field = "K");
/// `Theorem claim : ...` without the final dot, as coq-statement fixes it.
/// `field`: the field it is stated over, quantified when it is K.
[[nodiscard]] std::string statement_text(const proof::Proof& proof, const std::string& field = "K");
/// The equation of a recurrence claim, of the sequence `s`.
[[nodiscard]] std::string recurrence_equation(const proof::Proof& proof, const std::string& field);
/// Names of the parameters in the order of the statement (rational, then integer).
[[nodiscard]] std::vector<std::string> parameter_names(const proof::Proof& proof);
/// The binder list `(K : char0_field) (x : K) (m : Z)`.
[[nodiscard]] std::string parameter_binders(const proof::Proof& proof,
                                            const std::string& field = "K");

}  // namespace sumwright::writers::coq
