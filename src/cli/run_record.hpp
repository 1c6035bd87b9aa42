// run.json: what differs from run to run - times, host, versions, what assistants said.
#pragma once

#include <nlohmann/json.hpp>
#include <string>

#include "cli/decision.hpp"

namespace sumwright::cli {

/// The current time in UTC, ISO 8601.
[[nodiscard]] std::string utc_now();

/// Operating system, processor and memory; no name of the machine or the user.
[[nodiscard]] nlohmann::ordered_json host_json();

/// run.json as `export` writes it.
[[nodiscard]] std::string run_json(const Options& options, const Decision& decision,
                                   const std::string& started);

/// The text of a run.json with one more replay; starts anew when the old text is not one.
[[nodiscard]] std::string with_replay(const std::string& old, const nlohmann::ordered_json& replay);

}  // namespace sumwright::cli
