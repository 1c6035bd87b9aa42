// From the key equation to an exact solution: existence at one random point modulo a prime, then
// images modulo as many primes as the coefficients need, each candidate checked exactly.
#include "search/key_solution.hpp"

#include <algorithm>
#include <stdexcept>

#include "search/key_image.hpp"
#include "search/reconstruction.hpp"

namespace sumwright::search {
namespace {

using algebra::Deadline;
using algebra::Polynomial;

constexpr std::size_t kMaxPrimes = 2000;
constexpr unsigned kMaxAttempts = 6;
constexpr unsigned kMaxUnlucky = 5;

class Solver {
 public:
  Solver(const KeyEquation& equation, const std::vector<Polynomial>& given,
         const Deadline& deadline, unsigned attempt)
      : equation_(equation),
        system_(equation, given),
        deadline_(deadline),
        attempt_(attempt),
        random_(attempt + 1) {}

  // Whether there is a solution; true also fixes the pattern of free unknowns.
  bool exists() {
    const Field field(prime(0));
    start_ = random_() >> 5;
    KeyImage image(system_, field, field.reduce(start_));
    for (unsigned i = 0; i < kMaxUnlucky; ++i) {
      WordVector point;
      for (std::size_t v = 0; v < equation_.ring->size(); ++v) {
        point.push_back(field.reduce(random_() >> 4));
      }
      if (auto pattern = image.explore(point, deadline_)) {
        pattern_ = std::move(*pattern);
        return pattern_.unit_column().has_value();
      }
    }
    throw std::runtime_error("no regular point found for the key equation");
  }

  // Nothing when the primes ran out or were unlucky: another attempt is due.
  std::optional<KeySolution> solve(const std::function<bool(const KeySolution&)>& accept) {
    const std::size_t columns = pattern_.free.size() - 1;
    const auto entries = columns + static_cast<std::size_t>(equation_.degree + 1);
    ModularReconstruction reconstruction(equation_.ring->size(), variables(), entries, columns,
                                         *pattern_.unit_column() - 1, attempt_);
    IntegerLift lift(attempt_);
    unsigned unlucky = 0;
    std::size_t used = 0;
    std::size_t next_try = 1;
    for (std::size_t i = 0; used < kMaxPrimes && unlucky < kMaxUnlucky; ++i) {
      const Field field(prime(i));
      KeyImage image(system_, field, field.reduce(start_));
      const ModularReconstruction::BlackBox box = [&](const WordVector& point) {
        return image.solve(point, pattern_, deadline_);
      };
      const auto residues = reconstruction.image(field, box, deadline_);
      if (!residues) {
        ++unlucky;
        continue;
      }
      lift.add(field.prime(), *residues);
      if (++used < next_try) continue;
      next_try = used + 1 + used / 8;
      if (const auto vector = lift.vector()) {
        KeySolution candidate = assemble(*vector, reconstruction.layout(), columns);
        if (accept(candidate)) return candidate;
      }
    }
    return std::nullopt;
  }

 private:
  [[nodiscard]] Word prime(std::size_t i) const { return search_prime(attempt_ + i); }

  [[nodiscard]] std::vector<std::size_t> variables() const {
    std::vector<std::size_t> out = {kRunning};
    for (std::size_t v = kIndex + 1; v < equation_.ring->size(); ++v) out.push_back(v);
    return out;
  }

  [[nodiscard]] KeySolution assemble(const std::vector<mpz_class>& vector,
                                     const std::vector<Coefficient>& layout,
                                     std::size_t columns) const {
    std::vector<std::vector<algebra::Monomial>> x(columns);
    std::vector<algebra::Monomial> y;
    for (std::size_t i = 0; i < vector.size(); ++i) {
      if (vector[i] == 0) continue;
      algebra::Monomial term{vector[i], layout[i].exponents};
      if (layout[i].entry < columns) {
        x[layout[i].entry].push_back(std::move(term));
      } else {
        term.exponents[kIndex] = layout[i].entry - columns;
        y.push_back(std::move(term));
      }
    }
    KeySolution out{{}, Polynomial::from_terms(equation_.ring, y)};
    for (const auto& terms : x) out.x.push_back(Polynomial::from_terms(equation_.ring, terms));
    return out;
  }

  const KeyEquation& equation_;
  KeySystem system_;
  const Deadline& deadline_;
  unsigned attempt_;
  std::mt19937_64 random_;
  Word start_ = 0;
  SolutionPattern pattern_;
};

}  // namespace

std::optional<KeySolution> solve_key_equation(const KeyEquation& equation,
                                              const std::vector<Polynomial>& given,
                                              const std::function<bool(const KeySolution&)>& accept,
                                              const Deadline& deadline) {
  for (unsigned attempt = 0; attempt < kMaxAttempts; ++attempt) {
    Solver solver(equation, given, deadline, attempt);
    if (!solver.exists()) return std::nullopt;
    if (auto solution = solver.solve(accept)) return solution;
  }
  throw std::runtime_error("no candidate for the recurrence passed the exact check");
}

}  // namespace sumwright::search
