// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <string>
#include <vector>

#include "core/report/cross_analysis.h"

// Terms. The departure of a class is how far its count lies from the expected one: in plants, and in standard errors
// (the adjusted residual of Haberman 1973). The band holds the departures of 1 - alpha of samples when the hypothesis
// is true, a class taken by itself.
namespace filial::report {

struct FamilyTick {
    book::Id family;
    std::string label;
    double standard_errors = 0.0;
};
struct ClassDeparture {
    std::string label;
    std::vector<std::size_t> members; ///< classes of the cross; several where joined
    double observed = 0.0;
    double expected = 0.0;
    double plants = 0.0; ///< observed - expected
    Maybe<double> standard_errors;
    bool rejected = false;         ///< Holm-adjusted P below alpha: the only reason for a warning colour
    std::vector<FamilyTick> ticks; ///< single families, set-aside ones left out
};
struct DepartureMap {
    double band = 0.0;  ///< standard errors; 1.96 at alpha 0.05
    double share = 0.0; ///< of samples inside the band, 1 - alpha
    std::vector<ClassDeparture> classes;
};

/// What the departure map shows of an analysis; empty `classes` where nothing is tested. 0 < alpha < 1.
[[nodiscard]] DepartureMap departure_map(const CrossAnalysis& analysis, double alpha);

/// Values rounded to `decimals` so that they add to their rounded sum: the largest remainders are rounded up.
[[nodiscard]] std::vector<double> rounded_to_sum(const std::vector<double>& values, int decimals);

} // namespace filial::report
