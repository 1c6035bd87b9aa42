// A closed form to try for a sum whose recurrence is known.
#pragma once

#include <optional>
#include <string>

#include "proof/proof.hpp"

namespace sumwright::proof {

/// What an established answer to a question suggests as closed form of the sum, as claim-language
/// text: the right side itself for order 0; for order 1 with right side 0 the product of
/// S(n+1)/S(n) over n, when its factors are linear in the running variable (hypergeometric terms:
/// factorials, rising factorials, powers). A candidate, to be proved as a claim of its own; nothing
/// when none suggests itself. Order 2 and more are not tried.
[[nodiscard]] std::optional<std::string> closed_form_candidate(const Proof& question);

}  // namespace sumwright::proof
