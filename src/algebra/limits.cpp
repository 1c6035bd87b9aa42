// The library below reports its internal faults by aborting; here that becomes an exception,
// so that a fault ends one computation and not the process.
#include "algebra/limits.hpp"

#include <flint/flint.h>

#include <mutex>

namespace sumwright::algebra {
namespace {

// FLINT asks for this spelling of noreturn.
__attribute__((noreturn)) void throw_fault() {
  throw std::runtime_error("internal fault of the polynomial library");
}

}  // namespace

void install_abort_hook() {
  static std::once_flag once;
  std::call_once(once, [] { flint_set_abort(throw_fault); });
}

}  // namespace sumwright::algebra
