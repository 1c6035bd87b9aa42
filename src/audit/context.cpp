// From a Proof to the points at which it is tried: parameter samples (generic, small, boundary,
// and roots of the factors of the recurrence), n from the threshold on, k over the telescoping
// range.
#include "audit/context.hpp"

#include <algorithm>
#include <set>

#include "audit/atoms.hpp"
#include "audit/crossings.hpp"
#include "audit/hypotheses.hpp"
#include "audit/special_values.hpp"

namespace sumwright::audit {

namespace {

constexpr std::size_t kSpecialSamples = 4;
constexpr long kExceptionalSpan = 30;
constexpr std::size_t kMostExceptional = 4;
constexpr std::size_t kMostCrossings = 24;
constexpr std::size_t kIndex = 1;

std::vector<std::string> names_of(const proof::Proof& proof) {
  std::vector<std::string> out;
  for (const proof::Symbol& symbol : proof.symbols) out.push_back(symbol.name);
  return out;
}

}  // namespace

void Check::fail(const std::string& detail) {
  if (!finding_.agrees) return;
  finding_.agrees = false;
  finding_.detail = detail;
}

void Check::remark(const std::string& text) {
  if (finding_.agrees) finding_.detail += (finding_.detail.empty() ? "" : "; ") + text;
}

void Check::expect(bool fine, const std::function<std::string()>& detail) {
  count();
  if (!fine) fail(detail());
}

void Check::expect_same(const Value& left, const Value& right, const std::string& what,
                        const Point& at) {
  expect(same(left, right), [&] {
    return what + " at " + text_of(at) + ": " + text_of(left) + " against " + text_of(right);
  });
}

void Check::attempt(const std::function<void()>& one_case) {
  try {
    one_case();
  } catch (const TooLarge& reason) {
    if (left_out_++ == 0) first_reason_ = reason.what();
  } catch (const NotAnInteger& flaw) {
    fail(flaw.what());
  }
}

Finding Check::finding() const {
  Finding out = finding_;
  if (left_out_ > 0 && out.agrees)
    out.detail += (out.detail.empty() ? "" : "; ") + std::to_string(left_out_) + " left out (" +
                  first_reason_ + ")";
  return out;
}

std::vector<long> spread(long low, long high, long all) {
  std::set<long> out;
  if (high - low < all) {
    for (long k = low; k <= high; ++k) out.insert(k);
  } else {
    for (long i = 0; i < all / 3; ++i) out.insert({low + i, high - i});
    out.insert(low + (high - low) / 2);
  }
  return {out.begin(), out.end()};
}

Context::Context(const proof::Proof& the_proof, const AuditOptions& the_options)
    : proof(the_proof),
      claim(*the_proof.claim),
      options(the_options),
      names(names_of(the_proof)),
      samples(sample_parameters(claim, names, std::max<std::size_t>(options.parameter_samples, 1),
                                options.sum_span)),
      author(claim, samples, options.check_time) {
  add_special_samples();
  for (const Point& sample : samples)
    crossings_.push_back(audit::crossings(claim, sample, kMostCrossings));
  make_places();
}

bool Context::admits(std::size_t sample, long n) const {
  return audit::admits(claim, author.point(sample, n));
}

namespace {

/// Every factor that the recurrence, the certificate and the conditions on them are made of.
std::vector<const proof::Polynomial*> all_factors(const proof::Proof& proof) {
  std::vector<const proof::Polynomial*> out;
  const auto take = [&](const proof::Factored& value) {
    for (const auto& [factor, exponent] : value.factors) out.push_back(&factor);
  };
  if (proof.leading) take(proof.leading->polynomial);
  if (proof.telescoping) {
    for (const proof::Factored& one : proof.telescoping->coefficients) take(one);
    take(proof.telescoping->weight.polynomial);
    take(proof.telescoping->down);
    take(proof.telescoping->up);
    for (const auto& [atom, exponent] : proof.telescoping->base.product.atoms)
      if (!atom.base.terms.empty()) out.push_back(&atom.base);
  }
  return out;
}

bool has_degree_one(const proof::Polynomial& polynomial, std::size_t symbol) {
  unsigned long degree = 0;
  for (const proof::Monomial& monomial : polynomial.terms)
    if (symbol < monomial.exponents.size()) degree = std::max(degree, monomial.exponents[symbol]);
  return degree == 1;
}

}  // namespace

void Context::add_sample(const Point& point) {
  const bool known = std::any_of(samples.begin(), samples.end(), [&](const Point& old) {
    return std::equal(old.values.begin() + kIndex + 1, old.values.end(),
                      point.values.begin() + kIndex + 1,
                      [](const numeric& a, const numeric& b) { return a.is_equal(b); });
  });
  if (!known && audit::admits(claim, point)) samples.push_back(point);
}

void Context::add_special_samples() {
  if (claim.parameters.empty() || samples.empty()) return;
  const Point base = samples.front();
  const std::size_t most = samples.size() + kSpecialSamples;
  for (const proof::Polynomial* factor : all_factors(proof))
    for (std::size_t symbol = kIndex + 1; symbol < names.size(); ++symbol) {
      if (samples.size() >= most) return;
      if (!has_degree_one(*factor, symbol)) continue;
      Point point = base;
      point.values[0] = numeric(proof.threshold + 2);
      point.values[kIndex] = 1;
      const std::optional<numeric> root = linear_root([&](const numeric& x) {
        point.values[symbol] = x;
        return Value::of(value_of(*factor, point));
      });
      if (!root) continue;
      point.values[symbol] = *root;
      point.values[kIndex] = 0;
      add_sample(point);
    }
  for (const Point& point : special_points(claim, base, most - samples.size())) add_sample(point);
}

std::vector<long> Context::chosen_values(std::size_t sample) const {
  const long first = proof.threshold;
  std::set<long> out;
  const long few = sample == 0 ? 8 : 3;  // the first sample is a generic one
  for (long i = 0; i < few; ++i) out.insert(first + i);
  if (sample < 2) out.insert(first + 13);
  for (const long n : crossings_.at(sample))
    if (n >= first) out.insert(n);
  if (!proof.telescoping) return {out.begin(), out.end()};
  std::size_t exceptional = 0;
  for (long n = first; n <= first + kExceptionalSpan && exceptional < kMostExceptional; ++n) {
    const Point point = author.point(sample, n);
    const auto zero = [&](const proof::Factored& one) { return value_of(one, point).is_zero(); };
    if (zero(proof.telescoping->weight.polynomial) ||
        std::any_of(proof.telescoping->coefficients.begin(), proof.telescoping->coefficients.end(),
                    zero)) {
      out.insert(n);
      ++exceptional;
    }
  }
  return {out.begin(), out.end()};
}

void Context::make_places() {
  for (std::size_t sample = 0; sample < samples.size(); ++sample)
    for (const long n : chosen_values(sample)) {
      if (!admits(sample, n)) continue;
      running_places_.push_back({sample, n, 0});
      if (!proof.telescoping) continue;
      const Point point = author.point(sample, n);
      for (const long k : spread(value_of(proof.telescoping->low, point),
                                 value_of(proof.telescoping->high, point), sample == 0 ? 12 : 6))
        index_places_.push_back({sample, n, k});
    }
}

}  // namespace sumwright::audit
