// The table of claim keys, and the check of one TOML table against it.
//
// Every refusal names the key, what it takes, and an example taken from the same row.
#include "claim/keys.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

[[nodiscard]] const Key* find_key(const std::string& table, std::string_view name) {
  const auto& keys = claim_keys();
  const auto found = std::find_if(keys.begin(), keys.end(), [&](const Key& key) {
    return key.table == table && key.name == name;
  });
  return found == keys.end() ? nullptr : &*found;
}

[[nodiscard]] std::string table_header(const std::string& table) {
  if (table.empty()) return "the top level, before the first [table]";
  if (table == "range") return "an entry of 'over'";
  if (table == "parameter") return "an entry of [parameters]";
  return "[" + table + "]";
}

// The tables in which a misplaced key is at home.
[[nodiscard]] std::string home_of(std::string_view name) {
  for (const Key& key : claim_keys()) {
    if (key.name == name) {
      return fmt::format("{} belongs in {}", in_quotes(name), table_header(key.table));
    }
  }
  return {};
}

[[noreturn]] void refuse_key(const Source& source, const Entry& entry, const std::string& table,
                             const std::string& header) {
  std::vector<std::string> known;
  for (const Key& key : claim_keys()) {
    if (key.table == table) known.push_back(key.name);
  }
  std::string note = home_of(entry.key);
  if (note.empty()) note = suggestion(entry.key, known);
  if (note.empty()) note = "the keys here are " + listing(known);
  throw InputError(source, entry.key_place,
                   fmt::format("unknown key {} in {}", in_quotes(entry.key), header), note);
}

[[nodiscard]] Value::Kind item_kind(KeyType type) {
  return type == KeyType::ranges ? Value::Kind::table : Value::Kind::text;
}

[[nodiscard]] bool fits(Value::Kind kind, KeyType type) {
  switch (type) {
    case KeyType::integer:
      return kind == Value::Kind::integer;
    case KeyType::text:
    case KeyType::expression:
    case KeyType::ring:
      return kind == Value::Kind::text;
    case KeyType::bound:
      return kind == Value::Kind::text || kind == Value::Kind::integer;
    case KeyType::texts:
    case KeyType::expressions:
    case KeyType::comparisons:
    case KeyType::ranges:
    case KeyType::exclusions:
      return kind == Value::Kind::array;
    case KeyType::certificate:
    case KeyType::parameters:
    case KeyType::table:
      return kind == Value::Kind::table;
  }
  return false;
}

void check_type(const Source& source, const Entry& entry, const Key& key) {
  const std::string note = "such as  " + key.example;
  if (!fits(entry.value.kind, key.type)) {
    throw InputError(source, entry.value.place,
                     fmt::format("{} must be {}, not {}", in_quotes(key.name), type_name(key.type),
                                 kind_name(entry.value.kind)),
                     note);
  }
  if (entry.value.kind != Value::Kind::array) return;
  for (const Value& item : entry.value.items) {
    if (item.kind == item_kind(key.type)) continue;
    throw InputError(source, item.place,
                     fmt::format("each entry of {} must be {}, not {}", in_quotes(key.name),
                                 kind_name(item_kind(key.type)), kind_name(item.kind)),
                     note);
  }
}

}  // namespace

const std::vector<Key>& claim_keys() {
  static const std::vector<Key> table = {
      {"", "format", KeyType::integer, true, "version of the format of this file", "format = 1"},
      {"", "title", KeyType::text, true, "one line that names the claim",
       "title = \"Squares along one row\""},
      {"", "running", KeyType::text, true, "the integer variable the recurrence runs in",
       "running = \"n\""},
      {"", "from", KeyType::integer, true, "the claim is made for every integer from here on",
       "from = 0"},
      {"", "assume", KeyType::comparisons, false, "conditions between parameters",
       "assume = [\"a >= b\"]"},
      {"", "sum", KeyType::table, true, "the sum", "[sum]"},
      {"", "equals", KeyType::table, false, "what the sum equals", "[equals]"},
      {"", "parameters", KeyType::parameters, false, "every other symbol", "[parameters]"},
      {"", "evidence", KeyType::table, false, "a recurrence and its certificate", "[evidence]"},
      {"", "record", KeyType::table, false, "carried into the exports", "[record]"},
      {"sum", "summand", KeyType::expression, true, "what is summed",
       "summand = \"binomial(n, k)^2\""},
      {"sum", "over", KeyType::ranges, false, "the ranges, outermost first",
       "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]"},
      {"range", "index", KeyType::text, true, "the summation index", "index = \"k\""},
      {"range", "low", KeyType::bound, true, "the first value", "low = \"0\""},
      {"range", "high", KeyType::bound, true, "the last value", "high = \"n\""},
      {"equals", "closed", KeyType::expression, false, "a closed form",
       "closed = \"binomial(2*n, n)\""},
      {"equals", "summand", KeyType::expression, false, "another sum: what is summed",
       "summand = \"binomial(n, k)\""},
      {"equals", "over", KeyType::ranges, false, "another sum: its ranges",
       "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]"},
      {"parameter", "in", KeyType::ring, true, "where its values lie", "in = \"rationals\""},
      {"parameter", "not", KeyType::exclusions, false, "excluded values of a rational parameter",
       "not = [\"0\", \"negative integers\"]"},
      {"parameter", "at_least", KeyType::integer, false, "lower bound of an integer parameter",
       "at_least = 0"},
      {"evidence", "recurrence", KeyType::expressions, false, "coefficients of S(n), S(n+1), ...",
       "recurrence = [\"-2*(2*n + 1)\", \"n + 1\"]"},
      {"evidence", "right_side", KeyType::expression, false, "right side of the recurrence",
       "right_side = \"0\""},
      {"evidence", "certificate", KeyType::certificate, false, "one rational function per index",
       "certificate = { k = \"k^2*(2*k - 3*n - 3)/(n + 1 - k)^2\" }"},
      {"record", "authors", KeyType::texts, false, "who claims it", "authors = [\"A. Author\"]"},
      {"record", "source", KeyType::text, false, "where it was published",
       "source = \"A Journal 1 (2020), 1-2\""},
      {"record", "identifier", KeyType::text, false, "an identifier of the publication",
       "identifier = \"doi:...\""},
      {"record", "licence", KeyType::text, false, "the licence of this file",
       "licence = \"CC0-1.0\""}};
  return table;
}

std::string_view type_name(KeyType type) {
  switch (type) {
    case KeyType::integer:
      return "an integer";
    case KeyType::text:
      return "a text";
    case KeyType::ring:
      return "the text \"rationals\" or \"integers\"";
    case KeyType::expression:
      return "an expression in quotes";
    case KeyType::bound:
      return "an expression in quotes or an integer";
    case KeyType::texts:
      return "an array of texts";
    case KeyType::expressions:
      return "an array of expressions in quotes";
    case KeyType::comparisons:
      return "an array of comparisons in quotes";
    case KeyType::ranges:
      return "an array of tables";
    case KeyType::exclusions:
      return "an array of texts";
    case KeyType::certificate:
    case KeyType::parameters:
    case KeyType::table:
      return "a table";
  }
  return "a value";
}

void check_keys(const Source& source, const Value& table, const std::string& name,
                const std::string& header) {
  for (const Entry& entry : table.entries) {
    const Key* key = find_key(name, entry.key);
    if (key == nullptr) refuse_key(source, entry, name, header);
    check_type(source, entry, *key);
  }
  for (const Key& key : claim_keys()) {
    if (key.table != name || !key.required || table.find(key.name) != nullptr) continue;
    throw InputError(source, {table.place.offset, std::min<std::size_t>(table.place.length, 1)},
                     fmt::format("{} is missing in {}", in_quotes(key.name), header),
                     "such as  " + key.example);
  }
}

}  // namespace sumwright::claim
