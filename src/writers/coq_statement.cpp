// The formal statement, written from the claim's parse tree by the fixed translation: nothing is
// simplified, sums and products associate as parsed.

#include "writers/coq_statement.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <stdexcept>

#include "claim/affine.hpp"
#include "claim/parts.hpp"
#include "writers/claim_text.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

using claim::Expression;
using claim::Operation;

namespace {

bool is_rational(const proof::Proof& proof, const std::string& name) {
  return std::any_of(proof.claim->parameters.begin(), proof.claim->parameters.end(),
                     [&](const claim::Parameter& p) {
                       return p.name == name && p.ring == claim::Parameter::Ring::rationals;
                     });
}

std::string paren(const std::string& text) { return "(" + text + ")"; }

std::string infix(const proof::Proof& proof, const Expression& e, const char* sign,
                  std::string (*print)(const proof::Proof&, const Expression&)) {
  return paren(
      fmt::format("{} {} {}", print(proof, *e.children[0]), sign, print(proof, *e.children[1])));
}

std::string call_text(const proof::Proof& proof, const Expression& e) {
  const auto integer = [&](std::size_t i) { return integer_text(proof, *e.children[i]); };
  const auto field = [&](std::size_t i) { return field_text(proof, *e.children[i]); };
  if (e.name == "factorial") return paren("factorial " + integer(0));
  if (e.name == "binomial") {
    if (is_integer_argument(proof, *e.children[0]))
      return paren(fmt::format("binomial {} {}", integer(0), integer(1)));
    return paren(fmt::format("gbinomial {} {}", field(0), integer(1)));
  }
  return paren(fmt::format("{} {} {}", e.name, field(0), integer(1)));
}

std::string power_text(const proof::Proof& proof, const Expression& e) {
  const Expression& base = *e.children[0];
  const std::optional<mpz_class> exponent = claim::as_literal(*e.children[1]);
  if (!exponent)
    return paren(
        fmt::format("zpow {} {}", field_text(proof, base), integer_text(proof, *e.children[1])));
  const mpz_class size = abs(*exponent);
  if (*exponent >= 0) return paren(fmt::format("{} ^ {}", field_text(proof, base), size.get_str()));
  if (claim::has_factorial(base))
    return paren(fmt::format("{} ^ {}", reciprocal_text(proof, base), size.get_str()));
  return paren(fmt::format("/ ({} ^ {})", field_text(proof, base), size.get_str()));
}

std::string comparison_sign(claim::Comparison c) {
  return c == claim::Comparison::not_equal ? "<>" : comparison_text(c);
}

std::string word_condition(claim::Exclusion::Kind kind) {
  using Kind = claim::Exclusion::Kind;
  switch (kind) {
    case Kind::positive_integers:
      return "0 < z -> ";
    case Kind::negative_integers:
      return "z < 0 -> ";
    case Kind::nonnegative_integers:
      return "0 <= z -> ";
    case Kind::nonpositive_integers:
      return "z <= 0 -> ";
    default:
      return "";
  }
}

std::string exclusion_text(const proof::Proof& proof, const std::string& x,
                           const claim::Exclusion& e, const std::string& field) {
  if (e.kind == claim::Exclusion::Kind::constant)
    return fmt::format("{}%K <> {}%K :> {}", x, paren(field_text(proof, *e.written)), field);
  return fmt::format("(forall z : Z, {}{} <> inj z :> {})", word_condition(e.kind), x, field);
}

std::string assumption_text(const proof::Proof& proof, const claim::Assumption& a,
                            const std::string& field) {
  const std::string sign = comparison_sign(a.comparison);
  if (a.over_integers)
    return fmt::format("{} {} {}", integer_text(proof, *a.left), sign,
                       integer_text(proof, *a.right));
  return fmt::format("{}%K {} {}%K :> {}", paren(field_text(proof, *a.left)), sign,
                     paren(field_text(proof, *a.right)), field);
}

}  // namespace

std::string recurrence_equation(const proof::Proof& proof, const std::string& field) {
  const claim::Evidence& evidence = proof.claim->evidence;
  const std::string n = name_of(proof.claim->running);
  std::string left;
  for (std::size_t i = 0; i < evidence.recurrence.size(); ++i) {
    const std::string at = i == 0 ? n : fmt::format("({} + {})%Z", n, i);
    const std::string part =
        fmt::format("{} * s {}", field_text(proof, *evidence.recurrence[i]), at);
    left += left.empty() ? part : " + " + part;
  }
  const std::string right =
      evidence.right_side ? field_text(proof, *evidence.right_side) : std::string("inj 0");
  return fmt::format("({})%K = ({})%K :> {}", left, right, field);
}

std::string name_of(const std::string& symbol) { return safe_name(symbol); }

bool is_integer_argument(const proof::Proof& proof, const Expression& e) {
  switch (e.operation) {
    case Operation::literal:
      return true;
    case Operation::symbol:
      return !is_rational(proof, e.name);
    case Operation::negate:
    case Operation::add:
    case Operation::subtract:
    case Operation::multiply:
      return std::all_of(e.children.begin(), e.children.end(), [&](const claim::ExpressionPtr& c) {
        return is_integer_argument(proof, *c);
      });
    default:
      return false;
  }
}

std::string integer_text(const proof::Proof& proof, const Expression& e) {
  switch (e.operation) {
    case Operation::literal:
      return bracketed(e.value.get_str());
    case Operation::symbol:
      return name_of(e.name);
    case Operation::negate:
      return paren("- " + integer_text(proof, *e.children[0]));
    case Operation::add:
      return infix(proof, e, "+", integer_text);
    case Operation::subtract:
      return infix(proof, e, "-", integer_text);
    case Operation::multiply:
      return infix(proof, e, "*", integer_text);
    case Operation::divide:
      return infix(proof, e, "/", integer_text);
    case Operation::power:
      return infix(proof, e, "^", integer_text);
    case Operation::call:
      break;
  }
  if (e.name == "floor") return integer_text(proof, *e.children[0]);
  std::string out = integer_text(proof, *e.children[0]);
  for (std::size_t i = 1; i < e.children.size(); ++i)
    out = paren(fmt::format("Z.{} {} {}", e.name, out, integer_text(proof, *e.children[i])));
  return out;
}

std::string field_text(const proof::Proof& proof, const Expression& e) {
  switch (e.operation) {
    case Operation::literal:
      return paren("inj " + bracketed(e.value.get_str()));
    case Operation::symbol:
      return is_rational(proof, e.name) ? name_of(e.name) : paren("inj " + name_of(e.name));
    case Operation::negate:
      return paren("- " + field_text(proof, *e.children[0]));
    case Operation::add:
      return infix(proof, e, "+", field_text);
    case Operation::subtract:
      return infix(proof, e, "-", field_text);
    case Operation::multiply:
      return infix(proof, e, "*", field_text);
    case Operation::divide:
      if (claim::has_factorial(*e.children[1]))
        return paren(fmt::format("{} * {}", field_text(proof, *e.children[0]),
                                 reciprocal_text(proof, *e.children[1])));
      return infix(proof, e, "/", field_text);
    case Operation::power:
      return power_text(proof, e);
    case Operation::call:
      return call_text(proof, e);
  }
  throw std::logic_error("unknown expression");
}

std::string reciprocal_text(const proof::Proof& proof, const Expression& v) {
  if (v.operation == Operation::call && v.name == "factorial")
    return paren("rfactorial " + integer_text(proof, *v.children[0]));
  if (v.operation == Operation::multiply)
    return paren(fmt::format("{} * {}", reciprocal_text(proof, *v.children[0]),
                             reciprocal_text(proof, *v.children[1])));
  if (v.operation == Operation::divide)
    return paren(fmt::format("{} * {}", reciprocal_text(proof, *v.children[0]),
                             field_text(proof, *v.children[1])));
  if (v.operation == Operation::negate) return paren("- " + reciprocal_text(proof, *v.children[0]));
  if (v.operation == Operation::power) {
    const std::optional<mpz_class> c = claim::as_literal(*v.children[1]);
    if (c && *c >= 0)
      return paren(fmt::format("{} ^ {}", reciprocal_text(proof, *v.children[0]), c->get_str()));
  }
  return paren("/ " + field_text(proof, v));
}

std::string exclusion_name(const proof::Proof& proof, std::size_t parameter,
                           std::size_t exclusion) {
  return fmt::format("H_not_{}_{}", name_of(proof.symbols[parameter].name), exclusion + 1);
}

std::string assumption_name(std::size_t assumption) {
  return fmt::format("H_assume_{}", assumption + 1);
}

std::vector<Hypothesis> hypotheses(const proof::Proof& proof, const std::string& field) {
  std::vector<Hypothesis> out;
  const claim::Claim& claim = *proof.claim;
  for (std::size_t i = 0; i < claim.parameters.size(); ++i)
    for (std::size_t e = 0; e < claim.parameters[i].excluded.size(); ++e)
      out.push_back({exclusion_name(proof, i + 2, e),
                     exclusion_text(proof, name_of(claim.parameters[i].name),
                                    claim.parameters[i].excluded[e], field)});
  for (const claim::Parameter& p : claim.parameters)
    if (p.at_least)
      out.push_back({"H_least_" + name_of(p.name),
                     fmt::format("{} <= {}", bracketed(p.at_least->get_str()), name_of(p.name))});
  for (std::size_t i = 0; i < claim.assumptions.size(); ++i)
    out.push_back({assumption_name(i), assumption_text(proof, claim.assumptions[i], field)});
  return out;
}

namespace {

// No symbol of a claim is written with an underscore (safe_name).
constexpr const char* kLowEnd = "lo_end";
constexpr const char* kHighEnd = "hi_end";

}  // namespace

std::string sum_text(const proof::Proof& proof) {
  const claim::Sum& sum = proof.claim->sum;
  const std::string summand = field_text(proof, *sum.summand);
  if (sum.over.empty()) return fmt::format("{}%K", summand);
  return fmt::format("sum {} {} (fun {} : Z => {}%K)", end_text(proof, false),
                     end_text(proof, true), name_of(sum.over[0].index), summand);
}

std::string end_name(const proof::Proof& proof, bool upper) {
  const claim::Range& r = proof.claim->sum.over[0];
  const claim::Bound& bound = upper ? r.high : r.low;
  if (bound.value) return integer_text(proof, *bound.value);
  return upper ? kHighEnd : kLowEnd;
}

std::string end_text(const proof::Proof& proof, bool upper) {
  const claim::Range& r = proof.claim->sum.over[0];
  const bool infinite = !(upper ? r.high : r.low).value;
  if (!infinite || proof.claim->is_equality()) return end_name(proof, upper);
  return fmt::format("({} {})", end_name(proof, upper), name_of(proof.claim->running));
}

namespace {

std::vector<std::string> end_variables(const proof::Proof& proof) {
  std::vector<std::string> out;
  for (const claim::Range& r : proof.claim->sum.over) {
    if (!r.low.value) out.emplace_back(kLowEnd);
    if (!r.high.value) out.emplace_back(kHighEnd);
  }
  return out;
}

}  // namespace

std::string end_arguments(const proof::Proof& proof) {
  std::string out;
  for (const std::string& end : end_variables(proof)) out += " " + end;
  return out;
}

std::string end_binders(const proof::Proof& proof, const std::string& type) {
  std::string out;
  for (const std::string& end : end_variables(proof)) out += fmt::format(" ({} : {})", end, type);
  return out;
}

std::string vanishing_text(const proof::Proof& proof, const std::string& summand,
                           const std::string& low, const std::string& high,
                           const std::string& field) {
  if (end_variables(proof).empty()) return "";
  const claim::Range& r = proof.claim->sum.over[0];
  const std::string k = name_of(r.index);
  std::string beyond;
  if (!r.low.value) beyond = fmt::format("{} < {}", k, low);
  if (!r.high.value) beyond += fmt::format("{}{} < {}", beyond.empty() ? "" : " \\/ ", high, k);
  return fmt::format("(forall {} : Z, {} -> {} = 0%K :> {})", k, beyond, summand, field);
}

std::vector<std::string> parameter_names(const proof::Proof& proof) {
  std::vector<std::string> out;
  for (const auto ring : {claim::Parameter::Ring::rationals, claim::Parameter::Ring::integers})
    for (const claim::Parameter& p : proof.claim->parameters)
      if (p.ring == ring) out.push_back(name_of(p.name));
  return out;
}

std::string parameter_binders(const proof::Proof& proof, const std::string& field) {
  std::string out = field == "K" ? "(K : char0_field)" : "";
  for (const auto ring : {claim::Parameter::Ring::rationals, claim::Parameter::Ring::integers})
    for (const claim::Parameter& p : proof.claim->parameters)
      if (p.ring == ring)
        out += fmt::format("{}({} : {})", out.empty() ? "" : " ", name_of(p.name),
                           ring == claim::Parameter::Ring::rationals ? field : "Z");
  return out;
}

std::string statement_text(const proof::Proof& proof, const std::string& field) {
  const std::string n = name_of(proof.claim->running);
  const std::string parameters = parameter_binders(proof, field);
  std::string out = parameters.empty() ? "forall" : "forall " + parameters;
  const bool equality = proof.claim->is_equality();
  const std::string ends = end_binders(proof, equality ? "Z" : "Z -> Z");
  out += equality ? fmt::format(" ({} : Z){},\n", n, ends)
                  : fmt::format("{} (s : Z -> {}),\n", ends, field);
  const std::string vanishing =
      vanishing_text(proof, field_text(proof, *proof.claim->sum.summand) + "%K",
                     proof.claim->sum.over.empty() ? "" : end_text(proof, false),
                     proof.claim->sum.over.empty() ? "" : end_text(proof, true), field);
  for (const Hypothesis& h : hypotheses(proof, field)) out += fmt::format("  {} ->\n", h.text);
  const std::string from = bracketed(std::to_string(proof.from));
  if (equality) {
    if (!vanishing.empty())
      out += fmt::format("  {} <= {} ->\n  {} ->\n", from, n, vanishing);
    else
      out += fmt::format("  {} <= {} ->\n", from, n);
    out += fmt::format("  {} =\n  {}%K :> {}", sum_text(proof),
                       field_text(proof, *proof.claim->closed), field);
    return out;
  }
  out += fmt::format("  (forall {} : Z, s {} = {}) ->\n", n, n, sum_text(proof));
  if (!vanishing.empty())
    out += fmt::format("  (forall {} : Z, {} <= {} -> {}) ->\n", n, from, n, vanishing);
  out += fmt::format("  forall {} : Z, {} <= {} ->\n  {}", n, from, n,
                     recurrence_equation(proof, field));
  return out;
}

}  // namespace sumwright::writers::coq
