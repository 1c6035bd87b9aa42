// Re-checking a file: its polynomial identities by themselves, and item by item against a rebuilt
// proof.
//
// The identities are expanded with arithmetic of their own while the work stays within a budget;
// past it they are evaluated on a grid that is large enough for their degrees.
#include <fmt/format.h>

#include <algorithm>
#include <functional>
#include <map>

#include "claim/text.hpp"
#include "writers/exact_polynomial.hpp"
#include "writers/obligations_reader.hpp"
#include "writers/print_text.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {

namespace {

constexpr std::size_t kExpansionUnits = 20'000'000;
constexpr std::size_t kEvaluationUnits = 200'000'000;
constexpr unsigned long kDegreeBits = 5000;  // largest degree worth a try

[[nodiscard]] std::size_t index_position(const ObligationsFile& file) {
  for (std::size_t i = 0; i < file.symbols.size(); ++i) {
    if (file.symbols[i].kind == proof::SymbolKind::index) return i;
  }
  return file.symbols.size();
}

// What must vanish identically: a sum of products, each evaluated or expanded on demand.
struct Identity {
  std::function<ExactPolynomial(Budget&)> expanded;
  std::function<mpq_class(const std::vector<long>&)> at;
  std::vector<unsigned long> degrees;  // bounds per symbol
  std::size_t cost = 1;                // of one evaluation
};

void raise_degrees(std::vector<unsigned long>& degrees,
                   const std::vector<const proof::Factored*>& f,
                   const proof::Polynomial* polynomial = nullptr) {
  for (std::size_t i = 0; i < degrees.size(); ++i) {
    unsigned long degree = polynomial == nullptr ? 0 : degree_bound(*polynomial, i);
    for (const proof::Factored* factor : f) degree += degree_bound(*factor, i);
    degrees[i] = std::max(degrees[i], degree);
  }
}

[[nodiscard]] std::size_t term_count(const proof::Factored& value) {
  std::size_t count = 1;
  for (const auto& [factor, exponent] : value.factors) count += factor.terms.size();
  return count;
}

// The grid 0..d_1 times 0..d_2 times ...; false as soon as a value is not 0.
[[nodiscard]] bool zero_on_grid(const Identity& identity) {
  Budget budget(kEvaluationUnits);
  std::vector<long> point(identity.degrees.size(), 0);
  while (true) {
    budget.spend(identity.cost);
    if (identity.at(point) != 0) return false;
    std::size_t i = 0;
    while (i < point.size() && point[i] == static_cast<long>(identity.degrees[i])) point[i++] = 0;
    if (i == point.size()) return true;
    ++point[i];
  }
}

[[nodiscard]] bool vanishes(const Identity& identity) {
  for (const unsigned long degree : identity.degrees) {
    if (degree > kDegreeBits) throw Budget::Exhausted();
  }
  try {
    Budget budget(kExpansionUnits);
    return identity.expanded(budget).empty();
  } catch (const Budget::Exhausted&) {
    return zero_on_grid(identity);
  }
}

[[nodiscard]] ExactPolynomial left_side(const ObligationsFile& file, Budget& budget) {
  const std::size_t symbols = file.symbols.size();
  ExactPolynomial sum;
  for (std::size_t i = 0; i < file.p.size(); ++i) {
    add_to(sum,
           product(expand(file.coefficients[i], symbols, budget),
                   expand(file.p[i], symbols, budget), budget),
           1);
  }
  return product(expand(file.weight, symbols, budget), sum, budget);
}

[[nodiscard]] mpq_class left_side_at(const ObligationsFile& file, const std::vector<long>& point) {
  mpq_class sum = 0;
  for (std::size_t i = 0; i < file.p.size(); ++i) {
    sum += evaluate(file.coefficients[i], point) * evaluate(file.p[i], point);
  }
  return sum * evaluate(file.weight, point);
}

[[nodiscard]] Identity left_frame(const ObligationsFile& file) {
  Identity out;
  out.degrees.assign(file.symbols.size(), 0);
  for (std::size_t i = 0; i < file.p.size(); ++i) {
    raise_degrees(out.degrees, {&file.weight, &file.coefficients[i], &file.p[i]});
    out.cost += term_count(file.coefficients[i]) + term_count(file.p[i]);
  }
  return out;
}

// weight * sum a_i p_i - (up c(k+1) - down c)
[[nodiscard]] Identity telescoping_identity(const ObligationsFile& file) {
  const std::size_t k = index_position(file);
  const std::size_t symbols = file.symbols.size();
  const proof::Polynomial& c = file.certificate_polynomial;
  Identity out = left_frame(file);
  raise_degrees(out.degrees, {&file.up}, &c);
  raise_degrees(out.degrees, {&file.down}, &c);
  out.cost += term_count(file.up) + term_count(file.down) + 2 * c.terms.size();
  out.expanded = [&file, &c, k, symbols](Budget& budget) {
    ExactPolynomial sum = left_side(file, budget);
    const ExactPolynomial now = expand(c);
    add_to(sum, product(expand(file.up, symbols, budget), shifted(now, k, budget), budget), -1);
    add_to(sum, product(expand(file.down, symbols, budget), now, budget), 1);
    return sum;
  };
  out.at = [&file, &c, k](const std::vector<long>& point) -> mpq_class {
    std::vector<long> next = point;
    ++next[k];
    return left_side_at(file, point) - evaluate(file.up, point) * evaluate(c, next) +
           evaluate(file.down, point) * evaluate(c, point);
  };
  return out;
}

// weight * sum a_i p_i - scale * normal form
[[nodiscard]] Identity normal_form_identity(const ObligationsFile& file) {
  Identity out = left_frame(file);
  raise_degrees(out.degrees, {}, &file.normal_form);
  out.cost += file.normal_form.terms.size();
  out.expanded = [&file](Budget& budget) {
    ExactPolynomial sum = left_side(file, budget);
    add_to(sum, expand(file.normal_form), -file.normal_scale);
    return sum;
  };
  out.at = [&file](const std::vector<long>& point) -> mpq_class {
    return left_side_at(file, point) - file.normal_scale * evaluate(file.normal_form, point);
  };
  return out;
}

[[nodiscard]] Identity class_identity(const ObligationsFile& file, const ObligationsClass& group) {
  Identity out;
  out.degrees.assign(file.symbols.size(), 0);
  for (const proof::Factored& share : group.shares) {
    raise_degrees(out.degrees, {&share});
    out.cost += term_count(share);
  }
  out.expanded = [&file, &group](Budget& budget) {
    ExactPolynomial sum;
    for (const proof::Factored& share : group.shares) {
      add_to(sum, expand(share, file.symbols.size(), budget), 1);
    }
    return sum;
  };
  out.at = [&group](const std::vector<long>& point) -> mpq_class {
    mpq_class sum = 0;
    for (const proof::Factored& share : group.shares) sum += evaluate(share, point);
    return sum;
  };
  return out;
}

// Sizes as stated; primitive; leading coefficient positive.
[[nodiscard]] bool normal_form_is_normal(const ObligationsFile& file) {
  const Size size = size_of(file.normal_form);
  if (size.terms != file.terms || size.degree != file.degree || size.bits != file.bits)
    return false;
  for (std::size_t i = 0; i < file.symbols.size(); ++i) {
    if (degree_in(file.normal_form, i) != file.degrees[i]) return false;
  }
  if (file.normal_form.terms.empty()) return true;
  mpz_class content = 0;
  for (const proof::Monomial& term : file.normal_form.terms)
    content = gcd(content, term.coefficient);
  return content == 1 && file.normal_form.terms.front().coefficient > 0 && file.normal_scale != 0;
}

// From a little before the first difference, so that long values show where they differ.
[[nodiscard]] std::string window(const std::string& text, std::size_t at) {
  constexpr std::size_t kBefore = 20;
  if (at <= kBefore) return claim::in_quotes(text);
  return claim::in_quotes("..." + text.substr(at - kBefore));
}

[[nodiscard]] std::string differs(const ObligationsEntry& file, const ObligationsEntry& rebuilt) {
  const std::size_t shorter = std::min(file.value.size(), rebuilt.value.size());
  std::size_t at = 0;
  while (at < shorter && file.value[at] == rebuilt.value[at]) ++at;
  return fmt::format("{}`{}`: the file has {}, the claim gives {}",
                     file.section.empty() ? "" : file.section + ": ", file.key,
                     window(file.value, at), window(rebuilt.value, at));
}

}  // namespace

bool equality_holds(const ObligationsFile& file) {
  if (!file.has_equality && file.classes.empty()) return false;
  try {
    if (file.has_equality) {
      if (index_position(file) == file.symbols.size() || !normal_form_is_normal(file)) return false;
      if (!vanishes(normal_form_identity(file)) || !vanishes(telescoping_identity(file)))
        return false;
    }
    return std::all_of(
        file.classes.begin(), file.classes.end(),
        [&](const ObligationsClass& group) { return vanishes(class_identity(file, group)); });
  } catch (const std::invalid_argument&) {
    return false;  // a negative power where a polynomial is needed
  }
}

std::vector<std::string> differences(const ObligationsFile& file, const proof::Proof& rebuilt) {
  const ObligationsFile other = read_obligations_text("rebuilt", obligations_text(rebuilt));
  std::vector<std::string> out;
  if (file.claim_text != other.claim_text) out.emplace_back("the claim's text is another one");
  std::map<std::pair<std::string, std::string>, const ObligationsEntry*> wanted;
  for (const ObligationsEntry& entry : other.entries) wanted[{entry.section, entry.key}] = &entry;
  for (const ObligationsEntry& entry : file.entries) {
    const auto found = wanted.find({entry.section, entry.key});
    if (found == wanted.end()) {
      out.push_back(fmt::format("{}: `{}` has no counterpart", entry.section, entry.key));
      continue;
    }
    if (found->second->value != entry.value) out.push_back(differs(entry, *found->second));
    wanted.erase(found);
  }
  for (const ObligationsEntry& entry : other.entries) {
    if (!wanted.contains({entry.section, entry.key})) continue;
    out.push_back(fmt::format("{}: `{}` is missing in the file", entry.section, entry.key));
  }
  return out;
}

}  // namespace sumwright::writers
