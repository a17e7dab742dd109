// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit_log.h"

#include <gtest/gtest.h>

#include "core/report/wording.h"
#include "tests/book/random_book.h"

namespace filial::test {
namespace {

using namespace filial::book;

Edit titled(const std::string& from, const std::string& to) {
    Book before;
    before.title = from;
    Book after;
    after.title = to;
    return {SetBook{before, after}};
}

void do_title(EditLog& log, const std::string& to, const std::string& key = {}) {
    ASSERT_TRUE(log.perform(titled(log.book().title, to), "", "", key));
}

EditLog empty_log() {
    Book book;
    book.id = "book";
    return EditLog(book);
}

TEST(EditLog, UndoingAllGivesTheStartAndRedoingAllTheEnd) {
    for (unsigned seed = 0; seed < 60; ++seed) {
        RandomBook random(seed);
        const Book start = random.book();
        EditLog log(start);
        for (int i = 0; i < 30; ++i)
            ASSERT_TRUE(log.perform(random.edit(log.book()), "t", "w", random.up_to(2) == 0 ? "key" : ""));
        const Book end = log.book();
        while (log.can_undo())
            ASSERT_TRUE(log.undo("t", "w"));
        EXPECT_EQ(log.book(), start);
        EXPECT_FALSE(log.dirty());
        while (log.can_redo())
            ASSERT_TRUE(log.redo("t", "w"));
        EXPECT_EQ(log.book(), end);
    }
}

TEST(EditLog, ReplayingAHistoryGivesTheSameBookAndTheSameUndo) {
    for (unsigned seed = 0; seed < 60; ++seed) {
        RandomBook random(seed);
        const Book start = random.book();
        EditLog log(start);
        for (int i = 0; i < 60; ++i) {
            const std::size_t act = random.up_to(5);
            if (act == 0)
                log.undo("t", "w");
            else if (act == 1)
                log.redo("t", "w");
            else
                ASSERT_TRUE(log.perform(random.edit(log.book()), "t", "w", random.up_to(1) == 0 ? "key" : ""));
        }
        EditLog again(start);
        for (const LogEntry& entry : log.history())
            ASSERT_TRUE(again.replay(entry));
        EXPECT_EQ(again.book(), log.book());
        ASSERT_EQ(again.history().size(), log.history().size());
        while (log.can_undo()) {
            log.undo("", "");
            ASSERT_TRUE(again.undo("", ""));
            ASSERT_EQ(again.book(), log.book());
        }
        EXPECT_FALSE(again.can_undo());
    }
}

TEST(EditLog, HistoryOnlyGrowsAndIsNumberedWithoutGaps) {
    EditLog log = empty_log();
    std::vector<std::uint64_t> heard;
    log.on_entry([&](const LogEntry& entry) { heard.push_back(entry.sequence); });
    do_title(log, "a");
    do_title(log, "b");
    log.undo("", "");
    do_title(log, "c");
    EXPECT_FALSE(log.can_redo());
    ASSERT_EQ(log.history().size(), 4U);
    EXPECT_EQ(heard, (std::vector<std::uint64_t>{1, 2, 3, 4}));
    EXPECT_EQ(log.history()[2].act, Act::Undo);
}

TEST(EditLog, EntriesOfOneKeyAreOneStep) {
    EditLog log = empty_log();
    do_title(log, "a", "title");
    do_title(log, "ab", "title");
    do_title(log, "abc", "title");
    do_title(log, "x", "other");
    log.undo("", "");
    EXPECT_EQ(log.book().title, "abc");
    log.undo("", "");
    EXPECT_EQ(log.book().title, "");
    EXPECT_FALSE(log.can_undo());
    log.redo("", "");
    EXPECT_EQ(log.book().title, "abc");
    // After an undo or redo a new entry begins a new step, whatever its key.
    do_title(log, "abcd", "title");
    log.undo("", "");
    EXPECT_EQ(log.book().title, "abc");
}

TEST(EditLog, DirtyGoesByPosition) {
    EditLog log = empty_log();
    EXPECT_FALSE(log.dirty());
    do_title(log, "a");
    EXPECT_TRUE(log.dirty());
    log.mark_saved();
    EXPECT_FALSE(log.dirty());
    log.undo("", "");
    EXPECT_TRUE(log.dirty());
    log.redo("", "");
    EXPECT_FALSE(log.dirty());
    log.undo("", "");
    do_title(log, "b"); // the saved state can no longer be reached
    EXPECT_TRUE(log.dirty());
    log.undo("", "");
    EXPECT_TRUE(log.dirty());
}

TEST(EditLog, AStepThatWasSavedTakesNoMoreEntries) {
    EditLog log = empty_log();
    do_title(log, "a", "title");
    log.mark_saved();
    do_title(log, "ab", "title");
    EXPECT_TRUE(log.dirty());
    log.undo("", "");
    EXPECT_EQ(log.book().title, "a");
    EXPECT_FALSE(log.dirty());
}

TEST(EditLog, AJournalCanUndoWhatWasDoneBeforeItsBookWasSaved) {
    EditLog log = empty_log();
    do_title(log, "a");
    const Book saved = log.book();
    log.undo("", "");
    EditLog reopened(saved);
    ASSERT_TRUE(reopened.replay(log.history().back()));
    EXPECT_EQ(reopened.book().title, "");
    EXPECT_TRUE(reopened.dirty());
    EXPECT_TRUE(reopened.can_redo());
    reopened.redo("", "");
    EXPECT_EQ(reopened.book(), saved);
    EXPECT_FALSE(reopened.dirty());
}

TEST(EditLog, ARefusedEditIsNotRecorded) {
    EditLog log = empty_log();
    EXPECT_FALSE(log.perform(titled("not so", "x"), "", ""));
    EXPECT_TRUE(log.history().empty());
    EXPECT_FALSE(log.undo("", ""));
    EXPECT_FALSE(log.redo("", ""));
}

} // namespace
} // namespace filial::test
