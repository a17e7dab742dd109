// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit.h"

#include <gtest/gtest.h>

#include "core/book/book_file.h"
#include "core/book/check.h"
#include "core/book/edit_parts.h"
#include "core/report/wording.h"
#include "tests/book/random_book.h"

namespace filial::test {
namespace {

using namespace filial::book;

Cell number(std::int64_t value) {
    return {CellState::Number, Count(value)};
}

Book small_book() {
    Book book;
    book.id = "book000000000001";
    book.lines = {{"line000000000001", "K14", ""}};
    Cross cross;
    cross.id = "cross00000000001";
    cross.name = "K14 × M02, F2";
    cross.parents = {"line000000000001"};
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}};
    cross.classes = product_classes(cross.traits);
    Family family = new_family("F2-06", 2);
    family.id = "family0000000001";
    family.typed = {number(34), number(9)};
    cross.families = {family};
    book.crosses = {cross};
    return book;
}

SetCell set_first(const Cell& before, const Cell& after) {
    return {"cross00000000001", "family0000000001", 0, before, after};
}

TEST(Edit, RevertUndoesWhateverApplyDid) {
    for (unsigned seed = 0; seed < 400; ++seed) {
        RandomBook random(seed);
        const Book start = random.book();
        const Edit edit = random.edit(start);
        Book book = start;
        ASSERT_TRUE(apply(edit, book)) << write_edit(edit);
        ASSERT_TRUE(check_book(book)) << write_edit(edit);
        const Book changed = book;
        ASSERT_TRUE(revert(edit, book)) << write_edit(edit);
        EXPECT_EQ(book, start) << write_edit(edit);
        ASSERT_TRUE(apply(edit, book));
        EXPECT_EQ(book, changed);
    }
}

TEST(Edit, JsonReadsBackToTheSameChange) {
    for (unsigned seed = 0; seed < 400; ++seed) {
        RandomBook random(seed);
        const Book start = random.book();
        const Edit edit = random.edit(start);
        const std::string json = write_edit(edit);
        EXPECT_EQ(json.find('\n'), std::string::npos);
        const Result<Edit> read = read_edit(json);
        ASSERT_TRUE(read) << json << report::render(read.error().message);
        EXPECT_EQ(read.value().change.index(), edit.change.index());
        EXPECT_EQ(write_edit(read.value()), json);
        Book book = start;
        Book other = start;
        ASSERT_TRUE(apply(edit, book));
        ASSERT_TRUE(apply(read.value(), other)) << json;
        EXPECT_EQ(book, other) << json;
        ASSERT_TRUE(revert(trimmed(read.value()), other)) << json;
        EXPECT_EQ(start, other) << json;
    }
}

TEST(Edit, OneThatDoesNotFitLeavesTheBookAsItWas) {
    // Two books of different seeds share no ids, so hardly any edit of one fits the other.
    int refusals = 0;
    for (unsigned seed = 0; seed < 200; ++seed) {
        RandomBook random(seed);
        const Book start = random.book();
        Book other = random.book();
        const Book before = other;
        const Edit edit = random.edit(start);
        if (apply(edit, other))
            continue;
        ++refusals;
        EXPECT_EQ(other, before) << write_edit(edit);
    }
    EXPECT_GT(refusals, 100);
}

TEST(Edit, ADifferentBeforeIsRefused) {
    Book book = small_book();
    const Done refused = apply({set_first(number(33), number(31))}, book);
    ASSERT_FALSE(refused);
    EXPECT_EQ(refused.error().message.id, MessageId::EditBeforeDiffers);
    EXPECT_EQ(book, small_book());
}

TEST(Edit, AMacroIsDoneWholeOrNotAtAll) {
    Book book = small_book();
    const Macro macro{{{set_first(number(34), number(31))}, {set_first(number(34), number(30))}}};
    ASSERT_FALSE(apply({macro}, book));
    EXPECT_EQ(book, small_book());
}

TEST(Edit, WhatCouldNotBeReadBackIsRefused) {
    const Book start = small_book();
    const Cross& cross = start.crosses[0];
    Cross outside = cross;
    outside.classes[0].levels = {2};
    Cross orphan = cross;
    orphan.parents = {"nobody"};
    HypothesisUse overlapping;
    overlapping.joins = {{0, 1}, {1}};
    Book without_line = start;
    without_line.lines.clear();
    Family wide = new_family("F2-07", 3);
    Family twin = new_family("F2-07", 2);
    twin.id = cross.families[0].id;
    Plant stray;
    stray.phenotype = ClassIndex{2};
    const std::vector<std::pair<Edit, MessageId>> cases{
        {{SetCross{cross.id, cross, outside}}, MessageId::FieldNotIndex},
        {{SetCross{cross.id, cross, orphan}}, MessageId::FieldParentMissing},
        {{SetHypothesis{cross.id, cross.hypothesis, overlapping}}, MessageId::FieldIndexTwice},
        {{SetBook{start, without_line}}, MessageId::FieldParentMissing},
        {{InsertFamily{cross.id, 0, wide}}, MessageId::FieldWrongLength},
        {{InsertFamily{cross.id, 0, twin}}, MessageId::EditIdTaken},
        {{AddPlants{cross.id, cross.families[0].id, {stray}}}, MessageId::FieldNotIndex},
        {{set_first(number(34), {CellState::Number, Count(Count::kLargestTyped + 1)})}, MessageId::FieldNotCount},
        {{set_first(number(34), {CellState::Blank, Count(1)})}, MessageId::FieldNotCell},
        {{MoveFamily{cross.id, 0, 1}}, MessageId::EditPlaceOutside},
        {{SetCell{"nobody", "nobody", 0, {}, {}}}, MessageId::EditCrossMissing},
        {{SetCell{cross.id, "nobody", 0, {}, {}}}, MessageId::EditFamilyMissing},
    };
    for (const auto& [edit, expected] : cases) {
        Book book = start;
        const Done refused = apply(edit, book);
        ASSERT_FALSE(refused) << write_edit(edit);
        EXPECT_EQ(refused.error().message.id, expected) << report::render(refused.error().message);
        EXPECT_EQ(book, start);
    }
}

TEST(Edit, SaysWhatChanged) {
    const Book book = small_book();
    EXPECT_EQ(report::render(describe({set_first(number(34), number(31))}, book)), "F2-06, 34 → 31");
    EXPECT_EQ(report::render(describe({set_first(number(34), {CellState::NotLooked, {}})}, book)), "F2-06, 34 → –");
    EXPECT_EQ(report::render(describe({set_first({}, number(31))}, book)), "F2-06, 31 entered");
    const Macro typed{{{set_first({}, number(3))}, {set_first(number(3), number(31))}}};
    EXPECT_EQ(report::render(describe({typed}, book)), "F2-06, 31 entered");
}

TEST(Edit, UnknownKindsAndFieldsAreErrors) {
    EXPECT_FALSE(read_edit(R"({"edit":"explode"})"));
    EXPECT_FALSE(read_edit(R"({"edit":"move_cross","from":0})"));
    EXPECT_FALSE(read_edit(R"({"edit":"move_cross","from":0,"to":-1})"));
    EXPECT_FALSE(read_edit(R"({"edit":"move_cross","from":0,"to":1,"how":"fast"})"));
    EXPECT_FALSE(read_edit("[]"));
    EXPECT_TRUE(read_edit(R"({"edit":"move_cross","from":0,"to":1})"));
    const std::string cell = R"({"edit":"set_cell","cross":"c","family":"f","class":0,"before":null,"after":3)";
    EXPECT_TRUE(read_edit(cell + "}"));
    EXPECT_FALSE(read_edit(cell + R"(,"more":1})"));
}

} // namespace
} // namespace filial::test
