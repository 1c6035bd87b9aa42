// How the symbols of a claim and the letters of the argument appear in formulas.
#pragma once

#include <map>
#include <string>
#include <utility>
#include <vector>

#include "proof/proof.hpp"
#include "writers/latex_formula.hpp"

namespace sumwright::writers {

/// Names of one appendix. Different symbols look different, and the letters of the argument
/// (S, F, G, ...) differ from all symbols of the claim.
class LatexNames {
 public:
  explicit LatexNames(const claim::Claim& claim);

  /// A declared symbol; nothing is known of others.
  [[nodiscard]] bool is_symbol(const std::string& name) const { return symbols_.contains(name); }
  [[nodiscard]] const Piece& symbol(const std::string& name) const { return symbols_.at(name); }

  /// Symbols whose names are too long for formulas, each with the letter that stands for it.
  [[nodiscard]] const std::vector<std::pair<std::string, std::string>>& replaced() const {
    return replaced_;
  }

  /// A letter of the argument: S F G R B C E (functions, base terms), a p c d u v b.
  [[nodiscard]] std::string letter(char letter) const;
  /// Variables that no symbol of the claim uses, for conventions: a number, a length.
  [[nodiscard]] const std::string& number() const { return number_; }
  [[nodiscard]] const std::string& length() const { return length_; }

 private:
  void add(const std::string& name);
  /// A letter for a long name: one of `wanted` if it is free, then others.
  void replace(const std::string& name, const std::string& wanted);
  [[nodiscard]] bool taken(char letter) const;

  std::map<std::string, Piece> symbols_;
  std::vector<std::pair<std::string, std::string>> replaced_;
  std::string number_;
  std::string length_;
};

}  // namespace sumwright::writers
