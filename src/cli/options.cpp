// From the command line to Options.
//
// Invariant: what the help offers is exactly what is accepted; both come from the two tables.
#include "cli/options.hpp"

#include <fmt/format.h>

#include <CLI/CLI.hpp>
#include <algorithm>
#include <charconv>
#include <cmath>
#include <map>
#include <memory>

#include "claim/text.hpp"
#include "cli/commands.hpp"

namespace sumwright::cli {

namespace {

template <typename Number>
[[nodiscard]] std::optional<Number> number(std::string_view text) {
  Number value{};
  const auto [end, code] = std::from_chars(text.data(), text.data() + text.size(), value);
  if (code != std::errc() || end != text.data() + text.size() || text.empty()) return std::nullopt;
  return value;
}

[[nodiscard]] std::string take_path(std::filesystem::path& path, const std::string& text) {
  if (text.empty()) return "an empty path";
  path = text;
  return "";
}

[[nodiscard]] std::string take_out(Options& options, const std::string& text) {
  return take_path(options.out, text);
}

[[nodiscard]] std::string take_write(Options& options, const std::string& text) {
  return take_path(options.write.emplace(), text);
}

[[nodiscard]] std::string take_targets(Options& options, const std::string& text) {
  static const std::vector<std::string> known{"latex", "coq", "obligations"};
  options.targets.clear();
  for (const std::string& target : CLI::detail::split(text, ',')) {
    if (std::find(known.begin(), known.end(), target) == known.end()) {
      return fmt::format("no target {}; there are {}", claim::in_quotes(target),
                         claim::alternatives(known));
    }
    options.targets.push_back(target);
  }
  return options.targets.empty() ? "no target" : "";
}

[[nodiscard]] std::string take_prefix(Options& options, const std::string& text) {
  const auto letter = [](char c) { return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z'); };
  const auto inner = [&](char c) { return letter(c) || (c >= '0' && c <= '9') || c == '_'; };
  if (text.empty() || text.size() > 60 || !letter(text[0]) ||
      !std::all_of(text.begin(), text.end(), inner)) {
    return "a name is a letter and up to 59 letters, digits or underscores";
  }
  options.coq_prefix = text;
  return "";
}

[[nodiscard]] std::string take_max_order(Options& options, const std::string& text) {
  const auto value = number<unsigned>(text);
  if (!value || *value > 100) return "an integer from 0 to 100 is needed";
  options.max_order = *value;
  return "";
}

[[nodiscard]] std::string take_time_limit(Options& options, const std::string& text) {
  const auto value = number<double>(text);
  if (!value || !std::isfinite(*value) || *value <= 0 || *value > 1e7) {
    return "a number of seconds above 0, at most 10000000, is needed";
  }
  options.time_limit = *value;
  return "";
}

[[nodiscard]] std::string take_memory_limit(Options& options, const std::string& text) {
  const std::size_t digits = std::min(text.find_first_not_of("0123456789"), text.size());
  static const std::map<std::string, unsigned> units{
      {"", 0}, {"KiB", 10}, {"MiB", 20}, {"GiB", 30}, {"TiB", 40}};
  const auto value = number<std::uint64_t>(text.substr(0, digits));
  const auto unit = units.find(text.substr(digits));
  if (!value || unit == units.end() || *value > (std::uint64_t{1} << 50U) >> unit->second ||
      *value << unit->second < std::uint64_t{64} << 20U) {
    return "a size such as 512MiB or 4GiB is needed, at least 64MiB";
  }
  options.memory_limit = *value << unit->second;
  return "";
}

[[nodiscard]] std::string take_jobs(Options& options, const std::string& text) {
  const auto value = number<unsigned>(text);
  if (!value || *value < 1 || *value > 1024) return "an integer from 1 to 1024 is needed";
  options.jobs = *value;
  return "";
}

[[nodiscard]] std::string take_json(Options& options, const std::string&) {
  options.json = true;
  return "";
}

constexpr std::string_view kEnd =
    "Exit status: 0 established; 1 refuted; 2 the input cannot be used; 3 undecided within the\n"
    "limits given; 4 a fault of Sumwright. Results go to stdout, everything else to stderr.";

void add_option(CLI::App& app, const OptionRow& row, Options& options) {
  const auto callback = [&row, &options](const std::string& text) {
    const std::string wrong = row.take(options, text);
    if (!wrong.empty()) {
      throw CLI::ValidationError(std::string(row.name),
                                 fmt::format("{}: {}", claim::in_quotes(text), wrong));
    }
  };
  if (row.value.empty()) {
    app.add_flag_callback(
        std::string(row.name), [callback] { callback(""); }, std::string(row.help));
    return;
  }
  app.add_option_function<std::string>(std::string(row.name), callback, std::string(row.help))
      ->type_name(std::string(row.value))
      ->required(row.required);
}

[[nodiscard]] bool has_command(const OptionRow& row, std::string_view command) {
  return (" " + std::string(row.commands) + " ").find(" " + std::string(command) + " ") !=
         std::string::npos;
}

[[nodiscard]] bool is_unknown_command(std::string_view word) {
  const auto& rows = command_rows();
  return !word.starts_with('-') &&
         std::none_of(rows.begin(), rows.end(),
                      [&](const CommandRow& row) { return row.name == word; });
}

[[nodiscard]] std::vector<std::string> command_names() {
  std::vector<std::string> names;
  for (const CommandRow& row : command_rows()) names.emplace_back(row.name);
  return names;
}

[[noreturn]] void refuse_command(const std::string& word) {
  const std::string hint = claim::suggestion(word, command_names());
  throw Unusable(fmt::format("no command {}; {}", claim::in_quotes(word),
                             hint.empty() ? "there are " + claim::listing(command_names()) : hint));
}

[[noreturn]] void refuse_arguments(int count, const char* const* arguments,
                                   const std::string& message) {
  const std::string command = count > 1 ? arguments[1] : "";
  if (command.empty() || command.starts_with('-')) {
    throw Unusable(fmt::format("a command is needed: {}; `sumwright --help` tells more",
                               claim::alternatives(command_names())));
  }
  throw Unusable(
      fmt::format("{}: {}; `sumwright {} --help` lists what it takes", command, message, command));
}

}  // namespace

const std::vector<OptionRow>& option_rows() {
  static const std::vector<OptionRow> rows{
      {"--write", "FILE", "write a copy of the claim with this evidence in it", "find", false,
       take_write, "copy.toml", ""},
      {"--out", "DIR", "the folder to write (its parent must exist)", "export", true, take_out,
       "out", ""},
      {"--as", "TARGETS", "targets, separated by commas [latex,coq,obligations]", "export", false,
       take_targets, "coq,obligations", "coq,html"},
      {"--coq-prefix", "NAME", "logical name of the exported Coq files [Sumwright]", "export",
       false, take_prefix, "DrawsFromLots", "no.dots"},
      {"--max-order", "N", "largest order of a recurrence to search for [8]", "find check export",
       false, take_max_order, "3", "-1"},
      {"--time-limit", "SECONDS", "stop after this time [600]", "find check export replay", false,
       take_time_limit, "60", "0"},
      {"--memory-limit", "SIZE", "stop at this much memory [4GiB]", "find check export replay",
       false, take_memory_limit, "1GiB", "4 potatoes"},
      {"--jobs", "N", "programs run at once [as many as processors]", "replay", false, take_jobs,
       "2", "0"},
      {"--json", "", "results as JSON", "find check export replay", false, take_json, "", ""},
  };
  return rows;
}

const std::vector<CommandRow>& command_rows() {
  static const std::vector<CommandRow> rows{
      {"find", "CLAIM", "a claim file", "find a recurrence for the claim's sum, and prove it",
       find},
      {"check", "FILE", "a claim file, or an obligation file from an export",
       "the verdict on a claim, with its side conditions", check},
      {"export", "CLAIM", "a claim file",
       "the verdict, and the proof as LaTeX, Coq and obligations", export_claim},
      {"replay", "DIR", "a folder that `export` wrote", "run Coq over an export", replay},
  };
  return rows;
}

Arguments read_arguments(int count, const char* const* arguments) {
  if (count > 1 && is_unknown_command(arguments[1])) refuse_command(arguments[1]);
  CLI::App app{"Sumwright proves summation identities and exports the proofs."};
  app.name("sumwright");
  app.set_version_flag("--version", "sumwright " SUMWRIGHT_VERSION);
  app.require_subcommand(1);
  app.footer(std::string(kEnd));
  Arguments out;
  std::string input;
  std::map<const CLI::App*, const CommandRow*> commands;
  for (const CommandRow& row : command_rows()) {
    CLI::App* command = app.add_subcommand(std::string(row.name), std::string(row.help));
    command->add_option(std::string(row.argument), input, std::string(row.argument_help))
        ->type_name("")
        ->required();
    for (const OptionRow& option : option_rows()) {
      if (has_command(option, row.name)) add_option(*command, option, out.options);
    }
    commands[command] = &row;
  }
  try {
    app.parse(count, arguments);
  } catch (const CLI::ParseError& error) {
    if (error.get_exit_code() != 0) refuse_arguments(count, arguments, error.what());
    out.exit_status = app.exit(error);  // prints help or version
    return out;
  }
  out.options.input = input;
  out.command = commands.at(app.get_subcommands().front());
  return out;
}

}  // namespace sumwright::cli
