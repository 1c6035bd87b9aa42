// Counting by definitions.
#include "external/routes.hpp"

namespace sumwright::testing::routes {
namespace {

using Grid = std::vector<Terms>;

Grid grid(std::size_t rows, std::size_t columns) { return Grid(rows, Terms(columns)); }

}  // namespace

mpz_class binomial(std::size_t n, std::size_t k) {
  static std::vector<Terms> rows{{1}};
  while (rows.size() <= n) {
    Terms row(rows.back().size() + 1, 1);
    for (std::size_t j = 1; j + 1 < row.size(); ++j) row[j] = rows.back()[j - 1] + rows.back()[j];
    rows.push_back(std::move(row));
  }
  return k <= n ? rows[n][k] : mpz_class(0);
}

mpz_class factorial(std::size_t n) {
  mpz_class out = 1;
  for (std::size_t i = 2; i <= n; ++i) out *= i;
  return out;
}

Terms each(std::size_t count, const std::function<mpz_class(std::size_t n)>& value) {
  Terms out;
  for (std::size_t n = 0; n < count; ++n) out.push_back(value(n));
  return out;
}

Terms sums(std::size_t count, const std::function<mpz_class(std::size_t n, std::size_t k)>& term) {
  return each(count, [&](std::size_t n) {
    mpz_class out = 0;
    for (std::size_t k = 0; k <= n; ++k) out += term(n, k);
    return out;
  });
}

mpz_class delannoy(std::size_t n, std::size_t m) {
  Grid paths = grid(n + 1, m + 1);
  for (std::size_t i = 0; i <= n; ++i) {
    for (std::size_t j = 0; j <= m; ++j) {
      if (i == 0 || j == 0) {
        paths[i][j] = 1;
      } else {
        paths[i][j] = paths[i - 1][j] + paths[i][j - 1] + paths[i - 1][j - 1];
      }
    }
  }
  return paths[n][m];
}

mpz_class schroeder(std::size_t n) {
  Grid paths = grid(n + 1, n + 1);
  for (std::size_t i = 0; i <= n; ++i) {
    for (std::size_t j = 0; j <= i; ++j) {
      paths[i][j] = j == 0 ? 1 : 0;
      if (j == 0) continue;
      paths[i][j] = paths[i][j - 1] + paths[i - 1][j - 1];
      if (j < i) paths[i][j] += paths[i - 1][j];
    }
  }
  return paths[n][n];
}

mpz_class level_paths(std::size_t n, bool free) {
  const std::size_t middle = free ? n + 1 : 1;  // one place below the lowest height stays 0
  Terms at(middle + n + 2);
  at[middle] = 1;
  for (std::size_t step = 0; step < n; ++step) {
    Terms next(at.size());
    for (std::size_t h = 1; h + 1 < at.size(); ++h) next[h] = at[h - 1] + at[h] + at[h + 1];
    at = std::move(next);
  }
  return at[middle];
}

mpz_class catalan(std::size_t n) {
  Terms at(2 * n + 3);
  at[1] = 1;
  for (std::size_t step = 0; step < 2 * n; ++step) {
    Terms next(at.size());
    for (std::size_t h = 1; h + 1 < at.size(); ++h) next[h] = at[h - 1] + at[h + 1];
    at = std::move(next);
  }
  return at[1];
}

mpz_class central_coefficient(std::size_t n, long a, long b, long c) {
  Terms power{1};
  for (std::size_t i = 0; i < n; ++i) {
    Terms next(power.size() + 2);
    for (std::size_t j = 0; j < power.size(); ++j) {
      next[j] += a * power[j];
      next[j + 1] += b * power[j];
      next[j + 2] += c * power[j];
    }
    power = std::move(next);
  }
  return power[n];
}

mpz_class multinomial_squares(std::size_t n, std::size_t parts) {
  if (parts == 1) return 1;
  mpz_class out = 0;
  for (std::size_t first = 0; first <= n; ++first) {
    out += binomial(n, first) * binomial(n, first) * multinomial_squares(n - first, parts - 1);
  }
  return out;
}

mpz_class derangements(std::size_t n) {
  mpz_class out = 0;
  for (std::size_t fixed = 0; fixed <= n; ++fixed) {
    const mpz_class ways = binomial(n, fixed) * factorial(n - fixed);
    out += fixed % 2 == 0 ? ways : mpz_class(-ways);
  }
  return out;
}

mpz_class rooks(std::size_t n, std::size_t m) {
  // the first row empty, or its rook in one of m columns
  if (n == 0 || m == 0) return 1;
  return rooks(n - 1, m) + m * rooks(n - 1, m - 1);
}

}  // namespace sumwright::testing::routes
