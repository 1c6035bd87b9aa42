// The files of templates/ that go into exports, compiled into the program by templates/embed.cmake.
#pragma once

#include <string_view>
#include <vector>

namespace sumwright::writers {

/// One file; `path` is relative to templates/, with '/' separators: `coq/Statement.v`.
struct EmbeddedTemplate {
  std::string_view path;
  std::string_view text;
};

/// All of them, sorted by path: coq/*.v, coq/_CoqProject, latex/*.
[[nodiscard]] const std::vector<EmbeddedTemplate>& embedded_templates();

/// The text of one; throws std::out_of_range when there is none of that path.
[[nodiscard]] std::string_view embedded_template(std::string_view path);

}  // namespace sumwright::writers
