// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/detectable.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdint>

#include <boost/math/tools/toms748_solve.hpp>

#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

constexpr std::array kPowers{0.8, 0.9};

double solve_noncentrality(double power, double alpha, int df) {
    const double critical = numeric::chi_square_critical(alpha, df);
    const auto lacking = [&](double lambda) {
        return numeric::noncentral_chi_square_upper(critical, df, lambda) - power;
    };
    double high = 8.0 + 4.0 * std::sqrt(static_cast<double>(df));
    double low = 0.0;
    while (lacking(high) < 0.0) {
        low = high;
        high *= 2.0;
    }
    std::uintmax_t evaluations = 100;
    const auto bracket = boost::math::tools::toms748_solve(lacking, low, high,
                                                           boost::math::tools::eps_tolerance<double>(50), evaluations);
    return 0.5 * (bracket.first + bracket.second);
}

// The families of a cross ask the same question one after the other: the last answer of each power is kept.
struct Remembered {
    double alpha = 0.0;
    int df = 0;
    double lambda = 0.0;
};

double remembered_noncentrality(std::size_t power, double alpha, int df) {
    thread_local std::array<Remembered, kPowers.size()> last;
    Remembered& memory = last[power];
    if (memory.alpha != alpha || memory.df != df)
        memory = {alpha, df, noncentrality_for_power(kPowers[power], alpha, df)};
    return memory.lambda;
}

void set_percentage_points(Detectable& detectable, const Sample& sample) {
    detectable.percentage_points = Message{MessageId::FitNoClassCanMove, {}};
    double least = 2.0;
    for (std::size_t i = 0; i < sample.cells.size(); ++i) {
        const double p = sample.cells[i].probability;
        const double move = detectable.w * std::sqrt(p * (1.0 - p));
        if (p <= 0.0 || move > std::min(p, 1.0 - p) || move >= least)
            continue;
        least = move;
        detectable.percentage_points = move;
        detectable.class_index = i;
    }
}

} // namespace

double noncentrality_for_power(double power, double alpha, int df) {
    return solve_noncentrality(power, alpha, df);
}

std::vector<Detectable> detectable_departures(const Sample& sample, double alpha, int df) {
    std::vector<Detectable> result;
    if (df < 1 || sample.n == 0)
        return result;
    for (std::size_t i = 0; i < kPowers.size(); ++i) {
        if (alpha >= kPowers[i])
            continue;
        Detectable detectable;
        detectable.power = kPowers[i];
        detectable.w = std::sqrt(remembered_noncentrality(i, alpha, df) / static_cast<double>(sample.n));
        set_percentage_points(detectable, sample);
        result.push_back(std::move(detectable));
    }
    return result;
}

} // namespace filial::fit
