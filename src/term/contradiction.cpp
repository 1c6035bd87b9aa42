// From a claim's hypotheses to a refusal when they exclude everything: equal sides of `!=`, linear
// arithmetic, and, where the integer parameters are bounded on both sides, every point of the box.

#include "term/contradiction.hpp"

#include <algorithm>
#include <optional>
#include <vector>

#include "term/conversion.hpp"

namespace sumwright::term {

namespace {

constexpr long most_points = 20000;

[[noreturn]] void refuse(const Setting& setting, claim::Place place, const char* what) {
  throw claim::InputError(*setting.claim->source, place, what, "a claim about nothing is refused");
}

struct Side {
  std::size_t symbol;
  long low;
  long high;
};

/// What is asked of a point: the forms are >= 0, the others are not 0.
struct Conditions {
  std::vector<Affine> nonnegative;
  std::vector<Affine> nonzero;
};

bool only_in(const std::vector<Side>& sides, const Affine& form) {
  for (std::size_t i = 0; i < form.coefficients.size(); ++i)
    if (form.coefficients[i] != 0 &&
        std::none_of(sides.begin(), sides.end(), [&](const Side& s) { return s.symbol == i; }))
      return false;
  return true;
}

/// Those that speak of the box's symbols alone.
Conditions conditions_of(const Setting& setting, const std::vector<Side>& sides) {
  Conditions out;
  for (const Affine& form : setting.hypotheses.all())
    if (only_in(sides, form)) out.nonnegative.push_back(form);
  for (const claim::Assumption& a : setting.claim->assumptions) {
    if (a.comparison != claim::Comparison::not_equal || !a.over_integers) continue;
    const Affine difference = to_affine(setting, *a.left) - to_affine(setting, *a.right);
    if (only_in(sides, difference)) out.nonzero.push_back(difference);
  }
  return out;
}

/// The integer parameters that are bounded on both sides; nothing when the box has too many points.
/// An empty box has a side with low > high.
std::optional<std::vector<Side>> box_of(const Setting& setting) {
  std::vector<Side> out;
  long points = 1;
  for (std::size_t i = 0; i < setting.size(); ++i) {
    if (setting.symbols[i].kind != proof::SymbolKind::integer_parameter) continue;
    const Affine symbol = Affine::symbol(setting.size(), i);
    const std::optional<long> low = setting.hypotheses.lower_bound(symbol);
    const std::optional<long> negated = setting.hypotheses.lower_bound(-symbol);
    if (!low || !negated) continue;
    const long high = -*negated;
    if (low <= high && high - *low >= most_points / points) return std::nullopt;
    points *= std::max(high - *low + 1, 1L);
    out.push_back({i, *low, high});
  }
  return out;
}

class Enumeration {
 public:
  Enumeration(const Setting& setting, const std::vector<Side>& sides)
      : sides_(sides), conditions_(conditions_of(setting, sides)), values_(setting.size(), 0) {}

  /// Whether some point of the box satisfies the conditions.
  bool any(std::size_t side = 0) {
    if (side == sides_.size()) return admitted();
    for (long v = sides_[side].low; v <= sides_[side].high; ++v) {
      values_[sides_[side].symbol] = v;
      if (any(side + 1)) return true;
    }
    return false;
  }

 private:
  [[nodiscard]] mpz_class at(const Affine& form) const {
    mpz_class out = form.constant;
    for (std::size_t i = 0; i < values_.size(); ++i)
      out += mpz_class(form.coefficients[i]) * values_[i];
    return out;
  }
  [[nodiscard]] bool admitted() const {
    for (const Affine& form : conditions_.nonnegative)
      if (at(form) < 0) return false;
    for (const Affine& form : conditions_.nonzero)
      if (at(form) == 0) return false;
    return true;
  }

  const std::vector<Side>& sides_;
  Conditions conditions_;
  std::vector<long> values_;
};

bool no_integer_point(const Setting& setting) {
  if (setting.claim->assumptions.empty()) return false;
  const std::optional<std::vector<Side>> sides = box_of(setting);
  return sides && !sides->empty() && !Enumeration(setting, *sides).any();
}

}  // namespace

void refuse_contradiction(const Setting& setting) {
  const claim::Claim& claim = *setting.claim;
  const Facts facts = setting.from(checked_long(setting, claim.from, {}));
  for (const claim::Assumption& a : claim.assumptions) {
    if (a.comparison != claim::Comparison::not_equal) continue;
    if (a.over_integers) {
      const Affine difference = to_affine(setting, *a.left) - to_affine(setting, *a.right);
      if (facts.implies_zero(difference))
        refuse(setting, a.place, "no values satisfy this condition");
      continue;
    }
    const auto left = to_rational_function(setting, *a.left);
    const auto right = to_rational_function(setting, *a.right);
    if (left && right && *left == *right)
      refuse(setting, a.place, "no values satisfy this condition");
  }
  if (facts.contradictory() || no_integer_point(setting))
    refuse(setting, claim.assumptions.empty() ? claim::Place{} : claim.assumptions.back().place,
           "no values satisfy the conditions between the parameters");
}

}  // namespace sumwright::term
