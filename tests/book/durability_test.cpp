// SPDX-License-Identifier: GPL-3.0-or-later
// The page cache survives a killed process, so killing alone proves nothing: here the disk forgets at every single call
// whatever was not synced, names in folders included.
#include <gtest/gtest.h>

#include <algorithm>
#include <csignal>
#include <map>
#include <mutex>
#include <random>
#include <thread>

#include <sys/wait.h>
#include <unistd.h>

#include "core/book/system_calls.h"
#include "tests/book/scratch.h"

namespace filial::test {
namespace {

using namespace filial::book;
using Disk = std::map<std::string, std::string>; ///< bytes by path

/// Passes calls on and keeps, beside the real disk, what would be left of it after a loss of power.
class ForgetfulCalls : public SystemCalls {
public:
    explicit ForgetfulCalls(const std::string& book) {
        inodes_.push_back({bytes_of(book), bytes_of(book)});
        names_[book] = synced_names_[book] = 0;
    }
    /// What is left after call number i: names and bytes synced; names at once; half of the unsynced bytes as well.
    std::vector<Disk> strict, eager, torn;
    std::size_t calls() {
        const std::lock_guard lock(mutex_);
        return strict.size();
    }

    int open(const std::string& path, Access access, unsigned permissions) override {
        const std::lock_guard lock(mutex_);
        const int file = system_calls().open(path, access, permissions);
        if (file < 0)
            return file;
        folders_.erase(file);
        if (access == Access::Folder) {
            folders_[file] = path;
        } else {
            if (!names_.contains(path)) {
                inodes_.emplace_back();
                names_[path] = inodes_.size() - 1;
            }
            files_[file] = names_[path];
        }
        remember();
        return file;
    }
    long write(int file, std::string_view bytes) override {
        const std::lock_guard lock(mutex_);
        const long written = system_calls().write(file, bytes);
        if (written > 0)
            inodes_[files_.at(file)].live += bytes.substr(0, static_cast<std::size_t>(written));
        remember();
        return written;
    }
    int sync(int file) override {
        const std::lock_guard lock(mutex_);
        if (const auto folder = folders_.find(file); folder != folders_.end())
            sync_names(folder->second);
        else
            inodes_[files_.at(file)].synced = inodes_[files_.at(file)].live;
        remember();
        return 0;
    }
    int truncate(int file) override {
        const std::lock_guard lock(mutex_);
        inodes_[files_.at(file)].live.clear();
        remember();
        return system_calls().truncate(file);
    }
    int permit(int file, unsigned permissions) override { return system_calls().permit(file, permissions); }
    int close(int file) override { return system_calls().close(file); }
    int rename(const std::string& from, const std::string& to) override {
        const std::lock_guard lock(mutex_);
        names_[to] = names_.at(from);
        names_.erase(from);
        remember();
        return system_calls().rename(from, to);
    }
    int unlink(const std::string& path) override {
        const std::lock_guard lock(mutex_);
        names_.erase(path);
        remember();
        return system_calls().unlink(path);
    }

private:
    struct Inode {
        std::string live, synced;
    };
    void sync_names(const std::string& folder) {
        const auto within = [&](const auto& name) { return name.first.substr(0, name.first.rfind('/')) == folder; };
        std::erase_if(synced_names_, within);
        for (const auto& name : names_)
            if (within(name))
                synced_names_.insert(name);
    }
    void remember() {
        Disk a;
        Disk b;
        Disk c;
        for (const auto& [path, inode] : synced_names_)
            a[path] = inodes_[inode].synced;
        for (const auto& [path, inode] : names_) {
            const Inode& one = inodes_[inode];
            b[path] = one.synced;
            const std::size_t more =
                one.live.size() > one.synced.size() ? (one.live.size() - one.synced.size()) / 2 : 0;
            c[path] = one.synced + one.live.substr(std::min(one.synced.size(), one.live.size()), more);
        }
        strict.push_back(std::move(a));
        eager.push_back(std::move(b));
        torn.push_back(std::move(c));
    }

    std::mutex mutex_;
    std::vector<Inode> inodes_;
    std::map<std::string, std::size_t> names_, synced_names_;
    std::map<int, std::size_t> files_;
    std::map<int, std::string> folders_;
};

/// The titles in the order the session had them; undo makes one come back.
struct Script {
    std::vector<int> titles{0};
    std::vector<std::pair<std::size_t, std::size_t>> acknowledged; ///< calls, index into titles
};

void act(Session& session, ForgetfulCalls& calls, Script& script, char what) {
    if (what == 'u')
        session.undo();
    Done result = done();
    if (what == 'e')
        result = count_on(session);
    else if (what == 's')
        result = session.save();
    ASSERT_TRUE(result);
    if (what == 'u' || what == 'e')
        script.titles.push_back(counted(session.book()));
    if (what == 'w')
        session.wait_until_synced();
    const std::uint64_t synced = session.synced_sequence();
    script.acknowledged.emplace_back(calls.calls(), synced);
}

int reopened_title(const Disk& left, const std::string& from_folder) {
    const Scratch scratch;
    for (const auto& [path, bytes] : left)
        put_bytes(scratch.folder + path.substr(from_folder.size()), bytes);
    const auto session = Session::open(disk(), scratch.places(), scratch.book());
    return session ? counted(session.value()->book()) : -1;
}

TEST(Durability, WhatWasAcknowledgedIsThereAndNothingIsThereTwice) {
    const Scratch scratch;
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    ForgetfulCalls calls(scratch.book());
    Script script;
    {
        const auto files = files_over(calls);
        auto session = Session::open(*files, scratch.places(), scratch.book());
        ASSERT_TRUE(session);
        for (const char what : std::string("ewewseweeewsuweuwsewsewuuw"))
            act(*session.value(), calls, script, what);
    }
    ASSERT_GT(calls.calls(), 40U);
    for (const auto* disks : {&calls.strict, &calls.eager, &calls.torn})
        for (std::size_t i = 0; i < disks->size(); ++i) {
            std::size_t least = 0;
            for (const auto& [after, index] : script.acknowledged)
                if (after <= i)
                    least = std::max(least, index);
            const int title = reopened_title((*disks)[i], scratch.folder);
            const auto begin = script.titles.begin() + static_cast<std::ptrdiff_t>(least);
            ASSERT_NE(std::find(begin, script.titles.end(), title), script.titles.end())
                << "call " << i << " of " << disks->size() << ", found " << title << ", acknowledged up to " << least;
        }
}

/// Counts on and tells every synced number, until it is killed.
[[noreturn]] void count_until_killed(const Scratch& scratch, int pipe) {
    auto session = Session::open(disk(), scratch.places(), scratch.book());
    if (!session)
        _exit(3);
    for (;;) {
        if (!count_on(*session.value()))
            _exit(4);
        const int number = counted(session.value()->book());
        if (number % 5 == 0 && !session.value()->save())
            _exit(5);
        session.value()->wait_until_synced();
        if (session.value()->journal_state() != JournalState::OnDisk || ::write(pipe, &number, sizeof number) < 0)
            _exit(6);
    }
}

TEST(Durability, AKilledProcessLosesNothingItSaidWasOnDisk) {
    const Scratch scratch;
    ASSERT_TRUE(save_book(disk(), scratch.book(), counting_book()));
    std::mt19937 random(7);
    int last = 0;
    for (int cycle = 0; cycle < 40; ++cycle) {
        int ends[2];
        ASSERT_EQ(pipe(ends), 0);
        const pid_t child = fork();
        if (child == 0)
            count_until_killed(scratch, ends[1]);
        close(ends[1]);
        // Killed after some acknowledgements and then at any moment.
        int number = 0;
        for (auto wanted = random() % 4 + 1; wanted > 0 && read(ends[0], &number, sizeof number) > 0; --wanted)
            last = number;
        std::this_thread::sleep_for(std::chrono::microseconds(random() % 3000));
        kill(child, SIGKILL);
        while (read(ends[0], &number, sizeof number) > 0)
            last = number;
        close(ends[0]);
        int status = 0;
        ASSERT_EQ(waitpid(child, &status, 0), child);
        ASSERT_TRUE(WIFSIGNALED(status)) << WEXITSTATUS(status);
        const auto session = Session::open(disk(), scratch.places(), scratch.book());
        ASSERT_TRUE(session);
        const int found = counted(session.value()->book());
        // One more may have reached the disk before it was told.
        ASSERT_GE(found, last);
        ASSERT_LE(found, last + 1);
        last = found;
    }
}

} // namespace
} // namespace filial::test
