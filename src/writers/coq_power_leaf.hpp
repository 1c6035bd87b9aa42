// Powers with symbolic exponents as atoms: the tactics, and the small arithmetic that conversions
// share.
#pragma once

#include <fmt/format.h>

#include <cstdlib>
#include <set>
#include <string>
#include <vector>

#include "claim/affine.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_steps.hpp"

namespace sumwright::writers::coq {

/// Base of the conversion writer: how a power leaf is split into powers of its irreducible bases.
class PowerLeafText {
 protected:
  explicit PowerLeafText(const proof::Proof& proof) : proof_(proof), scope_(plain_scope(proof)) {}

  [[nodiscard]] proof::Affine affine_of(const claim::Expression& e) const {
    std::set<std::string> integers;
    for (const proof::Symbol& s : proof_.symbols)
      if (s.kind != proof::SymbolKind::rational_parameter) integers.insert(s.name);
    proof::Affine out;
    out.coefficients.assign(proof_.symbols.size(), 0);
    const auto view = claim::as_affine(e, integers);
    if (!view) return out;
    out.constant = view->constant;
    for (const auto& [name, c] : view->coefficients)
      for (std::size_t i = 0; i < proof_.symbols.size(); ++i)
        if (proof_.symbols[i].name == name) out.coefficients[i] = c;
    return out;
  }

  static proof::Affine combine(const proof::Affine& a, long factor, const proof::Affine& b,
                               long constant) {
    proof::Affine out = a;
    for (std::size_t i = 0; i < out.coefficients.size(); ++i)
      out.coefficients[i] += factor * b.coefficients[i];
    out.constant += factor * b.constant + constant;
    return out;
  }

  [[nodiscard]] std::string z(const proof::Affine& a) const { return bracketed(affine(a, scope_)); }

  // ---------------------------------------------------------------- powers

  struct Part {
    std::string base;
    long exponent = 1;
    std::string to;  ///< the exponent in the atom
  };

  /// The multiple e with image = e * exponent (both affine, exponent not 0).
  static long multiple(const proof::Affine& image, const proof::Affine& exponent) {
    for (std::size_t i = 0; i < exponent.coefficients.size(); ++i)
      if (exponent.coefficients[i] != 0) return image.coefficients[i] / exponent.coefficients[i];
    return exponent.constant == 0 ? 1 : image.constant / exponent.constant;
  }

  static std::string part_text(const Part& p) {
    return p.exponent == 1 ? p.base : fmt::format("{} ^ {}", p.base, p.exponent);
  }

  static std::string parts_text(const std::vector<Part>& parts, std::size_t first) {
    if (first >= parts.size()) return "inj 1";
    if (first + 1 == parts.size()) return part_text(parts[first]);
    return fmt::format("({} * {})", part_text(parts[first]), parts_text(parts, first + 1));
  }

  std::string side_conditions(const proof::Leaf& l) const {
    std::string out =
        "reflexivity | index | right; index | left; numeric_neq0 | numeric_neq0 | "
        "left; split; numeric_neq0";
    for (const proof::Nonzero& why : l.nonzero)
      if (!why.factors.empty()) {
        const std::string one = nonzero_tactic(proof_, why, scope_);
        out += fmt::format(" | ({0}) | left; {0}", one);
      }
    return out + " | pq | pqf";
  }

  std::string power_script(const proof::Leaf& l) {
    const claim::Expression& e = *l.expression;
    const std::string v = field_text(proof_, *e.children[0]);
    const std::string written = integer_text(proof_, *e.children[1]);
    const proof::Affine exponent = affine_of(*e.children[1]);
    std::vector<Part> above;
    std::vector<Part> below;
    for (const auto& [a, count] : l.value.atoms) {
      const long m = multiple(a.argument, exponent);
      Part p{power_base(a.base, scope_), std::abs(m), z(a.argument)};
      (m > 0 ? above : below).push_back(p);
    }
    const std::string by = " by first [" + side_conditions(l) + "].\n";
    std::string out;
    if (!below.empty()) {
      proof::Affine zero = exponent;
      for (long& c : zero.coefficients) c = 0;
      zero.constant = 0;
      const std::string minus = z(combine(zero, -1, exponent, 0));
      out += fmt::format("  rewrite (zpow_div_base K {}%K ({})%K ({})%K {} {})", v,
                         parts_text(above, 0), parts_text(below, 0), written, minus) +
             by;
      out += split(below, minus, by);
    } else if (!same_term(v, parts_text(above, 0))) {
      out += fmt::format("  rewrite (leaf_zpow K {}%K ({})%K {} {})", v, parts_text(above, 0),
                         written, written) +
             by;
    }
    if (above.empty())
      out += fmt::format("  rewrite (zpow_one_base K (inj 1) {}) by reflexivity.\n", written);
    else
      out += split(above, written, by);
    return out + "  inj_norm. ring.\n";
  }

  static std::string split(const std::vector<Part>& parts, const std::string& exponent,
                           const std::string& by) {
    std::string out;
    for (std::size_t i = 0; i + 1 < parts.size(); ++i)
      out +=
          fmt::format("  rewrite (zpow_mul_base K ({})%K ({})%K ({})%K {})", parts_text(parts, i),
                      part_text(parts[i]), parts_text(parts, i + 1), exponent) +
          by;
    for (const Part& p : parts) {
      if (p.exponent == 1 && same_term(exponent, p.to)) continue;
      if (p.exponent == 1)
        out +=
            fmt::format("  rewrite (leaf_zpow K {0}%K {0}%K {1} {2})", p.base, exponent, p.to) + by;
      else
        out += fmt::format("  rewrite (zpow_pow_base K ({})%K {}%K {} {} {})", part_text(p), p.base,
                           p.exponent, exponent, p.to) +
               by;
    }
    return out;
  }

  const proof::Proof& proof_;
  Scope scope_;
};

}  // namespace sumwright::writers::coq
