// A TOML text as a plain tree with places; hides the TOML library.
#pragma once

#include <cstddef>
#include <cstdint>
#include <string>
#include <string_view>
#include <vector>

#include "claim/source.hpp"
#include "claim/toml_text.hpp"

namespace sumwright::claim {

struct Entry;

/// One TOML value.
struct Value {
  enum class Kind { text, integer, floating, boolean, date, array, table };
  Kind kind = Kind::table;
  MappedText text;             ///< text only
  std::int64_t integer = 0;    ///< integer only
  std::vector<Value> items;    ///< array only
  std::vector<Entry> entries;  ///< table only, in the order of the file
  Place place;                 ///< where the value stands (text: with its delimiters)

  /// The entry with this key; null when there is none.
  [[nodiscard]] const Entry* find(std::string_view key) const;
};

/// One `key = value`, or one table under its header.
struct Entry {
  std::string key;
  Place key_place;
  Value value;
};

/// Parses the whole source. Throws InputError when it is not UTF-8, not TOML 1.0, or
/// nested beyond what a claim needs.
[[nodiscard]] Value parse_document(const Source& source);

/// `a text`, `an integer`, ... for messages.
[[nodiscard]] std::string kind_name(Value::Kind kind);

}  // namespace sumwright::claim
