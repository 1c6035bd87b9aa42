// From an exception's parts to one JSON object.
#include "cli/failure.hpp"

#include <algorithm>
#include <nlohmann/json.hpp>

#include "claim/text.hpp"

namespace sumwright::cli {

namespace {

using Json = nlohmann::ordered_json;

[[nodiscard]] std::string text_of(const Json& json) {
  return json.dump(2, ' ', false, Json::error_handler_t::replace) + "\n";
}

// The lines of a note: the one with a suggestion apart, the others joined.
void add_note(Json& out, std::string_view note) {
  std::string expected;
  while (!note.empty()) {
    const std::size_t end = std::min(note.find('\n'), note.size());
    const std::string_view line = note.substr(0, end);
    if (const auto word = claim::suggested(line)) {
      out["suggestion"] = *word;
    } else if (!line.empty()) {
      expected += (expected.empty() ? "" : "; ") + std::string(line);
    }
    note.remove_prefix(std::min(end + 1, note.size()));
  }
  if (!expected.empty()) out["expected"] = expected;
}

}  // namespace

std::string failure_json(Status status, const std::string& message) {
  if (status == Status::undecided) {
    return text_of(
        {{"verdict", "undecided"}, {"reason", message}, {"exit_status", static_cast<int>(status)}});
  }
  return text_of({{"verdict", status == Status::fault ? "fault" : "refused"},
                  {"message", message},
                  {"exit_status", static_cast<int>(status)}});
}

std::string failure_json(const claim::InputError::Parts& parts) {
  Json out = {{"verdict", "refused"}, {"file", parts.file}};
  if (parts.position.line > 0) {
    out["line"] = parts.position.line;
    out["column"] = parts.position.column;
  }
  out["message"] = parts.message;
  add_note(out, parts.note);
  out["exit_status"] = static_cast<int>(Status::unusable);
  return text_of(out);
}

}  // namespace sumwright::cli
