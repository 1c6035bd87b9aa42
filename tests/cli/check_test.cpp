// `check`: statuses and texts, verdict by verdict.
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "program.hpp"

namespace sumwright::testing {
namespace {

void expect_says(const std::string& text, const std::string& what) {
  EXPECT_NE(text.find(what), std::string::npos) << "expected: " << what << "\nin:\n" << text;
}

void expect_narrow(const std::string& text) {
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    EXPECT_LE(end - at, 80U) << text.substr(at, end - at);
    EXPECT_TRUE(end == at || text[end - 1] != ' ') << text.substr(at, end - at);
    at = end + 1;
  }
}

TEST(Check, Established) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"check", exemplar("equal-faults.toml")});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err, "");
  const std::string head =
      "verdict       established\n"
      "claim         Two lines with equally many faults\n"
      "              sum(k = 0..n, binomial(n, k)^2) = binomial(2*n, n) for every\n"
      "              integer n >= 0\n"
      "recurrence    -2*(2*n + 1)*S(n) + (n + 1)*S(n + 1) = 0\n"
      "              for S(n), the sum on the left; brought by the author\n"
      "certificate   -k^2*(3*n - 2*k + 3)/(n - k + 1)^2\n"
      "audit         ";
  EXPECT_EQ(outcome.out.substr(0, head.size()), head);
  expect_says(outcome.out, "cases: all agree\n");
  expect_says(outcome.out,
              "\nid    side condition                  where                 settled\n");
  expect_says(outcome.out, "[leading");
  expect_narrow(outcome.out);
}

TEST(Check, RefutedClaimWithPoint) {
  const TestFolder folder;
  folder.write("c.toml",
               replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n*(n - 1)"));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.status, 1);
  EXPECT_EQ(outcome.err, "");
  EXPECT_EQ(outcome.out.substr(0, 45), "verdict       refuted (the claim is false)\ncl");
  expect_says(outcome.out, "point         the claimed equality fails at n = 2\n");
  expect_says(outcome.out, "left side     6\nright side    8\n");
}

TEST(Check, RefutedEvidenceLeavesTheEqualityOpen) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim() +
                             "[evidence]\nrecurrence = [\"-2*(2*n + 1)\", \"n + 1\"]\n"
                             "certificate = { k = \"k^2*(2*k - 3*n - 2)/(n + 1 - k)^2\" }\n");
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.status, 1);
  expect_says(outcome.out, "verdict       refuted (the evidence is wrong)\n");
  expect_says(outcome.out, "\nresidue       ");
  expect_says(outcome.out, "\npoint         ");
  expect_says(outcome.out, "the equality itself is not decided by this");
  expect_narrow(outcome.out);
}

TEST(Check, UnusableInputIsPointedAt) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, j)^2"));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.out, "");
  EXPECT_EQ(outcome.err.substr(0, 22), "c.toml:7:24: error: 'j") << outcome.err;
  expect_says(outcome.err, "summand = \"binomial(n, j)^2\"\n");
  expect_says(outcome.err, "^");
}

TEST(Check, NotHypergeometricIsUnusable) {
  const TestFolder folder;
  folder.write("c.toml",
               replaced(replaced(squares_claim(), "binomial(n, k)^2", "1/(1 + binomial(n, k))"),
                        "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.err.substr(0, 9), "c.toml:7:") << outcome.err;
}

TEST(Check, MissingFile) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"check", "none.toml"});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.out, "");
  expect_says(outcome.err, "none.toml");
}

TEST(Check, UndecidedSaysWhatWouldSettleIt) {
  const TestFolder folder;
  // The squares need order 1; nothing of order 0 exists.
  folder.write("c.toml", squares_claim());
  const Outcome outcome = folder.sumwright({"check", "c.toml", "--max-order", "0"});
  EXPECT_EQ(outcome.status, 3);
  EXPECT_EQ(outcome.err, "");
  EXPECT_EQ(outcome.out.substr(0, 24), "verdict       undecided\n");
  expect_says(outcome.out, "reason        no recurrence of order up to 0 was found\n");
  expect_says(outcome.out, "would settle  a larger --max-order");
}

TEST(Check, TimeLimit) {
  const TestFolder folder;
  folder.write("c.toml", replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)^9"),
                                  "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  const Outcome outcome = folder.sumwright({"check", "c.toml", "--time-limit", "0.2"});
  EXPECT_EQ(outcome.status, 3);
  expect_says(outcome.out, "time limit reached");
}

TEST(Check, Json) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"check", "--json", exemplar("equal-faults.toml")});
  EXPECT_EQ(outcome.status, 0);
  const auto json = nlohmann::json::parse(outcome.out);
  EXPECT_EQ(json.at("verdict"), "established");
  EXPECT_EQ(json.at("exit_status"), 0);
  EXPECT_FALSE(json.at("conditions").empty());
  EXPECT_FALSE(json.at("audit").empty());
  for (const auto& finding : json.at("audit")) EXPECT_EQ(finding.at("agrees"), true);
}

TEST(Check, JsonOfARefutation) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n"));
  const Outcome outcome = folder.sumwright({"check", "--json", "c.toml"});
  EXPECT_EQ(outcome.status, 1);
  const auto json = nlohmann::json::parse(outcome.out);
  EXPECT_EQ(json.at("verdict"), "refuted");
  EXPECT_EQ(json.at("subject"), "claim");
  EXPECT_EQ(json.at("counterexample").at("values").at("n"), "1");
  EXPECT_EQ(json.at("counterexample").at("left"), "2");
  EXPECT_EQ(json.at("counterexample").at("right"), "3");
  EXPECT_EQ(json.at("exit_status"), 1);
}

// A title may carry anything TOML allows; a terminal must not see it raw.
TEST(Check, HostileTitleIsHarmless) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "Squares of one row",
                                  "a\xE2\x80\xAE"
                                  "b"));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.out.find("\xE2\x80\xAE"), std::string::npos);
  EXPECT_EQ(outcome.err.find("\xE2\x80\xAE"), std::string::npos);
}

TEST(Check, FullDiskIsReported) {
  const TestFolder folder;
  const Outcome outcome = run_program({"sh", "-c", "exec \"$0\" check \"$1\" >/dev/full",
                                       SUMWRIGHT_PROGRAM, exemplar("equal-faults.toml")},
                                      folder.path());
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.err, "sumwright: standard output: No space left on device\n");
}

}  // namespace
}  // namespace sumwright::testing
