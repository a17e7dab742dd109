// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/session.h"

#include <gtest/gtest.h>

#include <algorithm>
#include <atomic>
#include <cerrno>

#include <sys/wait.h>
#include <unistd.h>

#include "core/book/system_calls.h"
#include "tests/book/scratch.h"

namespace filial::test {
namespace {

using namespace filial::book;

std::unique_ptr<Session> opened(const Scratch& scratch, Files& files = disk()) {
    Result<std::unique_ptr<Session>> session = Session::open(files, scratch.places(), scratch.book());
    return session ? std::move(session).value() : nullptr;
}

/// A book with its journal of five edits, left behind as by a crash.
void leave_five(const Scratch& scratch) {
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    auto session = opened(scratch);
    for (int i = 0; i < 5; ++i)
        ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_EQ(session->synced_sequence(), 5U);
}

bool warned(const Session& session, MessageId id) {
    return std::any_of(session.warnings().begin(), session.warnings().end(),
                       [&](const Message& message) { return message.id == id; });
}

TEST(Session, RecoversWhatWasNotSaved) {
    const Scratch scratch;
    leave_five(scratch);
    auto session = opened(scratch);
    ASSERT_NE(session, nullptr);
    EXPECT_EQ(counted(session->book()), 5);
    EXPECT_EQ(session->recovered_entries(), 5U);
    EXPECT_TRUE(session->dirty());
    EXPECT_TRUE(session->warnings().empty());
    session->undo();
    EXPECT_EQ(counted(session->book()), 4);
    ASSERT_TRUE(session->save());
    EXPECT_FALSE(session->dirty());
    session.reset();
    EXPECT_FALSE(disk().exists(scratch.journal()));
    session = opened(scratch);
    EXPECT_EQ(counted(session->book()), 4);
    EXPECT_EQ(session->recovered_entries(), 0U);
}

TEST(Session, ASecondOpeningIsRefusedAndSaysByWhom) {
    const Scratch scratch;
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    const auto first = opened(scratch);
    const auto second = Session::open(disk(), scratch.places(), scratch.book());
    ASSERT_FALSE(second);
    EXPECT_EQ(second.error().message.id, MessageId::BookOpenElsewhere);
    EXPECT_EQ(second.error().message.arguments.at(3).text, std::to_string(getpid()));
}

TEST(Session, AnUnsavedBookIsFoundAgainOnlyOnceItsSessionIsGone) {
    const Scratch scratch;
    auto created = Session::create(disk(), scratch.places(), counting_book());
    ASSERT_TRUE(created);
    auto session = std::move(created).value();
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_TRUE(Session::recoverable(disk(), scratch.places()).empty());
    session.reset();
    const auto left = Session::recoverable(disk(), scratch.places());
    ASSERT_EQ(left.size(), 1U);
    EXPECT_EQ(left[0].entries, 1U);
    auto recovered = Session::recover(disk(), scratch.places(), left[0]);
    ASSERT_TRUE(recovered);
    session = std::move(recovered).value();
    EXPECT_EQ(counted(session->book()), 1);
    ASSERT_TRUE(session->save_as(scratch.book()));
    session.reset();
    EXPECT_TRUE(Session::recoverable(disk(), scratch.places()).empty());
    EXPECT_EQ(counted(opened(scratch)->book()), 1);
}

TEST(Session, DiscardLeavesNothingToRecover) {
    const Scratch scratch;
    leave_five(scratch);
    ASSERT_TRUE(opened(scratch)->discard());
    EXPECT_EQ(counted(opened(scratch)->book()), 0);
}

TEST(Session, RevertIsAnEditThatCanBeUndone) {
    const Scratch scratch;
    leave_five(scratch);
    auto session = opened(scratch);
    ASSERT_TRUE(session->revert_to_saved());
    EXPECT_EQ(counted(session->book()), 0);
    EXPECT_FALSE(session->dirty());
    session->undo();
    EXPECT_EQ(counted(session->book()), 5);
    EXPECT_TRUE(session->dirty());
}

TEST(Session, AJournalCutAnywhereGivesAllEntriesBeforeTheCut) {
    const Scratch source;
    leave_five(source);
    const std::string journal = bytes_of(source.journal());
    const std::string book = bytes_of(source.book());
    for (std::size_t size = 0; size < journal.size(); ++size) {
        const Scratch scratch;
        put_bytes(scratch.book(), book);
        put_bytes(scratch.journal(), journal.substr(0, size));
        const auto session = opened(scratch);
        ASSERT_NE(session, nullptr) << size;
        const std::string kept = journal.substr(0, size);
        const auto lines = std::count(kept.begin(), kept.end(), '\n');
        const bool clean = size > 0 && kept.back() == '\n';
        ASSERT_EQ(counted(session->book()), std::max<std::ptrdiff_t>(lines - 1, 0)) << size;
        ASSERT_EQ(session->warnings().empty(), clean) << size;
        ASSERT_EQ(bytes_of(scratch.journal() + ".damaged"), clean ? "" : kept);
    }
}

TEST(Session, AnAlteredByteIsNoticed) {
    const Scratch source;
    leave_five(source);
    const std::string journal = bytes_of(source.journal());
    const std::string book = bytes_of(source.book());
    for (std::size_t at = 0; at < journal.size(); at += 7) {
        const Scratch scratch;
        put_bytes(scratch.book(), book);
        std::string bad = journal;
        bad[at] = static_cast<char>(bad[at] ^ 0x11);
        put_bytes(scratch.journal(), bad);
        const auto session = opened(scratch);
        ASSERT_NE(session, nullptr) << at;
        const auto before = std::count(journal.begin(), journal.begin() + static_cast<std::ptrdiff_t>(at), '\n');
        ASSERT_EQ(counted(session->book()), std::max<std::ptrdiff_t>(before - 1, 0)) << at;
        ASSERT_EQ(bytes_of(scratch.journal() + ".damaged"), bad);
    }
}

TEST(Session, WhatWasRecoveredFromADamagedJournalIsOnDiskAgain) {
    const Scratch scratch;
    leave_five(scratch);
    put_bytes(scratch.journal(), bytes_of(scratch.journal()) + "torn");
    auto session = opened(scratch);
    EXPECT_TRUE(warned(*session, MessageId::JournalLinesLost));
    session->wait_until_synced();
    EXPECT_EQ(session->synced_sequence(), 5U);
    session.reset();
    session = opened(scratch);
    EXPECT_EQ(counted(session->book()), 5);
    EXPECT_TRUE(session->warnings().empty());
}

TEST(Session, AJournalOfAnotherStateIsKeptAsideAndNotReplayed) {
    const Scratch scratch;
    leave_five(scratch);
    Book other = counting_book();
    other.title = "100";
    ASSERT_TRUE(save_book(disk(), scratch.book(), other));
    const std::string journal = bytes_of(scratch.journal());
    const auto session = opened(scratch);
    EXPECT_EQ(counted(session->book()), 100);
    EXPECT_TRUE(warned(*session, MessageId::JournalOfAnotherState));
    EXPECT_EQ(bytes_of(scratch.journal() + ".damaged"), journal);
}

TEST(Session, ACrashBetweenSavingAndEmptyingTheJournalDoesNothingTwice) {
    const Scratch scratch;
    leave_five(scratch);
    // The journal as the save leaves it when it is stopped right after the book was renamed into place.
    class KeepingCalls : public SystemCalls {
    public:
        int open(const std::string& p, Access a, unsigned m) override { return system_calls().open(p, a, m); }
        long write(int f, std::string_view b) override { return system_calls().write(f, b); }
        int sync(int f) override { return system_calls().sync(f); }
        int truncate(int f) override { return system_calls().truncate(f); }
        int permit(int f, unsigned m) override { return system_calls().permit(f, m); }
        int close(int f) override { return system_calls().close(f); }
        int rename(const std::string& f, const std::string& t) override { return system_calls().rename(f, t); }
        int unlink(const std::string& p) override {
            errno = EIO;
            return p.ends_with(".journal") ? -1 : system_calls().unlink(p);
        }
    } calls;
    const auto files = files_over(calls);
    auto session = opened(scratch, *files);
    ASSERT_TRUE(count_on(*session));
    ASSERT_TRUE(session->save());
    session.reset();
    ASSERT_TRUE(disk().exists(scratch.journal()));
    session = opened(scratch);
    EXPECT_EQ(counted(session->book()), 6);
    EXPECT_EQ(session->recovered_entries(), 0U);
    EXPECT_TRUE(session->warnings().empty());
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    session.reset();
    EXPECT_EQ(counted(opened(scratch)->book()), 7);
}

class FullDisk : public SystemCalls {
public:
    std::atomic<bool> full = false;
    int open(const std::string& p, Access a, unsigned m) override { return system_calls().open(p, a, m); }
    long write(int f, std::string_view b) override {
        if (!full)
            return system_calls().write(f, b);
        errno = ENOSPC;
        return -1;
    }
    int sync(int f) override { return system_calls().sync(f); }
    int truncate(int f) override { return system_calls().truncate(f); }
    int permit(int f, unsigned m) override { return system_calls().permit(f, m); }
    int close(int f) override { return system_calls().close(f); }
    int rename(const std::string& f, const std::string& t) override { return system_calls().rename(f, t); }
    int unlink(const std::string& p) override { return system_calls().unlink(p); }
};

TEST(Session, AFullDiskLosesNothingAndIsTriedAgain) {
    const Scratch scratch;
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    FullDisk calls;
    const auto files = files_over(calls);
    auto session = opened(scratch, *files);
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    calls.full = true;
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_EQ(session->journal_state(), JournalState::InMemoryOnly);
    EXPECT_EQ(session->journal_error()->message.id, MessageId::FileNoSpace);
    EXPECT_EQ(session->synced_sequence(), 1U);
    const std::string before = bytes_of(scratch.book());
    const Done saved = session->save();
    ASSERT_FALSE(saved);
    EXPECT_EQ(saved.error().message.id, MessageId::FileNoSpace);
    EXPECT_EQ(bytes_of(scratch.book()), before);
    EXPECT_TRUE(session->dirty());
    calls.full = false;
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_EQ(session->journal_state(), JournalState::OnDisk);
    EXPECT_EQ(session->synced_sequence(), 3U);
    session.reset();
    EXPECT_EQ(counted(opened(scratch)->book()), 3);
}

TEST(Session, AFolderOrFileRemovedUnderneathLosesNothing) {
    const Scratch scratch;
    const std::string folder = scratch.path("season");
    const std::string path = folder + "/bed.filial";
    std::filesystem::create_directory(folder);
    ASSERT_TRUE(save_book(disk(), path, counting_book()));
    auto result = Session::open(disk(), scratch.places(), path);
    ASSERT_TRUE(result);
    const auto session = std::move(result).value();
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    std::filesystem::remove_all(folder);
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_EQ(session->journal_state(), JournalState::InMemoryOnly);
    const Done saved = session->save();
    ASSERT_FALSE(saved);
    EXPECT_EQ(saved.error().message.id, MessageId::FileMissing);
    std::filesystem::create_directory(folder);
    ASSERT_TRUE(count_on(*session));
    session->wait_until_synced();
    EXPECT_EQ(session->journal_state(), JournalState::OnDisk);
    ASSERT_TRUE(session->save());
    EXPECT_EQ(counted(open_book(disk(), path).value().book), 3);
    std::filesystem::remove(path);
    ASSERT_TRUE(count_on(*session));
    ASSERT_TRUE(session->save());
    EXPECT_EQ(counted(open_book(disk(), path).value().book), 4);
}

/// What a person without write permission sees; runs in a child that is nobody. Gives the number of the failed step.
int without_permission(const Scratch& scratch) {
    if (geteuid() == 0 && setuid(65534) != 0)
        return 1;
    auto session = opened(scratch);
    if (session == nullptr || !count_on(*session))
        return 2;
    session->wait_until_synced();
    if (session->journal_state() != JournalState::OnDisk)
        return 3;
    const Done saved = session->save();
    if (saved || saved.error().message.id != MessageId::FileNotPermitted)
        return 4;
    session.reset();
    session = opened(scratch);
    return session != nullptr && counted(session->book()) == 1 && session->recovered_entries() == 1 ? 0 : 5;
}

TEST(Session, ABookInAFolderThatCannotBeWrittenIsJournalledInTheStateFolder) {
    const Scratch scratch;
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    std::filesystem::create_directory(scratch.path("state"));
    std::filesystem::permissions(scratch.path("state"), std::filesystem::perms::all);
    std::filesystem::permissions(scratch.folder, std::filesystem::perms(0555));
    const pid_t child = fork();
    if (child == 0)
        _exit(without_permission(scratch));
    int status = 0;
    ASSERT_EQ(waitpid(child, &status, 0), child);
    std::filesystem::permissions(scratch.folder, std::filesystem::perms(0755));
    ASSERT_TRUE(WIFEXITED(status));
    EXPECT_EQ(WEXITSTATUS(status), 0);
}

TEST(Session, ANewerBookIsReadOnly) {
    const Scratch scratch;
    put_bytes(scratch.book(), R"({"version":2,"needs_reader":2,"id":"b","title":"7"})");
    const auto session = opened(scratch);
    ASSERT_NE(session, nullptr);
    EXPECT_TRUE(session->read_only());
    EXPECT_EQ(count_on(*session).error().message.id, MessageId::BookReadOnly);
    EXPECT_EQ(session->save().error().message.id, MessageId::BookReadOnly);
}

} // namespace
} // namespace filial::test
