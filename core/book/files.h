// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <string>
#include <string_view>
#include <vector>

#include "core/numeric/result.h"

// Terms. Files is the seam through which books and journals reach the disk; tests put in one that fails, fills up or
// forgets what was not synced.
namespace filial::book {

/// A file open for appending.
class AppendFile {
public:
    virtual ~AppendFile() = default;
    virtual Done append(std::string_view bytes) = 0;
    virtual Done sync() = 0;     ///< fdatasync
    virtual Done truncate() = 0; ///< to nothing, synced
};

class Files {
public:
    virtual ~Files() = default;
    virtual Result<std::string> read(const std::string& path, std::size_t at_most) = 0;
    virtual bool exists(const std::string& path) = 0;
    /// New file beside `path`, written, synced, renamed over it, folder synced. Keeps the permission bits of a file
    /// that was there, and follows a symbolic link to it. On an error the old file is as it was.
    virtual Done write_atomically(const std::string& path, std::string_view bytes) = 0;
    virtual Result<std::unique_ptr<AppendFile>> open_append(const std::string& path) = 0;
    virtual Done remove(const std::string& path) = 0;
    /// Takes the lock of a book, a file beside it; an error BookOpenElsewhere says who holds it. Released when the
    /// object goes, or the process.
    virtual Result<std::shared_ptr<void>> lock(const std::string& path) = 0;
    virtual bool folder_writable(const std::string& folder) = 0;
    /// Names of the files in a folder, sorted; none where it cannot be read.
    virtual std::vector<std::string> list(const std::string& folder) = 0;
    /// Makes a folder and those above it; done where it is there already.
    virtual Done make_folder(const std::string& folder) = 0;
};

/// The real disk (POSIX).
[[nodiscard]] Files& disk();

} // namespace filial::book
