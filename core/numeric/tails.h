// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>
#include <limits>

// Terms. An upper tail is P(X >= x), a lower tail P(X <= x), each computed directly and never as one minus
// the other. log10_p stays finite where p is too small for a double.
namespace filial::numeric {

inline constexpr double kInfinity = std::numeric_limits<double>::infinity();

struct Tail {
    double p = 1.0;       ///< 0..1; may underflow to 0
    double log10_p = 0.0; ///< decimal logarithm; -infinity only for an impossible event

    friend bool operator==(const Tail&, const Tail&) = default;
};

/// Chi-square upper tail Q(df/2, x/2); x >= 0, df > 0. Relative error <= 1e-12 down to 1e-300; log10_p right to
/// the same absolute error / ln 10 beyond. Source: Pearson 1900; Abramowitz & Stegun 1964, 26.4.
[[nodiscard]] Tail chi_square_upper(double x, double df);
/// Chi-square lower tail P(df/2, x/2), same range and accuracy.
[[nodiscard]] Tail chi_square_lower(double x, double df);
/// The x with chi_square_upper(x, df).p == p; 0 < p < 1.
[[nodiscard]] double chi_square_critical(double p, double df);
/// Noncentral chi-square upper tail at x, df, noncentrality lambda >= 0.
[[nodiscard]] double noncentral_chi_square_upper(double x, double df, double lambda);
/// Two-sided normal P of z: erfc(|z|/sqrt 2).
[[nodiscard]] Tail normal_two_sided(double z);
/// Upper tail of the standard normal.
[[nodiscard]] Tail normal_upper(double z);
/// Standard normal quantile z with P(Z > z) = upper; 0 < upper < 1.
[[nodiscard]] double normal_critical(double upper);
/// P(X >= k) and P(X <= k), X binomial(n, p).
[[nodiscard]] double binomial_upper(std::int64_t k, std::int64_t n, double p);
[[nodiscard]] double binomial_lower(std::int64_t k, std::int64_t n, double p);

} // namespace filial::numeric
