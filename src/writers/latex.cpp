// From an established Proof to appendix.tex and appendix-standalone.tex.
//
// The argument in the order of the Proof, in the style of the trade; needs amsmath and amsthm only.
// Labels start with a part of the claim's hash, so that several appendices fit in one paper.
#include <fmt/format.h>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"
#include "writers/sha256.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {

std::string enumeration(const std::vector<std::string>& items) {
  std::string out;
  for (std::size_t i = 0; i < items.size(); ++i) {
    if (i > 0) out += i + 1 == items.size() ? " and " : ", ";
    out += items[i];
  }
  return out;
}

LatexDocument::LatexDocument(const proof::Proof& proof, const std::string& obligations_sha256)
    : proof_(proof),
      claim_(*proof.claim),
      prefix_("sw-" + sha256(proof.claim->source->text).substr(0, 8) + ":"),
      obligations_sha256_(obligations_sha256),
      names_(*proof.claim),
      values_(proof.symbols, names_),
      expressions_(names_) {}

std::string LatexDocument::appendix() {
  opening();
  long_names();
  theorem();
  conventions();
  say("\\begin{proof}\n");
  certificate();
  base_term();
  equality();
  summation();
  ends();
  closed_form();
  leading();
  initial_values();
  conclusion();
  say("\\end{proof}\n");
  conditions();
  trust();
  return out_;
}

void LatexDocument::head(const std::string& title) {
  out_ += "\\par\\medskip\\noindent\\textbf{" + title + ".}\\enspace\n";
}

void LatexDocument::code_paragraph(const std::string& text, const std::string& label) {
  const std::string number =
      label.empty() ? "" : "\\refstepcounter{equation}\\label{" + label + "}(\\theequation)\\quad ";
  out_ +=
      "\\begin{quote}\\raggedright\\small " + number + "\n" + latex_code(text) + "\n\\end{quote}\n";
}

void LatexDocument::explain_dots() {
  if (dots_explained_ || values_.abbreviated() == 0) return;
  dots_explained_ = true;
  say("Here and below, dots stand for terms that are not printed: all polynomials are in full in "
      "the file \\texttt{obligations.txt}, whose SHA-256 is given at the end. ");
}

std::string LatexDocument::coefficient(std::size_t i) const {
  return fmt::format("{}_{{{}}}({})", names_.letter('a'), i, running(0));
}

std::string LatexDocument::reference(const std::string& name) const {
  return "\\eqref{" + label(name) + "}";
}

std::string LatexDocument::running(long shift) const {
  std::string name = names_.symbol(claim_.running).tex;
  if (shift == 0) return name;
  return fmt::format("{}{}{}", name, shift < 0 ? "-" : "+", std::abs(shift));
}

bool LatexDocument::has_index() const {
  return !claim_.sum.over.empty() && proof_.symbols.size() > 1 && !proof_.symbols[1].name.empty() &&
         proof_.symbols[1].kind == proof::SymbolKind::index;
}

Formula LatexDocument::at(char letter, long shift, long index_shift) const {
  if (!has_index()) return of_running(letter, shift);
  const Piece& index = names_.symbol(proof_.symbols[1].name);
  const std::string moved =
      index_shift == 0 ? index.tex : fmt::format("{}+{}", index.tex, index_shift);
  const double width = 1.9 + names_.symbol(claim_.running).width + index.width +
                       (shift == 0 ? 0 : 1.8) + (index_shift == 0 ? 0 : 1.8);
  return piece(fmt::format("{}({},{})", names_.letter(letter), running(shift), moved), width);
}

Formula LatexDocument::of_running(char letter, long shift) const {
  const double width = 1.6 + names_.symbol(claim_.running).width + (shift == 0 ? 0 : 1.8);
  return piece(fmt::format("{}({})", names_.letter(letter), running(shift)), width);
}

std::vector<std::string> LatexDocument::symbol_names() const {
  std::vector<std::string> out;
  for (const proof::Symbol& symbol : proof_.symbols) {
    if (!symbol.name.empty()) out.push_back(symbol.name);
  }
  return out;
}

namespace {

constexpr std::string_view kNotice =
    "% Generated from a checked proof; the full data are in obligations.txt beside this file.\n"
    "% Needs the packages amsmath and amsthm. Free to use, change and publish (CC0).\n";

constexpr std::string_view kEnvironment =
    "\\ifdefined\\sumwrighttheorem\\else\\newtheorem*{sumwrighttheorem}{Theorem}\\fi\n";

}  // namespace

std::vector<NamedText> latex_files(const proof::Proof& proof) {
  if (proof.verdict != proof::Verdict::established) return {};
  const std::string body = LatexDocument(proof, sha256(obligations_text(proof))).appendix();
  const std::string appendix = std::string(kNotice) + std::string(kEnvironment) + body;
  const std::string standalone =
      std::string(kNotice) +
      "\\documentclass{amsart}\n\\usepackage{amsmath,amsthm}\n\\raggedbottom\n\\begin{document}\n" +
      std::string(kEnvironment) + body + "\\end{document}\n";
  return {{"appendix.tex", appendix}, {"appendix-standalone.tex", standalone}};
}

}  // namespace sumwright::writers
