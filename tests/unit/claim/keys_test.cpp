#include "claim/keys.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <set>
#include <string>
#include <utility>
#include <vector>

#include "claim_testing.hpp"

namespace sumwright::claim {
namespace {

using test::expect_refused;
using test::full_claim;
using test::refusal;
using test::replaced;

// Where an unknown key of each table is put, and the line and column it then has.
struct TableCase {
  std::string table;
  std::string before;  // the text in front of which the key is put
  std::string place;
};

const std::vector<TableCase> kTables = {{"", "format  =", "1:1"},
                                        {"sum", "summand =", "8:1"},
                                        {"range", "index = \"k\", ", "9:15"},
                                        {"equals", "closed  =", "12:1"},
                                        {"parameter", "in = \"rationals\"", "15:7"},
                                        {"evidence", "recurrence  =", "19:1"},
                                        {"record", "authors =", "24:1"}};

std::string with_key(const TableCase& row, const std::string& key) {
  const bool inside = row.table == "range" || row.table == "parameter";
  return replaced(full_claim(), row.before, key + " = 1" + (inside ? ", " : "\n") + row.before);
}

TEST(ClaimKeys, EveryRowIsComplete) {
  ASSERT_EQ(claim_keys().size(), 28U);
  std::set<std::pair<std::string, std::string>> seen;
  std::set<std::string> tables;
  for (const Key& key : claim_keys()) {
    EXPECT_FALSE(key.help.empty()) << key.name;
    EXPECT_FALSE(key.example.empty()) << key.name;
    EXPECT_FALSE(type_name(key.type).empty()) << key.name;
    EXPECT_TRUE(seen.emplace(key.table, key.name).second) << key.name;
    tables.insert(key.table);
  }
  for (const TableCase& row : kTables) EXPECT_TRUE(tables.erase(row.table)) << row.table;
  EXPECT_TRUE(tables.empty()) << "a table without a test: " << *tables.begin();
}

TEST(ClaimKeys, TheFullClaimIsRead) { EXPECT_FALSE(refusal(full_claim())); }

TEST(ClaimKeys, UnknownKeysAreRefusedInEveryTable) {
  for (const TableCase& row : kTables) {
    SCOPED_TRACE(row.table);
    expect_refused(with_key(row, "zzz"), row.place, "unknown key 'zzz' in ");
    expect_refused(with_key(row, "zzz"), row.place, "the keys here are ");
    expect_refused(with_key(row, "\"\\u001b\""), row.place, "unknown key '\\x1b' in ");
  }
}

TEST(ClaimKeys, EveryKeyMisspeltIsRefusedWithASuggestion) {
  std::size_t suggested = 0;
  for (const Key& key : claim_keys()) {
    const auto row = std::find_if(kTables.begin(), kTables.end(), [&key](const TableCase& entry) {
      return entry.table == key.table;
    });
    ASSERT_NE(row, kTables.end());
    const std::string wrong = key.name + "x";
    SCOPED_TRACE(key.table + "." + wrong);
    expect_refused(with_key(*row, wrong), row->place, "did you mean '" + key.name + "'?");
    ++suggested;
  }
  EXPECT_EQ(suggested, claim_keys().size());
}

TEST(ClaimKeys, AKeyInTheWrongTableIsSentHome) {
  expect_refused(with_key(kTables[0], "summand"), "1:1", "'summand' belongs in [sum]");
  expect_refused(with_key(kTables[0], "index"), "1:1", "'index' belongs in an entry of 'over'");
  expect_refused(with_key(kTables[1], "recurrence"), "8:1", "'recurrence' belongs in [evidence]");
  expect_refused(with_key(kTables[3], "at_least"), "12:1", "an entry of [parameters]");
  expect_refused(with_key(kTables[6], "title"), "24:1", "'title' belongs in the top level");
}

// A value of the wrong type for each key, put in place of the whole line or entry.
TEST(ClaimKeys, EveryKeyRefusesAWrongType) {
  const std::vector<test::Refused> cases = {
      {"format  = 1", "format = \"1\"", "1:10", "'format' must be an integer, not a text"},
      {"format  = 1", "format = 1.0", "1:10", "not a floating-point number"},
      {"title   = \"Squares along one row\"", "title = 1", "2:9", "'title' must be a text"},
      {"running = \"n\"", "running = ['n']", "3:11", "'running' must be a text, not an array"},
      {"from    = 0", "from = \"0\"", "4:8", "'from' must be an integer, not a text"},
      {"from    = 0", "from = 0.5", "4:8", "'from' must be an integer, not a floating"},
      {"assume  = [\"m >= 1\", \"x != 1/2\"]", "assume = \"m >= 1\"", "5:10",
       "'assume' must be an array of comparisons"},
      {"[\"m >= 1\", \"x != 1/2\"]", "[\"m >= 1\", 2]", "5:22",
       "each entry of 'assume' must be a text, not an integer"},
      {"summand = \"binomial(n, k)^2\"", "summand = 1", "8:11",
       "'summand' must be an expression in quotes, not an integer"},
      {"over    = [ { index = \"k\", low = \"0\", high = \"n\" } ]", "over = \"k\"", "9:8",
       "'over' must be an array of tables, not a text"},
      {"[ { index = \"k\", low = \"0\", high = \"n\" } ]", "[ \"k\" ]", "9:13",
       "each entry of 'over' must be a table, not a text"},
      {"index = \"k\"", "index = 1", "9:23", "'index' must be a text"},
      {"low = \"0\"", "low = 0.0", "9:34", "'low' must be an expression in quotes or an integer"},
      {"high = \"n\"", "high = inf", "9:46", "'high' must be an expression in quotes"},
      {"high = \"n\"", "high = true", "9:46", "not a truth value"},
      {"closed  = \"binomial(2*n, n)\"", "closed = 0", "12:10", "'closed' must be an expression"},
      {"in = \"rationals\"", "in = 2000-01-01", "15:12", "not a date or time"},
      {"not = [\"0\", \"negative integers\"]", "not = \"0\"", "15:31", "'not' must be an array"},
      {"not = [\"0\",", "not = [0,", "15:32", "each entry of 'not' must be a text"},
      {"at_least = 0", "at_least = \"0\"", "16:35", "'at_least' must be an integer"},
      {"recurrence  = [\"-2*(2*n + 1)\", \"n + 1\"]", "recurrence = \"n\"", "19:14",
       "'recurrence' must be an array of expressions"},
      {"[\"-2*(2*n + 1)\", \"n + 1\"]", "[1, -1]", "19:16", "must be a text, not an integer"},
      {"right_side  = \"0\"", "right_side = 0", "20:14", "'right_side' must be an expression"},
      {"certificate = { k =", "certificate = [\"1\"] # {", "21:15",
       "'certificate' must be a table"},
      {"k = \"k^2*(2*k - 3*n - 3)/(n + 1 - k)^2\"", "k = 0", "21:21",
       "the certificate for 'k' must be an expression in quotes, not an integer"},
      {"authors = [\"A. Author\", \"B. Author\"]", "authors = \"A\"", "24:11",
       "'authors' must be an array of texts"},
      {"\"B. Author\"]", "7]", "24:25", "each entry of 'authors' must be a text"},
      {"source  = \"A Journal 1 (2020), 1-2\"", "source = 1", "25:10", "'source' must be a text"},
      {"identifier = \"doi:10.0/0\"", "identifier = 1", "26:14", "'identifier' must be a text"},
      {"licence = \"CC0-1.0\"", "licence = false", "27:11", "'licence' must be a text"},
      {"x = { in = \"rationals\", not = [\"0\", \"negative integers\"] }", "x = \"rationals\"",
       "15:5", "parameter 'x' must be a table, not a text"}};
  test::expect_all_refused(full_claim(), cases);
  expect_refused("format = 1\ntitle = 'a'\nrunning = 'n'\nfrom = 0\nsum = 1", "5:7",
                 "'sum' must be a table, not an integer");
  for (const std::string key : {"equals", "parameters", "evidence", "record"}) {
    expect_refused("format = 1\ntitle = 'a'\nrunning = 'n'\nfrom = 0\n" + key + " = 1\n[sum]\n",
                   "5:" + std::to_string(key.size() + 4), "'" + key + "' must be a table");
  }
}

TEST(ClaimKeys, EveryRequiredKeyIsMissed) {
  const std::vector<test::Refused> cases = {
      {"format  = 1", "", "1:1", "'format' is missing in the claim file"},
      {"title ", "# ", "1:1", "'title' is missing in the claim file"},
      {"running = ", "# ", "1:1", "'running' is missing in the claim file"},
      {"from ", "# ", "1:1", "'from' is missing in the claim file"},
      {"summand = \"binomial(n, k)^2\"", "", "7:1", "'summand' is missing in [sum]"},
      {"index = \"k\", ", "", "9:13", "'index' is missing in a range"},
      {"low = \"0\", ", "", "9:13", "'low' is missing in a range"},
      {", high = \"n\"", "", "9:13", "'high' is missing in a range"},
      {"in = \"rationals\", ", "", "15:5", "'in' is missing in parameter 'x'"}};
  test::expect_all_refused(full_claim(), cases);
  expect_refused("format = 1\ntitle = 'a'\nrunning = 'n'\nfrom = 0\n", "1:1",
                 "'sum' is missing in the claim file");
  std::size_t required = 0;
  for (const Key& key : claim_keys()) required += key.required ? 1U : 0U;
  EXPECT_EQ(required, cases.size() + 1);
}

}  // namespace
}  // namespace sumwright::claim
