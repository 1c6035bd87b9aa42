// Polynomials and factored values as text in the claim language, in the ring's term order.
#include <string>

#include "algebra/polynomial.hpp"

namespace sumwright::algebra {
namespace {

std::string power_product(const Ring& ring, const std::vector<unsigned long>& exponents) {
  std::string out;
  for (std::size_t v = 0; v < exponents.size(); ++v) {
    if (exponents[v] == 0) continue;
    if (!out.empty()) out += '*';
    out += ring.names()[v];
    if (exponents[v] > 1) out += '^' + std::to_string(exponents[v]);
  }
  return out;
}

// A factor as it stands in a product; a variable needs no brackets.
std::string factor_text(const Polynomial& base, long exponent) {
  std::string out = base.to_string();
  const bool plain = base.terms() == 1 && base.total_degree() == 1 && base.content() == 1;
  if (!plain) out = '(' + out + ')';
  if (exponent > 1) out += '^' + std::to_string(exponent);
  return out;
}

struct Product {
  std::string text;
  unsigned count = 0;
  void append(const std::string& factor) {
    if (count++ > 0) text += '*';
    text += factor;
  }
};

}  // namespace

std::string Polynomial::to_string() const {
  if (is_zero()) return "0";
  std::string out;
  for (const Monomial& term : to_terms()) {
    const bool negative = term.coefficient < 0;
    const mpz_class size = abs(term.coefficient);
    if (out.empty()) {
      if (negative) out += '-';
    } else {
      out += negative ? " - " : " + ";
    }
    const std::string powers = power_product(*ring_, term.exponents);
    if (powers.empty()) {
      out += size.get_str();
    } else {
      if (size != 1) out += size.get_str() + '*';
      out += powers;
    }
  }
  return out;
}

std::string Factored::to_string() const {
  if (is_zero()) return "0";
  Product above;
  Product below;
  const mpz_class size = abs(constant.get_num());
  if (size != 1) above.append(size.get_str());
  if (constant.get_den() != 1) below.append(constant.get_den().get_str());
  for (const auto& [base, exponent] : factors) {
    if (exponent > 0) {
      above.append(factor_text(base, exponent));
    } else {
      below.append(factor_text(base, -exponent));
    }
  }
  if (above.count == 0) above.append("1");
  std::string out = (constant < 0 ? "-" : "") + above.text;
  if (below.count == 1) out += '/' + below.text;
  if (below.count > 1) out += "/(" + below.text + ')';
  return out;
}

}  // namespace sumwright::algebra
