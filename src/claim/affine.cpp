// From a parse tree to an integer-affine form, node by node.
//
// Invariant: every number fits a long; the first one that does not ends the reading.
#include "claim/affine.hpp"

#include <utility>

namespace sumwright::claim {

namespace {

class AffineReader {
 public:
  AffineReader(const std::set<std::string>& names, AffineFault* fault)
      : names_(names), fault_(fault) {}

  [[nodiscard]] std::optional<AffineView> read(const Expression& e) {
    switch (e.operation) {
      case Operation::literal:
        return literal(e);
      case Operation::symbol:
        if (!names_.contains(e.name)) return fail(e, false);
        return AffineView{{{e.name, 1}}, 0};
      case Operation::negate:
        return scaled(e, read(*e.children[0]), -1);
      case Operation::add:
        return sum(e, 1);
      case Operation::subtract:
        return sum(e, -1);
      case Operation::multiply:
        return product(e);
      case Operation::power:
        return power(e);
      case Operation::divide:
      case Operation::call:
        break;
    }
    return fail(e, false);
  }

 private:
  std::nullopt_t fail(const Expression& where, bool too_large) {
    if (fault_ != nullptr) *fault_ = {&where, too_large};
    return std::nullopt;
  }

  [[nodiscard]] std::optional<AffineView> literal(const Expression& e) {
    if (!e.value.fits_slong_p()) return fail(e, true);
    return AffineView{{}, e.value.get_si()};
  }

  [[nodiscard]] std::optional<AffineView> scaled(const Expression& e,
                                                 std::optional<AffineView> form, long factor) {
    if (!form) return std::nullopt;
    if (factor == 0) return AffineView{};
    bool overflow = __builtin_mul_overflow(form->constant, factor, &form->constant);
    for (auto& [name, coefficient] : form->coefficients) {
      overflow |= __builtin_mul_overflow(coefficient, factor, &coefficient);
    }
    if (overflow) return fail(e, true);
    return form;
  }

  [[nodiscard]] std::optional<AffineView> sum(const Expression& e, long sign) {
    auto left = read(*e.children[0]);
    if (!left) return std::nullopt;
    auto right = scaled(e, read(*e.children[1]), sign);
    if (!right) return std::nullopt;
    bool overflow = __builtin_add_overflow(left->constant, right->constant, &left->constant);
    for (const auto& [name, coefficient] : right->coefficients) {
      const auto entry = left->coefficients.try_emplace(name, 0).first;
      overflow |= __builtin_add_overflow(entry->second, coefficient, &entry->second);
      if (entry->second == 0) left->coefficients.erase(entry);
    }
    if (overflow) return fail(e, true);
    return left;
  }

  [[nodiscard]] std::optional<AffineView> product(const Expression& e) {
    auto left = read(*e.children[0]);
    if (!left) return std::nullopt;
    auto right = read(*e.children[1]);
    if (!right) return std::nullopt;
    if (left->is_constant()) return scaled(e, std::move(right), left->constant);
    if (right->is_constant()) return scaled(e, std::move(left), right->constant);
    return fail(e, false);
  }

  [[nodiscard]] std::optional<AffineView> power(const Expression& e) {
    const auto base = read(*e.children[0]);
    if (!base) return std::nullopt;
    const auto exponent = read(*e.children[1]);
    if (!exponent) return std::nullopt;
    if (!base->is_constant() || !exponent->is_constant() || exponent->constant < 0) {
      return fail(e, false);
    }
    long value = 1;
    if (base->constant == 1 || base->constant == -1) {
      value = exponent->constant % 2 == 0 ? 1 : base->constant;
    } else if (base->constant == 0) {
      value = exponent->constant == 0 ? 1 : 0;
    } else {
      for (long i = 0; i < exponent->constant; ++i) {  // overflows before 64 rounds
        if (__builtin_mul_overflow(value, base->constant, &value)) return fail(e, true);
      }
    }
    return AffineView{{}, value};
  }

  const std::set<std::string>& names_;
  AffineFault* fault_;
};

}  // namespace

std::optional<AffineView> as_affine(const Expression& expression,
                                    const std::set<std::string>& names, AffineFault* fault) {
  return AffineReader(names, fault).read(expression);
}

std::optional<mpz_class> as_literal(const Expression& expression) {
  if (expression.operation == Operation::literal) return expression.value;
  if (expression.operation != Operation::negate) return std::nullopt;
  const Expression& operand = *expression.children[0];
  if (operand.operation != Operation::literal) return std::nullopt;
  return -operand.value;
}

}  // namespace sumwright::claim
