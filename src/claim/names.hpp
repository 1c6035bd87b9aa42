// Names in a claim file: how they look, where each is declared, where it may stand.
#pragma once

#include <map>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "claim/claim.hpp"
#include "claim/expression_parser.hpp"
#include "claim/shapes.hpp"
#include "claim/source.hpp"
#include "claim/toml_text.hpp"

namespace sumwright::claim {

/// The declared names of one claim.
class Names {
 public:
  enum class Kind { running, index, integer, rational };

  /// What the parser and the checks of shape need to know about symbols.
  struct View {
    Symbols symbols;
    Scope scope;

    /// Takes the running variable out, where only an equality may name it.
    void remove_running();
  };

  /// Declares `name`, written at `place`. Throws InputError when it is no name, is taken
  /// by the language, or is declared already.
  void declare(const Source& source, const std::string& name, Place place, Kind kind);

  /// Everything declared so far: running variable, parameters, current indices.
  [[nodiscard]] View with_indices() const;

  /// Every declared name with one reason.
  [[nodiscard]] std::map<std::string, std::string> all(const std::string& reason) const;

  /// Takes the indices out again, at the end of a sum.
  void forget_indices();

 private:
  struct Declared {
    Kind kind = Kind::index;
    Place place;
  };
  std::map<std::string, Declared> names_;
};

/// `inf`, `+inf` or `-inf` as a whole bound.
[[nodiscard]] std::optional<Bound::Kind> infinity(std::string_view text);

/// The word of an exclusion; nothing when the text is not made of words. Throws
/// InputError at words that are not known.
[[nodiscard]] std::optional<Exclusion::Kind> exclusion_word(const Source& source,
                                                            const MappedText& text);

/// A text that goes into exports as one line: line breaks become spaces, outer
/// blanks go. `what` names it in messages. Throws InputError at control characters and when
/// nothing is left.
[[nodiscard]] std::string plain_line(const Source& source, const MappedText& text,
                                     const std::string& what);

}  // namespace sumwright::claim
