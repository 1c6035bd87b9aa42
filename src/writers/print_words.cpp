// The words that exports use for enumerated values, one table per type.
#include <array>
#include <string_view>
#include <utility>

#include "writers/print_text.hpp"

namespace sumwright::writers {

namespace {

template <typename Enum, std::size_t N>
[[nodiscard]] std::string find(const std::array<std::pair<Enum, std::string_view>, N>& table,
                               Enum value) {
  for (const auto& [key, text] : table) {
    if (key == value) return std::string(text);
  }
  return "unknown";
}

template <typename Enum>
using Row = std::pair<Enum, std::string_view>;

using proof::ConditionKind;
using proof::LeafRule;
using proof::Settled;
using proof::Subject;
using proof::Verdict;

constexpr std::array<Row<ConditionKind>, 12> kKinds = {{
    {ConditionKind::factorial_argument, "factorial argument"},
    {ConditionKind::definedness, "definedness"},
    {ConditionKind::nonvanishing, "nonvanishing"},
    {ConditionKind::support, "support"},
    {ConditionKind::range, "range"},
    {ConditionKind::explicit_point, "explicit point"},
    {ConditionKind::threshold, "threshold"},
    {ConditionKind::onset, "onset"},
    {ConditionKind::leading_coefficient, "leading coefficient"},
    {ConditionKind::initial_value, "initial value"},
    {ConditionKind::continuation, "continuation"},
    {ConditionKind::hypothesis, "hypothesis"},
}};

constexpr std::array<Row<Settled>, 3> kSettled = {{
    {Settled::decided, "decided"},
    {Settled::given, "given"},
    {Settled::open, "open"},
}};

constexpr std::array<Row<Verdict>, 3> kVerdicts = {{
    {Verdict::established, "established"},
    {Verdict::refuted, "refuted"},
    {Verdict::undecided, "undecided"},
}};

constexpr std::array<Row<Subject>, 2> kSubjects = {{
    {Subject::claim, "claim"},
    {Subject::evidence, "evidence"},
}};

constexpr std::array<Row<LeafRule>, 10> kRules = {{
    {LeafRule::binomial_factorials, "binomial(a, b) = fact(a) rfact(b) rfact(a - b), a >= 0"},
    {LeafRule::binomial_interval, "binomial(x + u, b) = ip(x; u - b + 1, u + 1) rfact(b)"},
    {LeafRule::factorial, "factorial(a) = fact(a)"},
    {LeafRule::reciprocal_factorial, "factorial(a) in a denominator = rfact(a)"},
    {LeafRule::rising_interval, "rising(x + u, m) = ip(x; u, u + m), m >= 0"},
    {LeafRule::rising_factorials, "rising(u, m) = fact(u + m - 1) rfact(u - 1), u >= 1, m >= 0"},
    {LeafRule::rising_reflected, "rising(u, m) = (-1)^m fact(-u) rfact(-u - m), u <= 0, m >= 0"},
    {LeafRule::falling_interval, "falling(x + u, m) = ip(x; u - m + 1, u + 1), m >= 0"},
    {LeafRule::falling_factorials, "falling(u, m) = fact(u) rfact(u - m), u >= 0, m >= 0"},
    {LeafRule::power, "powers of irreducible bases"},
}};

}  // namespace

std::string word(ConditionKind kind) { return find(kKinds, kind); }
std::string word(Settled settled) { return find(kSettled, settled); }
std::string word(Verdict verdict) { return find(kVerdicts, verdict); }
std::string word(Subject subject) { return find(kSubjects, subject); }
std::string word(LeafRule rule) { return find(kRules, rule); }

}  // namespace sumwright::writers
