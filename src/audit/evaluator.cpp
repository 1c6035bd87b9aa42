// From the author's parse tree to exact values.
//
// Written from the claim format alone (its sections Meaning and Expressions), node by node, with no
// rewriting: what the author wrote is what is computed. Reciprocals are pushed down products,
// quotients and powers, because a factorial in a denominator is a reciprocal factorial.
#include "audit/evaluator.hpp"

#include <cstdlib>
#include <utility>

namespace sumwright::audit {

namespace {

using claim::Expression;
using claim::Operation;

constexpr long kMostTerms = 3000;  // of one sum
constexpr long kMargin = 4;        // terms that must vanish at an infinite end

const Expression& child(const Expression& expression, std::size_t i) {
  return *expression.children.at(i);
}

/// 1 / value, the value being no factorial.
Value inverted(const Value& value) {
  if (!value.exists()) return value;
  if (value.number.is_zero()) return Value::divided_by_zero("division by 0");
  return Value::of(numeric(1) / value.number);
}

/// An argument must have a value whatever stands beside the call.
Value argument(const Expression& expression, const Point& at) {
  Value value = evaluate(expression, at);
  if (value.state == Value::State::outside_domain) value.state = Value::State::division_by_zero;
  return value;
}

Value factorial(const Expression& call, const Point& at, bool reciprocal) {
  Value a = argument(child(call, 0), at);
  if (!a.exists()) return a;
  if (!a.number.is_integer()) return Value::outside("factorial of " + text_of(a.number));
  const long m = to_machine(a.number);
  if (m >= 0) return Value::of(reciprocal ? numeric(1) / factorial_of(m) : factorial_of(m));
  return reciprocal ? Value::of(0) : Value::outside("factorial of " + text_of(a.number));
}

numeric binomial(const numeric& a, long b) {
  if (b < 0) return 0;
  if (a.is_nonneg_integer() && a.int_length() <= 40) {
    const long n = a.to_long();
    if (b > n) return 0;
    if (n < 400) return factorial_of(n) / (factorial_of(b) * factorial_of(n - b));
  }
  return progression_product(a, -1, b) / factorial_of(b);
}

Value call_of_two(const Expression& call, const Point& at) {
  Value a = argument(child(call, 0), at);
  Value b = argument(child(call, 1), at);
  if (!a.exists()) return a;
  if (!b.exists()) return b;
  if (!b.number.is_integer())
    return Value::outside(call.name + " with the second argument " + text_of(b.number));
  const long m = to_machine(b.number);
  if (call.name == "binomial") return Value::of(binomial(a.number, m));
  if (m < 0) return Value::outside(call.name + " of length " + std::to_string(m));
  return Value::of(progression_product(a.number, call.name == "rising" ? 1 : -1, m));
}

/// min, max and floor, which stand in bounds only.
Value bound_call(const Expression& call, const Point& at) {
  Value out = argument(child(call, 0), at);
  if (call.name == "floor") {
    if (!out.exists()) return out;
    const numeric n = out.number.numer();
    const numeric d = out.number.denom();
    return Value::of((n - GiNaC::mod(n, d)) / d);  // mod of a positive modulus is in [0, d)
  }
  for (std::size_t i = 1; i < call.children.size(); ++i) {
    Value next = argument(child(call, i), at);
    if (!out.exists()) return out;
    if (!next.exists()) return next;
    if (call.name == "min" ? next.number < out.number : next.number > out.number) out = next;
  }
  return out;
}

Value call_value(const Expression& call, const Point& at, bool reciprocal) {
  if (call.name == "factorial") return factorial(call, at, reciprocal);
  Value value;
  if (call.name == "floor" || call.name == "min" || call.name == "max")
    value = bound_call(call, at);
  else if (call.name == "binomial" || call.name == "rising" || call.name == "falling")
    value = call_of_two(call, at);
  else
    throw std::logic_error("audit: unknown function " + call.name);
  return reciprocal ? inverted(value) : value;
}

Value power(const Expression& node, const Point& at, bool reciprocal) {
  Value v = argument(child(node, 1), at);
  if (!v.exists()) return v;
  if (!v.number.is_integer()) return Value::divided_by_zero("exponent " + text_of(v.number));
  long exponent = to_machine(v.number);
  if (reciprocal) exponent = -exponent;
  return raised(evaluate(child(node, 0), at, exponent < 0), std::labs(exponent));
}

}  // namespace

Value evaluate(const Expression& node, const Point& at, bool reciprocal) {
  switch (node.operation) {
    case Operation::multiply:
      return times(evaluate(child(node, 0), at, reciprocal),
                   evaluate(child(node, 1), at, reciprocal));
    case Operation::divide:
      return times(evaluate(child(node, 0), at, reciprocal),
                   evaluate(child(node, 1), at, !reciprocal));
    case Operation::negate:
      return times(Value::of(-1), evaluate(child(node, 0), at, reciprocal));
    case Operation::power:
      return power(node, at, reciprocal);
    case Operation::call:
      return call_value(node, at, reciprocal);
    default:
      break;
  }
  Value value;
  if (node.operation == Operation::literal)
    value = Value::of(to_numeric(node.value));
  else if (node.operation == Operation::symbol)
    value = Value::of(at.at(node.name));
  else if (node.operation == Operation::add)
    value = plus(evaluate(child(node, 0), at), evaluate(child(node, 1), at));
  else
    value = minus(evaluate(child(node, 0), at), evaluate(child(node, 1), at));
  return reciprocal ? inverted(value) : value;
}

bool mentions(const Expression& expression, const std::string& name) {
  if (expression.operation == Operation::symbol) return expression.name == name;
  for (const claim::ExpressionPtr& one : expression.children)
    if (mentions(*one, name)) return true;
  return false;
}

Interval interval_at(const claim::Range& range, const Point& at) {
  long reach = 8;  // a guess that the vanishing margin confirms
  for (const numeric& value : at.values)
    if (value.is_integer()) reach += 2 * std::labs(to_machine(value));
  const auto end = [&](const claim::Bound& bound, long beyond) {
    if (bound.kind != claim::Bound::Kind::finite) return beyond;
    const Value value = argument(*bound.value, at);
    if (!value.exists()) throw TooLarge("a bound without a value: " + value.why);
    return to_machine(value.number);
  };
  Interval out;
  out.low = end(range.low, -reach);
  out.high = end(range.high, reach);
  out.windowed_low = range.low.kind != claim::Bound::Kind::finite;
  out.windowed_high = range.high.kind != claim::Bound::Kind::finite;
  if (out.windowed_low && !out.windowed_high) out.low = std::min(out.low, out.high - reach);
  if (out.windowed_high && !out.windowed_low) out.high = std::max(out.high, out.low + reach);
  return out;
}

namespace {

struct Summation {
  const claim::Sum& sum;
  const std::function<void()>& check_time;
  long terms = 0;

  Value over(std::size_t depth, Point& at) {
    if (depth == sum.over.size()) {
      if (check_time) check_time();
      if (++terms > kMostTerms) throw TooLarge("a sum of many terms");
      return evaluate(*sum.summand, at);
    }
    const claim::Range& range = sum.over[depth];
    const Interval ends = interval_at(range, at);
    Value total = Value::of(0);
    for (long k = ends.low; k <= ends.high && total.exists(); ++k) {
      at.set(range.index, numeric(k));
      const Value inner = over(depth + 1, at);
      const bool margin = (ends.windowed_low && k < ends.low + kMargin) ||
                          (ends.windowed_high && k > ends.high - kMargin);
      if (margin && !inner.is_zero()) throw TooLarge("the support of an infinite range");
      if (!inner.exists()) return {inner.state, 0, inner.why + " at " + text_of(at)};
      total = plus(total, inner);
    }
    return total;
  }
};

}  // namespace

Value evaluate_sum(const claim::Sum& sum, const Point& at,
                   const std::function<void()>& check_time) {
  Point inner = at;
  return Summation{sum, check_time}.over(0, inner);
}

}  // namespace sumwright::audit
