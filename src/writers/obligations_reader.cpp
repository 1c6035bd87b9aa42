// From entries to the typed parts of obligations.txt.
//
// Invariant: what is returned is what the file says; nothing is filled in. Numbered entries run
// without gaps, the claim's text has the stated length and SHA-256.
#include "writers/obligations_reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <fstream>
#include <map>

#include "claim/text.hpp"
#include "writers/obligations_lines.hpp"
#include "writers/sha256.hpp"

namespace sumwright::writers {

namespace {

constexpr std::string_view kNotEstablished = "NOT ESTABLISHED, ";

class FileBuilder {
 public:
  FileBuilder(const claim::Source& source, const ObligationsLimits& limits)
      : limits_(limits), source_(source), lines_(read_lines(source, limits)) {
    for (const ReadEntry& entry : lines_.entries) {
      index_[{entry.section->name, entry.key}] = &entry;
    }
  }

  ObligationsFile build() {
    for (const ReadEntry& entry : lines_.entries) {
      out_.entries.push_back({entry.section->name, entry.key, entry.value.text, entry.place});
    }
    front();
    claim_text();
    symbols();
    check_forms();
    recurrence();
    if (has("base term", "B") != has("equality", "normal form")) {
      refuse(lines_.entries.back().place, "`base term` and `equality` come together");
    }
    if (has("base term", "B")) equality();
    classes();
    return std::move(out_);
  }

 private:
  [[noreturn]] void refuse(claim::Place place, const std::string& message) const {
    throw claim::InputError(source_, place, message);
  }

  [[nodiscard]] bool has(const std::string& section, const std::string& key) const {
    return index_.contains({section, key});
  }
  [[nodiscard]] const ReadEntry& at(const std::string& section, const std::string& key) const {
    const auto found = index_.find({section, key});
    if (found == index_.end()) {
      refuse({source_.text.size(), 1}, fmt::format("section `{}`: `{}` is missing", section, key));
    }
    return *found->second;
  }
  [[nodiscard]] std::string text(const std::string& section, const std::string& key) const {
    return at(section, key).value.text;
  }
  [[nodiscard]] ValueReader values() const { return {source_, out_.symbols, limits_}; }

  // The entries prefix0, prefix1, ... (from `first` on), which must have no gaps.
  [[nodiscard]] std::vector<const ReadEntry*> numbered(const std::string& section,
                                                       const std::string& prefix,
                                                       std::size_t first) const {
    std::vector<const ReadEntry*> out;
    while (has(section, prefix + std::to_string(first + out.size()))) {
      out.push_back(&at(section, prefix + std::to_string(first + out.size())));
    }
    const auto count = static_cast<std::size_t>(
        std::count_if(lines_.entries.begin(), lines_.entries.end(), [&](const ReadEntry& entry) {
          return entry.section->name == section && matches(prefix + "#", entry.key);
        }));
    if (count != out.size()) {
      refuse({source_.text.size(), 1},
             fmt::format("section `{}`: the entries `{}...` are not numbered {}, {}, ...", section,
                         prefix, first, first + 1));
    }
    return out;
  }

  void front() {
    const ReadEntry& entry = at("", "verdict");
    out_.verdict = entry.value.text;
    const bool denied = out_.verdict.starts_with(kNotEstablished);
    if (denied) out_.verdict.erase(0, kNotEstablished.size());
    const bool established = out_.verdict == "established";
    if (established == denied ||
        (!established && out_.verdict != "refuted" && out_.verdict != "undecided")) {
      refuse(entry.place, "no such verdict");
    }
    if (text("conclusion", "verdict") != out_.verdict) {
      refuse(at("conclusion", "verdict").place, "not the verdict that the file starts with");
    }
    if (established && has("", "open 1")) {
      refuse(at("", "open 1").place, "an established claim has no open conditions");
    }
    out_.title = text("", "title");
  }

  void claim_text() {
    out_.claim_text = lines_.block;
    const long bytes = values().small_integer(at("claim", "bytes").value);
    const auto size = static_cast<long>(out_.claim_text.size());
    if (bytes == size - 1) {
      out_.claim_text.pop_back();
    } else if (bytes != size) {
      refuse(at("claim", "bytes").place, fmt::format("the claim's text has {} bytes", size));
    }
    out_.claim_sha256 = text("claim", "sha256");
    if (sha256(out_.claim_text) != out_.claim_sha256) {
      refuse(at("claim", "sha256").place, "this is not the SHA-256 of the claim's text below");
    }
  }

  void symbols() {
    static const std::map<std::string, proof::SymbolKind> kinds = {
        {"running variable, integer", proof::SymbolKind::running},
        {"summation index, integer", proof::SymbolKind::index},
        {"parameter, integer", proof::SymbolKind::integer_parameter},
        {"parameter, any number of a field of characteristic zero",
         proof::SymbolKind::rational_parameter}};
    for (const ReadEntry* entry : numbered("symbols", "symbol ", 1)) {
      const std::string& value = entry->value.text;
      const std::size_t comma = std::min(value.find(", "), value.size());
      const auto kind = kinds.find(value.substr(std::min(comma + 2, value.size())));
      const std::string name = value.substr(0, comma);
      const bool repeated =
          std::any_of(out_.symbols.begin(), out_.symbols.end(),
                      [&](const proof::Symbol& symbol) { return symbol.name == name; });
      if (kind == kinds.end() || repeated)
        refuse(entry->place, "not a symbol and what it ranges over");
      out_.symbols.push_back({name, kind->second});
    }
  }

  // Every polynomial and number has its form, also those that are only compared.
  void check_forms() {
    ValueReader reader = values();
    for (const ReadEntry& entry : lines_.entries) {
      switch (entry.row->kind) {
        case ValueKind::text:
          break;
        case ValueKind::integer:
          static_cast<void>(reader.integer(entry.value));
          break;
        case ValueKind::polynomial:
          static_cast<void>(reader.polynomial(entry.value));
          break;
        case ValueKind::factored:
          static_cast<void>(reader.factored(entry.value));
          break;
      }
    }
  }

  void recurrence() {
    for (const ReadEntry* entry : numbered("recurrence", "coefficient ", 0)) {
      out_.recurrence.push_back(entry->value.text);
    }
    if (out_.recurrence.empty()) return;
    out_.right_side = text("recurrence", "right side");
    if (has("recurrence", "certificate")) out_.certificate = text("recurrence", "certificate");
  }

  void equality() {
    ValueReader reader = values();
    out_.has_equality = true;
    out_.base = text("base term", "B");
    for (const ReadEntry* entry : numbered("base term", "a_", 0)) {
      out_.coefficients.push_back(reader.factored(entry->value));
    }
    for (const ReadEntry* entry : numbered("base term", "p_", 0)) {
      out_.p.push_back(reader.factored(entry->value));
    }
    if (out_.p.size() != out_.coefficients.size()) {
      refuse(at("base term", "B").place, "as many p_i as a_i are needed");
    }
    out_.weight = reader.factored(at("base term", "weight").value);
    out_.down = reader.factored(at("base term", "down").value);
    out_.up = reader.factored(at("base term", "up").value);
    out_.certificate_polynomial = reader.polynomial(at("base term", "c").value);
    out_.normal_form = reader.polynomial(at("equality", "normal form").value);
    const proof::Factored scale = reader.factored(at("equality", "scale").value);
    if (!scale.factors.empty()) refuse(at("equality", "scale").place, "the scale is a number");
    out_.normal_scale = scale.constant;
    check_equation();
    out_.terms = static_cast<std::size_t>(reader.small_integer(at("equality", "terms").value));
    out_.degree = reader.small_integer(at("equality", "degree").value);
    out_.bits = static_cast<std::size_t>(reader.small_integer(at("equality", "bits").value));
    for (const ReadEntry* entry : numbered("equality", "degree in symbol ", 1)) {
      out_.degrees.push_back(reader.small_integer(entry->value));
    }
    if (out_.degrees.size() != out_.symbols.size()) {
      refuse(at("equality", "degree").place, "a degree in each symbol is needed");
    }
  }

  // The two sides are always the same expressions in the entries of the base term.
  void check_equation() const {
    std::string left;
    for (std::size_t i = 0; i < out_.p.size(); ++i) {
      left += fmt::format("{}a_{}*p_{}", i == 0 ? "" : " + ", i, i);
    }
    if (text("equality", "left") != "weight*(" + left + ")") {
      refuse(at("equality", "left").place, "expected weight*(" + left + ")");
    }
    if (text("equality", "right") != "up*c(k + 1) - down*c(k)") {
      refuse(at("equality", "right").place, "expected up*c(k + 1) - down*c(k)");
    }
  }

  void classes() {
    ValueReader reader = values();
    for (const ReadEntry& entry : lines_.entries) {
      const std::size_t at_share = entry.key.find(" share ");
      if (at_share == std::string::npos) continue;
      const std::string key = entry.key.substr(0, at_share);
      if (out_.classes.empty() || out_.classes.back().key != key ||
          out_.classes.back().section != entry.section->name) {
        out_.classes.push_back(
            {entry.section->name, key, text(entry.section->name, key + " base"), {}});
      }
      out_.classes.back().shares.push_back(reader.factored(entry.value));
    }
  }

  const ObligationsLimits& limits_;
  const claim::Source& source_;
  ReadLines lines_;
  std::map<std::pair<std::string, std::string>, const ReadEntry*> index_;
  ObligationsFile out_;
};

}  // namespace

ObligationsFile read_obligations_text(std::string name, std::string text,
                                      const ObligationsLimits& limits) {
  const claim::Source source{std::move(name), std::move(text)};
  if (source.text.size() > limits.file_bytes) {
    throw claim::InputError(fmt::format("{}: error: the file is larger than {} bytes",
                                        claim::printable(source.name), limits.file_bytes));
  }
  return FileBuilder(source, limits).build();
}

ObligationsFile read_obligations_file(const std::filesystem::path& path,
                                      const ObligationsLimits& limits) {
  const std::string shown = claim::printable(path.string());
  std::ifstream in(path, std::ios::binary);
  if (!in) throw claim::InputError(shown + ": error: the file cannot be opened");
  std::string text(limits.file_bytes + 1, '\0');
  in.read(text.data(), static_cast<std::streamsize>(text.size()));
  if (in.bad() || (in.fail() && !in.eof())) {
    throw claim::InputError(shown + ": error: the file cannot be read");
  }
  text.resize(static_cast<std::size_t>(in.gcount()));
  return read_obligations_text(path.string(), std::move(text), limits);
}

}  // namespace sumwright::writers
