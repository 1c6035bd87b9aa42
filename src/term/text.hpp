// Terms as text of the claim language, so that what Sumwright finds can be read back as a claim.
#pragma once

#include <string>

#include "term/product.hpp"
#include "term/setting.hpp"

namespace sumwright::term {

/// rational * product as an expression of the claim language (factorials, rising factorials,
/// powers).
[[nodiscard]] std::string claim_text(const algebra::Factored& rational, const Product& product);

/// A rational function in factored form as claim text: "k^2*(2*k - 3*n - 3)/(n - k + 1)^2".
[[nodiscard]] std::string claim_text(const algebra::Factored& rational);

}  // namespace sumwright::term
