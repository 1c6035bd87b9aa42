// From an expression to postfix code, and from postfix code to exact values.
//
// The code follows the tree node by node, with the claim format's meaning of a factorial in a
// denominator: 1/v becomes R(v), R(u*v) = R(u)R(v), R(u/v) = R(u)v, R(u^c) = R(u)^c,
// R(-u) = -R(u), R(factorial(a)) = the reciprocal factorial, else the inverse. Every node is
// evaluated, so that no division by zero is passed over beside a factor 0.
#include "term/evaluator.hpp"

#include <algorithm>
#include <stdexcept>
#include <unordered_map>
#include <utility>

namespace sumwright::term::exact {

namespace {

using claim::Expression;
using claim::Operation;
using State = Outcome::State;

constexpr std::size_t kCachedFactorials = 1024;
constexpr std::size_t kCachedProducts = 1024;

[[noreturn]] void too_large() { throw std::length_error("a number grows too large"); }

[[nodiscard]] std::size_t bits(const mpz_class& number) {
  return mpz_sizeinbase(number.get_mpz_t(), 2);
}

[[nodiscard]] std::size_t bits(const mpq_class& number) {
  return bits(number.get_num()) + bits(number.get_den());
}

void check_size(const mpq_class& number) {
  if (bits(number) > kMaxBits) too_large();
}

[[nodiscard]] bool is_integer(const mpq_class& number) { return number.get_den() == 1; }

void lose_value(Outcome& outcome, State state, std::string text, claim::Place place) {
  outcome.state = state;
  outcome.number = 0;
  outcome.reason = std::make_shared<const Outcome::Reason>(Outcome::Reason{std::move(text), place});
}

// The worse of two states; the first one's reason when they are equal.
void take_worse(Outcome& a, const Outcome& b) {
  if (b.state <= a.state) return;
  a.state = b.state;
  a.reason = b.reason;
  a.number = 0;
}

[[nodiscard]] std::size_t product_size(std::size_t factors, std::size_t each) {
  return factors > kMaxBits ? kMaxBits + 1 : factors * each;
}

[[nodiscard]] mpz_class factorial(unsigned long argument) {
  thread_local std::vector<mpz_class> table = {mpz_class(1)};
  if (argument < kCachedFactorials) {
    while (table.size() <= argument) table.push_back(table.back() * table.size());
    return table[argument];
  }
  if (product_size(argument, bits(mpz_class(argument))) > kMaxBits) too_large();
  mpz_class result;
  mpz_fac_ui(result.get_mpz_t(), argument);
  return result;
}

[[nodiscard]] unsigned long to_count(const mpz_class& number) {
  if (!number.fits_ulong_p()) too_large();
  return number.get_ui();
}

// binomial(upper, lower) for upper, lower >= 0.
[[nodiscard]] mpz_class natural_binomial(const mpz_class& upper, const mpz_class& lower) {
  if (lower > upper) return 0;
  const mpz_class other = upper - lower;
  const unsigned long shorter = to_count(std::min(lower, other));
  if (product_size(shorter, bits(upper)) > kMaxBits) too_large();
  mpz_class result;
  mpz_bin_ui(result.get_mpz_t(), upper.get_mpz_t(), shorter);
  return result;
}

// binomial(upper, lower) for integers, lower >= 0; a negative upper argument is reflected.
[[nodiscard]] mpz_class integer_binomial(const mpz_class& upper, const mpz_class& lower) {
  if (upper >= 0) return natural_binomial(upper, lower);
  mpz_class result = natural_binomial(lower - upper - 1, lower);
  if (mpz_odd_p(lower.get_mpz_t()) != 0) result = -result;
  return result;
}

// Whether an integer 0 is among start, start + step, ..., start + (count-1)*step; step = 1, -1.
[[nodiscard]] bool passes_zero(const mpq_class& start, const mpz_class& count, int step) {
  if (!is_integer(start)) return false;
  const mpq_class distance = -step * start;
  return distance >= 0 && distance < count;
}

void note(Chambers* chambers, bool side) {
  if (chambers != nullptr) chambers->push_back(side);
}

void round_down(Outcome& outcome) {
  mpz_class quotient;
  mpz_fdiv_q(quotient.get_mpz_t(), outcome.number.get_num_mpz_t(), outcome.number.get_den_mpz_t());
  outcome.number = quotient;
}

void take_extreme(Outcome& outcome, const Outcome& other, bool smaller) {
  take_worse(outcome, other);
  if (!outcome.is_number()) return;
  const bool take = smaller ? other.number < outcome.number : other.number > outcome.number;
  if (take) outcome.number = other.number;
}

void to_factorial(Outcome& outcome, bool reciprocal, claim::Place place) {
  if (!outcome.is_number()) return;
  const mpq_class argument = outcome.number;
  if (!is_integer(argument) || (argument < 0 && !reciprocal)) {
    return lose_value(outcome, State::undefined, "factorial of " + argument.get_str(), place);
  }
  if (argument < 0) {
    outcome.number = 0;
    return;
  }
  outcome.number = factorial(to_count(argument.get_num()));
  if (reciprocal) invert(outcome, place);
}

void power_of(mpz_class& base, unsigned long exponent) {
  mpz_pow_ui(base.get_mpz_t(), base.get_mpz_t(), exponent);
}

void raise_number(mpq_class& base, const mpz_class& exponent) {
  if (exponent < 0) base = 1 / base;
  const mpz_class count = abs(exponent);
  if (base == 0 || base == 1) {
    if (count == 0) base = 1;
    return;
  }
  if (base == -1) {
    if (mpz_even_p(count.get_mpz_t()) != 0) base = 1;
    return;
  }
  const unsigned long times = to_count(count);
  if (product_size(times, bits(base)) > kMaxBits) too_large();
  power_of(base.get_num(), times);  // stays in lowest terms
  power_of(base.get_den(), times);
}

}  // namespace

Value Outcome::value() const {
  Value result;
  if (is_number()) {
    result.number = number;
  } else {
    result.why_not = reason->text;
    result.place = reason->place;
  }
  return result;
}

void multiply(Outcome& a, const Outcome& b) {
  if (a.is_number() && b.is_number()) {
    a.number *= b.number;
    check_size(a.number);
    return;
  }
  const bool has_zero = (a.is_number() && a.number == 0) || (b.is_number() && b.number == 0);
  take_worse(a, b);
  if (has_zero && a.state == State::undefined) a = Outcome{};
}

void add(Outcome& a, const Outcome& b) {
  take_worse(a, b);
  if (!a.is_number()) return;
  a.number += b.number;
  check_size(a.number);
}

void subtract(Outcome& a, const Outcome& b) {
  take_worse(a, b);
  if (!a.is_number()) return;
  a.number -= b.number;
  check_size(a.number);
}

void invert(Outcome& a, claim::Place place) {
  if (!a.is_number()) return;
  if (a.number == 0) {
    lose_value(a, State::division_by_zero, "division by 0", place);
    return;
  }
  mpq_inv(a.number.get_mpq_t(), a.number.get_mpq_t());
}

void raise(Outcome& a, const mpz_class& exponent, claim::Place place) {
  if (!a.is_number()) return;
  if (a.number == 0 && exponent < 0) {
    lose_value(a, State::division_by_zero, "0 to the power " + exponent.get_str(), place);
    return;
  }
  raise_number(a.number, exponent);
}

std::size_t Symbols::slot(std::string_view name) const {
  const auto found = std::find(names_.begin(), names_.end(), name);
  if (found == names_.end()) {
    throw std::invalid_argument("no value is given for '" + std::string(name) + "'");
  }
  return static_cast<std::size_t>(found - names_.begin());
}

std::size_t Symbols::add(std::string_view name) {
  const auto found = std::find(names_.begin(), names_.end(), name);
  if (found != names_.end()) return static_cast<std::size_t>(found - names_.begin());
  names_.emplace_back(name);
  return names_.size() - 1;
}

std::optional<mpz_class> literal_value(const Expression& expression) {
  if (expression.operation == Operation::literal) return expression.value;
  if (expression.operation != Operation::negate) return std::nullopt;
  const Expression& operand = *expression.children[0];
  if (operand.operation != Operation::literal) return std::nullopt;
  return mpz_class(-operand.value);
}

void collect_symbols(const Expression& expression, std::vector<std::string>& names) {
  if (expression.operation == Operation::symbol &&
      std::find(names.begin(), names.end(), expression.name) == names.end()) {
    names.push_back(expression.name);
  }
  for (const auto& child : expression.children) collect_symbols(*child, names);
}

class Program::Compiler {
 public:
  Compiler(Program& program, const Symbols& symbols) : program_(program), symbols_(symbols) {}

  void emit(const Expression& node) {
    switch (node.operation) {
      case Operation::literal:
        return constant(node.value, node.place);
      case Operation::symbol:
        return push(Code::symbol, symbols_.slot(node.name), node.place);
      case Operation::negate:
        emit(*node.children[0]);
        return push(Code::negate, 0, node.place);
      case Operation::add:
        return binary(node, Code::add);
      case Operation::subtract:
        return binary(node, Code::subtract);
      case Operation::multiply:
        return binary(node, Code::multiply);
      case Operation::divide:
        emit(*node.children[0]);
        emit_reciprocal(*node.children[1]);
        return push(Code::multiply, 0, node.place);
      case Operation::power:
        return power(node);
      case Operation::call:
        return call(node);
    }
  }

  // R(node); without a factorial it is the inverse.
  void emit_reciprocal(const Expression& node) {
    if (has_factorial(node)) {
      const auto operand = [&node](std::size_t i) -> const Expression& {
        return *node.children[i];
      };
      switch (node.operation) {
        case Operation::multiply:
          emit_reciprocal(operand(0));
          emit_reciprocal(operand(1));
          return push(Code::multiply, 0, node.place);
        case Operation::divide:
          emit_reciprocal(operand(0));
          emit(operand(1));
          push(Code::require_nonzero, 0, operand(1).place);
          return push(Code::multiply, 0, node.place);
        case Operation::negate:
          emit_reciprocal(operand(0));
          return push(Code::negate, 0, node.place);
        case Operation::power:
          if (const auto exponent = literal_value(operand(1)); exponent && *exponent >= 0) {
            emit_reciprocal(operand(0));
            constant(*exponent, operand(1).place);
            return push(Code::power, 0, node.place);
          }
          break;
        case Operation::call:
          if (node.name != "factorial") break;
          emit(operand(0));
          return push(Code::reciprocal_factorial, 0, node.place);
        default:
          break;
      }
    }
    emit(node);
    push(Code::invert, 0, node.place);
  }

 private:
  void power(const Expression& node) {
    const Expression& base = *node.children[0];
    const auto exponent = literal_value(*node.children[1]);
    if (exponent && *exponent < 0 && has_factorial(base)) {
      emit_reciprocal(base);
      constant(-*exponent, node.children[1]->place);
      return push(Code::power, 0, node.place);
    }
    binary(node, Code::power);
  }

  void call(const Expression& node) {
    for (const auto& argument : node.children) emit(*argument);
    const std::string& name = node.name;
    if (name == "factorial") return push(Code::factorial, 0, node.place);
    if (name == "floor") return push(Code::floor, 0, node.place);
    if (name == "min") return push(Code::minimum, node.children.size(), node.place);
    if (name == "max") return push(Code::maximum, node.children.size(), node.place);
    Code code = Code::binomial;
    if (name == "rising") {
      code = Code::rising;
    } else if (name == "falling") {
      code = Code::falling;
    } else if (name != "binomial") {
      throw std::invalid_argument("'" + name + "' is not a function");
    }
    program_.products_.emplace_back();
    push(code, program_.products_.size() - 1, node.place);
  }

  void binary(const Expression& node, Code code) {
    emit(*node.children[0]);
    emit(*node.children[1]);
    push(code, 0, node.place);
  }

  void constant(const mpz_class& value, claim::Place place) {
    program_.constants_.emplace_back(value);
    push(Code::constant, program_.constants_.size() - 1, place);
  }

  void push(Code code, std::size_t operand, claim::Place place) {
    program_.code_.push_back({code, operand, place});
  }

  // Remembered, so that a tower of divisions does not cost its square.
  bool has_factorial(const Expression& node) {
    const auto found = factorials_.find(&node);
    if (found != factorials_.end()) return found->second;
    bool has = node.operation == Operation::call && node.name == "factorial";
    for (const auto& child : node.children) has = has_factorial(*child) || has;
    factorials_.emplace(&node, has);
    return has;
  }

  Program& program_;
  const Symbols& symbols_;
  std::unordered_map<const Expression*, bool> factorials_;
};

Program::Program(const Expression& expression, const Symbols& symbols, bool reciprocal) {
  Compiler compiler(*this, symbols);
  if (reciprocal) {
    compiler.emit_reciprocal(expression);
  } else {
    compiler.emit(expression);
  }
}

Outcome Program::run(const Slots& slots, Machine& machine, Chambers* chambers) {
  std::size_t top = 0;
  for (const Instruction& instruction : code_) {
    machine.tick();
    step(instruction, slots, machine, top, chambers);
  }
  return std::move(machine.stack_[0]);
}

void Program::step(const Instruction& instruction, const Slots& slots, Machine& machine,
                   std::size_t& top, Chambers* chambers) {
  auto& stack = machine.stack_;
  const auto push = [&](const mpq_class& number) {
    if (top == stack.size()) stack.emplace_back();
    stack[top].state = State::number;
    stack[top].reason.reset();
    stack[top].number = number;
    ++top;
  };
  switch (instruction.code) {
    case Code::constant:
      return push(constants_[instruction.operand]);
    case Code::symbol:
      return push(slots[instruction.operand]);
    case Code::negate:
      mpq_neg(stack[top - 1].number.get_mpq_t(), stack[top - 1].number.get_mpq_t());
      return;
    case Code::add:
      --top;
      return exact::add(stack[top - 1], stack[top]);
    case Code::subtract:
      --top;
      return exact::subtract(stack[top - 1], stack[top]);
    case Code::multiply:
      --top;
      return exact::multiply(stack[top - 1], stack[top]);
    case Code::invert:
      return exact::invert(stack[top - 1], instruction.place);
    case Code::require_nonzero:
      if (stack[top - 1].is_number() && stack[top - 1].number == 0) {
        exact::invert(stack[top - 1], instruction.place);
      }
      return;
    case Code::floor:
      return round_down(stack[top - 1]);
    case Code::minimum:
    case Code::maximum:
      top -= instruction.operand - 1;
      for (std::size_t i = 0; i + 1 < instruction.operand; ++i) {
        take_extreme(stack[top - 1], stack[top + i], instruction.code == Code::minimum);
      }
      return;
    case Code::factorial:
    case Code::reciprocal_factorial:
      note(chambers, stack[top - 1].number >= 0);
      return to_factorial(stack[top - 1], instruction.code == Code::reciprocal_factorial,
                          instruction.place);
    case Code::power:
    case Code::binomial:
    case Code::rising:
    case Code::falling:
      --top;
      return of_two(instruction, machine, stack[top - 1], stack[top], chambers);
  }
}

// first := binomial(first, second), rising, falling, or first^second.
void Program::of_two(const Instruction& instruction, Machine& machine, Outcome& first,
                     const Outcome& second, Chambers* chambers) {
  take_worse(first, second);
  if (!first.is_number()) return;
  const claim::Place place = instruction.place;
  const bool is_power = instruction.code == Code::power;
  const bool is_binomial = instruction.code == Code::binomial;
  const std::string_view name = is_power                           ? "the power"
                                : is_binomial                      ? "binomial with lower argument"
                                : instruction.code == Code::rising ? "rising of length"
                                                                   : "falling of length";
  const auto no_value = [&](State state) {
    lose_value(first, state, std::string(name) + " " + second.number.get_str(), place);
  };
  if (!is_integer(second.number)) {
    return no_value(is_power || is_binomial ? State::division_by_zero : State::undefined);
  }
  const mpz_class& argument = second.number.get_num();
  if (is_power) {
    note(chambers, first.number == 0);
    return raise(first, argument, place);
  }
  const bool upwards = instruction.code == Code::rising;
  note(chambers, upwards ? first.number > 0 : first.number >= 0);
  note(chambers, upwards ? first.number + argument > 0 : first.number - argument >= 0);
  note(chambers, argument >= 0);
  if (argument < 0) {
    if (!is_binomial) return no_value(State::undefined);
    first.number = 0;
  } else if (is_binomial && is_integer(first.number)) {
    first.number = integer_binomial(first.number.get_num(), argument);
  } else {
    product(instruction, machine, first, argument);
  }
}

// first := the product of `length` factors that starts with it; the prefixes are kept, since
// a sum asks for one length after the other.
void Program::product(const Instruction& instruction, Machine& machine, Outcome& first,
                      const mpz_class& length) {
  const int step = instruction.code == Code::rising ? 1 : -1;
  if (passes_zero(first.number, length, step)) {
    first.number = 0;
    return;
  }
  const unsigned long count = to_count(length);
  if (product_size(count, bits(first.number) + bits(length)) > kMaxBits) too_large();
  PrefixProducts& kept = products_[instruction.operand];
  if (kept.products.empty() || kept.start != first.number) {
    kept.start = first.number;
    kept.products.assign(1, mpq_class(1));
  }
  std::size_t reached = std::min<std::size_t>(count, kept.products.size() - 1);
  mpq_class result = kept.products[reached];
  mpq_class factor = kept.start + step * mpq_class(mpz_class(reached));
  for (; reached < count; ++reached, factor += step) {
    machine.tick();
    result *= factor;
    if (instruction.code == Code::binomial) result /= mpz_class(reached + 1);
    if (reached + 1 == kept.products.size() && reached < kCachedProducts) {
      kept.products.push_back(result);
    }
  }
  first.number = result;
}

}  // namespace sumwright::term::exact
