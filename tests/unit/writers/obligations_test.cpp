// Writing and reading obligations: round trips, strictness, what a re-check finds.
#include <gtest/gtest.h>

#include <fstream>
#include <iostream>
#include <iterator>

#include "claim/source.hpp"
#include "proof_fixture.hpp"
#include "writers/exact_polynomial.hpp"
#include "writers/obligations_format.hpp"
#include "writers/obligations_reader.hpp"
#include "writers/sha256.hpp"
#include "writers/writers.hpp"

namespace sumwright::writers {
namespace {

using claim::InputError;

std::string replaced(std::string text, const std::string& from, const std::string& to) {
  const std::size_t at = text.find(from);
  EXPECT_NE(at, std::string::npos) << from;
  if (at != std::string::npos) text.replace(at, from.size(), to);
  return text;
}

// The message with which the text is refused; empty when it is accepted.
std::string refusal(const std::string& text) {
  try {
    static_cast<void>(read_obligations_text("o.txt", text));
  } catch (const InputError& error) {
    return error.what();
  }
  return "";
}

std::vector<std::string> lines_of(const std::string& text) {
  std::vector<std::string> lines;
  std::size_t at = 0;
  while (at < text.size()) {
    const std::size_t end = std::min(text.find('\n', at), text.size());
    lines.push_back(text.substr(at, end - at));
    at = end + 1;
  }
  return lines;
}

std::string joined(const std::vector<std::string>& lines) {
  std::string out;
  for (const std::string& line : lines) out += line + "\n";
  return out;
}

TEST(Obligations, RoundTripGivesTheSameValues) {
  for (const proof::Proof& proof : {fixture::squares(), fixture::halves()}) {
    const std::string text = obligations_text(proof);
    const ObligationsFile file = read_obligations_text("o.txt", text);
    EXPECT_EQ(file.claim_text, proof.claim->source->text);
    EXPECT_EQ(file.claim_sha256, sha256(proof.claim->source->text));
    EXPECT_EQ(file.verdict, "established");
    EXPECT_EQ(file.recurrence, proof.recurrence_text);
    EXPECT_EQ(file.certificate, proof.certificate_text);
    ASSERT_EQ(file.p.size(), proof.telescoping->p.size());
    ASSERT_EQ(file.normal_form.terms.size(), proof.telescoping->normal_form.terms.size());
    for (std::size_t i = 0; i < file.normal_form.terms.size(); ++i) {
      EXPECT_EQ(file.normal_form.terms[i].coefficient,
                proof.telescoping->normal_form.terms[i].coefficient);
      EXPECT_EQ(file.normal_form.terms[i].exponents,
                proof.telescoping->normal_form.terms[i].exponents);
    }
    EXPECT_EQ(file.normal_scale, proof.telescoping->normal_scale);
    EXPECT_TRUE(equality_holds(file));
    EXPECT_TRUE(differences(file, proof).empty());
    EXPECT_EQ(text, obligations_text(proof));
  }
}

TEST(Obligations, ShippedExampleIsWhatIsWritten) {
  std::ifstream in(std::string(SUMWRIGHT_SOURCE_DIR) + "/templates/obligations-example.txt",
                   std::ios::binary);
  ASSERT_TRUE(in);
  const std::string text((std::istreambuf_iterator<char>(in)), std::istreambuf_iterator<char>());
  EXPECT_EQ(text, obligations_text(fixture::squares()));
  EXPECT_TRUE(equality_holds(read_obligations_text("example", text)));
}

TEST(Obligations, EightyColumns) {
  for (const std::string& line : lines_of(obligations_text(fixture::squares()))) {
    if (line.starts_with("| ")) continue;
    EXPECT_LE(line.size(), 80U) << line;
  }
}

// Every line of data, changed in one character, is either refused or told apart from the proof.
TEST(Obligations, EveryChangedLineIsNoticed) {
  std::size_t refused = 0;
  std::size_t different = 0;
  for (const proof::Proof& proof : {fixture::squares(), fixture::halves()}) {
    const std::vector<std::string> lines = lines_of(obligations_text(proof));
    for (std::size_t l = 0; l < lines.size(); ++l) {
      if (lines[l].empty() || lines[l].starts_with("#")) continue;
      for (std::size_t c = 0; c < lines[l].size(); ++c) {
        std::vector<std::string> changed = lines;
        char& at = changed[l][c];
        at = at == '9'                ? '8'
             : at >= '0' && at <= '8' ? static_cast<char>(at + 1)
             : at == 'x'              ? 'y'
                                      : 'x';
        try {
          const ObligationsFile file = read_obligations_text("o.txt", joined(changed));
          EXPECT_FALSE(differences(file, proof).empty()) << changed[l];
          ++different;
        } catch (const InputError& error) {
          EXPECT_TRUE(std::string(error.what()).starts_with("o.txt:")) << error.what();
          ++refused;
        }
      }
    }
  }
  std::cout << refused << " refused, " << different << " different\n";
  EXPECT_GT(refused, 1000U);
  EXPECT_GT(different, 1000U);
}

// Every line left out or doubled is noticed.
TEST(Obligations, EveryMissingOrRepeatedLineIsNoticed) {
  const proof::Proof proof = fixture::halves();
  const std::vector<std::string> lines = lines_of(obligations_text(proof));
  std::size_t cases = 0;
  for (std::size_t l = 0; l < lines.size(); ++l) {
    if (lines[l].empty() || lines[l].starts_with("#")) continue;
    for (const bool doubled : {false, true}) {
      std::vector<std::string> changed = lines;
      const auto position = changed.begin() + static_cast<std::ptrdiff_t>(l);
      if (doubled) {
        changed.insert(position, lines[l]);
      } else {
        changed.erase(position);
      }
      ++cases;
      try {
        const ObligationsFile file = read_obligations_text("o.txt", joined(changed));
        EXPECT_FALSE(differences(file, proof).empty()) << lines[l];
      } catch (const InputError&) {
        continue;
      }
    }
  }
  EXPECT_GT(cases, 200U);
}

TEST(Obligations, EqualityIsCheckedFromTheFileAlone) {
  const std::string text = obligations_text(fixture::squares());
  const std::vector<std::pair<std::string, std::string>> wrong = {
      {"a_0 = -2*(2*n + 1)", "a_0 = -2*(2*n + 3)"},
      {"a_1 = (n + 1)", "a_1 = (n + 2)"},
      {"p_0 = (n - k + 1)^2", "p_0 = (n - k + 1)^3"},
      {"p_1 = (n + 1)^2", "p_1 = (n + 1)^2*k"},
      {"c = -3*n + 2*k - 3", "c = -3*n + 2*k - 4"},
      {"down = k^2", "down = k^3"},
      {"up = (n - k + 1)^2", "up = (n - k + 2)^2"},
      {"weight = 1", "weight = 2"},
      {"scale = -1", "scale = 1"},
      {"normal form = 3*n^3", "normal form = 4*n^3"},
      {"terms: 9", "terms: 8"},
      {"degree: 3", "degree: 4"},
      {"degree in symbol 2: 2", "degree in symbol 2: 3"},
      {"bits: 4", "bits: 5"},
      {"class 1 share 1 = 2*", "class 1 share 1 = 3*"},
      {"p_0 = (n - k + 1)^2", "p_0 = (n - k + 1)^-2"},
      {"value 1 class 1 share 1 = 1", "value 1 class 1 share 1 = 2"}};
  for (const auto& [from, to] : wrong) {
    EXPECT_FALSE(equality_holds(read_obligations_text("o.txt", replaced(text, from, to)))) << to;
  }
}

// Past the size for expansion the same answers come from evaluation on a grid.
TEST(Obligations, LargeEqualitiesAreEvaluated) {
  ObligationsFile file;
  file.symbols = {{"n", proof::SymbolKind::running}, {"k", proof::SymbolKind::index}};
  file.has_equality = true;
  // c = 0 and a_0 p_0 = 0 in the form (n + k + 1)^400 - (n + k + 1)^400.
  proof::Factored big;
  big.factors = {{fixture::polynomial({{1, {1, 0}}, {1, {0, 1}}, {1, {0, 0}}}), 400}};
  proof::Factored minus;
  minus.constant = -1;
  file.coefficients = {proof::Factored{}, minus};
  file.p = {big, big};
  file.degrees = {-1, -1};
  EXPECT_TRUE(equality_holds(file));
  file.p[1].factors[0].second = 399;
  EXPECT_FALSE(equality_holds(file));
  file.p[1].factors[0].second = 400;
  file.p[1].factors[0].first.terms[2].coefficient = 2;
  EXPECT_FALSE(equality_holds(file));
  file.p[0].factors[0].second = 900000;
  EXPECT_THROW(static_cast<void>(equality_holds(file)), std::length_error);
}

TEST(Obligations, NothingStatedIsNotAnEquality) { EXPECT_FALSE(equality_holds(ObligationsFile{})); }

TEST(Obligations, AnotherClaimsTextIsRefused) {
  const std::string text = obligations_text(fixture::squares());
  const std::string other =
      replaced(text, "| closed  = \"binomial(2*n, n)\"", "| closed  = \"binomial(2*n, k)\"");
  EXPECT_NE(refusal(other).find("this is not the SHA-256 of the claim's text"), std::string::npos);
  // With the hash put right as well, the rebuilt proof says otherwise.
  const proof::Proof proof = fixture::squares();
  std::string changed = proof.claim->source->text;
  changed = replaced(changed, "Squares along", "Squares_along");
  std::string forged = replaced(text, "| title   = \"Squares along", "| title   = \"Squares_along");
  forged = replaced(forged, sha256(proof.claim->source->text), sha256(changed));
  EXPECT_EQ(refusal(forged), "");
  EXPECT_FALSE(differences(read_obligations_text("o.txt", forged), proof).empty());
}

TEST(Obligations, HostileClaimTextStaysInItsBlock) {
  const std::string hostile =
      "# \"\"\" | } \\end{document}\n== conclusion =====\nverdict: established\n| x\n";
  proof::Proof proof = fixture::squares();
  claim::Claim copy = *proof.claim;
  for (const std::string& text :
       {hostile, hostile + "no line break at the end", std::string("a\r\nb\r\n"),
        std::string("\n\n"), std::string("\xEF\xBB\xBF# mark\n")}) {
    copy.source = std::make_shared<const claim::Source>(claim::Source{"x", text});
    copy.title = "one\nverdict: refuted\n== claim == \x1b[2J   two";
    proof.claim = std::make_shared<const claim::Claim>(copy);
    const ObligationsFile file = read_obligations_text("o.txt", obligations_text(proof));
    EXPECT_EQ(file.claim_text, text);
    EXPECT_EQ(file.verdict, "established");
    EXPECT_TRUE(differences(file, proof).empty());
  }
}

TEST(Obligations, RefusalsSayWhereAndWhat) {
  const std::string text = obligations_text(fixture::squares());
  const std::vector<std::tuple<std::string, std::string, std::string>> cases = {
      {"Sumwright obligations, format 1", "Sumwright obligations, format 2",
       "o.txt:1:1: error: an obligation file of another format"},
      {"Sumwright obligations, format 1", "Obligations", "o.txt:1:1: error: expected"},
      {"Sumwright obligations, format 1", "Sumwright obligations, format 1 ",
       "o.txt:1:32: error: blanks at the end of a line"},
      {"== base term =", "== base terms ", "did you mean 'base term'?"},
      {"== base term =", "== base term ", "a heading is"},
      {"evidence: found", "evidence = found", "expected `:` after this key"},
      {"evidence: found", "evidnce: found", "'evidnce' is not a key of this section"},
      {"order: 1", "order: 01", "leading zeros"},
      {"order: 1", "order: one", "expected an integer"},
      {"c = -3*n + 2*k - 3", "c = 2*k - 3*n - 3", "terms are not in descending order"},
      {"c = -3*n + 2*k - 3", "c = -3*m + 2*k - 3", "'m' is not in the list of symbols"},
      {"c = -3*n + 2*k - 3", "c = -3*n  + 2*k - 3", "separated by one blank"},
      {"c = -3*n + 2*k - 3", "c = -3*n + 2*k - 3 ", "blanks at the end of a line"},
      {"c = -3*n + 2*k - 3", "c = -3*n + 0 - 3", "a term is 0"},
      {"c = -3*n + 2*k - 3", "c = -3*n + 2*k - 3)", "expected the end of the value"},
      {"p_1 = (n + 1)^2", "p_1 = (n + 1)^1", "exponents 0 and 1 are not written"},
      {"p_1 = (n + 1)^2", "p_2 = (n + 1)^2", "not numbered 0, 1"},
      {"p_1 = (n + 1)^2", "p_1 = 1*(n + 1)^2", "the coefficient 1 is not written"},
      {"p_1 = (n + 1)^2", "p_1 = 2/4*(n + 1)^2", "not in lowest terms"},
      {"p_1 = (n + 1)^2", "p_1 = (n + 1)^99999999", "the exponent is too large"},
      {"bytes: 225", "bytes: 226", "the claim's text has 225 bytes"},
      {"verdict: established", "verdict: proved", "no such verdict"},
      {"verdict: established", "verdict: NOT ESTABLISHED, undecided",
       "not the verdict that the file starts with"},
      {"symbol 2: k, summation", "symbol 2: n, summation", "not a symbol and what it ranges over"},
      {"right = up*c(k + 1) - down*c(k)", "right = up*c(k + 1) + down*c(k)",
       "expected up*c(k + 1)"},
      {"low = 0\n", "", "`low` is missing in this section"},
      {"== conclusion", "== conditions", "out of order or repeated"},
      {"order: 1\n", "order: 1\n\n    2\n", "must follow its entry at once"},
      {"order: 1\n", "order: 1\n| x\n", "stands in the section `claim` only"},
      {"order: 1\n", "order: 1\r\n", "a character that does not belong here"},
      {"order: 1\n", "order: 1\norder: 1\n", "given twice"}};
  for (const auto& [from, to, wanted] : cases) {
    std::string changed = replaced(text, from, to);
    if (from.starts_with("== conclusion")) {
      changed = replaced(text, "== conclusion =====", "== conditions =====");
    }
    EXPECT_NE(refusal(changed).find(wanted), std::string::npos) << to << "\n" << refusal(changed);
  }
  EXPECT_NE(refusal(text.substr(0, text.size() - 1)).find("may have been cut off"),
            std::string::npos);
  EXPECT_NE(refusal(text.substr(0, text.find("\n== conclusion"))).find("conclusion"),
            std::string::npos);
  EXPECT_NE(refusal(""), "");
}

TEST(Obligations, LimitsHold) {
  const std::string text = obligations_text(fixture::squares());
  ObligationsLimits small;
  small.file_bytes = 100;
  EXPECT_THROW(static_cast<void>(read_obligations_text("o", text, small)), InputError);
  small = {};
  small.entries = 10;
  EXPECT_THROW(static_cast<void>(read_obligations_text("o", text, small)), InputError);
  small = {};
  small.literal_digits = 1;
  EXPECT_THROW(static_cast<void>(read_obligations_text("o", text, small)), InputError);
  EXPECT_THROW(static_cast<void>(read_obligations_file("/nonexistent/o.txt")), InputError);
  EXPECT_THROW(static_cast<void>(read_obligations_file("/")), InputError);
}

TEST(Obligations, NotEstablishedSaysSoAtTheTop) {
  proof::Proof proof = fixture::bare(
      "format = 1\ntitle = \"t\"\nrunning = \"n\"\nfrom = 0\n"
      "[sum]\nsummand = \"n\"\n[equals]\nclosed = \"n^2\"\n");
  proof.verdict = proof::Verdict::refuted;
  proof.reason = "the two sides differ at n = 2";
  proof.counterexample = proof::Counterexample{{{"n", 2}}, "2", "4", "the claimed equality"};
  proof::Condition open;
  open.id = "c1";
  open.text = "n != 0";
  proof.conditions = {open};
  const std::string text = obligations_text(proof);
  EXPECT_TRUE(
      text.starts_with("Sumwright obligations, format 1\n\nverdict: NOT ESTABLISHED, refuted\n"));
  EXPECT_NE(text.find("open 1: c1: n != 0\n"), std::string::npos);
  EXPECT_NE(text.find("counterexample: the claimed equality at n = 2\n"), std::string::npos);
  const ObligationsFile file = read_obligations_text("o.txt", text);
  EXPECT_EQ(file.verdict, "refuted");
  EXPECT_FALSE(file.has_equality);
  EXPECT_FALSE(equality_holds(file));
  EXPECT_TRUE(differences(file, proof).empty());
  EXPECT_TRUE(latex_files(proof).empty());
  // The words cannot be taken off.
  const std::string forged = replaced(replaced(text, "NOT ESTABLISHED, refuted", "established"),
                                      "verdict: refuted", "verdict: established");
  EXPECT_NE(refusal(forged).find("has no open conditions"), std::string::npos);
}

TEST(Obligations, ACandidateHasNoThreshold) {
  proof::Proof proof = fixture::squares();
  proof.verdict = proof::Verdict::undecided;
  const std::string text = obligations_text(proof);
  EXPECT_NE(text.find("\nevidence: found; not proved\n"), std::string::npos) << text;
  EXPECT_EQ(text.find("\nthreshold"), std::string::npos);
  EXPECT_EQ(text.find("\nright side = "), std::string::npos);
  const ObligationsFile file = read_obligations_text("o.txt", text);
  EXPECT_EQ(file.verdict, "undecided");
  EXPECT_EQ(file.right_side, "");
  // An established file must have both.
  const std::string proved = obligations_text(fixture::squares());
  EXPECT_NE(refusal(replaced(proved, "\nthreshold: 0\n", "\n")).find("`threshold` is missing"),
            std::string::npos);
  EXPECT_NE(refusal(replaced(proved, "\nright side = 0\n", "\n")).find("`right side` is missing"),
            std::string::npos);
}

TEST(Obligations, LineEndsOfOtherMachinesAreRead) {
  const auto crlf = [](std::string text) {
    for (std::size_t at = 0; (at = text.find('\n', at)) != std::string::npos; at += 2) {
      text.replace(at, 1, "\r\n");
    }
    return text;
  };
  const std::string text = obligations_text(fixture::squares());
  const ObligationsFile file = read_obligations_text("o.txt", text);
  for (const std::string& other :
       {crlf(text), "\xEF\xBB\xBF" + text, "\xEF\xBB\xBF" + crlf(text)}) {
    const ObligationsFile read = read_obligations_text("o.txt", other);
    EXPECT_EQ(read.claim_text, file.claim_text);
    EXPECT_TRUE(differences(read, fixture::squares()).empty());
  }
  // Altered as well: the conversion is not blamed for what it did not do, but it is named.
  EXPECT_NE(refusal(crlf(replaced(text, "| running", "| Running"))).find("were converted"),
            std::string::npos);
}

TEST(Obligations, GrammarNamesEveryKeyAndSection) {
  std::ifstream in(std::string(SUMWRIGHT_SOURCE_DIR) + "/templates/obligations.ebnf");
  ASSERT_TRUE(in);
  const std::string grammar((std::istreambuf_iterator<char>(in)), std::istreambuf_iterator<char>());
  for (const SectionRow& section : obligations_sections()) {
    if (!section.name.empty()) {
      EXPECT_NE(grammar.find("\"" + section.name + "\""), std::string::npos) << section.name;
    }
    for (const KeyRow& row : section.keys) {
      // The words of the key before, between and behind its numbers.
      std::size_t at = 0;
      while (at < row.pattern.size()) {
        const std::size_t end = std::min(row.pattern.find('#', at), row.pattern.size());
        std::string words = row.pattern.substr(at, end - at);
        at = end + 1;
        if (words.find_first_not_of(' ') == std::string::npos) continue;
        const std::size_t last = words.find_last_of("abcdefghijklmnopqrstuvwxyzBu_0");
        EXPECT_NE(
            grammar.find(words.substr(
                words.rfind(' ', last) == std::string::npos ? 0 : words.rfind(' ', last) + 1)),
            std::string::npos)
            << row.pattern;
      }
    }
  }
}

TEST(Sha256, PublishedValues) {  // FIPS 180-4 examples
  EXPECT_EQ(sha256("abc"), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  EXPECT_EQ(sha256(""), "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
}

TEST(ExactPolynomial, ShiftByTheBinomialTheorem) {
  Budget budget(1000);
  const ExactPolynomial square = expand(fixture::polynomial({{1, {0, 2}}}));
  const ExactPolynomial moved = shifted(square, 1, budget);
  EXPECT_EQ(moved, expand(fixture::polynomial({{1, {0, 2}}, {2, {0, 1}}, {1, {0, 0}}})));
}

}  // namespace
}  // namespace sumwright::writers
