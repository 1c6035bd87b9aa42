// From the text of an expression to its parse tree, by recursive descent.
//
// Invariant: recursion, tree depth and number of nodes are bounded before a node is
// built, so that neither parsing nor freeing a stranger's tree can exhaust the stack.
#include "claim/expression_parser.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

using Kind = Token::Kind;

// Counts one level of recursion for as long as it lives.
class Level {
 public:
  explicit Level(std::size_t* depth) : depth_(depth) { ++*depth_; }
  ~Level() { --*depth_; }
  Level(const Level&) = delete;
  Level& operator=(const Level&) = delete;

 private:
  std::size_t* depth_;
};

[[nodiscard]] Place join(Place first, Place last) {
  const std::size_t end = std::max(first.offset + first.length, last.offset + last.length);
  return {first.offset, end - first.offset};
}

[[nodiscard]] std::string lower_case(std::string_view text) {
  std::string out(text);
  for (char& c : out) {
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  }
  return out;
}

// The name that differs from `word` in upper and lower case only.
[[nodiscard]] std::optional<std::string> same_but_for_case(std::string_view word,
                                                           const std::vector<std::string>& names) {
  const std::string wanted = lower_case(word);
  for (const std::string& name : names) {
    if (lower_case(name) == wanted) return name;
  }
  return std::nullopt;
}

// The function that people call by another name in formulas and programs.
[[nodiscard]] std::string_view function_called(std::string_view word) {
  struct Habit {
    std::string_view word;  // lower case
    std::string_view function;
  };
  static constexpr Habit habits[] = {
      {"c", "binomial"},   {"binom", "binomial"}, {"choose", "binomial"},   {"comb", "binomial"},
      {"ncr", "binomial"}, {"fact", "factorial"}, {"pochhammer", "rising"}, {"poch", "rising"},
      {"rf", "rising"},    {"ff", "falling"}};
  const std::string wanted = lower_case(word);
  for (const Habit& habit : habits) {
    if (habit.word == wanted) return habit.function;
  }
  return {};
}

class Parser {
 public:
  Parser(const Source& source, const MappedText& text, const Symbols& symbols, const Limits& limits,
         std::vector<Remark>* remarks)
      : source_(source),
        symbols_(symbols),
        limits_(limits),
        remarks_(remarks),
        lexer_(source, text, limits) {
    advance();
  }

  [[nodiscard]] ExpressionPtr whole() {
    if (current_.kind == Kind::end) refuse("an expression is expected; the text is empty");
    Node node = expression();
    expect_end();
    return node.tree;
  }

  [[nodiscard]] ParsedComparison whole_comparison() {
    if (current_.kind == Kind::end) refuse("a comparison is expected; the text is empty");
    ParsedComparison out;
    out.left = expression().tree;
    const auto comparison = comparison_of(current_.kind);
    if (!comparison) {
      if (current_.kind == Kind::end) {
        refuse("a comparison is expected: <=, <, >=, > or != between two expressions");
      }
      refuse_rest();
    }
    out.comparison = *comparison;
    out.sign = current_.place;
    advance();
    out.right = expression().tree;
    if (comparison_of(current_.kind)) {
      refuse("one comparison in each entry", "write the second one as an entry of its own");
    }
    expect_end();
    return out;
  }

 private:
  // A tree, where it stands with its brackets, and how deep it is.
  struct Node {
    ExpressionPtr tree;
    Place outer;
    std::size_t depth = 1;
  };

  [[nodiscard]] static std::optional<Comparison> comparison_of(Kind kind) {
    switch (kind) {
      case Kind::less_equal:
        return Comparison::less_equal;
      case Kind::less:
        return Comparison::less;
      case Kind::greater_equal:
        return Comparison::greater_equal;
      case Kind::greater:
        return Comparison::greater;
      case Kind::not_equal:
        return Comparison::not_equal;
      default:
        return std::nullopt;
    }
  }

  void advance() { current_ = lexer_.next(); }

  [[noreturn]] void refuse(std::string_view message, std::string_view note = {}) const {
    throw InputError(source_, current_.place, message, note);
  }

  void expect_end() const {
    if (current_.kind != Kind::end) refuse_rest();
  }

  // A whole expression has been read, and something follows it.
  [[noreturn]] void refuse_rest() const {
    switch (current_.kind) {
      case Kind::integer:
      case Kind::name:
      case Kind::open:
        refuse("an operator is expected here", "there are no implicit products; write a*b");
      case Kind::close:
        refuse("no bracket is open here");
      case Kind::comma:
        refuse("a comma stands only between the arguments of a function");
      case Kind::end:
        refuse("the expression ends too early");
      default:
        refuse("a comparison may stand only in 'assume'");
    }
  }

  [[nodiscard]] Node make(Expression node, std::vector<Node> parts, Place outer) {
    std::size_t depth = 0;
    for (Node& part : parts) {
      depth = std::max(depth, part.depth);
      node.children.push_back(std::move(part.tree));
    }
    node.place = outer;
    if (++nodes_ > limits_.nodes) {
      throw InputError(source_, node.sign.length > 0 ? node.sign : outer,
                       fmt::format("the expression is too long; at most {} numbers, symbols and "
                                   "operations are read",
                                   limits_.nodes));
    }
    if (depth + 1 > limits_.tree_depth) {
      throw InputError(source_, node.sign,
                       fmt::format("more than {} operations stand one inside the other; use "
                                   "brackets to balance a long sum",
                                   limits_.tree_depth));
    }
    return {std::make_shared<const Expression>(std::move(node)), outer, depth + 1};
  }

  [[nodiscard]] Node binary(Operation operation, const Token& sign, Node left, Node right) {
    Expression node;
    node.operation = operation;
    node.sign = sign.place;
    const Place outer = join(left.outer, right.outer);
    std::vector<Node> parts;
    parts.push_back(std::move(left));
    parts.push_back(std::move(right));
    return make(std::move(node), std::move(parts), outer);
  }

  void check_depth() const {
    if (depth_ > limits_.nesting) {
      refuse(fmt::format("nested too deeply; at most {} levels are read", limits_.nesting));
    }
  }

  [[nodiscard]] Node expression() {
    const Level level(&depth_);
    check_depth();
    Node left = product();
    while (current_.kind == Kind::plus || current_.kind == Kind::minus) {
      const Token sign = current_;
      advance();
      const auto operation = sign.kind == Kind::plus ? Operation::add : Operation::subtract;
      left = binary(operation, sign, std::move(left), product());
    }
    return left;
  }

  [[nodiscard]] Node product() {
    Node left = with_sign();
    while (current_.kind == Kind::times || current_.kind == Kind::over) {
      const Token sign = current_;
      advance();
      if (sign.kind == Kind::times && current_.kind == Kind::times) {
        refuse("an operand is expected here", "a power is written a^b");
      }
      const auto operation = sign.kind == Kind::times ? Operation::multiply : Operation::divide;
      left = binary(operation, sign, std::move(left), with_sign());
    }
    return left;
  }

  [[nodiscard]] Node with_sign() {
    std::vector<Token> signs;
    while (current_.kind == Kind::plus || current_.kind == Kind::minus) {
      if (current_.kind == Kind::minus) {
        signs.push_back(current_);
        if (depth_ + signs.size() > limits_.nesting) {
          refuse(fmt::format("too many signs; at most {} levels are read", limits_.nesting));
        }
      }
      advance();
    }
    Node node = power();
    for (; !signs.empty(); signs.pop_back()) {
      Expression negation;
      negation.operation = Operation::negate;
      negation.sign = signs.back().place;
      remark_on_sign(*node.tree, node.outer, signs.back());
      const Place outer = join(signs.back().place, node.outer);
      std::vector<Node> parts;
      parts.push_back(std::move(node));
      node = make(std::move(negation), std::move(parts), outer);
    }
    return node;
  }

  // `-1^k` is -(1^k), which is rarely what was meant.
  void remark_on_sign(const Expression& operand, Place outer, const Token& sign) {
    if (remarks_ == nullptr || operand.operation != Operation::power) return;
    if (outer.offset != operand.place.offset || outer.length != operand.place.length) return;
    const Expression& base = *operand.children[0];
    if (base.operation != Operation::literal || base.place.offset != outer.offset) return;
    const std::string inner = as_written(operand.place);
    const std::string number = base.value.get_str();
    remarks_->push_back(
        {join(sign.place, outer), fmt::format("-{} is -({}); for a power of -{} write (-{})^...",
                                              inner, inner, number, number)});
  }

  [[nodiscard]] std::string as_written(Place place) const {
    constexpr std::size_t longest = 30;
    std::string text = source_.text.substr(place.offset, std::min(place.length, longest));
    if (place.length > longest) text += "...";
    return text;
  }

  [[nodiscard]] Node power() {
    Node base = primary();
    if (current_.kind != Kind::caret) return base;
    const Level level(&depth_);
    check_depth();
    const Token sign = current_;
    advance();
    Node exponent = with_sign();
    return binary(Operation::power, sign, std::move(base), std::move(exponent));
  }

  [[nodiscard]] Node primary() {
    switch (current_.kind) {
      case Kind::integer:
        return integer();
      case Kind::name:
        return name();
      case Kind::open:
        return brackets();
      case Kind::end:
        refuse("the expression ends where an operand is expected");
      case Kind::close:
        refuse("an operand is expected before this bracket");
      default:
        refuse(fmt::format("an operand is expected, not {}", in_quotes(current_.text)));
    }
  }

  [[nodiscard]] Node integer() {
    Expression node;
    node.operation = Operation::literal;
    node.value = mpz_class(std::string(current_.text), 10);
    const Place place = current_.place;
    node.sign = place;
    advance();
    return make(std::move(node), {}, place);
  }

  [[nodiscard]] Node brackets() {
    const Token open = current_;
    advance();
    Node node = expression();
    node.outer = join(open.place, close(open));
    return node;
  }

  // The closing bracket to `open`.
  [[nodiscard]] Place close(const Token& open) {
    if (current_.kind != Kind::close) {
      if (current_.kind != Kind::end) refuse_rest();
      const auto where = source_.position(open.place.offset);
      refuse("a closing bracket is missing",
             fmt::format("the bracket was opened at {}:{}", where.line, where.column));
    }
    const Place place = current_.place;
    advance();
    return place;
  }

  [[nodiscard]] Node name() {
    const Token token = current_;
    advance();
    if (const Function* function = find_function(token.text)) return call(token, *function);
    if (current_.kind == Kind::open) refuse_call(token);
    if (!is_allowed(token.text)) refuse_symbol(token);
    Expression node;
    node.operation = Operation::symbol;
    node.name = std::string(token.text);
    node.sign = token.place;
    return make(std::move(node), {}, token.place);
  }

  [[nodiscard]] bool is_allowed(std::string_view name) const {
    return std::binary_search(symbols_.allowed.begin(), symbols_.allowed.end(), name);
  }

  [[noreturn]] void refuse_symbol(const Token& token) const {
    const std::string name(token.text);
    if (name == "inf") {
      throw InputError(source_, token.place, "'inf' may stand only as a whole bound",
                       "low = \"-inf\" or high = \"inf\"");
    }
    if (const auto found = symbols_.elsewhere.find(name); found != symbols_.elsewhere.end()) {
      throw InputError(source_, token.place,
                       fmt::format("{} may not stand here: {}", in_quotes(name), found->second));
    }
    const auto twin = same_but_for_case(name, symbols_.allowed);
    std::string note = twin ? did_you_mean(*twin) : suggestion(name, symbols_.allowed);
    if (note.empty()) note = suggestion(name, function_names());
    if (note.empty()) note = "every symbol is an index, the running variable or a parameter";
    throw InputError(source_, token.place, fmt::format("{} is not declared", in_quotes(name)),
                     note);
  }

  [[noreturn]] void refuse_call(const Token& token) const {
    const std::string name(token.text);
    const auto twin = same_but_for_case(name, function_names());
    std::string note = twin ? did_you_mean(*twin) : suggestion(name, function_names());
    if (const auto known = function_called(name); !known.empty()) note = did_you_mean(known);
    if (is_allowed(name)) {
      note = fmt::format("there are no implicit products; write {}*(...)", printable(name));
    }
    if (note.empty()) note = "the functions are " + listing(function_names());
    throw InputError(source_, token.place, fmt::format("{} is not a function", in_quotes(name)),
                     note);
  }

  [[nodiscard]] static std::vector<std::string> function_names() {
    std::vector<std::string> names;
    for (const Function& function : functions()) names.push_back(function.name);
    return names;
  }

  [[nodiscard]] Node call(const Token& token, const Function& function) {
    if (current_.kind != Kind::open) {
      throw InputError(source_, token.place,
                       fmt::format("{} is a function and needs its arguments in brackets",
                                   in_quotes(function.name)),
                       "write " + function.usage);
    }
    const Token open = current_;
    advance();
    std::vector<Node> arguments;
    if (current_.kind != Kind::close) {
      arguments.push_back(expression());
      while (current_.kind == Kind::comma) {
        advance();
        arguments.push_back(expression());
      }
    }
    const Place outer = join(token.place, close(open));
    check_arguments(function, arguments.size(), outer);
    Expression node;
    node.operation = Operation::call;
    node.name = function.name;
    node.sign = token.place;
    return make(std::move(node), std::move(arguments), outer);
  }

  void check_arguments(const Function& function, std::size_t count, Place place) const {
    if (count >= function.least_arguments && count <= function.most_arguments) return;
    const bool several = function.most_arguments > function.least_arguments;
    throw InputError(source_, place,
                     fmt::format("{} takes {}{} argument{}, not {}", in_quotes(function.name),
                                 several ? "at least " : "", function.least_arguments,
                                 function.least_arguments == 1 ? "" : "s", count),
                     "write " + function.usage);
  }

  const Source& source_;
  const Symbols& symbols_;
  const Limits& limits_;
  std::vector<Remark>* remarks_;
  Lexer lexer_;
  Token current_;
  std::size_t depth_ = 0;
  std::size_t nodes_ = 0;
};

}  // namespace

const std::vector<Function>& functions() {
  static const std::vector<Function> table = {
      {"binomial", 2, 2, false, "binomial(a, b)"}, {"factorial", 1, 1, false, "factorial(a)"},
      {"rising", 2, 2, false, "rising(a, m)"},     {"falling", 2, 2, false, "falling(a, m)"},
      {"floor", 1, 1, true, "floor(a/b)"},         {"min", 2, 100, true, "min(a, b)"},
      {"max", 2, 100, true, "max(a, b)"}};
  return table;
}

const Function* find_function(std::string_view name) {
  const auto& table = functions();
  const auto found = std::find_if(table.begin(), table.end(), [name](const Function& function) {
    return function.name == name;
  });
  return found == table.end() ? nullptr : &*found;
}

ExpressionPtr parse_mapped(const Source& source, const MappedText& text, const Symbols& symbols,
                           const Limits& limits, std::vector<Remark>* remarks) {
  return Parser(source, text, symbols, limits, remarks).whole();
}

ParsedComparison parse_comparison(const Source& source, const MappedText& text,
                                  const Symbols& symbols, const Limits& limits,
                                  std::vector<Remark>* remarks) {
  return Parser(source, text, symbols, limits, remarks).whole_comparison();
}

ExpressionPtr parse_expression(const Source& source, Place where,
                               const std::vector<std::string>& symbols, const Limits& limits) {
  Symbols allowed;
  allowed.allowed = symbols;
  std::sort(allowed.allowed.begin(), allowed.allowed.end());
  return parse_mapped(source, plain_text(source, where), allowed, limits);
}

}  // namespace sumwright::claim
