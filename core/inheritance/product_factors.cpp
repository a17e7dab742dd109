// SPDX-License-Identifier: GPL-3.0-or-later
#include <numeric>

#include <boost/multiprecision/cpp_int.hpp>

#include "core/inheritance/hypothesis.h"

namespace filial::inheritance {
namespace {

using Whole = boost::multiprecision::cpp_int;

/// The level of `trait` that class `index` has; first trait slowest.
std::size_t level_of(std::size_t index, std::span<const std::size_t> level_counts, std::size_t trait) {
    std::size_t block = 1;
    for (std::size_t later = trait + 1; later < level_counts.size(); ++later)
        block *= level_counts[later];
    return index / block % level_counts[trait];
}

} // namespace

std::vector<Factor> product_factors(const ratio::Ratio& ratio, std::span<const std::size_t> level_counts) {
    std::size_t classes = 1;
    for (const std::size_t levels : level_counts) {
        if (levels == 0 || levels > ratio.size())
            return {};
        classes *= levels;
        if (classes > ratio.size())
            return {};
    }
    if (level_counts.empty() || classes != ratio.size())
        return {};
    std::vector<Factor> margins;
    for (std::size_t trait = 0; trait < level_counts.size(); ++trait) {
        Factor margin{std::vector<std::int64_t>(level_counts[trait], 0)};
        for (std::size_t i = 0; i < classes; ++i)
            margin.weights[level_of(i, level_counts, trait)] += ratio.weights()[i];
        margins.push_back(std::move(margin));
    }
    // A product of its margins: weight * total^(traits - 1) = product of the margins, in integers without bound.
    const Whole scale =
        boost::multiprecision::pow(Whole(ratio.total()), static_cast<unsigned>(level_counts.size() - 1));
    for (std::size_t i = 0; i < classes; ++i) {
        Whole product = 1;
        for (std::size_t trait = 0; trait < level_counts.size(); ++trait)
            product *= margins[trait].weights[level_of(i, level_counts, trait)];
        if (product != ratio.weights()[i] * scale)
            return {};
    }
    for (Factor& margin : margins) {
        std::int64_t divisor = 0;
        for (const std::int64_t weight : margin.weights)
            divisor = std::gcd(divisor, weight);
        for (std::int64_t& weight : margin.weights)
            weight /= divisor;
    }
    return margins;
}

} // namespace filial::inheritance
