// Recursive descent over the polynomial part of templates/obligations.ebnf.
//
// Invariant: what is accepted is in the order and form of the printer, so that equal texts and
// equal values are the same thing.
#include "writers/obligations_values.hpp"

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::writers {

namespace {

[[nodiscard]] bool digit(char c) { return c >= '0' && c <= '9'; }
[[nodiscard]] bool letter(char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); }

}  // namespace

void ValueReader::refuse(const std::string& message, std::size_t at) const {
  claim::Place place;
  if (at < value_->offsets.size()) {
    place = {value_->offsets[at], 1};
  } else if (!value_->offsets.empty()) {
    place = {value_->offsets.back() + 1, 1};
  }
  throw claim::InputError(source_, place, message);
}

void ValueReader::start(const PlacedValue& value) {
  value_ = &value;
  at_ = 0;
}

void ValueReader::finish() const {
  if (!at_end()) refuse("expected the end of the value", at_);
}

bool ValueReader::take(std::string_view token) {
  if (std::string_view(value_->text).substr(at_, token.size()) != token) return false;
  at_ += token.size();
  return true;
}

mpz_class ValueReader::natural() {
  const std::size_t start = at_;
  while (digit(peek())) ++at_;
  const std::size_t length = at_ - start;
  if (length == 0) refuse("expected an integer", start);
  if (length > limits_.literal_digits) refuse("the integer is too long", start);
  if (length > 1 && value_->text[start] == '0') refuse("leading zeros are not allowed", start);
  return mpz_class(value_->text.substr(start, length), 10);
}

long ValueReader::exponent(bool negative_allowed) {
  if (!take("^")) return 1;
  const std::size_t start = at_;
  const bool negative = negative_allowed && take("-");
  const mpz_class value = natural();
  if (value > limits_.exponent) refuse("the exponent is too large", start);
  if (value == 0 || (value == 1 && !negative)) refuse("exponents 0 and 1 are not written", start);
  return negative ? -value.get_si() : value.get_si();
}

std::size_t ValueReader::symbol() {
  const std::size_t start = at_;
  while (letter(peek()) || peek() == '_' || (at_ > start && digit(peek()))) ++at_;
  const std::string name = value_->text.substr(start, at_ - start);
  for (std::size_t i = 0; i < symbols_.size(); ++i) {
    if (!name.empty() && symbols_[i].name == name) return i;
  }
  refuse(name.empty() ? "expected a symbol"
                      : claim::in_quotes(name) + " is not in the list of symbols",
         start);
}

proof::Monomial ValueReader::monomial() {
  proof::Monomial out;
  out.exponents.assign(symbols_.size(), 0);
  const std::size_t start = at_;
  bool more = true;
  if (digit(peek())) {
    out.coefficient = natural();
    more = take("*");
    if (more && out.coefficient <= 1) refuse("coefficients 0 and 1 are not written", start);
  } else {
    out.coefficient = 1;
  }
  std::size_t last = 0;
  for (bool first = true; more; first = false) {
    const std::size_t where = at_;
    const std::size_t which = symbol();
    if (!first && which <= last) refuse("symbols are not in the order of their list", where);
    last = which;
    out.exponents[which] = static_cast<unsigned long>(exponent(false));
    more = take("*");
  }
  return out;
}

proof::Polynomial ValueReader::sum() {
  proof::Polynomial out;
  bool negative = take("-");
  while (true) {
    const std::size_t where = at_;
    proof::Monomial term = monomial();
    const bool zero = term.coefficient == 0;
    if (zero && (negative || !out.terms.empty())) refuse("a term is 0", where);
    if (!out.terms.empty() && out.terms.back().exponents <= term.exponents) {
      refuse("terms are not in descending order", where);
    }
    if (negative) term.coefficient = -term.coefficient;
    if (zero) return out;
    out.terms.push_back(std::move(term));
    if (take(" + ")) {
      negative = false;
    } else if (take(" - ")) {
      negative = true;
    } else {
      return out;
    }
  }
}

std::pair<proof::Polynomial, long> ValueReader::factor() {
  proof::Polynomial base;
  if (take("(")) {
    base = sum();
    if (!take(")")) refuse("expected `)`, ` + ` or ` - `", at_);
  } else {
    proof::Monomial term;
    term.coefficient = 1;
    term.exponents.assign(symbols_.size(), 0);
    term.exponents[symbol()] = 1;
    base.terms.push_back(std::move(term));
  }
  return {std::move(base), exponent(true)};
}

proof::Polynomial ValueReader::polynomial(const PlacedValue& value) {
  start(value);
  proof::Polynomial out = sum();
  finish();
  return out;
}

proof::Factored ValueReader::factored(const PlacedValue& value) {
  start(value);
  proof::Factored out;
  const bool negative = take("-");
  bool more = true;
  if (digit(peek())) {
    const std::size_t where = at_;
    const mpz_class numerator = natural();
    mpz_class denominator = 1;
    if (take("/")) {
      denominator = natural();
      if (denominator <= 1 || gcd(numerator, denominator) != 1) {
        refuse("the fraction is not in lowest terms", where);
      }
    }
    out.constant = mpq_class(numerator, denominator);
    more = take("*");
    if (numerator == 0 && (more || negative)) refuse("a product with 0 is written as 0", where);
    if (more && out.constant == 1) refuse("the coefficient 1 is not written", where);
  }
  if (negative) out.constant = -out.constant;
  while (more) {
    out.factors.push_back(factor());
    more = take("*");
  }
  finish();
  return out;
}

mpz_class ValueReader::integer(const PlacedValue& value) {
  start(value);
  const bool negative = take("-");
  mpz_class out = natural();
  if (negative && out == 0) refuse("expected an integer", 0);
  finish();
  return negative ? mpz_class(-out) : out;
}

long ValueReader::small_integer(const PlacedValue& value) {
  const mpz_class out = integer(value);
  if (!out.fits_slong_p()) refuse("the integer is too large", 0);
  return out.get_si();
}

}  // namespace sumwright::writers
