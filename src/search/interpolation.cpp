// Interpolation modulo a prime: Lagrange's formula written as a matrix, and Cauchy's problem
// (rational interpolation) by Euclid's algorithm; J. von zur Gathen and J. Gerhard, Modern Computer
// Algebra, section 5.8; the largest-quotient rule after M. Monagan (ISSAC 2004).
#include "search/interpolation.hpp"

#include <algorithm>

namespace sumwright::search {
namespace {

void trim(WordVector& a) {
  while (!a.empty() && a.back() == 0) a.pop_back();
}

// a := a - quotient * b for the division of a by b (b not zero); returns the quotient.
WordVector divide(const Field& field, WordVector& a, const WordVector& b) {
  WordVector quotient;
  if (a.size() < b.size()) return quotient;
  quotient.assign(a.size() - b.size() + 1, 0);
  const Word inverse = field.inverse(b.back());
  for (std::size_t at = quotient.size(); at-- > 0;) {
    const Word multiple = field.mul(a[at + b.size() - 1], inverse);
    quotient[at] = multiple;
    if (multiple == 0) continue;
    for (std::size_t j = 0; j < b.size(); ++j) {
      a[at + j] = field.sub(a[at + j], field.mul(multiple, b[j]));
    }
  }
  trim(a);
  return quotient;
}

void subtract_product(const Field& field, WordVector& a, const WordVector& b, const WordVector& c) {
  if (b.empty() || c.empty()) return;
  a.resize(std::max(a.size(), b.size() + c.size() - 1), 0);
  for (std::size_t i = 0; i < b.size(); ++i) {
    for (std::size_t j = 0; j < c.size(); ++j) {
      a[i + j] = field.sub(a[i + j], field.mul(b[i], c[j]));
    }
  }
  trim(a);
}

}  // namespace

WordVector master_polynomial(const Field& field, const WordVector& points) {
  WordVector out = {1};
  for (const Word point : points) {
    out.push_back(0);
    for (std::size_t i = out.size() - 1; i > 0; --i) {
      out[i] = field.sub(out[i - 1], field.mul(point, out[i]));
    }
    out[0] = field.neg(field.mul(point, out[0]));
  }
  return out;
}

std::vector<WordVector> interpolation_matrix(const Field& field, const WordVector& points) {
  const std::size_t count = points.size();
  const WordVector master = master_polynomial(field, points);
  std::vector<WordVector> out(count, WordVector(count));
  WordVector weights(count);
  for (std::size_t j = 0; j < count; ++j) {
    // master / (z - point), by Horner; its value at the point is the weight's inverse.
    Word carry = 0;
    Word value = 0;
    for (std::size_t i = count; i-- > 0;) {
      carry = field.add(master[i + 1], field.mul(carry, points[j]));
      out[i][j] = carry;
      value = field.add(field.mul(value, points[j]), carry);
    }
    weights[j] = value;
  }
  if (!field.invert_all(weights)) return out;  // not for distinct points
  for (WordVector& row : out) {
    for (std::size_t j = 0; j < count; ++j) row[j] = field.mul(row[j], weights[j]);
  }
  return out;
}

std::optional<ModularFraction> recover_fraction(const Field& field, const WordVector& master,
                                                WordVector interpolant) {
  trim(interpolant);
  WordVector r0 = master;
  WordVector r1 = std::move(interpolant);
  WordVector t0;
  WordVector t1 = {1};
  std::size_t best = 1;
  std::optional<ModularFraction> out;
  while (true) {
    // A remainder 0 stands for the fraction 0 only at the start; later its cofactor just collects
    // the points where the interpolant vanishes.
    if (r1.empty() && t1.size() > 1) break;
    const std::size_t gain = r0.size() - r1.size();
    if (gain > best) {
      best = gain;
      out = ModularFraction{r1, t1};
    }
    if (r1.size() <= best) break;  // no later quotient can be larger
    const WordVector quotient = divide(field, r0, r1);
    subtract_product(field, t0, quotient, t1);
    std::swap(r0, r1);
    std::swap(t0, t1);
  }
  if (!out) return out;
  const Word scale = field.inverse(out->denominator.back());
  for (Word& entry : out->numerator) entry = field.mul(entry, scale);
  for (Word& entry : out->denominator) entry = field.mul(entry, scale);
  return out;
}

WordVector multiply(const Field& field, const WordVector& a, const WordVector& b) {
  if (a.empty() || b.empty()) return {};
  WordVector out(a.size() + b.size() - 1, 0);
  for (std::size_t i = 0; i < a.size(); ++i) {
    for (std::size_t j = 0; j < b.size(); ++j) {
      out[i + j] = field.add(out[i + j], field.mul(a[i], b[j]));
    }
  }
  return out;
}

Word evaluate(const Field& field, const WordVector& polynomial, Word at) {
  Word out = 0;
  for (std::size_t i = polynomial.size(); i-- > 0;) {
    out = field.add(field.mul(out, at), polynomial[i]);
  }
  return out;
}

}  // namespace sumwright::search
