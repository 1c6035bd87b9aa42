// The heart: a complete argument for one claim as plain data, prover-neutral.
//
// Read it in this order, which is the order of the argument:
//   summand     the author's summand equals F, a sum of products of atoms        (Conversion)
//   telescoping F(n+i,k) = p_i B, G(n,k) = q0 B, G(n,k+1) = q1 B, one equality   (Telescoping)
//   ranges      S(n+i) as a sum over one common range plus explicit points       (RangeStep)
//   recurrence  the ends, the explicit points and b(n) balance                   (Balance)
//   closed      the closed form satisfies the same recurrence                    (Balance)
//   leading     a_J(n) != 0                                                      (Nonzero)
//   initial     finitely many values                                            (InitialValue)
// A writer that needs mathematics beyond this value has found something missing here.
#pragma once

#include <gmpxx.h>

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "claim/claim.hpp"
#include "proof/value.hpp"

namespace sumwright::proof {

enum class ConditionKind {
  factorial_argument,
  definedness,
  nonvanishing,
  support,
  range,
  explicit_point,
  threshold,
  onset,
  leading_coefficient,
  initial_value,
  continuation,
  hypothesis
};

enum class Settled { decided, given, open };

/// A side condition: what must hold, where, and why it does.
struct Condition {
  std::string id;  ///< "c1", "c2", ... in order of the argument
  ConditionKind kind = ConditionKind::definedness;
  std::string text;    ///< "n - k >= 0"
  std::string region;  ///< "n >= 0, 0 <= k <= n"
  Settled settled = Settled::open;
  std::string method;  ///< "linear arithmetic", "hypothesis m >= 0", "evaluation", ...
};

// ---------------------------------------------------------------- the author's terms as atoms

/// How one function call or symbolic power of the claim becomes atoms.
enum class LeafRule {
  binomial_factorials,  ///< binomial(a,b) = fact(a) rfact(b) rfact(a-b), a >= 0
  binomial_interval,    ///< binomial(a,b) = ip(x; u-b+1, u+1) rfact(b), a = x + u, any a (x = 0 for
                        ///< integers)
  factorial,            ///< factorial(a) = fact(a)
  reciprocal_factorial,  ///< factorial(a) in a denominator = rfact(a)
  rising_interval,       ///< rising(x+u, m) = ip(x; u, u+m), m >= 0
  rising_factorials,     ///< rising(u, m) = fact(u+m-1) rfact(u-1), u >= 1, m >= 0
  rising_reflected,      ///< rising(u, m) = (-1)^m fact(-u) rfact(-u-m), u <= 0, m >= 0
  falling_interval,      ///< falling(x+u, m) = ip(x; u-m+1, u+1), m >= 0
  falling_factorials,    ///< falling(u, m) = fact(u) rfact(u-m), u >= 0, m >= 0
  power                  ///< u^v = product of powers of irreducible bases
};

/// leaf = value, where the conditions hold.
struct Leaf {
  claim::ExpressionPtr expression;
  LeafRule rule = LeafRule::factorial;
  Product value;
  std::vector<std::string> conditions;
  std::vector<Nonzero> nonzero;  ///< powers: the bases that must not vanish
};

/// An author's denominator: `expression` (the divisor v of u / v, or the base u of u^-c) times
/// `reciprocal` is 1. Not used for denominators with factorials read as reciprocal factorials.
struct Denominator {
  claim::ExpressionPtr node;        ///< the `divide` or negative `power` node
  claim::ExpressionPtr expression;  ///< v, or u
  Product as_product;               ///< v by the leaf rules
  Product reciprocal;               ///< w with v w = 1
  std::vector<Unit> units;          ///< their product is v w
  std::vector<std::string> conditions;
};

/// base^(first + second) = base^first base^second, where two powers of one base met in a product.
struct PowerMerge {
  Polynomial base;
  Affine first;
  Affine second;
  std::vector<std::string> conditions;
  std::optional<Nonzero> nonzero;  ///< set when it rests on a nonzero base, not on exponents >= 0
};

/// `expression` (summand, closed form, right side) = sum of `products` on `region`.
struct Conversion {
  std::string id;  ///< "summand", "closed", "right_side"
  claim::ExpressionPtr expression;
  Region region;
  std::vector<Leaf> leaves;  ///< every call and symbolic power, each different one once
  std::vector<Denominator> denominators;  ///< innermost first
  std::vector<PowerMerge> merges;         ///< in the order in which they happened
  std::vector<Product> products;          ///< after cancelling units
  std::vector<std::vector<Unit>> units;   ///< per product: the units cancelled from it
  /// Definedness of the author's text, for `claim_defined`: each entry names a node and why it has
  /// a value.
  std::vector<std::string> definedness;  ///< condition ids
};

// ---------------------------------------------------------------- similarity: instances of a base

/// One atom rewritten: from = factor * to, by `steps` applications of its law. A `literal` step has
/// no `to`: the atom has a value that needs no law beyond its definition (arguments without
/// symbols, an interval product of literal length), and from = factor. Steps are in an order in
/// which a rewritten atom never meets a later step's `from`.
struct AtomStep {
  enum class Side { left, right };
  Side side = Side::left;
  Atom from;
  Atom to;
  unsigned steps = 0;         ///< 0: the two differ only in the way the argument is written
  unsigned multiplicity = 1;  ///< how many of the copies of `from` are rewritten by this step
  bool literal = false;
  Factored factor;  ///< product of the linear factors of the law; constant may be a fraction
  /// A literal step of a reciprocal interval product: from = factor * these reciprocals.
  std::vector<Atom> reciprocals;
  std::vector<std::string> conditions;
  std::optional<Nonzero> nonzero;  ///< for laws that need a nonzero base or factor
};

/// left = right as numbers on the region: left atoms and right atoms become the same by the steps
/// and units, and then left.coefficient * factors = right.coefficient * factors is a polynomial
/// identity.
struct Instance {
  std::string id;
  Region region;
  Product left;
  Product right;
  std::vector<Unit> left_units;   ///< inserted into (multiplied to) the left side
  std::vector<Unit> right_units;  ///< inserted into the right side
  std::vector<AtomStep> steps;
  std::optional<Nonzero>
      cancelled;  ///< both sides were multiplied by this and it is cancelled last
};

/// A product with coefficient 1 to which similar products are compared.
struct Base {
  std::string id;  ///< "B", "E1", "E2", ...
  Product product;
};

/// A term of a balance: sign and weight are in `product.coefficient`.
struct BalanceTerm {
  enum class Origin { upper_end, lower_end, explicit_point, right_side, closed_form, value };
  Origin origin = Origin::explicit_point;
  std::string text;       ///< "G(n, n+2)", "a_1 F(n+1, n+1)" for readers
  unsigned shift = 0;     ///< explicit_point, closed_form: the i of n+i
  long offset = 0;        ///< explicit_point: index value is the range end (see RangeStep) + offset
  bool at_upper = true;   ///< explicit_point: which end
  std::size_t piece = 0;  ///< which product of F, C or b
  Affine point;           ///< explicit_point and ends: the index value
  Product product;        ///< after substituting the index; in the remaining symbols
  std::optional<std::string>
      zero;  ///< why it is 0: "polynomial factor", or the id of a support condition
  std::optional<Atom> zero_atom;  ///< the rfact with negative argument when that is the reason
  /// With zero_atom: a factor of the coefficient; the argument is negative only where it is not 0.
  /// It has an integer symbol with coefficient 1 or -1.
  std::optional<Affine> zero_factor;
  std::size_t group = 0;             ///< index into Balance::groups when not zero
  std::optional<Instance> instance;  ///< product = polynomial * base of the group
};

/// One class of similar terms; the sum of the members' polynomials is identically 0.
struct BalanceGroup {
  Base base;
  std::vector<std::size_t> members;  ///< indices into Balance::terms, same order as `polynomials`
  std::vector<Factored> polynomials;
};

/// sum of terms = 0 on the region, by grouping similar terms.
struct Balance {
  std::string id;  ///< "ends", "closed_recurrence", "initial_0", ...
  Region region;
  std::vector<BalanceTerm> terms;
  std::vector<BalanceGroup> groups;
};

// ---------------------------------------------------------------- telescoping

/// sum_i weight a_i(n) F(n+i,k) = q1 B - q0 B on `region`, from one polynomial equality:
///   weight * sum_i coefficients[i] * p[i] = up * c(n,k+1) - down * c(n,k),
/// q0 = down * c, q1 = up * c(n,k+1), and down(n,k+1) B(n,k+1) = up(n,k) B(n,k).
struct Telescoping {
  Base base;
  std::vector<Factored> coefficients;  ///< a_0..a_J: polynomials free of the index
  Nonzero weight;                      ///< d(n): free of the index; 1 in most cases
  /// per shift i, per product of F: F_j(n+i,k) = p B
  std::vector<std::vector<Instance>> shifts;
  std::vector<Factored> p;  ///< per shift: the sum over the products of F
  Polynomial certificate;   ///< c(n,k)
  Factored down;
  Factored up;
  std::optional<Instance> index_shift;  ///< down(n,k+1) B(n,k+1) = up B(n,k); none when c = 0
  Region region;                        ///< n >= threshold, low <= k <= high
  Affine low;                           ///< common range: low(n) <= k <= high(n)
  Affine high;
  std::vector<std::string> conditions;

  /// Normal form of the equality: left - right expanded is 0; for the record, the left side,
  /// primitive over Z with positive leading coefficient, and its sizes.
  Polynomial normal_form;
  mpq_class normal_scale = 1;  ///< left side = normal_scale * normal_form
};

/// Why F(n+i, k) vanishes beyond an end: per product of F an rfact whose argument is negative
/// there.
struct Vanishing {
  std::vector<Atom> atoms;  ///< per product of F, written at n+i
  std::string condition;
};

/// In place of a range with an infinite end: F(n,k) = 0 beyond the ends that replace infinite ones.
/// What a claim says of an infinite range: for all finite ends outside of which every term is 0.
struct FiniteRange {
  claim::Range range;
  std::optional<Vanishing> below;  ///< set when the author's lower end is infinite
  std::optional<Vanishing> above;
};

/// sum over the author's range at n+i of F(n+i,k)
///   = sum over low..high of F(n+i,k) + low_points terms below low + high_points terms above high.
struct RangeStep {
  unsigned shift = 0;
  unsigned low_points = 0;
  unsigned high_points = 0;
  std::optional<Vanishing>
      below;  ///< set when the author's lower end differs from low - low_points
  std::optional<Vanishing> above;
};

// ---------------------------------------------------------------- conclusion

/// S at one literal n: the index runs over literal low..high, or base + low .. base + high, after
/// leaving out vanishing terms.
struct LiteralSum {
  long at = 0;  ///< the n of S(n)
  long low = 0;
  long high = -1;                  ///< high < low: no nonzero terms
  std::optional<Vanishing> below;  ///< set when the author's end is not literally `low`
  std::optional<Vanishing> above;
  std::optional<Affine> base = {};  ///< in integer parameters; none: 0

  /// base + offset; `symbols` is the number of them.
  [[nodiscard]] Affine point(std::size_t symbols, long offset) const {
    Affine out = base ? *base : Affine{std::vector<long>(symbols, 0), 0};
    out.constant += offset;
    return out;
  }
};

/// One n checked term by term: S(at) against the closed form (equalities: one sum), or
/// sum_i a_i(at) S(at+i) against b(at) (recurrences: sums for i = 0..J). A balance in the
/// parameters only. BalanceTerm::shift says to which of `sums` an explicit term belongs,
/// BalanceTerm::point is the index value.
struct InitialValue {
  long at = 0;
  std::vector<LiteralSum> sums;
  std::optional<mpq_class> value;  ///< both sides as a number, when free of parameters
  Balance balance;  ///< S(at) - right side = 0 (for recurrences: sum a_i S(at+i) - b(at))
};

enum class Verdict { established, refuted, undecided };
enum class Subject { claim, evidence };

/// A point at which the claim or the evidence fails, both sides exact.
struct Counterexample {
  std::vector<std::pair<std::string, mpq_class>> values;  ///< symbol, value, in order of symbols
  std::string left;                                       ///< exact number or "no value: <why>"
  std::string right;
  std::string what;  ///< "the claimed equality", "the telescoping identity", ...
};

struct Proof {
  /// The claim with the evidence in use. For a question or a recurrence claim, evidence.recurrence
  /// and right_side are the parse trees of the recurrence as stated in the theorem (denominators
  /// cleared).
  std::shared_ptr<const claim::Claim> claim;
  bool question = false;  ///< the author asked for a recurrence; it was found
  std::vector<Symbol> symbols;

  Verdict verdict = Verdict::undecided;
  Subject subject = Subject::claim;
  std::string reason;                            ///< undecided, refuted: in a sentence or two
  std::string would_settle;                      ///< undecided: which rule, what would help
  std::optional<Counterexample> counterexample;  ///< refuted
  std::string residue;  ///< wrong certificate: leading monomials of the residue

  /// The recurrence proved, as claim-language text: what `find` prints. Undecided: a candidate,
  /// whose right side is not known (empty) unless the author claims one.
  std::vector<std::string> recurrence_text;
  std::string right_side_text;  ///< as the claim states it, else as the ends give it
  std::string certificate_text;
  bool evidence_brought = false;  ///< the author brought it (else found)
  long from = 0;                  ///< the claim's `from`
  long threshold = 0;             ///< n1: the telescoping argument holds for n >= n1
  unsigned order = 0;             ///< J after dropping zero coefficients at the end

  Conversion summand;
  std::optional<Conversion> right_side;  ///< b(n) of a claimed recurrence, if not 0
  std::optional<Conversion> closed;      ///< the closed form of an equality
  /// The right side that the ends give, grouped by similarity, for readers.
  std::vector<Product> boundary;

  std::optional<FiniteRange> finite_range;  ///< set when the author's range has an infinite end
  std::optional<Telescoping> telescoping;   ///< none only when the claim has no index
  std::vector<RangeStep> ranges;            ///< one per shift 0..J
  /// Recurrence claims: ends + explicit points - weight * b = 0, for n >= threshold, so that
  /// sum_i a_i S(n+i) = b.
  std::optional<Balance> ends;
  /// Equalities: ends + explicit points - weight * sum_i a_i C(n+i) = 0, so that S and C satisfy
  /// the same recurrence, whatever its right side. (Order 0: this is the whole conclusion.)
  std::optional<Balance> closed_recurrence;
  std::optional<Nonzero> leading;  ///< a_J(n) != 0 for n >= threshold (equalities)
  std::vector<InitialValue>
      initial;  ///< from..threshold+J-1 (equalities), from..threshold-1 (recurrences)

  std::vector<Condition> conditions;

  /// The range that is summed over: the author's, with finite ends. For claims with an index.
  [[nodiscard]] const claim::Range& summed_range() const {
    return finite_range ? finite_range->range : claim->sum.over.at(0);
  }
};

}  // namespace sumwright::proof
