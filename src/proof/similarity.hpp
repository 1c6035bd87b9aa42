// Similar products brought to a common base: the working forms behind Base and Instance.
//
// Base term (design, section 2): over all products of a class, every rfact form at its largest
// shift, every fact form at its smallest, the longest reciprocal and the shortest interval
// products, the smallest exponents. Then each product is a polynomial times the base, by one law
// per atom:
//   rfact(m-1) = m rfact(m) for every m;  fact(m+1) = (m+1) fact(m) for m >= 0;  and alike.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "term/conversion.hpp"
#include "term/product.hpp"

namespace sumwright::proof::building {

/// A condition that an argument needs on its region: form >= 0, or polynomial != 0; both when both
/// are set.
struct Need {
  ConditionKind kind = ConditionKind::factorial_argument;
  std::optional<term::Affine> nonnegative;
  std::optional<algebra::Factored> nonzero;
  /// The law of a power holds for every exponent when its base is not 0: in place of `nonnegative`.
  std::optional<algebra::Factored> or_nonzero = {};
};

/// base^L steps by its law where L >= 0 or base != 0; nothing to ask of a numeric base.
[[nodiscard]] std::vector<Need> power_needs(const algebra::Polynomial& base,
                                            const term::Affine& exponent);

struct Step {
  AtomStep::Side side = AtomStep::Side::left;
  term::Atom from;
  std::optional<term::Atom> to;  ///< none: a literal step
  unsigned steps = 0;
  unsigned multiplicity = 1;
  algebra::Factored factor;  ///< of one copy
  std::vector<Need> needs;
  std::vector<term::Atom> reciprocals = {};  ///< AtomStep::reciprocals
};

struct UnitDraft {
  term::Atom left;
  term::Atom right;
  unsigned exponent = 1;
  Need need;
};

/// product = polynomial * base, with the steps that show it.
struct Bringing {
  term::Product product;
  term::Product base;
  algebra::Factored polynomial;
  std::vector<UnitDraft> left_units;
  std::vector<UnitDraft> right_units;
  std::vector<Step> steps;
  std::optional<algebra::Factored> cancelled;  ///< both sides multiplied by it
  term::Product right;  ///< base times `right` coefficient where the right side carries one

  /// Every need of steps, units and the cancelled factor.
  [[nodiscard]] std::vector<Need> needs() const;
};

/// The base of products known to be similar; nothing (with `why`) when the laws cannot bring them
/// together.
[[nodiscard]] std::optional<term::Product> common_base(const algebra::RingPtr& ring,
                                                       const std::vector<term::Product>& products,
                                                       std::string& why);

/// product = polynomial * base; nothing (with `why`) when the laws do not reach.
[[nodiscard]] std::optional<Bringing> bring(const algebra::RingPtr& ring,
                                            const term::Product& product, const term::Product& base,
                                            std::string& why);

/// down(k+1) base(k+1) = up base(k): the shift of a base in the index, with common factors
/// cancelled.
struct IndexShift {
  algebra::Factored down;  ///< as a function of k (not k+1)
  algebra::Factored up;
  Bringing bringing;  ///< left: down(k+1) * base(k+1), right: up * base(k)
};
[[nodiscard]] std::optional<IndexShift> index_shift(const algebra::RingPtr& ring,
                                                    const term::Product& base, std::string& why);

/// Groups products into classes of similar ones; each entry lists positions.
[[nodiscard]] std::vector<std::vector<std::size_t>> similarity_classes(
    const algebra::RingPtr& ring, const std::vector<term::Product>& products);

}  // namespace sumwright::proof::building
