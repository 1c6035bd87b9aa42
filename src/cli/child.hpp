// Another program, run with limits and without a shell.
#pragma once

#include <sys/types.h>

#include <chrono>
#include <cstdint>
#include <filesystem>
#include <optional>
#include <string>
#include <vector>

namespace sumwright::cli {

/// The program of that name on PATH; nothing when there is none.
[[nodiscard]] std::optional<std::filesystem::path> find_program(const std::string& name);

struct ChildRequest {
  std::filesystem::path program;
  std::vector<std::string> arguments;  ///< without the program's name
  std::filesystem::path folder;        ///< working folder
  std::filesystem::path output;        ///< file that takes stdout and stderr
  std::uint64_t memory_limit = 0;      ///< bytes of address space
  double seconds = 0;                  ///< wall time, after which it is ended
};

struct ChildResult {
  int status = -1;  ///< exit status; -1 when a signal ended it
  int signal = 0;
  bool timed_out = false;
  double seconds = 0;
  std::string output;  ///< the first 64 KiB

  [[nodiscard]] bool succeeded() const { return status == 0 && !timed_out; }
};

/// A running child. It gets an environment of PATH, HOME and TMPDIR (the last two its working
/// folder) and the C locale, a process group of its own, and dies with its parent; the destructor
/// ends it.
class Child {
 public:
  /// Starts it. Throws Fault when no process can be made.
  explicit Child(const ChildRequest& request);
  Child(const Child&) = delete;
  Child& operator=(const Child&) = delete;
  ~Child();

  /// The result when it has ended (or was ended for its time); nothing while it runs.
  [[nodiscard]] std::optional<ChildResult> poll();

 private:
  void end();

  ChildRequest request_;
  pid_t pid_ = -1;
  std::chrono::steady_clock::time_point start_ = std::chrono::steady_clock::now();
};

/// Runs to the end. Throws algebra::TimeUp when the user interrupts.
[[nodiscard]] ChildResult run_child(const ChildRequest& request);

}  // namespace sumwright::cli
