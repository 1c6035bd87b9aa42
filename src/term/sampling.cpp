// From a claim's hypotheses to parameter values that satisfy them.
//
// Every parameter has a list of candidates, small and special values first; tuples are tried
// by the sum of their places in the lists, in turn with tuples of unlike places, since small
// values alone are often degenerate. The order depends on the claim alone.
#include "term/sampling.hpp"

#include <algorithm>
#include <functional>
#include <set>
#include <stdexcept>
#include <utility>

namespace sumwright::term {

namespace exact {

namespace {

using claim::Claim;
using claim::Exclusion;
using claim::Expression;
using claim::Operation;
using claim::Parameter;
using Candidates = std::vector<mpq_class>;

constexpr long kSmall = 20;                // candidates of an integer parameter reach so far
constexpr std::size_t kSpecial = 6;        // special values of one parameter
constexpr std::size_t kSpecialNodes = 12;  // size of a sub-expression searched for zeros
constexpr std::size_t kTuples = 20000;     // tuples tried in each order

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

[[nodiscard]] bool admits(const Parameter& parameter, const mpq_class& value) {
  if (parameter.ring == Parameter::Ring::integers) {
    return value.get_den() == 1 && (!parameter.at_least || value >= *parameter.at_least);
  }
  return std::none_of(parameter.excluded.begin(), parameter.excluded.end(),
                      [&value](const Exclusion& entry) { return excludes(entry, value); });
}

[[nodiscard]] bool holds(const mpq_class& left, claim::Comparison comparison,
                         const mpq_class& right) {
  switch (comparison) {
    case claim::Comparison::less_equal:
      return left <= right;
    case claim::Comparison::less:
      return left < right;
    case claim::Comparison::greater_equal:
      return left >= right;
    case claim::Comparison::greater:
      return left > right;
    case claim::Comparison::not_equal:
      return left != right;
  }
  return false;
}

[[nodiscard]] bool names(const Expression& expression, const std::string& name) {
  std::vector<std::string> symbols;
  collect_symbols(expression, symbols);
  return std::find(symbols.begin(), symbols.end(), name) != symbols.end();
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

// Zeros of small sub-expressions in one parameter alone, such as 7 for (x - 7)/(x - 7): the
// values at which a claim is most likely to fail, and to be without a value.
class SpecialValues {
 public:
  SpecialValues(const std::string& name, const Candidates& tried)
      : name_(name), tried_(tried), symbols_({name}) {}

  void search(const Expression& expression) { (void)size(expression); }
  [[nodiscard]] const Candidates& found() const { return found_; }

 private:
  // Nodes of an expression in the parameter alone; 0 when another symbol occurs or it is large.
  std::size_t size(const Expression& node) {
    std::size_t total = 1;
    bool alone = node.operation != Operation::symbol || node.name == name_;
    for (const auto& child : node.children) {
      const std::size_t part = size(*child);
      alone = alone && part > 0;
      total += part;
    }
    if (!alone || total > kSpecialNodes) return 0;
    if (node.operation == Operation::add || node.operation == Operation::subtract) zeros(node);
    return total;
  }

  void zeros(const Expression& node) {
    if (found_.size() >= kSpecial || !names(node, name_)) return;
    try {
      Program program(node, symbols_);
      const auto at = [&](const mpq_class& x) { return program.run({x}, machine_); };
      const Outcome origin = at(0);
      const Outcome one = at(1);
      const Outcome two = at(2);
      if (origin.is_number() && one.is_number() && two.is_number()) {
        const mpq_class slope = one.number - origin.number;
        if (slope != 0 && two.number - one.number == slope) return add(-origin.number / slope);
      }
      for (const mpq_class& x : tried_) {
        const Outcome outcome = at(x);
        if (outcome.is_number() && outcome.number == 0) add(x);
      }
    } catch (const std::length_error&) {  // too large to be of use
    }
  }

  void add(const mpq_class& value) {
    if (found_.size() >= kSpecial) return;
    if (std::find(found_.begin(), found_.end(), value) == found_.end()) found_.push_back(value);
  }

  std::string name_;
  Candidates tried_;
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

[[nodiscard]] Candidates candidates(const Claim& claim, const Parameter& parameter,
                                    const Candidates& near) {
  const Candidates small = small_values(parameter);
  SpecialValues special(parameter.name, small);
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

// Tuples of places in the lists of candidates.
class Tuples {
 public:
  Tuples(const Claim& claim, Hypotheses& hypotheses, const mpz_class* running)
      : hypotheses_(hypotheses), with_running_(running != nullptr), slots_(1) {
    slots_[0] = running == nullptr ? mpz_class(0) : *running;
    const Candidates near = values_near_hypotheses(claim, running);
    for (const Parameter& parameter : claim.parameters) {
      lists_.push_back(candidates(claim, parameter, near));
    }
    slots_.resize(1 + lists_.size());
  }

  [[nodiscard]] bool possible() const {
    return std::none_of(lists_.begin(), lists_.end(),
                        [](const Candidates& list) { return list.empty(); });
  }

  // By the sum of the places.
  [[nodiscard]] std::vector<Slots> graded(std::size_t count) {
    start(count);
    std::size_t most = 0;
    for (const Candidates& list : lists_) most += list.size() - 1;
    for (std::size_t sum = 0; sum <= most && !done(); ++sum) place(0, sum);
    return std::move(found_);
  }

  // Unlike places, and places far out: a multiplicative walk through the lists.
  [[nodiscard]] std::vector<Slots> mixed(std::size_t count) {
    start(count);
    for (std::size_t turn = 1; !done() && turn < kTuples; ++turn) {
      for (std::size_t i = 0; i < lists_.size(); ++i) {
        const std::size_t place = (turn + 1) * (2 * i + 1) + turn / 7 * i + i;
        slots_[i + 1] = lists_[i][place % lists_[i].size()];
      }
      consider();
    }
    return std::move(found_);
  }

 private:
  void start(std::size_t count) {
    found_.clear();
    wanted_ = count;
    tried_ = 0;
  }
  [[nodiscard]] bool done() const { return found_.size() >= wanted_ || tried_ >= kTuples; }

  // Places of the parameters from `i` on with the given sum.
  void place(std::size_t i, std::size_t sum) {
    if (done()) return;
    if (i == lists_.size()) {
      if (sum == 0) consider();
      return;
    }
    if (i + 1 == lists_.size()) {
      if (sum >= lists_[i].size()) {
        ++tried_;
        return;
      }
      slots_[i + 1] = lists_[i][sum];
      return consider();
    }
    for (std::size_t own = std::min(sum, lists_[i].size() - 1) + 1; own-- > 0;) {
      slots_[i + 1] = lists_[i][own];
      place(i + 1, sum - own);
    }
  }

  void consider() {
    ++tried_;
    if (!hypotheses_.admit(slots_, with_running_)) return;
    if (std::find(found_.begin(), found_.end(), slots_) == found_.end()) found_.push_back(slots_);
  }

  Hypotheses& hypotheses_;
  bool with_running_;
  Slots slots_;
  std::vector<Candidates> lists_;
  std::vector<Slots> found_;
  std::size_t wanted_ = 0;
  std::size_t tried_ = 0;
};

}  // namespace

Symbols claim_symbols(const Claim& claim) {
  Symbols symbols({claim.running});
  for (const Parameter& parameter : claim.parameters) symbols.add(parameter.name);
  return symbols;
}

Hypotheses::Hypotheses(const Claim& claim) : claim_(claim) {
  const Symbols symbols = claim_symbols(claim);
  for (const claim::Assumption& entry : claim.assumptions) {
    const bool running = names(*entry.left, claim.running) || names(*entry.right, claim.running);
    names_running_ = names_running_ || running;
    assumptions_.push_back(
        {Program(*entry.left, symbols), entry.comparison, Program(*entry.right, symbols), running});
  }
}

bool Hypotheses::admit(const Slots& slots, bool with_running) {
  for (std::size_t i = 0; i < claim_.parameters.size(); ++i) {
    if (!admits(claim_.parameters[i], slots[i + 1])) return false;
  }
  return std::all_of(assumptions_.begin(), assumptions_.end(), [&](Compared& entry) {
    if (entry.names_running && !with_running) return true;
    const Outcome left = entry.left.run(slots, machine_);
    const Outcome right = entry.right.run(slots, machine_);
    return left.is_number() && right.is_number() &&
           holds(left.number, entry.comparison, right.number);
  });
}

std::vector<Slots> sample_slots(const Claim& claim, Hypotheses& hypotheses, std::size_t count,
                                const mpz_class* running) {
  Tuples tuples(claim, hypotheses, running);
  if (count == 0 || !tuples.possible()) return {};
  const std::vector<Slots> graded = tuples.graded(count);
  const bool several = claim.parameters.size() > 1 || graded.empty();
  const std::vector<Slots> mixed = several ? tuples.mixed(count) : std::vector<Slots>{};
  std::vector<Slots> all;
  const auto take = [&all, count](const std::vector<Slots>& from, std::size_t i) {
    if (i >= from.size() || all.size() >= count) return;
    if (std::find(all.begin(), all.end(), from[i]) == all.end()) all.push_back(from[i]);
  };
  for (std::size_t i = 0; i < count && all.size() < count; ++i) {
    take(graded, i);
    take(mixed, i);
  }
  return all;
}

}  // namespace exact

std::vector<Assignment> sample_parameters(const claim::Claim& claim, std::size_t count) {
  exact::Hypotheses hypotheses(claim);
  std::vector<Assignment> result;
  for (const exact::Slots& slots : exact::sample_slots(claim, hypotheses, count, nullptr)) {
    Assignment assignment;
    for (std::size_t i = 0; i < claim.parameters.size(); ++i) {
      assignment[claim.parameters[i].name] = slots[i + 1];
    }
    result.push_back(std::move(assignment));
  }
  return result;
}

bool satisfies_hypotheses(const claim::Claim& claim, const Assignment& at) {
  exact::Slots slots(1);
  const auto running = at.find(claim.running);
  if (running != at.end()) {
    slots[0] = running->second;
    if (slots[0].get_den() != 1 || slots[0] < claim.from) return false;
  }
  for (const claim::Parameter& parameter : claim.parameters) {
    const auto found = at.find(parameter.name);
    if (found == at.end()) {
      throw std::invalid_argument("no value is given for '" + parameter.name + "'");
    }
    slots.push_back(found->second);
  }
  exact::Hypotheses hypotheses(claim);
  if (running == at.end() && hypotheses.name_running()) {
    throw std::invalid_argument("no value is given for '" + claim.running + "'");
  }
  return hypotheses.admit(slots, running != at.end());
}

}  // namespace sumwright::term
