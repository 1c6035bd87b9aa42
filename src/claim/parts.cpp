// What an expression contains: questions that several stages ask of a parse tree.

#include "claim/parts.hpp"

#include <algorithm>

namespace sumwright::claim {

bool has_factorial(const Expression& expression) {
  if (expression.operation == Operation::call && expression.name == "factorial") return true;
  return std::any_of(expression.children.begin(), expression.children.end(),
                     [](const ExpressionPtr& child) { return has_factorial(*child); });
}

}  // namespace sumwright::claim
