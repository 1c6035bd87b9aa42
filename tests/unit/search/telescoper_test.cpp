// Recurrences found, against published ones.
#include <gtest/gtest.h>

#include "search_support.hpp"

namespace sumwright::testing {
namespace {

using search::find_telescoper;
using search::ShiftQuotients;

const algebra::RingPtr kRing = make_ring({"n", "k", "x", "m", "p"});

// Finds, re-checks by evaluation, and compares the recurrence with the expected one.
void expect_recurrence(const TermBuilder& term, const std::vector<std::string>& expected) {
  search::SearchOptions options;
  options.deadline = algebra::Deadline(std::chrono::seconds(60));
  const auto found = find_telescoper(kRing, term.build(), options);
  ASSERT_TRUE(found.has_value());
  std::vector<algebra::Polynomial> wanted;
  for (const auto& text : expected) wanted.push_back(polynomial(kRing, text));
  EXPECT_EQ(text_of(found->coefficients), text_of(wanted));
  std::mt19937_64 random(1);
  for (int i = 0; i < 3; ++i) {
    EXPECT_EQ(identity_defect(kRing, term.build(), found->coefficients, found->certificate,
                              random_point(kRing, random)),
              0);
  }
}

TermBuilder term() { return TermBuilder(kRing); }

TEST(FindTelescoper, PowersOfBinomials) {
  expect_recurrence(term().binomial("n", "k"), {"-2", "1"});
  expect_recurrence(term().binomial("n", "k", 2), {"-2*(2*n+1)", "n+1"});
  // J. Franel, L'Intermediaire des mathematiciens 1 (1894) and 2 (1895).
  expect_recurrence(term().binomial("n", "k", 3), {"-8*(n+1)^2", "-(7*n^2+21*n+16)", "(n+2)^2"});
  expect_recurrence(term().binomial("n", "k", 4),
                    {"-4*(n+1)*(4*n+3)*(4*n+5)", "-2*(2*n+3)*(3*n^2+9*n+7)", "(n+2)^3"});
}

TEST(FindTelescoper, AperyNumbers) {
  // A. van der Poorten, A proof that Euler missed, Math. Intelligencer 1 (1979).
  expect_recurrence(term().binomial("n", "k", 2).binomial("n+k", "k"),
                    {"-(n+1)^2", "-(11*n^2+33*n+25)", "(n+2)^2"});
  expect_recurrence(term().binomial("n", "k", 2).binomial("n+k", "k", 2),
                    {"(n+1)^3", "-(34*(n+1)^3+51*(n+1)^2+27*(n+1)+5)", "(n+2)^3"});
}

TEST(FindTelescoper, LegendrePolynomialsWithAParameter) {
  // NIST Digital Library of Mathematical Functions, 18.9.1 and table 18.9.1.
  expect_recurrence(term().binomial("n", "k").binomial("n+k", "k").power("(x-1)/2", "k"),
                    {"n+1", "-(2*n+3)*x", "n+2"});
}

TEST(FindTelescoper, CentralDelannoyNumbers) {
  // n D(n) = 3 (2n-1) D(n-1) - (n-1) D(n-2): OEIS A001850 (from memory).
  expect_recurrence(term().binomial("n", "k").binomial("n+k", "k"), {"n+1", "-3*(2*n+3)", "n+2"});
}

TEST(FindTelescoper, VandermondeWithParameters) {
  // sum_k C(m,k) C(p,n-k) = C(m+p,n): Graham, Knuth, Patashnik, Concrete Mathematics, (5.22).
  expect_recurrence(term().binomial("m", "k").binomial("p", "n-k"), {"n-m-p", "n+1"});
}

TEST(FindTelescoper, FactorialsThatShareFactorsAreCancelled) {
  // Domb numbers, order 2: OEIS A002895 (from memory):
  // n^3 a(n) = 2(2n-1)(5n^2-5n+2) a(n-1) - 64 (n-1)^3 a(n-2).
  expect_recurrence(term().binomial("n", "k", 2).binomial("2*k", "k").binomial("2*n-2*k", "n-k"),
                    {"64*(n+1)^3", "-2*(2*n+3)*(5*(n+2)^2-5*(n+2)+2)", "(n+2)^3"});
  // sum_k C(n,k)^2 C(2k,k): OEIS A002893 (from memory):
  // (n+1)^2 a(n+1) = (10n^2+10n+3) a(n) - 9 n^2 a(n-1).
  expect_recurrence(term().binomial("n", "k", 2).binomial("2*k", "k"),
                    {"9*(n+1)^2", "-(10*(n+1)^2+10*(n+1)+3)", "(n+2)^2"});
}

TEST(FindTelescoper, DirectTelescopingInTwoVariablesHasOrderZero) {
  expect_recurrence(term().factorial("n+k").factorial("k", -1), {"1"});
  expect_recurrence(term().power("2", "n"), {"1"});
  expect_recurrence(term().factor("n+k^2"), {"1"});
}

TEST(FindTelescoper, LinearFactorInTheSummand) {
  // (n - 2k) C(n,k) telescopes: the integer distance between n-2k-2 and n-2k.
  expect_recurrence(term().factor("n-2*k").binomial("n", "k"), {"1"});
  expect_recurrence(term().factor("k").binomial("n", "k"), {"-2*(n+1)", "n"});
}

TEST(FindTelescoper, VanishingLeadingCoefficientIsKept) {
  // sum_k k (k-1) (k-2) C(n,k): a_1 = n - 2 vanishes at n = 2.
  expect_recurrence(term().factor("k*(k-1)*(k-2)").binomial("n", "k"), {"-2*(n+1)", "n-2"});
}

TEST(FindTelescoper, NotEveryTermHasATelescoper) {
  // 1/(n^2+k^2) is not proper and has none at all: S. A. Abramov, When does Zeilberger's algorithm
  // succeed?, Adv. Appl. Math. 30 (2003).
  search::SearchOptions options;
  options.max_order = 4;
  EXPECT_FALSE(find_telescoper(kRing, term().factor("1/(n^2+k^2)").build(), options));
  options.max_order = 1;
  EXPECT_FALSE(find_telescoper(kRing, term().binomial("n", "k", 3).build(), options));
}

TEST(FindTelescoper, StartsAtTheLeastOrderAskedFor) {
  search::SearchOptions options;
  options.min_order = 2;
  std::vector<unsigned> begun;
  options.progress = [&](unsigned order) { begun.push_back(order); };
  const auto found = find_telescoper(kRing, term().binomial("n", "k").build(), options);
  ASSERT_TRUE(found.has_value());
  EXPECT_EQ(begun, std::vector<unsigned>{2});
  ASSERT_EQ(found->coefficients.size(), 3U);
  EXPECT_FALSE(found->coefficients.back().is_zero());
}

TEST(FindTelescoper, RefusesWhatIsNoTerm) {
  ShiftQuotients zero;
  zero.by_index.constant = 0;
  EXPECT_THROW((void)find_telescoper(kRing, zero, {}), std::invalid_argument);
  const auto small = make_ring({"n"});
  EXPECT_THROW((void)find_telescoper(small, {}, {}), std::invalid_argument);
}

TEST(FindTelescoper, IsTheSameEveryTime) {
  const auto t = term().rising("x", "k").binomial("n", "k").power("-p", "k").build();
  const auto first = find_telescoper(kRing, t, {});
  const auto second = find_telescoper(kRing, t, {});
  ASSERT_TRUE(first && second);
  EXPECT_EQ(text_of(first->coefficients), text_of(second->coefficients));
  EXPECT_EQ(first->certificate.to_string(), second->certificate.to_string());
}

TEST(FindTelescoper, PowersOfBinomialsHaveTheirKnownOrders) {
  // Orders floor((r+1)/2) (from memory; M. Stoll, European J. Combin. 18 (1997)).
  for (long r = 1; r <= 7; ++r) {
    const auto found = find_telescoper(kRing, term().binomial("n", "k", r).build(), {});
    ASSERT_TRUE(found.has_value());
    EXPECT_EQ(found->coefficients.size(), static_cast<std::size_t>((r + 1) / 2 + 1)) << r;
  }
}

}  // namespace
}  // namespace sumwright::testing
