// SPDX-License-Identifier: GPL-3.0-or-later
#include <QBarCategoryAxis>
#include <QLineSeries>
#include <QScatterSeries>
#include <QValueAxis>

#include "app/charts/chart_adapter.h"
#include "app/charts/chart_parts.h"

namespace filial::app {

void drawIntervals(QChart& chart, const report::Chart& data, const Tokens& t) {
    auto* labels = labelAxis(data, t);
    const auto [low, high] = span(data);
    auto* numbers = numberAxis(low, high, data.y_title, t);
    chart.addAxis(labels, Qt::AlignBottom);
    chart.addAxis(numbers, Qt::AlignLeft);
    const auto put = [&](QXYSeries* series) {
        chart.addSeries(series);
        series->attachAxis(labels);
        series->attachAxis(numbers);
    };
    for (const auto& series : data.series) {
        auto* points = new QScatterSeries;
        points->setMarkerSize(8.0);
        points->setColor(t.ink);
        points->setBorderColor(t.ink);
        for (std::size_t i = 0; i < series.values.size(); ++i) {
            const auto x = static_cast<double>(i);
            points->append(x, series.values[i]);
            if (i >= series.low.size() || i >= series.high.size())
                continue;
            auto* line = new QLineSeries;
            line->setPen(QPen(t.ink, 1.5));
            line->append(x, series.low[i]);
            line->append(x, series.high[i]);
            put(line);
        }
        put(points);
    }
}

} // namespace filial::app
