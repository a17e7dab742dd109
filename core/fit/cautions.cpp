// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/cautions.h"

#include <algorithm>
#include <cmath>
#include <functional>
#include <limits>
#include <numeric>

#include "core/fit/statistics.h"

namespace filial::fit {
namespace {

constexpr double kSmallExpected = 5.0;   // common practice
constexpr double kLeastExpected = 1.0;   // Cochran 1954, Biometrics 10: 417-451
constexpr double kShareBelowSmall = 0.2; // Cochran 1954
constexpr double kTooClose = 0.025;
constexpr double kOrderLikelihood = 1000.0;

bool small(const Cell& cell) {
    return cell.probability > 0.0 && cell.expected < kSmallExpected;
}

// The small class and the neighbour with the smaller expected count; a class that is small too is joined once.
void propose_joins(GoodnessOfFit& result, const Sample& sample) {
    if (sample.cells.size() < 3)
        return; // a join would leave one class
    std::vector<bool> taken(sample.cells.size(), false);
    for (std::size_t i = 0; i < sample.cells.size(); ++i) {
        if (!small(sample.cells[i]) || taken[i])
            continue;
        const bool before = i > 0 && !taken[i - 1];
        const bool after = i + 1 < sample.cells.size() && !taken[i + 1];
        if (!before && !after)
            continue;
        const bool take_before = before && (!after || sample.cells[i - 1].expected <= sample.cells[i + 1].expected);
        const std::size_t other = take_before ? i - 1 : i + 1;
        taken[i] = taken[other] = true;
        std::vector<std::size_t> members = sample.cells[i].members;
        members.insert(members.end(), sample.cells[other].members.begin(), sample.cells[other].members.end());
        std::sort(members.begin(), members.end());
        result.proposed_joins.push_back(std::move(members));
    }
}

void caution_small(GoodnessOfFit& result, const Sample& sample) {
    const auto few = std::count_if(sample.cells.begin(), sample.cells.end(), small);
    if (few == 0)
        return;
    const auto least = std::min_element(sample.cells.begin(), sample.cells.end(), [](const Cell& a, const Cell& b) {
        return (a.probability > 0.0 ? a.expected : std::numeric_limits<double>::infinity()) <
               (b.probability > 0.0 ? b.expected : std::numeric_limits<double>::infinity());
    });
    const bool cochran = least->expected < kLeastExpected ||
                         static_cast<double>(few) > kShareBelowSmall * static_cast<double>(sample.possible);
    const std::string& label = result.classes[static_cast<std::size_t>(least - sample.cells.begin())].label;
    const MessageId id = result.exact ? MessageId::FitSmallExpectedExact
                         : cochran    ? MessageId::FitSmallExpectedCochran
                                      : MessageId::FitSmallExpected;
    result.cautions.push_back({id, {text_argument(label), number_argument(least->expected, 1)}});
    propose_joins(result, sample);
}

void caution_too_close(GoodnessOfFit& result) {
    std::optional<double> left;
    if (result.exact && result.input.method != Method::ChiSquare)
        left = result.exact->p_too_close;
    else if (result.chi_square && result.chi_square->p_too_close)
        left = *result.chi_square->p_too_close;
    if (left && *left < kTooClose)
        result.cautions.push_back(
            {MessageId::FitTooClose, {ratio_argument(result.input.hypothesis.notation()), p_argument(*left)}});
}

void caution_percentages(GoodnessOfFit& result, const Sample& sample) {
    const auto& observed = result.input.observed;
    const bool below = std::all_of(observed.begin(), observed.end(), [](Count c) { return c.value() <= 100; });
    if (below && sample.n >= 99 && sample.n <= 101)
        result.cautions.push_back({MessageId::FitLooksLikePercentages, {}});
}

double log_likelihood(const std::vector<std::int64_t>& counts, const std::vector<std::int64_t>& weights) {
    double total = 0.0;
    for (std::size_t i = 0; i < counts.size(); ++i)
        if (counts[i] > 0)
            total += weights[i] > 0 ? static_cast<double>(counts[i]) * std::log(static_cast<double>(weights[i]))
                                    : -std::numeric_limits<double>::infinity();
    return total;
}

// The likeliest assignment gives the larger weights to the larger counts (rearrangement inequality).
std::vector<std::int64_t> likeliest_assignment(const std::vector<std::int64_t>& counts,
                                               const std::vector<std::int64_t>& weights) {
    std::vector<std::size_t> by_count(counts.size());
    std::iota(by_count.begin(), by_count.end(), std::size_t{0});
    std::stable_sort(by_count.begin(), by_count.end(),
                     [&counts](std::size_t a, std::size_t b) { return counts[a] > counts[b]; });
    std::vector<std::int64_t> sorted = weights;
    std::sort(sorted.begin(), sorted.end(), std::greater<>());
    std::vector<std::int64_t> assigned(weights.size());
    for (std::size_t rank = 0; rank < sorted.size(); ++rank)
        assigned[by_count[rank]] = sorted[rank];
    return assigned;
}

bool fits(const Sample& sample, const std::vector<std::int64_t>& weights, double alpha, int df) {
    Sample other = sample;
    for (std::size_t i = 0; i < weights.size(); ++i) {
        Cell& cell = other.cells[i];
        cell.probability = static_cast<double>(weights[i]) / static_cast<double>(sample.weight_total);
        cell.expected = static_cast<double>(sample.n) * cell.probability;
        cell.excess = static_cast<double>(cell.observed) - cell.expected;
    }
    return !impossible(other) && numeric::chi_square_upper(pearson_statistic(other), df).p >= alpha;
}

void caution_order(GoodnessOfFit& result, const Sample& sample) {
    const bool rejected = result.verdict == Verdict::Contradicted || result.verdict == Verdict::Impossible;
    if (!rejected || sample.weight_total == 0 || !result.input.joins.empty() || result.df < 1)
        return;
    std::vector<std::int64_t> counts;
    std::vector<std::int64_t> weights;
    for (const Cell& cell : sample.cells) {
        counts.push_back(cell.observed);
        weights.push_back(cell.weight);
    }
    const std::vector<std::int64_t> other = likeliest_assignment(counts, weights);
    if (other == weights ||
        !(log_likelihood(counts, other) - log_likelihood(counts, weights) > std::log(kOrderLikelihood)))
        return;
    if (!fits(sample, other, result.input.alpha, result.df))
        return;
    std::string text;
    for (const std::int64_t weight : other)
        text += (text.empty() ? "" : ":") + std::to_string(weight);
    result.cautions.push_back(
        {MessageId::FitSuspiciousOrder, {ratio_argument(result.input.hypothesis.notation()), ratio_argument(text)}});
}

} // namespace

void set_cautions(GoodnessOfFit& result, const Sample& sample) {
    if (sample.n == 0)
        return;
    if (!impossible(sample)) { // what cannot be is no question of large enough numbers
        caution_small(result, sample);
        caution_too_close(result);
    }
    if (result.input.joins_after_seeing && !result.input.joins.empty())
        result.cautions.push_back({MessageId::FitJoinedAfterSeeing, {}});
    caution_percentages(result, sample);
    caution_order(result, sample);
}

} // namespace filial::fit
