// From a claim, or from evidence shown wrong, to a point at which it fails.
//
// Both sides are evaluated exactly, smallest n first; a point is given only where both sides
// were evaluated to numbers that differ, or where the claim's own terms have no value. Points
// at which the numbers or sums are too large to evaluate are passed over.
#include <algorithm>
#include <set>
#include <stdexcept>
#include <utility>

#include "term/candidates.hpp"
#include "term/clearing.hpp"
#include "term/evaluation.hpp"
#include "term/evaluator.hpp"
#include "term/sampling.hpp"

namespace sumwright::term {

namespace exact {
namespace {

using claim::Claim;
using Named = std::vector<std::pair<std::string, mpq_class>>;

constexpr std::size_t kTerms = 20000;              // points of one sum
constexpr std::size_t kCertificatePoints = 20000;  // points tried against a certificate
constexpr long kCertificateSpan = 40;              // values of the running variable tried
constexpr long kCertificateWidth = 100;            // values of the index tried per n
constexpr std::size_t kCertificateSamples = 6;

// A side's value, and the indices at which its summand has none.
struct Side {
  Outcome outcome;
  Named indices;
};

[[nodiscard]] std::string with_indices(const Side& side) {
  std::string text = side.outcome.reason->text;
  for (const auto& [name, number] : side.indices) {
    text += (name == side.indices.front().first ? " at " : ", ") + name + " = " + number.get_str();
  }
  return text;
}

[[nodiscard]] Value value_of(const Side& side) {
  Value value = side.outcome.value();
  if (!value.number) value.why_not = with_indices(side);
  return value;
}

// S(n) by n, for one assignment of the parameters.
using KnownSums = std::map<mpz_class, Side>;

// A claim compiled for evaluation of both sides.
class CompiledClaim {
 public:
  CompiledClaim(const Claim& claim, const algebra::Deadline& deadline)
      : claim_(claim),
        symbols_(claim_symbols(claim)),
        machine_(deadline),
        sum_(claim.sum, symbols_),
        recurrence_(
            claim.is_equality() ? std::vector<claim::ExpressionPtr>{} : claim.evidence.recurrence,
            claim.evidence.right_side.get(), symbols_) {
    if (claim.closed) closed_.emplace(*claim.closed, symbols_);
    if (claim.other_sum) other_.emplace(*claim.other_sum, symbols_);
  }

  // The sides at the slots (running variable first). Sums already in `known` are not repeated.
  [[nodiscard]] std::pair<Side, Side> sides(const Slots& at, KnownSums& known) {
    machine_.check();
    Slots slots = at;
    slots.resize(symbols_.size());
    if (closed_) return {sum(slots, known), {closed_->run(slots, machine_), {}}};
    if (other_) return {sum(slots, known), summed(*other_, slots)};
    if (claim_.is_question()) return {sum(slots, known), sum(slots, known)};
    return recurrence(slots, known);
  }

 private:
  [[nodiscard]] Side summed(SumProgram& program, Slots& slots) {
    SumProgram::Result result = program.run(slots, machine_, kTerms);
    return {std::move(result.outcome), std::move(result.indices)};
  }

  [[nodiscard]] const Side& sum(Slots& slots, KnownSums& known) {
    const mpz_class n = slots[0].get_num();
    auto found = known.find(n);
    if (found == known.end()) found = known.emplace(n, summed(sum_, slots)).first;
    return found->second;
  }

  [[nodiscard]] std::pair<Side, Side> recurrence(Slots& slots, KnownSums& known) {
    ClearedRecurrence::Row row = recurrence_.at(slots, machine_);
    Side left;
    const mpq_class n = slots[0];
    for (std::size_t i = 0; i < row.coefficients.size(); ++i) {
      slots[0] = n + mpq_class(mpz_class(i));
      const Side& term = sum(slots, known);
      multiply(row.coefficients[i], term.outcome);
      const bool valued = left.outcome.is_number();
      add(left.outcome, row.coefficients[i]);
      if (valued && !left.outcome.is_number()) left.indices = term.indices;
    }
    // NOLINTNEXTLINE(performance-move-const-arg): Side is returned by value
    return {std::move(left), {row.right_side, {}}};
  }

  const Claim& claim_;
  Symbols symbols_;
  Machine machine_;
  SumProgram sum_;
  ClearedRecurrence recurrence_;
  std::optional<Program> closed_;
  std::optional<SumProgram> other_;
};

[[nodiscard]] Named point(const Claim& claim, const Slots& slots, const Named& indices) {
  Named at = {{claim.running, slots[0]}};
  at.insert(at.end(), indices.begin(), indices.end());
  for (std::size_t i = 0; i < claim.parameters.size(); ++i) {
    at.emplace_back(claim.parameters[i].name, slots[i + 1]);
  }
  return at;
}

[[nodiscard]] bool differ(const Outcome& left, const Outcome& right) {
  return !left.is_number() || !right.is_number() || left.number != right.number;
}

// Parameter values for each n: the same for all n, unless the hypotheses name n.
class Samples {
 public:
  Samples(const Claim& claim, std::size_t count)
      : claim_(claim), count_(count), hypotheses_(claim) {
    if (!hypotheses_.name_running()) fixed_ = sample_slots(claim_, hypotheses_, count_, nullptr);
  }
  [[nodiscard]] std::vector<Slots> at(const mpz_class& n) {
    if (hypotheses_.name_running()) return sample_slots(claim_, hypotheses_, count_, &n);
    std::vector<Slots> samples = fixed_;
    for (Slots& slots : samples) slots[0] = n;
    return samples;
  }

 private:
  const Claim& claim_;
  std::size_t count_;
  Hypotheses hypotheses_;
  std::vector<Slots> fixed_;
};

[[nodiscard]] bool is_infinite(const claim::Sum& sum) {
  return std::any_of(sum.over.begin(), sum.over.end(), [](const claim::Range& range) {
    return !range.low.value || !range.high.value;
  });
}

[[nodiscard]] std::set<mpz_class> points(const Claim& claim, long span,
                                         const std::vector<mpz_class>& also) {
  std::set<mpz_class> all;
  for (long i = 0; i < span; ++i) all.insert(claim.from + i);
  for (const mpz_class& n : also) {
    if (n >= claim.from) all.insert(n);
  }
  if (span > 0) {
    for (const mpz_class& n : special_running_values(claim)) all.insert(n);
  }
  return all;
}

// The telescoped identity of a certificate, compiled for evaluation at integer points.
class CompiledCertificate {
 public:
  CompiledCertificate(const Claim& claim, const std::vector<claim::ExpressionPtr>& recurrence,
                      const claim::Expression& certificate, const algebra::Deadline& deadline)
      : symbols_(claim_symbols(claim)),
        machine_(deadline),
        index_(symbols_.add(claim.sum.over[0].index)),
        summand_(*claim.sum.summand, symbols_),
        certificate_(certificate, symbols_) {
    for (const auto& coefficient : recurrence) coefficients_.emplace_back(*coefficient, symbols_);
  }

  struct Compared {
    Outcome left;
    Outcome right;
  };

  // Both sides at a point where F is not 0 and its shift quotients are regular on the way to
  // all points involved: there the identity of rational functions is one of numbers. Nothing
  // at other points: a true certificate may fail there.
  [[nodiscard]] std::optional<Compared> at(const Slots& point, const mpz_class& k) {
    machine_.check();
    Slots slots = point;
    slots.resize(symbols_.size());
    chambers_.reset();
    slots[index_] = k + 1;
    Outcome right = certificate_.run(slots, machine_);
    if (!right.is_number() || !times_term(right, slots)) return std::nullopt;
    slots[index_] = k;
    Outcome right_end = certificate_.run(slots, machine_);
    if (!right_end.is_number() || !times_term(right_end, slots)) return std::nullopt;
    subtract(right, right_end);
    Outcome left;
    Slots moved = slots;
    for (Program& coefficient : coefficients_) {
      Outcome part = coefficient.run(slots, machine_);
      if (!part.is_number() || !times_term(part, moved)) return std::nullopt;
      add(left, part);
      moved[0] += 1;
    }
    return Compared{std::move(left), std::move(right)};
  }

 private:
  // factor := factor * F; false where F is 0, has no value, or lies in another chamber.
  bool times_term(Outcome& factor, const Slots& slots) {
    Chambers chambers;
    const Outcome term = summand_.run(slots, machine_, &chambers);
    if (!term.is_number() || term.number == 0) return false;
    if (!chambers_) chambers_ = chambers;
    if (*chambers_ != chambers) return false;
    multiply(factor, term);
    return true;
  }

  Symbols symbols_;
  Machine machine_;
  std::size_t index_;
  Program summand_;
  Program certificate_;
  std::vector<Program> coefficients_;
  std::optional<Chambers> chambers_;  // of the point's first term
};

// The index values to try at one n: the claim's range and a margin, or around 0..n.
class IndexWindow {
 public:
  explicit IndexWindow(const Claim& claim) : symbols_(claim_symbols(claim)) {
    const claim::Range& range = claim.sum.over[0];
    if (range.low.value) low_.emplace(*range.low.value, symbols_);
    if (range.high.value) high_.emplace(*range.high.value, symbols_);
  }
  [[nodiscard]] std::pair<mpz_class, mpz_class> at(const Slots& slots) {
    const mpz_class n = slots[0].get_num();
    mpz_class low = low_ ? run_integer(*low_, slots, machine_) : mpz_class(-abs(n));
    mpz_class high = high_ ? run_integer(*high_, slots, machine_) : mpz_class(2 * abs(n));
    if (high < low) std::swap(low, high);
    low -= 3;
    high += 3;
    if (high - low > kCertificateWidth) high = low + kCertificateWidth;
    return {low, high};
  }

 private:
  Symbols symbols_;
  Machine machine_;
  std::optional<Program> low_;
  std::optional<Program> high_;
};

}  // namespace
}  // namespace exact

Sides evaluate_sides(const claim::Claim& claim, const Assignment& at) {
  exact::CompiledClaim compiled(claim, {});
  exact::Slots slots;
  const auto number = [&at](const std::string& name) -> const mpq_class& {
    const auto found = at.find(name);
    if (found == at.end()) throw std::invalid_argument("no value is given for '" + name + "'");
    return found->second;
  };
  slots.push_back(number(claim.running));
  for (const claim::Parameter& parameter : claim.parameters) {
    slots.push_back(number(parameter.name));
  }
  exact::KnownSums known;
  const auto [left, right] = compiled.sides(slots, known);
  return {value_of(left), value_of(right)};
}

std::optional<Difference> refute(const claim::Claim& claim, long span, std::size_t samples,
                                 const std::vector<mpz_class>& also,
                                 const algebra::Deadline& deadline) {
  if (exact::is_infinite(claim.sum)) return std::nullopt;
  if (claim.other_sum && exact::is_infinite(*claim.other_sum)) return std::nullopt;
  exact::CompiledClaim compiled(claim, deadline);
  exact::Samples assignments(claim, samples);
  std::vector<exact::KnownSums> known;
  for (const mpz_class& n : exact::points(claim, span, also)) {
    const std::vector<exact::Slots> at = assignments.at(n);
    known.resize(at.size());
    for (std::size_t i = 0; i < at.size(); ++i) {
      known[i].erase(known[i].begin(), known[i].lower_bound(n));
      try {
        const auto [left, right] = compiled.sides(at[i], known[i]);
        if (!exact::differ(left.outcome, right.outcome)) continue;
        const auto& indices = left.outcome.is_number() ? right.indices : left.indices;
        return Difference{exact::point(claim, at[i], indices), left.outcome.value(),
                          right.outcome.value()};
      } catch (const std::length_error&) {
        continue;  // too large to evaluate
      }
    }
  }
  return std::nullopt;
}

std::optional<Difference> refute_certificate(const claim::Claim& claim,
                                             const std::vector<claim::ExpressionPtr>& recurrence,
                                             const claim::Expression& certificate,
                                             const algebra::Deadline& deadline) {
  if (claim.sum.over.size() != 1) return std::nullopt;
  exact::CompiledCertificate compiled(claim, recurrence, certificate, deadline);
  exact::IndexWindow window(claim);
  exact::Samples assignments(claim, exact::kCertificateSamples);
  const std::string& index = claim.sum.over[0].index;
  std::size_t tried = 0;
  for (long i = 0; i < exact::kCertificateSpan; ++i) {
    for (const exact::Slots& slots : assignments.at(claim.from + i)) {
      const auto [low, high] = window.at(slots);
      for (mpz_class k = low; k <= high; ++k) {
        if (++tried > exact::kCertificatePoints) return std::nullopt;
        try {
          const auto compared = compiled.at(slots, k);
          if (!compared || compared->left.number == compared->right.number) continue;
          return Difference{exact::point(claim, slots, {{index, k}}), compared->left.value(),
                            compared->right.value()};
        } catch (const std::length_error&) {
          continue;  // too large to evaluate
        }
      }
    }
  }
  return std::nullopt;
}

}  // namespace sumwright::term
