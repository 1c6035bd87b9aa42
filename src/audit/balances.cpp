// Balances: sums of hypergeometric terms that should be 0.
//
// At points: the terms add up to 0, each zero reason holds, each term is its polynomial times the
// base of its group. As polynomials: the members of a group add up to 0 identically. And the terms
// of the two main balances are what the telescoping argument leaves, origin by origin.
#include <algorithm>
#include <map>

#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/polynomial_identity.hpp"
#include "audit/terms.hpp"
#include "audit/text_reader.hpp"

namespace sumwright::audit {

namespace {

using Origin = proof::BalanceTerm::Origin;

void check_zero_reason(Check& check, const proof::BalanceTerm& term, const Point& point) {
  check.expect_same(value_of(term.product, point), Value::of(0), "the vanishing term " + term.text,
                    point);
  if (!term.zero_atom) return;
  const bool occurs =
      std::any_of(term.product.atoms.begin(), term.product.atoms.end(),
                  [&](const auto& entry) { return identical(entry.first, *term.zero_atom); });
  const bool by_factor = term.zero_factor && value_of(*term.zero_factor, point) == 0;
  check.expect(
      occurs && term.zero_atom->kind == proof::AtomKind::reciprocal_factorial &&
          (by_factor || value_of(term.zero_atom->argument, point) < 0),
      [&] { return "the zero atom of " + term.text + " is no reason at " + text_of(point); });
}

void check_group(const Context& context, Check& check, const proof::Balance& balance,
                 std::size_t number) {
  const proof::BalanceGroup& group = balance.groups[number];
  if (group.members.size() != group.polynomials.size())
    return check.fail("a group with " + std::to_string(group.members.size()) + " members and " +
                      std::to_string(group.polynomials.size()) + " polynomials");
  std::vector<IdentityTerm> terms;
  for (const proof::Factored& one : group.polynomials) terms.push_back({1, {{&one, false}}});
  if (terms.empty()) return;
  const IdentityResult result = decide_identity(terms, context.names, context.options.expand_up_to,
                                                context.options.check_time);
  check.expect(result.zero, [&] {
    return "the polynomials of group " + group.base.id + " of balance " + balance.id +
           " do not add up to 0: " + result.detail;
  });
}

/// Every term is either zero for a reason or in exactly one group.
void check_membership(Check& check, const proof::Balance& balance) {
  std::map<std::size_t, std::size_t> uses;
  for (std::size_t g = 0; g < balance.groups.size(); ++g)
    for (const std::size_t member : balance.groups[g].members) {
      ++uses[member];
      check.expect(member < balance.terms.size() && balance.terms[member].group == g, [&] {
        return "balance " + balance.id + ": a member of no term or another group";
      });
    }
  for (std::size_t t = 0; t < balance.terms.size(); ++t)
    check.expect(uses[t] == (balance.terms[t].zero ? 0U : 1U), [&] {
      return "balance " + balance.id + ": the term " + balance.terms[t].text + " is in " +
             std::to_string(uses[t]) + " groups";
    });
}

void check_members_at(Check& check, const proof::Balance& balance, const Point& point) {
  for (const proof::BalanceGroup& group : balance.groups) {
    const Value base = value_of(group.base.product, point);
    for (std::size_t j = 0; j < group.members.size() && j < group.polynomials.size(); ++j)
      if (group.members[j] < balance.terms.size()) {
        const proof::BalanceTerm& term = balance.terms[group.members[j]];
        check.expect_same(value_of(term.product, point),
                          times(value_of(group.polynomials[j], point), base),
                          "the term " + term.text + " over " + group.base.id, point);
      }
  }
}

}  // namespace

void check_balance(const Context& context, Check& check, const proof::Balance& balance,
                   const std::vector<Place>& places) {
  for (std::size_t g = 0; g < balance.groups.size(); ++g) check_group(context, check, balance, g);
  check_membership(check, balance);
  const Domain domain(balance.region, context.names);
  for (const Place& place : places)
    check.attempt([&] {
      context.tick();
      const Point point = context.at(place);
      if (!domain.contains(point))
        return check.fail("the region " + balance.region.text + " of balance " + balance.id +
                          " leaves out " + text_of(point));
      Value total = Value::of(0);
      for (const proof::BalanceTerm& term : balance.terms) {
        total = plus(total, value_of(term.product, point));
        if (term.zero) check_zero_reason(check, term, point);
        if (term.instance)
          check.expect_same(value_of(term.instance->left, point), value_of(term.product, point),
                            "left side of the instance of " + term.text, point);
      }
      check.expect_same(total, Value::of(0), "sum of balance " + balance.id, point);
      check_members_at(check, balance, point);
    });
  for (const proof::BalanceTerm& term : balance.terms)
    if (term.instance)
      check_instance(context, check, *term.instance, places, balance.id + ", " + term.text);
}

namespace {

/// What each origin of a main balance must add up to at one place.
class Expected {
 public:
  Expected(Context& context, const Place& place, const std::string& id)
      : context_(context), place_(place), id_(id), point_(context.at(place)) {}

  void compare(Check& check, const proof::Balance& balance) {
    std::map<Origin, Value> sums;
    for (const Origin origin : {Origin::upper_end, Origin::lower_end, Origin::explicit_point,
                                Origin::right_side, Origin::closed_form, Origin::value})
      sums[origin] = Value::of(0);
    for (const proof::BalanceTerm& term : balance.terms)
      sums[term.origin] = plus(sums[term.origin], value_of(term.product, point_));
    const auto expect = [&](Origin origin, const Value& value, const char* what) {
      check.expect_same(sums[origin], value, std::string(what) + " in balance " + id_, point_);
    };
    const long low = value_of(context_.proof.telescoping->low, point_);
    const long high = value_of(context_.proof.telescoping->high, point_);
    const bool empty = low > high;
    expect(Origin::upper_end,
           empty ? lower_part(context_, {place_.sample, place_.n, low})
                 : upper_part(context_, {place_.sample, place_.n, high}),
           "the upper end");
    expect(Origin::lower_end,
           times(Value::of(-1), lower_part(context_, {place_.sample, place_.n, low})),
           "the lower end");
    expect(Origin::explicit_point, explicit_points(low, high), "the explicit points");
    expect(Origin::value, Value::of(0), "terms of other origin");
    if (context_.proof.closed_recurrence && &balance == &*context_.proof.closed_recurrence)
      expect(Origin::closed_form, closed_form(), "the closed form");
    else if (!context_.claim.is_question())  // there the sums are added up against what is printed
      expect(Origin::right_side, right_side(), "the right side");
  }

 private:
  Value weight() const { return value_of(context_.proof.telescoping->weight.polynomial, point_); }
  Value coefficient(std::size_t i) const {
    return value_of(context_.proof.telescoping->coefficients[i], point_);
  }

  Value explicit_points(long low, long high) {
    Value out = Value::of(0);
    for (const proof::RangeStep& step : context_.proof.ranges) {
      if (step.shift >= context_.proof.telescoping->coefficients.size()) continue;
      Value sum = Value::of(0);
      const auto add = [&](long k) {
        sum = plus(sum, shifted_term(context_, {place_.sample, place_.n, k},
                                     static_cast<long>(step.shift)));
      };
      for (long j = 1; j <= static_cast<long>(step.low_points); ++j) add(low - j);
      for (long j = 1; j <= static_cast<long>(step.high_points); ++j) add(high + j);
      out = plus(out, times(coefficient(step.shift), sum));
    }
    return times(weight(), out);
  }

  Value closed_form() {
    Value out = Value::of(0);
    for (std::size_t i = 0; i < context_.proof.telescoping->coefficients.size(); ++i)
      out = plus(out, times(coefficient(i), context_.author.right_side(
                                                place_.sample, place_.n + static_cast<long>(i))));
    return times(Value::of(-1), times(weight(), out));
  }

  /// - weight * scale * b, where the proved coefficients are scale times the author's.
  Value right_side();

  Context& context_;
  const Place& place_;
  const std::string& id_;
  Point point_;
};

Value Expected::right_side() {
  const claim::Evidence& written = context_.claim.evidence;
  if (context_.claim.is_equality() || written.recurrence.empty() || !written.right_side)
    return Value::of(0);
  const std::size_t size =
      std::min(written.recurrence.size(), context_.proof.telescoping->coefficients.size());
  for (std::size_t i = 0; i < size; ++i) {
    const Value author = evaluate(*written.recurrence[i], point_);
    const Value proved = coefficient(i);
    if (!author.exists() || !proved.exists() || author.number.is_zero()) continue;
    const Value scale = Value::of(-proved.number / author.number);
    return times(times(weight(), scale), evaluate(*written.right_side, point_));
  }
  throw TooLarge("coefficients without a value");
}

/// One term per explicit point and product of F.
void check_explicit_count(const proof::Proof& proof, const proof::Balance& balance, Check& check) {
  if (!proof.telescoping) return;
  std::size_t wanted = 0;
  for (const proof::RangeStep& step : proof.ranges) wanted += step.low_points + step.high_points;
  wanted *= proof.summand.products.size();
  const auto found = static_cast<std::size_t>(
      std::count_if(balance.terms.begin(), balance.terms.end(),
                    [](const auto& term) { return term.origin == Origin::explicit_point; }));
  check.expect(found == wanted, [&] {
    return std::to_string(found) + " explicit terms in balance " + balance.id + " for " +
           std::to_string(wanted) + " explicit points and products";
  });
}

void check_main_balance(Context& context, const proof::Balance& balance, const std::string& name,
                        std::vector<Finding>& findings) {
  Check check(name);
  check_balance(context, check, balance, context.running_places());
  check_explicit_count(context.proof, balance, check);
  if (context.proof.telescoping)
    for (const Place& place : context.running_places())
      check.attempt([&] { Expected(context, place, balance.id).compare(check, balance); });
  findings.push_back(check.finding());
}

}  // namespace

void check_balances(Context& context, std::vector<Finding>& findings) {
  if (context.proof.ends)
    check_main_balance(context, *context.proof.ends, "balance of the ends", findings);
  if (context.proof.closed_recurrence)
    check_main_balance(context, *context.proof.closed_recurrence, "balance with the closed form",
                       findings);
}

}  // namespace sumwright::audit
