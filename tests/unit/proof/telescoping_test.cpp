// The polynomial equality: right evidence gives residue 0, wrong evidence does not, values agree.
#include "proof/telescoping.hpp"

#include <gtest/gtest.h>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::ClaimParts;
using testing::Number;
using testing::Point;
using testing::value_of;

ClaimParts row_squares() {
  ClaimParts parts;
  parts.summand = "binomial(n, k)^2";
  parts.closed = "binomial(2*n, n)";
  parts.recurrence = "\"-2*(2*n + 1)\", \"n + 1\"";
  parts.certificate = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2";
  return parts;
}

std::optional<TelescopingDraft> draft(const Terms& terms, std::string& why) {
  const EvidenceDraft evidence = testing::evidence_of(terms);
  return draft_telescoping(terms.setting, terms.summand.products, evidence.coefficients,
                           *evidence.certificate, why);
}

// The example of the method: the double pole at k = n + 1 is gone.
TEST(Telescoping, SquaresOfARow) {
  const Terms terms = testing::terms_of(row_squares());
  std::string why;
  const auto made = draft(terms, why);
  ASSERT_TRUE(made) << why;
  EXPECT_TRUE(made->holds());
  ASSERT_EQ(made->p.size(), 2U);
  EXPECT_EQ(made->p[0].to_string(), "(n - k + 1)^2");
  EXPECT_EQ(made->p[1].to_string(), "(n + 1)^2");
  EXPECT_EQ(made->certificate.to_string(), "-3*n + 2*k - 3");
  EXPECT_EQ(made->index.down.to_string(), "k^2");
  EXPECT_TRUE(made->weight.factors.empty());
  ASSERT_EQ(made->base.atoms.size(), 3U);
  for (const Need& need : made->needs)
    EXPECT_EQ(term::text(terms.setting, *need.nonnegative), "n") << "only fact(n) needs something";
}

TEST(Telescoping, WrongEvidenceLeavesAResidue) {
  for (const auto& [recurrence, certificate] : std::vector<std::pair<const char*, const char*>>{
           {"\"-2*(2*n + 1)\", \"n + 2\"", "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
           {"\"-2*(2*n + 1)\", \"n + 1\"", "k^2*(2*k - 3*n - 2)/(n + 1 - k)^2"},
           {"\"-2*(2*n + 1)\", \"n + 1\"", "-k^2*(2*k - 3*n - 3)/(n + 1 - k)^2"},
           {"\"-2*(2*n + 1)\", \"n + 1\"", "0"},
           {"\"-2*(2*n + 1)\", \"n + 1\"", "k^2*(2*k - 3*n - 3)/(n - k)^2"}}) {
    ClaimParts parts = row_squares();
    parts.recurrence = recurrence;
    parts.certificate = certificate;
    const Terms terms = testing::terms_of(parts);
    std::string why;
    const auto made = draft(terms, why);
    if (!made) {
      EXPECT_FALSE(why.empty());
      continue;
    }
    EXPECT_FALSE(made->holds()) << recurrence << " " << certificate;
  }
}

/// weight * sum a_i F(n+i,k) = q1 B - q0 B where the needs are met, at every point of a box, ends
/// and poles of the certificate included.
void expect_identity(const ClaimParts& parts) {
  const Terms terms = testing::terms_of(parts);
  std::string why;
  const auto made = draft(terms, why);
  ASSERT_TRUE(made) << why;
  ASSERT_TRUE(made->holds());
  std::size_t compared = 0;
  for (long n = 0; n <= 6; ++n)
    for (long k = -3; k <= n + 4; ++k)
      for (const long m : {0L, 3L}) {
        Point at(terms.setting.size(), mpq_class(1, 3));
        at[0] = n;
        at[1] = k;
        for (std::size_t i = 2; i < at.size(); ++i)
          if (terms.setting.is_integer(i)) at[i] = m;
        if (!testing::all_met(made->needs, at)) continue;
        mpq_class left = 0;
        bool defined = true;
        for (std::size_t i = 0; i < made->coefficients.size(); ++i) {
          Point moved = at;
          moved[0] += static_cast<long>(i);
          const Number f = value_of(terms.summand.products, moved);
          defined = defined && f;
          if (f) left += made->coefficients[i].evaluate_rational(at) * *f;
        }
        const Number base = value_of(made->base, at);
        if (!defined || !base) continue;
        Point next = at;
        next[1] += 1;
        const mpq_class right =
            (*value_of(made->index.up, at) * made->certificate.evaluate_rational(next) -
             *value_of(made->index.down, at) * made->certificate.evaluate_rational(at)) *
            *base;
        EXPECT_EQ(*value_of(made->weight, at) * left, right) << "n = " << n << ", k = " << k;
        ++compared;
      }
  EXPECT_GT(compared, 20U);
}

TEST(Telescoping, HoldsAsNumbersAtPolesAndEnds) {
  expect_identity(row_squares());
  ClaimParts parts;
  parts.summand = "binomial(n + k, k)/2^k";
  parts.recurrence = "\"2\", \"-1\"";
  parts.certificate = "2*k/(n + 1)";
  expect_identity(parts);
  parts = {};
  parts.summand = "k*factorial(k)";
  parts.recurrence = "\"1\"";
  parts.certificate = "1/k";
  expect_identity(parts);
  parts = {};
  parts.summand = "binomial(m, k)*binomial(2*m, n - k)";
  parts.parameters = "m = { in = \"integers\", at_least = 0 }";
  parts.recurrence = "\"n - 3*m\", \"n + 1\"";
  parts.certificate = "k*(n - k - 2*m)/(n - k + 1)";
  expect_identity(parts);
  parts = {};
  parts.summand = "rising(x, k)/factorial(k)";
  parts.parameters = "x = { in = \"rationals\", not = [\"integers\"] }";
  parts.recurrence = "\"1\"";
  parts.certificate = "k/x";
  expect_identity(parts);
}

}  // namespace
}  // namespace sumwright::proof::building
