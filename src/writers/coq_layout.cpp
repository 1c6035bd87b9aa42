// Long lines of a generated file are broken. Coq reads any space as it reads the end of a line, so
// only spaces become breaks and the file means the same; comments are broken between words.

#include <cctype>
#include <vector>

#include "writers/coq_comments.hpp"

namespace sumwright::writers::coq {

namespace {

constexpr std::size_t longest_line = 100;

class Line {
 public:
  Line(const std::string& text, bool comment) : text_(text), comment_(comment) {
    indent_ = std::min(text.find_first_not_of(' '), longest_line / 2);
    const bool item = text.compare(indent_, 2, "- ") == 0;
    more_ = std::string(indent_ + (comment && !item ? 0 : 2), ' ');
    if (text.compare(indent_, 3, "(**") == 0) more_ = std::string(indent_ + 4, ' ');
    int depth = 0;
    for (const char ch : text) {
      if (ch == '(' || ch == '[' || ch == '{') ++depth;
      if (ch == ')' || ch == ']' || ch == '}') --depth;
      depth_.push_back(depth);
    }
  }

  std::string run() {
    std::string out;
    std::size_t begin = 0;
    std::size_t room = longest_line;
    const std::string same(indent_, ' ');
    while (text_.size() - begin > room) {
      const std::size_t end = best(begin + (out.empty() ? indent_ : 0), begin + room);
      if (end == std::string::npos) break;
      const std::string& more = ends_sentence(end) ? same : more_;
      out += text_.substr(begin, end - begin) + "\n" + more;
      begin = end + 1;
      room = longest_line - more.size();
    }
    return out + text_.substr(begin);
  }

 private:
  /// The space at which to break text after `begin`: up to `limit` if there is one.
  [[nodiscard]] std::size_t best(std::size_t begin, std::size_t limit) const {
    std::size_t found = std::string::npos;
    int least = 0;
    for (std::size_t at = begin + 1; at < text_.size(); ++at) {
      if (at > limit && found != std::string::npos) break;
      if (text_[at] != ' ' || text_[at - 1] == ' ') continue;
      if (at < begin + (limit - begin) / 3 && !comment_) continue;
      const int price = cost(at);
      if (price == never || (found != std::string::npos && price > least)) continue;
      found = at;
      least = price;
    }
    return found;
  }

  static constexpr int never = 1000;

  /// Not in a line that begins with a bullet: the rest would stand outside.
  [[nodiscard]] bool ends_sentence(std::size_t at) const {
    return !comment_ && depth_[at] == 0 && text_[at - 1] == '.' && text_[indent_] != '-';
  }

  [[nodiscard]] int cost(std::size_t at) const {
    if (comment_) return 0;
    const std::size_t before = text_.rfind(' ', at - 1);
    const std::string word = text_.substr(before == std::string::npos ? 0 : before + 1,
                                          at - (before == std::string::npos ? 0 : before + 1));
    // A sign, and a bullet.
    if (word == "(-" || word == "(/" || (word == "-" && before + 1 <= indent_)) return never;
    const int depth = 4 * depth_[at];
    if (ends_sentence(at)) return -1;
    if (word == "+" || word == "-" || word == "=" || word == "->" || word == "/\\" || word == "|" ||
        word == ":=" || word.back() == ';' || word.back() == ',')
      return depth;
    if (word == "*") return depth + 1;
    return word == "/" || word == ":" || word == "^" ? never : depth + 6;
  }

  const std::string& text_;
  bool comment_;
  std::size_t indent_ = 0;
  std::string more_;
  std::vector<int> depth_;
};

}  // namespace

std::string wrapped(const std::string& text) {
  std::string out;
  int comments = 0;
  for (std::size_t begin = 0; begin < text.size();) {
    std::size_t end = text.find('\n', begin);
    if (end == std::string::npos) end = text.size();
    std::string line = text.substr(begin, end - begin);
    begin = end + 1;
    line.erase(line.find_last_not_of(' ') + 1);
    int after = comments;
    for (std::size_t i = 0; i + 1 < line.size(); ++i) {
      if (line[i] == '(' && line[i + 1] == '*') ++after;
      if (line[i] == '*' && line[i + 1] == ')') --after;
    }
    const bool comment = comments > 0 || after > 0 || line.starts_with("(*");
    out += (line.size() > longest_line ? Line(line, comment).run() : line) + "\n";
    comments = after;
  }
  return out;
}

}  // namespace sumwright::writers::coq
