// Hostile terms end with TimeUp or an answer, in bounded time and memory.
#include <gtest/gtest.h>
#include <sys/resource.h>

#include <chrono>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

const algebra::RingPtr kRing = make_ring({"n", "k", "x", "y", "z"});

// Runs the search for at most half a second; whether it ended by itself.
bool ends_by_itself(const TermBuilder& term) {
  search::SearchOptions options;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(500));
  const auto before = std::chrono::steady_clock::now();
  bool by_itself = true;
  try {
    (void)search::find_telescoper(kRing, term.build(), options);
  } catch (const algebra::TimeUp&) {
    by_itself = false;
  }
  const auto taken = std::chrono::steady_clock::now() - before;
  const auto slowness = static_cast<long>(environment_number("SUMWRIGHT_TEST_SLOWNESS", 1));
  EXPECT_LT(taken, std::chrono::seconds(10 * slowness));
  return by_itself;
}

TermBuilder term() { return TermBuilder(kRing); }

TEST(SearchLimits, LargeDegreesAreRefused) {
  EXPECT_FALSE(ends_by_itself(term().binomial("n", "k", 1000000)));
  EXPECT_FALSE(ends_by_itself(term().power("x", "1000000*k").power("2", "100000*k")));
  EXPECT_FALSE(ends_by_itself(term().factor("1/(k*(k+1000000000))")));
}

TEST(SearchLimits, LargeTermsEndWithAnAnswerOrInTime) {
  EXPECT_TRUE(ends_by_itself(term().binomial("n", "k", 40))) << "no order up to 8, seen at once";
  ends_by_itself(term().binomial("n", "k", 200));
  ends_by_itself(term().binomial("100*n", "37*k"));
  EXPECT_FALSE(ends_by_itself(term().factor("1/(k*(k+3000))")));
  ends_by_itself(
      term().rising("x", "k", 2).rising("y", "k", -2).rising("z", "k").binomial("n", "k", 2));
  rusage usage{};
  ASSERT_EQ(getrusage(RUSAGE_SELF, &usage), 0);
  EXPECT_LT(usage.ru_maxrss, 1024 * 1024) << "kilobytes";
}

TEST(SearchLimits, TheDeadlineIsKept) {
  search::SearchOptions options;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(0));
  EXPECT_THROW((void)search::find_telescoper(
                   kRing, TermBuilder(kRing).binomial("n", "k", 5).build(), options),
               algebra::TimeUp);
}

}  // namespace
}  // namespace sumwright::testing
