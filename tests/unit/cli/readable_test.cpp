// Inequalities for people: the same inequality, and nothing else is touched.
#include "cli/readable.hpp"

#include <gtest/gtest.h>

namespace sumwright::cli {
namespace {

TEST(Readable, LeadingMinusSignsGo) {
  const std::pair<const char*, const char*> cases[] = {
      {"-k - 1 >= 0", "k <= -1"},
      {"-n + 1000 >= 0", "n <= 1000"},
      {"-k >= 0", "k <= 0"},
      {"-2*n + k - 3 >= 0", "2*n <= k - 3"},
      {"-n - k + m >= 0", "n + k <= m"},
      {"-n - 1 + m >= 0", "n <= -1 + m"},
      {"n >= 0, -k - 1 >= 0, 0 <= k <= n", "n >= 0, k <= -1, 0 <= k <= n"},
      {"the closed form needs -n + 1000 >= 0 at c.toml:11:15",
       "the closed form needs n <= 1000 at c.toml:11:15"},
      {"n - 1 >= 0 unless -n >= 0; open", "n - 1 >= 0 unless n <= 0; open"}};
  for (const auto& [text, expected] : cases) EXPECT_EQ(readable_inequalities(text), expected);
}

TEST(Readable, OtherTextsStay) {
  for (const char* text :
       {"", "n - k >= 0", "n + 1 >= 0", "-1 >= 0", "-k^2 >= 0", "-(n + k) >= 0", "-k - 1 > 0",
        "-k  - 1 >= 0", "- >= 0", "-k -1 >= 0", "F(n, k) = 0, -", "-k*n >= 0", "-2* >= 0", " >= 0",
        "f -n >= 0.5", "(-k) - n >= 0", " - n >= 0"}) {
    EXPECT_EQ(readable_inequalities(text), text);
  }
}

}  // namespace
}  // namespace sumwright::cli
