// SPDX-License-Identifier: GPL-3.0-or-later
// Intervals of a share against printed values.
#include <gtest/gtest.h>

#include "core/fit/intervals.h"
#include "tests/support/reference.h"

namespace filial::test {
namespace {

TEST(IntervalsTest, ExactLimitsOfFourInTwenty) { // A17, NIST/SEMATECH e-Handbook 7.2.4.1
    const auto published = reference_case("A17")["published"];
    const fit::Interval limits = fit::clopper_pearson_interval(4, 20, 0.1);
    EXPECT_NEAR(limits.low, std::stod(published[0]["as_printed"].get<std::string>()), 5e-7);
    // The page prints 0.401029, found by a search that stopped early; it is 0.401028117: one in its last digit.
    ASSERT_EQ(published[1]["as_printed"], "0.401029");
    EXPECT_NEAR(limits.high, 0.401029, 1e-6);
    EXPECT_NEAR(limits.high, published[1]["recomputed"].get<double>(), 1e-14);
}

TEST(IntervalsTest, OneSidedWilsonLimit) { // A18, same page, with z = 1.645 as it prints
    const auto value = reference_case("A18");
    const std::string printed = value["published"][0]["as_printed"];
    const fit::Interval limits = fit::wilson_interval(26, 200, 1.645);
    EXPECT_NEAR(limits.low, std::stod(printed), printed_tolerance(printed));
    EXPECT_NEAR(limits.low, value["expected"]["lower_with_z_1_645"].get<double>(), 1e-14);
}

TEST(IntervalsTest, FourSharesAsPrinted) { // A19, Newcombe 1998, Statistics in Medicine 17: 857-872, table I
    const auto value = reference_case("A19");
    int checked = 0;
    for (const auto& one : value["published"]) {
        const std::string quantity = one["quantity"];
        const std::string printed = one["as_printed"];
        const std::string share = quantity.substr(quantity.rfind(' ') + 1);
        const long x = std::stol(share);
        const long n = std::stol(share.substr(share.find('/') + 1));
        const fit::Interval limits = quantity.starts_with("Wilson") ? fit::wilson_interval(x, n, 1.959963984540054)
                                                                    : fit::clopper_pearson_interval(x, n, 0.05);
        const double found = quantity.find(" low ") != std::string::npos ? limits.low : limits.high;
        EXPECT_NEAR(found, std::stod(printed), printed_tolerance(printed) + 1e-15) << quantity;
        EXPECT_NEAR(found, one["recomputed"].get<double>(), 1e-13) << quantity;
        ++checked;
    }
    EXPECT_EQ(checked, 16);
}

} // namespace
} // namespace filial::test
