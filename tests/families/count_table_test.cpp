// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/families/count_table.h"

#include <algorithm>
#include <cmath>
#include <cstdlib>

#include <gtest/gtest.h>

#include "core/numeric/tails.h"
#include "tests/families/random_tables.h"

namespace filial::families {
namespace {

using numeric::chi_square_upper;
using test::random_tables;
using test::shares_of;

constexpr std::uint64_t kSeed = 20'260'312;
constexpr std::size_t kTables = 3'000;

double number(const test::Row& row, std::size_t at) {
    return std::strtod(row.at(at).c_str(), nullptr); // std::stod throws at a P below the smallest double
}

void expect_close(double found, double expected, double relative, const std::string& what) {
    EXPECT_NEAR(found, expected, relative * std::max(1.0, std::fabs(expected))) << what;
}

// A P is compared by its relative error, which grows with the statistic: x/2 times that of x.
void expect_p(double found, double expected, double statistic, double relative, const std::string& what) {
    EXPECT_NEAR(found, expected, relative * std::max(1.0, statistic / 2.0) * expected + 1e-300) << what;
}

std::map<std::string, test::Row> ask(const std::string& script, const std::vector<test::RandomTable>& tables) {
    std::vector<test::Row> rows;
    for (std::size_t t = 0; t < tables.size(); ++t)
        rows.push_back(test::oracle_row("t" + std::to_string(t), tables[t]));
    auto answers = test::run_oracle(script, rows);
    EXPECT_EQ(answers.size(), tables.size());
    return answers;
}

TEST(CountTableOracle, AgreesWithR) {
    const auto tables = random_tables(kTables, kSeed);
    const auto answers = ask("families.R", tables);
    for (std::size_t t = 0; t < tables.size(); ++t) {
        const std::string id = "t" + std::to_string(t);
        const test::Row& r = answers.at(id);
        const CountTable table(tables[t].rows);
        const Shares shares = shares_of(tables[t].weights);
        const auto contingency = contingency_statistics(table);
        ASSERT_TRUE(contingency.has_value()) << id;
        expect_close(contingency->chi_square, number(r, 1), 1e-12, id + " contingency");
        EXPECT_EQ(contingency->df, std::stoi(r.at(2))) << id;
        expect_p(chi_square_upper(contingency->chi_square, contingency->df).p, number(r, 3), number(r, 1), 1e-11, id);
        expect_close(total_statistics(table, shares).chi_square, number(r, 4), 1e-12, id + " total");
        expect_close(statistics(table.totals(), shares).chi_square, number(r, 6), 1e-12, id + " pooled");

        std::vector<double> p;
        const int df = static_cast<int>(table.classes_with_plants()) - 1;
        for (const auto& statistic : against_the_rest(table))
            if (statistic.has_value())
                p.push_back(chi_square_upper(*statistic, df).p);
        ASSERT_EQ(r.size(), 8 + 3 * p.size()) << id;
        const auto adjusted = p.size() == 2 ? p : holm(p);
        const auto rate = p.size() == 2 ? p : benjamini_hochberg(p);
        for (std::size_t j = 0; j < p.size(); ++j) {
            EXPECT_NEAR(p[j], number(r, 8 + 3 * j), 1e-10 * p[j] + 1e-300) << id << " family " << j;
            EXPECT_NEAR(adjusted[j], number(r, 9 + 3 * j), 1e-10 * adjusted[j] + 1e-300) << id << " Holm " << j;
            EXPECT_NEAR(rate[j], number(r, 10 + 3 * j), 1e-10 * rate[j] + 1e-300) << id << " rate " << j;
        }
    }
}

TEST(CountTableOracle, AgreesWithSciPyAndRationalArithmetic) {
    const auto tables = random_tables(kTables, kSeed + 1);
    const auto answers = ask("families.py", tables);
    for (std::size_t t = 0; t < tables.size(); ++t) {
        const std::string id = "t" + std::to_string(t);
        const test::Row& r = answers.at(id);
        const CountTable table(tables[t].rows);
        const Shares shares = shares_of(tables[t].weights);
        const auto contingency = contingency_statistics(table);
        ASSERT_TRUE(contingency.has_value()) << id;
        expect_close(contingency->chi_square, number(r, 1), 1e-12, id + " SciPy");
        EXPECT_EQ(static_cast<double>(contingency->df), number(r, 3)) << id;
        expect_close(contingency->g, number(r, 4), 1e-11, id + " SciPy G");
        expect_close(contingency->chi_square, number(r, 5), 1e-15, id + " contingency");
        expect_p(chi_square_upper(contingency->chi_square, contingency->df).p, number(r, 6), number(r, 5), 1e-12, id);
        expect_close(contingency->g, number(r, 7), 4e-15, id + " G");
        const TwoStatistics total = total_statistics(table, shares);
        const TwoStatistics pooled = statistics(table.totals(), shares);
        expect_close(total.chi_square, number(r, 8), 1e-15, id + " total");
        expect_close(pooled.chi_square, number(r, 10), 1e-15, id + " pooled");
        expect_close(between_scaled(table, shares), number(r, 11), 1e-15, id + " between");
        expect_close(total.g, number(r, 12), 4e-15, id + " total G");
        expect_close(pooled.g, number(r, 13), 4e-15, id + " pooled G");
        const auto z = score_z(table, shares);
        ASSERT_TRUE(z.has_value()) << id;
        expect_close(*z, number(r, 14), 1e-14, id + " Z");
        const double z_p = numeric::normal_upper(*z).p;
        EXPECT_NEAR(z_p, number(r, 15), 1e-12 * std::max(1.0, *z * *z) * number(r, 15) + 1e-300) << id;
    }
}

TEST(CountTable, PartsAddUp) {
    const auto tables = random_tables(10'000, kSeed + 2);
    for (std::size_t t = 0; t < tables.size(); ++t) {
        const CountTable table(tables[t].rows);
        const Shares shares = shares_of(tables[t].weights);
        const TwoStatistics total = total_statistics(table, shares);
        const TwoStatistics pooled = statistics(table.totals(), shares);
        const auto contingency = contingency_statistics(table);
        ASSERT_TRUE(contingency.has_value());
        EXPECT_LE(std::fabs(between_scaled(table, shares) - (total.chi_square - pooled.chi_square)),
                  1e-12 * std::max(1.0, total.chi_square));
        EXPECT_LE(std::fabs(contingency->g - (total.g - pooled.g)), 1e-12 * std::max(1.0, total.g));
    }
}

// Doubling every count doubles each statistic; weights written larger change none.
TEST(CountTable, ScalesWithTheCounts) {
    for (const auto& random : random_tables(200, kSeed + 3)) {
        auto doubled = random.rows;
        for (auto& row : doubled)
            for (auto& count : row)
                count *= 2;
        auto heavier = random.weights;
        for (auto& weight : heavier)
            weight *= 1'000'000'007;
        const CountTable once(random.rows), twice(doubled);
        const Shares shares = shares_of(random.weights);
        expect_close(contingency_statistics(twice)->chi_square, 2.0 * contingency_statistics(once)->chi_square, 1e-14,
                     "contingency");
        expect_close(contingency_statistics(twice)->g, 2.0 * contingency_statistics(once)->g, 1e-14, "G");
        expect_close(total_statistics(once, shares_of(heavier)).chi_square, total_statistics(once, shares).chi_square,
                     1e-14, "weights");
    }
}

// Families of billions of plants a few plants off the ratio: (O-E)^2/E by hand.
TEST(CountTable, KeepsItsDigitsWithHugeCounts) {
    const CountTable table({{750'000'000'001, 249'999'999'999}, {749'999'999'999, 250'000'000'001}});
    const Shares shares = shares_of({3, 1});
    const double one = 1.0 / 750e9 + 1.0 / 250e9;
    EXPECT_NEAR(total_statistics(table, shares).chi_square, 2.0 * one, 1e-14 * one);
    EXPECT_NEAR(total_statistics(table, shares).g, 2.0 * one, 1e-9 * one); // G = X2 (1 + terms of order 1e-12)
    EXPECT_EQ(statistics(table.totals(), shares).chi_square, 0.0);
    EXPECT_NEAR(between_scaled(table, shares), 2.0 * one, 1e-14 * one);
    EXPECT_NEAR(contingency_statistics(table)->chi_square, 2.0 * one, 1e-14 * one);
    EXPECT_NEAR(*against_the_rest(table).front(), 2.0 * one, 1e-14 * one);
}

TEST(CountTable, RealSharesGiveWhatExactOnesGive) {
    for (const auto& random : random_tables(500, kSeed + 4)) {
        const CountTable table(random.rows);
        const Shares exact = shares_of(random.weights);
        Shares real = exact;
        real.weights.clear();
        expect_close(total_statistics(table, real).chi_square, total_statistics(table, exact).chi_square, 1e-12, "X2");
        expect_close(total_statistics(table, real).g, total_statistics(table, exact).g, 1e-12, "G");
        expect_close(between_scaled(table, real), between_scaled(table, exact), 1e-12, "between");
        expect_close(*score_z(table, real), *score_z(table, exact), 1e-11, "Z");
    }
}

TEST(CountTable, HasNothingToCompareInDegenerateTables) {
    EXPECT_FALSE(contingency_statistics(CountTable({{3, 1}})).has_value());
    EXPECT_FALSE(contingency_statistics(CountTable({{3, 1}, {0, 0}})).has_value());
    EXPECT_FALSE(contingency_statistics(CountTable({{3, 0}, {5, 0}})).has_value());
    EXPECT_FALSE(contingency_statistics(CountTable({{0, 0}, {0, 0}})).has_value());
    EXPECT_FALSE(against_the_rest(CountTable({{3, 1}, {0, 0}}))[0].has_value());
    EXPECT_FALSE(against_the_rest(CountTable({{3, 1}, {0, 0}}))[1].has_value());
    EXPECT_FALSE(score_z(CountTable({{1, 0}, {0, 1}, {0, 0}}), shares_of({3, 1})).has_value());
    EXPECT_FALSE(score_z(CountTable({{5, 0}}), shares_of({1, 0})).has_value());
    EXPECT_EQ(statistics(std::vector<std::int64_t>{0, 0}, shares_of({3, 1})).g, 0.0);
    EXPECT_TRUE(holm({}).empty());
    EXPECT_TRUE(benjamini_hochberg({}).empty());
}

} // namespace
} // namespace filial::families
