// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <vector>

#include "core/fit/goodness_of_fit.h"

// Terms. A sample is the counts after joins, each group of joined classes one cell, with the probability of every cell
// under the hypothesis. Where the hypothesis is a ratio the cells keep its whole weights, so that O - E is exact.
namespace filial::fit {

struct Cell {
    std::vector<std::size_t> members; ///< classes of the input
    std::int64_t observed = 0;
    std::int64_t weight = 0; ///< only where Sample::weight_total > 0
    double probability = 0.0;
    double expected = 0.0;
    double excess = 0.0;            ///< O - E without cancellation
    std::vector<double> derivative; ///< of the probability by each free parameter
};

struct Sample {
    std::vector<Cell> cells;
    std::int64_t n = 0;
    std::int64_t weight_total = 0; ///< sum of the weights; 0 where real-valued probabilities enter
    std::size_t possible = 0;      ///< cells of positive probability (k+)
};

/// Refuses what cannot be tested: lengths that differ, joins out of range or overlapping, alpha outside (0,1), fewer
/// than two classes, methods that are not available.
[[nodiscard]] Done check_input(const Input& input);

/// The cells after joins, without probabilities; the input has passed `check_input`.
[[nodiscard]] Sample join_classes(const Input& input);

/// Puts probabilities (one a class of the input, with derivatives where parameters are free) and expected counts into
/// the cells. A ratio's weights are used where the hypothesis has them.
void set_probabilities(Sample& sample, const inheritance::Hypothesis& hypothesis, const std::vector<double>& beta);

/// A cell that the hypothesis forbids, although it holds offspring.
[[nodiscard]] bool impossible(const Sample& sample);

} // namespace filial::fit
