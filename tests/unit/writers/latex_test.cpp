// The appendix: what it says, that nothing from outside is read as a command, and how it compiles.
#include <gtest/gtest.h>
#include <unistd.h>

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <iostream>
#include <iterator>
#include <random>

#include "claim/reader.hpp"
#include "proof_fixture.hpp"
#include "writers/latex_expression.hpp"
#include "writers/latex_text.hpp"
#include "writers/latex_values.hpp"
#include "writers/sha256.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

namespace fs = std::filesystem;

bool have_pdflatex() { return std::system("pdflatex --version >/dev/null 2>&1") == 0; }

// Compiles twice; everything in the log that a paper must not have.
std::string complaints(const std::string& tex) {
  std::string pattern = (fs::temp_directory_path() / "sumwright-latex-XXXXXX").string();
  if (::mkdtemp(pattern.data()) == nullptr) return "no temporary folder";
  const fs::path folder = pattern;
  std::ofstream(folder / "a.tex") << tex;
  const std::string command = "cd '" + folder.string() +
                              "' && timeout 60 pdflatex -interaction=nonstopmode -halt-on-error "
                              "-no-shell-escape a.tex >/dev/null 2>&1";
  std::string out;
  for (int run = 0; run < 2; ++run) {
    if (std::system(command.c_str()) != 0) out += "pdflatex fails; ";
  }
  std::ifstream log(folder / "a.log");
  std::string line;
  while (std::getline(log, line)) {
    for (const char* bad : {"Overfull", "Underfull", "Warning", "undefined", "! "}) {
      if (line.find(bad) != std::string::npos) out += line + "\n";
    }
  }
  if (!fs::exists(folder / "a.pdf")) out += "no pages";
  fs::remove_all(folder);
  return out;
}

std::string file_text(const proof::Proof& proof, std::size_t which) {
  const auto files = latex_files(proof);
  EXPECT_EQ(files.size(), 2U);
  return files.at(which).text;
}

proof::Proof with_claim(proof::Proof proof, const std::string& text) {
  proof.claim =
      std::make_shared<const claim::Claim>(claim::read_claim_text("claim.toml", text).claim);
  return proof;
}

std::string squares_claim(const std::string& title, const std::string& more = "") {
  return "format = 1\ntitle = " + title +
         "\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"binomial(n, k)^2\"\n"
         "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n[equals]\nclosed = "
         "\"binomial(2*n, n)\"\n" +
         more;
}

TEST(Latex, SaysWhatAPaperNeeds) {
  const std::string text = file_text(fixture::squares(), 0);
  for (const char* part :
       {"\\sum_{k=0}^{n} \\binom{n}{k}^{2} = \\binom{2n}{n}.",
        "\\frac{n!^{2}}{k!^{2}\\,(n-k+1)!^{2}}", "F(n,k) &= (n-k+1)^{2}\\,B(n,k)",
        "G(n,k+1) &= (n-k+1)^{2}\\,c(n,k+1)\\,B(n,k)", "\\frac{k^{2}(2k-3n-3)}{(n+1-k)^{2}}",
        "\\texttt{coq/Claim.v}", "{1/(-1)!}=0$ (c5)", "E_{1} = \\frac{(2n)!}{(n+1)!^{2}}"}) {
    EXPECT_NE(text.find(part), std::string::npos) << part;
  }
  EXPECT_EQ(text.find("\\documentclass"), std::string::npos);
  EXPECT_EQ(text.find("\\usepackage"), std::string::npos);
  const std::string hash = sha256(obligations_text(fixture::squares()));
  EXPECT_NE(text.find(hash.substr(0, 16)), std::string::npos);
  EXPECT_NE(file_text(fixture::squares(), 1).find("\\documentclass{amsart}"), std::string::npos);
}

TEST(Latex, NonNaturalEndIsShownWithItsBalance) {
  const std::string text = file_text(fixture::halves(), 0);
  for (const char* part :
       {"F(n+1,n+1)", "2 classes of similar terms", "-4(n+1)+4(n+1) = 0", "2-2 = 0"}) {
    EXPECT_NE(text.find(part), std::string::npos) << part;
  }
}

TEST(Latex, TextIsNeverACommand) {
  EXPECT_EQ(latex_text("\\end{document} $x$ 100% #1 a_b ^~{}&"),
            "{\\normalfont\\textbackslash}end\\{document\\} {\\normalfont\\$}x{\\normalfont\\$} "
            "100\\% \\#1 a\\_b "
            "{\\normalfont\\textasciicircum}{\\normalfont\\textasciitilde}\\{\\}\\&");
  EXPECT_EQ(latex_text("Ap\xC3\xA9ry, Ramanujan\xE2\x80\x99s, \xE6\x9D\x8E"),
            "Ap\\'{e}ry, Ramanujan's, [U+674E]");
  EXPECT_EQ(latex_text("a\n\n\tb\x1B[0m\xFF"), "a b[U+001B][0m[0xFF]");
  EXPECT_EQ(latex_text(std::string(1000, 'a'), 5), "aaaaa\\ldots{}");
  EXPECT_EQ(latex_code("a_b^2 \\x"), "\\texttt{a\\char95{}b\\char94{}\\allowbreak{}2 \\char92{}x}");
}

// No backslash, brace or dollar of a hostile text gets through unescaped.
TEST(Latex, EscapingIsBalancedForAnyBytes) {
  std::mt19937 random(20240611);
  for (int round = 0; round < 500; ++round) {
    std::string text;
    for (int i = 0; i < 60; ++i) text += static_cast<char>(random() % 256);
    for (const std::string& out : {latex_text(text), latex_code(text)}) {
      int depth = 0;
      int dollars = 0;
      for (std::size_t i = 0; i < out.size(); ++i) {
        if (out[i] == '\\' && i + 1 < out.size() &&
            std::string("{}$&%#_").find(out[i + 1]) != std::string::npos) {
          ++i;
        } else if (out[i] == '{') {
          ++depth;
        } else if (out[i] == '}') {
          ASSERT_GE(--depth, 0) << out;
        } else if (out[i] == '$') {
          ++dollars;
        } else {
          ASSERT_EQ(std::string("%#&~").find(out[i]) == std::string::npos || out[i] == '~', true)
              << out;
          ASSERT_NE(out[i], '\n');
        }
      }
      ASSERT_EQ(depth, 0) << out;
      ASSERT_EQ(dollars % 2, 0) << out;
    }
  }
}

class ExpressionText : public ::testing::Test {
 protected:
  static std::string tex(const std::string& summand) {
    const proof::Proof proof = fixture::bare(
        "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"" + summand +
        "\"\nover = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n[parameters]\n"
        "x = { in = \"rationals\" }\nalpha = { in = \"rationals\" }\nn_1 = { in = \"integers\" }\n"
        "n1 = { in = \"integers\" }\nlot_size = { in = \"integers\" }\n");
    const LatexNames names(*proof.claim);
    return inline_tex(LatexExpressions(names).formula(*proof.claim->sum.summand));
  }
};

TEST_F(ExpressionText, FollowsPrecedence) {
  EXPECT_EQ(tex("n - (k - x)"), "n-(k-x)");
  EXPECT_EQ(tex("n*(k + 1)"), "n(k+1)");
  EXPECT_EQ(tex("2*3*n"), "2\\cdot 3n");
  EXPECT_EQ(tex("-2*n"), "-2n");
  EXPECT_EQ(tex("(n + 1)/(k + 2)"), "\\frac{n+1}{k+2}");
  EXPECT_EQ(tex("(x/2)^n"), "\\left(\\frac{x}{2}\\right)^{n}");
  EXPECT_EQ(tex("(-1)^k*x"), "(-1)^{k}x");
  EXPECT_EQ(tex("x^(n - k)"), "x^{n-k}");
  EXPECT_EQ(tex("n*(-k)"), "n(-k)");
  EXPECT_EQ(tex("factorial(2*k)/factorial(k)^2"), "\\frac{(2k)!}{k!^{2}}");
  EXPECT_EQ(tex("rising(x, k)*falling(x + 1, k)"), "x^{\\overline{k}}(x+1)^{\\underline{k}}");
  EXPECT_EQ(tex("rising(x, k)^2"), "(x^{\\overline{k}})^{2}");
  EXPECT_EQ(tex("binomial(n + k, k)*x"), "\\binom{n+k}{k}\\,x");
}

TEST_F(ExpressionText, NamesAreReadableAndDifferent) {
  EXPECT_EQ(tex("alpha*k"), "\\alpha k");
  EXPECT_EQ(tex("n_1"), "n_{1}");
  EXPECT_EQ(tex("n1"), "\\mathtt{n1}");  // would look like n_1
  EXPECT_EQ(tex("lot_size"), "\\mathit{lot\\_size}");
}

TEST(Latex, LettersOfTheArgumentAvoidTheClaims) {
  const proof::Proof proof = fixture::bare(
      "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"S + F_1 + "
      "a\"\n[equals]\n"
      "closed = \"1\"\n[parameters]\nS = { in = \"rationals\" }\nF_1 = { in = \"rationals\" }\n"
      "a = { in = \"rationals\" }\n");
  const LatexNames names(*proof.claim);
  EXPECT_EQ(names.letter('S'), "\\mathcal{S}");
  EXPECT_EQ(names.letter('F'), "\\mathcal{F}");
  EXPECT_EQ(names.letter('a'), "\\bar{a}");
  EXPECT_EQ(names.letter('G'), "G");
  const LatexExpressions expressions(names);
  EXPECT_EQ(expressions.mixed("n >= 0, 0 <= a <= 2*n + 1"), "$n\\ge 0$, $0\\le a\\le 2n+1$");
  EXPECT_EQ(expressions.mixed("F(n, n + 1) is kept"), "$\\mathcal{F}(n,n+1)$ is kept");
  EXPECT_EQ(expressions.mixed("x_y > {0}"), "x\\_y $>$ \\{$0$\\}");
  EXPECT_EQ(expressions.mixed("F(n, n) has 2 point(s) outside"),
            "$\\mathcal{F}(n,n)$ has $2$ point(s) outside");
  EXPECT_EQ(expressions.mixed("2*3*a >= 2*n"), "$2\\cdot 3a\\ge 2n$");
  EXPECT_EQ(expressions.mixed("100% \\input{a}").find("\\input"), std::string::npos);
}

TEST(Latex, CompilesWithoutComplaint) {
  if (!have_pdflatex()) GTEST_SKIP() << "pdflatex is not installed";
  EXPECT_EQ(complaints(file_text(fixture::squares(), 1)), "");
  EXPECT_EQ(complaints(file_text(fixture::halves(), 1)), "");
}

TEST(Latex, TwoAppendicesFitInOnePaper) {
  if (!have_pdflatex()) GTEST_SKIP() << "pdflatex is not installed";
  const std::string paper =
      "\\documentclass{amsart}\\usepackage{amsmath,amsthm}\n"
      "\\newtheorem{theorem}{Theorem}\\begin{document}\n\\section{Text}A.\n\\appendix\n" +
      file_text(fixture::squares(), 0) + file_text(fixture::halves(), 0) + "\\end{document}\n";
  EXPECT_EQ(complaints(paper), "");
}

TEST(Latex, HostileClaimsCompileToo) {
  if (!have_pdflatex()) GTEST_SKIP() << "pdflatex is not installed";
  const std::string record =
      "[record]\nauthors = [\"\\\\input{/etc/passwd}\", \"\xC5\x81ukasz "
      "\xE6\x9D\x8E\xE5\x96\x84\xE8\x98\xAD\"]\n"
      "source = '''$$\\begin{verbatim} %{}&#^_~\\end ^^5c " +
      std::string(300, 'w') + "'''\n";
  for (const std::string& title :
       {std::string("'\\end{document} }{ $$ % # & _ ^ ~ \\write18{x}'"),
        "'" + std::string(900, 'W') + "'",
        std::string("\"\xE2\x88\x91 \xCE\xB1 \xF0\x9F\x98\x80 \xD0\x96\"")}) {
    const proof::Proof proof = with_claim(fixture::squares(), squares_claim(title, record));
    EXPECT_EQ(complaints(file_text(proof, 1)), "") << title;
  }
}

proof::Polynomial random_polynomial(std::mt19937& random, std::size_t terms, unsigned digits) {
  proof::Polynomial out;
  for (std::size_t i = 0; i < terms; ++i) {
    std::string number = std::to_string(1 + random() % 9);
    for (unsigned d = 1; d < digits; ++d) number += static_cast<char>('0' + random() % 10);
    mpz_class coefficient(number);
    if (random() % 2 == 0) coefficient = -coefficient;
    out.terms.push_back({coefficient, {terms - i, random() % 40}});
  }
  return out;
}

// Long polynomials, long numbers, many of them: lines and pages break, past a page dots appear.
TEST(Latex, LongFormulasStayInsideTheMargins) {
  if (!have_pdflatex()) GTEST_SKIP() << "pdflatex is not installed";
  std::mt19937 random(7);
  for (const auto& [terms, digits] : std::vector<std::pair<std::size_t, unsigned>>{
           {12, 2}, {60, 5}, {40, 30}, {9, 400}, {200, 10}, {3000, 60}}) {
    proof::Proof proof = fixture::squares();
    proof::Telescoping& t = *proof.telescoping;
    t.certificate = random_polynomial(random, terms, digits);
    t.normal_form = random_polynomial(random, terms, digits);
    t.p[0].factors.push_back({random_polynomial(random, terms, digits), 1});
    t.coefficients[1].factors.push_back({random_polynomial(random, terms / 3, digits), 2});
    const std::string text = file_text(proof, 1);
    EXPECT_EQ(complaints(text), "") << terms << " terms of " << digits << " digits";
    const bool dots = text.find("dots stand for terms") != std::string::npos;
    EXPECT_TRUE(terms != 12 || !dots);
    EXPECT_TRUE(terms != 3000 || dots);
    EXPECT_LT(text.size(), 100000U);
  }
}

}  // namespace
}  // namespace sumwright::writers
