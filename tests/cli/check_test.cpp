// `check`: statuses and texts, verdict by verdict.
#include <gtest/gtest.h>
#include <sys/stat.h>

#include <nlohmann/json.hpp>

#include "program.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;

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

// A named pipe without a writer: a plain open would wait, and no limit would end it.
TEST(Check, PipesAndDevicesAreNotWaitedFor) {
  const TestFolder folder;
  ASSERT_EQ(::mkfifo((folder.path() / "pipe").c_str(), 0600), 0);
  for (const std::string command : {"check", "find", "replay"}) {
    for (const std::string name : {"pipe", "/dev/zero"}) {
      const Outcome outcome =
          run_program({"timeout", "20", SUMWRIGHT_PROGRAM, command, name}, folder.path());
      EXPECT_EQ(outcome.status, 2) << command << " " << name;
      expect_says(outcome.err, command == "replay" ? "not a folder" : "not a regular file");
    }
  }
}

TEST(Check, AClosedTerminalChangesNothing) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const auto status = [&](const std::string& redirected) {
    return run_program({"sh", "-c", "exec \"$0\" " + redirected, SUMWRIGHT_PROGRAM}, folder.path())
        .status;
  };
  EXPECT_EQ(status("check none.toml 2>&-"), 2);
  EXPECT_EQ(status("check none.toml 2>/dev/full"), 2);
  EXPECT_EQ(status("check c.toml 2>&- 0<&-"), 0);
  EXPECT_EQ(status("check c.toml >&-"), 2);
  // Nothing of a message ends up in a file that got the number of a closed stream.
  EXPECT_EQ(status("find c.toml --write w.toml 2>&-"), 0);
  expect_says(read_file(folder.path() / "w.toml"), "[evidence]");
  EXPECT_EQ(read_file(folder.path() / "w.toml").find("sumwright"), std::string::npos);
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

// What is not proved has another name than what is.
TEST(Check, ACandidateIsNotARecurrence) {
  std::size_t candidates = 0;
  for (const auto& entry :
       fs::directory_iterator(std::string(SUMWRIGHT_SOURCE_DIR) + "/tests/undecided")) {
    if (entry.path().extension() != ".toml") continue;
    SCOPED_TRACE(entry.path().filename());
    const TestFolder folder;
    const Outcome outcome = folder.sumwright({"check", entry.path().string()});
    EXPECT_EQ(outcome.status, 3) << outcome.out;
    EXPECT_EQ(outcome.out.find("\nrecurrence "), std::string::npos) << outcome.out;
    if (outcome.out.find("\ncandidate ") == std::string::npos) continue;
    ++candidates;
    expect_says(outcome.out, "; not proved\n");
    const Outcome json = folder.sumwright({"check", "--json", entry.path().string()});
    const auto parsed = nlohmann::json::parse(json.out);
    EXPECT_FALSE(parsed.contains("recurrence"));
    EXPECT_TRUE(parsed.contains("candidate"));
  }
  EXPECT_GT(candidates, 0U);
}

// A recurrence whose argument starts late says from where on.
TEST(Check, TheThresholdIsSaid) {
  const TestFolder folder;
  folder.write("c.toml",
               "format = 1\ntitle = \"Rabbits\"\nrunning = \"n\"\nfrom = 0\n"
               "[sum]\nsummand = \"binomial(n - k, k)\"\n"
               "over = [ { index = \"k\", low = \"0\", high = \"floor(n/2)\" } ]\n");
  const Outcome json = folder.sumwright({"find", "c.toml", "--json"});
  ASSERT_EQ(json.status, 0) << json.out;
  const long threshold = nlohmann::json::parse(json.out).at("recurrence").at("threshold");
  ASSERT_GT(threshold, 0) << "another claim is needed for this test";
  expect_says(folder.sumwright({"find", "c.toml"}).out,
              "found; for n >= " + std::to_string(threshold) + ", smaller n checked one by one\n");
}

TEST(Check, InequalitiesAreShownAsPeopleWriteThem) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(2*n, n)",
                                  "binomial(2*n, n)*factorial(1000 - n)/factorial(1000 - n)"));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_NE(outcome.status, 0);
  expect_says(outcome.out, "n <= 1000 [definedness]");
  EXPECT_EQ(outcome.out.find("-n + 1000"), std::string::npos) << outcome.out;
}

TEST(Check, SizeLimitsAdviseNoLongerTime) {
  const TestFolder folder;
  folder.write("c.toml",
               replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)^16"),
                        "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  const Outcome outcome = folder.sumwright({"check", "c.toml"});
  EXPECT_EQ(outcome.status, 3);
  expect_says(outcome.out, "\nreason        an intermediate result is larger than Sumwright works");
  EXPECT_EQ(outcome.out.find("--time-limit"), std::string::npos) << outcome.out;
}

TEST(Check, TimeLimit) {
  const TestFolder folder;
  folder.write("c.toml", replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)^9"),
                                  "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  const Outcome outcome = folder.sumwright({"check", "c.toml", "--time-limit", "0.2"});
  EXPECT_EQ(outcome.status, 3);
  EXPECT_EQ(outcome.out.substr(0, 24), "verdict       undecided\n");
  expect_says(outcome.out, "\nreason        time limit reached");
  expect_says(outcome.out, "\nwould settle  a larger --time-limit\n");
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

nlohmann::json only_object(const Outcome& outcome) {
  const auto json = nlohmann::json::parse(outcome.out, nullptr, false);
  EXPECT_TRUE(json.is_object()) << outcome.out << outcome.err;
  EXPECT_EQ(json.value("exit_status", -1), outcome.status);
  return json;
}

TEST(Check, JsonOfUnusableInput) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(n, k)^2", "binomal(n, k)^2"));
  const Outcome placed = folder.sumwright({"check", "--json", "c.toml"});
  EXPECT_EQ(placed.status, 2);
  EXPECT_EQ(placed.err.substr(0, 14), "c.toml:7:12: e") << placed.err;
  auto json = only_object(placed);
  EXPECT_EQ(json.at("verdict"), "refused");
  EXPECT_EQ(json.at("file"), "c.toml");
  EXPECT_EQ(json.at("line"), 7);
  EXPECT_EQ(json.at("column"), 12);
  EXPECT_EQ(json.at("message"), "'binomal' is not a function");
  EXPECT_EQ(json.at("suggestion"), "binomial");
  EXPECT_FALSE(json.contains("expected"));

  folder.write("c.toml", replaced(squares_claim(), "binomial(n, k)^2", "2 k"));
  json = only_object(folder.sumwright({"check", "--json", "c.toml"}));
  EXPECT_EQ(json.at("expected"), "there are no implicit products; write a*b");
  EXPECT_FALSE(json.contains("suggestion"));

  json = only_object(folder.sumwright({"find", "none.toml", "--json"}));
  EXPECT_EQ(json.at("file"), "none.toml");
  EXPECT_FALSE(json.contains("line"));

  for (const std::vector<std::string>& arguments :
       std::vector<std::vector<std::string>>{{"check", "--json"},
                                             {"chekc", "c.toml", "--json"},
                                             {"replay", "none", "--json"},
                                             {"export", "c.toml", "--out", "no/where", "--json"}}) {
    const Outcome outcome = folder.sumwright(arguments);
    EXPECT_EQ(outcome.status, 2);
    json = only_object(outcome);
    EXPECT_EQ(json.at("verdict"), "refused");
    EXPECT_FALSE(json.at("message").get<std::string>().empty());
  }
}

TEST(Check, JsonWithoutMessages) {
  const TestFolder folder;
  const Outcome outcome = run_program(
      {"sh", "-c", "exec \"$0\" check --json none.toml 2>&-", SUMWRIGHT_PROGRAM}, folder.path());
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(only_object(outcome).at("verdict"), "refused");
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
