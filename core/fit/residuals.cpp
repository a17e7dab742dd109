// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/residuals.h"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/fit/exact_two_class.h"
#include "core/fit/intervals.h"

namespace filial::fit {
namespace {

constexpr double kIntervalError = 0.05; // the intervals are called 95 % on screen, whatever alpha the test has
constexpr double kNoVariance = 1e-12;   // share of the binomial variance that counts as none

std::string joined_label(const Cell& cell, const std::vector<std::string>& labels) {
    std::string label;
    for (const std::size_t member : cell.members)
        label += (label.empty() ? "" : "+") + labels[member];
    return label;
}

// Information per plant about the one free parameter.
double information(const Sample& sample) {
    double total = 0.0;
    for (const Cell& cell : sample.cells)
        if (cell.probability > 0.0 && !cell.derivative.empty())
            total += cell.derivative.front() * cell.derivative.front() / cell.probability;
    return total;
}

// Haberman 1973: (O - E) over its standard error, the variance of the fit taken off.
Maybe<double> adjusted_residual(const Sample& sample, const Cell& cell, double information_per_plant) {
    const double binomial = cell.probability * (1.0 - cell.probability);
    double variance = binomial;
    if (information_per_plant > 0.0 && !cell.derivative.empty())
        variance -= cell.derivative.front() * cell.derivative.front() / information_per_plant;
    if (!(variance > kNoVariance * binomial))
        return plain_message(MessageId::FitNoResidualVariance);
    return cell.excess / std::sqrt(static_cast<double>(sample.n) * variance);
}

void set_residuals(ClassResult& result, const Sample& sample, const Cell& cell, const ClassSituation& situation,
                   double information_per_plant) {
    const auto none = [&result](MessageId id) {
        result.adjusted_residual = plain_message(id);
        result.p = result.p_holm = plain_message(id);
    };
    if (cell.probability <= 0.0 || sample.n == 0) {
        const MessageId id = sample.n == 0 ? MessageId::FitNoPlants : MessageId::FitClassForbidden;
        result.residual = plain_message(id);
        return none(id);
    }
    result.residual = cell.excess / std::sqrt(cell.expected);
    if (cell.probability >= 1.0)
        return none(MessageId::FitNoResidualVariance);
    if (situation.at_boundary)
        return none(MessageId::FitEstimateAtBoundary);
    if (situation.fitted_elsewhere)
        return none(MessageId::FitVarianceUnknown);
    result.adjusted_residual = adjusted_residual(sample, cell, information_per_plant);
    if (situation.fixed)
        result.p = exact_class_p(sample, cell).p;
    else if (result.adjusted_residual)
        result.p = numeric::normal_two_sided(*result.adjusted_residual).p;
    else
        result.p = result.adjusted_residual.why_not;
    result.p_holm = result.p;
}

void set_intervals(ClassResult& result, const Sample& sample, const Cell& cell, double z) {
    if (sample.n == 0) {
        for (Maybe<double>* limit : {&result.interval_low, &result.interval_high, &result.exact_low, &result.exact_high,
                                     &result.simultaneous_low, &result.simultaneous_high})
            *limit = plain_message(MessageId::FitNoPlants);
        return;
    }
    const Interval wilson = wilson_interval(cell.observed, sample.n, z);
    const Interval exact = clopper_pearson_interval(cell.observed, sample.n, kIntervalError);
    const Interval joint = goodman_interval(cell.observed, sample.n, sample.cells.size(), kIntervalError);
    result.interval_low = wilson.low;
    result.interval_high = wilson.high;
    result.exact_low = exact.low;
    result.exact_high = exact.high;
    result.simultaneous_low = joint.low;
    result.simultaneous_high = joint.high;
}

// Two possible classes are one test with one P, which both show unadjusted.
void set_holm(std::vector<ClassResult>& classes, std::size_t possible) {
    std::vector<double> p;
    for (const ClassResult& result : classes)
        if (result.p)
            p.push_back(*result.p);
    if (p.empty() || possible == 2)
        return;
    const std::vector<double> adjusted = holm(p);
    auto next = adjusted.begin();
    for (ClassResult& result : classes)
        if (result.p)
            result.p_holm = *next++;
}

} // namespace

std::vector<ClassResult> class_results(const Sample& sample, const std::vector<std::string>& labels,
                                       const ClassSituation& situation) {
    const double z = numeric::normal_critical(kIntervalError / 2.0);
    const double information_per_plant = situation.fixed ? 0.0 : information(sample);
    std::vector<ClassResult> results;
    results.reserve(sample.cells.size());
    for (const Cell& cell : sample.cells) {
        ClassResult& result = results.emplace_back();
        result.label = joined_label(cell, labels);
        result.members = cell.members;
        result.observed = Count(cell.observed);
        result.probability = cell.probability;
        result.expected = cell.expected;
        set_residuals(result, sample, cell, situation, information_per_plant);
        set_intervals(result, sample, cell, z);
    }
    set_holm(results, sample.possible);
    return results;
}

std::vector<double> holm(const std::vector<double>& p) {
    std::vector<std::size_t> order(p.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::sort(order.begin(), order.end(), [&p](std::size_t a, std::size_t b) { return p[a] < p[b]; });
    std::vector<double> adjusted(p.size());
    double largest = 0.0;
    for (std::size_t rank = 0; rank < order.size(); ++rank) {
        largest = std::max(largest, std::min(1.0, static_cast<double>(p.size() - rank) * p[order[rank]]));
        adjusted[order[rank]] = largest;
    }
    return adjusted;
}

} // namespace filial::fit
