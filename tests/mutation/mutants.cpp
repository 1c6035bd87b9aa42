// Mutation by walking parse trees: every node gives its local variants, every variant one claim.
// Invariant: a mutant differs from the original in one node, or in one symbol of one expression.
#include "mutants.hpp"

#include <stdexcept>
#include <utility>

namespace sumwright::testing {

using claim::Expression;
using claim::ExpressionPtr;
using claim::Operation;

namespace {

struct Variant {
  std::string change;
  ExpressionPtr expression;
};
using Variants = std::vector<Variant>;

ExpressionPtr literal(const mpz_class& value) {
  auto out = std::make_shared<Expression>();
  out->operation = Operation::literal;
  out->value = abs(value);
  if (value >= 0) return out;
  auto negative = std::make_shared<Expression>();
  negative->operation = Operation::negate;
  negative->children = {out};
  return negative;
}

ExpressionPtr node(Operation operation, std::vector<ExpressionPtr> children) {
  auto out = std::make_shared<Expression>();
  out->operation = operation;
  out->children = std::move(children);
  return out;
}

ExpressionPtr with_operation(const Expression& e, Operation operation) {
  auto out = std::make_shared<Expression>(e);
  out->operation = operation;
  return out;
}

ExpressionPtr with_child(const Expression& e, std::size_t i, const ExpressionPtr& child) {
  auto out = std::make_shared<Expression>(e);
  out->children[i] = child;
  return out;
}

ExpressionPtr plus(const ExpressionPtr& e, long by) {
  return node(by > 0 ? Operation::add : Operation::subtract, {e, literal(std::abs(by))});
}

/// Every occurrence of the symbol by symbol + 1.
ExpressionPtr shifted(const ExpressionPtr& e, const std::string& symbol) {
  if (e->operation == Operation::symbol) return e->name == symbol ? plus(e, 1) : e;
  auto out = std::make_shared<Expression>(*e);
  for (ExpressionPtr& child : out->children) child = shifted(child, symbol);
  return out;
}

bool mentions(const Expression& e, const std::string& symbol) {
  if (e.operation == Operation::symbol) return e.name == symbol;
  for (const ExpressionPtr& child : e.children)
    if (mentions(*child, symbol)) return true;
  return false;
}

void add_local(const ExpressionPtr& e, Variants& out) {
  switch (e->operation) {
    case Operation::literal:
      out.push_back({"literal " + e->value.get_str() + " + 1", literal(e->value + 1)});
      if (e->value > 0)
        out.push_back({"literal " + e->value.get_str() + " - 1", literal(e->value - 1)});
      return;
    case Operation::symbol:
      out.push_back({e->name + " -> " + e->name + " + 1 once", plus(e, 1)});
      return;
    case Operation::negate:
      out.push_back({"sign of " + claim::to_text(*e), e->children[0]});
      return;
    case Operation::add:
      out.push_back({"sign in " + claim::to_text(*e), with_operation(*e, Operation::subtract)});
      return;
    case Operation::subtract:
      out.push_back({"sign in " + claim::to_text(*e), with_operation(*e, Operation::add)});
      return;
    default:
      return;
  }
}

void add_nodes(const ExpressionPtr& e, Variants& out) {
  add_local(e, out);
  for (std::size_t i = 0; i < e->children.size(); ++i) {
    Variants inner;
    add_nodes(e->children[i], inner);
    for (Variant& v : inner) out.push_back({std::move(v.change), with_child(*e, i, v.expression)});
  }
}

void add_shifts(const claim::Claim& c, const ExpressionPtr& e, Variants& out) {
  std::vector<std::string> symbols{c.running};
  for (const claim::Range& r : c.sum.over) symbols.push_back(r.index);
  for (const std::string& s : symbols)
    if (mentions(*e, s)) out.push_back({s + " -> " + s + " + 1", shifted(e, s)});
}

/// A single change of a whole value: sign, factor, constant.
void add_whole(const ExpressionPtr& e, Variants& out) {
  out.push_back({"negated", node(Operation::negate, {e})});
  out.push_back({"doubled", node(Operation::multiply, {literal(2), e})});
  out.push_back({"plus 1", plus(e, 1)});
}

Variants all_variants(const claim::Claim& c, const ExpressionPtr& e) {
  Variants out;
  add_nodes(e, out);
  add_shifts(c, e, out);
  add_whole(e, out);
  return out;
}

class Maker {
 public:
  explicit Maker(const claim::Claim& original) : original_(original) {}

  std::vector<Mutant> run() {
    recurrence();
    certificate();
    right_side();
    closed();
    ranges();
    from();
    return std::move(out_);
  }

 private:
  template <typename Change>
  void add(Part part, const std::string& change, const ExpressionPtr& before,
           const ExpressionPtr& after, const Change& edit) {
    Mutant m{part, change, original_, before, after};
    edit(m.claim);
    out_.push_back(std::move(m));
  }

  void recurrence() {
    const auto& all = original_.evidence.recurrence;
    for (std::size_t i = 0; i < all.size(); ++i)
      for (const Variant& v : all_variants(original_, all[i]))
        add(Part::recurrence, "a_" + std::to_string(i) + ": " + v.change, all[i], v.expression,
            [&](claim::Claim& c) { c.evidence.recurrence[i] = v.expression; });
    if (all.size() < 2) return;
    add(Part::recurrence, "first two coefficients exchanged", all[0], all[1],
        [&](claim::Claim& c) { std::swap(c.evidence.recurrence[0], c.evidence.recurrence[1]); });
  }

  void certificate() {
    for (const auto& [index, r] : original_.evidence.certificate)
      for (const Variant& v : all_variants(original_, r))
        add(Part::certificate, "R: " + v.change, r, v.expression,
            [&](claim::Claim& c) { c.evidence.certificate[index] = v.expression; });
  }

  void right_side() {
    if (original_.evidence.recurrence.empty()) return;
    Variants variants;
    if (original_.evidence.right_side) {
      variants = all_variants(original_, original_.evidence.right_side);
    } else {
      auto n = std::make_shared<Expression>();
      n->operation = Operation::symbol;
      n->name = original_.running;
      variants = {{"0 -> 1", literal(1)}, {"0 -> -1", literal(-1)}, {"0 -> n", n}};
    }
    for (const Variant& v : variants)
      add(Part::right_side, "b: " + v.change, original_.evidence.right_side, v.expression,
          [&](claim::Claim& c) { c.evidence.right_side = v.expression; });
  }

  void closed() {
    if (!original_.closed) return;
    for (const Variant& v : all_variants(original_, original_.closed))
      add(Part::closed, "closed form: " + v.change, original_.closed, v.expression,
          [&](claim::Claim& c) { c.closed = v.expression; });
  }

  void ranges() {
    for (std::size_t i = 0; i < original_.sum.over.size(); ++i)
      for (const bool high : {false, true}) {
        const claim::Range& range = original_.sum.over[i];
        const claim::Bound& b = high ? range.high : range.low;
        if (b.kind != claim::Bound::Kind::finite) continue;
        Variants variants;
        add_nodes(b.value, variants);
        if (b.value->operation != Operation::literal)
          for (const long by : {1L, -1L})
            variants.push_back({by > 0 ? "one more" : "one less", plus(b.value, by)});
        for (const Variant& v : variants)
          add(Part::range, (high ? "upper bound: " : "lower bound: ") + v.change, b.value,
              v.expression, [&](claim::Claim& c) {
                claim::Range& changed = c.sum.over[i];
                (high ? changed.high : changed.low).value = v.expression;
              });
      }
  }

  void from() {
    for (const long by : {-2L, -1L, 1L, 2L})
      add(Part::from, "from " + std::string(by < 0 ? "- " : "+ ") + std::to_string(std::abs(by)),
          nullptr, nullptr, [&](claim::Claim& c) { c.from += by; });
  }

  const claim::Claim& original_;
  std::vector<Mutant> out_;
};

}  // namespace

const char* name_of(Part part) {
  switch (part) {
    case Part::recurrence:
      return "recurrence";
    case Part::certificate:
      return "certificate";
    case Part::right_side:
      return "right side";
    case Part::closed:
      return "closed form";
    case Part::range:
      return "range";
    case Part::from:
      return "from";
  }
  throw std::logic_error("unknown part");
}

std::vector<Mutant> mutants_of(const claim::Claim& claim) { return Maker(claim).run(); }

}  // namespace sumwright::testing
