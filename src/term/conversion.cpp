// From the parse tree to products of atoms. Sums are distributed, quotients become products with
// recorded denominators, calls and symbolic powers become leaves (term/leaves.cpp).
// Invariant: on the region, expression = sum of products wherever every requirement holds.

#include "term/conversion.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <stdexcept>

#include "claim/affine.hpp"
#include "claim/parts.hpp"
#include "term/leaves.hpp"

namespace sumwright::term {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using claim::Expression;
using claim::ExpressionPtr;
using claim::Operation;
using proof::ConditionKind;

namespace {

constexpr std::size_t most_products = 64;
constexpr unsigned long highest_power = 1000;

/// Only literals, symbols, + - * and literal powers >= 0.
bool is_polynomial(const Expression& e) {
  switch (e.operation) {
    case Operation::call:
    case Operation::divide:
      return false;
    case Operation::power: {
      const std::optional<mpz_class> c = claim::as_literal(*e.children[1]);
      return c && *c >= 0 && is_polynomial(*e.children[0]);
    }
    default:
      return std::all_of(e.children.begin(), e.children.end(),
                         [](const ExpressionPtr& c) { return is_polynomial(*c); });
  }
}

class Converter {
 public:
  Converter(const Setting& setting, const Facts& facts) : setting_(setting), facts_(facts) {}

  Conversion run(const ExpressionPtr& expression) {
    out_.expression = expression;
    std::vector<Product> products = expand(expression);
    for (Product& product : products) {
      std::vector<Unit> units = cancel(product);
      if (product.is_zero()) continue;
      out_.products.push_back(std::move(product));
      out_.cancelled.push_back(std::move(units));
    }
    return std::move(out_);
  }

 private:
  using Products = std::vector<Product>;

  [[noreturn]] void refuse(const Expression& e, const std::string& message) const {
    throw claim::InputError(*setting_.claim->source, e.place, message);
  }

  Product from_factored(const Factored& value) const {
    Product out;
    out.coefficient = value;
    const mpz_class denominator = value.constant.get_den();
    out.coefficient.constant = mpq_class(value.constant.get_num());
    if (denominator != 1) divide_by_constant(out, setting_.ring, denominator);
    return out;
  }

  Products expand(const ExpressionPtr& e) {
    if (is_polynomial(*e)) {
      const std::optional<RationalFunction> value = to_rational_function(setting_, *e);
      return {from_factored(value->factored())};
    }
    switch (e->operation) {
      case Operation::negate:
        return negated(expand(e->children[0]));
      case Operation::add:
        return joined(expand(e->children[0]), expand(e->children[1]));
      case Operation::subtract:
        return joined(expand(e->children[0]), negated(expand(e->children[1])));
      case Operation::multiply:
        return product(expand(e->children[0]), expand(e->children[1]), *e);
      case Operation::divide:
        return expand_quotient(e);
      case Operation::power:
        return expand_power(e);
      case Operation::call:
        return {leaf(e, false)};
      default:
        throw std::logic_error("literals and symbols are polynomials");
    }
  }

  Products expand_quotient(const ExpressionPtr& e) {
    const ExpressionPtr& divisor = e->children[1];
    Products numerator = expand(e->children[0]);
    if (claim::has_factorial(*divisor)) return product(numerator, reciprocal(divisor), *e);
    return product(numerator, {divide(e, divisor, 1)}, *e);
  }

  Products expand_power(const ExpressionPtr& e) {
    const std::optional<mpz_class> exponent = claim::as_literal(*e->children[1]);
    if (!exponent) return {leaf(e, false)};
    const ExpressionPtr& base = e->children[0];
    const mpz_class size = abs(*exponent);
    if (size > highest_power) refuse(*e, "this exponent is too large");
    if (*exponent < 0) {
      if (claim::has_factorial(*base)) return power(reciprocal(base), size.get_ui(), *e);
      return {divide(e, base, size.get_ui())};
    }
    return power(expand(base), size.get_ui(), *e);
  }

  /// The reciprocal of a divisor that contains a factorial: reciprocal factorials (claim format).
  Products reciprocal(const ExpressionPtr& v) {
    if (v->operation == Operation::call && v->name == "factorial") return {leaf(v, true)};
    if (!claim::has_factorial(*v)) return {divide(v, v, 1)};
    switch (v->operation) {
      case Operation::multiply:
        return product(reciprocal(v->children[0]), reciprocal(v->children[1]), *v);
      case Operation::divide:
        return product(reciprocal(v->children[0]), expand(v->children[1]), *v);
      case Operation::negate:
        return negated(reciprocal(v->children[0]));
      case Operation::power: {
        const std::optional<mpz_class> c = claim::as_literal(*v->children[1]);
        if (c && *c >= 0 && *c <= highest_power)
          return power(reciprocal(v->children[0]), c->get_ui(), *v);
        return {divide(v, v, 1)};
      }
      default:
        return {divide(v, v, 1)};
    }
  }

  /// An author's denominator: divisor ^ exponent as one product, and its reciprocal.
  Product divide(const ExpressionPtr& node, const ExpressionPtr& divisor, unsigned long exponent) {
    Products parts = merged(expand(divisor));
    if (parts.empty()) refuse(*divisor, "division by an expression that is identically zero");
    if (parts.size() != 1)
      refuse(*divisor,
             "this denominator is a sum of terms that are not similar as written; "
             "expected a product of hypergeometric factors");
    Denominator d;
    d.node = node;
    d.expression = divisor;
    record_power_merges(parts[0], exponent, node->place);
    d.as_product.multiply(parts[0], static_cast<unsigned>(exponent));
    invert(d, divisor->place);
    for (const Denominator& known : out_.denominators)
      if (known.node == node) return d.reciprocal;
    out_.denominators.push_back(d);
    return d.reciprocal;
  }

  void invert(Denominator& d, claim::Place place) {
    const algebra::RingPtr& ring = setting_.ring;
    const Factored& c = d.as_product.coefficient;
    if (c.constant < 0) d.reciprocal.coefficient.constant = -1;
    divide_by_constant(d.reciprocal, ring, abs(mpz_class(c.constant.get_num())));
    for (const auto& [p, e] : c.factors) {
      const Unit unit{reciprocal_atom(ring, p), reciprocal_atom(ring, p), static_cast<unsigned>(e),
                      nonvanishing(p, ConditionKind::definedness, place)};
      d.reciprocal.multiply(unit.right, unit.exponent);
      d.units.push_back(unit);
      out_.definedness.push_back(unit.requirement);
    }
    for (const auto& [atom, e] : d.as_product.atoms) {
      Unit unit{atom, atom, e, {}};
      unit.right = inverse_atom(ring, atom);
      unit.requirement = inverse_requirement(atom, place);
      d.reciprocal.multiply(unit.right, e);
      d.units.push_back(unit);
      out_.definedness.push_back(unit.requirement);
    }
  }

  Requirement nonvanishing(const Polynomial& p, ConditionKind kind, claim::Place place) const {
    Requirement r;
    r.kind = kind;
    Factored f;
    f.multiply(p, 1);
    r.nonzero = f;
    r.why = decide_nonzero(setting_, facts_, f);
    r.settled = r.why.has_value();
    r.place = place;
    return r;
  }

  Requirement inverse_requirement(const Atom& atom, claim::Place place) const {
    Requirement r;
    r.kind = ConditionKind::definedness;
    r.place = place;
    switch (atom.kind) {
      case AtomKind::factorial:
      case AtomKind::reciprocal_factorial:
        r.nonnegative = atom.argument;
        r.settled = facts_.implies(atom.argument);
        return r;
      case AtomKind::power:
      case AtomKind::reciprocal:
        return nonvanishing(atom.base, ConditionKind::definedness, place);
      case AtomKind::interval_product:
      case AtomKind::reciprocal_interval_product:
        return interval_nonvanishing(setting_, facts_, atom, place);
    }
    return r;
  }

  Product leaf(const ExpressionPtr& e, bool reciprocal_factorial) {
    Leaf made = make_leaf(setting_, facts_, e, reciprocal_factorial, out_.definedness);
    const std::string text = claim::to_text(*e);
    for (const Leaf& known : out_.leaves)
      if (known.rule == made.rule && claim::to_text(*known.expression) == text) return known.value;
    out_.leaves.push_back(made);
    return made.value;
  }

  static Products negated(Products products) {
    for (Product& p : products) p.coefficient.constant = -p.coefficient.constant;
    return products;
  }

  Products joined(Products a, const Products& b) {
    a.insert(a.end(), b.begin(), b.end());
    return merged(std::move(a));
  }

  Products product(const Products& a, const Products& b, const Expression& e) {
    if (a.size() * b.size() > most_products) refuse(e, "this product of sums is too large");
    Products out;
    for (const Product& x : a)
      for (const Product& y : b) {
        record_merges(x, y, e.place);
        out.push_back(x);
        out.back().multiply(y);
      }
    return merged(std::move(out));
  }

  Products power(const Products& base, unsigned long exponent, const Expression& e) {
    Products one{Product{}};
    if (base.size() == 1) {
      record_power_merges(base[0], exponent, e.place);
      one[0].multiply(base[0], static_cast<unsigned>(exponent));
      return one;
    }
    for (unsigned long i = 0; i < exponent; ++i) one = product(one, base, e);
    return one;
  }

  /// base^exponent by repeated multiplication.
  void record_power_merges(const Product& base, unsigned long exponent, claim::Place place) {
    const Product powers = powers_only(base);
    for (unsigned long i = 1; i < exponent; ++i) {
      Product before;
      before.multiply(powers, static_cast<unsigned>(i));
      record_merges(before, powers, place);
    }
  }

  static Product powers_only(const Product& p) {
    Product out;
    for (const auto& [atom, e] : p.atoms)
      if (atom.kind == AtomKind::power) out.multiply(atom, e);
    return out;
  }

  void record_merges(const Product& x, const Product& y, claim::Place place) {
    for (const auto& [a, ea] : x.atoms)
      for (const auto& [b, eb] : y.atoms) {
        if (a.kind != AtomKind::power || b.kind != AtomKind::power || !(a.base == b.base)) continue;
        PowerMerge merge{
            a.base, static_cast<long>(ea) * a.argument, static_cast<long>(eb) * b.argument, {}};
        const auto same = [&](const PowerMerge& m) {
          return m.base == merge.base && m.first == merge.first && m.second == merge.second;
        };
        if (std::any_of(out_.merges.begin(), out_.merges.end(), same)) continue;
        if (!a.base.is_constant()) require_merge(merge, place);
        out_.merges.push_back(std::move(merge));
      }
  }

  /// base^(a+b) = base^a base^b needs a, b >= 0 where the base may be 0.
  void require_merge(PowerMerge& merge, claim::Place place) {
    if (facts_.implies(merge.first) && facts_.implies(merge.second)) {
      for (const Affine* form : {&merge.first, &merge.second}) {
        Requirement r;
        r.kind = ConditionKind::definedness;
        r.nonnegative = *form;
        r.settled = true;
        r.place = place;
        merge.requirements.push_back(r);
      }
      return;
    }
    merge.requirements.push_back(nonvanishing(merge.base, ConditionKind::nonvanishing, place));
  }

  /// Adds the coefficients of products with the same atoms; drops zeros.
  Products merged(Products products) const {
    Products out;
    for (Product& p : products) {
      if (p.is_zero()) continue;
      const auto same = std::find_if(out.begin(), out.end(),
                                     [&](const Product& q) { return q.atoms == p.atoms; });
      if (same == out.end()) {
        out.push_back(std::move(p));
        continue;
      }
      const Polynomial sum =
          same->coefficient.numerator(setting_.ring) + p.coefficient.numerator(setting_.ring);
      same->coefficient = algebra::factor(sum);
      if (sum.is_zero()) out.erase(same);
    }
    return out;
  }

  /// fact(L) rfact(L) with L >= 0, and P * 1/P (P is nonzero by definedness).
  std::vector<Unit> cancel(Product& product) {
    std::vector<Unit> units;
    const auto atoms = product.atoms;
    for (const auto& [atom, e] : atoms) {
      if (atom.kind == AtomKind::factorial) cancel_factorial(product, atom, e, units);
      if (atom.kind == AtomKind::reciprocal) cancel_polynomial(product, atom, e, units);
    }
    return units;
  }

  static void remove(Product& product, const Atom& atom, unsigned times) {
    const auto it = std::find_if(product.atoms.begin(), product.atoms.end(),
                                 [&](const auto& entry) { return entry.first == atom; });
    it->second -= times;
    if (it->second == 0) product.atoms.erase(it);
  }

  void cancel_factorial(Product& product, const Atom& atom, unsigned e, std::vector<Unit>& units) {
    const Atom partner = reciprocal_factorial_atom(setting_.ring, atom.argument);
    for (const auto& [other, f] : product.atoms) {
      if (!(other == partner) || !facts_.implies(atom.argument)) continue;
      const unsigned times = std::min(e, f);
      Requirement r;
      r.kind = ConditionKind::factorial_argument;
      r.nonnegative = atom.argument;
      r.settled = true;
      r.place = out_.expression->place;
      units.push_back({atom, partner, times, r});
      remove(product, atom, times);
      remove(product, partner, times);
      return;
    }
  }

  void cancel_polynomial(Product& product, const Atom& atom, unsigned e, std::vector<Unit>& units) {
    for (const auto& [p, f] : product.coefficient.factors) {
      if (!(p == atom.base)) continue;
      const unsigned times = std::min(e, static_cast<unsigned>(f));
      const Polynomial base = atom.base;
      Requirement r = nonvanishing(base, ConditionKind::definedness, out_.expression->place);
      units.push_back({atom, atom, times, r});
      remove(product, atom, times);
      product.coefficient.multiply(base, -static_cast<long>(times));
      return;
    }
  }

  const Setting& setting_;
  const Facts& facts_;
  Conversion out_;
};

}  // namespace

const Requirement* Conversion::open() const {
  for (const Requirement& r : definedness)
    if (!r.settled) return &r;
  for (const Leaf& leaf : leaves)
    for (const Requirement& r : leaf.requirements)
      if (!r.settled) return &r;
  for (const PowerMerge& merge : merges)
    for (const Requirement& r : merge.requirements)
      if (!r.settled) return &r;
  return nullptr;
}

Conversion convert(const Setting& setting, const Facts& facts, const ExpressionPtr& expression) {
  return Converter(setting, facts).run(expression);
}

}  // namespace sumwright::term
