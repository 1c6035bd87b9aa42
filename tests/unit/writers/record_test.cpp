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
  EXPECT_TRUE(json["reason"].get<std::string>().starts_with("the \"certificate\"\nis wrong "));
}

}  // namespace
}  // namespace sumwright::writers
