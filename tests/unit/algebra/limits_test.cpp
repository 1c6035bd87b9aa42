// Deadlines, interruption, and faults of the library below as exceptions.
#include "algebra/limits.hpp"

#include <flint/flint.h>
#include <gtest/gtest.h>

#include <thread>

namespace sumwright::algebra {
namespace {

TEST(Deadline, EndsWorkAfterItsTime) {
  EXPECT_NO_THROW(Deadline().check());
  EXPECT_NO_THROW(Deadline(std::chrono::milliseconds(60000)).check());
  const Deadline soon(std::chrono::milliseconds(1));
  std::this_thread::sleep_for(std::chrono::milliseconds(5));
  try {
    soon.check();
    FAIL() << "the time was up";
  } catch (const TimeUp& up) {
    EXPECT_FALSE(up.interrupted);
    EXPECT_STREQ(up.what(), "time limit reached");
  }
}

TEST(Deadline, EndsWorkWhenInterrupted) {
  Deadline::interrupt_flag = true;
  try {
    Deadline().check();
    Deadline::interrupt_flag = false;
    FAIL() << "the flag was set";
  } catch (const TimeUp& up) {
    Deadline::interrupt_flag = false;
    EXPECT_TRUE(up.interrupted);
  }
}

TEST(AbortHook, TurnsAFaultIntoAnException) {
  install_abort_hook();
  install_abort_hook();
  EXPECT_THROW(flint_abort(), std::runtime_error);
}

}  // namespace
}  // namespace sumwright::algebra
