// From a folder of scripts to what Coq says of them.
//
// Invariant: a script is started only when all scripts that it requires have been accepted.
#include "cli/coq_run.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <thread>

#include "claim/text.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

namespace {

constexpr double kShortSeconds = 30;

}  // namespace

std::optional<CoqTools> find_coq_tools(std::string& missing) {
  CoqTools out;
  for (const auto& [name, place] :
       {std::pair<std::string, std::filesystem::path*>{"coqc", &out.compiler},
        {"coqchk", &out.checker},
        {"coqdep", &out.sorter}}) {
    const auto found = find_program(name);
    if (!found) {
      missing = name;
      return std::nullopt;
    }
    *place = *found;
  }
  return out;
}

CoqRun::CoqRun(const CoqTools& tools, const CoqProject& project, std::filesystem::path folder,
               const CoqLimits& limits, CoqStepStart start, CoqStepDone done)
    : tools_(tools),
      project_(project),
      folder_(std::move(folder)),
      limits_(limits),
      started_(std::move(start)),
      done_(std::move(done)) {}

ChildRequest CoqRun::request(const std::filesystem::path& program,
                             std::vector<std::string> arguments, const std::string& output) const {
  const double spent =
      std::chrono::duration<double>(std::chrono::steady_clock::now() - start_).count();
  ChildRequest out;
  out.program = program;
  out.arguments = std::move(arguments);
  out.folder = folder_;
  out.output = folder_ / output;
  out.memory_limit = limits_.memory;
  out.seconds = std::max(0.0, limits_.seconds - spent);
  return out;
}

std::vector<std::string> CoqRun::ready() const {
  std::vector<std::string> out;
  for (const std::string& file : project_.files) {
    const std::set<std::string>& needed = needs_.at(file);
    if (!begun_.contains(file) &&
        std::includes(finished_.begin(), finished_.end(), needed.begin(), needed.end())) {
      out.push_back(file);
    }
  }
  return out;
}

void CoqRun::start_some() {
  for (const std::string& file : ready()) {
    if (running_.size() >= limits_.jobs) return;
    std::vector<std::string> arguments{"-q"};
    arguments.insert(arguments.end(), project_.load_path.begin(), project_.load_path.end());
    arguments.push_back(file);
    begun_.insert(file);
    started_("coqc " + file);
    running_.push_back(
        {file, std::make_unique<Child>(request(tools_.compiler, arguments, file + ".output"))});
  }
}

// Takes the results of what has ended; gives whether all of it was accepted.
bool CoqRun::collect() {
  bool good = true;
  for (Running& running : running_) {
    std::optional<ChildResult> result = running.child->poll();
    if (!result) continue;
    running.child.reset();
    good = good && result->succeeded();
    if (result->succeeded()) finished_.insert(running.file);
    done_({"coqc", running.file, *std::move(result)});
  }
  std::erase_if(running_, [](const Running& running) { return running.child == nullptr; });
  return good;
}

bool CoqRun::compile() {
  std::vector<std::string> arguments = project_.load_path;
  arguments.insert(arguments.end(), project_.files.begin(), project_.files.end());
  started_("coqdep");
  ChildRequest sort = request(tools_.sorter, arguments, "coqdep.output");
  sort.seconds = std::min(sort.seconds, kShortSeconds);
  const ChildResult sorted = run_child(sort);
  if (!sorted.succeeded()) {
    throw Unusable("coqdep cannot order the scripts: " + claim::printable(sorted.output));
  }
  needs_ = dependencies(sorted.output, project_);
  while (finished_.size() < project_.files.size()) {
    start_some();
    if (running_.empty()) throw Unusable("the scripts require each other in a circle");
    if (!collect()) {
      running_.clear();
      return false;
    }
    algebra::Deadline().check();  // throws when interrupted
    std::this_thread::sleep_for(std::chrono::milliseconds(5));
  }
  return true;
}

CoqStep CoqRun::check(const std::string& module) {
  std::vector<std::string> arguments{"-silent", "-o"};
  arguments.insert(arguments.end(), project_.load_path.begin(), project_.load_path.end());
  arguments.push_back(module);
  started_("coqchk " + module);
  CoqStep out{"coqchk", module, run_child(request(tools_.checker, arguments, "coqchk.output"))};
  done_(out);
  return out;
}

}  // namespace sumwright::cli
