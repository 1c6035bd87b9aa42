// The output folder: complete or untouched, and never outside of itself.
#include "writers/output_folder.hpp"

#include <gtest/gtest.h>
#include <sys/stat.h>
#include <unistd.h>

#include <cstdlib>
#include <fstream>
#include <iterator>
#include <set>

namespace sumwright::writers {
namespace {

namespace fs = std::filesystem;

class OutputFolder : public ::testing::Test {
 protected:
  void SetUp() override {
    std::string pattern = (fs::temp_directory_path() / "sumwright-test-XXXXXX").string();
    ASSERT_NE(::mkdtemp(pattern.data()), nullptr);
    root_ = pattern;
  }
  void TearDown() override { fs::remove_all(root_); }

  static std::string read(const fs::path& path) {
    std::ifstream in(path, std::ios::binary);
    return {std::istreambuf_iterator<char>(in), std::istreambuf_iterator<char>()};
  }
  static void write(const fs::path& path, const std::string& text) { std::ofstream(path) << text; }
  // Everything below the root, hidden things included.
  [[nodiscard]] std::set<std::string> all() const {
    std::set<std::string> out;
    for (const auto& entry : fs::recursive_directory_iterator(root_)) {
      out.insert(entry.path().lexically_relative(root_).string());
    }
    return out;
  }
  [[nodiscard]] std::string refusal(const std::vector<NamedText>& files) const {
    try {
      write_folder(root_ / "out", files);
    } catch (const OutputError& error) {
      return error.what();
    }
    return "";
  }

  fs::path root_;
};

TEST_F(OutputFolder, WritesAndReplacesOnlyItsOwnNames) {
  write_folder(root_ / "out", {{"a.txt", "one"}, {"coq/Claim.v", std::string(100000, 'x')}});
  EXPECT_EQ(read(root_ / "out/a.txt"), "one");
  EXPECT_EQ(fs::file_size(root_ / "out/coq/Claim.v"), 100000U);
  write(root_ / "out/mine.txt", "kept");
  write(root_ / "out/coq/mine.txt", "kept");
  write_folder(root_ / "out/", {{"a.txt", "two"}});
  EXPECT_EQ(all(), (std::set<std::string>{"out", "out/a.txt", "out/mine.txt", "out/coq",
                                          "out/coq/Claim.v", "out/coq/mine.txt"}));
  EXPECT_EQ(read(root_ / "out/a.txt"), "two");
  EXPECT_EQ(read(root_ / "out/mine.txt"), "kept");
}

TEST_F(OutputFolder, RefusesPathsThatLeaveTheFolder) {
  for (const char* path : {"../a", "a/../../b", "/etc/a", "", "a//b", ".", "a/", "./a"}) {
    EXPECT_NE(refusal({{"good", "x"}, {path, "x"}}).find("not a relative path below"),
              std::string::npos)
        << path;
  }
  EXPECT_NE(refusal({{std::string("a\0b", 3), "x"}}), "");
  EXPECT_NE(refusal({{"a", "x"}, {"a", "y"}}).find("given twice"), std::string::npos);
  EXPECT_NE(refusal({{"a", "x"}, {"a/b", "y"}}).find("file and a folder"), std::string::npos);
  EXPECT_TRUE(all().empty());
}

TEST_F(OutputFolder, RefusesSymbolicLinks) {
  fs::create_directory(root_ / "elsewhere");
  write(root_ / "elsewhere/secret", "untouched");
  fs::create_directory_symlink(root_ / "elsewhere", root_ / "out");
  EXPECT_NE(refusal({{"a", "x"}}).find("symbolic links are not followed"), std::string::npos);
  fs::remove(root_ / "out");
  fs::create_directory(root_ / "out");
  fs::create_directory_symlink(root_ / "elsewhere", root_ / "out/coq");
  EXPECT_NE(refusal({{"a", "x"}, {"coq/secret", "x"}}).find("symbolic links are not followed"),
            std::string::npos);
  fs::remove(root_ / "out/coq");
  fs::create_symlink(root_ / "elsewhere/secret", root_ / "out/b");
  EXPECT_NE(refusal({{"a", "x"}, {"b", "x"}}).find("not a regular file"), std::string::npos);
  EXPECT_EQ(read(root_ / "elsewhere/secret"), "untouched");
  EXPECT_EQ(all(), (std::set<std::string>{"elsewhere", "elsewhere/secret", "out", "out/b"}));
}

TEST_F(OutputFolder, RefusesAFileWhereTheFolderShouldBe) {
  write(root_ / "out", "a file");
  EXPECT_NE(refusal({{"a", "x"}}), "");
  EXPECT_EQ(read(root_ / "out"), "a file");
  EXPECT_THROW(write_folder(root_ / "missing/out", {{"a", "x"}}), OutputError);
  EXPECT_EQ(all(), (std::set<std::string>{"out"}));
}

// An existing folder may be a volume of its own: nothing is staged outside of it.
TEST_F(OutputFolder, AnExistingFolderIsAllThatIsNeeded) {
  class Spy : public FileSink {
   public:
    void write(const fs::path& path, const std::string& text) override {
      places.push_back(path.parent_path().parent_path());
      FileSink::write(path, text);
    }
    std::vector<fs::path> places;
  };
  Spy sink;
  write_folder(root_ / "out", {{"a", "x"}}, sink);
  EXPECT_EQ(sink.places.back(), root_);
  write_folder(root_ / "out", {{"a", "y"}}, sink);
  EXPECT_EQ(sink.places.back(), root_ / "out");
  EXPECT_EQ(read(root_ / "out/a"), "y");
  EXPECT_EQ(all(), (std::set<std::string>{"out", "out/a"}));
}

// /dev/full takes the place of the disk: opening works, the bytes do not arrive.
class FullDisk : public FileSink {
 public:
  explicit FullDisk(std::size_t good) : good_(good) {}
  void write(const fs::path& path, const std::string& text) override {
    if (good_-- > 0) {
      FileSink::write(path, text);
      return;
    }
    std::ofstream out("/dev/full", std::ios::binary);
    out << text;
    out.flush();
    if (!out) throw OutputError(path.filename().string() + ": No space left on device");
  }

 private:
  std::size_t good_;
};

TEST_F(OutputFolder, AFullDiskLeavesNothing) {
  fs::create_directory(root_ / "out");
  write(root_ / "out/a", "before");
  const std::vector<NamedText> files = {{"a", "after"}, {"b", "x"}, {"coq/c", "x"}};
  for (std::size_t good = 0; good < files.size(); ++good) {
    FullDisk sink(good);
    EXPECT_THROW(write_folder(root_ / "out", files, sink), OutputError);
    EXPECT_EQ(read(root_ / "out/a"), "before");
    EXPECT_EQ(all(), (std::set<std::string>{"out", "out/a"}));
    EXPECT_THROW(write_folder(root_ / "new", files, sink = FullDisk(good)), OutputError);
    EXPECT_EQ(all(), (std::set<std::string>{"out", "out/a"}));
  }
}

// The real sink at a place where writing fails.
TEST_F(OutputFolder, SinkReportsItsFailures) {
  FileSink sink;
  write(root_ / "there", "x");
  EXPECT_THROW(sink.write(root_ / "there", "y"), OutputError);
  EXPECT_EQ(read(root_ / "there"), "x");
  fs::create_symlink("/dev/full", root_ / "full");
  EXPECT_THROW(sink.write(root_ / "full", "y"), OutputError);
}

}  // namespace
}  // namespace sumwright::writers
