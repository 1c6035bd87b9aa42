// The key equation at one point modulo a prime: from factored coefficients to value tables,
// from the recursion to a small linear system, from its kernel to one normalised solution.
#include "search/key_image.hpp"

#include <algorithm>
#include <stdexcept>

#include "search/interpolation.hpp"

namespace sumwright::search {

using algebra::Factored;
using algebra::Polynomial;

namespace {

constexpr long kMaxSolvedDegree = 6000;             // of y in k
constexpr std::size_t kMaxTableEntries = 20000000;  // factor values at one point

}  // namespace

std::optional<std::size_t> SolutionPattern::unit_column() const {
  for (std::size_t i = free.size(); i-- > 1;) {
    if (free[i]) return i;
  }
  return std::nullopt;
}

KeyImage::KeyImage(const KeyEquation& equation, const std::vector<Polynomial>& given,
                   const Field& field, Word start)
    : equation_(equation), field_(field), start_(start) {
  up_ = compile(equation.up);
  down_ = compile(equation.down);
  for (const Factored& column : equation.columns) columns_.push_back(compile(column));
  for (const Polynomial& coefficient : given) given_.push_back(compile(coefficient));
  prepare_differences();
}

KeyImage::Terms KeyImage::compile(const Polynomial& value) const {
  Terms out;
  for (auto& term : value.to_terms()) {
    const Word size = mpz_fdiv_ui(term.coefficient.get_mpz_t(), field_.prime());
    out.push_back({size, std::move(term.exponents)});
  }
  return out;
}

KeyImage::Product KeyImage::compile(const Factored& value) {
  Product out;
  out.constant = mpz_fdiv_ui(value.constant.get_num_mpz_t(), field_.prime());
  for (const auto& [base, exponent] : value.factors) {
    std::size_t at = 0;
    while (at < bases_.size() && !(bases_[at] == base)) ++at;
    if (at == bases_.size()) {
      bases_.push_back(base);
      factors_.push_back(compile(base));
    }
    out.factors.emplace_back(at, exponent);
  }
  return out;
}

// Weights (-1)^(d+1-j) binomial(d+1, j) of the (d+1)-th difference.
void KeyImage::prepare_differences() {
  const auto order = static_cast<std::size_t>(equation_.degree + 1);
  WordVector inverses;
  for (std::size_t j = 1; j <= order; ++j) inverses.push_back(j);
  if (!field_.invert_all(inverses)) throw std::logic_error("prime below the degree");
  differences_.assign(order + 1, 1);
  for (std::size_t j = 1; j <= order; ++j) {
    const Word step = field_.mul(inverses[j - 1], order + 1 - j);
    differences_[j] = field_.mul(differences_[j - 1], step);
  }
  for (std::size_t j = 0; j <= order; ++j) {
    if ((order - j) % 2 == 1) differences_[j] = field_.neg(differences_[j]);
  }
}

// From values at start_, start_ + 1, ... to coefficients of powers of k.
void KeyImage::prepare_interpolation() {
  if (!to_powers_.empty()) return;
  if (equation_.degree > kMaxSolvedDegree) {
    throw algebra::TimeUp("size limit reached: degree of the certificate");
  }
  WordVector points;
  for (long j = 0; j <= equation_.degree; ++j) {
    points.push_back(field_.add(start_, static_cast<Word>(j)));
  }
  to_powers_ = interpolation_matrix(field_, points);
}

std::size_t KeyImage::full_rows() const {
  // Recursion steps K = equation_degree + 1 make the identity hold at more points than its degree;
  // K + 1 values have K - degree differences of order degree + 1.
  return static_cast<std::size_t>(equation_.equation_degree + 1 - equation_.degree);
}

std::size_t KeyImage::few_rows() const {
  return (given_.empty() ? columns_.size() : 1) + 2;  // unknowns, and one more as a check
}

// Coefficients in k of a polynomial at a point.
WordVector KeyImage::value_of(const Terms& terms, const WordVector& point) const {
  WordVector out;
  for (const Term& term : terms) {
    Word value = term.coefficient;
    for (std::size_t v = 0; v < point.size(); ++v) {
      if (v == kIndex || term.exponents[v] == 0) continue;
      value = field_.mul(value, field_.power(point[v], term.exponents[v]));
    }
    const std::size_t at = term.exponents[kIndex];
    if (at >= out.size()) out.resize(at + 1, 0);
    out[at] = field_.add(out[at], value);
  }
  return out;
}

void KeyImage::fill_values(const WordVector& point, std::size_t count) {
  if (factors_.size() * count > kMaxTableEntries) {
    throw algebra::TimeUp("size limit reached: factors of the key equation");
  }
  tables_.resize(factors_.size());
  for (std::size_t f = 0; f < factors_.size(); ++f) {
    const WordVector in_k = value_of(factors_[f], point);
    WordVector& table = tables_[f];
    table.resize(count);
    if (in_k.size() <= 2) {
      const Word step = in_k.size() == 2 ? in_k[1] : 0;
      Word value = field_.add(in_k.empty() ? 0 : in_k[0], field_.mul(step, start_));
      for (Word& entry : table) {
        entry = value;
        value = field_.add(value, step);
      }
      continue;
    }
    for (std::size_t j = 0; j < count; ++j) {
      const Word k = field_.add(start_, j);
      Word value = 0;
      for (std::size_t e = in_k.size(); e-- > 0;) value = field_.add(field_.mul(value, k), in_k[e]);
      table[j] = value;
    }
  }
}

void KeyImage::multiply_in(WordVector& into, const Product& product) const {
  if (product.constant != 1) {
    for (Word& entry : into) entry = field_.mul(entry, product.constant);
  }
  for (const auto& [factor, exponent] : product.factors) {
    const WordVector& table = tables_[factor];
    for (std::size_t j = 0; j < into.size(); ++j) {
      into[j] = field_.mul(into[j], field_.power(table[j], static_cast<Word>(exponent)));
    }
  }
}

bool KeyImage::run_recursion(const WordVector& point, std::size_t rows,
                             const algebra::Deadline& deadline) {
  const auto steps = static_cast<std::size_t>(equation_.degree + static_cast<long>(rows));
  fill_values(point, steps);
  WordVector up(steps, 1);
  WordVector down(steps, 1);
  multiply_in(up, up_);
  multiply_in(down, down_);
  if (!field_.invert_all(up)) return false;

  std::vector<WordVector> right;
  for (std::size_t i = 0; i < columns_.size(); ++i) {
    deadline.check();
    WordVector column(steps, 1);
    multiply_in(column, columns_[i]);
    if (given_.empty()) {
      right.push_back(std::move(column));
      continue;
    }
    if (right.empty()) right.emplace_back(steps, 0);
    if (i >= given_.size()) break;
    const WordVector scale = value_of(given_[i], point);
    if (scale.empty()) continue;
    for (std::size_t j = 0; j < steps; ++j) {
      right[0][j] = field_.add(right[0][j], field_.mul(scale[0], column[j]));
    }
  }

  sequences_.assign(right.size() + 1, WordVector(steps + 1, 0));
  sequences_[0][0] = 1;
  for (std::size_t u = 0; u < sequences_.size(); ++u) {
    WordVector& y = sequences_[u];
    for (std::size_t j = 0; j < steps; ++j) {
      Word next = field_.mul(down[j], y[j]);
      if (u > 0) next = field_.add(next, right[u - 1][j]);
      y[j + 1] = field_.mul(next, up[j]);
    }
  }
  return true;
}

// Reduced row echelon form of the vanishing differences.
SolutionPattern KeyImage::eliminate(std::size_t rows, const algebra::Deadline& deadline) {
  const std::size_t unknowns = sequences_.size();
  matrix_.assign(rows, WordVector(unknowns));
  for (std::size_t r = 0; r < rows; ++r) {
    if (r % 16 == 15) deadline.check();
    for (std::size_t u = 0; u < unknowns; ++u) {
      matrix_[r][u] =
          field_.dot(differences_.data(), sequences_[u].data() + r, differences_.size());
    }
  }
  SolutionPattern pattern;
  pattern.free.assign(unknowns, true);
  pivots_.clear();
  for (std::size_t u = 0; u < unknowns && pivots_.size() < rows; ++u) {
    const std::size_t at = pivots_.size();
    std::size_t pivot = at;
    while (pivot < rows && matrix_[pivot][u] == 0) ++pivot;
    if (pivot == rows) continue;
    std::swap(matrix_[at], matrix_[pivot]);
    const Word scale = field_.inverse(matrix_[at][u]);
    for (std::size_t c = u; c < unknowns; ++c) matrix_[at][c] = field_.mul(matrix_[at][c], scale);
    for (std::size_t r = 0; r < rows; ++r) {
      const Word multiple = matrix_[r][u];
      if (r == at || multiple == 0) continue;
      for (std::size_t c = u; c < unknowns; ++c) {
        matrix_[r][c] = field_.sub(matrix_[r][c], field_.mul(multiple, matrix_[at][c]));
      }
    }
    pattern.free[u] = false;
    pivots_.push_back(u);
  }
  return pattern;
}

std::optional<SolutionPattern> KeyImage::explore(const WordVector& point,
                                                 const algebra::Deadline& deadline) {
  // A few equations are usually enough to see that there is no solution.
  const std::size_t few = std::min(full_rows(), few_rows());
  if (!run_recursion(point, few, deadline)) return std::nullopt;
  SolutionPattern first = eliminate(few, deadline);
  first.full_rows = false;
  if (few == full_rows() || !first.unit_column()) return first;
  if (!run_recursion(point, full_rows(), deadline)) return std::nullopt;
  SolutionPattern all = eliminate(full_rows(), deadline);
  all.full_rows = !(first == all);
  return all;
}

std::optional<WordVector> KeyImage::solve(const WordVector& point, const SolutionPattern& pattern,
                                          const algebra::Deadline& deadline) {
  deadline.check();
  const std::size_t rows = pattern.full_rows ? full_rows() : std::min(full_rows(), few_rows());
  if (!run_recursion(point, rows, deadline)) return std::nullopt;
  if (!(eliminate(rows, deadline) == pattern)) return std::nullopt;
  prepare_interpolation();
  return back_substitute(pattern);
}

WordVector KeyImage::back_substitute(const SolutionPattern& pattern) const {
  const std::size_t unit = pattern.unit_column().value();
  WordVector x(pattern.free.size(), 0);
  x[unit] = 1;
  for (std::size_t r = 0; r < pivots_.size(); ++r) x[pivots_[r]] = field_.neg(matrix_[r][unit]);

  const auto count = static_cast<std::size_t>(equation_.degree + 1);
  WordVector values(count, 0);
  for (std::size_t u = 0; u < x.size(); ++u) {
    if (x[u] == 0) continue;
    for (std::size_t j = 0; j < count; ++j) {
      values[j] = field_.add(values[j], field_.mul(x[u], sequences_[u][j]));
    }
  }
  WordVector y = coefficients_of(values);
  if (pattern.free[0] && equation_.homogeneous_degree) {
    // y is unique up to a multiple of a polynomial of this degree: its coefficient is made 0,
    // so that the solution does not depend on the start.
    const auto top = static_cast<std::size_t>(*equation_.homogeneous_degree);
    const WordVector h = coefficients_of(WordVector(
        sequences_[0].begin(), sequences_[0].begin() + static_cast<std::ptrdiff_t>(count)));
    if (top < count && h[top] != 0) {
      const Word multiple = field_.mul(y[top], field_.inverse(h[top]));
      for (std::size_t i = 0; i < count; ++i) y[i] = field_.sub(y[i], field_.mul(multiple, h[i]));
    }
  }
  WordVector out(x.begin() + 1, x.end());
  out.insert(out.end(), y.begin(), y.end());
  return out;
}

WordVector KeyImage::coefficients_of(const WordVector& values) const {
  WordVector out(values.size());
  for (std::size_t i = 0; i < out.size(); ++i) {
    out[i] = field_.dot(to_powers_[i].data(), values.data(), values.size());
  }
  return out;
}

}  // namespace sumwright::search
