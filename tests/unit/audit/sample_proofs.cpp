// Proofs by hand. Squares: the certificate R = k^2 (2k-3n-3)/(n+1-k)^2 with base term
// (n! / (k! (n+1-k)!))^2. Halves: G(n,k) = -2k B, from Pascal's rule, with B = (n+k)! / (k! (n+1)!
// 2^k). Powers: the binomial theorem, G(n,k) = -k B x^k with B = n! / (k! (n+1-k)!).
#include "sample_proofs.hpp"

#include <map>
#include <stdexcept>

#include "audit/text_reader.hpp"
#include "claim/reader.hpp"

namespace sumwright::audit::testing {

namespace {

using Exponents = std::vector<unsigned long>;
using Sum = std::map<Exponents, mpz_class, std::greater<>>;

Sum times(const Sum& a, const Sum& b) {
  Sum out;
  for (const auto& [ea, ca] : a)
    for (const auto& [eb, cb] : b) {
      Exponents e = ea;
      for (std::size_t i = 0; i < e.size(); ++i) e[i] += eb[i];
      out[e] += ca * cb;
    }
  return out;
}

Sum expand(const claim::Expression& node, const std::vector<std::string>& names) {
  using claim::Operation;
  const auto part = [&](std::size_t i) { return expand(*node.children.at(i), names); };
  Exponents zero(names.size(), 0);
  if (node.operation == Operation::literal) return {{zero, node.value}};
  if (node.operation == Operation::symbol) {
    for (std::size_t i = 0; i < names.size(); ++i)
      if (names[i] == node.name) zero[i] = 1;
    return {{zero, 1}};
  }
  if (node.operation == Operation::negate) return times({{zero, -1}}, part(0));
  if (node.operation == Operation::multiply) return times(part(0), part(1));
  if (node.operation == Operation::power) {
    Sum out{{zero, 1}};
    for (long e = node.children.at(1)->value.get_si(); e > 0; --e) out = times(out, part(0));
    return out;
  }
  Sum out = part(0);
  const int sign = node.operation == Operation::subtract ? -1 : 1;
  for (const auto& [e, c] : part(1)) out[e] += sign * c;
  return out;
}

}  // namespace

proof::Polynomial Notation::polynomial(const std::string& text) const {
  const claim::ExpressionPtr tree = read_expression(text, names_);
  if (!tree) throw std::logic_error("not a polynomial: " + text);
  proof::Polynomial out;
  for (const auto& [exponents, coefficient] : expand(*tree, names_))
    if (coefficient != 0) out.terms.push_back({coefficient, exponents});
  return out;
}

proof::Affine Notation::affine(const std::string& text) const {
  proof::Affine out;
  out.coefficients.assign(names_.size(), 0);
  for (const proof::Monomial& monomial : polynomial(text).terms) {
    bool constant = true;
    for (std::size_t i = 0; i < names_.size(); ++i)
      if (monomial.exponents[i] == 1) {
        out.coefficients[i] = monomial.coefficient.get_si();
        constant = false;
      }
    if (constant) out.constant = monomial.coefficient.get_si();
  }
  return out;
}

proof::Factored Notation::factored(const mpq_class& constant,
                                   const std::vector<std::pair<std::string, long>>& factors) const {
  proof::Factored out;
  out.constant = constant;
  for (const auto& [text, exponent] : factors) out.factors.emplace_back(polynomial(text), exponent);
  return out;
}

proof::Atom Notation::fact(const std::string& argument) const {
  proof::Atom out;
  out.kind = proof::AtomKind::factorial;
  out.argument = affine(argument);
  return out;
}

proof::Atom Notation::rfact(const std::string& argument) const {
  proof::Atom out = fact(argument);
  out.kind = proof::AtomKind::reciprocal_factorial;
  return out;
}

proof::Atom Notation::power(const std::string& base, const std::string& exponent) const {
  proof::Atom out = fact(exponent);
  out.kind = proof::AtomKind::power;
  out.base = polynomial(base);
  return out;
}

proof::Region Notation::region(const std::vector<std::string>& nonnegative) const {
  proof::Region out;
  for (const std::string& text : nonnegative) {
    out.nonnegative.push_back(affine(text));
    out.text += (out.text.empty() ? "" : ", ") + text + " >= 0";
  }
  return out;
}

proof::Product product(const proof::Factored& coefficient, const Atoms& atoms) {
  return {coefficient, atoms};
}

proof::Product over(const proof::Factored& coefficient, const proof::Product& base) {
  return {coefficient, base.atoms};
}

proof::Instance instance(const std::string& id, const proof::Region& region,
                         const proof::Product& left, const proof::Product& right) {
  proof::Instance out;
  out.id = id;
  out.region = region;
  out.left = left;
  out.right = right;
  return out;
}

std::shared_ptr<const claim::Claim> read_claim(const std::string& text) {
  return std::make_shared<const claim::Claim>(claim::read_claim_text("test.toml", text).claim);
}

namespace {

using Origin = proof::BalanceTerm::Origin;

proof::Condition decided(const std::string& id, proof::ConditionKind kind,
                         const std::string& text) {
  return {id, kind, text, "", proof::Settled::decided, "linear arithmetic"};
}

proof::BalanceTerm term(Origin origin, const std::string& text, const proof::Product& value,
                        std::size_t group) {
  proof::BalanceTerm out;
  out.origin = origin;
  out.text = text;
  out.product = value;
  out.group = group;
  return out;
}

proof::BalanceTerm zero_term(Origin origin, const std::string& text, const proof::Product& value) {
  proof::BalanceTerm out = term(origin, text, value, 0);
  out.zero = "polynomial factor";
  return out;
}

proof::Nonzero linear_nonzero(const Notation& w, const std::string& factor, const std::string& id) {
  proof::Nonzero out;
  out.polynomial = w.factored(1, {{factor, 1}});
  out.condition = id;
  proof::NonzeroFactor one;
  one.factor = w.polynomial(factor);
  out.factors.push_back(one);
  return out;
}

proof::InitialValue one_at_zero(const Notation& w) {
  proof::InitialValue out;
  out.at = 0;
  out.sums = {{0, 0, 0, {}, {}}};
  out.value = 1;
  out.balance.id = "initial_0";
  out.balance.terms = {term(Origin::explicit_point, "F(0, 0)", product(w.factored(1, {}), {}), 0),
                       term(Origin::closed_form, "C(0)", product(w.factored(-1, {}), {}), 0)};
  out.balance.groups = {
      {{"I", product(w.factored(1, {}), {})}, {0, 1}, {w.factored(1, {}), w.factored(-1, {})}}};
  return out;
}

proof::Proof start(const std::string& text, const Notation& w) {
  proof::Proof out;
  out.claim = read_claim(text);
  using proof::SymbolKind;
  for (std::size_t i = 0; i < w.names().size(); ++i)
    out.symbols.push_back({w.names()[i], i == 0   ? SymbolKind::running
                                         : i == 1 ? SymbolKind::index
                                                  : SymbolKind::rational_parameter});
  out.verdict = proof::Verdict::established;
  out.order = 1;
  out.summand.id = "summand";
  out.summand.expression = out.claim->sum.summand;
  out.summand.region = w.region({"n", "k", "n - k"});
  out.ranges = {{0, 0, 0, {}, {}}, {1, 0, 0, {}, {}}};
  out.conditions = {decided("c1", proof::ConditionKind::leading_coefficient, "n + 1 != 0")};
  return out;
}

}  // namespace

std::string squares_claim_text() {
  return R"(
format = 1
title = "squares of one row"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)^2"
over = [ { index = "k", low = 0, high = "n" } ]
)";
}

namespace {

void add_squares_argument(proof::Proof& out, const Notation& w) {
  const proof::Factored one = w.factored(1, {});
  out.summand.products = {
      product(one, {{w.fact("n"), 2}, {w.rfact("k"), 2}, {w.rfact("n - k"), 2}})};
  proof::Leaf leaf;
  leaf.expression = out.claim->sum.summand->children.at(0);
  leaf.rule = proof::LeafRule::binomial_factorials;
  leaf.value = product(one, {{w.fact("n"), 1}, {w.rfact("k"), 1}, {w.rfact("n - k"), 1}});
  leaf.conditions = {"c2"};
  out.summand.leaves = {leaf};
  out.conditions.push_back(decided("c2", proof::ConditionKind::factorial_argument, "n >= 0"));
  out.conditions.push_back(decided("c3", proof::ConditionKind::support, "n - k < 0"));

  proof::Telescoping t;
  const proof::Product b =
      product(one, {{w.fact("n"), 2}, {w.rfact("k"), 2}, {w.rfact("n + 1 - k"), 2}});
  t.base = {"B", b};
  t.region = w.region({"n", "k", "n + 1 - k"});
  t.low = w.affine("0");
  t.high = w.affine("n + 1");
  t.coefficients = {w.factored(-2, {{"2*n + 1", 1}}), w.factored(1, {{"n + 1", 1}})};
  t.p = {w.factored(1, {{"n + 1 - k", 2}}), w.factored(1, {{"n + 1", 2}})};
  t.certificate = w.polynomial("2*k - 3*n - 3");
  t.down = w.factored(1, {{"k", 2}});
  t.up = w.factored(1, {{"n + 1 - k", 2}});
  t.shifts = {
      {instance("shift_0", t.region, out.summand.products[0], over(t.p[0], b))},
      {instance("shift_1", t.region,
                product(one, {{w.fact("n + 1"), 2}, {w.rfact("k"), 2}, {w.rfact("n + 1 - k"), 2}}),
                over(t.p[1], b))}};
  t.index_shift =
      instance("index_shift", t.region,
               product(w.factored(1, {{"k + 1", 2}}),
                       {{w.fact("n"), 2}, {w.rfact("k + 1"), 2}, {w.rfact("n - k"), 2}}),
               over(t.up, b));
  t.normal_form = w.polynomial("(n+1)^3 - 2*(2*n+1)*(n+1-k)^2");
  if (t.normal_form.terms.front().coefficient < 0) {
    for (proof::Monomial& monomial : t.normal_form.terms) monomial.coefficient *= -1;
    t.normal_scale = -1;
  }
  out.telescoping = t;
  out.ranges[0].above = proof::Vanishing{{w.rfact("n - k")}, "c3"};
  out.recurrence_text = {"-2*(2*n + 1)", "n + 1"};
  out.right_side_text = "0";
}

std::vector<proof::BalanceTerm> squares_ends(const Notation& w) {
  return {zero_term(Origin::upper_end, "G(n, n+2)", product(w.factored(0, {}), {})),
          zero_term(Origin::lower_end, "G(n, 0)", product(w.factored(0, {}), {}))};
}

}  // namespace

proof::Proof squares_proof() {
  const Notation w({"n", "k"});
  proof::Proof out = start(squares_claim_text() + "[equals]\nclosed = \"binomial(2*n, n)\"\n", w);
  add_squares_argument(out, w);
  out.closed = proof::Conversion{};
  out.closed->id = "closed";
  out.closed->expression = out.claim->closed;
  out.closed->region = w.region({"n"});
  out.closed->products = {product(w.factored(1, {}), {{w.fact("2*n"), 1}, {w.rfact("n"), 2}})};

  const proof::Product e = product(w.factored(1, {}), {{w.fact("2*n"), 1}, {w.rfact("n + 1"), 2}});
  const proof::Factored first = w.factored(2, {{"2*n + 1", 1}, {"n + 1", 2}});
  const proof::Factored second = w.factored(-1, {{"n + 1", 1}, {"2*n + 2", 1}, {"2*n + 1", 1}});
  proof::Balance balance;
  balance.id = "closed_recurrence";
  balance.region = w.region({"n"});
  balance.terms = squares_ends(w);
  balance.terms.push_back(
      term(Origin::closed_form, "a_0 C(n)",
           product(w.factored(2, {{"2*n + 1", 1}}), {{w.fact("2*n"), 1}, {w.rfact("n"), 2}}), 0));
  balance.terms.push_back(term(
      Origin::closed_form, "a_1 C(n+1)",
      product(w.factored(-1, {{"n + 1", 1}}), {{w.fact("2*n + 2"), 1}, {w.rfact("n + 1"), 2}}), 0));
  balance.terms[2].instance =
      instance("closed_0", balance.region, balance.terms[2].product, over(first, e));
  balance.terms[3].instance =
      instance("closed_1", balance.region, balance.terms[3].product, over(second, e));
  balance.groups = {{{"E1", e}, {2, 3}, {first, second}}};
  out.closed_recurrence = balance;
  out.leading = linear_nonzero(w, "n + 1", "c1");
  out.initial = {one_at_zero(w)};
  return out;
}

proof::Proof squares_recurrence_proof() {
  const Notation w({"n", "k"});
  proof::Proof out = start(
      squares_claim_text() + "[evidence]\nrecurrence = [\"-4*(2*n + 1)\", \"2*(n + 1)\"]\n", w);
  add_squares_argument(out, w);
  proof::Balance balance;
  balance.id = "ends";
  balance.region = w.region({"n"});
  balance.terms = squares_ends(w);
  out.ends = balance;
  return out;
}

proof::Proof halves_proof() {
  const Notation w({"n", "k"});
  const proof::Factored one = w.factored(1, {});
  proof::Proof out = start(R"(
format = 1
title = "halves"
running = "n"
from = 0
[sum]
summand = "binomial(n + k, k)/2^k"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = "2^n"
)",
                           w);
  out.summand.region = w.region({"n", "k"});
  out.summand.products = {product(
      one, {{w.fact("n + k"), 1}, {w.rfact("k"), 1}, {w.rfact("n"), 1}, {w.power("2", "-k"), 1}})};
  proof::Telescoping t;
  const proof::Product b = product(
      one,
      {{w.fact("n + k"), 1}, {w.rfact("k"), 1}, {w.rfact("n + 1"), 1}, {w.power("2", "-k"), 1}});
  t.base = {"B", b};
  t.region = w.region({"n", "k", "n - k"});
  t.low = w.affine("0");
  t.high = w.affine("n");
  t.coefficients = {w.factored(-2, {}), one};
  t.p = {w.factored(1, {{"n + 1", 1}}), w.factored(1, {{"n + k + 1", 1}})};
  t.certificate = w.polynomial("-1");
  t.down = w.factored(2, {{"k", 1}});
  t.up = w.factored(1, {{"n + k + 1", 1}});
  const proof::Product shifted = product(one, {{w.fact("n + k + 1"), 1},
                                               {w.rfact("k"), 1},
                                               {w.rfact("n + 1"), 1},
                                               {w.power("2", "-k"), 1}});
  t.shifts = {{instance("shift_0", t.region, out.summand.products[0], over(t.p[0], b))},
              {instance("shift_1", t.region, shifted, over(t.p[1], b))}};
  t.index_shift = instance("index_shift", t.region,
                           product(w.factored(2, {{"k + 1", 1}}), {{w.fact("n + k + 1"), 1},
                                                                   {w.rfact("k + 1"), 1},
                                                                   {w.rfact("n + 1"), 1},
                                                                   {w.power("2", "-k - 1"), 1}}),
                           over(t.up, b));
  t.normal_form = w.polynomial("n - k + 1");
  t.normal_scale = -1;
  out.telescoping = t;
  out.ranges[1].high_points = 1;
  out.recurrence_text = {"-2", "1"};
  out.right_side_text = "0";
  out.closed = proof::Conversion{};
  out.closed->id = "closed";
  out.closed->expression = out.claim->closed;
  out.closed->region = w.region({"n"});
  out.closed->products = {product(one, {{w.power("2", "n"), 1}})};

  const proof::Product e =
      product(one, {{w.fact("2*n"), 1}, {w.rfact("n + 1"), 2}, {w.power("2", "-n - 1"), 1}});
  const proof::Product two = product(one, {{w.power("2", "n"), 1}});
  proof::Balance balance;
  balance.id = "closed_recurrence";
  balance.region = w.region({"n"});
  balance.terms = {
      term(Origin::upper_end, "G(n, n+1)",
           product(w.factored(-1, {{"2*n + 1", 1}}), {{w.fact("2*n"), 1},
                                                      {w.rfact("n"), 1},
                                                      {w.rfact("n + 1"), 1},
                                                      {w.power("2", "-n"), 1}}),
           0),
      zero_term(Origin::lower_end, "G(n, 0)", product(w.factored(0, {}), {})),
      term(Origin::explicit_point, "F(n+1, n+1)",
           product(one,
                   {{w.fact("2*n + 2"), 1}, {w.rfact("n + 1"), 2}, {w.power("2", "-n - 1"), 1}}),
           0),
      term(Origin::closed_form, "a_0 C(n)", over(w.factored(2, {}), two), 1),
      term(Origin::closed_form, "a_1 C(n+1)",
           product(w.factored(-1, {}), {{w.power("2", "n + 1"), 1}}), 1)};
  const proof::Factored upper = w.factored(-2, {{"2*n + 1", 1}, {"n + 1", 1}});
  const proof::Factored point = w.factored(1, {{"2*n + 2", 1}, {"2*n + 1", 1}});
  balance.groups = {{{"E1", e}, {0, 2}, {upper, point}},
                    {{"E2", two}, {3, 4}, {w.factored(2, {}), w.factored(-2, {})}}};
  out.closed_recurrence = balance;
  out.leading = proof::Nonzero{};
  out.leading->condition = "c1";
  out.initial = {one_at_zero(w)};
  return out;
}

proof::Proof powers_proof() {
  const Notation w({"n", "k", "x"});
  const proof::Factored one = w.factored(1, {});
  proof::Proof out = start(R"(
format = 1
title = "powers"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)*x^k"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = "(x + 1)^n"
[parameters]
x = { in = "rationals", not = ["-1"] }
)",
                           w);
  out.conditions.push_back(decided("c3", proof::ConditionKind::support, "n - k < 0"));
  out.conditions.push_back({"c4", proof::ConditionKind::nonvanishing, "x + 1 != 0", "",
                            proof::Settled::given, "hypothesis x != -1"});
  const auto term_at = [&](const std::string& n) {
    return product(
        one, {{w.fact(n), 1}, {w.rfact("k"), 1}, {w.rfact(n + " - k"), 1}, {w.power("x", "k"), 1}});
  };
  out.summand.products = {term_at("n")};
  proof::Telescoping t;
  const proof::Product b = product(
      one,
      {{w.fact("n"), 1}, {w.rfact("k"), 1}, {w.rfact("n + 1 - k"), 1}, {w.power("x", "k"), 1}});
  t.base = {"B", b};
  t.region = w.region({"n", "k", "n + 1 - k"});
  t.low = w.affine("0");
  t.high = w.affine("n + 1");
  t.coefficients = {w.factored(-1, {{"x + 1", 1}}), one};
  t.p = {w.factored(1, {{"n + 1 - k", 1}}), w.factored(1, {{"n + 1", 1}})};
  t.certificate = w.polynomial("-1");
  t.down = w.factored(1, {{"k", 1}});
  t.up = w.factored(1, {{"n + 1 - k", 1}, {"x", 1}});
  t.shifts = {{instance("shift_0", t.region, term_at("n"), over(t.p[0], b))},
              {instance("shift_1", t.region, term_at("n + 1"), over(t.p[1], b))}};
  t.index_shift = instance("index_shift", t.region,
                           product(w.factored(1, {{"k + 1", 1}}), {{w.fact("n"), 1},
                                                                   {w.rfact("k + 1"), 1},
                                                                   {w.rfact("n - k"), 1},
                                                                   {w.power("x", "k + 1"), 1}}),
                           over(t.up, b));
  t.normal_form = w.polynomial("(n + 1 - k)*x - k");
  t.normal_scale = -1;
  out.telescoping = t;
  out.ranges[0].above = proof::Vanishing{{w.rfact("n - k")}, "c3"};
  out.recurrence_text = {"-(x + 1)", "1"};
  out.closed = proof::Conversion{};
  out.closed->id = "closed";
  out.closed->expression = out.claim->closed;
  out.closed->region = w.region({"n"});
  const proof::Product c = product(one, {{w.power("x + 1", "n"), 1}});
  out.closed->products = {c};
  proof::Balance balance;
  balance.id = "closed_recurrence";
  balance.region = w.region({"n"});
  balance.terms = squares_ends(w);
  balance.terms.push_back(
      term(Origin::closed_form, "a_0 C(n)", over(w.factored(1, {{"x + 1", 1}}), c), 0));
  balance.terms.push_back(term(Origin::closed_form, "a_1 C(n+1)",
                               product(w.factored(-1, {}), {{w.power("x + 1", "n + 1"), 1}}), 0));
  balance.groups = {
      {{"E1", c}, {2, 3}, {w.factored(1, {{"x + 1", 1}}), w.factored(-1, {{"x + 1", 1}})}}};
  out.closed_recurrence = balance;
  out.leading = proof::Nonzero{};
  out.leading->condition = "c1";
  out.initial = {one_at_zero(w)};
  return out;
}

}  // namespace sumwright::audit::testing
