// The machine behind term/evaluation: expressions compiled to postfix code over exact rationals.
//
// Internal to src/term; other stages use term/evaluation.hpp.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <memory>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "algebra/limits.hpp"
#include "claim/claim.hpp"
#include "term/outcome.hpp"

namespace sumwright::term::exact {

/// Names to slots; `slot` of a name that is not there throws std::invalid_argument.
class Symbols {
 public:
  explicit Symbols(std::vector<std::string> names) : names_(std::move(names)) {}
  [[nodiscard]] std::size_t slot(std::string_view name) const;
  /// The slot of `name`, made when it is new.
  std::size_t add(std::string_view name);
  [[nodiscard]] std::size_t size() const { return names_.size(); }

 private:
  std::vector<std::string> names_;
};

/// Values by slot.
using Slots = std::vector<mpq_class>;

/// For each function of an expression, on which side of its special points the arguments lie.
/// Between points of equal chambers the shift quotients of the functions are regular.
using Chambers = std::vector<bool>;

/// Working memory of programs; one per thread.
class Machine {
 public:
  explicit Machine(const algebra::Deadline& deadline = {}) : deadline_(deadline) {}
  /// Checks the deadline now and then.
  void tick() {
    if ((++ticks_ & 63U) == 0) deadline_.check();
  }
  void check() const { deadline_.check(); }

 private:
  friend class Program;
  algebra::Deadline deadline_;
  std::size_t ticks_ = 0;
  std::vector<Outcome> stack_;
};

/// A compiled expression.
class Program {
 public:
  /// The expression, or R(expression), its reciprocal as a denominator has it.
  /// Throws std::invalid_argument at a name without a slot.
  Program(const claim::Expression& expression, const Symbols& symbols, bool reciprocal = false);

  /// The value at `slots`; writes the chambers of all functions, when asked.
  /// Throws algebra::TimeUp, std::length_error.
  [[nodiscard]] Outcome run(const Slots& slots, Machine& machine, Chambers* chambers = nullptr);

 private:
  enum class Code : unsigned char {
    constant,
    symbol,
    negate,
    add,
    subtract,
    multiply,
    invert,
    require_nonzero,
    power,
    binomial,
    factorial,
    reciprocal_factorial,
    rising,
    falling,
    floor,
    minimum,
    maximum
  };
  struct Instruction {
    Code code = Code::constant;
    std::size_t operand = 0;  ///< constant, slot, number of arguments, or prefix products
    claim::Place place;
  };
  class Compiler;

  void step(const Instruction& instruction, const Slots& slots, Machine& machine, std::size_t& top,
            Chambers* chambers);
  void of_two(const Instruction& instruction, Machine& machine, Outcome& first,
              const Outcome& second, Chambers* chambers);

  std::vector<Instruction> code_;
  std::vector<mpq_class> constants_;
  std::vector<PrefixProducts> products_;
};

/// A compiled sum.
class SumProgram {
 public:
  /// Adds the indices to `symbols`.
  SumProgram(const claim::Sum& sum, Symbols& symbols);

  struct Result {
    Outcome outcome;
    std::vector<std::pair<std::string, mpq_class>> indices;  ///< where the summand has no value
  };
  /// The sum at `slots` (the indices' slots are overwritten). Throws std::length_error past
  /// `max_terms` points, std::invalid_argument at an infinite range, algebra::TimeUp.
  [[nodiscard]] Result run(Slots& slots, Machine& machine, std::size_t max_terms);

 private:
  struct Level {
    std::string index;
    std::size_t slot = 0;
    std::optional<Program> low;
    std::optional<Program> high;
  };
  bool run_level(std::size_t depth, Slots& slots, Machine& machine, Result& result);

  std::vector<Level> levels_;
  Program summand_;
  std::size_t terms_left_ = 0;
};

/// An integer-valued program's value; std::invalid_argument when it is none.
[[nodiscard]] mpz_class run_integer(Program& program, const Slots& slots, Machine& machine);

/// The names of all symbols in the expression, each once, in order of appearance.
void collect_symbols(const claim::Expression& expression, std::vector<std::string>& names);

}  // namespace sumwright::term::exact
