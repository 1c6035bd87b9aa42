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

#include "claim/affine.hpp"

namespace sumwright::term::exact {

namespace {

using claim::Expression;
using claim::Operation;
using State = Outcome::State;

[[nodiscard]] bool is_integer(const mpq_class& number) { return number.get_den() == 1; }

void note(Chambers* chambers, bool side) {
  if (chambers != nullptr) chambers->push_back(side);
}

}  // namespace

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
          if (const auto exponent = claim::as_literal(operand(1)); exponent && *exponent >= 0) {
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
    const auto exponent = claim::as_literal(*node.children[1]);
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
    if (name == "binomial") return product(Code::binomial, PrefixProducts::Kind::binomial, node);
    if (name == "rising") return product(Code::rising, PrefixProducts::Kind::rising, node);
    if (name == "falling") return product(Code::falling, PrefixProducts::Kind::falling, node);
    throw std::invalid_argument("'" + name + "' is not a function");
  }

  void product(Code code, PrefixProducts::Kind kind, const Expression& node) {
    program_.products_.emplace_back(kind);
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
  if (!take_worse(first, second)) return;
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
    to_binomial(first, argument);
  } else {
    products_[instruction.operand].apply(first, argument, [&machine] { machine.tick(); });
  }
}

}  // namespace sumwright::term::exact
