// One line on the terminal that says what is being done.
#pragma once

#include <chrono>
#include <string>

namespace sumwright::cli {

/// Shows stages on stderr when that is a terminal, and nothing otherwise. The line is
/// erased by `clear` and at the end of the object's life.
class Progress {
 public:
  Progress();
  Progress(const Progress&) = delete;
  Progress& operator=(const Progress&) = delete;
  ~Progress() { clear(); }

  void show(const std::string& stage);
  void clear();

 private:
  bool terminal_;
  bool shown_ = false;
  std::chrono::steady_clock::time_point start_ = std::chrono::steady_clock::now();
};

}  // namespace sumwright::cli
