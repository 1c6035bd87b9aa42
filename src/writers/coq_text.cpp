// Polynomials, atoms and products as Coq text. Invariant: printing is syntactic, so that
// substituting a symbol's text gives exactly the term that unfolding a definition gives.

#include "writers/coq_text.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace sumwright::writers::coq {

using proof::Affine;
using proof::Atom;
using proof::AtomKind;
using proof::Factored;
using proof::Polynomial;

namespace {

struct Sum {
  std::string text;
  void add(bool negative, const std::string& part) {
    if (text.empty())
      text = negative ? "- " + part : part;
    else
      text += (negative ? " - " : " + ") + part;
  }
};

std::string power(const std::string& base, unsigned long exponent) {
  return exponent == 1 ? base : fmt::format("{} ^ {}", base, exponent);
}

/// `inj n`-like texts are applications and bind tighter than `^`.
std::string monomial(const proof::Monomial& m, const std::vector<std::string>& names,
                     const std::string& coefficient) {
  std::string out = coefficient;
  for (std::size_t i = 0; i < m.exponents.size(); ++i) {
    if (m.exponents[i] == 0) continue;
    const std::string& name = names[i];
    const bool word = name.starts_with("inj ") || name.find(' ') == std::string::npos;
    const std::string factor = power(word ? name : "(" + name + ")", m.exponents[i]);
    out += out.empty() ? factor : " * " + factor;
  }
  return out;
}

bool is_unit_monomial(const proof::Monomial& m) {
  return std::all_of(m.exponents.begin(), m.exponents.end(),
                     [](unsigned long e) { return e == 0; });
}

}  // namespace

Scope plain_scope(const proof::Proof& proof) {
  Scope out;
  for (const proof::Symbol& s : proof.symbols) {
    const std::string name = safe_name(s.name);
    out.integer.push_back(name);
    out.field.push_back(s.kind == proof::SymbolKind::rational_parameter ? name : "inj " + name);
  }
  return out;
}

Scope polynomial_scope(const proof::Proof& proof) {
  Scope out = plain_scope(proof);
  for (std::size_t i = 0; i < 2; ++i) out.field[i] = out.integer[i];
  return out;
}

Scope with(Scope scope, std::size_t at, const std::string& text) {
  scope.integer[at] = bracketed(text);
  scope.field[at] = "inj " + bracketed(text);
  return scope;
}

std::string bracketed(const std::string& text) {
  if (text.empty()) return text;
  if (text.front() != '-' && text.find(' ') == std::string::npos) return text;
  return "(" + text + ")";
}

std::string enclosed(const std::string& text) {
  if (text.find(' ') == std::string::npos) return text;
  int depth = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    if (text[i] == '(') ++depth;
    if (text[i] == ')') --depth;
    if (depth == 0 && i + 1 < text.size()) return "(" + text + ")";
  }
  return text;
}

std::string affine(const Affine& form, const Scope& scope) {
  Sum out;
  for (const bool negative : {false, true})
    for (std::size_t i = 0; i < form.coefficients.size(); ++i) {
      const long c = form.coefficients[i];
      if (c == 0 || (c < 0) != negative) continue;
      const std::string name = scope.integer[i];
      out.add(negative, std::abs(c) == 1 ? name : fmt::format("{} * {}", std::abs(c), name));
    }
  if (form.constant != 0 || out.text.empty()) {
    if (out.text.empty()) return std::to_string(form.constant);
    out.add(form.constant < 0, std::to_string(std::abs(form.constant)));
  }
  return out.text;
}

std::string integer_polynomial(const Polynomial& p, const Scope& scope) {
  Sum out;
  for (const proof::Monomial& m : p.terms) {
    const mpz_class size = abs(m.coefficient);
    const std::string c = size == 1 && !is_unit_monomial(m) ? "" : size.get_str();
    out.add(m.coefficient < 0, monomial(m, scope.integer, c));
  }
  return out.text.empty() ? "0" : out.text;
}

std::string polynomial(const Polynomial& p, const Scope& scope) {
  Sum out;
  for (const proof::Monomial& m : p.terms) {
    const mpz_class size = abs(m.coefficient);
    const std::string c = size == 1 && !is_unit_monomial(m) ? "" : "inj " + size.get_str();
    out.add(m.coefficient < 0, monomial(m, scope.field, c));
  }
  return out.text.empty() ? "inj 0" : out.text;
}

std::string rational(const mpq_class& value) {
  const mpz_class& num = value.get_num();
  std::string above =
      num < 0 ? fmt::format("inj ({})", num.get_str()) : fmt::format("inj {}", num.get_str());
  if (value.get_den() == 1) return above;
  return fmt::format("{} / inj {}", above, value.get_den().get_str());
}

std::string factored(const Factored& value, const Scope& scope) {
  std::string out;
  if (value.constant != 1 || value.factors.empty()) {
    out = rational(value.constant);
    if (value.constant.get_den() != 1 && !value.factors.empty()) out = "(" + out + ")";
  }
  for (const auto& [p, e] : value.factors) {
    std::string text = polynomial(p, scope);
    if (text.find(' ') != std::string::npos) text = "(" + text + ")";
    const std::string factor = power(text, static_cast<unsigned long>(std::abs(e)));
    out += out.empty() ? factor : " * " + factor;
  }
  return out;
}

std::string interval_base(const Atom& a, const Scope& scope) {
  const std::string base = polynomial(a.base, scope);
  if (a.base_scale == 1) return bracketed(base);
  return fmt::format("({} / inj {})", bracketed(base), a.base_scale.get_str());
}

std::string power_base(const Polynomial& base, const Scope& scope) {
  if (is_constant(base) && !base.terms.empty() && base.terms[0].coefficient < 0)
    return fmt::format("(inj ({}))", base.terms[0].coefficient.get_str());
  return bracketed(polynomial(base, scope));
}

std::string atom(const Atom& a, const Scope& scope) {
  const std::string at = bracketed(affine(a.argument, scope));
  switch (a.kind) {
    case AtomKind::factorial:
      return "factorial " + at;
    case AtomKind::reciprocal_factorial:
      return "rfactorial " + at;
    case AtomKind::power:
      return fmt::format("zpow {} {}", power_base(a.base, scope), at);
    case AtomKind::interval_product:
    case AtomKind::reciprocal_interval_product:
      return fmt::format("{} {} {} {}", a.kind == AtomKind::interval_product ? "ip" : "rip",
                         interval_base(a, scope), bracketed(affine(a.low, scope)),
                         bracketed(affine(a.high, scope)));
    case AtomKind::reciprocal:
      return fmt::format("(/ ({}))", polynomial(a.base, scope));
  }
  return "";
}

std::string product(const proof::Product& p, const Scope& scope) {
  std::string out;
  if (p.coefficient.constant != 1 || !p.coefficient.factors.empty() || p.atoms.empty())
    out = factored(p.coefficient, scope);
  for (const auto& [a, e] : p.atoms) {
    const std::string factor = power(atom(a, scope), e);
    out += out.empty() ? factor : " * " + factor;
  }
  return out;
}

Affine substitute(const Affine& form, const Substitution& by) {
  Affine out = form;
  for (const auto& [at, value] : by) {
    if (at >= form.coefficients.size()) continue;  // a form that the atom does not have
    const long c = form.coefficients[at];
    if (c == 0) continue;
    out.coefficients[at] -= c;
    for (std::size_t i = 0; i < value.coefficients.size(); ++i)
      out.coefficients[i] += c * value.coefficients[i];
    out.constant += c * value.constant;
  }
  return out;
}

Polynomial substitute(const Polynomial& p, const Substitution& by) {
  using Terms = std::map<std::vector<unsigned long>, mpz_class, std::greater<>>;
  const auto times = [](const Terms& a, const Terms& b) {
    Terms out;
    for (const auto& [ea, ca] : a)
      for (const auto& [eb, cb] : b) {
        std::vector<unsigned long> e = ea;
        for (std::size_t i = 0; i < e.size(); ++i) e[i] += eb[i];
        out[e] += ca * cb;
      }
    return out;
  };
  Terms sum;
  for (const proof::Monomial& m : p.terms) {
    std::vector<unsigned long> rest = m.exponents;
    for (const auto& [at, value] : by) rest[at] = 0;
    Terms part{{rest, m.coefficient}};
    for (const auto& [at, value] : by) {
      Terms form;
      for (std::size_t i = 0; i < value.coefficients.size(); ++i)
        if (value.coefficients[i] != 0) {
          std::vector<unsigned long> e(rest.size(), 0);
          e[i] = 1;
          form[e] += value.coefficients[i];
        }
      if (value.constant != 0) form[std::vector<unsigned long>(rest.size(), 0)] += value.constant;
      for (unsigned long k = 0; k < m.exponents[at]; ++k) part = times(part, form);
    }
    for (const auto& [e, c] : part) sum[e] += c;
  }
  Polynomial out;
  for (const auto& [e, c] : sum)
    if (c != 0) out.terms.push_back({c, e});
  return out;
}

Atom substitute(const Atom& a, const Substitution& by) {
  Atom out = a;
  out.argument = substitute(a.argument, by);
  out.low = substitute(a.low, by);
  out.high = substitute(a.high, by);
  if (a.kind == AtomKind::reciprocal) out.base = substitute(a.base, by);
  return out;
}

bool is_constant(const Affine& form) {
  return std::all_of(form.coefficients.begin(), form.coefficients.end(),
                     [](long c) { return c == 0; });
}

bool is_constant(const Polynomial& p) {
  return p.terms.empty() || (p.terms.size() == 1 && is_unit_monomial(p.terms[0]));
}

bool has_fraction(const Factored& value) { return value.constant.get_den() != 1; }

}  // namespace sumwright::writers::coq
