// From a claim file to a Claim (format 1).
#pragma once

#include <filesystem>
#include <memory>
#include <string>
#include <vector>

#include "claim/claim.hpp"

namespace sumwright::claim {

/// Limits that keep a stranger's file from exhausting the machine. A tree that was read is
/// never deeper than `tree_depth`, so recursive walks and its destruction are safe.
struct Limits {
  std::size_t file_bytes = 1U << 20U;
  std::size_t nesting = 200;          ///< brackets, signs and powers one inside the other
  std::size_t nodes = 20000;          ///< nodes of one expression
  std::size_t literal_digits = 1000;  ///< digits of one integer literal
  long exponent = 1000;               ///< largest literal exponent, in absolute value
  std::size_t tree_depth = 4000;      ///< depth of the tree: long sums lean to the left
  std::size_t power_bits = 100000;    ///< estimated size of an expression once powers are expanded
  long magnitude = 1000000;           ///< of `from`, `at_least`, and integers in affine forms
  std::size_t entries = 1000;         ///< entries of one array
  std::size_t parameters = 100;
  std::size_t ranges = 16;  ///< of one sum
};

/// A claim and the warnings met on the way (already rendered, for stderr).
struct ReadClaim {
  Claim claim;
  std::vector<std::string> warnings;
};

/// Reads and checks a claim file: TOML, keys, symbols, shapes of bounds and assumptions.
/// Whether the summand is hypergeometric is decided later, by `term`.
/// Throws InputError.
[[nodiscard]] ReadClaim read_claim_file(const std::filesystem::path& path,
                                        const Limits& limits = {});

/// The same from a text already in memory; `name` is used in messages.
[[nodiscard]] ReadClaim read_claim_text(std::string name, std::string text,
                                        const Limits& limits = {});

/// Parses one expression that stands as plain text (no TOML escapes) at `where` in
/// `source`, with the given names allowed as symbols. Used by the reader of
/// obligations and by tests. Throws InputError.
[[nodiscard]] ExpressionPtr parse_expression(const Source& source, Place where,
                                             const std::vector<std::string>& symbols,
                                             const Limits& limits = {});

}  // namespace sumwright::claim
