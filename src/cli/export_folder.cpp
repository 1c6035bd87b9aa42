// What is known of an export folder from its record.json.
//
// Invariant: nothing outside the folder is read or removed; paths of a record are checked, and
// symbolic links are not followed.
#include "cli/export_folder.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <nlohmann/json.hpp>
#include <optional>

#include "claim/text.hpp"
#include "cli/output.hpp"
#include "cli/single_file.hpp"
#include "cli/status.hpp"
#include "writers/output_folder.hpp"
#include "writers/sha256.hpp"

namespace sumwright::cli {

namespace {

namespace fs = std::filesystem;
using Json = nlohmann::json;

constexpr const char* kRecordName = "record.json";
constexpr const char* kRunName = "run.json";
constexpr std::size_t kRecordBytes = std::size_t{16} << 20U;
constexpr std::size_t kFileBytes = std::size_t{256} << 20U;

[[nodiscard]] bool is_inside(const std::string& path) {
  const fs::path parts(path);
  return !path.empty() && parts.is_relative() && path.find('\0') == std::string::npos &&
         std::all_of(parts.begin(), parts.end(), [](const fs::path& part) {
           return !part.empty() && part != "." && part != "..";
         });
}

// Whether `path` below `folder` is a regular file reached without symbolic links.
[[nodiscard]] bool is_plain_file(const fs::path& folder, const fs::path& path) {
  fs::path at = folder;
  std::error_code code;
  for (const fs::path& part : path) {
    at /= part;
    if (fs::is_symlink(fs::symlink_status(at, code))) return false;
  }
  return fs::is_regular_file(at, code);
}

// Removes what an earlier export wrote at `file.path`, unless it was changed since.
void remove_stale(const fs::path& folder, const ListedFile& file) {
  if (!is_plain_file(folder, file.path)) return;
  const fs::path path = folder / file.path;
  if (writers::sha256(read_whole_file(path, kFileBytes)) != file.sha256) {
    say(
        fmt::format("sumwright: warning: {} is of an earlier export and was changed by hand; "
                    "it does not belong to this one\n",
                    claim::printable(path.string())));
    return;
  }
  std::error_code code;
  fs::remove(path, code);
  if (code) {
    throw writers::OutputError(
        fmt::format("{}: {}", claim::printable(path.string()), code.message()));
  }
  fs::remove(path.parent_path(), code);  // succeeds only when the folder is empty
}

// What the record of an earlier export lists; nothing when the folder has no record of Sumwright.
[[nodiscard]] std::optional<std::vector<ListedFile>> earlier_export(const fs::path& folder) {
  if (!is_plain_file(folder, kRecordName)) return std::nullopt;
  const fs::path record = folder / kRecordName;
  const std::string text = read_whole_file(record, kRecordBytes);
  const Json json = Json::parse(text, nullptr, false);
  const bool own = json.is_object() && json.contains("tool") && json["tool"].is_object() &&
                   json["tool"].value("name", Json()) == "Sumwright";
  if (!own) return std::nullopt;
  try {
    return listed_files(text, record.string());
  } catch (const Unusable&) {
    return std::nullopt;  // not as Sumwright writes it
  }
}

// Whether the file at `path` is one that exports write and replace; run.json is not listed, as it
// changes with every replay.
[[nodiscard]] bool is_known(const std::optional<std::vector<ListedFile>>& earlier,
                            const std::string& path) {
  if (!earlier) return false;
  return path == kRecordName || path == kRunName ||
         std::any_of(earlier->begin(), earlier->end(),
                     [&](const ListedFile& file) { return file.path == path; });
}

}  // namespace

std::vector<ListedFile> listed_files(const std::string& record, const std::string& name) {
  const Json json = Json::parse(record, nullptr, false);
  const auto refuse = [&](const std::string& what) -> void {
    throw Unusable(fmt::format("{}: {}", claim::printable(name), what));
  };
  if (!json.is_object() || !json.contains("files") || !json["files"].is_array()) {
    refuse("not a record of an export");
  }
  std::vector<ListedFile> out;
  for (const Json& file : json["files"]) {
    const bool good = file.is_object() && file.contains("path") && file["path"].is_string() &&
                      file.contains("sha256") && file["sha256"].is_string();
    if (!good) refuse("a listed file without path or sha256");
    out.push_back({file["path"].get<std::string>(), file["sha256"].get<std::string>()});
    if (!is_inside(out.back().path)) {
      refuse(
          fmt::format("lists {}, which is outside the export", claim::in_quotes(out.back().path)));
    }
  }
  return out;
}

void check_export_folder(const fs::path& folder) {
  std::error_code code;
  const fs::path whole = fs::absolute(folder).lexically_normal();
  const fs::path parent = (whole.has_filename() ? whole : whole.parent_path()).parent_path();
  if (!fs::is_directory(parent, code)) {
    throw Unusable(claim::printable(parent.string()) + ": no such folder");
  }
  if (fs::exists(whole, code) && !fs::is_directory(whole, code)) {
    throw Unusable(claim::printable(folder.string()) + ": exists and is not a folder");
  }
}

void check_nothing_is_lost(const fs::path& folder, const std::vector<std::string>& paths) {
  const std::optional<std::vector<ListedFile>> earlier = earlier_export(folder);
  for (const std::string& path : paths) {
    if (is_known(earlier, path)) continue;
    std::error_code code;
    if (!fs::exists(fs::symlink_status(folder / path, code))) continue;
    throw Unusable(fmt::format(
        "{}: exists and is not from an earlier export; move it away, or choose another --out",
        claim::printable((folder / path).string())));
  }
}

void write_export(const fs::path& folder, std::vector<writers::NamedText> files) {
  std::vector<std::string> paths;
  for (const writers::NamedText& file : files) paths.push_back(file.path);
  check_nothing_is_lost(folder, paths);
  const std::vector<ListedFile> stale = earlier_export(folder).value_or(std::vector<ListedFile>());
  // The record first: whatever a power cut leaves is listed in it, and can be replaced.
  std::stable_partition(files.begin(), files.end(),
                        [](const writers::NamedText& file) { return file.path == kRecordName; });
  writers::write_folder(folder, files);
  for (const ListedFile& file : stale) {
    const bool written = std::any_of(files.begin(), files.end(), [&](const writers::NamedText& f) {
      return f.path == file.path;
    });
    if (!written) remove_stale(folder, file);
  }
}

}  // namespace sumwright::cli
