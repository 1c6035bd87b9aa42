// `replay`: from an export folder to what Coq says of it today.
//
// Only files whose hashes record.json states are run, from a copy that is thrown away, so that the
// export stays as it is; run.json alone is replaced. Invariant: status 0 means that every script
// was accepted and that the checker found no axiom under the theorem.
#include <fmt/format.h>
#include <unistd.h>

#include <algorithm>
#include <nlohmann/json.hpp>
#include <thread>

#include "claim/text.hpp"
#include "cli/commands.hpp"
#include "cli/coq_run.hpp"
#include "cli/export_folder.hpp"
#include "cli/output.hpp"
#include "cli/progress.hpp"
#include "cli/report.hpp"
#include "cli/run_record.hpp"
#include "cli/session.hpp"
#include "cli/single_file.hpp"
#include "writers/embedded.hpp"
#include "writers/output_folder.hpp"
#include "writers/sha256.hpp"

namespace sumwright::cli {

namespace {

namespace fs = std::filesystem;
using Json = nlohmann::ordered_json;

constexpr std::size_t kFileBytes = std::size_t{256} << 20U;
constexpr std::size_t kOutputShown = 2000;
constexpr std::string_view kCoqFolder = "coq/";

/// A folder for products; removed with everything in it.
class TemporaryFolder {
 public:
  TemporaryFolder() {
    std::error_code code;
    std::string pattern = (fs::temp_directory_path(code) / "sumwright-replay-XXXXXX").string();
    if (code || ::mkdtemp(pattern.data()) == nullptr) {
      throw Unusable("no temporary folder can be made: " + pattern);
    }
    path_ = pattern;
  }
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;
  ~TemporaryFolder() {
    std::error_code ignored;  // nothing can be done about it here
    fs::remove_all(path_, ignored);
  }
  [[nodiscard]] const fs::path& path() const { return path_; }

 private:
  fs::path path_;
};

class Replay {
 public:
  explicit Replay(const Options& options) : options_(options) {}

  Status run() {
    read_export();
    if (!problems_.empty()) return conclude(Status::refuted);
    std::string missing;
    const std::optional<CoqTools> tools = find_coq_tools(missing);
    if (!tools) {
      problems_.push_back(missing + " is not installed on this machine");
      return conclude(Status::undecided);
    }
    return conclude(with_tools(*tools));
  }

 private:
  void say(const std::string& text) const {
    if (!options_.json) print_result(text);
  }

  void read_export() {
    const fs::path record = options_.input / "record.json";
    check_folder(record);
    const std::string text = read_whole_file(record, kFileBytes);
    const std::vector<ListedFile> files = listed_files(text, record.string());
    for (const ListedFile& file : files) read_listed(file);
    const auto project = scripts_.find("_CoqProject");
    if (project == scripts_.end() && problems_.empty()) {
      throw Unusable(claim::printable(options_.input.string()) +
                     ": this export holds no Coq scripts (the claim was not established, or the "
                     "target was not asked for)");
    }
    if (project == scripts_.end()) return;
    project_ = read_coq_project(project->second, (options_.input / "coq/_CoqProject").string());
    for (const std::string& file : project_.files) {
      if (!scripts_.contains(file) && problems_.empty()) {
        problems_.push_back("coq/" + file + " is not in record.json");
      }
    }
    look_at_scripts();
  }

  void check_folder(const fs::path& record) const {
    const std::string shown = claim::printable(options_.input.string());
    std::error_code code;
    const fs::file_status status = fs::status(options_.input, code);
    if (!fs::exists(status)) throw Unusable(shown + ": no such folder");
    if (!fs::is_directory(status)) {
      throw Unusable(shown + ": not a folder; `replay` takes the folder that `export` wrote");
    }
    if (fs::status(record, code).type() == fs::file_type::not_found) {
      throw Unusable(shown + ": not a folder written by `export`: it has no record.json");
    }
  }

  void read_listed(const ListedFile& file) {
    std::string text;
    try {
      text = read_whole_file(options_.input / file.path, kFileBytes);
    } catch (const Unusable& reason) {
      problems_.push_back(std::string("listed in record.json, but ") + reason.what());
      return;
    }
    if (writers::sha256(text) != file.sha256) {
      problems_.push_back(file.path +
                          " is not the file that record.json describes (SHA-256 differs)");
      return;
    }
    if (file.path.starts_with(kCoqFolder)) {
      scripts_[file.path.substr(kCoqFolder.size())] = std::move(text);
    }
  }

  void look_at_scripts() {
    for (const auto& [name, text] : scripts_) {
      if (!name.ends_with(".v")) continue;
      const std::string command = reaching_command(text);
      if (!command.empty()) {
        problems_.push_back(
            fmt::format("coq/{} contains `{}`, which no export does", name, command));
      }
    }
    const auto statement = scripts_.find("Statement.v");
    if (statement != scripts_.end() &&
        statement->second != writers::embedded_template("coq/Statement.v")) {
      notes_.emplace_back(
          "Statement.v is not that of this version; what the theorem says has to be "
          "read in it");
    }
  }

  Status with_tools(const CoqTools& tools) {
    const TemporaryFolder folder;
    for (const std::string& file : project_.files) {
      const fs::path place = folder.path() / file;
      fs::create_directories(place.parent_path());
      writers::FileSink().write(place, scripts_.at(file));
    }
    CoqLimits limits;
    limits.jobs =
        options_.jobs > 0 ? options_.jobs : std::max(1U, std::thread::hardware_concurrency());
    limits.memory = options_.memory_limit;
    limits.seconds = options_.time_limit;
    Progress progress;
    version(tools, folder.path(), limits);
    CoqRun run(
        tools, project_, folder.path(), limits,
        [&progress](const std::string& what) { progress.show(what); },
        [this, &progress](const CoqStep& step) {
          progress.clear();
          finished(step);
        });
    if (!run.compile()) return failed_;
    return checked(run);
  }

  void version(const CoqTools& tools, const fs::path& folder, const CoqLimits& limits) {
    const ChildResult result = run_child({tools.compiler,
                                          {"--version"},
                                          folder,
                                          folder / "version.output",
                                          limits.memory,
                                          limits.seconds});
    version_ = claim::printable(result.output.substr(0, result.output.find('\n')));
    say(version_ + "\n");
  }

  // Ended by the system, which says nothing of the script.
  [[nodiscard]] static bool ended_early(const ChildResult& result) {
    return result.signal != 0 || result.output.find("Out of memory") != std::string::npos;
  }

  [[nodiscard]] static std::string_view word_for(const ChildResult& result) {
    if (result.succeeded()) return "";
    if (result.timed_out) return "stopped at its time limit";
    return ended_early(result) ? "ended early" : "FAILED";
  }

  void finished(const CoqStep& step) {
    const std::string_view word = word_for(step.result);
    say(fmt::format("{:8.2f} s  {:<6}  {}{}{}\n", step.result.seconds, step.tool, step.name,
                    word.empty() ? "" : "  ", word));
    steps_.push_back({{"tool", step.tool},
                      {"name", step.name},
                      {"seconds", step.result.seconds},
                      {"accepted", step.result.succeeded()}});
    if (step.result.succeeded()) return;
    if (step.result.timed_out) {
      problems_.push_back(step.name + ": time limit reached; a larger --time-limit may settle it");
      failed_ = Status::undecided;
    } else if (ended_early(step.result)) {
      problems_.push_back(fmt::format("{}: {} ended by itself (memory limit, or signal {})",
                                      step.name, step.tool, step.result.signal));
      failed_ = Status::undecided;
    } else {
      problems_.push_back(fmt::format("{} does not accept {}:\n{}", step.tool, step.name,
                                      shown(step.result.output)));
      failed_ = Status::refuted;
    }
  }

  [[nodiscard]] static std::string shown(const std::string& output) {
    std::string out;
    for (std::size_t at = 0; at < std::min(output.size(), kOutputShown);) {
      const std::size_t end = std::min(output.find('\n', at), output.size());
      out += "    " + claim::printable(output.substr(at, end - at)) + "\n";
      at = end + 1;
    }
    return out;
  }

  Status checked(CoqRun& run) {
    const CoqStep step = run.check(project_.module(project_.claim_file()));
    if (!step.result.succeeded()) return failed_;
    assumptions_ = assumptions_in_summary(step.result.output);
    if (assumptions_.empty()) {
      say("no axioms under the theorem\n");
      return Status::established;
    }
    for (const std::string& assumption : assumptions_) {
      problems_.push_back("the theorem rests on " + claim::printable(assumption));
    }
    return Status::refuted;
  }

  Status conclude(Status status) {
    write_run_record(status);
    for (const std::string& note : notes_) cli::say(fmt::format("sumwright: note: {}\n", note));
    for (const std::string& problem : problems_) cli::say(fmt::format("sumwright: {}\n", problem));
    static constexpr std::string_view words[] = {"accepted", "refused", "", "undecided"};
    const std::string word(words[static_cast<std::size_t>(status)]);
    if (options_.json) {
      print_result(outcome(status).dump(2, ' ', false, Json::error_handler_t::replace) + "\n");
    } else {
      print_result(word + "\n");
    }
    return status;
  }

  [[nodiscard]] Json outcome(Status status) const {
    return {{"time", utc_now()},
            {"assistant", version_},
            {"host", host_json()},
            {"steps", steps_},
            {"assumptions", assumptions_},
            {"problems", problems_},
            {"notes", notes_},
            {"exit_status", static_cast<int>(status)}};
  }

  void write_run_record(Status status) const {
    const fs::path path = options_.input / "run.json";
    std::error_code code;
    const std::string old = fs::exists(path, code) ? read_whole_file(path, kFileBytes) : "";
    write_single_file(path, with_replay(old, outcome(status)));
  }

  const Options& options_;
  std::map<std::string, std::string> scripts_;  // below coq/
  CoqProject project_;
  std::string version_;
  Json steps_ = Json::array();
  std::vector<std::string> assumptions_;
  std::vector<std::string> problems_;
  std::vector<std::string> notes_;
  Status failed_ = Status::refuted;
};

}  // namespace

Status replay(const Options& options) { return Replay(options).run(); }

}  // namespace sumwright::cli
