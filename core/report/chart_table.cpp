// SPDX-License-Identifier: GPL-3.0-or-later
#include "core/report/chart_table.h"

#include <algorithm>
#include <cmath>

#include "core/report/wording.h"

namespace filial::report {

namespace {

/// Counts are read as counts, without decimals.
bool counts_only(const Chart::Series& series) {
    return std::all_of(series.values.begin(), series.values.end(),
                       [](double value) { return std::trunc(value) == value; });
}

std::string value_at(const std::vector<double>& values, std::size_t i, bool counts) {
    if (i >= values.size()) {
        return "–";
    }
    return counts ? fixed_text(values[i], 0) : statistic_text(values[i]);
}

} // namespace

Table chart_table(const Chart& chart) {
    Table table;
    table.caption = chart.title;
    table.columns.push_back({chart.x_title, Align::Left});
    for (const Chart::Series& series : chart.series) {
        table.columns.push_back({series.name, Align::Right});
        if (!series.low.empty()) {
            table.columns.push_back({render({MessageId::ReportChartLow, {text_argument(series.name)}}), Align::Right});
            table.columns.push_back({render({MessageId::ReportChartHigh, {text_argument(series.name)}}), Align::Right});
        }
    }
    for (std::size_t i = 0; i < chart.labels.size(); ++i) {
        TableRow row;
        row.cells.push_back(chart.labels[i]);
        for (const Chart::Series& series : chart.series) {
            row.cells.push_back(value_at(series.values, i, series.low.empty() && counts_only(series)));
            if (!series.low.empty()) {
                row.cells.push_back(value_at(series.low, i, false));
                row.cells.push_back(value_at(series.high, i, false));
            }
        }
        table.rows.push_back(std::move(row));
    }
    if (!chart.y_title.empty()) {
        table.notes.push_back(chart.y_title);
    }
    table.notes.push_back(render({MessageId::ReportChartNeedsProgram, {}}));
    return table;
}

} // namespace filial::report
