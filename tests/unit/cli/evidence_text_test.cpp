// Evidence put into claim files of every form that TOML allows.
#include "cli/evidence_text.hpp"

#include <gtest/gtest.h>

#include "cli/status.hpp"

namespace sumwright::cli {
namespace {

const std::string kHead = "title = \"t\"  # kept\n";
const EvidenceTexts kPlain{{"-2", "n + 1"}, "0", "k", "k/n"};
const EvidenceTexts kWithRightSide{{"1"}, "2^n", "k", "k"};

std::string changed(const std::string& text, const EvidenceTexts& evidence) {
  return with_evidence({"t.toml", text}, evidence);
}

TEST(EvidenceText, AppendsATable) {
  EXPECT_EQ(changed(kHead, kPlain), kHead +
                                        "\n[evidence]\nrecurrence  = [\"-2\", \"n + 1\"]\n"
                                        "certificate = { k = \"k/n\" }\n");
  EXPECT_EQ(changed("title = \"t\"", kWithRightSide),
            "title = \"t\"\n\n[evidence]\nrecurrence  = [\"1\"]\nright_side  = \"2^n\"\n"
            "certificate = { k = \"k\" }\n");
}

TEST(EvidenceText, KeepsLineEnds) {
  EXPECT_EQ(changed("title = \"t\"\r\n", kPlain),
            "title = \"t\"\r\n\r\n[evidence]\r\nrecurrence  = [\"-2\", \"n + 1\"]\r\n"
            "certificate = { k = \"k/n\" }\r\n");
}

TEST(EvidenceText, ReplacesValuesWhereTheyStand) {
  EXPECT_EQ(changed(kHead + "[ evidence ]\nright_side = '3' # r\nrecurrence=[\n'1', # one\n'2'\n]\n"
                            "certificate.k = '''\nk'''\n[record]\n",
                    kPlain),
            kHead +
                "[ evidence ]\nright_side = \"0\" # r\nrecurrence=[\"-2\", \"n + 1\"]\n"
                "certificate.k = \"k/n\"\n[record]\n");
}

TEST(EvidenceText, AddsWhatIsMissing) {
  EXPECT_EQ(changed(kHead + "[evidence]\n  recurrence = ['1']  # c\n\n[record]\n", kWithRightSide),
            kHead +
                "[evidence]\n  recurrence = [\"1\"]  # c\n  right_side = \"2^n\"\n"
                "  certificate = { k = \"k\" }\n\n[record]\n");
}

TEST(EvidenceText, AtTheEndOfAFileWithoutLineEnd) {
  EXPECT_EQ(changed(kHead + "[evidence]\nrecurrence = ['1']", kWithRightSide),
            kHead +
                "[evidence]\nrecurrence = [\"1\"]\nright_side = \"2^n\"\n"
                "certificate = { k = \"k\" }");
}

TEST(EvidenceText, DottedKeys) {
  EXPECT_EQ(changed("evidence.recurrence = ['1']\n" + kHead, kWithRightSide),
            "evidence.recurrence = [\"1\"]\nevidence.right_side = \"2^n\"\n"
            "evidence.certificate = { k = \"k\" }\n" +
                kHead);
}

TEST(EvidenceText, InlineTable) {
  EXPECT_EQ(
      changed("evidence = { recurrence = ['1'] } # e\n" + kHead, kWithRightSide),
      "evidence = { recurrence = [\"1\"], right_side = \"2^n\", certificate = { k = \"k\" } } "
      "# e\n" +
          kHead);
}

TEST(EvidenceText, TableOfItsOwnForTheCertificate) {
  EXPECT_EQ(changed(kHead + "[evidence]\nrecurrence = ['1']\n[evidence.certificate]\nk = '1' # c\n",
                    kWithRightSide),
            kHead +
                "[evidence]\nrecurrence = [\"1\"]\nright_side = \"2^n\"\n"
                "[evidence.certificate]\nk = \"k\" # c\n");
}

TEST(EvidenceText, ByteOrderMarkStays) {
  EXPECT_EQ(changed("\xEF\xBB\xBF"
                    "evidence.recurrence = ['1']\n",
                    {{"2"}, "n", "", ""}),
            "\xEF\xBB\xBF"
            "evidence.recurrence = [\"2\"]\nevidence.right_side = \"n\"\n");
}

TEST(EvidenceText, LongRecurrencesTakeALineEach) {
  const std::string longer(80, '1');
  EXPECT_EQ(evidence_lines({{longer, "1"}, "0", "", ""}, "\n"),
            "recurrence  = [\n  \"" + longer + "\",\n  \"1\"\n]\n");
}

// Nothing but texts of the claim language may be put into a file.
TEST(EvidenceText, NoInjection) {
  EXPECT_THROW((void)changed(kHead, {{"1\"]\nx = 1 #"}, "0", "", ""}), Fault);
  EXPECT_THROW((void)changed(kHead, {{"1"}, "\"", "", ""}), Fault);
  EXPECT_THROW((void)changed(kHead, {{"1"}, "0", "k", "a\nb"}), Fault);
}

}  // namespace
}  // namespace sumwright::cli
