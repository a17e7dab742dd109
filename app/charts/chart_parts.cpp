// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/charts/chart_parts.h"

#include <algorithm>
#include <cmath>

#include <QBarCategoryAxis>
#include <QValueAxis>

namespace filial::app {

void dress(QAbstractAxis& axis, const Tokens& t) {
    axis.setLabelsFont(font(TextRole::Note));
    axis.setTitleFont(font(TextRole::Note));
    axis.setLabelsBrush(t.muted);
    axis.setTitleBrush(t.muted);
    axis.setLinePen(QPen(t.ink, 1.5));
    axis.setGridLinePen(QPen(t.rule, 1));
}

QBarCategoryAxis* labelAxis(const report::Chart& data, const Tokens& t) {
    auto* axis = new QBarCategoryAxis;
    QStringList labels;
    for (const std::string& label : data.labels)
        labels << QString::fromStdString(label);
    axis->append(labels);
    dress(*axis, t);
    axis->setGridLineVisible(false);
    return axis;
}

QValueAxis* numberAxis(double low, double high, const std::string& title, const Tokens& t) {
    auto* axis = new QValueAxis;
    axis->setRange(low, high > low ? high : low + 1.0);
    axis->setTickCount(5);
    axis->applyNiceNumbers();
    const double step = (axis->max() - axis->min()) / (axis->tickCount() - 1);
    axis->setLabelFormat(step >= 1.0 ? QStringLiteral("%.0f") : QStringLiteral("%.2f"));
    axis->setTitleText(QString::fromStdString(title));
    dress(*axis, t);
    return axis;
}

std::pair<double, double> span(const report::Chart& data) {
    double low = 0.0, high = 0.0;
    for (const auto& series : data.series) {
        for (const auto* values : {&series.values, &series.low, &series.high}) {
            for (const double value : *values) {
                if (std::isfinite(value)) {
                    low = std::min(low, value);
                    high = std::max(high, value);
                }
            }
        }
    }
    return {low, high};
}

} // namespace filial::app
