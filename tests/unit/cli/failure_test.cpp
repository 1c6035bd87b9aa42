// Runs without a verdict, as machines see them.
#include "cli/failure.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

namespace sumwright::cli {
namespace {

using nlohmann::json;

TEST(FailureJson, VerdictGoesWithTheStatus) {
  const struct {
    Status status;
    std::string verdict;
    std::string key;
  } cases[] = {{Status::unusable, "refused", "message"},
               {Status::undecided, "undecided", "reason"},
               {Status::fault, "fault", "message"}};
  for (const auto& row : cases) {
    const json out = json::parse(failure_json(row.status, "why \"so\" \xFF"));
    EXPECT_EQ(out.at("verdict"), row.verdict);
    EXPECT_EQ(out.at("exit_status"), static_cast<int>(row.status));
    EXPECT_TRUE(out.at(row.key).get<std::string>().starts_with("why \"so\" "));
  }
}

TEST(FailureJson, PlaceAndNotes) {
  const claim::Source source{"c.toml", "a\nbc"};
  const claim::InputError error(source, {3, 1}, "wrong", "did you mean 'x'?\nwrite y\nor z");
  const json out = json::parse(failure_json(error.parts()));
  EXPECT_EQ(out, json::parse(R"({"verdict": "refused", "file": "c.toml", "line": 2, "column": 2,
    "message": "wrong", "suggestion": "x", "expected": "write y; or z", "exit_status": 2})"));
  const json whole = json::parse(failure_json(claim::InputError("f", "gone").parts()));
  EXPECT_EQ(whole, json::parse(R"({"verdict": "refused", "file": "f", "message": "gone",
    "exit_status": 2})"));
}

}  // namespace
}  // namespace sumwright::cli
