// `find`: what it prints, and the copy of the claim that it writes.
#include <gtest/gtest.h>

#include "program.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;

const char* const kEvidence =
    "[evidence]\n"
    "recurrence  = [\"-2*(2*n + 1)\", \"n + 1\"]\n"
    "certificate = { k = \"-k^2*(3*n - 2*k + 3)/(n - k + 1)^2\" }\n";

TEST(Find, PrintsARecurrenceTwice) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const Outcome outcome = folder.sumwright({"find", "c.toml"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err, "");
  EXPECT_NE(outcome.out.find("recurrence    -2*(2*n + 1)*S(n) + (n + 1)*S(n + 1) = 0\n"),
            std::string::npos)
      << outcome.out;
  EXPECT_NE(outcome.out.find("\n" + std::string(kEvidence)), std::string::npos) << outcome.out;
  EXPECT_NE(outcome.out.find("`sumwright check` decides the equality"), std::string::npos);
}

TEST(Find, AnswersAQuestionWithARightSide) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"find", exemplar("dispatch-orders.toml")});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_NE(outcome.out.find("S(n) = factorial(n + 1) - 1"), std::string::npos) << outcome.out;
  EXPECT_NE(outcome.out.find("right_side  = \"factorial(n + 1) - 1\"\n"), std::string::npos);
  EXPECT_EQ(outcome.out.find("one by one"), std::string::npos);
}

TEST(Find, GivesAClosedFormThatItProved) {
  const TestFolder folder;
  folder.write("q.toml",
               "format = 1\ntitle = \"q\"\nrunning = \"n\"\nfrom = 0\n[sum]\n"
               "summand = \"binomial(n, k)^2\"\n"
               "over = [ { index = \"k\", low = 0, high = \"n\" } ]\n");
  const Outcome text = folder.sumwright({"find", "q.toml"});
  EXPECT_NE(text.out.find("closed form   S(n) = factorial(2*n)/factorial(n)^2, proved as a claim"),
            std::string::npos)
      << text.out;
  const Outcome json = folder.sumwright({"find", "q.toml", "--json"});
  EXPECT_NE(json.out.find("\"closed_form\": \"factorial(2*n)/factorial(n)^2\""), std::string::npos)
      << json.out;
  folder.write("e.toml",
               "format = 1\ntitle = \"e\"\nrunning = \"n\"\nfrom = 0\n[sum]\n"
               "summand = \"binomial(n, k)^3\"\n"
               "over = [ { index = \"k\", low = 0, high = \"n\" } ]\n");
  EXPECT_EQ(folder.sumwright({"find", "e.toml"}).out.find("closed form"), std::string::npos);
}

TEST(Find, NothingWithinTheOrder) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const Outcome outcome =
      folder.sumwright({"find", "c.toml", "--max-order", "0", "--write", "w.toml"});
  EXPECT_EQ(outcome.status, 3);
  EXPECT_NE(outcome.out.find("no recurrence of order up to 0 was found"), std::string::npos);
  EXPECT_EQ(outcome.err, "sumwright: nothing found, nothing written\n");
  EXPECT_FALSE(fs::exists(folder.path() / "w.toml"));
}

TEST(Find, WritesACopyThatChecks) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const Outcome outcome = folder.sumwright({"find", "c.toml", "--write", "w.toml"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err, "sumwright: evidence written to w.toml\n");
  EXPECT_EQ(read_file(folder.path() / "w.toml"), squares_claim() + "\n" + kEvidence);
  EXPECT_EQ(read_file(folder.path() / "c.toml"), squares_claim());
  const Outcome checked = folder.sumwright({"check", "w.toml"});
  EXPECT_EQ(checked.status, 0);
  EXPECT_NE(checked.out.find("brought by the author"), std::string::npos);
  EXPECT_EQ(folder.files(), (std::vector<std::string>{"c.toml", "w.toml"}));
}

TEST(Find, KeepsTheLayoutOfEvidenceThatIsThere) {
  const TestFolder folder;
  // CRLF, a byte-order mark, comments, an odd order of keys, text behind the table.
  std::string claim = squares_claim() +
                      "\n[evidence]   # from an old note\n"
                      "  certificate = { k = \"k\" }  # wrong\n"
                      "  recurrence = [  # two of them\n    \"1\",\n    \"2\" ]  # wrong as well\n"
                      "\n[record]\nsource = \"a note\"  # the end\n";
  for (std::size_t at = 0; (at = claim.find('\n', at)) != std::string::npos; at += 2) {
    claim.replace(at, 1, "\r\n");
  }
  claim = "\xEF\xBB\xBF" + claim;
  folder.write("c.toml", claim);
  const Outcome outcome = folder.sumwright({"find", "c.toml", "--write", "c.toml"});
  EXPECT_EQ(outcome.status, 0) << outcome.err;
  std::string expected = replaced(claim, "\"k\" }", "\"-k^2*(3*n - 2*k + 3)/(n - k + 1)^2\" }");
  expected = replaced(expected, "[  # two of them\r\n    \"1\",\r\n    \"2\" ]",
                      "[\"-2*(2*n + 1)\", \"n + 1\"]");
  EXPECT_EQ(read_file(folder.path() / "c.toml"), expected);
}

TEST(Find, OtherNameOfTheInputIsRefused) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  fs::create_symlink("c.toml", folder.path() / "link.toml");
  const Outcome outcome = folder.sumwright({"find", "c.toml", "--write", "link.toml"});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.err, "sumwright: link.toml: is the claim file under another name\n");
  EXPECT_EQ(read_file(folder.path() / "c.toml"), squares_claim());
}

TEST(Find, PlacesThatCannotBeWritten) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  fs::create_directory(folder.path() / "taken");
  for (const std::string target : {"taken", "none/w.toml", "/dev/full"}) {
    const Outcome outcome = folder.sumwright({"find", "c.toml", "--write", target});
    EXPECT_EQ(outcome.status, 2) << target;
    EXPECT_NE(outcome.err.find("sumwright: "), std::string::npos) << outcome.err;
  }
  EXPECT_EQ(folder.files(), std::vector<std::string>{"c.toml"});
}

TEST(Find, ReplacingAClaimedRecurrenceIsSaid) {
  const TestFolder folder;
  const std::string claim = replaced(squares_claim(), "[equals]\nclosed  = \"binomial(2*n, n)\"\n",
                                     "[evidence]\nrecurrence = [\"1\", \"1\"]\n");
  folder.write("c.toml", claim);
  const Outcome outcome = folder.sumwright({"find", "c.toml", "--write", "w.toml"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_NE(outcome.err.find("it replaces the recurrence that the file claimed"),
            std::string::npos);
}

}  // namespace
}  // namespace sumwright::testing
