// From a recurrence a_0 S(n) + a_1 S(n+1) = 0 to S(n0) times the product of -a_0(j)/a_1(j) over
// n0 <= j < n, factor by factor. Nothing here is trusted: the text is a claim that is then proved.

#include "proof/closed_form.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <cstdlib>
#include <map>
#include <stdexcept>
#include <vector>

#include "proof/atom_keys.hpp"
#include "term/conversion.hpp"
#include "term/evaluation.hpp"
#include "term/simplify.hpp"
#include "term/text.hpp"

namespace sumwright::proof {

namespace building {

using algebra::Polynomial;
using term::Affine;

namespace {

constexpr long starts_tried = 4;

using algebra::Factored;
using algebra::RationalFunction;

constexpr long most_terms = 4;

/// The literal range of the index at n, the same for some parameter values.
std::optional<std::pair<long, long>> range_at(const Proof& question, long n) {
  const claim::Range& range = question.summed_range();
  std::optional<std::pair<long, long>> out;
  for (term::Assignment& at : term::sample_parameters(*question.claim, 5)) {
    at[question.claim->running] = n;
    const mpz_class low = term::evaluate_bound(*range.low.value, at);
    const mpz_class high = term::evaluate_bound(*range.high.value, at);
    if (high - low >= most_terms || !low.fits_slong_p() || !high.fits_slong_p())
      return std::nullopt;
    const std::pair<long, long> here{low.get_si(), high.get_si()};
    if (out && *out != here) return std::nullopt;
    out = here;
  }
  return out;
}

/// The product at one n and k, when nothing but a rational function of the parameters is left.
std::optional<Factored> value_of(const term::Setting& setting, const term::Product& product, long n,
                                 long k) {
  const algebra::RingPtr& ring = setting.ring;
  const auto at = [&](long value) { return Affine::of(setting.size(), value); };
  const term::Product there = term::substitute(
      ring, term::substitute(ring, product, term::running, at(n)), term::index, at(k));
  const AtomGroups groups(ring, there);
  if (!groups.powers.empty() || !groups.intervals.empty()) return std::nullopt;
  for (const auto& [key, constants] : groups.factorials)
    if (constants.fact != constants.rfact) return std::nullopt;
  Factored out = there.coefficient;
  for (const auto& [atom, exponent] : groups.literals) {
    const Factored value = literal_value(ring, atom);
    if (value.is_zero()) return value;
    out.multiply(value, exponent);
  }
  for (const auto& [atom, exponent] : groups.expanded)
    for (unsigned i = 0; i < exponent; ++i) out.constant *= expanded_reciprocal(atom).constant;
  for (const auto& [p, exponent] : groups.reciprocals)
    out.multiply(p, -static_cast<long>(exponent));
  return out;
}

/// S(n), term by term; nothing when the terms are many or depend on the parameters in another way.
std::optional<Factored> value_at(const Proof& question, const term::Setting& setting, long n) {
  const std::optional<std::pair<long, long>> range = range_at(question, n);
  if (!range) return std::nullopt;
  const auto symbol = [&](std::size_t at) { return Affine::symbol(setting.size(), at); };
  const term::Facts here = setting.from(n)
                               .with(-symbol(term::running) + n)
                               .with(symbol(term::index) - range->first)
                               .with(-symbol(term::index) + range->second);
  const term::Conversion summand = term::convert(setting, here, question.claim->sum.summand);
  if (summand.open() != nullptr) return std::nullopt;
  RationalFunction total(setting.ring, mpq_class(0));
  for (long k = range->first; k <= range->second; ++k)
    for (const term::Product& product : summand.products) {
      const std::optional<Factored> value = value_of(setting, product, n, k);
      if (!value) return std::nullopt;
      if (!value->is_zero()) total = total + RationalFunction(setting.ring, *value);
    }
  return total.factored();
}

std::string plus(const std::string& text, const mpz_class& c) {
  if (c == 0) return text;
  return fmt::format("{} {} {}", text, c < 0 ? "-" : "+", mpz_class(abs(c)).get_str());
}

mpq_class power(const mpq_class& base, long exponent) {
  mpq_class out = 1;
  for (long i = 0; i < std::abs(exponent); ++i) out *= base;
  return exponent < 0 ? mpq_class(1 / out) : out;
}

/// Equal factors as powers, in order of their first occurrence.
std::vector<std::string> grouped(const std::vector<std::string>& factors) {
  std::vector<std::pair<std::string, unsigned>> counted;
  for (const std::string& f : factors) {
    const auto known = std::find_if(counted.begin(), counted.end(),
                                    [&](const auto& entry) { return entry.first == f; });
    if (known != counted.end())
      ++known->second;
    else
      counted.emplace_back(f, 1);
  }
  std::vector<std::string> out;
  for (const auto& [f, count] : counted)
    out.push_back(count == 1 ? f : fmt::format("{}^{}", f, count));
  return out;
}

mpz_class floor_of(const mpq_class& value) {
  mpz_class out;
  mpz_fdiv_q(out.get_mpz_t(), value.get_num_mpz_t(), value.get_den_mpz_t());
  return out;
}

/// S(start) times the product of the quotients over start <= j < n, as
/// constant * growth^n * above / below.
class ProductText {
 public:
  ProductText(const term::Setting& setting, long start, const Factored& first)
      : setting_(setting),
        start_(start),
        n_(setting.symbols[term::running].name),
        constant_(first.constant) {
    for (const auto& [p, exponent] : first.factors) add("(" + p.to_string() + ")", exponent);
  }

  /// factor(j)^exponent; false when its product has no such form.
  bool multiply(const Polynomial& factor, long exponent) {
    if (factor.depends_on(term::index) || factor.degree(term::running) > 1) return false;
    const Polynomial rest =
        factor.substitute(term::running, Polynomial(setting_.ring, mpz_class(0)));
    if (factor.degree(term::running) < 1) {
      add(fmt::format("({})^({})", rest.to_string(), steps()), exponent);
      return true;
    }
    const Polynomial slope = factor.shift(term::running, 1) - factor;
    if (!slope.is_constant()) return false;
    const mpz_class c = slope.constant();
    if (!rest.is_constant()) return symbolic(c, rest, exponent);
    mpq_class shift(rest.constant(), c);
    shift.canonicalize();
    scale(c, exponent);
    shifts_[shift] += exponent;
    return true;
  }

  void scale(const mpq_class& by, long exponent) { growth_ *= power(by, exponent); }

  /// Nothing when a factor j + shift vanishes on the way, or numbers would grow too large.
  std::optional<std::string> text() {
    whole_sets();
    fallings();
    for (const auto& [shift, exponent] : shifts_)
      if (exponent != 0 && !single(shift, exponent)) return std::nullopt;
    constant_ *= power(growth_, -start_);
    std::string out;
    const auto join = [&](const std::string& factor) { out += (out.empty() ? "" : "*") + factor; };
    if (constant_ == -1)
      out = "-1";
    else if (constant_ != 1 || (growth_ == 1 && above_.empty()))
      join(constant_.get_num().get_str());
    if (growth_.get_num() != 1) join(fmt::format("({})^{}", growth_.get_num().get_str(), n_));
    for (const std::string& f : grouped(above_)) join(f);
    if (out.empty()) out = "1";
    std::vector<std::string> under = grouped(below_);
    if (growth_.get_den() != 1)
      under.insert(under.begin(), fmt::format("{}^{}", growth_.get_den().get_str(), n_));
    if (constant_.get_den() != 1) under.insert(under.begin(), constant_.get_den().get_str());
    if (under.empty()) return out;
    return fmt::format("{}/({})", out, fmt::join(under, "*"));
  }

 private:
  [[nodiscard]] std::string steps() const { return plus(n_, -start_); }

  void add(const std::string& text, long exponent) {
    for (long i = 0; i < std::abs(exponent); ++i) (exponent > 0 ? above_ : below_).push_back(text);
  }

  /// Gauss's multiplication formula: the product of rising(i/m, N) over 0 < i < m is
  /// (m N)!/(m^(m N) N!).
  void whole_sets() {
    for (const long m : {2L, 3L, 4L, 6L})
      for (const auto& [shift, unused] : std::map<mpq_class, long>(shifts_)) {
        const mpz_class e = floor_of(shift);
        if (shift != mpq_class(e) + mpq_class(1, m) || start_ + e < 0 || start_ + e > 60) continue;
        while (take_set(m, e, 1)) set_of(m, e, 1);
        while (take_set(m, e, -1)) set_of(m, e, -1);
      }
  }

  bool take_set(long m, const mpz_class& e, long sign) {
    const auto member = [&](long i) {
      mpq_class out(i, m);
      out.canonicalize();
      return mpq_class(out + e);
    };
    for (long i = 1; i < m; ++i) {
      const auto it = shifts_.find(member(i));
      if (it == shifts_.end() || sign * it->second <= 0) return false;
    }
    for (long i = 1; i < m; ++i) shifts_[member(i)] -= sign;
    return true;
  }

  void set_of(long m, const mpz_class& e, long exponent) {
    add(fmt::format("factorial({}*{})", m, e == 0 ? n_ : "(" + plus(n_, e) + ")"), exponent);
    add(fmt::format("factorial({})", plus(n_, e)), -exponent);
    const mpz_class at = start_ + e;  // N at the start
    mpz_class whole;
    mpz_ui_pow_ui(whole.get_mpz_t(), static_cast<unsigned long>(m), static_cast<unsigned long>(m));
    scale(mpq_class(1, whole), exponent);
    const mpz_class there(mpz_class::factorial(at.get_ui() * static_cast<unsigned long>(m)) /
                          mpz_class::factorial(at.get_ui()));
    constant_ *= power(there, -exponent);
  }

  bool single(const mpq_class& shift, long exponent) {
    const mpq_class first = shift + start_;
    if (shift.get_den() != 1) {
      add(fmt::format("rising({}, {})", first.get_str(), steps()), exponent);
      return true;
    }
    if (first <= 0 || first > 200) return false;
    add(fmt::format("factorial({})", plus(n_, shift.get_num() - 1)), exponent);
    constant_ *= power(mpq_class(mpz_class::factorial(first.get_num().get_ui() - 1)), -exponent);
    return true;
  }

  [[nodiscard]] Polynomial number(long value) const {
    return Polynomial(setting_.ring, mpz_class(value));
  }

  /// No parameter has a positive coefficient.
  static bool only_negative(const Polynomial& rest) {
    for (const algebra::Monomial& m : rest.to_terms())
      if (m.coefficient > 0 && std::any_of(m.exponents.begin(), m.exponents.end(),
                                           [](unsigned long e) { return e > 0; }))
        return false;
    return true;
  }

  /// c j + D with parameters in D.
  bool symbolic(const mpz_class& c, const Polynomial& rest, long exponent) {
    const Polynomial n = Polynomial::variable(setting_.ring, term::running);
    const bool negative = only_negative(rest);
    if (abs(c) == 1 && negative == (c > 0)) {  // -(X - j), X = -D or D
      const Polynomial x = (negative ? -rest : rest) - number(start_);
      if (negative) scale(-1, exponent);
      if (start_ == 0)
        fallings_[x.to_string()] += exponent;
      else
        add(fmt::format("falling({}, {})", x.to_string(), steps()), exponent);
      return true;
    }
    scale(c, exponent);
    Affine form;
    if (c == 1 && !term::involves_rational_parameter(setting_, rest) &&
        term::to_affine(rest, form) && setting_.from(start_).implies(form + start_ - 1)) {
      add(fmt::format("factorial({})", (n + rest - number(1)).to_string()), exponent);
      add(fmt::format("factorial({})", (rest + number(start_ - 1)).to_string()), -exponent);
      return true;
    }
    const std::string a = c == 1
                              ? (rest + number(start_)).to_string()
                              : plus(fmt::format("({})/{}", rest.to_string(), c.get_str()), start_);
    add(fmt::format("rising({}, {})", a, steps()), exponent);
    return true;
  }

  /// falling(X, n)/n! is a binomial coefficient.
  void fallings() {
    const auto divisor = shifts_.find(mpq_class(1));
    for (auto& [x, exponent] : fallings_)
      for (; exponent != 0; exponent -= exponent > 0 ? 1 : -1) {
        const bool binomial =
            divisor != shifts_.end() && start_ == 0 && exponent > 0 && divisor->second < 0;
        if (binomial) ++divisor->second;
        add(fmt::format("{}({}, {})", binomial ? "binomial" : "falling", x, n_),
            exponent > 0 ? 1 : -1);
      }
  }

  const term::Setting& setting_;
  long start_;
  std::string n_;
  mpq_class constant_;
  mpq_class growth_ = 1;
  std::map<mpq_class, long> shifts_;      ///< exponents of j + shift
  std::map<std::string, long> fallings_;  ///< exponents of falling(text, n), from n = 0
  std::vector<std::string> above_;
  std::vector<std::string> below_;
};

}  // namespace

[[nodiscard]] static std::optional<std::string> first_order(const Proof& question) {
  const term::Setting setting = term::make_setting(question.claim);
  const auto& coefficients = question.claim->evidence.recurrence;
  if (coefficients.size() != 2) return std::nullopt;
  const auto a0 = term::to_rational_function(setting, *coefficients[0]);
  const auto a1 = term::to_rational_function(setting, *coefficients[1]);
  if (!a0 || !a1 || a0->is_zero() || a1->is_zero()) return std::nullopt;
  algebra::Factored quotient = a0->factored();
  quotient.multiply(a1->factored(), -1);
  quotient.constant = -quotient.constant;
  for (long start = question.from; start < question.from + starts_tried; ++start) {
    const std::optional<Factored> first = value_at(question, setting, start);
    if (!first || first->is_zero()) continue;
    ProductText text(setting, start, *first);
    text.scale(quotient.constant, 1);
    bool fits = true;
    for (const auto& [factor, exponent] : quotient.factors)
      fits = fits && text.multiply(factor, exponent);
    if (!fits) return std::nullopt;
    if (std::optional<std::string> made = text.text()) return made;
  }
  return std::nullopt;
}

/// b(n)/a_0(n); a single term simplified.
static std::string quotient(const Proof& question) {
  std::string plain =
      fmt::format("({})/({})", question.right_side_text, question.recurrence_text[0]);
  const term::Setting setting = term::make_setting(question.claim);
  const claim::ExpressionPtr& right = question.claim->evidence.right_side;
  if (!right) return plain;
  const term::Conversion b = term::convert(setting, setting.from(question.from), right);
  const auto a = term::to_rational_function(setting, *question.claim->evidence.recurrence.at(0));
  if (b.products.size() != 1 || !a || a->is_zero()) return plain;
  Factored value = b.products[0].coefficient;
  value.multiply(a->factored(), -1);
  term::Product product = b.products[0];
  product.coefficient = {};
  term::simplify(setting.ring, value, product);
  return term::claim_text(value, product);
}

}  // namespace building

std::optional<std::string> closed_form_candidate(const Proof& question) {
  if (question.verdict != Verdict::established || question.claim->sum.over.size() != 1)
    return std::nullopt;
  if (question.order == 0) {
    if (question.recurrence_text.size() != 1 || question.right_side_text.empty())
      return std::nullopt;
    if (question.recurrence_text[0] == "1") return question.right_side_text;
    return building::quotient(question);
  }
  if (question.order != 1 || question.right_side_text != "0") return std::nullopt;
  try {
    return building::first_order(question);
  } catch (const std::domain_error&) {  // a value at the start divides by 0
  } catch (const std::length_error&) {  // or is too large
  } catch (const std::overflow_error&) {
  } catch (const std::invalid_argument&) {  // a bound without a value
  }
  return std::nullopt;
}

}  // namespace sumwright::proof
