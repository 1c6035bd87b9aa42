// The program: arguments, limits, one command, one exit status.
//
// Every exception ends here. Input errors are the user's (2), running out of time or memory decides
// nothing (3), anything else is a fault of Sumwright (4). With --json each of them is an object on
// stdout as well.
#include <fmt/format.h>

#include <cstdio>
#include <cstring>
#include <exception>
#include <new>

#include "algebra/limits.hpp"
#include "claim/source.hpp"
#include "claim/text.hpp"
#include "cli/failure.hpp"
#include "cli/options.hpp"
#include "cli/output.hpp"
#include "cli/session.hpp"
#include "writers/output_folder.hpp"

namespace {

using sumwright::cli::Status;

// The object of a run that cannot print its result; when stdout fails too, there is nothing left.
void print_failure(const std::string& json) {
  if (!sumwright::cli::take_json()) return;
  const bool printed = std::fputs(json.c_str(), stdout) >= 0 && std::fflush(stdout) == 0;
  (void)printed;
}

int failed(Status status, const std::string& what) {
  sumwright::cli::say(fmt::format("sumwright: {}\n", sumwright::claim::printable(what)));
  print_failure(sumwright::cli::failure_json(status, what));
  return static_cast<int>(status);
}

int unusable(const sumwright::claim::InputError& error) {
  sumwright::cli::say(std::string(error.what()) + "\n");  // rendered, with lines of its own
  print_failure(sumwright::cli::failure_json(error.parts()));
  return static_cast<int>(Status::unusable);
}

int run(int count, char** arguments) {
  const sumwright::cli::Arguments read = sumwright::cli::read_arguments(count, arguments);
  if (read.command == nullptr) return read.exit_status;
  sumwright::cli::limit_memory(read.options.memory_limit);
  return static_cast<int>(read.command->run(read.options));
}

int fault(const std::string& what) {
  sumwright::cli::say(
      fmt::format("sumwright: this is a fault of Sumwright, not of the claim: {}\n"
                  "sumwright: please report it together with the claim file\n",
                  what));
  print_failure(sumwright::cli::failure_json(Status::fault, what));
  return static_cast<int>(Status::fault);
}

}  // namespace

int main(int count, char** arguments) {
  for (int i = 1; i < count; ++i) {
    if (std::strcmp(arguments[i], "--json") == 0) sumwright::cli::json_is_due = true;
  }
  try {
    sumwright::cli::prepare_process();
    return run(count, arguments);
  } catch (const sumwright::claim::InputError& error) {
    return unusable(error);
  } catch (const sumwright::cli::Unusable& error) {
    return failed(Status::unusable, error.what());
  } catch (const sumwright::writers::OutputError& error) {
    return failed(Status::unusable, error.what());
  } catch (const sumwright::algebra::TimeUp& error) {
    return failed(Status::undecided, error.what());
  } catch (const std::bad_alloc&) {
    return failed(Status::undecided, "memory limit reached");
  } catch (const std::exception& error) {
    return fault(error.what());
  } catch (...) {
    return fault("an unknown exception");
  }
}
