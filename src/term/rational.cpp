// Rational expressions of a claim as rational functions, integer constants as prime powers, and
// plain copies for the Proof value.

#include <fmt/format.h>

#include <stdexcept>

#include "claim/affine.hpp"
#include "term/conversion.hpp"

namespace sumwright::term {

using algebra::Polynomial;
using algebra::RationalFunction;
using claim::Expression;
using claim::Operation;

namespace {

constexpr long largest_degree = 3000;
constexpr unsigned long largest_prime = 1UL << 16U;

void guard(const Setting& setting, const Expression& e, long degree) {
  if (degree > largest_degree)
    throw claim::InputError(*setting.claim->source, e.place,
                            fmt::format("this expression has degree over {}", largest_degree));
}

std::optional<RationalFunction> power(const Setting& setting, const Expression& e) {
  const std::optional<mpz_class> exponent = claim::as_literal(*e.children[1]);
  if (!exponent || !exponent->fits_slong_p()) return std::nullopt;
  const std::optional<RationalFunction> base = to_rational_function(setting, *e.children[0]);
  if (!base) return std::nullopt;
  const long c = exponent->get_si();
  const long degree =
      std::max({base->numerator().total_degree(), base->denominator().total_degree(), 0L});
  if (std::abs(c) > largest_degree) guard(setting, e, largest_degree + 1);
  guard(setting, e, degree * std::abs(c));
  if (c < 0 && base->is_zero())
    throw claim::InputError(*setting.claim->source, e.place, "division by zero");
  return base->power(c);
}

}  // namespace

std::optional<RationalFunction> to_rational_function(const Setting& setting, const Expression& e) {
  if (e.operation == Operation::literal) return RationalFunction(Polynomial(setting.ring, e.value));
  if (e.operation == Operation::symbol) {
    const auto at = setting.position.find(e.name);
    if (at == setting.position.end()) return std::nullopt;
    return RationalFunction(Polynomial::variable(setting.ring, at->second));
  }
  if (e.operation == Operation::call) return std::nullopt;
  if (e.operation == Operation::power) return power(setting, e);
  const std::optional<RationalFunction> a = to_rational_function(setting, *e.children[0]);
  if (!a) return std::nullopt;
  if (e.operation == Operation::negate) return -*a;
  const std::optional<RationalFunction> b = to_rational_function(setting, *e.children[1]);
  if (!b) return std::nullopt;
  switch (e.operation) {
    case Operation::add:
      return *a + *b;
    case Operation::subtract:
      return *a - *b;
    case Operation::multiply:
      guard(setting, e, a->numerator().total_degree() + b->numerator().total_degree());
      return *a * *b;
    case Operation::divide:
      if (b->is_zero())
        throw claim::InputError(*setting.claim->source, e.children[1]->place,
                                "division by an expression that is identically zero");
      return *a / *b;
    default:
      throw std::logic_error("unknown operation");
  }
}

void divide_by_constant(Product& product, const algebra::RingPtr& ring, const mpz_class& divisor) {
  mpz_class rest = abs(divisor);
  for (unsigned long p = 2; p < largest_prime && rest > 1; p += p == 2 ? 1 : 2) {
    long multiplicity = 0;
    while (mpz_divisible_ui_p(rest.get_mpz_t(), p) != 0) {
      rest /= p;
      ++multiplicity;
    }
    if (multiplicity > 0)
      product.multiply(
          power_atom(Polynomial(ring, mpz_class(p)), Affine::of(ring->size(), -multiplicity)));
  }
  // A cofactor without small primes serves as a base of its own.
  if (rest > 1) product.multiply(power_atom(Polynomial(ring, rest), Affine::of(ring->size(), -1)));
}

proof::Atom plain(const Atom& atom) {
  proof::Atom out;
  out.kind = atom.kind;
  out.argument = plain(atom.argument);
  out.base = plain(atom.base);
  out.base_scale = atom.scale;
  out.low = plain(atom.low);
  out.high = plain(atom.high);
  return out;
}

proof::Product plain(const Product& product) {
  proof::Product out;
  out.coefficient = plain(product.coefficient);
  for (const auto& [atom, e] : product.atoms) out.atoms.emplace_back(plain(atom), e);
  return out;
}

}  // namespace sumwright::term
