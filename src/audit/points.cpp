// The term identity at integer points, poles of R and both ends included.
//
//   weight sum_i a_i F(n+i,k) = up c(n,k+1) B - down c(n,k) B      for threshold <= n, low <= k <=
//   high
// as numbers, F from the author's text where the author's range has k; then the instances of the
// base term that the identity was reduced by.
#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/terms.hpp"
#include "audit/text_reader.hpp"

namespace sumwright::audit {

namespace {

void check_units(Check& check, const std::vector<proof::Unit>& units, const Point& point) {
  for (const proof::Unit& unit : units) {
    const Value left = unit.right.kind == proof::AtomKind::reciprocal
                           ? Value::of(value_of(unit.right.base, point))
                           : value_of(unit.left, point);
    check.expect_same(times(left, value_of(unit.right, point)), Value::of(1),
                      "atoms that should have the product 1", point);
  }
}

void check_steps(Check& check, const proof::Instance& instance, const Point& point) {
  for (const proof::AtomStep& step : instance.steps) {
    Value image = value_of(step.factor, point);
    if (!step.literal) image = times(image, value_of(step.to, point));
    for (const proof::Atom& one : step.reciprocals) image = times(image, value_of(one, point));
    check.expect_same(value_of(step.from, point), image, "a step of instance " + instance.id,
                      point);
  }
}

}  // namespace

void check_instance(const Context& context, Check& check, const proof::Instance& instance,
                    const std::vector<Place>& places, const std::string& use) {
  const Domain domain(instance.region, context.names);
  for (const Place& place : places)
    check.attempt([&] {
      context.tick();
      const Point point = context.at(place);
      if (!domain.contains(point))
        return check.fail("the region " + instance.region.text + " of instance " + instance.id +
                          " (" + use + ") leaves out " + text_of(point));
      check.expect_same(value_of(instance.left, point), value_of(instance.right, point),
                        "instance " + instance.id + " (" + use + ")", point);
      check_steps(check, instance, point);
      check_units(check, instance.left_units, point);
      check_units(check, instance.right_units, point);
      if (instance.cancelled)
        check.expect(!value_of(instance.cancelled->polynomial, point).is_zero(), [&] {
          return "instance " + instance.id + " cancels a factor that is 0 at " + text_of(point);
        });
    });
}

namespace {

void check_identity(Context& context, std::vector<Finding>& findings) {
  Check check("term identity at points");
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  const Domain domain(telescoping.region, context.names);
  for (const Place& place : context.index_places())
    check.attempt([&] {
      context.tick();
      const Point point = context.at(place);
      if (!domain.contains(point))
        return check.fail("the region " + telescoping.region.text + " leaves out " +
                          text_of(point));
      Value left = Value::of(0);
      for (std::size_t i = 0; i < telescoping.coefficients.size(); ++i)
        left = plus(left, times(value_of(telescoping.coefficients[i], point),
                                shifted_term(context, place, static_cast<long>(i))));
      left = times(left, value_of(telescoping.weight.polynomial, point));
      check.expect_same(left, minus(upper_part(context, place), lower_part(context, place)),
                        "sum of a_i F(n+i,k) against G(n,k+1) - G(n,k)", point);
    });
  findings.push_back(check.finding());
}

/// Per shift and product of F: the instance is about that product, and the products add up to p_i
/// B.
void check_shifts(Context& context, std::vector<Finding>& findings) {
  Check check("shifted terms over the base term");
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  const std::size_t pieces = context.proof.summand.products.size();
  for (std::size_t i = 0; i < telescoping.shifts.size(); ++i) {
    const std::string use = "F(n+" + std::to_string(i) + ",k)";
    if (telescoping.shifts[i].size() != pieces)
      check.fail(use + " has " + std::to_string(telescoping.shifts[i].size()) + " instances for " +
                 std::to_string(pieces) + " products");
    for (const proof::Instance& instance : telescoping.shifts[i])
      check_instance(context, check, instance, context.index_places(), use);
    for (const Place& place : context.index_places())
      check.attempt([&] {
        const Point point = context.at(place);
        const Point moved = context.at({place.sample, place.n + static_cast<long>(i), place.k});
        Value sum = Value::of(0);
        for (std::size_t j = 0; j < telescoping.shifts[i].size() && j < pieces; ++j) {
          const Value value = value_of(telescoping.shifts[i][j].left, point);
          check.expect_same(value, value_of(context.proof.summand.products[j], moved),
                            "left side of the instance of " + use, point);
          sum = plus(sum, value);
        }
        check.expect_same(
            sum,
            times(value_of(telescoping.p.at(i), point), value_of(telescoping.base.product, point)),
            use + " against p B", point);
      });
  }
  findings.push_back(check.finding());
}

void check_index_shift(Context& context, std::vector<Finding>& findings) {
  const proof::Telescoping& telescoping = *context.proof.telescoping;
  Check check("certificate over the base term");
  if (!telescoping.index_shift) {
    check.expect(telescoping.certificate.terms.empty(),
                 [] { return std::string("no statement about G(n,k+1)"); });
    return findings.push_back(check.finding());
  }
  check_instance(context, check, *telescoping.index_shift, context.index_places(), "B(n,k+1)");
  for (const Place& place : context.index_places())
    check.attempt([&] {
      const Point point = context.at(place);
      const Point next = context.at({place.sample, place.n, place.k + 1});
      check.expect_same(
          times(value_of(telescoping.down, next), value_of(telescoping.base.product, next)),
          times(value_of(telescoping.up, point), value_of(telescoping.base.product, point)),
          "down(n,k+1) B(n,k+1) against up(n,k) B(n,k)", point);
      check.expect_same(
          value_of(telescoping.index_shift->right, point),
          times(value_of(telescoping.up, point), value_of(telescoping.base.product, point)),
          "right side of the statement about B(n,k+1)", point);
    });
  findings.push_back(check.finding());
}

}  // namespace

void check_terms(Context& context, std::vector<Finding>& findings) {
  if (!context.proof.telescoping) return;
  check_identity(context, findings);
  check_shifts(context, findings);
  check_index_shift(context, findings);
}

}  // namespace sumwright::audit
