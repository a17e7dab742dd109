// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/numeric/tails.h"

#include <cmath>
#include <cstdio>
#include <cstdlib>

#include <gtest/gtest.h>

#include "tests/support/oracle.h"
#include "tests/support/reference.h"

namespace filial::test {
namespace {

using nlohmann::json;

TEST(TailsTest, CriticalValuesAsPrinted) { // A01: NIST handbook; Fisher & Yates 1963, Table IV
    const json reference = reference_case("A01");
    for (const auto& [df, row] : reference["expected"].items())
        for (const auto& [area, value] : row.items()) {
            const double critical = numeric::chi_square_critical(std::stod(area), std::stod(df));
            EXPECT_NEAR(critical, value.get<double>(), 2e-14 * critical);
        }
    int compared = 0;
    for (const json& line : reference["published"]) {
        double df = 0.0;
        double area = 0.0;
        ASSERT_EQ(std::sscanf(line["quantity"].get<std::string>().c_str(), "df %lf upper %lf", &df, &area), 2);
        const auto printed = line["as_printed"].get<std::string>();
        EXPECT_NEAR(numeric::chi_square_critical(area, df), std::stod(printed), printed_tolerance(printed));
        ++compared;
    }
    EXPECT_GT(compared, 40);
}

TEST(TailsTest, LowerCriticalValues) { // A02
    const json reference = reference_case("A02");
    for (const auto& [df, row] : reference["expected"].items())
        for (const auto& [exceeded, value] : row.items()) {
            const double critical = numeric::chi_square_critical(std::stod(exceeded), std::stod(df));
            EXPECT_NEAR(critical, value.get<double>(), 2e-14 * critical);
        }
}

TEST(TailsTest, UpperTailsDeepAndNearOne) { // A03: Abramowitz & Stegun 1964, table 26.7
    const json reference = reference_case("A03");
    for (const auto& [name, value] : reference["expected"].items()) {
        double x = 0.0;
        double df = 0.0;
        ASSERT_EQ(std::sscanf(name.c_str(), "Q(%lf|df=%lf)", &x, &df), 2);
        EXPECT_NEAR(numeric::chi_square_upper(x, df).p, value.get<double>(), 1e-14 * value.get<double>() + 1e-300);
    }
}

TEST(TailsOracle, DeepTailsInMpmath) {
    std::vector<Row> rows;
    for (const double df : {1.0, 2.0, 3.0, 8.0, 26.0, 63.0, 255.0})
        for (const double x : {1e-9, 1e-3, 0.3, 1.0, 7.8, 20.0, 83.0, 300.0, 700.0, 1375.0, 1500.0, 5000.0, 1e5})
            rows.push_back({std::to_string(rows.size()), exact_text(x), exact_text(df)});
    const auto oracle = run_oracle("tails.py", rows);
    for (const Row& row : rows) {
        const double x = std::stod(row[1]);
        const double df = std::stod(row[2]);
        SCOPED_TRACE(row[1] + " on " + row[2]);
        const Row& expected = oracle.at(row[0]);
        const auto compare = [](const numeric::Tail& found, const std::string& p, const std::string& log10_p) {
            const double value = std::strtod(p.c_str(), nullptr); // 0 or subnormal beyond the range of a double
            if (value > 1e-300) {
                EXPECT_NEAR(found.p, value, 1e-12 * value);
            }
            EXPECT_NEAR(found.log10_p, std::stod(log10_p), 1e-12 + 4e-16 * std::abs(std::stod(log10_p)));
        };
        compare(numeric::chi_square_upper(x, df), expected[1], expected[2]);
        compare(numeric::chi_square_lower(x, df), expected[3], expected[4]);
        if (!expected[5].empty()) {
            const double noncentral = std::strtod(expected[5].c_str(), nullptr);
            EXPECT_NEAR(numeric::noncentral_chi_square_upper(x, df, df + 5.0), noncentral, 1e-11 * noncentral);
        }
    }
}

TEST(TailsTest, RefusesNonsense) {
    EXPECT_THROW(static_cast<void>(numeric::chi_square_upper(-1.0, 3.0)), std::domain_error);
    EXPECT_THROW(static_cast<void>(numeric::chi_square_upper(std::nan(""), 3.0)), std::domain_error);
    EXPECT_THROW(static_cast<void>(numeric::chi_square_upper(1.0, 0.0)), std::domain_error);
    EXPECT_THROW(static_cast<void>(numeric::chi_square_critical(0.0, 1.0)), std::domain_error);
    EXPECT_EQ(numeric::chi_square_upper(0.0, 3.0).p, 1.0);
    EXPECT_EQ(numeric::chi_square_upper(HUGE_VAL, 3.0).p, 0.0);
}

} // namespace
} // namespace filial::test
