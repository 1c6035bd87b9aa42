// Reads back the texts that a Proof shows to people, so that they can be evaluated.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "audit/numbers.hpp"
#include "claim/expression.hpp"
#include "proof/value.hpp"

namespace sumwright::audit {

/// An expression of the claim language. Null when the text is none, or has a symbol that is not
/// listed.
[[nodiscard]] claim::ExpressionPtr read_expression(const std::string& text,
                                                   const std::vector<std::string>& symbols);

/// "left sign right" with sign <=, <, >=, >, != or =; chains "0 <= k <= n" give several.
struct ReadComparison {
  claim::ExpressionPtr left;
  std::string sign;
  claim::ExpressionPtr right;
};
/// Whether it holds at a point; nothing when a side has no value there. Throws TooLarge.
[[nodiscard]] std::optional<bool> holds(const ReadComparison& comparison, const Point& at);

/// Comparisons joined by commas or "and"; empty when some part is not one.
[[nodiscard]] std::vector<ReadComparison> read_comparisons(const std::string& text,
                                                           const std::vector<std::string>& symbols);

/// A region as data and as text: it contains a point when both say so.
class Domain {
 public:
  /// Keeps a reference to the region.
  Domain(const proof::Region& region, const std::vector<std::string>& symbols);
  [[nodiscard]] bool contains(const Point& at) const;
  /// Whether there is anything that delimits it: forms, or a text that could be read.
  [[nodiscard]] bool delimited() const;

 private:
  const proof::Region& region_;
  std::vector<ReadComparison> text_;
};

}  // namespace sumwright::audit
