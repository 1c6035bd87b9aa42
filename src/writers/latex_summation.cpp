// From the telescoping identity to the sums: the common range, single terms, terms that vanish.
#include <fmt/format.h>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"

namespace sumwright::writers {

std::string LatexDocument::vanishing_clause(const proof::Vanishing& vanishing) {
  std::vector<std::string> atoms;
  for (const proof::Atom& atom : vanishing.atoms) {
    atoms.push_back("${1/" + inline_tex(values_.atom(atom)) + "}=0$");
  }
  return "because " + enumeration(atoms) + " there (" + latex_text(vanishing.condition) + ")";
}

// The author's sum at one shift as the common sum and single terms.
Formula LatexDocument::range_sum(const proof::RangeStep& step) {
  const proof::Telescoping& t = *proof_.telescoping;
  const auto shift = static_cast<long>(step.shift);
  const Piece& k = names_.symbol(proof_.symbols[1].name);
  const auto bound = [&](const proof::Affine& affine, long by) {
    proof::Affine moved = affine;
    moved.constant += by;
    return values_.affine(moved);
  };
  Formula out = piece(fmt::format("\\sum_{{{}={}}}^{{{}}} {}", k.tex, inline_tex(bound(t.low, 0)),
                                  inline_tex(bound(t.high, 0)), inline_tex(at('F', shift))),
                      4 + width_of(at('F', shift)));
  const auto add = [&](const proof::Affine& affine, long by) {
    const Formula point = bound(affine, by);
    append_term(
        out, piece(fmt::format("{}({},{})", names_.letter('F'), running(shift), inline_tex(point)),
                   4 + width_of(point) + width_of(of_running('F', shift)) - 2));
  };
  const auto add_points = [&](unsigned points, const proof::Affine& affine, long sign) {
    for (unsigned j = 1; j <= points; ++j) {
      if (points <= 3 || j == 1 || j == points) {
        add(affine, sign * static_cast<long>(j));
      } else if (j == 2) {
        append(out, piece("+\\cdots", 2.5));
      }
    }
  };
  add_points(step.low_points, t.low, -1);
  add_points(step.high_points, t.high, 1);
  return out;
}

/// Why a sum over an infinite range is one of finitely many terms.
void LatexDocument::finite_range() {
  if (!proof_.finite_range) return;
  const proof::FiniteRange& finite = *proof_.finite_range;
  const std::string f = inline_tex(at('F', 0));
  const std::string k = names_.symbol(proof_.symbols[1].name).tex;
  const auto clause = [&](const std::optional<proof::Vanishing>& vanishing, const char* relation,
                          const claim::Bound& bound) {
    if (!vanishing) return;
    say(fmt::format("For ${}{}{}$ we have ${}=0$, {}.\n", k, relation,
                    inline_tex(expressions_.formula(*bound.value)), f,
                    vanishing_clause(*vanishing)));
  };
  clause(finite.below, "<", finite.range.low);
  clause(finite.above, ">", finite.range.high);
  say(
      fmt::format("The sum over the infinite range therefore has only finitely many terms that are "
                  "not $0$, and is the sum over ${}\\le {}\\le {}$.\n\n",
                  inline_tex(expressions_.formula(*finite.range.low.value)), k,
                  inline_tex(expressions_.formula(*finite.range.high.value))));
}

void LatexDocument::summation() {
  if (!proof_.telescoping || proof_.ranges.empty()) return;
  const proof::Telescoping& t = *proof_.telescoping;
  const std::string k = names_.symbol(proof_.symbols[1].name).tex;
  proof::Affine beyond = t.high;
  ++beyond.constant;
  head("Summation");
  finite_range();
  say(fmt::format(
      "Let ${}\\ge {}$ and sum {} over ${}\\le {}\\le {}$. The right side telescopes to "
      "${}({},{})-{}({},{})$. For the left side,\n",
      running(0), proof_.threshold, reference("telescoping"), inline_tex(values_.affine(t.low)), k,
      inline_tex(values_.affine(t.high)), names_.letter('G'), running(0),
      inline_tex(values_.affine(beyond)), names_.letter('G'), running(0),
      inline_tex(values_.affine(t.low))));
  std::vector<DisplayRow> rows;
  std::string reasons;
  for (const proof::RangeStep& step : proof_.ranges) {
    const auto shift = static_cast<long>(step.shift);
    rows.push_back({of_running('S', shift), range_sum(step)});
    const auto reason = [&](const std::optional<proof::Vanishing>& vanishing, const char* where) {
      if (!vanishing) return;
      reasons += fmt::format("\\item ${}$ is $0$ {} this range, {}.\n", inline_tex(at('F', shift)),
                             where, vanishing_clause(*vanishing));
    };
    reason(step.below, "below");
    reason(step.above, "above");
  }
  say(display_list(rows, "."));
  if (reasons.empty()) return;
  say(std::string(proof_.finite_range ? "Those ends" : "The claim's own ends") +
      " and these differ by terms that vanish:\n\\begin{itemize}\\raggedright\n" + reasons +
      "\\end{itemize}\n");
}

}  // namespace sumwright::writers
