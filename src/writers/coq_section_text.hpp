// What the sections about the sum share: how its terms, coefficients and shifts are written.
#pragma once

#include <fmt/format.h>

#include <cctype>
#include <set>
#include <string>

#include "proof/proof.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

/// Base of the section writers: the names and texts that they have in common, and the text made so
/// far.
class SectionText {
 protected:
  explicit SectionText(const proof::Proof& proof)
      : proof_(proof),
        scope_(plain_scope(proof)),
        names_(names(proof)),
        threshold_(bracketed(std::to_string(proof.threshold))),
        from_(bracketed(std::to_string(proof.from))),
        beyond_(fmt::format("{} <= {} ->", threshold_, names_.n)),
        equality_(proof.claim->is_equality()),
        coefficients_(proof.order + 1) {}

  /// `F1 n k + F2 n k + ...`
  [[nodiscard]] std::string pieces(const std::string& name, std::size_t count,
                                   const std::string& arguments) const {
    std::string out;
    for (std::size_t j = 0; j < count; ++j)
      out += fmt::format("{}{}{} {}", out.empty() ? "" : " + ", name, j + 1, arguments);
    return out.empty() ? "inj 0" : out;
  }

  [[nodiscard]] std::string f_pieces(const std::string& n, const std::string& k) const {
    return pieces("F", proof_.summand.products.size(),
                  names_.index ? fmt::format("{} {}", n, k) : n);
  }

  /// The factor of S(n+i) in the recurrence.
  [[nodiscard]] std::string scale(unsigned i) const {
    if (!names_.index) return fmt::format("a{} (inj {})", i, names_.n);
    return fmt::format("weight (inj {0}) * a{1} (inj {0})", names_.n, i);
  }

  /// Its left side for a sequence.
  [[nodiscard]] std::string combination(const std::string& side) const {
    std::string out;
    for (unsigned i = 0; i < coefficients_; ++i)
      out += fmt::format("{}{} * {} {}", out.empty() ? "" : " + ", scale(i), side,
                         shifted(names_.n, i));
    return out;
  }

  /// F vanishes at n + shift, or at a literal n, because an rfact argument is negative; without a
  /// reason there is no such point. `n` and `scope`: what stands for the running variable, as data
  /// and as text.
  [[nodiscard]] std::string vanish(const std::optional<proof::Vanishing>& v, const proof::Affine& n,
                                   const Scope& scope) const {
    if (!v) return "exfalso; index";
    std::string unfold;
    std::string rewrites;
    std::set<std::string> done;
    for (std::size_t j = 0; j < v->atoms.size(); ++j) {
      unfold += fmt::format("{}F{}", j == 0 ? "" : ", ", j + 1);
      const std::string argument = original_argument(v->atoms[j], j, n, scope);
      if (done.insert(argument).second)
        rewrites += fmt::format("rewrite (rfact_neg K {}) by index; ", argument);
    }
    return fmt::format("unfold {}; {}ring", unfold, rewrites);
  }

  /// The text that the atom's argument has after unfolding the piece at the running variable `n`.
  [[nodiscard]] std::string original_argument(const proof::Atom& image, std::size_t piece,
                                              const proof::Affine& n, const Scope& scope) const {
    for (const auto& [a, e] : proof_.summand.products[piece].atoms) {
      if (a.kind != proof::AtomKind::reciprocal_factorial) continue;
      const proof::Affine moved = substitute(a.argument, {{0, n}});
      if (moved.coefficients == image.argument.coefficients &&
          moved.constant == image.argument.constant)
        return bracketed(affine(a.argument, scope));
    }
    return bracketed(affine(image.argument, scope_));
  }

  /// coefficient * running variable + constant.
  [[nodiscard]] proof::Affine running(long coefficient, long constant) const {
    proof::Affine out;
    out.coefficients.assign(proof_.symbols.size(), 0);
    out.coefficients[0] = coefficient;
    out.constant = constant;
    return out;
  }

  /// Every occurrence of the identifier `word`.
  static std::string replace_word(const std::string& text, const std::string& word,
                                  const std::string& with) {
    std::string out;
    std::string token;
    const auto flush = [&] {
      out += token == word ? with : token;
      token.clear();
    };
    for (char ch : text) {
      if (std::isalnum(static_cast<unsigned char>(ch)) != 0 || ch == '_') {
        token += ch;
        continue;
      }
      flush();
      out += ch;
    }
    flush();
    return out;
  }

  const proof::Proof& proof_;
  Scope scope_;
  Names names_;
  std::string threshold_;
  std::string from_;
  std::string beyond_;
  bool equality_ = false;
  unsigned coefficients_ = 1;
  std::string out_;
};

}  // namespace sumwright::writers::coq
