// Gosper's and Zeilberger's algorithms on top of the key equation: orders in turn, the solution
// made canonical (coefficients coprime, last one with positive leading coefficient), the
// certificate reduced, and everything checked exactly before it is returned.
#include <stdexcept>

#include "search/base_term.hpp"
#include "search/key_solution.hpp"
#include "search/search.hpp"

namespace sumwright::search {
namespace {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using algebra::RingPtr;

// Divides `target` by `base` as often as it goes, at most `times`.
long remove_factor(Polynomial& target, const Polynomial& base, long times) {
  long done = 0;
  while (done < times && !target.is_constant()) {
    auto [quotient, exact] = target.divide(base);
    if (!exact) break;
    target = std::move(quotient);
    ++done;
  }
  return done;
}

void divide_exactly(Polynomial& target, const mpz_class& by) {
  if (by != 1) target = target.divide(Polynomial(target.ring(), by)).first;
}

// gauge * y / divisor, reduced; the divisor is free of k and has no factor in common with y. Only
// the few known factors of the gauge can cancel, so no general greatest common divisor is needed.
RationalFunction reduced_certificate(Factored gauge, Polynomial y, Polynomial divisor) {
  const RingPtr ring = y.ring();
  if (y.is_zero()) return RationalFunction(y);
  for (auto& [base, exponent] : gauge.factors) {
    if (exponent < 0) {
      exponent += remove_factor(y, base, -exponent);
    } else if (!base.depends_on(kIndex)) {
      exponent -= remove_factor(divisor, base, exponent);
    }
  }
  std::erase_if(gauge.factors, [](const auto& entry) { return entry.second == 0; });
  Polynomial above = gauge.numerator(ring) * y;
  Polynomial below = gauge.denominator(ring) * divisor;
  const mpz_class content = gcd(above.content(), below.content());
  divide_exactly(above, content);
  divide_exactly(below, content);
  return RationalFunction::from_coprime(above, below);
}

// Coefficients without common factor, the last nonzero one with positive leading coefficient.
Telescoper make_telescoper(const Factored& gauge, const KeySolution& solution) {
  Polynomial common(solution.y.ring());
  mpz_class content = 0;
  for (const Polynomial& coefficient : solution.x) {
    if (coefficient.is_zero()) continue;
    content = gcd(content, coefficient.content());
    if (!common.is_one()) common = gcd(common, coefficient);
  }
  common *= Polynomial(common.ring(), content);
  for (std::size_t i = solution.x.size(); i-- > 0;) {
    if (solution.x[i].is_zero()) continue;
    if (solution.x[i].leading_coefficient() < 0) common = -common;
    break;
  }
  Telescoper out{{}, reduced_certificate(gauge, solution.y, common)};
  for (const Polynomial& coefficient : solution.x) {
    out.coefficients.push_back(coefficient.is_zero() ? coefficient
                                                     : coefficient.divide(common).first);
  }
  return out;
}

}  // namespace

std::optional<Telescoper> find_telescoper(const RingPtr& ring, const ShiftQuotients& given_summand,
                                          const SearchOptions& options) {
  if (ring->size() < 2) throw std::invalid_argument("the ring needs variables n and k");
  const ShiftQuotients summand = refined(given_summand);
  for (unsigned order = options.min_order; order <= options.max_order; ++order) {
    options.deadline.check();
    if (options.progress) options.progress(order);
    const KeyEquation equation = make_key_equation(ring, summand, order, options.deadline);
    std::optional<Telescoper> found;
    const auto accept = [&](const KeySolution& candidate) {
      found = make_telescoper(equation.gauge, candidate);
      return verify_identity(ring, summand, found->coefficients, found->certificate).holds;
    };
    if (solve_key_equation(equation, {}, accept, options.deadline)) return found;
  }
  return std::nullopt;
}

std::optional<RationalFunction> find_certificate(const RingPtr& ring,
                                                 const ShiftQuotients& given_summand,
                                                 const std::vector<Polynomial>& coefficients,
                                                 const algebra::Deadline& deadline) {
  if (ring->size() < 2) throw std::invalid_argument("the ring needs variables n and k");
  if (coefficients.empty()) throw std::invalid_argument("no coefficients");
  for (const Polynomial& coefficient : coefficients) {
    if (coefficient.depends_on(kIndex)) throw std::invalid_argument("coefficient depends on k");
  }
  const ShiftQuotients summand = refined(given_summand);
  const KeyEquation equation = make_key_equation(ring, summand, coefficients.size() - 1, deadline);
  std::optional<RationalFunction> found;
  const auto accept = [&](const KeySolution& candidate) {
    found = reduced_certificate(equation.gauge, candidate.y, candidate.x.front());
    return verify_identity(ring, summand, coefficients, *found).holds;
  };
  if (solve_key_equation(equation, coefficients, accept, deadline)) return found;
  return std::nullopt;
}

}  // namespace sumwright::search
