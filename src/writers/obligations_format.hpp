// What may stand in obligations.txt: the table behind templates/obligations.ebnf.
#pragma once

#include <string>
#include <string_view>
#include <vector>

namespace sumwright::writers {

/// What a value is read as.
enum class ValueKind { text, integer, polynomial, factored };

/// One kind of entry. In `pattern`, # stands for a number without leading zeros.
struct KeyRow {
  std::string pattern;
  char separator = ':';  ///< ':' statement, '=' definition
  ValueKind kind = ValueKind::text;
  bool required = false;  ///< in every file that has the section
};

struct SectionRow {
  std::string name;  ///< empty: the lines before the first heading
  std::vector<KeyRow> keys;
};

/// All sections, in the order in which they must stand.
[[nodiscard]] const std::vector<SectionRow>& obligations_sections();

/// Whether the key has the pattern's form.
[[nodiscard]] bool matches(std::string_view pattern, std::string_view key);

}  // namespace sumwright::writers
