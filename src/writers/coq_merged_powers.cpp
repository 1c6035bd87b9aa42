// From the merges that a conversion recorded to tactics that compare the two products.
//
// A nonzero base: all of its powers, on both sides, are taken apart into powers to single symbols,
// the negative ones as inverses, and `field` compares. Nothing depends on which powers met, or
// whether a merged exponent also stands in the text. A base that may be 0 has exponents >= 0 only,
// and no inverse: there the recorded merges are used, first as rules that put powers together, and
// if that does not end it, as rules that take them apart, the last merge first.

#include "writers/coq_merged_powers.hpp"

#include <fmt/format.h>

#include <map>
#include <set>
#include <vector>

#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

namespace {

using proof::AtomKind;

class MergedPowersText {
 public:
  MergedPowersText(const proof::Proof& proof, const proof::Conversion& c, const Scope& scope)
      : proof_(proof), c_(c), scope_(scope) {}

  MergedPowers run(const std::vector<const proof::Product*>& numeric) {
    nonzero_bases();
    for (const proof::Product* p : numeric)
      for (const auto& [a, e] : p->atoms)
        if (a.kind == AtomKind::power && is_constant(a.base))
          add_nonzero(power_base(a.base, scope_), "numeric_neq0");
    by_value_ = !numeric.empty();
    for (const std::string& base : order_) nonzero_base(base);
    for (std::size_t i = 0; i < c_.merges.size(); ++i)
      if (!nonzero_.contains(power_base(c_.merges[i].base, scope_))) merge(i);
    close();
    return std::move(out_);
  }

 private:
  void nonzero_bases() {
    for (const proof::PowerMerge& m : c_.merges) {
      if (m.nonzero)
        add_nonzero(power_base(m.base, scope_), nonzero_tactic(proof_, *m.nonzero, scope_));
      else if (is_constant(m.base))
        add_nonzero(power_base(m.base, scope_), "numeric_neq0");
    }
  }

  void add_nonzero(const std::string& base, const std::string& why) {
    if (nonzero_.emplace(base, why).second) order_.push_back(base);
  }

  void nonzero_base(const std::string& base) {
    const std::string name = fmt::format("base_nonzero_{}", ++bases_);
    out_.setup +=
        fmt::format("  assert ({} : ({})%K <> 0%K) by ({}).\n", name, base, nonzero_.at(base));
    out_.split += fmt::format("split_powers K {}%K {}; ", base, name);
    if (by_value_ && nonzero_.at(base) == "numeric_neq0")
      out_.split += fmt::format("rewrite ?(zpow_1_r K {}%K); ", base);
  }

  void merge(std::size_t i) {
    const proof::PowerMerge& m = c_.merges[i];
    const std::string b = power_base(m.base, scope_);
    proof::Affine total = m.first;
    for (std::size_t s = 0; s < total.coefficients.size(); ++s)
      total.coefficients[s] += m.second.coefficients[s];
    total.constant += m.second.constant;
    const auto z = [&](const proof::Affine& a) { return bracketed(affine(a, scope_)); };
    const std::string pair = fmt::format("zpow {0} {1} * zpow {0} {2}", b, z(m.first), z(m.second));
    const std::string name = fmt::format("merge{}", i + 1);
    if (is_constant(total) && total.constant == 0) {
      out_.setup += fmt::format(
          "  assert ({0} : ({1} = inj 1)%K)\n"
          "    by (rewrite <- (zpow_add K {2} {3} {4} 0); [apply (zpow_0_r K) | right; lia | "
          "lia]).\n",
          name, pair, b, z(m.first), z(m.second));
    } else {
      out_.setup += fmt::format(
          "  assert ({0} : ({1} = zpow {2} {3})%K)\n"
          "    by (symmetry; apply (zpow_add K); [right; lia | lia]).\n",
          name, pair, b, z(total));
      apart_ = fmt::format("try rewrite <- {}; ", name) + apart_;
    }
    together_ += (together_.empty() ? "" : " ") + name;
  }

  void close() {
    const std::string rules = together_.empty() ? "" : fmt::format(" [{}]", together_);
    std::string end = "ring";
    std::string after;
    if (!order_.empty()) {
      end = "field";
      after = "; nonzero_powers";
      out_.split += reciprocals();
    }
    out_.close = end + rules + after;
    if (apart_.empty()) return;
    out_.close = fmt::format("first [{0} | {1}{2}{3}]", out_.close, apart_, end, after);
  }

  /// Other inverses become variables, so that `field` asks for nothing about them.
  [[nodiscard]] std::string reciprocals() const {
    std::set<std::string> found;
    const auto collect = [&](const proof::Product& p) {
      for (const auto& [a, e] : p.atoms)
        if (a.kind == AtomKind::reciprocal) found.insert(atom(a, scope_));
    };
    for (const proof::Product& p : c_.products) collect(p);
    for (const proof::Denominator& d : c_.denominators) collect(d.reciprocal);
    std::string out;
    for (const std::string& a : found) out += fmt::format("generalize {}%K; intro; ", a);
    return out;
  }

  const proof::Proof& proof_;
  const proof::Conversion& c_;
  const Scope& scope_;
  std::map<std::string, std::string> nonzero_;  ///< base as text -> tactic
  std::vector<std::string> order_;
  std::size_t bases_ = 0;
  bool by_value_ = false;
  std::string together_;
  std::string apart_;
  MergedPowers out_;
};

}  // namespace

MergedPowers merged_powers(const proof::Proof& proof, const proof::Conversion& c,
                           const Scope& scope, const std::vector<const proof::Product*>& numeric) {
  if (c.merges.empty() && numeric.empty()) return {"", "", "ring"};
  return MergedPowersText(proof, c, scope).run(numeric);
}

}  // namespace sumwright::writers::coq
