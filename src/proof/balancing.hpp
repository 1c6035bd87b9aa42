// Finitely many products that must add up to 0, class by class (terms that are similar, added up).
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "proof/similarity.hpp"
#include "term/setting.hpp"

namespace sumwright::proof::building {

/// A term with what a reader should know about it (BalanceTerm without its settlement).
struct TermDraft {
  BalanceTerm::Origin origin = BalanceTerm::Origin::explicit_point;
  std::string text;
  unsigned shift = 0;
  long offset = 0;
  bool at_upper = true;
  std::size_t piece = 0;
  std::optional<term::Affine> point;
  term::Product product;

  // Filled by `balance`:
  bool zero_coefficient = false;
  std::optional<term::Atom> zero_atom;
  std::optional<term::Affine> zero_factor;  ///< with zero_atom, when it vanishes only beside this
  std::size_t group = 0;
  std::optional<Bringing> bringing;
};

struct GroupDraft {
  term::Product base;
  std::vector<std::size_t> members;
  algebra::RationalFunction total;  ///< sum of the members' polynomials
};

struct BalanceDraft {
  std::vector<TermDraft> terms;
  std::vector<GroupDraft> groups;

  [[nodiscard]] bool holds() const;
  [[nodiscard]] std::vector<Need> needs() const;
};

/// Groups the terms and brings each class to its base; `facts` decide which terms vanish because an
/// rfact argument is negative. Nothing, with `why`, when the laws do not reach.
[[nodiscard]] std::optional<BalanceDraft> balance(const term::Setting& setting,
                                                  const term::Facts& facts,
                                                  std::vector<TermDraft> terms, std::string& why);

}  // namespace sumwright::proof::building
