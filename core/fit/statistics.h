// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include "core/fit/sample.h"

// Terms. The statistics of a sample against its expected counts: Pearson's X2, the likelihood ratio G, and their
// corrections.
namespace filial::fit {

/// O ln(O/E) - (O - E) >= 0, from O, E > 0 and their difference `excess` = O - E, without cancellation.
/// Source: Loader 2000, Fast and accurate computation of binomial probabilities, the function D0.
[[nodiscard]] double deviance_term(double observed, double expected, double excess);

/// Pearson 1900. Cells of expected 0 add nothing; `impossible` samples have no finite value and must not come here.
[[nodiscard]] double pearson_statistic(const Sample& sample);
/// G = 2 sum [O ln(O/E) - (O - E)].
[[nodiscard]] double likelihood_ratio_statistic(const Sample& sample);
/// Yates 1934: sum of max(0, |O - E| - 1/2)^2 / E.
[[nodiscard]] double yates_statistic(const Sample& sample);
/// Williams 1976, customary q = 1 + (k+1)/(6N), k the possible cells.
[[nodiscard]] double williams_customary_q(const Sample& sample);
/// Williams 1976, general q = 1 + (sum 1/p - 1)/(6N(k-1)); needs two possible cells.
[[nodiscard]] double williams_general_q(const Sample& sample);

struct TestSituation {
    int df = 0;
    bool fixed = true;        ///< no parameter fitted, here or elsewhere
    bool at_boundary = false; ///< an estimate lies on the boundary of its range: the chi-square P does not hold
};

/// The three tests with their P, or the reason why there is none.
[[nodiscard]] Maybe<ChiSquare> chi_square_test(const Sample& sample, const TestSituation& situation);
[[nodiscard]] Maybe<LikelihoodRatio> likelihood_ratio_test(const Sample& sample, const TestSituation& situation);
[[nodiscard]] Maybe<Yates> yates_test(const Sample& sample, const TestSituation& situation);

} // namespace filial::fit
