// Shared by the tests of the claim stage: claim texts and what their refusals say.
#pragma once

#include <gtest/gtest.h>

#include <cstdint>
#include <cstdlib>
#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "claim/reader.hpp"

namespace sumwright::claim::test {

/// A claim with every key of format 1. Line numbers matter to the tests.
inline std::string full_claim() {
  return R"toml(format  = 1
title   = "Squares along one row"
running = "n"
from    = 0
assume  = ["m >= 1", "x != 1/2"]

[sum]
summand = "binomial(n, k)^2"
over    = [ { index = "k", low = "0", high = "n" } ]

[equals]
closed  = "binomial(2*n, n)"

[parameters]
x = { in = "rationals", not = ["0", "negative integers"] }
m = { in = "integers", at_least = 0 }

[evidence]
recurrence  = ["-2*(2*n + 1)", "n + 1"]
right_side  = "0"
certificate = { k = "k^2*(2*k - 3*n - 3)/(n + 1 - k)^2" }

[record]
authors = ["A. Author", "B. Author"]
source  = "A Journal 1 (2020), 1-2"
identifier = "doi:10.0/0"
licence = "CC0-1.0"
)toml";
}

/// `text` with the first `from` replaced; fails the test when there is none.
inline std::string replaced(std::string text, std::string_view from, std::string_view to) {
  const std::size_t at = text.find(from);
  EXPECT_NE(at, std::string::npos) << "no '" << from << "' to replace";
  return at == std::string::npos ? text : text.replace(at, from.size(), to);
}

/// The refusal of a text; nothing when it is read.
inline std::optional<std::string> refusal(const std::string& text, const Limits& limits = {}) {
  try {
    (void)read_claim_text("t.toml", text, limits);
  } catch (const InputError& error) {
    return error.what();
  }
  return std::nullopt;
}

/// Expects a refusal that starts with `t.toml:<place>: error: ` and says `message`.
inline void expect_refused(const std::string& text, std::string_view place,
                           std::string_view message) {
  const auto what = refusal(text);
  ASSERT_TRUE(what) << "was read:\n" << text;
  const std::string head = "t.toml:" + std::string(place) + ": error: ";
  EXPECT_EQ(what->substr(0, head.size()), head) << *what;
  EXPECT_NE(what->find(message), std::string::npos) << "expected: " << message << "\n" << *what;
}

/// One change of a claim and the refusal it must meet.
struct Refused {
  std::string_view from;
  std::string_view to;
  std::string_view place;
  std::string_view message;
};

inline void expect_all_refused(const std::string& claim, const std::vector<Refused>& cases) {
  ASSERT_FALSE(cases.empty());
  for (const Refused& row : cases) {
    SCOPED_TRACE(std::string(row.from) + "  ->  " + std::string(row.to));
    expect_refused(replaced(claim, row.from, row.to), row.place, row.message);
  }
}

inline void expect_all_read(const std::string& claim, const std::vector<Refused>& cases) {
  ASSERT_FALSE(cases.empty());
  for (const Refused& row : cases) {
    SCOPED_TRACE(std::string(row.from) + "  ->  " + std::string(row.to));
    const auto what = refusal(replaced(claim, row.from, row.to));
    EXPECT_FALSE(what) << *what;
  }
}

/// The seed of a test with random input; SUMWRIGHT_TEST_SEED overrides it.
inline std::uint64_t test_seed(std::uint64_t fallback) {
  const char* text = std::getenv("SUMWRIGHT_TEST_SEED");
  return text == nullptr ? fallback : std::strtoull(text, nullptr, 10);
}

/// `cases` times SUMWRIGHT_TEST_EFFORT (default 1), never less than one.
inline std::size_t test_effort(std::size_t cases) {
  const char* text = std::getenv("SUMWRIGHT_TEST_EFFORT");
  const double factor = text == nullptr ? 1.0 : std::strtod(text, nullptr);
  const double count = static_cast<double>(cases) * factor;
  return count < 1 ? 1 : static_cast<std::size_t>(count);
}

}  // namespace sumwright::claim::test
