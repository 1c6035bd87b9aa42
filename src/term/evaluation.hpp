// Exact values of a claim's expressions at integer points, by the meaning of the claim format.
#pragma once

#include <gmpxx.h>

#include <map>
#include <optional>
#include <string>
#include <vector>

#include "algebra/limits.hpp"
#include "claim/claim.hpp"

namespace sumwright::term {

/// Values of symbols; integer symbols hold integers.
using Assignment = std::map<std::string, mpq_class>;

/// A number, or the reason why there is none ("division by 0", "factorial of -1", ...) and its
/// place. A product with a factor 0 is 0 even where a factorial, rising or falling beside it has no
/// value; a division by zero never has a value.
struct Value {
  std::optional<mpq_class> number;
  std::string why_not;
  claim::Place place;
};

/// Value of `expression`. Throws algebra::TimeUp; std::length_error when numbers grow past
/// `max_bits`.
[[nodiscard]] Value evaluate(const claim::Expression& expression, const Assignment& at);

/// Value of the sum at the assignment (running variable and parameters).
/// Finite ranges only; more than `max_terms` terms: std::length_error.
[[nodiscard]] Value evaluate_sum(const claim::Sum& sum, const Assignment& at,
                                 std::size_t max_terms = 20000);

/// A bound's value at an assignment (finite bounds).
[[nodiscard]] mpz_class evaluate_bound(const claim::Expression& bound, const Assignment& at);

/// A point where the two sides of something differ or one has no value.
struct Difference {
  std::vector<std::pair<std::string, mpq_class>>
      at;  ///< running first, then index, then parameters
  Value left;
  Value right;
};

/// Parameter assignments that satisfy `not`, `at_least` and `assume` (with the running variable set
/// by the caller), small values first, deterministic; includes boundary values (at_least itself, 0,
/// 1, -1, 1/2, ...). Empty result only if none was found within the search box.
[[nodiscard]] std::vector<Assignment> sample_parameters(const claim::Claim& claim,
                                                        std::size_t count);

/// Whether the assignment (running variable included when the assumption names it) satisfies every
/// hypothesis of the claim.
[[nodiscard]] bool satisfies_hypotheses(const claim::Claim& claim, const Assignment& at);

/// The left and right side of the claim (equality: the sum and the closed form; recurrence claim:
/// sum_i a_i S(n+i) and b, denominators of the coefficients cleared) at an assignment.
struct Sides {
  Value left;
  Value right;
};
[[nodiscard]] Sides evaluate_sides(const claim::Claim& claim, const Assignment& at);

/// The first point (smallest n first) with from <= n < from + span at which the claim fails, over
/// `samples` parameter assignments, plus the extra n in `also`. Nothing when none fails.
[[nodiscard]] std::optional<Difference> refute(const claim::Claim& claim, long span,
                                               std::size_t samples,
                                               const std::vector<mpz_class>& also,
                                               const algebra::Deadline& deadline);

/// A point (n, k, parameters) at which sum_i a_i F(n+i,k) and G(n,k+1) - G(n,k), G = R F, both have
/// values and differ; for evidence that has been shown wrong. Searches a growing box.
[[nodiscard]] std::optional<Difference> refute_certificate(
    const claim::Claim& claim, const std::vector<claim::ExpressionPtr>& recurrence,
    const claim::Expression& certificate, const algebra::Deadline& deadline);

}  // namespace sumwright::term
