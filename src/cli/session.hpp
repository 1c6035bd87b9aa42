// The process around one command: limits, signals, and the last resort when time is up.
#pragma once

#include <atomic>
#include <condition_variable>
#include <mutex>
#include <string>
#include <thread>

#include "algebra/limits.hpp"
#include "cli/options.hpp"

namespace sumwright::cli {

/// Installed once, at the start of the process: fault hooks of the libraries, SIGINT and SIGTERM.
/// The first signal asks all work to stop (Deadline::interrupt_flag), the second ends the process
/// with status 3. While a SignalShield lives, neither ends it.
void prepare_process();

/// Bounds the address space of this process.
void limit_memory(std::uint64_t bytes);

/// Holds signals back while files are moved into place.
class SignalShield {
 public:
  SignalShield();
  SignalShield(const SignalShield&) = delete;
  SignalShield& operator=(const SignalShield&) = delete;
  ~SignalShield();
};

/// The time limit of one command: a Deadline for code that asks, and a thread that ends the
/// process with status 3 when code that does not ask overruns it. Nothing is being written while
/// the watch lives.
class Watch {
 public:
  explicit Watch(const Options& options);
  Watch(const Watch&) = delete;
  Watch& operator=(const Watch&) = delete;
  ~Watch();

  [[nodiscard]] const algebra::Deadline& deadline() const { return deadline_; }

 private:
  void wait(double seconds, bool json);

  algebra::Deadline deadline_;
  std::mutex mutex_;
  std::condition_variable changed_;
  bool over_ = false;
  std::thread thread_;
};

}  // namespace sumwright::cli
