// Established closed forms against Arb at parameters that are no integers.
//
// The left side is Arb's own function, or its term-by-term sum of balls; the right side is the
// author's closed form with every factorial, binomial, rising and falling read as a quotient of
// gamma functions (DLMF 5.2.5, 1.2.6). Both balls must be narrow and meet; with n or any parameter
// moved a little on the right alone, they must not. Numbers of equations are from memory.
#include <gtest/gtest.h>

#include <set>
#include <stdexcept>

#include "external/expressions.hpp"
#include "external/functions.hpp"
#include "external/printed.hpp"
#include "term/evaluation.hpp"

namespace sumwright::testing {
namespace {

constexpr long kNarrow = 100;  // bits
constexpr long kSmallValues = 6;

mpq_class q(const char* text) { return mpq_class(text); }

// ---------------------------------------------------------------- left sides

Ball gauss_chu(const Balls& b, const mpz_class& n, const Values& v) {
  return b.hypergeometric_2f1(-n, v.at("a"), v.at("c"), 1);
}

Ball chu_by_terms(const Balls& b, const mpz_class& n, const Values& v) {
  return b.partial_sum({-n, v.at("a")}, {v.at("c"), 1}, 1, n + 1);
}

Ball vandermonde(const Balls& b, const mpz_class& n, const Values& v) {
  const mpq_class& y = v.at("y");
  return b.product(b.binomial(y, n), b.partial_sum({-n, -v.at("x")}, {y - n + 1, 1}, 1, n + 1));
}

Ball rising_binomial(const Balls& b, const mpz_class& n, const Values& v) {
  const mpq_class& y = v.at("y");
  return b.product(b.rising(y, n), b.partial_sum({-n, v.at("x")}, {1 - y - n, 1}, 1, n + 1));
}

Ball falling_binomial(const Balls& b, const mpz_class& n, const Values& v) {
  const mpq_class& y = v.at("y");
  return b.product(b.falling(y, n), b.partial_sum({-n, -v.at("x")}, {y - n + 1, 1}, 1, n + 1));
}

Ball parallel(const Balls& b, const mpz_class& n, const Values& v) {
  return b.partial_sum({v.at("x") + 1}, {1}, 1, n + 1);
}

Ball rising_column(const Balls& b, const mpz_class& n, const Values& v) {
  return b.partial_sum({v.at("x")}, {1}, 1, n + 1);
}

Ball alternating_part(const Balls& b, const mpz_class& n, const Values& v) {
  return b.partial_sum({-v.at("x")}, {1}, 1, n + 1);
}

Ball distance_to_middle(const Balls& b, const mpz_class& n, const Values& v) {
  const mpq_class half = v.at("x") / 2;
  return b.product(b.number(half), b.partial_sum({-v.at("x"), 1 - half}, {1, -half}, -1, n + 1));
}

Ball half_integers(const Balls& b, const mpz_class& n, const Values&) {
  const mpq_class half = q("1/2");
  return b.product(b.quotient(b.rising(half, n), b.gamma(n + 1)),
                   b.partial_sum({-n, half}, {half - n, 1}, 1, n + 1));
}

Ball odd_numbers(const Balls& b, const mpz_class& n, const Values&) {
  return b.hypergeometric_2f1(-n, q("1/2"), q("3/2"), 1);
}

Ball touchard(const Balls& b, const mpz_class& n, const Values&) {
  const mpq_class m = n;
  return b.product(b.power(b.number(2), n), b.hypergeometric_2f1(-m / 2, (1 - m) / 2, 2, 1));
}

Ball segner(const Balls& b, const mpz_class& n, const Values&) {
  const Ball catalan = b.quotient(b.binomial(2 * n, n), b.number(n + 1));
  return b.product(catalan, b.partial_sum({q("1/2"), -n - 1}, {2, q("1/2") - n}, 1, n + 1));
}

Ball central_over_fours(const Balls& b, const mpz_class& n, const Values&) {
  return b.partial_sum({q("1/2")}, {1}, 1, n + 1);
}

Ball row_squares(const Balls& b, const mpz_class& n, const Values&) {
  return b.hypergeometric_2f1(-n, -n, 1, 1);
}

Ball two_rows(const Balls& b, const mpz_class& n, const Values&) {
  return b.product(b.binomial(2 * n, n), b.partial_sum({-n, -n}, {1, n + 1}, 1, n + 1));
}

Ball equal_lower(const Balls& b, const mpz_class& n, const Values& v) {
  return b.hypergeometric_2f1(-n, -v.at("m"), 1, 1);
}

Ball narayana(const Balls& b, const mpz_class& n, const Values&) {
  return b.hypergeometric_2f1(1 - n, -n, 2, 1);
}

Ball dixon(const Balls& b, const mpz_class& n, const Values&) {
  return b.hypergeometric({-2 * n, -2 * n, -2 * n}, {1, 1}, 1);
}

Ball kummer(const Balls& b, const mpz_class& n, const Values&) {
  return b.hypergeometric_2f1(-2 * n, -2 * n, 1, -1);
}

Ball li_shanlan(const Balls& b, const mpz_class& n, const Values& v) {
  const mpq_class& m = v.at("m");
  return b.product(b.binomial(m + 2 * n, 2 * n),
                   b.partial_sum({-n, -n, -m}, {1, 1, -m - 2 * n}, 1, n + 1));
}

const std::string kRational = "tests/corpus/rational-parameters/";
const std::string kEnds = "tests/corpus/nonnatural-ends/";

std::vector<KnownFunction> table() {
  const std::vector<long> large{17, 200, 3000};
  const std::vector<Values> none{{}};
  const std::vector<Values> ac{{{"a", q("1/3")}, {"c", q("5/7")}},
                               {{"a", q("-7/2")}, {"c", q("-3/4")}},
                               {{"a", q("22/5")}, {"c", q("1/2")}}};
  const std::vector<Values> xy{{{"x", q("1/3")}, {"y", q("5/7")}},
                               {{"x", q("-7/2")}, {"y", q("-3/4")}},
                               {{"x", q("22/5")}, {"y", q("1/2")}}};
  const std::vector<Values> x{{{"x", q("1/3")}}, {{"x", q("-7/2")}}, {{"x", q("41/6")}}};
  const std::vector<Values> m{{{"m", 3}}, {{"m", 40}}};
  return {
      {"ChuVandermonde", kRational + "chu-vandermonde.toml", "DLMF 15.4.24, 15.4.20", gauss_chu, ac,
       large},
      {"ChuVandermondeByTerms", kRational + "chu-vandermonde.toml", "DLMF 15.2.1, 15.4.24",
       chu_by_terms, ac, large},
      {"Vandermonde", kRational + "vandermonde.toml", "Concrete Mathematics (5.27), (5.93)",
       vandermonde, xy, large},
      {"RisingFactorials", kRational + "rising-factorials.toml", "Concrete Mathematics, ex. 5.37",
       rising_binomial, xy, large},
      {"FallingFactorials", kRational + "falling-factorials.toml", "Concrete Mathematics, ex. 5.37",
       falling_binomial, xy, large},
      {"RisingColumn", kRational + "column-of-rising-factorials.toml", "Concrete Mathematics (5.9)",
       rising_column, x, large},
      {"HalfIntegers", kRational + "half-integers.toml", "DLMF 15.4.24", half_integers, none,
       large},
      {"ParallelSummation", kEnds + "parallel-summation.toml", "Concrete Mathematics (5.9)",
       parallel, x, large},
      {"AlternatingPart", kEnds + "alternating-part-of-a-row.toml", "Concrete Mathematics (5.16)",
       alternating_part, x, large},
      {"DistanceToTheMiddle", kEnds + "distance-to-the-middle.toml", "Concrete Mathematics (5.18)",
       distance_to_middle, x, large},
      {"OddNumbers", "tests/corpus/weights/alternating-divided-by-odd-numbers.toml",
       "DLMF 15.4.20: Gauss", odd_numbers, none, large},
      {"Touchard", "tests/corpus/catalan-delannoy/touchard.toml", "DLMF 15.4.20: Gauss", touchard,
       none, large},
      {"Segner", "tests/corpus/catalan-delannoy/catalan-convolution.toml", "term quotient", segner,
       none, large},
      {"CentralBinomialsOverFours",
       "tests/corpus/indefinite/central-binomial-over-powers-of-four.toml",
       "binomial(2k, k)/4^k = (1/2)_k/k!, DLMF 5.5.5", central_over_fours, none, large},
      {"RowSquares", "tests/corpus/squares-and-cubes/row-squares.toml", "DLMF 15.4.20: Gauss",
       row_squares, none, large},
      {"TwoRows", "tests/corpus/vandermonde/two-rows.toml", "DLMF 15.4.24", two_rows, none, large},
      {"EqualLowerIndices", "tests/corpus/vandermonde/equal-lower-indices.toml", "DLMF 15.4.24",
       equal_lower, m, large},
      {"LiShanlan", "tests/corpus/vandermonde/li-shanlan.toml", "DLMF 16.4.3: Saalschuetz",
       li_shanlan, m, large},
      {"Narayana", "tests/corpus/catalan-delannoy/narayana.toml", "DLMF 15.4.20: Gauss", narayana,
       none, large},
      {"Dixon",
       "tests/corpus/squares-and-cubes/dixon-cubes.toml",
       "DLMF 16.4.4: Dixon",
       dixon,
       none,
       {17, 200}},
      {"Kummer",
       "tests/corpus/squares-and-cubes/alternating-squares.toml",
       "DLMF 15.4.26: Kummer",
       kummer,
       none,
       {17, 200}},
  };
}

// ---------------------------------------------------------------- the comparison

class ClosedForms : public ::testing::TestWithParam<KnownFunction> {};

std::string text(const Values& at) {
  std::string out;
  for (const auto& [name, value] : at) out += name + " = " + value.get_str() + " ";
  return out;
}

void collect_symbols(const claim::Expression& e, std::set<std::string>& out) {
  if (e.operation == claim::Operation::symbol) out.insert(e.name);
  for (const claim::ExpressionPtr& child : e.children) collect_symbols(*child, out);
}

void check_against_the_sum(const KnownFunction& function, const claim::Claim& claim, Values at) {
  for (long i = 0; i < kSmallValues; ++i) {
    const mpz_class n = claim.from + i;
    at[claim.running] = n;
    const term::Value sum = term::evaluate_sum(claim.sum, at);
    ASSERT_TRUE(sum.number) << sum.why_not;
    const Ball left = function.value(Balls(256), n, at);
    EXPECT_TRUE(left.contains(*sum.number))
        << function.source << " is not the sum at " << text(at) << left.text();
    EXPECT_EQ(exact_value(*claim.closed, at), *sum.number) << text(at);
  }
}

/// Narrow balls of the left side and of the closed form at `right`. Throws std::runtime_error when
/// there are none.
std::pair<Ball, Ball> sides(const KnownFunction& function, const claim::Claim& claim,
                            const mpz_class& n, const Values& left, const Values& right) {
  for (long bits = 256; bits <= 1L << 16U; bits *= 2) {
    const Balls balls(bits);
    std::pair<Ball, Ball> out{function.value(balls, n, left),
                              ball_value(*claim.closed, right, balls)};
    if (out.first.is_narrow(out.first, kNarrow) && out.second.is_narrow(out.second, kNarrow)) {
      return out;
    }
  }
  throw std::runtime_error("no narrow balls at " + text(left));
}

void check_large(const KnownFunction& function, const claim::Claim& claim, const mpz_class& n,
                 Values at, const std::set<std::string>& symbols, std::size_t& moved) {
  at[claim.running] = n;
  SCOPED_TRACE(text(at));
  const auto [left, right] = sides(function, claim, n, at, at);
  EXPECT_TRUE(arb_overlaps(left.get(), right.get())) << left.text() << " and " << right.text();
  for (const auto& [name, value] : at) {
    if (!symbols.contains(name)) continue;
    Values other = at;
    other[name] += value.get_den() == 1 ? mpq_class(1) : q("1/1000000");
    const auto [same, changed] = sides(function, claim, n, at, other);
    EXPECT_FALSE(arb_overlaps(same.get(), changed.get())) << "not noticed: " << text(other);
    ++moved;
  }
}

TEST_P(ClosedForms, AgreeWithArb) {
  const KnownFunction& function = GetParam();
  SCOPED_TRACE(function.file + "; " + function.source);
  const Printed printed = printed_for(function.file);
  ASSERT_NE(printed.claim->closed, nullptr);
  std::set<std::string> symbols;
  collect_symbols(*printed.claim->closed, symbols);
  std::size_t moved = 0;
  for (const Values& parameters : function.points) {
    check_against_the_sum(function, *printed.claim, parameters);
    for (const long n : function.large) {
      check_large(function, *printed.claim, n, parameters, symbols, moved);
    }
  }
  EXPECT_EQ(moved, symbols.size() * function.points.size() * function.large.size());
}

INSTANTIATE_TEST_SUITE_P(Arb, ClosedForms, ::testing::ValuesIn(table()),
                         [](const auto& about) { return about.param.name; });

}  // namespace
}  // namespace sumwright::testing
