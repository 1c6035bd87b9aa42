// Limits and interruptions: a status, a word, and nothing left behind.
#include <gtest/gtest.h>

#include "program.hpp"

namespace sumwright::testing {
namespace {

// The sum of the 14th powers of a row: many seconds and hundreds of megabytes.
std::string heavy_claim() {
  return replaced(replaced(squares_claim(), "binomial(n, k)^2", "binomial(n, k)^14"),
                  "[equals]\nclosed  = \"binomial(2*n, n)\"\n", "");
}

TEST(Limits, MemoryDecidesNothing) {
#if defined(__SANITIZE_ADDRESS__)
  GTEST_SKIP() << "sanitizers need more address space than the limit";
#endif
  const TestFolder folder;
  folder.write("c.toml", heavy_claim());
  for (const std::string size : {"64MiB", "80MiB", "96MiB"}) {
    const Outcome outcome = folder.sumwright(
        {"export", "c.toml", "--out", "out", "--memory-limit", size, "--time-limit", "60"});
    EXPECT_EQ(outcome.status, 3) << size << "\n" << outcome.out.substr(0, 500) << outcome.err;
    EXPECT_NE((outcome.out + outcome.err).find("memory limit reached"), std::string::npos)
        << size << "\n"
        << outcome.out.substr(0, 500) << outcome.err;
  }
}

TEST(Limits, InterruptedRunLeavesNothing) {
  const TestFolder folder;
  folder.write("c.toml", heavy_claim());
  const Outcome outcome = run_program({"timeout", "--preserve-status", "--signal=INT", "0.3",
                                       SUMWRIGHT_PROGRAM, "find", "c.toml", "--write", "w.toml"},
                                      folder.path());
  EXPECT_EQ(outcome.status, 3);
  EXPECT_NE(outcome.out.find("reason        interrupted\n"), std::string::npos)
      << outcome.out << outcome.err;
  EXPECT_EQ(folder.files(), std::vector<std::string>{"c.toml"});
}

TEST(Limits, TerminationIsAnInterruption) {
  const TestFolder folder;
  folder.write("c.toml", heavy_claim());
  const Outcome outcome = run_program(
      {"timeout", "--preserve-status", "--signal=TERM", "0.3", SUMWRIGHT_PROGRAM, "find", "c.toml"},
      folder.path());
  EXPECT_EQ(outcome.status, 3);
}

// Files from outside that are large, deep or endless are refused at once.
TEST(Limits, HostileFiles) {
  const TestFolder folder;
  folder.write("power.toml", replaced(squares_claim(), "binomial(n, k)^2", "9^9^9^9"));
  folder.write("deep.toml", replaced(squares_claim(), "binomial(n, k)^2",
                                     std::string(100000, '(') + "1" + std::string(100000, ')')));
  folder.write("large.toml", squares_claim() + "#" + std::string(10U << 20U, 'x') + "\n");
  folder.write("large.txt", "Sumwright obligations, format 1\n" + std::string(70U << 20U, '\n'));
  folder.write("empty.toml", "");
  folder.write("binary.toml", std::string("\x7f"
                                          "ELF\0\1\2",
                                          7));
  for (const std::string name : {"power.toml", "deep.toml", "large.toml", "large.txt", "empty.toml",
                                 "binary.toml", "/dev/zero", "."}) {
    const Outcome outcome = folder.sumwright({"check", name, "--time-limit", "5"});
    EXPECT_EQ(outcome.status, 2) << name << "\n" << outcome.out << outcome.err.substr(0, 500);
    EXPECT_EQ(outcome.out, "") << name;
    EXPECT_LT(outcome.err.size(), 2000U) << name;
  }
}

}  // namespace
}  // namespace sumwright::testing
