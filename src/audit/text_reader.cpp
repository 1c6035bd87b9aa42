// From shown text to parse trees: a small recursive descent over the grammar of the claim format,
// independent of the reader of claim files, with its own limit on nesting.
#include "audit/text_reader.hpp"

#include <algorithm>
#include <cctype>
#include <cstring>
#include <utility>

#include "audit/atoms.hpp"
#include "audit/evaluator.hpp"

namespace sumwright::audit {

namespace {

using claim::Expression;
using claim::ExpressionPtr;
using claim::Operation;

constexpr int kDeepest = 200;

ExpressionPtr node(Operation operation, std::vector<ExpressionPtr> children) {
  for (const ExpressionPtr& child : children)
    if (!child) return nullptr;
  auto out = std::make_shared<Expression>();
  out->operation = operation;
  out->children = std::move(children);
  return out;
}

bool is_function(const std::string& word) {
  for (const char* name : {"factorial", "binomial", "rising", "falling", "floor", "min", "max"})
    if (word == name) return true;
  return false;
}

class Reader {
 public:
  Reader(const std::string& text, const std::vector<std::string>& symbols)
      : text_(text), symbols_(symbols) {}

  ExpressionPtr whole() {
    ExpressionPtr out = sum();
    skip();
    return place_ == text_.size() ? out : nullptr;
  }

 private:
  void skip() {
    while (place_ < text_.size() && std::isspace(static_cast<unsigned char>(text_[place_])))
      ++place_;
  }
  char peek() {
    skip();
    return place_ < text_.size() ? text_[place_] : '\0';
  }
  bool take(char wanted) {
    if (peek() != wanted) return false;
    ++place_;
    return true;
  }

  ExpressionPtr sum() {
    if (++depth_ > kDeepest) return nullptr;
    ExpressionPtr out = term();
    while (out && (peek() == '+' || peek() == '-'))
      out = take('+') ? node(Operation::add, {out, term()})
                      : (take('-'), node(Operation::subtract, {out, term()}));
    --depth_;
    return out;
  }
  ExpressionPtr term() {
    ExpressionPtr out = factor();
    while (out && (peek() == '*' || peek() == '/'))
      out = take('*') ? node(Operation::multiply, {out, factor()})
                      : (take('/'), node(Operation::divide, {out, factor()}));
    return out;
  }
  ExpressionPtr factor() {
    if (++depth_ > kDeepest) return nullptr;
    ExpressionPtr out;
    if (take('-'))
      out = node(Operation::negate, {factor()});
    else if (take('+'))
      out = factor();
    else
      out = power();
    --depth_;
    return out;
  }
  ExpressionPtr power() {
    ExpressionPtr base = primary();
    if (!base || !take('^')) return base;
    return node(Operation::power, {base, factor()});
  }
  ExpressionPtr primary() {
    if (take('(')) {
      ExpressionPtr out = sum();
      return take(')') ? out : nullptr;
    }
    if (std::isdigit(static_cast<unsigned char>(peek()))) return literal();
    return name();
  }
  ExpressionPtr literal() {
    std::string digits;
    while (place_ < text_.size() && std::isdigit(static_cast<unsigned char>(text_[place_])))
      digits += text_[place_++];
    auto out = std::make_shared<Expression>();
    out->operation = Operation::literal;
    out->value = mpz_class(digits);
    return out;
  }
  ExpressionPtr name() {
    std::string word;
    while (place_ < text_.size() &&
           (std::isalnum(static_cast<unsigned char>(text_[place_])) || text_[place_] == '_'))
      word += text_[place_++];
    auto out = std::make_shared<Expression>();
    out->name = word;
    if (std::find(symbols_.begin(), symbols_.end(), word) != symbols_.end() && !word.empty()) {
      out->operation = Operation::symbol;
      return out;
    }
    if (!is_function(word) || !take('(')) return nullptr;
    out->operation = Operation::call;
    do {
      out->children.push_back(sum());
      if (!out->children.back()) return nullptr;
    } while (take(','));
    const bool one = word == "factorial" || word == "floor";
    const bool any = word == "min" || word == "max";
    if (!any && out->children.size() != (one ? 1U : 2U)) return nullptr;
    return take(')') ? out : nullptr;
  }

  const std::string& text_;
  const std::vector<std::string>& symbols_;
  std::size_t place_ = 0;
  int depth_ = 0;
};

/// The sign that starts at `place`, longest first; empty when there is none.
std::string sign_at(const std::string& text, std::size_t place) {
  for (const char* sign : {"<=", ">=", "!=", "<", ">", "="})
    if (text.compare(place, std::strlen(sign), sign) == 0) return sign;
  return "";
}

std::size_t separating_comma(const std::string& text) {
  int depth = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '(') ++depth;
    if (text[i] == ')') --depth;
    if (text[i] == ',' && depth == 0) return i;
  }
  return std::string::npos;
}

/// Adds the comparisons of one chain; false when the text is none.
bool read_chain(const std::string& text, const std::vector<std::string>& symbols,
                std::vector<ReadComparison>& out) {
  std::vector<std::string> parts(1);
  std::vector<std::string> signs;
  for (std::size_t i = 0; i < text.size();) {
    const std::string sign = sign_at(text, i);
    if (sign.empty()) {
      parts.back() += text[i++];
      continue;
    }
    signs.push_back(sign);
    parts.emplace_back();
    i += sign.size();
  }
  if (signs.empty()) return false;
  for (std::size_t i = 0; i < signs.size(); ++i) {
    ReadComparison one{read_expression(parts[i], symbols), signs[i],
                       read_expression(parts[i + 1], symbols)};
    if (!one.left || !one.right) return false;
    out.push_back(std::move(one));
  }
  return true;
}

}  // namespace

ExpressionPtr read_expression(const std::string& text, const std::vector<std::string>& symbols) {
  return Reader(text, symbols).whole();
}

std::optional<bool> holds(const ReadComparison& comparison, const Point& at) {
  const Value left = evaluate(*comparison.left, at);
  const Value right = evaluate(*comparison.right, at);
  if (!left.exists() || !right.exists()) return std::nullopt;
  const numeric& a = left.number;
  const numeric& b = right.number;
  if (comparison.sign == "<=") return a <= b;
  if (comparison.sign == "<") return a < b;
  if (comparison.sign == ">=") return a >= b;
  if (comparison.sign == ">") return a > b;
  return comparison.sign == "=" ? a.is_equal(b) : !a.is_equal(b);
}

Domain::Domain(const proof::Region& region, const std::vector<std::string>& symbols)
    : region_(region), text_(read_comparisons(region.text, symbols)) {}

bool Domain::delimited() const { return !region_.nonnegative.empty() || !text_.empty(); }

bool Domain::contains(const Point& at) const {
  for (const proof::Affine& form : region_.nonnegative)
    if (value_of(form, at) < 0) return false;
  return std::all_of(text_.begin(), text_.end(),
                     [&](const ReadComparison& one) { return holds(one, at).value_or(false); });
}

std::vector<ReadComparison> read_comparisons(const std::string& text,
                                             const std::vector<std::string>& symbols) {
  std::string rest = text;  // commas inside brackets belong to min and max
  for (std::size_t at = rest.find(" and "); at != std::string::npos; at = rest.find(" and "))
    rest.replace(at, 5, ",");
  std::vector<ReadComparison> out;
  while (!rest.empty()) {
    const std::size_t comma = separating_comma(rest);
    if (!read_chain(rest.substr(0, comma), symbols, out)) return {};
    rest = comma == std::string::npos ? "" : rest.substr(comma + 1);
  }
  return out;
}

}  // namespace sumwright::audit
