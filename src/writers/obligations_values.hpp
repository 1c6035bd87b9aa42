// Polynomials and numbers of obligations.txt, from text to data.
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "claim/source.hpp"
#include "proof/value.hpp"
#include "writers/obligations_reader.hpp"

namespace sumwright::writers {

/// A value together with where each of its bytes stands in the file.
struct PlacedValue {
  std::string text;
  std::vector<std::size_t> offsets;
};

/// Reads the values of one file; the references must outlive it. All functions refuse anything but
/// the form that writers print, and throw claim::InputError.
class ValueReader {
 public:
  ValueReader(const claim::Source& source, const std::vector<proof::Symbol>& symbols,
              const ObligationsLimits& limits)
      : source_(source), symbols_(symbols), limits_(limits) {}

  [[nodiscard]] proof::Polynomial polynomial(const PlacedValue& value);
  [[nodiscard]] proof::Factored factored(const PlacedValue& value);
  [[nodiscard]] mpz_class integer(const PlacedValue& value);
  /// An integer that fits a long.
  [[nodiscard]] long small_integer(const PlacedValue& value);

 private:
  [[nodiscard]] bool at_end() const { return at_ >= value_->text.size(); }
  [[nodiscard]] char peek() const { return at_end() ? '\0' : value_->text[at_]; }
  [[nodiscard]] bool take(std::string_view token);
  [[nodiscard]] mpz_class natural();
  [[nodiscard]] long exponent(bool negative_allowed);
  [[nodiscard]] std::size_t symbol();
  [[nodiscard]] proof::Polynomial sum();
  [[nodiscard]] proof::Monomial monomial();
  [[nodiscard]] std::pair<proof::Polynomial, long> factor();
  [[noreturn]] void refuse(const std::string& message, std::size_t at) const;
  void start(const PlacedValue& value);
  void finish() const;

  const claim::Source& source_;
  const std::vector<proof::Symbol>& symbols_;
  const ObligationsLimits& limits_;
  const PlacedValue* value_ = nullptr;
  std::size_t at_ = 0;
};

}  // namespace sumwright::writers
