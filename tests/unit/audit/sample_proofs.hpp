// Two whole proofs, written down by hand for the tests of the audit, and the small language in
// which they are written.
#pragma once

#include <string>
#include <utility>
#include <vector>

#include "claim/claim.hpp"
#include "proof/proof.hpp"

namespace sumwright::audit::testing {

/// Symbols by position: n, k, then the names given here.
class Notation {
 public:
  explicit Notation(std::vector<std::string> names) : names_(std::move(names)) {}
  [[nodiscard]] proof::Polynomial polynomial(const std::string& text) const;
  [[nodiscard]] proof::Affine affine(const std::string& text) const;
  /// constant * product of (text)^exponent.
  [[nodiscard]] proof::Factored factored(
      const mpq_class& constant, const std::vector<std::pair<std::string, long>>& factors) const;
  [[nodiscard]] proof::Atom fact(const std::string& argument) const;
  [[nodiscard]] proof::Atom rfact(const std::string& argument) const;
  [[nodiscard]] proof::Atom power(const std::string& base, const std::string& exponent) const;
  [[nodiscard]] proof::Region region(const std::vector<std::string>& nonnegative) const;
  [[nodiscard]] const std::vector<std::string>& names() const { return names_; }

 private:
  std::vector<std::string> names_;
};

using Atoms = std::vector<std::pair<proof::Atom, unsigned>>;
[[nodiscard]] proof::Product product(const proof::Factored& coefficient, const Atoms& atoms);
/// The same atoms with another coefficient.
[[nodiscard]] proof::Product over(const proof::Factored& coefficient, const proof::Product& base);
[[nodiscard]] proof::Instance instance(const std::string& id, const proof::Region& region,
                                       const proof::Product& left, const proof::Product& right);

[[nodiscard]] std::shared_ptr<const claim::Claim> read_claim(const std::string& text);

/// sum over k = 0..n of binomial(n,k)^2 = binomial(2n,n): natural ends.
[[nodiscard]] std::string squares_claim_text();
[[nodiscard]] proof::Proof squares_proof();
/// The same sum as a claimed recurrence: no closed form, a balance of the ends alone.
[[nodiscard]] proof::Proof squares_recurrence_proof();
/// sum over k = 0..n of binomial(n+k,k)/2^k = 2^n: an upper end that is not natural, one explicit
/// point.
[[nodiscard]] proof::Proof halves_proof();
/// sum over k = 0..n of binomial(n,k) x^k = (x+1)^n for rational x, x != -1 excluded.
[[nodiscard]] proof::Proof powers_proof();

}  // namespace sumwright::audit::testing
