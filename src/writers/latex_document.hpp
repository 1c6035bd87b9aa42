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
  void long_names();
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
  /// a_0(n), a_1(n), ... and, when `weighted`, the factor d(n) of the identity, if it is not 1.
  void coefficient_list(bool weighted);
  void base_term();
  void equality();
  /// d(n) (a_0(n) F(n,k) + a_1(n) F(n+1,k) + ...)
  [[nodiscard]] Formula weighted_sum();
  /// G(n,k+1) - G(n,k)
  [[nodiscard]] Formula difference() const;
  [[nodiscard]] Formula equality_left();
  void multiplied_out();

  // latex_summation.cpp
  void finite_range();
  void summation();
  [[nodiscard]] Formula range_sum(const proof::RangeStep& step);
  void pieces();
  /// `F(n,k) = ...`, for several products with names for each: `F_1(n,k) + F_2(n,k)`, where ...
  void parts(char letter, const Formula& name, const std::vector<proof::Product>& products);
  [[nodiscard]] std::string vanishing_clause(const proof::Vanishing& vanishing);

  // latex_without_index.cpp
  /// The recurrence is S(n) = ... itself: no coefficients are written.
  [[nodiscard]] bool without_coefficients() const;
  void single_term();

  // latex_conclusion.cpp: ends, closed form, leading coefficient, initial values
  void ends();
  void closed_form();
  /// `at`: the literal n of an initial value.
  /// `place`: the beginning of its keys in obligations.txt.
  void balance(const proof::Balance& balance, const std::string& place = "",
               std::optional<long> at = std::nullopt);
  void balance_zeros(const proof::Balance& balance, std::optional<long> at);
  /// The class `position` of similar terms; `place` is where obligations.txt has it.
  void balance_group(const proof::Balance& balance, std::size_t position, const std::string& place,
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
  /// Says once where the terms are that dots stand for, when there have been any.
  void explain_dots();
  /// `text` as a paragraph of its own in typewriter type, for what no formula can hold; with the
  /// number of an equation when there is a label.
  void code_paragraph(const std::string& text, const std::string& label = "");
  [[nodiscard]] std::string label(const std::string& name) const { return prefix_ + name; }
  [[nodiscard]] std::string coefficient(std::size_t i) const;  ///< `a_{1}(n)`
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
  /// a_i(n), when it is known as a polynomial or can be printed as the claim has it.
  [[nodiscard]] std::optional<Formula> coefficient_value(std::size_t i);
  [[nodiscard]] bool coefficients_printable();

  const proof::Proof& proof_;
  const claim::Claim& claim_;
  std::string prefix_;
  std::string obligations_sha256_;
  LatexNames names_;
  LatexValues values_;
  LatexExpressions expressions_;
  std::size_t bases_ = 0;  ///< base terms E_1, E_2, ... of classes of similar terms so far
  bool dots_explained_ = false;
  std::string out_;
};

/// `a`, `a and b`, `a, b and c`.
[[nodiscard]] std::string enumeration(const std::vector<std::string>& items);

}  // namespace sumwright::writers
