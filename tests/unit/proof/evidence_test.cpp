// Evidence read from a claim: denominators cleared, faults with their place, quotients of the
// summand.
#include "proof/evidence.hpp"

#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::ClaimParts;

TEST(Evidence, DenominatorsAreClearedEverywhere) {
  ClaimParts parts;
  parts.recurrence = "\"-2/(n + 1)\", \"1/(2*(n + 1))\"";
  parts.right_side = "3^n";
  parts.certificate = "k/n";
  const Terms terms = testing::terms_of(parts);
  const BroughtEvidence brought = read_evidence(terms, *terms.setting.claim);
  EXPECT_EQ(brought.cleared.to_string(), "2*n + 2");
  ASSERT_EQ(brought.draft.coefficients.size(), 2U);
  EXPECT_EQ(brought.draft.coefficients[0].to_string(), "-4");
  EXPECT_EQ(brought.draft.coefficients[1].to_string(), "1");
  ASSERT_TRUE(brought.has_certificate);
  EXPECT_EQ(brought.draft.certificate->to_string(),
            testing::rational_text(terms.setting, "(2*n + 2)*k/n"));
  ASSERT_TRUE(brought.draft.right_side);
  EXPECT_EQ(*testing::value_of(brought.draft.right_side->products, {2, 0}), 9 * 6);
}

TEST(Evidence, ZeroRightSidesAreNone) {
  ClaimParts parts;
  parts.recurrence = "\"-2\", \"1\"";
  parts.right_side = "2^n - 2^n";
  const Terms terms = testing::terms_of(parts);
  EXPECT_FALSE(read_evidence(terms, *terms.setting.claim).draft.right_side);
  EXPECT_FALSE(read_evidence(terms, *terms.setting.claim).has_certificate);
}

void expect_refused(const ClaimParts& parts, const std::string& message) {
  try {
    const Terms terms = testing::terms_of(parts);
    (void)read_evidence(terms, *terms.setting.claim);
    ADD_FAILURE() << "was read";
  } catch (const claim::InputError& error) {
    EXPECT_NE(std::string(error.what()).find(message), std::string::npos) << error.what();
  }
}

TEST(Evidence, UnusableEvidenceIsRefused) {
  ClaimParts parts;
  parts.recurrence = "\"n - n\", \"0\"";
  expect_refused(parts, "every coefficient of this recurrence is zero");
  parts.recurrence = "\"1/(n - n)\", \"1\"";
  expect_refused(parts, "identically zero");
}

TEST(Evidence, QuotientsOfSumsOfSimilarTerms) {
  ClaimParts parts;
  parts.summand = "binomial(n, k) + k*binomial(n, k) + binomial(n + 1, k)";
  const Terms terms = testing::terms_of(parts);
  const search::ShiftQuotients q = shift_quotients(terms);
  std::size_t compared = 0;
  for (long n = 1; n <= 6; ++n)
    for (long k = 0; k <= n; ++k) {
      const auto f = [&](long a, long b) {
        return *term::evaluate(*terms.setting.claim->sum.summand, {{"n", a}, {"k", b}}).number;
      };
      const testing::Number by_n = testing::value_of(q.by_running, {n, k});
      const testing::Number by_k = testing::value_of(q.by_index, {n, k});
      ASSERT_TRUE(by_n);
      ASSERT_TRUE(by_k);
      EXPECT_EQ(f(n, k) * *by_n, f(n + 1, k));
      EXPECT_EQ(f(n, k) * *by_k, f(n, k + 1)) << n << " " << k;
      ++compared;
    }
  EXPECT_GT(compared, 20U);
}

TEST(Evidence, SumsOfDissimilarTermsAreRefused) {
  for (const char* summand : {"2^k + 3^k", "binomial(n, k) + factorial(k)", "k + 2^k"}) {
    ClaimParts parts;
    parts.summand = summand;
    try {
      (void)shift_quotients(testing::terms_of(parts));
      ADD_FAILURE() << summand << " was taken";
    } catch (const claim::InputError& error) {
      EXPECT_NE(std::string(error.what()).find("not a hypergeometric term"), std::string::npos)
          << error.what();
      EXPECT_EQ(std::string(error.what()).substr(0, 9), "t.toml:6:") << error.what();
    }
  }
  ClaimParts zero;
  zero.summand = "rising(1, k) - factorial(k)";
  EXPECT_THROW((void)shift_quotients(testing::terms_of(zero)), claim::InputError);
}

TEST(Evidence, TheClosedFormMayCarryTheRecurrence) {
  ClaimParts parts;
  parts.closed = "2^n";
  const auto holds = [&](const char* recurrence, const char* right_side) {
    parts.recurrence = recurrence;
    parts.right_side = right_side;
    const Terms terms = testing::terms_of(parts);
    return holds_for_closed_form(terms, testing::evidence_of(terms));
  };
  EXPECT_TRUE(holds("\"-2\", \"1\"", ""));
  EXPECT_TRUE(holds("\"-1\", \"1\"", "2^n"));
  EXPECT_TRUE(holds("\"n - 6\", \"1\", \"1\"", "n*2^n"));
  EXPECT_FALSE(holds("\"-1\", \"1\"", ""));
  EXPECT_FALSE(holds("\"-2\", \"1\"", "1"));
  EXPECT_FALSE(holds("\"1\", \"-1\"", "2^n"));
}

}  // namespace
}  // namespace sumwright::proof::building
