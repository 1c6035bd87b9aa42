// The sections and keys of obligations.txt, format 1.
#include "writers/obligations_format.hpp"

#include <algorithm>

namespace sumwright::writers {

namespace {

using Rows = std::vector<KeyRow>;

void append(Rows& out, const Rows& more) { out.insert(out.end(), more.begin(), more.end()); }

[[nodiscard]] Rows nonzero_keys(const std::string& key, bool required) {
  return {{key, '=', ValueKind::factored, required},
          {key + " factor #", ':', ValueKind::text, false},
          {key + " condition", ':', ValueKind::text, false}};
}

[[nodiscard]] Rows instance_keys(const std::string& key) {
  Rows out = {{key + " on", ':', ValueKind::text, false},
              {key + " left", '=', ValueKind::text, false},
              {key + " right", '=', ValueKind::text, false},
              {key + " left unit #", ':', ValueKind::text, false},
              {key + " right unit #", ':', ValueKind::text, false},
              {key + " step #", ':', ValueKind::text, false}};
  append(out, nonzero_keys(key + " cancelled", false));
  return out;
}

[[nodiscard]] Rows conversion_keys() {
  Rows out = {{"written", '=', ValueKind::text, true},
              {"product #", '=', ValueKind::text, false},
              {"product # cancelled #", ':', ValueKind::text, false},
              {"on", ':', ValueKind::text, true},
              {"rule #", ':', ValueKind::text, false},
              {"rule # gives", ':', ValueKind::text, false},
              {"denominator #", ':', ValueKind::text, false},
              {"denominator # unit #", ':', ValueKind::text, false},
              {"defined by", ':', ValueKind::text, true}};
  append(out, nonzero_keys("rule # nonzero #", false));
  return out;
}

[[nodiscard]] Rows balance_keys(const std::string& prefix) {
  Rows out = {{prefix + "terms add up to 0", ':', ValueKind::text, prefix.empty()},
              {prefix + "term #", ':', ValueKind::text, false},
              {prefix + "term # value", '=', ValueKind::text, false},
              {prefix + "term # vanishes", ':', ValueKind::text, false},
              {prefix + "class # base", '=', ValueKind::text, false},
              {prefix + "class # member #", ':', ValueKind::text, false},
              {prefix + "class # share #", '=', ValueKind::factored, false}};
  append(out, instance_keys(prefix + "term #"));
  return out;
}

[[nodiscard]] Rows front_keys() {
  return {{"verdict", ':', ValueKind::text, true},
          {"subject", ':', ValueKind::text, true},
          {"title", ':', ValueKind::text, true},
          {"claim kind", ':', ValueKind::text, true},
          {"statement", ':', ValueKind::text, true},
          {"reason", ':', ValueKind::text, false},
          {"would settle", ':', ValueKind::text, false},
          {"counterexample", ':', ValueKind::text, false},
          {"left value", ':', ValueKind::text, false},
          {"right value", ':', ValueKind::text, false},
          {"residue", ':', ValueKind::text, false},
          {"open #", ':', ValueKind::text, false}};
}

[[nodiscard]] Rows recurrence_keys() {
  return {
      {"evidence", ':', ValueKind::text, true},      {"order", ':', ValueKind::integer, true},
      {"from", ':', ValueKind::integer, true},       {"threshold", ':', ValueKind::integer, false},
      {"coefficient #", '=', ValueKind::text, true}, {"right side", '=', ValueKind::text, false},
      {"certificate", '=', ValueKind::text, false},  {"boundary #", '=', ValueKind::text, false}};
}

[[nodiscard]] Rows base_keys() {
  Rows out = {
      {"B", '=', ValueKind::text, true},          {"region", ':', ValueKind::text, true},
      {"low", '=', ValueKind::polynomial, true},  {"high", '=', ValueKind::polynomial, true},
      {"conditions", ':', ValueKind::text, true}, {"a_#", '=', ValueKind::factored, true},
      {"p_#", '=', ValueKind::factored, true},    {"c", '=', ValueKind::polynomial, true},
      {"down", '=', ValueKind::factored, true},   {"up", '=', ValueKind::factored, true}};
  append(out, nonzero_keys("weight", true));
  append(out, instance_keys("shift # #"));
  append(out, instance_keys("index shift"));
  return out;
}

[[nodiscard]] Rows equality_keys() {
  return {{"left", '=', ValueKind::text, true},
          {"right", '=', ValueKind::text, true},
          {"terms", ':', ValueKind::integer, true},
          {"degree", ':', ValueKind::integer, true},
          {"degree in symbol #", ':', ValueKind::integer, true},
          {"bits", ':', ValueKind::integer, true},
          {"scale", '=', ValueKind::factored, true},
          {"normal form", '=', ValueKind::polynomial, true}};
}

[[nodiscard]] Rows initial_keys() {
  Rows out = {{"value #", ':', ValueKind::text, true},
              {"value # both", '=', ValueKind::text, false},
              {"value # sum #", ':', ValueKind::text, false},
              {"value # sum # zero below", ':', ValueKind::text, false},
              {"value # sum # zero above", ':', ValueKind::text, false}};
  append(out, balance_keys("value # "));
  return out;
}

[[nodiscard]] std::vector<SectionRow> make_sections() {
  return {
      {"", front_keys()},
      {"claim", {{"sha256", ':', ValueKind::text, true}, {"bytes", ':', ValueKind::integer, true}}},
      {"symbols",
       {{"symbol #", ':', ValueKind::text, true}, {"hypothesis #", ':', ValueKind::text, false}}},
      {"term", conversion_keys()},
      {"closed form", conversion_keys()},
      {"right side", conversion_keys()},
      {"recurrence", recurrence_keys()},
      {"base term", base_keys()},
      {"equality", equality_keys()},
      {"ranges",
       {{"finite low", ':', ValueKind::text, false},
        {"finite high", ':', ValueKind::text, false},
        {"finite zero below", ':', ValueKind::text, false},
        {"finite zero above", ':', ValueKind::text, false},
        {"range #", ':', ValueKind::text, true},
        {"range # zero below", ':', ValueKind::text, false},
        {"range # zero above", ':', ValueKind::text, false}}},
      {"ends", balance_keys("")},
      {"closed recurrence", balance_keys("")},
      {"leading coefficient", nonzero_keys("leading", true)},
      {"initial values", initial_keys()},
      {"conditions", {{"c#", ':', ValueKind::text, true}}},
      {"conclusion",
       {{"verdict", ':', ValueKind::text, true}, {"conditions", ':', ValueKind::text, true}}}};
}

[[nodiscard]] bool digit(char c) { return c >= '0' && c <= '9'; }

}  // namespace

const std::vector<SectionRow>& obligations_sections() {
  static const std::vector<SectionRow> sections = make_sections();
  return sections;
}

bool matches(std::string_view pattern, std::string_view key) {
  std::size_t at = 0;
  for (const char c : pattern) {
    if (c != '#') {
      if (at >= key.size() || key[at] != c) return false;
      ++at;
      continue;
    }
    const std::size_t start = at;
    while (at < key.size() && digit(key[at])) ++at;
    const std::size_t length = at - start;
    if (length == 0 || length > 9 || (length > 1 && key[start] == '0')) return false;
  }
  return at == key.size();
}

}  // namespace sumwright::writers
