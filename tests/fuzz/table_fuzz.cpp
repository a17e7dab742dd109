// SPDX-License-Identifier: GPL-3.0-or-later
// Cells, copied blocks and count tables from anywhere are read or refused; a block that was read is written and read
// back the same.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "core/book/count_table.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const std::string_view text(reinterpret_cast<const char*>(data), size);
    if (const auto cell = filial::book::read_cell(text); cell.ok()) {
        const auto again = filial::book::read_cell(filial::book::cell_text(cell.value()));
        if (!again.ok() || !(again.value() == cell.value()))
            std::abort();
    }
    const auto block = filial::book::read_block(text);
    if (filial::book::read_block(filial::book::write_block(block)) != block)
        std::abort();
    const auto table = filial::book::read_count_table(text);
    if (!table.ok())
        return 0;
    for (const auto& family : table.value().families)
        if (family.typed.size() != table.value().class_labels.size())
            std::abort();
    return 0;
}
