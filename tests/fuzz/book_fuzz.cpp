// SPDX-License-Identifier: GPL-3.0-or-later
// A book file from anywhere is read whole or refused; one that was read is written and read back the same.
#include <cstdint>
#include <cstdlib>
#include <string>

#include "core/book/book_file.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const std::string text(reinterpret_cast<const char*>(data), size);
    const auto read = filial::book::read_book(text);
    if (!read.ok())
        return 0;
    const auto again = filial::book::read_book(filial::book::write_book(read.value().book));
    if (!again.ok() || !(again.value().book == read.value().book))
        std::abort();
    return 0;
}
