// From a claim to the values of one symbol that are worth trying, special ones early.
#include "term/candidates.hpp"

#include <algorithm>
#include <functional>
#include <set>
#include <stdexcept>
#include <utility>

#include "claim/affine.hpp"
#include "term/evaluator.hpp"

namespace sumwright::term::exact {

namespace {

using claim::Claim;
using claim::Exclusion;
using claim::Expression;
using claim::Operation;
using claim::Parameter;
using Candidates = std::vector<mpq_class>;

constexpr long kSmall = 20;                // candidates of an integer parameter reach so far
constexpr std::size_t kSpecial = 8;        // special values of one symbol
constexpr std::size_t kSpecialNodes = 12;  // size of a sub-expression searched for zeros
constexpr long kFar = 500;                 // special values of the running variable reach so far

[[nodiscard]] bool excludes(const Exclusion& exclusion, const mpq_class& value) {
  if (exclusion.kind == Exclusion::Kind::constant) return value == exclusion.value;
  if (value.get_den() != 1) return false;
  switch (exclusion.kind) {
    case Exclusion::Kind::positive_integers:
      return value > 0;
    case Exclusion::Kind::negative_integers:
      return value < 0;
    case Exclusion::Kind::nonnegative_integers:
      return value >= 0;
    case Exclusion::Kind::nonpositive_integers:
      return value <= 0;
    default:
      return true;
  }
}

[[nodiscard]] Candidates small_values(const Parameter& parameter) {
  Candidates values;
  if (parameter.ring == Parameter::Ring::integers && parameter.at_least) {
    for (long i = 0; i < 2 * kSmall; ++i) values.emplace_back(*parameter.at_least + i);
  } else if (parameter.ring == Parameter::Ring::integers) {
    values.emplace_back(0);
    for (long i = 1; i <= kSmall; ++i) {
      values.emplace_back(i);
      values.emplace_back(-i);
    }
  } else {
    values = {0, 1, -1, 2};
    for (const auto& [over, under] :
         {std::pair{1, 2}, {-1, 2}, {3, 1},  {-3, 2}, {-2, 1}, {1, 3}, {5, 2},
          {-4, 3},         {4, 1},  {-3, 1}, {7, 3},  {-7, 2}, {5, 1}, {-4, 1},
          {3, 4},          {-1, 5}, {11, 2}, {7, 1},  {-5, 1}, {10, 1}}) {
      values.emplace_back(over, under);
    }
  }
  return values;
}

// Values at which a claim is most likely to fail or to be without a value: zeros of small
// sub-expressions in one symbol alone, such as 7 for (x - 7)/(x - 7), starts of rising and
// falling factorials that pass through 0, and thresholds of binomial(u, 9).
class SpecialValues {
 public:
  SpecialValues(std::string name, Candidates tried, std::function<bool(const mpq_class&)> wanted)
      : name_(std::move(name)),
        tried_(std::move(tried)),
        wanted_(std::move(wanted)),
        symbols_({name_}) {}

  void search(const Expression& expression) { (void)size(expression); }
  [[nodiscard]] const Candidates& found() const { return found_; }

 private:
  // Nodes of an expression in the symbol alone; 0 when another symbol occurs or it is large.
  std::size_t size(const Expression& node) {
    std::size_t total = 1;
    bool alone = node.operation != Operation::symbol || node.name == name_;
    std::vector<std::size_t> sizes;
    for (const auto& child : node.children) {
      sizes.push_back(size(*child));
      alone = alone && sizes.back() > 0;
      total += sizes.back();
    }
    if (node.operation == Operation::call && sizes.front() > 0) call(node);
    if (!alone || total > kSpecialNodes) return 0;
    if (node.operation == Operation::add || node.operation == Operation::subtract) {
      solve(node, 0);
    }
    return total;
  }

  void call(const Expression& node) {
    const Expression& first = *node.children[0];
    if (node.name == "rising" || node.name == "falling") {
      for (long start = 0; start < 3; ++start) solve(first, node.name == "rising" ? -start : start);
    } else if (node.name == "binomial") {
      const auto lower = claim::as_literal(*node.children[1]);
      if (lower) solve(first, *lower);
    }
  }

  // Where node = target: the root of an affine node, else what is found among small values.
  void solve(const Expression& node, const mpq_class& target) {
    if (found_.size() >= kSpecial || !mentions(node, name_)) return;
    try {
      Program program(node, symbols_);
      const auto at = [&](const mpq_class& x) { return program.run({x}, machine_); };
      const Outcome origin = at(0);
      const Outcome one = at(1);
      const Outcome two = at(2);
      if (origin.is_number() && one.is_number() && two.is_number()) {
        const mpq_class slope = one.number - origin.number;
        if (slope != 0 && two.number - one.number == slope) {
          return add((target - origin.number) / slope);
        }
      }
      for (const mpq_class& x : tried_) {
        const Outcome outcome = at(x);
        if (outcome.is_number() && outcome.number == target) add(x);
      }
    } catch (const std::length_error&) {  // too large to be of use
    }
  }

  void add(const mpq_class& value) {
    if (found_.size() >= kSpecial || !wanted_(value)) return;
    if (std::find(found_.begin(), found_.end(), value) == found_.end()) found_.push_back(value);
  }

  std::string name_;
  Candidates tried_;
  std::function<bool(const mpq_class&)> wanted_;
  Symbols symbols_;
  Machine machine_;
  Candidates found_;
};

void for_each_expression(const Claim& claim, const std::function<void(const Expression&)>& use) {
  const auto use_sum = [&use](const claim::Sum& sum) {
    use(*sum.summand);
    for (const claim::Range& range : sum.over) {
      if (range.low.value) use(*range.low.value);
      if (range.high.value) use(*range.high.value);
    }
  };
  use_sum(claim.sum);
  if (claim.closed) use(*claim.closed);
  if (claim.other_sum) use_sum(*claim.other_sum);
  if (claim.is_equality()) return;
  for (const auto& coefficient : claim.evidence.recurrence) use(*coefficient);
  if (claim.evidence.right_side) use(*claim.evidence.right_side);
}

void collect_literals(const Expression& expression, std::set<mpz_class>& literals) {
  if (expression.operation == Operation::literal) literals.insert(expression.value);
  for (const auto& child : expression.children) collect_literals(*child, literals);
}

// Values near the constants of the hypotheses, so that far-off hypotheses can be met.
[[nodiscard]] Candidates values_near_hypotheses(const Claim& claim, const mpz_class* running) {
  std::set<mpz_class> centres;
  for (const claim::Assumption& assumption : claim.assumptions) {
    collect_literals(*assumption.left, centres);
    collect_literals(*assumption.right, centres);
  }
  for (const Parameter& parameter : claim.parameters) {
    if (parameter.at_least) centres.insert(*parameter.at_least);
  }
  Candidates values;
  if (running != nullptr) {
    for (const int step : {0, 1, -1}) values.emplace_back(*running + step);
    values.emplace_back(2 * *running);
    values.emplace_back(-*running);
  }
  for (const mpz_class& centre : centres) {
    if (values.size() > 2 * kSmall) break;
    for (const int step : {0, 1, -1}) values.emplace_back(centre + step);
    values.emplace_back(-centre);
    if (running != nullptr) values.emplace_back(centre + *running);
  }
  return values;
}

void collect_thresholds(const Expression& node, std::set<mpz_class>& thresholds) {
  if (node.operation == Operation::call && node.name == "binomial") {
    if (const auto lower = claim::as_literal(*node.children[1])) thresholds.insert(*lower);
  }
  for (const auto& child : node.children) collect_thresholds(*child, thresholds);
}

// Lower arguments c of binomial(u, c), whatever u: from a sum over k <= n, n = c is where it sets
// in.
[[nodiscard]] std::vector<mpz_class> binomial_thresholds(const Claim& claim) {
  std::set<mpz_class> all;
  for_each_expression(claim, [&all](const Expression& use) { collect_thresholds(use, all); });
  std::vector<mpz_class> near;
  for (const mpz_class& n : all) {
    if (n >= claim.from && n <= claim.from + kFar && near.size() < kSpecial) near.push_back(n);
  }
  return near;
}

}  // namespace

bool mentions(const Expression& expression, const std::string& name) {
  return (expression.operation == Operation::symbol && expression.name == name) ||
         std::any_of(expression.children.begin(), expression.children.end(),
                     [&name](const auto& child) { return mentions(*child, name); });
}

bool admits(const Parameter& parameter, const mpq_class& value) {
  if (parameter.ring == Parameter::Ring::integers) {
    return value.get_den() == 1 && (!parameter.at_least || value >= *parameter.at_least);
  }
  return std::none_of(parameter.excluded.begin(), parameter.excluded.end(),
                      [&value](const Exclusion& entry) { return excludes(entry, value); });
}

std::vector<mpq_class> candidates(const Claim& claim, const Parameter& parameter,
                                  const mpz_class* running) {
  const Candidates small = small_values(parameter);
  const Candidates near = values_near_hypotheses(claim, running);
  SpecialValues special(parameter.name, small,
                        [&parameter](const mpq_class& value) { return admits(parameter, value); });
  for_each_expression(claim, [&special](const Expression& use) { special.search(use); });
  Candidates all;
  const auto append = [&](Candidates::const_iterator from, Candidates::const_iterator to) {
    for (; from != to; ++from) {
      if (admits(parameter, *from) && std::find(all.begin(), all.end(), *from) == all.end()) {
        all.push_back(*from);
      }
    }
  };
  append(small.begin(), small.begin() + 2);
  append(special.found().begin(), special.found().end());
  append(small.begin() + 2, small.begin() + 8);
  append(near.begin(), near.end());
  append(small.begin() + 8, small.end());
  return all;
}

std::vector<mpz_class> special_running_values(const Claim& claim) {
  SpecialValues special(claim.running, {}, [&claim](const mpq_class& n) {
    return n.get_den() == 1 && n >= claim.from && n <= claim.from + kFar;
  });
  for_each_expression(claim, [&special](const Expression& use) { special.search(use); });
  std::vector<mpz_class> values;
  for (const mpq_class& value : special.found()) values.push_back(value.get_num());
  for (const mpz_class& threshold : binomial_thresholds(claim)) values.push_back(threshold);
  return values;
}

}  // namespace sumwright::term::exact
