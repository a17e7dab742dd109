// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <optional>
#include <string>
#include <vector>

#include "core/book/book_file.h"
#include "core/book/edit_log.h"
#include "core/book/files.h"

// Terms. A session is one open book: its edit log, its file, its journal and its lock. The journal is a file of one
// entry a line with a checksum, beside the book (".name.filial.journal") or in the state folder where the book's
// folder cannot be written. Saving writes the book and empties the journal. A journal with entries past its book is
// recovered.
namespace filial::book {

enum class JournalState : std::uint8_t { OnDisk, InMemoryOnly };

class Session {
public:
    struct Places {
        std::string state_folder; ///< for journals of unsaved books and of books in folders that cannot be written
    };

    /// A new, unsaved book; its journal lives in the state folder.
    [[nodiscard]] static Result<std::unique_ptr<Session>> create(Files& files, Places places, Book book);
    /// Opens a book file. A lock held elsewhere is an error (BookOpenElsewhere). Recovers what the journal holds past
    /// the file.
    [[nodiscard]] static Result<std::unique_ptr<Session>> open(Files& files, Places places, const std::string& path);
    /// Journals of unsaved books found in the state folder after a crash.
    struct Recoverable {
        std::string journal_path;
        std::string title;
        std::string book_path;
        Timestamp time;
        std::size_t entries = 0;
    };
    [[nodiscard]] static std::vector<Recoverable> recoverable(Files& files, const Places& places);
    [[nodiscard]] static Result<std::unique_ptr<Session>> recover(Files& files, Places places,
                                                                  const Recoverable& which);

    ~Session();
    Session(const Session&) = delete;
    Session& operator=(const Session&) = delete;

    [[nodiscard]] const Book& book() const;
    [[nodiscard]] EditLog& log();
    [[nodiscard]] const EditLog& log() const;
    /// Performs an edit with the present time and the session's `who`.
    Done perform(Edit edit, std::string merge_key = {});
    std::optional<Message> undo();
    std::optional<Message> redo();
    void set_who(std::string who);

    [[nodiscard]] const std::string& path() const; ///< "" while never saved
    [[nodiscard]] bool read_only() const;
    [[nodiscard]] std::size_t recovered_entries() const; ///< entries taken from the journal on opening
    [[nodiscard]] const std::vector<Message>& warnings() const;
    [[nodiscard]] bool dirty() const;

    Done save();
    Done save_as(const std::string& path);
    /// Goes back to the saved file as one undoable edit.
    Done revert_to_saved();
    /// Drops the journal without saving: the person said so when closing.
    Done discard();

    /// Whether entries reach the disk, and the last journal error; a failing journal never loses the book in memory.
    [[nodiscard]] JournalState journal_state() const;
    [[nodiscard]] std::optional<Error> journal_error() const;
    /// The last sequence that is synced to disk, and a wait for it (tests; closing).
    [[nodiscard]] std::uint64_t synced_sequence() const;
    void wait_until_synced();

private:
    struct Private;
    explicit Session(std::unique_ptr<Private> p);
    std::unique_ptr<Private> p_;
};

} // namespace filial::book
