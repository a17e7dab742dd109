// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/book/book_lock.h"

#include <array>
#include <cerrno>
#include <sstream>

#include <fcntl.h>
#include <pwd.h>
#include <sys/file.h>
#include <sys/stat.h>
#include <unistd.h>

#include "core/book/file_error.h"

namespace filial::book {

namespace {

class Lock {
public:
    Lock(int file, std::string path) : file_(file), path_(std::move(path)) {}
    ~Lock() {
        // Removed while still held: nobody can take a lock on a file that is about to vanish without noticing.
        ::unlink(path_.c_str());
        ::close(file_);
    }
    Lock(const Lock&) = delete;
    Lock& operator=(const Lock&) = delete;

private:
    int file_;
    std::string path_;
};

std::string host_name() {
    std::array<char, 256> name{};
    return ::gethostname(name.data(), name.size() - 1) == 0 ? name.data() : "";
}

std::string user_name() {
    std::array<char, 4096> room{};
    passwd entry{};
    passwd* found = nullptr;
    if (::getpwuid_r(::getuid(), &entry, room.data(), room.size(), &found) == 0 && found != nullptr)
        return found->pw_name;
    return std::to_string(::getuid());
}

void sign(int file) {
    std::ostringstream text;
    text << host_name() << '\n' << ::getpid() << '\n' << user_name() << '\n';
    const std::string bytes = text.str();
    // Who holds it is a courtesy; the lock holds without it, on a full disk too.
    if (::ftruncate(file, 0) == 0) [[maybe_unused]]
        const auto written = ::pwrite(file, bytes.data(), bytes.size(), 0);
}

Error held(int file, const std::string& book_path) {
    std::array<char, 1024> bytes{};
    [[maybe_unused]] const auto size = ::pread(file, bytes.data(), bytes.size() - 1, 0);
    std::istringstream text(bytes.data());
    std::string host;
    std::string process;
    std::string user;
    std::getline(text, host);
    std::getline(text, process);
    std::getline(text, user);
    return Error{ErrorKind::File,
                 Message{MessageId::BookOpenElsewhere,
                         {text_argument(book_path), text_argument(user), text_argument(host), text_argument(process)}},
                 std::nullopt};
}

bool same_file(int file, const std::string& path) {
    struct stat opened {};
    struct stat named {};
    return ::fstat(file, &opened) == 0 && ::stat(path.c_str(), &named) == 0 && opened.st_ino == named.st_ino &&
           opened.st_dev == named.st_dev;
}

} // namespace

Result<std::shared_ptr<void>> take_lock(const std::string& lock_path, const std::string& book_path) {
    for (;;) {
        const int file = ::open(lock_path.c_str(), O_RDWR | O_CREAT | O_CLOEXEC | O_NOFOLLOW, 0644);
        if (file < 0)
            return file_error(errno, lock_path);
        if (::flock(file, LOCK_EX | LOCK_NB) != 0) {
            const int number = errno;
            Error error = number == EWOULDBLOCK ? held(file, book_path) : file_error(number, lock_path);
            ::close(file);
            return error;
        }
        // The former holder may have removed the file between our opening and locking it.
        if (same_file(file, lock_path)) {
            sign(file);
            return std::shared_ptr<void>(std::make_shared<Lock>(file, lock_path));
        }
        ::close(file);
    }
}

} // namespace filial::book
