// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/edit_log.h"

#include <stdexcept>

#include "core/book/edit_parts.h"

namespace filial::book {

EditLog::EditLog(Book book) : book_(std::move(book)) {}

Done EditLog::perform(Edit edit, Timestamp time, std::string who, std::string merge_key) {
    edit = trimmed(std::move(edit));
    if (Done applied = apply(edit, book_); !applied)
        return applied;
    record({0, Act::Do, std::move(edit), std::move(merge_key), std::move(time), std::move(who)});
    return done();
}

void EditLog::record(LogEntry entry) {
    entry.sequence = history_.size() + 1;
    const Act act = entry.act;
    const bool joins = act == Act::Do && joins_last(entry.merge_key);
    history_.push_back(std::move(entry));
    const std::size_t index = history_.size() - 1;
    if (act == Act::Do)
        note_do(index, joins);
    else if (act == Act::Undo)
        note_undo(index);
    else
        note_redo(index);
    if (listener_)
        listener_(history_.back());
}

bool EditLog::joins_last(const std::string& merge_key) const {
    // A step that was saved stays as it is, so that undoing what came after leads back to the saved state.
    return !merge_key.empty() && !history_.empty() && history_.back().act == Act::Do &&
           history_.back().merge_key == merge_key && !done_.empty() && saved_at_ != done_.size();
}

void EditLog::note_do(std::size_t index, bool joins) {
    if (saved_at_ && *saved_at_ > done_.size())
        saved_at_.reset();
    undone_.clear();
    if (joins)
        done_.back().entries.push_back(index);
    else
        done_.push_back({{index}});
}

void EditLog::note_undo(std::size_t index) {
    if (!done_.empty()) {
        undone_.push_back(std::move(done_.back()));
        done_.pop_back();
        return;
    }
    // A journal can undo a step from before its book was saved; the saved state then lies one step above the bottom.
    undone_.push_back({{index}});
    if (saved_at_)
        ++*saved_at_;
}

void EditLog::note_redo(std::size_t index) {
    if (undone_.empty()) {
        done_.push_back({{index}});
        return;
    }
    done_.push_back(std::move(undone_.back()));
    undone_.pop_back();
}

Edit EditLog::edit_of(const Step& step) const {
    if (step.entries.size() == 1)
        return history_[step.entries.front()].edit;
    Macro all;
    for (const std::size_t entry : step.entries)
        all.edits.push_back(history_[entry].edit);
    return {std::move(all)};
}

std::optional<Message> EditLog::undo(Timestamp time, std::string who) {
    if (done_.empty())
        return std::nullopt;
    Edit edit = edit_of(done_.back());
    Message text = describe(edit, book_);
    if (!revert(edit, book_))
        throw std::logic_error("a step that was done can be undone");
    record({0, Act::Undo, std::move(edit), {}, std::move(time), std::move(who)});
    return text;
}

std::optional<Message> EditLog::redo(Timestamp time, std::string who) {
    if (undone_.empty())
        return std::nullopt;
    Edit edit = edit_of(undone_.back());
    if (!apply(edit, book_))
        throw std::logic_error("a step that was undone can be redone");
    Message text = describe(edit, book_);
    record({0, Act::Redo, std::move(edit), {}, std::move(time), std::move(who)});
    return text;
}

bool EditLog::can_undo() const {
    return !done_.empty();
}

bool EditLog::can_redo() const {
    return !undone_.empty();
}

std::optional<Message> EditLog::undo_text() const {
    if (done_.empty())
        return std::nullopt;
    return describe(edit_of(done_.back()), book_);
}

std::optional<Message> EditLog::redo_text() const {
    if (undone_.empty())
        return std::nullopt;
    return describe(edit_of(undone_.back()), book_);
}

Done EditLog::replay(const LogEntry& entry) {
    Done fits = entry.act == Act::Undo ? revert(entry.edit, book_) : apply(entry.edit, book_);
    if (fits)
        record(entry);
    return fits;
}

bool EditLog::dirty() const {
    return saved_at_ != done_.size();
}

void EditLog::mark_saved() {
    saved_at_ = done_.size();
}

void EditLog::on_entry(std::function<void(const LogEntry&)> listener) {
    listener_ = std::move(listener);
}

} // namespace filial::book
