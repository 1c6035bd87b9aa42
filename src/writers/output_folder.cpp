// From named texts to files: staged in a hidden folder, then moved into place.
//
// Invariant: a file below the output folder is either as it was or complete and synchronised.
// Places are looked up without following symbolic links (openat, O_NOFOLLOW), so that a link
// planted below the folder cannot lead a write elsewhere.
#include "writers/output_folder.hpp"

#include <fcntl.h>
#include <fmt/format.h>
#include <sys/stat.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <cstring>
#include <set>

#include "claim/text.hpp"

namespace sumwright::writers {

namespace {

namespace fs = std::filesystem;

[[noreturn]] void fail(const std::string& path, int code) {
  throw OutputError(fmt::format("{}: {}", claim::printable(path), std::strerror(code)));
}
[[noreturn]] void fail(const std::string& path, const std::string& reason) {
  throw OutputError(fmt::format("{}: {}", claim::printable(path), reason));
}

/// A file descriptor that is closed at the end.
class Descriptor {
 public:
  explicit Descriptor(int value) : value_(value) {}
  Descriptor(const Descriptor&) = delete;
  Descriptor& operator=(const Descriptor&) = delete;
  Descriptor(Descriptor&& other) noexcept : value_(other.value_) { other.value_ = -1; }
  Descriptor& operator=(Descriptor&& other) noexcept {
    std::swap(value_, other.value_);
    return *this;
  }
  ~Descriptor() {
    if (value_ >= 0) ::close(value_);
  }
  [[nodiscard]] int get() const { return value_; }
  /// Closes now; the error code, 0 when there is none.
  [[nodiscard]] int close() {
    const int result = ::close(value_);
    value_ = -1;
    return result == 0 ? 0 : errno;
  }

 private:
  int value_;
};

[[nodiscard]] std::vector<std::string> parts_of(const std::string& path) {
  std::vector<std::string> parts;
  std::size_t at = 0;
  while (true) {
    const std::size_t end = std::min(path.find('/', at), path.size());
    parts.push_back(path.substr(at, end - at));
    if (end == path.size()) break;
    at = end + 1;
  }
  for (const std::string& part : parts) {
    if (part.empty() || part == "." || part == ".." || part.find('\0') != std::string::npos) {
      fail(path, "not a relative path below the output folder");
    }
  }
  return parts;
}

void check_paths(const std::vector<NamedText>& files) {
  std::set<std::string> seen;
  std::set<std::string> folders;
  for (const NamedText& file : files) {
    const auto parts = parts_of(file.path);
    if (!seen.insert(file.path).second) fail(file.path, "given twice");
    std::string folder;
    for (std::size_t i = 0; i + 1 < parts.size(); ++i) {
      folder += (i == 0 ? "" : "/") + parts[i];
      folders.insert(folder);
    }
  }
  for (const std::string& folder : folders) {
    if (seen.contains(folder)) fail(folder, "is a file and a folder at once");
  }
}

[[nodiscard]] Descriptor open_folder(int parent, const std::string& name,
                                     const std::string& shown) {
  const int fd = ::openat(parent, name.c_str(), O_RDONLY | O_DIRECTORY | O_NOFOLLOW | O_CLOEXEC);
  if (fd < 0) {
    const bool link = errno == ELOOP || errno == ENOTDIR;
    if (link) fail(shown, "not a folder (symbolic links are not followed)");
    fail(shown, errno);
  }
  return Descriptor(fd);
}

[[nodiscard]] Descriptor make_folder(int parent, const std::string& name,
                                     const std::string& shown) {
  if (::mkdirat(parent, name.c_str(), 0777) != 0 && errno != EEXIST) fail(shown, errno);
  return open_folder(parent, name, shown);
}

[[nodiscard]] bool exists(int parent, const std::string& name) {
  struct stat status {};
  return ::fstatat(parent, name.c_str(), &status, AT_SYMLINK_NOFOLLOW) == 0;
}

// What stands at a file's place must be nothing or a regular file.
void check_target(int parent, const std::string& name, const std::string& shown) {
  struct stat status {};
  if (::fstatat(parent, name.c_str(), &status, AT_SYMLINK_NOFOLLOW) != 0) {
    if (errno != ENOENT) fail(shown, errno);
    return;
  }
  if (!S_ISREG(status.st_mode)) fail(shown, "exists and is not a regular file");
}

/// The hidden folder; removed with what is left in it.
class Stage {
 public:
  Stage(const fs::path& parent, const std::string& name) {
    std::string pattern = (parent / ("." + name + ".part-XXXXXX")).string();
    if (::mkdtemp(pattern.data()) == nullptr) fail(parent.string(), errno);
    path_ = pattern;
  }
  Stage(const Stage&) = delete;
  Stage& operator=(const Stage&) = delete;
  ~Stage() {
    std::error_code ignored;  // nothing can be done about it here
    fs::remove_all(path_, ignored);
  }
  [[nodiscard]] const fs::path& path() const { return path_; }

 private:
  fs::path path_;
};

// Follows or makes the folders of a file below `root`; the last part is left.
[[nodiscard]] Descriptor descend(int root, const std::vector<std::string>& parts,
                                 const std::string& shown, bool make) {
  Descriptor at(::dup(root));
  if (at.get() < 0) fail(shown, errno);
  for (std::size_t i = 0; i + 1 < parts.size(); ++i) {
    at = make ? make_folder(at.get(), parts[i], shown) : open_folder(at.get(), parts[i], shown);
  }
  return at;
}

void synchronise(int fd, const std::string& shown) {
  if (::fsync(fd) != 0 && errno != EINVAL && errno != EROFS) fail(shown, errno);
}

// The entry of a folder that was made. Where its parent may be written but not read, the system has
// to do without.
void synchronise_folder(const fs::path& path) {
  const Descriptor folder(::open(path.c_str(), O_RDONLY | O_DIRECTORY | O_CLOEXEC));
  if (folder.get() >= 0) synchronise(folder.get(), path.string());
}

void write_all(int fd, const std::string& text, const std::string& shown) {
  std::size_t done = 0;
  while (done < text.size()) {
    const ssize_t written = ::write(fd, text.data() + done, text.size() - done);
    if (written < 0) {
      if (errno == EINTR) continue;
      fail(shown, errno);
    }
    done += static_cast<std::size_t>(written);
  }
}

}  // namespace

void FileSink::write(const fs::path& path, const std::string& text) {
  const std::string shown = path.filename().string();
  Descriptor file(::open(path.c_str(), O_WRONLY | O_CREAT | O_EXCL | O_NOFOLLOW | O_CLOEXEC, 0666));
  if (file.get() < 0) fail(shown, errno);
  write_all(file.get(), text, shown);
  synchronise(file.get(), shown);
  if (const int code = file.close(); code != 0) fail(shown, code);
}

void write_folder(const fs::path& folder, const std::vector<NamedText>& files) {
  FileSink sink;
  write_folder(folder, files, sink);
}

void write_folder(const fs::path& folder, const std::vector<NamedText>& files, FileSink& sink) {
  check_paths(files);
  fs::path target = fs::absolute(folder).lexically_normal();
  if (!target.has_filename()) target = target.parent_path();
  const std::string name = target.filename().string();
  if (name.empty()) fail(folder.string(), "not a folder that can be made");
  const Descriptor parent(::open(target.parent_path().c_str(), O_PATH | O_DIRECTORY | O_CLOEXEC));
  if (parent.get() < 0) fail(target.parent_path().string(), errno);

  const bool there = exists(parent.get(), name);
  Descriptor root(-1);
  if (there) root = open_folder(parent.get(), name, target.string());
  const Stage stage(there ? target : target.parent_path(), there ? "sumwright" : name);
  for (const NamedText& file : files) {
    const fs::path path = stage.path() / file.path;
    std::error_code code;
    fs::create_directories(path.parent_path(), code);
    if (code) fail(file.path, code.message());
    sink.write(path, file.text);
  }

  if (!there) root = make_folder(parent.get(), name, target.string());
  const Descriptor staged = open_folder(there ? root.get() : parent.get(),
                                        stage.path().filename().string(), stage.path().string());
  std::vector<std::pair<Descriptor, Descriptor>> places;  // all checked before the first move
  for (const NamedText& file : files) {
    const auto parts = parts_of(file.path);
    places.emplace_back(descend(staged.get(), parts, file.path, false),
                        descend(root.get(), parts, file.path, true));
    check_target(places.back().second.get(), parts.back(), file.path);
  }
  for (std::size_t i = 0; i < files.size(); ++i) {
    const std::string last = parts_of(files[i].path).back();
    if (::renameat(places[i].first.get(), last.c_str(), places[i].second.get(), last.c_str()) !=
        0) {
      fail(files[i].path, errno);
    }
  }
  for (const auto& place : places) synchronise(place.second.get(), target.string());
  if (!there) synchronise_folder(target.parent_path());
}

}  // namespace sumwright::writers
