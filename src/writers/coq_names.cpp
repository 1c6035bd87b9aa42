// From the claim's symbols to names that mean nothing else in a generated file. Invariant: a name
// is kept or gets `_v`, and a name with an underscore is never kept, so that no two symbols meet.

#include <cctype>
#include <set>

#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

namespace {

/// Names without capitals, digits and underscores; the others are renamed by their form. Single
/// capital letters stand here too.
const std::set<std::string>& reserved() {
  static const std::set<std::string> words = {
      // Coq's own words, and notations of the libraries that are imported
      "as", "at", "by", "cofix", "do", "else", "end", "exists", "fix", "for", "forall", "fun", "if",
      "in", "let", "match", "mod", "of", "rec", "rem", "return", "struct", "then", "using", "where",
      "with", "lazymatch", "multimatch", "ltac",
      // types and constructors of the standard library
      "K", "Z", "N", "Q", "R", "S", "O", "I", "nat", "bool", "positive", "list", "nil", "cons",
      "last", "length", "eq", "or", "and", "not", "le", "lt", "ge", "gt", "ex", "true", "false",
      "tt", "id", "left", "right", "inl", "inr", "fst", "snd", "pair", "option",
      // the vocabulary and the support library
      "carrier", "kzero", "kone", "kadd", "kmul", "ksub", "kopp", "kdiv", "kinv", "inj", "pow",
      "zpow", "sum", "product", "factorial", "rfactorial", "binomial", "gbinomial", "rising",
      "falling", "ip", "rip", "gip", "rlin", "ap", "polynomial", "recurrence", "weighted",
      "continuation", "divide", "integer", "nonneg", "comb", "index", "pq", "pqf", "values", "zsum",
      "zproduct", "zbinomial", "zfactorial", "zrising", "zfalling", "zexpr",
      // tactics, where a name may stand too
      "field", "ring", "lia", "reflexivity",
      // what a generated file defines or binds
      "base", "c", "claim", "conclusion", "defined", "down", "equality", "initial", "leading",
      "remainder", "s", "summand", "summed", "t", "telescoping", "term", "total", "up", "weight",
      "z"};
  return words;
}

}  // namespace

std::string safe_name(const std::string& name) {
  // Numbered definitions have digits, lemmas and hypotheses underscores; commands, types and
  // modules are capitalised, and so are all hypotheses.
  const bool plain = name.find_first_of("_0123456789") == std::string::npos;
  const bool capitalised = std::isupper(static_cast<unsigned char>(name[0])) != 0;
  if (!plain || (capitalised && name.size() > 1) || name == "H" || reserved().contains(name))
    return name + "_v";
  return name;
}

}  // namespace sumwright::writers::coq
