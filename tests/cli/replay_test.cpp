// `replay` up to the point where Coq is needed: tampering, foreign folders, no assistant.
// With a stand-in for the assistant: what is run, in what order, and what becomes of its words.
#include <gtest/gtest.h>
#include <sys/stat.h>

#include <nlohmann/json.hpp>

#include "program.hpp"
#include "writers/sha256.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;
using nlohmann::json;

constexpr const char* kSummary =
    "\nCONTEXT SUMMARY\n===============\n\n* Theory: Set is predicative\n  \n* Axioms: <none>\n  \n"
    "* Constants/Inductives relying on type-in-type: <none>\n  \n"
    "* Constants/Inductives relying on unsafe (co)fixpoints: <none>\n  \n"
    "* Inductives whose positivity is assumed: <none>\n  \n";

// An export, and a folder of programs that stand for Coq's.
class Replay : public ::testing::Test {
 protected:
  void SetUp() override {
    ASSERT_EQ(
        folder_.sumwright({"export", exemplar("equal-faults.toml"), "--out", "out", "--as", "coq"})
            .status,
        0);
    fs::create_directory(folder_.path() / "bin");
    stand_in("coqdep", "for f; do case $f in *.v) echo \"${f%.v}.vo: $f\";; esac; done");
    stand_in("coqc",
             "if [ \"$1\" = --version ]; then echo 'Stand-in 1.0'; exit; fi\n"
             "for f; do :; done; [ -f \"$f\" ] && echo \"$f\" >>\"$LOG_FILE\" 2>/dev/null; exit 0");
    stand_in("coqchk", "cat <<'END'" + std::string(kSummary) + "END");
  }

  void stand_in(const std::string& name, const std::string& body) const {
    const fs::path path = folder_.write("bin/" + name, "#!/bin/sh\n" + body + "\n");
    ::chmod(path.c_str(), 0755);
  }

  [[nodiscard]] Outcome replay(std::vector<std::string> more = {}) const {
    std::vector<std::string> arguments{SUMWRIGHT_PROGRAM, "replay", "out"};
    arguments.insert(arguments.end(), more.begin(), more.end());
    return run_program(arguments, folder_.path(),
                       {{"PATH", (folder_.path() / "bin").string() + ":/usr/bin:/bin"}});
  }

  [[nodiscard]] json last_replay() const {
    return json::parse(read_file(folder_.path() / "out/run.json")).at("replays").back();
  }

  TestFolder folder_;
};

TEST_F(Replay, Accepted) {
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 0) << outcome.err;
  EXPECT_EQ(outcome.out.substr(0, 13), "Stand-in 1.0\n");
  EXPECT_NE(outcome.out.find("coqc    Claim.v\n"), std::string::npos);
  EXPECT_NE(outcome.out.find("coqchk  Sumwright.Claim\n"), std::string::npos);
  EXPECT_TRUE(outcome.out.ends_with("no axioms under the theorem\naccepted\n")) << outcome.out;
  EXPECT_EQ(last_replay().at("exit_status"), 0);
  EXPECT_EQ(last_replay().at("assistant"), "Stand-in 1.0");
  EXPECT_GE(last_replay().at("steps").size(), 10U);
}

TEST_F(Replay, LeavesTheExportAsItIs) {
  const auto before = folder_.files();
  EXPECT_EQ(replay().status, 0);
  EXPECT_EQ(folder_.files(), before);
}

TEST_F(Replay, RefusedByTheCompiler) {
  stand_in("coqc",
           "for f; do :; done; case $f in Sums.v) echo 'Error: no such lemma'; exit 1;; esac");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 1);
  EXPECT_NE(outcome.out.find("coqc    Sums.v  FAILED\n"), std::string::npos) << outcome.out;
  EXPECT_TRUE(outcome.out.ends_with("refused\n"));
  EXPECT_NE(outcome.err.find("coqc does not accept Sums.v:\n    Error: no such lemma\n"),
            std::string::npos)
      << outcome.err;
  EXPECT_EQ(last_replay().at("exit_status"), 1);
}

TEST_F(Replay, AnAxiomUnderTheTheoremIsARefusal) {
  stand_in("coqchk",
           "cat <<'END'" +
               replaced(kSummary, "* Axioms: <none>", "* Axioms:\n    Sumwright.Claim.trust_me") +
               "END");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 1);
  EXPECT_EQ(outcome.err, "sumwright: the theorem rests on Axioms: Sumwright.Claim.trust_me\n");
  EXPECT_EQ(last_replay().at("assumptions").at(0), "Axioms: Sumwright.Claim.trust_me");
}

TEST_F(Replay, TypeInTypeIsARefusal) {
  stand_in(
      "coqchk",
      "cat <<'END'" + replaced(kSummary, "type-in-type: <none>", "type-in-type: \n    X") + "END");
  EXPECT_EQ(replay().status, 1);
}

TEST_F(Replay, ASummaryThatCannotBeReadIsNoSummary) {
  stand_in("coqchk", "echo Modules were successfully checked");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.err, "sumwright: coqchk gave no summary of the context\n");
}

TEST_F(Replay, TimeLimit) {
  stand_in("coqc", "exec sleep 60");
  const Outcome outcome = replay({"--time-limit", "0.5"});
  EXPECT_EQ(outcome.status, 3);
  EXPECT_NE(outcome.err.find("time limit reached"), std::string::npos) << outcome.err;
  EXPECT_NE(outcome.out.find("  stopped at its time limit\n"), std::string::npos) << outcome.out;
  EXPECT_EQ(outcome.out.find("FAILED"), std::string::npos) << outcome.out;
  EXPECT_TRUE(outcome.out.ends_with("undecided\n"));
}

TEST_F(Replay, AProgramEndedByASignalDecidesNothing) {
  stand_in("coqc", "kill -9 $$");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 3);
  EXPECT_EQ(outcome.out.find("FAILED"), std::string::npos) << outcome.out;
}

TEST_F(Replay, NoAssistant) {
  fs::remove(folder_.path() / "bin/coqchk");
  const Outcome outcome = run_program({SUMWRIGHT_PROGRAM, "replay", "out"}, folder_.path(),
                                      {{"PATH", (folder_.path() / "bin").string()}});
  EXPECT_EQ(outcome.status, 3);
  EXPECT_EQ(outcome.err, "sumwright: coqchk is not installed on this machine\n");
  EXPECT_EQ(outcome.out, "undecided\n");
}

TEST_F(Replay, TamperedFilesAreNamedAndNothingIsRun) {
  stand_in("coqc", "exit 7");  // would be reported
  const fs::path script = folder_.path() / "out/coq/Claim.v";
  folder_.write("out/coq/Claim.v", read_file(script) + "(* more *)\n");
  fs::remove(folder_.path() / "out/coq/Sums.v");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 1);
  EXPECT_NE(outcome.err.find("coq/Claim.v is not the file that record.json describes"),
            std::string::npos);
  EXPECT_NE(outcome.err.find("coq/Sums.v: No such file"), std::string::npos) << outcome.err;
  EXPECT_EQ(outcome.out, "refused\n");
}

TEST_F(Replay, FilesThatAreNotListedAreNotRun) {
  folder_.write("out/coq/Extra.v", "Axiom wrong : False.\n");
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.out.find("Extra"), std::string::npos);
}

// A whole export by a stranger: hashes are right, scripts reach out of the proof.
TEST_F(Replay, ScriptsThatReachOutAreNotRun) {
  json record = json::parse(read_file(folder_.path() / "out/record.json"));
  const std::pair<std::string, std::string> cases[] = {
      {"Redirect \"/etc/x\" Print nat.", "Redirect"},
      {"Cd (* *) \"/\".", "Cd \"...\""},
      {"Declare ML Module \"x\".", "Declare ML"},
      {"Add LoadPath \"/\" as X.", "LoadPath \"...\""},
      {"Separate Extraction plus.", "Extraction"},
      {"Load \"/etc/x\".", "Load \"...\""}};
  for (const auto& [sentence, command] : cases) {
    const std::string text = "(* \"Redirect\" *) " + sentence + "\n";
    folder_.write("out/coq/Claim.v", text);
    for (json& file : record.at("files")) {
      if (file.at("path") == "coq/Claim.v") file["sha256"] = writers::sha256(text);
    }
    folder_.write("out/record.json", record.dump());
    const Outcome outcome = replay();
    EXPECT_EQ(outcome.status, 1) << sentence;
    EXPECT_NE(outcome.err.find("coq/Claim.v contains `" + command + "`"), std::string::npos)
        << outcome.err;
  }
}

TEST_F(Replay, ProjectFileThatPassesOptionsIsRefused) {
  const std::string text =
      read_file(folder_.path() / "out/coq/_CoqProject") + "-arg -impredicative-set\n";
  json record = json::parse(read_file(folder_.path() / "out/record.json"));
  for (json& file : record.at("files")) {
    if (file.at("path") == "coq/_CoqProject") file["sha256"] = writers::sha256(text);
  }
  folder_.write("out/coq/_CoqProject", text);
  folder_.write("out/record.json", record.dump());
  const Outcome outcome = replay();
  EXPECT_EQ(outcome.status, 2);
  EXPECT_NE(outcome.err.find("'-arg' is not part of an exported project"), std::string::npos)
      << outcome.err;
}

TEST_F(Replay, Json) {
  const Outcome outcome = replay({"--json", "--jobs", "1"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(json::parse(outcome.out).at("exit_status"), 0);
}

TEST(ReplayFolder, NoExport) {
  const TestFolder folder;
  const Outcome empty = folder.sumwright({"replay", "."});
  EXPECT_EQ(empty.status, 2);
  EXPECT_EQ(empty.err, "sumwright: .: not a folder written by `export`: it has no record.json\n");
  EXPECT_EQ(folder.sumwright({"replay", "none"}).err, "sumwright: none: no such folder\n");
  folder.write("record.json", "{}");
  const Outcome outcome = folder.sumwright({"replay", "."});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_EQ(outcome.err, "sumwright: ./record.json: not a record of an export\n");
}

TEST(ReplayFolder, ExportWithoutScripts) {
  const TestFolder folder;
  EXPECT_EQ(folder
                .sumwright({"export", exemplar("equal-faults.toml"), "--out", "out", "--as",
                            "obligations"})
                .status,
            0);
  const Outcome outcome = folder.sumwright({"replay", "out"});
  EXPECT_EQ(outcome.status, 2);
  EXPECT_NE(outcome.err.find("this export holds no Coq scripts"), std::string::npos) << outcome.err;
}

}  // namespace
}  // namespace sumwright::testing
