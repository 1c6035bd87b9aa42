// Where formulas are broken: no sign and no operator is ever lost, added or read differently.
#include <gtest/gtest.h>

#include <random>
#include <string>
#include <vector>

#include "claim/reader.hpp"
#include "proof_fixture.hpp"
#include "writers/latex_expression.hpp"
#include "writers/latex_layout.hpp"
#include "writers/latex_names.hpp"
#include "writers/latex_values.hpp"

namespace sumwright::writers {
namespace {

constexpr const char* kSymbols =
    "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"k\"\n"
    "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n[parameters]\n"
    "x = { in = \"rationals\" }\nlot = { in = \"rationals\" }\n";

Formula sum_of(const std::vector<Formula>& terms) {
  Formula out;
  for (const Formula& term : terms) append_term(out, term);
  return out;
}

Formula product_of(const std::vector<Formula>& factors) {
  Formula out;
  for (const Formula& factor : factors) multiply(out, factor);
  return out;
}

Formula letter(const std::string& tex) { return piece(tex, 1); }

std::string joined(const std::vector<std::string>& lines) {
  std::string out;
  for (const std::string& line : lines) out += (out.empty() ? "" : " | ") + line;
  return out;
}

std::string broken(const Formula& formula, double room) {
  return joined(broken_lines(formula, room, room));
}

TEST(LatexLines, ATermStartsItsLineWithItsSign) {
  const Formula sum = sum_of({letter("a"), letter("b"), negative(letter("c"))});
  EXPECT_EQ(inline_tex(sum), "a+b-c");
  EXPECT_EQ(broken(sum, 2.5), "a | {}+b | {}-c");
}

TEST(LatexLines, AFactorStartsItsLineWithAMultiplicationSign) {
  const Formula product = product_of({letter("a"), letter("b"), piece("2", 0.5)});
  EXPECT_EQ(inline_tex(product), "ab\\cdot 2");
  EXPECT_EQ(broken(product, 2.4), "ab | {}\\times 2");
  EXPECT_EQ(broken(product, 2.0), "ab | {}\\times 2");
  EXPECT_EQ(broken(product, 1.9), "a | {}\\times b | {}\\times 2");
}

TEST(LatexLines, ADifferenceOfProductsIsBrokenAtItsMinus) {
  Formula difference = product_of({bracketed(sum_of({letter("k"), letter("r")})), letter("u")});
  subtract(difference,
           product_of({letter("k"), bracketed(sum_of({letter("n"), letter("k")})), letter("v")}));
  EXPECT_EQ(inline_tex(difference), "(k+r)u-k(n+k)v");
  EXPECT_EQ(broken(difference, 8), "(k+r)u | {}-k(n+k)v");
  EXPECT_EQ(broken(difference, 7), "(k+r)u | {}-k(n+k) | {}\\times v");
}

TEST(LatexLines, ANegativeLeadingFactorStaysASign) {
  Formula sum = letter("a");
  append_term(sum, held(piece("-7", 1), held(piece("9", 0.5), bracketed(letter("n")))));
  EXPECT_EQ(inline_tex(sum), "a-7\\cdot 9(n)");
  EXPECT_EQ(broken(sum, 5), "a | {}-7\\cdot 9(n)");
  // As a factor it needs brackets, as what is subtracted too.
  EXPECT_EQ(inline_tex(product_of({letter("a"), negative(letter("b"))})), "a(-b)");
  EXPECT_EQ(broken(product_of({letter("a"), negative(letter("b"))}), 3), "a | {}\\times (-b)");
  Formula difference = letter("a");
  subtract(difference, negative(letter("b")));
  EXPECT_EQ(inline_tex(difference), "a-(-b)");
  EXPECT_EQ(inline_tex(negative(negative(letter("b")))), "-(-b)");
}

TEST(LatexLines, AQuotientIsBrokenBeforeItsStroke) {
  Formula quotient = product_of({letter("a"), letter("b")});
  divide(quotient, bracketed(product_of({letter("c"), letter("d")})));
  EXPECT_EQ(inline_tex(quotient), "ab\\,\\big/(cd)");
  EXPECT_EQ(broken(quotient, 4.5), "ab | {}\\big/(cd)");
  EXPECT_EQ(broken(quotient, 2.8), "ab | {}\\big/(c | {}\\times d)");
}

TEST(LatexLines, BracketsInsideOneAnotherAreBrokenInsideLast) {
  const Formula inner = bracketed(sum_of({letter("a"), letter("b"), letter("c"), letter("d")}));
  const Formula outer = bracketed(sum_of({product_of({letter("x"), inner}), letter("y")}));
  const Formula product = product_of({letter("z"), outer, outer});
  EXPECT_EQ(broken(product, 20), "z(x(a+b+c+d)+y) | {}\\times (x(a+b+c+d)+y)");
  EXPECT_EQ(broken(product, 12), "z(x(a+b+c+d) | {}+y) | {}\\times (x(a+b+c+d) | {}+y)");
  EXPECT_EQ(broken(product, 9), "z(x(a+b+c | {}+d)+y)(x | {}\\times (a+b+c | {}+d)+y)");
}

TEST(LatexLines, NoLineHoldsASignAlone) {
  const Formula wide = bracketed(sum_of({piece("A", 9), piece("B", 9)}));
  EXPECT_EQ(broken(product_of({letter("a"), wide}), 6), "a | {}\\times (A | {}+B)");
}

TEST(LatexLines, NamesOfSeveralLettersStandApart) {
  const Formula lot = piece("\\mathit{lot}", 1.5);
  EXPECT_EQ(inline_tex(product_of({letter("S"), lot, letter("E")})), "S\\,\\mathit{lot}\\,E");
  EXPECT_EQ(inline_tex(product_of({lot, bracketed(sum_of({letter("a"), letter("b")}))})),
            "\\mathit{lot}\\,(a+b)");
  EXPECT_EQ(inline_tex(held(piece("2", 0.5), lot)), "2\\,\\mathit{lot}");
}

// ------------------------------------------------------------ any expression, at any width

// Random expressions of the claim language.
class RandomText {
 public:
  explicit RandomText(unsigned seed) : random_(seed) {}

  std::string text(int depth) {
    const unsigned kind = depth == 0 ? number() % 2 : 2 + number() % 7;
    switch (kind) {
      case 0:
        return std::to_string(random_() % 30);
      case 1:
        return std::vector<std::string>{"n", "k", "x", "lot"}[random_() % 4];
      case 2:
      case 3:
        return "(" + text(depth - 1) + " + " + text(depth - 1) + ")";
      case 4:
        return "(" + text(depth - 1) + " - " + text(depth - 1) + ")";
      case 5:
      case 6:
        return text(depth - 1) + "*" + text(depth - 1);
      case 7:
        return "(-" + text(depth - 1) + ")";
      default:
        return "(" + text(depth - 1) + ")/(" + text(depth - 1) + ")";
    }
  }
  unsigned number() { return static_cast<unsigned>(random_()); }

 private:
  std::mt19937 random_;
};

// The numbers modulo a prime, or nothing where a divisor is 0.
constexpr long kPrime = 1000003;
struct Residue {
  long value = 0;
  bool defined = true;
};
Residue inverse(Residue a) {
  if (a.value == 0) return {0, false};
  Residue out{1, a.defined};
  for (long e = kPrime - 2, base = a.value; e > 0; e /= 2, base = base * base % kPrime) {
    if (e % 2 == 1) out.value = out.value * base % kPrime;
  }
  return out;
}
Residue combined(Residue a, char sign, Residue b) {
  const bool defined = a.defined && b.defined;
  if (sign == '+') return {(a.value + b.value) % kPrime, defined};
  if (sign == '-') return {(a.value - b.value + kPrime) % kPrime, defined};
  return {a.value * b.value % kPrime, defined};
}

Residue symbol_value(const std::string& name) {
  return {name == "n" ? 1234L : name == "k" ? 57L : name == "x" ? 900001L : 33331L, true};
}

Residue value_of(const claim::Expression& expression) {
  using claim::Operation;
  const auto child = [&](std::size_t i) { return value_of(*expression.children[i]); };
  switch (expression.operation) {
    case Operation::literal:
      return {expression.value.get_si() % kPrime, true};
    case Operation::symbol:
      return symbol_value(expression.name);
    case Operation::negate:
      return combined({}, '-', child(0));
    case Operation::add:
      return combined(child(0), '+', child(1));
    case Operation::subtract:
      return combined(child(0), '-', child(1));
    case Operation::multiply:
      return combined(child(0), '*', child(1));
    default:
      return combined(child(0), '*', inverse(child(1)));
  }
}

// Reads a formula as a mathematician does. Fails at everything that could be read in two ways: an
// operator behind an operator, digits behind a factor, a factor behind a divisor in a row.
class FormulaReader {
 public:
  explicit FormulaReader(std::string text) : text_(std::move(text)) {}

  Residue read() {
    const Residue out = sum();
    if (at_ != text_.size()) fail("text is left over");
    return out;
  }
  [[nodiscard]] const std::string& failure() const { return failure_; }

 private:
  bool take(const std::string& token) {
    if (text_.compare(at_, token.size(), token) != 0) return false;
    at_ += token.size();
    return true;
  }
  void fail(const std::string& why) {
    if (failure_.empty()) failure_ = why + " at " + text_.substr(std::min(at_, text_.size()), 20);
    at_ = text_.size();
  }
  Residue sum() {
    Residue out;
    char sign = take("-") ? '-' : '+';
    for (;;) {
      out = combined(out, sign, product());
      if (take("+")) {
        sign = '+';
      } else if (take("-")) {
        sign = '-';
      } else {
        return out;
      }
    }
  }
  Residue product() {
    Residue out = factor(true);
    for (;;) {
      if (take("\\,\\big/") || take("\\big/")) {
        const Residue below = factor(false);
        if (starts_factor() || text_.compare(at_, 2, "\\,") == 0) fail("a factor behind a divisor");
        return combined(out, '*', inverse(below));
      }
      const bool sign = take("\\cdot ") || take("\\times ");
      if (!sign) take("\\,");
      if (!starts_factor()) {
        if (sign) fail("no factor behind a sign");
        return out;
      }
      out = combined(out, '*', factor(sign));
    }
  }
  [[nodiscard]] bool starts_factor() const {
    if (at_ >= text_.size()) return false;
    const char c = text_[at_];
    return (c >= '0' && c <= '9') || (c >= 'a' && c <= 'z') || c == '(' ||
           text_.compare(at_, 5, "\\frac") == 0 || text_.compare(at_, 5, "\\left") == 0 ||
           text_.compare(at_, 5, "\\math") == 0;
  }
  Residue factor(bool digits_allowed) {
    if (take("\\frac{")) {
      const Residue above = sum();
      if (!take("}{")) fail("no denominator");
      const Residue below = sum();
      if (!take("}")) fail("no end of a fraction");
      return combined(above, '*', inverse(below));
    }
    const bool tall = take("\\left(");
    if (tall || take("(")) {
      const Residue inside = sum();
      if (!take(tall ? "\\right)" : ")")) fail("no closing bracket");
      return inside;
    }
    if (take("\\mathit{lot}")) return symbol_value("lot");
    if (at_ < text_.size() && text_[at_] >= 'a' && text_[at_] <= 'z') {
      return symbol_value(std::string(1, text_[at_++]));
    }
    const std::size_t start = at_;
    while (at_ < text_.size() && text_[at_] >= '0' && text_[at_] <= '9') ++at_;
    if (start == at_) {
      fail("no factor");
      return {};
    }
    if (!digits_allowed) fail("digits behind a factor");
    return {std::stol(text_.substr(start, at_ - start)) % kPrime, true};
  }

  std::string text_;
  std::size_t at_ = 0;
  std::string failure_;
};

// The text without what breaks lines and without multiplication signs and spaces.
std::string bare(const std::string& text) {
  std::string out = text;
  for (const std::string mark : {"{}", "\\times ", "\\cdot ", "\\,"}) {
    for (std::size_t at = out.find(mark); at != std::string::npos; at = out.find(mark, at)) {
      out.erase(at, mark.size());
    }
  }
  return out;
}

TEST(LatexLines, BrokenTextIsTheUnbrokenTextAndMeansTheSame) {
  const proof::Proof proof = fixture::bare(kSymbols);
  const LatexNames names(*proof.claim);
  const LatexExpressions expressions(names);
  RandomText random(20240717);
  std::size_t breaks = 0;
  std::size_t defined = 0;
  for (int round = 0; round < 4000; ++round) {
    const std::string text = random.text(1 + round % 6);
    if (text.size() > 2500) continue;
    const claim::Source source{"text", text};
    const claim::ExpressionPtr tree =
        parse_expression(source, {0, text.size()}, {"n", "k", "x", "lot"});
    const Formula formula = expressions.formula(*tree);
    const double room = 4 + random.number() % 40;
    const std::vector<std::string> lines = broken_lines(formula, room, room);
    breaks += lines.size() - 1;
    std::string together;
    for (std::size_t i = 0; i < lines.size(); ++i) {
      ASSERT_NE(lines[i], "{}\\times ") << text;
      together += i == 0 ? lines[i] : lines[i].substr(lines[i].starts_with("{}") ? 2 : 0);
    }
    ASSERT_EQ(bare(together), bare(inline_tex(formula))) << text;
    const Residue expected = value_of(*tree);
    for (const std::string& shown : {inline_tex(formula), together}) {
      FormulaReader reader(shown);
      const Residue found = reader.read();
      ASSERT_EQ(reader.failure(), "") << text << "\n" << shown;
      ASSERT_EQ(found.defined, expected.defined) << text << "\n" << shown;
      if (expected.defined) {
        ASSERT_EQ(found.value, expected.value) << text << "\n" << shown;
      }
    }
    defined += expected.defined ? 1 : 0;
  }
  EXPECT_GT(breaks, 2000U);
  EXPECT_GT(defined, 2000U);
}

// The same for the values of a proof: sums of factored polynomials as in the equality.
TEST(LatexLines, SumsOfFactoredPolynomialsMeanTheSameWhenBroken) {
  const proof::Proof proof = fixture::bare(kSymbols);
  const LatexNames names(*proof.claim);
  LatexValues values(proof.symbols, names);
  std::mt19937 random(11);
  const std::vector<std::string> symbols = {"n", "k", "x", "lot"};
  for (int round = 0; round < 1000; ++round) {
    Formula sum;
    Residue expected;
    for (unsigned term = 0; term <= random() % 3; ++term) {
      proof::Factored factored;
      factored.constant = static_cast<long>(random() % 9) - 4;
      if (factored.constant == 0) factored.constant = -1;
      Residue value{(factored.constant.get_num().get_si() + kPrime) % kPrime, true};
      for (unsigned f = 0; f < random() % 4; ++f) {
        proof::Polynomial base;
        Residue base_value;
        for (unsigned m = 0; m <= random() % 3; ++m) {
          proof::Monomial monomial{static_cast<long>(random() % 7) - 3, {0, 0, 0, 0}};
          if (monomial.coefficient == 0) monomial.coefficient = 1;
          monomial.exponents[m] = random() % 2;
          Residue part{(monomial.coefficient.get_si() + kPrime) % kPrime, true};
          if (monomial.exponents[m] == 1) part = combined(part, '*', symbol_value(symbols[m]));
          base_value = combined(base_value, '+', part);
          base.terms.push_back(monomial);
        }
        factored.factors.push_back({base, 1});
        value = combined(value, '*', base_value);
      }
      append_term(sum, values.factored(factored, false));
      expected = combined(expected, '+', value);
    }
    const double room = 3 + static_cast<double>(random() % 20);
    std::string together;
    for (const std::string& line : broken_lines(sum, room, room)) {
      together += line.starts_with("{}") ? line.substr(2) : line;
    }
    ASSERT_EQ(bare(together), bare(inline_tex(sum)));
    for (const std::string& shown : {inline_tex(sum), together}) {
      FormulaReader reader(shown);
      const Residue found = reader.read();
      ASSERT_EQ(reader.failure(), "") << shown;
      ASSERT_EQ(found.value, expected.value) << shown;
    }
  }
}

}  // namespace
}  // namespace sumwright::writers
