// What an author brings: right in any form, or wrong and said which part.
#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof {
namespace {

using testing::ClaimParts;
using testing::decide;

ClaimParts squares(bool equality = true) {
  ClaimParts parts;
  parts.summand = "binomial(n, k)^2";
  if (equality) parts.closed = "binomial(2*n, n)";
  parts.recurrence = "\"-2*(2*n + 1)\", \"n + 1\"";
  parts.certificate = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2";
  return parts;
}

TEST(BroughtEvidence, RightInAnyForm) {
  struct Form {
    const char* recurrence;
    const char* certificate;
  };
  const Form forms[] = {
      {"\"-2*(2*n + 1)\", \"n + 1\"", "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
      {"\"-2*(2*n + 1)\", \"n + 1\"", ""},
      {"\"-2*(2*n + 1)\", \"n + 1\"",
       "(2*k^3 - 3*n*k^2 - 3*k^2)/(n^2 - 2*n*k + k^2 + 2*n - 2*k + 1)"},
      {"\"-2*(2*n + 1)\", \"n + 1\"", "k^3*(n + 7)*(2*k - 3*n - 3)/(k*(n + 7)*(n + 1 - k)^2)"},
      {"\"-14*(2*n + 1)\", \"7*(n + 1)\"", "7*k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
      {"\"-2*(2*n + 1)*(n + 5)\", \"(n + 1)*(n + 5)\"",
       "(n + 5)*k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
      {"\"-2*(2*n + 1)/(n + 1)\", \"1\"", "k^2*(2*k - 3*n - 3)/((n + 1)*(n + 1 - k)^2)"},
      {"\"2*(2*n + 1)\", \"-(n + 1)\"", "-k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
      {"\"-2*(2*n + 1)\", \"n + 1\", \"0\"", "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
  };
  for (const Form& form : forms)
    for (const bool equality : {true, false}) {
      SCOPED_TRACE(std::string(form.recurrence) + " with " + form.certificate +
                   (equality ? " for the equality" : " as the claim"));
      ClaimParts parts = squares(equality);
      parts.recurrence = form.recurrence;
      parts.certificate = form.certificate;
      const Proof proof = decide(parts);
      EXPECT_EQ(testing::name_of(proof.verdict), "established") << proof.reason;
      EXPECT_FALSE(testing::has_open_condition(proof));
      EXPECT_TRUE(proof.evidence_brought);
    }
}

void expect_wrong(const ClaimParts& parts, const char* part, Subject subject = Subject::evidence) {
  const Proof proof = decide(parts);
  ASSERT_EQ(testing::name_of(proof.verdict), "refuted") << proof.reason;
  EXPECT_EQ(proof.subject, subject);
  EXPECT_NE(proof.reason.find(part), std::string::npos) << proof.reason;
  ASSERT_TRUE(proof.counterexample);
  EXPECT_NE(proof.counterexample->left, proof.counterexample->right);
}

TEST(BroughtEvidence, RightRecurrenceWithAWrongCertificate) {
  ClaimParts parts = squares();
  parts.certificate = "k^2*(2*k - 3*n - 2)/(n + 1 - k)^2";
  expect_wrong(parts, "the certificate is wrong");
  const Proof proof = decide(parts);
  EXPECT_FALSE(proof.residue.empty());
  EXPECT_EQ(proof.counterexample->what, "the telescoping identity");
  // The right one is offered, and is right.
  const std::string offer = "a certificate for it is ";
  const std::size_t at = proof.reason.find(offer);
  ASSERT_NE(at, std::string::npos) << proof.reason;
  parts.certificate = proof.reason.substr(at + offer.size());
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "established") << parts.certificate;
}

TEST(BroughtEvidence, RightCertificateWithAWrongRecurrence) {
  ClaimParts parts = squares();
  parts.recurrence = "\"-2*(2*n + 1)\", \"n + 2\"";
  expect_wrong(parts, "the recurrence is wrong (it fails at n = 0); the certificate belongs to");
}

TEST(BroughtEvidence, BothWrong) {
  ClaimParts parts = squares();
  parts.recurrence = "\"-2*(2*n + 1)\", \"n + 2\"";
  parts.certificate = "k^2*(2*k - 3*n - 2)/(n + 1 - k)^2";
  expect_wrong(parts, "the recurrence is wrong");
}

TEST(BroughtEvidence, WrongRecurrenceAlone) {
  ClaimParts parts = squares();
  parts.recurrence = "\"-2*(2*n + 1)\", \"n + 2\"";
  parts.certificate = "";
  expect_wrong(parts, "the recurrence is wrong: it fails at n = 0");
}

TEST(BroughtEvidence, ScaledOnOneSideOnly) {
  ClaimParts parts = squares();
  parts.certificate = "2*k^2*(2*k - 3*n - 3)/(n + 1 - k)^2";
  expect_wrong(parts, "the certificate is wrong");
  parts = squares();
  parts.recurrence = "\"-4*(2*n + 1)\", \"2*(n + 1)\"";
  expect_wrong(parts, "the certificate is wrong");
}

TEST(BroughtEvidence, WrongRightSide) {
  ClaimParts parts = squares();
  parts.right_side = "1";
  expect_wrong(parts, "the certificate is right as an identity");
  parts = squares(false);
  parts.right_side = "1";
  expect_wrong(parts, "", Subject::claim);
  parts.certificate = "";
  expect_wrong(parts, "", Subject::claim);
  parts = squares();
  parts.right_side = "n - n";
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "established");
}

// True, but not what the summand's telescoper gives: the closed form carries it.
TEST(BroughtEvidence, RecurrenceThatIsNoTelescoper) {
  ClaimParts parts;
  parts.closed = "2^n";
  parts.recurrence = "\"-1\", \"1\"";
  parts.right_side = "2^n";
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "established");
  parts.right_side = "2^n + n*(n - 1)*(n - 2)*(n - 3)";
  EXPECT_EQ(testing::name_of(decide(parts).verdict), "refuted");
}

TEST(BroughtEvidence, FalseEqualityWithRightEvidence) {
  ClaimParts parts = squares();
  parts.closed = "2*binomial(2*n, n)";
  expect_wrong(parts, "the two sides of the claim differ", Subject::claim);
}

}  // namespace
}  // namespace sumwright::proof
