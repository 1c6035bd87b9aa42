// README as a script: every `$ sumwright ...` in it is run, and prints what README shows.
#include <gtest/gtest.h>

#include <regex>

#include "cli/options.hpp"
#include "program.hpp"
#include "writers/embedded.hpp"
#include "writers/sha256.hpp"

namespace sumwright::testing {
namespace {

namespace fs = std::filesystem;

struct Step {
  std::vector<std::string> words;  // of the command
  std::vector<std::string> shown;  // the output as README has it; `...` stands for any lines
};

std::string readme() { return read_file(std::string(SUMWRIGHT_SOURCE_DIR) + "/README.md"); }

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

std::vector<std::string> words_of(const std::string& text) {
  std::vector<std::string> out;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find(' ', at), text.size());
    if (end > at) out.push_back(text.substr(at, end - at));
    at = end + 1;
  }
  return out;
}

std::vector<Step> steps() {
  std::vector<Step> out;
  bool inside = false;
  for (const std::string& line : lines_of(readme())) {
    if (line.starts_with("```")) {
      inside = line == "```console";
    } else if (inside && line.starts_with("$ ")) {
      out.push_back({words_of(line.substr(2)), {}});
    } else if (inside && !out.empty()) {
      out.back().shown.push_back(line);
    }
  }
  return out;
}

// Seconds differ from run to run; sizes and counts of cases change with every improvement.
std::string without_numbers(const std::string& line) {
  static const std::regex kTime("^ *[0-9]+\\.[0-9]+ s ");
  static const std::regex kCount(" +[0-9]+ (bytes|checks|cases)");
  return std::regex_replace(std::regex_replace(line, kTime, "TIME "), kCount, " N $1");
}

// Whether the lines match the pattern, in which `...` matches any number of lines.
bool matches(const std::vector<std::string>& pattern, std::size_t p,
             const std::vector<std::string>& lines, std::size_t at) {
  if (p == pattern.size()) return at == lines.size();
  if (pattern[p] == "...") {
    for (std::size_t next = at; next <= lines.size(); ++next) {
      if (matches(pattern, p + 1, lines, next)) return true;
    }
    return false;
  }
  return at < lines.size() && without_numbers(pattern[p]) == without_numbers(lines[at]) &&
         matches(pattern, p + 1, lines, at + 1);
}

TEST(Readme, WalkShowsWhatIsPrinted) {
  const TestFolder folder;
  fs::create_directory_symlink(std::string(SUMWRIGHT_SOURCE_DIR) + "/exemplars",
                               folder.path() / "exemplars");
  std::size_t run = 0;
  for (const Step& step : steps()) {
    if (step.words.empty() || step.words[0] != "sumwright") continue;
    if (step.words[1] == "replay") continue;  // Coq itself: tests/end_to_end
    ++run;
    const Outcome outcome =
        folder.sumwright(std::vector<std::string>(step.words.begin() + 1, step.words.end()));
    std::string command;
    for (const std::string& word : step.words) command += word + " ";
    SCOPED_TRACE(command);
    EXPECT_EQ(outcome.status, 0) << outcome.err;
    EXPECT_TRUE(matches(step.shown, 0, lines_of(outcome.out), 0)) << "README differs; printed:\n"
                                                                  << outcome.out;
  }
  EXPECT_GE(run, 4U);
}

TEST(Readme, NamesEveryCommandAndOption) {
  const std::string text = readme();
  for (const cli::CommandRow& row : cli::command_rows()) {
    EXPECT_NE(text.find("sumwright " + std::string(row.name)), std::string::npos) << row.name;
  }
  for (const cli::OptionRow& row : cli::option_rows()) {
    EXPECT_NE(text.find(row.name), std::string::npos) << row.name;
  }
}

TEST(Readme, NamesNoOptionThatIsNotThere) {
  const std::string text = readme();
  static const std::regex kOption("`(--[a-z-]+)");
  for (std::sregex_iterator at(text.begin(), text.end(), kOption); at != std::sregex_iterator();
       ++at) {
    const std::string name = (*at)[1];
    bool known = name == "--help" || name == "--version";
    for (const cli::OptionRow& row : cli::option_rows()) known = known || row.name == name;
    EXPECT_TRUE(known) << name;
  }
}

TEST(Readme, HasTheHashOfTheVocabulary) {
  EXPECT_NE(readme().find(writers::sha256(writers::embedded_template("coq/Statement.v"))),
            std::string::npos)
      << "SHA-256 of templates/coq/Statement.v";
}

}  // namespace
}  // namespace sumwright::testing
