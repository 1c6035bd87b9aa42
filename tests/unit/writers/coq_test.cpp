// The generated Coq file as text: its names, its comments and its lines. That Coq accepts it, and
// what it proves, is tested end to end.
#include <gtest/gtest.h>

#include <algorithm>
#include <regex>
#include <set>
#include <sstream>

#include "claim/reader.hpp"
#include "proof_fixture.hpp"
#include "writers/coq_comments.hpp"
#include "writers/coq_merged_powers.hpp"
#include "writers/coq_text.hpp"
#include "writers/embedded.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

std::string without_comments(const std::string& text) {
  std::string out;
  int depth = 0;
  for (std::size_t i = 0; i < text.size(); ++i) {
    const std::string two = text.substr(i, 2);
    if (two == "(*") ++depth;
    if (depth == 0) out += text[i];
    if (two == "*)" && depth > 0) {
      --depth;
      ++i;
    }
  }
  EXPECT_EQ(depth, 0);
  return out;
}

std::string words_of(const std::string& text) {
  std::string out;
  for (const char ch : text) {
    if (ch != ' ' && ch != '\n')
      out += ch;
    else if (!out.empty() && out.back() != ' ')
      out += ' ';
  }
  return out;
}

proof::Proof titled(proof::Proof proof, const std::string& title) {
  claim::Claim claim = *proof.claim;
  claim.title = title;
  proof.claim = std::make_shared<const claim::Claim>(claim);
  return proof;
}

/// Everything that a file declares.
std::set<std::string> declared(const std::string& text) {
  static const std::regex declaration(
      R"((?:Lemma|Theorem|Corollary|Definition|Fixpoint|Notation|Ltac|Variable|Hypothesis)\s+([A-Za-z_][A-Za-z0-9_]*))");
  std::set<std::string> out;
  const std::string code = without_comments(text);
  for (std::sregex_iterator it(code.begin(), code.end(), declaration), end; it != end; ++it)
    out.insert((*it)[1]);
  return out;
}

TEST(CoqNames, KeepWhatMeansNothing) {
  for (const char* name : {"n", "k", "x", "m", "a", "b", "rate", "lots"})
    EXPECT_EQ(coq::safe_name(name), name);
}

TEST(CoqNames, WordsOfCoqAreRenamed) {
  for (const char* name : {"fun",     "forall", "match",    "return",     "as",
                           "mod",     "Prop",   "Set",      "Type",       "SProp",
                           "Section", "End",    "Fixpoint", "Definition", "Theorem",
                           "Lemma",   "Qed",    "Axiom",    "Print",      "List",
                           "Nat",     "Claim",  "K",        "Z",          "O",
                           "S",       "I",      "H",        "Hn",         "Statement",
                           "IF",      "inj",    "sum_",     "s",          "z",
                           "t",       "c",      "F1",       "p0_1",       "the_statement"})
    EXPECT_EQ(coq::safe_name(name), std::string(name) + "_v");
}

TEST(CoqNames, NoTwoSymbolsMeet) {
  const std::vector<std::string> names = {"s", "s_v", "s_v_v", "S", "x", "x_v", "x1", "x1_v"};
  std::set<std::string> written;
  for (const std::string& name : names) written.insert(coq::safe_name(name));
  EXPECT_EQ(written.size(), names.size());
}

TEST(CoqNames, NothingThatAFileDeclaresIsKept) {
  std::set<std::string> names = declared(coq_claim_text(fixture::squares()));
  names.merge(declared(coq_claim_text(fixture::halves())));
  EXPECT_TRUE(names.contains("telescoping"));
  for (const char* file : {"Statement", "Scalars", "Products", "Powers", "Sums", "Values",
                           "Integers", "Leaves", "Factorials", "Induction"}) {
    const std::string text(embedded_template("coq/" + std::string(file) + ".v"));
    for (const std::string& name : declared(text))
      // Variables of the library's sections are bound in its lemmas only.
      if (name.size() > 1) names.insert(name);
  }
  EXPECT_GT(names.size(), 200U);
  for (const std::string& name : names) EXPECT_NE(coq::safe_name(name), name);
}

TEST(CoqTerms, BracketsThatCoqDrops) {
  EXPECT_TRUE(coq::same_term("((inj 2) * x) + y", "inj 2 * x + y"));
  EXPECT_TRUE(coq::same_term("(x + y) + (inj 1)", "x + y + inj 1"));
  EXPECT_TRUE(coq::same_term("(- 2) * n", "- 2 * n"));
  EXPECT_TRUE(coq::same_term("zpow (inj 2) (n - k)", "(zpow ((inj 2)) (n - k))"));
}

TEST(CoqTerms, BracketsThatCoqKeeps) {
  EXPECT_FALSE(coq::same_term("x + (y + inj 1)", "x + y + inj 1"));
  EXPECT_FALSE(coq::same_term("x * (y * z)", "x * y * z"));
  EXPECT_FALSE(coq::same_term("- (x * y)", "- x * y"));
  EXPECT_FALSE(coq::same_term("(- x) ^ 2", "- x ^ 2"));
  EXPECT_FALSE(coq::same_term("n - (k - 1)", "n - k - 1"));
  EXPECT_FALSE(coq::same_term("/ x * y", "/ (x * y)"));
}

TEST(CoqTerms, EnclosedOnce) {
  EXPECT_EQ(coq::enclosed("k"), "k");
  EXPECT_EQ(coq::enclosed("n + 1"), "(n + 1)");
  EXPECT_EQ(coq::enclosed("(n + 1)"), "(n + 1)");
  EXPECT_EQ(coq::enclosed("(n + 1) * (n + 2)"), "((n + 1) * (n + 2))");
}

TEST(CoqComments, NothingLeavesThem) {
  const std::string hostile = "ends *) Axiom cheat : False. (* \" open (*) **) \"";
  for (const std::string& text : {coq::comment_text(hostile), coq::comment_formula(hostile)}) {
    EXPECT_EQ(text.find("*)"), std::string::npos);
    EXPECT_EQ(text.find("(*"), std::string::npos);
    EXPECT_EQ(text.find('"'), std::string::npos);
  }
  const std::string plain = coq_claim_text(titled(fixture::squares(), "A title"));
  const std::string quoted = coq_claim_text(titled(fixture::squares(), hostile));
  EXPECT_EQ(without_comments(plain), without_comments(quoted));
  for (const NamedText& file : coq_corollaries(titled(fixture::squares(), hostile), "Own"))
    EXPECT_EQ(without_comments(file.text).find("cheat"), std::string::npos);
}

TEST(CoqComments, SayWhatIsProved) {
  const std::string text = coq_claim_text(fixture::squares());
  EXPECT_NE(text.find("sum(k = 0..n, binomial(n, k)^2) = binomial(2*n, n)"), std::string::npos);
  // The theorem's own text stands in the first comment too.
  const std::size_t at = text.find("sum 0 n (fun k : Z =>");
  EXPECT_LT(at, text.find("Require Import"));
  for (const char* name : {"[base]", "[F1]", "[C1]", "[left_end]", "[remainder]", "[equality]"})
    EXPECT_NE(text.find(name), std::string::npos) << name;
}

TEST(CoqComments, EveryLemmaHasOne) {
  for (const std::string& text :
       {coq_claim_text(fixture::squares()), coq_claim_text(fixture::halves())})
    for (std::size_t at = text.find("\nLemma "); at != std::string::npos;
         at = text.find("\nLemma ", at + 1))
      EXPECT_EQ(text.substr(at - 2, 2), "*)") << text.substr(at, 60);
}

TEST(CoqLines, AreShortAndMeanTheSame) {
  std::string sum = "  (";
  for (int i = 0; i < 100; ++i)
    sum += (i == 0 ? "inj " : " + inj ") + std::to_string(i * i * i) + " * n ^ 3 * k";
  for (const std::string& text : {"Definition c := " + sum + ")%K.", "(** " + sum + " *)"}) {
    const std::string out = coq::wrapped(text);
    EXPECT_EQ(words_of(out), words_of(text + "\n"));
    std::istringstream lines(out);
    for (std::string line; std::getline(lines, line);) {
      EXPECT_LE(line.size(), 100U);
      EXPECT_NE(line.back(), ' ');
    }
  }
}

TEST(CoqLines, NumbersAreNotCut) {
  const std::string number(500, '7');
  EXPECT_NE(coq::wrapped("Definition c := inj " + number + " + inj 1.").find(number),
            std::string::npos);
  EXPECT_EQ(coq::wrapped("  apply x.   \n\n"), "  apply x.\n\n");
}

TEST(CoqLines, OfAFile) {
  for (const std::string& text :
       {coq_claim_text(fixture::squares()), coq_claim_text(fixture::halves())}) {
    std::istringstream lines(text);
    for (std::string line; std::getline(lines, line);) {
      EXPECT_LE(line.size(), 110U) << line;
      EXPECT_FALSE(line.ends_with(' ')) << line;
    }
  }
}

TEST(CoqPowers, OfANonzeroBaseAreTakenApartOnBothSides) {
  proof::Proof proof = fixture::halves();
  const coq::Scope scope = coq::plain_scope(proof);
  proof::PowerMerge merge;
  merge.base = fixture::polynomial({{2, {0, 0}}});
  merge.first = fixture::affine({1, 0}, -3);
  merge.second = fixture::affine({0, 0}, 3);
  proof.summand.merges = {merge};
  const coq::MergedPowers powers = coq::merged_powers(proof, proof.summand, scope, {});
  EXPECT_NE(powers.split.find("split_powers K (inj 2)%K"), std::string::npos);
  EXPECT_EQ(powers.close, "field; nonzero_powers");
  // The merge itself, which could rewrite either side, is not used.
  EXPECT_EQ(powers.setup.find("n - 3"), std::string::npos);
}

TEST(CoqPowers, OfABaseThatMayBeZeroUseTheMerges) {
  proof::Proof proof = fixture::bare(R"toml(format = 1
title = "Powers"
running = "n"
from = 0
[sum]
summand = "x^k*x^(n - k)"
over = [ { index = "k", low = "0", high = "n" } ]
[equals]
closed = "(n + 1)*x^n"
[parameters]
x = { in = "rationals" }
)toml");
  const coq::Scope scope = coq::plain_scope(proof);
  proof::PowerMerge merge;
  merge.base = fixture::polynomial({{1, {0, 0, 1}}});
  merge.first = fixture::affine({0, 1, 0}, 0);
  merge.second = fixture::affine({1, -1, 0}, 0);
  proof::Conversion conversion;
  conversion.merges = {merge};
  const coq::MergedPowers powers = coq::merged_powers(proof, conversion, scope, {});
  EXPECT_EQ(powers.split, "");
  EXPECT_NE(powers.setup.find("zpow x k * zpow x (n - k) = zpow x n"), std::string::npos);
  EXPECT_NE(powers.close.find("ring [merge1]"), std::string::npos);
}

TEST(CoqPowers, NoMergesNoTactics) {
  const proof::Proof proof = fixture::halves();
  const coq::Scope scope = coq::plain_scope(proof);
  const coq::MergedPowers powers = coq::merged_powers(proof, proof::Conversion{}, scope, {});
  EXPECT_EQ(powers.setup + powers.split, "");
  EXPECT_EQ(powers.close, "ring");
}

}  // namespace
}  // namespace sumwright::writers
