// From names of the claim file to mathematical letters.
//
// Greek names become Greek letters, trailing digits and parts behind an underscore become indices,
// longer names are set in one italic word, and names too long for formulas get a letter; whatever
// would look like another symbol is spelt out.
#include "writers/latex_names.hpp"

#include <algorithm>
#include <array>
#include <string_view>

namespace sumwright::writers {

namespace {

constexpr std::array<std::string_view, 35> kGreek = {
    "alpha",   "beta",   "gamma", "delta",   "epsilon", "zeta",  "eta",   "theta", "iota",
    "kappa",   "lambda", "mu",    "nu",      "xi",      "pi",    "rho",   "sigma", "tau",
    "upsilon", "phi",    "chi",   "psi",     "omega",   "Gamma", "Delta", "Theta", "Lambda",
    "Xi",      "Pi",     "Sigma", "Upsilon", "Phi",     "Psi",   "Omega", "ell"};
constexpr double kWidest = 6.5;   // wider names get a letter
constexpr double kAllWords = 16;  // room for all words together, else those of some length do
constexpr double kShortWord = 1.5;
constexpr std::string_view kOfArgument = "SFGRBCEapcduvbeioO";  // and what looks like a number

[[nodiscard]] bool is_digit(char c) { return c >= '0' && c <= '9'; }

[[nodiscard]] bool is_greek(std::string_view name) {
  return std::find(kGreek.begin(), kGreek.end(), name) != kGreek.end();
}

[[nodiscard]] std::string escaped(std::string_view name) {
  std::string out;
  for (const char c : name) out += c == '_' ? std::string("\\_") : std::string(1, c);
  return out;
}

// A head that is one letter; empty when it is not.
[[nodiscard]] std::string single(std::string_view head) {
  if (head.size() == 1) return std::string(head);
  return is_greek(head) ? "\\" + std::string(head) : "";
}

[[nodiscard]] std::string word(std::string_view name) {
  return name.size() == 1 ? std::string(name) : "\\mathit{" + escaped(name) + "}";
}

[[nodiscard]] Piece pretty(std::string_view name) {
  std::size_t digits = name.size();
  while (digits > 0 && is_digit(name[digits - 1])) --digits;
  const std::size_t bar = name.find('_');
  const std::size_t cut = std::min(bar, digits);
  const std::string head = single(name.substr(0, cut));
  if (!head.empty() && cut == name.size()) {
    return {head.size() > 1 ? head + " " : head, 0.66};  // \alpha k, not \alphak
  }
  if (!head.empty()) {
    const std::string_view index = name.substr(bar == cut ? cut + 1 : cut);
    const bool plain = !index.empty() && index.find('_') == std::string_view::npos;
    if (plain) {
      const bool all_digits = std::all_of(index.begin(), index.end(), is_digit);
      const std::string shown = all_digits              ? std::string(index)
                                : single(index).empty() ? word(index)
                                                        : single(index);
      return {head + "_{" + shown + "}", 0.66 + 0.45 * static_cast<double>(index.size())};
    }
  }
  return {word(name), 0.58 * static_cast<double>(name.size())};
}

[[nodiscard]] bool looks_like(const Piece& a, const Piece& b) { return a.tex == b.tex; }

// The letter, small and capital.
[[nodiscard]] std::string either_case(char c) {
  const bool capital = c >= 'A' && c <= 'Z';
  return {c, static_cast<char>(capital ? c - 'A' + 'a' : c - 'a' + 'A')};
}

}  // namespace

LatexNames::LatexNames(const claim::Claim& claim) {
  struct Name {
    std::string name;
    std::string wanted;  // letters for its role
  };
  std::vector<Name> names = {{claim.running, "n"}};
  for (const claim::Range& range : claim.sum.over) names.push_back({range.index, "kj"});
  if (claim.other_sum) {
    for (const claim::Range& range : claim.other_sum->over) names.push_back({range.index, "kj"});
  }
  for (const claim::Parameter& parameter : claim.parameters) {
    const bool rational = parameter.ring == claim::Parameter::Ring::rationals;
    names.push_back(
        {parameter.name, either_case(parameter.name[0]) + (rational ? "xyzwt" : "mrs")});
  }
  double words = 0;
  for (const Name& name : names) {
    const Piece shown = pretty(name.name);
    if (is_word(shown.tex)) words += shown.width;
  }
  const double widest = words > kAllWords ? kShortWord : kWidest;
  const auto is_long = [&](const Name& name) { return pretty(name.name).width > widest; };
  for (const Name& name : names) {
    if (!is_long(name)) add(name.name);
  }
  for (const Name& name : names) {
    if (is_long(name)) replace(name.name, name.wanted);
  }
  const auto free_letter = [&](std::string_view candidates) {
    for (const char c : candidates) {
      if (!taken(c)) return std::string(1, c);
    }
    return std::string("\\ast");
  };
  number_ = free_letter("zywxqthgA");
  length_ = free_letter("mljirsM");
}

void LatexNames::add(const std::string& name) {
  if (name.empty() || symbols_.contains(name)) return;
  Piece candidate = pretty(name);
  const auto clashes = [&](const Piece& piece) {
    return std::any_of(symbols_.begin(), symbols_.end(),
                       [&](const auto& entry) { return looks_like(entry.second, piece); });
  };
  if (clashes(candidate)) {
    candidate = {"\\mathtt{" + escaped(name) + "}", 0.53 * static_cast<double>(name.size())};
    if (clashes(candidate)) {
      candidate.tex += "_{" + std::to_string(symbols_.size()) + "}";
      candidate.width += 1;
    }
  }
  symbols_[name] = candidate;
}

void LatexNames::replace(const std::string& name, const std::string& wanted) {
  if (symbols_.contains(name)) return;
  Piece letter;
  for (const char c : wanted + "mrstNMKLTUVWxyzwqhgjlHPQXYZ") {
    if (kOfArgument.find(c) != std::string_view::npos || taken(c)) continue;
    letter = {std::string(1, c), 0.9};
    break;
  }
  for (std::size_t i = 1; letter.tex.empty(); ++i) {
    const Piece next = {"x_{" + std::to_string(i) + "}", 1.6};
    const bool clash = std::any_of(symbols_.begin(), symbols_.end(), [&](const auto& entry) {
      return looks_like(entry.second, next);
    });
    if (!clash) letter = next;
  }
  symbols_[name] = letter;
  replaced_.push_back({name, letter.tex});
}

bool LatexNames::taken(char letter) const {
  return std::any_of(symbols_.begin(), symbols_.end(), [&](const auto& entry) {
    const std::string& tex = entry.second.tex;
    return tex[0] == letter && (tex.size() == 1 || tex[1] == '_');
  });
}

std::string LatexNames::letter(char letter) const {
  std::string plain(1, letter);
  if (!taken(letter)) return plain;
  const bool capital = letter >= 'A' && letter <= 'Z';
  return capital ? "\\mathcal{" + plain + "}" : "\\bar{" + plain + "}";
}

}  // namespace sumwright::writers
