// Terms as text of the claim language: a quotient of products, each atom by its function.

#include "term/text.hpp"

#include <fmt/format.h>

#include <vector>

namespace sumwright::term {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RingPtr;

namespace {

struct Quotient {
  std::vector<std::string> above;
  std::vector<std::string> below;
};

std::string powered(const std::string& base, long exponent) {
  return exponent == 1 ? base : fmt::format("{}^{}", base, exponent);
}

/// In brackets unless it is a single symbol or a nonnegative number.
std::string bracketed(const std::string& text) {
  const bool simple = text.find_first_of(" +-*/^") == std::string::npos;
  return simple ? text : "(" + text + ")";
}

void add_factored(Quotient& out, const Factored& value, std::string& sign) {
  const mpz_class num = abs(value.constant.get_num());
  if (value.constant < 0) sign = "-";
  if (num != 1) out.above.push_back(num.get_str());
  if (value.constant.get_den() != 1) out.below.push_back(value.constant.get_den().get_str());
  for (const auto& [p, e] : value.factors)
    (e > 0 ? out.above : out.below).push_back(powered(bracketed(p.to_string()), std::abs(e)));
}

std::string interval_text(const Atom& atom) {
  // ip(a; i, j) = rising(a + i, j - i), a = base / scale
  const RingPtr& ring = atom.base.ring();
  const Polynomial first = interval_factor(atom, atom.low);
  const std::string length = (atom.high - atom.low).polynomial(ring).to_string();
  const std::string start = atom.scale == 1
                                ? first.to_string()
                                : fmt::format("({})/{}", first.to_string(), atom.scale.get_str());
  return fmt::format("rising({}, {})", start, length);
}

void add_atom(Quotient& out, const RingPtr& ring, const Atom& atom, long e) {
  const std::string argument = atom.argument.polynomial(ring).to_string();
  switch (atom.kind) {
    case AtomKind::factorial:
      out.above.push_back(powered(fmt::format("factorial({})", argument), e));
      return;
    case AtomKind::reciprocal_factorial:
      out.below.push_back(powered(fmt::format("factorial({})", argument), e));
      return;
    case AtomKind::power: {
      const Affine exponent = e * atom.argument;
      const std::string base = bracketed(atom.base.to_string());
      if (exponent.is_constant())
        (exponent.constant > 0 ? out.above : out.below)
            .push_back(powered(base, std::abs(exponent.constant)));
      else
        out.above.push_back(
            fmt::format("{}^{}", base, bracketed(exponent.polynomial(ring).to_string())));
      return;
    }
    case AtomKind::interval_product:
      out.above.push_back(powered(interval_text(atom), e));
      return;
    case AtomKind::reciprocal_interval_product:
      out.below.push_back(powered(interval_text(atom), e));
      return;
    case AtomKind::reciprocal:
      out.below.push_back(powered(bracketed(atom.base.to_string()), e));
      return;
  }
}

std::string join(const Quotient& q, const std::string& sign) {
  std::string out = sign;
  out += q.above.empty() ? "1" : fmt::format("{}", fmt::join(q.above, "*"));
  if (q.below.size() == 1) out += "/" + q.below[0];
  if (q.below.size() > 1) out += fmt::format("/({})", fmt::join(q.below, "*"));
  return out;
}

}  // namespace

std::string claim_text(const Factored& rational, const Product& product) {
  Factored all = rational;
  if (all.is_zero() || product.is_zero()) return "0";
  all.multiply(product.coefficient);
  Quotient q;
  std::string sign;
  add_factored(q, all, sign);
  for (const auto& [atom, e] : product.atoms)
    add_atom(q, atom.base.ring(), atom, static_cast<long>(e));
  return join(q, sign);
}

std::string claim_text(const Factored& rational) { return claim_text(rational, Product{}); }

}  // namespace sumwright::term
