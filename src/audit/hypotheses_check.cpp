// That nothing is assumed beyond the claim.
//
// No condition is open. A condition that is `given` rests on hypotheses that the claim contains,
// and what it says follows from them: it holds at every sample that the claim admits, and the
// values of a parameter that would break it are not admitted.
#include <algorithm>
#include <set>

#include "audit/checks.hpp"
#include "audit/evaluator.hpp"
#include "audit/hypotheses.hpp"
#include "audit/special_values.hpp"
#include "audit/text_reader.hpp"

namespace sumwright::audit {

namespace {

const std::string kAnyHypothesis = "hypothesis of the claim";
const std::string kHypothesis = "hypothesis ";

std::string without_spaces(std::string text) {
  text.erase(std::remove(text.begin(), text.end(), ' '), text.end());
  return text;
}

struct Given {
  const Context& context;
  Check& check;
  const proof::Condition& condition;

  /// Every symbol that a hypothesis of the claim speaks of.
  std::set<std::string> hypothesis_symbols() const {
    std::set<std::string> out;
    for (const claim::Parameter& one : context.claim.parameters)
      if (!one.excluded.empty() || one.at_least) out.insert(one.name);
    for (const claim::Assumption& one : context.claim.assumptions)
      for (const std::string& name : context.names)
        if (mentions(*one.left, name) || mentions(*one.right, name)) out.insert(name);
    return out;
  }

  /// "hypothesis m >= 0" must be an entry of the claim; "hypothesis of the claim" needs one that
  /// speaks of a symbol of the condition.
  bool names_hypothesis(const std::vector<ReadComparison>& says) const {
    if (condition.method == kAnyHypothesis) {
      const std::set<std::string> known = hypothesis_symbols();
      return std::any_of(says.begin(), says.end(), [&](const ReadComparison& one) {
        return std::any_of(known.begin(), known.end(), [&](const std::string& name) {
          return mentions(*one.left, name) || mentions(*one.right, name);
        });
      });
    }
    if (condition.method.rfind(kHypothesis, 0) != 0) return false;
    const std::string named = without_spaces(condition.method.substr(kHypothesis.size()));
    const std::vector<std::string> known = hypothesis_texts(context.claim);
    return std::find(known.begin(), known.end(), named) != known.end();
  }

  const std::vector<Place>& places(const ReadComparison& one) const {
    const std::string index = context.names.size() > 1 ? context.names[1] : "";
    return mentions(*one.left, index) || mentions(*one.right, index) ? context.index_places()
                                                                     : context.running_places();
  }

  void fail_at(const Point& point) const {
    check.fail(condition.id + " (" + condition.text +
               ") does not follow from the hypotheses: " + text_of(point));
  }

  void holds_at(const ReadComparison& one, const Place& place) const {
    const Point point = context.at(place);
    const std::optional<bool> fine = holds(one, point);
    check.count();
    if (fine && !*fine) fail_at(point);
    if (one.sign != "!=") return;
    for (const claim::Parameter& parameter : context.claim.parameters)
      root_in(one, parameter.name, point);
  }

  /// Where the condition is linear in a parameter: the value that breaks it must not be admitted.
  void root_in(const ReadComparison& one, const std::string& name, Point point) const {
    const std::optional<numeric> root = linear_root([&](const numeric& x) {
      point.set(name, x);
      return minus(evaluate(*one.left, point), evaluate(*one.right, point));
    });
    if (!root) return;
    point.set(name, *root);
    check.count();
    if (admits(context.claim, point)) fail_at(point);
  }

  void run() const {
    const std::vector<ReadComparison> says = read_comparisons(condition.text, context.names);
    check.expect(names_hypothesis(says), [&] {
      return condition.id + " (" + condition.text + ") rests on '" + condition.method +
             "', which the claim does not contain";
    });
    for (const ReadComparison& one : says)
      for (const Place& place : places(one))
        check.attempt([&] {
          context.tick();
          holds_at(one, place);
        });
  }
};

/// The claim of the proof says what the author's file says, a recurrence added or cleared.
void check_original(const Context& context, Check& check) {
  const claim::Claim* original = context.options.original;
  if (original == nullptr) return;
  const claim::Claim& used = context.claim;
  const auto need = [&](bool fine, const std::string& what) {
    check.expect(fine, [&] { return "not the author's: " + what; });
  };
  need(used.running == original->running && used.from == original->from, "running, from");
  need(used.sum.summand == original->sum.summand, "the summand");
  need(used.sum.over.size() == original->sum.over.size(), "the ranges");
  for (std::size_t i = 0; i < std::min(used.sum.over.size(), original->sum.over.size()); ++i)
    need(used.sum.over[i].index == original->sum.over[i].index &&
             used.sum.over[i].low.value == original->sum.over[i].low.value &&
             used.sum.over[i].high.value == original->sum.over[i].high.value,
         "a range");
  need(used.closed == original->closed && used.is_equality() == original->is_equality(),
       "the right side of the equality");
  need(hypothesis_texts(used) == hypothesis_texts(*original), "the hypotheses");
  need(original->is_question() || !used.evidence.recurrence.empty() || used.is_equality(),
       "the recurrence");
}

}  // namespace

void check_hypotheses(const Context& context, std::vector<Finding>& findings) {
  Check check("nothing assumed beyond the claim");
  check_original(context, check);
  for (const proof::Condition& condition : context.proof.conditions) {
    check.expect(condition.settled != proof::Settled::open,
                 [&] { return condition.id + " (" + condition.text + ") is open"; });
    check.expect(!condition.method.empty(), [&] { return condition.id + " has no method"; });
    if (condition.settled == proof::Settled::given) Given{context, check, condition}.run();
  }
  findings.push_back(check.finding());
}

}  // namespace sumwright::audit
