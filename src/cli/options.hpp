// Commands and their options: one table for parsing, help and tests.
#pragma once

#include <cstdint>
#include <filesystem>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "cli/status.hpp"

namespace sumwright::cli {

/// What the arguments say.
struct Options {
  std::filesystem::path input;                 ///< CLAIM, OBLIGATIONS or DIR
  std::optional<std::filesystem::path> write;  ///< find
  std::filesystem::path out;                   ///< export
  std::vector<std::string> targets{"latex", "coq", "obligations"};
  std::string coq_prefix = "Sumwright";
  unsigned max_order = 8;
  double time_limit = 600;                               ///< seconds
  std::uint64_t memory_limit = std::uint64_t{4} << 30U;  ///< bytes
  unsigned jobs = 0;                                     ///< 0: as many as there are processors
  bool json = false;
};

/// One option.
struct OptionRow {
  std::string_view name;   ///< "--max-order"
  std::string_view value;  ///< what stands for the value in the help; empty for a flag
  std::string_view help;
  std::string_view commands;  ///< names of the commands that have it, separated by blanks
  bool required = false;
  /// Takes the value; gives what is wrong with it, empty when nothing is.
  std::string (*take)(Options& options, const std::string& text) = nullptr;
  std::string_view accepted;  ///< an example; empty for a flag
  std::string_view refused;   ///< an example; empty for a flag
};

[[nodiscard]] const std::vector<OptionRow>& option_rows();

/// One command.
struct CommandRow {
  std::string_view name;
  std::string_view argument;  ///< "CLAIM", "DIR"
  std::string_view argument_help;
  std::string_view help;
  Status (*run)(const Options& options) = nullptr;
};

[[nodiscard]] const std::vector<CommandRow>& command_rows();

/// The result of reading the arguments: a command to run, or an exit status because
/// everything was said already (help, version).
struct Arguments {
  const CommandRow* command = nullptr;
  Options options;
  int exit_status = 0;
};

/// Reads the arguments; help goes to stdout. Throws Unusable.
[[nodiscard]] Arguments read_arguments(int count, const char* const* arguments);

}  // namespace sumwright::cli
