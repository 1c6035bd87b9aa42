// Limits of the process, so that a hostile claim ends in a verdict and not in a frozen machine.
//
// Invariant: every way out that is taken here leaves files as they were and gives status 3.
#include "cli/session.hpp"

#include <gmp.h>
#include <signal.h>
#include <sys/resource.h>
#include <unistd.h>

#include <chrono>
#include <cstdlib>
#include <exception>
#include <new>
#include <string_view>

#include "cli/output.hpp"

namespace sumwright::cli {

namespace {

using algebra::Deadline;

// Objects of runs that end where nothing can be composed any more.
constexpr std::string_view kInterruptedJson =
    "{\n  \"verdict\": \"undecided\",\n  \"reason\": \"interrupted\",\n  \"exit_status\": 3\n}\n";
constexpr std::string_view kMemoryJson =
    "{\n  \"verdict\": \"undecided\",\n  \"reason\": \"memory limit reached\",\n"
    "  \"would_settle\": \"a larger --memory-limit\",\n  \"exit_status\": 3\n}\n";
constexpr std::string_view kFaultJson =
    "{\n  \"verdict\": \"fault\",\n  \"message\": \"an exception where none may pass\",\n"
    "  \"exit_status\": 4\n}\n";
constexpr std::string_view kTimeJson =
    "{\n  \"verdict\": \"undecided\",\n  \"reason\": \"time limit reached\",\n"
    "  \"would_settle\": \"a larger --time-limit\",\n  \"exit_status\": 3\n}\n";
constexpr std::string_view kTimeText =
    "verdict       undecided\n"
    "reason        time limit reached, in the middle of one long step\n"
    "would settle  a larger --time-limit\n";

// Safe in a signal handler and where memory is short.
void write_now(int fd, std::string_view text) {
  const ssize_t ignored = ::write(fd, text.data(), text.size());
  (void)ignored;
}

void on_signal(int) {
  if (!Deadline::interrupt_flag.exchange(true)) return;
  write_now(STDERR_FILENO, "\nsumwright: interrupted\n");
  if (take_json()) write_now(STDOUT_FILENO, kInterruptedJson);
  ::_exit(static_cast<int>(Status::undecided));
}

// The number library ends the process when memory is short unless its allocators throw.
void* allocate(std::size_t size) {
  void* memory = std::malloc(size);
  if (memory == nullptr) throw std::bad_alloc();
  return memory;
}
void* reallocate(void* old, std::size_t, std::size_t size) {
  void* memory = std::realloc(old, size);
  if (memory == nullptr) throw std::bad_alloc();
  return memory;
}
void release(void* memory, std::size_t) { std::free(memory); }

// Whether a moderate piece of memory can still be had.
[[nodiscard]] bool memory_is_short() {
  void* probe = std::malloc(std::size_t{32} << 20U);
  std::free(probe);
  return probe == nullptr;
}

// An exception met code that lets none pass: most often memory that ran out inside a library.
[[noreturn]] void on_terminate() {
  const bool memory = memory_is_short();
  write_now(STDERR_FILENO,
            memory ? "sumwright: memory limit reached\n"
                   : "sumwright: this is a fault of Sumwright: an exception where none may pass\n");
  if (take_json()) write_now(STDOUT_FILENO, memory ? kMemoryJson : kFaultJson);
  std::_Exit(static_cast<int>(memory ? Status::undecided : Status::fault));
}

[[nodiscard]] sigset_t ending_signals() {
  sigset_t set;
  sigemptyset(&set);
  sigaddset(&set, SIGINT);
  sigaddset(&set, SIGTERM);
  return set;
}

}  // namespace

void prepare_process() {
  reserve_standard_streams();
  mp_set_memory_functions(allocate, reallocate, release);
  algebra::install_abort_hook();
  std::set_terminate(on_terminate);
  struct sigaction action {};
  action.sa_handler = on_signal;
  sigemptyset(&action.sa_mask);
  action.sa_flags = SA_RESTART;
  sigaction(SIGINT, &action, nullptr);
  sigaction(SIGTERM, &action, nullptr);
}

void limit_memory(std::uint64_t bytes) {
#if defined(__SANITIZE_ADDRESS__)
  (void)bytes;  // the sanitizer reserves more address space than any limit
#else
  rlimit limit{};
  if (getrlimit(RLIMIT_AS, &limit) != 0) return;
  if (limit.rlim_max == RLIM_INFINITY || bytes < limit.rlim_max) limit.rlim_cur = bytes;
  setrlimit(RLIMIT_AS, &limit);
#endif
}

SignalShield::SignalShield() {
  const sigset_t set = ending_signals();
  pthread_sigmask(SIG_BLOCK, &set, nullptr);
}

SignalShield::~SignalShield() {
  const sigset_t set = ending_signals();
  pthread_sigmask(SIG_UNBLOCK, &set, nullptr);
}

Watch::Watch(const Options& options)
    : deadline_(std::chrono::milliseconds(static_cast<long long>(options.time_limit * 1000) + 1)) {
  const SignalShield shield;  // signals are for the main thread
  thread_ = std::thread(&Watch::wait, this, options.time_limit, options.json);
}

Watch::~Watch() {
  {
    const std::lock_guard<std::mutex> lock(mutex_);
    over_ = true;
  }
  changed_.notify_all();
  thread_.join();
}

void Watch::wait(double seconds, bool json) {
  // Work that asks for the time stops by itself; the rest gets a tenth more, or two seconds.
  const std::chrono::duration<double> grace(seconds + std::max(2.0, seconds / 10));
  std::unique_lock<std::mutex> lock(mutex_);
  if (changed_.wait_for(lock, grace, [this] { return over_; })) return;
  if (!json) write_now(STDOUT_FILENO, kTimeText);
  if (take_json()) write_now(STDOUT_FILENO, kTimeJson);
  std::_Exit(static_cast<int>(Status::undecided));
}

}  // namespace sumwright::cli
