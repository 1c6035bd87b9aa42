// What a generated proof says to its reader, and how its lines are broken.
#pragma once

#include <string>

#include "proof/proof.hpp"

namespace sumwright::writers::coq {

/// Text from outside (a title) for a comment: letters, digits and harmless marks remain.
[[nodiscard]] std::string comment_text(const std::string& text);
/// A formula for a comment: nothing in it opens or ends a comment or a string.
[[nodiscard]] std::string comment_formula(const std::string& text);
/// A comment of its own lines, before a lemma or a definition.
[[nodiscard]] std::string note(const std::string& words);
/// `(** ** ... *)`, the title of a section.
[[nodiscard]] std::string heading(const std::string& words);

/// The comment at the beginning: what is proved, in words and as Coq has it.
[[nodiscard]] std::string opening_comment(const proof::Proof& proof);
/// The comment after the imports: the order of the argument and what the names mean.
[[nodiscard]] std::string legend(const proof::Proof& proof);

/// The text with lines broken at about 100 characters, at spaces that stand in few brackets, after
/// operators where there are any; no blanks at the ends of lines.
[[nodiscard]] std::string wrapped(const std::string& text);

}  // namespace sumwright::writers::coq
