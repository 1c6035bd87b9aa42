// From a claim's hypotheses to parameter values that satisfy them.
//
// Every parameter has a list of candidates, small and special values first; tuples are tried
// by the sum of their places in the lists, in turn with tuples of unlike places, since small
// values alone are often degenerate. The order depends on the claim alone.
#include "term/sampling.hpp"

#include <algorithm>
#include <stdexcept>
#include <utility>

#include "term/candidates.hpp"

namespace sumwright::term {

namespace exact {

namespace {

using claim::Claim;
using claim::Expression;
using claim::Parameter;
using Candidates = std::vector<mpq_class>;

constexpr std::size_t kTuples = 20000;  // tuples tried in each order

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

// Tuples of places in the lists of candidates.
class Tuples {
 public:
  Tuples(const Claim& claim, Hypotheses& hypotheses, const mpz_class* running)
      : hypotheses_(hypotheses), with_running_(running != nullptr), slots_(1) {
    slots_[0] = running == nullptr ? mpz_class(0) : *running;
    for (const Parameter& parameter : claim.parameters) {
      lists_.push_back(candidates(claim, parameter, running));
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
    const bool running =
        mentions(*entry.left, claim.running) || mentions(*entry.right, claim.running);
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
