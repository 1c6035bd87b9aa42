// Printed recurrences against Arb's functions at large n.
//
// The ball of sum_i a_i(n) S(n+i) - b(n) must contain 0 while its radius is below 2^-100 of every
// single term, so that no term could be wrong unseen; with any coefficient changed by 1, or the
// right side doubled, it must not contain 0, at the same demand.
#include <gtest/gtest.h>

#include <algorithm>
#include <optional>

#include "external/expressions.hpp"
#include "external/functions.hpp"
#include "external/printed.hpp"
#include "term/evaluation.hpp"

namespace sumwright::testing {
namespace {

constexpr long kNarrow = 100;  // bits
constexpr long kFirstPrecision = 256;
constexpr long kLastPrecision = 1L << 18U;
constexpr long kSmallValues = 9;

/// A change of one part of a recurrence.
struct Change {
  std::optional<std::size_t> coefficient;  ///< this coefficient plus 1
  bool right_side = false;                 ///< twice the right side
};

/// The terms of one recurrence at one point and precision.
class Terms {
 public:
  Terms(const Recurrence& recurrence, const Values& at, const std::vector<Ball>& values,
        const Balls& balls, const Change& change) {
    std::vector<mpq_class> a = recurrence.coefficients_at(at);
    if (change.coefficient) a.at(*change.coefficient) += 1;
    total_ = balls.number(0);
    for (std::size_t i = 0; i < a.size(); ++i) {
      if (a[i] != 0) add(balls.product(balls.number(a[i]), values.at(i)), balls);
    }
    if (recurrence.right_side) {
      const Ball factor = balls.number(change.right_side ? -2 : -1);
      add(balls.product(factor, ball_value(*recurrence.right_side, at, balls)), balls);
    }
  }

  /// Whether the total is narrow beside every term.
  [[nodiscard]] bool narrow() const {
    return !terms_.empty() && std::all_of(terms_.begin(), terms_.end(), [this](const Ball& term) {
      return total_.is_narrow(term, kNarrow);
    });
  }
  [[nodiscard]] const Ball& total() const { return total_; }

 private:
  void add(Ball term, const Balls& balls) {
    total_ = balls.sum(total_, term);
    terms_.push_back(std::move(term));
  }

  std::vector<Ball> terms_;
  Ball total_;
};

/// S(n), S(n+1), ... of one function, kept for every precision.
class Row {
 public:
  Row(const KnownFunction& function, Values parameters)
      : function_(function), parameters_(std::move(parameters)) {}

  const Ball& value(const mpz_class& n, long bits) {
    const auto key = std::make_pair(n, bits);
    const auto known = values_.find(key);
    if (known != values_.end()) return known->second;
    return values_.emplace(key, function_.value(Balls(bits), n, parameters_)).first->second;
  }

  /// The total, at a precision at which it is narrow; a total that is not finite when there is
  /// none.
  Ball total(const Recurrence& recurrence, const std::string& running, const mpz_class& n,
             const Change& change) {
    Values at = parameters_;
    at[running] = n;
    for (long bits = kFirstPrecision; bits <= kLastPrecision; bits *= 2) {
      std::vector<Ball> values;
      for (std::size_t i = 0; i < recurrence.coefficients.size(); ++i) {
        values.push_back(value(n + static_cast<long>(i), bits));
      }
      const Terms terms(recurrence, at, values, Balls(bits), change);
      if (terms.narrow()) return terms.total();
    }
    ADD_FAILURE() << "no narrow ball at n = " << n << " up to " << kLastPrecision << " bits";
    return Balls(kFirstPrecision).quotient(Ball(), Ball());
  }

 private:
  const KnownFunction& function_;
  Values parameters_;
  std::map<std::pair<mpz_class, long>, Ball> values_;
};

std::string text(const Values& at) {
  std::string out;
  for (const auto& [name, value] : at) out += ", " + name + " = " + value.get_str();
  return out;
}

class External : public ::testing::TestWithParam<KnownFunction> {};

// The function is the sum of the claim: first values, exactly.
void check_small_values(const KnownFunction& function, const claim::Claim& claim) {
  for (const Values& parameters : function.points) {
    Row row(function, parameters);
    for (long i = 0; i < kSmallValues; ++i) {
      const mpz_class n = claim.from + i;
      Values at = parameters;
      at[claim.running] = n;
      const term::Value sum = term::evaluate_sum(claim.sum, at);
      ASSERT_TRUE(sum.number) << sum.why_not;
      const Ball& ball = row.value(n, kFirstPrecision);
      EXPECT_TRUE(ball.contains(*sum.number))
          << function.source << " is not the sum at n = " << n << text(parameters) << ": "
          << ball.text() << ", not " << *sum.number;
      const Ball scale = Balls(kFirstPrecision).number(*sum.number == 0 ? 1 : *sum.number);
      EXPECT_TRUE(ball.is_narrow(scale, kNarrow)) << "n = " << n << text(parameters) << ball.text();
    }
  }
}

void check_recurrence(const KnownFunction& function, const claim::Claim& claim,
                      const Recurrence& recurrence, std::size_t& holds, std::size_t& wrong) {
  for (const Values& parameters : function.points) {
    Row row(function, parameters);
    for (const long n : function.large) {
      SCOPED_TRACE(recurrence.how + " at n = " + std::to_string(n) + text(parameters));
      const Ball total = row.total(recurrence, claim.running, n, {});
      EXPECT_TRUE(total.contains_zero()) << total.text();
      ++holds;
      for (std::size_t i = 0; i < recurrence.coefficients.size(); ++i) {
        const Ball changed = row.total(recurrence, claim.running, n, {i, false});
        EXPECT_TRUE(changed.is_nonzero())
            << "coefficient " << i << " plus 1 is not noticed: " << changed.text();
        ++wrong;
      }
      if (!recurrence.right_side) continue;
      const Ball changed = row.total(recurrence, claim.running, n, {std::nullopt, true});
      EXPECT_TRUE(changed.is_nonzero())
          << "a doubled right side is not noticed: " << changed.text();
      ++wrong;
    }
  }
}

TEST_P(External, RecurrenceHoldsForTheFunction) {
  const KnownFunction& function = GetParam();
  SCOPED_TRACE(function.file + "; " + function.source);
  const Printed printed = printed_for(function.file);
  check_small_values(function, *printed.claim);
  std::size_t holds = 0;
  std::size_t wrong = 0;
  for (const Recurrence& recurrence : printed.recurrences) {
    check_recurrence(function, *printed.claim, recurrence, holds, wrong);
  }
  EXPECT_EQ(holds, 2 * function.points.size() * function.large.size());
  EXPECT_GE(wrong, holds);
  RecordProperty("holds", std::to_string(holds));
  RecordProperty("wrong", std::to_string(wrong));
}

INSTANTIATE_TEST_SUITE_P(Arb, External, ::testing::ValuesIn(known_functions()),
                         [](const auto& about) { return about.param.name; });

}  // namespace
}  // namespace sumwright::testing
