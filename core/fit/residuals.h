// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <string>
#include <vector>

#include "core/fit/sample.h"

// Terms. The classes of a result: expected counts, residuals, a P for each class and intervals for its share.
namespace filial::fit {

struct ClassSituation {
    bool fixed = true;             ///< nothing fitted: exact binomial P
    bool fitted_elsewhere = false; ///< the variance of the fit is not known here: no P
    bool at_boundary = false;
};

[[nodiscard]] std::vector<ClassResult> class_results(const Sample& sample, const std::vector<std::string>& labels,
                                                     const ClassSituation& situation);

/// Holm 1979: adjusted P, in the order given, each at least the one before it in rank and at most 1.
[[nodiscard]] std::vector<double> holm(const std::vector<double>& p);

} // namespace filial::fit
