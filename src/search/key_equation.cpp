// From the base term's Gosper form to the key equation, and the bound of the degree of y in k.
// Bound: A = B (1996), section 5.4. Leading coefficients are compared as factored polynomials in
// the other variables; the delicate case needs the two leading coefficients only.
#include "search/key_equation.hpp"

#include <algorithm>

#include "algebra/rational_function.hpp"
#include "search/gosper_form.hpp"

namespace sumwright::search {
namespace {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using algebra::RingPtr;

constexpr long kMaxDegree = 100000;

// Coefficient of the highest power of k, canonical: equal polynomials give equal values.
Factored leading_in_index(const Factored& value) {
  Factored out;
  out.constant = value.constant;
  for (const auto& [base, exponent] : value.factors) {
    const Polynomial lead = base.depends_on(kIndex) ? base.coefficients_in(kIndex).back() : base;
    out.multiply(algebra::factor(lead), exponent);
  }
  return out;
}

bool equal(const Factored& a, const Factored& b) {
  Factored quotient = a;
  quotient.multiply(b, -1);
  return quotient.factors.empty() && quotient.constant == 1;
}

// Second over leading coefficient in k: the sum over the factors of the same quotient.
RationalFunction second_over_leading(const RingPtr& ring, const Factored& value) {
  RationalFunction sum(ring, mpq_class(0));
  for (const auto& [base, exponent] : value.factors) {
    if (!base.depends_on(kIndex)) continue;
    const auto parts = base.coefficients_in(kIndex);
    sum =
        sum + RationalFunction(Polynomial(ring, exponent) * parts[parts.size() - 2], parts.back());
  }
  return sum;
}

// With up and down of equal degree and leading coefficient l, the coefficient of k^(deg y + deg -
// 1) on the left is l * (deg y + u - d), u and d the second-over-leading quotients: it vanishes
// when deg y = d - u, which must be an integer >= 0 (free of n and the parameters).
std::optional<long> exceptional_degree(const KeyEquation& equation) {
  const RationalFunction difference = second_over_leading(equation.ring, equation.down) -
                                      second_over_leading(equation.ring, equation.up);
  if (!difference.is_polynomial() || !difference.numerator().is_constant()) return std::nullopt;
  const mpz_class value = difference.numerator().constant();
  if (value < 0) return std::nullopt;
  if (value > kMaxDegree) throw algebra::TimeUp("size limit reached: degree of the certificate");
  return value.get_si();
}

void set_degrees(KeyEquation& equation) {
  const long up = index_degree(equation.up);
  const long down = index_degree(equation.down);
  long right = 0;
  for (const Factored& column : equation.columns) right = std::max(right, index_degree(column));
  const long left = std::max(up, down);
  const bool delicate =
      up == down && equal(leading_in_index(equation.up), leading_in_index(equation.down));
  equation.degree = right - left + (delicate ? 1 : 0);
  if (delicate) {
    equation.homogeneous_degree = exceptional_degree(equation);
    equation.degree = std::max(equation.degree, equation.homogeneous_degree.value_or(-1));
  }
  equation.degree = std::max(equation.degree, -1L);
  equation.equation_degree = std::max(right, left + equation.degree);
  if (equation.equation_degree > kMaxDegree) {
    throw algebra::TimeUp("size limit reached: degree of the key equation");
  }
}

}  // namespace

long index_degree(const Factored& value) {
  long degree = 0;
  for (const auto& [base, exponent] : value.factors) degree += exponent * base.degree(kIndex);
  return degree;
}

KeyEquation make_key_equation(const RingPtr& ring, const ShiftQuotients& summand, std::size_t order,
                              const algebra::Deadline& deadline) {
  BaseTerm term = make_base_term(summand, order, deadline);
  const GosperForm form = gosper_form(term.ratio, deadline);
  KeyEquation out;
  out.ring = ring;
  out.up = form.a;
  out.down = form.b.shift(kIndex, -1);
  out.columns = std::move(term.numerators);
  for (Factored& column : out.columns) column.multiply(form.c);
  out.gauge = out.down;
  out.gauge.multiply(form.c, -1);
  out.gauge.multiply(term.denominator, -1);
  set_degrees(out);
  return out;
}

}  // namespace sumwright::search
