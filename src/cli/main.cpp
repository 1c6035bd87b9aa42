// The program: arguments, limits, one command, one exit status.
//
// Every exception ends here. Input errors are the user's (2), running out of time or memory decides
// nothing (3), anything else is a fault of Sumwright (4).
#include <fmt/format.h>

#include <cstdio>
#include <exception>
#include <new>

#include "algebra/limits.hpp"
#include "claim/source.hpp"
#include "claim/text.hpp"
#include "cli/options.hpp"
#include "cli/session.hpp"
#include "writers/output_folder.hpp"

namespace {

using sumwright::cli::Status;

int failed(Status status, const char* what) {
  fmt::print(stderr, "sumwright: {}\n", sumwright::claim::printable(what));
  return static_cast<int>(status);
}

int run(int count, char** arguments) {
  const sumwright::cli::Arguments read = sumwright::cli::read_arguments(count, arguments);
  if (read.command == nullptr) return read.exit_status;
  sumwright::cli::limit_memory(read.options.memory_limit);
  return static_cast<int>(read.command->run(read.options));
}

int fault(const std::string& what) {
  fmt::print(stderr, "sumwright: this is a fault of Sumwright, not of the claim: {}\n", what);
  fmt::print(stderr, "sumwright: please report it together with the claim file\n");
  return static_cast<int>(Status::fault);
}

}  // namespace

int main(int count, char** arguments) {
  try {
    sumwright::cli::prepare_process();
    return run(count, arguments);
  } catch (const sumwright::claim::InputError& error) {
    fmt::print(stderr, "{}\n", error.what());  // rendered, with lines of its own
    return static_cast<int>(Status::unusable);
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
