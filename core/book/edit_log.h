// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <functional>
#include <optional>
#include <string>
#include <vector>

#include "core/book/edit.h"

// Terms. The edit log is undo stack, journal and history at once. An entry is one act: an edit done, undone or redone,
// with its time and who. Acts are only ever added; undo adds an act.
namespace filial::book {

enum class Act : std::uint8_t { Do, Undo, Redo };

struct LogEntry {
    std::uint64_t sequence = 0; ///< from 1, without gaps
    Act act = Act::Do;
    Edit edit;
    std::string merge_key; ///< consecutive Do entries with the same non-empty key are one undo step
    Timestamp time;
    std::string who;
};

class EditLog {
public:
    explicit EditLog(Book book);

    [[nodiscard]] const Book& book() const { return book_; }
    /// Applies an edit and records it. A new edit clears what could be redone (the history keeps it).
    Done perform(Edit edit, Timestamp time, std::string who, std::string merge_key = {});
    /// Undo and redo one step; the message says what was undone. Empty where there is nothing to undo.
    std::optional<Message> undo(Timestamp time, std::string who);
    std::optional<Message> redo(Timestamp time, std::string who);
    [[nodiscard]] bool can_undo() const;
    [[nodiscard]] bool can_redo() const;
    [[nodiscard]] std::optional<Message> undo_text() const;
    [[nodiscard]] std::optional<Message> redo_text() const;
    /// Replays an entry read from a journal; numbered anew. An entry that does not fit is an error and changes nothing.
    Done replay(const LogEntry& entry);

    [[nodiscard]] const std::vector<LogEntry>& history() const { return history_; }
    /// Whether the book differs from the last saved state, by position in the undo stack.
    [[nodiscard]] bool dirty() const;
    void mark_saved();
    /// Called with each entry right after it took effect; the journal listens here.
    void on_entry(std::function<void(const LogEntry&)> listener);

private:
    struct Step {
        std::vector<std::size_t> entries;
    };                           // indices into history_; their edits in order are the step
    void record(LogEntry entry); // numbers it, moves the stacks, tells the listener
    [[nodiscard]] bool joins_last(const std::string& merge_key) const;
    void note_do(std::size_t index, bool joins);
    void note_undo(std::size_t index);
    void note_redo(std::size_t index);
    [[nodiscard]] Edit edit_of(const Step& step) const;

    Book book_;
    std::vector<LogEntry> history_;
    std::vector<Step> done_, undone_;
    std::optional<std::size_t> saved_at_ = 0;
    std::function<void(const LogEntry&)> listener_;
};

} // namespace filial::book
