// Comments of a generated file. Invariant: whatever the claim's texts are, a comment ends where
// this file ends it; only expressions printed from parse trees and sanitised titles are quoted.

#include "writers/coq_comments.hpp"

#include <fmt/format.h>

#include <cctype>

#include "claim/text.hpp"
#include "writers/claim_text.hpp"
#include "writers/coq_sections.hpp"
#include "writers/coq_statement.hpp"
#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

namespace {

std::string listed(const std::vector<std::string>& items, const char* last = " and ") {
  std::string out;
  for (std::size_t i = 0; i < items.size(); ++i)
    out += (i == 0 ? "" : (i + 1 == items.size() ? last : ", ")) + items[i];
  return out;
}

/// "x and y are any elements of K, m is any integer".
std::string parameters_in_words(const claim::Claim& claim) {
  std::vector<std::string> rational;
  std::vector<std::string> integer;
  for (const claim::Parameter& p : claim.parameters)
    (p.ring == claim::Parameter::Ring::rationals ? rational : integer).push_back(p.name);
  std::string out;
  if (!rational.empty())
    out += fmt::format("; {} {}", listed(rational),
                       rational.size() == 1 ? "is any element of K" : "are any elements of K");
  if (!integer.empty())
    out += fmt::format("; {} {}", listed(integer),
                       integer.size() == 1 ? "is any integer" : "are any integers");
  return out;
}

std::string renamed(const proof::Proof& proof) {
  std::vector<std::string> out;
  for (const proof::Symbol& s : proof.symbols)
    if (!s.name.empty() && safe_name(s.name) != s.name)
      out.push_back(fmt::format("{} is [{}]", s.name, safe_name(s.name)));
  return out.empty() ? "" : "    Renamed in this file: " + listed(out) + ".\n\n";
}

/// The lines of the legend, for the names that the proof has.
class Legend {
 public:
  explicit Legend(const proof::Proof& proof) : proof_(proof), names_(names(proof)) {}

  std::string run() {
    out_ =
        "(** ** The argument, in the order of the file\n\n"
        "    Both sides are shown to satisfy one recurrence in the running variable.  The "
        "names:\n\n";
    terms();
    if (proof_.telescoping) telescoping();
    remainder();
    if (proof_.claim->is_equality()) {
      item("[right_recurrence], [leading], [initial]",
           "the right side satisfies the same recurrence, its leading coefficient is not 0, and "
           "the first values agree; [conclusion] is then an induction");
    } else {
      item("[right_recurrence]", "what remains is the right side of the claimed recurrence");
    }
    item(
        "tactics",
        "[pq] and [pqf] prove equalities of polynomials in K, [index] linear facts about integers; "
        "every rewriting step names its law and its arguments");
    out_.back() = ' ';
    return out_ + "*)\n\n";
  }

 private:
  void item(const std::string& names, const std::string& words) {
    out_ += fmt::format("    - {}: {}.\n", names, words);
  }

  static std::string numbered(const std::string& letter, std::size_t count) {
    if (count == 1) return fmt::format("[{}1]", letter);
    return fmt::format("[{0}1] ... [{0}{1}]", letter, count);
  }

  void terms() {
    item("[summand], [left_side], [right_side]", "the texts of the claim, as written");
    item("atoms",
         "[factorial m]; [rfactorial m] = 1/m!, which is 0 for m < 0; [zpow b m] = b^m; "
         "[ip v i j] = (v + i)(v + i + 1)...(v + j - 1); [rip v i j] = 1/ip; inverses");
    if (!proof_.summand.products.empty())
      item(numbered("F", proof_.summand.products.size()),
           "the summand is the sum of these: products of atoms ([summand_terms])");
    if (proof_.closed && !proof_.closed->products.empty())
      item(numbered("C", proof_.closed->products.size()), "the same for the right side");
    if (proof_.right_side && !proof_.right_side->products.empty())
      item(numbered("b", proof_.right_side->products.size()), "the same for the right side");
    item("[.._leaf_i], [.._denominator_i]",
         "one lemma for each function call or power, and for each divisor");
  }

  void telescoping() {
    const std::string& n = names_.n;
    const std::string& k = names_.k;
    item("[base]",
         fmt::format("a product of atoms; every term is a polynomial times it, Fj ({0} + i) {1} = "
                     "pi_j {0} {1} * base {0} {1} ([term_shift_i_j])",
                     n, k));
    item("[a0], [a1], ...",
         "the coefficients of the recurrence; [weight] is a common factor without the index");
    item(
        "[c], [down], [up]",
        fmt::format("the certificate is G {0} {1} = down {0} {1} * c {0} {1} * base {0} {1}; "
                    "[index_shift] gives G {0} ({1} + 1) = up {0} {1} * c {0} ({1} + 1) * base {0} "
                    "{1}",
                    n, k));
    item("[equality]",
         "the one identity of polynomials; it gives [telescoping], that the recurrence's "
         "combination of terms is G at the next index minus G");
    item("[left_end], [right_end]",
         "G at the first index and after the last one: what the sum over the common range is "
         "([summed]); [range_i] compares that range with the claim's");
  }

  void remainder() {
    if (names_.index)
      item("[remainder]",
           "the right side of the recurrence of the sum ([left_recurrence]): the two ends, and "
           "terms of the claim's range outside the common one");
    else
      item("[remainder]", "the value of the combination of the left side ([left_recurrence])");
    item("[E1], [E2], ...",
         "products of atoms, one for each class of similar terms in an equation without the "
         "index; every term of it is a polynomial times one of them, or 0");
  }

  const proof::Proof& proof_;
  Names names_;
  std::string out_;
};

}  // namespace

std::string comment_text(const std::string& text) {
  // Nothing in a comment may end it or open another, nor look like a string.
  std::string out;
  for (const char ch : claim::printable(text)) {  // no mark that changes the direction of writing
    const auto byte = static_cast<unsigned char>(ch);
    const bool plain = ch == ' ' || ch == ',' || ch == '.' || ch == '-' || ch == ':' || ch == '=' ||
                       ch == '+' || ch == '^' || std::isalnum(byte) != 0 || byte >= 0x80;
    out += plain ? ch : ' ';
  }
  return out;
}

std::string comment_formula(const std::string& text) {
  std::string out;
  for (const char ch : text) {
    const bool opens = ch == '*' && out.ends_with('(');
    const bool closes = ch == ')' && out.ends_with('*');
    if (opens || closes) out += ' ';
    out += ch == '"' ? '\'' : ch;
  }
  return out;
}

std::string note(const std::string& words) { return fmt::format("(** {} *)\n", words); }

std::string heading(const std::string& words) { return fmt::format("(** ** {} *)\n\n", words); }

std::string opening_comment(const proof::Proof& proof) {
  const claim::Claim& claim = *proof.claim;
  std::vector<std::string> given = hypothesis_texts(claim);
  given.pop_back();  // the range of the running variable is in the statement
  std::string out = fmt::format(
      "(** * {}\n\n    Generated by Sumwright.  SPDX-License-Identifier: 0BSD\n\n"
      "    What is proved, in the notation of the claim:\n\n      {}.\n\n"
      "    K is any field of characteristic 0 (the rational numbers, the real numbers, ...){}.\n",
      comment_text(claim.title), comment_formula(writers::statement_text(proof)),
      parameters_in_words(claim));
  if (!given.empty())
    out += fmt::format("    It is assumed that {}.\n", comment_formula(listed(given)));
  std::string statement = comment_formula(statement_text(proof));
  for (std::size_t at = statement.find('\n'); at != std::string::npos;
       at = statement.find('\n', at + 1))
    statement.insert(at + 1, "      ");
  const char* theorems =
      proof.finite_range
          ? "    The last three theorems say it: [claim], where an infinite end of the range "
            "stands "
            "for every\n    finite one beyond which all terms are 0; [claim_defined], that "
            "everything "
            "in the claim has a\n    value; [claim_support], that there are such ends.  "
            "Statement.v "
            "has the definitions.\n    The statement of [claim] is\n\n"
          : "    The last two theorems say it: [claim], and [claim_defined], that everything in "
            "the "
            "claim\n    has a value.  Statement.v has the definitions.  The statement of [claim] "
            "is\n\n";
  return out + "\n" + renamed(proof) + theorems + fmt::format("      {}. *)\n\n", statement);
}

std::string legend(const proof::Proof& proof) { return Legend(proof).run(); }

}  // namespace sumwright::writers::coq
