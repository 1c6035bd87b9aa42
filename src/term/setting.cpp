// From a claim's declarations to ring, facts and range ends.
// Invariant: variable 0 is the running variable, 1 the index (a placeholder when there is none).

#include "term/setting.hpp"

#include <fmt/format.h>

#include <set>

#include "claim/affine.hpp"
#include "term/contradiction.hpp"

namespace sumwright::term {

using claim::Comparison;
using claim::Expression;
using claim::Operation;

namespace {

std::string unused_name(const claim::Claim& claim) {
  std::string name = "k";
  const auto taken = [&](const std::string& s) {
    if (s == claim.running) return true;
    for (const claim::Parameter& p : claim.parameters)
      if (p.name == s) return true;
    return false;
  };
  while (taken(name)) name += "_";
  return name;
}

/// left (comparison) right as facts; disjunctions (!=) are left to decide_nonzero.
void add_assumption(Setting& setting, const claim::Assumption& a) {
  if (!a.over_integers) return;
  const Affine left = to_affine(setting, *a.left);
  const Affine right = to_affine(setting, *a.right);
  switch (a.comparison) {
    case Comparison::less_equal:
      setting.hypotheses.add(right - left);
      break;
    case Comparison::less:
      setting.hypotheses.add(right - left - 1);
      break;
    case Comparison::greater_equal:
      setting.hypotheses.add(left - right);
      break;
    case Comparison::greater:
      setting.hypotheses.add(left - right - 1);
      break;
    case Comparison::not_equal:
      break;
  }
}

std::vector<Conjunction> combine(const std::vector<Conjunction>& a,
                                 const std::vector<Conjunction>& b) {
  std::vector<Conjunction> out;
  for (const Conjunction& x : a)
    for (const Conjunction& y : b) {
      Conjunction both = x;
      both.insert(both.end(), y.begin(), y.end());
      out.push_back(both);
    }
  return out;
}

std::vector<Conjunction> unite(std::vector<Conjunction> a, const std::vector<Conjunction>& b) {
  a.insert(a.end(), b.begin(), b.end());
  return a;
}

std::optional<End> end_of(const Setting& setting, const Expression& e, bool upper) {
  const Affine k = Affine::symbol(setting.size(), index);
  if (e.operation == Operation::call && (e.name == "min" || e.name == "max")) {
    std::optional<End> out;
    // k <= min(..) is a conjunction, k <= max(..) a disjunction; lower ends the other way round.
    const bool conjunction = (e.name == "min") == upper;
    for (const claim::ExpressionPtr& child : e.children) {
      const std::optional<End> next = end_of(setting, *child, upper);
      if (!next) return std::nullopt;
      if (!out) {
        out = next;
        continue;
      }
      out->affine.reset();
      out->inside =
          conjunction ? combine(out->inside, next->inside) : unite(out->inside, next->inside);
      out->outside =
          conjunction ? unite(out->outside, next->outside) : combine(out->outside, next->outside);
      if (out->inside.size() + out->outside.size() > 64) return std::nullopt;
    }
    return out;
  }
  if (e.operation == Operation::call && e.name == "floor") {
    const Expression& quotient = *e.children.at(0);
    if (quotient.operation != Operation::divide) return end_of(setting, quotient, upper);
    const std::optional<mpz_class> divisor = claim::as_literal(*quotient.children[1]);
    std::set<std::string> names;
    for (const auto& [name, at] : setting.position)
      if (setting.is_integer(at)) names.insert(name);
    if (!divisor || !divisor->fits_slong_p() || !claim::as_affine(*quotient.children[0], names))
      return std::nullopt;
    const long b = divisor->get_si();
    const Affine u = to_affine(setting, *quotient.children[0]);
    // k <= floor(u/b) iff b k <= u; k < floor(u/b) iff b (k+1) <= u.
    if (upper) return End{std::nullopt, {{u - b * k}}, {{b * k - u - 1}}};
    return End{std::nullopt, {{b * k + b - u - 1}}, {{u - b * k - b}}};
  }
  const Affine bound = to_affine(setting, e);
  if (upper) return End{bound, {{bound - k}}, {{k - bound - 1}}};
  return End{bound, {{k - bound}}, {{bound - k - 1}}};
}

}  // namespace

Facts Setting::from(long least) const {
  return hypotheses.with(Affine::symbol(size(), running) - least);
}

long checked_long(const Setting& setting, const mpz_class& value, claim::Place place) {
  if (!value.fits_slong_p())
    throw claim::InputError(*setting.claim->source, place, "this number is too large");
  return value.get_si();
}

Setting make_setting(const std::shared_ptr<const claim::Claim>& claim) {
  using proof::SymbolKind;
  std::vector<proof::Symbol> symbols{{claim->running, SymbolKind::running}};
  const bool has_index = !claim->sum.over.empty();
  symbols.push_back(
      {has_index ? claim->sum.over[0].index : unused_name(*claim), SymbolKind::index});
  for (const claim::Parameter& p : claim->parameters)
    symbols.push_back({p.name, p.ring == claim::Parameter::Ring::integers
                                   ? SymbolKind::integer_parameter
                                   : SymbolKind::rational_parameter});
  std::vector<std::string> names;
  std::map<std::string, std::size_t> position;
  for (const proof::Symbol& s : symbols) {
    position[s.name] = names.size();
    names.push_back(s.name);
  }
  Setting out{claim,     std::make_shared<algebra::Ring>(names),
              symbols,   position,
              has_index, Facts(symbols.size())};
  for (std::size_t i = 0; i < claim->parameters.size(); ++i)
    if (claim->parameters[i].at_least)
      out.hypotheses.add(
          Affine::symbol(out.size(), i + 2) -
          checked_long(out, *claim->parameters[i].at_least, claim->parameters[i].place));
  for (const claim::Assumption& a : claim->assumptions) add_assumption(out, a);
  refuse_contradiction(out);
  return out;
}

Affine to_affine(const Setting& setting, const Expression& expression) {
  std::set<std::string> names;
  for (const auto& [name, at] : setting.position)
    if (setting.is_integer(at)) names.insert(name);
  const std::optional<claim::AffineView> view = claim::as_affine(expression, names);
  if (!view)
    throw claim::InputError(*setting.claim->source, expression.place,
                            "expected an integer-affine expression in the integer symbols");
  Affine out = Affine::of(setting.size(), view->constant);
  for (const auto& [name, c] : view->coefficients) out.coefficients[setting.position.at(name)] = c;
  return out;
}

std::optional<End> make_end(const Setting& setting, const claim::Bound& bound, bool upper) {
  if (bound.kind != claim::Bound::Kind::finite) return std::nullopt;
  return end_of(setting, *bound.value, upper);
}

End shift(const End& end, std::size_t symbol, long by) {
  End out = end;
  if (out.affine) out.affine = out.affine->shift(symbol, by);
  for (auto* side : {&out.inside, &out.outside})
    for (Conjunction& c : *side)
      for (Affine& form : c) form = form.shift(symbol, by);
  return out;
}

proof::Polynomial plain(const algebra::Polynomial& polynomial) {
  proof::Polynomial out;
  for (algebra::Monomial& m : polynomial.to_terms())
    out.terms.push_back({std::move(m.coefficient), std::move(m.exponents)});
  return out;
}

proof::Factored plain(const algebra::Factored& value) {
  proof::Factored out;
  out.constant = value.constant;
  for (const auto& [p, e] : value.factors) out.factors.emplace_back(plain(p), e);
  return out;
}

proof::Affine plain(const Affine& form) { return {form.coefficients, form.constant}; }

std::string text(const Setting& setting, const Affine& form) {
  return form.polynomial(setting.ring).to_string();
}

}  // namespace sumwright::term
