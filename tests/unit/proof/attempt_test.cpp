// One attempt with given evidence: how far it comes, and what stops it.
#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using Outcome = Attempt::Outcome;
using testing::ClaimParts;

Attempt tried(const ClaimParts& parts, bool as_equality) {
  const Terms terms = testing::terms_of(parts);
  return attempt(terms, testing::evidence_of(terms), as_equality, {});
}

ClaimParts row() {
  ClaimParts parts;
  parts.closed = "2^n";
  parts.recurrence = "\"-2\", \"1\"";
  parts.certificate = "-k/(n + 1 - k)";
  return parts;
}

TEST(Attempt, Complete) {
  const Attempt equality = tried(row(), true);
  EXPECT_EQ(equality.outcome, Outcome::complete) << equality.why;
  EXPECT_EQ(equality.draft.initial.size(), 1U);
  EXPECT_TRUE(equality.draft.closed_recurrence);
  const Attempt recurrence = tried(row(), false);
  EXPECT_EQ(recurrence.outcome, Outcome::complete) << recurrence.why;
  EXPECT_TRUE(recurrence.draft.ends);
  EXPECT_EQ(recurrence.draft.right_side_text, "0");
}

TEST(Attempt, IdentityFails) {
  ClaimParts parts = row();
  parts.certificate = "k/(n + 1 - k)";
  EXPECT_EQ(tried(parts, true).outcome, Outcome::identity_fails);
  parts = row();
  parts.recurrence = "\"-3\", \"1\"";
  EXPECT_EQ(tried(parts, false).outcome, Outcome::identity_fails);
}

TEST(Attempt, EndsFail) {
  ClaimParts parts = row();
  parts.right_side = "1";
  const Attempt one = tried(parts, false);
  EXPECT_EQ(one.outcome, Outcome::ends_fail);
  EXPECT_EQ(one.draft.right_side_text, "0");
  parts = row();
  parts.summand = "binomial(2*n, k)";
  parts.recurrence = "\"-4\", \"1\"";
  parts.certificate = "-k*(6*n - 2*k + 5)/((2*n + 2 - k)*(2*n + 1 - k))";
  const Attempt half = tried(parts, false);
  ASSERT_EQ(half.outcome, Outcome::ends_fail);
  // What the ends give, at n = 0: S(1) - 4 S(0) = 3 - 4.
  const claim::ExpressionPtr b =
      testing::parse(testing::terms_of(parts).setting, half.draft.right_side_text);
  EXPECT_EQ(term::evaluate(*b, {{"n", 0}, {"k", 0}}).number, mpq_class(-1))
      << half.draft.right_side_text;
  EXPECT_EQ(term::evaluate(*b, {{"n", 1}, {"k", 0}}).number, mpq_class(11 - 12));
}

TEST(Attempt, ClosedFormFails) {
  ClaimParts parts = row();
  parts.closed = "3^n";
  EXPECT_EQ(tried(parts, true).outcome, Outcome::closed_fails);
}

TEST(Attempt, StartingValueFails) {
  ClaimParts parts = row();
  parts.closed = "2^(n + 1)";
  const Attempt made = tried(parts, true);
  EXPECT_EQ(made.outcome, Outcome::initial_fails);
  EXPECT_EQ(made.at, 0);
}

TEST(Attempt, StuckNamesTheRule) {
  ClaimParts parts = row();
  parts.parameters = "x = { in = \"rationals\" }";
  parts.recurrence = "\"-2*x\", \"x\"";
  parts.certificate = "-x*k/(n + 1 - k)";
  const Attempt parameter = tried(parts, true);
  EXPECT_EQ(parameter.outcome, Outcome::stuck);
  EXPECT_EQ(parameter.rule.substr(0, 12), "continuation") << parameter.rule;
  parts.parameters = "m = { in = \"integers\" }";
  parts.recurrence = "\"-2*(n - m)\", \"n - m\"";
  parts.certificate = "-(n - m)*k/(n + 1 - k)";
  const Attempt onset = tried(parts, true);
  EXPECT_EQ(onset.outcome, Outcome::stuck);
  EXPECT_EQ(onset.rule.substr(0, 8), "an onset") << onset.rule;
}

// A leading coefficient that vanishes at small n moves the threshold; the values before it are
// compared.
TEST(Attempt, ThresholdsMoveBehindZeros) {
  ClaimParts parts = row();
  parts.recurrence = "\"-2*(n - 3)\", \"n - 3\"";
  parts.certificate = "-(n - 3)*k/(n + 1 - k)";
  const Attempt made = tried(parts, true);
  ASSERT_EQ(made.outcome, Outcome::complete) << made.why;
  EXPECT_EQ(made.draft.threshold, 4);
  ASSERT_EQ(made.draft.initial.size(), 5U);
  for (std::size_t i = 0; i < made.draft.initial.size(); ++i)
    EXPECT_EQ(made.draft.initial[i].at, static_cast<long>(i));
  // As a recurrence there is nothing to move: it holds at n = 3 as well.
  EXPECT_EQ(tried(parts, false).draft.threshold, 0);
}

TEST(Attempt, RespectsTheDeadline) {
  const Terms terms = testing::terms_of(row());
  const EvidenceDraft evidence = testing::evidence_of(terms);
  EXPECT_THROW(
      (void)attempt(terms, evidence, true, algebra::Deadline(std::chrono::milliseconds(-1))),
      algebra::TimeUp);
}

}  // namespace
}  // namespace sumwright::proof::building
