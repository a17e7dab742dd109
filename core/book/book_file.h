// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>

#include "core/book/files.h"
#include "core/book/model.h"
#include "core/numeric/result.h"

// Terms. A book file (.filial) is JSON with `version` and `needs_reader`. A file whose `needs_reader` is newer than
// this program opens read-only and keeps its unknown fields.
namespace filial::book {

inline constexpr int kFileVersion = 1;
inline constexpr std::size_t kLargestFile = std::size_t{512} * 1024 * 1024; ///< bytes; larger is refused before reading

struct OpenedBook {
    Book book;
    bool read_only = false; ///< needs a newer reader
    std::string sha256;     ///< of the file's bytes
    std::vector<Message> warnings;
};

/// Reads book text. Errors name the place: line and column of malformed JSON, or the path of a wrong field
/// (crosses[0].families[3].typed[1]), what was found and what is allowed. Never reads partly.
[[nodiscard]] Result<OpenedBook> read_book(const std::string& json);
[[nodiscard]] std::string write_book(const Book& book);

[[nodiscard]] Result<OpenedBook> open_book(Files& files, const std::string& path);
/// Writes a new file beside, syncs it, renames it over `path`, syncs the folder.
[[nodiscard]] Done save_book(Files& files, const std::string& path, const Book& book);

/// SHA-256 in hex.
[[nodiscard]] std::string sha256_hex(const std::string& bytes);

} // namespace filial::book
