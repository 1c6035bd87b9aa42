// Hostile terms end with TimeUp or an answer, in bounded time and memory.
#include <gtest/gtest.h>

#include <chrono>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

const algebra::RingPtr kRing = make_ring({"n", "k", "x", "y", "z"});

// Runs the search for at most two seconds; the bool says whether it ended by itself.
bool ends(const search::ShiftQuotients& t) {
  search::SearchOptions options;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(2000));
  const auto before = std::chrono::steady_clock::now();
  bool by_itself = true;
  try {
    (void)search::find_telescoper(kRing, t, options);
  } catch (const algebra::TimeUp&) {
    by_itself = false;
  }
  const auto taken = std::chrono::steady_clock::now() - before;
  EXPECT_LT(taken, std::chrono::seconds(
                       10 * static_cast<long>(environment_number("SUMWRIGHT_TEST_SLOWNESS", 1))));
  return by_itself;
}

TEST(SearchLimits, HostileTermsEnd) {
  ends(TermBuilder(kRing).binomial("n", "k", 200).build());
  ends(TermBuilder(kRing).binomial("100*n", "37*k").build());
  ends(TermBuilder(kRing).binomial("n", "k", 1000000).build());
  ends(TermBuilder(kRing).power("x", "1000000*k").power("2", "100000*k").build());
  ends(TermBuilder(kRing).factor("1/(k*(k+1000000000))").build());
  ends(TermBuilder(kRing).factor("1/(k*(k+3000))").build());
  ends(TermBuilder(kRing).binomial("n", "k", 40).build());
  ends(TermBuilder(kRing)
           .rising("x", "k", 2)
           .rising("y", "k", -2)
           .rising("z", "k")
           .binomial("n", "k", 2)
           .build());
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
