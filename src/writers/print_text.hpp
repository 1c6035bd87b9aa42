// Values of a proof as plain text: the vocabulary of obligations.txt.
//
//   polynomials   3*n^2*k - 1, terms in the order of the value
//   products      (n + 1)^2*fact(n)^2*rfact(k)^2
//   fact(L) = L!; rfact(L) = 1/L!, 0 for L < 0; ip(a; i, j) = product of (a + t), i <= t < j;
//   rip(a; i, j) = 1/ip(a; i, j); inv(P) = 1/P
#pragma once

#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers {

/// Prints values whose symbols are those given, by position.
class TextPrinter {
 public:
  explicit TextPrinter(const std::vector<proof::Symbol>& symbols) : symbols_(symbols) {}

  [[nodiscard]] std::string polynomial(const proof::Polynomial& value) const;
  [[nodiscard]] std::string factored(const proof::Factored& value) const;
  [[nodiscard]] std::string affine(const proof::Affine& value) const;
  [[nodiscard]] std::string atom(const proof::Atom& value) const;
  [[nodiscard]] std::string product(const proof::Product& value) const;
  /// `fact(n) * rfact(n) = 1 [c2]`, the exponent shown when it is not 1.
  [[nodiscard]] std::string unit(const proof::Unit& value) const;
  /// `rfact(n - k) = (n - k + 1)*rfact(n - k + 1) [c3]`.
  [[nodiscard]] std::string step(const proof::AtomStep& value) const;
  /// Why one factor is nonzero: `n + 1: linear arithmetic`.
  [[nodiscard]] std::string nonzero_factor(const proof::NonzeroFactor& value) const;

 private:
  [[nodiscard]] std::string monomial(const proof::Monomial& value) const;
  /// Bracketed unless it is one symbol (or, if allowed, a nonnegative integer).
  [[nodiscard]] std::string bracketed(const proof::Polynomial& value, bool bare_integer) const;
  [[nodiscard]] std::string interval(const proof::Atom& value) const;

  const std::vector<proof::Symbol>& symbols_;
};

/// `c1, c2`, or `none`.
[[nodiscard]] std::string id_list(const std::vector<std::string>& ids);

/// ` [c1, c2]`, or nothing.
[[nodiscard]] std::string bracketed_ids(const std::vector<std::string>& ids);

/// Words of the exports for enumerated values; `record.json` uses the same.
[[nodiscard]] std::string word(proof::ConditionKind kind);
[[nodiscard]] std::string word(proof::Settled settled);
[[nodiscard]] std::string word(proof::Verdict verdict);
[[nodiscard]] std::string word(proof::Subject subject);
[[nodiscard]] std::string word(proof::LeafRule rule);

/// Number of terms, total degree (-1 for 0), and bits of the largest coefficient.
struct Size {
  std::size_t terms = 0;
  long degree = -1;
  std::size_t bits = 0;
};
[[nodiscard]] Size size_of(const proof::Polynomial& value);
/// Degree in one symbol; -1 for 0.
[[nodiscard]] long degree_in(const proof::Polynomial& value, std::size_t symbol);

/// Whether the value is one symbol to the first power with coefficient 1; which one.
[[nodiscard]] bool is_symbol(const proof::Polynomial& value, std::size_t* which);
/// Whether the value is an integer; which one.
[[nodiscard]] bool is_integer(const proof::Polynomial& value, mpz_class* which);

}  // namespace sumwright::writers
