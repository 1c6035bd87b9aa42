// The appendix as a whole: one object per proof, one method per part; used by latex*.cpp only.
#pragma once

#include <optional>
#include <string>
#include <vector>

#include "proof/proof.hpp"
#include "writers/latex_expression.hpp"
#include "writers/latex_names.hpp"
#include "writers/latex_values.hpp"

namespace sumwright::writers {

class LatexDocument {
 public:
  LatexDocument(const proof::Proof& proof, const std::string& obligations_sha256);

  /// The appendix without preamble, for \input into a paper.
  [[nodiscard]] std::string appendix();

 private:
  // latex_statement.cpp: what is claimed, and conventions
  void opening();
  void theorem();
  [[nodiscard]] std::string hypotheses() const;
  [[nodiscard]] std::string parameter_sentence() const;
  void statement_display();
  void conventions();
  [[nodiscard]] bool uses(bool (*kind)(proof::AtomKind)) const;
  /// `By m! = m (m-1)! ..., each of the following`: the laws that the base term needs.
  [[nodiscard]] std::string laws() const;

  // latex_argument.cpp: certificate, base term, equality
  void certificate();
  void coefficient_list();
  void base_term();
  void equality();

  // latex_summation.cpp
  void summation();
  [[nodiscard]] Formula range_sum(const proof::RangeStep& step);
  void pieces();
  [[nodiscard]] std::string vanishing_clause(const proof::Vanishing& vanishing);

  // latex_conclusion.cpp: ends, closed form, leading coefficient, initial values
  void ends();
  void closed_form();
  /// `at`: the literal n of an initial value.
  void balance(const proof::Balance& balance, std::optional<long> at = std::nullopt);
  void balance_zeros(const proof::Balance& balance, std::optional<long> at);
  void balance_group(const proof::Balance& balance, const proof::BalanceGroup& group,
                     std::optional<long> at);
  [[nodiscard]] Formula term_label(const proof::BalanceTerm& term, std::optional<long> at);
  [[nodiscard]] std::string zero_reason(const proof::BalanceTerm& term);
  void leading();
  /// `is not zero: ...`, without a full stop.
  [[nodiscard]] std::string nonzero_reason(const proof::Nonzero& nonzero);
  void initial_values();
  void conclusion();

  // latex_conditions.cpp: the table and the closing paragraph
  void conditions();
  void trust();

  // small things
  void head(const std::string& title);
  void say(const std::string& text) { out_ += text; }
  /// `text` as a paragraph of its own in typewriter type, for what no formula can hold.
  void code_paragraph(const std::string& text);
  [[nodiscard]] std::string label(const std::string& name) const { return prefix_ + name; }
  [[nodiscard]] std::string reference(const std::string& name) const;
  [[nodiscard]] std::string running(long shift) const;  ///< `n+1`
  /// `F(n+1,k)`, the index shifted by `index_shift`; without an index when there is none.
  [[nodiscard]] Formula at(char letter, long shift, long index_shift = 0) const;
  /// `S(n+1)`.
  [[nodiscard]] Formula of_running(char letter, long shift) const;
  [[nodiscard]] bool has_index() const;
  [[nodiscard]] std::vector<std::string> symbol_names() const;
  /// sum of coefficients times S(n+i), from the printed recurrence.
  [[nodiscard]] Formula recurrence_left(bool symbolic);
  [[nodiscard]] Formula right_side();
  [[nodiscard]] bool recurrence_is_short();
  [[nodiscard]] bool weight_is_one() const;

  const proof::Proof& proof_;
  const claim::Claim& claim_;
  std::string prefix_;
  std::string obligations_sha256_;
  LatexNames names_;
  LatexValues values_;
  LatexExpressions expressions_;
  std::string out_;
};

/// `a`, `a and b`, `a, b and c`.
[[nodiscard]] std::string enumeration(const std::vector<std::string>& items);

}  // namespace sumwright::writers
