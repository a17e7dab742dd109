// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstdint>

// Terms. Binomial probabilities and tails for numbers of offspring up to 4e15, as natural logarithms, so that a tail
// of 1e-5000 keeps its digits. p is given together with q = 1 - p, each with full relative accuracy.
namespace filial::fit {

class Binomial {
public:
    /// X ~ binomial(n, p); p, q > 0, p + q = 1.
    Binomial(std::int64_t n, double p, double q);
    /// p = a / (a + b), q = b / (a + b): departures from the mean are then exact. a, b > 0, a + b <= 2^62.
    Binomial(std::int64_t n, std::int64_t a, std::int64_t b);

    [[nodiscard]] std::int64_t n() const { return n_; }
    /// floor(n p): the statistic of a fit falls up to here and rises from the next.
    [[nodiscard]] std::int64_t mean_floor() const { return mean_floor_; }
    /// floor((n + 1) p), kept in 0..n: the probability rises up to here and falls from the next.
    [[nodiscard]] std::int64_t mode() const { return mode_; }

    /// Half of G of the outcome (x, n - x).
    [[nodiscard]] double deviance(std::int64_t x) const;
    /// ln P(X = x), saddle-point form (Loader 2000).
    [[nodiscard]] double log_pmf(std::int64_t x) const;
    /// X2 of the outcome (x, n - x).
    [[nodiscard]] double pearson(std::int64_t x) const;
    /// ln P(X <= x) for x <= mode, ln P(X >= x) for x > mode; -infinity outside 0..n. The tails away from the mode.
    [[nodiscard]] double log_lower_tail(std::int64_t x) const;
    [[nodiscard]] double log_upper_tail(std::int64_t x) const;
    /// P(X >= x) / P(X = x) for 1 <= x <= n.
    [[nodiscard]] double upper_tail_over_term(std::int64_t x) const;
    /// A bound for the relative error of a tail whose logarithm is `log_tail`: rounding of the leading term, of the
    /// summation and the truncated rest.
    [[nodiscard]] double relative_error_bound(double log_tail) const;

private:
    [[nodiscard]] double excess(std::int64_t x) const; ///< x - n p
    void set_places();
    std::int64_t n_;
    std::int64_t a_ = 0, b_ = 0; ///< whole weights, or 0
    double p_, q_;
    double log_p_, log_q_;
    double sd_;
    std::int64_t mean_floor_ = 0, mode_ = 0;
};

} // namespace filial::fit
