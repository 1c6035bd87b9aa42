// Sorting atoms into groups; literal atoms and their values.
#include "proof/atom_keys.hpp"

#include <gtest/gtest.h>

#include <stdexcept>

#include "proof_support.hpp"

namespace sumwright::proof::building {
namespace {

using testing::affine;

class AtomKeysTest : public ::testing::Test {
 protected:
  term::Setting setting_ = testing::usual_setting();
  const algebra::RingPtr& ring_ = setting_.ring;
  [[nodiscard]] term::Atom fact(const char* text) const {
    return term::factorial_atom(ring_, affine(setting_, text));
  }
  [[nodiscard]] term::Atom rfact(const char* text) const {
    return term::reciprocal_factorial_atom(ring_, affine(setting_, text));
  }
  [[nodiscard]] term::Atom interval(const char* base, const char* low, const char* high,
                                    bool reciprocal = false) const {
    return term::interval_atom(testing::polynomial_of(setting_, base), 1, affine(setting_, low),
                               affine(setting_, high), reciprocal);
  }
};

TEST_F(AtomKeysTest, LiteralAtomsHaveTheirValues) {
  const testing::Point at{4, 2, 1, mpq_class(1, 2)};
  const std::vector<term::Atom> literal{
      fact("0"),
      fact("6"),
      rfact("5"),
      rfact("-1"),
      term::power_atom(algebra::Polynomial(ring_, 3), affine(setting_, "-4")),
      term::power_atom(testing::polynomial_of(setting_, "x"), affine(setting_, "3")),
      interval("x", "n", "n + 3"),
      interval("x", "k", "k"),
      interval("0", "-2", "2"),
      term::reciprocal_atom(ring_, algebra::Polynomial(ring_, 7))};
  for (const term::Atom& atom : literal) {
    EXPECT_TRUE(is_literal(atom));
    EXPECT_EQ(testing::value_of(literal_value(ring_, atom), at), testing::value_of(atom, at));
  }
  for (const term::Atom& atom :
       {fact("n"), rfact("k - 3"),
        term::power_atom(algebra::Polynomial(ring_, 2), affine(setting_, "n")),
        term::power_atom(testing::polynomial_of(setting_, "x"), affine(setting_, "-3")),
        interval("x", "0", "n"), interval("x", "0", "2", true),
        term::reciprocal_atom(ring_, testing::polynomial_of(setting_, "n + 1"))})
    EXPECT_FALSE(is_literal(atom));
}

// 1/(a+i) ... 1/(a+j-1), also where a has a denominator or a minus sign.
TEST_F(AtomKeysTest, ReciprocalsOfLiteralLengthAreExpanded) {
  const testing::Point at{4, 2, 1, mpq_class(1, 2)};
  const auto scaled = [&](const char* base, long scale) {
    return term::interval_atom(testing::polynomial_of(setting_, base), scale, affine(setting_, "k"),
                               affine(setting_, "k + 3"), true);
  };
  for (const term::Atom& atom : {interval("x", "0", "1", true), interval("x", "-1", "2", true),
                                 interval("-x", "2", "4", true), interval("0", "n", "n + 2", true),
                                 scaled("x", 3), scaled("1", 2), scaled("-4*x - 2", 5)}) {
    const Expanded made = expanded_reciprocal(atom);
    mpq_class value = made.constant;
    for (const term::Atom& one : made.reciprocals) value *= *testing::value_of(one, at);
    EXPECT_EQ(testing::value_of(atom, at), value);
    term::Product product;
    product.multiply(atom);
    const AtomGroups groups(ring_, product);
    EXPECT_EQ(groups.expanded.size(), 1U);
    EXPECT_TRUE(groups.intervals.empty());
    EXPECT_EQ(groups.reciprocals.empty(), made.reciprocals.empty());
  }
  EXPECT_THROW((void)expanded_reciprocal(interval("0", "-1", "1", true)), std::domain_error);
}

TEST_F(AtomKeysTest, LiteralsOutsideTheirDomainAreFaults) {
  EXPECT_THROW((void)literal_value(ring_, fact("-1")), std::logic_error);
  EXPECT_THROW((void)literal_value(ring_, fact("900000")), std::length_error);
}

TEST_F(AtomKeysTest, GroupsByLinearPart) {
  term::Product p;
  p.multiply(fact("n + 2"));
  p.multiply(fact("n"), 2);
  p.multiply(rfact("n - 1"));
  p.multiply(rfact("k"));
  p.multiply(fact("3"));
  p.multiply(interval("x", "0", "n"));
  p.multiply(interval("x", "1", "n + 1"));
  p.multiply(interval("x", "1", "k"));
  const AtomGroups groups(ring_, p);
  EXPECT_EQ(groups.factorials.size(), 2U);
  const FactorialConstants n = groups.constants(affine(setting_, "n").coefficients);
  EXPECT_EQ(n.fact, (std::vector<long>{0, 0, 2}));
  EXPECT_EQ(n.rfact, (std::vector<long>{-1}));
  EXPECT_TRUE(groups.constants(affine(setting_, "n - k").coefficients).fact.empty());
  EXPECT_EQ(groups.literals.size(), 1U);
  EXPECT_EQ(groups.intervals.size(), 2U);
}

TEST_F(AtomKeysTest, BasesNameWhatDoesNotFit) {
  const auto base = [&](const term::Atom& a, const term::Atom& b) {
    term::Product p;
    p.multiply(a);
    term::Product q;
    q.multiply(b);
    std::string why;
    EXPECT_FALSE(common_base(ring_, {p, q}, why));
    return why;
  };
  EXPECT_NE(base(fact("n"), fact("k")).find("different factorials"), std::string::npos);
  EXPECT_NE(base(interval("x", "0", "n"), interval("x", "0", "k")).find("interval products"),
            std::string::npos);
  EXPECT_NE(base(term::power_atom(algebra::Polynomial(ring_, 2), affine(setting_, "n")),
                 term::power_atom(algebra::Polynomial(ring_, 3), affine(setting_, "n")))
                .find("powers of"),
            std::string::npos);
}

}  // namespace
}  // namespace sumwright::proof::building
