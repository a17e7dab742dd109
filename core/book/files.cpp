// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/files.h"

#include <algorithm>
#include <array>
#include <atomic>
#include <cerrno>
#include <climits>
#include <cstdlib>
#include <filesystem>
#include <system_error>

#include <fcntl.h>
#include <sys/stat.h>
#include <unistd.h>

#include "core/book/book_lock.h"
#include "core/book/file_error.h"
#include "core/book/system_calls.h"

namespace filial::book {

Error file_error(int number, const std::string& path) {
    MessageId id = MessageId::FileFailed;
    std::vector<Argument> arguments{text_argument(path)};
    if (number == EACCES || number == EPERM || number == EROFS)
        id = MessageId::FileNotPermitted;
    else if (number == ENOSPC || number == EDQUOT || number == EFBIG)
        id = MessageId::FileNoSpace;
    else if (number == ENOENT || number == ENOTDIR)
        id = MessageId::FileMissing;
    else if (number == EISDIR)
        id = MessageId::FileIsFolder;
    else
        arguments.push_back(text_argument(std::generic_category().message(number)));
    return Error{ErrorKind::File, Message{id, std::move(arguments)}, std::nullopt};
}

std::string folder_of(const std::string& path) {
    const auto slash = path.rfind('/');
    if (slash == std::string::npos)
        return ".";
    return slash == 0 ? "/" : path.substr(0, slash);
}

std::string name_of(const std::string& path) {
    return path.substr(path.rfind('/') + 1);
}

namespace {

Error failed(const std::string& path) {
    return file_error(errno, path);
}

/// A file that closes itself.
class Handle {
public:
    Handle(SystemCalls& calls, int file) : calls_(calls), file_(file) {}
    ~Handle() {
        if (file_ >= 0)
            calls_.close(file_);
    }
    Handle(const Handle&) = delete;
    Handle& operator=(const Handle&) = delete;
    [[nodiscard]] int get() const { return file_; }
    [[nodiscard]] bool open() const { return file_ >= 0; }
    int close() { return calls_.close(std::exchange(file_, -1)); }

private:
    SystemCalls& calls_;
    int file_;
};

Done write_all(SystemCalls& calls, int file, std::string_view bytes, const std::string& path) {
    while (!bytes.empty()) {
        const long written = calls.write(file, bytes);
        if (written < 0 && errno == EINTR)
            continue;
        if (written < 0)
            return failed(path);
        if (written == 0)
            return file_error(ENOSPC, path);
        bytes.remove_prefix(static_cast<std::size_t>(written));
    }
    return done();
}

/// A new name in a folder is on disk only once the folder is.
Done sync_folder(SystemCalls& calls, const std::string& folder) {
    Handle handle(calls, calls.open(folder, SystemCalls::Access::Folder, 0));
    if (!handle.open() || calls.sync(handle.get()) != 0) {
        // Some network file systems know no sync of folders; there is nothing more to be done there.
        if (errno == EINVAL)
            return done();
        return failed(folder);
    }
    return done();
}

std::string behind_links(const std::string& path) {
    std::array<char, PATH_MAX> real{};
    return ::realpath(path.c_str(), real.data()) != nullptr ? std::string(real.data()) : path;
}

class SystemAppendFile : public AppendFile {
public:
    SystemAppendFile(SystemCalls& calls, int file, std::string path)
        : handle_(calls, file), calls_(calls), path_(path) {}
    Done append(std::string_view bytes) override { return write_all(calls_, handle_.get(), bytes, path_); }
    Done sync() override {
        if (calls_.sync(handle_.get()) != 0)
            return failed(path_);
        return done();
    }
    Done truncate() override {
        if (calls_.truncate(handle_.get()) != 0)
            return failed(path_);
        return sync();
    }

private:
    Handle handle_;
    SystemCalls& calls_;
    std::string path_;
};

Result<std::string> read_all(int file, std::size_t at_most, const std::string& path) {
    const auto too_large = [&] {
        return Error{ErrorKind::File,
                     Message{MessageId::FileTooLarge,
                             {text_argument(path), count_argument(static_cast<std::int64_t>(at_most >> 20U))}},
                     std::nullopt};
    };
    struct stat about {};
    if (::fstat(file, &about) != 0)
        return failed(path);
    if (S_ISDIR(about.st_mode))
        return file_error(EISDIR, path);
    if (!S_ISREG(about.st_mode))
        return Error{ErrorKind::File, Message{MessageId::FileNotRegular, {text_argument(path)}}, std::nullopt};
    if (static_cast<std::size_t>(about.st_size) > at_most)
        return too_large();
    std::string bytes;
    bytes.reserve(static_cast<std::size_t>(about.st_size) + 1);
    std::array<char, 65536> room{};
    for (;;) {
        const ssize_t read = ::read(file, room.data(), room.size());
        if (read < 0 && errno == EINTR)
            continue;
        if (read < 0)
            return failed(path);
        if (read == 0)
            return bytes;
        bytes.append(room.data(), static_cast<std::size_t>(read));
        if (bytes.size() > at_most)
            return too_large();
    }
}

class SystemFiles : public Files {
public:
    explicit SystemFiles(SystemCalls& calls) : calls_(calls) {}

    Result<std::string> read(const std::string& path, std::size_t at_most) override {
        // Without waiting: a pipe by that name would else hold the program for ever.
        const int file = ::open(path.c_str(), O_RDONLY | O_CLOEXEC | O_NONBLOCK);
        if (file < 0)
            return failed(path);
        Result<std::string> bytes = read_all(file, at_most, path);
        ::close(file);
        return bytes;
    }
    bool exists(const std::string& path) override {
        struct stat about {};
        return ::stat(path.c_str(), &about) == 0;
    }
    Done write_atomically(const std::string& path, std::string_view bytes) override {
        const std::string target = behind_links(path);
        struct stat before {};
        const bool there = ::stat(target.c_str(), &before) == 0;
        if (there && S_ISDIR(before.st_mode))
            return file_error(EISDIR, path);
        // Replacing a file needs no permission of its own, only of the folder; a file made read-only is meant so.
        if (there && ::access(target.c_str(), W_OK) != 0)
            return failed(path);
        const std::string fresh = free_name(target);
        Done written = write_new(fresh, bytes, there ? std::optional(before.st_mode & 07777U) : std::nullopt, path);
        if (written && calls_.rename(fresh, target) != 0)
            written = failed(path);
        if (!written) {
            calls_.unlink(fresh);
            return written;
        }
        return sync_folder(calls_, folder_of(target));
    }
    Result<std::unique_ptr<AppendFile>> open_append(const std::string& path) override {
        const bool there = exists(path);
        const int file = calls_.open(path, SystemCalls::Access::Append, 0666);
        if (file < 0)
            return failed(path);
        auto opened = std::make_unique<SystemAppendFile>(calls_, file, path);
        if (!there)
            if (Done synced = sync_folder(calls_, folder_of(path)); !synced)
                return synced.error();
        return std::unique_ptr<AppendFile>(std::move(opened));
    }
    Done remove(const std::string& path) override {
        if (calls_.unlink(path) != 0 && errno != ENOENT)
            return failed(path);
        return done();
    }
    Result<std::shared_ptr<void>> lock(const std::string& path) override {
        const std::string target = behind_links(path);
        return take_lock(folder_of(target) + "/." + name_of(target) + ".lock", path);
    }
    bool folder_writable(const std::string& folder) override { return ::access(folder.c_str(), W_OK | X_OK) == 0; }
    std::vector<std::string> list(const std::string& folder) override {
        std::vector<std::string> names;
        std::error_code error;
        for (std::filesystem::directory_iterator at(folder, error), end; !error && at != end; at.increment(error))
            names.push_back(at->path().filename().string());
        std::sort(names.begin(), names.end());
        return names;
    }
    Done make_folder(const std::string& folder) override {
        std::error_code error;
        std::filesystem::create_directories(folder, error);
        if (error)
            return file_error(error.value(), folder);
        return done();
    }

private:
    /// A name beside the target that no file has: a crash may have left one of an earlier process with our number.
    std::string free_name(const std::string& target) {
        const std::string begin = folder_of(target) + "/." + name_of(target) + "." + std::to_string(::getpid()) + "-";
        std::string name;
        do {
            name = begin + std::to_string(++written_) + ".new";
        } while (exists(name));
        return name;
    }
    Done write_new(const std::string& fresh, std::string_view bytes, std::optional<unsigned> permissions,
                   const std::string& path) {
        Handle handle(calls_, calls_.open(fresh, SystemCalls::Access::Create, 0666));
        if (!handle.open())
            return failed(path);
        if (permissions && calls_.permit(handle.get(), *permissions) != 0)
            return failed(path);
        if (Done all = write_all(calls_, handle.get(), bytes, path); !all)
            return all;
        if (calls_.sync(handle.get()) != 0 || handle.close() != 0)
            return failed(path);
        return done();
    }

    SystemCalls& calls_;
    std::atomic<unsigned> written_ = 0;
};

} // namespace

std::unique_ptr<Files> files_over(SystemCalls& calls) {
    return std::make_unique<SystemFiles>(calls);
}

Files& disk() {
    static SystemFiles files(system_calls());
    return files;
}

} // namespace filial::book
