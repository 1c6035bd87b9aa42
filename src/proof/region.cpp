// Choosing the common range of the index (rules R1 and R5).
// Candidates for each end come from the author's ends at n, ..., n+J and from the ends of the
// support (rfact arguments); the widest pair on which every need is a theorem of linear arithmetic
// wins. Points of the author's ranges beyond it are kept as explicit points; where it reaches
// beyond the author's ranges, F must vanish there.

#include "proof/region.hpp"

#include <algorithm>

namespace sumwright::proof::building {

using term::Affine;
using term::Conjunction;
using term::End;
using term::Facts;
using term::Product;
using term::Setting;

namespace {

constexpr long steps_inward = 4;
constexpr std::size_t most_candidates = 24;
constexpr long most_points = 12;

Facts with_all(Facts facts, const Conjunction& forms) {
  for (const Affine& form : forms) facts.add(form);
  return facts;
}

void add_candidate(std::vector<Affine>& list, const Affine& form) {
  if (std::find(list.begin(), list.end(), form) == list.end() && list.size() < most_candidates)
    list.push_back(form);
}

class Chooser {
 public:
  Chooser(const Setting& setting, const AuthorRange& range, const std::vector<Product>& summand,
          unsigned order, const std::vector<Need>& needs, std::string& why)
      : setting_(setting),
        range_(range),
        summand_(summand),
        order_(order),
        needs_(needs),
        why_(why) {}

  std::optional<RegionDraft> run(long threshold) {
    if (!free_needs_hold(threshold)) return std::nullopt;
    const std::vector<Affine> uppers = candidates(true);
    const std::vector<Affine> lowers = candidates(false);
    bool first = true;
    for (const Affine& high : uppers)
      for (const Affine& low : lowers) {
        std::string why;
        std::optional<RegionDraft> region = attempt(threshold, low, high, why);
        if (region) return region;
        if (first) why_ = why;
        first = false;
      }
    if (first) why_ = "the ends of the range give no affine candidate";
    return std::nullopt;
  }

 private:
  [[nodiscard]] bool free_needs_hold(long threshold) const {
    std::vector<Need> needs;
    for (const Need& need : needs_) {
      const bool form = need.nonnegative && need.nonnegative->coefficients[term::index] == 0;
      bool factor = need.nonzero.has_value();
      if (factor)
        for (const auto& [p, e] : need.nonzero->factors)
          factor = factor && !p.depends_on(term::index);
      if (form || factor) needs.push_back(need);
    }
    return all_hold(setting_, setting_.from(threshold), needs, &why_);
  }

  /// Widest first.
  [[nodiscard]] std::vector<Affine> candidates(bool upper) const {
    std::vector<Affine> out;
    const End& end = upper ? range_.high : range_.low;
    if (end.affine) add_family(out, *end.affine, upper);
    // Where steep > 1, the weaker |k| <= |bound| still bounds the support.
    for (const SupportEnd& support : support_ends(summand_, upper))
      add_family(out, support.bound, upper);
    return out;
  }

  void add_family(std::vector<Affine>& out, const Affine& bound, bool upper) const {
    const Affine here = bound;
    const Affine there = bound.shift(term::running, order_);
    const bool grows = there.constant >= here.constant;
    const Affine& widest = grows == upper ? there : here;
    const Affine& narrowest = grows == upper ? here : there;
    const long spread = std::min(std::abs(widest.constant - narrowest.constant), 8L);
    for (long c = 0; c <= spread + steps_inward; ++c)
      add_candidate(out, upper ? widest - c : widest + c);
  }

  std::optional<RegionDraft> attempt(long threshold, const Affine& low, const Affine& high,
                                     std::string& why) const {
    RegionDraft region{threshold, low, high, {}};
    if (!setting_.from(threshold).implies(high - low)) {
      why = "the common range may be empty";
      return std::nullopt;
    }
    if (!all_hold(setting_, region.facts(setting_), needs_, &why)) return std::nullopt;
    for (unsigned i = 0; i <= order_; ++i) {
      RangeDraft range;
      range.shift = i;
      bool high_known = false;
      bool low_known = false;
      if (!parallel_points(region, i, true, range.high_points, high_known, why) ||
          !parallel_points(region, i, false, range.low_points, low_known, why))
        return std::nullopt;
      if (!high_known && !settle_vanishing(region, range, true, range.above, why))
        return std::nullopt;
      if (!low_known && !settle_vanishing(region, range, false, range.below, why))
        return std::nullopt;
      region.ranges.push_back(range);
    }
    return region;
  }

  /// An author's end that stays a constant number of points beyond the common range: those points
  /// are kept explicitly, and the end is `known`.
  bool parallel_points(const RegionDraft& region, unsigned i, bool upper, unsigned& points,
                       bool& known, std::string& why) const {
    const End end = term::shift(upper ? range_.high : range_.low, term::running, i);
    const Affine& common = upper ? region.high : region.low;
    if (!end.affine || !(*end.affine - common).is_constant()) return true;
    const long beyond = upper ? (*end.affine - common).constant : (common - *end.affine).constant;
    if (beyond > most_points) {
      why = "too many points beyond the common range";
      return false;
    }
    known = beyond >= 0;
    if (known) points = static_cast<unsigned>(beyond);
    return true;
  }

  bool settle_vanishing(const RegionDraft& region, const RangeDraft& range, bool upper,
                        std::optional<VanishingDraft>& vanish, std::string& why) const {
    const End end = term::shift(upper ? range_.high : range_.low, term::running, range.shift);
    vanish = vanishing(setting_.from(region.threshold), mismatches(region, range, end, upper),
                       shifted_summand(range.shift));
    if (!vanish)
      why = upper ? "the upper end of the range is not natural and does not run parallel to it"
                  : "the lower end of the range is not natural and does not run parallel to it";
    return vanish.has_value();
  }

  /// Points in one of the two ranges (the author's; the common one with its explicit points) but
  /// not in the other, because of this end. The author's range may be empty or end before the
  /// explicit points do.
  [[nodiscard]] static std::vector<Conjunction> mismatches(const RegionDraft& region,
                                                           const RangeDraft& range, const End& end,
                                                           bool upper) {
    const Affine k = Affine::symbol(region.low.coefficients.size(), term::index);
    const Affine low = region.low - static_cast<long>(range.low_points);
    const Affine high = region.high + static_cast<long>(range.high_points);
    std::vector<Conjunction> out;
    for (Conjunction c : end.outside) {
      c.push_back(high - k);
      c.push_back(k - low);
      out.push_back(c);
    }
    for (Conjunction c : end.inside) {
      c.push_back(upper ? k - high - 1 : low - k - 1);
      out.push_back(c);
    }
    return out;
  }

  [[nodiscard]] std::vector<Product> shifted_summand(unsigned i) const {
    std::vector<Product> out;
    for (const Product& f : summand_) out.push_back(term::shift(f, term::running, i));
    return out;
  }

  const Setting& setting_;
  const AuthorRange& range_;
  const std::vector<Product>& summand_;
  unsigned order_;
  const std::vector<Need>& needs_;
  std::string& why_;
};

}  // namespace

Facts RegionDraft::facts(const Setting& setting) const {
  const Affine k = Affine::symbol(setting.size(), term::index);
  return setting.from(threshold).with(k - low).with(high - k);
}

bool all_hold(const Setting& setting, const Facts& facts, const std::vector<Need>& needs,
              std::string* failing) {
  std::vector<Affine> known;
  for (const Need& need : needs) {
    if (need.nonnegative) {
      if (std::find(known.begin(), known.end(), *need.nonnegative) != known.end()) continue;
      const bool by_base =
          need.or_nonzero && term::decide_nonzero(setting, facts, *need.or_nonzero).has_value();
      if (!by_base && !facts.implies(*need.nonnegative)) {
        if (failing != nullptr) *failing = term::text(setting, *need.nonnegative) + " >= 0";
        return false;
      }
      if (!need.or_nonzero) known.push_back(*need.nonnegative);
    }
    std::string factor;
    if (need.nonzero && !term::decide_nonzero(setting, facts, *need.nonzero, &factor)) {
      if (failing != nullptr) *failing = factor + " != 0";
      return false;
    }
  }
  return true;
}

std::vector<SupportEnd> support_ends(const std::vector<Product>& summand, bool upper) {
  std::vector<SupportEnd> out;
  for (const Product& f : summand)
    for (const auto& [atom, e] : f.atoms) {
      if (atom.kind != AtomKind::reciprocal_factorial) continue;
      const long slope = atom.argument.coefficients[term::index];
      if (slope == 0 || (slope < 0) != upper) continue;
      Affine rest = atom.argument;
      rest.coefficients[term::index] = 0;
      out.push_back({std::abs(slope), upper ? rest : -rest});
    }
  return out;
}

std::optional<VanishingDraft> vanishing(const Facts& facts, const std::vector<Conjunction>& where,
                                        const std::vector<Product>& summand) {
  VanishingDraft out;
  for (const Product& f : summand) {
    const auto found = std::find_if(f.atoms.begin(), f.atoms.end(), [&](const auto& entry) {
      if (entry.first.kind != AtomKind::reciprocal_factorial) return false;
      return std::all_of(where.begin(), where.end(), [&](const Conjunction& c) {
        return with_all(facts, c).implies(-entry.first.argument - 1);
      });
    });
    if (found == f.atoms.end()) return std::nullopt;
    out.push_back(found->first);
  }
  return out;
}

std::optional<RegionDraft> choose_region(const Setting& setting, const AuthorRange& range,
                                         const std::vector<Product>& summand, unsigned order,
                                         const std::vector<Need>& needs, long threshold,
                                         std::string& why) {
  return Chooser(setting, range, summand, order, needs, why).run(threshold);
}

}  // namespace sumwright::proof::building
