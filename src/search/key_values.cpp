// Values of the key equation's coefficients at k0, k0 + 1, ... modulo a prime: every factor power
// is tabulated once per point, then products are taken.
#include <algorithm>

#include "search/key_image.hpp"

namespace sumwright::search {
namespace {

constexpr std::size_t kMaxTableEntries = 20000000;  // at one point

}  // namespace

Word KeyImage::reduce(const mpz_class& value) const {
  return mpz_fdiv_ui(value.get_mpz_t(), field_.prime());
}

KeyImage::Terms KeyImage::reduce(const std::vector<algebra::Monomial>& terms) const {
  Terms out;
  for (const auto& term : terms) out.push_back({reduce(term.coefficient), &term.exponents});
  return out;
}

// Coefficients in k at a point of the other variables; empty for 0.
WordVector KeyImage::in_index(const Terms& terms, const WordVector& point) const {
  WordVector out;
  for (const Term& term : terms) {
    const auto& exponents = *term.exponents;
    Word value = term.coefficient;
    for (std::size_t v = 0; v < point.size(); ++v) {
      if (v == kIndex || exponents[v] == 0) continue;
      value =
          field_.mul(value, exponents[v] == 1 ? point[v] : field_.power(point[v], exponents[v]));
    }
    const std::size_t at = exponents[kIndex];
    if (at >= out.size()) out.resize(at + 1, 0);
    out[at] = field_.add(out[at], value);
  }
  return out;
}

void KeyImage::tabulate_base(const WordVector& in_k, WordVector& table) const {
  if (in_k.size() <= 2) {
    const Word step = in_k.size() == 2 ? in_k[1] : 0;
    Word value = field_.add(in_k.empty() ? 0 : in_k[0], field_.mul(step, start_));
    for (Word& entry : table) {
      entry = value;
      value = field_.add(value, step);
    }
    return;
  }
  for (std::size_t j = 0; j < table.size(); ++j) {
    const Word k = field_.add(start_, j);
    Word value = 0;
    for (std::size_t e = in_k.size(); e-- > 0;) value = field_.add(field_.mul(value, k), in_k[e]);
    table[j] = value;
  }
}

void KeyImage::tabulate(const WordVector& point, std::size_t count) {
  if (bases_.size() * count > kMaxTableEntries) {
    throw algebra::TimeUp("size limit reached: factors of the key equation");
  }
  tables_.resize(bases_.size());
  for (std::size_t f = 0; f < bases_.size(); ++f) {
    const auto& power = system_.powers[f];
    tables_[f].resize(power.uses_index ? count : std::min<std::size_t>(count, 1));
    tabulate_base(in_index(bases_[f], point), tables_[f]);
    if (power.exponent == 1) continue;
    for (Word& entry : tables_[f]) {
      entry = field_.power(entry, static_cast<Word>(power.exponent));
    }
  }
}

WordVector KeyImage::values_of(const KeySystem::Product& product, std::size_t count) const {
  if (count == 0) return {};
  Word scalar = reduce(product.constant);
  for (const std::size_t f : product.powers) {
    if (!system_.powers[f].uses_index) scalar = field_.mul(scalar, tables_[f][0]);
  }
  WordVector out(count, scalar);
  for (const std::size_t f : product.powers) {
    if (!system_.powers[f].uses_index) continue;
    const WordVector& table = tables_[f];
    for (std::size_t j = 0; j < count; ++j) out[j] = field_.mul(out[j], table[j]);
  }
  return out;
}

std::vector<WordVector> KeyImage::right_sides(const WordVector& point, std::size_t count,
                                              const algebra::Deadline& deadline) const {
  std::vector<WordVector> out;
  if (system_.given.empty()) {
    for (const auto& column : system_.columns) {
      deadline.check();
      out.push_back(values_of(column, count));
    }
    return out;
  }
  out.emplace_back(count, 0);
  for (std::size_t i = 0; i < given_.size() && i < system_.columns.size(); ++i) {
    deadline.check();
    const WordVector scale = in_index(given_[i], point);
    if (scale.empty()) continue;
    const WordVector column = values_of(system_.columns[i], count);
    for (std::size_t j = 0; j < count; ++j) {
      out[0][j] = field_.add(out[0][j], field_.mul(scale[0], column[j]));
    }
  }
  return out;
}

}  // namespace sumwright::search
