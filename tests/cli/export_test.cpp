// `export`: which files for which verdict, the same bytes every time, and nothing half written.
#include <gtest/gtest.h>
#include <unistd.h>

#include <nlohmann/json.hpp>

#include "program.hpp"
#include "writers/sha256.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;
using nlohmann::json;

bool has(const std::vector<std::string>& files, const std::string& name) {
  return std::find(files.begin(), files.end(), name) != files.end();
}

TEST(Export, EstablishedHasEverything) {
  const TestFolder folder;
  const Outcome outcome =
      folder.sumwright({"export", exemplar("equal-faults.toml"), "--out", "out"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err, "");
  EXPECT_NE(outcome.out.find("\nwritten to out:\n  obligations.txt "), std::string::npos);
  const auto files = folder.files();
  for (const std::string name :
       {"out/obligations.txt", "out/appendix.tex", "out/appendix-standalone.tex",
        "out/coq/_CoqProject", "out/coq/Claim.v", "out/coq/Statement.v", "out/record.json",
        "out/run.json"}) {
    EXPECT_TRUE(has(files, name)) << name;
  }
  const json record = json::parse(read_file(folder.path() / "out/record.json"));
  EXPECT_EQ(record.at("verdict"), "established");
  // Every file but the two records is listed with its hash, and no other.
  EXPECT_EQ(record.at("files").size() + 2, files.size());
  for (const json& file : record.at("files")) {
    const std::string text = read_file(folder.path() / "out" / file.at("path").get<std::string>());
    EXPECT_EQ(file.at("sha256"), writers::sha256(text)) << file.at("path");
    EXPECT_EQ(file.at("bytes"), text.size());
  }
}

TEST(Export, SameBytesFromAnotherPlaceAndLocale) {
  const TestFolder one;
  const TestFolder two;
  const std::string text = read_file(exemplar("two-lots.toml"));
  one.write("a.toml", text);
  two.write("a.toml", text);
  EXPECT_EQ(one.sumwright({"export", "a.toml", "--out", "x"}).status, 0);
  const Outcome second =
      run_program({SUMWRIGHT_PROGRAM, "export", "a.toml", "--out", "x", "--time-limit", "300"},
                  two.path(), {{"LC_ALL", "C.UTF-8"}, {"TZ", "Asia/Tokyo"}});
  EXPECT_EQ(second.status, 0);
  ASSERT_EQ(one.files(), two.files());
  std::size_t compared = 0;
  for (const std::string& file : one.files()) {
    if (file == "x/run.json") continue;
    EXPECT_EQ(read_file(one.path() / file), read_file(two.path() / file)) << file;
    ++compared;
  }
  EXPECT_GT(compared, 10U);
}

TEST(Export, RunRecordHoldsWhatDiffers) {
  const TestFolder folder;
  EXPECT_EQ(folder.sumwright({"export", exemplar("equal-faults.toml"), "--out", "out"}).status, 0);
  const json run = json::parse(read_file(folder.path() / "out/run.json"));
  for (const char* key : {"tool", "libraries", "host", "started", "finished", "seconds",
                          "peak_memory_bytes", "limits", "replays"}) {
    EXPECT_TRUE(run.contains(key)) << key;
  }
  for (const auto& [name, version] : run.at("libraries").items()) {
    EXPECT_FALSE(version.get<std::string>().empty()) << name;
  }
}

TEST(Export, Targets) {
  const TestFolder folder;
  EXPECT_EQ(folder
                .sumwright({"export", exemplar("equal-faults.toml"), "--out", "out", "--as",
                            "obligations"})
                .status,
            0);
  EXPECT_EQ(folder.files(),
            (std::vector<std::string>{"out/obligations.txt", "out/record.json", "out/run.json"}));
}

TEST(Export, CoqPrefix) {
  const TestFolder folder;
  EXPECT_EQ(folder
                .sumwright({"export", exemplar("equal-faults.toml"), "--out", "out", "--as", "coq",
                            "--coq-prefix", "EqualFaults"})
                .status,
            0);
  EXPECT_TRUE(has(folder.files(), "out/coq/EqualFaults/Claim.v"));
  EXPECT_NE(read_file(folder.path() / "out/coq/_CoqProject").find("-Q EqualFaults EqualFaults\n"),
            std::string::npos);
}

void expect_no_proof(const TestFolder& folder) {
  EXPECT_EQ(folder.files(), (std::vector<std::string>{"c.toml", "out/obligations.txt",
                                                      "out/record.json", "out/run.json"}));
  EXPECT_NE(read_file(folder.path() / "out/obligations.txt").find("verdict: NOT ESTABLISHED"),
            std::string::npos);
}

TEST(Export, RefutedHasNoProof) {
  const TestFolder folder;
  folder.write("c.toml", replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n"));
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out"}).status, 1);
  expect_no_proof(folder);
  const json record = json::parse(read_file(folder.path() / "out/record.json"));
  EXPECT_EQ(record.at("verdict"), "refuted");
  EXPECT_EQ(record.at("counterexample").at("values").at("n"), "1");
}

TEST(Export, UndecidedHasNoProofEvenIfNotAskedForObligations) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  EXPECT_EQ(
      folder.sumwright({"export", "c.toml", "--out", "out", "--max-order", "0", "--as", "latex"})
          .status,
      3);
  expect_no_proof(folder);
}

TEST(Export, StoppedByTimeHasNoProof) {
  const TestFolder folder;
  folder.write("c.toml", replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)^9"),
                                  "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--time-limit", "0.2"}).status,
            3);
  expect_no_proof(folder);
}

// An earlier theorem must not stand beside a later verdict.
TEST(Export, OldProofDoesNotSurvive) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out"}).status, 0);
  EXPECT_TRUE(has(folder.files(), "out/coq/Claim.v"));
  folder.write("c.toml", replaced(squares_claim(), "binomial(2*n, n)", "binomial(2*n, n) + n"));
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out"}).status, 1);
  expect_no_proof(folder);
}

TEST(Export, WhatWasChangedByHandStaysWithAWarning) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out"}).status, 0);
  folder.write("out/appendix.tex", "mine now\n");
  const Outcome outcome =
      folder.sumwright({"export", "c.toml", "--out", "out", "--as", "obligations"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err,
            "sumwright: warning: out/appendix.tex is of an earlier export and was changed by hand; "
            "it does "
            "not belong to this one\n");
  EXPECT_EQ(read_file(folder.path() / "out/appendix.tex"), "mine now\n");
}

// What an author keeps in the folder is not replaced without a word.
TEST(Export, FilesOfTheAuthorAreNotReplaced) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  fs::create_directory(folder.path() / "out");
  for (const std::string name :
       {"obligations.txt", "appendix.tex", "record.json", "run.json", "coq"}) {
    const fs::path mine = folder.write("out/" + name, "{\"files\": []}\n");
    const Outcome outcome = folder.sumwright({"export", "c.toml", "--out", "out"});
    EXPECT_EQ(outcome.status, 2) << name;
    if (name != "coq") {
      EXPECT_EQ(outcome.err, "sumwright: out/" + name +
                                 ": exists and is not from an earlier export; move it away, or "
                                 "choose another --out\n");
    }
    EXPECT_EQ(read_file(mine), "{\"files\": []}\n");
    EXPECT_EQ(folder.files(), (std::vector<std::string>{"c.toml", "out/" + name}));
    fs::remove(mine);
  }
  // Beside an export, what it does not list is still the author's.
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--as", "obligations"}).status,
            0);
  folder.write("out/appendix.tex", "mine\n");
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out"}).status, 2);
  EXPECT_EQ(read_file(folder.path() / "out/appendix.tex"), "mine\n");
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--as", "obligations"}).status,
            0);
}

// A mounted volume: the folder is there and may be written, what is above it may not.
TEST(Export, OnlyTheFolderItselfIsWritten) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  fs::create_directories(folder.path() / "above/out");
  const bool root = ::geteuid() == 0;
  fs::permissions(folder.path(), fs::perms(0755));
  fs::permissions(folder.path() / "above", fs::perms(0555));
  fs::permissions(folder.path() / "above/out", fs::perms(0777));
  std::vector<std::string> arguments{SUMWRIGHT_PROGRAM, "export", "c.toml", "--out", "above/out"};
  if (root) {
    const std::vector<std::string> as_nobody{"setpriv", "--reuid=65534", "--regid=65534",
                                             "--clear-groups"};
    arguments.insert(arguments.begin(), as_nobody.begin(), as_nobody.end());
  }
  const Outcome outcome = run_program(arguments, folder.path());
  fs::permissions(folder.path() / "above", fs::perms(0755));
  EXPECT_EQ(outcome.status, 0) << outcome.err;
  EXPECT_TRUE(has(folder.files(), "above/out/coq/Claim.v"));
  for (const auto& entry : fs::directory_iterator(folder.path() / "above/out")) {
    EXPECT_FALSE(entry.path().filename().string().starts_with(".")) << entry.path();
  }
}

TEST(Export, AnUnansweredQuestionIsArchivedAsOne) {
  const TestFolder folder;
  folder.write("c.toml",
               replaced(squares_claim(), "[equals]\nclosed  = \"binomial(2*n, n)\"\n", ""));
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--max-order", "0"}).status, 3);
  const json record = json::parse(read_file(folder.path() / "out/record.json"));
  EXPECT_EQ(record.at("claim").at("statement"),
            "a recurrence for S(n) = sum(k = 0..n, binomial(n, k)^2) for every integer n >= 0");
  EXPECT_FALSE(record.contains("recurrence"));
}

// A record from a stranger must not lead to files elsewhere.
TEST(Export, RecordThatPointsOutsideRemovesNothing) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  fs::create_directory(folder.path() / "out");
  folder.write("precious", "x");
  folder.write("out/record.json", R"({"files": [{"path": "../precious", "sha256": ")" +
                                      writers::sha256("x") + R"("}]})");
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--as", "obligations"}).status,
            2);
  folder.write("out/record.json",
               R"({"tool": {"name": "Sumwright"}, "files": [{"path": "../precious", "sha256": ")" +
                   writers::sha256("x") + R"("}]})");
  EXPECT_EQ(folder.sumwright({"export", "c.toml", "--out", "out", "--as", "obligations"}).status,
            2);
  EXPECT_EQ(read_file(folder.path() / "precious"), "x");
}

TEST(Export, PlacesThatCannotBeUsed) {
  const TestFolder folder;
  folder.write("c.toml", squares_claim());
  const struct {
    std::string out;
    std::string message;
  } cases[] = {{"none/out", "no such folder"}, {"c.toml", "exists and is not a folder"}};
  for (const auto& row : cases) {
    const Outcome outcome = folder.sumwright({"export", "c.toml", "--out", row.out});
    EXPECT_EQ(outcome.status, 2) << row.out;
    EXPECT_NE(outcome.err.find(row.message), std::string::npos) << outcome.err;
  }
  EXPECT_EQ(folder.files(), std::vector<std::string>{"c.toml"});
}

}  // namespace
}  // namespace sumwright::testing
