// What a verdict says of a recurrence: its name, its origin, and no more than is known.
#include "cli/report.hpp"

#include <gtest/gtest.h>

#include <nlohmann/json.hpp>

#include "claim/reader.hpp"

namespace sumwright::cli {
namespace {

constexpr const char* kSum =
    "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n[sum]\nsummand = \"n*k\"\n"
    "over = [ { index = \"k\", low = \"0\", high = \"n\" } ]\n";

Decision decision(const std::string& more, proof::Verdict verdict) {
  Decision out;
  out.proof.claim =
      std::make_shared<const claim::Claim>(claim::read_claim_text("c.toml", kSum + more).claim);
  out.proof.symbols = {{"n", proof::SymbolKind::running}, {"k", proof::SymbolKind::index}};
  out.proof.verdict = verdict;
  out.proof.recurrence_text = {"n", "2"};
  out.proof.right_side_text = "n^3";
  out.proof.certificate_text = "k";
  return out;
}

void expect_says(const std::string& text, const std::string& what) {
  EXPECT_NE(text.find(what), std::string::npos) << "expected: " << what << "\nin:\n" << text;
}

TEST(Report, AFoundCandidateHasNoRightSide) {
  const std::string text = verdict_text(decision("", proof::Verdict::undecided));
  expect_says(text,
              "\ncandidate     n*S(n) + 2*S(n + 1), right side not known\n"
              "              found; not proved\n");
  EXPECT_EQ(text.find("n^3"), std::string::npos) << text;
  EXPECT_EQ(text.find("\nrecurrence"), std::string::npos) << text;
}

TEST(Report, AClaimedRecurrenceIsTheAuthors) {
  const std::string claimed = "[evidence]\nrecurrence = [\"n/2\", \"1\"]\nright_side = \"n + 1\"\n";
  const std::string open = verdict_text(decision(claimed, proof::Verdict::undecided));
  expect_says(open,
              "\ncandidate     n/2*S(n) + S(n + 1) = n + 1\n"
              "              brought by the author; not proved\n");
  const std::string refuted = verdict_text(decision(claimed, proof::Verdict::refuted));
  expect_says(refuted, "\nrecurrence    n/2*S(n) + S(n + 1) = n + 1\n");
}

TEST(Report, WhatWasFoundForARefutedEqualityIsNotShown) {
  const std::string text =
      verdict_text(decision("[equals]\nclosed = \"n\"\n", proof::Verdict::refuted));
  EXPECT_EQ(text.find("S(n + 1)"), std::string::npos) << text;
}

TEST(Report, TheThreshold) {
  Decision proved = decision("", proof::Verdict::established);
  expect_says(verdict_text(proved),
              "\nrecurrence    n*S(n) + 2*S(n + 1) = n^3\n"
              "              found\n");
  proved.proof.threshold = 4;
  expect_says(verdict_text(proved), "found; for n >= 4, smaller n checked one by one\n");
}

}  // namespace
}  // namespace sumwright::cli
