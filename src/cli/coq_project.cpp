// Texts of the Coq tools, from and for `replay`.
//
// Invariant: a form that is not known is refused, never guessed at: a summary that cannot be read
// is not a summary without axioms.
#include "cli/coq_project.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>
#include <sstream>

#include "claim/text.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

namespace {

[[nodiscard]] bool is_word(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || (c >= '0' && c <= '9') || c == '_' ||
         c == '\'' || (static_cast<unsigned char>(c) & 0x80U) != 0;
}

[[nodiscard]] bool is_name(const std::string& text) {
  return !text.empty() && text[0] >= 'A' && text[0] <= 'z' &&
         std::all_of(text.begin(), text.end(), [](char c) { return is_word(c) && c != '\''; });
}

// The folder and the name of a script: `.` and the whole when it has no folder.
[[nodiscard]] std::pair<std::string, std::string> split(const std::string& file) {
  const std::size_t slash = file.find('/');
  if (slash == std::string::npos) return {".", file};
  return {file.substr(0, slash), file.substr(slash + 1)};
}

[[nodiscard]] bool is_script(const std::string& text) {
  const auto [folder, name] = split(text);
  return (folder == "." || is_name(folder)) && name.size() > 2 && name.ends_with(".v") &&
         is_name(name.substr(0, name.size() - 2));
}

// The script's words outside comments, with `"` for each string.
[[nodiscard]] std::vector<std::string> words_of(std::string_view script) {
  std::vector<std::string> out;
  std::size_t depth = 0;
  for (std::size_t at = 0; at < script.size();) {
    if (script.substr(at).starts_with("(*")) {
      ++depth;
      at += 2;
    } else if (depth > 0 && script.substr(at).starts_with("*)")) {
      --depth;
      at += 2;
    } else if (script[at] == '"') {
      at = std::min(script.find('"', at + 1), script.size() - 1) + 1;
      if (depth == 0) out.emplace_back("\"");
    } else if (depth == 0 && is_word(script[at])) {
      const std::size_t start = at;
      while (at < script.size() && is_word(script[at])) ++at;
      out.emplace_back(script.substr(start, at - start));
    } else {
      ++at;
    }
  }
  return out;
}

[[nodiscard]] std::vector<std::string> tokens(const std::string& text) {
  std::istringstream in(text);
  std::vector<std::string> out;
  for (std::string token; in >> token;) out.push_back(token);
  return out;
}

[[nodiscard]] std::string trimmed(const std::string& text) {
  const std::size_t begin = text.find_first_not_of(" \t\r");
  if (begin == std::string::npos) return "";
  return text.substr(begin, text.find_last_not_of(" \t\r") - begin + 1);
}

}  // namespace

std::string CoqProject::claim_file() const {
  for (const std::string& file : files) {
    if (split(file).second == "Claim.v") return file;
  }
  return "";
}

std::string CoqProject::module(const std::string& file) const {
  const auto [folder, name] = split(file);
  return libraries.at(folder) + "." + name.substr(0, name.size() - 2);
}

CoqProject read_coq_project(const std::string& text, const std::string& name) {
  CoqProject out;
  const auto refuse = [&](const std::string& token) {
    throw Unusable(fmt::format("{}: {} is not part of an exported project", claim::printable(name),
                               claim::in_quotes(token)));
  };
  const std::vector<std::string> words = tokens(text);
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (words[i] == "-Q" && i + 2 < words.size()) {
      const std::string& folder = words[i + 1];
      if (folder != "." && !is_name(folder)) refuse(folder);
      if (!is_name(words[i + 2])) refuse(words[i + 2]);
      out.load_path.insert(out.load_path.end(), {"-Q", folder, words[i + 2]});
      out.libraries[folder] = words[i + 2];
      i += 2;
    } else if (is_script(words[i])) {
      out.files.push_back(words[i]);
    } else {
      refuse(words[i]);
    }
  }
  for (const std::string& file : out.files) {
    if (!out.libraries.contains(split(file).first)) refuse(file);
  }
  if (out.claim_file().empty()) throw Unusable(claim::printable(name) + ": lists no Claim.v");
  return out;
}

std::string reaching_command(std::string_view script) {
  // Exports use none of the first at all; the others reach out when a path follows.
  static constexpr std::array<std::string_view, 2> kNever{"Redirect", "Extraction"};
  static constexpr std::array<std::string_view, 5> kWithPath{"Cd", "Load", "LoadPath", "Path",
                                                             "Verbose"};
  const std::vector<std::string> words = words_of(script);
  for (std::size_t i = 0; i < words.size(); ++i) {
    if (std::find(kNever.begin(), kNever.end(), words[i]) != kNever.end()) return words[i];
    if (i == 0) continue;
    const std::string& before = words[i - 1];
    if (words[i] == "ML" && (before == "Declare" || before == "Add")) return before + " ML";
    if (words[i] == "\"" &&
        std::find(kWithPath.begin(), kWithPath.end(), before) != kWithPath.end()) {
      return before + " \"...\"";
    }
  }
  return "";
}

std::map<std::string, std::set<std::string>> dependencies(const std::string& coqdep_output,
                                                          const CoqProject& project) {
  std::map<std::string, std::set<std::string>> out;
  for (const std::string& file : project.files) out[file];
  std::istringstream in(coqdep_output);
  for (std::string line; std::getline(in, line);) {
    const std::size_t colon = line.find(": ");
    if (colon == std::string::npos) continue;
    const std::vector<std::string> targets = tokens(line.substr(0, colon));
    if (targets.empty() || !targets[0].ends_with(".vo")) continue;
    const auto entry = out.find(targets[0].substr(0, targets[0].size() - 1));
    if (entry == out.end()) continue;
    for (const std::string& needed : tokens(line.substr(colon + 2))) {
      const std::string script = needed.substr(0, needed.size() - 1);
      if (needed.ends_with(".vo") && out.contains(script)) entry->second.insert(script);
    }
  }
  return out;
}

std::vector<std::string> assumptions_in_summary(const std::string& coqchk_output) {
  std::vector<std::string> out;
  std::string heading;
  std::size_t headings = 0;
  bool axioms_seen = false;
  std::istringstream in(
      coqchk_output.substr(std::min(coqchk_output.find("CONTEXT SUMMARY"), coqchk_output.size())));
  for (std::string line; std::getline(in, line);) {
    std::string text = trimmed(line);
    if (text.starts_with("* ")) {
      ++headings;
      const std::size_t colon = text.find(':');
      heading = text.substr(2, colon == std::string::npos ? colon : colon - 2);
      text = colon == std::string::npos ? "" : trimmed(text.substr(colon + 1));
      axioms_seen = axioms_seen || heading == "Axioms";
    } else if (headings == 0) {
      continue;
    }
    if (text.empty() || text == "<none>" || heading == "Theory") continue;
    out.push_back(heading + ": " + text);
  }
  if (!axioms_seen || headings < 4) throw Unusable("coqchk gave no summary of the context");
  return out;
}

}  // namespace sumwright::cli
