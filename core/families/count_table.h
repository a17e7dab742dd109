// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <cstddef>
#include <cstdint>
#include <optional>
#include <span>
#include <vector>

// Terms. A count table has a row a family and a column a class (after joins). The expected shares are the
// hypothesis' class probabilities: exact integer weights where it is a ratio, so that departures are exact whole
// numbers before they are squared; else real numbers.
namespace filial::families {

class CountTable {
public:
    /// Rows of equal length, counts 0 to 4e15, as their sum.
    explicit CountTable(std::vector<std::vector<std::int64_t>> rows);

    [[nodiscard]] const std::vector<std::vector<std::int64_t>>& rows() const { return rows_; }
    [[nodiscard]] const std::vector<std::int64_t>& sizes() const { return sizes_; }
    [[nodiscard]] const std::vector<std::int64_t>& totals() const { return totals_; }
    [[nodiscard]] std::int64_t total() const { return total_; }
    [[nodiscard]] std::size_t families_with_plants() const;
    [[nodiscard]] std::size_t classes_with_plants() const;

private:
    std::vector<std::vector<std::int64_t>> rows_;
    std::vector<std::int64_t> sizes_, totals_;
    std::int64_t total_ = 0;
};

/// The hypothesis' class probabilities.
struct Shares {
    std::vector<std::int64_t> weights; ///< exact weights; empty where the shares are real
    std::int64_t weight_total = 0;
    std::vector<double> p; ///< one a class

    [[nodiscard]] std::size_t possible() const; ///< classes with a share above 0
};

struct TwoStatistics {
    double chi_square = 0.0;
    double g = 0.0;
};

/// Pearson's X2 and G = 2 sum[O ln(O/E) - (O - E)] of one sample; 0 for an empty one. No forbidden class may hold
/// plants.
[[nodiscard]] TwoStatistics statistics(std::span<const std::int64_t> observed, const Shares& shares);
/// Their sums over the families.
[[nodiscard]] TwoStatistics total_statistics(const CountTable& table, const Shares& shares);
/// sum_j n_j sum_i (share_ij - share_i)^2 / p_i: total minus pooled X2, computed without the subtraction.
[[nodiscard]] double between_scaled(const CountTable& table, const Shares& shares);

struct ContingencyStatistics {
    int df = 0;
    double chi_square = 0.0;
    double g = 0.0;
    double smallest_expected = 0.0;
    std::size_t cells = 0, cells_below_5 = 0;
};
/// Families against classes, scaled by the pooled counts; empty rows and columns dropped. Empty where fewer than two
/// rows or columns are left. Source: Pearson 1900; Fisher 1922.
[[nodiscard]] std::optional<ContingencyStatistics> contingency_statistics(const CountTable& table);

/// X2 of each family against all others, on (classes with plants - 1) df; empty for a family without plants, and where
/// no other has any.
[[nodiscard]] std::vector<std::optional<double>> against_the_rest(const CountTable& table);

/// Score statistic for extra variation, mean fixed: sum_j [sum_i O(O-1)/p_i - n(n-1)] / sqrt(2(k-1) sum_j n(n-1)).
/// Empty where every family has one plant at most or fewer than two classes are possible.
[[nodiscard]] std::optional<double> score_z(const CountTable& table, const Shares& shares);

/// P adjusted for the number of tests, in the order given. Sources: Holm 1979; Benjamini & Hochberg 1995.
[[nodiscard]] std::vector<double> holm(std::span<const double> p);
[[nodiscard]] std::vector<double> benjamini_hochberg(std::span<const double> p);

} // namespace filial::families
