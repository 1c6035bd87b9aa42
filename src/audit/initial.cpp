// Initial values: at each n the literal sum, its balance with the right side, and the stated
// number, against the author's sum added up at every sample.
#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/terms.hpp"

namespace sumwright::audit {

namespace {

using Origin = proof::BalanceTerm::Origin;

struct Initial {
  Context& context;
  Check& check;
  const proof::InitialValue& initial;

  /// S(at), or sum_i a_i S(at+i) for a claimed or found recurrence; the a_i as proved.
  Value left_side(const Place& place) {
    if (context.claim.is_equality() || !context.proof.telescoping)
      return context.author.sum(place.sample, initial.at);
    Value out = Value::of(0);
    const Point point = context.at(place);
    const auto& coefficients = context.proof.telescoping->coefficients;
    for (std::size_t i = 0; i < coefficients.size(); ++i)
      out = plus(out, times(value_of(coefficients[i], point),
                            context.author.sum(place.sample, initial.at + static_cast<long>(i))));
    return out;
  }

  /// One sum over its literal range, vanishing terms left out, against the whole of it.
  void check_literal(const Place& place, const proof::LiteralSum& literal) {
    if (context.claim.sum.over.size() != 1) return;
    const Interval author = context.author.range(place.sample, literal.at);
    Value sum = Value::of(0);
    const long base = literal.base ? value_of(*literal.base, context.at(place)) : 0;
    for (long k = base + literal.low; k <= base + literal.high; ++k)
      sum = plus(sum, author.contains(k) ? context.author.term(place.sample, literal.at, k)
                                         : products_at(context, context.proof.summand,
                                                       {place.sample, literal.at, k}));
    check.expect_same(sum, context.author.sum(place.sample, literal.at),
                      "S(" + std::to_string(literal.at) + ") over " +
                          std::to_string(base + literal.low) + ".." +
                          std::to_string(base + literal.high),
                      context.at(place));
  }

  void check_which_sums() {
    const bool one = context.claim.is_equality() || !context.proof.telescoping;
    check.expect(initial.sums.size() == (one ? 1 : context.proof.order + std::size_t{1}), [&] {
      return std::to_string(initial.sums.size()) + " sums at n = " + std::to_string(initial.at);
    });
    for (std::size_t i = 0; i < initial.sums.size(); ++i)
      check.expect(initial.sums[i].at == initial.at + static_cast<long>(i), [&] {
        return "the sums at n = " + std::to_string(initial.at) + " are not S(n), S(n+1), ...";
      });
  }

  void check_sides(const Place& place) {
    const Point point = context.at(place);
    const Value left = left_side(place);
    if (context.claim.is_equality())
      check.expect_same(left, context.author.right_side(place.sample, initial.at),
                        "the sum against the right side", point);
    if (initial.value)
      check.expect_same(left, Value::of(to_numeric(*initial.value)),
                        "the sum against the stated value", point);
    if (initial.balance.terms.empty()) {
      check.expect(initial.value || left.is_zero(),
                   [&] { return "neither a value nor a balance at " + text_of(point); });
      return;
    }
    Value terms = Value::of(0);
    for (const proof::BalanceTerm& term : initial.balance.terms)
      if (term.origin != Origin::right_side && term.origin != Origin::closed_form)
        terms = plus(terms, value_of(term.product, point));
    check.expect_same(terms, left, "the terms of the initial balance against the sum", point);
  }

  void run() {
    check_which_sums();
    std::vector<Place> places;
    for (std::size_t sample = 0; sample < context.samples.size(); ++sample)
      if (context.admits(sample, initial.at)) places.push_back({sample, initial.at, 0});
    for (const Place& place : places)
      check.attempt([&] {
        context.tick();
        for (const proof::LiteralSum& literal : initial.sums) check_literal(place, literal);
        check_sides(place);
      });
    if (!initial.balance.terms.empty()) check_balance(context, check, initial.balance, places);
  }
};

}  // namespace

void check_initial_values(Context& context, std::vector<Finding>& findings) {
  if (context.proof.initial.empty()) return;
  Check check("initial values");
  for (const proof::InitialValue& initial : context.proof.initial)
    Initial{context, check, initial}.run();
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
