// What the sources must look like: which stage may know which, sizes, first includes, openings.
#include <gtest/gtest.h>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <map>
#include <regex>
#include <set>
#include <sstream>
#include <string>
#include <vector>

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;

const fs::path kRoot = SUMWRIGHT_SOURCE_DIR;

// Who may include whom. proof/proof.hpp and proof/value.hpp are plain data without code: they are
// what the audit and the writers read.
const std::map<std::string, std::set<std::string>> kAllowed{
    {"claim", {}},
    {"algebra", {}},
    {"term", {"claim", "algebra", "proof/proof.hpp", "proof/value.hpp"}},
    {"search", {"algebra"}},
    {"proof", {"claim", "algebra", "term", "search"}},
    {"audit", {"claim", "proof/proof.hpp", "proof/value.hpp"}},
    {"writers", {"claim", "proof/proof.hpp", "proof/value.hpp"}},
    {"cli",
     {"claim", "proof/proof.hpp", "proof/value.hpp", "proof/build.hpp", "proof/closed_form.hpp",
      "audit/audit.hpp", "writers", "algebra/limits.hpp"}},
};

std::vector<std::string> lines_of(const fs::path& path) {
  std::ifstream in(path);
  EXPECT_TRUE(in.good()) << path;
  std::vector<std::string> out;
  for (std::string line; std::getline(in, line);) out.push_back(line);
  return out;
}

std::vector<fs::path> sources(const std::string& folder, const std::set<std::string>& extensions) {
  std::vector<fs::path> out;
  for (const auto& entry : fs::recursive_directory_iterator(kRoot / folder)) {
    if (extensions.contains(entry.path().extension().string())) out.push_back(entry.path());
  }
  std::sort(out.begin(), out.end());
  EXPECT_FALSE(out.empty()) << folder;
  return out;
}

std::vector<std::string> project_includes(const fs::path& path) {
  static const std::regex kInclude("^#include \"([^\"]+)\"");
  std::vector<std::string> out;
  for (const std::string& line : lines_of(path)) {
    std::smatch match;
    if (std::regex_search(line, match, kInclude)) out.push_back(match[1]);
  }
  return out;
}

TEST(Sources, IncludeOnlyWhatTheirStageMayKnow) {
  std::size_t edges = 0;
  for (const fs::path& path : sources("src", {".cpp", ".hpp"})) {
    const std::string stage = path.parent_path().filename();
    ASSERT_TRUE(kAllowed.contains(stage)) << "a folder that is not in the list: " << path;
    for (const std::string& include : project_includes(path)) {
      const std::string to = include.substr(0, include.find('/'));
      if (include.find('/') == std::string::npos) {
        EXPECT_EQ(include, "build_facts.hpp") << path;
        continue;
      }
      ++edges;
      if (to == stage) continue;
      EXPECT_TRUE(kAllowed.at(stage).contains(to) || kAllowed.at(stage).contains(include))
          << path << " may not include " << include;
    }
  }
  EXPECT_GT(edges, 100U);
}

// Libraries stay behind the one stage that is there to hide them.
TEST(Sources, LibrariesStayBehindTheirStage) {
  const std::map<std::string, std::set<std::string>> homes{{"<flint/", {"algebra", "search"}},
                                                           {"<toml++/", {"claim"}},
                                                           {"<ginac/", {"audit"}},
                                                           {"<cln/", {"audit"}},
                                                           {"<ppl.hh>", {"term"}},
                                                           {"<CLI/", {"cli"}},
                                                           {"<openssl/", {"writers"}}};
  std::set<std::string> seen;
  for (const fs::path& path : sources("src", {".cpp", ".hpp"})) {
    const std::string stage = path.parent_path().filename();
    for (const std::string& line : lines_of(path)) {
      if (!line.starts_with("#include <")) continue;
      for (const auto& [prefix, stages] : homes) {
        if (line.substr(9).starts_with(prefix)) {
          seen.insert(prefix);
          EXPECT_TRUE(stages.contains(stage)) << path << ": " << line;
        }
      }
    }
  }
  EXPECT_EQ(seen.size(), homes.size()) << "a library is used nowhere";
}

// A header that its .cpp includes first compiles alone; headers without one are compiled by
// themselves.
TEST(Sources, OwnHeaderComesFirst) {
  std::size_t checked = 0;
  for (const fs::path& path : sources("src", {".cpp"})) {
    fs::path header = path;
    header.replace_extension(".hpp");
    if (!fs::exists(header)) continue;
    const auto includes = project_includes(path);
    ASSERT_FALSE(includes.empty()) << path;
    EXPECT_EQ(includes[0], header.lexically_relative(kRoot / "src").string()) << path;
    for (const std::string& line : lines_of(path)) {
      if (!line.starts_with("#include")) continue;
      EXPECT_EQ(line.find('<'), std::string::npos)
          << path << ": another header comes before its own";
      break;
    }
    ++checked;
  }
  EXPECT_GT(checked, 30U);
}

TEST(Sources, NoFileIsTooLong) {
  for (const auto& [folder, most] :
       std::map<std::string, std::size_t>{{"src", 500}, {"templates", 500}, {"tests", 600}}) {
    for (const fs::path& path : sources(folder, {".cpp", ".hpp", ".v", ".py", ".cmake", ".sh"})) {
      EXPECT_LE(lines_of(path).size(), most) << path;
    }
  }
}

TEST(Sources, EveryFileOpensWithWhatItDoes) {
  for (const fs::path& path : sources("src", {".cpp", ".hpp"})) {
    const auto lines = lines_of(path);
    ASSERT_FALSE(lines.empty()) << path;
    EXPECT_TRUE(lines[0].starts_with("// ")) << path;
    if (path.extension() == ".hpp") {
      EXPECT_NE(std::find(lines.begin(), lines.end(), "#pragma once"), lines.end()) << path;
    }
  }
}

// Nothing outside cli/ ends the process.
TEST(Sources, OnlyTheProgramExits) {
  static const std::regex kExit("\\b(std::)?(exit|_exit|_Exit|quick_exit|abort|terminate)\\s*\\(");
  for (const fs::path& path : sources("src", {".cpp", ".hpp"})) {
    if (path.parent_path().filename() == "cli") continue;
    for (const std::string& line : lines_of(path)) {
      const std::string code = line.substr(0, line.find("//"));
      EXPECT_FALSE(std::regex_search(code, kExit)) << path << ": " << line;
    }
  }
}

// No path of a developer's machine, no tab, no line that ends in blanks.
TEST(Sources, PlainText) {
  static const std::vector<std::string> kForbidden{
      std::string("/wo") + "rk/", std::string("/tm") + "p/", std::string("/ho") + "me/"};
  for (const std::string folder : {"src", "tests", "templates", "exemplars"}) {
    for (const fs::path& path :
         sources(folder, {".cpp", ".hpp", ".v", ".py", ".cmake", ".sh", ".toml", ".txt"})) {
      for (const std::string& line : lines_of(path)) {
        for (const std::string& text : kForbidden) {
          EXPECT_EQ(line.find(text), std::string::npos) << path << ": " << line;
        }
        EXPECT_EQ(line.find('\t'), std::string::npos) << path << ": " << line;
        // In obligation files an empty line of the claim is a bar and a blank.
        EXPECT_FALSE(line.ends_with(" ") && line != "| ") << path << ": " << line;
      }
    }
  }
}

// Every script and source is named as a test where it is one.
TEST(Sources, UnitTestsAreNamedForSources) {
  for (const auto& entry : fs::directory_iterator(kRoot / "tests/unit")) {
    EXPECT_TRUE(kAllowed.contains(entry.path().filename().string())) << entry.path();
  }
}

}  // namespace
}  // namespace sumwright::testing
