// From the short texts of a proof (conditions, regions, names of terms) to mathematics and words.
//
// Words that are no symbols and no letters of the argument stay words; the rest goes between
// dollars, in pieces that end at commas, so that lines can be broken there.
#include <algorithm>
#include <array>
#include <string_view>

#include "writers/latex_expression.hpp"
#include "writers/latex_text.hpp"

namespace sumwright::writers {

namespace {

struct Sign {
  std::string_view text;
  std::string_view tex;
  double width;
};

// Longer signs first.
constexpr std::array<Sign, 14> kSigns = {{{">=", "\\ge ", 1.4},
                                          {"<=", "\\le ", 1.4},
                                          {"!=", "\\ne ", 1.4},
                                          {":=", ":=", 1.6},
                                          {"..", ",\\dots,", 2.2},
                                          {">", ">", 1.4},
                                          {"<", "<", 1.4},
                                          {"=", "=", 1.4},
                                          {"+", "+", 1.25},
                                          {"-", "-", 1.25},
                                          {"*", "\\,", 0.2},
                                          {"/", "/", 0.5},
                                          {"(", "(", 0.4},
                                          {")", ")", 0.4}}};

[[nodiscard]] bool is_letter(char c) {
  return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z') || c == '_';
}
[[nodiscard]] bool is_digit(char c) { return c >= '0' && c <= '9'; }

// A token: mathematics (math), or text, or a blank between tokens.
struct Token {
  enum class Kind { math, comma, other };
  Kind kind = Kind::other;
  std::string tex;
  double width = 0;
  bool blank_before = false;
};

class Scanner {
 public:
  Scanner(const LatexNames& names, std::string_view text) : names_(names), text_(text) {}

  std::vector<Token> scan() {
    std::vector<Token> out;
    while (at_ < text_.size()) {
      bool blank = false;
      while (at_ < text_.size() && text_[at_] == ' ') {
        blank = true;
        ++at_;
      }
      if (at_ >= text_.size()) break;
      out.push_back(token());
      out.back().blank_before = blank;
    }
    return out;
  }

 private:
  Token token() {
    if (is_letter(text_[at_])) return name();
    if (is_digit(text_[at_])) return math(take_digits());
    if (text_[at_] == '!' && at_ > 0 && !text_.substr(at_).starts_with("!=")) {
      ++at_;
      return {Token::Kind::math, "!", 0.3, false};
    }
    if (text_[at_] == '^') return power();
    for (const Sign& sign : kSigns) {
      if (!text_.substr(at_).starts_with(sign.text)) continue;
      const bool number_before = at_ > 0 && is_digit(text_[at_ - 1]);
      at_ += sign.text.size();
      if (sign.text == "*") return times(number_before);
      return {Token::Kind::math, std::string(sign.tex), sign.width, false};
    }
    const bool comma = text_[at_] == ',';
    std::size_t length = 1;
    while (!comma && at_ + length < text_.size() &&
           (static_cast<unsigned char>(text_[at_ + length]) & 0xC0U) == 0x80U) {
      ++length;
    }
    Token out{comma ? Token::Kind::comma : Token::Kind::other,
              latex_text(text_.substr(at_, length)), 0.4, false};
    at_ += length;
    return out;
  }

  // A dot between numbers, nothing between a number and a letter.
  [[nodiscard]] Token times(bool number_before) const {
    const std::size_t next = std::min(text_.find_first_not_of(' ', at_), text_.size());
    if (next < text_.size() && is_digit(text_[next])) {
      return {Token::Kind::math, "\\cdot ", 0.8, false};
    }
    std::size_t end = next;
    while (end < text_.size() && (is_letter(text_[end]) || is_digit(text_[end]))) ++end;
    const std::string name(text_.substr(next, end - next));
    const bool word = names_.is_symbol(name) && is_word(names_.symbol(name).tex);
    if (number_before && !word) return {Token::Kind::math, "", 0, false};
    return {Token::Kind::math, "\\,", 0.2, false};
  }

  static Token math(const std::string& tex) {
    return {Token::Kind::math, tex, 0.52 * static_cast<double>(tex.size()), false};
  }

  std::string take_digits() {
    const std::size_t start = at_;
    while (at_ < text_.size() && is_digit(text_[at_])) ++at_;
    return std::string(text_.substr(start, at_ - start));
  }

  // `^` with a name, a number or a bracketed exponent behind it.
  Token power() {
    ++at_;
    std::size_t end = at_;
    if (end < text_.size() && text_[end] == '(') {
      int depth = 0;
      do {
        depth += text_[end] == '(' ? 1 : text_[end] == ')' ? -1 : 0;
        ++end;
      } while (end < text_.size() && depth > 0);
      if (depth > 0) return {Token::Kind::other, "{\\normalfont\\textasciicircum}", 0.5, false};
    } else {
      while (end < text_.size() && (is_letter(text_[end]) || is_digit(text_[end]))) ++end;
    }
    std::string_view inside = text_.substr(at_, end - at_);
    if (inside.empty()) return {Token::Kind::other, "{\\normalfont\\textasciicircum}", 0.5, false};
    at_ = end;
    if (inside.front() == '(') inside = inside.substr(1, inside.size() - 2);
    std::string tex;
    for (const Token& token : Scanner(names_, inside).scan()) {
      tex += token.kind == Token::Kind::math ? token.tex : "\\text{" + token.tex + "}";
    }
    return {Token::Kind::math, "^{" + tex + "}", 0.4 * static_cast<double>(inside.size()), false};
  }

  Token name() {
    const std::size_t start = at_;
    while (at_ < text_.size() && (is_letter(text_[at_]) || is_digit(text_[at_]))) ++at_;
    const std::string word(text_.substr(start, at_ - start));
    if (names_.is_symbol(word)) {
      const Piece& piece = names_.symbol(word);
      return {Token::Kind::math, piece.tex, piece.width, false};
    }
    const bool function = at_ < text_.size() && text_[at_] == '(';
    if (word.size() == 1 && std::string_view("SFGRBCb").find(word[0]) != std::string_view::npos &&
        (function || word == "B")) {
      return {Token::Kind::math, names_.letter(word[0]), 0.75, false};
    }
    const std::size_t bar = word.find('_');
    const bool indexed = bar == 1 && word.size() > 2 &&
                         std::all_of(word.begin() + 2, word.end(), is_digit) &&
                         std::string_view("apqFC").find(word[0]) != std::string_view::npos;
    if (indexed) {
      return {Token::Kind::math, names_.letter(word[0]) + "_{" + word.substr(2) + "}", 1.1, false};
    }
    if (function && (word == "fact" || word == "rfact")) {
      return {Token::Kind::math, "\\mathrm{" + word + "}", 2.5, false};
    }
    return {Token::Kind::other, latex_text(word), 0.5 * static_cast<double>(word.size()), false};
  }

  const LatexNames& names_;
  std::string_view text_;
  std::size_t at_ = 0;
};

}  // namespace

std::string LatexExpressions::mixed(const std::string& text) const {
  std::string out;
  std::string math;
  int depth = 0;
  const auto flush = [&] {
    if (!math.empty()) out += "$" + math + "$";
    math.clear();
  };
  const std::vector<Token> tokens = Scanner(names_, text).scan();
  for (std::size_t t = 0; t < tokens.size(); ++t) {
    const Token& token = tokens[t];
    const bool inside = !math.empty() && depth > 0;
    // Brackets around words are no mathematics.
    const bool words =
        math.empty() && (token.tex == ")" || (token.tex == "(" && t + 1 < tokens.size() &&
                                              tokens[t + 1].kind == Token::Kind::other));
    if (token.kind == Token::Kind::math && !words) {
      if (math.empty() && token.blank_before && !out.empty()) out += ' ';
      // Two names in a row are a product only where the text says so.
      if (!math.empty() && token.blank_before && is_letter(token.tex[0]) && !math.ends_with(' ') &&
          (is_letter(math.back()) || is_digit(math.back()) || math.back() == '}')) {
        math += "\\,";
      }
      math += token.tex;
      depth += token.tex == "(" ? 1 : token.tex == ")" ? -1 : 0;
    } else if (token.kind == Token::Kind::comma && inside) {
      math += ",";
    } else {
      flush();
      depth = 0;
      if (token.blank_before && !out.empty()) out += ' ';
      out += token.tex;
    }
  }
  flush();
  return out;
}

Formula LatexExpressions::math(const std::string& text) const {
  Formula out = piece("", 0);
  for (const Token& token : Scanner(names_, text).scan()) {
    const bool other = token.kind == Token::Kind::other;
    const std::string& before = out.back().tex;
    const bool names = !before.empty() && (is_letter(before.back()) || is_digit(before.back()) ||
                                           before.back() == '}');
    if (token.blank_before && names && is_letter(token.tex[0])) append_tex(out, "\\,", 0.2);
    append_tex(out, other ? "\\text{" + token.tex + "}" : token.tex, token.width);
  }
  return out;
}

}  // namespace sumwright::writers
