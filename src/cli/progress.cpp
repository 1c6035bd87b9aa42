// Progress on a terminal; a file or pipe never sees any of it.
#include "cli/progress.hpp"

#include <fmt/format.h>
#include <unistd.h>

#include "claim/text.hpp"
#include "cli/output.hpp"

namespace sumwright::cli {

Progress::Progress() : terminal_(::isatty(STDERR_FILENO) == 1) {}

void Progress::show(const std::string& stage) {
  if (!terminal_) return;
  const std::chrono::duration<double> taken = std::chrono::steady_clock::now() - start_;
  say(fmt::format("\r\033[K{:6.1f} s  {}", taken.count(), claim::printable(stage).substr(0, 60)));
  shown_ = true;
}

void Progress::clear() {
  if (!shown_) return;
  say("\r\033[K");
  shown_ = false;
}

}  // namespace sumwright::cli
