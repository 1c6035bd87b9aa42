// From names of the claim file to mathematical letters.
//
// Greek names become Greek letters, trailing digits and parts behind an underscore become indices,
// longer names are set in one italic word; whatever would look like another symbol is spelt out.
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
constexpr std::size_t kLongest = 24;

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
    return {head.size() > 1 ? head + " " : head, 0.66, 0, false};  // \alpha k, not \alphak
  }
  if (!head.empty()) {
    const std::string_view index = name.substr(bar == cut ? cut + 1 : cut);
    const bool plain = !index.empty() && index.find('_') == std::string_view::npos;
    if (plain) {
      const bool all_digits = std::all_of(index.begin(), index.end(), is_digit);
      const std::string shown = all_digits              ? std::string(index)
                                : single(index).empty() ? word(index)
                                                        : single(index);
      return {head + "_{" + shown + "}", 0.66 + 0.45 * static_cast<double>(index.size()), 0, false};
    }
  }
  return {word(name), 0.58 * static_cast<double>(name.size()), 0, false};
}

[[nodiscard]] bool looks_like(const Piece& a, const Piece& b) { return a.tex == b.tex; }

}  // namespace

LatexNames::LatexNames(const claim::Claim& claim) {
  add(claim.running);
  for (const claim::Range& range : claim.sum.over) add(range.index);
  if (claim.other_sum) {
    for (const claim::Range& range : claim.other_sum->over) add(range.index);
  }
  for (const claim::Parameter& parameter : claim.parameters) add(parameter.name);
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
  const std::string shown = name.size() <= kLongest ? name : name.substr(0, kLongest - 4);
  Piece candidate =
      name.size() <= kLongest ? pretty(name) : Piece{word(shown) + "_{\\ldots}", 14.0, 0, false};
  const auto clashes = [&](const Piece& piece) {
    return std::any_of(symbols_.begin(), symbols_.end(),
                       [&](const auto& entry) { return looks_like(entry.second, piece); });
  };
  if (clashes(candidate)) {
    candidate = {"\\mathtt{" + escaped(shown) + "}", 0.53 * static_cast<double>(shown.size()), 0,
                 false};
    if (name.size() > kLongest || clashes(candidate)) {
      candidate.tex += "_{" + std::to_string(symbols_.size()) + "}";
      candidate.width += 1;
    }
  }
  symbols_[name] = candidate;
}

bool LatexNames::taken(char letter) const {
  return std::any_of(symbols_.begin(), symbols_.end(), [&](const auto& entry) {
    const std::string& tex = entry.second.tex;
    return tex[0] == letter && (tex.size() == 1 || tex[1] == '_');
  });
}

std::string LatexNames::letter(char letter) const {
  const std::string plain(1, letter);
  if (!taken(letter)) return plain;
  const bool capital = letter >= 'A' && letter <= 'Z';
  return capital ? "\\mathcal{" + plain + "}" : "\\bar{" + plain + "}";
}

}  // namespace sumwright::writers
