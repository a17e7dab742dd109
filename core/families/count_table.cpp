// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/families/count_table.h"

#include <algorithm>
#include <cmath>
#include <numeric>

namespace filial::families {
namespace {

// Counts go to 4e15 and weights to 2^62: their products need more than 64 bits to stay exact.
__extension__ using Wide = __int128;
using Real = long double;

constexpr Real kNearOne = 0.3L; // relative departures up to here go through the series below

// ln(1+x) - x for |x| <= kNearOne, by 2 atanh(s) with s = x/(2+x): ln(1+x) = 2s(1 + s^2/3 + s^4/5 + …) and
// 2s - x = -s x, so nothing cancels. (Abramowitz & Stegun 1964, 4.1.27.)
Real log1p_minus_x(Real x) {
    const Real s = x / (2.0L + x);
    const Real square = s * s;
    Real sum = 0.0L;
    for (int power = 29; power >= 3; power -= 2)
        sum = square * (1.0L / power + sum);
    return 2.0L * s * sum - s * x;
}

// O ln(O/E) - (O - E) from E and the relative departure x = (O - E)/E, without cancellation near x = 0.
Real deviance_term(Real expected, Real x) {
    if (x <= -1.0L)
        return expected;
    if (std::fabs(x) < kNearOne)
        return expected * ((1.0L + x) * log1p_minus_x(x) + x * x);
    return expected * ((1.0L + x) * std::log1p(x) - x);
}

struct Departure {
    Real expected = 0.0L;
    Real relative = 0.0L; // (O - E)/E
};

Departure departure(std::int64_t observed, std::int64_t n, const Shares& shares, std::size_t i) {
    if (!shares.weights.empty()) {
        const Wide scaled_expected = static_cast<Wide>(n) * shares.weights[i];
        const Wide difference = static_cast<Wide>(shares.weight_total) * observed - scaled_expected;
        const Real expected = static_cast<Real>(scaled_expected) / static_cast<Real>(shares.weight_total);
        return {expected, static_cast<Real>(difference) / static_cast<Real>(scaled_expected)};
    }
    const Real expected = static_cast<Real>(n) * static_cast<Real>(shares.p[i]);
    return {expected, (static_cast<Real>(observed) - expected) / expected};
}

Real exact_share(const Shares& shares, std::size_t i) {
    return shares.weights.empty() ? static_cast<Real>(shares.p[i])
                                  : static_cast<Real>(shares.weights[i]) / static_cast<Real>(shares.weight_total);
}

struct Sums {
    Real chi_square = 0.0L, g = 0.0L;
};

Sums sums(std::span<const std::int64_t> observed, std::int64_t n, const Shares& shares) {
    Sums result;
    if (n == 0)
        return result;
    for (std::size_t i = 0; i < observed.size(); ++i) {
        if (shares.p[i] <= 0.0)
            continue;
        const Departure d = departure(observed[i], n, shares, i);
        result.chi_square += d.expected * d.relative * d.relative;
        result.g += 2.0L * deviance_term(d.expected, d.relative);
    }
    return result;
}

} // namespace

CountTable::CountTable(std::vector<std::vector<std::int64_t>> rows) : rows_(std::move(rows)) {
    totals_.assign(rows_.empty() ? 0 : rows_.front().size(), 0);
    sizes_.reserve(rows_.size());
    for (const auto& row : rows_) {
        sizes_.push_back(std::accumulate(row.begin(), row.end(), std::int64_t{0}));
        total_ += sizes_.back();
        for (std::size_t i = 0; i < row.size(); ++i)
            totals_[i] += row[i];
    }
}

std::size_t CountTable::families_with_plants() const {
    return static_cast<std::size_t>(std::count_if(sizes_.begin(), sizes_.end(), [](auto n) { return n > 0; }));
}

std::size_t CountTable::classes_with_plants() const {
    return static_cast<std::size_t>(std::count_if(totals_.begin(), totals_.end(), [](auto n) { return n > 0; }));
}

std::size_t Shares::possible() const {
    return static_cast<std::size_t>(std::count_if(p.begin(), p.end(), [](double share) { return share > 0.0; }));
}

TwoStatistics statistics(std::span<const std::int64_t> observed, const Shares& shares) {
    const auto n = std::accumulate(observed.begin(), observed.end(), std::int64_t{0});
    const Sums result = sums(observed, n, shares);
    return {static_cast<double>(result.chi_square), static_cast<double>(result.g)};
}

TwoStatistics total_statistics(const CountTable& table, const Shares& shares) {
    Sums result;
    for (std::size_t j = 0; j < table.rows().size(); ++j) {
        const Sums one = sums(table.rows()[j], table.sizes()[j], shares);
        result.chi_square += one.chi_square;
        result.g += one.g;
    }
    return {static_cast<double>(result.chi_square), static_cast<double>(result.g)};
}

double between_scaled(const CountTable& table, const Shares& shares) {
    const auto n = static_cast<Real>(table.total());
    Real sum = 0.0L;
    for (std::size_t j = 0; j < table.rows().size(); ++j) {
        if (table.sizes()[j] == 0)
            continue;
        const auto size = static_cast<Real>(table.sizes()[j]);
        for (std::size_t i = 0; i < table.totals().size(); ++i) {
            if (shares.p[i] <= 0.0)
                continue;
            const Wide difference = static_cast<Wide>(table.rows()[j][i]) * table.total() -
                                    static_cast<Wide>(table.sizes()[j]) * table.totals()[i];
            const Real share_difference = static_cast<Real>(difference) / (size * n);
            sum += size * share_difference * share_difference / exact_share(shares, i);
        }
    }
    return static_cast<double>(sum);
}

std::optional<ContingencyStatistics> contingency_statistics(const CountTable& table) {
    const std::size_t rows = table.families_with_plants();
    const std::size_t columns = table.classes_with_plants();
    if (rows < 2 || columns < 2)
        return std::nullopt;
    ContingencyStatistics result;
    result.df = static_cast<int>((rows - 1) * (columns - 1));
    result.cells = rows * columns;
    Real smallest = static_cast<Real>(table.total());
    Sums sum;
    for (std::size_t j = 0; j < table.rows().size(); ++j) {
        for (std::size_t i = 0; i < table.totals().size(); ++i) {
            const Wide scaled = static_cast<Wide>(table.sizes()[j]) * table.totals()[i];
            if (scaled == 0)
                continue;
            const Wide difference = static_cast<Wide>(table.rows()[j][i]) * table.total() - scaled;
            const Real expected = static_cast<Real>(scaled) / static_cast<Real>(table.total());
            const Real relative = static_cast<Real>(difference) / static_cast<Real>(scaled);
            sum.chi_square += expected * relative * relative;
            sum.g += 2.0L * deviance_term(expected, relative);
            smallest = std::min(smallest, expected);
            if (scaled < static_cast<Wide>(5) * table.total())
                ++result.cells_below_5;
        }
    }
    result.chi_square = static_cast<double>(sum.chi_square);
    result.g = static_cast<double>(sum.g);
    result.smallest_expected = static_cast<double>(smallest);
    return result;
}

std::vector<std::optional<double>> against_the_rest(const CountTable& table) {
    std::vector<std::optional<double>> result(table.rows().size());
    for (std::size_t j = 0; j < table.rows().size(); ++j) {
        const std::int64_t size = table.sizes()[j];
        const std::int64_t rest = table.total() - size;
        if (size == 0 || rest == 0)
            continue;
        // In a table of two rows a column's departures are equal and opposite, so with D = O N - n C one term a
        // column is left: D^2 / (C n (N - n)).
        Real sum = 0.0L;
        for (std::size_t i = 0; i < table.totals().size(); ++i) {
            if (table.totals()[i] == 0)
                continue;
            const Wide difference =
                static_cast<Wide>(table.rows()[j][i]) * table.total() - static_cast<Wide>(size) * table.totals()[i];
            sum += static_cast<Real>(difference) * static_cast<Real>(difference) /
                   (static_cast<Real>(table.totals()[i]) * static_cast<Real>(size) * static_cast<Real>(rest));
        }
        result[j] = static_cast<double>(sum);
    }
    return result;
}

std::optional<double> score_z(const CountTable& table, const Shares& shares) {
    const auto df = static_cast<Real>(shares.possible()) - 1.0L;
    Real numerator = 0.0L, pairs = 0.0L;
    for (std::size_t j = 0; j < table.rows().size(); ++j) {
        const std::int64_t size = table.sizes()[j];
        if (size == 0)
            continue;
        const auto n = static_cast<Real>(size);
        pairs += n * (n - 1.0L);
        // sum O(O-1)/p - n(n-1) = n (X2 - (k-1)) - sum (O-E)/p: the large squares are gone before they cancel.
        Real chi_square = 0.0L, linear = 0.0L;
        for (std::size_t i = 0; i < shares.p.size(); ++i) {
            if (shares.p[i] <= 0.0)
                continue;
            const Departure d = departure(table.rows()[j][i], size, shares, i);
            chi_square += d.expected * d.relative * d.relative;
            linear += n * d.relative;
        }
        numerator += n * (chi_square - df) - linear;
    }
    if (df < 1.0L || pairs <= 0.0L)
        return std::nullopt;
    return static_cast<double>(numerator / std::sqrt(2.0L * df * pairs));
}

namespace {
std::vector<std::size_t> ascending(std::span<const double> p) {
    std::vector<std::size_t> order(p.size());
    std::iota(order.begin(), order.end(), std::size_t{0});
    std::stable_sort(order.begin(), order.end(), [&](std::size_t a, std::size_t b) { return p[a] < p[b]; });
    return order;
}
} // namespace

std::vector<double> holm(std::span<const double> p) {
    std::vector<double> result(p.size());
    double largest = 0.0;
    std::size_t left = p.size();
    for (const std::size_t i : ascending(p)) {
        largest = std::max(largest, std::min(1.0, p[i] * static_cast<double>(left--)));
        result[i] = largest;
    }
    return result;
}

std::vector<double> benjamini_hochberg(std::span<const double> p) {
    std::vector<double> result(p.size());
    double smallest = 1.0;
    const auto tests = static_cast<double>(p.size());
    const auto order = ascending(p);
    for (std::size_t rank = order.size(); rank-- > 0;) {
        smallest = std::min(smallest, p[order[rank]] * tests / static_cast<double>(rank + 1));
        result[order[rank]] = smallest;
    }
    return result;
}

} // namespace filial::families
