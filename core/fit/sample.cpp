// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/sample.h"

#include <algorithm>
#include <cmath>

namespace filial::fit {
namespace {

__extension__ using Wide = __int128; // A*O and N*a stay below 2^115

constexpr int kMostFittedElsewhere = 1000;

Done check_joins(const Input& input) {
    std::vector<bool> taken(input.observed.size(), false);
    std::size_t left = input.observed.size();
    for (const auto& join : input.joins) {
        if (join.size() < 2)
            return refusal(MessageId::FitJoinTooSmall, {});
        for (const std::size_t member : join) {
            if (member >= taken.size())
                return refusal(MessageId::FitJoinOutOfRange, {size_argument(member + 1), size_argument(taken.size())});
            if (taken[member])
                return refusal(MessageId::FitJoinOverlaps, {text_argument(input.labels[member])});
            taken[member] = true;
        }
        left -= join.size() - 1;
    }
    if (left < 2)
        return refusal(MessageId::FitTooFewClasses, {size_argument(left)});
    return done();
}

Done check_traits(const Input& input) {
    if (input.level_counts.empty())
        return done();
    std::size_t product = 1;
    for (const std::size_t levels : input.level_counts)
        product = levels == 0 || product > input.observed.size() ? 0 : product * levels;
    if (product != input.observed.size())
        return refusal(MessageId::FitTraitsMismatch, {size_argument(product), size_argument(input.observed.size())});
    if (input.trait_names.size() != input.level_counts.size())
        return refusal(MessageId::FitTraitNamesMismatch,
                       {size_argument(input.trait_names.size()), size_argument(input.level_counts.size())});
    return done();
}

Done check_settings(const Input& input) {
    if (!(input.alpha > 0.0 && input.alpha < 1.0))
        return refusal(MessageId::FitAlphaOutOfRange, {number_argument(input.alpha, 3)});
    if (input.fitted_elsewhere < 0 || input.fitted_elsewhere > kMostFittedElsewhere)
        return refusal(MessageId::FitFittedOutOfRange,
                       {count_argument(input.fitted_elsewhere), count_argument(kMostFittedElsewhere)});
    if (input.method == Method::Simulate)
        return refusal(MessageId::FitSimulateUnavailable, {});
    std::int64_t total = 0;
    for (const Count count : input.observed) {
        if (count.value() > Count::kLargest - total)
            return refusal(MessageId::FitTotalTooLarge, {count_argument(Count::kLargest)});
        total += count.value();
    }
    return done();
}

// Where each class goes: the number of its join, or none.
std::vector<std::size_t> join_of_class(const Input& input) {
    std::vector<std::size_t> place(input.observed.size(), input.joins.size());
    for (std::size_t j = 0; j < input.joins.size(); ++j)
        for (const std::size_t member : input.joins[j])
            place[member] = j;
    return place;
}

double exact_excess(const Sample& sample, const Cell& cell) {
    const Wide difference =
        Wide{sample.weight_total} * cell.observed - Wide{sample.n} * cell.weight; // A*O - N*a, exact
    return static_cast<double>(difference) / static_cast<double>(sample.weight_total);
}

void set_weights(Sample& sample, const ratio::Ratio& ratio) {
    sample.weight_total = ratio.total();
    for (Cell& cell : sample.cells) {
        cell.weight = 0;
        for (const std::size_t member : cell.members)
            cell.weight += ratio.weights()[member];
        cell.probability = static_cast<double>(cell.weight) / static_cast<double>(sample.weight_total);
        cell.expected =
            static_cast<double>(sample.n) * static_cast<double>(cell.weight) / static_cast<double>(sample.weight_total);
        cell.excess = exact_excess(sample, cell);
        cell.derivative.clear();
    }
}

void set_reals(Sample& sample, const inheritance::ClassProbabilities& classes) {
    const auto n = static_cast<double>(sample.n);
    for (Cell& cell : sample.cells) {
        cell.probability = 0.0;
        cell.derivative.clear();
        for (const std::size_t member : cell.members) {
            cell.probability += classes.p[member];
            if (member >= classes.derivatives.size())
                continue;
            const auto& row = classes.derivatives[member];
            cell.derivative.resize(row.size(), 0.0);
            for (std::size_t j = 0; j < row.size(); ++j)
                cell.derivative[j] += row[j];
        }
        cell.expected = n * cell.probability;
        cell.excess = std::fma(-n, cell.probability, static_cast<double>(cell.observed));
    }
}

} // namespace

Done check_input(const Input& input) {
    const std::size_t classes = input.observed.size();
    if (classes < 2)
        return refusal(MessageId::FitTooFewClasses, {size_argument(classes)});
    if (input.labels.size() != classes)
        return refusal(MessageId::FitLabelsMismatch, {size_argument(input.labels.size()), size_argument(classes)});
    if (input.hypothesis.class_count() != classes)
        return refusal(MessageId::FitTermsMismatch,
                       {ratio_argument(input.hypothesis.notation()), size_argument(input.hypothesis.class_count()),
                        size_argument(classes)});
    if (Done settings = check_settings(input); !settings)
        return settings;
    if (Done joins = check_joins(input); !joins)
        return joins;
    return check_traits(input);
}

Sample join_classes(const Input& input) {
    const std::vector<std::size_t> place = join_of_class(input);
    std::vector<bool> done_join(input.joins.size(), false);
    Sample sample;
    sample.cells.reserve(input.observed.size());
    for (std::size_t i = 0; i < input.observed.size(); ++i) {
        Cell cell;
        if (place[i] == input.joins.size()) {
            cell.members = {i};
        } else {
            if (done_join[place[i]])
                continue;
            done_join[place[i]] = true;
            cell.members = input.joins[place[i]];
            std::sort(cell.members.begin(), cell.members.end());
        }
        for (const std::size_t member : cell.members)
            cell.observed += input.observed[member].value();
        sample.n += cell.observed;
        sample.cells.push_back(std::move(cell));
    }
    return sample;
}

void set_probabilities(Sample& sample, const inheritance::Hypothesis& hypothesis, const std::vector<double>& beta) {
    if (const ratio::Ratio* ratio = hypothesis.ratio())
        set_weights(sample, *ratio);
    else
        set_reals(sample, hypothesis.at(beta));
    sample.possible = static_cast<std::size_t>(std::count_if(sample.cells.begin(), sample.cells.end(),
                                                             [](const Cell& cell) { return cell.probability > 0.0; }));
}

bool impossible(const Sample& sample) {
    return std::any_of(sample.cells.begin(), sample.cells.end(),
                       [](const Cell& cell) { return cell.probability == 0.0 && cell.observed > 0; });
}

} // namespace filial::fit
