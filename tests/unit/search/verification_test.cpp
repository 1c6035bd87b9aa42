// The exact check of the telescoping identity, with evidence written by hand.
#include <gtest/gtest.h>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

using search::verify_identity;

const algebra::RingPtr kRing = make_ring({"n", "k"});

std::vector<algebra::Polynomial> recurrence(const std::vector<std::string>& texts) {
  std::vector<algebra::Polynomial> out;
  for (const auto& text : texts) out.push_back(polynomial(kRing, text));
  return out;
}

TEST(VerifyIdentity, AcceptsTrueEvidenceInAnyForm) {
  const auto t = TermBuilder(kRing).binomial("n", "k", 2).build();
  const auto r = rational(kRing, "k^2*(2*k-3*n-3)/(n+1-k)^2");
  EXPECT_TRUE(verify_identity(kRing, t, recurrence({"-4*n-2", "n+1"}), r).holds);
  EXPECT_TRUE(
      verify_identity(kRing, t, recurrence({"(-4*n-2)*n", "(n+1)*n"}), r * rational(kRing, "n"))
          .holds);
  // A certificate with a factor unknown to the quotients still checks (nothing cancels there).
  const auto s = TermBuilder(kRing).factor("1/(k^2+1)-1/(k^2+2*k+2)").build();
  const auto f = rational(kRing, "1/(k^2+1)-1/(k^2+2*k+2)");
  EXPECT_TRUE(
      verify_identity(kRing, s, recurrence({"1"}), rational(kRing, "-1/(k^2+1)") / f).holds);
}

TEST(VerifyIdentity, TellsTheResidueOfFalseEvidence) {
  const auto t = TermBuilder(kRing).binomial("n", "k", 2).build();
  const auto r = rational(kRing, "k^2*(2*k-3*n-3)/(n+1-k)^2");
  const auto check = verify_identity(kRing, t, recurrence({"-4*n-1", "n+1"}), r);
  EXPECT_FALSE(check.holds);
  EXPECT_EQ(check.residue, polynomial(kRing, "(n+1-k)^2"));  // one F too many
  EXPECT_FALSE(verify_identity(kRing, t, recurrence({"-4*n-2", "n+1"}), r.shift(1, 1)).holds);
  EXPECT_FALSE(verify_identity(kRing, t, recurrence({"-4*n-2", "n+1"}), -r).holds);
  EXPECT_FALSE(
      verify_identity(kRing, t, recurrence({"-4*n-2", "n+1"}), rational(kRing, "0")).holds);
  EXPECT_FALSE(verify_identity(kRing, t, recurrence({"n+1", "-4*n-2"}), r).holds);
  EXPECT_THROW((void)verify_identity(kRing, t, recurrence({"k", "1"}), r), std::invalid_argument);
}

TEST(VerifyIdentity, HandlesDegenerateEvidence) {
  const auto t = TermBuilder(kRing).binomial("n", "k").build();
  EXPECT_TRUE(verify_identity(kRing, t, {}, rational(kRing, "0")).holds);
  EXPECT_TRUE(verify_identity(kRing, t, recurrence({"0", "0"}), rational(kRing, "0")).holds);
  EXPECT_FALSE(verify_identity(kRing, t, {}, rational(kRing, "1")).holds);
}

}  // namespace
}  // namespace sumwright::testing
