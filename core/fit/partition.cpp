// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/partition.h"

#include <algorithm>
#include <bit>
#include <cstdint>
#include <string>

namespace filial::fit {
namespace {

__extension__ using Wide = __int128;
using Subset = std::uint32_t; // bit t: factor t is in the set

constexpr std::size_t kMostTraits = 6; // 64 classes of two levels each

// Counts over the levels of a subset of the traits, and how far each is from its probability.
class Margins {
public:
    Margins(const Input& input, const std::vector<inheritance::Factor>& factors)
        : input_(input), factors_(factors), margins_(std::size_t{1} << factors.size()) {
        for (const Count count : input.observed)
            n_ += count.value();
        for (Subset set = 0; set < margins_.size(); ++set)
            fill(set);
    }
    [[nodiscard]] std::int64_t n() const { return n_; }
    [[nodiscard]] std::size_t size(Subset set) const { return margins_[set].departure.size(); }
    [[nodiscard]] double probability(Subset set, std::size_t cell) const { return margins_[set].probability[cell]; }

    /// sum over T in S of (-1)^(|S|-|T|) (phat_T / p_T - 1): the ones cancel for every S that is not empty.
    [[nodiscard]] double contrast(Subset set, std::size_t cell) const {
        double total = 0.0;
        for (Subset part = set; part != 0; part = (part - 1) & set) {
            const bool even = (std::popcount(set) - std::popcount(part)) % 2 == 0;
            const double departure = margins_[part].departure[project(set, cell, part)];
            total += even ? departure : -departure;
        }
        return total;
    }

private:
    struct Margin {
        std::vector<double> departure; ///< phat / p - 1
        std::vector<double> probability;
    };

    [[nodiscard]] bool has(Subset set, std::size_t factor) const { return (set >> factor & 1U) != 0; }

    // Cells of a margin are numbered row by row over its factors, first factor slowest.
    [[nodiscard]] std::size_t project(Subset from, std::size_t cell, Subset to) const {
        std::size_t place = 0;
        std::size_t stride = 1;
        for (std::size_t t = factors_.size(); t-- > 0;) {
            if (!has(from, t))
                continue;
            const std::size_t levels = factors_[t].weights.size();
            if (has(to, t)) {
                place += stride * (cell % levels);
                stride *= levels;
            }
            cell /= levels;
        }
        return place;
    }

    void fill(Subset set) {
        std::size_t cells = 1;
        std::int64_t total = 1;
        for (std::size_t t = 0; t < factors_.size(); ++t)
            if (has(set, t)) {
                cells *= factors_[t].weights.size();
                std::int64_t sum = 0;
                for (const std::int64_t weight : factors_[t].weights)
                    sum += weight;
                total *= sum;
            }
        std::vector<std::int64_t> observed(cells, 0);
        std::vector<std::int64_t> weight(cells, 0);
        const Subset all = static_cast<Subset>(margins_.size() - 1);
        for (std::size_t i = 0; i < input_.observed.size(); ++i)
            observed[project(all, i, set)] += input_.observed[i].value();
        for (std::size_t cell = 0; cell < cells; ++cell)
            weight[cell] = weight_of(set, cell);
        Margin& margin = margins_[set];
        for (std::size_t cell = 0; cell < cells; ++cell) {
            const Wide scaled = Wide{n_} * weight[cell];
            margin.departure.push_back(static_cast<double>(Wide{total} * observed[cell] - scaled) /
                                       static_cast<double>(scaled));
            margin.probability.push_back(static_cast<double>(weight[cell]) / static_cast<double>(total));
        }
    }

    [[nodiscard]] std::int64_t weight_of(Subset set, std::size_t cell) const {
        std::int64_t weight = 1;
        for (std::size_t t = factors_.size(); t-- > 0;)
            if (has(set, t)) {
                const std::size_t levels = factors_[t].weights.size();
                weight *= factors_[t].weights[cell % levels];
                cell /= levels;
            }
        return weight;
    }

    const Input& input_;
    const std::vector<inheritance::Factor>& factors_;
    std::vector<Margin> margins_;
    std::int64_t n_ = 0;
};

std::string factor_text(const inheritance::Factor& factor) {
    std::string text;
    for (const std::int64_t weight : factor.weights)
        text += (text.empty() ? "" : ":") + std::to_string(weight);
    return text;
}

Message row_name(const Input& input, const std::vector<inheritance::Factor>& factors,
                 const std::vector<std::size_t>& traits) {
    if (traits.size() == 1)
        return {MessageId::FitPartitionTrait,
                {text_argument(input.trait_names[traits[0]]), ratio_argument(factor_text(factors[traits[0]]))}};
    if (factors.size() == 2)
        return {MessageId::FitPartitionAssociation, {}};
    std::string names;
    for (const std::size_t trait : traits)
        names += (names.empty() ? "" : " × ") + input.trait_names[trait];
    return {MessageId::FitPartitionAssociationOf, {text_argument(names)}};
}

PartitionRow row_of(const Input& input, const std::vector<inheritance::Factor>& factors, const Margins& margins,
                    Subset set) {
    PartitionRow row;
    row.df = 1;
    for (std::size_t t = 0; t < factors.size(); ++t)
        if ((set >> t & 1U) != 0) {
            row.traits.push_back(t);
            row.df *= static_cast<int>(factors[t].weights.size()) - 1;
        }
    row.what = row_name(input, factors, row.traits);
    double total = 0.0;
    for (std::size_t cell = 0; cell < margins.size(set); ++cell) {
        const double contrast = margins.contrast(set, cell);
        total += margins.probability(set, cell) * contrast * contrast;
    }
    row.statistic = static_cast<double>(margins.n()) * total;
    row.p = numeric::chi_square_upper(row.statistic, row.df);
    return row;
}

} // namespace

Maybe<std::vector<PartitionRow>> partition_by_traits(const Input& input) {
    if (input.level_counts.size() < 2 || input.level_counts.size() > kMostTraits)
        return plain_message(MessageId::FitPartitionNeedsTraits);
    if (!input.joins.empty())
        return plain_message(MessageId::FitPartitionJoined);
    const ratio::Ratio* ratio = input.hypothesis.ratio();
    if (ratio == nullptr || input.fitted_elsewhere > 0)
        return plain_message(MessageId::FitOnlyNothingFitted);
    const auto factors = inheritance::product_factors(*ratio, input.level_counts);
    if (factors.size() != input.level_counts.size())
        return plain_message(MessageId::FitPartitionNoProduct);
    for (const inheritance::Factor& factor : factors)
        if (factor.weights.size() < 2 ||
            std::any_of(factor.weights.begin(), factor.weights.end(), [](std::int64_t w) { return w <= 0; }))
            return plain_message(MessageId::FitPartitionNoProduct);
    const Margins margins(input, factors);
    if (margins.n() == 0)
        return plain_message(MessageId::FitNoPlants);
    std::vector<PartitionRow> rows;
    const auto sets = Subset{1} << factors.size();
    for (std::size_t size = 1; size <= factors.size(); ++size) // single traits first, then pairs, …
        for (Subset set = 1; set < sets; ++set)
            if (static_cast<std::size_t>(std::popcount(set)) == size)
                rows.push_back(row_of(input, factors, margins, set));
    return rows;
}

} // namespace filial::fit
