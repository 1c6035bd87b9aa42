// From keys and values to lines that the reader of obligations takes apart again.
//
// Invariant: every line but those of a block starts with a heading mark, a remark mark, a key or
// four blanks, whatever the values contain (templates/obligations.ebnf).
#include "writers/obligations_document.hpp"

#include "claim/text.hpp"

namespace sumwright::writers {

namespace {

// Columns taken once printed; wide characters are counted as one.
[[nodiscard]] std::size_t width(std::string_view text) {
  std::size_t columns = 0;
  for (const char c : text) {
    if ((static_cast<unsigned char>(c) & 0xC0U) != 0x80U) ++columns;
  }
  return columns;
}

// Where the word that starts at `at` ends: at a blank, but not inside brackets, unless they hold
// much.
[[nodiscard]] std::size_t word_end(std::string_view text, std::size_t at) {
  constexpr std::size_t kTogether = 50;
  int depth = 0;
  std::size_t first = text.size();
  for (std::size_t i = at; i < text.size(); ++i) {
    depth += text[i] == '(' ? 1 : text[i] == ')' ? -1 : 0;
    if (text[i] != ' ') continue;
    if (depth <= 0) return i - at <= kTogether ? i : std::min(first, i);
    first = std::min(first, i);
    if (i - at > kTogether) return first;
  }
  return text.size() - at <= kTogether ? text.size() : first;
}

}  // namespace

std::string single_spaced(std::string_view text) {
  std::string out;
  bool pending = false;
  for (const char c : text) {
    if (c == ' ') {
      pending = true;
      continue;
    }
    if (pending && !out.empty()) out += ' ';
    pending = false;
    out += c;
  }
  return out;
}

ObligationsDocument::ObligationsDocument() { text_ = std::string(kObligationsFirstLine) + "\n\n"; }

void ObligationsDocument::heading(std::string_view name) {
  std::string line = "== " + std::string(name) + " ";
  line.append(kObligationsColumns - line.size(), '=');
  text_ += "\n" + line + "\n\n";
}

void ObligationsDocument::blank() { text_ += '\n'; }

void ObligationsDocument::wrapped(std::string_view first, std::string_view rest_indent,
                                  std::string_view text) {
  std::string line(first);
  bool empty_line = true;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = word_end(text, at);
    const std::string_view word = text.substr(at, end - at);
    const std::size_t gap = empty_line ? 0 : 1;
    if (!empty_line && width(line) + gap + width(word) > kObligationsColumns) {
      text_ += line + "\n";
      line = rest_indent;
      empty_line = true;
    }
    if (!empty_line) line += ' ';
    line += word;
    empty_line = false;
    at = end + 1;
  }
  text_ += line + "\n";
}

void ObligationsDocument::remark(std::string_view text) {
  wrapped("# ", "# ", single_spaced(claim::printable(text)));
}

void ObligationsDocument::statement(std::string_view key, std::string_view value) {
  const std::string text = single_spaced(claim::printable(value));
  wrapped(std::string(key) + ": ", "    ", text.empty() ? "none" : text);
}

void ObligationsDocument::definition(std::string_view key, std::string_view value) {
  const std::string text = single_spaced(claim::printable(value));
  wrapped(std::string(key) + " = ", "    ", text.empty() ? "none" : text);
}

void ObligationsDocument::block(std::string_view text) {
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    text_ += "| ";
    text_ += text.substr(at, end - at);
    text_ += '\n';
    at = end + 1;
  }
}

}  // namespace sumwright::writers
