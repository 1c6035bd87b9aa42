// From obligations.txt back to data: the reader that a re-check years later starts from.
//
// Shares no code with the stages that found or built the proof. Strict: what
// templates/obligations.ebnf does not allow is refused with its place.
#pragma once

#include <cstddef>
#include <filesystem>
#include <string>
#include <vector>

#include "claim/source.hpp"
#include "proof/proof.hpp"

namespace sumwright::writers {

/// One `key: value` or `key = value`, the value with its continuation lines joined by one blank.
struct ObligationsEntry {
  std::string section;  ///< empty before the first heading
  std::string key;
  std::string value;
  claim::Place place;  ///< of the key
};

/// Shares of one class of similar terms; they must add up to 0.
struct ObligationsClass {
  std::string section;
  std::string key;  ///< "class 2", "value 1 class 1"
  std::string base;
  std::vector<proof::Factored> shares;
};

/// A file read. Symbol positions are those of `symbols`.
struct ObligationsFile {
  std::string verdict;  ///< "established", ... (without the words NOT ESTABLISHED)
  std::string title;
  std::string claim_text;  ///< byte for byte
  std::string claim_sha256;
  std::vector<proof::Symbol> symbols;

  /// The evidence, in the claim language; empty recurrence: none.
  std::vector<std::string> recurrence;
  std::string right_side;
  std::string certificate;

  bool has_equality = false;  ///< whether the following were given
  std::string base;           ///< the base term as printed
  std::vector<proof::Factored> coefficients;
  std::vector<proof::Factored> p;
  proof::Factored weight;
  proof::Factored down;
  proof::Factored up;
  proof::Polynomial certificate_polynomial;  ///< c
  proof::Polynomial normal_form;
  mpq_class normal_scale;
  std::size_t terms = 0;  ///< sizes as stated in the file
  long degree = -1;
  std::vector<long> degrees;  ///< per symbol
  std::size_t bits = 0;

  std::vector<ObligationsClass> classes;
  std::vector<ObligationsEntry> entries;  ///< everything, in order
};

/// Limits on files from outside.
struct ObligationsLimits {
  std::size_t file_bytes = std::size_t{64} << 20U;
  std::size_t entries = 200000;
  std::size_t literal_digits = 20000;
  unsigned long exponent = 1000000;
};

/// Reads a file. A byte-order mark, and line ends converted to CR LF throughout, are accepted.
/// Throws claim::InputError.
[[nodiscard]] ObligationsFile read_obligations_file(const std::filesystem::path& path,
                                                    const ObligationsLimits& limits = {});

/// The same from a text in memory; `name` is used in messages.
[[nodiscard]] ObligationsFile read_obligations_text(std::string name, std::string text,
                                                    const ObligationsLimits& limits = {});

/// What the file says otherwise than the proof rebuilt from the claim's text, item by item, each
/// as a sentence for the user. Empty: they agree in everything.
[[nodiscard]] std::vector<std::string> differences(const ObligationsFile& file,
                                                   const proof::Proof& rebuilt);

/// Whether all polynomial identities that the file states hold, from the file alone:
///   weight * sum a_i p_i = up c(k+1) - down c = scale * normal form, the stated sizes are those of
///   the normal form, and the shares of each class add up to 0.
/// False also when the file states no identity at all. Exact: by expansion while that stays small,
/// else by evaluation at as many points as the degrees require (a polynomial of degree d_j in x_j
/// that vanishes on a grid of d_1+1 by d_2+1 by ... points is 0). Throws std::length_error when
/// neither is within reach.
[[nodiscard]] bool equality_holds(const ObligationsFile& file);

}  // namespace sumwright::writers
