// Writing a set of files below a folder so that an interruption leaves nothing half written.
#pragma once

#include <filesystem>
#include <stdexcept>
#include <string>
#include <vector>

#include "writers/writers.hpp"

namespace sumwright::writers {

/// The files could not be written; what() names the file and the reason.
class OutputError : public std::runtime_error {
 public:
  using std::runtime_error::runtime_error;
};

/// How a file's bytes reach the disk. Tests put one in front that fails.
class FileSink {
 public:
  virtual ~FileSink() = default;
  /// Creates `path` (which must not exist), writes, synchronises and closes it. Throws OutputError.
  virtual void write(const std::filesystem::path& path, const std::string& text);
};

/// Writes all files below `folder`, which is created if it is not there (its parent must exist).
///
/// Everything is written to a hidden folder first, each file synchronised and closed; only then are
/// the files moved to their places, one atomic rename each, in the order given. The hidden folder
/// stands in `folder` when that exists (it may be a volume of its own, below a parent that cannot
/// be written), else beside it. When something fails before the moves, no file below `folder` has
/// changed and none is left; the hidden folder is removed also when an exception passes. Existing
/// files of the same names are replaced; others are not touched.
///
/// Refused with OutputError: paths that are empty, absolute, or have `.`, `..` or empty parts; two
/// files of the same path; symbolic links at `folder`, at a folder below it or at a file's place;
/// anything but a regular file there.
void write_folder(const std::filesystem::path& folder, const std::vector<NamedText>& files);
void write_folder(const std::filesystem::path& folder, const std::vector<NamedText>& files,
                  FileSink& sink);

}  // namespace sumwright::writers
