// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <memory>
#include <string>

#include <QWidget>

#include "app/common/theme.h"
#include "core/report/document.h"

class QChart;
class QChartView;

// Terms. The adapter is the one place that knows Qt Charts: it turns a report's chart, which is data, into a picture on
// the screen or an SVG. One file draws one kind. No built-in theme, animation or legend; tokens are applied anew when
// the theme changes.
namespace filial::app {

/// Fills an empty chart; one function a kind.
void drawObservedExpected(QChart& chart, const report::Chart& data, const Tokens& t);
void drawDepartures(QChart& chart, const report::Chart& data, const Tokens& t);
void drawIntervals(QChart& chart, const report::Chart& data, const Tokens& t);

/// A chart in the house's look; the caller owns it.
std::unique_ptr<QChart> makeChart(const report::Chart& data, const Tokens& t);

/// A chart on the screen.
class ChartWidget : public QWidget {
    Q_OBJECT
public:
    explicit ChartWidget(QWidget* parent = nullptr);
    ~ChartWidget() override;
    void setData(const report::Chart& data);
    const report::Chart& data() const { return data_; }

protected:
    void resizeEvent(QResizeEvent* event) override;

private:
    void rebuild();
    report::Chart data_;
    QChartView* view_;
};

/// The chart as SVG text in the light theme, for HtmlOptions::draw_chart. Needs a QApplication (any platform, also
/// offscreen); without one it is empty, and the writer falls back to the table.
std::string chartSvg(const report::Chart& data);

} // namespace filial::app
