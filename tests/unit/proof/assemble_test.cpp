// The finished Proof as plain data: every reference leads somewhere, nothing is open or missing.
#include <gtest/gtest.h>

#include <filesystem>
#include <iostream>
#include <set>

#include "proof_support.hpp"

namespace sumwright::proof {
namespace {

namespace fs = std::filesystem;

class Walk {
 public:
  explicit Walk(const Proof& proof) : proof_(proof) {
    for (const Condition& c : proof.conditions) {
      EXPECT_TRUE(ids_.insert(c.id).second) << "twice: " << c.id;
      EXPECT_FALSE(c.text.empty());
      EXPECT_FALSE(c.method.empty()) << c.id;
      EXPECT_NE(c.settled, Settled::open) << c.id << " " << c.text;
    }
  }

  void conversion(const Conversion& c) {
    EXPECT_FALSE(c.id.empty());
    EXPECT_TRUE(c.expression);
    EXPECT_EQ(c.products.size(), c.units.size());
    for (const Leaf& leaf : c.leaves) all(leaf.conditions);
    for (const Denominator& d : c.denominators) all(d.conditions);
    for (const PowerMerge& m : c.merges) all(m.conditions);
    for (const Product& p : c.products) product(p);
    all(c.definedness);
  }
  void instance(const Instance& i) {
    product(i.left);
    product(i.right);
    for (const AtomStep& s : i.steps) all(s.conditions);
    for (const auto* units : {&i.left_units, &i.right_units})
      for (const Unit& u : *units) id(u.condition);
  }
  void balance(const Balance& b) {
    std::set<std::size_t> grouped;
    for (std::size_t g = 0; g < b.groups.size(); ++g) {
      EXPECT_EQ(b.groups[g].members.size(), b.groups[g].polynomials.size());
      for (std::size_t m : b.groups[g].members) {
        ASSERT_LT(m, b.terms.size());
        EXPECT_EQ(b.terms[m].group, g);
        EXPECT_TRUE(grouped.insert(m).second);
        ASSERT_TRUE(b.terms[m].instance);
        instance(*b.terms[m].instance);
      }
    }
    for (std::size_t i = 0; i < b.terms.size(); ++i)
      EXPECT_EQ(grouped.contains(i), !b.terms[i].zero) << b.id << " term " << i;
  }
  void run() {
    conversion(proof_.summand);
    if (proof_.closed) conversion(*proof_.closed);
    if (proof_.right_side) conversion(*proof_.right_side);
    EXPECT_NE(proof_.ends.has_value(), proof_.closed_recurrence.has_value());
    if (proof_.ends) balance(*proof_.ends);
    if (proof_.closed_recurrence) balance(*proof_.closed_recurrence);
    for (const InitialValue& v : proof_.initial) balance(v.balance);
    if (!proof_.telescoping) return;
    const Telescoping& t = *proof_.telescoping;
    EXPECT_EQ(t.coefficients.size(), proof_.order + 1);
    EXPECT_EQ(t.shifts.size(), t.coefficients.size());
    EXPECT_EQ(t.p.size(), t.coefficients.size());
    EXPECT_EQ(proof_.ranges.size(), t.coefficients.size());
    for (const auto& shift : t.shifts) {
      EXPECT_EQ(shift.size(), proof_.summand.products.size());
      for (const Instance& i : shift) instance(i);
    }
    EXPECT_EQ(t.index_shift.has_value(), !t.certificate.terms.empty());
    all(t.conditions);
    for (std::size_t i = 0; i < proof_.ranges.size(); ++i) EXPECT_EQ(proof_.ranges[i].shift, i);
  }

 private:
  void id(const std::string& name) { EXPECT_TRUE(ids_.contains(name)) << "'" << name << "'"; }
  void all(const std::vector<std::string>& names) {
    for (const std::string& name : names) id(name);
  }
  void product(const Product& p) {
    for (const auto& [atom, e] : p.atoms) {
      EXPECT_GT(e, 0U);
      EXPECT_EQ(atom.argument.coefficients.size(), proof_.symbols.size());
    }
    for (const auto& [f, e] : p.coefficient.factors) {
      EXPECT_GT(e, 0);
      EXPECT_FALSE(f.terms.empty());
    }
  }

  const Proof& proof_;
  std::set<std::string> ids_;
};

TEST(Assemble, ProofsOfTheCorpusAreComplete) {
  std::size_t proofs = 0;
  for (const char* folder : {"exemplars", "tests/corpus"})
    for (const auto& entry :
         fs::recursive_directory_iterator(fs::path(SUMWRIGHT_SOURCE_DIR) / folder)) {
      if (entry.path().extension() != ".toml") continue;
      SCOPED_TRACE(entry.path().string());
      const auto claim = std::make_shared<claim::Claim>(claim::read_claim_file(entry.path()).claim);
      const Proof proof = build(claim);
      ASSERT_EQ(testing::name_of(proof.verdict), "established") << proof.reason;
      Walk(proof).run();
      ++proofs;
    }
  std::cout << proofs << " proofs\n";
  EXPECT_GE(proofs, 50U);
}

// The conditions of an argument that is not there are still reported, the open one among them.
TEST(Assemble, OpenConditionsAreReported) {
  testing::ClaimParts parts;
  parts.parameters = "m = { in = \"integers\", at_least = 0 }";
  parts.summand = "factorial(m - k)";
  parts.assume = "\"m >= 60\"";
  const Proof proof = testing::decide(parts);
  EXPECT_EQ(testing::name_of(proof.verdict), "undecided");
  EXPECT_TRUE(testing::has_open_condition(proof));
}

}  // namespace
}  // namespace sumwright::proof
