// The core of the proof: certificate, base term, the polynomial equality.
#include <fmt/format.h>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"
#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

constexpr double kExplicit = 6 * kRoom;  // the equality is written out up to six lines

// A product of two factored polynomials, side by side.
[[nodiscard]] Formula side_by_side(Formula first, Formula second) {
  const std::string tex = inline_tex(first);
  if (tex == "1") return second;
  if (inline_tex(second) == "1") return first;
  if (tex == "-1") first = piece("-", 0.8);
  if (starts_with_minus(second)) second = bracketed(second);
  const char start = second.front().tex[0];
  const bool digit = start >= '0' && start <= '9';
  if (digit && inline_tex(first) != "-") prepend_tex(second, "\\cdot ", 0.8);
  second.front().product = true;
  if (inline_tex(first) == "-") {
    prepend_tex(second, "-", 0.8);
    return second;
  }
  append(first, second, 1);
  return first;
}

// `factor` times a function such as B(n,k).
[[nodiscard]] Formula times(Formula factor, const Formula& function) {
  const std::string tex = inline_tex(factor);
  if (tex == "1") return function;
  if (tex == "-1") factor = piece("-", 0.8);
  append_tex(factor, "\\," + inline_tex(function), width_of(function) + 0.2);
  return factor;
}

}  // namespace

bool LatexDocument::weight_is_one() const {
  return proof_.telescoping->weight.polynomial.factors.empty() &&
         proof_.telescoping->weight.polynomial.constant == 1;
}

void LatexDocument::coefficient_list() {
  std::vector<DisplayRow> rows;
  const auto& coefficients = proof_.telescoping->coefficients;
  for (std::size_t i = 0; i < coefficients.size(); ++i) {
    rows.push_back({piece(fmt::format("{}_{{{}}}({})", names_.letter('a'), i, running(0)), 2.8),
                    values_.factored(coefficients[i])});
  }
  say(display_list(rows, "."));
}

void LatexDocument::certificate() {
  if (!proof_.telescoping) return;
  head("The certificate");
  const std::string f = inline_tex(at('F', 0));
  say(fmt::format(
      "Let ${}$ be the summand{} and put\n", f,
      claim_.is_equality() ? ", let $" + inline_tex(of_running('S', 0)) + "$ be the sum," : ""));
  coefficient_list();
  const std::string method =
      proof_.evidence_brought ? "The recurrence was given with the claim. "
      : proof_.order == 0
          ? "The following was found by Gosper's algorithm for indefinite sums. "
          : "The following was found by Zeilberger's method of creative telescoping. ";
  Formula left;
  for (std::size_t i = 0; i < proof_.telescoping->coefficients.size(); ++i) {
    const Formula function = at('F', static_cast<long>(i));
    const Formula coefficient =
        piece(fmt::format("{}_{{{}}}({})", names_.letter('a'), i, running(0)), 2.8);
    append_term(left, times(coefficient, function));
  }
  Formula right = at('G', 0, 1);
  append(right, piece("-" + inline_tex(at('G', 0)), width_of(at('G', 0)) + 1.25));
  say(method + "With $" + inline_tex(at('G', 0)) + "=" + inline_tex(at('R', 0)) + "\\," + f +
      "$ and ");
  const auto printed = expressions_.parsed(
      proof_.certificate_text.empty() ? "0" : proof_.certificate_text, symbol_names());
  if (printed) {
    say("the rational function\n" +
        display(at('R', 0), printed->formula, label("certificate"), ""));
  } else {
    say("a rational function $" + inline_tex(at('R', 0)) +
        "$ that is too long to be printed (it stands in \\texttt{obligations.txt} under "
        "\\texttt{certificate}; its numerator is in essence the polynomial " +
        reference("numerator") + "),\n");
  }
  say("we have, after division by $" + f + "$, an identity of rational functions:\n");
  say(display(left, right, label("rational"), "."));
  say("At single integer points its terms may have zero denominators. It is therefore not used "
      "there; "
      "what is used is the polynomial equality " +
      reference("equality") +
      ", from which "
      "denominators have been removed as follows.\n");
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
    rows.push_back({at('F', static_cast<long>(i)), times(values_.factored(t.p[i], false), base)});
  }
  rows.push_back({at('G', 0), times(times(values_.factored(t.down, false), c), base)});
  rows.push_back({at('G', 0, 1), times(times(values_.factored(t.up, false), at('c', 0, 1)), base)});
  if (!weight_is_one()) {
    say(fmt::format("From here on, both sides of {} are multiplied by\n", reference("rational")));
    say(display(of_running('d', 0), values_.factored(t.weight.polynomial), "", ","));
    say("and the factor is taken into $" + inline_tex(at('G', 0)) + "$. The factor " +
        nonzero_reason(t.weight) + ". ");
  }
  say(fmt::format("{} is an equality of numbers at all integers with {}:\n", laws(),
                  expressions_.mixed(t.region.text.empty() ? "no restriction" : t.region.text)));
  say(display_list(rows, "."));
}

// The parts of a summand that is a sum of several terms, by which later parts name them.
void LatexDocument::pieces() {
  if (proof_.summand.products.size() < 2) return;
  std::vector<DisplayRow> rows;
  Formula sum;
  for (std::size_t j = 0; j < proof_.summand.products.size(); ++j) {
    const std::string tex = inline_tex(at('F', 0));
    const std::string letter = names_.letter('F');
    const Formula name =
        piece(letter + "_{" + std::to_string(j + 1) + "}" + tex.substr(letter.size()),
              0.5 + width_of(at('F', 0)));
    append_term(sum, name);
    rows.push_back({name, values_.product(proof_.summand.products[j])});
  }
  say("The summand has several terms,\n" + display(at('F', 0), sum, "", ",") + "where\n" +
      display_list(rows, "."));
}

void LatexDocument::equality() {
  if (!proof_.telescoping) return;
  const proof::Telescoping& t = *proof_.telescoping;
  head("One polynomial equality");
  Formula left;
  for (std::size_t i = 0; i < t.p.size(); ++i) {
    append_term(left, side_by_side(values_.factored(t.coefficients[i], false),
                                   values_.factored(t.p[i], false)));
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
  if (!weight_is_one()) {
    left = side_by_side(values_.factored(t.weight.polynomial, false),
                        t.p.size() == 1 ? left : big_bracketed(left));
  }
  Formula right;
  if (t.certificate.terms.empty()) {
    right = piece("0", 0.52);
  } else {
    right = times(values_.factored(t.up, false), at('c', 0, 1));
    Formula down = times(values_.factored(t.down, false), at('c', 0));
    if (starts_with_minus(down)) down = bracketed(down);
    prepend_tex(down, "-", 1.25);
    append(right, down);
  }
  say(fmt::format("After division by ${}$ what remains of {} is\n", inline_tex(at('B', 0)),
                  reference("rational")));
  say(display(left, right, label("equality"), "."));
  const Size size = size_of(t.normal_form);
  std::vector<std::string> degrees;
  for (std::size_t i = 0; i < proof_.symbols.size(); ++i) {
    const long degree = degree_in(t.normal_form, i);
    if (degree < 1) continue;
    degrees.push_back(
        fmt::format("${}$ in ${}$", degree, names_.symbol(proof_.symbols[i].name).tex));
  }
  if (size.terms == 0) {
    say("Both sides are the zero polynomial. ");
  } else {
    Formula expanded = values_.polynomial(t.normal_form);
    if (t.normal_scale != 1) {
      proof::Factored scale;
      scale.constant = t.normal_scale;
      const bool one = inline_tex(expanded) == "1";
      expanded = side_by_side(values_.factored(scale), one ? expanded : bracketed(expanded));
    }
    say("Both sides, multiplied out, are\n" + display(expanded, {}, "", ""));
    say(fmt::format("({} {}{}{}). ", size.terms, size.terms == 1 ? "term" : "terms",
                    degrees.empty() ? "" : ", of degree ", enumeration(degrees)));
  }
  if (values_.abbreviated() > 0) {
    say(
        fmt::format("Dots stand for terms that are not printed: all polynomials are in full in the "
                    "file \\texttt{{obligations.txt}}, whose SHA-256 is given at the end. "));
  }
  Formula sum;
  for (std::size_t i = 0; i < t.coefficients.size(); ++i) {
    append_term(sum,
                times(piece(fmt::format("{}_{{{}}}({})", names_.letter('a'), i, running(0)), 2.8),
                      at('F', static_cast<long>(i))));
  }
  if (!weight_is_one()) {
    Formula d = of_running('d', 0);
    if (t.p.size() == 1) append_tex(d, "\\,", 0.2);
    sum = side_by_side(d, t.p.size() == 1 ? sum : big_bracketed(sum));
  }
  Formula difference = at('G', 0, 1);
  append(difference, piece("-" + inline_tex(at('G', 0)), width_of(at('G', 0)) + 1.25));
  say(fmt::format(
      "This is an equality of polynomials, so no point is an exception to it. Multiplied by "
      "${}$ it gives\n",
      inline_tex(at('B', 0))));
  say(display(sum, difference, label("telescoping"), ""));
  say("for all integers with " +
      expressions_.mixed(t.region.text.empty() ? "no restriction" : t.region.text) + ".\n");
}

}  // namespace sumwright::writers
