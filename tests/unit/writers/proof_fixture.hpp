// Two small proofs written by hand, so that writers can be tested without the stages before them.
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers::fixture {

/// Shorthand: term(3, {2, 1}) is 3*n^2*k when the symbols are n and k.
[[nodiscard]] proof::Polynomial polynomial(
    const std::vector<std::pair<long, std::vector<unsigned long>>>& terms);
[[nodiscard]] proof::Affine affine(std::vector<long> coefficients, long constant);

/// sum over k of binomial(n, k)^2 = binomial(2*n, n): natural ends, one class of similar terms.
[[nodiscard]] proof::Proof squares();

/// sum over k of binomial(n + k, k)/2^k = 2^n: the upper end is not natural, two classes.
[[nodiscard]] proof::Proof halves();

/// A claim read from a text; for proofs whose argument does not matter.
[[nodiscard]] proof::Proof bare(const std::string& claim_text);

}  // namespace sumwright::writers::fixture
