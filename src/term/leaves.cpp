// Function calls and symbolic powers as atoms.
// A first argument is split as x + u: u integer-affine in the integer symbols, x what remains
// (rational parameters and a fraction in [0, 1)); x = 0 gives factorials where signs are known
// (design rules R3 and R4), interval products elsewhere.

#include "term/leaves.hpp"

#include <fmt/format.h>

#include <stdexcept>

#include "claim/affine.hpp"

namespace sumwright::term {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using claim::Expression;
using claim::ExpressionPtr;
using claim::Operation;
using proof::ConditionKind;
using proof::LeafRule;

namespace {

/// x + u with x = base / scale.
struct SplitArgument {
  Polynomial base;
  mpz_class scale = 1;
  Affine integer;
  [[nodiscard]] bool is_integer() const { return base.is_zero(); }
};

[[noreturn]] void refuse(const Setting& setting, const Expression& e, const std::string& why) {
  throw claim::InputError(*setting.claim->source, e.place,
                          fmt::format("'{}' is not a hypergeometric factor: {}",
                                      claim::to_text(e).substr(0, 200), why));
}

/// Splits coefficient * monomial: into the integer part when it is an integer times one integer
/// symbol.
bool takes_integer_part(const Setting& setting, const algebra::Monomial& m, const mpz_class& scale,
                        Affine& integer) {
  std::size_t at = 0;
  unsigned long degree = 0;
  for (std::size_t i = 0; i < m.exponents.size(); ++i) {
    degree += m.exponents[i];
    if (m.exponents[i] != 0) at = i;
  }
  if (degree != 1 || !setting.is_integer(at) || m.coefficient % scale != 0) return false;
  const mpz_class c = m.coefficient / scale;
  if (!c.fits_slong_p()) return false;
  integer.coefficients[at] = c.get_si();
  return true;
}

SplitArgument split(const Setting& setting, const Expression& call, const Expression& argument) {
  const std::optional<RationalFunction> value = to_rational_function(setting, argument);
  if (!value || !value->denominator().is_constant())
    refuse(setting, call, "its first argument must be a polynomial in the symbols");
  SplitArgument out{Polynomial(setting.ring), value->denominator().constant(),
                    Affine::zero(setting.size())};
  std::vector<algebra::Monomial> rest;
  for (const algebra::Monomial& m : value->numerator().to_terms()) {
    if (takes_integer_part(setting, m, out.scale, out.integer)) continue;
    algebra::Monomial kept = m;
    bool constant = true;
    for (std::size_t i = 0; i < m.exponents.size(); ++i) {
      constant = constant && m.exponents[i] == 0;
      if (m.exponents[i] != 0 && i <= index)
        refuse(setting, call,
               "its first argument must have integer slope in the running variable "
               "and the index");
    }
    if (constant) {
      mpz_class floor;
      mpz_fdiv_q(floor.get_mpz_t(), m.coefficient.get_mpz_t(), out.scale.get_mpz_t());
      if (!floor.fits_slong_p()) refuse(setting, call, "its first argument is too large");
      out.integer.constant = floor.get_si();
      kept.coefficient = m.coefficient - floor * out.scale;
      if (kept.coefficient == 0) continue;
    }
    rest.push_back(std::move(kept));
  }
  out.base = Polynomial::from_terms(setting.ring, rest);
  if (out.base.is_zero()) out.scale = 1;
  mpz_class common = gcd(out.base.content(), out.scale);
  if (common > 1) {
    out.base = out.base.divide(Polynomial(setting.ring, common)).first;
    out.scale /= common;
  }
  return out;
}

Requirement at_least_zero(const Facts& facts, const Affine& form, ConditionKind kind,
                          claim::Place place) {
  Requirement r;
  r.kind = kind;
  r.nonnegative = form;
  r.settled = facts.implies(form);
  r.place = place;
  return r;
}

struct Making {
  const Setting& setting;
  const Facts& facts;
  const ExpressionPtr& e;
  std::vector<Requirement>& definedness;
  Leaf leaf;

  [[nodiscard]] Affine affine_argument(std::size_t i) const {
    return to_affine(setting, *e->children.at(i));
  }
  void fact(const Affine& at) { leaf.value.multiply(factorial_atom(setting.ring, at)); }
  void rfact(const Affine& at) { leaf.value.multiply(reciprocal_factorial_atom(setting.ring, at)); }
  void interval(const SplitArgument& a, const Affine& low, const Affine& high) {
    leaf.value.multiply(interval_atom(a.base, a.scale, low, high, false));
  }
  void require(const Affine& form, ConditionKind kind = ConditionKind::factorial_argument) {
    leaf.requirements.push_back(at_least_zero(facts, form, kind, e->place));
  }
  void require_defined(const Affine& form) {
    Requirement r = at_least_zero(facts, form, ConditionKind::definedness, e->place);
    leaf.requirements.push_back(r);
    definedness.push_back(r);
  }
};

void make_factorial(Making& m, bool reciprocal) {
  const Affine a = m.affine_argument(0);
  if (reciprocal) {
    m.leaf.rule = LeafRule::reciprocal_factorial;
    m.rfact(a);
    return;
  }
  m.leaf.rule = LeafRule::factorial;
  m.fact(a);
  m.require_defined(a);
}

void make_binomial(Making& m) {
  const SplitArgument a = split(m.setting, *m.e, *m.e->children.at(0));
  const Affine b = m.affine_argument(1);
  const Affine& u = a.integer;
  if (a.is_integer() && m.facts.implies(u)) {
    m.leaf.rule = LeafRule::binomial_factorials;
    m.require(u);
    m.fact(u);
    m.rfact(b);
    m.rfact(u - b);
    return;
  }
  m.leaf.rule = LeafRule::binomial_interval;
  m.interval(a, u - b + 1, u + 1);
  m.rfact(b);
}

void make_rising(Making& m) {
  const SplitArgument a = split(m.setting, *m.e, *m.e->children.at(0));
  const Affine length = m.affine_argument(1);
  const Affine& u = a.integer;
  m.require_defined(length);
  if (a.is_integer() && m.facts.implies(u - 1)) {
    m.leaf.rule = LeafRule::rising_factorials;
    m.require(u - 1);
    m.fact(u + length - 1);
    m.rfact(u - 1);
  } else if (a.is_integer() && m.facts.implies(-u)) {
    m.leaf.rule = LeafRule::rising_reflected;
    m.require(-u);
    m.leaf.value.multiply(power_atom(Polynomial(m.setting.ring, -1), length));
    m.fact(-u);
    m.rfact(-u - length);
  } else {
    m.leaf.rule = LeafRule::rising_interval;
    m.interval(a, u, u + length);
  }
}

void make_falling(Making& m) {
  const SplitArgument a = split(m.setting, *m.e, *m.e->children.at(0));
  const Affine length = m.affine_argument(1);
  const Affine& u = a.integer;
  m.require_defined(length);
  if (a.is_integer() && m.facts.implies(u)) {
    m.leaf.rule = LeafRule::falling_factorials;
    m.require(u);
    m.fact(u);
    m.rfact(u - length);
    return;
  }
  m.leaf.rule = LeafRule::falling_interval;
  m.interval(a, u - length + 1, u + 1);
}

/// value ^ exponent split into primes and irreducible bases.
void multiply_power(Making& m, const Factored& value, const Affine& exponent) {
  const algebra::RingPtr& ring = m.setting.ring;
  if (value.constant < 0) m.leaf.value.multiply(power_atom(Polynomial(ring, -1), exponent));
  const auto integer_base = [&](const mpz_class& number, long sign) {
    Product reciprocal;
    divide_by_constant(reciprocal, ring, abs(number));
    for (const auto& [atom, e] : reciprocal.atoms) {  // prime ^ -multiplicity
      const long multiplicity = -atom.argument.constant * static_cast<long>(e);
      m.leaf.value.multiply(power_atom(atom.base, (sign * multiplicity) * exponent));
    }
  };
  integer_base(value.constant.get_num(), 1);
  integer_base(value.constant.get_den(), -1);
  for (const auto& [base, e] : value.factors) m.leaf.value.multiply(power_atom(base, e * exponent));
}

void make_power(Making& m) {
  const Expression& base = *m.e->children.at(0);
  const std::optional<RationalFunction> value = to_rational_function(m.setting, base);
  if (!value) refuse(m.setting, *m.e, "its base must be a rational function of the parameters");
  if (value->is_zero()) refuse(m.setting, *m.e, "powers of 0 have no rational shift quotient");
  for (std::size_t i = 0; i <= index; ++i)
    if (value->numerator().depends_on(i) || value->denominator().depends_on(i))
      refuse(m.setting, *m.e, "its base may not depend on the running variable or the index");
  const Affine exponent = m.affine_argument(1);
  m.leaf.rule = LeafRule::power;
  multiply_power(m, value->factored(), exponent);
  // The value exists when the base is nonzero or the exponent >= 0.
  const Requirement sign = at_least_zero(m.facts, exponent, ConditionKind::definedness, m.e->place);
  for (const auto& [f, e] : value->factored().factors) {
    if (e > 0 && sign.settled) continue;
    Requirement r;
    r.kind = ConditionKind::definedness;
    r.place = m.e->place;
    Factored single;
    single.multiply(f, 1);
    r.nonzero = single;
    r.why = decide_nonzero(m.setting, m.facts, single);
    r.settled = r.why.has_value();
    m.leaf.requirements.push_back(r);
    m.definedness.push_back(r);
  }
  if (sign.settled) m.leaf.requirements.push_back(sign);
}

}  // namespace

Leaf make_leaf(const Setting& setting, const Facts& facts, const ExpressionPtr& expression,
               bool reciprocal, std::vector<Requirement>& definedness) {
  Making m{setting, facts, expression, definedness, {}};
  m.leaf.expression = expression;
  if (expression->operation == Operation::power)
    make_power(m);
  else if (expression->name == "factorial")
    make_factorial(m, reciprocal);
  else if (expression->name == "binomial")
    make_binomial(m);
  else if (expression->name == "rising")
    make_rising(m);
  else if (expression->name == "falling")
    make_falling(m);
  else
    refuse(setting, *expression, "floor, min and max belong to ranges");
  return m.leaf;
}

Atom inverse_atom(const algebra::RingPtr& ring, const Atom& atom) {
  Atom out = atom;
  switch (atom.kind) {
    case AtomKind::factorial:
      out.kind = AtomKind::reciprocal_factorial;
      return out;
    case AtomKind::reciprocal_factorial:
      out.kind = AtomKind::factorial;
      return out;
    case AtomKind::power:
      out.argument = -atom.argument;
      return out;
    case AtomKind::interval_product:
      out.kind = AtomKind::reciprocal_interval_product;
      return out;
    case AtomKind::reciprocal_interval_product:
      out.kind = AtomKind::interval_product;
      return out;
    case AtomKind::reciprocal:
      return reciprocal_atom(ring, atom.base);
  }
  throw std::logic_error("unknown atom");
}

namespace {

/// A parameter and the entry of its `not` that is a word ("integers", ...).
using ExcludedByWord = std::pair<std::size_t, std::size_t>;

/// The word that excludes the zero of a + t at t = `at`, when the zeros at t + 1, t + 2, ... differ
/// from it by integers.
std::optional<ExcludedByWord> excluded_by_word(const Setting& setting, const Facts& facts,
                                               const Atom& atom, const Affine& at) {
  const Factored f = algebra::factor(interval_factor(atom, at));
  const std::optional<proof::Nonzero> why = decide_nonzero(setting, facts, f);
  if (!why || why->factors.size() != 1) return std::nullopt;
  const proof::NonzeroFactor& factor = why->factors[0];
  if (factor.method != proof::NonzeroFactor::Method::excluded || factor.exponent != 1)
    return std::nullopt;
  const claim::Parameter& x = setting.claim->parameters.at(factor.parameter - index - 1);
  if (x.excluded.at(factor.exclusion).kind == claim::Exclusion::Kind::constant) return std::nullopt;
  // a + t = constant * scale * (x - value): one step of t moves the value by this quotient.
  const mpz_class step = f.constant.get_num() * factor.scale;
  if (atom.scale % step != 0) return std::nullopt;
  return ExcludedByWord{factor.parameter, factor.exclusion};
}

}  // namespace

Requirement interval_nonvanishing(const Setting& setting, const Facts& facts, const Atom& atom,
                                  claim::Place place) {
  // A factor a + t with low <= t < high: t gets the place of a fresh integer symbol, which no
  // hypothesis mentions; we use the running variable's column of an enlarged problem by asking for
  // the two ends and every value between through linear arithmetic on a + low .. a + high - 1.
  Requirement r;
  r.kind = ConditionKind::nonvanishing;
  r.place = place;
  const Polynomial first = interval_factor(atom, atom.low);
  r.nonzero = algebra::factor(first);
  if (first.is_zero()) return r;  // zero unless the product is empty
  const Factored f = *r.nonzero;
  if (atom.base.is_constant()) {
    // A proper fraction plus an integer is never 0; an integer product is nonzero when it lies on
    // one side of 0.
    const bool fraction = !atom.base.is_zero();
    const bool positive = facts.implies(atom.low - 1);
    const bool negative = facts.implies(-atom.high);
    r.settled = fraction || positive || negative;
    if (r.settled) r.why = decide_nonzero(setting, facts, f);
    r.settled = r.why.has_value();
    return r;
  }
  // a = x: one word of `not` must exclude the zeros of all factors, which it does when they are
  // integers and it excludes those of the first and the last.
  r.why = decide_nonzero(setting, facts, f);
  const std::optional<ExcludedByWord> low = excluded_by_word(setting, facts, atom, atom.low);
  r.settled = low && (facts.implies(atom.low - atom.high) ||
                      excluded_by_word(setting, facts.with(atom.high - atom.low - 1), atom,
                                       atom.high - 1) == low);
  if (!r.settled) r.why.reset();
  return r;
}

}  // namespace sumwright::term
