// SPDX-License-Identifier: GPL-3.0-or-later
#include <gtest/gtest.h>

#include "core/report/chart_table.h"

namespace filial::report {
namespace {

TEST(ChartTable, CountsHaveNoDecimals) {
    Chart chart;
    chart.labels = {"round", "wrinkled"};
    chart.series = {{"Observed", {336.0, 101.0}, {}, {}}, {"Expected", {327.75, 109.25}, {}, {}}};
    const Table table = chart_table(chart);
    ASSERT_EQ(table.rows.size(), 2U);
    EXPECT_EQ(table.rows[0].cells[1], "336");
    EXPECT_EQ(table.rows[1].cells[1], "101");
    EXPECT_EQ(table.rows[0].cells[2], "327.750"); // 437 × 3/4
    EXPECT_EQ(table.rows[1].cells[2], "109.250");
}

} // namespace
} // namespace filial::report
