// The end of the proof: boundary terms, closed form, leading coefficient, initial values,
// induction.
#include <fmt/format.h>

#include <algorithm>

#include "writers/latex_document.hpp"
#include "writers/latex_text.hpp"

namespace sumwright::writers {

namespace {

constexpr std::size_t kListed = 12;  // initial values and terms shown one by one

constexpr double kShownSum = 8 * kRoom;  // sums that give 0 are written out up to eight lines

[[nodiscard]] bool has_zeros(const proof::Balance& balance) {
  return std::any_of(balance.terms.begin(), balance.terms.end(),
                     [](const proof::BalanceTerm& term) { return term.zero.has_value(); });
}

}  // namespace

std::string LatexDocument::zero_reason(const proof::BalanceTerm& term) {
  if (!term.zero_atom) return "a polynomial factor is $0$";
  const std::string atom = "${1/" + inline_tex(values_.atom(*term.zero_atom)) + "}=0$";
  const std::string id = " (" + latex_text(*term.zero) + ")";
  if (!term.zero_factor) return atom + id;
  const std::string factor = inline_tex(values_.affine(*term.zero_factor));
  return "it has the factor $" + factor + "$, and " + atom + " unless $" + factor + "=0$" + id;
}

// The term in the letters of the argument, with its sign: what `product` is the value of.
Formula LatexDocument::term_label(const proof::BalanceTerm& term, std::optional<long> at) {
  using Origin = proof::BalanceTerm::Origin;
  const auto letter = [&](char name, std::size_t pieces) {
    std::string out = names_.letter(name);
    if (pieces > 1) out += "_{" + std::to_string(term.piece + 1) + "}";
    return out;
  };
  const auto shift = static_cast<long>(term.shift);
  const std::string n = at ? std::to_string(*at + shift) : running(shift);
  const std::string f = letter('F', proof_.summand.products.size());
  const std::string point = inline_tex(values_.affine(term.point));
  const std::string f_value =
      has_index() ? fmt::format("{}({},{})", f, n, point) : fmt::format("{}({})", f, n);
  const std::string a = without_coefficients()
                            ? ""
                            : fmt::format("{}_{{{}}}{}\\,", names_.letter('a'), term.shift,
                                          at ? "(" + std::to_string(*at) + ")" : "");
  const bool weighted = !at && proof_.telescoping && !weight_is_one();
  const std::string d = weighted ? names_.letter('d') + "(" + running(0) + ")\\," : "";
  const auto label = [](const std::string& tex) {
    return piece(tex, 0.42 * static_cast<double>(tex.size()));
  };
  switch (term.origin) {
    case Origin::upper_end: {
      proof::Affine beyond = term.point;
      ++beyond.constant;
      return label(
          fmt::format("{}({},{})", names_.letter('G'), n, inline_tex(values_.affine(beyond))));
    }
    case Origin::lower_end:
      return label(fmt::format("-{}({},{})", names_.letter('G'), n, point));
    case Origin::explicit_point:
      return label(d + a + f_value);
    case Origin::value:
      return label((claim_.is_equality() ? "" : a) + f_value);
    case Origin::right_side:
      return label(
          fmt::format("-{}{}({})", d,
                      letter('b', proof_.right_side ? proof_.right_side->products.size() : 1), n));
    case Origin::closed_form:
      break;
  }
  const std::string c = letter('C', proof_.closed ? proof_.closed->products.size() : 1);
  return label(fmt::format("-{}{}{}({})", d, at ? "" : a, c, n));
}

void LatexDocument::balance_zeros(const proof::Balance& balance, std::optional<long> at) {
  std::string items;
  for (const proof::BalanceTerm& term : balance.terms) {
    if (!term.zero) continue;
    items += fmt::format("\\item ${}=0$, because {}.\n", inline_tex(term_label(term, at)),
                         zero_reason(term));
  }
  if (items.empty()) return;
  say("These terms vanish:\n\\begin{itemize}\\raggedright\n" + items + "\\end{itemize}\n");
}

void LatexDocument::balance_group(const proof::Balance& balance, std::size_t position,
                                  const std::string& place, std::optional<long> at) {
  const proof::BalanceGroup& group = balance.groups[position];
  const bool trivial = group.base.product.atoms.empty();
  Formula base = piece("1", 0.52);
  if (!trivial) {
    base = piece(fmt::format("{}_{{{}}}", names_.letter('E'), ++bases_), 1.2);
    say("With\n" + display(base, values_.product(group.base.product), "", ""));
    say(balance.groups.size() > 1 ? "the similar terms are\n"
        : has_zeros(balance)      ? "the terms that remain are\n"
                                  : "the terms are\n");
  } else {
    say("The terms without factorials and powers are\n");
  }
  std::vector<DisplayRow> rows;
  Formula sum;
  const std::size_t abbreviated = values_.abbreviated();
  for (std::size_t m = 0; m < group.members.size(); ++m) {
    const Formula share = values_.factored(group.polynomials[m], false);
    append_term(sum, share);
    rows.push_back({term_label(balance.terms[group.members[m]], at),
                    trivial ? values_.factored(group.polynomials[m]) : of_function(share, base)});
  }
  say(display_list(rows, ","));
  if (values_.abbreviated() == abbreviated && width_of(sum) <= kShownSum) {
    say("and\n" + display(sum, piece("0", 0.52), "", "."));
    return;
  }
  say(
      fmt::format("and {} add up to $0$; {} in full in \\texttt{{obligations.txt}} under "
                  "\\texttt{{{}class {} share}}.\n",
                  trivial ? "they" : "the polynomials before $" + inline_tex(base) + "$",
                  trivial ? "they are" : "these are", place, position + 1));
  explain_dots();
}

void LatexDocument::balance(const proof::Balance& balance, const std::string& place,
                            std::optional<long> at) {
  balance_zeros(balance, at);
  if (balance.groups.size() > 1) {
    say(fmt::format(
        "The {}terms fall into {} classes of similar terms, each of which adds up to $0$ "
        "by itself. ",
        has_zeros(balance) ? "other " : "", balance.groups.size()));
  }
  for (std::size_t g = 0; g < balance.groups.size(); ++g) balance_group(balance, g, place, at);
}

void LatexDocument::ends() {
  if (!proof_.ends) return;
  if (proof_.telescoping) {
    head("The ends of the range");
    say(fmt::format(
        "It remains to collect the values of ${}$ at the ends and the single terms above, and to "
        "compare them with the right side of {}{}. ",
        names_.letter('G'), reference("claim"),
        weight_is_one() ? "" : " times $" + inline_tex(of_running('d', 0)) + "$"));
  } else {
    single_term();
  }
  if (proof_.right_side && !proof_.right_side->products.empty()) {
    say(fmt::format("Write ${}$ for the right side of {}; in factorials and powers,\n",
                    inline_tex(of_running('b', 0)), reference("claim")));
    parts('b', of_running('b', 0), proof_.right_side->products);
  }
  say(proof_.telescoping ? "Written on one side, they add up to $0$, as follows. "
                         : "Written on one side, the terms add up to $0$, as follows. ");
  balance(*proof_.ends);
}

void LatexDocument::closed_form() {
  if (!proof_.closed_recurrence) return;
  if (proof_.telescoping) {
    head("The closed form");
  } else {
    single_term();
  }
  say(fmt::format("Write ${}$ for the right side of {}; in factorials and powers,\n",
                  inline_tex(of_running('C', 0)), reference("claim")));
  parts('C', of_running('C', 0),
        proof_.closed ? proof_.closed->products : std::vector<proof::Product>{});
  const std::size_t count =
      proof_.telescoping ? proof_.telescoping->coefficients.size() : proof_.recurrence_text.size();
  const char left = proof_.telescoping ? 'S' : 'F';
  Formula sum;
  for (std::size_t i = 0; i < count; ++i) {
    const Formula value = of_running(left, static_cast<long>(i));
    Formula both = value;
    subtract(both, of_running('C', static_cast<long>(i)));
    if (without_coefficients()) {
      sum = both;
    } else {
      append_term(sum, piece(coefficient(i) + "\\bigl(" + inline_tex(both) + "\\bigr)",
                             3.8 + width_of(both)));
    }
  }
  say("We claim that\n" + display(sum, piece("0", 0.52), label("difference"), ""));
  say(fmt::format("for ${}\\ge {}$. ", running(0), proof_.threshold));
  if (proof_.telescoping) {
    say(
        fmt::format("By the summation above, this says that the values of ${}$ at the ends, the "
                    "single terms and the terms with ${}$ add up to $0$. ",
                    names_.letter('G'), names_.letter('C')));
  }
  balance(*proof_.closed_recurrence);
}

std::string LatexDocument::nonzero_reason(const proof::Nonzero& nonzero) {
  std::vector<std::string> reasons;
  using Method = proof::NonzeroFactor::Method;
  for (const proof::NonzeroFactor& factor : nonzero.factors) {
    if (factor.method == Method::constant) continue;
    std::string reason = "$" + inline_tex(values_.polynomial(factor.factor)) + "\\ne 0$ ";
    switch (factor.method) {
      case Method::linear:
        reason += "on the range";
        break;
      case Method::positive: {
        std::vector<std::string> moved;
        for (std::size_t i = 0; i < factor.shift.size() && i < proof_.symbols.size(); ++i) {
          if (factor.shift[i] == 0 || proof_.symbols[i].name.empty()) continue;
          const std::string name = names_.symbol(proof_.symbols[i].name).tex;
          moved.push_back(fmt::format("${}{}{}$", name, factor.shift[i] < 0 ? "" : "-",
                                      factor.shift[i] < 0 ? "+" + std::to_string(-factor.shift[i])
                                                          : std::to_string(factor.shift[i])));
        }
        reason += "because it is a polynomial ";
        if (!moved.empty()) reason += "in " + enumeration(moved) + " ";
        reason += factor.negated ? "with no positive coefficient and a negative constant term"
                                 : "with no negative coefficient and a positive constant term";
        break;
      }
      case Method::excluded:
        reason += "by what the theorem excludes";
        break;
      default:
        reason += "by assumption";
    }
    reasons.push_back(reason);
  }
  if (reasons.empty()) return "is a nonzero constant";
  const std::string id =
      nonzero.condition.empty() ? "" : " (" + latex_text(nonzero.condition) + ")";
  return "is not zero: " + enumeration(reasons) + id;
}

void LatexDocument::leading() {
  if (!proof_.leading || without_coefficients()) return;
  head("The leading coefficient");
  say(fmt::format("The coefficient ${}$, for ${}\\ge {}$, {}.\n", coefficient(proof_.order),
                  running(0), proof_.threshold, nonzero_reason(*proof_.leading)));
}

void LatexDocument::initial_values() {
  if (proof_.initial.empty()) return;
  head("Initial values");
  std::vector<std::string> shown;
  std::size_t symbolic = 0;
  for (const proof::InitialValue& value : proof_.initial) {
    if (!value.value) {
      ++symbolic;
    } else if (shown.size() < kListed) {
      const mpq_class& v = *value.value;
      const std::string text = v.get_str();
      shown.push_back(text.size() > 40
                          ? fmt::format("${}={}$", running(0), value.at)
                          : fmt::format("${}$ at ${}={}$", text, running(0), value.at));
    }
  }
  if (claim_.is_equality()) {
    say("Both sides of " + reference("claim") + " have been computed");
  } else {
    say("The recurrence has been verified by direct computation");
  }
  if (!shown.empty()) {
    say(claim_.is_equality() ? " and agree: they are " : ": both sides are ");
    say(enumeration(shown));
    if (shown.size() + symbolic < proof_.initial.size()) {
      say(fmt::format(", and so on, {} values in all", proof_.initial.size()));
    }
  }
  say(".\n");
  for (std::size_t v = 0; v < proof_.initial.size(); ++v) {
    const proof::InitialValue& value = proof_.initial[v];
    if (value.value || value.balance.groups.empty()) continue;
    say(fmt::format(
        "At ${}={}$ the sum has the terms below; with the right side they add up to $0$. ",
        running(0), value.at));
    balance(value.balance, fmt::format("value {} ", v + 1), value.at);
  }
}

void LatexDocument::conclusion() {
  head("Conclusion");
  const std::string n = running(0);
  if (!claim_.is_equality()) {
    say(fmt::format(
        "This proves {} for ${}\\ge {}$.{}\n", reference("claim"), n, proof_.threshold,
        proof_.initial.empty() ? "" : " For smaller values it has been verified directly."));
    return;
  }
  if (proof_.order == 0) {
    say(fmt::format(
        "{}{} gives {} for ${}\\ge {}$.{}\n",
        without_coefficients() ? "Equation " : "Since the coefficient is not zero, ",
        reference("difference"), reference("claim"), n, proof_.threshold,
        proof_.initial.empty() ? "" : " For smaller values it has been computed directly."));
    return;
  }
  const long values = static_cast<long>(proof_.order);
  say(fmt::format(
      "The difference of the two sides of {} satisfies {}, whose leading coefficient is not zero "
      "for ${}\\ge {}$, and vanishes for ${}$. By induction it vanishes for every ${}\\ge {}$.\n",
      reference("claim"), reference("difference"), n, proof_.threshold,
      proof_.threshold + values - 1 == proof_.from
          ? fmt::format("{}={}", n, proof_.from)
          : fmt::format("{}\\le {}\\le {}", proof_.from, n, proof_.threshold + values - 1),
      n, proof_.from));
}

}  // namespace sumwright::writers
