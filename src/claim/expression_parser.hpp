// The grammar of the expression language.
//
//   expression = product { ("+" | "-") product }
//   product    = signed { ("*" | "/") signed }
//   signed     = { "+" | "-" } power
//   power      = primary [ "^" signed ]
//   primary    = integer | name | function "(" expression { "," expression } ")"
//              | "(" expression ")"
#pragma once

#include <map>
#include <string>
#include <vector>

#include "claim/claim.hpp"
#include "claim/expression.hpp"
#include "claim/lexer.hpp"
#include "claim/reader.hpp"
#include "claim/toml_text.hpp"

namespace sumwright::claim {

/// One function of the language.
struct Function {
  std::string name;
  std::size_t least_arguments = 1;
  std::size_t most_arguments = 1;
  bool in_bounds = false;  ///< may stand in bounds, and only there
  std::string usage;       ///< `binomial(a, b)`
};

/// All functions, in the order of the documentation.
[[nodiscard]] const std::vector<Function>& functions();

/// The function of that name; null when there is none.
[[nodiscard]] const Function* find_function(std::string_view name);

/// The names that may stand as symbols in one expression, and why others may not.
struct Symbols {
  std::vector<std::string> allowed;              ///< sorted
  std::map<std::string, std::string> elsewhere;  ///< declared, but not here: name -> reason
};

/// A remark on an expression that was read.
struct Remark {
  Place place;
  std::string message;
};

/// Parses the whole text as one expression. Remarks (such as on `-1^k`) are appended to
/// `remarks` when it is given. Throws InputError.
[[nodiscard]] ExpressionPtr parse_mapped(const Source& source, const MappedText& text,
                                         const Symbols& symbols, const Limits& limits,
                                         std::vector<Remark>* remarks = nullptr);

/// Two expressions and the comparison between them.
struct ParsedComparison {
  ExpressionPtr left;
  Comparison comparison = Comparison::less_equal;
  ExpressionPtr right;
  Place sign;
};

/// Parses the whole text as one comparison. Throws InputError.
[[nodiscard]] ParsedComparison parse_comparison(const Source& source, const MappedText& text,
                                                const Symbols& symbols, const Limits& limits,
                                                std::vector<Remark>* remarks = nullptr);

}  // namespace sumwright::claim
