// What the documents promise: places that exist, a hash that is right, every command and option.
#include <gtest/gtest.h>

#include <algorithm>
#include <filesystem>
#include <fstream>
#include <iterator>
#include <regex>
#include <set>
#include <string>
#include <vector>

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;

const fs::path kRoot = SUMWRIGHT_SOURCE_DIR;

std::string text_of(const fs::path& path) {
  std::ifstream in(path, std::ios::binary);
  EXPECT_TRUE(in.good()) << path;
  return {std::istreambuf_iterator<char>(in), std::istreambuf_iterator<char>()};
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> out;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    out.push_back(text.substr(at, end - at));
    at = end + 1;
  }
  return out;
}

std::string section(const std::string& document, const std::string& heading) {
  const std::size_t at = document.find("\n## " + heading + "\n");
  EXPECT_NE(at, std::string::npos) << "no section " << heading;
  if (at == std::string::npos) return "";
  return document.substr(at, document.find("\n## ", at + 4) - at);
}

// | what | `file` | `function` | : the function is defined in the file.
TEST(Developers, TableOfPlacesIsRight) {
  static const std::regex kRow("^\\| ([^|]+) \\| `([^`]+)` \\| `([^`]+)` \\|$");
  const std::string table = section(text_of(kRoot / "DEVELOPERS.md"), "Where things happen");
  std::size_t rows = 0;
  for (const std::string& line : lines_of(table)) {
    std::smatch match;
    if (!std::regex_match(line, match, kRow)) continue;
    ++rows;
    const fs::path file = kRoot / match[2].str();
    ASSERT_TRUE(fs::exists(file)) << line;
    // A definition starts a line at its left edge and is no declaration.
    const std::regex definition("^[^ /].*[^A-Za-z0-9_]" + match[3].str() + "\\(.*[^;]$");
    bool defined = false;
    for (const std::string& source : lines_of(text_of(file))) {
      defined = defined || std::regex_search(source, definition);
    }
    EXPECT_TRUE(defined) << line;
  }
  EXPECT_GE(rows, 10U);
  EXPECT_LE(rows, 20U);
}

TEST(Documents, PathsThatAreNamedExist) {
  static const std::regex kPath("`((src|tests|templates|exemplars|\\.ci)/[A-Za-z0-9_./-]*)`");
  for (const std::string name : {"README.md", "DEVELOPERS.md"}) {
    const std::string text = text_of(kRoot / name);
    std::size_t found = 0;
    for (std::sregex_iterator at(text.begin(), text.end(), kPath); at != std::sregex_iterator();
         ++at) {
      ++found;
      EXPECT_TRUE(fs::exists(kRoot / (*at)[1].str())) << name << ": " << (*at)[1];
    }
    EXPECT_GT(found, 0U) << name;
  }
}

TEST(Documents, LinksLeadSomewhere) {
  static const std::regex kLink("\\]\\(([^)#:]+)\\)");
  for (const std::string name : {"README.md", "DEVELOPERS.md"}) {
    const std::string text = text_of(kRoot / name);
    for (std::sregex_iterator at(text.begin(), text.end(), kLink); at != std::sregex_iterator();
         ++at) {
      EXPECT_TRUE(fs::exists(kRoot / (*at)[1].str())) << name << ": " << (*at)[1];
    }
  }
}

// Generated files and the support library carry a licence of their own.
TEST(Licences, SupportLibrarySaysSo) {
  std::size_t files = 0;
  for (const auto& entry : fs::directory_iterator(kRoot / "templates/coq")) {
    if (entry.path().extension() != ".v") continue;
    ++files;
    EXPECT_NE(text_of(entry.path()).substr(0, 600).find("SPDX-License-Identifier: "),
              std::string::npos)
        << entry.path();
  }
  EXPECT_GT(files, 5U);
}

}  // namespace
}  // namespace sumwright::testing
