// `check` of obligation files: true ones, altered ones, and those of other claims.
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "program.hpp"
#include "writers/sha256.hpp"

namespace sumwright::testing {
namespace {

std::string obligations(const TestFolder& folder, const std::string& claim) {
  EXPECT_EQ(folder.sumwright({"export", claim, "--out", "made", "--as", "obligations"}).status, 0);
  return read_file(folder.path() / "made/obligations.txt");
}

void expect_refused(const TestFolder& folder, const std::string& text, const std::string& message) {
  folder.write("altered.txt", text);
  const Outcome outcome = folder.sumwright({"check", "altered.txt"});
  EXPECT_EQ(outcome.status, 1) << outcome.out << outcome.err;
  EXPECT_EQ(outcome.out.substr(0, 37), "verdict       the file does not hold\n");
  std::string flat;  // wrapped lines joined
  for (const char c : outcome.out) {
    const char shown = c == '\n' ? ' ' : c;
    if (shown != ' ' || flat.empty() || flat.back() != ' ') flat += shown;
  }
  EXPECT_NE(flat.find(message), std::string::npos) << "expected: " << message << "\n"
                                                   << outcome.out;
}

TEST(Obligations, EveryExemplarReadsBack) {
  std::size_t checked = 0;
  for (const auto& entry :
       std::filesystem::directory_iterator(std::string(SUMWRIGHT_SOURCE_DIR) + "/exemplars")) {
    if (entry.path().extension() != ".toml") continue;
    SCOPED_TRACE(entry.path().filename());
    const TestFolder folder;
    (void)obligations(folder, entry.path().string());
    const Outcome outcome = folder.sumwright({"check", "made/obligations.txt"});
    EXPECT_EQ(outcome.status, 0) << outcome.out << outcome.err;
    EXPECT_EQ(outcome.out.substr(0, 29), "verdict       the file holds\n") << outcome.out;
    EXPECT_NE(outcome.out.find("every item agrees with the proof rebuilt"), std::string::npos);
    ++checked;
  }
  EXPECT_GE(checked, 8U);
}

TEST(Obligations, AnotherClaimsTextIsRefused) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  std::string text = obligations(folder, "c.toml");
  // Another true claim of the same length, with its hash: the rest belongs to the first one.
  const std::string other =
      replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)  "),
               "binomial(2*n, n)", "2^n             ");
  text = replaced(text, writers::sha256(squares_claim()), writers::sha256(other));
  text = replaced(text, "| summand = \"binomial(n, k)^2\"", "| summand = \"binomial(n, k)  \"");
  text = replaced(text, "| closed  = \"binomial(2*n, n)\"", "| closed  = \"2^n             \"");
  expect_refused(folder, text, "items do not agree");
}

TEST(Obligations, ClaimTextWithoutItsHashIsUnusable) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const std::string text = obligations(folder, "c.toml");
  folder.write("altered.txt", replaced(text, "| title   = \"Squares of one row\"",
                                       "| title   = \"Squares of one sow\""));
  const Outcome outcome = folder.sumwright({"check", "altered.txt"});
  EXPECT_EQ(outcome.status, 2) << outcome.out;
  EXPECT_EQ(outcome.err.substr(0, 12), "altered.txt:") << outcome.err;
}

TEST(Obligations, AlteredPartsAreNamed) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const std::string text = obligations(folder, "c.toml");
  expect_refused(folder, replaced(text, "\ncoefficient 1 = (n + 1)", "\ncoefficient 1 = (n + 2)"),
                 "recurrence: `coefficient 1`: the file has '(n + 2)', the claim gives '(n + 1)'");
  expect_refused(folder, replaced(text, "\nnormal form = 3*n^3", "\nnormal form = 2*n^3"),
                 "DO NOT HOLD");
  expect_refused(
      folder, replaced(text, "c1: [factorial argument] n >= 0", "c1: [factorial argument] n >= 1"),
      "conditions: `c1`");
}

TEST(Obligations, NotEstablishedKeepsItsVerdict) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n"));
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "made"}).status, 1);
  const Outcome outcome = folder.sumwright({"check", "made/obligations.txt"});
  EXPECT_EQ(outcome.status, 1);
  EXPECT_NE(outcome.out.find("file says     refuted\n"), std::string::npos) << outcome.out;
}

TEST(Obligations, Json) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  (void)obligations(folder, "c.toml");
  const Outcome outcome = folder.sumwright({"check", "--json", "made/obligations.txt"});
  EXPECT_EQ(outcome.status, 0);
  const auto json = nlohmann::json::parse(outcome.out);
  EXPECT_EQ(json.at("file_says"), "established");
  EXPECT_TRUE(json.at("differences").empty());
  EXPECT_EQ(json.at("rebuilt").at("verdict"), "established");
}

}  // namespace
}  // namespace sumwright::testing
