// From the first bytes of a file to its kind.
#include "cli/input_file.hpp"

#include <string_view>

#include "claim/regular_file.hpp"
#include "writers/obligations_document.hpp"

namespace sumwright::cli {

bool is_obligations_file(const std::filesystem::path& path) {
  constexpr std::string_view mark = "\xEF\xBB\xBF";
  const std::string start = claim::read_regular_file(path, 100);
  std::string_view text = start;
  if (text.starts_with(mark)) text.remove_prefix(mark.size());
  return text.starts_with(writers::kObligationsTitle);
}

}  // namespace sumwright::cli
