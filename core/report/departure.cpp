// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/departure.h"

#include <algorithm>
#include <cmath>
#include <numeric>

#include "core/numeric/tails.h"

namespace filial::report {

namespace {

std::vector<FamilyTick> ticks_of(const CrossAnalysis& analysis, std::size_t place) {
    std::vector<FamilyTick> ticks;
    for (const FamilyAnalysis& family : analysis.families) {
        if (family.state != FamilyState::Tested || !family.fit || place >= family.fit->classes.size())
            continue;
        const Maybe<double>& errors = family.fit->classes[place].adjusted_residual;
        if (errors)
            ticks.push_back({family.id, family.label, *errors});
    }
    return ticks;
}

} // namespace

DepartureMap departure_map(const CrossAnalysis& analysis, double alpha) {
    DepartureMap map;
    map.share = 1.0 - alpha;
    map.band = numeric::normal_critical(alpha / 2.0);
    if (!analysis.totals)
        return map;
    for (std::size_t i = 0; i < analysis.totals->classes.size(); ++i) {
        const fit::ClassResult& result = analysis.totals->classes[i];
        ClassDeparture departure;
        departure.label = result.label;
        departure.members = result.members;
        departure.observed = result.observed.as_double();
        departure.expected = result.expected;
        departure.plants = departure.observed - departure.expected;
        departure.standard_errors = result.adjusted_residual;
        departure.rejected = result.p_holm && *result.p_holm < alpha;
        departure.ticks = ticks_of(analysis, i);
        map.classes.push_back(std::move(departure));
    }
    return map;
}

std::vector<double> rounded_to_sum(const std::vector<double>& values, int decimals) {
    const double scale = std::pow(10.0, decimals);
    std::vector<double> floors, remainders;
    for (const double value : values) {
        floors.push_back(std::floor(value * scale));
        remainders.push_back(value * scale - floors.back());
    }
    const double sum = std::accumulate(values.begin(), values.end(), 0.0);
    const double left = std::round(sum * scale) - std::accumulate(floors.begin(), floors.end(), 0.0);
    std::vector<std::size_t> order(values.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(),
                     [&](std::size_t a, std::size_t b) { return remainders[a] > remainders[b]; });
    for (std::size_t i = 0; i < order.size() && static_cast<double>(i) < left; ++i)
        floors[order[i]] += 1.0;
    for (double& value : floors)
        value /= scale;
    return floors;
}

} // namespace filial::report
