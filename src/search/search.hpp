// Finding a recurrence and its certificate for a hypergeometric summand in one index:
// Gosper's algorithm (order 0) and Zeilberger's algorithm (orders 1, 2, ...), minimal order first.
// R. W. Gosper, Decision procedure for indefinite hypergeometric summation, PNAS 75 (1978);
// D. Zeilberger, The method of creative telescoping, J. Symbolic Comput. 11 (1991).
#pragma once

#include <functional>
#include <optional>
#include <vector>

#include "algebra/limits.hpp"
#include "algebra/polynomial.hpp"
#include "algebra/rational_function.hpp"

namespace sumwright::search {

/// A summand F(n, k) known by its shift quotients: rational functions in a ring whose variable 0 is
/// the running variable n, variable 1 the index k, the rest parameters.
struct ShiftQuotients {
  algebra::Factored by_running;  ///< F(n+1,k) / F(n,k)
  algebra::Factored by_index;    ///< F(n,k+1) / F(n,k)
};

/// sum_i coefficients[i] F(n+i,k) = G(n,k+1) - G(n,k), G = certificate * F, as rational functions
/// after division by F. Coefficients are polynomials free of k, coprime, the last nonzero with
/// leading coefficient > 0.
struct Telescoper {
  std::vector<algebra::Polynomial> coefficients;
  algebra::RationalFunction certificate;
};

struct SearchOptions {
  unsigned min_order = 0;
  unsigned max_order = 8;
  algebra::Deadline deadline;
  std::function<void(unsigned order)> progress;  ///< called as each order is begun
};

/// The telescoper of least order in [min_order, max_order], or nothing when none exists there.
/// Order 0 with F free of n is Gosper's indefinite summation (coefficients = [a(n)]).
/// The result has been verified exactly. Throws algebra::TimeUp.
[[nodiscard]] std::optional<Telescoper> find_telescoper(const algebra::RingPtr& ring,
                                                        const ShiftQuotients& summand,
                                                        const SearchOptions& options);

/// Gosper's algorithm for a given operator: a certificate for the given coefficients, or nothing
/// when sum_i coefficients[i] F(n+i,k) is not Gosper-summable in k.
[[nodiscard]] std::optional<algebra::RationalFunction> find_certificate(
    const algebra::RingPtr& ring, const ShiftQuotients& summand,
    const std::vector<algebra::Polynomial>& coefficients, const algebra::Deadline& deadline);

/// Whether the telescoping identity holds exactly; the residue (a polynomial that would have to be
/// 0: left minus right over a common denominator) otherwise.
struct IdentityCheck {
  bool holds = false;
  algebra::Polynomial residue;
};
[[nodiscard]] IdentityCheck verify_identity(const algebra::RingPtr& ring,
                                            const ShiftQuotients& summand,
                                            const std::vector<algebra::Polynomial>& coefficients,
                                            const algebra::RationalFunction& certificate);

}  // namespace sumwright::search
