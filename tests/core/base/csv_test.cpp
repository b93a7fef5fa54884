#include "core/base/csv.h"

#include <fstream>
#include <random>

#include <gtest/gtest.h>

namespace strikeplate {
namespace {

TEST(Csv, QuotesLineEndsAndByteOrderMarkAreRead) {
  const auto table = parseCsv(
      "\xEF\xBB\xBF"
      "file, Trace ,time_s\r\n\"a,\"\"b\"\"\",1,0.5\n\n\"two\nlines\",2,\r\n",
      "t.csv");
  ASSERT_TRUE(table) << table.message();
  EXPECT_EQ(table->columns, (std::vector<std::string>{"file", "Trace", "time_s"}));
  ASSERT_EQ(table->rows.size(), 2u);
  EXPECT_EQ(table->rows[0], (std::vector<std::string>{"a,\"b\"", "1", "0.5"}));
  EXPECT_EQ(table->rows[1], (std::vector<std::string>{"two\nlines", "2", ""}));
  EXPECT_EQ(table->placeOf(0), "line 2 of t.csv");
  EXPECT_EQ(table->placeOf(1), "line 4 of t.csv");
  EXPECT_EQ(table->column("TRACE"), 1u);
}

TEST(Csv, SemicolonsAndTabsAreFound) {
  for (const char separator : {',', ';', '\t'}) {
    const std::string s(1, separator);
    const auto table = parseCsv("a" + s + "b\r1" + s + "2", "t.csv");
    ASSERT_TRUE(table);
    EXPECT_EQ(table->columns.size(), 2u);
    EXPECT_EQ(table->rows.at(0).at(1), "2");
  }
}

TEST(Csv, MissingColumnIsNamedWithThoseThatThereAre) {
  const auto table = parseCsv("x,y\n1,2\n", "geo.csv");
  ASSERT_TRUE(table);
  const auto column = table->neededColumn("time_s");
  ASSERT_FALSE(column);
  EXPECT_EQ(column.message(), "geo.csv has no column time_s; its columns are x, y.");
}

TEST(Csv, BadTablesAreRefusedInOneSentence) {
  EXPECT_EQ(parseCsv("", "t.csv").message(), "t.csv is empty; a table with a header row is needed.");
  EXPECT_EQ(parseCsv("\r\n \n", "t.csv").message(), "t.csv is empty; a table with a header row is needed.");
  EXPECT_EQ(parseCsv("a,b\n\"1,2\n3,4\n", "t.csv").message(), "A quote in line 2 of t.csv never ends; put it right.");
  EXPECT_NE(parseCsv("a,b\n1,2,3\n", "t.csv").message().find("Line 2 of t.csv has 3 cells"), std::string::npos);
  EXPECT_EQ(parseCsv("a,A\n", "t.csv").message(), "t.csv has two columns named a; take one out.");
  EXPECT_FALSE(parseCsv(std::string_view("a\0b", 3), "t.csv"));
  EXPECT_FALSE(readCsv("/no/such/table.csv"));
  EXPECT_FALSE(readCsv("/"));
}

TEST(Csv, WhatIsWrittenIsReadBackExactly) {
  std::mt19937 random(7);
  const std::string alphabet = "ab1. ,;\t\"\r\n";
  for (int round = 0; round < 2000; ++round) {
    std::vector<std::vector<std::string>> rows(1 + random() % 4, std::vector<std::string>(3));
    for (auto& row : rows) {
      for (std::string& cell : row) {
        for (std::size_t i = random() % 6; i > 0; --i) {
          cell += alphabet[random() % alphabet.size()];
        }
      }
      row[0] += "x";  // a row of blanks is passed over
    }
    const auto table = parseCsv(csvText({"one", "two, three", "four"}, rows), "t.csv");
    ASSERT_TRUE(table) << table.message();
    EXPECT_EQ(table->columns[1], "two, three");
    ASSERT_EQ(table->rows, rows);
  }
}

}  // namespace
}  // namespace strikeplate
