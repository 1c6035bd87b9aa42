// From a Claim back to TOML. Expressions are printed from their trees and need no escapes.
#include "claim_file_text.hpp"

#include <stdexcept>

namespace sumwright::testing {
namespace {

std::string quoted(const std::string& text) { return "\"" + text + "\""; }

std::string bound(const claim::Bound& b) {
  if (b.kind == claim::Bound::Kind::plus_infinity) return quoted("inf");
  if (b.kind == claim::Bound::Kind::minus_infinity) return quoted("-inf");
  return quoted(claim::to_text(*b.value));
}

std::string comparison(claim::Comparison c) {
  switch (c) {
    case claim::Comparison::less_equal:
      return "<=";
    case claim::Comparison::less:
      return "<";
    case claim::Comparison::greater_equal:
      return ">=";
    case claim::Comparison::greater:
      return ">";
    case claim::Comparison::not_equal:
      return "!=";
  }
  throw std::logic_error("unknown comparison");
}

std::string exclusion(const claim::Exclusion& e) {
  switch (e.kind) {
    case claim::Exclusion::Kind::constant:
      return quoted(claim::to_text(*e.written));
    case claim::Exclusion::Kind::integers:
      return quoted("integers");
    case claim::Exclusion::Kind::positive_integers:
      return quoted("positive integers");
    case claim::Exclusion::Kind::negative_integers:
      return quoted("negative integers");
    case claim::Exclusion::Kind::nonnegative_integers:
      return quoted("nonnegative integers");
    case claim::Exclusion::Kind::nonpositive_integers:
      return quoted("nonpositive integers");
  }
  throw std::logic_error("unknown exclusion");
}

std::string parameter(const claim::Parameter& p) {
  const bool rational = p.ring == claim::Parameter::Ring::rationals;
  std::string out = p.name + " = { in = " + quoted(rational ? "rationals" : "integers");
  if (p.at_least) out += ", at_least = " + p.at_least->get_str();
  if (!p.excluded.empty()) {
    out += ", not = [";
    for (std::size_t i = 0; i < p.excluded.size(); ++i)
      out += (i == 0 ? "" : ", ") + exclusion(p.excluded[i]);
    out += "]";
  }
  return out + " }\n";
}

std::string over(const std::vector<claim::Range>& ranges) {
  std::string out = "over    = [";
  for (const claim::Range& r : ranges)
    out += " { index = " + quoted(r.index) + ", low = " + bound(r.low) +
           ", high = " + bound(r.high) + " },";
  if (out.back() == ',') out.pop_back();
  return out + " ]\n";
}

std::string evidence(const claim::Evidence& e) {
  std::string out = "\n[evidence]\nrecurrence  = [";
  for (std::size_t i = 0; i < e.recurrence.size(); ++i)
    out += (i == 0 ? "" : ", ") + quoted(claim::to_text(*e.recurrence[i]));
  out += "]\n";
  if (e.right_side) out += "right_side  = " + quoted(claim::to_text(*e.right_side)) + "\n";
  if (e.certificate.empty()) return out;
  out += "certificate = {";
  for (const auto& [index, r] : e.certificate)
    out += " " + index + " = " + quoted(claim::to_text(*r)) + ",";
  out.pop_back();
  return out + " }\n";
}

}  // namespace

std::string claim_file_text(const claim::Claim& claim, const std::string& comment) {
  std::string out = "# " + comment +
                    "\nformat  = 1\ntitle   = \"Regression\"\nrunning = " + quoted(claim.running) +
                    "\nfrom    = " + claim.from.get_str() + "\n";
  if (!claim.assumptions.empty()) {
    out += "assume  = [";
    for (std::size_t i = 0; i < claim.assumptions.size(); ++i) {
      const claim::Assumption& a = claim.assumptions[i];
      out +=
          (i == 0 ? "" : ", ") + quoted(claim::to_text(*a.left) + " " + comparison(a.comparison) +
                                        " " + claim::to_text(*a.right));
    }
    out += "]\n";
  }
  out += "\n[sum]\nsummand = " + quoted(claim::to_text(*claim.sum.summand)) + "\n";
  if (!claim.sum.over.empty()) out += over(claim.sum.over);
  if (claim.closed) out += "\n[equals]\nclosed  = " + quoted(claim::to_text(*claim.closed)) + "\n";
  if (claim.other_sum)
    out += "\n[equals]\nsummand = " + quoted(claim::to_text(*claim.other_sum->summand)) + "\n" +
           over(claim.other_sum->over);
  if (!claim.parameters.empty()) out += "\n[parameters]\n";
  for (const claim::Parameter& p : claim.parameters) out += parameter(p);
  if (!claim.evidence.recurrence.empty()) out += evidence(claim.evidence);
  return out;
}

}  // namespace sumwright::testing
