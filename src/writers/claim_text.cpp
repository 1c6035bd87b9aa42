// From the claim as read to its plain-text statement. Expressions stay as the author wrote them.
#include "writers/claim_text.hpp"

#include <fmt/format.h>

#include "claim/reader.hpp"

namespace sumwright::writers {

namespace {

// The author's text; a recurrence that is the claim has the right side 0 unless another is written.
[[nodiscard]] StatedRecurrence written_recurrence(const claim::Claim& claim, bool is_the_claim) {
  StatedRecurrence out;
  out.brought = true;
  for (const claim::ExpressionPtr& written : claim.evidence.recurrence) {
    out.coefficients.push_back(to_text(*written));
  }
  if (is_the_claim) out.right_side = "0";
  if (claim.evidence.right_side) out.right_side = to_text(*claim.evidence.right_side);
  return out;
}

// The coefficient as a factor: in brackets when it is a sum, never in double ones.
[[nodiscard]] std::string as_factor(const proof::Proof& proof, const std::string& coefficient) {
  std::vector<std::string> symbols;
  for (const proof::Symbol& symbol : proof.symbols) symbols.push_back(symbol.name);
  try {
    const claim::Source source{"coefficient", coefficient};
    const claim::ExpressionPtr tree = parse_expression(source, {0, coefficient.size()}, symbols);
    const bool sum =
        tree->operation == claim::Operation::add || tree->operation == claim::Operation::subtract;
    return sum ? "(" + to_text(*tree) + ")" : to_text(*tree);
  } catch (const claim::InputError&) {
    return "(" + coefficient + ")";
  }
}

// `(n + 1)*S(n) - S(n + 1)`
[[nodiscard]] std::string recurrence_left(const proof::Proof& proof,
                                          const std::vector<std::string>& coefficients) {
  std::string out;
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    std::string term = as_factor(proof, coefficients[i]);
    const std::string value =
        fmt::format("S({}{})", proof.claim->running, i == 0 ? "" : fmt::format(" + {}", i));
    term = term == "1" ? value : term == "-1" ? "-" + value : term + "*" + value;
    if (out.empty()) {
      out = term;
    } else {
      out += term.starts_with('-') ? " - " + term.substr(1) : " + " + term;
    }
  }
  return out;
}

}  // namespace

std::string bound_text(const claim::Bound& bound) {
  switch (bound.kind) {
    case claim::Bound::Kind::minus_infinity:
      return "-inf";
    case claim::Bound::Kind::plus_infinity:
      return "inf";
    case claim::Bound::Kind::finite:
      break;
  }
  return to_text(*bound.value);
}

std::string sum_text(const claim::Sum& sum) {
  std::string out = to_text(*sum.summand);
  for (std::size_t i = sum.over.size(); i-- > 0;) {
    const claim::Range& range = sum.over[i];
    out = fmt::format("sum({} = {}..{}, {})", range.index, bound_text(range.low),
                      bound_text(range.high), out);
  }
  return out;
}

std::string exclusion_text(const std::string& name, const claim::Exclusion& exclusion) {
  switch (exclusion.kind) {
    case claim::Exclusion::Kind::constant:
      return name + " != " + to_text(*exclusion.written);
    case claim::Exclusion::Kind::integers:
      return name + " is not an integer";
    case claim::Exclusion::Kind::positive_integers:
      return name + " is not a positive integer";
    case claim::Exclusion::Kind::negative_integers:
      return name + " is not a negative integer";
    case claim::Exclusion::Kind::nonnegative_integers:
      return name + " is not a nonnegative integer";
    case claim::Exclusion::Kind::nonpositive_integers:
      break;
  }
  return name + " is not a nonpositive integer";
}

std::vector<std::string> hypothesis_texts(const claim::Claim& claim) {
  std::vector<std::string> out;
  for (const claim::Parameter& parameter : claim.parameters) {
    for (const claim::Exclusion& exclusion : parameter.excluded) {
      out.push_back(exclusion_text(parameter.name, exclusion));
    }
  }
  for (const claim::Parameter& parameter : claim.parameters) {
    if (parameter.at_least) {
      out.push_back(parameter.name + " >= " + parameter.at_least->get_str());
    }
  }
  for (const claim::Assumption& assumption : claim.assumptions) {
    out.push_back(fmt::format("{} {} {}", to_text(*assumption.left),
                              comparison_text(assumption.comparison), to_text(*assumption.right)));
  }
  out.push_back(claim.running + " >= " + claim.from.get_str());
  return out;
}

std::string claim_kind(const proof::Proof& proof) {
  if (proof.claim->is_equality()) return "equality";
  return proof.question || proof.claim->is_question() ? "question" : "recurrence";
}

StatedRecurrence stated_recurrence(const proof::Proof& proof) {
  const std::string found = proof.right_side_text.empty() ? "0" : proof.right_side_text;
  if (proof.verdict == proof::Verdict::established) {
    return {proof.recurrence_text, found, proof.certificate_text, proof.evidence_brought};
  }
  const bool claimed = claim_kind(proof) == "recurrence";
  if (!claimed && !proof.recurrence_text.empty()) {
    return {proof.recurrence_text, "", proof.certificate_text, proof.evidence_brought};
  }
  return written_recurrence(*proof.claim, claimed);
}

std::string statement_text(const proof::Proof& proof) {
  const claim::Claim& claim = *proof.claim;
  const std::string sum = sum_text(claim.sum);
  const std::string every =
      fmt::format("for every integer {} >= {}", claim.running, claim.from.get_str());
  if (claim.closed) return fmt::format("{} = {} {}", sum, to_text(*claim.closed), every);
  if (claim.other_sum) return fmt::format("{} = {} {}", sum, sum_text(*claim.other_sum), every);
  StatedRecurrence stated = stated_recurrence(proof);
  const bool answered = proof.verdict == proof::Verdict::established;
  if (claim_kind(proof) == "question" && !answered) stated.coefficients.clear();
  const std::string left = recurrence_left(proof, stated.coefficients);
  if (left.empty()) return fmt::format("a recurrence for S({}) = {} {}", claim.running, sum, every);
  return fmt::format("{} = {} {}, where S({}) = {}", left, stated.right_side, every, claim.running,
                     sum);
}

std::string comparison_text(claim::Comparison comparison) {
  switch (comparison) {
    case claim::Comparison::less_equal:
      return "<=";
    case claim::Comparison::less:
      return "<";
    case claim::Comparison::greater_equal:
      return ">=";
    case claim::Comparison::greater:
      return ">";
    case claim::Comparison::not_equal:
      break;
  }
  return "!=";
}

}  // namespace sumwright::writers
