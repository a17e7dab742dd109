// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/statistics.h"

#include <algorithm>
#include <cmath>
#include <limits>

namespace filial::fit {
namespace {

// What stands in the way of a chi-square P; NotComputed where nothing does.
MessageId obstacle(const TestSituation& situation) {
    if (situation.df < 1)
        return MessageId::FitNoDegreesOfFreedom;
    if (situation.at_boundary)
        return MessageId::FitEstimateAtBoundary;
    return MessageId::NotComputed;
}

} // namespace

double deviance_term(double observed, double expected, double excess) {
    if (observed == 0.0)
        return expected;
    const double sum = observed + expected;
    if (std::abs(excess) >= 0.1 * sum)
        return observed * std::log(observed / expected) - excess;
    const double v = excess / sum;
    const double v_squared = v * v;
    double total = excess * v;
    double power = 2.0 * observed * v;
    for (int j = 1; j < 1000; ++j) { // v <= 0.1: at most eight terms matter
        power *= v_squared;
        const double next = total + power / (2.0 * j + 1.0);
        if (next == total)
            break;
        total = next;
    }
    return total;
}

double pearson_statistic(const Sample& sample) {
    double total = 0.0;
    for (const Cell& cell : sample.cells)
        if (cell.expected > 0.0)
            total += cell.excess * cell.excess / cell.expected;
    return total;
}

double likelihood_ratio_statistic(const Sample& sample) {
    double total = 0.0;
    for (const Cell& cell : sample.cells)
        if (cell.expected > 0.0)
            total += deviance_term(static_cast<double>(cell.observed), cell.expected, cell.excess);
    return 2.0 * total;
}

double yates_statistic(const Sample& sample) {
    double total = 0.0;
    for (const Cell& cell : sample.cells)
        if (cell.expected > 0.0) {
            const double corrected = std::max(0.0, std::abs(cell.excess) - 0.5);
            total += corrected * corrected / cell.expected;
        }
    return total;
}

double williams_customary_q(const Sample& sample) {
    return 1.0 + (static_cast<double>(sample.possible) + 1.0) / (6.0 * static_cast<double>(sample.n));
}

double williams_general_q(const Sample& sample) {
    double reciprocals = 0.0;
    for (const Cell& cell : sample.cells)
        if (cell.probability > 0.0)
            reciprocals += 1.0 / cell.probability;
    return 1.0 +
           (reciprocals - 1.0) / (6.0 * static_cast<double>(sample.n) * (static_cast<double>(sample.possible) - 1.0));
}

Maybe<ChiSquare> chi_square_test(const Sample& sample, const TestSituation& situation) {
    if (sample.n == 0)
        return plain_message(MessageId::FitNoPlants);
    ChiSquare result;
    if (impossible(sample)) {
        result.statistic = numeric::kInfinity;
        result.p = Tail{0.0, -numeric::kInfinity};
        result.p_too_close = plain_message(MessageId::FitForbiddenSeen);
        return result;
    }
    result.statistic = pearson_statistic(sample);
    if (const MessageId found = obstacle(situation); found != MessageId::NotComputed) {
        result.p = plain_message(found);
        result.p_too_close = plain_message(found);
        return result;
    }
    result.p = numeric::chi_square_upper(result.statistic, situation.df);
    result.p_too_close = numeric::chi_square_lower(result.statistic, situation.df).p;
    return result;
}

Maybe<LikelihoodRatio> likelihood_ratio_test(const Sample& sample, const TestSituation& situation) {
    if (sample.n == 0)
        return plain_message(MessageId::FitNoPlants);
    LikelihoodRatio result;
    const auto no_williams = [&result](MessageId id) {
        result.williams_statistic = result.williams_general_statistic = plain_message(id);
        result.williams_p = result.williams_general_p = plain_message(id);
    };
    if (impossible(sample)) {
        result.statistic = numeric::kInfinity;
        result.p = Tail{0.0, -numeric::kInfinity};
        no_williams(MessageId::FitForbiddenSeen);
        return result;
    }
    result.statistic = likelihood_ratio_statistic(sample);
    if (const MessageId found = obstacle(situation); found != MessageId::NotComputed) {
        result.p = plain_message(found);
        no_williams(found);
        return result;
    }
    result.p = numeric::chi_square_upper(result.statistic, situation.df);
    if (!situation.fixed) {
        no_williams(MessageId::FitOnlyNothingFitted);
        return result;
    }
    const double customary = result.statistic / williams_customary_q(sample);
    const double general = result.statistic / williams_general_q(sample);
    result.williams_statistic = customary;
    result.williams_p = numeric::chi_square_upper(customary, situation.df);
    result.williams_general_statistic = general;
    result.williams_general_p = numeric::chi_square_upper(general, situation.df);
    return result;
}

Maybe<Yates> yates_test(const Sample& sample, const TestSituation& situation) {
    if (sample.n == 0)
        return plain_message(MessageId::FitNoPlants);
    if (sample.possible != 2)
        return plain_message(MessageId::FitOnlyTwoClasses);
    if (!situation.fixed)
        return plain_message(MessageId::FitOnlyNothingFitted);
    if (impossible(sample))
        return plain_message(MessageId::FitForbiddenSeen);
    Yates result;
    result.statistic = yates_statistic(sample);
    result.p = numeric::chi_square_upper(result.statistic, 1.0);
    return result;
}

} // namespace filial::fit
