// From shift quotients to the base term: the least common denominator of F(n+i,k)/F(n,k),
// i = 0..order, taken off F. Everything stays factored; nothing is expanded here.
#include "search/base_term.hpp"

#include <stdexcept>

namespace sumwright::search {

using algebra::Factored;
using algebra::Polynomial;

Factored refined(const Factored& value) {
  Factored out;
  out.constant = value.constant;
  if (value.is_zero()) return out;
  for (const auto& [base, exponent] : value.factors) {
    out.multiply(algebra::factor(base), exponent);
  }
  return out;
}

ShiftQuotients refined(const ShiftQuotients& summand) {
  if (summand.by_index.is_zero() || summand.by_running.is_zero()) {
    throw std::invalid_argument("a shift quotient of the summand is 0");
  }
  return {refined(summand.by_running), refined(summand.by_index)};
}

std::vector<Factored> running_quotients(const ShiftQuotients& summand, std::size_t order) {
  std::vector<Factored> out(1);
  for (std::size_t i = 0; i < order; ++i) {
    Factored next = out.back();
    next.multiply(summand.by_running.shift(kRunning, static_cast<long>(i)));
    out.push_back(std::move(next));
  }
  return out;
}

BaseTerm make_base_term(const ShiftQuotients& summand, std::size_t order,
                        const algebra::Deadline& deadline) {
  BaseTerm out;
  out.numerators = running_quotients(summand, order);
  // Exponent of each factor in the common denominator: the largest any quotient needs. Denominators
  // are merged factor by factor; `lacking` is what the merged one still lacks.
  for (const Factored& quotient : out.numerators) {
    deadline.check();
    Factored lacking = quotient;
    lacking.multiply(out.denominator);
    for (const auto& [base, exponent] : lacking.factors) {
      if (exponent < 0) out.denominator.multiply(base, -exponent);
    }
    out.denominator.constant *= lacking.constant.get_den();
  }
  for (Factored& numerator : out.numerators) {
    deadline.check();
    numerator.multiply(out.denominator);
  }
  out.ratio = summand.by_index;
  out.ratio.multiply(out.denominator);
  out.ratio.multiply(out.denominator.shift(kIndex, 1), -1);
  return out;
}

}  // namespace sumwright::search
