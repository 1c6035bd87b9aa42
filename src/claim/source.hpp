// A text from outside, and the messages that point into it.
#pragma once

#include <cstddef>
#include <memory>
#include <stdexcept>
#include <string>
#include <string_view>

#include "claim/expression.hpp"

namespace sumwright::claim {

/// A file's name and its bytes as read (byte-order mark included, if any).
struct Source {
  std::string name;
  std::string text;

  struct Position {
    std::size_t line = 1;    ///< from 1
    std::size_t column = 1;  ///< from 1, in Unicode characters
  };
  /// Where byte `offset` stands; offsets past the end are the end.
  [[nodiscard]] Position position(std::size_t offset) const;
  /// The whole line containing `offset`, without its line break.
  [[nodiscard]] std::string_view line(std::size_t offset) const;
};

/// `name:line:column: severity: message`, the line, a caret under the place
/// (long lines are windowed so that the caret stays within 80 columns), and `note: ...` lines.
/// Control characters of the source are shown escaped.
[[nodiscard]] std::string render(const Source& source, Place place, std::string_view severity,
                                 std::string_view message, std::string_view note = {});

/// The input cannot be used (exit status 2). what() is the rendered message.
class InputError : public std::runtime_error {
 public:
  /// The same in parts, for machines. Texts are as given, not made printable.
  struct Parts {
    std::string file;
    Source::Position position;  ///< line 0: the message is about the whole file
    std::string message;
    std::string note;
  };

  InputError(const Source& source, Place place, std::string_view message,
             std::string_view note = {});
  /// For faults without a place (file not readable): `file: error: message`.
  InputError(const std::string& file, const std::string& message);

  [[nodiscard]] const Parts& parts() const { return *parts_; }

 private:
  std::shared_ptr<const Parts> parts_;  // copies of an exception must not throw
};

}  // namespace sumwright::claim
