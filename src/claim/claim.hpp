// A summation claim as its author stated it: the value the `claim` stage hands on.
#pragma once

#include <gmpxx.h>

#include <map>
#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "claim/expression.hpp"
#include "claim/source.hpp"

namespace sumwright::claim {

/// One end of a summation range.
struct Bound {
  enum class Kind { finite, minus_infinity, plus_infinity };
  Kind kind = Kind::finite;
  ExpressionPtr value;  ///< set when finite: integer-affine, floor(u/b), min, max
  Place place;
};

/// `index` runs over low..high; a range with low > high is empty.
struct Range {
  std::string index;
  Bound low;
  Bound high;
  Place place;
};

/// The sum of `summand` over the lattice points of `over` (outermost first).
struct Sum {
  ExpressionPtr summand;
  std::vector<Range> over;
};

/// One entry of a parameter's `not`.
struct Exclusion {
  enum class Kind {
    constant,
    integers,
    positive_integers,
    negative_integers,
    nonnegative_integers,
    nonpositive_integers
  };
  Kind kind = Kind::constant;
  ExpressionPtr written;  ///< constant only: the expression as written
  mpq_class value;        ///< constant only
};

struct Parameter {
  enum class Ring { rationals, integers };
  std::string name;
  Ring ring = Ring::rationals;
  std::vector<Exclusion> excluded;    ///< rationals only
  std::optional<mpz_class> at_least;  ///< integers only
  Place place;
};

enum class Comparison { less_equal, less, greater_equal, greater, not_equal };

/// One entry of `assume`, as written.
struct Assumption {
  ExpressionPtr left;
  Comparison comparison = Comparison::less_equal;
  ExpressionPtr right;
  bool over_integers = true;  ///< only integer symbols, integer literals and + - * on both sides
  Place place;
};

/// What the author brings as evidence (or, without `equals`, as the claim).
struct Evidence {
  std::vector<ExpressionPtr> recurrence;             ///< coefficients of S(n), S(n+1), ...
  ExpressionPtr right_side;                          ///< null when not given: 0
  std::map<std::string, ExpressionPtr> certificate;  ///< index name -> rational function
  Place place;
};

/// Carried into the exports, never interpreted.
struct Record {
  std::vector<std::string> authors;
  std::string source;
  std::string identifier;
  std::string licence;
};

struct Claim {
  std::string title;
  std::string running;
  mpz_class from;
  std::vector<Assumption> assumptions;
  Sum sum;
  ExpressionPtr closed;               ///< `equals.closed`; null when absent
  std::optional<Sum> other_sum;       ///< `equals.summand` + `equals.over`
  std::vector<Parameter> parameters;  ///< in file order
  Evidence evidence;                  ///< empty recurrence: none brought
  Record record;
  std::shared_ptr<const Source> source;  ///< the file's text, for messages and exports

  [[nodiscard]] bool is_equality() const { return closed != nullptr || other_sum.has_value(); }
  [[nodiscard]] bool is_question() const { return !is_equality() && evidence.recurrence.empty(); }
};

}  // namespace sumwright::claim
