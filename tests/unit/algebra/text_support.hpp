// A small reader of rational functions for tests: integers, + - * / ^, brackets, ring variables.
// It shares no code with the claim reader, so that what is printed can be read back by other code.
#pragma once

#include <cctype>
#include <cstdlib>
#include <random>
#include <stdexcept>
#include <string>

#include "algebra/rational_function.hpp"

namespace sumwright::testing {

class TextReader {
 public:
  TextReader(const algebra::RingPtr& ring, const std::string& text) : ring_(ring), text_(text) {}

  algebra::RationalFunction read() {
    const auto out = sum();
    skip();
    if (at_ != text_.size()) throw std::runtime_error("trailing text in: " + text_);
    return out;
  }

 private:
  void skip() {
    while (at_ < text_.size() && text_[at_] == ' ') ++at_;
  }
  bool accept(char c) {
    skip();
    if (at_ == text_.size() || text_[at_] != c) return false;
    ++at_;
    return true;
  }
  algebra::RationalFunction sum() {
    auto out = product();
    while (true) {
      if (accept('+')) {
        out = out + product();
      } else if (accept('-')) {
        out = out - product();
      } else {
        return out;
      }
    }
  }
  algebra::RationalFunction product() {
    auto out = signed_power();
    while (true) {
      if (accept('*')) {
        out = out * signed_power();
      } else if (accept('/')) {
        out = out / signed_power();
      } else {
        return out;
      }
    }
  }
  algebra::RationalFunction signed_power() {
    if (accept('-')) return -signed_power();
    auto base = atom();
    if (!accept('^')) return base;
    const bool negative = accept('-');
    const long exponent = std::stol(digits());
    return base.power(negative ? -exponent : exponent);
  }
  algebra::RationalFunction atom() {
    if (accept('(')) {
      auto out = sum();
      if (!accept(')')) throw std::runtime_error("bracket expected in: " + text_);
      return out;
    }
    if (at_ < text_.size() && std::isdigit(static_cast<unsigned char>(text_[at_]))) {
      return algebra::RationalFunction(algebra::Polynomial(ring_, mpz_class(digits())));
    }
    std::string name;
    while (at_ < text_.size() && std::isalnum(static_cast<unsigned char>(text_[at_]))) {
      name += text_[at_++];
    }
    for (std::size_t i = 0; i < ring_->size(); ++i) {
      if (ring_->names()[i] == name) {
        return algebra::RationalFunction(algebra::Polynomial::variable(ring_, i));
      }
    }
    throw std::runtime_error("unknown name '" + name + "' in: " + text_);
  }
  std::string digits() {
    skip();
    std::string out;
    while (at_ < text_.size() && std::isdigit(static_cast<unsigned char>(text_[at_]))) {
      out += text_[at_++];
    }
    if (out.empty()) throw std::runtime_error("number expected in: " + text_);
    return out;
  }

  algebra::RingPtr ring_;
  std::string text_;
  std::size_t at_ = 0;
};

inline algebra::RingPtr make_ring(std::vector<std::string> names) {
  return std::make_shared<const algebra::Ring>(std::move(names));
}
inline algebra::RationalFunction rational(const algebra::RingPtr& ring, const std::string& text) {
  return TextReader(ring, text).read();
}
inline algebra::Polynomial polynomial(const algebra::RingPtr& ring, const std::string& text) {
  const auto out = rational(ring, text);
  if (!out.is_polynomial()) throw std::runtime_error("not a polynomial: " + text);
  return out.numerator();
}

/// Seed of the property tests (SUMWRIGHT_TEST_SEED) and their effort (SUMWRIGHT_TEST_EFFORT).
inline unsigned long environment_number(const char* name, unsigned long fallback) {
  const char* text = std::getenv(name);
  return text == nullptr ? fallback : std::strtoul(text, nullptr, 10);
}
inline unsigned long test_seed() {
  static const unsigned long seed =
      environment_number("SUMWRIGHT_TEST_SEED", std::random_device{}());
  return seed;
}
/// `base` cases times the effort; never 0, so that a property test cannot pass by running nothing.
inline unsigned long cases(unsigned long base) {
  return std::max(1UL, base * environment_number("SUMWRIGHT_TEST_EFFORT", 1));
}

/// A random polynomial with up to `terms` terms, exponents <= degree, coefficients within +-size.
inline algebra::Polynomial random_polynomial(const algebra::RingPtr& ring, std::mt19937_64& random,
                                             unsigned terms, unsigned long degree, long size) {
  std::vector<algebra::Monomial> list;
  for (unsigned i = 0; i < terms; ++i) {
    algebra::Monomial term;
    term.coefficient = std::uniform_int_distribution<long>(-size, size)(random);
    for (std::size_t v = 0; v < ring->size(); ++v) {
      term.exponents.push_back(std::uniform_int_distribution<unsigned long>(0, degree)(random));
    }
    list.push_back(term);
  }
  return algebra::Polynomial::from_terms(ring, list);
}

}  // namespace sumwright::testing
