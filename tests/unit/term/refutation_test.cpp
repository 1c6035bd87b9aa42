// Points at which false claims and wrong certificates fail, and none for true ones.
#include <gtest/gtest.h>

#include <chrono>
#include <string>

#include "claim/reader.hpp"
#include "term/evaluation.hpp"

namespace sumwright::term {
namespace {

constexpr long kSpan = 12;
constexpr std::size_t kSamples = 10;

struct Written {
  std::string summand = {};
  std::string closed = {};
  std::string recurrence = {};  // coefficients, separated by semicolons
  std::string right_side = {};
  std::string other = {};  // the lines of `equals` when it is another sum
  std::string parameters = {};
  std::string assume = {};
  std::string low = "0";
  std::string high = "n";
  std::string from = "0";
};

std::string replaced(std::string text, const std::string& what, const std::string& by) {
  for (std::size_t at = text.find(what); at != std::string::npos; at = text.find(what, at)) {
    text.replace(at, what.size(), by);
    at += by.size();
  }
  return text;
}

claim::Claim read(const Written& written) {
  std::string text = "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = " + written.from + "\n";
  if (!written.assume.empty()) text += "assume = [\"" + written.assume + "\"]\n";
  text += "[sum]\nsummand = \"" + written.summand + "\"\nover = [ { index = \"k\", low = \"" +
          written.low + "\", high = \"" + written.high + "\" } ]\n";
  if (!written.closed.empty()) text += "[equals]\nclosed = \"" + written.closed + "\"\n";
  if (!written.other.empty()) text += "[equals]\n" + written.other + "\n";
  if (!written.recurrence.empty()) {
    text += "[evidence]\nrecurrence = [\"" + replaced(written.recurrence, "; ", "\", \"") + "\"]\n";
    if (!written.right_side.empty()) text += "right_side = \"" + written.right_side + "\"\n";
  }
  if (!written.parameters.empty()) text += "[parameters]\n" + written.parameters + "\n";
  return claim::read_claim_text("test", text).claim;
}

std::string shown(const Value& value) {
  return value.number ? value.number->get_str() : "none (" + value.why_not + ")";
}

std::string shown(const std::optional<Difference>& difference) {
  if (!difference) return "holds";
  std::string text;
  for (const auto& [name, number] : difference->at) {
    text += name + " = " + number.get_str() + ", ";
  }
  text.erase(text.size() - 2);
  return text + ": " + shown(difference->left) + " against " + shown(difference->right);
}

std::string verdict(const Written& written, const std::vector<mpz_class>& also = {}) {
  return shown(refute(read(written), kSpan, kSamples, also, {}));
}

const char kRationalX[] = "x = { in = \"rationals\" }";
const char kIntegerM[] = "m = { in = \"integers\", at_least = 0 }";

TEST(Refute, TrueClosedForms) {
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n"}), "holds");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)^2", .closed = "binomial(2*n, n)"}), "holds");
  EXPECT_EQ(verdict({.summand = "k*factorial(k)", .closed = "factorial(n + 1) - 1"}), "holds");
  EXPECT_EQ(verdict({.summand = "1/(k*(k + 1))", .closed = "n/(n + 1)", .low = "1"}), "holds");
  EXPECT_EQ(verdict({.summand = "(-1)^k*binomial(n, k)/(x + k)",
                     .closed = "factorial(n)/rising(x, n + 1)",
                     .parameters = "x = { in = \"rationals\", not = [\"nonpositive integers\"] }"}),
            "holds");
}

TEST(Refute, TrueClosedFormsWithParametersOfEitherKind) {
  // Vandermonde's, with upper arguments in both rings.
  EXPECT_EQ(verdict({.summand = "binomial(x, k)*binomial(m, n - k)",
                     .closed = "binomial(x + m, n)",
                     .parameters = "x = { in = \"rationals\" }\nm = { in = \"integers\" }"}),
            "holds");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)*x^k*y^(n - k)",
                     .closed = "(x + y)^n",
                     .parameters = "x = { in = \"rationals\" }\ny = { in = \"rationals\" }"}),
            "holds");
}

TEST(Refute, AnotherSum) {
  const std::string half =
      "over = [ { index = \"j\", low = \"0\", high = \"floor(n/2)\" } ]\nsummand = ";
  EXPECT_EQ(verdict({.summand = "(-1)^k*binomial(n - k, k)",
                     .other = half + "\"(-1)^j*binomial(n - j, j)\""}),
            "holds");
  EXPECT_EQ(verdict({.summand = "(-1)^k*binomial(n - k, k)",
                     .other = half + "\"(-1)^j*binomial(n - j, j)\"",
                     .high = "n + 1"}),
            "n = 0: 2 against 1");
  EXPECT_EQ(
      verdict(
          {.summand = "binomial(n, k)", .other = half + "\"2^n/(j - 2)*(j - 2)\"", .high = "0"}),
      "n = 1: 1 against 2");
  EXPECT_EQ(verdict({.summand = "1", .other = half + "\"(j - 2)/(j - 2)\"", .high = "floor(n/2)"}),
            "n = 4, j = 2: 3 against none (division by 0)");
}

TEST(Refute, FalseClosedForms) {
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n - 1"}), "n = 0: 1 against 0");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n", .high = "n - 1"}),
            "n = 0: 0 against 1");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)^2", .closed = "binomial(2*n, n + 1) + 1"}),
            "n = 2: 6 against 5");
  EXPECT_EQ(verdict({.summand = "k^2", .closed = "n*(n + 1)*(2*n + 1)/6 + n*(n - 1)*(n - 2)"}),
            "n = 3: 14 against 20");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n", .from = "-2"}),
            "n = -2: 0 against 1/4");
}

// Right but for one n: the hump binomial(n, 7)*binomial(7, n) is 1 at 7 and 0 elsewhere.
TEST(Refute, NearMissAtOneN) {
  const Written seven{.summand = "binomial(n, k)",
                      .closed = "2^n + binomial(n, 3 + 4)*binomial(7, n)"};
  EXPECT_EQ(verdict(seven), "n = 7: 128 against 129");
  EXPECT_EQ(shown(refute(read(seven), 7, kSamples, {}, {})), "holds");
  EXPECT_EQ(shown(refute(read(seven), 8, kSamples, {}, {})), "n = 7: 128 against 129");
  const Written fifty{.summand = "1", .closed = "n + 1 + binomial(n, 20 + 30)*binomial(50, n)"};
  EXPECT_EQ(verdict(fifty), "holds");
  EXPECT_EQ(verdict(fifty, {49, 51}), "holds");
  EXPECT_EQ(verdict(fifty, {51, -3, 50}), "n = 50: 51 against 52");
}

// Values of n that stand out in the claim are tried beyond the span.
TEST(Refute, SpecialValuesOfTheRunningVariable) {
  EXPECT_EQ(verdict({.summand = "(-1)^k*binomial(n, k)*binomial(k, 30)", .closed = "0"}),
            "n = 30: 1 against 0");
  EXPECT_EQ(verdict({.summand = "1", .closed = "(n + 1)*(2*n - 90)/(2*n - 90)"}),
            "n = 45: 46 against none (division by 0)");
  EXPECT_EQ(verdict({.summand = "k", .closed = "n*(n + 1)/2 + binomial(n, 80)"}),
            "n = 80: 3240 against 3241");
}

TEST(Refute, SpecialValuesOfParameters) {
  EXPECT_EQ(verdict({.summand = "rising(-n, k)*rising(a, k)/(rising(c, k)*factorial(k))",
                     .closed = "rising(c - a, n)/rising(c, n)",
                     .parameters = "a = { in = \"rationals\" }\nc = { in = \"rationals\", not = "
                                   "[\"0\", \"-1\"] }"}),
            "n = 3, k = 3, a = 0, c = -2: none (division by 0) against none (division by 0)");
  EXPECT_EQ(
      verdict({.summand = "1", .closed = "n + 1 + n*binomial(m, 90)", .parameters = kIntegerM}),
      "n = 1, m = 90: 2 against 3");
}

TEST(Refute, NearMissAtOneParameterValue) {
  EXPECT_EQ(verdict({.summand = "1",
                     .closed = "n + 1 + n*binomial(m, 3)*binomial(3, m)",
                     .parameters = kIntegerM}),
            "n = 1, m = 3: 2 against 3");
  EXPECT_EQ(verdict({.summand = "1",
                     .closed = "n + 1 + n*binomial(m, 3)*binomial(3, m)",
                     .parameters = kIntegerM,
                     .assume = "m != 3"}),
            "holds");
  // The geometric sum, forgotten at x = 1.
  const Written geometric{
      .summand = "x^k", .closed = "(x^(n + 1) - 1)/(x - 1)", .parameters = kRationalX};
  EXPECT_EQ(verdict(geometric), "n = 0, x = 1: 1 against none (division by 0)");
  Written excluded = geometric;
  excluded.parameters = "x = { in = \"rationals\", not = [\"1\"] }";
  EXPECT_EQ(verdict(excluded), "holds");
  // A value that no list of small numbers holds.
  EXPECT_EQ(
      verdict(
          {.summand = "1", .closed = "(n + 1)*(7*x - 113)/(7*x - 113)", .parameters = kRationalX}),
      "n = 0, x = 113/7: 1 against none (division by 0)");
}

TEST(Refute, NearMissWhereParametersCoincide) {
  EXPECT_EQ(verdict({.summand = "x^k*y^(n - k)",
                     .closed = "(x^(n + 1) - y^(n + 1))/(x - y)",
                     .parameters = "x = { in = \"rationals\" }\ny = { in = \"rationals\" }"}),
            "n = 0, x = 0, y = 0: 1 against none (division by 0)");
  EXPECT_EQ(verdict({.summand = "x^k*y^(n - k)",
                     .closed = "(x^(n + 1) - y^(n + 1))/(x - y)",
                     .parameters = "x = { in = \"rationals\" }\ny = { in = \"rationals\" }",
                     .assume = "x != y"}),
            "holds");
}

TEST(Refute, ClosedFormsWithoutAValue) {
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n*(n - 5)/(n - 5)"}),
            "n = 5: 32 against none (division by 0)");
  EXPECT_EQ(verdict({.summand = "factorial(n)", .closed = "n*factorial(n - 1)", .high = "0"}),
            "n = 0: 1 against 0");
  EXPECT_EQ(
      verdict(
          {.summand = "factorial(n)", .closed = "n*factorial(n - 1)", .high = "0", .from = "1"}),
      "holds");
  EXPECT_EQ(verdict({.summand = "1", .closed = "factorial(n - 1)/factorial(n - 1)", .high = "0"}),
            "n = 0: 1 against 0");
  EXPECT_EQ(verdict({.summand = "0", .closed = "factorial(n - 1) - factorial(n - 1)"}),
            "n = 0: 0 against none (factorial of -1)");
}

TEST(Refute, SummandsWithoutAValue) {
  EXPECT_EQ(verdict({.summand = "(k - 3)/(k - 3)", .closed = "n + 1"}),
            "n = 3, k = 3: none (division by 0) against 4");
  EXPECT_EQ(verdict({.summand = "factorial(2 - k)/factorial(2 - k)",
                     .closed = "min_value",
                     .parameters = "min_value = { in = \"integers\", at_least = 1 }"}),
            "n = 0, min_value = 2: 1 against 2");
  EXPECT_EQ(
      verdict({.summand = "factorial(2 - k)", .closed = "2 + binomial(n, 1) - binomial(n, 2)"}),
      "n = 2: 4 against 3");
  EXPECT_EQ(
      verdict({.summand = "rising(x, 2 - k)*0^k", .closed = "x*(x + 1)", .parameters = kRationalX}),
      "holds");
  EXPECT_EQ(verdict({.summand = "rising(x, 2 - k)*(1 - 1)^k + rising(x, 1 - k)*0",
                     .closed = "x*(x + 1)",
                     .parameters = kRationalX}),
            "holds");
  // A question claims that its sum has values.
  EXPECT_EQ(verdict({.summand = "binomial(n, k)/(k - 4)"}),
            "n = 4, k = 4: none (division by 0) against none (division by 0)");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)/(k + 4)"}), "holds");
}

TEST(Refute, AssumptionsOnTheRunningVariable) {
  Written row{.summand = "binomial(m, k)", .closed = "2^m", .parameters = kIntegerM};
  EXPECT_EQ(verdict(row), "n = 0, m = 1: 1 against 2");
  row.assume = "m <= n";
  EXPECT_EQ(verdict(row), "holds");
  row.assume = "m <= n + 1";
  EXPECT_EQ(verdict(row), "n = 0, m = 1: 1 against 2");
}

TEST(Refute, Recurrences) {
  const std::string squares = "binomial(n, k)^2";
  EXPECT_EQ(verdict({.summand = squares, .recurrence = "-2*(2*n + 1); n + 1"}), "holds");
  EXPECT_EQ(verdict({.summand = squares, .recurrence = "2*(2*n + 1); n + 1"}),
            "n = 0: 4 against 0");
  EXPECT_EQ(verdict({.summand = squares, .recurrence = "-2*(2*n + 1); n + 1; 0"}), "holds");
  EXPECT_EQ(verdict({.summand = squares, .recurrence = "0; -2*(2*n + 3); n + 2"}), "holds");
  // The Franel numbers, from memory.
  EXPECT_EQ(verdict({.summand = "binomial(n, k)^3",
                     .recurrence = "-8*(n + 1)^2; -(7*n^2 + 21*n + 16); (n + 2)^2"}),
            "holds");
  EXPECT_EQ(verdict({.summand = "binomial(n, k)^3",
                     .recurrence = "-8*(n + 1)^2; -(7*n^2 + 21*n + 15); (n + 2)^2"}),
            "n = 0: 2 against 0");
  // Right but for one n.
  EXPECT_EQ(verdict({.summand = squares,
                     .recurrence = "-2*(2*n + 1); n + 1",
                     .right_side = "binomial(n, 7)*binomial(7, n)"}),
            "n = 7: 0 against 1");
}

TEST(Refute, RecurrencesWithARightSide) {
  EXPECT_EQ(verdict({.summand = "k*factorial(k)",
                     .recurrence = "-1; 1",
                     .right_side = "(n + 1)*factorial(n + 1)"}),
            "holds");
  EXPECT_EQ(
      verdict(
          {.summand = "k*factorial(k)", .recurrence = "-1; 1", .right_side = "n*factorial(n + 1)"}),
      "n = 0: 1 against 0");
  EXPECT_EQ(
      verdict({.summand = "binomial(n, k)", .recurrence = "-2; 1", .right_side = "0/(n - 2)"}),
      "n = 2: 0 against none (division by 0)");
}

TEST(Refute, DenominatorsOfARecurrenceAreCleared) {
  const std::string row = "binomial(n, k)";
  EXPECT_EQ(
      verdict(
          {.summand = "binomial(n, k)^2", .recurrence = "-2*(2*n + 1)/(n + 1); 1", .from = "-1"}),
      "holds");
  EXPECT_EQ(verdict({.summand = row, .recurrence = "-2/(n - 3); 1/(n - 3)"}), "holds");
  EXPECT_EQ(verdict({.summand = row, .recurrence = "-2*(n - 3)^-2; 1/((n - 3)*(n - 3))"}), "holds");
  // Cleared, -2 S(n) + S(n+1) is claimed to be 1 at n = 3.
  const std::string hump = "binomial(n, 3)*binomial(3, n)";
  EXPECT_EQ(
      verdict(
          {.summand = row, .recurrence = "-2/(n - 3); 1/(n - 3)", .right_side = hump + "/(n - 3)"}),
      "n = 3: 0 against 1");
  EXPECT_EQ(verdict({.summand = row,
                     .recurrence = "-2/(1 + 1/(n - 4)); 1/(1 + 1/(n - 4))",
                     .right_side = hump + "/(1 + 1/(n - 4))"}),
            "n = 3: 0 against -1");
  EXPECT_EQ(verdict({.summand = row, .recurrence = "-2/x; 1/x", .parameters = kRationalX}),
            "holds");
  EXPECT_EQ(verdict({.summand = row, .recurrence = "-1/x; 1/x", .parameters = kRationalX}),
            "n = 0, x = 0: 1 against 0");
  EXPECT_EQ(
      verdict({.summand = row, .recurrence = "-1/2; 1/4", .right_side = "1/(8*factorial(n - 3))"}),
      "n = 3: 0 against 1/8");
}

TEST(EvaluateSides, GivesBothSides) {
  const claim::Claim equality = read({.summand = "x^k", .closed = "1/x", .parameters = kRationalX});
  const Sides sides = evaluate_sides(equality, {{"n", 2}, {"x", mpq_class(1, 2)}});
  EXPECT_EQ(shown(sides.left), "7/4");
  EXPECT_EQ(shown(sides.right), "2");
  EXPECT_EQ(shown(evaluate_sides(equality, {{"n", 2}, {"x", 0}}).right), "none (division by 0)");
  EXPECT_THROW((void)evaluate_sides(equality, {{"n", 2}}), std::invalid_argument);
  const claim::Claim poles = read({.summand = "1/(k - 2)", .recurrence = "-1; 1"});
  EXPECT_EQ(shown(evaluate_sides(poles, {{"n", 1}}).left), "none (division by 0 at k = 2)");
  const claim::Claim question = read({.summand = "k"});
  EXPECT_EQ(shown(evaluate_sides(question, {{"n", 4}}).right), "10");
}

TEST(Refute, WhatIsTooLargeIsPassedOver) {
  EXPECT_EQ(verdict({.summand = "binomial(n, k)", .closed = "2^n", .from = "300"}), "holds");
  EXPECT_EQ(verdict({.summand = "1", .closed = "n", .from = "19998"}),
            "n = 19998: 19999 against 19998");
  EXPECT_EQ(verdict({.summand = "1", .closed = "n", .from = "20001"}), "holds");
  EXPECT_EQ(verdict({.summand = "1", .closed = "n + 1"}, {mpz_class("1000000000000000000000")}),
            "holds");
}

TEST(Refute, StopsAtTheDeadline) {
  const claim::Claim claim = read({.summand = "binomial(n, k)", .closed = "2^n"});
  EXPECT_THROW((void)refute(claim, kSpan, 1, {}, algebra::Deadline(std::chrono::milliseconds(-1))),
               algebra::TimeUp);
}

TEST(Refute, IsQuick) {
  const claim::Claim claim = read({.summand = "binomial(x, k)*binomial(m, n - k)",
                                   .closed = "binomial(x + m, n)",
                                   .parameters = std::string(kRationalX) + "\n" + kIntegerM});
  const auto start = std::chrono::steady_clock::now();
  EXPECT_EQ(shown(refute(claim, 20, 12, {50}, {})), "holds");
  EXPECT_LT(std::chrono::steady_clock::now() - start, std::chrono::seconds(2));
}

// The point found for a certificate R of the summand and recurrence written.
std::string certificate_point(const Written& written, const std::string& certificate) {
  Written whole = written;
  const claim::Claim claim = read(whole);
  std::vector<std::string> symbols = {"n", "k"};
  for (const claim::Parameter& parameter : claim.parameters) symbols.push_back(parameter.name);
  const claim::Source source{"certificate", certificate};
  const auto rational = claim::parse_expression(source, {0, certificate.size()}, symbols);
  return shown(refute_certificate(claim, claim.evidence.recurrence, *rational, {}));
}

const Written kSquares{.summand = "binomial(n, k)^2", .recurrence = "-2*(2*n + 1); n + 1"};
const char kSquaresCertificate[] = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2";

TEST(RefuteCertificate, TrueCertificatesHaveNoPoint) {
  EXPECT_EQ(certificate_point(kSquares, kSquaresCertificate), "holds");
  EXPECT_EQ(
      certificate_point({.summand = "binomial(n, k)", .recurrence = "-2; 1"}, "-k/(n + 1 - k)"),
      "holds");
  EXPECT_EQ(certificate_point({.summand = "k*factorial(k)", .recurrence = "1"}, "1/k"), "holds");
  EXPECT_EQ(
      certificate_point({.summand = "x^k", .recurrence = "x - 1", .parameters = kRationalX}, "1"),
      "holds");
  // The zeta(3) numbers, from memory.
  EXPECT_EQ(certificate_point(
                {.summand = "binomial(n, k)^2*binomial(n + k, k)^2",
                 .recurrence = "(n + 1)^3; -(34*n^3 + 153*n^2 + 231*n + 117); (n + 2)^3"},
                "4*k^4*(2*n + 3)*(2*k^2 - 3*k - 4*(n + 1)*(n + 2))/((n + 1 - k)^2*(n + 2 - k)^2)"),
            "holds");
}

// Where binomial(n, k) goes through n = -1 to n = 0, the identity of numbers fails although the
// one of rational functions is right: no such point may be shown.
TEST(RefuteCertificate, SingularPointsAreNotShown) {
  EXPECT_EQ(certificate_point({.summand = "binomial(n, k)", .recurrence = "-2; 1", .from = "-6"},
                              "-k/(n + 1 - k)"),
            "holds");
  Written squares = kSquares;
  squares.from = "-6";
  EXPECT_EQ(certificate_point(squares, kSquaresCertificate), "holds");
  EXPECT_EQ(certificate_point({.summand = "binomial(n + m, k)",
                               .recurrence = "-2; 1",
                               .parameters = kIntegerM,
                               .from = "-9"},
                              "-k/(n + m + 1 - k)"),
            "holds");
}

// binomial(k, -k) is -1 at -1 and 1 at 0; its shift quotient -k/(2*(2*k + 1)) says -1/2.
TEST(RefuteCertificate, SingularPointsWithValuesAreNotShown) {
  const Written sum{.summand = "binomial(k, -k)*(5*k + 2)/(2*k + 1)", .recurrence = "1"};
  EXPECT_EQ(certificate_point(sum, "-2*(2*k + 1)/(5*k + 2)"), "holds");
  EXPECT_NE(certificate_point(sum, "2*(2*k + 1)/(5*k + 2)"), "holds");
}

TEST(RefuteCertificate, WrongCertificates) {
  EXPECT_EQ(certificate_point(kSquares, "k^2*(2*k - 3*n - 2)/(n + 1 - k)^2"),
            "n = 1, k = 0: -4 against -3");
  EXPECT_EQ(certificate_point(kSquares, "-k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"),
            "n = 1, k = 0: -4 against 4");
  EXPECT_NE(certificate_point(kSquares, "k^2*(2*k - 3*n - 3)/(n + 2 - k)^2"), "holds");
  EXPECT_NE(certificate_point(kSquares, "0"), "holds");
  EXPECT_NE(certificate_point(
                kSquares, std::string(kSquaresCertificate) + " + (n - 1)*(n - 2)*(n - 3)*(k - 1)"),
            "holds");
  EXPECT_NE(certificate_point({.summand = "k*factorial(k)", .recurrence = "1"}, "1/(k + 1)"),
            "holds");
  EXPECT_NE(
      certificate_point({.summand = "x^k", .recurrence = "x - 1", .parameters = kRationalX}, "x"),
      "holds");
}

TEST(RefuteCertificate, WrongRecurrences) {
  Written wrong = kSquares;
  wrong.recurrence = "-2*(2*n + 1); n + 2";
  EXPECT_EQ(certificate_point(wrong, kSquaresCertificate), "n = 1, k = 0: -3 against -4");
}

TEST(RefuteCertificate, StopsAtTheDeadline) {
  const claim::Claim claim = read(kSquares);
  EXPECT_THROW((void)refute_certificate(claim, claim.evidence.recurrence, *claim.sum.summand,
                                        algebra::Deadline(std::chrono::milliseconds(-1))),
               algebra::TimeUp);
}

}  // namespace
}  // namespace sumwright::term
