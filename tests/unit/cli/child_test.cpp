// Other programs: their words, their ends, their limits.
#include "cli/child.hpp"

#include <gtest/gtest.h>
#include <stdlib.h>

#include "algebra/limits.hpp"

namespace sumwright::cli {
namespace {

namespace fs = std::filesystem;

class ChildTest : public ::testing::Test {
 protected:
  void SetUp() override {
    std::string pattern = (fs::temp_directory_path() / "sumwright-child-XXXXXX").string();
    ASSERT_NE(::mkdtemp(pattern.data()), nullptr);
    folder_ = pattern;
  }
  void TearDown() override { fs::remove_all(folder_); }

  [[nodiscard]] ChildRequest shell(const std::string& script) const {
    return {find_program("sh").value(), {"-c", script},          folder_,
            folder_ / "output",         std::uint64_t{1} << 40U, 30};
  }

  fs::path folder_;
};

TEST_F(ChildTest, OutputAndStatus) {
  const ChildResult result = run_child(shell("echo out; echo err >&2; exit 3"));
  EXPECT_EQ(result.status, 3);
  EXPECT_FALSE(result.succeeded());
  EXPECT_EQ(result.output, "out\nerr\n");
  EXPECT_TRUE(run_child(shell("true")).succeeded());
}

TEST_F(ChildTest, EnvironmentIsSmall) {
  ::setenv("COQPATH", "/somewhere", 1);
  const ChildResult result = run_child(shell("echo \"[$COQPATH] [$LC_ALL] $HOME\"; pwd"));
  const std::string real = fs::canonical(folder_).string();
  EXPECT_EQ(result.output, "[] [C] " + folder_.string() + "\n" + real + "\n");
  ::unsetenv("COQPATH");
}

TEST_F(ChildTest, TimeLimitEndsTheWholeGroup) {
  ChildRequest request = shell("sleep 60 & sleep 60");
  request.seconds = 0.2;
  const ChildResult result = run_child(request);
  EXPECT_TRUE(result.timed_out);
  EXPECT_FALSE(result.succeeded());
  EXPECT_LT(result.seconds, 10);
}

TEST_F(ChildTest, Signal) {
  const ChildResult result = run_child(shell("kill -9 $$"));
  EXPECT_EQ(result.signal, 9);
  EXPECT_FALSE(result.succeeded());
}

TEST_F(ChildTest, MemoryLimit) {
  ChildRequest request = shell("ulimit -v");
  request.memory_limit = std::uint64_t{512} << 20U;
  EXPECT_EQ(run_child(request).output, "524288\n");
}

TEST_F(ChildTest, InterruptionPasses) {
  algebra::Deadline::interrupt_flag = true;
  EXPECT_THROW((void)run_child(shell("sleep 60")), algebra::TimeUp);
  algebra::Deadline::interrupt_flag = false;
}

TEST_F(ChildTest, ProgramThatIsNotThere) {
  EXPECT_FALSE(find_program("no-such-program").has_value());
  ChildRequest request = shell("");
  request.program = folder_ / "none";
  EXPECT_EQ(run_child(request).status, 127);
}

}  // namespace
}  // namespace sumwright::cli
