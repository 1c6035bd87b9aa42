// The n at which the ends of a range meet, and that the audit looks there.
#include "audit/crossings.hpp"

#include <gtest/gtest.h>

#include <algorithm>

#include "audit/audit.hpp"
#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

std::string with_range(const std::string& low, const std::string& high) {
  return R"--(
format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "binomial(n, k)^2"
over = [ { index = "k", low = ")--" +
         low + R"--(", high = ")--" + high + R"--(" } ]
[equals]
closed = "binomial(2*n, n)"
[parameters]
m = { in = "integers", at_least = 0 }
)--";
}

std::vector<long> crossings_of(const std::string& low, const std::string& high, long m = 7) {
  const auto claim = testing::read_claim(with_range(low, high));
  return crossings(*claim, Point{{"n", "k", "m"}, {numeric(0), numeric(0), numeric(m)}}, 24);
}

TEST(AuditCrossings, EndsThatMeet) {
  EXPECT_EQ(crossings_of("0", "n"), (std::vector<long>{0, 1, 2}));
  EXPECT_EQ(crossings_of("2", "99000 - n"), (std::vector<long>{98997, 98998, 98999, 99000}));
  EXPECT_EQ(crossings_of("m", "floor(n/2)"), (std::vector<long>{13, 14, 15, 16}));
  EXPECT_EQ(crossings_of("n", "2*n + 5"), (std::vector<long>{})) << "they meet below `from`";
  EXPECT_EQ(crossings_of("n", "n + 3"), (std::vector<long>{})) << "parallel";
}

TEST(AuditCrossings, EntriesOfMinAndMaxEachForThemselves) {
  const std::vector<long> found = crossings_of("0", "min(2*n, 300 - n)");
  for (const long n : {0, 99, 100, 101, 299, 300, 301})
    EXPECT_TRUE(std::find(found.begin(), found.end(), n) != found.end()) << n;
}

/// True for n <= 20 and false from 21 on, beyond the n that are always tried.
TEST(AuditCrossings, AClaimThatTurnsFalseThere) {
  proof::Proof proof = testing::squares_proof();
  std::string text = with_range("0", "min(n, 40 - n)");
  text.resize(text.find("[parameters]"));
  proof.claim = testing::read_claim(text);
  proof.summand.expression = proof.claim->sum.summand;
  proof.closed->expression = proof.claim->closed;
  const AuditReport report = audit(proof);
  const auto sums = std::find_if(report.findings.begin(), report.findings.end(),
                                 [](const Finding& f) { return f.check == "sums added up"; });
  ASSERT_NE(sums, report.findings.end());
  EXPECT_FALSE(sums->agrees);
  EXPECT_NE(sums->detail.find("n = 21"), std::string::npos) << sums->detail;
}

}  // namespace
}  // namespace sumwright::audit
