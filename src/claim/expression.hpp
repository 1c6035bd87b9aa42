// The parse tree of the claim file's expression language.
//
// Produced by claim/expression_parser, read by every later stage. The tree keeps
// what the author wrote, node by node: nothing is simplified here, because the
// formal statement follows the tree.
#pragma once

#include <gmpxx.h>

#include <cstddef>
#include <memory>
#include <string>
#include <vector>

namespace sumwright::claim {

/// A span of bytes in the claim file: [offset, offset + length).
struct Place {
  std::size_t offset = 0;
  std::size_t length = 0;
};

enum class Operation {
  literal,   ///< an integer, `value` (nonnegative as parsed; TOML integers may be negative)
  symbol,    ///< a declared name, `name`
  negate,    ///< -u
  add,       ///< u + v
  subtract,  ///< u - v
  multiply,  ///< u * v
  divide,    ///< u / v
  power,     ///< u ^ v
  call  ///< `name`(children...): binomial, factorial, rising, falling; floor, min, max in bounds
};

struct Expression;
using ExpressionPtr = std::shared_ptr<const Expression>;

/// One node. Brackets and a leading plus make no node.
struct Expression {
  Operation operation = Operation::literal;
  mpz_class value;                      ///< literal only
  std::string name;                     ///< symbol or call only
  std::vector<ExpressionPtr> children;  ///< operands or arguments, in order
  Place place;                          ///< where the whole sub-expression stands
  Place sign;                           ///< the operator or function name itself
};

/// The expression as text of the claim language, with the fewest brackets that
/// parse back to the same tree.
[[nodiscard]] std::string to_text(const Expression& expression);

}  // namespace sumwright::claim
