// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <condition_variable>
#include <memory>
#include <mutex>
#include <optional>
#include <string>
#include <thread>
#include <vector>

#include "core/book/files.h"
#include "core/book/session.h"

// Terms. The journal of a session: lines go to the disk on a thread of their own, synced in batches, so that no key
// press waits for a disk. All lines since the saved state are kept, and where a file cannot be appended to any more
// (the disk was full, the folder went away) the whole of it is written anew at the next line.
namespace filial::book {

class Journal {
public:
    Journal(Files& files, std::string path, std::string header);
    ~Journal();
    Journal(const Journal&) = delete;
    Journal& operator=(const Journal&) = delete;

    /// Lines recovered, up to `sequence`: on disk under this path already, or to be written at once. To be called
    /// before any `add`.
    void resume(std::vector<std::string> lines, std::uint64_t sequence, bool on_disk);
    /// `sequence` counts as synced once the line is.
    void add(std::string line, std::uint64_t sequence);
    /// Removes the file and goes on under this path with no line; `sequence` is in the saved book.
    void restart(std::string path, std::string header, std::uint64_t sequence);
    /// Removes the file; lines added later go nowhere.
    void abandon();
    /// Whether any line was added since the saved state.
    [[nodiscard]] bool empty() const;

    [[nodiscard]] JournalState state() const;
    [[nodiscard]] std::optional<Error> error() const;
    [[nodiscard]] std::uint64_t synced_sequence() const;
    /// Until every line was written, or writing it failed.
    void wait();

private:
    void run(const std::stop_token& stop);
    Done write(bool append, const std::string& text);
    [[nodiscard]] std::string text_from(std::size_t line) const;

    Files& files_;
    mutable std::mutex mutex_;
    std::condition_variable_any changed_;
    std::string path_, header_;
    std::vector<std::string> lines_;
    std::size_t written_ = 0;   // lines in the open file
    std::size_t attempted_ = 0; // lines whose writing was tried
    std::uint64_t added_ = 0, synced_ = 0;
    bool abandoned_ = false;
    std::unique_ptr<AppendFile> file_; // only touched by the thread, and by others while it is idle
    std::optional<Error> error_;
    std::jthread thread_; // last, as it uses the others
};

} // namespace filial::book
