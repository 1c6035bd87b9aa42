// Deciding a polynomial identity by other arithmetic than the one that found it.
//
// From factored data to yes or no. Small: GiNaC expands. Large: a polynomial of degree at most d_v
// in each variable v that vanishes on a grid of d_v + 1 values per variable is 0 (the degree bounds
// are taken from the factors here). Too large for that: random points; the bound on the error is
// the lemma of Schwartz (J. ACM 27, 1980) and Zippel (EUROSAM 1979).
#include "audit/polynomial_identity.hpp"

#include <algorithm>
#include <cmath>
#include <cstdint>
#include <map>

#include "audit/expansion.hpp"
#include "audit/numbers.hpp"

namespace sumwright::audit {

namespace {

constexpr std::size_t kMostGridPoints = 40000;
constexpr int kRandomPoints = 4;
constexpr int kRandomBits = 40;
constexpr std::size_t kIndex = 1;  // position of the summation index

using Terms = std::vector<IdentityTerm>;

std::vector<std::size_t> degrees_of(const proof::Factored& value, std::size_t symbols) {
  std::vector<std::size_t> out(symbols, 0);
  for (const auto& [factor, exponent] : value.factors) {
    if (exponent < 0) throw std::logic_error("audit: a negative exponent in a polynomial");
    for (std::size_t v = 0; v < symbols; ++v) {
      std::size_t most = 0;
      for (const proof::Monomial& monomial : factor.terms)
        if (v < monomial.exponents.size())
          most = std::max<std::size_t>(most, monomial.exponents[v]);
      out[v] += most * static_cast<std::size_t>(exponent);
    }
  }
  return out;
}

std::vector<std::size_t> degree_bounds(const IdentityTerm& term, std::size_t symbols) {
  std::vector<std::size_t> out(symbols, 0);
  for (const IdentityTerm::Part& part : term.parts) {
    const std::vector<std::size_t> degrees = degrees_of(*part.value, symbols);
    for (std::size_t v = 0; v < symbols; ++v) out[v] += degrees[v];
  }
  return out;
}

std::vector<std::size_t> degree_bounds(const Terms& terms, std::size_t symbols) {
  std::vector<std::size_t> out(symbols, 0);
  for (const IdentityTerm& term : terms) {
    const std::vector<std::size_t> one = degree_bounds(term, symbols);
    for (std::size_t v = 0; v < symbols; ++v) out[v] = std::max(out[v], one[v]);
  }
  return out;
}

/// A product, or the largest number when it overflows.
std::size_t bounded_product(std::size_t a, std::size_t b) {
  std::size_t out = 0;
  return __builtin_mul_overflow(a, b, &out) ? SIZE_MAX : out;
}

std::size_t box(const std::vector<std::size_t>& degrees) {
  std::size_t out = 1;
  for (const std::size_t degree : degrees) out = bounded_product(out, degree + 1);
  return out;
}

std::size_t terms_when_expanded(const IdentityTerm& term, std::size_t symbols) {
  std::size_t out = 1;
  for (const IdentityTerm::Part& part : term.parts)
    for (const auto& [factor, exponent] : part.value->factors)
      for (long e = 0; e < exponent && out != SIZE_MAX; ++e)
        out = bounded_product(out, std::max<std::size_t>(factor.terms.size(), 1));
  return std::min(out, box(degree_bounds(term, symbols)));
}

// ---------------------------------------------------------------- expansion

IdentityResult by_expansion(const Terms& terms, const std::vector<std::string>& names) {
  const std::vector<GiNaC::ex> symbols = make_symbols(names);
  std::vector<GiNaC::ex> shifted = symbols;
  if (shifted.size() > kIndex) shifted[kIndex] = symbols[kIndex] + 1;
  GiNaC::exvector summands;
  for (const IdentityTerm& term : terms) {
    GiNaC::ex product = term.sign;
    for (const IdentityTerm::Part& part : term.parts)
      product *= to_ex(*part.value, part.index_shifted ? shifted : symbols);
    summands.push_back(product);
  }
  IdentityResult out;
  GiNaC::ex total = 0;
  for (const GiNaC::ex& summand : summands) {
    const GiNaC::ex expanded = summand.expand();
    out.cases += GiNaC::is_a<GiNaC::add>(expanded) ? expanded.nops() : 1;
    total += expanded;
  }
  total = total.expand();
  out.zero = total.is_zero();
  out.how = "expanded";
  if (!out.zero) out.detail = "the residue is " + leading_monomials(total, symbols);
  return out;
}

// ---------------------------------------------------------------- points

/// A polynomial in fewer and fewer variables: the exponents of those not yet given, first to last.
using Partial = std::map<std::vector<std::uint32_t>, numeric>;

/// Every factor that occurs, and the terms over positions in that list.
struct Evaluation {
  struct Factor {
    std::size_t polynomial;
    long exponent;
  };
  struct Product {
    numeric constant;
    std::vector<Factor> factors;
  };
  std::vector<Partial> polynomials;
  std::vector<bool> shifted;
  std::vector<Product> products;
};

Partial to_partial(const proof::Polynomial& polynomial, std::size_t symbols) {
  Partial out;
  for (const proof::Monomial& monomial : polynomial.terms) {
    std::vector<std::uint32_t> exponents(symbols, 0);
    for (std::size_t v = 0; v < symbols; ++v)
      if (v < monomial.exponents.size())
        exponents[v] = static_cast<std::uint32_t>(monomial.exponents[v]);
    numeric& coefficient = out[exponents];
    coefficient = coefficient + to_numeric(monomial.coefficient);
  }
  return out;
}

Evaluation prepare(const Terms& terms, std::size_t symbols) {
  Evaluation out;
  for (const IdentityTerm& term : terms) {
    Evaluation::Product product{term.sign, {}};
    for (const IdentityTerm::Part& part : term.parts) {
      product.constant = product.constant * to_numeric(part.value->constant);
      for (const auto& [factor, exponent] : part.value->factors) {
        product.factors.push_back({out.polynomials.size(), exponent});
        out.polynomials.push_back(to_partial(factor, symbols));
        out.shifted.push_back(part.index_shifted);
      }
    }
    out.products.push_back(product);
  }
  return out;
}

/// Gives the first open variable a value.
Partial substituted(const Partial& polynomial, const numeric& value) {
  Partial out;
  std::vector<numeric> powers{numeric(1)};
  for (const auto& [exponents, coefficient] : polynomial) {
    while (powers.size() <= exponents.front()) powers.push_back(powers.back() * value);
    numeric& sum = out[{exponents.begin() + 1, exponents.end()}];
    sum = sum + coefficient * powers[exponents.front()];
  }
  return out;
}

class Evaluator {
 public:
  Evaluator(Evaluation data, const std::vector<std::string>& names,
            const std::function<void()>& check_time)
      : data_(std::move(data)), names_(names), check_time_(check_time) {}

  /// Visits all combinations of the values; false (and a detail) at the first that is not 0.
  bool vanishes(const std::vector<std::vector<numeric>>& values) {
    return descend(data_.polynomials, values, 0);
  }
  std::size_t points = 0;
  std::string detail;

 private:
  bool descend(const std::vector<Partial>& polynomials,
               const std::vector<std::vector<numeric>>& values, std::size_t variable) {
    if (variable == values.size()) return check(polynomials);
    for (const numeric& value : values[variable]) {
      if (check_time_) check_time_();
      std::vector<Partial> next;
      next.reserve(polynomials.size());
      for (std::size_t i = 0; i < polynomials.size(); ++i)
        next.push_back(substituted(
            polynomials[i], variable == kIndex && data_.shifted[i] ? value + numeric(1) : value));
      at_.push_back(value);
      const bool fine = descend(next, values, variable + 1);
      at_.pop_back();
      if (!fine) return false;
    }
    return true;
  }

  bool check(const std::vector<Partial>& constants) {
    ++points;
    numeric total = 0;
    for (const Evaluation::Product& product : data_.products) {
      numeric value = product.constant;
      for (const Evaluation::Factor& factor : product.factors) {
        const Partial& constant = constants[factor.polynomial];
        value = value * natural_power(constant.empty() ? numeric(0) : constant.begin()->second,
                                      factor.exponent);
      }
      total = total + value;
    }
    if (total.is_zero()) return true;
    detail = "the residue is " + text_of(total) + " at " + text_of(Point{names_, at_});
    return false;
  }

  Evaluation data_;
  const std::vector<std::string>& names_;
  const std::function<void()>& check_time_;
  std::vector<numeric> at_;
};

IdentityResult by_grid(const Terms& terms, const std::vector<std::string>& names,
                       const std::vector<std::size_t>& degrees,
                       const std::function<void()>& check_time) {
  std::vector<std::vector<numeric>> values;
  std::string sizes;
  for (const std::size_t degree : degrees) {
    std::vector<numeric> line;
    for (std::size_t i = 0; i <= degree; ++i) line.emplace_back(static_cast<long>(i));
    values.push_back(line);
    sizes += (sizes.empty() ? "" : " x ") + std::to_string(degree + 1);
  }
  Evaluator evaluator(prepare(terms, names.size()), names, check_time);
  IdentityResult out;
  out.zero = evaluator.vanishes(values);
  out.cases = evaluator.points;
  out.detail = evaluator.detail;
  out.how = "grid of " + sizes + " points";
  return out;
}

/// A fixed sequence (splitmix64, Steele, Lea, Flood, OOPSLA 2014), started from the data's size.
class Sequence {
 public:
  explicit Sequence(std::uint64_t seed) : state_(seed) {}
  numeric next() {
    state_ += 0x9e3779b97f4a7c15U;
    std::uint64_t z = state_;
    z = (z ^ (z >> 30U)) * 0xbf58476d1ce4e5b9U;
    z = (z ^ (z >> 27U)) * 0x94d049bb133111ebU;
    return numeric(static_cast<long>((z ^ (z >> 31U)) >> (64U - kRandomBits)));
  }

 private:
  std::uint64_t state_;
};

std::uint64_t seed_from(const Terms& terms) {
  std::uint64_t seed = 20;
  for (const IdentityTerm& term : terms)
    for (const IdentityTerm::Part& part : term.parts)
      for (const auto& [factor, exponent] : part.value->factors)
        for (const proof::Monomial& monomial : factor.terms)
          seed = seed * 1099511628211U + mpz_fdiv_ui(monomial.coefficient.get_mpz_t(), 1000003) +
                 static_cast<std::uint64_t>(exponent);
  return seed;
}

IdentityResult by_random_points(const Terms& terms, const std::vector<std::string>& names,
                                const std::vector<std::size_t>& degrees,
                                const std::function<void()>& check_time) {
  std::size_t total_degree = 1;
  for (const std::size_t degree : degrees) total_degree += degree;
  Evaluator evaluator(prepare(terms, names.size()), names, check_time);
  Sequence sequence(seed_from(terms));
  IdentityResult out;
  out.zero = true;
  for (int i = 0; i < kRandomPoints && out.zero; ++i) {
    std::vector<std::vector<numeric>> values;
    for (std::size_t v = 0; v < names.size(); ++v) values.push_back({sequence.next()});
    out.zero = evaluator.vanishes(values);
  }
  const double bits =
      kRandomPoints * (kRandomBits - std::ceil(std::log2(static_cast<double>(total_degree))));
  out.cases = evaluator.points;
  out.detail = evaluator.detail;
  out.how = "random points of [0, 2^" + std::to_string(kRandomBits) +
            "), probability of error at most 2^-" + std::to_string(static_cast<long>(bits));
  return out;
}

}  // namespace

std::size_t estimated_size(const Terms& terms, std::size_t symbols) {
  std::size_t out = 0;
  for (const IdentityTerm& term : terms) {
    const std::size_t one = terms_when_expanded(term, symbols);
    out = out > SIZE_MAX - one ? SIZE_MAX : out + one;
  }
  return std::min(out, bounded_product(terms.size(), box(degree_bounds(terms, symbols))));
}

IdentityResult decide_identity(const Terms& terms, const std::vector<std::string>& names,
                               std::size_t expand_up_to, const std::function<void()>& check_time) {
  if (check_time) check_time();
  const std::vector<std::size_t> degrees = degree_bounds(terms, names.size());
  if (estimated_size(terms, names.size()) <= expand_up_to) return by_expansion(terms, names);
  if (box(degrees) <= kMostGridPoints) return by_grid(terms, names, degrees, check_time);
  return by_random_points(terms, names, degrees, check_time);
}

}  // namespace sumwright::audit
