// Identities decided three ways: by expansion, on a grid, at random points.
#include "audit/polynomial_identity.hpp"

#include <gtest/gtest.h>

#include <stdexcept>

#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

const testing::Notation& w() {
  static const testing::Notation notation({"n", "k", "x", "y", "z"});
  return notation;
}

/// left - right as terms over data that live as long as this does.
struct Identity {
  proof::Factored left;
  proof::Factored right;
  bool shifted = false;  ///< the index of the right side is moved
  [[nodiscard]] std::vector<IdentityTerm> terms() const {
    return {{1, {{&left, false}}}, {-1, {{&right, shifted}}}};
  }
  [[nodiscard]] IdentityResult decided(std::size_t expand_up_to) const {
    return decide_identity(terms(), w().names(), expand_up_to, {});
  }
};

const Identity kTrue{w().factored(1, {{"n + k", 6}, {"n - k", 6}}),
                     w().factored(1, {{"n^2 - k^2", 6}})};
const Identity kFalse{w().factored(1, {{"n + k", 6}, {"n - k", 6}}),
                      w().factored(1, {{"n^2 - k^2", 5}, {"n^2 - k^2 + 1", 1}})};

TEST(AuditIdentity, Expansion) {
  EXPECT_TRUE(kTrue.decided(3000).zero);
  EXPECT_EQ(kTrue.decided(3000).how, "expanded");
  const IdentityResult no = kFalse.decided(3000);
  EXPECT_FALSE(no.zero);
  EXPECT_EQ(no.detail, "the residue is -1*n^10 + 5*n^8*k^2 + -10*n^6*k^4 + ... (6 terms)");
}

TEST(AuditIdentity, Grid) {
  const IdentityResult yes = kTrue.decided(0);
  EXPECT_TRUE(yes.zero);
  EXPECT_EQ(yes.how, "grid of 13 x 13 x 1 x 1 x 1 points");
  EXPECT_EQ(yes.cases, 169U);
  const IdentityResult no = kFalse.decided(0);
  EXPECT_FALSE(no.zero);
  EXPECT_EQ(no.detail, "the residue is 1 at n = 0, k = 1, x = 0, y = 0, z = 0");
}

TEST(AuditIdentity, TheThresholdIsTheEstimate) {
  const std::size_t size = estimated_size(kTrue.terms(), w().names().size());
  EXPECT_EQ(kTrue.decided(size).how, "expanded");
  EXPECT_NE(kTrue.decided(size - 1).how, "expanded");
}

TEST(AuditIdentity, RandomPoints) {
  const Identity large{w().factored(1, {{"n + k + x + y + z", 12}}),
                       w().factored(1, {{"z + n + y + k + x", 12}})};
  const IdentityResult yes = large.decided(3000);
  EXPECT_TRUE(yes.zero);
  EXPECT_EQ(yes.cases, 4U);
  EXPECT_NE(yes.how.find("probability of error at most 2^-"), std::string::npos) << yes.how;
  const Identity other{large.left,
                       w().factored(1, {{"z + n + y + k + x", 11}, {"z + n + y + k + 2*x", 1}})};
  EXPECT_FALSE(other.decided(3000).zero);
}

TEST(AuditIdentity, AGridIsLargeEnoughForItsDegrees) {
  // n (n-1) ... (n-5) vanishes at 0..5: six points would not tell, seven do
  const Identity tricky{
      w().factored(
          1, {{"n", 1}, {"n - 1", 1}, {"n - 2", 1}, {"n - 3", 1}, {"n - 4", 1}, {"n - 5", 1}}),
      w().factored(0, {})};
  const IdentityResult no = tricky.decided(0);
  EXPECT_FALSE(no.zero);
  EXPECT_EQ(no.detail, "the residue is 720 at n = 6, k = 0, x = 0, y = 0, z = 0");
}

TEST(AuditIdentity, AShiftedIndex) {
  const Identity shifted{w().factored(1, {{"k + 1", 3}, {"n + k + 1", 2}}),
                         w().factored(1, {{"k", 3}, {"n + k", 2}}), true};
  EXPECT_TRUE(shifted.decided(3000).zero);
  EXPECT_TRUE(shifted.decided(0).zero);
  Identity unshifted = shifted;
  unshifted.shifted = false;
  EXPECT_FALSE(unshifted.decided(3000).zero);
  EXPECT_FALSE(unshifted.decided(0).zero);
}

TEST(AuditIdentity, FractionsAndZero) {
  const Identity halves{w().factored(mpq_class(1, 2), {{"2*n", 1}}), w().factored(1, {{"n", 1}})};
  EXPECT_TRUE(halves.decided(3000).zero);
  EXPECT_TRUE(halves.decided(0).zero);
  const Identity nothing{w().factored(0, {}), w().factored(5, {{"0", 1}})};
  EXPECT_TRUE(nothing.decided(3000).zero);
  EXPECT_TRUE(nothing.decided(0).zero);
}

TEST(AuditIdentity, ANegativeExponentIsMisuse) {
  const Identity wrong{w().factored(1, {{"n", -1}}), w().factored(1, {})};
  EXPECT_THROW((void)wrong.decided(3000), std::logic_error);
}

TEST(AuditIdentity, TheTimeCheckIsCalled) {
  int calls = 0;
  (void)decide_identity(kTrue.terms(), w().names(), 0, [&] { ++calls; });
  EXPECT_GT(calls, 100);
}

}  // namespace
}  // namespace sumwright::audit
