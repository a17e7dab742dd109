// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <vector>

#include "core/inheritance/hypothesis.h"

// Terms. The maximiser finds the free parameter of a hypothesis at which the multinomial likelihood of counts is
// largest. The counts may be sums over groups of classes: joined before fitting, so that the fit is efficient for the
// classes that are tested (Fisher 1924).
namespace filial::fit {

struct Fitted {
    std::vector<double> beta; ///< one a free parameter; empty where nothing is free or nothing could be fitted
    /// From the expected information at the estimate; empty at a boundary.
    std::optional<double> standard_error;
    std::optional<double> standard_error_observed; ///< from the observed information (curvature)
    bool at_boundary = false;                      ///< the likelihood still rises beyond the bound, or is flat there
    bool identified = true;                        ///< false: these classes say nothing about the parameter
    double log_likelihood = 0.0;                   ///< without the multinomial coefficient
};

/// One free parameter on its [low, high]. `groups[g]` lists the classes summed into `counts[g]`. The score is bracketed
/// from several starts and solved by Alefeld, Potra & Shi 1995 (TOMS 748); the best of all maxima and both bounds wins.
/// At least one count must be positive. More than one free parameter throws std::logic_error.
[[nodiscard]] Fitted maximise(const inheritance::Hypothesis& hypothesis,
                              const std::vector<std::vector<std::size_t>>& groups,
                              const std::vector<std::int64_t>& counts);

/// The number of parameters that the groups identify (rank of the derivative), without counts.
[[nodiscard]] int identified_parameters(const inheritance::Hypothesis& hypothesis,
                                        const std::vector<std::vector<std::size_t>>& groups);

} // namespace filial::fit
