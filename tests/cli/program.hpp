// Running the program under test and looking at everything it says.
#pragma once

#include <filesystem>
#include <string>
#include <utility>
#include <vector>

namespace sumwright::testing {

struct Outcome {
  int status = -1;  ///< exit status; -1 when a signal ended it
  std::string out;
  std::string err;
};

/// Runs a program to its end without a shell, in `folder`; environment as here, with the changes.
[[nodiscard]] Outcome run_program(
    const std::vector<std::string>& arguments, const std::filesystem::path& folder,
    const std::vector<std::pair<std::string, std::string>>& environment = {});

/// A folder that is removed at the end of a test.
class TestFolder {
 public:
  TestFolder();
  TestFolder(const TestFolder&) = delete;
  TestFolder& operator=(const TestFolder&) = delete;
  ~TestFolder();

  [[nodiscard]] const std::filesystem::path& path() const { return path_; }
  /// Writes a file and gives its path.
  std::filesystem::path write(const std::string& name, const std::string& text) const;
  /// Runs sumwright in this folder.
  [[nodiscard]] Outcome sumwright(std::vector<std::string> arguments) const;
  /// Relative paths of all files, sorted.
  [[nodiscard]] std::vector<std::string> files() const;

 private:
  std::filesystem::path path_;
};

/// The whole file; fails the test when it cannot be read.
[[nodiscard]] std::string read_file(const std::filesystem::path& path);

/// The path of an exemplar of the repository.
[[nodiscard]] std::string exemplar(const std::string& name);

/// `text` with the first `from` replaced; fails the test when there is none.
[[nodiscard]] std::string replaced(std::string text, const std::string& from,
                                   const std::string& to);

/// A true equality, by title, without evidence.
[[nodiscard]] std::string squares_claim();

}  // namespace sumwright::testing
