// One attempt at the whole argument with given evidence:
// telescoping -> threshold -> region -> balances -> starting values.
// Invariant: `complete` only when every need of every part is decided.

#include <fmt/format.h>

#include <stdexcept>

#include "proof/argument.hpp"
#include "term/simplify.hpp"
#include "term/text.hpp"

namespace sumwright::proof::building {

using algebra::Deadline;
using algebra::Factored;
using algebra::Polynomial;
using term::Facts;
using term::Product;
using term::Setting;

namespace {

constexpr long farthest_threshold = 200;
constexpr long more_thresholds = 6;

class Attempter {
 public:
  Attempter(const Terms& terms, const EvidenceDraft& evidence, bool as_equality,
            const Deadline& deadline)
      : terms_(terms), setting_(terms.setting), as_equality_(as_equality), deadline_(deadline) {
    out_.draft.evidence = evidence;
  }

  Attempt run() {
    if (!telescope() || !threshold() || !conclude()) return std::move(out_);
    if (!initial_values()) return std::move(out_);
    out_.outcome = Attempt::Outcome::complete;
    return std::move(out_);
  }

 private:
  bool stuck(const std::string& why, const std::string& rule) {
    out_.outcome = Attempt::Outcome::stuck;
    out_.why = why;
    out_.rule = rule;
    return false;
  }

  [[nodiscard]] unsigned order() const {
    return static_cast<unsigned>(out_.draft.evidence.coefficients.size()) - 1;
  }
  [[nodiscard]] const Factored& weight() const {
    static const Factored one;
    return out_.draft.telescoping ? out_.draft.telescoping->weight : one;
  }

  bool telescope() {
    if (!terms_.range) return true;
    std::string why;
    out_.draft.telescoping =
        draft_telescoping(setting_, terms_.summand.products, out_.draft.evidence.coefficients,
                          *out_.draft.evidence.certificate, why);
    if (!out_.draft.telescoping)
      return stuck(why, "a rule for terms that are similar but written differently");
    if (out_.draft.telescoping->holds()) return true;
    out_.outcome = Attempt::Outcome::identity_fails;
    return false;
  }

  /// The least n from which the weight (and for equalities the leading coefficient) is nonzero
  /// (R5).
  bool threshold() {
    Factored must = weight();
    if (as_equality_) {
      const Factored lead = algebra::factor(out_.draft.evidence.coefficients.back());
      out_.draft.leading = lead;
      must.multiply(lead);
    }
    std::string factor;
    for (long n = terms_.from; n <= terms_.from + farthest_threshold; ++n) {
      deadline_.check();
      if (!term::decide_nonzero(setting_, setting_.from(n), must, &factor)) continue;
      least_ = n;
      return true;
    }
    return stuck_on_factor(factor);
  }

  bool stuck_on_factor(const std::string& text) {
    bool rational = false;
    Factored must = weight();
    if (out_.draft.leading) must.multiply(*out_.draft.leading);
    for (const auto& [p, e] : must.factors)
      if (p.to_string() == text) rational = term::involves_rational_parameter(setting_, p);
    return stuck(
        fmt::format("the factor {} of the {} may vanish", text,
                    as_equality_ ? "leading coefficient" : "certificate's denominator"),
        rational
            ? "continuation in a parameter: prove it where it is not 0, then as polynomials"
            : "an onset: explicit values until the condition holds, the argument from there on");
  }

  /// A term at an end may vanish only from a later n on, so that a balance which fails does not end
  /// the search; if none holds, the first outcome stands.
  bool conclude() {
    std::optional<Attempt> first_failure;
    for (long n = least_; n <= least_ + more_thresholds; ++n) {
      deadline_.check();
      out_.outcome = Attempt::Outcome::stuck;
      out_.draft.threshold = n;
      if (terms_.range && !choose(n)) continue;
      if (balances(n)) return true;
      if (out_.outcome != Attempt::Outcome::stuck && !first_failure) first_failure = out_;
    }
    if (first_failure) out_ = std::move(*first_failure);
    return false;
  }

  bool choose(long n) {
    std::string why;
    std::optional<RegionDraft> region =
        choose_region(setting_, *terms_.range, terms_.summand.products, order(),
                      out_.draft.telescoping->needs, n, why);
    if (!region)
      return stuck("the identity is not available on the whole range: " + why,
                   "a rule for ends at which the terms do not vanish by a factorial");
    out_.draft.region = std::move(*region);
    return true;
  }

  [[nodiscard]] std::vector<TermDraft> left_terms() const {
    const ArgumentDraft& d = out_.draft;
    if (!terms_.range)
      return pointwise_terms(setting_, d.evidence.coefficients, terms_.summand.products);
    return end_terms(setting_, *d.telescoping, *d.region, terms_.summand.products);
  }

  std::optional<BalanceDraft> balanced(std::vector<TermDraft> terms, const Facts& facts) {
    std::string why;
    std::optional<BalanceDraft> made = balance(setting_, facts, std::move(terms), why);
    if (!made) {
      stuck(why, "a rule for terms that are similar but written differently");
      return std::nullopt;
    }
    if (!all_hold(setting_, facts, made->needs(), &why)) {
      stuck("a boundary term needs " + why,
            "reflection of a factorial, or explicit values where the condition fails");
      return std::nullopt;
    }
    return made;
  }

  bool balances(long n) {
    const Facts facts = setting_.from(n);
    ArgumentDraft& d = out_.draft;
    std::vector<TermDraft> ends = left_terms();
    describe_right_side(ends, facts);
    if (!as_equality_) return recurrence_balance(std::move(ends), facts);
    for (TermDraft& t :
         closed_terms(setting_, weight(), d.evidence.coefficients, terms_.closed->products))
      ends.push_back(std::move(t));
    d.closed_recurrence = balanced(std::move(ends), facts);
    if (!d.closed_recurrence) return false;
    if (!d.closed_recurrence->holds()) {
      out_.outcome = Attempt::Outcome::closed_fails;
      return false;
    }
    return true;
  }

  bool recurrence_balance(std::vector<TermDraft> terms, const Facts& facts) {
    ArgumentDraft& d = out_.draft;
    if (d.evidence.right_side)
      for (TermDraft& t : right_side_terms(setting_, weight(), d.evidence.right_side->products))
        terms.push_back(std::move(t));
    d.ends = balanced(std::move(terms), facts);
    if (!d.ends) return false;
    if (!d.ends->holds()) out_.outcome = Attempt::Outcome::ends_fail;
    return d.ends->holds();
  }

  /// b = what the ends give, class by class, over the weight.
  void describe_right_side(const std::vector<TermDraft>& ends, const Facts& facts) {
    std::string why;
    std::optional<BalanceDraft> made = balance(setting_, facts, ends, why);
    out_.draft.boundary.clear();
    out_.draft.right_side_text = "0";
    if (!made) return;
    std::string text;
    for (const GroupDraft& group : made->groups) {
      if (group.total.is_zero()) continue;
      Factored value = group.total.factored();
      value.multiply(weight(), -1);
      Product product = group.base;
      term::simplify(setting_.ring, value, product);
      const std::string part = term::claim_text(value, product);
      if (text.empty())
        text = part;
      else if (part.starts_with("-"))
        text += " - " + part.substr(1);
      else
        text += " + " + part;
      product.coefficient = value;
      out_.draft.boundary.push_back(product);
    }
    if (!text.empty()) out_.draft.right_side_text = text;
  }

  bool initial_values() {
    const ArgumentDraft& d = out_.draft;
    static const std::vector<Product> none;
    const std::vector<Product>& right =
        as_equality_ ? terms_.closed->products
                     : (d.evidence.right_side ? d.evidence.right_side->products : none);
    const InitialContext context{
        setting_, terms_.range, terms_.summand.products, d.evidence.coefficients,
        right,    as_equality_};
    const long end = d.threshold + (as_equality_ ? static_cast<long>(order()) : 0);
    for (long n = terms_.from; n < end; ++n) {
      deadline_.check();
      std::string why;
      std::optional<InitialDraft> value = initial_value(context, n, why);
      if (!value) return stuck(why, "an auxiliary claim for that value");
      if (!all_hold(setting_, setting_.hypotheses, value->balance.needs(), &why))
        return stuck(fmt::format("the value at {} needs {}", n, why),
                     "reflection of a factorial, or an auxiliary claim for that value");
      if (!value->balance.holds()) {
        out_.outcome = Attempt::Outcome::initial_fails;
        out_.at = n;
        return false;
      }
      out_.draft.initial.push_back(std::move(*value));
    }
    return true;
  }

  const Terms& terms_;
  const Setting& setting_;
  bool as_equality_;
  const Deadline& deadline_;
  long least_ = 0;
  Attempt out_;
};

}  // namespace

Attempt attempt(const Terms& terms, const EvidenceDraft& evidence, bool as_equality,
                const Deadline& deadline) {
  try {
    return Attempter(terms, evidence, as_equality, deadline).run();
  } catch (const std::domain_error&) {
    Attempt out;
    out.draft.evidence = evidence;
    out.why = "a factor vanishes identically at a boundary point";
    out.rule = "a rule for products that run through 0";
    return out;
  }
}

}  // namespace sumwright::proof::building
