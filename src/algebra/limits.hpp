// Time limit and interruption, asked for at the heads of long loops.
#pragma once

#include <atomic>
#include <chrono>
#include <stdexcept>

namespace sumwright::algebra {

/// Thrown by Deadline::check; caught in `cli` only (undecided) or where a smaller answer is
/// possible.
class TimeUp : public std::runtime_error {
 public:
  explicit TimeUp(bool by_user)
      : std::runtime_error(by_user ? "interrupted" : "time limit reached"), interrupted(by_user) {}
  /// An intermediate result that would be larger than `algebra` works with.
  explicit TimeUp(const char* size_reason) : std::runtime_error(size_reason), interrupted(false) {}
  bool interrupted;
};

/// A point in time after which work must stop; also stops when `interrupt_flag` is set.
class Deadline {
 public:
  Deadline() = default;  ///< never
  explicit Deadline(std::chrono::milliseconds from_now)
      : end_(std::chrono::steady_clock::now() + from_now), limited_(true) {}
  void check() const {
    if (interrupt_flag.load(std::memory_order_relaxed)) throw TimeUp(true);
    if (limited_ && std::chrono::steady_clock::now() > end_) throw TimeUp(false);
  }
  inline static std::atomic<bool> interrupt_flag{false};

 private:
  std::chrono::steady_clock::time_point end_{};
  bool limited_ = false;
};

/// Installs FLINT's abort hook so that an internal fault becomes an exception, once per process.
void install_abort_hook();

}  // namespace sumwright::algebra
