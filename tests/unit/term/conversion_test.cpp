// From expressions to products of atoms: one canonical form, equal values, refusals with their
// place.
#include "term/conversion.hpp"

#include <gtest/gtest.h>

#include <iostream>

#include "term_support.hpp"

namespace sumwright::term {
namespace {

using testing::convert;
using testing::Number;
using testing::Point;
using testing::value_of;

std::string shown(const Setting& setting, const Conversion& c) {
  std::string out;
  for (const Product& p : c.products) {
    out += out.empty() ? "" : " + ";
    out += p.coefficient.to_string();
    for (const auto& [atom, e] : p.atoms) {
      out += " [" + std::to_string(static_cast<int>(atom.kind)) + " " + atom.base.to_string() +
             "/" + atom.scale.get_str() + " " + text(setting, atom.argument) + " " +
             text(setting, atom.low) + " " + text(setting, atom.high) + "]^" + std::to_string(e);
    }
  }
  return out;
}

TEST(Conversion, EqualTermsHaveOneForm) {
  const Setting setting = testing::usual_setting();
  const std::vector<std::pair<std::string, std::string>> pairs{
      {"binomial(n, k)", "factorial(n)/(factorial(k)*factorial(n - k))"},
      {"binomial(n, k)^2", "binomial(n, k)*factorial(n)/factorial(k)/factorial(n - k)"},
      {"binomial(2*n, n)", "factorial(2*n)/factorial(n)^2"},
      {"binomial(2*n, n)", "factorial(2*n)*factorial(n)^-2"},
      {"binomial(n + m, k)", "factorial(m + n)/(factorial(n + m - k)*factorial(k))"},
      {"falling(n, k)", "factorial(n)/factorial(n - k)"},
      {"rising(k + 1, n)", "factorial(k + n)/factorial(k)"},
      {"rising(m + 1, n)", "factorial(m + n)/factorial(m)"},
      {"rising(-n, k)", "(-1)^k*factorial(n)/factorial(n - k)"},
      {"4^k", "2^(2*k)"},
      {"6^n", "3^n*2^n"},
      {"(4/9)^k", "2^(2*k)*3^(-2*k)"},
      {"1/2^k", "2^-k"},
      {"(1/2)^k", "2^(-k)"},
      {"2^k*2^n", "2^(n + k)"},
      {"(2^k)^2", "4^k"},
      {"(-1)^(n + k)", "(-1)^n*(-1)^k"},
      {"(-2)^k", "(-1)^k*2^k"},
      {"(x^2 - 1)^k", "(x - 1)^k*(x + 1)^k"},
      {"rising(x + 2, k)*(k + 1)", "(1 + k)*rising(2 + x, k)"},
      {"falling(x, k)", "rising(x - k + 1, k)"},
      {"binomial(x, k)", "falling(x, k)/factorial(k)"},
      {"rising(3/2, k)", "rising(1/2 + 1, k)"},
      {"binomial(n, k) + binomial(n, k)", "2*binomial(n, k)"},
      {"binomial(n, k)*(n - k)^2", "binomial(n, k)*(n^2 - 2*n*k + k^2)"},
      {"k*binomial(n, k) + n*binomial(n, k)", "(n + k)*binomial(n, k)"},
      {"binomial(n, k) - binomial(n, k) + 1", "1"},
      {"-(-(k + 1))", "k + 1"},
  };
  for (const auto& [a, b] : pairs) {
    SCOPED_TRACE(a + "  and  " + b);
    const Conversion left = convert(setting, a);
    const Conversion right = convert(setting, b);
    EXPECT_EQ(left.open(), nullptr);
    EXPECT_EQ(right.open(), nullptr);
    EXPECT_EQ(shown(setting, left), shown(setting, right));
  }
}

TEST(Conversion, DifferentTermsHaveDifferentForms) {
  const Setting setting = testing::usual_setting();
  for (const auto& [a, b] :
       std::vector<std::pair<std::string, std::string>>{{"binomial(n, k)", "binomial(n, k + 1)"},
                                                        {"binomial(n, k)", "binomial(n, k)^2"},
                                                        {"2^k", "3^k"},
                                                        {"2^k", "(-2)^k"},
                                                        {"rising(x, k)", "rising(x + 1, k)"},
                                                        {"factorial(n)", "1/factorial(n)"},
                                                        {"1/(2*k + 1)", "2*k + 1"}})
    EXPECT_NE(shown(setting, convert(setting, a)), shown(setting, convert(setting, b))) << a;
}

TEST(Conversion, ZeroHasNoProducts) {
  const Setting setting = testing::usual_setting();
  for (const char* text : {"0", "binomial(n, k) - binomial(n, k)", "0*factorial(k)", "k - k"})
    EXPECT_TRUE(convert(setting, text).products.empty()) << text;
}

const char* const kExpressions[] = {
    "binomial(n, k)",
    "binomial(n, 2*k)",
    "binomial(k, n)",
    "binomial(n - k, k)",
    "binomial(-n - 1, k)",
    "binomial(n - 3, k)",
    "binomial(-2, k)",
    "binomial(1/2, k)",
    "binomial(-1/2, n)",
    "binomial(x, k)",
    "binomial(x + n, k)",
    "binomial(2*x - k, k)",
    "binomial(n + k, 2*k)/(k + 1)",
    "factorial(n)/factorial(k)",
    "factorial(2*k)/(2^k*factorial(k))",
    "factorial(n + m)*factorial(k)/factorial(n + k + m + 1)",
    "k*factorial(k)",
    "1/factorial(n - 2*k)",
    "1/factorial(k - n)^2",
    "rising(1/2, k)/factorial(k)",
    "rising(5/6, n - k)",
    "rising(-1/3, k)",
    "rising(x, k)*rising(x + k, n - k)",
    "rising(-n, k)",
    "rising(-m, k)",
    "rising(m + 1, k)",
    "rising(k, n)",
    "rising(n - 4, k)",
    "falling(n, k)",
    "falling(n - 4, k)",
    "falling(x, n - k)",
    "falling(-1/2, k)",
    "x^k*(1 - x)^(n - k)",
    "(x + 1)^n/(x + 1)^k",
    "(2/3)^(n - 2*k)",
    "(-1)^k*binomial(n, k)",
    "(-x)^k",
    "1/(2*k + 1)",
    "k/(k + 1) - n/(n + 1)",
    "1/(k + 1)/(n + 2)^2",
    "(k^2 + k + 1)^-2",
    "2^k + 3^k",
    "(1 + 2^n)*(1 - 2^n)",
    "(2^k + 1)^2",
    "1/binomial(n, k)",
    "binomial(n, k)/binomial(2*n, k)",
    "1/(3*2^k*(n + 1))",
    "1/rising(x, k)",
    "1/rising(1/2, k + 1)^2",
    "-binomial(n, k) + 7",
    "x*k - 1/3",
};

/// Whether every requirement is met at the point (then the products must have the same value).
bool met(const Requirement& r, const Point& at) {
  if (r.nonnegative && value_of(*r.nonnegative, at) < 0) return false;
  return !r.nonzero || (value_of(*r.nonzero, at) && *value_of(*r.nonzero, at) != 0);
}
bool all_met(const Conversion& c, const Point& at) {
  for (const Requirement& r : c.definedness)
    if (!met(r, at)) return false;
  for (const Leaf& leaf : c.leaves)
    for (const Requirement& r : leaf.requirements)
      if (!met(r, at)) return false;
  for (const PowerMerge& merge : c.merges)
    for (const Requirement& r : merge.requirements)
      if (!met(r, at)) return false;
  return true;
}

// On the region the products have the value that the expression has by the claim format.
TEST(Conversion, KeepsValues) {
  const Setting setting = testing::usual_setting();
  std::size_t compared = 0;
  std::size_t undefined = 0;
  for (const char* text : kExpressions) {
    SCOPED_TRACE(text);
    const claim::ExpressionPtr expression = testing::parse(setting, text);
    const Conversion c = term::convert(setting, testing::usual_facts(setting), expression);
    std::size_t here = 0;
    for (long n = 0; n <= 6; ++n)
      for (long k = 0; k <= n; ++k)
        for (long m = 0; m <= 2; ++m)
          for (const char* x : {"1/2", "-7/3", "5/4"}) {
            const Point at{n, k, m, mpq_class(x)};
            if (!all_met(c, at)) {
              ++undefined;
              continue;
            }
            const Value value = evaluate(*expression, testing::assignment(setting, at));
            const Number products = value_of(c.products, at);
            ASSERT_TRUE(value.number) << value.why_not << " at n = " << n << ", k = " << k;
            ASSERT_TRUE(products) << "at n = " << n << ", k = " << k;
            ASSERT_EQ(*value.number, *products) << "n = " << n << ", k = " << k << ", m = " << m;
            ++here;
          }
    EXPECT_GT(here, 0U);
    compared += here;
  }
  std::cout << compared << " values compared, " << undefined << " points left out\n";
}

// A requirement called settled holds at every point of the region.
TEST(Conversion, SettledMeansTrue) {
  const Setting setting = testing::usual_setting();
  std::size_t checked = 0;
  for (const char* text : kExpressions) {
    const Conversion c = convert(setting, text);
    std::vector<Requirement> all = c.definedness;
    for (const Leaf& leaf : c.leaves)
      all.insert(all.end(), leaf.requirements.begin(), leaf.requirements.end());
    for (const Requirement& r : all) {
      if (!r.settled) continue;
      for (long n = 0; n <= 7; ++n)
        for (long k = 0; k <= n; ++k)
          for (long m = 0; m <= 2; ++m)
            EXPECT_TRUE(met(r, {n, k, m, mpq_class(1, 2)})) << text << " " << n << " " << k;
      ++checked;
    }
  }
  EXPECT_GT(checked, 20U);
}

TEST(Conversion, OpenRequirementsAreNamed) {
  const Setting setting = testing::usual_setting();
  const auto open = [&](const char* text) {
    const Conversion c = convert(setting, text);
    const Requirement* r = c.open();
    if (r == nullptr) return std::string("none");
    return r->nonnegative ? term::text(setting, *r->nonnegative) + " >= 0"
                          : r->nonzero->to_string() + " != 0";
  };
  EXPECT_EQ(open("factorial(k - 1)"), "k - 1 >= 0");
  EXPECT_EQ(open("1/k"), "k != 0");
  EXPECT_EQ(open("1/(n - 2*k)"), "(n - 2*k) != 0");
  EXPECT_EQ(open("1/(x - m)"), "none") << "x is no integer";
  EXPECT_EQ(open("1/(2*x - 1)"), "(2*x - 1) != 0");
  EXPECT_EQ(open("rising(x, k - 1)"), "k - 1 >= 0");
  EXPECT_EQ(open("1/(2*k + 1)"), "none");
  EXPECT_EQ(open("x^(k - n)"), "none") << "0 is excluded as an integer";
  EXPECT_EQ(open("(x - 1/2)^(k - n)"), "(2*x - 1) != 0");
}

// Refused as not hypergeometric, naming the factor.
TEST(Conversion, RefusesWhatIsNotHypergeometric) {
  const Setting setting = testing::usual_setting();
  const std::vector<std::pair<const char*, const char*>> cases{
      {"k*rising(n/2, k)", "'rising(n/2, k)' is not a hypergeometric factor"},
      {"binomial(n, k)*binomial(k^2, n)", "'binomial(k^2, n)' is not a hypergeometric factor"},
      {"binomial(n*k, k)", "'binomial(n*k, k)' is not a hypergeometric factor"},
      {"rising(n*x, k)", "integer slope in the running variable and the index"},
      {"rising(1/x, k)", "must be a polynomial in the symbols"},
      {"rising(factorial(k), k)", "must be a polynomial in the symbols"},
      {"1/(2^k + 1)", "a sum of terms that are not similar as written"},
      {"n + 1/(k - k)", "identically zero"},
      {"k/(factorial(k) - factorial(k))", "identically zero"},
  };
  for (const auto& [text, message] : cases) {
    SCOPED_TRACE(text);
    const claim::ExpressionPtr e = testing::parse(setting, text);
    try {
      (void)term::convert(setting, testing::usual_facts(setting), e);
      ADD_FAILURE() << "was converted";
    } catch (const claim::InputError& error) {
      EXPECT_NE(std::string(error.what()).find(message), std::string::npos) << error.what();
    }
  }
}

// The same through a whole claim file, where the place can be seen.
TEST(Conversion, NamesThePlaceInTheFile) {
  testing::ClaimParts parts = testing::usual_parts();
  parts.summand = "k*rising(n/2, k)";
  const auto claim = testing::read_claim(parts);
  const Setting setting = make_setting(claim);
  try {
    (void)term::convert(setting, setting.from(0), claim->sum.summand);
    ADD_FAILURE() << "was converted";
  } catch (const claim::InputError& error) {
    const std::string what = error.what();
    EXPECT_EQ(what.substr(0, 16), "t.toml:6:14: err") << what;
    EXPECT_NE(what.find("\n               ^~~~~~~~~~~~~~"), std::string::npos) << what;
  }
  parts.summand = "k^k";
  EXPECT_THROW((void)testing::read_claim(parts), claim::InputError);
}

// Growth is limited.
TEST(Conversion, RefusesProductsThatExplode) {
  const Setting setting = testing::usual_setting();
  std::string text = "(2^k + 1)";
  for (int i = 3; i < 12; ++i) text += "*(" + std::to_string(2 * i + 1) + "^k + 1)";
  EXPECT_THROW((void)convert(setting, text), claim::InputError);
}

}  // namespace
}  // namespace sumwright::term
