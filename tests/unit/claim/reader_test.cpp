#include "claim/reader.hpp"

#include <gtest/gtest.h>

#include <filesystem>
#include <fstream>
#include <string>
#include <vector>

#include "claim_testing.hpp"

namespace sumwright::claim {
namespace {

using test::expect_all_read;
using test::expect_all_refused;
using test::expect_refused;
using test::full_claim;
using test::refusal;
using test::Refused;
using test::replaced;

Claim read(const std::string& text) { return read_claim_text("t.toml", text).claim; }

TEST(ReadClaim, ReadsEveryPart) {
  const Claim claim = read(full_claim());
  EXPECT_EQ(claim.title, "Squares along one row");
  EXPECT_EQ(claim.running, "n");
  EXPECT_EQ(claim.from, 0);
  ASSERT_EQ(claim.assumptions.size(), 2U);
  EXPECT_EQ(claim.assumptions[0].comparison, Comparison::greater_equal);
  EXPECT_TRUE(claim.assumptions[0].over_integers);
  EXPECT_FALSE(claim.assumptions[1].over_integers);
  EXPECT_EQ(to_text(*claim.sum.summand), "binomial(n, k)^2");
  ASSERT_EQ(claim.sum.over.size(), 1U);
  EXPECT_EQ(claim.sum.over[0].index, "k");
  EXPECT_EQ(to_text(*claim.sum.over[0].low.value), "0");
  EXPECT_EQ(to_text(*claim.sum.over[0].high.value), "n");
  EXPECT_EQ(to_text(*claim.closed), "binomial(2*n, n)");
  EXPECT_FALSE(claim.other_sum);
  ASSERT_EQ(claim.parameters.size(), 2U);
  EXPECT_EQ(claim.parameters[0].name, "x");
  EXPECT_EQ(claim.parameters[0].ring, Parameter::Ring::rationals);
  ASSERT_EQ(claim.parameters[0].excluded.size(), 2U);
  EXPECT_EQ(claim.parameters[0].excluded[0].value, 0);
  EXPECT_EQ(claim.parameters[0].excluded[1].kind, Exclusion::Kind::negative_integers);
  EXPECT_EQ(claim.parameters[1].at_least, mpz_class(0));
  ASSERT_EQ(claim.evidence.recurrence.size(), 2U);
  EXPECT_EQ(to_text(*claim.evidence.recurrence[0]), "-2*(2*n + 1)");
  EXPECT_EQ(to_text(*claim.evidence.right_side), "0");
  EXPECT_EQ(claim.evidence.certificate.size(), 1U);
  EXPECT_EQ(claim.record.authors, (std::vector<std::string>{"A. Author", "B. Author"}));
  EXPECT_EQ(claim.record.licence, "CC0-1.0");
  EXPECT_TRUE(claim.is_equality());
  EXPECT_EQ(claim.source->text, full_claim());
  EXPECT_TRUE(read_claim_text("t", full_claim()).warnings.empty());
}

const std::string kQuestion = "format = 1\ntitle = 'a'\nrunning = 'n'\nfrom = -3\n[sum]\n";

TEST(ReadClaim, TheSmallestOnes) {
  const Claim claim = read(kQuestion + "summand = '1'");
  EXPECT_TRUE(claim.is_question());
  EXPECT_EQ(claim.from, -3);
  EXPECT_TRUE(claim.sum.over.empty());
  EXPECT_FALSE(claim.evidence.right_side);
  EXPECT_FALSE(
      read(kQuestion + "summand = '1'\n[evidence]\nrecurrence = ['1', '-1']").is_question());
}

TEST(ReadClaim, ParametersKeepTheOrderOfTheFile) {
  const Claim claim = read(kQuestion +
                           "summand = 'z*a*m'\n[parameters.z]\nin = 'rationals'\n"
                           "[parameters]\nm = { in = 'integers' }\na = { in = 'rationals' }\n");
  std::string order;
  for (const Parameter& parameter : claim.parameters) order += parameter.name;
  EXPECT_EQ(order, "zma");
  EXPECT_FALSE(claim.parameters[1].at_least);
}

TEST(ReadClaim, BoundsOfEachKind) {
  const Claim claim = read(kQuestion +
                           "summand = '1'\nover = [ { index = 'j', low = -2, high = '+inf' },\n"
                           "{ index = 'k', low = '-inf', high = 'min(j, floor(n/2))' } ]\n");
  ASSERT_EQ(claim.sum.over.size(), 2U);
  const Bound& low = claim.sum.over[0].low;
  EXPECT_EQ(low.kind, Bound::Kind::finite);
  EXPECT_EQ(low.value->operation, Operation::literal);
  EXPECT_EQ(low.value->value, -2);
  EXPECT_EQ(claim.sum.over[0].high.kind, Bound::Kind::plus_infinity);
  EXPECT_EQ(claim.sum.over[0].high.value, nullptr);
  EXPECT_EQ(claim.sum.over[1].low.kind, Bound::Kind::minus_infinity);
  EXPECT_EQ(to_text(*claim.sum.over[1].high.value), "min(j, floor(n/2))");
}

TEST(ReadClaim, AnotherSumMayReuseIndices) {
  const Claim claim =
      read(kQuestion +
           "summand = 'k'\nover = [ { index = 'k', low = 0, high = 'n' } ]\n[equals]\n"
           "summand = 'k*j'\nover = [ { index = 'j', low = 0, high = 'n' },\n"
           "{ index = 'k', low = 0, high = 'j' } ]\n");
  ASSERT_TRUE(claim.other_sum);
  EXPECT_EQ(claim.other_sum->over.size(), 2U);
  EXPECT_TRUE(claim.is_equality());
}

TEST(ReadClaim, ByteOrderMarkAndCarriageReturns) {
  std::string text = "\xEF\xBB\xBF";
  for (const char c : full_claim()) text += c == '\n' ? std::string("\r\n") : std::string(1, c);
  EXPECT_EQ(to_text(*read(text).sum.summand), "binomial(n, k)^2");
  expect_refused(replaced(text, "(n, k)^2", "(n, q)^2"), "8:24", "'q' is not declared");
}

TEST(ReadClaim, PlacesInsideEveryKindOfString) {
  const auto refused = [](const std::string& literal, const std::string& place) {
    SCOPED_TRACE(literal);
    expect_refused(kQuestion + "summand = " + literal + "\n", place, "'q' is not declared");
  };
  refused("\"1 + q\"", "6:16");
  refused("'1 + q'", "6:16");
  refused("\"\\u0031 + q\"", "6:21");
  refused("\"1\\t+ q\"", "6:17");
  refused("\"\"\"\n1 +\n  q\"\"\"", "8:3");
  refused("\"\"\"\r\n1 + \\\r\n   q\"\"\"", "8:4");
  refused("'''\n1 +\nq'''", "8:1");
  refused("\"1 + \\u0071\"", "6:16");
}

TEST(ReadClaim, TitleAndRecordAreFoldedToOneLine) {
  EXPECT_EQ(
      read(replaced(full_claim(), "\"Squares along one row\"", "\"\"\"\nA\nB\r\nC\n\"\"\"")).title,
      "A B C");
  EXPECT_EQ(read(replaced(full_claim(), "\"A. Author\"", "\"A.\\nAuthor\"")).record.authors[0],
            "A. Author");
}

TEST(ReadClaim, RefusesTexts) {
  expect_all_refused(
      full_claim(),
      {{"Squares along", "Squares\\talong", "2:19", "the title has a control character"},
       {"Squares along", "\\u001b[31m", "2:12", "control character '\\x1b'"},
       {"Squares along", "\\u202E", "2:12", "control character"},
       {"Squares along one row", "", "2:12", "the title is empty"},
       {"Squares along one row", " \\n ", "2:12", "the title is empty"},
       {"A. Author", "\\u0000", "24:13", "an author has a control character"},
       {"A Journal 1", "\\u007f", "25:12", "'source' has a control character"},
       {"doi:10.0/0", "a\\rb", "26:16", "'identifier' has a control character"},
       {"CC0-1.0", "\\b", "27:12", "'licence' has a control character"}});
}

TEST(ReadClaim, RefusesFormats) {
  expect_all_refused(full_claim(), {{"format  = 1", "format = 2", "1:10", "format 2 is not known"},
                                    {"format  = 1", "format = 0", "1:10", "reads format 1"},
                                    {"format  = 1", "format = 2\nnew = 1", "1:10", "format 2"}});
}

TEST(ReadClaim, RefusesNames) {
  expect_all_refused(
      full_claim(),
      {{"running = \"n\"", "running = \"\"", "3:12", "'' is not a name"},
       {"running = \"n\"", "running = \"n1 \"", "3:12", "'n1 ' is not a name"},
       {"running = \"n\"", "running = \"_n\"", "3:12", "'_n' is not a name"},
       {"running = \"n\"", "running = \"\xC3\xA9\"", "3:12", "is not a name"},
       {"running = \"n\"", "running = \"inf\"", "3:12", "'inf' means infinity"},
       {"running = \"n\"", "running = \"floor\"", "3:12", "'floor' is a function"},
       {"running = \"n\"", "running = \"m\"", "16:1", "it is the running variable at 3:12"},
       {"index = \"k\"", "index = \"n\"", "9:24", "it is the running variable at 3:12"},
       {"index = \"k\"", "index = \"x\"", "9:24", "it is a parameter at 15:1"},
       {"index = \"k\"", "index = \"max\"", "9:24", "'max' is a function"},
       {"index = \"k\"", "index = \"k k\"", "9:24", "'k k' is not a name"},
       {"x = { in", "n = { in", "15:1", "'n' is declared twice"},
       {"x = { in", "binomial = { in", "15:1", "'binomial' is a function"},
       {"x = { in", "\"x y\" = { in", "15:1", "'x y' is not a name"},
       {"x = { in", "1x = { in", "15:1", "'1x' is not a name"},
       {"x = { in", "inf = { in", "15:1", "'inf' means infinity"},
       {"m = { in", "x = { in", "16:5", "not valid TOML"}});
  expect_refused(kQuestion +
                     "summand = '1'\nover = [ { index = 'k', low = 0, high = 1 },\n"
                     "{ index = 'k', low = 0, high = 1 } ]",
                 "8:12", "it is an index at 7:21");
}

TEST(ReadClaim, RefusesSymbolsInTheWrongPlace) {
  expect_all_refused(
      full_claim(),
      {{"(n, k)^2", "(n, q)^2", "8:24", "'q' is not declared"},
       {"low = \"0\"", "low = \"k\"", "9:35", "only the indices of the ranges before it"},
       {"high = \"n\"", "high = \"x\"", "9:47", "'x' is a rational parameter; bounds are integers"},
       {"high = \"n\"", "high = \"q\"", "9:47", "'q' is not declared"},
       {"(2*n, n)", "(2*n, k)", "12:26", "it is a summation index, and the closed form has none"},
       {"-2*(2*n + 1)", "-2*(2*k + 1)", "19:23", "a coefficient of the recurrence has none"},
       {"right_side  = \"0\"", "right_side = \"k\"", "20:15", "the right side has none"},
       {"m >= 1", "k >= 1", "5:13", "a condition has none"},
       {"m >= 1", "q >= 1", "5:13", "'q' is not declared"},
       {"[\"0\", ", "[\"n\", ", "15:33", "neither a rational constant"},
       {"[\"0\", ", "[\"2*m\", ", "15:35", "'m' is not declared"},
       {"[\"0\", ", "[\"2*n\", ", "15:35", "an excluded value is a rational constant"}});
}

TEST(ReadClaim, LaterRangesUseEarlierIndicesOnly) {
  const std::string head = kQuestion + "summand = 'j*k'\n";
  EXPECT_FALSE(refusal(head + "over = [ { index = 'j', low = 0, high = 'n' },\n"
                              "{ index = 'k', low = 'j', high = 'n - j' } ]"));
  expect_refused(head +
                     "over = [ { index = 'j', low = 'k', high = 'n' },\n"
                     "{ index = 'k', low = 0, high = 'n' } ]",
                 "7:32", "only the indices of the ranges before it");
}

TEST(ReadClaim, TheRunningVariableInConditionsOnlyBesideEquals) {
  EXPECT_FALSE(refusal(replaced(full_claim(), "m >= 1", "m >= n")));
  const std::string claim = replaced(full_claim(), "[equals]\nclosed  = \"binomial(2*n, n)\"", "");
  EXPECT_FALSE(refusal(claim));
  expect_refused(replaced(claim, "m >= 1", "m >= n"), "5:18", "only beside [equals]");
}

TEST(ReadClaim, RefusesConditions) {
  expect_all_refused(full_claim(),
                     {{"m >= 1", "m", "5:14", "a comparison is expected"},
                      {"m >= 1", "m = 1", "5:15", "no equality sign"},
                      {"m >= 1", "0 <= m <= 1", "5:20", "one comparison in each entry"},
                      {"m >= 1", "x >= 1", "5:13", "only != can be stated of it"},
                      {"m >= 1", "m^2 >= 1", "5:14", "^ may not stand"},
                      {"x != 1/2", "x != 1/0", "5:30", "division by zero"},
                      {"x != 1/2", "x != factorial(2)", "5:28", "must be a rational function"}});
}

TEST(ReadClaim, RefusesBounds) {
  expect_all_refused(full_claim(),
                     {{"low = \"0\"", "low = \"inf\"", "9:35", "'low' may be -inf, not inf"},
                      {"high = \"n\"", "high = \"-inf\"", "9:47", "'high' may be inf, not -inf"},
                      {"high = \"n\"", "high = \"n + inf\"", "9:51", "only as a whole bound"},
                      {"high = \"n\"", "high = \"n/2\"", "9:48", "only directly inside 'floor'"},
                      {"high = \"n\"", "high = \"n^2\"", "9:47", "must be integer-affine"},
                      {"high = \"n\"", "high = \"\"", "9:47", "the text is empty"},
                      {"high = \"n\"", "high = 1000001", "9:46", "up to 1000000"},
                      {"low = \"0\"", "low = -1000001", "9:34", "up to 1000000"}});
}

TEST(ReadClaim, RefusesTerms) {
  expect_all_refused(
      full_claim(),
      {{"(n, k)^2", "(n, k^2)", "8:24", "the second argument of 'binomial'"},
       {"(n, k)^2", "(n, k)^9^9^9^9", "8:29", "an exponent beyond 1000"},
       {"(n, k)^2", "(n)", "8:12", "'binomial' takes 2 arguments, not 1"},
       {"(n, k)^2", "(n, k)^k", "8:21", "'n' may not stand in the base"},
       {"(2*n, n)", "(2*n, n/2)", "12:26", "the second argument of 'binomial'"},
       {"right_side  = \"0\"", "right_side = \"n/0\"", "20:17", "division by zero"},
       {"right_side  = \"0\"", "right_side = \"floor(n/2)\"", "20:15", "only in bounds"}});
}

TEST(ReadClaim, RefusesEquals) {
  const std::string other = "summand = 'j'\nover = [ { index = 'j', low = 0, high = 'n' } ]\n";
  expect_all_refused(full_claim(),
                     {{"closed  =", "summand = '1'\nclosed =", "12:1", "are both given"},
                      {"closed  =", "over = []\nclosed =", "12:1", "are both given"},
                      {"closed  =", "# ", "11:1", "[equals] is empty"},
                      {"closed  =", "summand =", "11:1", "'over' is missing or empty"},
                      {"closed  =", "over = []\nsummand =", "11:1", "'over' is missing or empty"},
                      {"closed  =", "over = [ { index = 'j', low = 0, high = 1 } ]\n# ", "11:1",
                       "'summand' is missing in [equals]"}});
  const std::string text = replaced(full_claim(), "closed  = \"binomial(2*n, n)\"", other);
  EXPECT_FALSE(refusal(text));
  expect_refused(replaced(text, "summand = 'j'", "summand = 'k'"), "12:12", "'k' is not declared");
}

TEST(ReadClaim, RefusesEvidence) {
  expect_all_refused(
      full_claim(),
      {{"recurrence  =", "# ", "20:1", "'right_side' may stand only beside a 'recurrence'"},
       {"[\"-2*(2*n + 1)\", \"n + 1\"]", "[]", "19:15", "the recurrence has no coefficients"},
       {"[\"-2*(2*n + 1)\", \"n + 1\"]", "[\"0\", \"1 - 1\"]", "19:15", "all coefficients"},
       {"\"n + 1\"]", "\"factorial(n)\"]", "19:33", "must be a rational function"},
       {"\"n + 1\"]", "\"2^n\"]", "19:35", "its exponents are integers"},
       {"\"n + 1\"]", "\"\"]", "19:33", "the text is empty"},
       {"\"n + 1\"]", "\"1/0\"]", "19:35", "division by zero"},
       {"{ k = \"k^2", "{ j = \"k^2", "21:17", "'j' is not an index of the sum"},
       {"{ k = \"k^2", "{ n = \"0\", k = \"k^2", "21:17", "the indices are 'k'"},
       {"{ k = \"k^2*(2*k - 3*n - 3)/(n + 1 - k)^2\" }", "{}", "21:1",
        "no entry for the index 'k'"},
       {"k^2*(2*k", "factorial(k)*(2*k", "21:22", "a certificate must be a rational function"},
       {"k^2*(2*k", "2^k*(2*k", "21:24", "a certificate must be a rational function"},
       {"k^2*(2*k", "q*(2*k", "21:22", "'q' is not declared"}});
  expect_refused(replaced(replaced(full_claim(), "recurrence  =", "# "), "right_side", "# "),
                 "21:1", "'certificate' may stand only beside a 'recurrence'");
  expect_refused(
      kQuestion + "summand = 'n'\n[evidence]\nrecurrence = ['1']\ncertificate = {k = '1'}", "9:16",
      "the sum has no index");
  expect_all_read(full_claim(), {{"\"n + 1\"]", "\"n/(x + m)\", \"0\"]", "", ""},
                                 {"right_side  = \"0\"", "right_side = \"factorial(n)*x\"", "", ""},
                                 {"right_side  = \"0\"", "", "", ""}});
}

TEST(ReadClaim, CertificatesForEveryIndex) {
  const std::string text = kQuestion +
                           "summand = 'j*k'\nover = [ { index = 'j', low = 0, high = 'n' },\n"
                           "{ index = 'k', low = 0, high = 'j' } ]\n[evidence]\n"
                           "recurrence = ['1']\n";
  EXPECT_FALSE(refusal(text + "certificate = { j = '0', k = 'j*k*n' }"));
  expect_refused(text + "certificate = { k = '0' }", "11:1", "no entry for the index 'j'");
}

TEST(ReadClaim, RefusesParameters) {
  expect_all_refused(
      full_claim(),
      {{"in = \"rationals\"", "in = \"rational\"", "15:13", "did you mean 'rationals'?"},
       {"in = \"rationals\"", "in = \"reals\"", "15:13", "unknown domain 'reals'"},
       {"not = [", "at_least = 0, not = [", "15:25", "'at_least' is only for integer parameters"},
       {"at_least = 0", "not = []", "16:24", "'not' is only for rational parameters"},
       {"at_least = 0", "at_least = 1000001", "16:35", "up to 1000000"},
       {"\"negative integers\"", "\"negative integer\"", "15:38",
        "did you mean 'negative integers'?"},
       {"\"negative integers\"", "\"primes\"", "15:38", "the words are"},
       {"\"negative integers\"", "\"1/0\"", "15:40", "division by zero"},
       {"\"negative integers\"", "\"1.5\"", "15:39", "no decimals"},
       {"\"negative integers\"", "\"\"", "15:38", "the text is empty"},
       {"\"negative integers\"", "\"binomial(4, 2)\"", "15:38",
        "an excluded value must be a rational"},
       {"from    = 0", "from = 1000001", "4:8", "'from' is read up to 1000000"},
       {"from    = 0", "from = -9223372036854775808", "4:8", "up to 1000000"}});
}

TEST(ReadClaim, WarnsOfSignsBeforePowers) {
  const ReadClaim result =
      read_claim_text("t.toml", replaced(full_claim(), "(n, k)^2", "(n, k)*-1^k"));
  ASSERT_EQ(result.warnings.size(), 1U);
  EXPECT_EQ(result.warnings[0].substr(0, 22), "t.toml:8:27: warning: ");
  EXPECT_NE(result.warnings[0].find("-(1^k)"), std::string::npos);
  std::string many = "1";
  for (int i = 0; i < 500; ++i) many += "*-1^k";
  EXPECT_LE(
      read_claim_text("t", replaced(full_claim(), "(n, k)^2", "(n, k)*" + many)).warnings.size(),
      20U);
}

TEST(ReadClaim, TwoClaimsInOneFileAreRefused) {
  expect_refused(full_claim() + full_claim(), "34:1", "not valid TOML");
}

TEST(ReadClaimFile, ReadsAFile) {
  const auto path = std::filesystem::temp_directory_path() / "sumwright_reader_test.toml";
  std::ofstream(path) << full_claim();
  const ReadClaim result = read_claim_file(path);
  EXPECT_EQ(result.claim.source->name, path.string());
  std::filesystem::remove(path);
}

TEST(ReadClaimFile, RefusesWhatIsNoFile) {
  const auto message = [](const std::filesystem::path& path) -> std::string {
    try {
      (void)read_claim_file(path);
    } catch (const InputError& error) {
      return error.what();
    }
    return "was read";
  };
  const auto folder = std::filesystem::temp_directory_path();
  EXPECT_NE(message(folder).find("this is a directory"), std::string::npos);
  EXPECT_NE(
      message(folder / "no-such\x1b-claim.toml").find("no-such\\x1b-claim.toml: error: cannot"),
      std::string::npos);
  EXPECT_NE(message("/dev/zero").find("not a regular file"), std::string::npos);
}

}  // namespace
}  // namespace sumwright::claim
