// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/session.h"

#include <array>
#include <chrono>
#include <ctime>
#include <filesystem>

#include "core/book/check.h"
#include "core/book/file_error.h"
#include "core/book/journal.h"
#include "core/book/journal_text.h"

namespace filial::book {

namespace {

constexpr std::size_t kLargestJournal = 4 * kLargestFile;

Timestamp now() {
    const auto time = std::chrono::system_clock::now();
    const std::time_t seconds = std::chrono::system_clock::to_time_t(time);
    const auto since = time.time_since_epoch();
    const auto milliseconds = std::chrono::duration_cast<std::chrono::milliseconds>(since).count() % 1000;
    std::tm parts{};
    gmtime_r(&seconds, &parts);
    std::array<char, 32> text{};
    std::strftime(text.data(), text.size(), "%Y-%m-%dT%H:%M:%S", &parts);
    const std::string thousandths = std::to_string(1000 + milliseconds).substr(1);
    return std::string(text.data()) + "." + thousandths + "Z";
}

Error refused(MessageId id, std::vector<Argument> arguments = {}) {
    return Error{ErrorKind::File, Message{id, std::move(arguments)}, std::nullopt};
}

std::string absolute(const std::string& path) {
    std::error_code error;
    const auto whole = std::filesystem::weakly_canonical(std::filesystem::absolute(path, error), error);
    return error ? path : whole.string();
}

/// Where a book keeps its journal and its lock: beside it, or in the state folder.
struct Homes {
    std::string beside, state;
    bool folder_writable = true;

    Homes(Files& files, const Session::Places& places, const std::string& path) {
        const std::string whole = absolute(path);
        beside = folder_of(whole) + "/." + name_of(whole) + ".journal";
        state = places.state_folder + "/" + sha256_hex(whole).substr(0, 16) + ".journal";
        folder_writable = files.folder_writable(folder_of(whole));
    }
    [[nodiscard]] const std::string& journal() const { return folder_writable ? beside : state; }
};

/// Copies a journal that cannot be used whole to another name, where a person can still look at it.
bool set_aside(Files& files, const std::string& journal_path, const std::string& bytes,
               std::vector<Message>& warnings) {
    std::string aside = journal_path + ".damaged";
    for (int i = 2; files.exists(aside); ++i)
        aside = journal_path + ".damaged-" + std::to_string(i);
    if (!files.write_atomically(aside, bytes))
        return false;
    warnings.push_back({MessageId::JournalSetAside, {text_argument(aside)}});
    return true;
}

} // namespace

struct Session::Private {
    Private(Files& the_files, Places the_places, Book book)
        : files(the_files), places(std::move(the_places)), log(std::move(book)) {}

    Files& files;
    Places places;
    EditLog log;
    std::string path, who;
    bool read_only = false;
    std::size_t recovered = 0;
    std::vector<Message> warnings;
    std::shared_ptr<void> lock;
    std::string saved_sha256;
    std::optional<Book> base; // of a book never saved
    std::unique_ptr<Journal> journal;

    [[nodiscard]] std::string header() const {
        return header_line({log.book().id, log.book().title, path.empty() ? path : absolute(path), saved_sha256, base,
                            log.history().size(), now()});
    }
    /// `on_disk`: the lines are there already; else they are written at once.
    void start_journal(std::string journal_path, std::vector<std::string> lines, const std::string& header_text,
                       bool on_disk) {
        journal = std::make_unique<Journal>(files, std::move(journal_path), header_text);
        journal->resume(std::move(lines), log.history().size(), on_disk);
        log.on_entry([this](const LogEntry& entry) { journal->add(entry_line(entry), entry.sequence); });
    }
    /// Replays what the journal holds past the first `within` entries; gives the lines that stand for it.
    std::vector<std::string> replay(const JournalContent& content, std::size_t within, std::size_t& lost) {
        std::vector<std::string> lines;
        lost = content.lost_lines;
        for (std::size_t i = within; i < content.entries.size(); ++i) {
            if (!log.replay(content.entries[i])) {
                lost += content.entries.size() - i;
                break;
            }
            lines.push_back(entry_line(log.history().back()));
        }
        recovered += lines.size();
        if (lost > 0)
            warnings.push_back({MessageId::JournalLinesLost,
                                {count_argument(static_cast<std::int64_t>(recovered)),
                                 count_argument(static_cast<std::int64_t>(lost))}});
        return lines;
    }
    /// Replays a journal that follows the saved file; whether it was whole, or empty where it is not to be used.
    std::optional<bool> take_over(const std::string& candidate, const std::string& bytes,
                                  std::vector<std::string>& lines);
    void open_journal(const Homes& homes);
    Done write_to(const std::string& target, const std::string& journal_path);
};

std::optional<bool> Session::Private::take_over(const std::string& candidate, const std::string& bytes,
                                                std::vector<std::string>& lines) {
    const Result<JournalContent> content = read_journal(bytes);
    if (!content) {
        warnings.push_back(content.error().message);
        return std::nullopt;
    }
    const auto within = entries_within(content.value(), saved_sha256);
    if (!within || content.value().header.book != log.book().id) {
        warnings.push_back({MessageId::JournalOfAnotherState, {text_argument(candidate)}});
        return std::nullopt;
    }
    if (!lines.empty())
        return std::nullopt;
    std::size_t lost = 0;
    lines = replay(content.value(), *within, lost);
    return lost == 0;
}

void Session::Private::open_journal(const Homes& homes) {
    const std::string header_text = header();
    std::string home = homes.journal();
    std::vector<std::string> lines;
    bool on_disk = false;
    for (const std::string& candidate : {homes.beside, homes.state}) {
        if (!files.exists(candidate))
            continue;
        const Result<std::string> bytes = files.read(candidate, kLargestJournal);
        if (!bytes) {
            warnings.push_back(bytes.error().message);
            if (candidate == home)
                home += "-" + new_id();
            continue;
        }
        const std::optional<bool> whole = take_over(candidate, bytes.value(), lines);
        if (whole.value_or(false)) {
            home = candidate;
            on_disk = true;
            continue;
        }
        // One that could not be used whole must not be written over before there is a copy of it.
        if (!set_aside(files, candidate, bytes.value(), warnings)) {
            if (candidate == home)
                home += "-" + new_id();
        } else if (whole.has_value()) {
            home = candidate; // what was recovered is written anew in its place
        } else {
            static_cast<void>(files.remove(candidate));
        }
    }
    start_journal(home, std::move(lines), header_text, on_disk);
}

Result<std::unique_ptr<Session>> Session::create(Files& files, Places places, Book book) {
    if (book.id.empty())
        book.id = new_id();
    if (Done sound = check_book(book); !sound)
        return sound.error();
    auto p = std::make_unique<Private>(files, std::move(places), std::move(book));
    p->base = p->log.book();
    // Where the state folder cannot be made the book opens all the same; its journal then says why it is not on disk.
    static_cast<void>(files.make_folder(p->places.state_folder));
    const std::string journal_path = p->places.state_folder + "/new-" + new_id() + ".journal";
    if (Result<std::shared_ptr<void>> lock = files.lock(journal_path); lock)
        p->lock = lock.value();
    p->start_journal(journal_path, {}, p->header(), true);
    return std::unique_ptr<Session>(new Session(std::move(p)));
}

Result<std::unique_ptr<Session>> Session::open(Files& files, Places places, const std::string& path) {
    if (!files.exists(path))
        return files.read(path, kLargestFile).error();
    static_cast<void>(files.make_folder(places.state_folder));
    const Homes homes(files, places, path);
    Result<std::shared_ptr<void>> lock = files.lock(homes.folder_writable ? path : homes.state);
    if (!lock && lock.error().message.id == MessageId::BookOpenElsewhere) {
        Error error = lock.error();
        error.message.arguments.front() = text_argument(path);
        return error;
    }
    Result<OpenedBook> opened = open_book(files, path);
    if (!opened)
        return opened.error();
    OpenedBook& content = opened.value();
    auto p = std::make_unique<Private>(files, std::move(places), std::move(content.book));
    p->path = path;
    p->read_only = content.read_only;
    p->saved_sha256 = content.sha256;
    p->warnings = std::move(content.warnings);
    if (lock)
        p->lock = lock.value();
    else
        p->warnings.push_back(lock.error().message);
    if (p->read_only)
        p->start_journal(homes.journal(), {}, p->header(), true);
    else
        p->open_journal(homes);
    return std::unique_ptr<Session>(new Session(std::move(p)));
}

std::vector<Session::Recoverable> Session::recoverable(Files& files, const Places& places) {
    std::vector<Recoverable> found;
    for (const std::string& name : files.list(places.state_folder)) {
        if (!name.ends_with(".journal"))
            continue;
        const std::string path = places.state_folder + "/" + name;
        // The lock of a session that lives is held.
        const Result<std::shared_ptr<void>> lock = files.lock(path);
        const Result<std::string> bytes = files.read(path, kLargestJournal);
        if (!lock || !bytes)
            continue;
        const Result<JournalContent> content = read_journal(bytes.value());
        if (!content || content.value().entries.empty())
            continue;
        const JournalContent& journal = content.value();
        found.push_back({path, journal.header.title, journal.header.book_path, journal.entries.back().time,
                         journal.entries.size()});
    }
    return found;
}

Result<std::unique_ptr<Session>> Session::recover(Files& files, Places places, const Recoverable& which) {
    if (!which.book_path.empty())
        return open(files, std::move(places), which.book_path);
    Result<std::shared_ptr<void>> lock = files.lock(which.journal_path);
    if (!lock)
        return lock.error();
    const Result<std::string> bytes = files.read(which.journal_path, kLargestJournal);
    if (!bytes)
        return bytes.error();
    Result<JournalContent> content = read_journal(bytes.value());
    if (!content)
        return content.error();
    JournalContent& journal = content.value();
    if (!journal.header.base || !check_book(*journal.header.base))
        return refused(MessageId::JournalDamaged);
    auto p = std::make_unique<Private>(files, std::move(places), *journal.header.base);
    p->base = std::move(journal.header.base);
    p->lock = lock.value();
    const std::string header_text = p->header();
    std::size_t lost = 0;
    std::vector<std::string> lines = p->replay(journal, 0, lost);
    std::string home = which.journal_path;
    if (lost > 0 && !set_aside(files, home, bytes.value(), p->warnings))
        home = p->places.state_folder + "/new-" + new_id() + ".journal";
    p->start_journal(home, std::move(lines), header_text, lost == 0);
    return std::unique_ptr<Session>(new Session(std::move(p)));
}

Session::Session(std::unique_ptr<Private> p) : p_(std::move(p)) {}

Session::~Session() {
    // Without a change since the saved state there is nothing to recover.
    if (!p_->log.dirty() && !p_->read_only)
        p_->journal->abandon();
}

const Book& Session::book() const {
    return p_->log.book();
}
EditLog& Session::log() {
    return p_->log;
}
const EditLog& Session::log() const {
    return p_->log;
}

Done Session::perform(Edit edit, std::string merge_key) {
    if (p_->read_only)
        return refused(MessageId::BookReadOnly);
    return p_->log.perform(std::move(edit), now(), p_->who, std::move(merge_key));
}

std::optional<Message> Session::undo() {
    return p_->log.undo(now(), p_->who);
}
std::optional<Message> Session::redo() {
    return p_->log.redo(now(), p_->who);
}
void Session::set_who(std::string who) {
    p_->who = std::move(who);
}
const std::string& Session::path() const {
    return p_->path;
}
bool Session::read_only() const {
    return p_->read_only;
}
std::size_t Session::recovered_entries() const {
    return p_->recovered;
}
const std::vector<Message>& Session::warnings() const {
    return p_->warnings;
}
bool Session::dirty() const {
    return p_->log.dirty();
}

Done Session::Private::write_to(const std::string& target, const std::string& journal_path) {
    const std::string bytes = write_book(log.book());
    const std::string sha256 = sha256_hex(bytes);
    if (!journal->empty()) {
        journal->add(saving_line(sha256), log.history().size());
        journal->wait();
    }
    if (Done written = files.write_atomically(target, bytes); !written)
        return written;
    path = target;
    saved_sha256 = sha256;
    base.reset();
    log.mark_saved();
    journal->restart(journal_path, header(), log.history().size());
    return done();
}

Done Session::save() {
    if (p_->read_only)
        return refused(MessageId::BookReadOnly);
    if (p_->path.empty())
        return refused(MessageId::BookNeverSaved);
    return p_->write_to(p_->path, Homes(p_->files, p_->places, p_->path).journal());
}

Done Session::save_as(const std::string& path) {
    if (p_->read_only)
        return refused(MessageId::BookReadOnly);
    if (!p_->path.empty() && absolute(path) == absolute(p_->path))
        return save();
    const Homes homes(p_->files, p_->places, path);
    Result<std::shared_ptr<void>> lock = p_->files.lock(homes.folder_writable ? path : homes.state);
    if (!lock && lock.error().message.id == MessageId::BookOpenElsewhere)
        return lock.error();
    // The journal of a book that is written over stays where a person can find it.
    if (const Result<std::string> old = p_->files.read(homes.journal(), kLargestJournal); old)
        static_cast<void>(set_aside(p_->files, homes.journal(), old.value(), p_->warnings));
    if (Done written = p_->write_to(path, homes.journal()); !written)
        return written;
    p_->lock = lock ? lock.value() : nullptr;
    return done();
}

Done Session::revert_to_saved() {
    if (p_->path.empty())
        return refused(MessageId::BookNeverSaved);
    Result<OpenedBook> saved = open_book(p_->files, p_->path);
    if (!saved)
        return saved.error();
    if (Done reverted = perform({RevertTo{book(), std::move(saved.value().book)}}); !reverted)
        return reverted;
    if (saved.value().sha256 == p_->saved_sha256)
        p_->log.mark_saved();
    return done();
}

Done Session::discard() {
    p_->journal->abandon();
    return done();
}

JournalState Session::journal_state() const {
    return p_->journal->state();
}
std::optional<Error> Session::journal_error() const {
    return p_->journal->error();
}
std::uint64_t Session::synced_sequence() const {
    return p_->journal->synced_sequence();
}
void Session::wait_until_synced() {
    p_->journal->wait();
}

} // namespace filial::book
