// The audit agrees with proofs that are right.
#include "audit/audit.hpp"

#include <gtest/gtest.h>

#include <chrono>
#include <iostream>
#include <stdexcept>

#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

std::string shown(const AuditReport& report) {
  std::string out;
  for (const Finding& finding : report.findings)
    out += finding.check + " [" + std::to_string(finding.cases) + "]" +
           (finding.agrees ? " agrees " : " DISAGREES: ") + finding.detail + "\n";
  return out;
}

void expect_agreement(const proof::Proof& proof, std::size_t checks) {
  const AuditReport report = audit(proof);
  EXPECT_TRUE(report.agrees()) << shown(report);
  EXPECT_EQ(report.findings.size(), checks) << shown(report);
  for (const Finding& finding : report.findings) EXPECT_GT(finding.cases, 0U) << shown(report);
}

TEST(Audit, AgreesWithNaturalEnds) { expect_agreement(testing::squares_proof(), 16); }
TEST(Audit, AgreesWithAClaimedRecurrence) {
  expect_agreement(testing::squares_recurrence_proof(), 14);
}
TEST(Audit, AgreesWithExplicitPoints) { expect_agreement(testing::halves_proof(), 16); }
TEST(Audit, AgreesWithARationalParameter) { expect_agreement(testing::powers_proof(), 16); }

TEST(Audit, IsDeterministic) {
  EXPECT_EQ(shown(audit(testing::powers_proof())), shown(audit(testing::powers_proof())));
}

TEST(Audit, AgreesWhenTheEqualityIsTakenAtPoints) {
  AuditOptions options;
  options.expand_up_to = 0;
  const AuditReport report = audit(testing::squares_proof(), options);
  EXPECT_TRUE(report.agrees()) << shown(report);
  EXPECT_NE(shown(report).find("grid of 4 x 4 points"), std::string::npos) << shown(report);
}

TEST(Audit, StopsWhenTheTimeCheckThrows) {
  AuditOptions options;
  int calls = 0;
  options.check_time = [&] {
    if (++calls > 50) throw std::runtime_error("stop");
  };
  EXPECT_THROW((void)audit(testing::squares_proof(), options), std::runtime_error);
  // and the next one is not held up
  EXPECT_TRUE(audit(testing::squares_proof()).agrees());
}

TEST(Audit, ProofWithoutClaimIsMisuse) {
  EXPECT_THROW((void)audit(proof::Proof{}), std::invalid_argument);
}

TEST(Audit, SmallClaimsAreCheap) {
  const auto start = std::chrono::steady_clock::now();
  const AuditReport report = audit(testing::squares_proof());
  const std::chrono::duration<double, std::milli> spent = std::chrono::steady_clock::now() - start;
  std::cout << shown(report) << spent.count() << " ms\n";
  EXPECT_LT(spent.count(), 600);  // ten times the target, for loaded machines
}

}  // namespace
}  // namespace sumwright::audit
