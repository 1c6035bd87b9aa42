#include "claim/document.hpp"

#include <gtest/gtest.h>

#include <string>
#include <vector>

namespace sumwright::claim {
namespace {

void expect_refused(const std::string& text, const std::string& place, const std::string& message) {
  try {
    (void)parse_document({"f", text});
    ADD_FAILURE() << "was accepted: " << text;
  } catch (const InputError& error) {
    const std::string what = error.what();
    EXPECT_EQ(what.substr(0, place.size() + 4), "f:" + place + ": ") << what;
    EXPECT_NE(what.find(message), std::string::npos) << what;
  }
}

TEST(ParseDocument, KindsAndPlaces) {
  const Source source{"f",
                      "a = 'x'\nb = -7\nc = 1.5\nd = true\ne = 2020-01-01\nf = [1]\n[g]\nh = 1"};
  const Value document = parse_document(source);
  ASSERT_EQ(document.entries.size(), 7U);
  const std::vector<Value::Kind> kinds = {
      Value::Kind::text, Value::Kind::integer, Value::Kind::floating, Value::Kind::boolean,
      Value::Kind::date, Value::Kind::array,   Value::Kind::table};
  for (std::size_t i = 0; i < kinds.size(); ++i) {
    EXPECT_EQ(document.entries[i].value.kind, kinds[i]) << document.entries[i].key;
  }
  EXPECT_EQ(document.find("a")->value.text.text, "x");
  EXPECT_EQ(document.find("a")->value.text.place.offset, 5U);
  EXPECT_EQ(document.find("b")->value.integer, -7);
  EXPECT_EQ(document.find("b")->key_place.offset, 8U);
  EXPECT_EQ(document.find("b")->value.place.offset, 12U);
  EXPECT_EQ(document.find("b")->value.place.length, 2U);
  EXPECT_EQ(document.find("z"), nullptr);
}

TEST(ParseDocument, KeepsTheOrderOfTheFile) {
  const Value document = parse_document({"f", "z = 1\na = 2\n[m]\nk = 1\nb = 2\n[c]\n"});
  std::vector<std::string> keys;
  for (const Entry& entry : document.entries) keys.push_back(entry.key);
  EXPECT_EQ(keys, (std::vector<std::string>{"z", "a", "m", "c"}));
  EXPECT_EQ(document.find("m")->value.entries[0].key, "k");
}

TEST(ParseDocument, PlacesBehindByteOrderMarkCarriageReturnsAndNonAscii) {
  const Source source{"f",
                      "\xEF\xBB\xBF"
                      "t = '\xC3\xA9\xE2\x82\xAC'\r\nab = 'q'\r\n"};
  const Value document = parse_document(source);
  const Place place = document.find("ab")->value.text.place;
  EXPECT_EQ(source.text.substr(place.offset, place.length), "q");
  const Place key = document.find("ab")->key_place;
  EXPECT_EQ(source.text.substr(key.offset, key.length), "ab");
}

TEST(ParseDocument, PlacesOnLongLines) {
  std::string text = "a = [";
  for (int i = 0; i < 2000; ++i) text += "'\xC3\xA9" + std::to_string(i) + "', ";
  text += "]\nb = 'last'";
  const Source source{"f", text};
  const Value document = parse_document(source);
  const auto& items = document.find("a")->value.items;
  ASSERT_EQ(items.size(), 2000U);
  for (const Value& item : items) {
    EXPECT_EQ(source.text.substr(item.text.place.offset, item.text.place.length), item.text.text);
  }
  const Place last = document.find("b")->value.text.place;
  EXPECT_EQ(source.text.substr(last.offset, last.length), "last");
}

TEST(ParseDocument, EveryKindOfStringIsMapped) {
  for (const std::string literal :
       {"\"a\\u0062c\"", "'abc'", "\"\"\"\na\\\n  bc\"\"\"", "'''abc'''", "\"\"\"abc\"\"\"\"\"",
        "\"\"\"\r\na\\  \r\n\r\n\tb\\u0063\"\"\"", "'''\nabc'''''", "\"\"\"a\"b\"\"c\\\"\"\"\""}) {
    SCOPED_TRACE(literal);
    const Source source{"f", "x = " + literal + "\n"};
    const Value document = parse_document(source);
    const MappedText& text = document.find("x")->value.text;
    // Were the two readings of the literal different, all places would be the whole literal.
    EXPECT_EQ(text.units.size(), text.text.size());
    EXPECT_EQ(source.text[text.units.front().offset], 'a');
    EXPECT_EQ(text.units.front().length, 1U);
  }
}

TEST(ParseDocument, CharactersBeyondAsciiInEveryKindOfString) {
  const std::string e = "\xC3\xA9\xC2\xA0\xF0\x9F\x98\x80";
  for (const std::string& literal :
       {"\"" + e + "\"", "'" + e + "'", "\"\"\"\\\n  " + e + "\"\"\"", "'''\n" + e + "'''"}) {
    const Value document = parse_document({"f", "\"" + e + "\" = " + literal + " # " + e});
    ASSERT_EQ(document.entries.size(), 1U);
    EXPECT_EQ(document.entries[0].key, e);
    EXPECT_EQ(document.entries[0].value.text.text, e);
    EXPECT_EQ(document.entries[0].value.text.units.front().length, 1U);
  }
}

TEST(ParseDocument, Refuses) {
  expect_refused("a = 1\na = 2", "2:5", "not valid TOML");
  expect_refused("a = ", "1:5", "not valid TOML");
  expect_refused("a = \"b", "1:5", "this string is not closed");
  expect_refused("a = \xC3\xA9", "1:5", "only in strings and comments");
  expect_refused("a = 'x\xFF'", "1:7", "not valid UTF-8");
  expect_refused(
      "\xFF\xFE"
      "a",
      "1:1", "not valid UTF-8");
  expect_refused(std::string("a = '\0'", 8), "1:6", "not valid TOML");
  expect_refused("a = 99999999999999999999", "1:25", "not valid TOML");
  expect_refused("[a]\n[a]\n", "2:1", "not valid TOML");
  expect_refused("a = [[[[[[[[[[[[[[[[[[]]]]]]]]]]]]]]]]]]", "1:21", "nested");
}

// Each of these reaches an assertion of toml++ 3.3, which would otherwise end the program.
TEST(ParseDocument, RefusesWhatMakesTheLibraryLoseItsWay) {
  expect_refused("a = 1\n[=b]", "2:2", "neither a key nor a value");
  expect_refused("[[/b]]", "1:3", "neither a key nor a value");
  expect_refused("[\n", "1:2", "neither a key nor a value");
  expect_refused("a = '\xC3\xA9' # \xC3\xA9\n[.b]", "2:2", "neither a key nor a value");
}

TEST(KindName, NamesEachKind) {
  EXPECT_EQ(kind_name(Value::Kind::text), "a text");
  EXPECT_EQ(kind_name(Value::Kind::integer), "an integer");
  EXPECT_EQ(kind_name(Value::Kind::floating), "a floating-point number");
  EXPECT_EQ(kind_name(Value::Kind::boolean), "a truth value");
  EXPECT_EQ(kind_name(Value::Kind::date), "a date or time");
  EXPECT_EQ(kind_name(Value::Kind::array), "an array");
  EXPECT_EQ(kind_name(Value::Kind::table), "a table");
}

}  // namespace
}  // namespace sumwright::claim
