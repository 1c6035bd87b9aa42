// GiNaC expressions from the plain polynomials of a Proof.
#pragma once

#include <ginac/ginac.h>

#include <string>
#include <vector>

#include "proof/value.hpp"

namespace sumwright::audit {

/// The symbols of a Proof as GiNaC symbols, by position.
[[nodiscard]] std::vector<GiNaC::ex> make_symbols(const std::vector<std::string>& names);

/// The polynomial at the given expressions for its symbols.
[[nodiscard]] GiNaC::ex to_ex(const proof::Polynomial& polynomial,
                              const std::vector<GiNaC::ex>& at);
/// The same for a factored polynomial; factors are not expanded.
[[nodiscard]] GiNaC::ex to_ex(const proof::Factored& factored, const std::vector<GiNaC::ex>& at);

/// The first few monomials of an expanded expression, by descending degrees, as text.
[[nodiscard]] std::string leading_monomials(const GiNaC::ex& expanded,
                                            const std::vector<GiNaC::ex>& symbols);

}  // namespace sumwright::audit
