// From a claim file's text to the same text with other evidence.
//
// The places of keys and values come from the parsed document, so that any way of writing the table
// (header, dotted keys, inline) keeps its form. Invariant: the outcome is parsed again, and the
// document that comes out differs in the evidence only.
#include "cli/evidence_text.hpp"

#include <fmt/format.h>

#include <algorithm>

#include "claim/document.hpp"
#include "claim/reader.hpp"
#include "cli/status.hpp"

namespace sumwright::cli {

namespace {

constexpr std::size_t kLineWidth = 100;

// Texts of the claim language need no escapes in TOML.
[[nodiscard]] std::string quoted(const std::string& text) {
  if (text.find_first_of("\"\\\n\r\t") != std::string::npos) {
    throw Fault("evidence that is no text of the claim language: " + text);
  }
  return "\"" + text + "\"";
}

// A whole text needs no brackets around it.
[[nodiscard]] std::string without_outer_brackets(const std::string& text) {
  if (!text.starts_with('(')) return text;
  int depth = 0;
  for (std::size_t at = 0; at + 1 < text.size(); ++at) {
    if (text[at] == '(') ++depth;
    if (text[at] == ')') --depth;
    if (depth == 0) return text;
  }
  return text.substr(1, text.size() - 2);
}

[[nodiscard]] std::string recurrence_value(const EvidenceTexts& evidence,
                                           std::string_view line_end) {
  std::string out = "[";
  std::size_t longest = 0;
  for (const std::string& text : evidence.recurrence) {
    longest += text.size() + 4;
  }
  const bool lines = longest + 16 > kLineWidth && !line_end.empty();
  for (std::size_t i = 0; i < evidence.recurrence.size(); ++i) {
    if (i > 0) out += lines ? "," : ", ";
    if (lines) out += std::string(line_end) + "  ";
    out += quoted(evidence.recurrence[i]);
  }
  if (lines) out += line_end;
  return out + "]";
}

[[nodiscard]] std::string certificate_value(const EvidenceTexts& evidence) {
  return fmt::format("{{ {} = {} }}", evidence.index, quoted(evidence.certificate));
}

// One change: the bytes [begin, begin + length) become `text`.
struct Edit {
  std::size_t begin = 0;
  std::size_t length = 0;
  std::string text;
};

class Editor {
 public:
  Editor(const claim::Source& source, const EvidenceTexts& evidence)
      : text_(source.text), evidence_(evidence), document_(claim::parse_document(source)) {
    line_end_ = text_.find("\r\n") == std::string::npos ? "\n" : "\r\n";
  }

  [[nodiscard]] std::string run() {
    const claim::Entry* table = document_.find("evidence");
    const claim::Entry* recurrence = table == nullptr ? nullptr : table->value.find("recurrence");
    if (recurrence == nullptr) return appended();
    replace(*recurrence, recurrence_value(evidence_, ""));
    right_side(table->value, *recurrence);
    certificate(table->value, *recurrence);
    return applied();
  }

 private:
  [[nodiscard]] std::string appended() const {
    std::string out = text_;
    if (!out.empty() && out.back() != '\n') out += line_end_;
    return out + line_end_ + "[evidence]" + line_end_ + evidence_lines(evidence_, line_end_);
  }

  void replace(const claim::Entry& entry, const std::string& value) {
    edits_.push_back({entry.value.place.offset, entry.value.place.length, value});
  }

  void right_side(const claim::Value& table, const claim::Entry& recurrence) {
    const claim::Entry* old = table.find("right_side");
    if (old != nullptr) {
      replace(*old, quoted(evidence_.right_side));
    } else if (evidence_.right_side != "0") {
      add("right_side", quoted(evidence_.right_side), recurrence);
    }
  }

  void certificate(const claim::Value& table, const claim::Entry& recurrence) {
    const claim::Entry* old = table.find("certificate");
    if (evidence_.index.empty()) return;
    if (old == nullptr) return add("certificate", certificate_value(evidence_), recurrence);
    const claim::Entry* value = old->value.find(evidence_.index);
    if (value != nullptr) return replace(*value, quoted(evidence_.certificate));
    replace(*old, certificate_value(evidence_));
  }

  // A key that the table does not have yet, in the form in which `neighbour` is written there.
  void add(const std::string& key, const std::string& value, const claim::Entry& neighbour) {
    const std::size_t start = text_.rfind('\n', neighbour.key_place.offset);
    const std::size_t line = start == std::string::npos ? 0 : start + 1;
    std::string before = text_.substr(line, neighbour.key_place.offset - line);
    if (before.starts_with("\xEF\xBB\xBF")) before.erase(0, 3);
    const std::size_t behind = neighbour.value.place.offset + neighbour.value.place.length;
    if (before.find('{') != std::string::npos) {
      edits_.push_back({behind, 0, fmt::format(", {} = {}", key, value)});
      return;
    }
    const std::size_t end = std::min(text_.find('\n', behind), text_.size());
    const std::string added = fmt::format("{}{} = {}", before, key, value);
    if (end == text_.size()) {
      edits_.push_back({end, 0, line_end_ + added});
    } else {
      edits_.push_back({end + 1, 0, added + line_end_});
    }
  }

  [[nodiscard]] std::string applied() {
    std::stable_sort(edits_.begin(), edits_.end(),
                     [](const Edit& a, const Edit& b) { return a.begin < b.begin; });
    std::string out;
    std::size_t at = 0;
    for (const Edit& edit : edits_) {
      if (edit.begin < at) throw Fault("the evidence of the file overlaps itself");
      out += text_.substr(at, edit.begin - at) + edit.text;
      at = edit.begin + edit.length;
    }
    return out + text_.substr(at);
  }

  const std::string& text_;
  const EvidenceTexts& evidence_;
  claim::Value document_;
  std::string line_end_;
  std::vector<Edit> edits_;
};

[[nodiscard]] bool same(const claim::Value& a, const claim::Value& b, bool top) {
  if (a.kind != b.kind || a.text.text != b.text.text || a.integer != b.integer ||
      a.items.size() != b.items.size()) {
    return false;
  }
  for (std::size_t i = 0; i < a.items.size(); ++i) {
    if (!same(a.items[i], b.items[i], false)) return false;
  }
  const auto skip = [top](const claim::Entry& entry) { return top && entry.key == "evidence"; };
  const auto count = [&](const claim::Value& v) {
    return v.entries.size() -
           static_cast<std::size_t>(std::count_if(v.entries.begin(), v.entries.end(), skip));
  };
  if (count(a) != count(b)) return false;
  return std::all_of(a.entries.begin(), a.entries.end(), [&](const claim::Entry& entry) {
    if (skip(entry)) return true;
    const claim::Entry* other = b.find(entry.key);
    return other != nullptr && same(entry.value, other->value, false);
  });
}

// Reads the outcome back: the same claim, and this evidence.
void check_outcome(const claim::Source& source, const std::string& text,
                   const EvidenceTexts& evidence) {
  const claim::Source outcome{source.name, text};
  const claim::Value before = claim::parse_document(source);
  const claim::Value after = claim::parse_document(outcome);
  const claim::Entry* table = after.find("evidence");
  bool good = same(before, after, true) && table != nullptr;
  if (good) {
    const claim::Entry* recurrence = table->value.find("recurrence");
    const claim::Entry* right_side = table->value.find("right_side");
    const claim::Entry* certificate = table->value.find("certificate");
    good = recurrence != nullptr && recurrence->value.items.size() == evidence.recurrence.size();
    for (std::size_t i = 0; good && i < evidence.recurrence.size(); ++i) {
      good = recurrence->value.items[i].text.text == evidence.recurrence[i];
    }
    good =
        good && (right_side == nullptr ? "0" : right_side->value.text.text) == evidence.right_side;
    if (good && !evidence.index.empty()) {
      const claim::Entry* value =
          certificate == nullptr ? nullptr : certificate->value.find(evidence.index);
      good = value != nullptr && value->value.text.text == evidence.certificate;
    }
  }
  if (!good) throw Fault("the evidence could not be put into the text of " + source.name);
}

}  // namespace

EvidenceTexts evidence_of(const proof::Proof& proof) {
  EvidenceTexts out;
  for (const std::string& text : proof.recurrence_text) {
    out.recurrence.push_back(without_outer_brackets(text));
  }
  out.right_side = proof.right_side_text.empty() ? "0" : proof.right_side_text;
  if (!proof.claim->sum.over.empty() && !proof.certificate_text.empty()) {
    out.index = proof.claim->sum.over[0].index;
    out.certificate = proof.certificate_text;
  }
  return out;
}

std::string evidence_lines(const EvidenceTexts& evidence, std::string_view line_end) {
  std::string out =
      fmt::format("recurrence  = {}{}", recurrence_value(evidence, line_end), line_end);
  if (evidence.right_side != "0") {
    out += fmt::format("right_side  = {}{}", quoted(evidence.right_side), line_end);
  }
  if (!evidence.index.empty()) {
    out += fmt::format("certificate = {}{}", certificate_value(evidence), line_end);
  }
  return out;
}

std::string with_evidence(const claim::Source& source, const EvidenceTexts& evidence) {
  std::string text = Editor(source, evidence).run();
  check_outcome(source, text, evidence);
  return text;
}

}  // namespace sumwright::cli
