// Where the telescoping identity is summed: the common range of the index, the points left over,
// and the threshold (design, rules R1 and R5).
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/similarity.hpp"
#include "term/setting.hpp"

namespace sumwright::proof::building {

/// Why F(n+i, k) is 0 beyond an end: per product of F an rfact with a negative argument.
using VanishingDraft = std::vector<term::Atom>;

struct RangeDraft {
  unsigned shift = 0;
  unsigned low_points = 0;
  unsigned high_points = 0;
  std::optional<VanishingDraft> below;
  std::optional<VanishingDraft> above;
};

struct RegionDraft {
  long threshold = 0;
  term::Affine low;
  term::Affine high;
  std::vector<RangeDraft> ranges;  ///< one per shift 0..order

  /// Hypotheses, n >= threshold, low <= k <= high.
  [[nodiscard]] term::Facts facts(const term::Setting& setting) const;
};

/// The author's range.
struct AuthorRange {
  term::End low;
  term::End high;
};

/// Whether every need follows from the facts; `failing` gets the text of the first that does not.
[[nodiscard]] bool all_hold(const term::Setting& setting, const term::Facts& facts,
                            const std::vector<Need>& needs, std::string* failing);

/// The widest common range on which `needs` hold for all n >= threshold, threshold >= least.
[[nodiscard]] std::optional<RegionDraft> choose_region(const term::Setting& setting,
                                                       const AuthorRange& range,
                                                       const std::vector<term::Product>& summand,
                                                       unsigned order,
                                                       const std::vector<Need>& needs,
                                                       long threshold, std::string& why);

/// An end of a product's support, from a reciprocal factorial: steep * k <= bound for an upper end,
/// steep * k >= bound for a lower one; steep > 0, the bound free of the index.
struct SupportEnd {
  long steep = 1;
  term::Affine bound;
};
[[nodiscard]] std::vector<SupportEnd> support_ends(const std::vector<term::Product>& summand,
                                                   bool upper);

/// Per product an rfact atom that is negative on each of the alternatives; nothing when some
/// product has none.
[[nodiscard]] std::optional<VanishingDraft> vanishing(const term::Facts& facts,
                                                      const std::vector<term::Conjunction>& where,
                                                      const std::vector<term::Product>& summand);

}  // namespace sumwright::proof::building
