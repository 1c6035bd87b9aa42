// record.json: complete, deterministic, and valid whatever the claim contains.
#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "proof_fixture.hpp"
#include "writers/sha256.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

TEST(Record, SaysWhatWasProved) {
  const proof::Proof proof = fixture::squares();
  const std::vector<NamedText> files = {{"obligations.txt", "abc"}, {"coq/Claim.v", ""}};
  const std::string text = record_json(proof, files);
  EXPECT_EQ(text, record_json(proof, files));
  const auto json = nlohmann::ordered_json::parse(text);
  EXPECT_EQ(json["format"], 1);
  EXPECT_EQ(json["verdict"], "established");
  EXPECT_EQ(json["claim"]["title"], "Squares along one row of the binomial triangle");
  EXPECT_EQ(json["claim"]["sha256"], sha256(proof.claim->source->text));
  EXPECT_EQ(json["recurrence"]["coefficients"],
            (std::vector<std::string>{"-2*(2*n + 1)", "n + 1"}));
  EXPECT_EQ(json["sizes"]["normal_form"]["terms"], 9);
  EXPECT_EQ(json["sizes"]["normal_form"]["degrees"]["k"], 2);
  EXPECT_EQ(json["sizes"]["normal_form"]["bits"], 4);
  EXPECT_EQ(json["conditions"].size(), proof.conditions.size());
  EXPECT_EQ(json["conditions"][5]["kind"], "leading coefficient");
  ASSERT_EQ(json["files"].size(), 2U);
  EXPECT_EQ(json["files"][0]["sha256"], sha256("abc"));
  EXPECT_EQ(json["files"][0]["bytes"], 3);
  EXPECT_FALSE(json.contains("counterexample"));
}

TEST(Record, Refuted) {
  proof::Proof proof = fixture::halves();
  proof.verdict = proof::Verdict::refuted;
  proof.subject = proof::Subject::evidence;
  proof.reason = "the \"certificate\"\nis wrong \xFF";  // not UTF-8
  proof.counterexample =
      proof::Counterexample{{{"n", 2}, {"k", mpq_class(1, 2)}}, "1/3", "0", "the identity"};
  const auto json = nlohmann::ordered_json::parse(record_json(proof, {}));
  EXPECT_EQ(json["verdict"], "refuted");
  EXPECT_EQ(json["subject"], "evidence");
  EXPECT_EQ(json["counterexample"]["values"]["k"], "1/2");
  EXPECT_EQ(json["counterexample"]["left"], "1/3");
  EXPECT_FALSE(json.contains("recurrence"));  // that name is kept for what is proved
  EXPECT_TRUE(json["reason"].get<std::string>().starts_with("the \"certificate\"\nis wrong "));
}

// While nothing is proved, the statement is the author's.
TEST(Record, UndecidedStatesWhatTheAuthorWrote) {
  const std::string sum =
      "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"n*k\"\n"
      "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n";
  proof::Proof question = fixture::bare(sum);
  question.recurrence_text = {"n", "1"};
  question.right_side_text = "n^3";
  auto json = nlohmann::ordered_json::parse(record_json(question, {}));
  EXPECT_EQ(json["claim"]["kind"], "question");
  EXPECT_EQ(json["claim"]["statement"],
            "a recurrence for S(n) = sum(k = 0..n, n*k) for every integer n >= 0");
  EXPECT_EQ(json["candidate"].dump(), R"({"order":1,"brought":false,"coefficients":["n","1"]})");

  proof::Proof claimed =
      fixture::bare(sum + "[evidence]\nrecurrence = [\"n/2\", \"1\"]\nright_side = \"n + 1\"\n");
  claimed.symbols = {{"n", proof::SymbolKind::running}};
  claimed.recurrence_text = {"n", "2"};  // as the work has it
  claimed.right_side_text = "0";
  json = nlohmann::ordered_json::parse(record_json(claimed, {}));
  EXPECT_EQ(json["claim"]["statement"],
            "n/2*S(n) + S(n + 1) = n + 1 for every integer n >= 0, where S(n) = sum(k = "
            "0..n, n*k)");
  EXPECT_EQ(json["candidate"].dump(),
            R"({"order":1,"brought":true,"coefficients":["n/2","1"],"right_side":"n + 1"})");
}

}  // namespace
}  // namespace sumwright::writers
