// From a request to a finished process.
//
// Between fork and exec only functions that are safe after fork are called, on memory prepared
// before.
#include "cli/child.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <signal.h>
#include <sys/prctl.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#include <cerrno>
#include <cstdlib>
#include <cstring>
#include <fstream>
#include <thread>

#include "algebra/limits.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

namespace {

namespace fs = std::filesystem;

constexpr std::size_t kOutputBytes = std::size_t{64} << 10U;
constexpr rlim_t kFileBytes = rlim_t{1} << 30U;

[[nodiscard]] std::vector<char*> pointers(std::vector<std::string>& texts) {
  std::vector<char*> out;
  for (std::string& text : texts) out.push_back(text.data());
  out.push_back(nullptr);
  return out;
}

void lower_limit(int resource, rlim_t value) {
  rlimit limit{};
  if (::getrlimit(static_cast<__rlimit_resource_t>(resource), &limit) != 0) return;
  if (limit.rlim_max == RLIM_INFINITY || value < limit.rlim_max) limit.rlim_max = value;
  limit.rlim_cur = limit.rlim_max;
  ::setrlimit(static_cast<__rlimit_resource_t>(resource), &limit);
}

[[noreturn]] void become(const ChildRequest& request, char* const* arguments,
                         char* const* environment, pid_t parent) {
  ::setpgid(0, 0);
  ::prctl(PR_SET_PDEATHSIG, SIGKILL);
  if (::getppid() != parent) ::_exit(127);  // the parent has ended in between
  ::signal(SIGINT, SIG_DFL);
  ::signal(SIGTERM, SIG_DFL);
  lower_limit(RLIMIT_AS, request.memory_limit);
  lower_limit(RLIMIT_FSIZE, kFileBytes);
  lower_limit(RLIMIT_CORE, 0);
  const int in = ::open("/dev/null", O_RDONLY);
  const int out = ::open(request.output.c_str(), O_WRONLY | O_CREAT | O_TRUNC | O_CLOEXEC, 0600);
  if (in < 0 || out < 0 || ::dup2(in, 0) < 0 || ::dup2(out, 1) < 0 || ::dup2(out, 2) < 0 ||
      ::chdir(request.folder.c_str()) != 0) {
    ::_exit(127);
  }
  ::execve(request.program.c_str(), arguments, environment);
  ::_exit(127);
}

[[nodiscard]] std::string beginning(const fs::path& path) {
  std::ifstream in(path, std::ios::binary);
  std::string text(kOutputBytes, '\0');
  in.read(text.data(), static_cast<std::streamsize>(text.size()));
  text.resize(static_cast<std::size_t>(in.gcount()));
  return text;
}

}  // namespace

std::optional<fs::path> find_program(const std::string& name) {
  const char* path = std::getenv("PATH");
  const std::string all = path == nullptr ? "/usr/local/bin:/usr/bin:/bin" : path;
  for (std::size_t at = 0; at <= all.size();) {
    const std::size_t end = std::min(all.find(':', at), all.size());
    const fs::path candidate = fs::path(all.substr(at, end - at)) / name;
    std::error_code code;
    if (candidate.is_absolute() && fs::is_regular_file(candidate, code) &&
        ::access(candidate.c_str(), X_OK) == 0) {
      return candidate;
    }
    at = end + 1;
  }
  return std::nullopt;
}

Child::Child(const ChildRequest& request) : request_(request) {
  std::vector<std::string> arguments{request.program.string()};
  arguments.insert(arguments.end(), request.arguments.begin(), request.arguments.end());
  const char* path = std::getenv("PATH");
  std::vector<std::string> environment{
      std::string("PATH=") + (path == nullptr ? "/usr/bin:/bin" : path),
      "HOME=" + request.folder.string(), "TMPDIR=" + request.folder.string(), "LC_ALL=C"};
  const std::vector<char*> argument_pointers = pointers(arguments);
  const std::vector<char*> environment_pointers = pointers(environment);
  const pid_t parent = ::getpid();
  pid_ = ::fork();
  if (pid_ == 0) {
    become(request_, argument_pointers.data(), environment_pointers.data(), parent);
  }
  if (pid_ < 0) throw Fault(fmt::format("no new process: {}", std::strerror(errno)));
  ::setpgid(pid_, pid_);
}

Child::~Child() { end(); }

void Child::end() {
  if (pid_ < 0) return;
  ::kill(-pid_, SIGKILL);
  ::kill(pid_, SIGKILL);
  int status = 0;
  while (::waitpid(pid_, &status, 0) < 0 && errno == EINTR) {
  }
  pid_ = -1;
}

std::optional<ChildResult> Child::poll() {
  ChildResult out;
  out.seconds = std::chrono::duration<double>(std::chrono::steady_clock::now() - start_).count();
  int status = 0;
  const pid_t ended = ::waitpid(pid_, &status, WNOHANG);
  if (ended == 0) {
    if (out.seconds <= request_.seconds) return std::nullopt;
    out.timed_out = true;
    end();
  } else if (ended == pid_) {
    ::kill(-pid_, SIGKILL);  // whatever it may have left running
    pid_ = -1;
    if (WIFEXITED(status)) out.status = WEXITSTATUS(status);
    if (WIFSIGNALED(status)) out.signal = WTERMSIG(status);
  } else {
    throw Fault(fmt::format("waiting for a process: {}", std::strerror(errno)));
  }
  out.output = beginning(request_.output);
  return out;
}

ChildResult run_child(const ChildRequest& request) {
  Child child(request);
  while (true) {
    if (auto result = child.poll()) return *std::move(result);
    algebra::Deadline().check();  // throws when interrupted
    std::this_thread::sleep_for(std::chrono::milliseconds(5));
  }
}

}  // namespace sumwright::cli
