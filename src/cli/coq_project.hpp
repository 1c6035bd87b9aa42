// What an exported _CoqProject says, and what its scripts may contain.
#pragma once

#include <map>
#include <set>
#include <string>
#include <string_view>
#include <vector>

namespace sumwright::cli {

/// A project: load-path options and scripts.
struct CoqProject {
  std::vector<std::string> load_path;            ///< `-Q FOLDER NAME`..., ready to be arguments
  std::map<std::string, std::string> libraries;  ///< folder (`.` or a plain name) -> logical name
  std::vector<std::string> files;  ///< `Name.v` or `Folder/Name.v`, in the order listed

  /// The file called Claim.v, in whichever folder; empty when there is none.
  [[nodiscard]] std::string claim_file() const;
  /// The logical name of the module of a script of the project.
  [[nodiscard]] std::string module(const std::string& file) const;
};

/// Reads a _CoqProject as exports have it: `-Q FOLDER NAME` lines and file names; anything else
/// could pass options to the assistant or lead out of the folder, and is refused. Throws Unusable.
[[nodiscard]] CoqProject read_coq_project(const std::string& text, const std::string& name);

/// A command in a script that would reach beyond the proof (write files, load plugins, change
/// folders); empty when there is none. Comments and strings are skipped.
[[nodiscard]] std::string reaching_command(std::string_view script);

/// Which scripts each script needs, from the output of coqdep. Only scripts of the project count.
[[nodiscard]] std::map<std::string, std::set<std::string>> dependencies(
    const std::string& coqdep_output, const CoqProject& project);

/// The `Axioms` and the other entries of a context summary of coqchk that are not `<none>`:
/// `Axioms: X`. Throws Unusable when the text is no summary.
[[nodiscard]] std::vector<std::string> assumptions_in_summary(const std::string& coqchk_output);

}  // namespace sumwright::cli
