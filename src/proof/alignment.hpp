// How the factorials of one linear part are matched between a product and a base.
#pragma once

#include <optional>
#include <vector>

namespace sumwright::proof::building {

/// Constants c of fact(lambda + c) and rfact(lambda + c), with multiplicity, sorted ascending.
struct FactorialConstants {
  std::vector<long> fact;
  std::vector<long> rfact;
};

/// The matching of a product to a base: pairs (from, to) of constants; `cancelled` pairs
/// fact(c) rfact(d), d <= c, that leave the product; constants c of inserted fact(c) rfact(c).
struct Alignment {
  std::vector<std::pair<long, long>> fact;
  std::vector<std::pair<long, long>> rfact;
  std::vector<std::pair<long, long>> cancelled;
  std::vector<long> inserted;
};

/// The smallest common form of several similar factorial parts (all differences of counts equal).
[[nodiscard]] FactorialConstants common_constants(const std::vector<FactorialConstants>& parts);

/// Nothing when the base is not reachable by the laws.
[[nodiscard]] std::optional<Alignment> align(const FactorialConstants& part,
                                             const FactorialConstants& base);

}  // namespace sumwright::proof::building
