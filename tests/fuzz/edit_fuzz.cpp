// SPDX-License-Identifier: GPL-3.0-or-later
// An edit from a damaged journal is read or refused. Applied to a book it either fits, and then reverts to the very
// same book, or is refused and leaves the book alone.
#include <cstdint>
#include <cstdlib>
#include <string>

#include "core/book/edit.h"
#include "core/book/model.h"

namespace {

filial::book::Book book_with_one_cross() {
    filial::book::Cross cross;
    cross.id = "aaaaaaaaaaaaaaaa";
    cross.name = "K14 × M02, F2";
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}};
    cross.classes = filial::book::product_classes(cross.traits);
    for (const char* id : {"bbbbbbbbbbbbbbbb", "cccccccccccccccc"}) {
        cross.families.push_back(filial::book::new_family(id, 2));
        cross.families.back().id = id;
    }
    filial::book::Book book;
    book.id = "dddddddddddddddd";
    book.crosses.push_back(cross);
    return book;
}

} // namespace

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const auto edit = filial::book::read_edit(std::string(reinterpret_cast<const char*>(data), size));
    if (!edit.ok())
        return 0;
    const auto again = filial::book::read_edit(filial::book::write_edit(edit.value()));
    if (!again.ok() || filial::book::write_edit(again.value()) != filial::book::write_edit(edit.value()))
        std::abort();
    static const filial::book::Book before = book_with_one_cross();
    filial::book::Book book = before;
    const bool applied = filial::book::apply(edit.value(), book).ok();
    if (applied && !filial::book::revert(edit.value(), book).ok())
        std::abort();
    if (!(book == before))
        std::abort();
    return 0;
}
