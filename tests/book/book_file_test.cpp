// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/book_file.h"

#include <gtest/gtest.h>

#include <fstream>
#include <sstream>

#include <nlohmann/json.hpp>

#include "core/report/wording.h"
#include "tests/book/random_book.h"

namespace filial::test {
namespace {

using namespace filial::book;

std::string fixture() {
    std::ifstream file(std::string(FILIAL_TEST_DATA) + "/fixtures/version-1.filial");
    std::ostringstream text;
    text << file.rdbuf();
    return text.str();
}

std::string error_of(const std::string& json) {
    const Result<OpenedBook> read = read_book(json);
    return read ? "read" : report::render(read.error().message);
}

/// The fixture with one place altered, by JSON pointer.
std::string altered(const std::string& place, const nlohmann::json& value) {
    auto json = nlohmann::ordered_json::parse(fixture());
    json[nlohmann::ordered_json::json_pointer(place)] = value;
    return json.dump();
}

TEST(BookFile, Version1ReadsForEver) {
    const Result<OpenedBook> read = read_book(fixture());
    ASSERT_TRUE(read) << error_of(fixture());
    EXPECT_FALSE(read.value().read_only);
    const Book& book = read.value().book;
    EXPECT_TRUE(book.unknown_fields.empty());
    EXPECT_EQ(book.title, "Trial ground, bed 3");
    const Cross& cross = book.crosses.at(0);
    EXPECT_EQ(cross.class_label(ClassIndex{1}), "purple · smooth");
    EXPECT_EQ(cross.class_label(ClassIndex{3}), "plain");
    EXPECT_EQ(cross.hypothesis.joins, (std::vector<std::vector<std::size_t>>{{2, 3}}));
    const Family& typed = cross.families.at(0);
    EXPECT_EQ(typed.cell(ClassIndex{0}), (Cell{CellState::Number, Count(31)}));
    EXPECT_EQ(typed.cell(ClassIndex{2}).state, CellState::NotLooked);
    EXPECT_EQ(typed.cell(ClassIndex{3}).state, CellState::Blank);
    EXPECT_FALSE(typed.complete(4));
    EXPECT_EQ(typed.sown, Count(60));
    const Family& tallied = cross.families.at(1);
    EXPECT_EQ(tallied.cell(ClassIndex{0}), (Cell{CellState::Number, Count(1)}));
    EXPECT_EQ(tallied.not_scored_cell(), (Cell{CellState::Number, Count(1)}));
    EXPECT_EQ(tallied.set_aside, "wet corner");
    // Nothing of it is lost by a save.
    EXPECT_EQ(nlohmann::json::parse(write_book(book)), nlohmann::json::parse(fixture()));
}

TEST(BookFile, EveryBookReadsBackEqualAndIsWrittenTheSame) {
    for (unsigned seed = 0; seed < 200; ++seed) {
        const Book book = RandomBook(seed).book();
        const std::string text = write_book(book);
        const Result<OpenedBook> read = read_book(text);
        ASSERT_TRUE(read) << error_of(text);
        EXPECT_EQ(read.value().book, book);
        EXPECT_EQ(write_book(read.value().book), text);
    }
}

TEST(BookFile, UnknownFieldsSurviveASaveAndFindTheirOwnerAgain) {
    auto json = nlohmann::ordered_json::parse(fixture());
    json["season"] = {{"rain", 3}};
    auto& cross = json["crosses"][0];
    cross["pollinator"] = "bees";
    cross["hypothesis"]["prior"] = {1, 2};
    cross["traits"][0]["levels"][1]["code"] = 7;
    cross["families"][1]["weight"] = 2.5;
    cross["families"][1]["plants"][0]["height"] = 12;
    Result<OpenedBook> read = read_book(json.dump());
    ASSERT_TRUE(read) << error_of(json.dump());
    EXPECT_EQ(nlohmann::json::parse(write_book(read.value().book)), nlohmann::json::parse(json.dump()));
    Book& book = read.value().book;
    std::swap(book.crosses[0].families[0], book.crosses[0].families[1]);
    const auto again = nlohmann::json::parse(write_book(book));
    EXPECT_EQ(again["crosses"][0]["families"][0]["weight"], 2.5);
    EXPECT_FALSE(again["crosses"][0]["families"][1].contains("weight"));
}

TEST(BookFile, ANewerFileOpensReadOnlyWithItsFields) {
    auto json = nlohmann::ordered_json::parse(fixture());
    json["version"] = 3;
    json["needs_reader"] = 2;
    json["seal"] = "x";
    const Result<OpenedBook> read = read_book(json.dump());
    ASSERT_TRUE(read);
    EXPECT_TRUE(read.value().read_only);
    EXPECT_EQ(read.value().warnings.at(0).id, MessageId::BookReadOnlyNewer);
    EXPECT_EQ(nlohmann::json::parse(write_book(read.value().book))["seal"], "x");
    json["crosses"] = 5;
    EXPECT_EQ(read_book(json.dump()).error().message.id, MessageId::BookTooNew);
}

TEST(BookFile, WrongValuesAreNamedWithPlaceFoundAndAllowed) {
    const std::string family = "/crosses/0/families/0";
    const std::string cell = "allowed are a whole number from 0 to 1,000,000,000,000, “–” for not looked, and null for "
                             "blank";
    for (const auto& [value, found] :
         std::vector<std::pair<nlohmann::json, std::string>>{{-1, "-1"},
                                                             {3.5, "3.5"},
                                                             {1e30, "1e+30"},
                                                             {"NaN", "\"NaN\""},
                                                             {"31", "\"31\""},
                                                             {true, "true"},
                                                             {1'000'000'000'001, "1000000000001"},
                                                             {18'446'744'073'709'551'615U, "18446744073709551615"}})
        EXPECT_EQ(error_of(altered(family + "/typed/1", value)),
                  "crosses[0].families[0].typed[1]: found " + found + "; " + cell);
    EXPECT_EQ(error_of(altered(family + "/typed", {1, 2})),
              "crosses[0].families[0].typed: found 2 entries; allowed are 4");
    EXPECT_EQ(error_of(altered("/crosses/0/classes/1/levels/0", 2)),
              "crosses[0].classes[1].levels[0]: found 2; allowed is a whole number from −1 to 1");
    EXPECT_EQ(error_of(altered("/crosses/0/families/1/id", "family0000000001")),
              "crosses[0].families[1].id: the id family0000000001 is there already; each id is allowed once in a book");
    EXPECT_EQ(error_of(altered("/crosses/0/parents/0", "nobody")),
              "crosses[0].parents[0]: no line of the book has the id nobody");
    EXPECT_EQ(error_of(altered("/crosses/0/hypothesis/joins", nlohmann::json::parse("[[0,1],[1]]"))),
              "crosses[0].hypothesis.joins[1][0]: 1 stands here for the second time; each is allowed once");
    EXPECT_EQ(error_of(altered("/crosses/0/families", nullptr)), "crosses[0].families: found null; allowed is a list");
    EXPECT_EQ(error_of(altered("/title", 5)), "title: found 5; allowed is a text");
}

TEST(BookFile, MalformedTextIsNamedByLineAndColumn) {
    EXPECT_EQ(error_of(""), "the file is empty");
    EXPECT_EQ(error_of(" \n\t"), "the file is empty");
    EXPECT_EQ(error_of("{}"), "this is JSON, but no book: needs_reader is missing");
    EXPECT_EQ(error_of("{\n \"version\": oops}"), "line 2, column 13: this is not JSON");
    EXPECT_EQ(error_of("{\"version\": NaN}").substr(0, 8), "line 1, ");
    EXPECT_EQ(error_of("{\"title\": \"\xff\"}"), "line 1, column 12: this is not JSON");
    EXPECT_EQ(error_of(R"({"needs_reader":1,"needs_reader":1})"),
              "the field needs_reader stands twice in one place; each is allowed once");
    EXPECT_EQ(error_of(std::string(100'000, '[')), "nested more than 64 deep");
}

TEST(BookFile, TruncatedAtEveryByteIsAnErrorAndNeverPartOfABook) {
    const std::string whole = fixture();
    const std::size_t end = whole.find_last_not_of('\n');
    for (std::size_t size = 1; size < end; ++size) {
        const Result<OpenedBook> read = read_book(whole.substr(0, size));
        ASSERT_FALSE(read) << size;
        ASSERT_EQ(read.error().message.id, MessageId::JsonEndsEarly) << size;
    }
}

TEST(BookFile, TheHashIsTheStandardOne) {
    // FIPS 180-2, appendix B.1: the message "abc".
    EXPECT_EQ(sha256_hex("abc"), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
}

} // namespace
} // namespace filial::test
