// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <string>
#include <string_view>

#include "core/book/files.h"

// Terms. The calls of the system that `Files` is made of, one virtual function each, so that a test can put in a disk
// that forgets whatever was not synced. Results are those of the calls; the error number is errno.
namespace filial::book {

class SystemCalls {
public:
    virtual ~SystemCalls() = default;
    enum class Access { Create, Append, Folder };
    /// Create makes a new file with these permission bits and fails where there is one; Append makes it where missing.
    virtual int open(const std::string& path, Access access, unsigned permissions) = 0;
    virtual long write(int file, std::string_view bytes) = 0;
    virtual int sync(int file) = 0;     ///< fdatasync, of a folder fsync
    virtual int truncate(int file) = 0; ///< to nothing
    virtual int permit(int file, unsigned permissions) = 0;
    virtual int close(int file) = 0;
    virtual int rename(const std::string& from, const std::string& to) = 0;
    virtual int unlink(const std::string& path) = 0;
};

[[nodiscard]] SystemCalls& system_calls();

/// Files over these calls; locks and what only reads go to the system itself.
[[nodiscard]] std::unique_ptr<Files> files_over(SystemCalls& calls);

} // namespace filial::book
