#include "proof_fixture.hpp"

#include "claim/reader.hpp"

namespace sumwright::writers::fixture {

namespace {

using proof::Affine;
using proof::Atom;
using proof::AtomKind;
using proof::Factored;
using proof::Polynomial;
using proof::Product;

constexpr const char* kSquares = R"toml(format  = 1
title   = "Squares along one row of the binomial triangle"
running = "n"
from    = 0

[sum]
summand = "binomial(n, k)^2"
over    = [ { index = "k", low = "0", high = "n" } ]

[equals]
closed  = "binomial(2*n, n)"
)toml";

constexpr const char* kHalves = R"toml(format  = 1
title   = "Two lots with equally many faults"
running = "n"
from    = 0

[sum]
summand = "binomial(n + k, k)/2^k"
over    = [ { index = "k", low = "0", high = "n" } ]

[equals]
closed  = "2^n"
)toml";

Atom factorial_atom(AtomKind kind, Affine argument) {
  Atom atom;
  atom.kind = kind;
  atom.argument = std::move(argument);
  return atom;
}

Atom fact(std::vector<long> c, long d) {
  return factorial_atom(AtomKind::factorial, affine(std::move(c), d));
}
Atom rfact(std::vector<long> c, long d) {
  return factorial_atom(AtomKind::reciprocal_factorial, affine(std::move(c), d));
}
Atom power(long base, std::vector<long> c, long d) {
  Atom atom = factorial_atom(AtomKind::power, affine(std::move(c), d));
  atom.base = polynomial({{base, {0, 0}}});
  return atom;
}

Polynomial linear(long n, long k, long constant) {
  std::vector<std::pair<long, std::vector<unsigned long>>> terms;
  if (n != 0) terms.push_back({n, {1, 0}});
  if (k != 0) terms.push_back({k, {0, 1}});
  if (constant != 0) terms.push_back({constant, {0, 0}});
  return polynomial(terms);
}

Factored times(long constant, std::vector<std::pair<Polynomial, long>> factors = {}) {
  Factored out;
  out.constant = constant;
  out.factors = std::move(factors);
  return out;
}

Product product(Factored coefficient, std::vector<std::pair<Atom, unsigned>> atoms) {
  return {std::move(coefficient), std::move(atoms)};
}

proof::Nonzero nonzero_linear(const Polynomial& p, const std::string& condition) {
  proof::Nonzero out;
  out.polynomial = times(1, {{p, 1}});
  proof::NonzeroFactor factor;
  factor.factor = p;
  out.factors = {factor};
  out.condition = condition;
  return out;
}

proof::AtomStep step(Atom from, Atom to, Factored factor, std::vector<std::string> conditions) {
  proof::AtomStep out;
  out.from = std::move(from);
  out.to = std::move(to);
  out.steps = 1;
  out.factor = std::move(factor);
  out.conditions = std::move(conditions);
  return out;
}

proof::Condition condition(std::string id, proof::ConditionKind kind, std::string text,
                           std::string region, std::string method) {
  return {std::move(id),    kind, std::move(text), std::move(region), proof::Settled::decided,
          std::move(method)};
}

proof::BalanceTerm balance_term(proof::BalanceTerm::Origin origin, std::string text,
                                Product product, Affine point = {}, unsigned shift = 0) {
  proof::BalanceTerm out;
  out.origin = origin;
  out.text = std::move(text);
  out.point = std::move(point);
  out.shift = shift;
  out.product = std::move(product);
  return out;
}

// A term that is `share` times the base of a group.
proof::BalanceTerm similar_term(proof::BalanceTerm term, std::size_t group, Factored share,
                                const Product& base, std::vector<proof::AtomStep> steps) {
  proof::Instance instance;
  instance.left = term.product;
  instance.right = base;
  instance.right.coefficient = std::move(share);
  instance.region.text = "n >= 0";
  instance.steps = std::move(steps);
  term.group = group;
  term.instance = std::move(instance);
  return term;
}

proof::InitialValue value_one() {
  proof::InitialValue out;
  out.at = 0;
  out.sums = {{0, 0, 0, {}, {}}};
  out.value = 1;
  out.balance.id = "initial_0";
  const Product one = product(times(1), {});
  using Origin = proof::BalanceTerm::Origin;
  out.balance.terms = {
      similar_term(balance_term(Origin::value, "F(0, 0)", one, affine({0, 0}, 0)), 0, times(1), one,
                   {}),
      similar_term(balance_term(Origin::closed_form, "right side at 0", product(times(-1), {})), 0,
                   times(-1), one, {})};
  out.balance.groups = {{{"E1", one}, {0, 1}, {times(1), times(-1)}}};
  return out;
}

}  // namespace

Polynomial polynomial(const std::vector<std::pair<long, std::vector<unsigned long>>>& terms) {
  Polynomial out;
  for (const auto& [coefficient, exponents] : terms) out.terms.push_back({coefficient, exponents});
  return out;
}

Affine affine(std::vector<long> coefficients, long constant) {
  return {std::move(coefficients), constant};
}

proof::Proof bare(const std::string& claim_text) {
  proof::Proof out;
  out.claim =
      std::make_shared<const claim::Claim>(claim::read_claim_text("claim.toml", claim_text).claim);
  out.symbols.push_back({out.claim->running, proof::SymbolKind::running});
  const auto& over = out.claim->sum.over;
  out.symbols.push_back({over.empty() ? "" : over[0].index, proof::SymbolKind::index});
  for (const claim::Parameter& parameter : out.claim->parameters) {
    out.symbols.push_back({parameter.name, parameter.ring == claim::Parameter::Ring::rationals
                                               ? proof::SymbolKind::rational_parameter
                                               : proof::SymbolKind::integer_parameter});
  }
  return out;
}

namespace {

using Kind = proof::ConditionKind;
using Origin = proof::BalanceTerm::Origin;

void squares_term(proof::Proof& out) {
  out.summand.id = "summand";
  out.summand.expression = out.claim->sum.summand;
  out.summand.region.text = "n >= 0, 0 <= k <= n";
  out.summand.leaves = {
      {out.claim->sum.summand->children[0],
       proof::LeafRule::binomial_factorials,
       product(times(1), {{fact({1, 0}, 0), 1}, {rfact({0, 1}, 0), 1}, {rfact({1, -1}, 0), 1}}),
       {"c1"},
       {}}};
  out.summand.products = {
      product(times(1), {{fact({1, 0}, 0), 2}, {rfact({0, 1}, 0), 2}, {rfact({1, -1}, 0), 2}})};
  out.summand.units = {{}};
  out.closed = proof::Conversion{};
  out.closed->id = "closed";
  out.closed->expression = out.claim->closed;
  out.closed->region.text = "n >= 0";
  out.closed->leaves = {{out.claim->closed,
                         proof::LeafRule::binomial_factorials,
                         product(times(1), {{fact({2, 0}, 0), 1}, {rfact({1, 0}, 0), 2}}),
                         {"c2"},
                         {}}};
  out.closed->products = {product(times(1), {{fact({2, 0}, 0), 1}, {rfact({1, 0}, 0), 2}})};
  out.closed->units = {{}};
}

proof::Telescoping squares_telescoping() {
  proof::Telescoping t;
  const Polynomial m = linear(1, -1, 1);
  t.base = {"B", product(times(1),
                         {{fact({1, 0}, 0), 2}, {rfact({0, 1}, 0), 2}, {rfact({1, -1}, 1), 2}})};
  t.coefficients = {times(-2, {{linear(2, 0, 1), 1}}), times(1, {{linear(1, 0, 1), 1}})};
  t.weight.polynomial = times(1);
  t.p = {times(1, {{m, 2}}), times(1, {{linear(1, 0, 1), 2}})};
  t.certificate = linear(-3, 2, -3);
  t.down = times(1, {{linear(0, 1, 0), 2}});
  t.up = times(1, {{m, 2}});
  t.region.text = "n >= 0, 0 <= k <= n + 1";
  t.low = affine({0, 0}, 0);
  t.high = affine({1, 0}, 1);
  t.conditions = {"c3"};
  t.normal_form = polynomial({{3, {3, 0}},
                              {-8, {2, 1}},
                              {7, {2, 0}},
                              {4, {1, 2}},
                              {-12, {1, 1}},
                              {5, {1, 0}},
                              {2, {0, 2}},
                              {-4, {0, 1}},
                              {1, {0, 0}}});
  t.normal_scale = -1;
  proof::Instance shift;
  shift.id = "shift_0";
  shift.region = t.region;
  shift.left =
      product(times(1), {{fact({1, 0}, 0), 2}, {rfact({0, 1}, 0), 2}, {rfact({1, -1}, 0), 2}});
  shift.right = t.base.product;
  shift.right.coefficient = t.p[0];
  shift.steps = {step(rfact({1, -1}, 0), rfact({1, -1}, 1), times(1, {{m, 1}}), {})};
  proof::Instance next;
  next.id = "shift_1";
  next.region = t.region;
  next.left =
      product(times(1), {{fact({1, 0}, 1), 2}, {rfact({0, 1}, 0), 2}, {rfact({1, -1}, 1), 2}});
  next.right = t.base.product;
  next.right.coefficient = t.p[1];
  next.steps = {step(fact({1, 0}, 1), fact({1, 0}, 0), times(1, {{linear(1, 0, 1), 1}}), {"c3"})};
  t.shifts = {{shift}, {next}};
  return t;
}

proof::Balance squares_closed() {
  proof::Balance b;
  b.id = "closed_recurrence";
  b.region.text = "n >= 0";
  const Product base = product(times(1), {{fact({2, 0}, 0), 1}, {rfact({1, 0}, 1), 2}});
  auto upper =
      balance_term(Origin::upper_end, "G(n, n + 2)",
                   product(times(1, {{linear(1, 0, 2), 2}, {linear(-1, 0, 1), 1}}),
                           {{fact({1, 0}, 0), 2}, {rfact({1, 0}, 2), 2}, {rfact({0, 0}, -1), 2}}),
                   affine({1, 0}, 1));
  upper.zero = "c5";
  upper.zero_atom = rfact({0, 0}, -1);
  auto lower = balance_term(Origin::lower_end, "G(n, 0)", product(times(0), {}), affine({0, 0}, 0));
  lower.zero = "polynomial factor";
  auto now = balance_term(
      Origin::closed_form, "a_0 C(n)",
      product(times(2, {{linear(2, 0, 1), 1}}), {{fact({2, 0}, 0), 1}, {rfact({1, 0}, 0), 2}}));
  auto next = balance_term(
      Origin::closed_form, "a_1 C(n + 1)",
      product(times(-1, {{linear(1, 0, 1), 1}}), {{fact({2, 0}, 2), 1}, {rfact({1, 0}, 1), 2}}), {},
      1);
  const Factored share = times(2, {{linear(2, 0, 1), 1}, {linear(1, 0, 1), 2}});
  const Factored other = times(-2, {{linear(2, 0, 1), 1}, {linear(1, 0, 1), 2}});
  b.terms = {upper, lower,
             similar_term(
                 now, 0, share, base,
                 {step(rfact({1, 0}, 0), rfact({1, 0}, 1), times(1, {{linear(1, 0, 1), 1}}), {})}),
             similar_term(next, 0, other, base, {})};
  b.groups = {{{"E1", base}, {2, 3}, {share, other}}};
  return b;
}

}  // namespace

proof::Proof squares() {
  proof::Proof out = bare(kSquares);
  out.verdict = proof::Verdict::established;
  squares_term(out);
  out.recurrence_text = {"-2*(2*n + 1)", "n + 1"};
  out.right_side_text = "0";
  out.certificate_text = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2";
  out.order = 1;
  out.telescoping = squares_telescoping();
  proof::RangeStep first;
  first.above = proof::Vanishing{{rfact({1, -1}, 0)}, "c4"};
  proof::RangeStep second;
  second.shift = 1;
  out.ranges = {first, second};
  out.closed_recurrence = squares_closed();
  out.leading = nonzero_linear(linear(1, 0, 1), "c6");
  out.initial = {value_one()};
  out.conditions = {
      condition("c1", Kind::factorial_argument, "n >= 0", "n >= 0, 0 <= k <= n",
                "linear arithmetic"),
      condition("c2", Kind::factorial_argument, "2*n >= 0", "n >= 0", "linear arithmetic"),
      condition("c3", Kind::factorial_argument, "n >= 0", "n >= 0, 0 <= k <= n + 1",
                "linear arithmetic"),
      condition("c4", Kind::support, "n - k < 0", "n >= 0, n < k <= n + 1", "linear arithmetic"),
      condition("c5", Kind::support, "-1 < 0", "n >= 0", "linear arithmetic"),
      condition("c6", Kind::leading_coefficient, "n + 1 != 0", "n >= 0", "linear arithmetic"),
      condition("c7", Kind::initial_value, "S(0) = 1", "n = 0", "evaluation")};
  return out;
}

namespace {

proof::Telescoping halves_telescoping() {
  proof::Telescoping t;
  t.base = {"B", product(times(1), {{fact({1, 1}, 0), 1},
                                    {rfact({1, 0}, 1), 1},
                                    {rfact({0, 1}, 0), 1},
                                    {power(2, {0, -1}, -1), 1}})};
  t.coefficients = {times(-2), times(1)};
  t.weight.polynomial = times(1);
  t.p = {times(2, {{linear(1, 0, 1), 1}}), times(2, {{linear(1, 1, 1), 1}})};
  t.certificate = linear(0, 0, -2);
  t.down = times(2, {{linear(0, 1, 0), 1}});
  t.up = times(1, {{linear(1, 1, 1), 1}});
  t.region.text = "n >= 0, 0 <= k <= n";
  t.low = affine({0, 0}, 0);
  t.high = affine({1, 0}, 0);
  t.normal_form = linear(1, -1, 1);
  t.normal_scale = -2;
  return t;
}

proof::Balance halves_closed() {
  proof::Balance b;
  b.id = "closed_recurrence";
  b.region.text = "n >= 0";
  const Product end =
      product(times(1), {{fact({2, 0}, 1), 1}, {rfact({1, 0}, 1), 2}, {power(2, {-1, 0}, -2), 1}});
  const Product two = product(times(1), {{power(2, {1, 0}, 0), 1}});
  const Factored share = times(4, {{linear(1, 0, 1), 1}});
  const Factored other = times(-4, {{linear(1, 0, 1), 1}});
  auto lower = balance_term(Origin::lower_end, "G(n, 0)", product(times(0), {}), affine({0, 0}, 0));
  lower.zero = "polynomial factor";
  Product upper = end;
  upper.coefficient = other;
  b.terms = {similar_term(balance_term(Origin::upper_end, "G(n, n + 1)", upper, affine({1, 0}, 0)),
                          0, other, end, {}),
             lower,
             similar_term(balance_term(Origin::explicit_point, "a_1 F(n + 1, n + 1)",
                                       product(times(1), {{fact({2, 0}, 2), 1},
                                                          {rfact({1, 0}, 1), 2},
                                                          {power(2, {-1, 0}, -1), 1}}),
                                       affine({1, 0}, 1), 1),
                          0, share, end, {}),
             similar_term(balance_term(Origin::closed_form, "a_0 C(n)",
                                       product(times(2), {{power(2, {1, 0}, 0), 1}})),
                          1, times(2), two, {}),
             similar_term(balance_term(Origin::closed_form, "a_1 C(n + 1)",
                                       product(times(-1), {{power(2, {1, 0}, 1), 1}}), {}, 1),
                          1, times(-2), two, {})};
  b.groups = {{{"E1", end}, {0, 2}, {other, share}}, {{"E2", two}, {3, 4}, {times(2), times(-2)}}};
  return b;
}

}  // namespace

proof::Proof halves() {
  proof::Proof out = bare(kHalves);
  out.verdict = proof::Verdict::established;
  out.summand.id = "summand";
  out.summand.expression = out.claim->sum.summand;
  out.summand.region.text = "n >= 0, 0 <= k <= n";
  out.summand.products = {product(times(1), {{fact({1, 1}, 0), 1},
                                             {rfact({1, 0}, 0), 1},
                                             {rfact({0, 1}, 0), 1},
                                             {power(2, {0, -1}, 0), 1}})};
  out.summand.units = {{}};
  out.closed = proof::Conversion{};
  out.closed->id = "closed";
  out.closed->expression = out.claim->closed;
  out.closed->products = {product(times(1), {{power(2, {1, 0}, 0), 1}})};
  out.closed->units = {{}};
  out.recurrence_text = {"-2", "1"};
  out.right_side_text = "0";
  out.certificate_text = "-2*k/(n + 1)";
  out.order = 1;
  out.telescoping = halves_telescoping();
  proof::RangeStep second;
  second.shift = 1;
  second.high_points = 1;
  out.ranges = {proof::RangeStep{}, second};
  out.closed_recurrence = halves_closed();
  out.leading = proof::Nonzero{};
  out.leading->polynomial = times(1);
  out.initial = {value_one()};
  out.conditions = {
      condition("c1", Kind::factorial_argument, "n + k >= 0", "n >= 0, 0 <= k <= n",
                "linear arithmetic"),
      condition("c2", Kind::nonvanishing, "2^k != 0", "n >= 0, 0 <= k <= n", "2 is not 0"),
      condition("c3", Kind::explicit_point, "k = n + 1 at shift 1", "n >= 0",
                "kept as an explicit term")};
  return out;
}

}  // namespace sumwright::writers::fixture
