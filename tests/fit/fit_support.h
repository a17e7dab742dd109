// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <string_view>
#include <vector>

#include "core/fit/goodness_of_fit.h"

namespace filial::test {

/// Counts against a hypothesis in its notation, classes labelled "class 1", "class 2", …
inline fit::Input fit_input(const std::vector<long>& counts, std::string_view hypothesis) {
    fit::Input input{.labels = {},
                     .observed = {},
                     .hypothesis = inheritance::read_hypothesis(hypothesis).value(),
                     .joins = {},
                     .level_counts = {},
                     .trait_names = {}};
    for (std::size_t i = 0; i < counts.size(); ++i) {
        input.labels.push_back("class " + std::to_string(i + 1));
        input.observed.emplace_back(counts[i]);
    }
    return input;
}

inline std::string notation(const std::vector<long>& weights) {
    std::string text;
    for (const long weight : weights)
        text += (text.empty() ? "" : ":") + std::to_string(weight);
    return text;
}

inline fit::GoodnessOfFit fitted(const fit::Input& input) {
    return fit::goodness_of_fit(input).value();
}

inline fit::GoodnessOfFit fitted(const std::vector<long>& counts, std::string_view hypothesis) {
    return fitted(fit_input(counts, hypothesis));
}

} // namespace filial::test
