// From TOML text to a tree of values with byte places, through toml++.
//
// toml++ counts lines and characters; every stage here counts bytes of the file. toml++ 3.3
// is given an ASCII text of bounded depth only (see check_toml_text): outside ASCII its tests for
// white space have undefined behaviour, and deep tables exhaust the stack.
#include "claim/document.hpp"

#include <fmt/format.h>

#include <stdexcept>

namespace sumwright::claim {

// Thrown where toml++ finds that it has lost its way.
struct TomlFault : std::logic_error {
  using std::logic_error::logic_error;
};

[[noreturn]] static void toml_fault(const char* condition) { throw TomlFault(condition); }

}  // namespace sumwright::claim

// Some damaged files reach assertions of toml++ 3.3. They must end neither in abort() nor, in
// release builds, in undefined behaviour, so assertions throw in every build. No other file
// may include toml++, which would define its inline functions a second time, differently.
#undef NDEBUG
#define TOML_ASSERT(expr) (static_cast<bool>(expr) ? void() : sumwright::claim::toml_fault(#expr))
#include <toml++/toml.h>

#include <algorithm>
#include <string_view>
#include <utility>

#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::string_view kByteOrderMark = "\xEF\xBB\xBF";

// Finds bytes by line and character. A mark at every kStride-th character of a line keeps a
// long line from being walked once for each value on it.
class LineIndex {
 public:
  explicit LineIndex(std::string_view text) : text_(text) {
    std::size_t at = text.starts_with(kByteOrderMark) ? kByteOrderMark.size() : 0;
    start_line(at);
    for (std::size_t character = 1; at < text.size(); ++character) {
      const bool newline = text[at] == '\n';
      at += decode(text, at).length;
      if (newline) {
        start_line(at);
        character = 0;
      } else if (character % kStride == 0) {
        marks_.push_back(at);
      }
    }
  }

  /// Behind the byte-order mark.
  [[nodiscard]] std::size_t start() const { return marks_[0]; }

  [[nodiscard]] std::size_t offset(toml::source_position position) const {
    if (position.line == 0) return marks_[0];
    if (position.line > lines_.size()) return text_.size();
    const std::size_t first = lines_[position.line - 1];
    const std::size_t behind =
        position.line < lines_.size() ? lines_[position.line] : marks_.size();
    const std::size_t skip = position.column > 0 ? position.column - 1 : 0;
    const std::size_t mark = std::min(first + skip / kStride, behind - 1);
    std::size_t at = marks_[mark];
    for (std::size_t left = skip - (mark - first) * kStride; left > 0 && at < text_.size();
         --left) {
      if (text_[at] == '\n') break;
      at += decode(text_, at).length;
    }
    return at;
  }

 private:
  static constexpr std::size_t kStride = 256;

  void start_line(std::size_t at) {
    lines_.push_back(marks_.size());
    marks_.push_back(at);
  }

  std::string_view text_;
  std::vector<std::size_t> lines_;  // index of the line's first mark
  std::vector<std::size_t> marks_;  // offset of every kStride-th character of a line
};

class Converter {
 public:
  explicit Converter(const Source& source) : source_(source), lines_(source.text) {}

  [[nodiscard]] std::size_t offset(toml::source_position position) const {
    return lines_.offset(position);
  }

  // The byte of the source that stands for byte `at` of its shadow.
  [[nodiscard]] std::size_t original(std::size_t at) const {
    std::size_t byte = lines_.start();
    for (; at > 0 && byte < source_.text.size(); --at) byte += decode(source_.text, byte).length;
    return byte;
  }

  [[nodiscard]] Place place(const toml::source_region& region) const {
    const std::size_t begin = offset(region.begin);
    const std::size_t end = offset(region.end);
    return {begin, end > begin ? end - begin : 0};
  }

  [[nodiscard]] Value value(const toml::node& node) const {
    Value out;
    out.place = place(node.source());
    if (const auto* table = node.as_table()) {
      out.kind = Value::Kind::table;
      fill_table(out, *table);
    } else if (const auto* array = node.as_array()) {
      out.kind = Value::Kind::array;
      for (const toml::node& item : *array) out.items.push_back(value(item));
    } else if (const auto* text = node.as_string()) {
      out.kind = Value::Kind::text;
      out.text = mapped(text->get(), out.place);
    } else if (const auto* integer = node.as_integer()) {
      out.kind = Value::Kind::integer;
      out.integer = integer->get();
    } else {
      out.kind = node.is_floating_point() ? Value::Kind::floating
                 : node.is_boolean()      ? Value::Kind::boolean
                                          : Value::Kind::date;
    }
    return out;
  }

 private:
  void fill_table(Value& out, const toml::table& table) const {
    for (const auto& [key, node] : table) {
      Entry entry;
      entry.key_place = place(key.source());
      entry.key = key_text(key, entry.key_place);
      entry.value = value(node);
      out.entries.push_back(std::move(entry));
    }
    // The library sorts by name; the formal statement follows the file.
    std::stable_sort(out.entries.begin(), out.entries.end(), [](const Entry& a, const Entry& b) {
      return a.key_place.offset < b.key_place.offset;
    });
  }

  // A key in quotes is read again, as the library saw only its shadow.
  [[nodiscard]] std::string key_text(const toml::key& key, Place where) const {
    auto literal = string_literal(source_.text, where.offset);
    return literal ? std::move(literal->text) : std::string(key.str());
  }

  [[nodiscard]] MappedText mapped(const std::string& text, Place where) const {
    auto literal = string_literal(source_.text, where.offset);
    if (literal && ascii_shadow(literal->text) == ascii_shadow(text)) return *std::move(literal);
    MappedText out;  // the two readings differ: point at the whole literal
    out.text = text;
    out.units.assign(text.size(), {where.offset, where.length});
    out.place = where;
    return out;
  }

  const Source& source_;
  LineIndex lines_;
};

[[nodiscard]] bool loses_its_way(std::string_view text) {
  try {
    (void)toml::parse(text);
  } catch (const TomlFault&) {
    return true;
  } catch (const toml::parse_error&) {
    return false;
  }
  return false;
}

// toml++ reads from left to right: the shortest beginning of the text that makes it lose its
// way ends at the fault.
[[nodiscard]] std::size_t fault_offset(std::string_view text) {
  std::size_t good = 0;
  std::size_t bad = text.size();
  while (bad - good > 1) {
    const std::size_t middle = good + (bad - good) / 2;
    (loses_its_way(text.substr(0, middle)) ? bad : good) = middle;
  }
  return good;
}

}  // namespace

const Entry* Value::find(std::string_view key) const {
  const auto found = std::find_if(entries.begin(), entries.end(),
                                  [key](const Entry& entry) { return entry.key == key; });
  return found == entries.end() ? nullptr : &*found;
}

Value parse_document(const Source& source) {
  if (const auto invalid = first_invalid_utf8(source.text)) {
    throw InputError(source, {*invalid, 1}, "this byte is not valid UTF-8",
                     "a claim file is a UTF-8 text");
  }
  check_toml_text(source);
  const Converter converter(source);
  const std::string shadow = ascii_shadow(source.text);
  try {
    return converter.value(toml::parse(std::string_view(shadow)));
  } catch (const toml::parse_error& error) {
    throw InputError(source, {converter.offset(error.source().begin), 1},
                     fmt::format("not valid TOML: {}", error.description()));
  } catch (const TomlFault&) {
    throw InputError(source, {converter.original(fault_offset(shadow)), 1},
                     "not valid TOML: this is neither a key nor a value");
  }
}

std::string kind_name(Value::Kind kind) {
  switch (kind) {
    case Value::Kind::text:
      return "a text";
    case Value::Kind::integer:
      return "an integer";
    case Value::Kind::floating:
      return "a floating-point number";
    case Value::Kind::boolean:
      return "a truth value";
    case Value::Kind::date:
      return "a date or time";
    case Value::Kind::array:
      return "an array";
    case Value::Kind::table:
      return "a table";
  }
  return "a value";
}

}  // namespace sumwright::claim
