// The shift of a base term in the index: down(n,k+1) B(n,k+1) = up(n,k) B(n,k).
// Both sides are brought to the same atoms: on the left and on the right each atom moves only in
// the direction in which its law holds without division. Common factors of down(n,k+1) and up are
// cancelled last, under a nonvanishing condition (factorials such as (2k)! beside k! need it).

#include <algorithm>
#include <stdexcept>

#include "proof/atom_keys.hpp"
#include "proof/similarity.hpp"

namespace sumwright::proof::building {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;
using term::Affine;
using term::Atom;
using term::Product;
using Side = AtomStep::Side;

namespace {

/// Removes common elements of two sorted lists.
template <typename T>
void remove_common(std::vector<T>& a, std::vector<T>& b) {
  std::vector<T> only_a;
  for (const T& x : a) {
    const auto it = std::find(b.begin(), b.end(), x);
    if (it == b.end())
      only_a.push_back(x);
    else
      b.erase(it);
  }
  a = std::move(only_a);
}

class Shifter {
 public:
  Shifter(const RingPtr& ring, const Product& base)
      : ring_(ring), base_(base), shifted_(term::shift(base, term::index, 1)) {}

  IndexShift run() {
    const AtomGroups left(ring_, shifted_);
    const AtomGroups right(ring_, base_);
    for (const auto& [key, constants] : right.factorials)
      factorials(key, left.constants(key), constants);
    for (const auto& [b, exponent] : right.powers) powers(b, left.powers.at(b), exponent);
    for (const auto& [key, atoms] : right.intervals) intervals(left.intervals.at(key), atoms);
    reciprocals(left, right);
    return finish();
  }

 private:
  void add(Side side, const Atom& from, const Atom& to, long steps, const Factored& factor,
           std::vector<Need> needs) {
    (side == Side::left ? up_ : down_next_).multiply(factor);
    for (Step& known : out_.bringing.steps)
      if (known.side == side && known.from == from && known.to == to) {
        ++known.multiplicity;
        return;
      }
    out_.bringing.steps.push_back(
        Step{side, from, to, static_cast<unsigned>(steps), 1, factor, std::move(needs)});
  }

  void factorials(const std::vector<long>& key, FactorialConstants left, FactorialConstants right) {
    remove_common(left.fact, right.fact);
    remove_common(left.rfact, right.rfact);
    const Affine linear{key, 0};
    const auto each = [](std::size_t size, bool ascending, const auto& action) {
      for (std::size_t i = 0; i < size; ++i) action(ascending ? i : size - 1 - i);
    };
    // fact moves down, so smaller sources first; rfact moves up, so larger sources first.
    each(left.fact.size(), true, [&](std::size_t i) {
      const long l = left.fact[i];
      const long r = right.fact[i];
      const Affine target = linear + std::min(l, r);
      add(l > r ? Side::left : Side::right, term::factorial_atom(ring_, linear + std::max(l, r)),
          term::factorial_atom(ring_, target), std::abs(l - r),
          rising_factors(ring_, target, std::abs(l - r)),
          {{ConditionKind::factorial_argument, target, std::nullopt}});
    });
    each(left.rfact.size(), false, [&](std::size_t i) {
      const long l = left.rfact[i];
      const long r = right.rfact[i];
      const Affine source = linear + std::min(l, r);
      add(l < r ? Side::left : Side::right, term::reciprocal_factorial_atom(ring_, source),
          term::reciprocal_factorial_atom(ring_, linear + std::max(l, r)), std::abs(l - r),
          rising_factors(ring_, source, std::abs(l - r)), {});
    });
  }

  void powers(const Polynomial& b, const Affine& left, const Affine& right) {
    const long gap = (left - right).constant;
    if (gap == 0) return;
    const Affine& target = gap > 0 ? right : left;
    Factored factor;
    factor.multiply(b, std::abs(gap));
    add(gap > 0 ? Side::left : Side::right, term::power_atom(b, gap > 0 ? left : right),
        term::power_atom(b, target), std::abs(gap), factor, power_needs(b, target));
  }

  void intervals(std::vector<Atom> left, std::vector<Atom> right) {
    remove_common(left, right);
    for (std::size_t i = 0; i < left.size(); ++i) interval(left[i], right[i]);
  }

  void interval(const Atom& left, const Atom& right) {
    const bool reciprocal = left.kind == AtomKind::reciprocal_interval_product;
    Atom common = left;
    common.low.constant = reciprocal ? std::min(left.low.constant, right.low.constant)
                                     : std::max(left.low.constant, right.low.constant);
    common.high.constant = reciprocal ? std::max(left.high.constant, right.high.constant)
                                      : std::min(left.high.constant, right.high.constant);
    for (const Side side : {Side::left, Side::right}) {
      const Atom& from = side == Side::left ? left : right;
      if (from == common) continue;
      const Atom& longer = reciprocal ? common : from;
      const Atom& shorter = reciprocal ? from : common;
      Factored factor = interval_factors(from, longer.low, shorter.low);
      factor.multiply(interval_factors(from, shorter.high, longer.high));
      std::vector<Need> needs{{ConditionKind::range, shorter.high - shorter.low, std::nullopt}};
      if (reciprocal) needs.push_back({ConditionKind::nonvanishing, std::nullopt, factor});
      add(side, from, common,
          std::abs(longer.low.constant - shorter.low.constant) +
              std::abs(longer.high.constant - shorter.high.constant),
          factor, needs);
    }
  }

  void reciprocals(const AtomGroups& left, const AtomGroups& right) {
    for (const Polynomial& p : merged_keys(left.reciprocals, right.reciprocals)) {
      const auto count = [&](const AtomGroups& g) {
        const auto it = g.reciprocals.find(p);
        return it == g.reciprocals.end() ? 0L : static_cast<long>(it->second);
      };
      const long gap = count(left) - count(right);
      if (gap == 0) continue;
      const Atom atom = term::reciprocal_atom(ring_, p);
      Factored single;
      single.multiply(p, 1);
      UnitDraft unit{atom,
                     atom,
                     static_cast<unsigned>(std::abs(gap)),
                     {ConditionKind::nonvanishing, std::nullopt, single}};
      // The side that lacks 1/P gets P * 1/P.
      (gap < 0 ? up_ : down_next_).multiply(p, std::abs(gap));
      (gap < 0 ? out_.bringing.left_units : out_.bringing.right_units).push_back(unit);
    }
  }

  IndexShift finish() {
    Factored common;
    for (const auto& [p, e] : up_.factors)
      for (const auto& [q, f] : down_next_.factors)
        if (p == q) common.multiply(p, std::min(e, f));
    up_.multiply(common, -1);
    down_next_.multiply(common, -1);
    const mpq_class scale = up_.constant / down_next_.constant;
    up_.constant = scale.get_num();
    down_next_.constant = scale.get_den();
    out_.up = up_;
    out_.down = down_next_.shift(term::index, -1);
    out_.bringing.product = shifted_;
    out_.bringing.product.coefficient = down_next_;
    out_.bringing.base = base_;
    out_.bringing.right = base_;
    out_.bringing.right.coefficient = up_;
    if (!common.factors.empty()) out_.bringing.cancelled = common;
    check();
    return std::move(out_);
  }

  void check() const {
    algebra::Factored quotient = term::shift_quotient(ring_, base_, term::index);
    quotient.multiply(down_next_);
    quotient.multiply(up_, -1);
    if (quotient.constant != 1 || !quotient.factors.empty())
      throw std::logic_error("the index shift of a base term does not agree with its quotient");
  }

  const RingPtr& ring_;
  const Product& base_;
  Product shifted_;
  Factored up_;
  Factored down_next_;
  IndexShift out_{{}, {}, Bringing{}};
};

}  // namespace

std::optional<IndexShift> index_shift(const RingPtr& ring, const Product& base, std::string& why) {
  (void)why;
  return Shifter(ring, base).run();
}

}  // namespace sumwright::proof::building
