// From the hypotheses of the claim (`not`, `at_least`, `assume`, `from`) to parameter values that
// satisfy them. Nothing but the author's entries decides what is admissible.
#include "audit/hypotheses.hpp"

#include <algorithm>

#include "audit/evaluator.hpp"

namespace sumwright::audit {

bool excludes(const claim::Exclusion& exclusion, const numeric& value) {
  using Kind = claim::Exclusion::Kind;
  if (exclusion.kind == Kind::constant) return value.is_equal(to_numeric(exclusion.value));
  if (!value.is_integer()) return false;
  switch (exclusion.kind) {
    case Kind::positive_integers:
      return value > 0;
    case Kind::negative_integers:
      return value < 0;
    case Kind::nonnegative_integers:
      return value >= 0;
    case Kind::nonpositive_integers:
      return value <= 0;
    default:
      return true;
  }
}

namespace {

bool holds(const claim::Assumption& assumption, const Point& at) {
  const Value left = evaluate(*assumption.left, at);
  const Value right = evaluate(*assumption.right, at);
  if (!left.exists() || !right.exists()) return false;
  switch (assumption.comparison) {
    case claim::Comparison::less_equal:
      return left.number <= right.number;
    case claim::Comparison::less:
      return left.number < right.number;
    case claim::Comparison::greater_equal:
      return left.number >= right.number;
    case claim::Comparison::greater:
      return left.number > right.number;
    default:
      return !left.number.is_equal(right.number);
  }
}

bool mentions_running(const claim::Claim& claim, const claim::Assumption& assumption) {
  return mentions(*assumption.left, claim.running) || mentions(*assumption.right, claim.running);
}

bool admits_one(const claim::Parameter& parameter, const numeric& value) {
  if (parameter.ring == claim::Parameter::Ring::integers)
    return value.is_integer() && (!parameter.at_least || value >= to_numeric(*parameter.at_least));
  return std::none_of(parameter.excluded.begin(), parameter.excluded.end(),
                      [&](const claim::Exclusion& one) { return excludes(one, value); });
}

}  // namespace

bool admits_parameters(const claim::Claim& claim, const Point& at) {
  for (const claim::Parameter& parameter : claim.parameters)
    if (!admits_one(parameter, at.at(parameter.name))) return false;
  return std::all_of(
      claim.assumptions.begin(), claim.assumptions.end(),
      [&](const claim::Assumption& one) { return mentions_running(claim, one) || holds(one, at); });
}

bool admits(const claim::Claim& claim, const Point& at) {
  if (at.at(claim.running) < to_numeric(claim.from)) return false;
  if (!admits_parameters(claim, at)) return false;
  return std::all_of(claim.assumptions.begin(), claim.assumptions.end(),
                     [&](const claim::Assumption& one) {
                       return !mentions_running(claim, one) || holds(one, at);
                     });
}

namespace {

/// The numbers that stand in the conditions between parameters.
void collect_literals(const claim::Expression& node, std::vector<numeric>& out) {
  if (node.operation == claim::Operation::literal && out.size() < 16)
    out.push_back(to_numeric(node.value));
  for (const claim::ExpressionPtr& child : node.children) collect_literals(*child, out);
}

std::vector<numeric> literals_of(const claim::Claim& claim) {
  std::vector<numeric> out;
  for (const claim::Assumption& one : claim.assumptions) {
    collect_literals(*one.left, out);
    collect_literals(*one.right, out);
  }
  return out;
}

/// Small and special values first, larger and more generic ones later; last those next to the
/// numbers in the conditions, which may leave hardly any other.
std::vector<numeric> candidates(const claim::Parameter& parameter,
                                const std::vector<numeric>& literals) {
  std::vector<numeric> out;
  const auto keep = [&](const numeric& value) {
    const bool known = std::any_of(out.begin(), out.end(),
                                   [&](const numeric& old) { return old.is_equal(value); });
    if (!known && admits_one(parameter, value)) out.push_back(value);
  };
  if (parameter.ring == claim::Parameter::Ring::rationals) {
    for (const long a : {0, 1, -1, 2}) keep(a);
    for (const auto& [a, b] : {std::pair{1L, 2L},
                               {-2L, 1L},
                               {3L, 1L},
                               {-1L, 2L},
                               {5L, 2L},
                               {1L, 3L},
                               {-7L, 3L},
                               {7L, 5L}})
      keep(numeric(a, b));
    for (const numeric& c : literals)
      for (const numeric& value : {c, -c, c + numeric(1, 2)}) keep(value);
    return out;
  }
  if (parameter.at_least) {
    const numeric low = to_numeric(*parameter.at_least);
    for (const long d : {0, 1, 2, 3, 4, 6, 9, 13, 21, 40}) keep(low + numeric(d));
  } else {
    for (const long a : {0, 1, -1, 2, -2, 3, -3, 5, 8, -8, 13, 21}) keep(a);
  }
  for (const numeric& c : literals)
    for (const long d : {0, 1, -1})
      for (const numeric& value : {c + numeric(d), -c + numeric(d)}) keep(value);
  return out;
}

/// Enumerates choices of one candidate each with a given sum of positions.
class Diagonals {
 public:
  Diagonals(const claim::Claim& claim, std::vector<std::vector<numeric>> lists)
      : claim_(claim), lists_(std::move(lists)) {}

  void visit(std::size_t sum, Point& point, std::vector<Point>& found, std::size_t most) {
    choose(0, sum, point, found, most);
  }
  [[nodiscard]] std::size_t last() const {
    std::size_t out = 0;
    for (const auto& list : lists_) out += list.size() - 1;
    return out;
  }

 private:
  void choose(std::size_t i, std::size_t left, Point& point, std::vector<Point>& found,
              std::size_t most) {
    if (found.size() >= most || tried_ > 20000) return;
    if (i == lists_.size()) {
      ++tried_;
      if (left == 0 && admits_parameters(claim_, point)) found.push_back(point);
      return;
    }
    const bool final = i + 1 == lists_.size();
    for (std::size_t j = final ? left : 0; j <= left && j < lists_[i].size(); ++j) {
      point.set(claim_.parameters[i].name, lists_[i][j]);
      choose(i + 1, left - j, point, found, most);
    }
  }

  const claim::Claim& claim_;
  std::vector<std::vector<numeric>> lists_;
  std::size_t tried_ = 0;
};

long admissible_span(const claim::Claim& claim, Point point, long span) {
  long out = 0;
  for (long i = 0; i < span; ++i) {
    point.set(claim.running, to_numeric(claim.from) + numeric(i));
    if (admits(claim, point)) ++out;
  }
  return out;
}

Point blank(const claim::Claim& claim, const std::vector<std::string>& names) {
  Point out{names, std::vector<numeric>(names.size(), numeric(0))};
  out.set(claim.running, to_numeric(claim.from));
  return out;
}

using Lists = std::vector<std::vector<numeric>>;

/// Small values of all parameters first.
std::vector<Point> small_points(const claim::Claim& claim, const Lists& lists, const Point& start,
                                std::size_t most) {
  Diagonals diagonals(claim, lists);
  std::vector<Point> found;
  Point point = start;
  for (std::size_t sum = 0; sum <= diagonals.last() && found.size() < most; ++sum)
    diagonals.visit(sum, point, found, most);
  return found;
}

/// Pairwise different later entries of the lists, in several arrangements.
std::vector<Point> generic_points(const claim::Claim& claim, const Lists& lists,
                                  const Point& start) {
  std::vector<Point> found;
  for (const std::size_t stride : {std::size_t{1}, std::size_t{2}, std::size_t{5}})
    for (std::size_t turn = 0; turn < 8; ++turn) {
      Point point = start;
      for (std::size_t i = 0; i < lists.size(); ++i) {
        const std::size_t skipped = std::min<std::size_t>(3, lists[i].size() - 1);
        const std::size_t at = skipped + (turn + stride * i) % (lists[i].size() - skipped);
        point.set(claim.parameters[i].name, lists[i][at]);
      }
      if (admits_parameters(claim, point)) found.push_back(point);
    }
  return found;
}

bool same_values(const Point& a, const Point& b) {
  return std::equal(a.values.begin(), a.values.end(), b.values.begin(), b.values.end(),
                    [](const numeric& x, const numeric& y) { return x.is_equal(y); });
}

/// Distinct points in order of arrival, each with an admissible n.
class Selection {
 public:
  Selection(const claim::Claim& claim, long span) : claim_(claim), span_(span) {}

  void take(const std::vector<Point>& from, std::size_t most) {
    for (const Point& point : from) {
      if (out.size() >= most) return;
      const bool known = std::any_of(out.begin(), out.end(),
                                     [&](const Point& old) { return same_values(old, point); });
      if (!known && admissible_span(claim_, point, span_) > 0) out.push_back(point);
    }
  }
  std::vector<Point> out;

 private:
  const claim::Claim& claim_;
  long span_;
};

}  // namespace

std::vector<Point> sample_parameters(const claim::Claim& claim,
                                     const std::vector<std::string>& names, std::size_t count,
                                     long span) {
  const Point start = blank(claim, names);
  if (claim.parameters.empty()) return {start};
  const std::vector<numeric> literals = literals_of(claim);
  Lists lists;
  for (const claim::Parameter& parameter : claim.parameters) {
    lists.push_back(candidates(parameter, literals));
    if (lists.back().empty()) return {};
  }
  std::vector<Point> generic = generic_points(claim, lists, start);
  std::stable_sort(generic.begin(), generic.end(), [&](const Point& a, const Point& b) {
    return admissible_span(claim, a, span) > admissible_span(claim, b, span);
  });
  const std::vector<Point> small = small_points(claim, lists, start, 60 + 10 * count);
  Selection selection(claim, span);
  selection.take(generic, std::max<std::size_t>(1, count / 2));
  selection.take(small, count);
  selection.take(generic, count);
  return selection.out;
}

std::vector<std::string> hypothesis_texts(const claim::Claim& claim) {
  using claim::Comparison;
  std::vector<std::string> out{claim.running + ">=" + claim.from.get_str()};
  for (const claim::Parameter& parameter : claim.parameters) {
    if (parameter.at_least) out.push_back(parameter.name + ">=" + parameter.at_least->get_str());
    for (const claim::Exclusion& one : parameter.excluded)
      if (one.kind == claim::Exclusion::Kind::constant)
        out.push_back(parameter.name + "!=" + one.value.get_str());
      else
        out.push_back(parameter.name + "not");
  }
  for (const claim::Assumption& one : claim.assumptions) {
    const char* sign = one.comparison == Comparison::less_equal      ? "<="
                       : one.comparison == Comparison::less          ? "<"
                       : one.comparison == Comparison::greater_equal ? ">="
                       : one.comparison == Comparison::greater       ? ">"
                                                                     : "!=";
    out.push_back(to_text(*one.left) + sign + to_text(*one.right));
  }
  for (std::string& text : out) text.erase(std::remove(text.begin(), text.end(), ' '), text.end());
  return out;
}

}  // namespace sumwright::audit
