// SPDX-License-Identifier: GPL-3.0-or-later
// Whatever is typed as a hypothesis is read or refused with its place; what was read reads back equal and its class
// probabilities add to 1.
#include <cmath>
#include <cstdint>
#include <cstdlib>
#include <string_view>
#include <vector>

#include "core/inheritance/hypothesis.h"

extern "C" int LLVMFuzzerTestOneInput(const std::uint8_t* data, std::size_t size) {
    const std::string_view text(reinterpret_cast<const char*>(data), size);
    const auto read = filial::inheritance::read_hypothesis(text);
    if (!read.ok()) {
        if (read.error().place.value_or(0) > size)
            std::abort();
        return 0;
    }
    const auto& hypothesis = read.value();
    const auto again = filial::inheritance::read_hypothesis(hypothesis.notation());
    if (!again.ok() || !(again.value() == hypothesis))
        std::abort();
    std::vector<double> middle;
    for (const auto& parameter : hypothesis.free_parameters())
        middle.push_back((parameter.low + parameter.high) / 2.0);
    double sum = 0.0;
    for (const double p : hypothesis.at(middle).p)
        sum += p;
    if (!(std::fabs(sum - 1.0) < 1e-9))
        std::abort();
    return 0;
}
