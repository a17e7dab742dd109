// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/count_table.h"

#include <gtest/gtest.h>

#include <algorithm>

#include "core/report/wording.h"
#include "tests/book/random_book.h"

namespace filial::test {
namespace {

using namespace filial::book;

TEST(CellText, ReadsWhatAPersonTypes) {
    for (const auto& [text, count] :
         std::vector<std::pair<std::string, std::int64_t>>{{"31", 31},
                                                           {" 31 ", 31},
                                                           {"29+8", 37},
                                                           {"29 + 8 + 0", 37},
                                                           {"0", 0},
                                                           {"1\u202F000", 1000},
                                                           {"12\u00A0345", 12345},
                                                           {"1000000000000", 1'000'000'000'000}}) {
        const Result<Cell> cell = read_cell(text);
        ASSERT_TRUE(cell) << text;
        EXPECT_EQ(cell.value(), (Cell{CellState::Number, Count(count)})) << text;
    }
    for (const char* text : {"–", "-", "—", "−", " – "})
        EXPECT_EQ(read_cell(text).value().state, CellState::NotLooked) << text;
    for (const char* text : {"", " ", "\t", "\u00A0"})
        EXPECT_EQ(read_cell(text).value().state, CellState::Blank);
}

TEST(CellText, RefusesWhatIsNoCount) {
    for (const auto& [text, id] :
         std::vector<std::pair<std::string, MessageId>>{{"-1", MessageId::CountNegative},
                                                        {"−3", MessageId::CountNegative},
                                                        {"29+-8", MessageId::CountNegative},
                                                        {"3.5", MessageId::CountNotWhole},
                                                        {"3,5", MessageId::CountNotWhole},
                                                        {"50%", MessageId::CountNotWhole},
                                                        {"1/2", MessageId::CountNotWhole},
                                                        {"abc", MessageId::CountNotANumber},
                                                        {"NaN", MessageId::CountNotANumber},
                                                        {"inf", MessageId::CountNotANumber},
                                                        {"1e2", MessageId::CountNotANumber},
                                                        {"1e30", MessageId::CountTooLarge},
                                                        {"1e+30", MessageId::CountTooLarge},
                                                        {"1e999", MessageId::CountTooLarge},
                                                        {"1000000000001", MessageId::CountTooLarge},
                                                        {"999999999999+2", MessageId::CountTooLarge},
                                                        {"99999999999999999999999", MessageId::CountTooLarge},
                                                        {"29+", MessageId::CountNotANumber},
                                                        {"+8", MessageId::CountNotANumber},
                                                        {"31 100", MessageId::CountNotANumber},
                                                        {"12\u202F34", MessageId::CountNotANumber},
                                                        {"0x10", MessageId::CountNotANumber}}) {
        const Result<Cell> cell = read_cell(text);
        ASSERT_FALSE(cell) << text;
        EXPECT_EQ(cell.error().message.id, id) << text;
    }
    EXPECT_EQ(read_cell("29+x").error().place, 3U);
}

TEST(Block, ReadsWhatSpreadsheetsCopy) {
    using Cells = std::vector<std::vector<std::string>>;
    EXPECT_EQ(read_block("1\t2\r\n3\t4\r\n"), (Cells{{"1", "2"}, {"3", "4"}}));
    EXPECT_EQ(read_block("1\t\n\t4"), (Cells{{"1", ""}, {"", "4"}}));
    EXPECT_EQ(read_block("\"a\tb\"\"c\nd\"\t5"), (Cells{{"a\tb\"c\nd", "5"}}));
    EXPECT_EQ(read_block("\"open\t5"), (Cells{{"\"open", "5"}}));
    EXPECT_EQ(read_block(""), Cells{});
}

TEST(Block, WhatIsWrittenReadsBack) {
    static const std::vector<std::string> pieces{"", "31", "a\tb", "\"", "\"x", "x\"y", "l\nm", "l\r\nm", "–"};
    for (unsigned seed = 0; seed < 300; ++seed) {
        RandomBook random(seed);
        std::vector<std::vector<std::string>> cells(random.up_to(3) + 1);
        for (auto& row : cells)
            for (std::size_t i = random.up_to(3) + 1; i > 0; --i)
                row.push_back(pieces[random.up_to(pieces.size() - 1)]);
        EXPECT_EQ(read_block(write_block(cells)), cells);
    }
}

TEST(CountTable, ReadsEachSeparatorAndTheColumnsItKnows) {
    for (const char separator : {',', ';', '\t'}) {
        std::string text = "\xEF\xBB\xBF"
                           "family,purple,green,not scored,Sown,emerged,alive,note\r\n"
                           "F2-01,31,29+8,2,80,75,70,wet\r\n\r\nF2-02,–,,,,,,\r\n";
        std::replace(text.begin(), text.end(), ',', separator);
        const Result<CountTable> read = read_count_table(text);
        ASSERT_TRUE(read) << report::render(read.error().message);
        const CountTable& table = read.value();
        EXPECT_EQ(table.class_labels, (std::vector<std::string>{"purple", "green"}));
        ASSERT_EQ(table.families.size(), 2U);
        EXPECT_EQ(table.families[0].typed[1], (Cell{CellState::Number, Count(37)}));
        EXPECT_EQ(table.families[0].not_scored_typed, (Cell{CellState::Number, Count(2)}));
        EXPECT_EQ(table.families[0].sown, Count(80));
        EXPECT_EQ(table.families[0].alive, Count(70));
        EXPECT_EQ(table.families[0].note, "wet");
        EXPECT_EQ(table.families[1].typed[0].state, CellState::NotLooked);
        EXPECT_EQ(table.families[1].typed[1].state, CellState::Blank);
        EXPECT_FALSE(table.families[1].sown);
    }
}

TEST(CountTable, ErrorsNameLineAndColumn) {
    using namespace std::string_literals;
    for (const auto& [text, expected] : std::vector<std::pair<std::string, std::string>>{
             {"", "the table is empty"},
             {"family,a\n", "the table has a header but no family"},
             {"F1,3,4\nF2,5,6\n", "line 1: a header is needed: family, then one name a class"},
             {"family,sown\nF1,3\n", "line 1: the header names no class"},
             {"family,a,a\nF1,3,4\n", "line 1, column 3: “a” names a second column; each name is allowed once"},
             {"family,a,b\nF1,3\n", "line 2: 2 columns; the header has 3"},
             {"family,a,b\nF1,3,4,5\n", "line 2: 4 columns; the header has 3"},
             {"family,a\nF1,3\n\nF1,4\n", "line 4, column 1: “F1” names a second family; each name is allowed once"},
             {"family,a,b\nF1,3,-4\n", "line 2, column 3 (b): -4 is negative; a count is a whole number from 0 up"},
             {"family,a,b\n\"F\n1\",3,4\nF2,x,4\n", "line 4, column 2 (a): “x” is not a count; allowed are whole "
                                                    "numbers, sums such as 29+8, – for not looked, "
                                                    "or nothing"},
             {"family,a,b\n,3,4\n", "line 2, column 1: the family has no name"},
             {"family,a\nF\xff,3\n", "line 2, character 2: this is not UTF-8 text"},
             {"family,a\nF1,3\0\n"s, "line 2, character 5: this is not UTF-8 text"},
             {"family,a,b\n\"F1,3,4\n", "line 2: a quote is not closed or stands inside a cell"}}) {
        const Result<CountTable> read = read_count_table(text);
        ASSERT_FALSE(read) << text;
        EXPECT_EQ(report::render(read.error().message), expected);
    }
}

} // namespace
} // namespace filial::test
