// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/detectable.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>

#include <boost/math/special_functions/gamma.hpp>

#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

constexpr std::array kPowers{0.8, 0.9};
constexpr double kWeightLeft = 1e-18;
constexpr int kMostSteps = 100;
constexpr double kLastStep = 1e-9;    // relative; the next would be its square
constexpr double kTied = 1.0 - 1e-12; // classes of p and 1 - p move alike: the first counts

// The power is wanted to 1e-12; plain doubles give that at a fraction of the time.
using Plain = boost::math::policies::policy<boost::math::policies::promote_double<false>>;

struct Power {
    double power = 0.0;
    double slope = 0.0; ///< its derivative by the noncentrality
};

// P(X > critical) of the noncentral chi-square distribution as its Poisson mixture: weights of mean lambda/2 on
// Q(df/2 + j, critical/2), where Q(a + 1, y) = Q(a, y) + y^a e^-y / Gamma(a + 1) (Johnson, Kotz & Balakrishnan 1995,
// chapter 29). Added up from the largest weight to both sides.
Power power_at(double lambda, double critical, int df) {
    const double mean = 0.5 * lambda;
    const double y = 0.5 * critical;
    const double middle = std::floor(mean);
    const double a = 0.5 * df + middle;
    const double middle_weight = boost::math::gamma_p_derivative(middle + 1.0, mean, Plain());
    const double middle_step = boost::math::gamma_p_derivative(a + 1.0, y, Plain());
    const double middle_upper = boost::math::gamma_q(a, y, Plain());
    Power result;
    double weight = middle_weight;
    double step = middle_step;
    double upper = middle_upper;
    for (double j = 0.0; weight > kWeightLeft; j += 1.0) {
        result.power += weight * upper;
        result.slope += 0.5 * weight * step;
        upper += step;
        step *= y / (a + j + 1.0);
        weight *= mean / (middle + j + 1.0);
    }
    weight = middle_weight;
    step = middle_step;
    upper = middle_upper;
    for (double j = 0.0; j < middle && weight > kWeightLeft; j += 1.0) {
        weight *= (middle - j) / mean;
        step *= (a - j) / y;
        upper -= step;
        result.power += weight * upper;
        result.slope += 0.5 * weight * step;
    }
    return result;
}

void set_percentage_points(Detectable& detectable, const Sample& sample) {
    detectable.percentage_points = Message{MessageId::FitNoClassCanMove, {}};
    double least = 2.0;
    for (std::size_t i = 0; i < sample.cells.size(); ++i) {
        const double p = sample.cells[i].probability;
        const double move = detectable.w * std::sqrt(p * (1.0 - p));
        if (p <= 0.0 || move > std::min(p, 1.0 - p) || move >= least * kTied)
            continue;
        least = move;
        detectable.percentage_points = move;
        detectable.class_index = i;
    }
}

} // namespace

double noncentrality_for_power(double power, double alpha, int df) {
    const double critical = numeric::chi_square_critical(alpha, df);
    double low = 0.0;
    double high = std::numeric_limits<double>::infinity();
    double lambda = std::max(1.0, critical - df + std::sqrt(2.0 * critical));
    for (int i = 0; i < kMostSteps; ++i) {
        const Power found = power_at(lambda, critical, df);
        const double lacking = power - found.power;
        (lacking > 0.0 ? low : high) = lambda;
        double next = lambda + lacking / found.slope; // Newton, kept inside what is known
        if (!(next > low && next < high))
            next = std::isinf(high) ? 2.0 * lambda : 0.5 * (low + high);
        const double moved = std::abs(next - lambda);
        lambda = next;
        if (moved < kLastStep * lambda)
            break;
    }
    return lambda;
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
        detectable.w = std::sqrt(noncentrality_for_power(kPowers[i], alpha, df) / static_cast<double>(sample.n));
        set_percentage_points(detectable, sample);
        result.push_back(std::move(detectable));
    }
    return result;
}

} // namespace filial::fit
