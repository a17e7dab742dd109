// SPDX-License-Identifier: GPL-3.0-or-later
// What is said class by class, and what a sample would notice, against SciPy and R.
#include <cmath>
#include <cstdlib>
#include <random>
#include <sstream>

#include <gtest/gtest.h>

#include "core/fit/detectable.h"
#include "core/fit/intervals.h"
#include "tests/fit/fit_support.h"
#include "tests/support/oracle.h"

namespace filial::test {
namespace {

double number(const std::string& text) {
    return std::strtod(text.c_str(), nullptr);
}

std::vector<double> numbers(const std::string& text) {
    std::vector<double> values;
    std::stringstream stream(text);
    for (std::string one; std::getline(stream, one, ';');)
        values.push_back(number(one));
    return values;
}

std::string joined(const std::vector<long>& values) {
    std::string text;
    for (const long value : values)
        text += (text.empty() ? "" : ";") + std::to_string(value);
    return text;
}

struct Table {
    std::vector<long> counts, weights;
    double alpha = 0.05;
};

std::vector<Table> random_tables() {
    std::mt19937_64 random(20260402);
    std::vector<Table> tables{{{0, 12}, {1, 1}}, {{3, 0, 1}, {1, 2, 1}}, {{315, 108, 101, 32}, {9, 3, 3, 1}}};
    for (int i = 0; i < 300; ++i) {
        Table table;
        table.alpha = i % 4 == 0 ? 0.01 : 0.05;
        const int classes = std::uniform_int_distribution<int>(2, 8)(random);
        const double size = std::exp(std::uniform_real_distribution<double>(2.0, 7.0)(random));
        for (int c = 0; c < classes; ++c) {
            table.weights.push_back(std::uniform_int_distribution<long>(1, 16)(random));
            const double mean = size * static_cast<double>(table.weights.back()) / (4.0 * classes);
            table.counts.push_back(std::poisson_distribution<long>(mean)(random));
        }
        table.counts.front() += 1; // never all zero
        tables.push_back(table);
    }
    return tables;
}

std::vector<Row> rows_of(const std::vector<Table>& tables) {
    std::vector<Row> rows;
    for (std::size_t i = 0; i < tables.size(); ++i)
        rows.push_back(
            {std::to_string(i), joined(tables[i].counts), joined(tables[i].weights), exact_text(tables[i].alpha)});
    return rows;
}

fit::GoodnessOfFit result_of(const Table& table) {
    fit::Input input = fit_input(table.counts, notation(table.weights));
    input.alpha = table.alpha;
    return fitted(input);
}

void expect_classes(const fit::GoodnessOfFit& found, const Row& row) {
    const auto adjusted = numbers(row[1]);
    const auto p = numbers(row[2]);
    const auto low = numbers(row[3]);
    const auto high = numbers(row[4]);
    ASSERT_EQ(adjusted.size(), found.classes.size());
    for (std::size_t i = 0; i < adjusted.size(); ++i) {
        SCOPED_TRACE("class " + std::to_string(i + 1));
        EXPECT_NEAR(*found.classes[i].adjusted_residual, adjusted[i], 1e-10);
        EXPECT_NEAR(*found.classes[i].p, p[i], 1e-9 * p[i]);
        EXPECT_NEAR(*found.classes[i].simultaneous_low, low[i], 1e-12);
        EXPECT_NEAR(*found.classes[i].simultaneous_high, high[i], 1e-12);
    }
}

void expect_detectable(const fit::GoodnessOfFit& found, const Row& row) {
    ASSERT_EQ(found.detectable.size(), 2U);
    for (std::size_t i = 0; i < 2; ++i) {
        const fit::Detectable& one = found.detectable[i];
        EXPECT_EQ(one.power, i == 0 ? 0.8 : 0.9);
        const std::size_t at = 9 + 3 * i;
        EXPECT_NEAR(one.w, number(row[at]), 1e-9 * number(row[at]));
        EXPECT_EQ(one.percentage_points.has_value(), row[at + 2] != "-1");
        if (!one.percentage_points)
            continue;
        EXPECT_NEAR(*one.percentage_points, number(row[at + 1]), 1e-9);
        EXPECT_EQ(std::to_string(one.class_index), row[at + 2]);
    }
}

TEST(ClasswiseOracle, ResidualsLimitsWilliamsAndPower) {
    const std::vector<Table> tables = random_tables();
    const auto oracle = run_oracle("fit_classes.py", rows_of(tables));
    std::size_t movable = 0;
    for (std::size_t i = 0; i < tables.size(); ++i) {
        SCOPED_TRACE(joined(tables[i].counts) + " against " + joined(tables[i].weights));
        const fit::GoodnessOfFit found = result_of(tables[i]);
        const Row& row = oracle.at(std::to_string(i));
        expect_classes(found, row);
        EXPECT_NEAR(*found.g->williams_statistic, number(row[5]), 1e-10 * (1.0 + number(row[5])));
        EXPECT_NEAR(found.g->williams_p->p, number(row[6]), 1e-9 * number(row[6]));
        EXPECT_NEAR(*found.g->williams_general_statistic, number(row[7]), 1e-10 * (1.0 + number(row[7])));
        EXPECT_NEAR(found.g->williams_general_p->p, number(row[8]), 1e-9 * number(row[8]));
        expect_detectable(found, row);
        movable += found.detectable[0].percentage_points ? 1U : 0U;
    }
    EXPECT_GT(movable, 100U);
}

TEST(ClasswiseOracle, HolmAsInR) {
    const std::vector<Table> tables = random_tables();
    std::vector<Row> rows;
    std::vector<fit::GoodnessOfFit> results;
    for (std::size_t i = 0; i < tables.size(); ++i) {
        results.push_back(result_of(tables[i]));
        std::string p;
        for (const fit::ClassResult& one : results[i].classes)
            p += (p.empty() ? "" : ";") + exact_text(*one.p);
        rows.push_back({std::to_string(i), p});
    }
    const auto oracle = run_oracle("fit_holm.R", rows);
    for (std::size_t i = 0; i < tables.size(); ++i) {
        const auto adjusted = numbers(oracle.at(std::to_string(i))[1]);
        const auto& classes = results[i].classes;
        for (std::size_t c = 0; c < classes.size(); ++c) // two classes are one test
            EXPECT_NEAR(*classes[c].p_holm, classes.size() == 2 ? *classes[c].p : adjusted[c], 1e-14);
    }
}

struct Share {
    long x, n;
};

// By the definition of the limits, in R's incomplete beta function: up to numbers no greenhouse holds.
TEST(ClasswiseOracle, ExactLimitsLeaveTheirTails) {
    std::vector<Share> shares{{1, 1}, {1, 2}, {1, 1'000'000'000'000}, {691'994'681'331, 776'506'914'344}};
    std::mt19937_64 random(99);
    for (int i = 0; i < 300; ++i) {
        const long n = std::lround(std::exp(std::uniform_real_distribution<double>(0.7, 27.0)(random)));
        const long most = i % 3 == 0 ? std::min<long>(n, 6) : n;
        shares.push_back({std::uniform_int_distribution<long>(1, most)(random), n});
    }
    std::vector<Row> rows;
    for (std::size_t i = 0; i < shares.size(); ++i) {
        const fit::Interval limits = fit::clopper_pearson_interval(shares[i].x, shares[i].n, 0.05);
        rows.push_back({std::to_string(i), std::to_string(shares[i].x), std::to_string(shares[i].n),
                        exact_text(limits.low), exact_text(limits.high),
                        exact_text(fit::share_that_explains(shares[i].x, shares[i].n, i % 2 == 0 ? 0.05 : 0.7))});
    }
    const auto oracle = run_oracle("fit_limits.R", rows);
    for (std::size_t i = 0; i < shares.size(); ++i) {
        SCOPED_TRACE(rows[i][1] + " of " + rows[i][2]);
        const Row& row = oracle.at(std::to_string(i));
        // Rounding of a limit near 1 moves its tail by the square root of the number of plants.
        const double tolerance = 1e-11 + 4e-15 * std::sqrt(static_cast<double>(shares[i].n)) * 10.0;
        EXPECT_NEAR(number(row[1]), 0.025, tolerance);
        if (shares[i].x < shares[i].n)
            EXPECT_NEAR(number(row[2]), 0.025, tolerance);
        else
            EXPECT_EQ(rows[i][4], "1");
        EXPECT_NEAR(number(row[3]), i % 2 == 0 ? 0.05 : 0.7, tolerance);
    }
}

} // namespace
} // namespace filial::test
