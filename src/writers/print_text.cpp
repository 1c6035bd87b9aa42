// From the plain data of a proof to text that the reader of obligations reads back.
//
// Invariant: different polynomials, factored polynomials and affine forms print differently.
#include "writers/print_text.hpp"

#include <fmt/format.h>

#include <algorithm>

namespace sumwright::writers {

namespace {

// Appends a signed term to a sum: ` - 3*n` for the text `-3*n`.
void append_term(std::string& out, const std::string& term) {
  if (out.empty()) {
    out = term;
  } else if (term.front() == '-') {
    out += " - " + term.substr(1);
  } else {
    out += " + " + term;
  }
}

[[nodiscard]] std::string raised(const std::string& base, long exponent) {
  return exponent == 1 ? base : fmt::format("{}^{}", base, exponent);
}

}  // namespace

std::string TextPrinter::monomial(const proof::Monomial& value) const {
  std::string powers;
  for (std::size_t i = 0; i < value.exponents.size(); ++i) {
    if (value.exponents[i] == 0) continue;
    if (!powers.empty()) powers += '*';
    powers += raised(symbols_[i].name, static_cast<long>(value.exponents[i]));
  }
  if (powers.empty()) return value.coefficient.get_str();
  if (value.coefficient == 1) return powers;
  if (value.coefficient == -1) return "-" + powers;
  return value.coefficient.get_str() + "*" + powers;
}

std::string TextPrinter::polynomial(const proof::Polynomial& value) const {
  std::string out;
  for (const proof::Monomial& term : value.terms) append_term(out, monomial(term));
  return out.empty() ? "0" : out;
}

std::string TextPrinter::bracketed(const proof::Polynomial& value, bool bare_integer) const {
  std::size_t which = 0;
  if (is_symbol(value, &which)) return symbols_[which].name;
  mpz_class number;
  if (bare_integer && is_integer(value, &number) && number >= 0) return number.get_str();
  return "(" + polynomial(value) + ")";
}

std::string TextPrinter::factored(const proof::Factored& value) const {
  if (value.constant == 0 || value.factors.empty()) return value.constant.get_str();
  std::string out;
  if (value.constant == -1) {
    out = "-";
  } else if (value.constant != 1) {
    out = value.constant.get_str() + "*";
  }
  for (std::size_t i = 0; i < value.factors.size(); ++i) {
    if (i > 0) out += '*';
    out += raised(bracketed(value.factors[i].first, false), value.factors[i].second);
  }
  return out;
}

std::string TextPrinter::affine(const proof::Affine& value) const {
  std::string out;
  for (std::size_t i = 0; i < value.coefficients.size(); ++i) {
    const long c = value.coefficients[i];
    if (c == 0) continue;
    const std::string& name = symbols_[i].name;
    append_term(out, c == 1 ? name : c == -1 ? "-" + name : fmt::format("{}*{}", c, name));
  }
  if (value.constant != 0 || out.empty()) append_term(out, std::to_string(value.constant));
  return out;
}

std::string TextPrinter::interval(const proof::Atom& value) const {
  std::string base = polynomial(value.base);
  if (value.base_scale != 1) {
    base = bracketed(value.base, true) + "/" + value.base_scale.get_str();
  }
  return fmt::format("({}; {}, {})", base, affine(value.low), affine(value.high));
}

std::string TextPrinter::atom(const proof::Atom& value) const {
  switch (value.kind) {
    case proof::AtomKind::factorial:
      return "fact(" + affine(value.argument) + ")";
    case proof::AtomKind::reciprocal_factorial:
      return "rfact(" + affine(value.argument) + ")";
    case proof::AtomKind::power:
      return bracketed(value.base, true) + "^(" + affine(value.argument) + ")";
    case proof::AtomKind::interval_product:
      return "ip" + interval(value);
    case proof::AtomKind::reciprocal_interval_product:
      return "rip" + interval(value);
    case proof::AtomKind::reciprocal:
      break;
  }
  return "inv(" + polynomial(value.base) + ")";
}

std::string TextPrinter::product(const proof::Product& value) const {
  std::string coefficient = factored(value.coefficient);
  if (value.atoms.empty() || value.coefficient.constant == 0) return coefficient;
  std::string out;
  if (coefficient == "-1") {
    out = "-";
  } else if (coefficient != "1") {
    out = coefficient + " * ";
  }
  for (std::size_t i = 0; i < value.atoms.size(); ++i) {
    if (i > 0) out += " * ";
    const auto& [factor, exponent] = value.atoms[i];
    const bool nested = exponent != 1 && factor.kind == proof::AtomKind::power;
    const std::string text = atom(factor);
    out += raised(nested ? "(" + text + ")" : text, static_cast<long>(exponent));
  }
  return out;
}

std::string TextPrinter::unit(const proof::Unit& value) const {
  const bool polynomial_left = value.right.kind == proof::AtomKind::reciprocal;
  const std::string left =
      polynomial_left ? "(" + polynomial(value.right.base) + ")" : atom(value.left);
  std::string out = left + " * " + atom(value.right);
  if (value.exponent != 1) out = fmt::format("({})^{}", out, value.exponent);
  return fmt::format("{} = 1 [{}]", out, value.condition);
}

std::string TextPrinter::step(const proof::AtomStep& value) const {
  const std::string factor = factored(value.factor);
  std::string to = atom(value.to);
  if (!value.reciprocals.empty()) {
    to.clear();
    for (const proof::Atom& one : value.reciprocals) to += (to.empty() ? "" : " * ") + atom(one);
  }
  return fmt::format("{} = {}{}", atom(value.from), factor == "1" ? to : factor + " * " + to,
                     bracketed_ids(value.conditions));
}

std::string TextPrinter::nonzero_factor(const proof::NonzeroFactor& value) const {
  const std::string factor = polynomial(value.factor);
  switch (value.method) {
    case proof::NonzeroFactor::Method::constant:
      return factor + ": a nonzero number";
    case proof::NonzeroFactor::Method::linear:
      return factor + ": linear arithmetic on the region";
    case proof::NonzeroFactor::Method::positive: {
      std::string by;
      for (std::size_t i = 0; i < value.shift.size() && i < symbols_.size(); ++i) {
        if (value.shift[i] == 0 || degree_in(value.factor, i) < 1) continue;
        by +=
            fmt::format("{}{} := {} {} {}", by.empty() ? "" : ", ", symbols_[i].name,
                        symbols_[i].name, value.shift[i] < 0 ? '-' : '+', std::abs(value.shift[i]));
      }
      return fmt::format("{}: {} coefficients and {} constant term{}{}", factor,
                         value.negated ? "no positive" : "no negative",
                         value.negated ? "a negative" : "a positive", by.empty() ? "" : " after ",
                         by);
    }
    case proof::NonzeroFactor::Method::excluded:
      return fmt::format("{}: the claim excludes this value of {}", factor,
                         symbols_[value.parameter].name);
    case proof::NonzeroFactor::Method::assumed:
      break;
  }
  return fmt::format("{}: assumption {} of the claim", factor, value.assumption + 1);
}

std::string bracketed_ids(const std::vector<std::string>& ids) {
  return ids.empty() ? "" : fmt::format(" [{}]", fmt::join(ids, ", "));
}

std::string id_list(const std::vector<std::string>& ids) {
  return ids.empty() ? "none" : fmt::format("{}", fmt::join(ids, ", "));
}

Size size_of(const proof::Polynomial& value) {
  Size size;
  size.terms = value.terms.size();
  for (const proof::Monomial& term : value.terms) {
    unsigned long degree = 0;
    for (const unsigned long e : term.exponents) degree += e;
    size.degree = std::max(size.degree, static_cast<long>(degree));
    size.bits = std::max(size.bits, mpz_sizeinbase(term.coefficient.get_mpz_t(), 2));
  }
  return size;
}

long degree_in(const proof::Polynomial& value, std::size_t symbol) {
  long degree = -1;
  for (const proof::Monomial& term : value.terms) {
    if (symbol < term.exponents.size()) {
      degree = std::max(degree, static_cast<long>(term.exponents[symbol]));
    }
  }
  return degree;
}

bool is_symbol(const proof::Polynomial& value, std::size_t* which) {
  if (value.terms.size() != 1 || value.terms[0].coefficient != 1) return false;
  unsigned long total = 0;
  const auto& exponents = value.terms[0].exponents;
  for (std::size_t i = 0; i < exponents.size(); ++i) {
    total += exponents[i];
    if (exponents[i] == 1) *which = i;
  }
  return total == 1;
}

bool is_integer(const proof::Polynomial& value, mpz_class* which) {
  if (value.terms.empty()) {
    *which = 0;
    return true;
  }
  const auto& exponents = value.terms[0].exponents;
  if (value.terms.size() != 1 ||
      std::any_of(exponents.begin(), exponents.end(), [](unsigned long e) { return e != 0; })) {
    return false;
  }
  *which = value.terms[0].coefficient;
  return true;
}

}  // namespace sumwright::writers
