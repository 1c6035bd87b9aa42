// Values of the parts of the telescoping argument at points.
#pragma once

#include "audit/context.hpp"
#include "audit/numbers.hpp"

namespace sumwright::audit {

/// F(n+shift, k): the author's summand where k is in the author's range at n+shift, else the
/// products of the summand's Conversion.
[[nodiscard]] Value shifted_term(Context& context, const Place& place, long shift);
/// The sum of the products of a Conversion with the running variable moved by `shift`.
[[nodiscard]] Value products_at(const Context& context, const proof::Conversion& conversion,
                                const Place& place, long shift = 0);

/// q1 B = up c(n,k+1) B at (n, k).
[[nodiscard]] Value upper_part(const Context& context, const Place& place);
/// q0 B = down c(n,k) B at (n, k).
[[nodiscard]] Value lower_part(const Context& context, const Place& place);

}  // namespace sumwright::audit
