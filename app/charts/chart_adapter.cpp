// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/charts/chart_adapter.h"

#include <QApplication>
#include <QBuffer>
#include <QChart>
#include <QChartView>
#include <QGraphicsLayout>
#include <QGraphicsScene>
#include <QLegend>
#include <QPainter>
#include <QSvgGenerator>

namespace filial::app {

std::unique_ptr<QChart> makeChart(const report::Chart& data, const Tokens& t) {
    auto chart = std::make_unique<QChart>();
    chart->legend()->hide();
    chart->setAnimationOptions(QChart::NoAnimation);
    chart->setBackgroundVisible(false);
    chart->setMargins({});
    chart->layout()->setContentsMargins(0, 0, 0, 0);
    chart->setTitleFont(font(TextRole::Label));
    chart->setTitleBrush(t.ink);
    chart->setTitle(QString::fromStdString(data.title));
    switch (data.kind) {
    case report::Chart::Kind::ObservedExpected:
        drawObservedExpected(*chart, data, t);
        break;
    case report::Chart::Kind::Departure:
        drawDepartures(*chart, data, t);
        break;
    case report::Chart::Kind::Intervals:
        drawIntervals(*chart, data, t);
        break;
    }
    return chart;
}

ChartWidget::ChartWidget(QWidget* parent) : QWidget(parent), view_(new QChartView(new QChart, this)) {
    view_->setFrameShape(QFrame::NoFrame);
    view_->setBackgroundBrush(Qt::NoBrush);
    view_->viewport()->setAutoFillBackground(false);
    view_->setRenderHint(QPainter::Antialiasing);
    view_->setFocusPolicy(Qt::NoFocus);
    view_->setAccessibleName(tr("Picture of the chart"));
    connect(&Theme::instance(), &Theme::changed, this, &ChartWidget::rebuild);
}

ChartWidget::~ChartWidget() = default;

void ChartWidget::setData(const report::Chart& data) {
    data_ = data;
    rebuild();
}

void ChartWidget::rebuild() {
    // setChart gives the old chart back instead of deleting it.
    const std::unique_ptr<QChart> old(view_->chart());
    view_->setChart(makeChart(data_, tokens()).release());
}

void ChartWidget::resizeEvent(QResizeEvent* event) {
    QWidget::resizeEvent(event);
    view_->setGeometry(rect());
}

std::string chartSvg(const report::Chart& data) {
    if (qobject_cast<QApplication*>(QCoreApplication::instance()) == nullptr)
        return {};
    constexpr QSize kSize(640, 300);
    QGraphicsScene scene;
    QChart* chart = makeChart(data, Theme::read(ThemeName::Light)).release();
    scene.addItem(chart);
    chart->resize(kSize);
    QBuffer buffer;
    QSvgGenerator svg;
    svg.setOutputDevice(&buffer);
    svg.setResolution(96);
    svg.setSize(kSize);
    svg.setViewBox(QRect(QPoint(), kSize));
    svg.setTitle(QString::fromStdString(data.title));
    QPainter painter(&svg);
    painter.setRenderHint(QPainter::Antialiasing);
    scene.render(&painter, QRectF(QPointF(), kSize), QRectF(QPointF(), kSize));
    painter.end();
    // Without its XML head, so that it can stand inside a page.
    const QByteArray text = buffer.data();
    return text.mid(std::max<qsizetype>(0, text.indexOf("<svg"))).toStdString();
}

} // namespace filial::app
