// Shared by the tests of terms and proofs: settings from short texts, and the values of atoms by
// their definitions, written anew so that nothing of the code under test is used.
#pragma once

#include <gmpxx.h>

#include <cstdlib>
#include <memory>
#include <optional>
#include <random>
#include <string>
#include <vector>

#include "claim/reader.hpp"
#include "term/conversion.hpp"
#include "term/evaluation.hpp"
#include "term/product.hpp"
#include "term/setting.hpp"

namespace sumwright::testing {

/// A claim file in pieces; empty ones are left out.
struct ClaimParts {
  std::string summand = "binomial(n, k)";
  std::string low = "0";
  std::string high = "n";
  std::string closed = {};
  std::string parameters = {};  ///< lines of the table
  std::string assume = {};      ///< `"m >= 1", "x != 2"`
  std::string recurrence = {};  ///< `"-2", "1"`
  std::string right_side = {};
  std::string certificate = {};
  long from = 0;
};

inline std::string claim_file(const ClaimParts& p) {
  std::string out = "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = " + std::to_string(p.from);
  if (!p.assume.empty()) out += "\nassume = [" + p.assume + "]";
  out += "\n[sum]\nsummand = \"" + p.summand + "\"\n";
  if (!p.low.empty())
    out += "over = [ { index = \"k\", low = \"" + p.low + "\", high = \"" + p.high + "\" } ]\n";
  if (!p.closed.empty()) out += "[equals]\nclosed = \"" + p.closed + "\"\n";
  if (!p.parameters.empty()) out += "[parameters]\n" + p.parameters + "\n";
  if (p.recurrence.empty()) return out;
  out += "[evidence]\nrecurrence = [" + p.recurrence + "]\n";
  if (!p.right_side.empty()) out += "right_side = \"" + p.right_side + "\"\n";
  if (!p.certificate.empty()) out += "certificate = { k = \"" + p.certificate + "\" }\n";
  return out;
}

inline std::shared_ptr<const claim::Claim> read_claim(const ClaimParts& parts) {
  return std::make_shared<claim::Claim>(claim::read_claim_text("t.toml", claim_file(parts)).claim);
}

/// n, k, an integer parameter m >= 0, a rational parameter x that is no integer.
inline ClaimParts usual_parts() {
  ClaimParts parts;
  parts.parameters =
      "m = { in = \"integers\", at_least = 0 }\nx = { in = \"rationals\", not = [\"integers\"] }";
  return parts;
}
inline term::Setting usual_setting() { return term::make_setting(read_claim(usual_parts())); }
constexpr std::size_t kN = 0;
constexpr std::size_t kK = 1;
constexpr std::size_t kM = 2;
constexpr std::size_t kX = 3;

/// hypotheses, n >= 0, 0 <= k <= n.
inline term::Facts usual_facts(const term::Setting& setting) {
  const term::Affine k = term::Affine::symbol(setting.size(), kK);
  const term::Affine n = term::Affine::symbol(setting.size(), kN);
  return setting.from(0).with(k).with(n - k);
}

inline claim::ExpressionPtr parse(const term::Setting& setting, const std::string& text) {
  std::vector<std::string> names;
  for (const proof::Symbol& s : setting.symbols) names.push_back(s.name);
  const claim::Source source{"expression", text};
  return claim::parse_expression(source, {0, text.size()}, names);
}

inline term::Affine affine(const term::Setting& setting, const std::string& text) {
  return term::to_affine(setting, *parse(setting, text));
}
inline algebra::Polynomial polynomial_of(const term::Setting& setting, const std::string& text) {
  return term::to_rational_function(setting, *parse(setting, text))->numerator();
}

inline term::Conversion convert(const term::Setting& setting, const std::string& text) {
  return term::convert(setting, usual_facts(setting), parse(setting, text));
}

// ---------------------------------------------------------------- values by definition

using Point = std::vector<mpq_class>;  ///< one value per symbol of the setting
using Number = std::optional<mpq_class>;

inline mpz_class value_of(const term::Affine& form, const Point& at) {
  mpq_class out = form.constant;
  for (std::size_t i = 0; i < form.coefficients.size(); ++i) out += form.coefficients[i] * at[i];
  return out.get_num();
}

inline Number power_of(const mpq_class& base, const mpz_class& exponent) {
  if (exponent < 0 && base == 0) return std::nullopt;
  mpq_class out = 1;
  for (mpz_class i = 0; i < abs(exponent); ++i) out *= base;
  return exponent < 0 ? mpq_class(1 / out) : out;
}

/// Product of (a + t), low <= t < high; high < low by reciprocals.
inline Number interval_of(const mpq_class& a, const mpz_class& low, const mpz_class& high) {
  mpq_class out = 1;
  for (mpz_class t = low; t < high; ++t) out *= a + t;
  for (mpz_class t = high; t < low; ++t) {
    if (a + t == 0) return std::nullopt;
    out /= a + t;
  }
  return out;
}

inline Number value_of(const term::Atom& atom, const Point& at) {
  using term::AtomKind;
  const mpz_class argument = value_of(atom.argument, at);
  switch (atom.kind) {
    case AtomKind::factorial:
      if (argument < 0) return std::nullopt;
      return mpq_class(mpz_class::factorial(argument));
    case AtomKind::reciprocal_factorial:
      if (argument < 0) return mpq_class(0);
      return mpq_class(1, mpz_class::factorial(argument));
    case AtomKind::power:
      return power_of(atom.base.evaluate_rational(at), argument);
    case AtomKind::interval_product:
    case AtomKind::reciprocal_interval_product: {
      const mpq_class a = atom.base.evaluate_rational(at) / atom.scale;
      const Number out = interval_of(a, value_of(atom.low, at), value_of(atom.high, at));
      if (!out || atom.kind == AtomKind::interval_product) return out;
      if (*out == 0) return std::nullopt;
      return mpq_class(1 / *out);
    }
    case AtomKind::reciprocal: {
      const mpq_class p = atom.base.evaluate_rational(at);
      if (p == 0) return std::nullopt;
      return mpq_class(1 / p);
    }
  }
  return std::nullopt;
}

inline Number value_of(const algebra::Factored& f, const Point& at) {
  mpq_class out = f.constant;
  for (const auto& [p, e] : f.factors) {
    const Number power = power_of(p.evaluate_rational(at), e);
    if (!power) return std::nullopt;
    out *= *power;
  }
  return out;
}

inline Number value_of(const term::Product& product, const Point& at) {
  Number out = value_of(product.coefficient, at);
  for (const auto& [atom, exponent] : product.atoms) {
    const Number value = value_of(atom, at);
    if (!value || !out) return std::nullopt;
    *out *= *power_of(*value, exponent);
  }
  return out;
}

inline Number value_of(const std::vector<term::Product>& products, const Point& at) {
  mpq_class out = 0;
  for (const term::Product& p : products) {
    const Number value = value_of(p, at);
    if (!value) return std::nullopt;
    out += *value;
  }
  return out;
}

inline term::Assignment assignment(const term::Setting& setting, const Point& at) {
  term::Assignment out;
  for (std::size_t i = 0; i < setting.size(); ++i) out[setting.symbols[i].name] = at[i];
  return out;
}

// ---------------------------------------------------------------- random input

inline std::uint64_t random_seed() {
  static const std::uint64_t seed = [] {
    const char* text = std::getenv("SUMWRIGHT_TEST_SEED");
    return text == nullptr ? std::random_device{}() : std::strtoull(text, nullptr, 10);
  }();
  return seed;
}
/// `base` cases times the effort, never 0.
inline unsigned long effort(unsigned long base) {
  const char* text = std::getenv("SUMWRIGHT_TEST_EFFORT");
  const double factor = text == nullptr ? 1.0 : std::strtod(text, nullptr);
  return std::max(1UL, static_cast<unsigned long>(static_cast<double>(base) * factor));
}

class RandomTerms {
 public:
  RandomTerms(const term::Setting& setting, std::uint64_t seed)
      : setting_(setting), random_(seed) {}

  long pick(long low, long high) { return std::uniform_int_distribution<long>(low, high)(random_); }

  /// Slopes in n, k, m within +-2, none in x.
  term::Affine form(long constant) {
    term::Affine out = term::Affine::of(setting_.size(), pick(-constant, constant));
    for (std::size_t i : {kN, kK, kM}) out.coefficients[i] = pick(-2, 2);
    return out;
  }

  /// Never a number: factorials of negative numbers do not pass the conversion.
  term::Affine symbolic_form(long constant) {
    term::Affine out = form(constant);
    if (out.is_constant()) out.coefficients[kN] = 1;
    return out;
  }

  term::Atom atom() {
    const algebra::RingPtr& ring = setting_.ring;
    switch (pick(0, 6)) {
      case 0:
        return term::factorial_atom(ring, symbolic_form(3));
      case 1:
        return term::reciprocal_factorial_atom(ring, symbolic_form(3));
      case 2:
        return term::power_atom(algebra::Polynomial(ring, pick(0, 1) == 0 ? -1 : pick(2, 3)),
                                symbolic_form(2));
      case 3:
        return term::power_atom(polynomial_of(setting_, pick(0, 1) == 0 ? "x" : "x + 2"),
                                symbolic_form(2));
      case 4:
        return term::reciprocal_atom(ring, polynomial_of(setting_, "2*k + 1"));
      default:
        break;
    }
    const char* const bases[] = {"x", "1", "0"};
    const long which = pick(0, 2);
    const term::Affine low = which == 2 ? symbolic_form(2) : form(2);
    term::Affine high = form(2);
    // Literal lengths are never negative, and of the base 0 there are no others.
    if (which == 2 || (high - low).is_constant()) high = low + pick(0, 3);
    return term::interval_atom(polynomial_of(setting_, bases[which]), which == 1 ? 2 : 1, low, high,
                               pick(0, 1) == 0);
  }

  term::Product product(long most_atoms) {
    term::Product out;
    out.coefficient.constant = pick(1, 5) * (pick(0, 1) == 0 ? 1 : -1);
    for (long i = pick(1, most_atoms); i > 0; --i)
      out.multiply(atom(), static_cast<unsigned>(pick(1, 2)));
    if (pick(0, 2) == 0) out.coefficient.multiply(polynomial_of(setting_, "n + k + 1"), 1);
    return out;
  }

  /// n, k, m integers, x = c + 1/2 or c + 1/3 or c + 2/3.
  Point point(long size) {
    Point out(setting_.size());
    for (std::size_t i : {kN, kK, kM}) out[i] = pick(i == kM ? 0 : -size, size);
    const long q = pick(2, 3);
    out[kX] = mpq_class(pick(-3, 3) * q + 1, static_cast<unsigned long>(q));
    out[kX].canonicalize();
    return out;
  }

 private:
  const term::Setting& setting_;
  std::mt19937_64 random_;
};

}  // namespace sumwright::testing
