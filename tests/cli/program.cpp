// Starts programs with both outputs in files, so that neither pipe can fill up.
#include "program.hpp"

#include <fcntl.h>
#include <gtest/gtest.h>
#include <spawn.h>
#include <stdlib.h>
#include <sys/wait.h>
#include <unistd.h>

#include <algorithm>
#include <fstream>
#include <iterator>
#include <stdexcept>

namespace sumwright::testing {

namespace fs = std::filesystem;

namespace {

std::vector<char*> pointers(std::vector<std::string>& texts) {
  std::vector<char*> out;
  for (std::string& text : texts) out.push_back(text.data());
  out.push_back(nullptr);
  return out;
}

std::vector<std::string> environment_with(
    const std::vector<std::pair<std::string, std::string>>& changes) {
  std::vector<std::string> out;
  for (char** entry = environ; *entry != nullptr; ++entry) {
    const std::string text(*entry);
    const std::string name = text.substr(0, text.find('='));
    if (std::none_of(changes.begin(), changes.end(),
                     [&](const auto& change) { return change.first == name; })) {
      out.push_back(text);
    }
  }
  for (const auto& [name, value] : changes) out.push_back(name + "=" + value);
  return out;
}

fs::path new_folder() {
  std::string pattern = (fs::temp_directory_path() / "sumwright-test-XXXXXX").string();
  if (::mkdtemp(pattern.data()) == nullptr) throw std::runtime_error("no temporary folder");
  return pattern;
}

}  // namespace

Outcome run_program(const std::vector<std::string>& arguments, const fs::path& folder,
                    const std::vector<std::pair<std::string, std::string>>& environment) {
  const fs::path outputs = new_folder();
  const std::string out_path = (outputs / "out").string();
  const std::string err_path = (outputs / "err").string();
  posix_spawn_file_actions_t actions;
  posix_spawn_file_actions_init(&actions);
  constexpr int kFlags = O_WRONLY | O_CREAT | O_TRUNC;
  posix_spawn_file_actions_addopen(&actions, 0, "/dev/null", O_RDONLY, 0);
  posix_spawn_file_actions_addopen(&actions, 1, out_path.c_str(), kFlags, 0600);
  posix_spawn_file_actions_addopen(&actions, 2, err_path.c_str(), kFlags, 0600);
  posix_spawn_file_actions_addchdir_np(&actions, folder.c_str());
  std::vector<std::string> words = arguments;
  std::vector<std::string> values = environment_with(environment);
  pid_t pid = -1;
  const int code = posix_spawnp(&pid, words.at(0).c_str(), &actions, nullptr,
                                pointers(words).data(), pointers(values).data());
  posix_spawn_file_actions_destroy(&actions);
  if (code != 0) throw std::runtime_error("cannot start " + words[0]);
  int status = 0;
  ::waitpid(pid, &status, 0);
  Outcome out;
  if (WIFEXITED(status)) out.status = WEXITSTATUS(status);
  out.out = read_file(out_path);
  out.err = read_file(err_path);
  fs::remove_all(outputs);
  return out;
}

TestFolder::TestFolder() : path_(new_folder()) {}

TestFolder::~TestFolder() {
  std::error_code ignored;
  fs::remove_all(path_, ignored);
}

fs::path TestFolder::write(const std::string& name, const std::string& text) const {
  const fs::path path = path_ / name;
  std::ofstream(path, std::ios::binary) << text;
  return path;
}

Outcome TestFolder::sumwright(std::vector<std::string> arguments) const {
  arguments.insert(arguments.begin(), SUMWRIGHT_PROGRAM);
  return run_program(arguments, path_);
}

std::vector<std::string> TestFolder::files() const {
  std::vector<std::string> out;
  for (const auto& entry : fs::recursive_directory_iterator(path_)) {
    if (!entry.is_directory()) out.push_back(entry.path().lexically_relative(path_).string());
  }
  std::sort(out.begin(), out.end());
  return out;
}

std::string read_file(const fs::path& path) {
  std::ifstream in(path, std::ios::binary);
  EXPECT_TRUE(in.good()) << path;
  return {std::istreambuf_iterator<char>(in), std::istreambuf_iterator<char>()};
}

std::string exemplar(const std::string& name) {
  return std::string(SUMWRIGHT_SOURCE_DIR) + "/exemplars/" + name;
}

std::string replaced(std::string text, const std::string& from, const std::string& to) {
  const std::size_t at = text.find(from);
  EXPECT_NE(at, std::string::npos) << "no '" << from << "' to replace in\n" << text;
  return at == std::string::npos ? text : text.replace(at, from.size(), to);
}

std::string squares_claim() {
  return "format  = 1\n"
         "title   = \"Squares of one row\"\n"
         "running = \"n\"\n"
         "from    = 0\n"
         "\n"
         "[sum]  # of the row's squares\n"
         "summand = \"binomial(n, k)^2\"\n"
         "over    = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n"
         "\n"
         "[equals]\n"
         "closed  = \"binomial(2*n, n)\"\n";
}

}  // namespace sumwright::testing
