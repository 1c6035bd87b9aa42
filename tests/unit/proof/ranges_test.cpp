// Many ranges for a few summands: what is established about S(n) is true from the first n on, short
// and empty ranges included; exact sums decide.
#include <gtest/gtest.h>

#include <iostream>

#include "proof_support.hpp"

namespace sumwright::proof {
namespace {

using testing::ClaimParts;

const char* const kSummands[] = {"binomial(n, k)",
                                 "binomial(2*n, k)",
                                 "binomial(n + k, k)",
                                 "binomial(n - k, k)",
                                 "binomial(n, k)*binomial(m, k)",
                                 "binomial(m, k)*2^k",
                                 "2^k",
                                 "k",
                                 "k*binomial(n, k)^2",
                                 "1/factorial(n - k)",
                                 "factorial(n)/factorial(n - 2*k)/factorial(k)",
                                 "rising(1/2, k)/factorial(k)",
                                 "binomial(-n - 1, k)",
                                 "binomial(n - 4, k)"};
const char* const kLows[] = {"0", "1", "4", "-2", "n - 3", "3 - n", "m", "floor(n/2)", "2*n"};
const char* const kHighs[] = {
    "n",     "n - 2",     "n - 5",     "2*n",           "n + 3",
    "5",     "m",         "n + m",     "floor(n/2)",    "floor((n - 4)/3)",
    "3 - n", "min(n, m)", "max(n, m)", "min(n - 3, 6)", "-1"};

struct Count {
  std::size_t established = 0;
  std::size_t undecided = 0;
  std::size_t refused = 0;
  std::size_t values = 0;
};

void expect_true(const Proof& proof, Count& count) {
  const claim::Claim& claim = *proof.claim;
  for (const term::Assignment& sample : term::sample_parameters(claim, 4))
    for (long i = 0; i < 14; ++i) {
      term::Assignment at = sample;
      at[claim.running] = claim.from + i;
      const term::Sides sides = term::evaluate_sides(claim, at);
      ASSERT_TRUE(sides.left.number) << "n = " << at["n"] << ": " << sides.left.why_not;
      ASSERT_TRUE(sides.right.number) << "n = " << at["n"] << ": " << sides.right.why_not;
      ASSERT_EQ(*sides.left.number, *sides.right.number)
          << "n = " << at["n"] << (at.contains("m") ? ", m = " + at["m"].get_str() : "")
          << ", right side " << proof.right_side_text;
      ++count.values;
    }
}

TEST(Ranges, EstablishedRecurrencesAreTrue) {
  std::mt19937_64 random(testing::random_seed());
  const auto pick = [&](std::size_t size) {
    return std::uniform_int_distribution<std::size_t>(0, size - 1)(random);
  };
  Count count;
  for (unsigned long i = 0; i < testing::effort(300); ++i) {
    ClaimParts parts;
    parts.summand = kSummands[pick(std::size(kSummands))];
    parts.low = kLows[pick(std::size(kLows))];
    parts.high = kHighs[pick(std::size(kHighs))];
    parts.from = static_cast<long>(pick(4)) - 1;
    for (const std::string& text : {parts.summand, parts.low, parts.high})
      if (text.find('m') != std::string::npos && text != "binomial(n, k)")
        parts.parameters = "m = { in = \"integers\", at_least = 0 }";
    SCOPED_TRACE(testing::claim_file(parts) + "\nseed " + std::to_string(testing::random_seed()));
    try {
      const Proof proof = testing::decide(parts, 2);
      if (proof.verdict == Verdict::undecided) {
        EXPECT_FALSE(proof.reason.empty());
        ++count.undecided;
        continue;
      }
      ASSERT_EQ(testing::name_of(proof.verdict), "established");
      ++count.established;
      expect_true(proof, count);
    } catch (const claim::InputError&) {
      ++count.refused;
    } catch (const std::exception& fault) {
      ADD_FAILURE() << "a fault: " << fault.what();
    }
    if (::testing::Test::HasFatalFailure()) return;
  }
  std::cout << count.established << " established (" << count.values << " values), "
            << count.undecided << " undecided, " << count.refused << " refused\n";
  EXPECT_GE(count.established, testing::effort(300) / 20);
}

}  // namespace
}  // namespace sumwright::proof
