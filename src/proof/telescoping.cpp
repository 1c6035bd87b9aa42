// The polynomial equality (design, section 2, and rule R2 for the order in which denominators of
// the certificate are absorbed): from F, a_i and R to
//   weight * sum_i a_i p_i = up * c(n,k+1) - down * c(n,k).
// Invariant: the equality is equivalent, as rational functions, to sum_i a_i F(n+i,k) = D_k (R F).

#include "proof/telescoping.hpp"

#include <stdexcept>

namespace sumwright::proof::building {

using algebra::Factored;
using algebra::Polynomial;
using algebra::RationalFunction;
using algebra::RingPtr;
using term::Affine;
using term::Atom;
using term::Product;
using term::Setting;

namespace {

constexpr long farthest_absorption = 64;

/// Tries to make the base smaller so that the denominator factor f of q0 goes: larger rfact
/// arguments, then smaller fact arguments, interval ends, exponents (rule R2). The base is changed
/// in place.
class Absorber {
 public:
  explicit Absorber(Product& base) : base_(base) {}

  bool absorb(const Polynomial& f) {
    Affine form;
    const bool affine = term::to_affine(f, form);
    if (affine && (raise_reciprocal(form) || lower_factorial(form))) return true;
    return shorten_interval(f) || lower_power(f);
  }

 private:
  void replace(const Atom& old, const Atom& fresh) {
    Product out;
    out.coefficient = base_.coefficient;
    bool done = false;
    for (const auto& [atom, e] : base_.atoms) {
      const bool here = !done && atom == old;
      out.multiply(atom, here ? e - 1 : e);
      if (here) out.multiply(fresh, 1);
      done = done || here;
    }
    base_ = out;
  }

  /// The multiple of f that has the linear part of `like` (f is primitive): f * s.
  static std::optional<Affine> matching(const Affine& f, const Affine& like) {
    for (std::size_t i = 0; i < f.coefficients.size(); ++i) {
      if (f.coefficients[i] == 0) continue;
      if (like.coefficients[i] % f.coefficients[i] != 0) return std::nullopt;
      const long s = like.coefficients[i] / f.coefficients[i];
      if (s == 0) return std::nullopt;
      const Affine scaled = s * f;
      if (scaled.coefficients != like.coefficients) return std::nullopt;
      return scaled;
    }
    return std::nullopt;
  }

  /// rfact(L) with the factor f among L+1, L+2, ...: the nearest one.
  bool raise_reciprocal(const Affine& f) {
    const Atom* best = nullptr;
    long gap = farthest_absorption;
    for (const auto& [atom, e] : base_.atoms) {
      if (atom.kind != AtomKind::reciprocal_factorial) continue;
      const std::optional<Affine> target = matching(f, atom.argument);
      if (!target) continue;
      const long d = target->constant - atom.argument.constant;
      if (d < 1 || d >= gap) continue;
      gap = d;
      best = &atom;
    }
    if (best == nullptr) return false;
    const Atom old = *best;
    Atom fresh = old;
    fresh.argument = old.argument + gap;
    replace(old, fresh);
    return true;
  }

  /// fact(L) with the factor f among L, L-1, ...
  bool lower_factorial(const Affine& f) {
    const Atom* best = nullptr;
    long gap = farthest_absorption;
    for (const auto& [atom, e] : base_.atoms) {
      if (atom.kind != AtomKind::factorial) continue;
      const std::optional<Affine> target = matching(f, atom.argument);
      if (!target) continue;
      const long d = atom.argument.constant - target->constant;
      if (d < 0 || d >= gap) continue;
      gap = d;
      best = &atom;
    }
    if (best == nullptr) return false;
    const Atom old = *best;
    Atom fresh = old;
    fresh.argument = old.argument - (gap + 1);
    replace(old, fresh);
    return true;
  }

  bool shorten_interval(const Polynomial& f) {
    for (const auto& entry : base_.atoms) {
      const Atom& atom = entry.first;
      const bool reciprocal = atom.kind == AtomKind::reciprocal_interval_product;
      if (atom.kind != AtomKind::interval_product && !reciprocal) continue;
      for (long t = 0; t < farthest_absorption; ++t) {
        const auto same = [&](const Affine& at) {
          return term::interval_factor(atom, at).primitive_part() == f;
        };
        const Atom old = atom;
        Atom fresh = atom;
        if (same(reciprocal ? atom.high + t : atom.high - 1 - t))
          fresh.high = reciprocal ? atom.high + (t + 1) : atom.high - (t + 1);
        else if (same(reciprocal ? atom.low - 1 - t : atom.low + t))
          fresh.low = reciprocal ? atom.low - (t + 1) : atom.low + (t + 1);
        else
          continue;
        replace(old, fresh);
        return true;
      }
    }
    return false;
  }

  bool lower_power(const Polynomial& f) {
    for (const auto& [atom, e] : base_.atoms) {
      if (atom.kind != AtomKind::power || !(atom.base.primitive_part() == f)) continue;
      const Atom old = atom;
      Atom fresh = atom;
      fresh.argument = atom.argument - 1;
      Product out;
      for (const auto& [other, n] : base_.atoms) out.multiply(other == old ? fresh : other, n);
      base_ = out;
      return true;
    }
    return false;
  }

  Product& base_;
};

/// The sum of factored values, factored when it is a single one.
Factored sum(const RingPtr& ring, const std::vector<Bringing>& parts) {
  if (parts.size() == 1) return parts[0].polynomial;
  RationalFunction total(ring, mpq_class(0));
  for (const Bringing& part : parts) total = total + RationalFunction(ring, part.polynomial);
  return total.factored();
}

class Drafter {
 public:
  Drafter(const Setting& setting, const std::vector<Product>& summand,
          const std::vector<Polynomial>& coefficients, const RationalFunction& certificate,
          std::string& why)
      : ring_(setting.ring),
        summand_(summand),
        certificate_(certificate),
        why_(why),
        out_{{},
             coefficients,
             {},
             {},
             {},
             Polynomial(setting.ring),
             {},
             {},
             RationalFunction(setting.ring, mpq_class(0)),
             Polynomial(setting.ring)} {}

  std::optional<TelescopingDraft> run() {
    if (has_zero_product()) return std::nullopt;
    std::vector<Product> instances;
    for (std::size_t i = 0; i < out_.coefficients.size(); ++i)
      for (const Product& f : summand_)
        instances.push_back(term::shift(f, term::running, static_cast<long>(i)));
    std::optional<Product> base = common_base(ring_, instances, why_);
    if (!base) return std::nullopt;
    out_.base = std::move(*base);
    if (!absorb_denominators() || !bring_shifts() || !shift_index() || !split_certificate())
      return std::nullopt;
    collect_needs();
    check_equality();
    return std::move(out_);
  }

 private:
  /// 1/L! with a literal L < 0: such a term has no quotients.
  [[nodiscard]] bool has_zero_product() const {
    for (const Product& f : summand_)
      for (const auto& [atom, e] : f.atoms)
        if (atom.kind == AtomKind::reciprocal_factorial && atom.argument.is_constant() &&
            atom.argument.constant < 0) {
          why_ = "a term of the summand is identically zero";
          return true;
        }
    return false;
  }

  /// q0 = R F / B; nothing when F and B have no quotient.
  [[nodiscard]] std::optional<Factored> q0() const {
    Factored out = certificate_.factored();
    RationalFunction total(ring_, mpq_class(0));
    for (const Product& f : summand_) {
      const std::optional<Factored> quotient = term::ratio(ring_, f, out_.base);
      if (!quotient) return std::nullopt;
      if (summand_.size() == 1) {
        out.multiply(*quotient);
        return out;
      }
      total = total + RationalFunction(ring_, *quotient);
    }
    out.multiply(total.factored());
    return out;
  }

  bool absorb_denominators() {
    for (int round = 0; round < 200; ++round) {
      const std::optional<Factored> quotient = q0();
      if (!quotient) {
        why_ = "a factorial of the summand has no value in the range";
        return false;
      }
      q0_ = *quotient;
      if (q0_.is_zero()) return true;
      const Polynomial* factor = nullptr;
      for (const auto& [p, e] : q0_.factors)
        if (e < 0 && p.depends_on(term::index)) {
          factor = &p;
          break;
        }
      if (factor == nullptr) return true;  // the rest goes into the weight
      const Polynomial f = *factor;
      if (!Absorber(out_.base).absorb(f)) out_.base.multiply(term::reciprocal_atom(ring_, f));
    }
    why_ = "the denominator of the certificate is not absorbed by the base term";
    return false;
  }

  bool bring_shifts() {
    for (std::size_t i = 0; i < out_.coefficients.size(); ++i) {
      std::vector<Bringing> parts;
      for (const Product& f : summand_) {
        std::optional<Bringing> part =
            bring(ring_, term::shift(f, term::running, static_cast<long>(i)), out_.base, why_);
        if (!part) return false;
        parts.push_back(std::move(*part));
      }
      out_.p.push_back(sum(ring_, parts));
      out_.shifts.push_back(std::move(parts));
    }
    return true;
  }

  bool shift_index() {
    std::optional<IndexShift> shift = building::index_shift(ring_, out_.base, why_);
    if (!shift) return false;
    out_.index = std::move(*shift);
    return true;
  }

  /// q0 = down * c / weight with c a polynomial over Z and weight free of the index.
  bool split_certificate() {
    Factored c = q0_;
    if (c.is_zero()) return true;
    c.multiply(out_.index.down, -1);
    Factored numerator;
    numerator.constant = c.constant.get_num();
    out_.weight.constant = c.constant.get_den();
    for (const auto& [p, e] : c.factors) {
      if (e > 0) {
        numerator.multiply(p, e);
      } else if (p.depends_on(term::index)) {
        why_ = "the certificate does not have the factor " + p.to_string() +
               " that the shift of the base term needs";
        return false;
      } else {
        out_.weight.multiply(p, -e);
      }
    }
    out_.certificate = numerator.numerator(ring_);
    return true;
  }

  void collect_needs() {
    for (const std::vector<Bringing>& parts : out_.shifts)
      for (const Bringing& part : parts) {
        const std::vector<Need> needs = part.needs();
        out_.needs.insert(out_.needs.end(), needs.begin(), needs.end());
      }
    if (!out_.certificate.is_zero()) {
      const std::vector<Need> needs = out_.index.bringing.needs();
      out_.needs.insert(out_.needs.end(), needs.begin(), needs.end());
    }
  }

  void check_equality() {
    RationalFunction left(ring_, mpq_class(0));
    for (std::size_t i = 0; i < out_.coefficients.size(); ++i)
      left = left + RationalFunction(out_.coefficients[i]) * RationalFunction(ring_, out_.p[i]);
    out_.left = left * RationalFunction(ring_, out_.weight);
    const Polynomial& c = out_.certificate;
    const RationalFunction right =
        RationalFunction(ring_, out_.index.up) * RationalFunction(c.shift(term::index, 1)) -
        RationalFunction(ring_, out_.index.down) * RationalFunction(c);
    out_.residue = (out_.left - right).numerator();
  }

  const RingPtr& ring_;
  const std::vector<Product>& summand_;
  const RationalFunction& certificate_;
  std::string& why_;
  Factored q0_;
  TelescopingDraft out_;
};

}  // namespace

std::optional<TelescopingDraft> draft_telescoping(const Setting& setting,
                                                  const std::vector<Product>& summand,
                                                  const std::vector<Polynomial>& coefficients,
                                                  const RationalFunction& certificate,
                                                  std::string& why) {
  return Drafter(setting, summand, coefficients, certificate, why).run();
}

}  // namespace sumwright::proof::building
