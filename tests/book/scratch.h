// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdlib>
#include <filesystem>
#include <fstream>
#include <sstream>
#include <string>

#include "core/book/book_file.h"
#include "core/book/session.h"

// A folder of its own for a test, and a book whose title counts the edits done to it: what was lost or done twice
// shows.
namespace filial::test {

class Scratch {
public:
    Scratch() {
        std::string name = (std::filesystem::temp_directory_path() / "filial-XXXXXX").string();
        if (mkdtemp(name.data()) == nullptr)
            throw std::runtime_error("no scratch folder");
        folder = name;
    }
    ~Scratch() {
        std::error_code ignored;
        std::filesystem::remove_all(folder, ignored);
    }
    Scratch(const Scratch&) = delete;
    Scratch& operator=(const Scratch&) = delete;
    [[nodiscard]] std::string path(const std::string& name) const { return folder + "/" + name; }
    [[nodiscard]] std::string book() const { return path("bed.filial"); }
    [[nodiscard]] std::string journal() const { return path(".bed.filial.journal"); }
    [[nodiscard]] book::Session::Places places() const { return {path("state")}; }
    std::string folder;
};

inline book::Book counting_book() {
    book::Book book;
    book.id = "countingbook0001";
    book.title = "0";
    return book;
}

inline int counted(const book::Book& book) {
    return std::stoi(book.title);
}

/// One edit: the title goes up by one.
inline Done count_on(book::Session& session) {
    book::Book before = session.book();
    book::Book after = before;
    after.title = std::to_string(counted(before) + 1);
    return session.perform({book::SetBook{before, after}});
}

inline std::string bytes_of(const std::string& path) {
    std::ifstream file(path, std::ios::binary);
    std::ostringstream text;
    text << file.rdbuf();
    return text.str();
}

inline void put_bytes(const std::string& path, const std::string& bytes) {
    std::ofstream(path, std::ios::binary | std::ios::trunc) << bytes;
}

} // namespace filial::test
