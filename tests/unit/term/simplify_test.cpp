// Readable right sides: equal as functions, larger factorials.

#include "term/simplify.hpp"

#include <gtest/gtest.h>

#include <memory>

#include "term/text.hpp"

namespace sumwright::term {
namespace {

const algebra::RingPtr& ring() {
  static const algebra::RingPtr r =
      std::make_shared<algebra::Ring>(std::vector<std::string>{"n", "k"});
  return r;
}

Affine form(long n, long constant) { return Affine{{n, 0}, constant}; }

TEST(Simplify, RaisesFactorialsAndCancelsDenominators) {
  // 4 n (2n-1) (2n-2)! / (n (n!)^2) = 2 (2n)! / (n (n!)^2) ... the factor n of 2n is taken by
  // (2n)!.
  algebra::Factored rational;
  rational.constant = 4;
  rational.multiply(form(1, 0).polynomial(ring()), 2);
  rational.multiply(form(2, -1).polynomial(ring()), 1);
  Product product;
  product.multiply(factorial_atom(ring(), form(2, -2)));
  product.multiply(reciprocal_factorial_atom(ring(), form(1, 0)), 2);
  product.multiply(reciprocal_atom(ring(), form(1, 0).polynomial(ring())));
  Product before = product;
  before.coefficient.multiply(rational);
  simplify(ring(), rational, product);
  EXPECT_EQ(claim_text(rational, product), "2*factorial(2*n)/factorial(n)^2");
  Product after = product;
  after.coefficient.multiply(rational);
  const auto quotient = ratio(ring(), before, after);
  ASSERT_TRUE(quotient.has_value());
  EXPECT_EQ(quotient->constant, 1);
  EXPECT_TRUE(quotient->factors.empty());
}

TEST(Simplify, LeavesWhatDoesNotFit) {
  algebra::Factored rational;
  rational.multiply(form(1, 5).polynomial(ring()), 1);
  Product product;
  product.multiply(factorial_atom(ring(), form(1, 0)));
  simplify(ring(), rational, product);
  EXPECT_EQ(claim_text(rational, product), "(n + 5)*factorial(n)");
}

}  // namespace
}  // namespace sumwright::term
