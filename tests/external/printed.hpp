// What the program prints for a claim file: its proved recurrence, read back as a reader would.
#pragma once

#include <memory>
#include <string>
#include <vector>

#include "claim/claim.hpp"
#include "external/balls.hpp"

namespace sumwright::testing {

/// sum_i coefficients[i](n) S(n+i) = right_side(n)
struct Recurrence {
  std::string how;  ///< "claimed" or "found", and the text, for messages
  std::vector<claim::ExpressionPtr> coefficients;
  claim::ExpressionPtr right_side;  ///< null: 0

  /// Exact values of the coefficients.
  [[nodiscard]] std::vector<mpq_class> coefficients_at(const Values& at) const;
};

struct Printed {
  std::shared_ptr<const claim::Claim> claim;  ///< as its author wrote it
  /// The recurrence of the claim as it stands (the author's, or found for the equality), and the
  /// one that is found when everything but the sum is taken away.
  std::vector<Recurrence> recurrences;
};

/// Reads the claim file (a path from the top of the sources) and decides it twice. Throws
/// std::runtime_error unless both are established.
[[nodiscard]] Printed printed_for(const std::string& file);

}  // namespace sumwright::testing
