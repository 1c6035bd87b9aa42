// The Coq tools over one project: compilation in the order of dependencies, then the checker.
#pragma once

#include <filesystem>
#include <functional>
#include <map>
#include <string>
#include <vector>

#include "algebra/limits.hpp"
#include "cli/child.hpp"
#include "cli/coq_project.hpp"

namespace sumwright::cli {

/// The tools found on this machine.
struct CoqTools {
  std::filesystem::path compiler;  ///< coqc
  std::filesystem::path checker;   ///< coqchk
  std::filesystem::path sorter;    ///< coqdep
  std::string version;             ///< the first line that coqc --version prints
};

/// Nothing when one of them is missing; `missing` then names it.
[[nodiscard]] std::optional<CoqTools> find_coq_tools(std::string& missing);

struct CoqLimits {
  unsigned jobs = 1;
  std::uint64_t memory = 0;  ///< bytes of each process
  double seconds = 0;        ///< of all together
};

/// One script or module gone through one tool.
struct CoqStep {
  std::string tool;  ///< "coqc", "coqchk"
  std::string name;  ///< the script or module
  ChildResult result;
};

/// Called as each step ends.
using CoqStepDone = std::function<void(const CoqStep&)>;
/// Called as each step starts, with what is being run.
using CoqStepStart = std::function<void(const std::string&)>;

/// Runs over a project whose files stand in `folder`, which takes the products as well. The clock
/// starts with the object.
class CoqRun {
 public:
  CoqRun(const CoqTools& tools, const CoqProject& project, std::filesystem::path folder,
         const CoqLimits& limits, CoqStepStart start, CoqStepDone done);

  /// Compiles every script after those that it needs; stops at the first that fails. Gives whether
  /// all were accepted. Throws Unusable when coqdep cannot order them, algebra::TimeUp on
  /// interruption.
  [[nodiscard]] bool compile();

  /// Checks one module with all it depends on.
  [[nodiscard]] CoqStep check(const std::string& module);

 private:
  [[nodiscard]] ChildRequest request(const std::filesystem::path& program,
                                     std::vector<std::string> arguments,
                                     const std::string& output) const;
  [[nodiscard]] std::vector<std::string> ready() const;
  void start_some();
  [[nodiscard]] bool collect();

  struct Running {
    std::string file;
    std::unique_ptr<Child> child;
  };

  const CoqTools& tools_;
  const CoqProject& project_;
  std::filesystem::path folder_;
  CoqLimits limits_;
  CoqStepStart started_;
  CoqStepDone done_;
  std::chrono::steady_clock::time_point start_ = std::chrono::steady_clock::now();
  std::map<std::string, std::set<std::string>> needs_;
  std::set<std::string> begun_;
  std::set<std::string> finished_;
  std::vector<Running> running_;
};

}  // namespace sumwright::cli
