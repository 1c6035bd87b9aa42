// From a factored shift quotient to a/b * c(k+1)/c(k). Irreducible factors are compared directly:
// f(k) = g(k+h) fixes h by the two leading coefficients in k, so no resultant is needed.
#include "search/gosper_form.hpp"

#include <algorithm>
#include <map>
#include <optional>

#include "search/base_term.hpp"

namespace sumwright::search {
namespace {

using algebra::Factored;
using algebra::Polynomial;

constexpr long kMaxShiftDegree = 20000;  // of c in k

struct IndexFactor {
  Polynomial base;
  long exponent;
  long degree;
  Polynomial lead;    // coefficient of k^degree
  Polynomial second;  // coefficient of k^(degree - 1)
};

std::vector<IndexFactor> index_factors(const Factored& ratio, int sign) {
  std::vector<IndexFactor> out;
  for (const auto& [base, exponent] : ratio.factors) {
    if (exponent * sign <= 0 || !base.depends_on(kIndex)) continue;
    const auto parts = base.coefficients_in(kIndex);
    out.push_back(
        {base, exponent * sign, base.degree(kIndex), parts.back(), parts[parts.size() - 2]});
  }
  return out;
}

// The integer h with f(k) = g(k+h), if there is one.
std::optional<long> spacing(const IndexFactor& f, const IndexFactor& g) {
  if (f.degree != g.degree || !(f.lead == g.lead)) return std::nullopt;
  const Polynomial scale = Polynomial(f.base.ring(), f.degree) * f.lead;
  const auto [quotient, exact] = (f.second - g.second).divide(scale);
  if (!exact || !quotient.is_constant()) return std::nullopt;
  const mpz_class h = quotient.constant();
  if (!h.fits_slong_p()) return std::nullopt;
  if (!(g.base.shift(kIndex, h.get_si()) == f.base)) return std::nullopt;
  return h.get_si();
}

}  // namespace

GosperForm gosper_form(const Factored& ratio, const algebra::Deadline& deadline) {
  auto above = index_factors(ratio, 1);
  auto below = index_factors(ratio, -1);
  std::multimap<long, std::pair<std::size_t, std::size_t>> pairs;  // by h, ascending
  for (std::size_t i = 0; i < above.size(); ++i) {
    deadline.check();
    for (std::size_t j = 0; j < below.size(); ++j) {
      const auto h = spacing(above[i], below[j]);
      if (h && *h > 0) pairs.insert({*h, {i, j}});
    }
  }
  GosperForm out;
  long degree = 0;
  Factored rest = ratio;
  for (const auto& [h, pair] : pairs) {
    IndexFactor& f = above[pair.first];
    IndexFactor& g = below[pair.second];
    const long common = std::min(f.exponent, g.exponent);
    if (common == 0) continue;
    f.exponent -= common;
    g.exponent -= common;
    rest.multiply(f.base, -common);
    rest.multiply(g.base, common);
    if (h > kMaxShiftDegree || (degree += h * f.degree * common) > kMaxShiftDegree) {
      throw algebra::TimeUp("size limit reached: factors at a large integer distance");
    }
    // f(k)/f(k-h) = c(k+1)/c(k) with c = f(k-1) ... f(k-h).
    for (long j = 1; j <= h; ++j) out.c.multiply(f.base.shift(kIndex, -j), common);
    deadline.check();
  }
  out.a.constant = rest.constant.get_num();
  out.b.constant = rest.constant.get_den();
  for (const auto& [base, exponent] : rest.factors) {
    if (exponent > 0) out.a.multiply(base, exponent);
    if (exponent < 0) out.b.multiply(base, -exponent);
  }
  return out;
}

}  // namespace sumwright::search
