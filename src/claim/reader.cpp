// From a claim file to a Claim: keys first, then names, then expressions in their places.
//
// Invariant: a Claim that comes out names only declared symbols, each where it may
// stand, and every expression has the shape that its place asks for.
#include "claim/reader.hpp"

#include <fmt/format.h>

#include <algorithm>
#include <utility>

#include "claim/document.hpp"
#include "claim/expression_parser.hpp"
#include "claim/keys.hpp"
#include "claim/names.hpp"
#include "claim/regular_file.hpp"
#include "claim/shapes.hpp"
#include "claim/text.hpp"

namespace sumwright::claim {

namespace {

constexpr std::size_t kMostWarnings = 20;

/// Builds one claim. Each read_ function takes one table of the file.
class ClaimReader {
 public:
  ClaimReader(std::shared_ptr<const Source> source, const Limits& limits)
      : source_(*source), limits_(limits) {
    result_.claim.source = std::move(source);
  }

  [[nodiscard]] ReadClaim read() {
    const Value document = parse_document(source_);
    check_format(document);
    check_keys(source_, document, "", "the claim file");
    read_head(document);
    read_parameters(document);
    result_.claim.sum = read_sum(document.find("sum")->value, "sum");
    read_equals(document);
    read_assumptions(document);
    read_evidence(document);
    read_record(document);
    return std::move(result_);
  }

 private:
  [[noreturn]] void refuse(Place place, std::string_view message,
                           std::string_view note = {}) const {
    throw InputError(source_, place, message, note);
  }

  // First of all: a file of a later format may have keys that this one lacks.
  void check_format(const Value& document) const {
    const Entry* format = document.find("format");
    if (format == nullptr || format->value.kind != Value::Kind::integer) return;
    if (format->value.integer == 1) return;
    refuse(format->value.place, fmt::format("format {} is not known", format->value.integer),
           "this version reads format 1");
  }

  void read_head(const Value& document) {
    Claim& claim = result_.claim;
    claim.title = plain_line(source_, document.find("title")->value.text, "the title");
    const MappedText& running = document.find("running")->value.text;
    names_.declare(source_, running.text, running.place, Names::Kind::running);
    claim.running = running.text;
    claim.from = bounded(document.find("from")->value, "from");
  }

  [[nodiscard]] mpz_class bounded(const Value& value, std::string_view key) const {
    if (value.integer > limits_.magnitude || value.integer < -limits_.magnitude) {
      refuse(value.place, fmt::format("{} is read up to {} in absolute value", in_quotes(key),
                                      limits_.magnitude));
    }
    return mpz_class(static_cast<long>(value.integer));
  }

  void check_entries(std::size_t count, Place place, std::size_t most) const {
    if (count <= most) return;
    refuse({place.offset, std::min<std::size_t>(place.length, 1)},
           fmt::format("{} entries; at most {} are read", count, most));
  }

  void read_parameters(const Value& document) {
    const Entry* parameters = document.find("parameters");
    if (parameters == nullptr) return;
    check_entries(parameters->value.entries.size(), parameters->value.place, limits_.parameters);
    for (const Entry& entry : parameters->value.entries) read_parameter(entry);
  }

  void read_parameter(const Entry& entry) {
    if (entry.value.kind != Value::Kind::table) {
      refuse(entry.value.place,
             fmt::format("parameter {} must be a table, not {}", in_quotes(entry.key),
                         kind_name(entry.value.kind)),
             "such as  x = { in = \"rationals\" }");
    }
    const Value& table = entry.value;
    check_keys(source_, table, "parameter", "parameter " + in_quotes(entry.key));
    Parameter parameter;
    parameter.name = entry.key;
    parameter.place = entry.key_place;
    parameter.ring = ring(table.find("in")->value.text);
    const bool rational = parameter.ring == Parameter::Ring::rationals;
    names_.declare(source_, entry.key, entry.key_place,
                   rational ? Names::Kind::rational : Names::Kind::integer);
    if (const Entry* least = table.find("at_least")) {
      if (rational) refuse(least->key_place, "'at_least' is only for integer parameters");
      parameter.at_least = bounded(least->value, "at_least");
    }
    if (const Entry* excluded = table.find("not")) {
      if (!rational) {
        refuse(excluded->key_place, "'not' is only for rational parameters",
               "conditions on integer parameters go into 'at_least' or 'assume'");
      }
      check_entries(excluded->value.items.size(), excluded->value.place, limits_.entries);
      Symbols none;
      none.elsewhere = names_.all("an excluded value is a rational constant");
      for (const Value& item : excluded->value.items) {
        parameter.excluded.push_back(exclusion(item.text, none));
      }
    }
    result_.claim.parameters.push_back(std::move(parameter));
  }

  [[nodiscard]] Parameter::Ring ring(const MappedText& text) const {
    if (text.text == "rationals") return Parameter::Ring::rationals;
    if (text.text == "integers") return Parameter::Ring::integers;
    const std::vector<std::string> known = {"rationals", "integers"};
    std::string note = suggestion(text.text, known);
    if (note.empty()) note = "'in' is " + alternatives(known);
    refuse(text.place, fmt::format("unknown domain {}", in_quotes(text.text)), note);
  }

  [[nodiscard]] Exclusion exclusion(const MappedText& text, const Symbols& none) {
    Exclusion out;
    if (const auto kind = exclusion_word(source_, text)) {
      out.kind = *kind;
      return out;
    }
    out.written = parse(text, none);
    const Scope scope;
    out.value = Shapes(source_, limits_, scope).constant(*out.written, "an excluded value");
    return out;
  }

  [[nodiscard]] ExpressionPtr parse(const MappedText& text, const Symbols& symbols) {
    std::vector<Remark> remarks;
    ExpressionPtr tree = parse_mapped(source_, text, symbols, limits_, &remarks);
    for (const Remark& remark : remarks) warn(remark);
    return tree;
  }

  void warn(const Remark& remark) {
    if (result_.warnings.size() >= kMostWarnings) return;
    result_.warnings.push_back(render(source_, remark.place, "warning", remark.message));
  }

  // A sum declares its indices one by one, as later ranges may use earlier indices. They are
  // forgotten at the end: another sum may use the same letters.
  [[nodiscard]] Sum read_sum(const Value& table, const std::string& name) {
    check_keys(source_, table, name, "[" + name + "]");
    Sum sum;
    const Entry* over = table.find("over");
    if (over != nullptr) {
      check_entries(over->value.items.size(), over->value.place, limits_.ranges);
      const std::vector<MappedText> indices = index_names(over->value);
      for (const Value& item : over->value.items) sum.over.push_back(read_range(item, indices));
    }
    const Names::View view = names_.with_indices();
    sum.summand = parse(table.find("summand")->value.text, view.symbols);
    Shapes(source_, limits_, view.scope).check_term(*sum.summand);
    if (name == "sum") {
      evidence_view_ = view;
    }
    names_.forget_indices();
    return sum;
  }

  [[nodiscard]] std::vector<MappedText> index_names(const Value& over) const {
    std::vector<MappedText> out;
    for (const Value& item : over.items) {
      check_keys(source_, item, "range", "a range");
      out.push_back(item.find("index")->value.text);
    }
    return out;
  }

  [[nodiscard]] Range read_range(const Value& table, const std::vector<MappedText>& indices) {
    Range range;
    range.place = table.place;
    const MappedText& index = table.find("index")->value.text;
    Names::View view = names_.with_indices();
    for (const MappedText& name : indices) {
      if (view.scope.indices.contains(name.text)) continue;
      view.symbols.elsewhere.try_emplace(
          name.text, "a bound may use only the indices of the ranges before it");
    }
    range.low = read_bound(table.find("low")->value, view, Bound::Kind::minus_infinity);
    range.high = read_bound(table.find("high")->value, view, Bound::Kind::plus_infinity);
    names_.declare(source_, index.text, index.place, Names::Kind::index);
    range.index = index.text;
    return range;
  }

  [[nodiscard]] Bound read_bound(const Value& value, const Names::View& view,
                                 Bound::Kind infinite) {
    Bound bound;
    bound.place = value.kind == Value::Kind::text ? value.text.place : value.place;
    if (value.kind == Value::Kind::integer) {
      Expression literal;
      literal.value = bounded(value, "a bound");
      literal.place = value.place;
      literal.sign = value.place;
      bound.value = std::make_shared<const Expression>(std::move(literal));
      return bound;
    }
    if (const auto kind = infinity(value.text.text)) {
      if (*kind != infinite) {
        refuse(bound.place, infinite == Bound::Kind::minus_infinity
                                ? "'low' may be -inf, not inf"
                                : "'high' may be inf, not -inf");
      }
      bound.kind = infinite;
      return bound;
    }
    bound.value = parse(value.text, view.symbols);
    Shapes(source_, limits_, view.scope).check_bound(*bound.value);
    return bound;
  }

  void read_equals(const Value& document) {
    const Entry* equals = document.find("equals");
    if (equals == nullptr) return;
    const Value& table = equals->value;
    check_keys(source_, table, "equals", "[equals]");
    const Entry* closed = table.find("closed");
    const Entry* summand = table.find("summand");
    const Entry* over = table.find("over");
    const std::string_view either = "[equals] has either 'closed', or 'summand' and 'over'";
    if (closed != nullptr && (summand != nullptr || over != nullptr)) {
      refuse((summand != nullptr ? summand : over)->key_place,
             "a closed form and another sum are both given", either);
    }
    if (closed != nullptr) {
      result_.claim.closed = read_closed(closed->value.text, "the closed form");
      return;
    }
    if (summand == nullptr || over == nullptr || over->value.items.empty()) {
      refuse({table.place.offset, std::min<std::size_t>(table.place.length, 1)},
             summand == nullptr && over == nullptr ? "[equals] is empty"
             : summand == nullptr                  ? "'summand' is missing in [equals]"
                                                   : "'over' is missing or empty in [equals]",
             either);
    }
    result_.claim.other_sum = read_sum(table, "equals");
  }

  // An expression in the running variable and the parameters alone.
  [[nodiscard]] ExpressionPtr read_closed(const MappedText& text, const std::string& what) {
    const Names::View view = view_without_indices(what);
    ExpressionPtr tree = parse(text, view.symbols);
    Shapes(source_, limits_, view.scope).check_term(*tree);
    return tree;
  }

  [[nodiscard]] Names::View view_without_indices(const std::string& what) const {
    Names::View view = names_.with_indices();
    for (const Range& range : result_.claim.sum.over) {
      view.symbols.elsewhere.try_emplace(
          range.index, fmt::format("it is a summation index, and {} has none", what));
    }
    return view;
  }

  void read_assumptions(const Value& document) {
    const Entry* assume = document.find("assume");
    if (assume == nullptr) return;
    check_entries(assume->value.items.size(), assume->value.place, limits_.entries);
    Names::View view = view_without_indices("a condition");
    if (!result_.claim.is_equality()) view.remove_running();
    for (const Value& item : assume->value.items) {
      std::vector<Remark> remarks;
      const ParsedComparison parsed =
          parse_comparison(source_, item.text, view.symbols, limits_, &remarks);
      for (const Remark& remark : remarks) warn(remark);
      Assumption assumption;
      assumption.over_integers = Shapes(source_, limits_, view.scope).check_comparison(parsed);
      assumption.left = parsed.left;
      assumption.comparison = parsed.comparison;
      assumption.right = parsed.right;
      assumption.place = item.text.place;
      result_.claim.assumptions.push_back(std::move(assumption));
    }
  }

  void read_evidence(const Value& document) {
    const Entry* evidence = document.find("evidence");
    if (evidence == nullptr) return;
    const Value& table = evidence->value;
    check_keys(source_, table, "evidence", "[evidence]");
    result_.claim.evidence.place = table.place;
    const Entry* recurrence = table.find("recurrence");
    if (recurrence != nullptr) read_recurrence(recurrence->value);
    for (const char* key : {"right_side", "certificate"}) {
      const Entry* entry = table.find(key);
      if (entry == nullptr || recurrence != nullptr) continue;
      refuse(entry->key_place,
             fmt::format("{} may stand only beside a 'recurrence'", in_quotes(key)));
    }
    if (const Entry* right = table.find("right_side")) {
      result_.claim.evidence.right_side = read_closed(right->value.text, "the right side");
    }
    if (const Entry* certificate = table.find("certificate")) read_certificate(*certificate);
  }

  void read_recurrence(const Value& array) {
    check_entries(array.items.size(), array.place, limits_.entries);
    if (array.items.empty()) refuse(array.place, "the recurrence has no coefficients");
    const std::string what = "a coefficient of the recurrence";
    const Names::View view = view_without_indices(what);
    const Shapes shapes(source_, limits_, view.scope);
    bool all_zero = true;
    for (const Value& item : array.items) {
      ExpressionPtr tree = parse(item.text, view.symbols);
      shapes.check_rational(*tree, what);
      all_zero = all_zero && shapes.is_zero_constant(*tree);
      result_.claim.evidence.recurrence.push_back(std::move(tree));
    }
    if (all_zero) refuse(array.place, "all coefficients of the recurrence are zero");
  }

  void read_certificate(const Entry& certificate) {
    const std::vector<Range>& over = result_.claim.sum.over;
    const auto is_index = [&over](const std::string& name) {
      return std::any_of(over.begin(), over.end(),
                         [&name](const Range& range) { return range.index == name; });
    };
    std::vector<std::string> indices;
    indices.reserve(over.size());
    for (const Range& range : over) indices.push_back(range.index);
    for (const Entry& entry : certificate.value.entries) {
      if (!is_index(entry.key)) {
        std::string note = suggestion(entry.key, indices);
        if (note.empty() && !indices.empty()) note = "the indices are " + listing(indices);
        if (indices.empty()) note = "the sum has no index, so it has no certificate";
        refuse(entry.key_place, fmt::format("{} is not an index of the sum", in_quotes(entry.key)),
               note);
      }
      if (entry.value.kind != Value::Kind::text) {
        refuse(entry.value.place,
               fmt::format("the certificate for {} must be an expression in quotes, not {}",
                           in_quotes(entry.key), kind_name(entry.value.kind)));
      }
      ExpressionPtr tree = parse(entry.value.text, evidence_view_.symbols);
      Shapes(source_, limits_, evidence_view_.scope).check_rational(*tree, "a certificate");
      result_.claim.evidence.certificate.emplace(entry.key, std::move(tree));
    }
    for (const std::string& index : indices) {
      if (result_.claim.evidence.certificate.contains(index)) continue;
      refuse(certificate.key_place,
             fmt::format("the certificate has no entry for the index {}", in_quotes(index)),
             "one rational function for each index; write \"0\" where there is none");
    }
  }

  void read_record(const Value& document) {
    const Entry* entry = document.find("record");
    if (entry == nullptr) return;
    const Value& table = entry->value;
    check_keys(source_, table, "record", "[record]");
    Record& record = result_.claim.record;
    if (const Entry* authors = table.find("authors")) {
      check_entries(authors->value.items.size(), authors->value.place, limits_.entries);
      for (const Value& author : authors->value.items) {
        record.authors.push_back(plain_line(source_, author.text, "an author"));
      }
    }
    const auto line = [&](const char* key) {
      const Entry* found = table.find(key);
      return found == nullptr ? std::string()
                              : plain_line(source_, found->value.text, in_quotes(key));
    };
    record.source = line("source");
    record.identifier = line("identifier");
    record.licence = line("licence");
  }

  const Source& source_;
  const Limits& limits_;
  ReadClaim result_;
  Names names_;
  Names::View evidence_view_;  // the symbols of the summand
};

// Nothing but blanks and line ends, behind a byte-order mark or not.
[[nodiscard]] bool is_blank(std::string_view text) {
  if (text.starts_with("\xEF\xBB\xBF")) text.remove_prefix(3);
  return text.find_first_not_of(" \t\r\n") == std::string_view::npos;
}

}  // namespace

ReadClaim read_claim_text(std::string name, std::string text, const Limits& limits) {
  if (text.size() > limits.file_bytes) {
    throw InputError(name, fmt::format("the file is larger than {} bytes", limits.file_bytes));
  }
  auto source = std::make_shared<const Source>(Source{std::move(name), std::move(text)});
  if (is_blank(source->text)) throw InputError(*source, {0, 1}, "the file is empty");
  return ClaimReader(std::move(source), limits).read();
}

ReadClaim read_claim_file(const std::filesystem::path& path, const Limits& limits) {
  return read_claim_text(path.string(), read_regular_file(path, limits.file_bytes), limits);
}

}  // namespace sumwright::claim
