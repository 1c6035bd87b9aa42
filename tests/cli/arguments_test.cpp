// Arguments: every command and option of the tables, in the help, accepted and refused.
#include <gtest/gtest.h>

#include "cli/options.hpp"
#include "program.hpp"

namespace sumwright::testing {
namespace {

std::vector<std::string> words(std::string_view text) {
  std::vector<std::string> out;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find(' ', at), text.size());
    out.emplace_back(text.substr(at, end - at));
    at = end + 1;
  }
  return out;
}

TEST(Arguments, HelpNamesEveryCommand) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"--help"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.err, "");
  ASSERT_FALSE(cli::command_rows().empty());
  for (const cli::CommandRow& row : cli::command_rows()) {
    EXPECT_NE(outcome.out.find("\n  " + std::string(row.name) + " "), std::string::npos)
        << row.name;
    EXPECT_NE(outcome.out.find(row.help), std::string::npos) << row.name;
  }
  EXPECT_NE(outcome.out.find("Exit status: 0 established; 1 refuted; 2"), std::string::npos);
}

TEST(Arguments, HelpOfACommandNamesItsOptionsAndNoOthers) {
  const TestFolder folder;
  for (const cli::CommandRow& command : cli::command_rows()) {
    const Outcome outcome = folder.sumwright({std::string(command.name), "--help"});
    EXPECT_EQ(outcome.status, 0);
    for (const cli::OptionRow& row : cli::option_rows()) {
      bool has = false;
      for (const std::string& word : words(row.commands)) has = has || word == command.name;
      const bool shown = outcome.out.find("  " + std::string(row.name) + " ") != std::string::npos;
      EXPECT_EQ(shown, has) << command.name << " " << row.name << "\n" << outcome.out;
    }
  }
}

// The command's arguments that an option needs beside it.
std::vector<std::string> base(const std::string& command, const cli::OptionRow& option) {
  std::vector<std::string> out{command, "none.toml"};
  if (command == "export" && option.name != "--out") out.insert(out.end(), {"--out", "out"});
  return out;
}

TEST(Arguments, EveryOptionIsAcceptedAndRefused) {
  const TestFolder folder;
  std::size_t cases = 0;
  for (const cli::OptionRow& row : cli::option_rows()) {
    for (const std::string& command : words(row.commands)) {
      SCOPED_TRACE(command + " " + std::string(row.name));
      std::vector<std::string> good = base(command, row);
      good.emplace_back(row.name);
      if (!row.value.empty()) good.emplace_back(row.accepted);
      const Outcome accepted = folder.sumwright(good);
      EXPECT_EQ(accepted.status, 2);  // for the file that is not there
      EXPECT_NE(accepted.err.find("none.toml"), std::string::npos) << accepted.err;
      if (row.value.empty()) continue;
      std::vector<std::string> bad = base(command, row);
      bad.emplace_back(row.name);
      bad.emplace_back(row.refused);
      const Outcome refused = folder.sumwright(bad);
      EXPECT_EQ(refused.status, 2);
      EXPECT_EQ(refused.out, "");
      EXPECT_NE(refused.err.find(row.name), std::string::npos) << refused.err;
      EXPECT_EQ(refused.err.find("none.toml"), std::string::npos) << refused.err;
      ++cases;
    }
  }
  EXPECT_GE(cases, 10U);
  EXPECT_TRUE(folder.files().empty());
}

TEST(Arguments, Refusals) {
  const TestFolder folder;
  const struct {
    std::vector<std::string> arguments;
    std::string message;
  } cases[] = {
      {{}, "sumwright: a command is needed: 'find', 'check', 'export' or 'replay'"},
      {{"prove", "x.toml"}, "no command 'prove'; there are 'find', 'check', 'export' and 'replay'"},
      {{"chekc", "x.toml"}, "no command 'chekc'; did you mean 'check'?"},
      {{"check"}, "sumwright: check: FILE is required; `sumwright check --help` lists what"},
      {{"check", "a.toml", "b.toml"}, "b.toml"},
      {{"check", "a.toml", "--out", "x"}, "--out"},
      {{"export", "a.toml"}, "sumwright: export: --out is required"},
      {{"check", "a.toml", "--memory-limit", "1KiB"},
       "sumwright: check: --memory-limit: '1KiB': a size"},
      {{"check", "a.toml", "--memory-limit", "1KiB"}, "at least 64MiB"},
      {{"export", "a.toml", "--out", "x", "--as", "pdf"}, "no target 'pdf'"},
      {{"export", "a.toml", "--out", "x", "--coq-prefix", "a; rm"}, "a name is a letter"},
  };
  for (const auto& row : cases) {
    const Outcome outcome = folder.sumwright(row.arguments);
    EXPECT_EQ(outcome.status, 2) << row.message;
    EXPECT_EQ(outcome.out, "") << row.message;
    EXPECT_NE(outcome.err.find(row.message), std::string::npos)
        << "expected: " << row.message << "\n"
        << outcome.err;
  }
}

TEST(Arguments, Version) {
  const TestFolder folder;
  const Outcome outcome = folder.sumwright({"--version"});
  EXPECT_EQ(outcome.status, 0);
  EXPECT_EQ(outcome.out, "sumwright " SUMWRIGHT_VERSION "\n");
}

}  // namespace
}  // namespace sumwright::testing
