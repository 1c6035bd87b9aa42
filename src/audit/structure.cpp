// That the argument has no gap: every part is there, the numbers of parts agree, the induction
// starts where the claim starts and its steps meet, and every condition named is recorded.
#include <algorithm>
#include <set>

#include "audit/checks.hpp"

namespace sumwright::audit {

namespace {

/// Order 0 with a number before S(n), or no recurrence at all.
bool divides_by_constant(const proof::Proof& proof) {
  if (!proof.telescoping) return true;
  return proof.order == 0 && proof.telescoping->coefficients.size() == 1 &&
         proof.telescoping->coefficients[0].factors.empty() &&
         proof.telescoping->coefficients[0].constant != 0;
}

void check_parts(const proof::Proof& proof, Check& check) {
  const claim::Claim& claim = *proof.claim;
  const auto need = [&](bool there, const std::string& what) {
    check.expect(there, [&] { return "missing or out of place: " + what; });
  };
  need(!proof.summand.products.empty() || proof.summand.expression != nullptr, "the summand");
  need(claim.sum.over.empty() || proof.telescoping.has_value(), "the telescoping argument");
  need(!claim.closed || proof.closed.has_value(), "the closed form");
  need(!claim.is_equality() || proof.closed_recurrence.has_value(),
       "the balance with the closed form");
  need(claim.is_equality() || proof.ends.has_value(), "the balance of the ends");
  need(!claim.is_equality() || proof.leading.has_value() || divides_by_constant(proof),
       "the leading coefficient");
  need(proof.summand.expression == claim.sum.summand, "the author's summand");
  need(!proof.closed || proof.closed->expression == claim.closed, "the author's closed form");
  need(!proof.right_side || proof.right_side->expression == claim.evidence.right_side,
       "the author's right side");
  need(mpz_class(proof.from) == claim.from, "the claim's `from`");
  need(!proof.symbols.empty() && proof.symbols[0].name == claim.running, "the running variable");
  need(claim.sum.over.size() != 1 ||
           (proof.symbols.size() > 1 && proof.symbols[1].name == claim.sum.over[0].index),
       "the index");
  need(proof.symbols.size() == claim.parameters.size() + 2, "the parameters");
  for (std::size_t i = 0; i < claim.parameters.size() && i + 2 < proof.symbols.size(); ++i)
    need(proof.symbols[i + 2].name == claim.parameters[i].name, "the parameters in file order");
}

void check_counts(const proof::Proof& proof, Check& check) {
  if (!proof.telescoping) return;
  const std::size_t size = proof.order + std::size_t{1};
  const auto need = [&](std::size_t number, const std::string& what) {
    check.expect(number == size, [&] {
      return std::to_string(number) + " " + what + " for order " + std::to_string(proof.order);
    });
  };
  need(proof.telescoping->coefficients.size(), "coefficients");
  need(proof.telescoping->shifts.size(), "shifted terms");
  need(proof.telescoping->p.size(), "polynomials p");
  need(proof.ranges.size(), "range steps");
  for (std::size_t i = 0; i < proof.ranges.size(); ++i)
    check.expect(proof.ranges[i].shift == i,
                 [] { return std::string("range steps out of order"); });
}

bool contains(const proof::Affine& form, std::size_t symbol) {
  return symbol < form.coefficients.size() && form.coefficients[symbol] != 0;
}

bool contains(const proof::Polynomial& polynomial, std::size_t symbol) {
  return std::any_of(polynomial.terms.begin(), polynomial.terms.end(), [&](const auto& monomial) {
    return symbol < monomial.exponents.size() && monomial.exponents[symbol] != 0;
  });
}

bool contains(const proof::Product& product, std::size_t symbol) {
  return std::any_of(product.coefficient.factors.begin(), product.coefficient.factors.end(),
                     [&](const auto& entry) { return contains(entry.first, symbol); }) ||
         std::any_of(product.atoms.begin(), product.atoms.end(), [&](const auto& entry) {
           const proof::Atom& atom = entry.first;
           return contains(atom.argument, symbol) || contains(atom.base, symbol) ||
                  contains(atom.low, symbol) || contains(atom.high, symbol);
         });
}

/// Where the index has been summed over or given a value, it must not occur any more.
void check_index_is_gone(const proof::Proof& proof, Check& check) {
  constexpr std::size_t kIndex = 1;
  const auto product = [&](const proof::Product& one, const std::string& where) {
    check.expect(!contains(one, kIndex), [&] { return "the index occurs in " + where; });
  };
  const auto balance = [&](const proof::Balance& one) {
    for (const proof::BalanceTerm& term : one.terms) product(term.product, "balance " + one.id);
    for (const proof::BalanceGroup& group : one.groups)
      product(group.base.product, "balance " + one.id);
  };
  for (const auto* conversion : {&proof.closed, &proof.right_side})
    if (*conversion)
      for (const proof::Product& one : (*conversion)->products) product(one, (*conversion)->id);
  if (proof.ends) balance(*proof.ends);
  if (proof.closed_recurrence) balance(*proof.closed_recurrence);
  for (const proof::InitialValue& initial : proof.initial) balance(initial.balance);
}

/// The common range depends on the running variable and integer parameters alone.
void check_common_range(const proof::Proof& proof, Check& check) {
  if (!proof.telescoping) return;
  for (const proof::Affine* end : {&proof.telescoping->low, &proof.telescoping->high})
    for (std::size_t i = 0; i < end->coefficients.size(); ++i)
      check.expect(end->coefficients[i] == 0 ||
                       (i < proof.symbols.size() &&
                        (proof.symbols[i].kind == proof::SymbolKind::running ||
                         proof.symbols[i].kind == proof::SymbolKind::integer_parameter)),
                   [] { return std::string("an end of the common range has a symbol too many"); });
}

/// from .. threshold + J - 1 for equalities, from .. threshold - 1 for recurrences: each once.
void check_induction(const proof::Proof& proof, Check& check) {
  check.expect(proof.threshold >= proof.from, [&] {
    return "threshold " + std::to_string(proof.threshold) + " below from " +
           std::to_string(proof.from);
  });
  const long steps = proof.claim->is_equality() ? static_cast<long>(proof.order) : 0;
  std::set<long> covered;
  for (const proof::InitialValue& initial : proof.initial)
    check.expect(covered.insert(initial.at).second,
                 [&] { return "two initial values at " + std::to_string(initial.at); });
  const long last = proof.threshold + steps - 1;
  check.expect(last - proof.from < 100000, [] { return std::string("too many initial values"); });
  if (!check.agrees()) return;
  for (long n = proof.from; n <= last; ++n)
    check.expect(covered.count(n) == 1,
                 [&] { return "the induction has no value at n = " + std::to_string(n); });
}

/// The hypotheses at n + J, n >= threshold, must give those at n .. n + J - 1.
void check_hypotheses_descend(const Context& context, Check& check) {
  const long order = static_cast<long>(context.proof.order);
  if (!context.claim.is_equality()) return;
  for (std::size_t sample = 0; sample < context.samples.size(); ++sample)
    for (long n = context.proof.threshold; n < context.proof.threshold + 8; ++n) {
      if (!context.admits(sample, n + order)) continue;
      for (long i = 0; i < order; ++i)
        check.expect(context.admits(sample, n + i), [&] {
          return "the step to n + J uses n + i where the hypotheses fail: " +
                 text_of(context.at({sample, n + i, 0}));
        });
    }
}

class References {
 public:
  References(const proof::Proof& proof, Check& check) : check_(check) {
    for (const proof::Condition& condition : proof.conditions)
      check.expect(known_.insert(condition.id).second,
                   [&] { return "two conditions called " + condition.id; });
  }
  void one(const std::string& id) {
    check_.expect(known_.count(id) == 1, [&] { return "no condition called '" + id + "'"; });
  }
  void all(const std::vector<std::string>& ids) {
    for (const std::string& id : ids) one(id);
  }
  void nonzero(const proof::Nonzero& nonzero) {
    if (!nonzero.condition.empty() || !nonzero.polynomial.factors.empty()) one(nonzero.condition);
  }
  void units(const std::vector<proof::Unit>& units) {
    for (const proof::Unit& unit : units) one(unit.condition);
  }
  void instance(const proof::Instance& instance) {
    for (const proof::AtomStep& step : instance.steps) all(step.conditions);
    units(instance.left_units);
    units(instance.right_units);
    if (instance.cancelled) nonzero(*instance.cancelled);
  }
  void conversion(const proof::Conversion& conversion) {
    for (const proof::Leaf& leaf : conversion.leaves) all(leaf.conditions);
    for (const proof::Denominator& one_of : conversion.denominators) all(one_of.conditions);
    for (const auto& list : conversion.units) units(list);
    all(conversion.definedness);
  }
  void balance(const proof::Balance& balance) {
    for (const proof::BalanceTerm& term : balance.terms)
      if (term.instance) instance(*term.instance);
  }

 private:
  std::set<std::string> known_;
  Check& check_;
};

void check_references(const proof::Proof& proof, Check& check) {
  References references(proof, check);
  references.conversion(proof.summand);
  if (proof.closed) references.conversion(*proof.closed);
  if (proof.right_side) references.conversion(*proof.right_side);
  if (proof.telescoping) {
    references.nonzero(proof.telescoping->weight);
    references.all(proof.telescoping->conditions);
    for (const auto& shift : proof.telescoping->shifts)
      for (const proof::Instance& one : shift) references.instance(one);
    if (proof.telescoping->index_shift) references.instance(*proof.telescoping->index_shift);
  }
  for (const proof::RangeStep& step : proof.ranges)
    for (const auto* reason : {&step.below, &step.above})
      if (*reason) references.one((*reason)->condition);
  if (proof.ends) references.balance(*proof.ends);
  if (proof.closed_recurrence) references.balance(*proof.closed_recurrence);
  if (proof.leading) references.nonzero(*proof.leading);
  for (const proof::InitialValue& initial : proof.initial) references.balance(initial.balance);
}

}  // namespace

void check_structure(const Context& context, std::vector<Finding>& findings) {
  Check check("argument without gaps");
  check_parts(context.proof, check);
  check_counts(context.proof, check);
  check_common_range(context.proof, check);
  check_index_is_gone(context.proof, check);
  check_induction(context.proof, check);
  check_hypotheses_descend(context, check);
  check_references(context.proof, check);
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
