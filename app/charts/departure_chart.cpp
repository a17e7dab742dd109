// SPDX-License-Identifier: GPL-3.0-or-later
#include <QBarCategoryAxis>
#include <QBarSeries>
#include <QBarSet>
#include <QValueAxis>

#include "app/charts/chart_adapter.h"
#include "app/charts/chart_parts.h"

namespace filial::app {

void drawDepartures(QChart& chart, const report::Chart& data, const Tokens& t) {
    auto* bars = new QBarSeries;
    bars->setBarWidth(0.45);
    for (const auto& series : data.series) {
        auto* set = new QBarSet(QString::fromStdString(series.name));
        for (const double value : series.values)
            set->append(value);
        set->setBrush(t.muted);
        set->setPen(QPen(t.ink, 1));
        bars->append(set);
    }
    chart.addSeries(bars);
    const auto [low, high] = span(data);
    auto* labels = labelAxis(data, t);
    auto* numbers = numberAxis(low, high, data.y_title, t);
    chart.addAxis(labels, Qt::AlignBottom);
    chart.addAxis(numbers, Qt::AlignLeft);
    bars->attachAxis(labels);
    bars->attachAxis(numbers);
}

} // namespace filial::app
