// RFC 4180 (Shafranovich Y, 2005, Common Format and MIME Type for CSV Files) section 2 has seven rules; each has its test, with the rule's own
// examples where it gives any.
#include "exchange/csv_table.h"

#include <gmock/gmock.h>
#include <gtest/gtest.h>

#include "support/test_random.h"

namespace nearpit {
namespace {

using testing::ElementsAre;
using testing::HasSubstr;
using testing::IsEmpty;
using testing::SizeIs;
using Fields = std::vector<std::string>;

CsvTable table_of(std::string_view text) {
  const auto table = read_csv(text, "T.csv");
  EXPECT_TRUE(table.ok()) << (table.ok() ? "" : table.error().one_line());
  return table.ok() ? *table : CsvTable{};
}

std::vector<Fields> rows_of(std::string_view text) {
  std::vector<Fields> rows;
  for (const CsvRow& row : table_of(text).rows)
    rows.push_back(row.fields);
  return rows;
}

std::vector<std::string> errors_of(std::string_view text) {
  const auto table = read_csv(text, "T.csv");
  return table.ok() ? std::vector<std::string>{} : table.error().lines;
}

TEST(CsvTableRfc4180, Rule1EachRecordOnALineEndedByCrLf) {
  EXPECT_THAT(rows_of("h1,h2,h3\r\naaa,bbb,ccc\r\nzzz,yyy,xxx\r\n"),
              ElementsAre(Fields{"aaa", "bbb", "ccc"}, Fields{"zzz", "yyy", "xxx"}));
}

TEST(CsvTableRfc4180, Rule2TheLastRecordMayLackItsLineBreak) {
  EXPECT_THAT(rows_of("h1,h2,h3\r\naaa,bbb,ccc\r\nzzz,yyy,xxx"),
              ElementsAre(Fields{"aaa", "bbb", "ccc"}, Fields{"zzz", "yyy", "xxx"}));
}

TEST(CsvTableRfc4180, Rule3AHeaderOfTheSameFormatAndWidth) {
  const CsvTable table = table_of("field_name,field_name2,field_name3\r\naaa,bbb,ccc\r\n");
  EXPECT_THAT(table.header, ElementsAre("field_name", "field_name2", "field_name3"));
  EXPECT_THAT(table.rows, SizeIs(1));
}

TEST(CsvTableRfc4180, Rule4SpacesArePartOfAField) {
  EXPECT_THAT(rows_of("a,b\n x , y\t\n"), ElementsAre(Fields{" x ", " y\t"}));
  EXPECT_THAT(rows_of("a,b\n\" x \",\"\t\"\n"), ElementsAre(Fields{" x ", "\t"}));
}

TEST(CsvTableRfc4180, Rule4NoCommaBehindTheLastField) {
  EXPECT_THAT(errors_of("a,b\n1,2,\n"), ElementsAre(HasSubstr("T.csv:2: 3 cells, but the header has 2 columns")));
  EXPECT_THAT(errors_of("a,b\n1\n"), ElementsAre(HasSubstr("T.csv:2: 1 cell, but the header has 2 columns")));
}

TEST(CsvTableRfc4180, Rule5FieldsMayBeQuotedAndUnquotedOnesHoldNoQuotes) {
  EXPECT_THAT(rows_of("h1,h2,h3\r\n\"aaa\",\"bbb\",\"ccc\"\r\nzzz,yyy,xxx\r\n"),
              ElementsAre(Fields{"aaa", "bbb", "ccc"}, Fields{"zzz", "yyy", "xxx"}));
  EXPECT_THAT(errors_of("a,b\nx,5\" deep\n"), ElementsAre(HasSubstr("T.csv:2: a quote inside a cell")));
}

TEST(CsvTableRfc4180, Rule6LineBreaksQuotesAndCommasStandInQuotes) {
  EXPECT_THAT(rows_of("h1,h2,h3\r\n\"aaa\",\"b \r\nbb\",\"c,cc\"\r\nzzz,yyy,xxx"),
              ElementsAre(Fields{"aaa", "b \r\nbb", "c,cc"}, Fields{"zzz", "yyy", "xxx"}));
}

TEST(CsvTableRfc4180, Rule7AQuoteInsideQuotesIsDoubled) {
  EXPECT_THAT(rows_of("h1,h2,h3\n\"aaa\",\"b\"\"bb\",\"ccc\"\n"), ElementsAre(Fields{"aaa", "b\"bb", "ccc"}));
  EXPECT_THAT(rows_of("a\n\"\"\"\"\n"), ElementsAre(Fields{"\""}));
}

TEST(CsvTable, ByteOrderMarkBareLineFeedsAndBlankLines) {
  const CsvTable table = table_of("\xEF\xBB\xBF\n\r\na,b\n\n1,2\r\n\r\n3,4\n\n");
  EXPECT_EQ(table.header_line, 3);
  EXPECT_THAT(table.header, ElementsAre("a", "b"));
  ASSERT_THAT(table.rows, SizeIs(2));
  EXPECT_EQ(table.rows[0].line, 5);
  EXPECT_EQ(table.rows[1].line, 7);
}

TEST(CsvTable, ARowsLineIsWhereItBegins) {
  const CsvTable table = table_of("a,b\n\"one\ntwo\r\nthree\",x\ny,z\n");
  ASSERT_THAT(table.rows, SizeIs(2));
  EXPECT_EQ(table.rows[0].line, 2);
  EXPECT_EQ(table.rows[1].line, 5);
}

TEST(CsvTable, EmptyCellsStay) {
  EXPECT_THAT(rows_of("a,b,c\n,,\n\"\",x,\"\"\n"), ElementsAre(Fields{"", "", ""}, Fields{"", "x", ""}));
  EXPECT_THAT(rows_of("a\n\"\"\n"), ElementsAre(Fields{""}));
}

TEST(CsvTable, EveryRowOfTheWrongWidthIsNamed) {
  EXPECT_THAT(
      errors_of("a,b\n1\n1,2\n1,2,3\n"),
      ElementsAre("T.csv:2: 1 cell, but the header has 2 columns; write a comma for each empty cell, too",
                  "T.csv:4: 3 cells, but the header has 2 columns; put quotes around a cell that holds a comma"));
}

TEST(CsvTable, FaultsLeaveTheOtherRows) {
  std::vector<CsvFault> faults;
  const auto table = read_csv("a,b\n1\n1,2\n1,2,3\n", "T.csv", &faults);
  ASSERT_TRUE(table.ok());
  ASSERT_THAT(table->rows, SizeIs(1));
  EXPECT_EQ(table->rows[0].line, 3);
  ASSERT_THAT(faults, SizeIs(2));
  EXPECT_EQ(faults[1].line, 4);
}

TEST(CsvTable, SemicolonsAreRefusedWithAHint) {
  const std::string hint =
      "semicolons between the cells; legal: commas (RFC 4180); save the table with commas between the cells";
  EXPECT_THAT(errors_of("pit;status\nT1-1;dug\n"), ElementsAre("T.csv:1: " + hint));
  EXPECT_THAT(errors_of("\"pit\";\"status\"\n"), ElementsAre("T.csv:1: " + hint));
  EXPECT_THAT(errors_of("pit;\"status\"\n"), ElementsAre("T.csv:1: " + hint));
  EXPECT_THAT(errors_of("pit,status\nT1-1;dug\n"), ElementsAre(HasSubstr("not semicolons")));
  EXPECT_THAT(errors_of("pit\tstatus\n"), ElementsAre(HasSubstr("T.csv:1: tabs between the cells")));
}

TEST(CsvTable, ASemicolonInsideACellIsText) {
  EXPECT_THAT(rows_of("pit,note\nT1-1,dry; stony\n"), ElementsAre(Fields{"T1-1", "dry; stony"}));
}

TEST(CsvTable, AQuoteNotClosedIsNamedWhereItBegan) {
  const std::string open = "the quoted cell that begins here is not closed; write a quote at its end";
  EXPECT_THAT(errors_of("a,b\n1,2\n3,\"four\n5,6\n7,8\n"), ElementsAre("T.csv:3: " + open));
  EXPECT_THAT(errors_of("a,b\n1,\""), ElementsAre("T.csv:2: " + open));
  EXPECT_THAT(errors_of("a,b\n\"1\n\",\"2"), ElementsAre("T.csv:3: " + open));
  EXPECT_THAT(
      errors_of("a,b\n3,\"four\n5,\"six\"\n"),
      ElementsAre(
          "T.csv:2: the quoted cell that begins here ends on line 3 with \"s\" behind its quote; legal: a comma or "
          "the end of the line; write \"\" for a quote inside the cell"));
}

TEST(CsvTable, BytesThatAreNoText) {
  EXPECT_THAT(errors_of("a,b\n1,2\nx,caf\xE9\n"),
              ElementsAre("T.csv:3: \"caf\\xe9\" is not UTF-8; save the table as CSV, UTF-8"));
  EXPECT_THAT(errors_of(std::string_view("a,b\n1,\0\n", 8)), ElementsAre(HasSubstr("T.csv:2: a NUL byte")));
  EXPECT_THAT(errors_of(std::string_view("\xFF\xFEp\0i\0t\0", 8)), ElementsAre(HasSubstr("T.csv:1: ")));
}

TEST(CsvTable, ACarriageReturnAlone) {
  EXPECT_THAT(errors_of("a,b\r1,2\r"), ElementsAre(HasSubstr("T.csv:1: a carriage return without a line feed")));
  EXPECT_THAT(errors_of("a,b\n1,2\n\r3,4\n"), ElementsAre(HasSubstr("T.csv:3: a carriage return without a line feed")));
  EXPECT_THAT(rows_of("a\n\"x\ry\"\n"), ElementsAre(Fields{"x\ry"}));
}

TEST(CsvTable, NothingInIt) {
  for (const std::string_view text : {"", "\xEF\xBB\xBF", "\n\r\n\n"}) {
    EXPECT_THAT(errors_of(text), ElementsAre(HasSubstr("T.csv:1: the table is empty")));
  }
  EXPECT_THAT(table_of("a,b\n").rows, IsEmpty());
}

TEST(CsvTable, Limits) {
  const std::string longest(10'000, 'x');
  EXPECT_THAT(rows_of("a\n" + longest + "\n"), ElementsAre(Fields{longest}));
  EXPECT_THAT(errors_of("a\n1\n" + longest + "x\n"),
              ElementsAre("T.csv:3: the cell that begins here is longer than 10000 bytes; shorten it"));
  EXPECT_THAT(errors_of("a\n\"" + std::string(30'000, '\n')),
              ElementsAre(HasSubstr(
                  "T.csv:2: the cell that begins here is longer than 10000 bytes; see whether its closing quote")));
  EXPECT_THAT(table_of(std::string(999, ',')).header, SizeIs(1'000));
  EXPECT_THAT(errors_of(std::string(1'000, ',')), ElementsAre("T.csv:1: 1001 columns; legal: up to 1000"));
  EXPECT_THAT(errors_of(std::string((64u << 20) + 1, '\n')), ElementsAre(HasSubstr("T.csv:1: 67108865 bytes")));
}

TEST(CsvTable, AMillionRowsAndNoMore) {
  std::string text = "a\n";
  for (int i = 0; i < 1'000'000; ++i)
    text += "1\n";
  EXPECT_THAT(table_of(text).rows, SizeIs(1'000'000));
  EXPECT_THAT(errors_of(text + "1\n"), ElementsAre(HasSubstr("T.csv:1000002: more than 1000000 rows")));
}

// Written by RFC 4180's grammar, the quotes left out at random where they may be.
std::string written(const std::string& field, TestRandom& random) {
  const bool must = field.find_first_of("\",\r\n") != std::string::npos;
  if (!must && random.chance(0.5)) return field;
  std::string out = "\"";
  for (const char c : field)
    out += c == '"' ? std::string("\"\"") : std::string(1, c);
  return out + "\"";
}

TEST(CsvTable, WhatIsWrittenIsReadBack) {
  TestRandom random = TestRandom::of_this_run();
  const std::vector<std::string> pieces = {"a", " ", "\"", ",", "\n", "\r\n", "\r", ";", "é", "0", "\t"};
  for (int round = 0; round < rounds(300); ++round) {
    const int columns = random.between(2, 4);
    std::vector<Fields> rows(static_cast<std::size_t>(random.between(0, 5)) + 1);
    std::string text;
    for (Fields& row : rows) {
      for (int i = 0; i < columns; ++i) {
        std::string field;
        for (int n = random.between(0, 4); n > 0; --n)
          field += random.one_of(pieces);
        text += (i > 0 ? "," : "") + written(field, random);
        row.push_back(field);
      }
      text += random.chance(0.5) ? "\r\n" : "\n";
    }
    const CsvTable table = table_of(text);
    EXPECT_EQ(table.header, rows[0]) << text;
    rows.erase(rows.begin());
    std::vector<Fields> read;
    for (const CsvRow& row : table.rows)
      read.push_back(row.fields);
    EXPECT_EQ(read, rows) << text;
  }
}

}  // namespace
}  // namespace nearpit
