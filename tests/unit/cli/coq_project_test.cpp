// Texts of the Coq tools: read as they are, refused when they are something else.
#include "cli/coq_project.hpp"

#include <gtest/gtest.h>

#include "cli/status.hpp"

namespace sumwright::cli {
namespace {

TEST(CoqProject, Reads) {
  const CoqProject project =
      read_coq_project("-Q . Sumwright\n-Q Mine Mine\nSums.v\nMine/Claim.v\n", "p");
  EXPECT_EQ(project.load_path,
            (std::vector<std::string>{"-Q", ".", "Sumwright", "-Q", "Mine", "Mine"}));
  EXPECT_EQ(project.files, (std::vector<std::string>{"Sums.v", "Mine/Claim.v"}));
  EXPECT_EQ(project.claim_file(), "Mine/Claim.v");
  EXPECT_EQ(project.module("Mine/Claim.v"), "Mine.Claim");
  EXPECT_EQ(project.module("Sums.v"), "Sumwright.Sums");
}

TEST(CoqProject, Refuses) {
  for (const std::string text :
       {"", "-Q . Sumwright\n", "-Q . Sumwright\nSums.v\n", "Claim.v\n",
        "-Q . Sumwright\nMine/Claim.v\n", "-Q .. Sumwright\nClaim.v\n",
        "-Q /etc Sumwright\nClaim.v\n", "-Q . Sum;wright\nClaim.v\n",
        "-Q . Sumwright\n../Claim.v\n", "-Q . Sumwright\n/Claim.v\n",
        "-Q . Sumwright\na/b/Claim.v\n", "-Q . Sumwright\n-arg -noinit\nClaim.v\n",
        "-I . \n-Q . Sumwright\nClaim.v\n", "-Q . Sumwright\nClaim.v\n-load.v\n"}) {
    EXPECT_THROW((void)read_coq_project(text, "p"), Unusable) << text;
  }
}

TEST(CoqProject, ReachingCommands) {
  EXPECT_EQ(reaching_command("Lemma a : True.\nProof. exact I. Qed.\n"), "");
  EXPECT_EQ(reaching_command("(* Redirect \"x\" *) Check 1."), "");
  EXPECT_EQ(reaching_command("(* (* nested *) Redirect *) Check 1."), "");
  EXPECT_EQ(reaching_command("Notation \"'Redirect'\" := nat."), "");
  EXPECT_EQ(reaching_command("Time Redirect \"x\" Check 1."), "Redirect");
  EXPECT_EQ(reaching_command("(* \" *) \" *) Redirect \"x\" Check 1."), "Redirect");
  EXPECT_EQ(reaching_command("Declare (* *) ML\nModule \"m\"."), "Declare ML");
  EXPECT_EQ(reaching_command("Add ML Path \"m\"."), "Add ML");
  EXPECT_EQ(reaching_command("Add Rec LoadPath \"m\" as X."), "LoadPath \"...\"");
  EXPECT_EQ(reaching_command("Load Verbose \"m\"."), "Verbose \"...\"");
  EXPECT_EQ(reaching_command("Recursive Extraction Library X."), "Extraction");
  EXPECT_EQ(reaching_command("forall Load Cd : Z, Load = Cd."), "");  // names of an author
}

TEST(CoqProject, Dependencies) {
  const CoqProject project = read_coq_project("-Q . Sumwright\nA.v\nB.v\nClaim.v\n", "p");
  const auto found = dependencies(
      "A.vo A.glob A.v.beautified A.required_vo: A.v \nA.vio: A.v\n"
      "B.vo B.glob: B.v A.vo /usr/lib/coq/X.vo\n"
      "Claim.vo Claim.glob: Claim.v A.vo B.vo\n",
      project);
  EXPECT_EQ(found.at("A.v"), std::set<std::string>{});
  EXPECT_EQ(found.at("B.v"), std::set<std::string>{"A.v"});
  EXPECT_EQ(found.at("Claim.v"), (std::set<std::string>{"A.v", "B.v"}));
}

constexpr const char* kHead =
    "CONTEXT SUMMARY\n===============\n\n* Theory: Set is predicative\n  \n";
constexpr const char* kTail =
    "* Constants/Inductives relying on type-in-type: <none>\n  \n"
    "* Constants/Inductives relying on unsafe (co)fixpoints: <none>\n  \n";

std::vector<std::string> assumptions(const std::string& axioms) {
  return assumptions_in_summary("Some words\n\n" + (kHead + axioms) + kTail);
}

TEST(CoqProject, Summary) {
  EXPECT_EQ(assumptions("* Axioms: <none>\n  \n"), std::vector<std::string>{});
  EXPECT_EQ(assumptions("* Axioms:\n    A.b\n    C.d\n  \n"),
            (std::vector<std::string>{"Axioms: A.b", "Axioms: C.d"}));
}

TEST(CoqProject, SummaryThatIsNone) {
  EXPECT_THROW((void)assumptions_in_summary(""), Unusable);
  EXPECT_THROW((void)assumptions_in_summary("* Axioms: <none>\n"), Unusable);
  EXPECT_THROW((void)assumptions(""), Unusable);
}

}  // namespace
}  // namespace sumwright::cli
