// The layout of obligations.txt: headings, remarks, entries, blocks; 80 columns.
#pragma once

#include <cstddef>
#include <string>
#include <string_view>

namespace sumwright::writers {

/// How the first line starts in every format.
inline constexpr std::string_view kObligationsTitle = "Sumwright obligations";
inline constexpr std::string_view kObligationsFirstLine = "Sumwright obligations, format 1";
inline constexpr std::size_t kObligationsColumns = 80;

/// Builds the text line by line. Values may be any text: control characters and line breaks are
/// shown escaped and runs of blanks become one, so that no value can look like another line.
class ObligationsDocument {
 public:
  ObligationsDocument();

  void heading(std::string_view name);
  void blank();
  void remark(std::string_view text);
  /// `key: value`, wrapped; continuation lines start with four blanks. An empty value is `none`.
  void statement(std::string_view key, std::string_view value);
  /// `key = value`, wrapped in the same way.
  void definition(std::string_view key, std::string_view value);
  /// Each line of the text behind `| `, byte for byte.
  void block(std::string_view text);

  [[nodiscard]] const std::string& text() const { return text_; }

 private:
  void wrapped(std::string_view first, std::string_view rest_indent, std::string_view text);

  std::string text_;
};

/// Runs of blanks as one, none at the ends: the form in which values are compared.
[[nodiscard]] std::string single_spaced(std::string_view text);

}  // namespace sumwright::writers
