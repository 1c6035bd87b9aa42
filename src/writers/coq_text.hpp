// Terms of the support library's language: polynomials, atoms and products as Coq text.
#pragma once

#include <map>
#include <string>
#include <vector>

#include "proof/proof.hpp"

namespace sumwright::writers::coq {

/// How each symbol is written: as a term of type Z (integer symbols) and as an element of K.
struct Scope {
  std::vector<std::string> integer;
  std::vector<std::string> field;
};

/// Symbols under names that collide with nothing in a generated file; running and index as Z
/// variables.
[[nodiscard]] Scope plain_scope(const proof::Proof& proof);
/// The running variable and the index as variables of type K (for polynomial definitions).
[[nodiscard]] Scope polynomial_scope(const proof::Proof& proof);
/// Symbol `at` written as the Z term `text` instead.
[[nodiscard]] Scope with(Scope scope, std::size_t at, const std::string& text);

/// The name in a generated file of the claim's symbol `name`: the same, or with `_v` when that
/// could be a word of Coq or another name of the file. Different symbols get different names.
[[nodiscard]] std::string safe_name(const std::string& name);

/// In brackets unless it is one word.
[[nodiscard]] std::string bracketed(const std::string& text);

/// Whether two texts are one term to Coq: they differ in spaces and redundant brackets at most.
[[nodiscard]] bool same_term(const std::string& a, const std::string& b);

/// In brackets unless it is one word or stands in brackets already.
[[nodiscard]] std::string enclosed(const std::string& text);

[[nodiscard]] std::string affine(const proof::Affine& form, const Scope& scope);
/// A polynomial in integer symbols as a term of type Z, each symbol replaced by `shifted` text if
/// given.
[[nodiscard]] std::string integer_polynomial(const proof::Polynomial& polynomial,
                                             const Scope& scope);
[[nodiscard]] std::string polynomial(const proof::Polynomial& polynomial, const Scope& scope);
[[nodiscard]] std::string rational(const mpq_class& value);
[[nodiscard]] std::string factored(const proof::Factored& value, const Scope& scope);
[[nodiscard]] std::string atom(const proof::Atom& atom, const Scope& scope);
/// The a of an interval product, and the base of a power.
[[nodiscard]] std::string interval_base(const proof::Atom& atom, const Scope& scope);
[[nodiscard]] std::string power_base(const proof::Polynomial& base, const Scope& scope);
[[nodiscard]] std::string product(const proof::Product& product, const Scope& scope);

/// symbol := affine form, in data (what `with` is for text).
using Substitution = std::map<std::size_t, proof::Affine>;
[[nodiscard]] proof::Affine substitute(const proof::Affine& form, const Substitution& by);
[[nodiscard]] proof::Polynomial substitute(const proof::Polynomial& polynomial,
                                           const Substitution& by);
[[nodiscard]] proof::Atom substitute(const proof::Atom& atom, const Substitution& by);

[[nodiscard]] bool is_constant(const proof::Affine& form);
[[nodiscard]] bool is_constant(const proof::Polynomial& polynomial);
[[nodiscard]] bool has_fraction(const proof::Factored& value);

}  // namespace sumwright::writers::coq
