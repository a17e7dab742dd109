// SPDX-License-Identifier: GPL-3.0-or-later
// A typed cross (first line) and grouping (second line) derive classes whose probabilities add to 1, or are refused.
#include <cmath>
#include <cstdint>
#include <cstdlib>
#include <string>

#include "core/inheritance/derive.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const std::string text(reinterpret_cast<const char*>(data), size);
    const auto end = text.find('\n');
    filial::inheritance::DeriveInput input;
    input.cross = text.substr(0, end);
    if (end != std::string::npos)
        input.show = text.substr(end + 1);
    const auto derived = filial::inheritance::derive(input);
    if (!derived.ok())
        return 0;
    double genotypes = 0.0;
    double classes = 0.0;
    for (const auto& row : derived.value().genotypes)
        genotypes += row.probability;
    for (const auto& row : derived.value().classes)
        classes += row.probability;
    if (!(std::fabs(genotypes - 1.0) < 1e-9) || !(std::fabs(classes - 1.0) < 1e-9))
        std::abort();
    return 0;
}
