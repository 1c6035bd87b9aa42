// Sums and printed recurrences against published sequences (OEIS).
//
// A slip of memory in a list fails under the list's number; only lists that pass are held against
// the program.
#include "external/sequences.hpp"

#include <gtest/gtest.h>

#include <algorithm>
#include <stdexcept>

#include "external/expressions.hpp"
#include "external/printed.hpp"
#include "term/evaluation.hpp"

namespace sumwright::testing {
namespace {

constexpr std::size_t kFewestTerms = 10;

class Lists : public ::testing::TestWithParam<Sequence> {};

TEST_P(Lists, AgreeWithASecondRoute) {
  const Sequence& sequence = GetParam();
  EXPECT_GE(sequence.terms.size(), kFewestTerms);
  const std::vector<mpz_class> counted = sequence.route(sequence.terms.size());
  ASSERT_EQ(counted.size(), sequence.terms.size());
  for (std::size_t i = 0; i < counted.size(); ++i) {
    EXPECT_EQ(sequence.terms[i], counted[i])
        << "the list of " << sequence.number << " (" << sequence.title << ") is wrong at place "
        << i << " by " << sequence.how;
  }
}

INSTANTIATE_TEST_SUITE_P(OEIS, Lists, ::testing::ValuesIn(sequences()),
                         [](const auto& about) { return about.param.number; });

const Sequence& find(const std::string& number) {
  const std::vector<Sequence>& all = sequences();
  const auto at =
      std::find_if(all.begin(), all.end(), [&](const Sequence& s) { return s.number == number; });
  if (at == all.end()) throw std::invalid_argument("no list " + number);
  return *at;
}

/// S(from), S(from+1), ... as published.
std::vector<mpq_class> published(const SequenceOf& about, const claim::Claim& claim) {
  const Sequence& sequence = find(about.number);
  std::vector<mpq_class> out;
  for (std::size_t i = about.first; i < sequence.terms.size(); ++i) {
    const mpz_class n = claim.from + static_cast<long>(i - about.first);
    const bool minus = about.alternating && mpz_odd_p(n.get_mpz_t()) != 0;
    out.emplace_back(minus ? mpz_class(-sequence.terms[i]) : sequence.terms[i]);
  }
  return out;
}

/// S(from), S(from+1), ... from the first of `values` by the recurrence with `change` added to one
/// coefficient; shorter than `values` where the leading coefficient is 0.
std::vector<mpq_class> unrolled(const Recurrence& recurrence, const claim::Claim& claim,
                                const Values& parameters, const std::vector<mpq_class>& values,
                                std::size_t changed, long change) {
  const std::size_t order = recurrence.coefficients.size() - 1;
  std::vector<mpq_class> out(values.begin(), values.begin() + static_cast<long>(order));
  while (out.size() < values.size()) {
    const std::size_t start = out.size() - order;
    Values at = parameters;
    at[claim.running] = claim.from + static_cast<long>(start);
    std::vector<mpq_class> a = recurrence.coefficients_at(at);
    a.at(changed) += change;
    if (a[order] == 0) break;
    mpq_class rest = recurrence.right_side ? exact_value(*recurrence.right_side, at) : mpq_class(0);
    for (std::size_t i = 0; i < order; ++i) rest -= a[i] * out[start + i];
    out.emplace_back(rest / a[order]);
  }
  return out;
}

class PublishedValues : public ::testing::TestWithParam<SequenceOf> {};

TEST_P(PublishedValues, AreThoseOfTheSumAndOfTheRecurrences) {
  const SequenceOf& about = GetParam();
  const Sequence& list = find(about.number);
  ASSERT_EQ(list.terms, list.route(list.terms.size()))
      << "the list of " << list.number << " is wrong; the program is not judged by it";
  const Printed printed = printed_for(about.file);
  const claim::Claim& claim = *printed.claim;
  const std::vector<mpq_class> values = published(about, claim);
  ASSERT_GE(values.size(), kFewestTerms);
  for (std::size_t i = 0; i < values.size(); ++i) {
    Values at = about.parameters;
    at[claim.running] = claim.from + static_cast<long>(i);
    const term::Value sum = term::evaluate_sum(claim.sum, at);
    ASSERT_TRUE(sum.number) << sum.why_not;
    EXPECT_EQ(*sum.number, values[i]) << "place " << i;
  }
  for (const Recurrence& recurrence : printed.recurrences) {
    SCOPED_TRACE(recurrence.how);
    EXPECT_EQ(unrolled(recurrence, claim, about.parameters, values, 0, 0), values);
    for (std::size_t i = 0; i < recurrence.coefficients.size(); ++i) {
      EXPECT_NE(unrolled(recurrence, claim, about.parameters, values, i, 1), values)
          << "coefficient " << i << " plus 1 is not noticed";
    }
  }
}

std::string test_name(const SequenceOf& about) {
  std::string out = about.file.substr(about.file.rfind('/') + 1);
  out.resize(out.rfind('.'));
  std::replace(out.begin(), out.end(), '-', '_');
  return about.number + "_" + out;
}

INSTANTIATE_TEST_SUITE_P(OEIS, PublishedValues, ::testing::ValuesIn(sequence_claims()),
                         [](const auto& about) { return test_name(about.param); });

}  // namespace
}  // namespace sumwright::testing
