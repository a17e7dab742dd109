// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/journal.h"

namespace filial::book {

Journal::Journal(Files& files, std::string path, std::string header)
    : files_(files), path_(std::move(path)), header_(std::move(header)),
      thread_([this](const std::stop_token& stop) { run(stop); }) {}

Journal::~Journal() {
    wait();
}

void Journal::resume(std::vector<std::string> lines, std::uint64_t sequence, bool on_disk) {
    {
        const std::lock_guard lock(mutex_);
        lines_ = std::move(lines);
        attempted_ = on_disk ? lines_.size() : 0;
        added_ = sequence;
        synced_ = on_disk ? sequence : 0;
    }
    changed_.notify_all();
}

void Journal::add(std::string line, std::uint64_t sequence) {
    {
        const std::lock_guard lock(mutex_);
        if (abandoned_)
            return;
        lines_.push_back(std::move(line));
        added_ = sequence;
    }
    changed_.notify_all();
}

void Journal::restart(std::string path, std::string header, std::uint64_t sequence) {
    wait();
    const std::lock_guard lock(mutex_);
    file_.reset();
    // A journal that stays all the same does no harm: its saving mark says that its entries are in the book.
    static_cast<void>(files_.remove(path_));
    path_ = std::move(path);
    header_ = std::move(header);
    lines_.clear();
    written_ = attempted_ = 0;
    added_ = synced_ = sequence;
    error_.reset();
}

void Journal::abandon() {
    wait();
    const std::lock_guard lock(mutex_);
    file_.reset();
    static_cast<void>(files_.remove(path_));
    abandoned_ = true;
}

bool Journal::empty() const {
    const std::lock_guard lock(mutex_);
    return lines_.empty();
}

JournalState Journal::state() const {
    const std::lock_guard lock(mutex_);
    return error_ ? JournalState::InMemoryOnly : JournalState::OnDisk;
}

std::optional<Error> Journal::error() const {
    const std::lock_guard lock(mutex_);
    return error_;
}

std::uint64_t Journal::synced_sequence() const {
    const std::lock_guard lock(mutex_);
    return synced_;
}

void Journal::wait() {
    std::unique_lock lock(mutex_);
    changed_.wait(lock, [this] { return attempted_ == lines_.size(); });
}

std::string Journal::text_from(std::size_t line) const {
    std::string text;
    for (; line < lines_.size(); ++line)
        text += lines_[line];
    return text;
}

void Journal::run(const std::stop_token& stop) {
    std::unique_lock lock(mutex_);
    while (changed_.wait(lock, stop, [this] { return attempted_ < lines_.size(); })) {
        const std::size_t until = lines_.size();
        const std::uint64_t sequence = added_;
        // A file that somebody removed would take lines and lose them.
        const bool append = file_ != nullptr && files_.exists(path_);
        const std::string text = append ? text_from(written_) : header_ + text_from(0);
        lock.unlock();
        Done result = write(append, text);
        lock.lock();
        attempted_ = until;
        if (result) {
            written_ = until;
            synced_ = sequence;
            error_.reset();
        } else {
            file_.reset();
            error_ = result.error();
        }
        changed_.notify_all();
    }
}

Done Journal::write(bool append, const std::string& text) {
    if (append) {
        if (Done appended = file_->append(text); !appended)
            return appended;
        return file_->sync();
    }
    file_.reset();
    if (Done written = files_.write_atomically(path_, text); !written)
        return written;
    Result<std::unique_ptr<AppendFile>> opened = files_.open_append(path_);
    if (!opened)
        return opened.error();
    file_ = std::move(opened).value();
    return done();
}

} // namespace filial::book
