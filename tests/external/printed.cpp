// From a claim file over its proof to the printed text, and from the text to expressions.
#include "external/printed.hpp"

#include <chrono>
#include <filesystem>
#include <stdexcept>

#include "claim/reader.hpp"
#include "external/expressions.hpp"
#include "proof/build.hpp"

namespace sumwright::testing {
namespace {

claim::ExpressionPtr parse(const claim::Claim& claim, const std::string& text) {
  std::vector<std::string> symbols{claim.running};
  for (const claim::Parameter& p : claim.parameters) symbols.push_back(p.name);
  const claim::Source source{"printed recurrence", text};
  return claim::parse_expression(source, {0, text.size()}, symbols);
}

Recurrence decide(const std::shared_ptr<const claim::Claim>& claim, const std::string& how) {
  proof::BuildOptions options;
  options.deadline = algebra::Deadline(std::chrono::milliseconds(60000));
  const proof::Proof proof = proof::build(claim, options);
  if (proof.verdict != proof::Verdict::established) {
    throw std::runtime_error(claim->title + ", " + how + ", is not established: " + proof.reason);
  }
  Recurrence out{how + ":", {}, nullptr};
  for (const std::string& text : proof.recurrence_text) {
    out.how += " [" + text + "]";
    out.coefficients.push_back(parse(*claim, text));
  }
  if (!proof.right_side_text.empty() && proof.right_side_text != "0") {
    out.how += " = " + proof.right_side_text;
    out.right_side = parse(*claim, proof.right_side_text);
  }
  if (out.coefficients.empty()) throw std::runtime_error(claim->title + ": nothing is printed");
  return out;
}

}  // namespace

std::vector<mpq_class> Recurrence::coefficients_at(const Values& at) const {
  std::vector<mpq_class> out;
  for (const claim::ExpressionPtr& a : coefficients) out.push_back(exact_value(*a, at));
  return out;
}

Printed printed_for(const std::string& file) {
  const std::filesystem::path path = std::filesystem::path(SUMWRIGHT_SOURCE_DIR) / file;
  const auto claim = std::make_shared<claim::Claim>(claim::read_claim_file(path).claim);
  const auto question = std::make_shared<claim::Claim>(*claim);
  question->closed = nullptr;
  question->other_sum.reset();
  question->evidence = claim::Evidence();
  return {claim, {decide(claim, "claimed"), decide(question, "found")}};
}

}  // namespace sumwright::testing
