// From a Proof to obligations.txt: what was to be proved, and everything the argument rests on.
//
// Sections in the order of the argument; the grammar is templates/obligations.ebnf. All data of the
// Proof that a re-check compares is written, nothing is computed.
#include <fmt/format.h>

#include <algorithm>

#include "claim/text.hpp"
#include "writers/claim_text.hpp"
#include "writers/obligations_document.hpp"
#include "writers/obligations_sections.hpp"
#include "writers/print_text.hpp"
#include "writers/sha256.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {

namespace {

void write_counterexample(ObligationsDocument& out, const proof::Counterexample& point) {
  std::string values;
  for (const auto& [name, value] : point.values) {
    values += fmt::format("{}{} = {}", values.empty() ? "" : ", ", name, value.get_str());
  }
  out.statement("counterexample", fmt::format("{} at {}", point.what, values));
  out.statement("left value", point.left);
  out.statement("right value", point.right);
}

void write_front(ObligationsDocument& out, const proof::Proof& proof) {
  const bool established = proof.verdict == proof::Verdict::established;
  out.statement("verdict",
                established ? word(proof.verdict) : "NOT ESTABLISHED, " + word(proof.verdict));
  out.statement("subject", word(proof.subject));
  out.statement("title", proof.claim->title);
  out.statement("claim kind", claim_kind(proof));
  out.statement("statement", statement_text(proof));
  if (!proof.reason.empty()) out.statement("reason", proof.reason);
  if (!proof.would_settle.empty()) out.statement("would settle", proof.would_settle);
  if (proof.counterexample) write_counterexample(out, *proof.counterexample);
  if (!proof.residue.empty()) out.statement("residue", proof.residue);
  std::size_t count = 0;
  for (const proof::Condition& condition : proof.conditions) {
    if (condition.settled != proof::Settled::open) continue;
    out.statement(fmt::format("open {}", ++count),
                  fmt::format("{}: {}", condition.id, condition.text));
  }
  out.blank();
  if (established) {
    out.remark(
        "This file states a summation claim and every obligation on which its proof rests. "
        "It can be checked with nothing else at hand: the claim's own text is the next "
        "section, and sum, term, base term and equality can be rebuilt from it.");
  } else {
    out.remark(
        "This claim is NOT established. What follows is as far as the argument goes; items "
        "marked open are not proved.");
  }
  out.blank();
  out.remark(
      "fact(L) is L!, used where L >= 0; rfact(L) is 1/L! for L >= 0 and 0 for L < 0; "
      "ip(a; i, j) is the product of a + t for i <= t < j; rip(a; i, j) is 1/ip(a; i, j); "
      "inv(P) is 1/P. Lines that start with # are remarks; conditions are named c1, c2, ... "
      "and listed near the end.");
}

// Characters that reorder or hide text make the block look other than it is.
[[nodiscard]] bool has_hidden_characters(std::string_view text) {
  for (std::size_t at = 0; at < text.size();) {
    const claim::Character character = claim::decode(text, at);
    const bool plain = text[at] == '\n' || text[at] == '\r' || text[at] == '\t';
    const bool mark = at == 0 && character.code == 0xFEFF;
    if (!plain && !mark && (!character.valid || claim::is_unprintable(character.code))) return true;
    at += character.length;
  }
  return false;
}

void write_claim(ObligationsDocument& out, const claim::Claim& claim) {
  const std::string& text = claim.source->text;
  out.heading("claim");
  out.statement("sha256", sha256(text));
  out.statement("bytes", std::to_string(text.size()));
  out.blank();
  out.remark("The claim file, byte for byte, each line behind a bar.");
  if (has_hidden_characters(text)) {
    out.remark("It contains characters that do not show or that reorder text.");
  }
  out.blank();
  out.block(text);
}

[[nodiscard]] std::string kind_words(proof::SymbolKind kind) {
  switch (kind) {
    case proof::SymbolKind::running:
      return "running variable, integer";
    case proof::SymbolKind::index:
      return "summation index, integer";
    case proof::SymbolKind::integer_parameter:
      return "parameter, integer";
    case proof::SymbolKind::rational_parameter:
      break;
  }
  return "parameter, any number of a field of characteristic zero";
}

void write_symbols(ObligationsDocument& out, const proof::Proof& proof) {
  out.heading("symbols");
  std::size_t count = 0;
  for (const proof::Symbol& symbol : proof.symbols) {
    if (symbol.name.empty()) continue;
    out.statement(fmt::format("symbol {}", ++count), symbol.name + ", " + kind_words(symbol.kind));
  }
  count = 0;
  for (const std::string& text : hypothesis_texts(*proof.claim)) {
    out.statement(fmt::format("hypothesis {}", ++count), text);
  }
}

void write_recurrence(ObligationsDocument& out, const proof::Proof& proof,
                      const TextPrinter& print) {
  const StatedRecurrence stated = stated_recurrence(proof);
  if (stated.coefficients.empty()) return;
  const bool established = proof.verdict == proof::Verdict::established;
  out.heading("recurrence");
  out.remark(
      "coefficient 0 * S(n) + coefficient 1 * S(n + 1) + ... = right side, S the sum and n "
      "the running variable.");
  if (!established) out.remark("That the sum satisfies it for every n is NOT proved.");
  out.blank();
  const std::string origin = stated.brought ? "brought by the author" : "found";
  out.statement("evidence", established ? origin : origin + "; not proved");
  out.statement("order", std::to_string(stated.coefficients.size() - 1));
  out.statement("from", std::to_string(proof.from));
  if (established) out.statement("threshold", std::to_string(proof.threshold));
  for (std::size_t i = 0; i < stated.coefficients.size(); ++i) {
    out.definition(fmt::format("coefficient {}", i), stated.coefficients[i]);
  }
  if (!stated.right_side.empty()) out.definition("right side", stated.right_side);
  if (!stated.certificate.empty()) out.definition("certificate", stated.certificate);
  for (std::size_t i = 0; i < proof.boundary.size(); ++i) {
    out.definition(fmt::format("boundary {}", i + 1), print.product(proof.boundary[i]));
  }
}

void write_argument(ObligationsDocument& out, const proof::Proof& proof, const TextPrinter& print) {
  if (proof.telescoping) {
    write_base(out, print, *proof.telescoping);
    write_equality(out, print, proof);
  }
  if (!proof.ranges.empty()) write_ranges(out, print, proof);
  const bool weighted =
      proof.telescoping && print.factored(proof.telescoping->weight.polynomial) != "1";
  if (proof.ends) {
    out.heading("ends");
    write_balance(out, print, "", *proof.ends, weighted);
  }
  if (proof.closed_recurrence) {
    out.heading("closed recurrence");
    write_balance(out, print, "", *proof.closed_recurrence, weighted);
  }
  if (proof.leading) {
    out.heading("leading coefficient");
    write_nonzero(out, print, "leading", *proof.leading);
  }
  if (!proof.initial.empty()) write_initial_values(out, print, proof);
}

void write_conditions(ObligationsDocument& out, const proof::Proof& proof) {
  if (proof.conditions.empty()) return;
  out.heading("conditions");
  for (const proof::Condition& condition : proof.conditions) {
    std::string text = fmt::format("[{}] {}", word(condition.kind), condition.text);
    if (!condition.region.empty()) text += " | " + condition.region;
    text += " | " + word(condition.settled);
    if (!condition.method.empty()) text += ": " + condition.method;
    out.statement(condition.id, text);
  }
}

void write_conclusion(ObligationsDocument& out, const proof::Proof& proof) {
  out.heading("conclusion");
  out.statement("verdict", word(proof.verdict));
  const auto count = [&](proof::Settled settled) {
    return std::count_if(proof.conditions.begin(), proof.conditions.end(),
                         [&](const proof::Condition& c) { return c.settled == settled; });
  };
  out.statement("conditions",
                fmt::format("{} decided, {} given, {} open", count(proof::Settled::decided),
                            count(proof::Settled::given), count(proof::Settled::open)));
}

}  // namespace

std::string obligations_text(const proof::Proof& proof) {
  ObligationsDocument out;
  const TextPrinter print(proof.symbols);
  write_front(out, proof);
  write_claim(out, *proof.claim);
  write_symbols(out, proof);
  if (proof.summand.expression) {
    out.heading("term");
    write_conversion(out, print, proof.summand);
  }
  if (proof.closed) {
    out.heading("closed form");
    write_conversion(out, print, *proof.closed);
  }
  if (proof.right_side) {
    out.heading("right side");
    write_conversion(out, print, *proof.right_side);
  }
  write_recurrence(out, proof, print);
  write_argument(out, proof, print);
  write_conditions(out, proof);
  write_conclusion(out, proof);
  return out.text();
}

}  // namespace sumwright::writers
