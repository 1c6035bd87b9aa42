// From cells to lines within the width of a terminal.
#include "cli/table.hpp"

#include <algorithm>

#include "claim/text.hpp"

namespace sumwright::cli {

namespace {

constexpr std::size_t kLabelWidth = 14;
constexpr std::size_t kLineWidth = 80;

[[nodiscard]] std::size_t columns(std::string_view text) {
  return static_cast<std::size_t>(std::count_if(text.begin(), text.end(), [](char c) {
    return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U;
  }));
}

// The bytes of the first `count` characters.
[[nodiscard]] std::size_t bytes_of(std::string_view text, std::size_t count) {
  std::size_t at = 0;
  while (at < text.size() && count-- > 0) at += claim::decode(text, at).length;
  return at;
}

[[nodiscard]] std::vector<std::string_view> words(std::string_view text, std::size_t width) {
  std::vector<std::string_view> out;
  for (std::size_t at = 0; at < text.size();) {
    if (text[at] == ' ' || text[at] == '\n') {
      ++at;
      continue;
    }
    const std::size_t end = std::min(text.find_first_of(" \n", at), text.size());
    const std::size_t length = std::min(end - at, bytes_of(text.substr(at), width));
    out.push_back(text.substr(at, length));
    at += length;
  }
  return out;
}

}  // namespace

std::vector<std::string> wrapped(std::string_view text, std::size_t width) {
  std::vector<std::string> lines(1);
  for (const std::string_view word : words(text, width)) {
    if (!lines.back().empty() && columns(lines.back()) + 1 + columns(word) > width) {
      lines.emplace_back();
    }
    if (!lines.back().empty()) lines.back() += ' ';
    lines.back() += word;
  }
  return lines;
}

std::string table(const std::vector<std::size_t>& widths,
                  const std::vector<std::vector<std::string>>& rows) {
  std::string out;
  for (const std::vector<std::string>& row : rows) {
    std::vector<std::vector<std::string>> cells;
    std::size_t height = 0;
    for (std::size_t i = 0; i < row.size(); ++i) {
      cells.push_back(wrapped(row[i], widths[i]));
      height = std::max(height, cells.back().size());
    }
    for (std::size_t line = 0; line < height; ++line) {
      std::string text;
      for (std::size_t i = 0; i < cells.size(); ++i) {
        const std::string cell = line < cells[i].size() ? cells[i][line] : "";
        text += cell + std::string(widths[i] - std::min(widths[i], columns(cell)) + 2, ' ');
      }
      text.erase(text.find_last_not_of(' ') + 1);
      out += text + "\n";
    }
  }
  return out;
}

std::string labelled(std::string_view label, std::string_view text) {
  return table({kLabelWidth - 2, kLineWidth - kLabelWidth},
               {{std::string(label), std::string(text)}});
}

}  // namespace sumwright::cli
