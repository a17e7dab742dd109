// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>

// Terms. Intervals for the share of one class, from its count x of n plants; 0 <= x <= n, n >= 1.
namespace filial::fit {

struct Interval {
    double low = 0.0;
    double high = 1.0;
};

/// Wilson 1927 without continuity correction; z is the normal quantile (1.96 for 95 %).
[[nodiscard]] Interval wilson_interval(std::int64_t x, std::int64_t n, double z);
/// Clopper & Pearson 1934; `error` is both tails together (0.05 for 95 %).
[[nodiscard]] Interval clopper_pearson_interval(std::int64_t x, std::int64_t n, double error);
/// Goodman 1965: joint for k classes; Wilson's form with the chi-square(1) point at error/k, at `error` for k = 2,
/// where the two classes are one share.
[[nodiscard]] Interval goodman_interval(std::int64_t x, std::int64_t n, std::size_t classes, double error);
/// The smallest probability at which x or more of n would not be surprising: P(X >= x) = error. 0 for x = 0.
[[nodiscard]] double share_that_explains(std::int64_t x, std::int64_t n, double error);

} // namespace filial::fit
