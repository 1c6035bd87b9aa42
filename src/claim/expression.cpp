// Expressions as text of the claim language.
//
// Invariant: parsing what to_text gives, gives the same tree, and no pair of brackets
// can be left out. Literals below zero (only from TOML integers) are written with a
// sign, which parses as a negation.
#include "claim/expression.hpp"

#include <array>
#include <string_view>

namespace sumwright::claim {

namespace {

// How tightly an expression holds together.
enum Strength { kSum = 1, kProduct, kSigned, kPower, kPrimary };

[[nodiscard]] Strength strength(const Expression& expression) {
  switch (expression.operation) {
    case Operation::add:
    case Operation::subtract:
      return kSum;
    case Operation::multiply:
    case Operation::divide:
      return kProduct;
    case Operation::negate:
      return kSigned;
    case Operation::power:
      return kPower;
    case Operation::literal:
      return expression.value < 0 ? kSigned : kPrimary;
    case Operation::symbol:
    case Operation::call:
      break;
  }
  return kPrimary;
}

[[nodiscard]] bool leans_left(Operation operation) {
  return operation == Operation::add || operation == Operation::subtract ||
         operation == Operation::multiply || operation == Operation::divide;
}

[[nodiscard]] std::string_view sign_text(Operation operation) {
  switch (operation) {
    case Operation::add:
      return " + ";
    case Operation::subtract:
      return " - ";
    case Operation::multiply:
      return "*";
    default:
      return "/";
  }
}

void append(std::string& out, const Expression& expression);

void append_at_least(std::string& out, const Expression& expression, Strength needed) {
  if (strength(expression) >= needed) {
    append(out, expression);
    return;
  }
  out += '(';
  append(out, expression);
  out += ')';
}

// Sums of thousands of terms lean to the left; their spine is walked, not recursed into.
void append_spine(std::string& out, const Expression& expression) {
  std::vector<const Expression*> spine = {&expression};
  while (true) {
    const Expression& node = *spine.back();
    const Expression& left = *node.children[0];
    if (!leans_left(left.operation) || strength(left) < strength(node)) break;
    spine.push_back(&left);
  }
  append_at_least(out, *spine.back()->children[0], strength(*spine.back()));
  for (; !spine.empty(); spine.pop_back()) {
    const Expression& node = *spine.back();
    out += sign_text(node.operation);
    append_at_least(out, *node.children[1], strength(node) == kSum ? kProduct : kSigned);
  }
}

void append_call(std::string& out, const Expression& expression) {
  out += expression.name;
  out += '(';
  for (std::size_t i = 0; i < expression.children.size(); ++i) {
    if (i > 0) out += ", ";
    append(out, *expression.children[i]);
  }
  out += ')';
}

void append(std::string& out, const Expression& expression) {
  switch (expression.operation) {
    case Operation::literal:
      out += expression.value.get_str();
      break;
    case Operation::symbol:
      out += expression.name;
      break;
    case Operation::negate:
      out += '-';
      append_at_least(out, *expression.children[0], kSigned);
      break;
    case Operation::power:
      append_at_least(out, *expression.children[0], kPrimary);
      out += '^';
      append_at_least(out, *expression.children[1], kSigned);
      break;
    case Operation::call:
      append_call(out, expression);
      break;
    default:
      append_spine(out, expression);
  }
}

}  // namespace

std::string to_text(const Expression& expression) {
  std::string out;
  append(out, expression);
  return out;
}

}  // namespace sumwright::claim
