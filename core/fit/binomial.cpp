// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/binomial.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <limits>
#include <numbers>

#include <boost/math/quadrature/gauss.hpp>
#include <boost/math/special_functions/log1p.hpp>

#include "core/fit/statistics.h"
#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

__extension__ using Wide = __int128;

constexpr double kEpsilon = std::numeric_limits<double>::epsilon();
// Up to this standard deviation a tail is summed term by term; above, its integral is cheaper and as accurate.
constexpr double kSumUpToDeviation = 60.0;

// ln n! - [ln(2 pi n)/2 + n ln n - n]. Source: Loader 2000; the series is Stirling's (Abramowitz & Stegun
// 1964, 6.1.41).
double stirling_error(std::int64_t n) {
    static const std::array<double, 16> small = [] {
        std::array<double, 16> table{};
        long double log_factorial = 0.0L;
        for (std::size_t i = 1; i < table.size(); ++i) {
            const auto x = static_cast<long double>(i);
            log_factorial += std::log(x);
            table[i] = static_cast<double>(
                log_factorial - (0.5L * std::log(2.0L * std::numbers::pi_v<long double> * x) + x * std::log(x) - x));
        }
        return table;
    }();
    if (n < 16)
        return small[static_cast<std::size_t>(n)];
    const auto x = static_cast<double>(n);
    const double inverse_square = 1.0 / (x * x);
    return (1.0 / 12.0 -
            (1.0 / 360.0 -
             (1.0 / 1260.0 -
              (1.0 / 1680.0 - (1.0 / 1188.0 - 691.0 / 360360.0 * inverse_square) * inverse_square) * inverse_square) *
                 inverse_square) *
                inverse_square) /
           x;
}

// 1 + r(1) + r(1) r(2) + …, ratios falling: stops when the geometric bound of the rest is below rounding.
template <class Ratio> double sum_of_products(std::int64_t most, Ratio ratio) {
    double sum = 1.0;
    double term = 1.0;
    for (std::int64_t j = 1; j <= most; ++j) {
        const double r = ratio(static_cast<double>(j));
        term *= r;
        sum += term;
        if (r < 1.0 && term * r < kEpsilon / 8.0 * sum * (1.0 - r))
            break;
    }
    return sum;
}

// P(X >= x)/P(X = x) = x * integral over u in (0,1) of (1-u)^(x-1) (1 + u p/q)^(n-x), from the incomplete beta function
// with t = p(1-u). `slope` = [(x-1) - (n-x) p/q] is the fall of the logarithm at u = 0, exact.
double tail_over_term(double x, double rest, double odds, double slope) {
    const auto exponent = [=](double u) {
        return (x - 1.0) * boost::math::log1pmx(-u) + rest * boost::math::log1pmx(u * odds) - slope * u;
    };
    // The integrand is log-concave with curvature about x - 1 + rest * odds^2 at 0.
    const double curvature = x - 1.0 + rest * odds * odds;
    double panel = std::min(1.0, 1.0 / (std::max(slope, 0.0) * 0.5 + 0.7 * std::sqrt(curvature)));
    double total = 0.0;
    double from = 0.0;
    while (from < 1.0) {
        const double to = std::min(1.0, from + panel);
        const double part = boost::math::quadrature::gauss<double, 20>::integrate(
            [&](double u) { return std::exp(exponent(u)); }, from, to);
        total += part;
        if (part < kEpsilon / 64.0 * total)
            break;
        from = to;
    }
    return x * total;
}

} // namespace

Binomial::Binomial(std::int64_t n, double p, double q)
    : n_(n), p_(p), q_(q), log_p_(p < 0.5 ? std::log(p) : std::log1p(-q)),
      log_q_(q < 0.5 ? std::log(q) : std::log1p(-p)), sd_(std::sqrt(static_cast<double>(n) * p * q)) {
    set_places();
}

Binomial::Binomial(std::int64_t n, std::int64_t a, std::int64_t b)
    : Binomial(n, static_cast<double>(a) / static_cast<double>(a + b),
               static_cast<double>(b) / static_cast<double>(a + b)) {
    a_ = a;
    b_ = b;
    set_places();
}

void Binomial::set_places() {
    if (a_ > 0) {
        mean_floor_ = static_cast<std::int64_t>(Wide{n_} * a_ / (a_ + b_));
        mode_ = static_cast<std::int64_t>(Wide{n_ + 1} * a_ / (a_ + b_));
    } else {
        mean_floor_ = static_cast<std::int64_t>(static_cast<double>(n_) * p_);
        mode_ = static_cast<std::int64_t>(static_cast<double>(n_ + 1) * p_);
    }
    mean_floor_ = std::clamp<std::int64_t>(mean_floor_, 0, n_);
    mode_ = std::clamp<std::int64_t>(mode_, 0, n_);
}

double Binomial::excess(std::int64_t x) const {
    if (a_ > 0) {
        const Wide total = Wide{a_} + b_;
        return static_cast<double>(total * x - Wide{n_} * a_) / static_cast<double>(total);
    }
    // By the smaller of p and q, which carries the digits.
    if (q_ < p_)
        return std::fma(static_cast<double>(n_), q_, static_cast<double>(x - n_));
    return std::fma(-static_cast<double>(n_), p_, static_cast<double>(x));
}

double Binomial::deviance(std::int64_t x) const {
    const auto n = static_cast<double>(n_);
    const double d = excess(x);
    return deviance_term(static_cast<double>(x), n * p_, d) + deviance_term(static_cast<double>(n_ - x), n * q_, -d);
}

double Binomial::pearson(std::int64_t x) const {
    const double d = excess(x) / sd_;
    return d * d;
}

double Binomial::log_pmf(std::int64_t x) const {
    const auto n = static_cast<double>(n_);
    if (x == 0)
        return n * log_q_;
    if (x == n_)
        return n * log_p_;
    const auto successes = static_cast<double>(x);
    const auto failures = static_cast<double>(n_ - x);
    return stirling_error(n_) - stirling_error(x) - stirling_error(n_ - x) - deviance(x) -
           0.5 * std::log(2.0 * std::numbers::pi * successes * (failures / n));
}

double Binomial::upper_tail_over_term(std::int64_t x) const {
    const auto from = static_cast<double>(x);
    const auto rest = static_cast<double>(n_ - x);
    const double odds = p_ / q_;
    if (sd_ <= kSumUpToDeviation || rest == 0.0)
        return sum_of_products(n_ - x, [&](double j) { return odds * (rest - j + 1.0) / (from + j); });
    return tail_over_term(from, rest, odds, (excess(x) - q_) / q_);
}

double Binomial::log_upper_tail(std::int64_t x) const {
    if (x > n_)
        return -numeric::kInfinity;
    if (x <= 0)
        return 0.0;
    return log_pmf(x) + std::log(upper_tail_over_term(x));
}

double Binomial::log_lower_tail(std::int64_t x) const {
    if (x < 0)
        return -numeric::kInfinity;
    if (x >= n_)
        return 0.0;
    const auto from = static_cast<double>(x);
    const auto rest = static_cast<double>(n_ - x);
    const double odds = q_ / p_;
    if (sd_ <= kSumUpToDeviation || x == 0)
        return log_pmf(x) +
               std::log(sum_of_products(x, [&](double j) { return odds * (from - j + 1.0) / (rest + j); }));
    return log_pmf(x) + std::log(tail_over_term(rest, from, odds, (-excess(x) - p_) / p_));
}

double Binomial::relative_error_bound(double log_tail) const {
    // Each of the few dozen operations behind the leading term errs by half an epsilon of its size, which is at most
    // that of the logarithm (or of the factors' logarithms, below 40); a sum of t terms adds at most 4 t epsilons.
    const double terms = std::min(sd_, kSumUpToDeviation) * 9.0;
    return kEpsilon * (200.0 + 8.0 * std::abs(log_tail) + 4.0 * terms);
}

} // namespace filial::fit
