// The meanings of atoms, products and affine forms at points.
#include "audit/atoms.hpp"

#include <gtest/gtest.h>

#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

const testing::Notation& w() {
  static const testing::Notation notation({"n", "k", "x"});
  return notation;
}

Point at(long n, long k, const numeric& x) { return {w().names(), {numeric(n), numeric(k), x}}; }

std::string shown(const proof::Atom& atom, const Point& point) {
  return text_of(value_of(atom, point));
}

proof::Atom interval(const std::string& a, long scale, const std::string& low,
                     const std::string& high, bool reciprocal) {
  proof::Atom out;
  out.kind =
      reciprocal ? proof::AtomKind::reciprocal_interval_product : proof::AtomKind::interval_product;
  out.base = w().polynomial(a);
  out.base_scale = scale;
  out.low = w().affine(low);
  out.high = w().affine(high);
  return out;
}

TEST(AuditAtoms, FactorialAndReciprocal) {
  EXPECT_EQ(shown(w().fact("n - k"), at(5, 2, 0)), "6");
  EXPECT_EQ(shown(w().fact("n - k"), at(2, 5, 0)), "no value (fact(-3))");
  EXPECT_EQ(shown(w().rfact("n - k"), at(5, 2, 0)), "1/6");
  EXPECT_EQ(shown(w().rfact("n - k"), at(2, 5, 0)), "0");
  // the law (D): rfact(m - 1) = m rfact(m) for every m
  for (long m = -3; m <= 3; ++m)
    EXPECT_TRUE(same(value_of(w().rfact("n - 1"), at(m, 0, 0)),
                     times(Value::of(m), value_of(w().rfact("n"), at(m, 0, 0)))))
        << m;
}

TEST(AuditAtoms, Power) {
  EXPECT_EQ(shown(w().power("x", "k"), at(0, -2, numeric(2, 3))), "9/4");
  EXPECT_EQ(shown(w().power("x", "k"), at(0, 0, 0)), "1");
  EXPECT_EQ(shown(w().power("x", "k"), at(0, 2, 0)), "0");
  EXPECT_EQ(shown(w().power("x", "k"), at(0, -1, 0)), "no value (0 to a negative power)");
}

TEST(AuditAtoms, IntervalProducts) {
  EXPECT_EQ(shown(interval("x", 1, "0", "n", false), at(3, 0, numeric(1, 2))), "15/8");
  EXPECT_EQ(shown(interval("1", 2, "0", "n", false), at(3, 0, 0)), "15/8");  // (1/2)(3/2)(5/2)
  EXPECT_EQ(shown(interval("x", 1, "-n", "0", false), at(2, 0, 5)), "12");   // (5-2)(5-1)
  EXPECT_EQ(shown(interval("x", 1, "0", "0", false), at(2, 0, 5)), "1");
  EXPECT_EQ(shown(interval("x", 1, "0", "n", false), at(-1, 0, 5)),
            "no value (an interval product of negative length)");
  EXPECT_EQ(shown(interval("x", 1, "0", "n", true), at(3, 0, numeric(1, 2))), "8/15");
  EXPECT_FALSE(value_of(interval("x", 1, "0", "n", true), at(3, 0, -1)).exists());
}

TEST(AuditAtoms, Reciprocal) {
  proof::Atom atom;
  atom.kind = proof::AtomKind::reciprocal;
  atom.base = w().polynomial("n + k - x");
  EXPECT_EQ(shown(atom, at(3, 1, 2)), "1/2");
  EXPECT_EQ(shown(atom, at(3, 1, 4)), "no value (the reciprocal of 0)");
}

TEST(AuditAtoms, Products) {
  const proof::Product product =
      testing::product(w().factored(mpq_class(1, 2), {{"n - k", 2}}),
                       {{w().fact("n"), 2}, {w().rfact("k"), 1}, {w().power("x", "-k"), 3}});
  // 1/2 * 4 * 36 * 1 * 2^3
  EXPECT_EQ(text_of(value_of(product, at(3, 1, numeric(1, 2)))), "576");
  EXPECT_EQ(text_of(value_of(product, at(-2, -2, 1))), "0");  // a factor 0 beside fact(-2)
  EXPECT_FALSE(value_of(product, at(-2, 0, 1)).exists());
  EXPECT_FALSE(value_of(product, at(1, 1, 0)).exists());  // a division by zero stays one
}

TEST(AuditAtoms, FactoredAndAffine) {
  EXPECT_EQ(
      text_of(value_of(w().factored(mpq_class(-1, 3), {{"n + 1", 2}, {"k", 1}}), at(2, 5, 0))),
      "-15");
  EXPECT_FALSE(value_of(w().factored(1, {{"n", -1}}), at(0, 0, 0)).exists());
  EXPECT_EQ(value_of(w().affine("2*n - 3*k + 7"), at(5, 2, 0)), 11);
  proof::Affine wrong = w().affine("n");
  wrong.coefficients[2] = 1;
  EXPECT_THROW((void)value_of(wrong, at(1, 1, numeric(1, 2))), NotAnInteger);
}

TEST(AuditAtoms, BigIntegersComeThrough) {
  for (const char* text : {"123456789012345678901234567890", "-18446744073709551616", "4294967296",
                           "-9223372036854775808", "0"}) {
    EXPECT_EQ(text_of(to_numeric(mpz_class(text))), text);
  }
  EXPECT_EQ(text_of(to_numeric(mpq_class("-6/123456789012345678901234567891"))),
            "-6/123456789012345678901234567891");
}

}  // namespace
}  // namespace sumwright::audit
