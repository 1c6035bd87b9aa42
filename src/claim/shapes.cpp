// The rules on expressions that can be decided from the parse tree alone.
//
// Whether a term is hypergeometric is decided later; here only what its grammar says.
// Invariant: whatever passes can be evaluated at a point without numbers
// beyond the limits growing out of constants alone.
#include "claim/shapes.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cmath>
#include <optional>
#include <utility>

#include "claim/text.hpp"

namespace sumwright::claim {

std::set<std::string> Scope::integer_symbols() const {
  std::set<std::string> out = indices;
  out.insert(integers.begin(), integers.end());
  if (!running.empty()) out.insert(running);
  return out;
}

Shapes::Shapes(const Source& source, const Limits& limits, const Scope& scope)
    : source_(source), limits_(limits), scope_(scope), integer_symbols_(scope.integer_symbols()) {}

void Shapes::refuse(Place place, std::string_view message, std::string_view note) const {
  throw InputError(source_, place, message, note);
}

Folded Shapes::fold(const Expression& expression) const {
  return fold_constants(source_, limits_, integer_symbols_, expression);
}

void Shapes::check_magnitude(const Expression& where, const AffineView& form, long limit) const {
  const auto fits = [limit](long value) { return value <= limit && value >= -limit; };
  const bool all = std::all_of(form.coefficients.begin(), form.coefficients.end(),
                               [&fits](const auto& entry) { return fits(entry.second); });
  if (all && fits(form.constant)) return;
  refuse(where.place, fmt::format("an integer beyond {} in absolute value", limit),
         fmt::format("integers here are read up to {}", limit));
}

void Shapes::check_count(const Expression& argument, const std::string& what) const {
  AffineFault fault;
  const auto form = as_affine(argument, integer_symbols_, &fault);
  if (form) {
    check_magnitude(argument, *form, limits_.magnitude);
    return;
  }
  if (fault.too_large) {
    refuse(fault.where->place,
           fmt::format("an integer beyond {} in absolute value", limits_.magnitude));
  }
  std::string note = "such as 2*n - k + 1";
  if (fault.where->operation == Operation::symbol) {
    note = fmt::format("{} is a rational parameter", in_quotes(fault.where->name));
  }
  refuse(fault.where->place,
         fmt::format("{} must be an integer-affine expression in the integer "
                     "symbols",
                     what),
         note);
}

// The running variable or an index somewhere in the expression.
const Expression* Shapes::moving_symbol(const Expression& e) const {
  if (e.operation == Operation::symbol) {
    return e.name == scope_.running || scope_.indices.contains(e.name) ? &e : nullptr;
  }
  for (const ExpressionPtr& child : e.children) {
    if (const Expression* found = moving_symbol(*child)) return found;
  }
  return nullptr;
}

void Shapes::check_exponent_size(const Expression& exponent, const AffineView& form) const {
  const auto fits = [this](long v) { return v <= limits_.exponent && v >= -limits_.exponent; };
  const bool all = std::all_of(form.coefficients.begin(), form.coefficients.end(),
                               [&fits](const auto& entry) { return fits(entry.second); });
  if (all && fits(form.constant)) return;
  refuse(exponent.place, fmt::format("an exponent beyond {} in absolute value", limits_.exponent));
}

void Shapes::check_term_power(const Expression& e) const {
  const Expression& base = *e.children[0];
  const Expression& exponent = *e.children[1];
  if (const auto literal = as_literal(exponent)) {
    if (abs(*literal) > limits_.exponent) {
      refuse(exponent.place,
             fmt::format("an exponent beyond {} in absolute value", limits_.exponent));
    }
    return;
  }
  AffineFault fault;
  const auto form = as_affine(exponent, integer_symbols_, &fault);
  if (!form && fault.too_large) {
    refuse(fault.where->place,
           fmt::format("an exponent beyond {} in absolute value", limits_.exponent));
  }
  if (!form) {
    refuse(fault.where->place,
           "an exponent must be a literal integer, or integer-affine in the integer symbols",
           "such as x^3, x^-2 or 2^(2*n - k)");
  }
  check_exponent_size(exponent, *form);
  if (const Expression* moving = moving_symbol(base)) {
    refuse(moving->place,
           fmt::format("{} may not stand in the base of this power", in_quotes(moving->name)),
           "beside an exponent that is not a literal integer, the base must be free of indices "
           "and of the running variable");
  }
}

void Shapes::check_term_node(const Expression& e) const {
  if (e.operation == Operation::power) check_term_power(e);
  if (e.operation == Operation::call) {
    const Function* function = find_function(e.name);
    if (function != nullptr && function->in_bounds) {
      refuse(e.sign, fmt::format("{} may stand only in bounds", in_quotes(e.name)));
    }
    if (e.name == "binomial") check_count(*e.children[1], "the second argument of 'binomial'");
    if (e.name == "factorial") check_count(*e.children[0], "the argument of 'factorial'");
    if (e.name == "rising") check_count(*e.children[1], "the second argument of 'rising'");
    if (e.name == "falling") check_count(*e.children[1], "the second argument of 'falling'");
  }
  for (const ExpressionPtr& child : e.children) check_term_node(*child);
}

void Shapes::check_term(const Expression& expression) const {
  check_term_node(expression);
  (void)fold(expression);
}

void Shapes::check_rational(const Expression& expression, const std::string& what) const {
  struct Walk {
    const Shapes& shapes;
    const std::string& what;
    void operator()(const Expression& e) const {
      if (e.operation == Operation::call) {
        shapes.refuse(e.sign, fmt::format("{} must be a rational function; {} may not stand in it",
                                          what, in_quotes(e.name)));
      }
      if (e.operation == Operation::power) {
        shapes.check_term_power(e);
        const auto form = as_affine(*e.children[1], {});
        if (!form) {
          shapes.refuse(
              e.children[1]->place,
              fmt::format("{} must be a rational function; its exponents are integers", what));
        }
      }
      for (const ExpressionPtr& child : e.children) (*this)(*child);
    }
  };
  Walk{*this, what}(expression);
  (void)fold(expression);
}

double Shapes::floor_scale(const Expression& e) const {
  const Expression& quotient = *e.children[0];
  if (quotient.operation != Operation::divide ||
      quotient.children[1]->operation != Operation::literal || quotient.children[1]->value <= 0) {
    refuse(quotient.place, "'floor' takes a quotient by a positive literal integer",
           "such as floor((n + 1)/2)");
  }
  if (quotient.children[1]->value > limits_.magnitude) {
    refuse(quotient.children[1]->place,
           fmt::format("an integer beyond {} in absolute value", limits_.magnitude));
  }
  return bound_scale(*quotient.children[0]);
}

double Shapes::product_scale(const Expression& e) const {
  for (const std::size_t side : {0U, 1U}) {
    const auto constant = as_affine(*e.children[side], integer_symbols_);
    if (!constant || !constant->is_constant()) continue;
    return magnitude(*constant) * bound_scale(*e.children[1 - side]);
  }
  refuse(e.place, "a bound must be integer-affine; one factor of a product must be an integer");
}

// The largest factor by which symbols and 1 can enter the value.
double Shapes::bound_scale(const Expression& e) const {
  double scale = 1;
  switch (e.operation) {
    case Operation::literal:
      scale = e.value.get_d() < 0 ? -e.value.get_d() : e.value.get_d();
      break;
    case Operation::symbol:
      if (!integer_symbols_.contains(e.name)) {
        refuse(e.place,
               fmt::format("{} is a rational parameter; bounds are integers", in_quotes(e.name)));
      }
      break;
    case Operation::negate:
      return bound_scale(*e.children[0]);
    case Operation::add:
    case Operation::subtract:
      return bound_scale(*e.children[0]) + bound_scale(*e.children[1]);
    case Operation::multiply:
      scale = product_scale(e);
      break;
    case Operation::divide:
      refuse(e.sign, "in a bound, / may stand only directly inside 'floor'", "such as floor(n/2)");
    case Operation::power: {
      const auto form = as_affine(e, {});
      if (!form) {
        refuse(e.place, "a bound must be integer-affine; powers may not stand in it");
      }
      scale = magnitude(*form);
      break;
    }
    case Operation::call:
      if (e.name == "floor") return floor_scale(e);
      if (e.name != "min" && e.name != "max") {
        refuse(e.sign, fmt::format("{} may not stand in a bound", in_quotes(e.name)));
      }
      for (const ExpressionPtr& argument : e.children) {
        scale = std::max(scale, bound_scale(*argument));
      }
      return scale;
  }
  if (!(scale <= static_cast<double>(limits_.magnitude))) {
    refuse(e.place, fmt::format("an integer beyond {} in absolute value", limits_.magnitude),
           fmt::format("integers here are read up to {}", limits_.magnitude));
  }
  return scale;
}

void Shapes::check_bound(const Expression& expression) const { (void)bound_scale(expression); }

// One side of <=, <, >=, >.
void Shapes::check_order(const Expression& expression) const {
  const std::string advice =
      "only integer literals, integer symbols and + - * may stand beside "
      "<=, <, >= and >";
  struct Walk {
    const Shapes& shapes;
    const std::string& advice;
    void operator()(const Expression& e) const {
      if (e.operation == Operation::symbol && !shapes.integer_symbols_.contains(e.name)) {
        shapes.refuse(e.place,
                      fmt::format("{} is a rational parameter; only != can be stated of it",
                                  in_quotes(e.name)));
      }
      if (e.operation == Operation::call) {
        shapes.refuse(e.sign, fmt::format("{} may not stand in a condition", in_quotes(e.name)),
                      advice);
      }
      if (e.operation == Operation::divide) {
        shapes.refuse(e.sign, "/ may not stand in a condition between integers", advice);
      }
      if (e.operation == Operation::power) {
        shapes.refuse(e.sign, "^ may not stand in a condition between integers", advice);
      }
      for (const ExpressionPtr& child : e.children) (*this)(*child);
    }
  };
  Walk{*this, advice}(expression);
  check_count(expression, "each side of the condition");
}

bool Shapes::check_comparison(const ParsedComparison& comparison) const {
  if (comparison.comparison != Comparison::not_equal) {
    check_order(*comparison.left);
    check_order(*comparison.right);
    return true;
  }
  struct IsInteger {
    const std::set<std::string>& names;
    bool operator()(const Expression& e) const {
      if (e.operation == Operation::symbol) return names.contains(e.name);
      if (e.operation == Operation::call || e.operation == Operation::power ||
          e.operation == Operation::divide) {
        return false;
      }
      return std::all_of(e.children.begin(), e.children.end(),
                         [this](const ExpressionPtr& child) { return (*this)(*child); });
    }
  };
  check_rational(*comparison.left, "each side of the condition");
  check_rational(*comparison.right, "each side of the condition");
  const IsInteger is_integer{integer_symbols_};
  return is_integer(*comparison.left) && is_integer(*comparison.right);
}

mpq_class Shapes::constant(const Expression& expression, const std::string& what) const {
  check_rational(expression, what);
  const Folded folded = fold(expression);
  if (!folded.value) refuse(expression.place, what + " is too large a number");
  return *folded.value;
}

bool Shapes::is_zero_constant(const Expression& expression) const {
  const Folded folded = fold(expression);
  return folded.value && *folded.value == 0;
}

}  // namespace sumwright::claim
