// Whether two texts are the same term: each is read with Coq's precedences (sums 50, products 40,
// signs and inverses 35, powers 30, application) and printed again with all brackets.

#include <cctype>

#include "writers/coq_text.hpp"

namespace sumwright::writers::coq {

namespace {

class Bracketing {
 public:
  explicit Bracketing(const std::string& text) {
    std::string word;
    const auto flush = [&] {
      if (!word.empty()) tokens_.push_back(word);
      word.clear();
    };
    for (const char ch : text) {
      if (std::isalnum(static_cast<unsigned char>(ch)) != 0 || ch == '_' || ch == '.') {
        word += ch;
        continue;
      }
      flush();
      if (ch != ' ') tokens_.emplace_back(1, ch);
    }
    flush();
  }

  std::string run() {
    std::string out = sum();
    while (at_ < tokens_.size()) out += " " + tokens_[at_++];  // not a term: compared as it stands
    return out;
  }

 private:
  [[nodiscard]] bool next(const char* which) const {
    return at_ < tokens_.size() && tokens_[at_].find_first_of(which) == 0;
  }

  std::string sum() {
    std::string out = product();
    while (next("+-")) {
      const std::string sign = tokens_[at_++];
      out = "(" + out + sign + product() + ")";
    }
    return out;
  }

  std::string product() {
    std::string out = prefixed();
    while (next("*/")) {
      const std::string sign = tokens_[at_++];
      out = "(" + out + sign + prefixed() + ")";
    }
    return out;
  }

  std::string prefixed() {
    if (!next("-/")) return power();
    const std::string sign = tokens_[at_++];
    return "(" + sign + prefixed() + ")";
  }

  std::string power() {
    std::string base = application();
    if (!next("^")) return base;
    ++at_;
    return "(" + base + "^" + power() + ")";
  }

  std::string application() {
    std::string out;
    std::size_t count = 0;
    while (at_ < tokens_.size() && (is_word() || next("("))) {
      out += (count++ == 0 ? "" : " ") + argument();
    }
    return count > 1 ? "(" + out + ")" : out;
  }

  [[nodiscard]] bool is_word() const {
    const auto first = static_cast<unsigned char>(tokens_[at_][0]);
    return std::isalnum(first) != 0 || first == '_';
  }

  std::string argument() {
    if (!next("(")) return tokens_[at_++];
    ++at_;
    std::string inside = sum();
    if (next(")")) ++at_;
    return inside;
  }

  std::vector<std::string> tokens_;
  std::size_t at_ = 0;
};

}  // namespace

bool same_term(const std::string& a, const std::string& b) {
  return Bracketing(a).run() == Bracketing(b).run();
}

}  // namespace sumwright::writers::coq
