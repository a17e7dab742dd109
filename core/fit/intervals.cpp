// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/fit/intervals.h"

#include <algorithm>
#include <cmath>

#include <boost/math/special_functions/beta.hpp>

#include "core/numeric/tails.h"

namespace filial::fit {
namespace {

double lower_limit(std::int64_t x, std::int64_t n, double tail) {
    if (x == 0)
        return 0.0;
    return boost::math::ibeta_inv(static_cast<double>(x), static_cast<double>(n - x) + 1.0, tail);
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
    const double high =
        x == n ? 1.0 : boost::math::ibetac_inv(static_cast<double>(x) + 1.0, static_cast<double>(n - x), tail);
    return {lower_limit(x, n, tail), high};
}

Interval goodman_interval(std::int64_t x, std::int64_t n, std::size_t classes, double error) {
    const double each = classes <= 2 ? error : error / static_cast<double>(classes);
    return wilson_from_square(x, n, numeric::chi_square_critical(each, 1.0));
}

double share_that_explains(std::int64_t x, std::int64_t n, double error) {
    return lower_limit(x, n, error);
}

} // namespace filial::fit
