// The terms of the balances: what telescoping leaves at the ends, explicit points, right sides and
// closed forms, each substituted so that only n and the parameters remain (rules R1, R5, R8).

#include "proof/conclusion.hpp"

#include <fmt/format.h>

namespace sumwright::proof::building {

using algebra::Factored;
using algebra::Polynomial;
using term::Affine;
using term::Product;
using term::Setting;
using Origin = BalanceTerm::Origin;

namespace {

/// product * polynomial (0 makes it 0), and * factored.
void scale(Product& product, const Polynomial& by) {
  if (by.is_zero())
    product.coefficient.constant = 0;
  else
    product.coefficient.multiply(by, 1);
}

void scale(Product& product, const Factored& by) {
  if (by.is_zero())
    product.coefficient.constant = 0;
  else
    product.coefficient.multiply(by);
}

void negate(Product& product) { product.coefficient.constant = -product.coefficient.constant; }

std::string shifted_name(const Setting& setting, unsigned i) {
  const std::string& n = setting.symbols[term::running].name;
  return i == 0 ? n : fmt::format("{} + {}", n, i);
}

class EndTerms {
 public:
  EndTerms(const Setting& setting, const TelescopingDraft& telescoping, const RegionDraft& region,
           const std::vector<Product>& summand)
      : setting_(setting), telescoping_(telescoping), region_(region), summand_(summand) {}

  std::vector<TermDraft> run() {
    if (!telescoping_.certificate.is_zero()) {
      out_.push_back(end(true));
      out_.push_back(end(false));
    }
    for (const RangeDraft& range : region_.ranges) {
      for (unsigned t = 1; t <= range.low_points; ++t)
        points(range.shift, region_.low - static_cast<long>(t), -static_cast<long>(t), false);
      for (unsigned t = 1; t <= range.high_points; ++t)
        points(range.shift, region_.high + static_cast<long>(t), static_cast<long>(t), true);
    }
    return std::move(out_);
  }

 private:
  TermDraft end(bool upper) {
    const algebra::RingPtr& ring = setting_.ring;
    const Affine& at = upper ? region_.high : region_.low;
    const Polynomial where = at.polynomial(ring);
    const Polynomial c =
        upper ? telescoping_.certificate.shift(term::index, 1) : telescoping_.certificate;
    TermDraft term;
    term.origin = upper ? Origin::upper_end : Origin::lower_end;
    term.at_upper = upper;
    term.point = at;
    term.text = fmt::format("G({}, {})", setting_.symbols[term::running].name,
                            term::text(setting_, upper ? at + 1 : at));
    term.product = term::substitute(ring, telescoping_.base, term::index, at);
    scale(term.product, upper ? telescoping_.index.up.substitute(term::index, where)
                              : telescoping_.index.down.substitute(term::index, where));
    scale(term.product, c.substitute(term::index, where));
    if (!upper) negate(term.product);
    return term;
  }

  void points(unsigned shift, const Affine& at, long offset, bool upper) {
    const Polynomial& a = telescoping_.coefficients[shift];
    for (std::size_t j = 0; j < summand_.size(); ++j) {
      TermDraft term;
      term.origin = Origin::explicit_point;
      term.shift = shift;
      term.offset = offset;
      term.at_upper = upper;
      term.piece = j;
      term.point = at;
      term.text = fmt::format("a_{} F({}, {})", shift, shifted_name(setting_, shift),
                              term::text(setting_, at));
      term.product = term::substitute(
          setting_.ring, term::shift(summand_[j], term::running, static_cast<long>(shift)),
          term::index, at);
      scale(term.product, a);
      scale(term.product, telescoping_.weight);
      out_.push_back(std::move(term));
    }
  }

  const Setting& setting_;
  const TelescopingDraft& telescoping_;
  const RegionDraft& region_;
  const std::vector<Product>& summand_;
  std::vector<TermDraft> out_;
};

/// The literal range of S(at), from the author's ends or from the support.
class LiteralRange {
 public:
  LiteralRange(const InitialContext& context, long at, std::string& why)
      : setting_(context.setting), why_(why) {
    const Affine n = Affine::of(setting_.size(), at);
    for (const Product& f : context.summand)
      summand_.push_back(term::substitute(setting_.ring, f, term::running, n));
    low_ = fix(context.range->low, n);
    high_ = fix(context.range->high, n);
    out_.at = at;
  }

  std::optional<LiteralSumDraft> run() {
    const bool literal = settle(false, out_.low, out_.below) && settle(true, out_.high, out_.above);
    if (!literal && !settle_beside_parameter()) {
      why_ = fmt::format("at {} = {} the sum runs over a range whose length depends on a parameter",
                         setting_.symbols[term::running].name, out_.at);
      return std::nullopt;
    }
    if (out_.high - out_.low > 2000) {
      why_ = "too many terms in a starting value";
      return std::nullopt;
    }
    return out_;
  }

 private:
  static term::End fix(term::End end, const Affine& n) {
    if (end.affine) end.affine = end.affine->substitute(term::running, n);
    for (auto* side : {&end.inside, &end.outside})
      for (auto& c : *side)
        for (Affine& form : c) form = form.substitute(term::running, n);
    return end;
  }

  bool settle(bool upper, long& value, std::optional<VanishingDraft>& vanish) {
    const term::End& end = upper ? high_ : low_;
    if (end.affine && end.affine->is_constant()) {
      value = end.affine->constant;
      return true;
    }
    for (const long candidate : candidates(end, upper)) {
      vanish = vanishing(setting_.hypotheses,
                         mismatches(end, Affine::of(setting_.size(), candidate), upper), summand_);
      value = candidate;
      if (vanish) return true;
    }
    return false;
  }

  /// Both ends a literal distance from one form in the parameters.
  bool settle_beside_parameter() {
    for (const Affine& low : forms(low_, false))
      for (const Affine& high : forms(high_, true)) {
        const Affine length = high - low;
        if (!length.is_constant() || length.constant < -1 || length.constant > 50) continue;
        std::optional<VanishingDraft> below;
        std::optional<VanishingDraft> above;
        if (!ends_at(low_, low, false, below) || !ends_at(high_, high, true, above)) continue;
        out_.base = low;
        out_.low = 0;
        out_.high = length.constant;
        out_.below = std::move(below);
        out_.above = std::move(above);
        return true;
      }
    return false;
  }

  /// The author's end and the ends of the support, where they are affine.
  [[nodiscard]] std::vector<Affine> forms(const term::End& end, bool upper) const {
    std::vector<Affine> out;
    if (end.affine) out.push_back(*end.affine);
    for (const SupportEnd& support : support_ends(summand_, upper))
      if (support.steep == 1) out.push_back(support.bound);
    return out;
  }

  bool ends_at(const term::End& end, const Affine& target, bool upper,
               std::optional<VanishingDraft>& vanish) const {
    if (end.affine && *end.affine == target) return true;
    vanish = vanishing(setting_.hypotheses, mismatches(end, target, upper), summand_);
    return vanish.has_value();
  }

  /// Literal bounds: of the author's end itself (floors) and of the support.
  [[nodiscard]] std::vector<long> candidates(const term::End& end, bool upper) const {
    const Affine k = Affine::symbol(setting_.size(), term::index);
    std::vector<long> out;
    for (const term::Conjunction& c : end.inside) {
      term::Facts facts = setting_.hypotheses;
      for (const Affine& form : c) facts.add(form);
      const std::optional<long> bound = facts.lower_bound(upper ? -k : k);
      if (bound) out.push_back(upper ? -*bound : *bound);
    }
    for (const SupportEnd& support : support_ends(summand_, upper)) {
      if (!support.bound.is_constant()) continue;
      const long c = support.bound.constant;
      out.push_back(upper ? term::floor_quotient(c, support.steep)
                          : -term::floor_quotient(-c, support.steep));
    }
    return out;
  }

  [[nodiscard]] std::vector<term::Conjunction> mismatches(const term::End& end,
                                                          const Affine& target, bool upper) const {
    const Affine k = Affine::symbol(setting_.size(), term::index);
    std::vector<term::Conjunction> out;
    for (term::Conjunction c : end.outside) {
      c.push_back(upper ? target - k : k - target);
      out.push_back(c);
    }
    for (term::Conjunction c : end.inside) {
      c.push_back(upper ? k - target - 1 : target - k - 1);
      out.push_back(c);
    }
    return out;
  }

  const Setting& setting_;
  std::string& why_;
  std::vector<Product> summand_;
  term::End low_;
  term::End high_;
  LiteralSumDraft out_;
};

class InitialValueBuilder {
 public:
  InitialValueBuilder(const InitialContext& context, long at, std::string& why)
      : context_(context), setting_(context.setting), why_(why) {
    out_.at = at;
  }

  std::optional<InitialDraft> run() {
    const std::size_t sums = context_.equality ? 1 : context_.coefficients.size();
    for (std::size_t i = 0; i < sums; ++i)
      if (!add_sum(static_cast<unsigned>(i))) return std::nullopt;
    const Affine n = Affine::of(setting_.size(), out_.at);
    for (std::size_t j = 0; j < context_.right.size(); ++j) {
      TermDraft term;
      term.origin = context_.equality ? Origin::closed_form : Origin::right_side;
      term.piece = j;
      term.text = fmt::format("right side at {}", out_.at);
      term.product = term::substitute(setting_.ring, context_.right[j], term::running, n);
      negate(term.product);
      terms_.push_back(std::move(term));
    }
    term::Facts facts = setting_.hypotheses;
    std::optional<BalanceDraft> made = balance(setting_, facts, std::move(terms_), why_);
    if (!made) return std::nullopt;
    out_.balance = std::move(*made);
    return std::move(out_);
  }

 private:
  bool add_sum(unsigned i) {
    const long n = out_.at + static_cast<long>(i);
    LiteralSumDraft sum;
    sum.at = n;
    sum.low = 0;
    sum.high = 0;
    if (context_.range) {
      std::optional<LiteralSumDraft> made = LiteralRange(context_, n, why_).run();
      if (!made) return false;
      sum = *made;
    }
    out_.sums.push_back(sum);
    const Affine at = Affine::of(setting_.size(), n);
    const Affine base = sum.base.value_or(Affine::of(setting_.size(), 0));
    for (long k = sum.low; k <= sum.high; ++k)
      for (std::size_t j = 0; j < context_.summand.size(); ++j) add_term(i, at, base + k, j);
    return true;
  }

  void add_term(unsigned i, const Affine& at, const Affine& k, std::size_t j) {
    TermDraft term;
    term.origin = Origin::value;
    term.shift = i;
    term.piece = j;
    term.point = k;
    term.text = fmt::format("F({}, {})", at.constant, term::text(setting_, k));
    term.product = term::substitute(setting_.ring, context_.summand[j], term::running, at);
    term.product = term::substitute(setting_.ring, term.product, term::index, *term.point);
    if (!context_.equality)
      scale(term.product, context_.coefficients[i].substitute(
                              term::running, Polynomial(setting_.ring, mpz_class(out_.at))));
    terms_.push_back(std::move(term));
  }

  const InitialContext& context_;
  const Setting& setting_;
  std::string& why_;
  std::vector<TermDraft> terms_;
  InitialDraft out_;
};

}  // namespace

std::vector<TermDraft> end_terms(const Setting& setting, const TelescopingDraft& telescoping,
                                 const RegionDraft& region, const std::vector<Product>& summand) {
  return EndTerms(setting, telescoping, region, summand).run();
}

std::vector<TermDraft> pointwise_terms(const Setting& setting,
                                       const std::vector<Polynomial>& coefficients,
                                       const std::vector<Product>& summand) {
  std::vector<TermDraft> out;
  for (unsigned i = 0; i < coefficients.size(); ++i)
    for (std::size_t j = 0; j < summand.size(); ++j) {
      TermDraft term;
      term.origin = Origin::explicit_point;
      term.shift = i;
      term.piece = j;
      term.text = fmt::format("a_{} F({})", i, shifted_name(setting, i));
      term.product = term::shift(summand[j], term::running, static_cast<long>(i));
      scale(term.product, coefficients[i]);
      out.push_back(std::move(term));
    }
  return out;
}

std::vector<TermDraft> right_side_terms(const Setting& setting, const Factored& weight,
                                        const std::vector<Product>& right_side) {
  std::vector<TermDraft> out;
  for (std::size_t j = 0; j < right_side.size(); ++j) {
    TermDraft term;
    term.origin = Origin::right_side;
    term.piece = j;
    term.text = fmt::format("b({})", setting.symbols[term::running].name);
    term.product = right_side[j];
    scale(term.product, weight);
    negate(term.product);
    out.push_back(std::move(term));
  }
  return out;
}

std::vector<TermDraft> closed_terms(const Setting& setting, const Factored& weight,
                                    const std::vector<Polynomial>& coefficients,
                                    const std::vector<Product>& closed) {
  std::vector<TermDraft> out;
  for (unsigned i = 0; i < coefficients.size(); ++i)
    for (std::size_t j = 0; j < closed.size(); ++j) {
      TermDraft term;
      term.origin = Origin::closed_form;
      term.shift = i;
      term.piece = j;
      term.text = fmt::format("a_{} C({})", i, shifted_name(setting, i));
      term.product = term::shift(closed[j], term::running, static_cast<long>(i));
      scale(term.product, coefficients[i]);
      scale(term.product, weight);
      negate(term.product);
      out.push_back(std::move(term));
    }
  return out;
}

std::optional<InitialDraft> initial_value(const InitialContext& context, long at,
                                          std::string& why) {
  return InitialValueBuilder(context, at, why).run();
}

}  // namespace sumwright::proof::building
