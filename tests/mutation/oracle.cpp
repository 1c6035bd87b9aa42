// The second opinion of the mutation test: values of the claim's own expressions.
#include "oracle.hpp"

#include <optional>
#include <stdexcept>
#include <string>
#include <vector>

#include "claim/reader.hpp"
#include "term/evaluation.hpp"

namespace sumwright::testing {
namespace {

using State = Opinion::State;
using term::Assignment;

constexpr std::size_t kEnoughPoints = 10;

std::string text(const term::Value& v) {
  return v.number ? v.number->get_str() : "no value: " + v.why_not;
}

std::string text(const Assignment& at) {
  std::string out;
  for (const auto& [name, value] : at)
    out += (out.empty() ? "" : ", ") + name + " = " + value.get_str();
  return out;
}

claim::Claim recurrence_only(const claim::Claim& claim) {
  claim::Claim out = claim;
  out.closed = nullptr;
  out.other_sum.reset();
  return out;
}

/// An infinite range as one that reaches far beyond the support of all small mutants.
claim::Claim with_window(const claim::Claim& claim) {
  claim::Claim out = claim;
  std::vector<std::string> names{claim.running};
  std::string reach = "3*" + claim.running + " + 150";
  for (const claim::Parameter& p : claim.parameters)
    if (p.ring == claim::Parameter::Ring::integers) {
      names.push_back(p.name);
      reach += " + 2*" + p.name;
    }
  const auto bound = [&](const std::string& text) {
    const claim::Source source{"window", text};
    return claim::parse_expression(source, {0, text.size()}, names);
  };
  for (claim::Range& r : out.sum.over) {
    if (!r.low.value) r.low = {claim::Bound::Kind::finite, bound("-(" + reach + ")"), r.low.place};
    if (!r.high.value) r.high = {claim::Bound::Kind::finite, bound(reach), r.high.place};
  }
  return out;
}

/// A random point that satisfies the hypotheses; the index is free.
std::optional<Assignment> random_point(const claim::Claim& claim, std::mt19937_64& random) {
  const auto pick = [&](long low, long high) {
    return std::uniform_int_distribution<long>(low, high)(random);
  };
  Assignment at;
  const long n = claim.from.get_si() + pick(5, 40);
  at[claim.running] = n;
  for (const claim::Parameter& p : claim.parameters) {
    if (p.ring == claim::Parameter::Ring::integers) {
      const long least = p.at_least ? p.at_least->get_si() : -20;
      at[p.name] = least + pick(0, 60);
    } else {
      at[p.name] = mpq_class(pick(-400, 400), 7 * pick(1, 9) + 1);
      at[p.name].canonicalize();
    }
  }
  if (!term::satisfies_hypotheses(claim, at)) return std::nullopt;
  for (const claim::Range& r : claim.sum.over) at[r.index] = pick(-2, n + 3);
  return at;
}

/// The two sides of the telescoping identity divided by F; nothing where a part has no value.
std::optional<std::pair<mpq_class, mpq_class>> identity_sides(const claim::Claim& claim,
                                                              const Assignment& at) {
  const std::string& index = claim.sum.over.at(0).index;
  const claim::Expression& r = *claim.evidence.certificate.at(index);
  const auto summand = [&](long by_running, long by_index) {
    Assignment moved = at;
    moved[claim.running] += by_running;
    moved[index] += by_index;
    return term::evaluate(*claim.sum.summand, moved).number;
  };
  const std::optional<mpq_class> here = summand(0, 0);
  const std::optional<mpq_class> next = summand(0, 1);
  Assignment beyond = at;
  beyond[index] += 1;
  const term::Value low = term::evaluate(r, at);
  const term::Value high = term::evaluate(r, beyond);
  if (!here || !next || *here == 0 || !low.number || !high.number) return std::nullopt;
  mpq_class left = 0;
  for (std::size_t i = 0; i < claim.evidence.recurrence.size(); ++i) {
    const term::Value a = term::evaluate(*claim.evidence.recurrence[i], at);
    const std::optional<mpq_class> f = summand(static_cast<long>(i), 0);
    if (!a.number || !f) return std::nullopt;
    left += *a.number * *f;
  }
  const mpq_class right = *high.number * *next - *low.number * *here;
  return std::make_pair(mpq_class(left / *here), mpq_class(right / *here));
}

}  // namespace

Opinion claim_holds(const claim::Claim& claim, long span) {
  Opinion out;
  std::vector<Assignment> samples = term::sample_parameters(claim, 6);
  const claim::Claim finite = with_window(claim);
  for (long i = 0; i < span; ++i)
    for (Assignment at : samples) {
      at[claim.running] = claim.from + i;
      if (!term::satisfies_hypotheses(claim, at)) continue;
      const term::Sides sides = term::evaluate_sides(finite, at);
      ++out.cases;
      if (sides.left.number && sides.right.number && *sides.left.number == *sides.right.number)
        continue;
      out.state = State::differs;
      out.where = text(at) + ": " + text(sides.left) + " and " + text(sides.right);
      return out;
    }
  out.state = out.cases == 0 ? State::unknown : State::agrees;
  if (out.cases == 0) out.where = "no parameter values were found";
  return out;
}

Opinion recurrence_holds(const claim::Claim& claim, long span) {
  return claim_holds(recurrence_only(claim), span);
}

Opinion certificate_holds(const claim::Claim& claim, std::mt19937_64& random) {
  Opinion out;
  for (int tries = 0; tries < 4000 && out.cases < kEnoughPoints; ++tries) {
    const std::optional<Assignment> at = random_point(claim, random);
    if (!at) continue;
    const auto sides = identity_sides(claim, *at);
    if (!sides) continue;
    ++out.cases;
    if (sides->first == sides->second) continue;
    out.state = State::differs;
    out.where = text(*at) + ": " + sides->first.get_str() + " and " + sides->second.get_str() +
                " (divided by F)";
    return out;
  }
  out.state = out.cases < kEnoughPoints ? State::unknown : State::agrees;
  if (out.state == State::unknown) out.where = "too few points with values";
  return out;
}

bool equal_values(const claim::Claim& claim, const claim::Expression& a, const claim::Expression& b,
                  std::mt19937_64& random) {
  std::size_t compared = 0;
  for (int tries = 0; tries < 400 && compared < kEnoughPoints; ++tries) {
    const std::optional<Assignment> at = random_point(claim, random);
    if (!at) continue;
    const term::Value x = term::evaluate(a, *at);
    const term::Value y = term::evaluate(b, *at);
    if (!x.number && !y.number) continue;
    if (!x.number || !y.number || *x.number != *y.number) return false;
    ++compared;
  }
  return compared >= kEnoughPoints;
}

std::string check_counterexample(const claim::Claim& claim, const proof::Proof& proof) {
  if (!proof.counterexample) return "no point is given";
  const proof::Counterexample& point = *proof.counterexample;
  Assignment at;
  for (const auto& [name, value] : point.values) at[name] = value;
  if (point.left == point.right) return "both sides are " + point.left;
  if (at[claim.running] < claim.from) return "n is below `from`";
  if (point.what == "the telescoping identity") {
    // `from` does not bound the identity, but both sides must have values there.
    const auto sides = identity_sides(claim, at);
    if (!sides) return {};  // F = 0 there: not decided by division
    return sides->first == sides->second ? "the identity holds at the point" : "";
  }
  const bool equality = point.what == "the claimed equality";
  if (equality != (claim.is_equality() && proof.subject == proof::Subject::claim))
    return "the point is about '" + point.what + "'";
  if (!term::satisfies_hypotheses(claim, at)) return "the point does not satisfy the hypotheses";
  // Indices are named where the summand has no value; they are not part of the claim's assignment.
  for (const claim::Range& r : claim.sum.over) at.erase(r.index);
  const term::Sides sides =
      term::evaluate_sides(with_window(equality ? claim : recurrence_only(claim)), at);
  if (sides.left.number && sides.right.number && *sides.left.number == *sides.right.number)
    return "both sides are equal at the point";
  if (sides.left.number && sides.left.number->get_str() != point.left)
    return "the left side is " + sides.left.number->get_str() + ", not " + point.left;
  if (sides.right.number && sides.right.number->get_str() != point.right)
    return "the right side is " + sides.right.number->get_str() + ", not " + point.right;
  return {};
}

}  // namespace sumwright::testing
