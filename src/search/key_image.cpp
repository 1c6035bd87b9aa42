// The key equation at one point modulo a prime: the recursion's values as a small linear system,
// from its kernel to one normalised solution. Tables of factor values are in key_values.cpp.
#include "search/key_image.hpp"

#include <algorithm>
#include <stdexcept>

#include "search/interpolation.hpp"

namespace sumwright::search {
namespace {

constexpr long kMaxSolvedDegree = 6000;  // of y in k

}  // namespace

std::optional<std::size_t> SolutionPattern::unit_column() const {
  for (std::size_t i = free.size(); i-- > 1;) {
    if (free[i]) return i;
  }
  return std::nullopt;
}

KeyImage::KeyImage(const KeySystem& system, const Field& field, Word start)
    : system_(system), field_(field), start_(start) {
  for (const auto& power : system.powers) bases_.push_back(reduce(power.terms));
  for (const auto& coefficient : system.given) given_.push_back(reduce(coefficient));
  prepare_differences();
}

// Weights (-1)^(d+1-j) binomial(d+1, j) of the (d+1)-th difference.
void KeyImage::prepare_differences() {
  const auto order = static_cast<std::size_t>(system_.degree + 1);
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

// From values at k0, k0 + 1, ... to coefficients of powers of k.
void KeyImage::prepare_interpolation() {
  if (!to_powers_.empty()) return;
  if (system_.degree > kMaxSolvedDegree) {
    throw algebra::TimeUp("size limit reached: degree of the certificate");
  }
  WordVector points;
  for (long j = 0; j <= system_.degree; ++j) {
    points.push_back(field_.add(start_, static_cast<Word>(j)));
  }
  to_powers_ = interpolation_matrix(field_, points);
}

std::size_t KeyImage::full_rows() const {
  // Recursion steps K = equation_degree + 1 make the identity hold at more points than its degree;
  // K + 1 values have K - degree differences of order degree + 1.
  return static_cast<std::size_t>(system_.equation_degree + 1 - system_.degree);
}

std::size_t KeyImage::few_rows() const {
  return system_.unknown_columns() + 2;  // unknowns, and one more as a check
}

bool KeyImage::run_recursion(const WordVector& point, std::size_t rows,
                             const algebra::Deadline& deadline) {
  const auto steps = static_cast<std::size_t>(system_.degree + static_cast<long>(rows));
  tabulate(point, steps);
  WordVector up = values_of(system_.up, steps);
  const WordVector down = values_of(system_.down, steps);
  if (!field_.invert_all(up)) return false;
  const std::vector<WordVector> right = right_sides(point, steps, deadline);

  sequences_.resize(right.size() + 1);
  for (std::size_t u = 0; u < sequences_.size(); ++u) {
    WordVector& y = sequences_[u];
    y.resize(steps + 1);
    y[0] = u == 0 ? 1 : 0;
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
  matrix_.resize(rows);
  for (std::size_t r = 0; r < rows; ++r) {
    if (r % 16 == 15) deadline.check();
    matrix_[r].resize(unknowns);
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

  WordVector values(static_cast<std::size_t>(system_.degree + 1), 0);
  for (std::size_t u = 0; u < x.size(); ++u) {
    if (x[u] == 0) continue;
    for (std::size_t j = 0; j < values.size(); ++j) {
      values[j] = field_.add(values[j], field_.mul(x[u], sequences_[u][j]));
    }
  }
  WordVector y = coefficients_of(values.data());
  if (pattern.free[0]) remove_homogeneous(y);
  WordVector out(x.begin() + 1, x.end());
  out.insert(out.end(), y.begin(), y.end());
  return out;
}

// y is unique up to a multiple of a polynomial of known degree: the coefficient of that power is
// made 0, so that the solution does not depend on the start.
void KeyImage::remove_homogeneous(WordVector& y) const {
  if (!system_.homogeneous_degree) return;
  const auto top = static_cast<std::size_t>(*system_.homogeneous_degree);
  if (top >= y.size()) return;
  const WordVector h = coefficients_of(sequences_[0].data());
  if (h[top] == 0) return;
  const Word multiple = field_.mul(y[top], field_.inverse(h[top]));
  for (std::size_t i = 0; i < y.size(); ++i) y[i] = field_.sub(y[i], field_.mul(multiple, h[i]));
}

WordVector KeyImage::coefficients_of(const Word* values) const {
  WordVector out(to_powers_.size());
  for (std::size_t i = 0; i < out.size(); ++i) {
    out[i] = field_.dot(to_powers_[i].data(), values, out.size());
  }
  return out;
}

}  // namespace sumwright::search
