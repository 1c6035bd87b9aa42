// The parts of the search: normal form, degree bounds, modular tools, integer lifting.
#include "search/key_equation.hpp"

#include <gtest/gtest.h>

#include "search/gosper_form.hpp"
#include "search/interpolation.hpp"
#include "search/key_image.hpp"
#include "search/reconstruction.hpp"
#include "search_support.hpp"

namespace sumwright::testing {
namespace {

using namespace search;  // NOLINT: the test is about this namespace

const algebra::RingPtr kRing = make_ring({"n", "k", "x"});

TEST(GosperForm, SeparatesIntegerSpacedFactors) {
  const auto form = gosper_form(rational(kRing, "(k+3)*(2*k+5)/(k*(2*k+1))").factored(), {});
  EXPECT_EQ(form.a.to_string(), "1");
  EXPECT_EQ(form.b.to_string(), "1");
  EXPECT_EQ(form.c.numerator(kRing), polynomial(kRing, "k*(k+1)*(k+2)*(2*k+1)*(2*k+3)"));
}

TEST(GosperForm, LeavesOtherDistancesAlone) {
  for (const char* text : {"k/(k+3)", "(2*k+1)/(2*k+2)", "(k+n)/(k+x)", "(k^2+1)/(k^2+3)",
                           "(2*k+1)/(k+1)", "(n+k)/(n-k)"}) {
    const auto form = gosper_form(rational(kRing, text).factored(), {});
    EXPECT_EQ(form.c.to_string(), "1") << text;
    EXPECT_EQ(algebra::RationalFunction(form.a.numerator(kRing), form.b.numerator(kRing)),
              rational(kRing, text));
  }
}

TEST(GosperFormProperty, IsANormalForm) {
  std::mt19937_64 random(test_seed() + 2);
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  for (unsigned long i = 0; i < cases(30); ++i) {
    algebra::Factored ratio;
    ratio.constant = mpq_class(static_cast<long>(random() % 9) - 4, 7);
    if (ratio.constant == 0) ratio.constant = 1;
    for (int f = 0; f < 6; ++f) {
      const char* families[] = {"k+", "2*k+", "k+n+", "k+x+", "k^2+k*n+"};
      auto base = polynomial(kRing, families[random() % 5] + std::to_string(random() % 6));
      ratio.multiply(algebra::factor(base.shift(1, static_cast<long>(random() % 4))),
                     random() % 2 == 0 ? 1 : -1);
    }
    const auto form = gosper_form(ratio, {});
    algebra::Factored again = form.a;
    again.multiply(form.b, -1);
    again.multiply(form.c.shift(1, 1));
    again.multiply(form.c, -1);
    EXPECT_EQ(algebra::RationalFunction(kRing, again), algebra::RationalFunction(kRing, ratio));
    const auto a = form.a.numerator(kRing);
    for (long h = 0; h < 15; ++h) {
      EXPECT_FALSE(gcd(a, form.b.numerator(kRing).shift(1, h)).depends_on(1)) << h;
    }
  }
}

TEST(KeyEquation, DelicateDegree) {
  // Apery's sum at order 2: equal degrees and leading coefficients, difference of the second
  // ones 2.
  const auto term = TermBuilder(kRing).binomial("n", "k", 2).binomial("n+k", "k", 2).build();
  const auto equation = make_key_equation(kRing, refined(term), 2, {});
  EXPECT_EQ(equation.homogeneous_degree, 2);
  EXPECT_EQ(equation.degree, 2);
  // A difference that depends on n is no degree.
  const auto other = TermBuilder(kRing).binomial("n", "k").power("-1", "k").build();
  EXPECT_EQ(make_key_equation(kRing, refined(other), 0, {}).homogeneous_degree, std::nullopt);
}

bool solvable(const KeyEquation& equation, std::mt19937_64& random) {
  const Field field(search_prime(0));
  const KeySystem system(equation, {});
  KeyImage image(system, field, field.reduce(random()));
  WordVector point;
  for (std::size_t v = 0; v < equation.ring->size(); ++v) point.push_back(field.reduce(random()));
  const auto pattern = image.explore(point, {});
  EXPECT_TRUE(pattern.has_value());
  return pattern && pattern->unit_column().has_value();
}

// Allowing a larger degree must never give a solution that the bound excludes.
TEST(KeyEquationProperty, TheDegreeBoundExcludesNothing) {
  std::mt19937_64 random(test_seed() + 3);
  SCOPED_TRACE("SUMWRIGHT_TEST_SEED=" + std::to_string(test_seed()));
  unsigned yes = 0;
  unsigned no = 0;
  for (unsigned long i = 0; i < cases(40); ++i) {
    TermBuilder t(kRing);
    t.binomial("n+" + std::to_string(random() % 2), "k", static_cast<long>(random() % 3));
    if (random() % 2 == 0) t.factorial("n+k", random() % 2 == 0 ? 1 : -1).factorial("k", -1);
    if (random() % 2 == 0) t.power(random() % 2 == 0 ? "-1" : "1/4", "k").binomial("2*k", "k");
    if (random() % 2 == 0) t.factor("k^2+" + std::to_string(random() % 3));
    if (random() % 3 == 0) t.factor("1/(k+x)");
    for (std::size_t order = 0; order <= 3; ++order) {
      auto equation = make_key_equation(kRing, refined(t.build()), order, {});
      const bool found = solvable(equation, random);
      ++(found ? yes : no);
      const long more = 1 + static_cast<long>(random() % 6);
      equation.degree += more;
      equation.equation_degree += more + 1;
      EXPECT_EQ(solvable(equation, random), found) << "order " << order;
    }
  }
  EXPECT_GT(yes, 0U);
  EXPECT_GT(no, 0U);
}

TEST(Interpolation, RecoversFractionsAndRefusesTooFewPoints) {
  const Field field(search_prime(0));
  const WordVector numerator = {5, 0, 3, field.neg(2)};  // 5 + 3 z^2 - 2 z^3
  const WordVector denominator = {7, 4, 1};
  for (std::size_t count = 1; count < 12; ++count) {
    WordVector points;
    WordVector values;
    for (Word z = 0; z < count; ++z) {
      points.push_back(1000 + 3 * z);
      values.push_back(field.mul(evaluate(field, numerator, points.back()),
                                 field.inverse(evaluate(field, denominator, points.back()))));
    }
    const auto matrix = interpolation_matrix(field, points);
    WordVector interpolant;
    for (const auto& row : matrix)
      interpolant.push_back(field.dot(row.data(), values.data(), count));
    for (std::size_t j = 0; j < count; ++j) {
      EXPECT_EQ(evaluate(field, interpolant, points[j]), values[j]);
    }
    const auto fraction = recover_fraction(field, master_polynomial(field, points), interpolant);
    EXPECT_EQ(fraction.has_value(), count >= 7) << count;  // 3 + 2 + 1 unknowns and one to confirm
    if (fraction) {
      EXPECT_EQ(fraction->numerator, numerator);
      EXPECT_EQ(fraction->denominator, denominator);
    }
  }
}

TEST(Field, LongSumsAreReducedInTime) {
  const Field field(search_prime(0));
  const WordVector large(1000, field.prime() - 1);
  EXPECT_EQ(field.dot(large.data(), large.data(), large.size()), 1000U);
  EXPECT_EQ(field.dot(large.data(), large.data(), 500, 2), 500U);
  WordVector some = {2, 3, field.prime() - 1};
  ASSERT_TRUE(field.invert_all(some));
  EXPECT_EQ(field.mul(some[1], 3), 1U);
  WordVector zero = {2, 0};
  EXPECT_FALSE(field.invert_all(zero));
  EXPECT_EQ(field.from_signed(-1), field.prime() - 1);
}

TEST(IntegerLift, NeedsAsManyPrimesAsTheNumbersAreLong) {
  // (1, -22/7, (10^40+1)/3) is 21 : -66 : 7 * (10^40 + 1).
  const mpz_class large("10000000000000000000000000000000000000001");
  IntegerLift lift(1);
  std::optional<std::vector<mpz_class>> out;
  std::size_t used = 0;
  while (!out && used < 20) {
    const Field field(search_prime(used++));
    const Word seventh = field.inverse(7);
    const Word third = field.inverse(3);
    lift.add(field.prime(), {1, field.mul(field.neg(22), seventh),
                             field.mul(mpz_fdiv_ui(large.get_mpz_t(), field.prime()), third)});
    out = lift.vector();
  }
  ASSERT_TRUE(out.has_value());
  EXPECT_EQ(used, 3U);
  EXPECT_EQ(*out, (std::vector<mpz_class>{21, -66, 7 * large}));
}

TEST(ModularReconstruction, ThreeVariablesWithACommonDenominator) {
  // The vector (1 + a b, a - 3 c, b^2 c) / (1 + a b) over the variables a, b, c.
  const Field field(search_prime(0));
  ModularReconstruction reconstruction(3, {0, 1, 2}, 3, 2, 0, 7);
  const auto image = reconstruction.image(
      field,
      [&](const WordVector& p) -> std::optional<WordVector> {
        const Word d = field.add(1, field.mul(p[0], p[1]));
        if (d == 0) return std::nullopt;
        const Word inverse = field.inverse(d);
        const Word second = field.sub(p[0], field.mul(3, p[2]));
        const Word third = field.mul(field.mul(p[1], p[1]), p[2]);
        return WordVector{1, field.mul(second, inverse), field.mul(third, inverse)};
      },
      {});
  ASSERT_TRUE(image.has_value());
  ASSERT_EQ(image->size(), reconstruction.layout().size());
  std::string text;
  for (std::size_t i = 0; i < image->size(); ++i) {
    if ((*image)[i] == 0) continue;
    const auto& c = reconstruction.layout()[i];
    const Word size = std::min((*image)[i], field.neg((*image)[i]));
    text += std::to_string(c.entry) + ":" + std::to_string(size) + "@" +
            std::to_string(c.exponents[0]) + std::to_string(c.exponents[1]) +
            std::to_string(c.exponents[2]) + " ";
  }
  EXPECT_EQ(text, "0:1@000 0:1@110 1:3@001 1:1@100 2:1@021 ");
}

}  // namespace
}  // namespace sumwright::testing
