// The table. Sums are put into the form pFq by the quotient of neighbouring terms (DLMF 16.2.1;
// common practice); a wrong line shows up at small n, where the sum itself is compared. Numbers of
// equations are from memory.
#include "external/functions.hpp"

namespace sumwright::testing {
namespace {

using Numbers = std::vector<mpq_class>;
using NumbersOf = std::function<Numbers(const mpq_class& n)>;

const std::vector<long> kLarge{50, 1000, 10000};
const std::vector<Values> kNone{{}};

mpq_class q(const char* text) { return mpq_class(text); }

std::vector<Values> values_of(const char* name, const std::vector<const char*>& texts) {
  std::vector<Values> out;
  for (const char* text : texts) out.push_back({{name, q(text)}});
  return out;
}

/// pFq whose parameters depend on n alone.
Formula pfq(const NumbersOf& a, const NumbersOf& b, const mpq_class& z) {
  return [a, b, z](const Balls& balls, const mpz_class& n, const Values&) {
    return balls.hypergeometric(a(n), b(n), z);
  };
}

Formula pfq(const NumbersOf& a, const Numbers& b, const mpq_class& z) {
  const NumbersOf same = [b](const mpq_class&) { return b; };
  return pfq(a, same, z);
}

/// factor(n) times another formula.
Formula times(const std::function<Ball(const Balls&, const mpz_class&)>& factor,
              const Formula& formula) {
  return [factor, formula](const Balls& balls, const mpz_class& n, const Values& at) {
    return balls.product(factor(balls, n), formula(balls, n, at));
  };
}

Ball legendre(const Balls& balls, const mpz_class& n, const Values& at) {
  return balls.legendre_p(n, balls.number(at.at("x")));
}

Ball legendre_at_three(const Balls& balls, const mpz_class& n, const Values&) {
  return balls.legendre_p(n, balls.number(3));
}

// ---------------------------------------------------------------- orthogonal polynomials

Ball gegenbauer_half(const Balls& balls, const mpz_class& n, const Values& at) {
  return balls.gegenbauer_c(n, q("1/2"), at.at("x"));
}

Ball jacobi_shifted(const Balls& balls, const mpz_class& n, const Values& at) {
  return balls.jacobi_p(n, 0, 0, 2 * at.at("x") - 1);
}

Ball laguerre(const Balls& balls, const mpz_class& n, const Values& at) {
  return balls.laguerre_l(n, at.at("a"), at.at("x"));
}

Ball laguerre_at_minus_one(const Balls& balls, const mpz_class& n, const Values&) {
  return balls.product(balls.gamma(n + 1), balls.laguerre_l(n, 0, -1));
}

Ball bessel(const Balls& balls, const mpz_class& n, const Values&) {
  const Ball root = balls.square_root(balls.quotient(balls.number(2), balls.pi()));
  const Ball factor = balls.product(root, balls.exponential(1));
  return balls.product(factor, balls.bessel_k(n + q("1/2"), 1));
}

void add_polynomials(std::vector<KnownFunction>& out) {
  // |x| < 1, and |x| > 1 on both sides
  const std::vector<Values> points = values_of("x", {"1/3", "-2/7", "7/5", "-5/2", "3"});
  const std::vector<Values> laguerre_points{{{"a", q("1/2")}, {"x", q("2/3")}},
                                            {{"a", q("-1/3")}, {"x", q("-5")}},
                                            {{"a", q("-7/2")}, {"x", q("9/4")}}};
  out.push_back({"LegendreByPowers", "tests/corpus/legendre/powers-of-half-x-minus-one.toml",
                 "DLMF 18.5.7 with alpha = beta = 0: P_n(x)", legendre, points, kLarge});
  out.push_back({"LegendreByQuotients", "tests/corpus/legendre/quotient-form.toml",
                 "DLMF 18.5.8 with alpha = beta = 0: P_n(x)", legendre, points, kLarge});
  out.push_back({"LegendreAsGegenbauer",
                 "tests/corpus/legendre/squares-of-one-row.toml",
                 "DLMF 18.7.9: P_n(x) = C_n^(1/2)(x)",
                 gegenbauer_half,
                 points,
                 {50, 1000}});
  out.push_back({"ShiftedLegendreAsJacobi",
                 "tests/corpus/legendre/shifted.toml",
                 "Abramowitz and Stegun 22.5.35: P_n^(0,0)(2x - 1)",
                 jacobi_shifted,
                 points,
                 {50, 1000}});
  out.push_back({"Laguerre", "tests/corpus/legendre/laguerre.toml", "DLMF 18.5.12: L_n^(a)(x)",
                 laguerre, laguerre_points, kLarge});
  out.push_back({"RookPlacements", "tests/corpus/questions/partial-permutations.toml",
                 "DLMF 18.5.12: n! L_n(-1)", laguerre_at_minus_one, kNone, kLarge});
  out.push_back({"BesselPolynomialsAtOne", "tests/corpus/questions/bessel-polynomials-at-one.toml",
                 "DLMF 10.47.9, 10.49.12: e sqrt(2/pi) K_(n+1/2)(1)", bessel, kNone, kLarge});
}

// ---------------------------------------------------------------- lattice paths

Ball delannoy_off_centre(const Balls& balls, const mpz_class& n, const Values& at) {
  return balls.hypergeometric_2f1(-n, -at.at("m"), 1, 2);
}

Ball large_schroeder(const Balls& balls, const mpz_class& n, const Values&) {
  return balls.quotient(balls.jacobi_p(n, 1, -1, 3), balls.number(n + 1));
}

// [t^n] (1 + bt + ct^2)^n = d^(n/2) P_n(b/sqrt(d)), d = b^2 - 4c; here b = 4, c = 1
Ball central_coefficients(const Balls& balls, const mpz_class& n, const Values&) {
  const Ball root = balls.square_root(balls.number(12));
  return balls.product(balls.power(root, n),
                       balls.legendre_p(n, balls.quotient(balls.number(4), root)));
}

Ball fibonacci(const Balls& balls, const mpz_class& n, const Values&) {
  return balls.fibonacci(n + 1);
}

void add_paths(std::vector<KnownFunction>& out) {
  const NumbersOf halves = [](const mpq_class& n) { return Numbers{-n / 2, (1 - n) / 2}; };
  const NumbersOf narayana = [](const mpq_class& n) { return Numbers{1 - n, -n}; };
  out.push_back({"CentralDelannoy", "tests/corpus/catalan-delannoy/central-delannoy.toml",
                 "OEIS A001850: P_n(3)", legendre_at_three, kNone, kLarge});
  out.push_back({"CentralDelannoyByPowersOfTwo",
                 "tests/corpus/catalan-delannoy/central-delannoy-powers-of-two.toml",
                 "OEIS A001850: P_n(3)", legendre_at_three, kNone, kLarge});
  out.push_back({"CentralDelannoyByDiagonals", "exemplars/robot-routes.toml",
                 "OEIS A001850: P_n(3)", legendre_at_three, kNone, kLarge});
  out.push_back({"DelannoyOffCentre", "tests/corpus/catalan-delannoy/delannoy-off-centre.toml",
                 "term quotient: 2F1(-n, -m; 1; 2)", delannoy_off_centre,
                 values_of("m", {"0", "1", "7", "40"}), kLarge});
  out.push_back({"CentralTrinomial", "tests/corpus/catalan-delannoy/central-trinomial.toml",
                 "term quotient: 2F1(-n/2, (1-n)/2; 1; 4)", pfq(halves, Numbers{1}, 4), kNone,
                 kLarge});
  out.push_back({"CentralCoefficients", "tests/corpus/questions/central-coefficients.toml",
                 "generating function of P_n, DLMF 18.12.11: 12^(n/2) P_n(2/sqrt(3))",
                 central_coefficients, kNone, kLarge});
  out.push_back({"Motzkin", "tests/corpus/catalan-delannoy/motzkin.toml",
                 "term quotient: 2F1(-n/2, (1-n)/2; 2; 4)", pfq(halves, Numbers{2}, 4), kNone,
                 kLarge});
  out.push_back({"LargeSchroeder", "tests/corpus/catalan-delannoy/large-schroeder.toml",
                 "DLMF 18.5.7: P_n^(1,-1)(3)/(n + 1)", large_schroeder, kNone, kLarge});
  out.push_back({"SmallSchroeder", "tests/corpus/catalan-delannoy/small-schroeder.toml",
                 "term quotient: 2F1(1-n, -n; 2; 2)", pfq(narayana, Numbers{2}, 2), kNone, kLarge});
  out.push_back({"Fibonacci", "tests/corpus/catalan-delannoy/fibonacci-diagonals.toml",
                 "Concrete Mathematics (6.130): F_(n+1)", fibonacci, kNone, kLarge});
}

// ---------------------------------------------------------------- powers of a row, Apery

Ball central_binomial(const Balls& balls, const mpz_class& n) { return balls.binomial(2 * n, n); }

Ball power_of_three(const Balls& balls, const mpz_class& n) {
  return balls.power(balls.number(3), n);
}

void add_powers(std::vector<KnownFunction>& out) {
  const NumbersOf cubes = [](const mpq_class& n) { return Numbers{-n, -n, -n}; };
  const NumbersOf fourth = [](const mpq_class& n) { return Numbers{-n, -n, -n, -n}; };
  const NumbersOf even_squares = [](const mpq_class& n) { return Numbers{-2 * n, -2 * n}; };
  const NumbersOf even_cubes = [](const mpq_class& n) { return Numbers{-2 * n, -2 * n, -2 * n}; };
  const NumbersOf zeta_two = [](const mpq_class& n) { return Numbers{-n, -n, n + 1}; };
  const NumbersOf zeta_three = [](const mpq_class& n) { return Numbers{-n, -n, n + 1, n + 1}; };
  const NumbersOf honeycomb = [](const mpq_class& n) { return Numbers{-n, -n, q("1/2")}; };
  const NumbersOf domb = [](const mpq_class& n) { return Numbers{-n, -n, -n, q("1/2")}; };
  const NumbersOf domb_below = [](const mpq_class& n) { return Numbers{1, 1, q("1/2") - n}; };
  const NumbersOf thirds = [](const mpq_class& n) {
    return Numbers{-n / 3, (1 - n) / 3, (2 - n) / 3, n + 1};
  };
  const std::string powers = "tests/corpus/squares-and-cubes/";
  const std::string apery = "tests/corpus/apery/";
  out.push_back({"FranelCubes", powers + "franel-cubes.toml",
                 "term quotient: 3F2(-n, -n, -n; 1, 1; -1)", pfq(cubes, Numbers{1, 1}, -1), kNone,
                 kLarge});
  out.push_back({"FranelCubesThreeLines",
                 "exemplars/equal-faults-three-lines.toml",
                 "term quotient: 3F2(-n, -n, -n; 1, 1; -1)",
                 pfq(cubes, Numbers{1, 1}, -1),
                 kNone,
                 {50, 1000}});
  out.push_back({"FranelSecondForm", apery + "franel-second-form.toml",
                 "V. Strehl, Discrete Mathematics 136 (1994): 3F2(-n, -n, -n; 1, 1; -1)",
                 pfq(cubes, Numbers{1, 1}, -1), kNone, kLarge});
  out.push_back({"FranelFourthPowers", powers + "franel-fourth-powers.toml",
                 "term quotient: 4F3(-n, -n, -n, -n; 1, 1, 1; 1)", pfq(fourth, Numbers{1, 1, 1}, 1),
                 kNone, kLarge});
  out.push_back({"AlternatingSquares",
                 powers + "alternating-squares.toml",
                 "term quotient: 2F1(-2n, -2n; 1; -1)",
                 pfq(even_squares, Numbers{1}, -1),
                 kNone,
                 {50, 1000}});
  out.push_back({"AlternatingCubes",
                 powers + "dixon-cubes.toml",
                 "term quotient: 3F2(-2n, -2n, -2n; 1, 1; 1)",
                 pfq(even_cubes, Numbers{1, 1}, 1),
                 kNone,
                 {50, 1000}});
  out.push_back({"AperyZetaTwo", apery + "zeta-two.toml", "OEIS A005258: 3F2(-n, -n, n+1; 1, 1; 1)",
                 pfq(zeta_two, Numbers{1, 1}, 1), kNone, kLarge});
  out.push_back({"AperyZetaTwoAlternating", apery + "zeta-two-alternating.toml",
                 "OEIS A005258: 3F2(-n, -n, n+1; 1, 1; 1)", pfq(zeta_two, Numbers{1, 1}, 1), kNone,
                 kLarge});
  out.push_back({"AperyZetaThree", apery + "zeta-three.toml",
                 "OEIS A005259: 4F3(-n, -n, n+1, n+1; 1, 1, 1; 1)",
                 pfq(zeta_three, Numbers{1, 1, 1}, 1), kNone, kLarge});
  out.push_back({"HoneycombPolygons", apery + "honeycomb-polygons.toml",
                 "term quotient: 3F2(-n, -n, 1/2; 1, 1; 4)", pfq(honeycomb, Numbers{1, 1}, 4),
                 kNone, kLarge});
  out.push_back({"Domb", apery + "domb-numbers.toml",
                 "term quotient: binomial(2n, n) 4F3(-n, -n, -n, 1/2; 1, 1, 1/2-n; 1)",
                 times(central_binomial, pfq(domb, domb_below, 1)), kNone, kLarge});
  out.push_back({"AlmkvistZudilin",
                 "tests/corpus/questions/almkvist-zudilin.toml",
                 "term quotient: 3^n 4F3(-n/3, (1-n)/3, (2-n)/3, n+1; 1, 1, 1; 1)",
                 times(power_of_three, pfq(thirds, Numbers{1, 1, 1}, 1)),
                 kNone,
                 {50, 1000}});
}

// ---------------------------------------------------------------- recurrences with a right side

Ball derangements(const Balls& balls, const mpz_class& n, const Values&) {
  const Ball sign = balls.number(mpz_even_p(n.get_mpz_t()) != 0 ? 1 : -1);
  return balls.product(sign, balls.hypergeometric({-n, 1}, {}, 1));
}

Ball arrangements(const Balls& balls, const mpz_class& n, const Values&) {
  return balls.product(balls.exponential(1), balls.gamma_upper(n + 1, 1));
}

// P(X <= n) for X binomial with 3n or 2n draws, times the number of all outcomes; n >= 1 there
Ball third_of_a_row(const Balls& balls, const mpz_class& n, const Values&) {
  if (n == 0) return balls.number(1);
  return balls.product(balls.power(balls.number(8), n),
                       balls.beta_regularized(2 * n, n + 1, q("1/2")));
}

Ball half_of_a_row(const Balls& balls, const mpz_class& n, const Values&) {
  if (n == 0) return balls.number(1);
  return balls.product(balls.power(balls.number(4), n), balls.beta_regularized(n, n + 1, q("1/2")));
}

void add_with_right_side(std::vector<KnownFunction>& out) {
  const std::string ends = "tests/corpus/nonnatural-ends/";
  const std::string several = "tests/corpus/several-terms/";
  const NumbersOf halves = [](const mpq_class& n) { return Numbers{-n / 2, (1 - n) / 2}; };
  out.push_back({"Derangements",
                 ends + "derangements.toml",
                 "reversed sum: (-1)^n 2F0(-n, 1; ; 1)",
                 derangements,
                 kNone,
                 {50, 1000}});
  out.push_back({"Arrangements",
                 several + "arrangements.toml",
                 "DLMF 8.4.8: e Gamma(n + 1, 1)",
                 arrangements,
                 kNone,
                 {50, 1000}});
  out.push_back({"ThirdOfARow",
                 ends + "third-of-a-row.toml",
                 "DLMF 8.17.5: 8^n I_(1/2)(2n, n + 1)",
                 third_of_a_row,
                 kNone,
                 {50, 1000}});
  out.push_back({"HalfOfARow",
                 several + "partial-row-recurrence.toml",
                 "DLMF 8.17.5: 4^n I_(1/2)(n, n + 1)",
                 half_of_a_row,
                 kNone,
                 {50, 1000}});
  out.push_back({"Involutions", "tests/corpus/questions/involutions.toml",
                 "term quotient: 2F0(-n/2, (1-n)/2; ; 2)", pfq(halves, Numbers{}, 2), kNone,
                 kLarge});
}

}  // namespace

const std::vector<KnownFunction>& known_functions() {
  static const std::vector<KnownFunction> table = [] {
    std::vector<KnownFunction> out;
    add_polynomials(out);
    add_paths(out);
    add_powers(out);
    add_with_right_side(out);
    return out;
  }();
  return table;
}

}  // namespace sumwright::testing
