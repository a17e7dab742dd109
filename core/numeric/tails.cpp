// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/numeric/tails.h"

#include <cmath>
#include <limits>
#include <stdexcept>
#include <utility>

#include <boost/math/distributions/binomial.hpp>
#include <boost/math/distributions/chi_squared.hpp>
#include <boost/math/distributions/non_central_chi_squared.hpp>
#include <boost/math/distributions/normal.hpp>
#include <boost/math/special_functions/gamma.hpp>
#include <boost/math/tools/fraction.hpp>
#include <boost/math/tools/series.hpp>

namespace filial::numeric {
namespace {

constexpr double kSmallestTrusted = 1e-290; // below, the logarithm is taken by its own route
const double kLn10 = std::log(10.0);
// Plain doubles give a critical value to 1e-14 and at a tenth of the time of long doubles.
using Plain = boost::math::policies::policy<boost::math::policies::promote_double<false>>;

// Legendre's continued fraction of the incomplete gamma function (Abramowitz & Stegun 1964, 6.5.31), for x > a + 1.
struct UpperGammaFraction {
    using result_type = std::pair<double, double>;
    double a, x, k = -1.0;
    result_type operator()() {
        k += 1.0;
        return {k * (a - k), x - a + 1.0 + 2.0 * k};
    }
};

// Terms of 1 + x/(a+1) + x^2/((a+1)(a+2)) + …  (Abramowitz & Stegun 1964, 6.5.29).
struct LowerGammaSeries {
    using result_type = double;
    double a, x, term = 1.0;
    double operator()() {
        const double now = term;
        a += 1.0;
        term *= x / a;
        return now;
    }
};

double log_gamma_upper(double a, double x) {
    UpperGammaFraction fraction{a, x};
    const double value = boost::math::tools::continued_fraction_b(fraction, std::numeric_limits<double>::epsilon());
    return -x + a * std::log(x) - boost::math::lgamma(a) - std::log(value);
}

double log_gamma_lower(double a, double x) {
    LowerGammaSeries series{a, x};
    const double sum = boost::math::tools::sum_series(series, std::numeric_limits<double>::digits);
    return -x + a * std::log(x) - boost::math::lgamma(a + 1.0) + std::log(sum);
}

void require(bool condition, const char* what) {
    if (!condition)
        throw std::domain_error(what);
}

} // namespace

Tail chi_square_upper(double x, double df) {
    require(x >= 0.0 && df > 0.0, "chi_square_upper needs x >= 0 and df > 0");
    if (x == kInfinity)
        return {0.0, -kInfinity};
    const double p = boost::math::gamma_q(df / 2.0, x / 2.0);
    if (p > kSmallestTrusted)
        return {p, std::log10(p)};
    const double log_p = log_gamma_upper(df / 2.0, x / 2.0);
    return {std::exp(log_p), log_p / kLn10};
}

Tail chi_square_lower(double x, double df) {
    require(x >= 0.0 && df > 0.0, "chi_square_lower needs x >= 0 and df > 0");
    if (x == 0.0)
        return {0.0, -kInfinity};
    if (x == kInfinity)
        return {1.0, 0.0};
    const double p = boost::math::gamma_p(df / 2.0, x / 2.0);
    if (p > kSmallestTrusted)
        return {p, std::log10(p)};
    const double log_p = log_gamma_lower(df / 2.0, x / 2.0);
    return {std::exp(log_p), log_p / kLn10};
}

double chi_square_critical(double p, double df) {
    require(p > 0.0 && p < 1.0 && df > 0.0, "chi_square_critical needs 0 < p < 1 and df > 0");
    return 2.0 * boost::math::gamma_q_inv(df / 2.0, p, Plain());
}

double noncentral_chi_square_upper(double x, double df, double lambda) {
    require(x >= 0.0 && df > 0.0 && lambda >= 0.0, "noncentral_chi_square_upper needs x >= 0, df > 0, lambda >= 0");
    if (lambda == 0.0)
        return chi_square_upper(x, df).p;
    const boost::math::non_central_chi_squared_distribution<double> distribution(df, lambda);
    return boost::math::cdf(boost::math::complement(distribution, x));
}

Tail normal_two_sided(double z) {
    return chi_square_upper(z * z, 1.0);
}

Tail normal_upper(double z) {
    require(!std::isnan(z), "normal_upper needs a number");
    if (z <= 0.0) {
        const double p = boost::math::cdf(boost::math::complement(boost::math::normal_distribution<double>(), z));
        return {p, std::log10(p)};
    }
    const Tail both = normal_two_sided(z);
    return {both.p / 2.0, both.log10_p - std::log10(2.0)};
}

double normal_critical(double upper) {
    require(upper > 0.0 && upper < 1.0, "normal_critical needs 0 < upper < 1");
    return boost::math::quantile(boost::math::complement(boost::math::normal_distribution<double>(), upper));
}

double binomial_upper(std::int64_t k, std::int64_t n, double p) {
    require(n >= 0 && p >= 0.0 && p <= 1.0, "binomial_upper needs n >= 0 and 0 <= p <= 1");
    if (k <= 0)
        return 1.0;
    if (k > n)
        return 0.0;
    const boost::math::binomial_distribution<double> distribution(static_cast<double>(n), p);
    return boost::math::cdf(boost::math::complement(distribution, static_cast<double>(k - 1)));
}

double binomial_lower(std::int64_t k, std::int64_t n, double p) {
    require(n >= 0 && p >= 0.0 && p <= 1.0, "binomial_lower needs n >= 0 and 0 <= p <= 1");
    if (k < 0)
        return 0.0;
    if (k >= n)
        return 1.0;
    const boost::math::binomial_distribution<double> distribution(static_cast<double>(n), p);
    return boost::math::cdf(distribution, static_cast<double>(k));
}

} // namespace filial::numeric
