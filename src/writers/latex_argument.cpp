// The core of the proof: certificate, base term, the polynomial equality.
#include <fmt/format.h>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"
#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

constexpr double kExplicit = 6 * kRoom;      // the equality is written out up to six lines
constexpr double kCertificate = 20 * kRoom;  // the certificate up to about half a page

[[nodiscard]] bool is_number(const std::string& tex) {
  return !tex.empty() && tex.find_first_not_of("-0123456789") == std::string::npos;
}

// A product of two formulas that are no sums; `spaced`: with a thin space between them.
[[nodiscard]] Formula times(const Formula& first, const Formula& second, bool spaced = false) {
  const std::string tex = inline_tex(first);
  if (tex == "1") return second;
  if (tex == "-1") return negative(second);
  if (inline_tex(second) == "1") return first;
  if (is_number(tex) && !spaced) return held(first, second);
  Formula out = first;
  multiply(out, second, spaced);
  return out;
}

[[nodiscard]] bool is_one(const proof::Factored& value) {
  return value.factors.empty() && value.constant == 1;
}

}  // namespace

bool LatexDocument::weight_is_one() const { return is_one(proof_.telescoping->weight.polynomial); }

std::optional<Formula> LatexDocument::coefficient_value(std::size_t i) {
  if (proof_.telescoping) return values_.factored(proof_.telescoping->coefficients.at(i));
  const auto printed = expressions_.parsed(proof_.recurrence_text.at(i), symbol_names());
  if (!printed) return std::nullopt;
  return printed->formula;
}

bool LatexDocument::coefficients_printable() {
  if (proof_.telescoping) return true;
  for (std::size_t i = 0; i < proof_.recurrence_text.size(); ++i) {
    if (!coefficient_value(i)) return false;
  }
  return true;
}

void LatexDocument::coefficient_list(bool weighted) {
  std::vector<DisplayRow> rows;
  const std::size_t count =
      proof_.telescoping ? proof_.telescoping->coefficients.size() : proof_.recurrence_text.size();
  for (std::size_t i = 0; i < count; ++i) {
    rows.push_back({piece(coefficient(i), 2.8), coefficient_value(i).value_or(Formula{})});
  }
  if (weighted && !weight_is_one()) {
    rows.push_back({of_running('d', 0), values_.factored(proof_.telescoping->weight.polynomial)});
  }
  say(display_list(rows, "."));
}

Formula LatexDocument::weighted_sum() {
  Formula sum;
  const std::size_t count = proof_.telescoping->coefficients.size();
  for (std::size_t i = 0; i < count; ++i) {
    append_term(sum, of_function(piece(coefficient(i), 2.8), at('F', static_cast<long>(i))));
  }
  if (weight_is_one()) return sum;
  return times(of_running('d', 0), count == 1 ? sum : big_bracketed(sum), count == 1);
}

Formula LatexDocument::difference() const {
  Formula out = at('G', 0, 1);
  subtract(out, at('G', 0));
  return out;
}

void LatexDocument::certificate() {
  if (!proof_.telescoping) return;
  head("The certificate");
  const std::string f = inline_tex(at('F', 0));
  say(fmt::format(
      "Let ${}$ be the summand{} and put\n", f,
      claim_.is_equality() ? ", let $" + inline_tex(of_running('S', 0)) + "$ be the sum," : ""));
  coefficient_list(true);
  explain_dots();
  if (!weight_is_one()) {
    say(fmt::format("The factor ${}$, which serves to clear denominators, {}. ",
                    inline_tex(of_running('d', 0)), nonzero_reason(proof_.telescoping->weight)));
  }
  const std::string method =
      proof_.evidence_brought ? "The recurrence was given with the claim. "
      : proof_.order == 0
          ? "The following was found by Gosper's algorithm for indefinite sums. "
          : "The following was found by Zeilberger's method of creative telescoping. ";
  Formula g = at('R', 0);
  if (!weight_is_one()) g = of_function(of_running('d', 0), g);
  say(method + "With $" + inline_tex(at('G', 0)) + "=" + inline_tex(of_function(g, at('F', 0))) +
      "$ and ");
  const auto printed = expressions_.parsed(
      proof_.certificate_text.empty() ? "0" : proof_.certificate_text, symbol_names());
  if (printed && width_of(printed->formula) <= kCertificate) {
    say("the rational function\n" +
        display(at('R', 0), printed->formula, label("certificate"), ""));
  } else {
    say("a rational function $" + inline_tex(at('R', 0)) +
        "$ that is too long to be printed (it stands in \\texttt{obligations.txt} under "
        "\\texttt{certificate}; its numerator is in essence the polynomial " +
        reference("numerator") + "),\n");
  }
  say("we have, after division by $" + f + "$, an identity of rational functions:\n");
  say(display(weighted_sum(), difference(), label("rational"), "."));
  say("At single integer points its terms may have zero denominators. It is therefore not used "
      "there; what is used is the polynomial equality " +
      reference("equality") + ", from which denominators have been removed as follows.\n");
}

void LatexDocument::base_term() {
  if (!proof_.telescoping) return;
  const proof::Telescoping& t = *proof_.telescoping;
  head("The base term");
  pieces();
  say("Put\n" + display(at('B', 0), values_.product(t.base.product), label("base"), ""));
  std::vector<DisplayRow> rows;
  const Formula c = at('c', 0);
  const Formula base = at('B', 0);
  say("and let\n" + display(c, values_.polynomial(t.certificate), label("numerator"), "."));
  for (std::size_t i = 0; i < t.p.size(); ++i) {
    rows.push_back(
        {at('F', static_cast<long>(i)), of_function(values_.factored(t.p[i], false), base)});
  }
  const Formula down = of_function(values_.factored(t.down, false), c);
  rows.push_back({at('G', 0), of_function(down, base)});
  const Formula up = of_function(values_.factored(t.up, false), at('c', 0, 1));
  rows.push_back({at('G', 0, 1), of_function(up, base)});
  explain_dots();
  say(fmt::format("{} is an equality of numbers at all integers with {}:\n", laws(),
                  expressions_.mixed(t.region.text.empty() ? "no restriction" : t.region.text)));
  say(display_list(rows, "."));
  explain_dots();
}

void LatexDocument::parts(char letter, const Formula& name,
                          const std::vector<proof::Product>& products) {
  if (products.size() < 2) {
    const Formula value = products.empty() ? piece("0", 0.52) : values_.product(products[0]);
    say(display(name, value, "", "."));
    return;
  }
  std::vector<DisplayRow> rows;
  Formula sum;
  const std::string arguments = inline_tex(name).substr(names_.letter(letter).size());
  for (std::size_t j = 0; j < products.size(); ++j) {
    const Formula part = piece(fmt::format("{}_{{{}}}{}", names_.letter(letter), j + 1, arguments),
                               0.5 + width_of(name));
    append_term(sum, part);
    rows.push_back({part, values_.product(products[j])});
  }
  say(display(name, sum, "", ",") + "where\n" + display_list(rows, "."));
}

// The parts of a summand that is a sum of several terms, by which later parts name them.
void LatexDocument::pieces() {
  if (proof_.summand.products.size() < 2) return;
  say("The summand has several terms,\n");
  parts('F', at('F', 0), proof_.summand.products);
}

Formula LatexDocument::equality_left() {
  const proof::Telescoping& t = *proof_.telescoping;
  if (t.p.size() == 1) {
    std::vector<const proof::Factored*> factors;
    for (const proof::Factored* factor : {&t.weight.polynomial, &t.coefficients[0], &t.p[0]}) {
      if (!is_one(*factor)) factors.push_back(factor);
    }
    if (factors.size() == 1) return values_.factored(*factors[0]);  // no brackets around a side
  }
  Formula left;
  for (std::size_t i = 0; i < t.p.size(); ++i) {
    append_term(left,
                times(values_.factored(t.coefficients[i], false), values_.factored(t.p[i], false)));
  }
  if (width_of(left) > kExplicit) {
    left.clear();
    for (std::size_t i = 0; i < t.p.size(); ++i) {
      append_term(left, piece(fmt::format("{}_{{{}}}\\,{}_{{{}}}", names_.letter('a'), i,
                                          names_.letter('p'), i),
                              2.4));
    }
    say(fmt::format(
        "Write ${0}_{{i}}$ for the factor of ${1}$ in the list above, ${0}_{{i}}\\,{1}$ being the "
        "term with ${2}+i$. ",
        names_.letter('p'), inline_tex(at('B', 0)), running(0)));
  }
  if (weight_is_one()) return left;
  return times(values_.factored(t.weight.polynomial, false),
               t.p.size() == 1 ? left : big_bracketed(left));
}

void LatexDocument::equality() {
  if (!proof_.telescoping) return;
  const proof::Telescoping& t = *proof_.telescoping;
  head("One polynomial equality");
  const Formula left = equality_left();
  Formula right = piece("0", 0.52);
  if (!t.certificate.terms.empty()) {
    right = of_function(values_.factored(t.up, false), at('c', 0, 1));
    subtract(right, of_function(values_.factored(t.down, false), at('c', 0)));
  }
  say(fmt::format("After division by ${}$ what remains of {} is\n", inline_tex(at('B', 0)),
                  reference("rational")));
  say(display(left, right, label("equality"), "."));
  multiplied_out();
  explain_dots();
  say(fmt::format(
      "This is an equality of polynomials, so no point is an exception to it. Multiplied by "
      "${}$ it gives\n",
      inline_tex(at('B', 0))));
  say(display(weighted_sum(), difference(), label("telescoping"), ""));
  say("for all integers with " +
      expressions_.mixed(t.region.text.empty() ? "no restriction" : t.region.text) + ".\n");
}

void LatexDocument::multiplied_out() {
  const proof::Telescoping& t = *proof_.telescoping;
  const Size size = size_of(t.normal_form);
  if (size.terms == 0) {
    say("Both sides are the zero polynomial. ");
    return;
  }
  std::vector<std::string> degrees;
  for (std::size_t i = 0; i < proof_.symbols.size(); ++i) {
    const long degree = degree_in(t.normal_form, i);
    if (degree < 1) continue;
    degrees.push_back(
        fmt::format("${}$ in ${}$", degree, names_.symbol(proof_.symbols[i].name).tex));
  }
  Formula expanded = values_.polynomial(t.normal_form);
  if (t.normal_scale != 1) {
    proof::Factored scale;
    scale.constant = t.normal_scale;
    const bool one = inline_tex(expanded) == "1";
    expanded = times(values_.factored(scale), one ? expanded : bracketed(expanded));
  }
  say("Both sides, multiplied out, are\n" + display(expanded, {}, "", ""));
  say(fmt::format("({} {}{}{}). ", size.terms, size.terms == 1 ? "term" : "terms",
                  degrees.empty() ? "" : ", of degree ", enumeration(degrees)));
}

}  // namespace sumwright::writers
