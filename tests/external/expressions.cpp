// Parse trees to exact numbers and to balls.
#include "external/expressions.hpp"

#include <stdexcept>

namespace sumwright::testing {
namespace {

using claim::Operation;

long count(const mpq_class& q) {
  if (q.get_den() != 1 || !q.get_num().fits_slong_p()) throw std::domain_error("not a count");
  return q.get_num().get_si();
}

/// x (x+1) ... (x+m-1)
mpq_class rising(const mpq_class& x, long m) {
  if (m < 0) throw std::domain_error("a negative number of factors");
  mpq_class out = 1;
  for (long t = 0; t < m; ++t) out *= x + t;
  return out;
}

mpq_class call(const std::string& name, const std::vector<mpq_class>& arguments) {
  const mpq_class& a = arguments.at(0);
  if (name == "factorial") return rising(1, count(a));
  const long m = count(arguments.at(1));
  if (name == "rising") return rising(a, m);
  if (name == "falling") return rising(a - m + 1, m);
  if (name != "binomial") throw std::domain_error("a function without a value: " + name);
  return m < 0 ? mpq_class(0) : mpq_class(rising(a - m + 1, m) / rising(1, m));
}

mpq_class power(const mpq_class& base, long exponent) {
  if (exponent < 0 && base == 0) throw std::domain_error("division by 0");
  mpq_class out = 1;
  for (long i = 0; i < std::abs(exponent); ++i) out *= base;
  return exponent < 0 ? mpq_class(1 / out) : out;
}

mpq_class divide(const mpq_class& a, const mpq_class& b) {
  if (b == 0) throw std::domain_error("division by 0");
  return a / b;
}

Ball ball_call(const std::string& name, const std::vector<mpq_class>& arguments,
               const Balls& balls) {
  const mpq_class& a = arguments.at(0);
  if (name == "factorial") return balls.gamma(a + 1);
  if (name == "rising") return balls.rising(a, arguments.at(1));
  if (name == "falling") return balls.falling(a, arguments.at(1));
  if (name == "binomial") return balls.binomial(a, arguments.at(1));
  throw std::domain_error("a function without a value: " + name);
}

std::vector<mpq_class> exact_children(const claim::Expression& e, const Values& at) {
  std::vector<mpq_class> out;
  for (const claim::ExpressionPtr& child : e.children) out.push_back(exact_value(*child, at));
  return out;
}

}  // namespace

mpq_class exact_value(const claim::Expression& e, const Values& at) {
  if (e.operation == Operation::literal) return e.value;
  if (e.operation == Operation::symbol) return at.at(e.name);
  const std::vector<mpq_class> u = exact_children(e, at);
  switch (e.operation) {
    case Operation::negate:
      return -u.at(0);
    case Operation::add:
      return u.at(0) + u.at(1);
    case Operation::subtract:
      return u.at(0) - u.at(1);
    case Operation::multiply:
      return u.at(0) * u.at(1);
    case Operation::divide:
      return divide(u.at(0), u.at(1));
    case Operation::power:
      return power(u.at(0), count(u.at(1)));
    default:
      return call(e.name, u);
  }
}

Ball ball_value(const claim::Expression& e, const Values& at, const Balls& balls) {
  const auto child = [&](std::size_t i) { return ball_value(*e.children.at(i), at, balls); };
  switch (e.operation) {
    case Operation::literal:
      return balls.number(e.value);
    case Operation::symbol:
      return balls.number(at.at(e.name));
    case Operation::negate:
      return balls.difference(balls.number(0), child(0));
    case Operation::add:
      return balls.sum(child(0), child(1));
    case Operation::subtract:
      return balls.difference(child(0), child(1));
    case Operation::multiply:
      return balls.product(child(0), child(1));
    case Operation::divide:
      return balls.quotient(child(0), child(1));
    case Operation::power:
      return balls.power(child(0), count(exact_value(*e.children.at(1), at)));
    default:
      return ball_call(e.name, exact_children(e, at), balls);
  }
}

}  // namespace sumwright::testing
