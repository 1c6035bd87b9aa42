// From an expression, a bound or a sum and values of its symbols to the exact value.
//
// A range is walked in the order listed, later ranges inside; every lattice point is
// evaluated, and the first one without a value leaves the whole sum without one.
#include "term/evaluation.hpp"

#include <stdexcept>
#include <utility>

#include "term/evaluator.hpp"

namespace sumwright::term::exact {

namespace {

// Called before the summand is compiled, which may name every index.
[[nodiscard]] const Symbols& with_indices(const claim::Sum& sum, Symbols& symbols) {
  for (const claim::Range& range : sum.over) symbols.add(range.index);
  return symbols;
}

}  // namespace

mpz_class run_integer(Program& program, const Slots& slots, Machine& machine) {
  const Outcome outcome = program.run(slots, machine);
  if (!outcome.is_number()) throw std::invalid_argument("a bound has no value");
  if (outcome.number.get_den() != 1) throw std::invalid_argument("a bound is not an integer");
  return outcome.number.get_num();
}

SumProgram::SumProgram(const claim::Sum& sum, Symbols& symbols)
    : summand_(*sum.summand, with_indices(sum, symbols)) {
  const auto compile = [&symbols](const claim::Bound& bound) {
    std::optional<Program> program;
    if (bound.kind == claim::Bound::Kind::finite) program.emplace(*bound.value, symbols);
    return program;
  };
  for (const claim::Range& range : sum.over) {
    levels_.push_back(
        {range.index, symbols.slot(range.index), compile(range.low), compile(range.high)});
  }
}

SumProgram::Result SumProgram::run(Slots& slots, Machine& machine, std::size_t max_terms) {
  for (const Level& level : levels_) {
    if (!level.low || !level.high) {
      throw std::invalid_argument("an infinite range cannot be summed term by term");
    }
    if (slots.size() <= level.slot) slots.resize(level.slot + 1);
  }
  terms_left_ = max_terms;
  Result result;
  (void)run_level(0, slots, machine, result);
  return result;
}

// Adds the points of the ranges from `depth` on; false at a point without a value.
bool SumProgram::run_level(std::size_t depth, Slots& slots, Machine& machine, Result& result) {
  if (depth == levels_.size()) {
    add(result.outcome, summand_.run(slots, machine));
    if (result.outcome.is_number()) return true;
    for (const Level& level : levels_) result.indices.emplace_back(level.index, slots[level.slot]);
    return false;
  }
  Level& level = levels_[depth];
  mpz_class index = run_integer(*level.low, slots, machine);
  const mpz_class last = run_integer(*level.high, slots, machine);
  for (; index <= last; ++index) {
    if (terms_left_ == 0) throw std::length_error("a sum has too many terms");
    --terms_left_;
    slots[level.slot] = index;
    if (!run_level(depth + 1, slots, machine, result)) return false;
  }
  return true;
}

}  // namespace sumwright::term::exact

namespace sumwright::term {

using exact::Machine;
using exact::Outcome;
using exact::Program;
using exact::Slots;
using exact::SumProgram;
using exact::Symbols;

namespace {

struct Environment {
  Symbols symbols{{}};
  Slots slots;
};

[[nodiscard]] Environment environment_of(const Assignment& at) {
  Environment result;
  for (const auto& [name, number] : at) {
    result.symbols.add(name);
    result.slots.push_back(number);
  }
  return result;
}

}  // namespace

Value evaluate(const claim::Expression& expression, const Assignment& at) {
  const Environment environment = environment_of(at);
  Machine machine;
  return Program(expression, environment.symbols).run(environment.slots, machine).value();
}

Value evaluate_sum(const claim::Sum& sum, const Assignment& at, std::size_t max_terms) {
  Environment environment = environment_of(at);
  Machine machine;
  SumProgram program(sum, environment.symbols);
  const SumProgram::Result result = program.run(environment.slots, machine, max_terms);
  Value value = result.outcome.value();
  for (const auto& [name, number] : result.indices) {
    value.why_not +=
        (name == result.indices.front().first ? " at " : ", ") + name + " = " + number.get_str();
  }
  return value;
}

mpz_class evaluate_bound(const claim::Expression& bound, const Assignment& at) {
  const Environment environment = environment_of(at);
  Machine machine;
  Program program(bound, environment.symbols);
  return exact::run_integer(program, environment.slots, machine);
}

}  // namespace sumwright::term
