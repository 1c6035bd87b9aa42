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
  EXPECT_EQ(outcome.out.substr(0, 37), "verdict       the file does not hold\n") << outcome.out;
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
  const std::string head =
      "verdict       the file's verdict is confirmed: the claim is refuted\n"
      "file says     refuted: the claimed equality at n = 1\n";
  EXPECT_EQ(outcome.out.substr(0, head.size()), head);
  EXPECT_NE(outcome.out.find("every item agrees with the refutation"), std::string::npos);
  // Another point than the one that is found again is not confirmed.
  const std::string text = read_file(folder.path() / "made/obligations.txt");
  expect_refused(folder,
                 replaced(text, "the claimed equality at n = 1", "the claimed equality at n = 0"),
                 "compared 1 item does not agree");
  // Nor is a refutation of a true claim: the claim is established.
  const std::string claim = replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + 0");
  std::string other = replaced(text, "| closed  = \"binomial(2*n, n) + n\"",
                               "| closed  = \"binomial(2*n, n) + 0\"");
  other = replaced(
      other, writers::sha256(replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n")),
      writers::sha256(claim));
  expect_refused(folder, other,
                 "the file says refuted, the claim decided again is established: export it again");
}

TEST(Obligations, UndecidedIsConfirmed) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "made", "--max-order", "0"}).status, 3);
  const Outcome again = folder.sumwright({"check", "made/obligations.txt", "--max-order", "0"});
  EXPECT_EQ(again.status, 3);
  EXPECT_EQ(again.out.substr(0, 71),
            "verdict       the file's verdict is confirmed: the claim is undecided\nf");
  const Outcome better = folder.sumwright({"check", "made/obligations.txt"});
  EXPECT_EQ(better.status, 1);
  EXPECT_EQ(better.out.substr(0, 39), "verdict       the file is out of date\nf") << better.out;
}

std::string crlf(std::string text) {
  for (std::size_t at = 0; (at = text.find('\n', at)) != std::string::npos; at += 2) {
    text.replace(at, 1, "\r\n");
  }
  return text;
}

// Line ends and byte-order marks come and go on the way through mail and version control.
TEST(Obligations, ConvertedFilesAreRead) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const std::string text = obligations(folder, "c.toml");
  folder.write("c.toml", crlf(squares_claim()));
  const std::string other = obligations(folder, "c.toml");
  const std::string stripped = [&] {
    std::string out = other;
    std::erase(out, '\r');
    return out;
  }();
  for (const std::string& good :
       {crlf(text), "\xEF\xBB\xBF" + text, "\xEF\xBB\xBF" + crlf(text), crlf(stripped)}) {
    folder.write("converted.txt", good);
    const Outcome outcome = folder.sumwright({"check", "converted.txt"});
    EXPECT_EQ(outcome.status, 0) << outcome.out << outcome.err;
  }
}

TEST(Obligations, DamageOnTheWayIsNamed) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const std::string text = obligations(folder, "c.toml");
  const std::string first = "Sumwright obligations, format 1\n";
  const struct {
    std::string text;
    std::string message;
  } cases[] = {
      {replaced(text, first, "Sumwright obligations, format 1  \n"), "blanks at the end of a line"},
      {replaced(text, "verdict: established\n", "verdict: established \n"),
       "blanks at the end of a line"},
      {replaced(text, first, "Sumwright obligations, format 2\n"), "of another format"},
      {replaced(text, "\n| \n", "\n|\n"), "the blank behind the bar is gone"},
      {"", "altered.txt:1:1: error: the file is empty"},
      {"\xEF\xBB\xBF\r\n", "altered.txt:1:1: error: the file is empty"},
  };
  for (const auto& row : cases) {
    folder.write("altered.txt", row.text);
    const Outcome outcome = folder.sumwright({"check", "altered.txt"});
    EXPECT_EQ(outcome.status, 2);
    EXPECT_NE(outcome.err.find(row.message), std::string::npos) << row.message << "\n"
                                                                << outcome.err;
  }
}

TEST(Obligations, OtherCommandsSayWhatTheFileIs) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  folder.write("o.txt", obligations(folder, "c.toml"));
  for (const std::vector<std::string>& arguments : std::vector<std::vector<std::string>>{
           {"find", "o.txt"}, {"export", "o.txt", "--out", "out"}}) {
    const Outcome outcome = folder.sumwright(arguments);
    EXPECT_EQ(outcome.status, 2);
    EXPECT_EQ(outcome.err.substr(0, 57),
              "sumwright: o.txt: this is an obligation file, not a claim");
    EXPECT_NE(outcome.err.find("`sumwright check` verifies it"), std::string::npos);
  }
}

TEST(Obligations, Json) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  (void)obligations(folder, "c.toml");
  const Outcome outcome = folder.sumwright({"check", "--json", "made/obligations.txt"});
  EXPECT_EQ(outcome.status, 0);
  const auto json = nlohmann::json::parse(outcome.out);
  EXPECT_EQ(json.at("verdict"), "the file holds");
  EXPECT_EQ(json.at("file_says"), "established");
  EXPECT_TRUE(json.at("differences").empty());
  EXPECT_EQ(json.at("rebuilt").at("verdict"), "established");
}

}  // namespace
}  // namespace sumwright::testing
