// From a run to run.json. Everything that is not deterministic goes here, and only here.
#include "cli/run_record.hpp"

#include <fmt/format.h>
#include <gmp.h>
#include <sys/resource.h>
#include <sys/utsname.h>
#include <unistd.h>

#include <ctime>

#include "build_facts.hpp"

namespace sumwright::cli {

namespace {

using Json = nlohmann::ordered_json;

constexpr int kRunFormat = 1;
constexpr std::size_t kReplaysKept = 20;

[[nodiscard]] Json libraries_json() {
  return {{"FLINT", kFlintVersion},      {"GMP", gmp_version}, {"PPL", kPplVersion},
          {"GiNaC", kGinacVersion},      {"CLN", kClnVersion}, {"OpenSSL", kOpensslVersion},
          {"compiler", kCompilerVersion}};
}

}  // namespace

std::string utc_now() {
  const std::time_t now = std::time(nullptr);
  std::tm parts{};
  gmtime_r(&now, &parts);
  char text[32];
  const std::size_t size = std::strftime(text, sizeof text, "%Y-%m-%dT%H:%M:%SZ", &parts);
  return {text, size};
}

Json host_json() {
  utsname names{};
  if (uname(&names) != 0) return Json::object();
  const long pages = sysconf(_SC_PHYS_PAGES);
  const long page = sysconf(_SC_PAGE_SIZE);
  return {{"system", names.sysname},
          {"release", names.release},
          {"machine", names.machine},
          {"processors", sysconf(_SC_NPROCESSORS_ONLN)},
          {"memory_bytes", static_cast<long long>(pages) * page}};
}

std::string run_json(const Options& options, const Decision& decision, const std::string& started) {
  Json seconds = Json::object();
  for (const auto& [step, time] : decision.seconds) seconds[step] = time;
  rusage usage{};
  getrusage(RUSAGE_SELF, &usage);
  Json out = {{"format", kRunFormat},
              {"tool", {{"name", "Sumwright"}, {"version", SUMWRIGHT_VERSION}}},
              {"libraries", libraries_json()},
              {"host", host_json()},
              {"started", started},
              {"finished", utc_now()},
              {"seconds", seconds},
              {"peak_memory_bytes", static_cast<long long>(usage.ru_maxrss) * 1024},
              {"limits",
               {{"max_order", options.max_order},
                {"seconds", options.time_limit},
                {"memory_bytes", options.memory_limit}}},
              {"replays", Json::array()}};
  return out.dump(2) + "\n";
}

std::string with_replay(const std::string& old, const Json& replay) {
  Json out = Json::parse(old, nullptr, false);
  if (!out.is_object()) out = Json{{"format", kRunFormat}};
  if (!out.contains("replays") || !out["replays"].is_array()) out["replays"] = Json::array();
  out["replays"].push_back(replay);
  while (out["replays"].size() > kReplaysKept) out["replays"].erase(0);
  return out.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

}  // namespace sumwright::cli
