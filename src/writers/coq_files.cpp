// The folder coq/: the support library as embedded, _CoqProject, and the generated files.

#include <fmt/format.h>

#include "writers/embedded.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

constexpr std::string_view library_prefix = "Sumwright";

/// The files of templates/coq/_CoqProject, in its order.
std::vector<std::string> library_files() {
  const std::string_view project = embedded_template("coq/_CoqProject");
  std::vector<std::string> out;
  std::string line;
  for (const char ch : project) {
    if (ch != '\n') {
      line += ch;
      continue;
    }
    if (line.ends_with(".v")) out.push_back(line);
    line.clear();
  }
  return out;
}

}  // namespace

std::vector<NamedText> coq_files(const proof::Proof& proof, const std::string& prefix) {
  const bool own = prefix != library_prefix;
  const std::string folder = own ? prefix + "/" : "";
  std::string project = fmt::format("-Q . {}\n", library_prefix);
  if (own) project += fmt::format("-Q {} {}\n", prefix, prefix);
  std::vector<NamedText> out;
  for (const std::string& file : library_files()) {
    project += file + "\n";
    out.push_back({"coq/" + file, std::string(embedded_template("coq/" + file))});
  }
  project += folder + "Claim.v\n";
  out.push_back({"coq/" + folder + "Claim.v", coq_claim_text(proof)});
  for (NamedText& file : coq_corollaries(proof, prefix)) {
    project += folder + file.path + "\n";
    out.push_back({"coq/" + folder + file.path, std::move(file.text)});
  }
  out.insert(out.begin(), {"coq/_CoqProject", project});
  return out;
}

}  // namespace sumwright::writers
