// The keys of a claim file, format 1: one table for the reader, the help and the tests.
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "claim/document.hpp"
#include "claim/source.hpp"

namespace sumwright::claim {

/// What a key takes.
enum class KeyType {
  integer,
  text,
  texts,        ///< array of texts
  expression,   ///< a text
  expressions,  ///< array of texts
  comparisons,  ///< array of texts
  bound,        ///< a text or an integer
  ranges,       ///< array of tables `range`
  exclusions,   ///< array of texts
  ring,         ///< a text, "rationals" or "integers"
  certificate,  ///< table: index -> expression
  parameters,   ///< table: name -> table `parameter`
  table         ///< a table with keys of its own
};

struct Key {
  std::string table;  ///< "" for the top level; sum, range, equals, parameter, evidence, record
  std::string name;
  KeyType type = KeyType::text;
  bool required = false;
  std::string help;     ///< one line
  std::string example;  ///< a line of TOML
};

/// All keys, in the order of the documentation.
[[nodiscard]] const std::vector<Key>& claim_keys();

/// What a type takes, for messages: `a text`, `an array of texts`.
[[nodiscard]] std::string_view type_name(KeyType type);

/// Refuses unknown keys, wrong types and missing required keys of one table, which is
/// written as `header` in messages (`[sum]`, `the claim file`). Throws InputError.
void check_keys(const Source& source, const Value& table, const std::string& name,
                const std::string& header);

}  // namespace sumwright::claim
