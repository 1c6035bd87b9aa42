// The opening of the appendix: heading, origin of the claim, theorem, conventions.
#include <fmt/format.h>

#include <algorithm>

#include "writers/claim_text.hpp"
#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"

namespace sumwright::writers {

namespace {

[[nodiscard]] bool is_interval(proof::AtomKind kind) {
  return kind == proof::AtomKind::interval_product ||
         kind == proof::AtomKind::reciprocal_interval_product;
}

[[nodiscard]] bool is_factorial(proof::AtomKind kind) {
  return kind == proof::AtomKind::factorial || kind == proof::AtomKind::reciprocal_factorial;
}

[[nodiscard]] bool is_power(proof::AtomKind kind) { return kind == proof::AtomKind::power; }

[[nodiscard]] bool names_function(const claim::Expression& expression, std::string_view name) {
  std::vector<const claim::Expression*> open = {&expression};
  while (!open.empty()) {
    const claim::Expression& node = *open.back();
    open.pop_back();
    if (node.operation == claim::Operation::call && node.name == name) return true;
    for (const claim::ExpressionPtr& child : node.children) open.push_back(child.get());
  }
  return false;
}

}  // namespace

void LatexDocument::opening() {
  say(fmt::format("\\section{{{}}}\\label{{{}}}\n", latex_text(claim_.title, 200),
                  label("section")));
  const claim::Record& record = claim_.record;
  std::vector<std::string> authors;
  for (std::size_t i = 0; i < record.authors.size() && i < 20; ++i) {
    authors.push_back(latex_text(record.authors[i], 100));
  }
  if (authors.empty() && record.source.empty()) return;
  std::string text = "The claim";
  if (!authors.empty()) text += " is stated by " + enumeration(authors);
  if (!record.source.empty()) {
    text += (authors.empty() ? " is taken from the following source: " : "; its source: ") +
            latex_text(record.source);
  }
  if (!text.ends_with('.')) text += '.';
  bool ragged = has_long_word(record.source);
  for (const std::string& author : record.authors) ragged = ragged || has_long_word(author);
  say("{" + std::string(ragged ? "\\raggedright " : "\\emergencystretch2em ") + text +
      "\\par}\n\n");
}

std::string LatexDocument::parameter_sentence() const {
  std::vector<std::string> rationals;
  std::vector<std::string> integers;
  std::vector<std::string> excluded;
  for (const claim::Parameter& parameter : claim_.parameters) {
    const std::string name = "$" + names_.symbol(parameter.name).tex + "$";
    if (parameter.ring == claim::Parameter::Ring::rationals) {
      rationals.push_back(name);
      for (const claim::Exclusion& exclusion : parameter.excluded) {
        excluded.push_back(expressions_.mixed(exclusion_text(parameter.name, exclusion)));
      }
    } else if (parameter.at_least) {
      integers.push_back(
          expressions_.mixed(parameter.name + " >= " + parameter.at_least->get_str()));
    } else {
      integers.push_back(name);
    }
  }
  std::string out;
  if (!rationals.empty()) {
    out += fmt::format("Let {} be {} of a field of characteristic zero{}{}. ",
                       enumeration(rationals), rationals.size() == 1 ? "an element" : "elements",
                       excluded.empty() ? "" : ", where ", enumeration(excluded));
  }
  if (!integers.empty()) {
    out += fmt::format("Let {} be {}. ", enumeration(integers),
                       integers.size() == 1 ? "an integer" : "integers");
  }
  return out;
}

std::string LatexDocument::hypotheses() const {
  std::string out = parameter_sentence();
  std::vector<std::string> assumptions;
  for (const claim::Assumption& assumption : claim_.assumptions) {
    assumptions.push_back(expressions_.mixed(fmt::format("{} {} {}", to_text(*assumption.left),
                                                         comparison_text(assumption.comparison),
                                                         to_text(*assumption.right))));
  }
  if (!assumptions.empty()) out += "Assume that " + enumeration(assumptions) + ". ";
  const std::string range = fmt::format("every integer ${}\\ge {}$",
                                        names_.symbol(claim_.running).tex, claim_.from.get_str());
  return out + (out.empty() ? "For " : "Then, for ") + range;
}

// Before the theorem, which uses the letters.
void LatexDocument::long_names() {
  if (names_.replaced().empty()) return;
  std::vector<std::string> letters;
  for (const auto& [name, letter] : names_.replaced()) {
    letters.push_back("$" + letter + "$ for " + latex_code(name));
  }
  say("{\\raggedright In formulas we write " + enumeration(letters) +
      ", the names in the claim file.\\par}\n\n");
}

void LatexDocument::theorem() {
  say("\\begin{sumwrighttheorem}\\sloppy\n" + hypotheses());
  statement_display();
  say("\\end{sumwrighttheorem}\n");
}

void LatexDocument::statement_display() {
  const bool fits = expressions_.fits(*claim_.sum.summand);
  const bool right_fits = !claim_.closed || expressions_.fits(*claim_.closed);
  const bool symbolic = !claim_.is_equality() && !recurrence_is_short();
  if (!fits || !right_fits || (symbolic && !coefficients_printable())) {
    say(", with the notation of the claim file,\n");
    code_paragraph(statement_text(proof_), label("claim"));
    return;
  }
  const Formula sum = expressions_.sum(claim_.sum);
  if (claim_.is_equality()) {
    say(",\n");
    const Formula right =
        claim_.closed ? expressions_.formula(*claim_.closed) : expressions_.sum(*claim_.other_sum);
    say(display(sum, right, label("claim"), "."));
    return;
  }
  say(fmt::format(", the {}\n{}satisfy the recurrence\n", has_index() ? "sums" : "terms",
                  display(of_running('S', 0), sum, label("sum"), "")));
  say(display(recurrence_left(symbolic), right_side(), label("claim"), symbolic ? "," : "."));
  const bool right_named = inline_tex(right_side()) == inline_tex(of_running('b', 0));
  if (symbolic) {
    say("where\n");
    coefficient_list(false);
  }
  if (right_named) {
    say("Here $" + inline_tex(of_running('b', 0)) + "$ is, as in a claim file,\n");
    code_paragraph(proof_.right_side_text);
  }
}

bool LatexDocument::recurrence_is_short() { return width_of(recurrence_left(false)) < 4 * kRoom; }

Formula LatexDocument::recurrence_left(bool symbolic) {
  Formula out;
  for (std::size_t i = 0; i < proof_.recurrence_text.size(); ++i) {
    const std::string& text = proof_.recurrence_text[i];
    if (text == "0") continue;
    Formula factor;
    if (symbolic) {
      factor = piece(coefficient(i), 3);
    } else {
      const auto printed = expressions_.parsed(text, symbol_names());
      factor = !printed                                ? piece("", 100 * kRoom)  // not on a page
               : printed->strength < Strength::product ? bracketed(printed->formula, printed->tall)
                                                       : printed->formula;
    }
    append_term(out, of_function(factor, of_running('S', static_cast<long>(i))));
  }
  return out;
}

Formula LatexDocument::right_side() {
  const std::string& text = proof_.right_side_text;
  if (text.empty() || text == "0") return piece("0", 0.52);
  const auto printed = expressions_.parsed(text, symbol_names());
  return printed ? printed->formula : of_running('b', 0);
}

bool LatexDocument::uses(bool (*kind)(proof::AtomKind)) const {
  std::vector<const proof::Product*> products;
  if (proof_.telescoping) products.push_back(&proof_.telescoping->base.product);
  for (const proof::Product& product : proof_.summand.products) products.push_back(&product);
  if (proof_.closed) {
    for (const proof::Product& product : proof_.closed->products) products.push_back(&product);
  }
  return std::any_of(products.begin(), products.end(), [&](const proof::Product* product) {
    return std::any_of(product->atoms.begin(), product->atoms.end(),
                       [&](const auto& atom) { return kind(atom.first.kind); });
  });
}

std::string LatexDocument::laws() const {
  const std::string& m = names_.length();
  const std::string& z = names_.number();
  std::vector<std::string> out;
  if (uses(is_factorial)) {
    out.push_back(
        fmt::format("${0}!={0}\\,({0}-1)!$ for ${0}\\ge 1$ and the convention on $1/{0}!$", m));
  }
  if (uses(is_interval)) {
    out.push_back(
        fmt::format("${0}^{{\\overline{{{1}+1}}}}={0}^{{\\overline{{{1}}}}}\\,({0}+{1})="
                    "{0}\\,({0}+1)^{{\\overline{{{1}}}}}$",
                    z, m));
  }
  if (uses(is_power)) out.push_back(fmt::format("${0}^{{{1}+1}}={0}\\,{0}^{{{1}}}$", z, m));
  return out.empty() ? "Each of the following"
                     : "By " + enumeration(out) + ", each of the following";
}

void LatexDocument::conventions() {
  const std::string& m = names_.length();
  const std::string& z = names_.number();
  const auto written = [&](std::string_view name) {
    return names_function(*claim_.sum.summand, name) ||
           (claim_.closed && names_function(*claim_.closed, name));
  };
  head("Conventions");
  if (uses(is_factorial)) {
    say(fmt::format(
        "For an integer ${0}<0$ we read $1/{0}!$ as $0$; then\n"
        "\\[ \\frac{{1}}{{({0}-1)!}} = \\frac{{{0}}}{{{0}!}} \\]\nholds for every integer "
        "${0}$. ",
        m));
  }
  if (written("binomial")) {
    say(fmt::format(
        "As usual, $\\binom{{{0}}}{{{1}}}={0}({0}-1)\\cdots({0}-{1}+1)/{1}!$ for ${1}\\ge 0$, "
        "and $\\binom{{{0}}}{{{1}}}=0$ for ${1}<0$. ",
        z, m));
  }
  if (uses(is_interval) || written("rising")) {
    say(fmt::format(
        "The rising factorial is ${0}^{{\\overline{{{1}}}}}={0}({0}+1)\\cdots({0}+{1}-1)$. ", z,
        m));
  }
  if (written("falling")) {
    say(fmt::format(
        "The falling factorial is ${0}^{{\\underline{{{1}}}}}={0}({0}-1)\\cdots({0}-{1}+1)$. ", z,
        m));
  }
  say("Labels such as (c1) refer to the table of side conditions at the end.\n");
}

}  // namespace sumwright::writers
