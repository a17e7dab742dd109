// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/system_calls.h"

#include <cstdio>

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

namespace filial::book {

namespace {

class RealCalls : public SystemCalls {
public:
    int open(const std::string& path, Access access, unsigned permissions) override {
        int flags = O_CLOEXEC;
        if (access == Access::Create)
            flags |= O_WRONLY | O_CREAT | O_EXCL;
        else if (access == Access::Append)
            flags |= O_WRONLY | O_APPEND | O_CREAT;
        else
            flags |= O_RDONLY | O_DIRECTORY;
        return ::open(path.c_str(), flags, permissions);
    }
    long write(int file, std::string_view bytes) override { return ::write(file, bytes.data(), bytes.size()); }
    int sync(int file) override { return ::fdatasync(file); }
    int truncate(int file) override { return ::ftruncate(file, 0); }
    int permit(int file, unsigned permissions) override { return ::fchmod(file, permissions); }
    int close(int file) override { return ::close(file); }
    int rename(const std::string& from, const std::string& to) override {
        return std::rename(from.c_str(), to.c_str());
    }
    int unlink(const std::string& path) override { return ::unlink(path.c_str()); }
};

} // namespace

SystemCalls& system_calls() {
    static RealCalls calls;
    return calls;
}

} // namespace filial::book
