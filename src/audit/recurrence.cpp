// The recurrence proved against the author's, where the recurrence is the claim, and against the
// texts in which it is printed: proportional coefficients at points, never zero where the others
// are not.
#include <algorithm>

#include "audit/atoms.hpp"
#include "audit/checks.hpp"
#include "audit/text_reader.hpp"

namespace sumwright::audit {

namespace {

using Coefficients = std::vector<claim::ExpressionPtr>;

struct Proportion {
  const proof::Telescoping& telescoping;
  Check& check;

  Value proved(std::size_t i, const Point& point) const {
    if (i >= telescoping.coefficients.size()) return Value::of(0);
    return value_of(telescoping.coefficients[i], point);
  }

  /// All a_i A_j = a_j A_i, and not all a_i are 0 unless all A_i are.
  void at(const Coefficients& written, const Point& point) {
    const std::size_t size = std::max(written.size(), telescoping.coefficients.size());
    std::vector<Value> author;
    for (std::size_t i = 0; i < size; ++i)
      author.push_back(i < written.size() ? evaluate(*written[i], point) : Value::of(0));
    if (!std::all_of(author.begin(), author.end(), [](const Value& v) { return v.exists(); }))
      return;  // a denominator of the author's vanishes here
    bool some_written = false;
    bool some_proved = false;
    for (std::size_t i = 0; i < size; ++i) {
      some_written = some_written || !author[i].is_zero();
      some_proved = some_proved || !proved(i, point).is_zero();
      for (std::size_t j = i + 1; j < size; ++j)
        check.expect_same(
            times(proved(i, point), author[j]), times(proved(j, point), author[i]),
            "coefficients " + std::to_string(i) + " and " + std::to_string(j) + ", crosswise",
            point);
    }
    check.expect(some_proved || !some_written,
                 [&] { return "the proved recurrence is void at " + text_of(point); });
  }
};

std::vector<Place> many_places(const Context& context) {
  std::vector<Place> out;
  for (std::size_t sample = 0; sample < context.samples.size(); ++sample)
    for (long n = context.proof.from; n < context.proof.from + 24; ++n)
      if (context.admits(sample, n)) out.push_back({sample, n, 0});
  return out;
}

void check_against(Context& context, const Coefficients& written, const std::string& name,
                   std::vector<Finding>& findings) {
  Check check(name);
  Proportion proportion{*context.proof.telescoping, check};
  for (const Place& place : many_places(context))
    check.attempt([&] {
      context.tick();
      proportion.at(written, context.at(place));
    });
  findings.push_back(check.finding());
}

/// The printed recurrence with its right side, the sums added up, for n >= threshold; for a
/// question from `from` on.
void check_printed_sums(Context& context, const Coefficients& printed, Check& check) {
  claim::ExpressionPtr right;
  if (!context.proof.right_side_text.empty()) {
    right = read_expression(context.proof.right_side_text, context.names);
    if (!right && context.claim.is_question())
      return check.fail("the right side is not an expression: " + context.proof.right_side_text);
    if (!right) return check.remark("right side not read back; the claim's own is checked");
  }
  const long start = context.claim.is_equality() ? context.proof.threshold : context.proof.from;
  for (std::size_t sample = 0; sample < context.samples.size(); ++sample)
    for (long n = start; n < start + context.options.sum_span; ++n) {
      if (!context.admits(sample, n)) continue;
      check.attempt([&] {
        const Point point = context.at({sample, n, 0});
        Value left = Value::of(0);
        for (std::size_t i = 0; i < printed.size(); ++i)
          left = plus(left, times(evaluate(*printed[i], point),
                                  context.author.sum(sample, n + static_cast<long>(i))));
        check.expect_same(left, right ? evaluate(*right, point) : Value::of(0),
                          "the printed recurrence", point);
      });
    }
}

void check_printed(Context& context, std::vector<Finding>& findings) {
  if (context.proof.recurrence_text.empty()) return;
  Check check("recurrence as printed");
  Coefficients printed;
  for (const std::string& text : context.proof.recurrence_text) {
    printed.push_back(read_expression(text, context.names));
    if (!printed.back()) {
      check.fail("not an expression: " + text);
      return findings.push_back(check.finding());
    }
  }
  Proportion proportion{*context.proof.telescoping, check};
  for (const Place& place : many_places(context))
    check.attempt([&] { proportion.at(printed, context.at(place)); });
  check_printed_sums(context, printed, check);
  findings.push_back(check.finding());
}

}  // namespace

void check_claimed_recurrence(Context& context, std::vector<Finding>& findings) {
  if (!context.proof.telescoping) return;
  const claim::Claim& claim = context.claim;
  if (!claim.is_equality() && !claim.is_question())
    check_against(context, claim.evidence.recurrence, "claimed recurrence", findings);
  const claim::Claim* original = context.options.original;
  if (original != nullptr && !original->is_equality() && !original->is_question())
    check_against(context, original->evidence.recurrence, "recurrence as the author wrote it",
                  findings);
  check_printed(context, findings);
}

}  // namespace sumwright::audit
