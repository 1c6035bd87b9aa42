// Nonvanishing: the leading coefficient and every other quantity that was divided by.
//
// Each is tried at points of the region where it is used, and the method given per factor is
// repeated: affine in integer symbols, positive after a shift, excluded or assumed by the claim.
#include <algorithm>

#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/expansion.hpp"
#include "audit/hypotheses.hpp"

namespace sumwright::audit {

namespace {

constexpr long kLeadingSpan = 30;

bool occurs(const proof::Polynomial& polynomial, std::size_t symbol) {
  return std::any_of(polynomial.terms.begin(), polynomial.terms.end(), [&](const auto& monomial) {
    return symbol < monomial.exponents.size() && monomial.exponents[symbol] != 0;
  });
}

bool is_affine_in_integers(const proof::Polynomial& polynomial,
                           const std::vector<proof::Symbol>& symbols) {
  for (const proof::Monomial& monomial : polynomial.terms) {
    unsigned long degree = 0;
    for (std::size_t i = 0; i < monomial.exponents.size(); ++i) {
      degree += monomial.exponents[i];
      if (monomial.exponents[i] != 0 && symbols.at(i).kind == proof::SymbolKind::rational_parameter)
        return false;
    }
    if (degree > 1) return false;
  }
  return true;
}

/// Nonempty text: why the factor's own reason is wrong, whatever the point.
class Reason {
 public:
  Reason(const Context& context, const proof::NonzeroFactor& factor)
      : context_(context), factor_(factor) {}

  std::string flaw() const {
    using Method = proof::NonzeroFactor::Method;
    switch (factor_.method) {
      case Method::constant:
        return is_constant() ? "" : "is not a nonzero number";
      case Method::linear:
        return is_affine_in_integers(factor_.factor, context_.proof.symbols)
                   ? ""
                   : "is not affine in integer symbols";
      case Method::positive:
        return positive_flaw();
      case Method::excluded:
        return excluded_flaw();
      case Method::assumed:
        return assumed_flaw();
    }
    return "has no method";
  }

 private:
  bool is_constant() const {
    if (factor_.factor.terms.size() != 1 || factor_.factor.terms[0].coefficient == 0) return false;
    const auto& exponents = factor_.factor.terms[0].exponents;
    return std::all_of(exponents.begin(), exponents.end(), [](auto e) { return e == 0; });
  }

  std::string positive_flaw() const {
    const std::vector<GiNaC::ex> symbols = make_symbols(context_.names);
    std::vector<GiNaC::ex> moved = symbols;
    for (std::size_t i = 0; i < symbols.size(); ++i) {
      if (!occurs(factor_.factor, i)) continue;
      if (context_.proof.symbols[i].kind == proof::SymbolKind::rational_parameter)
        return "contains a rational parameter, which has no sign";
      if (i >= factor_.shift.size()) return "has no shift for a symbol";
      moved[i] = symbols[i] + numeric(factor_.shift[i]);
    }
    GiNaC::ex expanded = to_ex(factor_.factor, moved).expand();
    if (factor_.negated) expanded = (-expanded).expand();
    GiNaC::ex constant = expanded;
    for (const GiNaC::ex& symbol : symbols) constant = constant.coeff(symbol, 0);
    if (!GiNaC::ex_to<numeric>(constant).is_positive()) return "has no positive constant term";
    const std::size_t size = GiNaC::is_a<GiNaC::add>(expanded) ? expanded.nops() : 1;
    for (std::size_t i = 0; i < size; ++i) {
      GiNaC::ex term = size == 1 ? expanded : expanded.op(i);
      for (const GiNaC::ex& symbol : symbols) term = term.coeff(symbol, term.degree(symbol));
      if (GiNaC::ex_to<numeric>(term).is_negative()) return "has a negative coefficient";
    }
    return "";
  }

  const claim::Parameter* parameter() const {
    if (factor_.parameter >= context_.names.size()) return nullptr;
    for (const claim::Parameter& one : context_.claim.parameters)
      if (one.name == context_.names[factor_.parameter]) return &one;
    return nullptr;
  }

  std::string excluded_flaw() const {
    const claim::Parameter* x = parameter();
    if (x == nullptr || factor_.exclusion >= x->excluded.size())
      return "names an entry that the claim does not have";
    const claim::Exclusion& entry = x->excluded[factor_.exclusion];
    const std::vector<GiNaC::ex> symbols = make_symbols(context_.names);
    GiNaC::ex value;
    if (entry.kind == claim::Exclusion::Kind::constant) {
      value = to_numeric(entry.value);
    } else {
      value = factor_.value.constant;
      for (std::size_t i = 0; i < factor_.value.coefficients.size(); ++i)
        value += numeric(factor_.value.coefficients[i]) * symbols.at(i);
    }
    // factor = scale (x - value) for some nonzero scale
    const GiNaC::ex factor = to_ex(factor_.factor, symbols).expand();
    const GiNaC::ex& x_symbol = symbols[factor_.parameter];
    const GiNaC::ex scale = factor.coeff(x_symbol, 1);
    if (!GiNaC::is_a<numeric>(scale) || scale.is_zero()) return "is not linear in the parameter";
    if (!(factor - scale * (x_symbol - value)).expand().is_zero())
      return "is not a multiple of parameter minus excluded value";
    return "";
  }

  std::string assumed_flaw() const {
    if (factor_.assumption >= context_.claim.assumptions.size())
      return "names an assumption that the claim does not have";
    const claim::Assumption& entry = context_.claim.assumptions[factor_.assumption];
    if (entry.comparison == claim::Comparison::less_equal ||
        entry.comparison == claim::Comparison::greater_equal)
      return "rests on an assumption that allows equality";
    // proportional to left - right, seen at every sample
    std::optional<numeric> ratio;
    for (const Point& point : context_.samples) {
      const Value difference = minus(evaluate(*entry.left, point), evaluate(*entry.right, point));
      if (!difference.exists() || difference.number.is_zero()) continue;
      const numeric here = value_of(factor_.factor, point) / difference.number;
      if (here.is_zero() || (ratio && !ratio->is_equal(here)))
        return "is not a multiple of the assumption's difference";
      ratio = here;
    }
    return "";
  }

  const Context& context_;
  const proof::NonzeroFactor& factor_;
};

void check_bounds(Check& check, const Context& context, const proof::NonzeroFactor& factor,
                  const Point& point, const std::string& what) {
  using Method = proof::NonzeroFactor::Method;
  if (factor.method == Method::positive)
    for (std::size_t i = 0; i < factor.shift.size(); ++i)
      if (occurs(factor.factor, i))
        check.expect(point.values.at(i) >= numeric(factor.shift[i]),
                     [&] { return what + ": the shift is no lower bound at " + text_of(point); });
  if (factor.method != Method::excluded) return;
  for (const claim::Parameter& one : context.claim.parameters)
    if (one.name == context.names.at(factor.parameter) && factor.exclusion < one.excluded.size() &&
        one.excluded[factor.exclusion].kind != claim::Exclusion::Kind::constant)
      check.expect(excludes(one.excluded[factor.exclusion], numeric(value_of(factor.value, point))),
                   [&] { return what + ": the value is not excluded at " + text_of(point); });
}

}  // namespace

void check_nonzero_at(const Context& context, Check& check, const proof::Nonzero& nonzero,
                      const std::vector<Place>& places, const std::string& what) {
  check.expect(nonzero.polynomial.constant != 0, [&] { return what + " is 0"; });
  for (const auto& [factor, exponent] : nonzero.polynomial.factors) {
    const proof::Polynomial& wanted = factor;
    check.expect(std::any_of(nonzero.factors.begin(), nonzero.factors.end(),
                             [&](const auto& one) { return identical(one.factor, wanted); }),
                 [&] { return what + ": a factor has no reason"; });
  }
  for (const proof::NonzeroFactor& factor : nonzero.factors) {
    const std::string flaw = Reason(context, factor).flaw();
    check.expect(flaw.empty(),
                 [&] { return std::string(what).append(": a factor ").append(flaw); });
  }
  for (const Place& place : places)
    check.attempt([&] {
      context.tick();
      const Point point = context.at(place);
      const Value value = value_of(nonzero.polynomial, point);
      check.expect(value.exists() && !value.is_zero(),
                   [&] { return what + " is " + text_of(value) + " at " + text_of(point); });
      for (const proof::NonzeroFactor& factor : nonzero.factors)
        check_bounds(check, context, factor, point, what);
    });
}

namespace {

void check_leading(const Context& context, std::vector<Finding>& findings) {
  if (!context.proof.leading) return;
  Check check("leading coefficient");
  std::vector<Place> places;
  for (std::size_t sample = 0; sample < context.samples.size(); ++sample)
    for (long i = 0; i <= kLeadingSpan; ++i)
      if (context.admits(sample, context.proof.threshold + i))
        places.push_back({sample, context.proof.threshold + i, 0});
  check_nonzero_at(context, check, *context.proof.leading, places, "the leading coefficient");
  if (context.proof.telescoping && !context.proof.telescoping->coefficients.empty())
    for (const Place& place : places)
      check.attempt([&] {
        const Point point = context.at(place);
        check.expect_same(value_of(context.proof.telescoping->coefficients.back(), point),
                          value_of(context.proof.leading->polynomial, point),
                          "the last coefficient against the one shown nonzero", point);
      });
  findings.push_back(check.finding());
}

void check_instance_conditions(const Context& context, Check& check,
                               const proof::Instance& instance, const std::vector<Place>& places) {
  const auto one = [&](const std::optional<proof::Nonzero>& nonzero, const char* what) {
    if (nonzero) check_nonzero_at(context, check, *nonzero, places, what + instance.id);
  };
  for (const proof::AtomStep& step : instance.steps) one(step.nonzero, "a step of instance ");
  for (const proof::Unit& unit : instance.left_units) one(unit.nonzero, "a unit of instance ");
  for (const proof::Unit& unit : instance.right_units) one(unit.nonzero, "a unit of instance ");
  one(instance.cancelled, "the factor cancelled in instance ");
}

}  // namespace

void check_nonzero(const Context& context, std::vector<Finding>& findings) {
  check_leading(context, findings);
  Check check("nonvanishing conditions");
  if (context.proof.telescoping) {
    const proof::Telescoping& telescoping = *context.proof.telescoping;
    check_nonzero_at(context, check, telescoping.weight, context.running_places(), "the weight");
    for (const auto& shift : telescoping.shifts)
      for (const proof::Instance& instance : shift)
        check_instance_conditions(context, check, instance, context.index_places());
    if (telescoping.index_shift)
      check_instance_conditions(context, check, *telescoping.index_shift, context.index_places());
  }
  for (const auto* balance : {&context.proof.ends, &context.proof.closed_recurrence})
    if (*balance)
      for (const proof::BalanceTerm& term : (*balance)->terms)
        if (term.instance)
          check_instance_conditions(context, check, *term.instance, context.running_places());
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
