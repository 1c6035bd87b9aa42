// From plain polynomials to GiNaC expressions, and a short text for one that should have been 0.
#include "audit/expansion.hpp"

#include <algorithm>
#include <map>

#include "audit/numbers.hpp"

namespace sumwright::audit {

std::vector<GiNaC::ex> make_symbols(const std::vector<std::string>& names) {
  std::vector<GiNaC::ex> out;
  out.reserve(names.size());
  for (const std::string& name : names) out.emplace_back(GiNaC::symbol(name.empty() ? "_" : name));
  return out;
}

GiNaC::ex to_ex(const proof::Polynomial& polynomial, const std::vector<GiNaC::ex>& at) {
  GiNaC::exvector terms;
  for (const proof::Monomial& monomial : polynomial.terms) {
    GiNaC::ex term = to_numeric(monomial.coefficient);
    for (std::size_t i = 0; i < monomial.exponents.size(); ++i)
      if (monomial.exponents[i] != 0)
        term *= GiNaC::pow(at.at(i), numeric(static_cast<unsigned long>(monomial.exponents[i])));
    terms.push_back(term);
  }
  return GiNaC::add(terms);
}

GiNaC::ex to_ex(const proof::Factored& factored, const std::vector<GiNaC::ex>& at) {
  GiNaC::ex out = to_numeric(factored.constant);
  for (const auto& [factor, exponent] : factored.factors)
    out *= GiNaC::pow(to_ex(factor, at), numeric(exponent));
  return out;
}

std::string leading_monomials(const GiNaC::ex& expanded, const std::vector<GiNaC::ex>& symbols) {
  const auto degrees_of = [&](const GiNaC::ex& term) {
    std::vector<int> out;
    out.reserve(symbols.size());
    for (const GiNaC::ex& symbol : symbols) out.push_back(term.degree(symbol));
    return out;
  };
  std::map<std::vector<int>, GiNaC::ex, std::greater<>> terms;
  if (GiNaC::is_a<GiNaC::add>(expanded))
    for (std::size_t i = 0; i < expanded.nops(); ++i)
      terms.emplace(degrees_of(expanded.op(i)), expanded.op(i));
  else
    terms.emplace(degrees_of(expanded), expanded);
  std::string out;
  std::size_t shown = 0;
  for (const auto& [degrees, term] : terms) {
    if (++shown > 3) return out + " + ... (" + std::to_string(terms.size()) + " terms)";
    numeric coefficient = 1;
    std::string monomial;
    for (std::size_t i = 0; i < symbols.size(); ++i)
      if (degrees[i] > 0)
        monomial += "*" + GiNaC::ex_to<GiNaC::symbol>(symbols[i]).get_name() +
                    (degrees[i] > 1 ? "^" + std::to_string(degrees[i]) : "");
    GiNaC::ex rest = term;
    for (std::size_t i = 0; i < symbols.size(); ++i) rest = rest.coeff(symbols[i], degrees[i]);
    if (GiNaC::is_a<numeric>(rest)) coefficient = GiNaC::ex_to<numeric>(rest);
    out += (out.empty() ? "" : " + ") + text_of(coefficient) + monomial;
  }
  return out;
}

}  // namespace sumwright::audit
