// The folder of an export: what an earlier run left there, and what a new one puts there.
#pragma once

#include <filesystem>
#include <string>
#include <vector>

#include "writers/writers.hpp"

namespace sumwright::cli {

/// One file as record.json lists it.
struct ListedFile {
  std::string path;
  std::string sha256;
};

/// The files of a record.json. Throws Unusable when the text is not a record, or lists paths that
/// leave the folder.
[[nodiscard]] std::vector<ListedFile> listed_files(const std::string& record,
                                                   const std::string& name);

/// Refuses a folder whose parent does not exist, or that is not a folder. Throws Unusable.
void check_export_folder(const std::filesystem::path& folder);

/// Refuses to replace what no export wrote: a file at one of the paths that the folder's
/// record.json, if it is one of Sumwright, does not list. Throws Unusable.
void check_nothing_is_lost(const std::filesystem::path& folder,
                           const std::vector<std::string>& paths);

/// Writes the files, after check_nothing_is_lost; then removes those that an earlier export wrote,
/// that are unchanged since, and that this one does not write: an old theorem must not stand beside
/// a new verdict. What was changed by hand stays, with a warning on stderr. Throws
/// writers::OutputError and Unusable.
void write_export(const std::filesystem::path& folder, std::vector<writers::NamedText> files);

}  // namespace sumwright::cli
