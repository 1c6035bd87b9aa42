// Files that a user names: regular ones are read, and nothing else is waited for.
#include "claim/regular_file.hpp"

#include <gtest/gtest.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cstdlib>
#include <fstream>

#include "claim/source.hpp"

namespace sumwright::claim {
namespace {

namespace fs = std::filesystem;

class RegularFile : public ::testing::Test {
 protected:
  void SetUp() override {
    std::string pattern = (fs::temp_directory_path() / "sumwright-test-XXXXXX").string();
    ASSERT_NE(::mkdtemp(pattern.data()), nullptr);
    root_ = pattern;
  }
  void TearDown() override { fs::remove_all(root_); }

  static std::string refusal(const fs::path& path) {
    try {
      (void)read_regular_file(path, 100);
    } catch (const InputError& error) {
      EXPECT_EQ(error.parts().file, path.string());
      return error.parts().message;
    }
    return "";
  }

  fs::path root_;
};

TEST_F(RegularFile, OneByteMoreThanAllowedIsRead) {
  std::ofstream(root_ / "f", std::ios::binary)
      << std::string("a\0b\r\n", 5) << std::string(95, 'x');
  EXPECT_EQ(read_regular_file(root_ / "f", 1000).size(), 100U);
  EXPECT_EQ(read_regular_file(root_ / "f", 100).size(), 100U);
  EXPECT_EQ(read_regular_file(root_ / "f", 4), std::string("a\0b\r\n", 5));
  fs::create_symlink(root_ / "f", root_ / "link");
  EXPECT_EQ(read_regular_file(root_ / "link", 1000).size(), 100U);
}

TEST_F(RegularFile, NothingElseIsWaitedFor) {
  ASSERT_EQ(::mkfifo((root_ / "pipe").c_str(), 0600), 0);  // no writer: a plain open would wait
  EXPECT_TRUE(refusal(root_ / "pipe").starts_with("not a regular file"));
  EXPECT_TRUE(refusal("/dev/zero").starts_with("not a regular file"));
  EXPECT_EQ(refusal(root_), "this is a directory, not a file");
  EXPECT_EQ(refusal(root_ / "none"), "cannot be opened: No such file or directory");
}

}  // namespace
}  // namespace sumwright::claim
