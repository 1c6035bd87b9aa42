// The symbols of a claim as ring variables, its hypotheses as facts, its ranges as linear
// constraints.
#pragma once

#include <map>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "algebra/polynomial.hpp"
#include "claim/claim.hpp"
#include "proof/value.hpp"
#include "term/facts.hpp"

namespace sumwright::term {

inline constexpr std::size_t running = 0;  ///< position of the running variable
inline constexpr std::size_t index = 1;    ///< position of the summation index

struct Setting {
  std::shared_ptr<const claim::Claim> claim;
  algebra::RingPtr ring;
  std::vector<proof::Symbol> symbols;  ///< one per ring variable
  std::map<std::string, std::size_t> position;
  bool has_index = false;
  Facts hypotheses;  ///< at_least and the integer-affine part of assume

  [[nodiscard]] std::size_t size() const { return symbols.size(); }
  [[nodiscard]] bool is_integer(std::size_t symbol) const {
    return symbols[symbol].kind != proof::SymbolKind::rational_parameter;
  }
  /// hypotheses and running >= least.
  [[nodiscard]] Facts from(long least) const;
};

/// Builds the setting of a single-sum claim (at most one index; the running variable of `other_sum`
/// and its index are not part of it). Throws claim::InputError when the hypotheses are
/// contradictory.
[[nodiscard]] Setting make_setting(const std::shared_ptr<const claim::Claim>& claim);

/// A number of the claim as a machine integer. Throws claim::InputError (with the place) when it is
/// too large.
[[nodiscard]] long checked_long(const Setting& setting, const mpz_class& value, claim::Place place);

/// An expression known to be integer-affine in integer symbols.
/// Throws claim::InputError (with the place) when it is not.
[[nodiscard]] Affine to_affine(const Setting& setting, const claim::Expression& expression);

/// One alternative of a condition on the index: every form >= 0.
using Conjunction = std::vector<Affine>;

/// A range end as linear arithmetic: affine when it is; always `inside` (k on the right side of it)
/// and `outside` (strictly beyond it) as disjunctions of conjunctions.
struct End {
  std::optional<Affine> affine;
  std::vector<Conjunction> inside;
  std::vector<Conjunction> outside;
};

/// Upper end: inside means k <= bound; lower end: k >= bound. Finite bounds only.
/// Nothing when the bound nests floor in a way that is not linear.
[[nodiscard]] std::optional<End> make_end(const Setting& setting, const claim::Bound& bound,
                                          bool upper);
/// The end with n := n + by.
[[nodiscard]] End shift(const End& end, std::size_t symbol, long by);

/// Why a polynomial is nonzero wherever `facts` hold; nothing when that is not provable by the
/// methods of proof::NonzeroFactor. `undecided` then names the first factor without a reason.
[[nodiscard]] std::optional<proof::Nonzero> decide_nonzero(const Setting& setting,
                                                           const Facts& facts,
                                                           const algebra::Factored& polynomial,
                                                           std::string* undecided = nullptr);

/// Whether a factor can vanish only through special values of rational parameters (rule R7), or
/// through integer parameters (rule R6): for messages.
[[nodiscard]] bool involves_rational_parameter(const Setting& setting,
                                               const algebra::Polynomial& polynomial);

/// Plain copies for the Proof value.
[[nodiscard]] proof::Polynomial plain(const algebra::Polynomial& polynomial);
[[nodiscard]] proof::Factored plain(const algebra::Factored& value);
[[nodiscard]] proof::Affine plain(const Affine& form);

/// "n - k >= 0"-style text of a form in the claim's symbols.
[[nodiscard]] std::string text(const Setting& setting, const Affine& form);

}  // namespace sumwright::term
