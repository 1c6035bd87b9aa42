// Matching factorial constants of one linear part.
// Laws: fact moves down (to smaller constants), rfact moves up; a pair fact(c) rfact(d), d <= c, is
// a polynomial and may be cancelled; a pair fact(c) rfact(c) may be inserted.

#include "proof/alignment.hpp"

#include <algorithm>

namespace sumwright::proof::building {
namespace {

/// Cancels up to `wanted` pairs, smallest gap first.
std::vector<std::pair<long, long>> cancel(FactorialConstants& part, std::size_t wanted) {
  std::vector<std::pair<long, long>> out;
  while (out.size() < wanted) {
    bool found = false;
    std::size_t best_f = 0;
    std::size_t best_r = 0;
    for (std::size_t f = 0; f < part.fact.size(); ++f)
      for (std::size_t r = 0; r < part.rfact.size(); ++r) {
        const long gap = part.fact[f] - part.rfact[r];
        if (gap < 0) continue;
        if (!found || gap < part.fact[best_f] - part.rfact[best_r]) {
          found = true;
          best_f = f;
          best_r = r;
        }
      }
    if (!found) break;
    out.emplace_back(part.fact[best_f], part.rfact[best_r]);
    part.fact.erase(part.fact.begin() + static_cast<long>(best_f));
    part.rfact.erase(part.rfact.begin() + static_cast<long>(best_r));
  }
  return out;
}

}  // namespace

FactorialConstants common_constants(const std::vector<FactorialConstants>& parts) {
  std::size_t facts = 0;
  for (FactorialConstants part : parts) {
    cancel(part, part.fact.size());
    facts = std::max(facts, part.fact.size());
  }
  FactorialConstants base;
  bool first = true;
  std::vector<FactorialConstants> reduced;
  for (FactorialConstants part : parts) {
    if (part.fact.size() > facts) cancel(part, part.fact.size() - facts);
    if (part.fact.size() == facts) {
      if (first) {
        base = part;
        first = false;
      }
      for (std::size_t i = 0; i < facts; ++i) base.fact[i] = std::min(base.fact[i], part.fact[i]);
      for (std::size_t i = 0; i < base.rfact.size(); ++i)
        base.rfact[i] = std::max(base.rfact[i], part.rfact[i]);
    }
    reduced.push_back(std::move(part));
  }
  // Products with fewer factorials get units inserted at the lowest places; what they then have
  // must not lie below the base, and their reciprocal factorials must reach as high as the units.
  const auto with_units = [&](const FactorialConstants& part, const std::vector<long>& own) {
    std::vector<long> out = own;
    out.insert(out.end(), base.fact.begin(),
               base.fact.begin() + static_cast<long>(facts - part.fact.size()));
    std::sort(out.begin(), out.end());
    return out;
  };
  for (bool changed = true; changed;) {
    changed = false;
    for (const FactorialConstants& part : reduced) {
      if (part.fact.size() >= facts) continue;
      const std::vector<long> have = with_units(part, part.fact);
      for (std::size_t i = 0; i < facts; ++i) {
        changed = changed || have[i] < base.fact[i];
        base.fact[i] = std::min(base.fact[i], have[i]);
      }
    }
  }
  for (const FactorialConstants& part : reduced) {
    if (part.fact.size() >= facts) continue;
    const std::vector<long> have = with_units(part, part.rfact);
    for (std::size_t i = 0; i < base.rfact.size(); ++i)
      base.rfact[i] = std::max(base.rfact[i], have[i]);
  }
  return base;
}

std::optional<Alignment> align(const FactorialConstants& given, const FactorialConstants& base) {
  FactorialConstants part = given;
  Alignment out;
  if (static_cast<long>(part.fact.size()) - static_cast<long>(part.rfact.size()) !=
      static_cast<long>(base.fact.size()) - static_cast<long>(base.rfact.size()))
    return std::nullopt;
  if (part.fact.size() > base.fact.size()) {
    const std::size_t wanted = part.fact.size() - base.fact.size();
    out.cancelled = cancel(part, wanted);
    if (out.cancelled.size() < wanted) return std::nullopt;
  }
  for (std::size_t i = 0; part.fact.size() < base.fact.size(); ++i) {
    const long c = base.fact[i];
    out.inserted.push_back(c);
    part.fact.push_back(c);
    part.rfact.push_back(c);
  }
  std::sort(part.fact.begin(), part.fact.end());
  std::sort(part.rfact.begin(), part.rfact.end());
  for (std::size_t i = 0; i < base.fact.size(); ++i) {
    if (part.fact[i] < base.fact[i]) return std::nullopt;
    out.fact.emplace_back(part.fact[i], base.fact[i]);
  }
  for (std::size_t i = 0; i < base.rfact.size(); ++i) {
    if (part.rfact[i] > base.rfact[i]) return std::nullopt;
    out.rfact.emplace_back(part.rfact[i], base.rfact[i]);
  }
  return out;
}

}  // namespace sumwright::proof::building
