// Behind the proof: the table of side conditions, and what has to be trusted.
#include <fmt/format.h>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"
#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

// One row in four columns; a paragraph of its own, so that pages can break between rows.
[[nodiscard]] std::string row(const std::string& id, const std::string& kind,
                              const std::string& statement, const std::string& settled) {
  const auto cell = [](double width, const std::string& text) {
    return fmt::format("\\parbox[t]{{{:.2f}\\textwidth}}{{\\raggedright\\strut {}\\strut}}", width,
                       text);
  };
  return "\\noindent" + cell(0.07, id) + "\\hspace{.01\\textwidth}%\n" + cell(0.19, kind) +
         "\\hspace{.01\\textwidth}%\n" + cell(0.43, statement) + "\\hspace{.01\\textwidth}%\n" +
         cell(0.27, settled) + "\\par\n";
}

constexpr std::string_view kRule = "\\noindent\\hrule height.4pt\\par\\smallskip\n";

}  // namespace

void LatexDocument::conditions() {
  if (proof_.conditions.empty()) return;
  head("Side conditions");
  say("Everything on which the argument depends besides the polynomial equalities:\n");
  say("\\par\\medskip\n{\\footnotesize\\parskip0pt\n");
  say(std::string(kRule));
  say(row("", "\\textit{kind}", "\\textit{statement, and where}", "\\textit{settled}"));
  say(std::string("\\smallskip") + std::string(kRule));
  for (const proof::Condition& condition : proof_.conditions) {
    std::string statement = expressions_.mixed(condition.text);
    if (!condition.region.empty() && !condition.text.ends_with(" at " + condition.region)) {
      statement += " for " + expressions_.mixed(condition.region);
    }
    std::string settled = word(condition.settled);
    if (!condition.method.empty()) settled += ": " + expressions_.mixed(condition.method);
    say(row(latex_text(condition.id), word(condition.kind), statement, settled));
  }
  say(std::string("\\smallskip") + std::string(kRule) + "}\\smallskip\n");
}

void LatexDocument::trust() {
  head("What has been proved, and what is trusted");
  say("The argument above is complete but for the expansion of polynomials, which any computer "
      "algebra "
      "system can repeat, and the linear inequalities in the table. ");
  say("It is accompanied by a script for the proof assistant Coq: the theorem \\texttt{claim} in "
      "\\texttt{coq/Claim.v} states the claim over an arbitrary field of characteristic zero");
  say(", in a vocabulary (binomial coefficients, factorials, finite sums) that is defined in a "
      "file of one "
      "or two pages, and uses no axioms. Whoever runs Coq on it trusts Coq's kernel and that this "
      "statement says what the theorem says; neither the program that wrote the script nor these "
      "pages "
      "have to be trusted. ");
  // A paragraph that is not divided, so that the digits do not stand alone on a page.
  say("\n\n{\\raggedright\\widowpenalty10000 \\clubpenalty10000\n"
      "The same obligations, with every polynomial in full, are in the text file "
      "\\texttt{obligations.txt} with SHA-256\n");
  std::string hash;
  for (std::size_t i = 0; i < obligations_sha256_.size(); i += 16) {
    hash += (i == 0 ? "" : "\\allowbreak ") + obligations_sha256_.substr(i, 16);
  }
  say("\\texttt{" + hash + "}.\\par}\n");
}

}  // namespace sumwright::writers
