// What the pages say beside the formulas: every letter is defined, once, and what is left out is
// named with the place where it stands.
#include <gtest/gtest.h>

#include <algorithm>

#include "claim/reader.hpp"
#include "proof_fixture.hpp"
#include "writers/claim_text.hpp"
#include "writers/latex_names.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

std::string pages(const proof::Proof& proof) {
  const auto files = latex_files(proof);
  EXPECT_EQ(files.size(), 2U);
  return files.at(0).text;
}

std::size_t count(const std::string& text, const std::string& part) {
  std::size_t out = 0;
  for (std::size_t at = text.find(part); at != std::string::npos; at = text.find(part, at + 1)) {
    ++out;
  }
  return out;
}

void expect_parts(const std::string& text, const std::vector<std::string>& parts) {
  for (const std::string& part : parts) EXPECT_NE(text.find(part), std::string::npos) << part;
}

proof::Proof with_claim(proof::Proof proof, const std::string& text) {
  proof.claim =
      std::make_shared<const claim::Claim>(claim::read_claim_text("claim.toml", text).claim);
  return proof;
}

TEST(LatexPages, TheFactorOfTheIdentityIsThereFromTheStart) {
  proof::Proof proof = fixture::squares();
  proof.telescoping->weight.polynomial.factors = {
      {fixture::polynomial({{1, {1, 0}}, {2, {0, 0}}}), 1}};
  const std::string text = pages(proof);
  expect_parts(text, {"d(n) &= n+2.", "The factor $d(n)$, which serves to clear denominators,",
                      "With $G(n,k)=d(n)\\,R(n,k)\\,F(n,k)$",
                      "d(n)\\bigl(a_{0}(n)\\,F(n,k)+a_{1}(n)\\,F(n+1,k)\\bigr) = G(n,k+1)-G(n,k)"});
  EXPECT_EQ(count(text, "d(n) &="), 1U);
  EXPECT_EQ(text.find("are multiplied by"), std::string::npos);
}

TEST(LatexPages, PartsOfTheClosedFormAreDefined) {
  proof::Proof proof = fixture::squares();
  EXPECT_EQ(pages(proof).find("C_{1}"), std::string::npos);
  proof.closed->products.push_back(proof.closed->products[0]);
  proof.closed->products[1].coefficient.constant = -3;
  proof.closed_recurrence->terms[3].piece = 1;
  expect_parts(pages(proof), {"C(n) = C_{1}(n)+C_{2}(n),", "C_{1}(n) &= \\frac{(2n)!}{n!^{2}},",
                              "C_{2}(n) &= -3\\,\\frac{(2n)!}{n!^{2}}.", "-a_{1}\\,C_{2}(n+1) &="});
}

TEST(LatexPages, BaseTermsOfClassesHaveDifferentNames) {
  proof::Proof proof = fixture::halves();
  proof::InitialValue value;
  value.at = 7;
  value.balance = *proof.closed_recurrence;
  proof.initial.push_back(value);
  const std::string text = pages(proof);
  for (const char* name : {"\nE_{1} = ", "\nE_{2} = ", "\nE_{3} = "}) {
    EXPECT_LE(count(text, name), 1U) << name;
  }
  EXPECT_EQ(count(text, "\nE_{1} = "), 1U);
}

TEST(LatexPages, LongPolynomialsAreAbbreviatedAndTheirPlaceIsNamed) {
  proof::Proof proof = fixture::squares();
  proof::Polynomial longest;
  for (unsigned long i = 400; i > 0; --i) longest.terms.push_back({7, {i, i}});
  proof.telescoping->certificate = longest;
  proof::BalanceGroup& group = proof.closed_recurrence->groups[0];
  for (proof::Factored& share : group.polynomials) share.factors.push_back({longest, 1});
  const std::string text = pages(proof);
  expect_parts(text, {"c(n,k) ={}& 7n^{400}k^{400}", "+\\cdots", "+7nk.",
                      "and the polynomials before $E_{1}$ add up to $0$; these are in full in "
                      "\\texttt{obligations.txt} under \\texttt{class 1 share}."});
  EXPECT_EQ(count(text, "dots stand for terms"), 1U);
  EXPECT_LT(text.find("c(n,k) ={}&"), text.find("dots stand for terms"));
  EXPECT_LT(text.find("dots stand for terms"), text.find("One polynomial equality"));
}

TEST(LatexPages, InfiniteRangesAreFirstMadeFinite) {
  proof::Proof proof = with_claim(
      fixture::squares(),
      "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = "
      "\"binomial(n, k)^2\"\nover = [ { index = \"k\", low = \"0\", high = \"inf\" } ]\n[equals]\n"
      "closed = \"binomial(2*n, n)\"\n");
  proof::FiniteRange finite;
  finite.range = fixture::squares().claim->sum.over[0];
  finite.above = proof.ranges[0].above;
  proof.finite_range = finite;
  const std::string text = pages(proof);
  expect_parts(text, {"\\sum_{k=0}^{\\infty}",
                      "For $k>n$ we have $F(n,k)=0$, because ${1/(n-k)!}=0$ there (c4).",
                      "and is the sum over $0\\le k\\le n$.", "Those ends and these differ"});
  EXPECT_EQ(text.find("For $k<"), std::string::npos);
}

TEST(LatexPages, ATermMayVanishByAFactorOrBesideIt) {
  proof::Proof proof = fixture::squares();
  proof::BalanceTerm& term = proof.closed_recurrence->terms[0];
  term.zero_factor = fixture::affine({1, 0}, -2);
  expect_parts(pages(proof), {"because it has the factor $n-2$, and ${1/(-1)!}=0$ unless $n-2=0$ "
                              "(c5)."});
}

TEST(LatexPages, WithoutAnIndexNothingIsSummed) {
  proof::Proof proof =
      with_claim(fixture::squares(),
                 "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = "
                 "\"binomial(2*n, n)\"\n[equals]\nclosed = \"factorial(2*n)/factorial(n)^2\"\n");
  proof.telescoping.reset();
  proof.ranges.clear();
  proof.recurrence_text = {"1"};
  proof.order = 0;
  proof.summand.products = proof.closed->products;
  proof::Balance& balance = *proof.closed_recurrence;
  balance.terms = {balance.terms[2], balance.terms[3]};
  balance.terms[0].origin = proof::BalanceTerm::Origin::explicit_point;
  balance.terms[1].shift = 0;
  balance.groups[0].members = {0, 1};
  const std::string text = pages(proof);
  expect_parts(text, {"Write $F(n)$ for the left side of", "F(n) = \\frac{(2n)!}{n!^{2}}.",
                      "F(n)-C(n) = 0", "F(n) &= ", "-C(n) &= "});
  for (const char* part : {"a_{0}", "F(n,0)", "G(", "$G", "summation", "S(n)"}) {
    EXPECT_EQ(text.substr(0, text.find("What has been proved")).find(part), std::string::npos)
        << part;
  }
  // A recurrence that is no formula has coefficients that are named and not printed.
  std::string power = "n";
  for (int i = 0; i < 60; ++i) power = "(" + power + ")^(n + 1)";
  proof.recurrence_text = {power, "1"};
  proof.ends = proof.closed_recurrence;
  proof.closed_recurrence.reset();
  proof.closed.reset();
  proof = with_claim(proof,
                     "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = "
                     "\"binomial(2*n, n)\"\n");
  proof.question = true;
  expect_parts(pages(proof), {"with the notation of the claim file,", "(\\theequation)",
                              "Write $a_{i}(n)$ for the coefficient of $S(n+i)$"});
}

TEST(LatexPages, LongNamesAreReplacedByLetters) {
  const std::string claim =
      "format = 1\ntitle = \"t\"\nrunning = \"" + std::string(64, 'r') +
      "\"\nfrom = 0\n[sum]\nsummand = \"binomial(a_name_that_is_long, k)*n\"\nover = [ { index = "
      "\"k\", low = \"0\", high = \"" +
      std::string(64, 'r') +
      "\" } ]\n[equals]\nclosed = \"1\"\n[parameters]\na_name_that_is_long = { in = \"integers\" "
      "}\nanother_name_that_is_long = { in = \"rationals\" }\nn = { in = \"rationals\" }\n";
  const proof::Proof proof = with_claim(fixture::squares(), claim);
  const LatexNames names(*proof.claim);
  EXPECT_EQ(names.symbol(std::string(64, 'r')).tex, "m");  // n is a parameter
  EXPECT_EQ(names.symbol("a_name_that_is_long").tex, "A");
  EXPECT_EQ(names.symbol("another_name_that_is_long").tex, "x");
  EXPECT_EQ(names.symbol("n").tex, "n");
  EXPECT_EQ(names.symbol("k").tex, "k");
  expect_parts(pages(proof),
               {"In formulas we write $m$ for \\texttt{rrrr", "$A$ for \\texttt{a\\char95{}name"});
  EXPECT_EQ(pages(fixture::squares()).find("In formulas we write"), std::string::npos);
}

TEST(LatexPages, EveryLongNameHasALetterOfItsOwn) {
  std::string claim =
      "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"1\"\nover = [ { "
      "index = \"k\", low = \"0\", high = \"n\" } ]\n[equals]\nclosed = \"1\"\n[parameters]\n";
  for (int i = 0; i < 60; ++i) {
    claim += "parameter_of_many_" + std::to_string(i) + " = { in = \"rationals\" }\n";
  }
  const proof::Proof proof = fixture::bare(claim);
  const LatexNames names(*proof.claim);
  std::vector<std::string> letters;
  for (const auto& [name, letter] : names.replaced()) letters.push_back(letter);
  EXPECT_EQ(letters.size(), 60U);
  std::sort(letters.begin(), letters.end());
  EXPECT_EQ(std::adjacent_find(letters.begin(), letters.end()), letters.end());
  for (const char* taken : {"n", "k", "S", "F", "G", "a", "c"}) {
    EXPECT_EQ(std::count(letters.begin(), letters.end(), taken), 0) << taken;
  }
}

TEST(LatexPages, TheHashIsNeverAloneOnAPage) {
  const std::string text = pages(fixture::squares());
  expect_parts(text, {"\\widowpenalty10000 \\clubpenalty10000\nThe same obligations"});
  EXPECT_EQ(text.find("\\begin{quote}"), std::string::npos);
}

// Recurrences in words: brackets around sums, never double ones; the text means the coefficients.
TEST(ClaimText, CoefficientsAreBracketedOnce) {
  proof::Proof proof = fixture::squares();
  proof = with_claim(proof,
                     "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = "
                     "\"binomial(n, k)^2\"\nover = [ { index = \"k\", low = \"0\", high = \"n\" } "
                     "]\n");
  proof.question = true;
  const auto left = [&](const std::vector<std::string>& coefficients) {
    proof.recurrence_text = coefficients;
    const std::string text = statement_text(proof);
    return text.substr(0, text.find(" = "));
  };
  EXPECT_EQ(left({"(n + 1)", "-1"}), "(n + 1)*S(n) - S(n + 1)");
  EXPECT_EQ(left({"-2*(2*n + 1)", "n + 1"}), "-2*(2*n + 1)*S(n) + (n + 1)*S(n + 1)");
  EXPECT_EQ(left({"-(n - 1)", "1", "n^2 - 1"}), "-(n - 1)*S(n) + S(n + 1) + (n^2 - 1)*S(n + 2)");
  EXPECT_EQ(left({"n/2", "-n^2"}), "n/2*S(n) - n^2*S(n + 1)");
  EXPECT_EQ(left({"1", "((n))"}), "S(n) + n*S(n + 1)");
}

}  // namespace
}  // namespace sumwright::writers
