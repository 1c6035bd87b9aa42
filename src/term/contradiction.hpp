// Claims about nothing: hypotheses that no values of the parameters satisfy.
#pragma once

#include "term/setting.hpp"

namespace sumwright::term {

/// Throws claim::InputError when the hypotheses are seen to be contradictory: by linear arithmetic
/// with integer tightening, by a condition u != v between equal sides, or because none of the
/// finitely many integer values that are left satisfies them. Not every contradiction is seen.
void refuse_contradiction(const Setting& setting);

}  // namespace sumwright::term
