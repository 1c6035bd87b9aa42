// What the program says: results to stdout, everything else to stderr.
#pragma once

#include <atomic>
#include <string>
#include <string_view>

namespace sumwright::cli {

/// A run with --json prints one JSON object, whatever becomes of it. True from the start of such a
/// run until the object is printed or on its way.
inline std::atomic<bool> json_is_due{false};

/// Whether the caller has to print the run's JSON object; true at most once in a run.
[[nodiscard]] inline bool take_json() { return json_is_due.exchange(false); }

/// Writes to stdout and makes sure that it arrived. Throws Unusable when it did not.
void print_result(const std::string& text);

/// Writes to stderr. A terminal that is gone is no reason to stop: failures are ignored.
void say(std::string_view text);

/// Keeps the descriptors 0, 1 and 2 from being given to files, should one be closed: a message
/// must not end up in an export. What is written to a closed stdout fails as before.
void reserve_standard_streams();

}  // namespace sumwright::cli
