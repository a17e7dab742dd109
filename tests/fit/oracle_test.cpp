// SPDX-License-Identifier: GPL-3.0-or-later
// Random tables against R, SciPy and brute force in mpmath; statistic and P are checked apart.
#include <algorithm>
#include <cmath>
#include <cstdlib>
#include <random>

#include <gtest/gtest.h>

#include "tests/fit/fit_support.h"
#include "tests/support/oracle.h"

namespace filial::test {
namespace {

constexpr int kTables = 10'000;

// Below the normal doubles std::stod throws; such a P is compared to 1e-300.
double number(const std::string& text) {
    return std::strtod(text.c_str(), nullptr);
}

struct Table {
    std::vector<long> counts, weights;
};

std::string joined(const std::vector<long>& values) {
    std::string text;
    for (const long value : values)
        text += (text.empty() ? "" : ";") + std::to_string(value);
    return text;
}

// Multinomial samples near their ratio, some disturbed, so that P runs from 1 to the deep tail.
std::vector<Table> random_tables() {
    std::mt19937_64 random(20260301);
    std::vector<Table> tables(kTables);
    for (Table& table : tables) {
        const auto classes = std::uniform_int_distribution<int>(2, 9)(random);
        const double size = std::exp(std::uniform_real_distribution<double>(2.0, 12.0)(random));
        long sum = 0;
        for (int i = 0; i < classes; ++i) {
            table.weights.push_back(std::uniform_int_distribution<long>(1, 30)(random));
            sum += table.weights.back();
        }
        const double disturbance = std::uniform_real_distribution<double>(0.0, 0.3)(random);
        for (const long weight : table.weights) {
            const double mean = size * static_cast<double>(weight) / static_cast<double>(sum) *
                                std::exp(std::normal_distribution<double>(0.0, disturbance)(random));
            table.counts.push_back(std::poisson_distribution<long>(mean)(random));
        }
        table.counts.front() += 1; // never all zero
    }
    return tables;
}

void expect_relative(double found, double expected, double tolerance, const std::string& what) {
    EXPECT_LE(std::abs(found - expected), tolerance * std::abs(expected) + 1e-300)
        << what << ": " << exact_text(found) << " and " << exact_text(expected);
}

TEST(FitOracle, TenThousandTablesInRAndSciPy) {
    const std::vector<Table> tables = random_tables();
    std::vector<fit::GoodnessOfFit> results;
    std::vector<Row> for_r;
    std::vector<Row> for_scipy;
    for (std::size_t i = 0; i < tables.size(); ++i) {
        results.push_back(fitted(tables[i].counts, notation(tables[i].weights)));
        const std::string chi2 = exact_text(results[i].chi_square->statistic);
        Row row{std::to_string(i), joined(tables[i].counts), joined(tables[i].weights), chi2};
        for_r.push_back(row);
        row.push_back(exact_text(results[i].g->statistic));
        for_scipy.push_back(row);
    }
    const auto r = run_oracle("fit_tables.R", for_r);
    const auto scipy = run_oracle("fit_tables.py", for_scipy);
    ASSERT_EQ(r.size(), tables.size());
    ASSERT_EQ(scipy.size(), tables.size());
    for (std::size_t i = 0; i < tables.size(); ++i) {
        const fit::GoodnessOfFit& found = results[i];
        const Row& in_r = r.at(std::to_string(i));
        const Row& in_scipy = scipy.at(std::to_string(i));
        // The references subtract rounded numbers: their own error is up to N eps in O - E, 2 sqrt(N X2) eps in X2.
        const auto n = static_cast<double>(found.n);
        const double x2 = found.chi_square->statistic;
        EXPECT_NEAR(x2, number(in_r[1]), 1e-13 * (x2 + std::sqrt(n * x2)) + 1e-18 * n);
        EXPECT_NEAR(x2, number(in_scipy[1]), 1e-13 * (x2 + std::sqrt(n * x2)) + 1e-18 * n);
        EXPECT_NEAR(found.g->statistic, number(in_scipy[2]), 1e-14 * n + 1e-13 * found.g->statistic);
        expect_relative(found.chi_square->p->p, number(in_r[2]), 1e-12 * std::max(1.0, x2 / 2.0), "P of X2 in R");
        expect_relative(found.chi_square->p->p, number(in_scipy[3]), 1e-12 * std::max(1.0, x2 / 2.0), "P of X2");
        expect_relative(found.g->p->p, number(in_scipy[4]), 1e-12 * std::max(1.0, found.g->statistic / 2.0), "P of G");
    }
}

struct Pair {
    long x, n, a, b;
};

std::vector<Pair> random_pairs() {
    std::vector<Pair> pairs{{0, 1, 1, 1},         {1, 1, 3, 1},    {6, 8, 3, 1},      {50, 100, 1, 1},
                            {75, 100, 3, 1},      {0, 300, 3, 1},  {300, 300, 1, 15}, {0, 600, 15, 1},
                            {8100, 16'000, 1, 1}, {60, 100, 1, 1}, {78, 78, 63, 1}};
    std::mt19937_64 random(7);
    for (int i = 0; i < 100; ++i) {
        const long n = i < 98 ? std::uniform_int_distribution<long>(1, 150)(random) : 16'000;
        const long a = std::uniform_int_distribution<long>(1, 16)(random);
        const long b = i % 3 == 0 ? a : std::uniform_int_distribution<long>(1, 16)(random);
        pairs.push_back({std::uniform_int_distribution<long>(0, n)(random), n, a, b});
    }
    return pairs;
}

TEST(FitOracle, ExactPOfTwoClassesInThreeOrders) {
    const std::vector<Pair> pairs = random_pairs();
    std::vector<Row> rows;
    for (std::size_t i = 0; i < pairs.size(); ++i)
        rows.push_back({std::to_string(i), std::to_string(pairs[i].x), std::to_string(pairs[i].n),
                        std::to_string(pairs[i].a), std::to_string(pairs[i].b)});
    const auto oracle = run_oracle("fit_exact.py", rows);
    for (std::size_t i = 0; i < pairs.size(); ++i) {
        const auto& [x, n, a, b] = pairs[i];
        SCOPED_TRACE(joined({x, n, a, b}));
        const Row& row = oracle.at(std::to_string(i));
        fit::Input input = fit_input({x, n - x}, notation({a, b}));
        const fit::GoodnessOfFit by_chi = fitted(input);
        const double p = number(row[1]);
        expect_relative(by_chi.exact->p.p, p, 1e-11, "X2 order");
        EXPECT_LE(by_chi.exact->lower, p * (1.0 + 1e-15));
        EXPECT_GE(by_chi.exact->upper, p * (1.0 - 1e-15));
        EXPECT_NEAR(by_chi.exact->p.log10_p, number(row[10]), 1e-11);
        expect_relative(by_chi.exact->p_too_close, number(row[2]), 1e-11, "left tail");
        expect_relative(by_chi.exact->mid_p, number(row[3]), 1e-9, "mid-P");
        input.order = fit::Order::G;
        expect_relative(fitted(input).exact->p.p, number(row[4]), 1e-11, "G order");
        input.order = fit::Order::Probability;
        expect_relative(fitted(input).exact->p.p, number(row[5]), 1e-11, "probability order");
        expect_relative(*by_chi.classes[0].p, number(row[5]), 1e-11, "P of the class");
        EXPECT_NEAR(*by_chi.classes[0].exact_low, number(row[6]), 1e-12);
        EXPECT_NEAR(*by_chi.classes[0].exact_high, number(row[7]), 1e-12);
        EXPECT_NEAR(*by_chi.classes[0].interval_low, number(row[8]), 1e-13);
        EXPECT_NEAR(*by_chi.classes[0].interval_high, number(row[9]), 1e-13);
    }
}

TEST(FitOracle, RecombinationInAnF2) {
    std::mt19937_64 random(11);
    std::vector<Row> rows;
    std::vector<std::vector<long>> counts;
    for (int i = 0; i < 300; ++i) {
        const bool coupling = i % 2 == 0;
        const double r = std::uniform_real_distribution<double>(0.02, 0.48)(random);
        const double theta = coupling ? (1.0 - r) * (1.0 - r) : r * r;
        const double n = std::exp(std::uniform_real_distribution<double>(3.0, 10.0)(random));
        std::vector<long> row;
        for (const double p : {2.0 + theta, 1.0 - theta, 1.0 - theta, theta})
            row.push_back(std::poisson_distribution<long>(n * p / 4.0)(random));
        counts.push_back(row);
        rows.push_back({std::to_string(i), std::to_string(row[0]), std::to_string(row[1]), std::to_string(row[2]),
                        std::to_string(row[3]), coupling ? "coupling" : "repulsion"});
    }
    const auto oracle = run_oracle("fit_f2.py", rows);
    int inside = 0;
    for (std::size_t i = 0; i < rows.size(); ++i) {
        const Row& row = oracle.at(std::to_string(i));
        const fit::GoodnessOfFit found = fitted(counts[i], "f2(" + rows[i][5] + ", r=fit)");
        ASSERT_EQ(found.estimates.size(), 1U);
        const double r = found.estimates[0].value;
        if (row[2] == "1") {
            EXPECT_NEAR(r, number(row[1]), 2e-4);
            continue;
        }
        ++inside;
        EXPECT_NEAR(r, number(row[1]), 1e-11);
        // Fisher & Balmukand 1928: N t^2 - B t - 2 d = 0.
        const auto& o = counts[i];
        const auto n = static_cast<double>(o[0] + o[1] + o[2] + o[3]);
        const auto d = static_cast<double>(o[3]);
        const auto b = static_cast<double>(o[0] - 2 * o[1] - 2 * o[2] - o[3]);
        const double root = std::sqrt(b * b + 8.0 * n * d);
        const double theta = b < 0.0 ? 4.0 * d / (root - b) : (b + root) / (2.0 * n);
        const double closed = rows[i][5] == "coupling" ? 1.0 - std::sqrt(theta) : std::sqrt(theta);
        EXPECT_NEAR(r, closed, 1e-12);
        EXPECT_EQ(found.df, 2);
        EXPECT_TRUE(found.chi_square->p.has_value());
    }
    EXPECT_GT(inside, 200);
}

} // namespace
} // namespace filial::test
