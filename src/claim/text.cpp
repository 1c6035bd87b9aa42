// Functions on untrusted text, for messages that are safe to print.
//
// Invariant: whatever bytes come in, what `printable` gives is valid UTF-8 without
// control characters, so a file cannot drive the terminal that shows its faults.
#include "claim/text.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <array>

namespace sumwright::claim {

namespace {

constexpr std::size_t kQuotedBytes = 60;
constexpr std::size_t kLongestWord = 40;
constexpr std::string_view kSuggestionStart = "did you mean ";
constexpr std::string_view kSuggestionEnd = "?";

[[nodiscard]] unsigned byte_at(std::string_view text, std::size_t offset) {
  return static_cast<unsigned char>(text[offset]);
}

void append_printable(std::string& out, std::string_view text, std::size_t offset,
                      const Character& character) {
  if (!character.valid) {
    out += fmt::format("\\x{:02x}", byte_at(text, offset));
  } else if (!is_unprintable(character.code)) {
    out += text.substr(offset, character.length);
  } else if (character.code < 0x80) {
    out += fmt::format("\\x{:02x}", static_cast<unsigned>(character.code));
  } else {
    out += fmt::format("\\u{{{:x}}}", static_cast<unsigned>(character.code));
  }
}

// Damerau-Levenshtein distance, restricted form (common practice).
[[nodiscard]] std::size_t edit_distance(std::string_view a, std::string_view b) {
  std::vector<std::size_t> before_last(b.size() + 1);
  std::vector<std::size_t> last(b.size() + 1);
  std::vector<std::size_t> row(b.size() + 1);
  for (std::size_t j = 0; j <= b.size(); ++j) last[j] = j;
  for (std::size_t i = 1; i <= a.size(); ++i) {
    row[0] = i;
    for (std::size_t j = 1; j <= b.size(); ++j) {
      const std::size_t replace = last[j - 1] + (a[i - 1] == b[j - 1] ? 0U : 1U);
      row[j] = std::min({last[j] + 1, row[j - 1] + 1, replace});
      if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1]) {
        row[j] = std::min(row[j], before_last[j - 2] + 1);
      }
    }
    std::swap(before_last, last);
    std::swap(last, row);
  }
  return last[b.size()];
}

[[nodiscard]] std::string joined(const std::vector<std::string>& names, std::string_view last) {
  std::string out;
  for (std::size_t i = 0; i < names.size(); ++i) {
    if (i > 0) out += i + 1 == names.size() ? last : ", ";
    out += in_quotes(names[i]);
  }
  return out;
}

}  // namespace

Character decode(std::string_view text, std::size_t offset) {
  const unsigned first = byte_at(text, offset);
  if (first < 0x80) return {static_cast<char32_t>(first), 1, true};
  std::size_t length = 0;
  if (first >= 0xC2 && first <= 0xDF) length = 2;
  if (first >= 0xE0 && first <= 0xEF) length = 3;
  if (first >= 0xF0 && first <= 0xF4) length = 4;
  if (length == 0 || text.size() - offset < length) return {0, 1, false};
  char32_t code = first & (0xFFU >> (length + 1));
  for (std::size_t i = 1; i < length; ++i) {
    const unsigned next = byte_at(text, offset + i);
    if ((next & 0xC0U) != 0x80U) return {0, 1, false};
    code = (code << 6U) | (next & 0x3FU);
  }
  constexpr std::array<char32_t, 5> smallest = {0, 0, 0x80, 0x800, 0x10000};
  const bool surrogate = code >= 0xD800 && code <= 0xDFFF;
  if (code < smallest.at(length) || code > 0x10FFFF || surrogate) return {0, 1, false};
  return {code, length, true};
}

std::optional<std::size_t> first_invalid_utf8(std::string_view text) {
  std::size_t offset = 0;
  while (offset < text.size()) {
    const Character character = decode(text, offset);
    if (!character.valid) return offset;
    offset += character.length;
  }
  return std::nullopt;
}

bool is_unprintable(char32_t code) {
  return code < 0x20 || (code >= 0x7F && code <= 0x9F) || code == 0xAD || code == 0x61C ||
         (code >= 0x200B && code <= 0x200F) || (code >= 0x2028 && code <= 0x202E) ||
         (code >= 0x2060 && code <= 0x206F) || code == 0xFEFF ||
         (code >= 0xFFF9 && code <= 0xFFFB) || (code >= 0xE0000 && code <= 0xE007F);
}

std::string printable(std::string_view text) {
  std::string out;
  for (std::size_t offset = 0; offset < text.size();) {
    const Character character = decode(text, offset);
    append_printable(out, text, offset, character);
    offset += character.length;
  }
  return out;
}

std::string in_quotes(std::string_view text) {
  std::string out = "'";
  for (std::size_t offset = 0; offset < text.size();) {
    if (out.size() > kQuotedBytes) {
      out += "...";
      break;
    }
    const Character character = decode(text, offset);
    append_printable(out, text, offset, character);
    offset += character.length;
  }
  return out + "'";
}

std::optional<std::string> nearest(std::string_view word,
                                   const std::vector<std::string>& candidates) {
  if (word.empty() || word.size() > kLongestWord) return std::nullopt;
  std::size_t best = std::max<std::size_t>(1, word.size() / 3) + 1;
  std::optional<std::string> found;
  for (const std::string& candidate : candidates) {
    if (candidate.size() > kLongestWord || candidate.size() <= 1) continue;
    const std::size_t distance = edit_distance(word, candidate);
    // A word of which nothing would be left is no near miss.
    if (distance < best && distance < std::max(word.size(), candidate.size())) {
      best = distance;
      found = candidate;
    }
  }
  return found;
}

std::string suggestion(std::string_view word, const std::vector<std::string>& candidates) {
  const auto found = nearest(word, candidates);
  return found ? did_you_mean(*found) : std::string();
}

std::string did_you_mean(std::string_view name) {
  return fmt::format("{}{}{}", kSuggestionStart, in_quotes(name), kSuggestionEnd);
}

std::optional<std::string> suggested(std::string_view note) {
  if (!note.starts_with(kSuggestionStart) || !note.ends_with(kSuggestionEnd)) return std::nullopt;
  note.remove_prefix(kSuggestionStart.size());
  note.remove_suffix(kSuggestionEnd.size());
  if (note.size() < 2 || note.front() != '\'' || note.back() != '\'') return std::nullopt;
  return std::string(note.substr(1, note.size() - 2));
}

std::string alternatives(const std::vector<std::string>& names) { return joined(names, " or "); }

std::string listing(const std::vector<std::string>& names) { return joined(names, " and "); }

}  // namespace sumwright::claim
