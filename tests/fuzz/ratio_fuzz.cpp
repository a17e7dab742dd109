// SPDX-License-Identifier: GPL-3.0-or-later
// Whatever is typed as a ratio is read or refused with its place; what was read reads back equal.
#include <cstdint>
#include <cstdlib>
#include <string_view>

#include "core/ratio/ratio.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const std::string_view text(reinterpret_cast<const char*>(data), size);
    const auto read = filial::ratio::read_ratio(text);
    if (!read.ok()) {
        if (read.error().place.value_or(0) > size)
            std::abort();
        return 0;
    }
    const auto again = filial::ratio::read_ratio(read.value().notation());
    if (!again.ok() || !(again.value() == read.value()))
        std::abort();
    for (std::size_t term = 0; term < read.value().size(); ++term)
        if (read.value().term_text(term).empty() || !(read.value().probability(term) >= 0.0))
            std::abort();
    return 0;
}
