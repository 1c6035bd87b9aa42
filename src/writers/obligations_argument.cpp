// The argument's sections of obligations.txt: term, base term, equality, ranges, balances, values.
//
// Each value of the Proof becomes one entry; keys are numbered by position, shifts from 0.
#include <fmt/format.h>

#include "writers/obligations_sections.hpp"

namespace sumwright::writers {

namespace {

[[nodiscard]] std::string region_text(const proof::Region& region) {
  return region.text.empty() ? "everywhere" : region.text;
}

// `shown`: the left side as printed before, which need not be repeated.
void write_instance(ObligationsDocument& out, const TextPrinter& print, const std::string& key,
                    const proof::Instance& instance, const std::string& shown = {}) {
  out.statement(key + " on", region_text(instance.region));
  const std::string left = print.product(instance.left);
  if (left != shown) out.definition(key + " left", left);
  out.definition(key + " right", print.product(instance.right));
  std::size_t count = 0;
  for (const proof::Unit& unit : instance.left_units) {
    out.statement(fmt::format("{} left unit {}", key, ++count), print.unit(unit));
  }
  count = 0;
  for (const proof::Unit& unit : instance.right_units) {
    out.statement(fmt::format("{} right unit {}", key, ++count), print.unit(unit));
  }
  count = 0;
  for (const proof::AtomStep& step : instance.steps) {
    const bool on_left = step.side == proof::AtomStep::Side::left;
    out.statement(fmt::format("{} step {}", key, ++count),
                  fmt::format("{}: {}", on_left ? "left" : "right", print.step(step)));
  }
  if (instance.cancelled) write_nonzero(out, print, key + " cancelled", *instance.cancelled);
}

[[nodiscard]] std::string vanishing_text(const TextPrinter& print,
                                         const proof::Vanishing& vanishing) {
  std::string out;
  for (const proof::Atom& atom : vanishing.atoms) {
    out += (out.empty() ? "" : ", ") + print.atom(atom) + " = 0";
  }
  return out + " [" + vanishing.condition + "]";
}

void write_zero_range(ObligationsDocument& out, const TextPrinter& print, const std::string& key,
                      const std::optional<proof::Vanishing>& vanishing) {
  if (vanishing) out.statement(key, vanishing_text(print, *vanishing));
}

// The texts of terms are without sign and weight; their values contain both.
[[nodiscard]] std::string sign_text(const proof::BalanceTerm& term, bool weighted) {
  using Origin = proof::BalanceTerm::Origin;
  const bool end = term.origin == Origin::upper_end || term.origin == Origin::lower_end;
  const bool minus = term.origin == Origin::lower_end || term.origin == Origin::right_side ||
                     term.origin == Origin::closed_form;
  return std::string(minus ? "- " : "") + (weighted && !end ? "weight * " : "");
}

void write_group(ObligationsDocument& out, const TextPrinter& print, const std::string& key,
                 const proof::BalanceGroup& group) {
  out.definition(key + " base", print.product(group.base.product));
  for (std::size_t m = 0; m < group.members.size() && m < group.polynomials.size(); ++m) {
    out.statement(fmt::format("{} member {}", key, m + 1),
                  fmt::format("term {}", group.members[m] + 1));
    out.definition(fmt::format("{} share {}", key, m + 1), print.factored(group.polynomials[m]));
  }
}

}  // namespace

void write_nonzero(ObligationsDocument& out, const TextPrinter& print, const std::string& key,
                   const proof::Nonzero& nonzero) {
  out.definition(key, print.factored(nonzero.polynomial));
  for (std::size_t i = 0; i < nonzero.factors.size(); ++i) {
    out.statement(fmt::format("{} factor {}", key, i + 1),
                  print.nonzero_factor(nonzero.factors[i]));
  }
  if (!nonzero.condition.empty()) out.statement(key + " condition", nonzero.condition);
}

void write_conversion(ObligationsDocument& out, const TextPrinter& print,
                      const proof::Conversion& conversion) {
  out.definition("written", to_text(*conversion.expression));
  for (std::size_t j = 0; j < conversion.products.size(); ++j) {
    out.definition(fmt::format("product {}", j + 1), print.product(conversion.products[j]));
  }
  out.statement("on", region_text(conversion.region));
  out.blank();
  for (std::size_t j = 0; j < conversion.leaves.size(); ++j) {
    const proof::Leaf& leaf = conversion.leaves[j];
    const std::string key = fmt::format("rule {}", j + 1);
    out.statement(key, word(leaf.rule));
    out.statement(key + " gives",
                  fmt::format("{} = {}{}", to_text(*leaf.expression), print.product(leaf.value),
                              bracketed_ids(leaf.conditions)));
    for (std::size_t z = 0; z < leaf.nonzero.size(); ++z) {
      write_nonzero(out, print, fmt::format("{} nonzero {}", key, z + 1), leaf.nonzero[z]);
    }
  }
  for (std::size_t j = 0; j < conversion.denominators.size(); ++j) {
    const proof::Denominator& denominator = conversion.denominators[j];
    const std::string key = fmt::format("denominator {}", j + 1);
    out.statement(key, fmt::format("{} = {}, its reciprocal {}{}", to_text(*denominator.expression),
                                   print.product(denominator.as_product),
                                   print.product(denominator.reciprocal),
                                   bracketed_ids(denominator.conditions)));
    for (std::size_t u = 0; u < denominator.units.size(); ++u) {
      out.statement(fmt::format("{} unit {}", key, u + 1), print.unit(denominator.units[u]));
    }
  }
  for (std::size_t j = 0; j < conversion.units.size(); ++j) {
    for (std::size_t u = 0; u < conversion.units[j].size(); ++u) {
      out.statement(fmt::format("product {} cancelled {}", j + 1, u + 1),
                    print.unit(conversion.units[j][u]));
    }
  }
  out.statement("defined by", id_list(conversion.definedness));
}

void write_base(ObligationsDocument& out, const TextPrinter& print,
                const proof::Telescoping& telescoping) {
  out.heading("base term");
  out.remark(
      "With i the shift and k the index: F(n + i, k) = p_i * B, G(n, k) = down * c * B, "
      "G(n, k + 1) = up * c(k + 1) * B.");
  out.blank();
  out.definition("B", print.product(telescoping.base.product));
  out.statement("region", region_text(telescoping.region));
  out.definition("low", print.affine(telescoping.low));
  out.definition("high", print.affine(telescoping.high));
  out.statement("conditions", id_list(telescoping.conditions));
  out.blank();
  write_nonzero(out, print, "weight", telescoping.weight);
  for (std::size_t i = 0; i < telescoping.coefficients.size(); ++i) {
    out.definition(fmt::format("a_{}", i), print.factored(telescoping.coefficients[i]));
  }
  for (std::size_t i = 0; i < telescoping.p.size(); ++i) {
    out.definition(fmt::format("p_{}", i), print.factored(telescoping.p[i]));
  }
  out.definition("c", print.polynomial(telescoping.certificate));
  out.definition("down", print.factored(telescoping.down));
  out.definition("up", print.factored(telescoping.up));
  for (std::size_t i = 0; i < telescoping.shifts.size(); ++i) {
    for (std::size_t j = 0; j < telescoping.shifts[i].size(); ++j) {
      out.blank();
      write_instance(out, print, fmt::format("shift {} {}", i, j + 1), telescoping.shifts[i][j]);
    }
  }
  if (telescoping.index_shift) {
    out.blank();
    write_instance(out, print, "index shift", *telescoping.index_shift);
  }
}

void write_equality(ObligationsDocument& out, const TextPrinter& print, const proof::Proof& proof) {
  const proof::Telescoping& telescoping = *proof.telescoping;
  std::string left;
  for (std::size_t i = 0; i < telescoping.p.size(); ++i) {
    left += fmt::format("{}a_{}*p_{}", i == 0 ? "" : " + ", i, i);
  }
  out.heading("equality");
  out.remark(
      "Of polynomials, for all values of the symbols. The normal form is that of the left "
      "side: primitive over the integers, leading coefficient positive, terms in descending "
      "lexicographic order, the symbols in the order of their list; left side = scale * "
      "normal form.");
  out.blank();
  out.definition("left", "weight*(" + left + ")");
  out.definition("right", "up*c(k + 1) - down*c(k)");
  const Size size = size_of(telescoping.normal_form);
  out.statement("terms", std::to_string(size.terms));
  out.statement("degree", std::to_string(size.degree));
  std::size_t count = 0;
  for (std::size_t i = 0; i < proof.symbols.size(); ++i) {
    if (proof.symbols[i].name.empty()) continue;
    out.statement(fmt::format("degree in symbol {}", ++count),
                  std::to_string(degree_in(telescoping.normal_form, i)));
  }
  out.statement("bits", std::to_string(size.bits));
  out.definition("scale", telescoping.normal_scale.get_str());
  out.definition("normal form", print.polynomial(telescoping.normal_form));
}

void write_finite_range(ObligationsDocument& out, const TextPrinter& print,
                        const proof::FiniteRange& finite) {
  out.remark(
      "An infinite end of the author's range stands for every finite one beyond which all terms "
      "are 0; these ends are used in its place.");
  out.blank();
  out.statement("finite low", claim::to_text(*finite.range.low.value));
  out.statement("finite high", claim::to_text(*finite.range.high.value));
  write_zero_range(out, print, "finite zero below", finite.below);
  write_zero_range(out, print, "finite zero above", finite.above);
  out.blank();
}

void write_ranges(ObligationsDocument& out, const TextPrinter& print, const proof::Proof& proof) {
  out.heading("ranges");
  out.remark(
      "The author's sum at n + i is the sum of F(n + i, k) over low..high, plus the given "
      "numbers of terms just below low and just above high.");
  out.blank();
  if (proof.finite_range) write_finite_range(out, print, *proof.finite_range);
  for (const proof::RangeStep& step : proof.ranges) {
    const std::string key = fmt::format("range {}", step.shift);
    out.statement(key, fmt::format("{} below, {} above", step.low_points, step.high_points));
    write_zero_range(out, print, key + " zero below", step.below);
    write_zero_range(out, print, key + " zero above", step.above);
  }
}

void write_balance(ObligationsDocument& out, const TextPrinter& print, const std::string& prefix,
                   const proof::Balance& balance, bool weighted) {
  out.statement(prefix + "terms add up to 0", region_text(balance.region));
  for (std::size_t t = 0; t < balance.terms.size(); ++t) {
    const proof::BalanceTerm& term = balance.terms[t];
    const std::string key = fmt::format("{}term {}", prefix, t + 1);
    out.statement(key, sign_text(term, weighted) + term.text);
    const std::string value = print.product(term.product);
    out.definition(key + " value", value);
    if (term.zero) {
      const std::string first =
          term.zero_factor ? print.affine(*term.zero_factor) + " = 0 or " : std::string();
      const std::string by =
          term.zero_atom ? first + print.atom(*term.zero_atom) + " = 0, " : std::string();
      out.statement(key + " vanishes", by + *term.zero);
    }
    if (term.instance) write_instance(out, print, key, *term.instance, value);
  }
  for (std::size_t g = 0; g < balance.groups.size(); ++g) {
    write_group(out, print, fmt::format("{}class {}", prefix, g + 1), balance.groups[g]);
  }
}

void write_initial_values(ObligationsDocument& out, const TextPrinter& print,
                          const proof::Proof& proof) {
  out.heading("initial values");
  for (std::size_t v = 0; v < proof.initial.size(); ++v) {
    const proof::InitialValue& initial = proof.initial[v];
    const std::string key = fmt::format("value {}", v + 1);
    if (v > 0) out.blank();
    out.statement(key, fmt::format("{} = {}", proof.symbols[0].name, initial.at));
    if (initial.value) out.definition(key + " both", initial.value->get_str());
    for (std::size_t s = 0; s < initial.sums.size(); ++s) {
      const proof::LiteralSum& sum = initial.sums[s];
      const std::string sum_key = fmt::format("{} sum {}", key, s + 1);
      const std::size_t symbols = proof.symbols.size();
      out.statement(sum_key, fmt::format("S({}), index {}..{}", sum.at,
                                         print.affine(sum.point(symbols, sum.low)),
                                         print.affine(sum.point(symbols, sum.high))));
      write_zero_range(out, print, sum_key + " zero below", sum.below);
      write_zero_range(out, print, sum_key + " zero above", sum.above);
    }
    write_balance(out, print, key + " ", initial.balance, false);
  }
}

}  // namespace sumwright::writers
