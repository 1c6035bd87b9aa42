// From a place in a text to the message that shows it.
//
// Bytes in, lines, columns and windows of at most 80 columns out. Work per message is
// bounded by the line's start and the window, however long the line is.
#include "claim/source.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";
constexpr std::size_t kColumns = 80;
constexpr std::size_t kBefore = 50;  // columns shown before the caret of a long line
constexpr std::string_view kIndent = "  ";
constexpr std::string_view kCut = "...";

[[nodiscard]] std::size_t text_start(std::string_view text) {
  return text.starts_with(kByteOrderMark) ? kByteOrderMark.size() : 0;
}

[[nodiscard]] std::size_t line_start(std::string_view text, std::size_t offset) {
  const std::size_t start = text_start(text);
  if (offset <= start) return start;
  const std::size_t newline = text.rfind('\n', offset - 1);
  return newline == std::string_view::npos ? start : std::max(start, newline + 1);
}

[[nodiscard]] std::size_t line_end(std::string_view text, std::size_t offset) {
  std::size_t end = text.find('\n', offset);
  if (end == std::string_view::npos) return text.size();
  if (end > line_start(text, offset) && text[end - 1] == '\r') --end;
  return end;
}

// Columns that a piece of text takes once printed. Wide characters are counted as one.
[[nodiscard]] std::size_t width_of(std::string_view shown) {
  return static_cast<std::size_t>(std::count_if(shown.begin(), shown.end(), [](char c) {
    return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U;
  }));
}

[[nodiscard]] std::string shown_character(std::string_view line, std::size_t offset,
                                          std::size_t* length) {
  const Character character = decode(line, offset);
  *length = character.length;
  if (line[offset] == '\t') return " ";
  return printable(line.substr(offset, character.length));
}

// The start of the character that ends just before `offset`.
[[nodiscard]] std::size_t previous_character(std::string_view line, std::size_t offset) {
  for (std::size_t back = 1; back <= 4 && back <= offset; ++back) {
    const Character character = decode(line, offset - back);
    if (character.valid && character.length == back) return offset - back;
  }
  return offset - 1;
}

struct Window {
  std::string before;  // printable text left of the caret
  std::string marked;  // under the caret
  std::string after;
};

// The part of `line` around [begin, end) that fits; `end` may be past the line's end.
[[nodiscard]] Window window_around(std::string_view line, std::size_t begin, std::size_t end) {
  const std::size_t room = kColumns - kIndent.size() - kCut.size();
  Window window;
  std::size_t start = begin;
  std::size_t used = 0;
  while (start > 0 && used < kBefore) {
    const std::size_t previous = previous_character(line, start);
    std::size_t length = 0;
    const std::string shown = shown_character(line, previous, &length);
    window.before.insert(0, shown);
    used += width_of(shown);
    start = previous;
  }
  if (start > 0) {
    window.before.insert(0, kCut);
    used += kCut.size();
  }
  std::size_t offset = begin;
  while (offset < line.size()) {
    std::size_t length = 0;
    const std::string shown = shown_character(line, offset, &length);
    if (used + width_of(shown) > room) break;
    (offset < end ? window.marked : window.after) += shown;
    used += width_of(shown);
    offset += length;
  }
  if (offset < line.size()) window.after += kCut;
  return window;
}

[[nodiscard]] std::string underline(const Window& window) {
  std::string out(width_of(window.before), ' ');
  out += '^';
  const std::size_t marked = width_of(window.marked);
  if (marked > 1) out.append(marked - 1, '~');
  return out;
}

void append_notes(std::string& out, std::string_view note) {
  while (!note.empty()) {
    const std::size_t end = std::min(note.find('\n'), note.size());
    if (end > 0) out += fmt::format("\nnote: {}", printable(note.substr(0, end)));
    note.remove_prefix(std::min(end + 1, note.size()));
  }
}

}  // namespace

Source::Position Source::position(std::size_t offset) const {
  const std::string_view view = text;
  offset = std::min(offset, view.size());
  const std::size_t start = line_start(view, offset);
  Position result;
  result.line += static_cast<std::size_t>(
      std::count(view.begin(), view.begin() + static_cast<std::ptrdiff_t>(start), '\n'));
  for (std::size_t at = start; at < offset; ++result.column) at += decode(view, at).length;
  return result;
}

std::string_view Source::line(std::size_t offset) const {
  const std::string_view view = text;
  const std::size_t start = line_start(view, std::min(offset, view.size()));
  return view.substr(start, line_end(view, start) - start);
}

std::string render(const Source& source, Place place, std::string_view severity,
                   std::string_view message, std::string_view note) {
  const Source::Position position = source.position(place.offset);
  const std::string_view line = source.line(place.offset);
  const std::size_t start = line_start(source.text, std::min(place.offset, source.text.size()));
  const std::size_t begin = std::min(std::max(place.offset, start) - start, line.size());
  const std::size_t end = begin + std::min(place.length, line.size() - begin);
  const Window window = window_around(line, begin, end);
  std::string out = fmt::format("{}:{}:{}: {}: {}\n", printable(source.name), position.line,
                                position.column, severity, printable(message));
  out += fmt::format("{}{}{}{}\n", kIndent, window.before, window.marked, window.after);
  out += fmt::format("{}{}", kIndent, underline(window));
  append_notes(out, note);
  return out;
}

InputError::InputError(const Source& source, Place place, std::string_view message,
                       std::string_view note)
    : std::runtime_error(render(source, place, "error", message, note)),
      parts_(std::make_shared<const Parts>(Parts{source.name, source.position(place.offset),
                                                 std::string(message), std::string(note)})) {}

InputError::InputError(const std::string& file, const std::string& message)
    : std::runtime_error(fmt::format("{}: error: {}", printable(file), printable(message))),
      parts_(std::make_shared<const Parts>(Parts{file, {0, 0}, message, ""})) {}

}  // namespace sumwright::claim
