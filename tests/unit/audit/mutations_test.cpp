// One ingredient of a right proof is changed; the checks that must notice do, and no others.
#include <gtest/gtest.h>

#include <cstdlib>
#include <functional>
#include <iostream>
#include <set>

#include "audit/audit.hpp"
#include "sample_proofs.hpp"

namespace sumwright::audit {
namespace {

using testing::Notation;
using Checks = std::set<std::string>;

/// The names of the disagreeing checks, and their details joined.
struct Outcome {
  Checks disagree;
  std::string details;
};

Outcome outcome(const proof::Proof& proof, const AuditOptions& options = {}) {
  Outcome out;
  for (const Finding& finding : audit(proof, options).findings)
    if (!finding.agrees) {
      out.disagree.insert(finding.check);
      out.details += finding.check + ": " + finding.detail + "\n";
    }
  return out;
}

void expect_disagreement(const proof::Proof& proof, const Checks& expected,
                         const std::string& detail) {
  const Outcome found = outcome(proof);
  EXPECT_EQ(found.disagree, expected) << found.details;
  EXPECT_NE(found.details.find(detail), std::string::npos) << found.details;
  if (std::getenv("AUDIT_SHOW") != nullptr) std::cout << found.details;
}

const Notation& w() {
  static const Notation notation({"n", "k"});
  return notation;
}

// ---------------------------------------------------------------- the equality

TEST(Mutations, ACoefficient) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->coefficients[0] = w().factored(-2, {{"2*n + 3", 1}});
  expect_disagreement(proof,
                      {"polynomial equality", "normal form", "term identity at points",
                       "balance with the closed form", "recurrence as printed"},
                      "at n = 0, k = 0");
}

TEST(Mutations, ACoefficientThatHidesInTheProportion) {
  // all coefficients and the certificate times n - 3: the equality holds, the recurrence is void at
  // 3
  proof::Proof proof = testing::squares_proof();
  for (proof::Factored& one : proof.telescoping->coefficients)
    one.factors.emplace_back(w().polynomial("n - 3"), 1);
  proof.telescoping->certificate = w().polynomial("(n - 3)*(2*k - 3*n - 3)");
  expect_disagreement(proof, {"normal form", "leading coefficient", "recurrence as printed"},
                      "void at n = 3");
}

TEST(Mutations, APolynomialP) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->p[0] = w().factored(1, {{"n - k", 1}, {"n + 1 - k", 1}});
  expect_disagreement(proof,
                      {"polynomial equality", "normal form", "shifted terms over the base term"},
                      "F(n+0,k) against p B at n = 0, k = 0: 1 against 0");
}

TEST(Mutations, TheCertificate) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->certificate = w().polynomial("2*k - 3*n - 4");
  expect_disagreement(proof, {"polynomial equality", "term identity at points"}, "the residue is");
}

TEST(Mutations, TheFactorUp) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->up = w().factored(1, {{"n + 1 - k", 1}, {"n + 2 - k", 1}});
  expect_disagreement(
      proof, {"polynomial equality", "term identity at points", "certificate over the base term"},
      "down(n,k+1) B(n,k+1)");
}

TEST(Mutations, TheFactorDown) {
  proof::Proof proof = testing::halves_proof();
  proof.telescoping->down = w().factored(2, {{"k + 1", 1}});
  expect_disagreement(proof,
                      {"polynomial equality", "term identity at points",
                       "certificate over the base term", "balance with the closed form"},
                      "the lower end in balance closed_recurrence at n = 0");
}

TEST(Mutations, TheWeight) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->weight.polynomial = w().factored(2, {});
  expect_disagreement(proof, {"polynomial equality", "normal form", "term identity at points"},
                      "n = 0, k = 0: -2 against -1");
}

TEST(Mutations, AWeightThatVanishes) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->weight.polynomial = w().factored(1, {{"n - 4", 1}});
  proof.telescoping->weight.condition = "c1";
  const Outcome found = outcome(proof);
  EXPECT_EQ(found.disagree.count("nonvanishing conditions"), 1U) << found.details;
  EXPECT_NE(found.details.find("a factor has no reason"), std::string::npos) << found.details;
}

TEST(Mutations, TheNormalForm) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->normal_scale *= 2;
  expect_disagreement(proof, {"normal form"}, "the residue is");
  proof = testing::squares_proof();
  for (proof::Monomial& one : proof.telescoping->normal_form.terms) one.coefficient *= -1;
  proof.telescoping->normal_scale *= -1;
  expect_disagreement(proof, {"normal form"}, "not primitive");
}

TEST(Mutations, ACoefficientWithTheIndex) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->weight.polynomial = w().factored(1, {{"k + 1", 1}});
  proof.telescoping->weight.condition = "c1";
  EXPECT_NE(outcome(proof).details.find("contains the index"), std::string::npos);
}

// ---------------------------------------------------------------- terms and base

TEST(Mutations, ABaseAtom) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->base.product.atoms[2].first = w().rfact("n + 2 - k");
  expect_disagreement(proof,
                      {"term identity at points", "shifted terms over the base term",
                       "certificate over the base term"},
                      "against p B at n = 0, k = 0");
}

TEST(Mutations, AnInstance) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->shifts[1][0].right.coefficient = w().factored(1, {{"n + 1", 1}});
  expect_disagreement(proof, {"shifted terms over the base term"},
                      "instance shift_1 (F(n+1,k)) at n = 1");
}

TEST(Mutations, AStepOfAnInstance) {
  proof::Proof proof = testing::squares_proof();
  proof::AtomStep step;
  step.from = w().rfact("n - k");
  step.to = w().rfact("n + 1 - k");
  step.steps = 1;
  step.factor = w().factored(1, {{"n + 1 - k", 1}});
  proof.telescoping->shifts[0][0].steps = {step};
  expect_disagreement(proof, {}, "");
  proof.telescoping->shifts[0][0].steps[0].factor = w().factored(1, {{"n - k", 1}});
  expect_disagreement(proof, {"shifted terms over the base term"}, "a step of instance shift_0");
}

TEST(Mutations, AUnitThatIsNone) {
  proof::Proof proof = testing::squares_proof();
  proof::Unit unit;
  unit.left = w().fact("n - k");
  unit.right = w().rfact("n - k");
  unit.condition = "c2";
  proof.telescoping->shifts[0][0].left_units = {unit};
  expect_disagreement(proof, {"shifted terms over the base term"},
                      "should have the product 1 at n = 0, k = 1");
}

TEST(Mutations, ARegionThatIsTooNarrow) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->region = w().region({"n", "k", "n - k"});
  expect_disagreement(proof, {"term identity at points"}, "leaves out n = 0, k = 1");
  proof = testing::squares_proof();
  proof.telescoping->shifts[0][0].region = w().region({"n - 1"});
  expect_disagreement(proof, {"shifted terms over the base term"}, "leaves out n = 0");
}

TEST(Mutations, AProductOfTheSummand) {
  proof::Proof proof = testing::squares_proof();
  proof.summand.products[0].coefficient = w().factored(2, {});
  expect_disagreement(proof, {"summand as atoms", "shifted terms over the base term", "ranges"},
                      "expression against atoms at n = 0, k = 0: 1 against 2");
}

TEST(Mutations, ALeaf) {
  proof::Proof proof = testing::squares_proof();
  proof.summand.leaves[0].value.atoms[0].first = w().fact("n + 1");
  expect_disagreement(proof, {"summand as atoms"}, "binomial(n, k) at n = 1, k = 0: 1 against 2");
}

TEST(Mutations, TheRegionOfTheSummand) {
  proof::Proof proof = testing::squares_proof();
  proof.summand.region = w().region({"n - 1", "k", "n - k - 1"});
  expect_disagreement(proof, {"summand as atoms"}, "leaves out n = 0, k = 0");
}

// ---------------------------------------------------------------- ranges and balances

TEST(Mutations, TheRangePoints) {
  proof::Proof proof = testing::halves_proof();
  proof.ranges[1].high_points = 0;
  expect_disagreement(proof, {"ranges", "balance with the closed form"},
                      "S(n+1) against the common range at n = 0, k = 0: 2 against 1");
  proof = testing::halves_proof();
  proof.ranges[1].high_points = 2;
  expect_disagreement(proof, {"ranges", "balance with the closed form"}, "0: 2 against 11/4");
}

TEST(Mutations, AVanishingReasonIsMissing) {
  proof::Proof proof = testing::squares_proof();
  proof.ranges[0].above.reset();
  expect_disagreement(proof, {"ranges"}, "no reason why F(n+0,k) at n = 0, k = 1");
}

TEST(Mutations, AVanishingAtom) {
  proof::Proof proof = testing::squares_proof();
  proof.ranges[0].above->atoms[0] = w().rfact("n + 1 - k");
  expect_disagreement(proof, {"ranges"}, "the atom does not vanish: F(n+0,k) at n = 0, k = 1");
}

TEST(Mutations, ACommonRangeThatIsTooShort) {
  proof::Proof proof = testing::squares_proof();
  proof.telescoping->high = w().affine("n");
  const Outcome found = outcome(proof);
  EXPECT_EQ(found.disagree, (Checks{"ranges", "balance with the closed form"})) << found.details;
}

TEST(Mutations, ARangeShorterThanEmpty) {
  proof::Proof proof = testing::halves_proof();
  proof.telescoping->high = w().affine("n - 3");
  EXPECT_NE(outcome(proof).details.find("shorter than empty at n = 0"), std::string::npos);
}

TEST(Mutations, APolynomialOfABalance) {
  proof::Proof proof = testing::squares_proof();
  proof.closed_recurrence->groups[0].polynomials[0] = w().factored(2, {{"n + 1", 3}});
  expect_disagreement(proof, {"balance with the closed form"},
                      "do not add up to 0: the residue is -2*n^3");
}

TEST(Mutations, ATermOfABalance) {
  proof::Proof proof = testing::squares_proof();
  proof.closed_recurrence->terms[2].product.coefficient = w().factored(2, {{"2*n + 3", 1}});
  expect_disagreement(proof, {"balance with the closed form"},
                      "left side of the instance of a_0 C(n)");
}

TEST(Mutations, ABalanceOfSomethingElse) {
  // true, 0 = 0, but not the balance that the argument needs
  proof::Proof proof = testing::halves_proof();
  proof.closed_recurrence->terms.erase(proof.closed_recurrence->terms.begin() + 3,
                                       proof.closed_recurrence->terms.end());
  proof.closed_recurrence->groups.pop_back();
  expect_disagreement(proof, {}, "");  // a_0 C(n) + a_1 C(n+1) = 0 here, so nothing is missing
  proof.closed_recurrence->terms.clear();
  proof.closed_recurrence->groups.clear();
  expect_disagreement(proof, {"balance with the closed form"},
                      "0 explicit terms in balance closed_recurrence for 1 explicit points");
}

TEST(Mutations, AnEndOfAnotherOrigin) {
  // the balance stays true, but its upper end is not the one that telescoping leaves
  proof::Proof proof = testing::halves_proof();
  std::swap(proof.closed_recurrence->terms[0].origin, proof.closed_recurrence->terms[1].origin);
  expect_disagreement(proof, {"balance with the closed form"},
                      "the upper end in balance closed_recurrence at n = 0");
}

TEST(Mutations, ATermInNoGroup) {
  proof::Proof proof = testing::squares_proof();
  proof.closed_recurrence->groups.clear();
  expect_disagreement(proof, {"balance with the closed form"}, "a_0 C(n) is in 0 groups");
}

TEST(Mutations, AZeroThatIsNone) {
  proof::Proof proof = testing::halves_proof();
  proof.closed_recurrence->terms[0].zero = "polynomial factor";
  expect_disagreement(proof, {"balance with the closed form"}, "the term G(n, n+1) is in 1 groups");
}

TEST(Mutations, AZeroAtomThatDoesNotVanish) {
  proof::Proof proof = testing::squares_proof();
  proof.closed_recurrence->terms[0].zero_atom = w().rfact("n");
  expect_disagreement(proof, {"balance with the closed form"}, "is no reason at n = 0");
}

// ---------------------------------------------------------------- the conclusion

TEST(Mutations, TheClosedForm) {
  proof::Proof proof = testing::squares_proof();
  proof.closed->products[0].atoms[1].first = w().rfact("n + 1");
  expect_disagreement(proof, {"closed form as atoms"}, "at n = 1");
}

TEST(Mutations, TheLeadingCoefficient) {
  proof::Proof proof = testing::squares_proof();
  proof.leading->polynomial = w().factored(1, {{"n - 17", 1}});
  proof.leading->factors[0].factor = w().polynomial("n - 17");
  expect_disagreement(proof, {"leading coefficient"}, "is 0 at n = 17");
}

TEST(Mutations, APositivityThatIsNone) {
  proof::Proof proof = testing::squares_proof();
  proof.leading->factors[0].method = proof::NonzeroFactor::Method::positive;
  proof.leading->factors[0].shift = {0, 0};
  expect_disagreement(proof, {}, "");
  proof.leading->factors[0].shift = {-1, 0};
  expect_disagreement(proof, {"leading coefficient"}, "has no positive constant term");
  proof.leading->factors[0].shift = {1, 0};
  expect_disagreement(proof, {"leading coefficient"}, "no lower bound at n = 0");
  proof.leading->factors[0].shift = {0, 0};
  proof.leading->factors[0].negated = true;
  expect_disagreement(proof, {"leading coefficient"}, "has no positive constant term");
}

TEST(Mutations, AnInitialValueIsMissing) {
  proof::Proof proof = testing::squares_proof();
  proof.initial.clear();
  expect_disagreement(proof, {"argument without gaps"}, "the induction has no value at n = 0");
}

TEST(Mutations, AnInitialValueIsWrong) {
  proof::Proof proof = testing::squares_proof();
  proof.initial[0].value = 2;
  expect_disagreement(proof, {"initial values"}, "stated value at n = 0, k = 0: 1 against 2");
  proof = testing::squares_proof();
  proof.initial[0].sums[0].high = -1;
  expect_disagreement(proof, {"initial values"}, "S(0) over 0..-1");
  proof = testing::squares_proof();
  proof.initial[0].balance.terms[0].product.coefficient = w().factored(3, {});
  expect_disagreement(proof, {"initial values"},
                      "the initial balance against the sum at n = 0, k = 0: 3 against 1");
}

TEST(Mutations, TheThreshold) {
  proof::Proof proof = testing::squares_proof();
  proof.threshold = 1;
  expect_disagreement(proof, {"argument without gaps"}, "the induction has no value at n = 1");
  proof = testing::squares_proof();
  proof.threshold = -1;
  expect_disagreement(proof, {"argument without gaps"}, "threshold -1 below from 0");
  proof = testing::squares_recurrence_proof();
  proof.threshold = 1;
  expect_disagreement(proof, {"argument without gaps"}, "the induction has no value at n = 0");
}

TEST(Mutations, PartsAreMissing) {
  proof::Proof proof = testing::squares_proof();
  proof.leading.reset();
  expect_disagreement(proof, {"argument without gaps"}, "the leading coefficient");
  proof = testing::squares_proof();
  proof.closed_recurrence.reset();
  expect_disagreement(proof, {"argument without gaps"}, "the balance with the closed form");
  proof = testing::squares_recurrence_proof();
  proof.ends.reset();
  expect_disagreement(proof, {"argument without gaps"}, "the balance of the ends");
  proof = testing::squares_proof();
  proof.ranges.pop_back();
  expect_disagreement(proof, {"argument without gaps"}, "1 range steps for order 1");
  proof = testing::squares_proof();
  proof.order = 2;
  EXPECT_EQ(outcome(proof).disagree, (Checks{"argument without gaps"}));
}

TEST(Mutations, AProofOfAnotherClaim) {
  proof::Proof proof = testing::squares_proof();
  proof.claim = testing::halves_proof().claim;
  expect_disagreement(proof, {"argument without gaps"}, "the author's summand");
  // same trees, another closed form
  proof = testing::squares_proof();
  auto other = std::make_shared<claim::Claim>(*proof.claim);
  other->closed = testing::halves_proof().claim->closed;
  proof.claim = other;
  expect_disagreement(proof, {"argument without gaps"}, "the author's closed form");
}

TEST(Mutations, AnotherRecurrenceThanTheClaimed) {
  proof::Proof proof = testing::squares_recurrence_proof();
  proof.claim = testing::read_claim(testing::squares_claim_text() +
                                    "[evidence]\nrecurrence = [\"-4*n\", \"2*(n + 1)\"]\n");
  proof.summand.expression = proof.claim->sum.summand;
  expect_disagreement(proof, {"claimed recurrence", "sums added up"},
                      "coefficients 0 and 1, crosswise at n = 0");
}

TEST(Mutations, ARecurrenceClaimedWithARightSide) {
  proof::Proof proof = testing::squares_recurrence_proof();
  proof.claim = testing::read_claim(
      testing::squares_claim_text() +
      "[evidence]\nrecurrence = [\"-2*(2*n + 1)\", \"n + 1\"]\nright_side = \"1\"\n");
  proof.summand.expression = proof.claim->sum.summand;
  expect_disagreement(proof, {"balance of the ends", "sums added up"},
                      "the right side in balance ends at n = 0, k = 0: 0 against -1");
}

TEST(Mutations, APrintedRecurrence) {
  proof::Proof proof = testing::squares_proof();
  proof.recurrence_text[1] = "n + 2";
  expect_disagreement(proof, {"recurrence as printed"}, "crosswise at n = 0");
  proof.recurrence_text[1] = "n +";
  expect_disagreement(proof, {"recurrence as printed"}, "not an expression");
  proof = testing::squares_proof();
  proof.right_side_text = "1";
  expect_disagreement(proof, {"recurrence as printed"}, "the printed recurrence at n = 0");
}

// ---------------------------------------------------------------- hypotheses

TEST(Mutations, AConditionLeftOpen) {
  proof::Proof proof = testing::squares_proof();
  proof.conditions[0].settled = proof::Settled::open;
  expect_disagreement(proof, {"nothing assumed beyond the claim"}, "c1 (n + 1 != 0) is open");
}

TEST(Mutations, AHypothesisInvented) {
  proof::Proof proof = testing::powers_proof();
  proof.conditions.push_back({"c9", proof::ConditionKind::hypothesis, "x != 0", "",
                              proof::Settled::given, "hypothesis x != 0"});
  expect_disagreement(proof, {"nothing assumed beyond the claim"},
                      "rests on 'hypothesis x != 0', which the claim does not contain");
  // a hypothesis of the claim does not give what does not follow from it
  proof.conditions.back().method = "hypothesis x != -1";
  expect_disagreement(proof, {"nothing assumed beyond the claim"}, "x = 0");
}

TEST(Mutations, AConditionThatIsNotRecorded) {
  proof::Proof proof = testing::squares_proof();
  proof.ranges[0].above->condition = "c7";
  expect_disagreement(proof, {"argument without gaps"}, "no condition called 'c7'");
}

TEST(Mutations, AnExclusionThatTheClaimDoesNotHave) {
  const Notation x({"n", "k", "x"});
  proof::Proof proof = testing::powers_proof();
  proof::NonzeroFactor factor;
  factor.factor = x.polynomial("x + 1");
  factor.method = proof::NonzeroFactor::Method::excluded;
  factor.parameter = 2;
  factor.exclusion = 0;
  proof.telescoping->weight.polynomial = x.factored(1, {{"x + 1", 1}});
  proof.telescoping->weight.factors = {factor};
  proof.telescoping->weight.condition = "c4";
  Outcome found = outcome(proof);  // other checks see the changed weight
  EXPECT_EQ(found.disagree.count("nonvanishing conditions"), 0U) << found.details;
  proof.telescoping->weight.factors[0].exclusion = 1;
  found = outcome(proof);
  EXPECT_NE(found.details.find("names an entry that the claim does not have"), std::string::npos)
      << found.details;
  proof.telescoping->weight.polynomial = x.factored(1, {{"x - 5", 1}});
  proof.telescoping->weight.factors[0].factor = x.polynomial("x - 5");
  proof.telescoping->weight.factors[0].exclusion = 0;
  found = outcome(proof);
  EXPECT_NE(found.details.find("parameter minus excluded value"), std::string::npos)
      << found.details;
}

TEST(Mutations, AFormThatIsNoInteger) {
  proof::Proof proof = testing::powers_proof();
  proof.telescoping->base.product.atoms[1].first.argument.coefficients[2] = 1;  // rfact(k + x)
  const Outcome found = outcome(proof);
  EXPECT_EQ(found.disagree.count("term identity at points"), 1U) << found.details;
  EXPECT_NE(found.details.find("an integer was expected"), std::string::npos) << found.details;
}

TEST(Mutations, TheIndexWhereItHasBeenSummedOver) {
  proof::Proof proof = testing::squares_proof();
  proof.closed->products[0].atoms[1].first = w().rfact("n + k");
  expect_disagreement(proof, {"argument without gaps"}, "the index occurs in closed");
  proof = testing::squares_proof();
  proof.closed_recurrence->terms[2].product.atoms[0].first = w().fact("2*n - k");
  expect_disagreement(proof, {"argument without gaps"}, "the index occurs in balance");
  proof = testing::squares_proof();
  proof.telescoping->high = w().affine("n + 1 + k");
  expect_disagreement(proof, {"argument without gaps"}, "a symbol too many");
}

TEST(Mutations, TheAuthorsRecurrenceAgainstTheClearedOne) {
  // written with a denominator, proved without
  const auto original = testing::read_claim(
      testing::squares_claim_text() + "[evidence]\nrecurrence = [\"-4 + 2/(n + 1)\", \"1\"]\n");
  proof::Proof proof = testing::squares_recurrence_proof();
  auto cleared = std::make_shared<claim::Claim>(*original);
  cleared->evidence = proof.claim->evidence;
  proof.claim = cleared;
  proof.summand.expression = original->sum.summand;
  AuditOptions options;
  options.original = original.get();
  EXPECT_EQ(outcome(proof, options).disagree, Checks{}) << outcome(proof, options).details;
  const auto other = testing::read_claim(testing::squares_claim_text() +
                                         "[evidence]\nrecurrence = [\"-4 + 3/(n + 1)\", \"1\"]\n");
  auto renamed = std::make_shared<claim::Claim>(*other);
  renamed->sum = original->sum;  // the same trees, so that only the recurrence differs
  options.original = renamed.get();
  EXPECT_EQ(outcome(proof, options).disagree, Checks{"recurrence as the author wrote it"})
      << outcome(proof, options).details;
  auto assumed = std::make_shared<claim::Claim>(*original);
  assumed->from = 1;
  options.original = assumed.get();
  EXPECT_EQ(outcome(proof, options).disagree, Checks{"nothing assumed beyond the claim"});
}

// ---------------------------------------------------------------- the sums themselves

TEST(Mutations, AFalseClosedForm) {
  // every part changed together, so that only the sums can tell: 2^n proved for another start
  proof::Proof proof = testing::halves_proof();
  auto false_claim = std::make_shared<claim::Claim>(*proof.claim);
  false_claim->closed = testing::read_claim(R"(
format = 1
title = "t"
running = "n"
from = 0
[sum]
summand = "1"
over = [ { index = "k", low = 0, high = "n" } ]
[equals]
closed = "3*2^n"
)")
                            ->closed;
  proof.claim = false_claim;
  proof.closed->expression = false_claim->closed;
  proof.closed->products[0].coefficient = w().factored(3, {});
  expect_disagreement(proof, {"initial values", "sums added up"},
                      "the claim at n = 0, k = 0: 1 against 3");
}

}  // namespace
}  // namespace sumwright::audit
