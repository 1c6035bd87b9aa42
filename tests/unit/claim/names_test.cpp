#include "claim/names.hpp"

#include <gtest/gtest.h>

#include <functional>
#include <string>

namespace sumwright::claim {
namespace {

void expect_message(const std::function<void()>& action, const std::string& message) {
  try {
    action();
    ADD_FAILURE() << "was accepted; expected: " << message;
  } catch (const InputError& error) {
    EXPECT_NE(std::string(error.what()).find(message), std::string::npos) << error.what();
  }
}

const Source kSource{"f", "some text"};

TEST(NamesDeclare, AcceptsNames) {
  for (const char* name : {"n", "N", "k1", "a_b", "forall", "Prop", "x_", "Inf", "infinity"}) {
    Names names;
    EXPECT_NO_THROW(names.declare(kSource, name, {}, Names::Kind::rational)) << name;
  }
}

TEST(NamesDeclare, RefusesWhatIsNoName) {
  for (const std::string name : {"", "1", "_a", "a b", "a-b", "\xC3\xA9", "a\n", "a.b", "n'"}) {
    expect_message([&] { Names().declare(kSource, name, {}, Names::Kind::index); },
                   "is not a name");
  }
  expect_message([] { Names().declare(kSource, std::string(65, 'a'), {}, Names::Kind::index); },
                 "a name of 65 characters");
}

TEST(NamesDeclare, RefusesWordsOfTheLanguage) {
  for (const Function& function : functions()) {
    expect_message([&] { Names().declare(kSource, function.name, {}, Names::Kind::integer); },
                   "is a function");
  }
  expect_message([] { Names().declare(kSource, "inf", {}, Names::Kind::integer); },
                 "means infinity");
}

TEST(NamesDeclare, RefusesASecondDeclaration) {
  Names names;
  names.declare(kSource, "n", {5, 1}, Names::Kind::running);
  expect_message([&] { names.declare(kSource, "n", {}, Names::Kind::index); },
                 "it is the running variable at 1:6");
  names.declare(kSource, "N", {}, Names::Kind::index);
}

TEST(NamesView, ShowsKinds) {
  Names names;
  names.declare(kSource, "n", {}, Names::Kind::running);
  names.declare(kSource, "k", {}, Names::Kind::index);
  names.declare(kSource, "m", {}, Names::Kind::integer);
  names.declare(kSource, "x", {}, Names::Kind::rational);
  Names::View view = names.with_indices();
  EXPECT_EQ(view.scope.running, "n");
  EXPECT_EQ(view.scope.integer_symbols(), (std::set<std::string>{"k", "m", "n"}));
  EXPECT_EQ(view.symbols.allowed, (std::vector<std::string>{"k", "m", "n", "x"}));
  view.remove_running();
  EXPECT_EQ(view.symbols.allowed, (std::vector<std::string>{"k", "m", "x"}));
  EXPECT_TRUE(view.symbols.elsewhere.contains("n"));
  EXPECT_EQ(view.scope.integer_symbols(), (std::set<std::string>{"k", "m"}));
  names.forget_indices();
  EXPECT_EQ(names.with_indices().symbols.allowed, (std::vector<std::string>{"m", "n", "x"}));
  EXPECT_EQ(names.all("why").size(), 3U);
}

TEST(Infinity, OnlyAsAWhole) {
  EXPECT_EQ(infinity("inf"), Bound::Kind::plus_infinity);
  EXPECT_EQ(infinity(" + inf "), Bound::Kind::plus_infinity);
  EXPECT_EQ(infinity("- inf"), Bound::Kind::minus_infinity);
  for (const char* text : {"", "n", "inf + 1", "--inf", "Inf", "infinity", "2*inf"}) {
    EXPECT_FALSE(infinity(text).has_value()) << text;
  }
}

MappedText mapped(const std::string& text) { return plain_text({"f", text}, {0, text.size()}); }

TEST(ExclusionWord, KnownSets) {
  EXPECT_EQ(exclusion_word(kSource, mapped("integers")), Exclusion::Kind::integers);
  EXPECT_EQ(exclusion_word(kSource, mapped(" positive\n integers ")),
            Exclusion::Kind::positive_integers);
  EXPECT_EQ(exclusion_word(kSource, mapped("negative integers")),
            Exclusion::Kind::negative_integers);
  EXPECT_EQ(exclusion_word(kSource, mapped("nonnegative integers")),
            Exclusion::Kind::nonnegative_integers);
  EXPECT_EQ(exclusion_word(kSource, mapped("nonpositive integers")),
            Exclusion::Kind::nonpositive_integers);
  for (const char* text : {"", "0", "-1/2", "2^3", "(1)"}) {
    EXPECT_FALSE(exclusion_word(kSource, mapped(text)).has_value()) << text;
  }
  expect_message([] { (void)exclusion_word(kSource, mapped("negative integer")); },
                 "did you mean 'negative integers'?");
  expect_message([] { (void)exclusion_word(kSource, mapped("non-negative integers")); },
                 "did you mean 'nonnegative integers'?");
  expect_message([] { (void)exclusion_word(kSource, mapped("primes")); }, "the words are");
}

TEST(PlainLine, FoldsLineBreaksAndRefusesControls) {
  EXPECT_EQ(plain_line(kSource, mapped("a\nb\r\nc"), "it"), "a b c");
  EXPECT_EQ(plain_line(kSource, mapped(" \na\n"), "it"), "a");
  EXPECT_EQ(plain_line(kSource, mapped("\xC3\xA9 \\emph{x} $"), "it"), "\xC3\xA9 \\emph{x} $");
  for (const std::string text :
       {"a\tb", "a\rb", "\x1b[0m", "a\x7f", "a\xC2\x85", "\xE2\x80\xAE", "\xE2\x80\xA8",
        "\xEF\xBB\xBF"
        "a"}) {
    expect_message([&] { (void)plain_line(kSource, mapped(text), "it"); },
                   "it has a control character");
  }
  for (const std::string text : {"", "  ", "\n\r\n"}) {
    expect_message([&] { (void)plain_line(kSource, mapped(text), "it"); }, "it is empty");
  }
}

}  // namespace
}  // namespace sumwright::claim
