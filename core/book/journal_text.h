// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>
#include <string>
#include <string_view>
#include <vector>

#include "core/book/edit_log.h"

// Terms. A journal is text: a header, then a line an entry. Each line begins with 16 hex digits of its SHA-256, so
// that a torn or altered line is known as such. The header names the state the entries follow on: the SHA-256 of the
// book file, or for a book never saved the book itself. A saving mark says which file a save is about to write; a
// crash between that save and the emptying of the journal then does not apply its entries twice.
namespace filial::book {

struct JournalHeader {
    Id book;
    std::string title;
    std::string book_path;    ///< "" for a book never saved
    std::string base_sha256;  ///< "" for a book never saved
    std::optional<Book> base; ///< only for a book never saved
    std::uint64_t base_sequence = 0;
    Timestamp time;
};

[[nodiscard]] std::string header_line(const JournalHeader& header);
[[nodiscard]] std::string entry_line(const LogEntry& entry);
[[nodiscard]] std::string saving_line(const std::string& sha256);

struct JournalContent {
    JournalHeader header;
    std::vector<LogEntry> entries;
    struct Saving {
        std::string sha256;
        std::size_t entries_before = 0;
    };
    std::vector<Saving> savings;
    std::size_t lost_lines = 0; ///< from the first damaged line on
};
/// Reads up to the first damaged line. An error where the header itself is damaged or of a newer version.
[[nodiscard]] Result<JournalContent> read_journal(std::string_view text);

/// How many of the journal's first entries are in the file with this hash; empty where the journal follows another.
[[nodiscard]] std::optional<std::size_t> entries_within(const JournalContent& journal, const std::string& sha256);

} // namespace filial::book
