// The lists, all from memory; a slip in one is reported under its own number by the test of lists.
#include "external/sequences.hpp"

#include <sstream>

#include "external/routes.hpp"

namespace sumwright::testing {
namespace {

using routes::Terms;
using Count = std::size_t;

Terms list(const std::string& text) {
  Terms out;
  std::istringstream in(text);
  for (std::string number; in >> number;) out.emplace_back(number);
  return out;
}

mpz_class binomial(Count n, Count k) { return routes::binomial(n, k); }
mpz_class square(const mpz_class& a) { return a * a; }

std::function<Terms(Count)> each(const std::function<mpz_class(Count n)>& value) {
  return [value](Count count) { return routes::each(count, value); };
}

std::function<Terms(Count)> sums(const std::function<mpz_class(Count n, Count k)>& term) {
  return [term](Count count) { return routes::sums(count, term); };
}

void add_paths(std::vector<Sequence>& table) {
  table.push_back({"A000108", "Catalan numbers",
                   list("1 1 2 5 14 42 132 429 1430 4862 16796 58786 208012 742900 2674440 9694845 "
                        "35357670 129644790 477638700 1767263190"),
                   "ballot paths", each(routes::catalan)});
  table.push_back({"A001006", "Motzkin numbers",
                   list("1 1 2 4 9 21 51 127 323 835 2188 5798 15511 41835 113634 310572 853467 "
                        "2356779"),
                   "paths with level steps",
                   each([](Count n) { return routes::level_paths(n, false); })});
  table.push_back({"A002426", "central trinomial coefficients",
                   list("1 1 3 7 19 51 141 393 1107 3139 8953 25653 73789 212941 616227 1787607 "
                        "5196627"),
                   "free paths with level steps",
                   each([](Count n) { return routes::level_paths(n, true); })});
  table.push_back({"A001850", "central Delannoy numbers",
                   list("1 3 13 63 321 1683 8989 48639 265729 1462563 8097453 45046719 251595969 "
                        "1409933619 7923848253 44642381823"),
                   "lattice paths", each([](Count n) { return routes::delannoy(n, n); })});
  table.push_back({"A001845", "Delannoy numbers D(n, 3)",
                   list("1 7 25 63 129 231 377 575 833 1159 1561 2047 2625"), "lattice paths",
                   each([](Count n) { return routes::delannoy(n, 3); })});
  table.push_back({"A006318", "large Schroeder numbers",
                   list("1 2 6 22 90 394 1806 8558 41586 206098 1037718 5293446 27297738 142078746 "
                        "745387038 3937603038"),
                   "lattice paths below the diagonal", each(routes::schroeder)});
  table.push_back({"A001003", "small Schroeder numbers",
                   list("1 1 3 11 45 197 903 4279 20793 103049 518859 2646723 13648869 71039373 "
                        "372693519"),
                   "half of the lattice paths below the diagonal", each([](Count n) {
                     return n == 0 ? mpz_class(1) : mpz_class(routes::schroeder(n) / 2);
                   })});
  table.push_back({"A000045", "Fibonacci numbers, from F_1",
                   list("1 1 2 3 5 8 13 21 34 55 89 144 233 377 610 987 1597 2584 4181 6765"),
                   "rows of squares and dominoes", [](Count count) {
                     Terms f{1, 1};
                     while (f.size() < count) f.push_back(f[f.size() - 1] + f[f.size() - 2]);
                     return f;
                   }});
}

void add_polynomial_values(std::vector<Sequence>& table) {
  // Place 9 was remembered wrongly at first and is corrected by the second route.
  table.push_back({"A006442", "Legendre polynomials at 5",
                   list("1 5 37 305 2641 23525 213445 1961825 18205345 170195525 1600472677 "
                        "15122515985"),
                   "coefficients of (1 + 5t + 6t^2)^n",
                   each([](Count n) { return routes::central_coefficient(n, 1, 5, 6); })});
  table.push_back({"A084768", "Legendre polynomials at 7",
                   list("1 7 73 847 10321 129367 1651609 21360031 278905249 3668760487 48543499753 "
                        "645382441711"),
                   "coefficients of (3 + 7t + 4t^2)^n",
                   each([](Count n) { return routes::central_coefficient(n, 3, 7, 4); })});
  table.push_back({"A081671", "central coefficients of (1 + 4t + t^2)^n",
                   list("1 4 18 88 454 2424 13236 73392 411462 2325976 13233628 75682512"),
                   "powers of the polynomial",
                   each([](Count n) { return routes::central_coefficient(n, 1, 4, 1); })});
  table.push_back({"A001515", "Bessel polynomials at 1",
                   list("1 2 7 37 266 2431 27007 353522 5329837 90960751 1733584106 36496226977"),
                   "literal sum of (n+k)!/((n-k)! k! 2^k)", sums([](Count n, Count k) {
                     mpz_class powers = 1;
                     for (Count i = 0; i < k; ++i) powers *= 2;
                     return mpz_class(routes::factorial(n + k) /
                                      (routes::factorial(n - k) * routes::factorial(k) * powers));
                   })});
}

void add_powers_of_rows(std::vector<Sequence>& table) {
  table.push_back({"A000984", "central binomial coefficients",
                   list("1 2 6 20 70 252 924 3432 12870 48620 184756 705432 2704156 10400600 "
                        "40116600 155117520"),
                   "Pascal's triangle", each([](Count n) { return binomial(2 * n, n); })});
  table.push_back({"A000172", "Franel numbers",
                   list("1 2 10 56 346 2252 15184 104960 739162 5280932 38165260 278415920 "
                        "2046924400 15148345760"),
                   "literal sum of cubes", sums([](Count n, Count k) {
                     return mpz_class(square(binomial(n, k)) * binomial(n, k));
                   })});
  table.push_back({"A005260", "sums of fourth powers of a row",
                   list("1 2 18 164 1810 21252 263844 3395016 44916498 607041380 8345319268 "
                        "116335834056 1640651321764 23365271704712"),
                   "literal sum of fourth powers",
                   sums([](Count n, Count k) { return square(square(binomial(n, k))); })});
  table.push_back(
      {"A005258", "Apery numbers for zeta(2)",
       list("1 3 19 147 1251 11253 104959 1004307 9793891 96918753 970336269 9807518757 "
            "99912156111 1024622952993"),
       "literal sum of binomial(n,k)^2 binomial(n+k,k)", sums([](Count n, Count k) {
         return mpz_class(square(binomial(n, k)) * binomial(n + k, k));
       })});
  table.push_back(
      {"A005259", "Apery numbers for zeta(3)",
       list("1 5 73 1445 33001 819005 21460825 584307365 16367912425 468690849005 "
            "13657436403073 403676083788125 12073365010564729"),
       "literal sum of squares of binomial(n,k) binomial(n+k,k)",
       sums([](Count n, Count k) { return square(binomial(n, k) * binomial(n + k, k)); })});
  table.push_back({"A002893", "honeycomb numbers",
                   list("1 3 15 93 639 4653 35169 272835 2157759 17319837 140668065 1153462995 "
                        "9533639025"),
                   "squares of multinomial coefficients with 3 parts",
                   each([](Count n) { return routes::multinomial_squares(n, 3); })});
  table.push_back({"A002895", "Domb numbers",
                   list("1 4 28 256 2716 31504 387136 4951552 65218204 878536624 12046924528 "
                        "167595457792 2359613230144"),
                   "squares of multinomial coefficients with 4 parts",
                   each([](Count n) { return routes::multinomial_squares(n, 4); })});
  table.push_back({"A006480", "(3n)!/n!^3",
                   list("1 6 90 1680 34650 756756 17153136 399072960 9465511770 227873431500 "
                        "5550996791340 136526995463040"),
                   "Pascal's triangle", each([](Count n) {
                     return mpz_class(binomial(3 * n, n) * binomial(2 * n, n));
                   })});
  table.push_back({"A005809", "binomial(3n, n)",
                   list("1 3 15 84 495 3003 18564 116280 735471 4686825 30045015 193536720"),
                   "Pascal's triangle", each([](Count n) { return binomial(3 * n, n); })});
  table.push_back({"A125143", "Almkvist-Zudilin numbers",
                   list("1 -3 9 -3 -279 2997 -19431 65853 292329 -7202523 69363009 -407637387"),
                   "literal sum of (-1)^(n-k) 3^(n-3k) binomial(n,3k) binomial(n+k,n) (3k)!/k!^3",
                   sums([](Count n, Count k) {
                     if (3 * k > n) return mpz_class(0);
                     mpz_class out = binomial(n, 3 * k) * binomial(n + k, n) * binomial(3 * k, k) *
                                     binomial(2 * k, k);
                     for (Count i = 3 * k; i < n; ++i) out *= 3;
                     return (n - k) % 2 == 0 ? out : mpz_class(-out);
                   })});
}

mpz_class part_of_a_row(Count row, Count last) {
  mpz_class out = 0;
  for (Count k = 0; k <= last; ++k) out += binomial(row, k);
  return out;
}

void add_permutations_and_parts(std::vector<Sequence>& table) {
  table.push_back({"A000166", "derangements",
                   list("1 0 1 2 9 44 265 1854 14833 133496 1334961 14684570 176214841 2290792932"),
                   "inclusion and exclusion", each(routes::derangements)});
  table.push_back({"A000522", "arrangements",
                   list("1 2 5 16 65 326 1957 13700 109601 986410 9864101 108505112 1302061345"),
                   "ordered choices of every size", sums([](Count n, Count k) {
                     return mpz_class(binomial(n, k) * routes::factorial(k));
                   })});
  table.push_back({"A000085", "involutions",
                   list("1 1 2 4 10 26 76 232 764 2620 9496 35696 140152 568504 2390480"),
                   "the last element fixed or paired", [](Count count) {
                     Terms out{1, 1};
                     while (out.size() < count) {
                       const Count n = out.size();
                       out.push_back(out[n - 1] + (n - 1) * out[n - 2]);
                     }
                     return out;
                   }});
  table.push_back({"A002720", "rooks on an n by n board",
                   list("1 2 7 34 209 1546 13327 130922 1441729 17572114 234662231 3405357682"),
                   "placed row by row", each([](Count n) { return routes::rooks(n, n); })});
  table.push_back({"A066380", "first third of row 3n",
                   list("1 4 22 130 794 4944 31180 198440 1271626 8192524"), "Pascal's triangle",
                   each([](Count n) { return part_of_a_row(3 * n, n); })});
  table.push_back({"A032443", "first half of row 2n",
                   list("1 3 11 42 163 638 2510 9908 39203 155382 616666 2449868 9740686 38754732"),
                   "Pascal's triangle", each([](Count n) { return part_of_a_row(2 * n, n); })});
}

}  // namespace

const std::vector<Sequence>& sequences() {
  static const std::vector<Sequence> table = [] {
    std::vector<Sequence> out;
    add_paths(out);
    add_polynomial_values(out);
    add_powers_of_rows(out);
    add_permutations_and_parts(out);
    return out;
  }();
  return table;
}

const std::vector<SequenceOf>& sequence_claims() {
  const std::string corpus = "tests/corpus/";
  static const std::vector<SequenceOf> table{
      {corpus + "catalan-delannoy/narayana.toml", "A000108", 1, {}},
      {corpus + "catalan-delannoy/touchard.toml", "A000108", 1, {}},
      {corpus + "catalan-delannoy/catalan-convolution.toml", "A000108", 1, {}},
      {corpus + "catalan-delannoy/motzkin.toml", "A001006", 0, {}},
      {corpus + "catalan-delannoy/central-trinomial.toml", "A002426", 0, {}},
      {corpus + "catalan-delannoy/central-delannoy.toml", "A001850", 0, {}},
      {corpus + "catalan-delannoy/central-delannoy-powers-of-two.toml", "A001850", 0, {}},
      {"exemplars/robot-routes.toml", "A001850", 0, {}},
      {corpus + "legendre/squares-of-one-row.toml", "A001850", 0, {{"x", 3}}},
      {corpus + "catalan-delannoy/delannoy-off-centre.toml", "A001845", 0, {{"m", 3}}},
      {corpus + "catalan-delannoy/large-schroeder.toml", "A006318", 0, {}},
      {corpus + "catalan-delannoy/small-schroeder.toml", "A001003", 1, {}},
      {corpus + "catalan-delannoy/fibonacci-diagonals.toml", "A000045", 0, {}},
      {corpus + "legendre/powers-of-half-x-minus-one.toml", "A006442", 0, {{"x", 5}}},
      {corpus + "legendre/quotient-form.toml", "A006442", 0, {{"x", 5}}},
      {corpus + "legendre/shifted.toml", "A084768", 0, {{"x", 4}}},
      {corpus + "questions/central-coefficients.toml", "A081671", 0, {}},
      {corpus + "questions/bessel-polynomials-at-one.toml", "A001515", 0, {}},
      {corpus + "squares-and-cubes/row-squares.toml", "A000984", 0, {}},
      {corpus + "vandermonde/quotients-of-factorials.toml", "A000984", 0, {}},
      {corpus + "vandermonde/two-rows.toml", "A005809", 0, {}},
      {corpus + "vandermonde/shifted-rows.toml", "A005809", 0, {}},
      {corpus + "squares-and-cubes/franel-cubes.toml", "A000172", 0, {}},
      {corpus + "apery/franel-second-form.toml", "A000172", 0, {}},
      {corpus + "squares-and-cubes/franel-fourth-powers.toml", "A005260", 0, {}},
      {corpus + "apery/zeta-two.toml", "A005258", 0, {}},
      {corpus + "apery/zeta-two-alternating.toml", "A005258", 0, {}},
      {corpus + "apery/zeta-three.toml", "A005259", 0, {}},
      {corpus + "apery/honeycomb-polygons.toml", "A002893", 0, {}},
      {corpus + "apery/domb-numbers.toml", "A002895", 0, {}},
      {corpus + "squares-and-cubes/dixon-cubes.toml", "A006480", 0, {}, true},
      {corpus + "questions/almkvist-zudilin.toml", "A125143", 0, {}, true},
      {corpus + "nonnatural-ends/derangements.toml", "A000166", 0, {}},
      {corpus + "several-terms/arrangements.toml", "A000522", 0, {}},
      {corpus + "questions/involutions.toml", "A000085", 0, {}},
      {corpus + "questions/partial-permutations.toml", "A002720", 0, {}},
      {corpus + "nonnatural-ends/third-of-a-row.toml", "A066380", 0, {}},
      {corpus + "several-terms/partial-row-recurrence.toml", "A032443", 0, {}},
      {corpus + "several-terms/half-of-an-even-row.toml", "A032443", 0, {}},
  };
  return table;
}

}  // namespace sumwright::testing
