// How long finding and exact verification take: sums of powers of one row of binomials and the
// zeta(3) sum. Prints one table; best time of several runs each. Exit status 1 when an answer is
// wrong. Usage: search_benchmark [LARGEST_POWER]
#include <algorithm>
#include <chrono>
#include <cstdio>
#include <cstdlib>
#include <string>

#include "search/search.hpp"

namespace {

using sumwright::algebra::Factored;
using sumwright::algebra::Polynomial;
using sumwright::algebra::Ring;
using sumwright::algebra::RingPtr;
using sumwright::search::ShiftQuotients;
using sumwright::search::Telescoper;

constexpr double kBudgetMs = 300;  // per measured quantity

template <typename Work>
double best_milliseconds(Work work) {
  double best = 0;
  double spent = 0;
  for (int run = 0; run < 200 && (run < 3 || spent < kBudgetMs); ++run) {
    const auto before = std::chrono::steady_clock::now();
    work();
    const std::chrono::duration<double, std::milli> taken =
        std::chrono::steady_clock::now() - before;
    best = run == 0 ? taken.count() : std::min(best, taken.count());
    spent += taken.count();
  }
  return best;
}

// binomial(n,k)^p binomial(n+k,k)^q
ShiftQuotients summand(const RingPtr& ring, long p, long q) {
  const auto affine = [&](long n, long k, long c) { return Polynomial::affine(ring, {n, k}, c); };
  ShiftQuotients out;
  out.by_running.multiply(affine(1, 0, 1), p - q);
  out.by_running.multiply(affine(1, -1, 1), -p);
  out.by_running.multiply(affine(1, 1, 1), q);
  out.by_index.multiply(affine(1, -1, 0), p);
  out.by_index.multiply(affine(0, 1, 1), -p - q);
  out.by_index.multiply(affine(1, 1, 1), q);
  // binomial(n+k,k) = (n+k)!/(n! k!): by n it brings (n+k+1)/(n+1), by k (n+k+1)/(k+1).
  return out;
}

bool measure(const std::string& name, long p, long q) {
  const RingPtr ring = std::make_shared<const Ring>(std::vector<std::string>{"n", "k"});
  const ShiftQuotients term = summand(ring, p, q);
  std::optional<Telescoper> found;
  const double find = best_milliseconds([&] { found = find_telescoper(ring, term, {}); });
  if (!found) {
    std::printf("%-22s nothing found\n", name.c_str());
    return false;
  }
  bool holds = true;
  const double verify = best_milliseconds([&] {
    holds = holds && verify_identity(ring, term, found->coefficients, found->certificate).holds;
  });
  long degree = 0;
  std::size_t bytes = 0;
  for (const Polynomial& coefficient : found->coefficients) {
    degree = std::max(degree, coefficient.degree(0));
    bytes += coefficient.to_string().size();
  }
  const Polynomial& above = found->certificate.numerator();
  const std::size_t certificate_bytes = found->certificate.factored().to_string().size();
  std::printf("%-22s %5zu %7ld %7ld %7ld %9zu %9zu %9.3f %9.3f %7.1f%s\n", name.c_str(),
              found->coefficients.size() - 1, degree, above.degree(0), above.degree(1), bytes,
              certificate_bytes, find, verify, find / verify, holds ? "" : "  WRONG");
  return holds;
}

}  // namespace

int main(int argc, char** argv) {
  const long largest = argc > 1 ? std::strtol(argv[1], nullptr, 10) : 6;
  std::printf("%-22s %5s %7s %7s %7s %9s %9s %9s %9s %7s\n", "summand", "order", "deg_n a",
              "deg_n R", "deg_k R", "bytes a", "bytes R", "find ms", "verify ms", "ratio");
  bool right = true;
  for (long r = 2; r <= largest; ++r) {
    right = measure("C(n,k)^" + std::to_string(r), r, 0) && right;
  }
  right = measure("C(n,k)^2 C(n+k,k)^2", 2, 2) && right;
  return right ? EXIT_SUCCESS : EXIT_FAILURE;
}
