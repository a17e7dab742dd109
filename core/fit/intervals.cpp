// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/intervals.h"

#include <cmath>

#include "core/fit/binomial.h"
#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

constexpr int kMostLimitSteps = 60;
constexpr double kLastLimitStep = 1e-8;

// A share with its complement, so that either keeps its digits near 0.
struct Share {
    double p = 0.0, q = 1.0;
};

Share share_at(double logit) {
    return {1.0 / (1.0 + std::exp(-logit)), 1.0 / (1.0 + std::exp(logit))};
}

// A start for the exact limit: where the normal approximation with continuity correction puts it.
double first_logit(std::int64_t x, std::int64_t n, double z) {
    const double count = static_cast<double>(x) - 0.5;
    const double rest = static_cast<double>(n - x) + 0.5;
    return std::log(count / rest) - z * std::sqrt(1.0 / count + 1.0 / rest);
}

// The share at which P(X >= x) = tail, x >= 1. Newton's method for ln P as a function of the logit of the share: it is
// concave and rises with slope x q P(X = x)/P(X >= x), so that every start leads there, from below after one step.
Share lower_limit(std::int64_t x, std::int64_t n, double tail) {
    if (x == n) {
        const double log_p = std::log(tail) / static_cast<double>(n);
        return {std::exp(log_p), -std::expm1(log_p)};
    }
    const double goal = std::log(tail);
    double logit = first_logit(x, n, numeric::normal_critical(tail));
    for (int step = 0; step < kMostLimitSteps; ++step) {
        const Share share = share_at(logit);
        const Binomial binomial(n, share.p, share.q);
        const double over = binomial.upper_tail_over_term(x);
        const double lacking = goal - binomial.log_pmf(x) - std::log(over);
        logit += lacking * over / (static_cast<double>(x) * share.q);
        if (std::abs(lacking) < kLastLimitStep) // the next would be its square
            break;
    }
    return share_at(logit);
}

Interval wilson_from_square(std::int64_t x, std::int64_t n, double z_squared) {
    const auto count = static_cast<double>(x);
    const auto rest = static_cast<double>(n - x);
    const auto total = static_cast<double>(n);
    const double half = std::sqrt(z_squared * (z_squared + 4.0 * count * (rest / total)));
    const double scale = 2.0 * (total + z_squared);
    // The lower limit as a quotient, so that small counts lose no digits; exactly 0 and 1 at the ends.
    const double high = x == n ? 1.0 : (2.0 * count + z_squared + half) / scale;
    const double low = 2.0 * count * count / total / (2.0 * count + z_squared + half);
    return {x == 0 ? 0.0 : low, high};
}

} // namespace

Interval wilson_interval(std::int64_t x, std::int64_t n, double z) {
    return wilson_from_square(x, n, z * z);
}

Interval clopper_pearson_interval(std::int64_t x, std::int64_t n, double error) {
    const double tail = error / 2.0;
    Interval interval;
    if (x > 0)
        interval.low = lower_limit(x, n, tail).p;
    if (x < n)
        interval.high = lower_limit(n - x, n, tail).q;
    return interval;
}

Interval goodman_interval(std::int64_t x, std::int64_t n, std::size_t classes, double error) {
    const double each = classes <= 2 ? error : error / static_cast<double>(classes);
    return wilson_interval(x, n, numeric::normal_critical(each / 2.0));
}

double share_that_explains(std::int64_t x, std::int64_t n, double error) {
    return x == 0 ? 0.0 : lower_limit(x, n, error).p;
}

} // namespace filial::fit
