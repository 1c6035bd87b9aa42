// How the symbols of a claim and the letters of the argument appear in formulas.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "writers/latex_layout.hpp"

namespace sumwright::writers {

/// Names of one appendix. Different symbols look different, and the letters of the argument
/// (S, F, G, ...) differ from all symbols of the claim.
class LatexNames {
 public:
  explicit LatexNames(const claim::Claim& claim);

  /// A declared symbol; nothing is known of others.
  [[nodiscard]] bool is_symbol(const std::string& name) const { return symbols_.contains(name); }
  [[nodiscard]] const Piece& symbol(const std::string& name) const { return symbols_.at(name); }

  /// A letter of the argument: S F G R B C E (functions, base terms), a p c d u v b.
  [[nodiscard]] std::string letter(char letter) const;
  /// Variables that no symbol of the claim uses, for conventions: a number, a length.
  [[nodiscard]] const std::string& number() const { return number_; }
  [[nodiscard]] const std::string& length() const { return length_; }

 private:
  void add(const std::string& name);
  [[nodiscard]] bool taken(char letter) const;

  std::map<std::string, Piece> symbols_;
  std::string number_;
  std::string length_;
};

}  // namespace sumwright::writers
