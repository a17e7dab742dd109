// SPDX-License-Identifier: GPL-3.0-or-later
#include <QBarCategoryAxis>
#include <QBarSeries>
#include <QBarSet>
#include <QValueAxis>

#include "app/charts/chart_adapter.h"
#include "app/charts/chart_parts.h"

namespace filial::app {

void drawObservedExpected(QChart& chart, const report::Chart& data, const Tokens& t) {
    auto* bars = new QBarSeries;
    bars->setBarWidth(0.7);
    for (std::size_t i = 0; i < data.series.size(); ++i) {
        auto* set = new QBarSet(QString::fromStdString(data.series[i].name));
        for (const double value : data.series[i].values)
            set->append(value);
        // Observed is filled, expected an outline: told apart without a hue.
        set->setBrush(i == 0 ? QBrush(t.accent) : QBrush(Qt::transparent));
        set->setPen(QPen(i == 0 ? t.accent : t.ink, 1.5));
        bars->append(set);
    }
    chart.addSeries(bars);
    auto* labels = labelAxis(data, t);
    auto* numbers = numberAxis(0.0, span(data).second, data.y_title, t);
    chart.addAxis(labels, Qt::AlignBottom);
    chart.addAxis(numbers, Qt::AlignLeft);
    bars->attachAxis(labels);
    bars->attachAxis(numbers);
}

} // namespace filial::app
