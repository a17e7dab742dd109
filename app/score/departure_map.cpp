// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/departure_map.h"

#include <algorithm>
#include <cmath>

#include <QHelpEvent>
#include <QPainter>
#include <QScrollBar>
#include <QToolTip>

#include "app/common/class_style.h"
#include "app/common/text.h"

namespace filial::app {

namespace {
constexpr double kBar = 48.0, kTick = 14.0, kLabel = 22.0, kRightMargin = 8.0;

QString signedText(double value, int decimals) {
    const QString text = fixedText(value, decimals);
    return value > 0.0 ? QStringLiteral("+") + text : text;
}
} // namespace

DepartureMapWidget::DepartureMapWidget(ScoreView* view, FamilyTable* table, QWidget* parent)
    : QWidget(parent), view_(view), table_(table) {
    setObjectName("departure-map");
    setMinimumHeight(110);
    setAccessibleName(tr("Departure from expected"));
    connect(view_, &ScoreView::changed, this, &DepartureMapWidget::refresh);
    connect(table_->horizontalHeader(), &QHeaderView::sectionResized, this, qOverload<>(&QWidget::update));
    connect(table_->horizontalScrollBar(), &QScrollBar::valueChanged, this, qOverload<>(&QWidget::update));
    refresh();
}

void DepartureMapWidget::refresh() {
    map_ = report::departure_map(view_->analysis(), view_->workbook()->alpha());
    QStringList spoken;
    for (const report::ClassDeparture& one : map_.classes) {
        spoken << tr("%1 %2 plants").arg(QString::fromStdString(one.label), signedText(one.plants, 1)) +
                      (one.standard_errors ? tr(", %1 standard errors").arg(signedText(*one.standard_errors, 2))
                                           : QString());
    }
    if (const QString all = spoken.join(QStringLiteral("; ")); all != accessibleDescription())
        setAccessibleDescription(all);
    update();
}

std::vector<QStringList> DepartureMapWidget::tableRows() const {
    std::vector<QStringList> rows{
        {tr("Class"), tr("Observed"), tr("Expected"), tr("Plants off"), tr("Standard errors")}};
    std::vector<double> expected;
    for (const report::ClassDeparture& one : map_.classes)
        expected.push_back(one.expected);
    expected = report::rounded_to_sum(expected, 1); // as in the row below the families
    for (std::size_t i = 0; i < map_.classes.size(); ++i) {
        const report::ClassDeparture& one = map_.classes[i];
        rows.push_back({QString::fromStdString(one.label), fixedText(one.observed, 0), fixedText(expected[i], 1),
                        signedText(one.plants, 1),
                        one.standard_errors ? signedText(*one.standard_errors, 2) : say(one.standard_errors.why_not)});
    }
    return rows;
}

QRectF DepartureMapWidget::column(std::size_t phenotype) const {
    const QHeaderView* header = table_->horizontalHeader();
    const int section = static_cast<int>(phenotype) + 1;
    if (header->model() == nullptr || section >= header->count() || header->isSectionHidden(section))
        return {};
    const QPoint corner =
        mapFromGlobal(header->viewport()->mapToGlobal(QPoint(header->sectionViewportPosition(section), 0)));
    return QRectF(corner.x(), 0, header->sectionSize(section), height());
}

QRectF DepartureMapWidget::column(const report::ClassDeparture& departure) const {
    QRectF all;
    for (const std::size_t member : departure.members)
        all |= column(member);
    return all;
}

void DepartureMapWidget::paintCaption(QPainter& painter, const QRectF& room) const {
    painter.setPen(tokens().ink);
    painter.setFont(app::font(TextRole::Label));
    QRectF drawn;
    painter.drawText(room, Qt::TextWordWrap, tr("Departure from expected"), &drawn);
    if (height() < 170 && room.width() < 130)
        return; // low and narrow: the tooltip and the table twin say the rest
    painter.setFont(app::font(TextRole::Note));
    painter.setPen(tokens().muted);
    const QString words = tr("in standard errors;\nband: %1 of 100 samples;\nticks: single families")
                              .arg(fixedText(map_.share * 100.0, map_.share > 0.99 ? 1 : 0));
    QRectF rest = room;
    rest.setTop(drawn.bottom() + 2);
    painter.drawText(rest, Qt::TextWordWrap, words);
}

void DepartureMapWidget::paintClass(QPainter& painter, const report::ClassDeparture& one, double zero,
                                    double unit) const {
    const QRectF place = column(one);
    const book::Cross* cross = view_->workbook()->shownCross();
    if (place.isNull() || cross == nullptr)
        return;
    const double right = place.right() - kRightMargin;
    painter.setFont(app::font(TextRole::Note));
    painter.setPen(one.rejected ? tokens().warning : tokens().muted);
    const QString plants = tr("%1 plants").arg(signedText(one.plants, 1));
    const bool fits = QFontMetrics(painter.font()).horizontalAdvance(plants) <= place.width() - 4;
    painter.drawText(QRectF(place.left(), height() - kLabel, place.width() - kRightMargin, kLabel),
                     Qt::AlignRight | Qt::AlignVCenter,
                     (one.rejected ? QStringLiteral("! ") : QString()) + (fits ? plants : signedText(one.plants, 1)));
    const double bar = std::min(kBar, place.width() - kRightMargin - kTick - 10.0);
    if (one.standard_errors) {
        const double y = zero - *one.standard_errors * unit;
        const QRectF mark(QPointF(right - bar, std::min(y, zero)), QPointF(right, std::max(y, zero)));
        if (mark.height() >= 1.0)
            paintSwatch(painter, mark, classStyle(*cross, one.members.front()));
        else
            painter.fillRect(QRectF(right - bar, zero - 1.5, bar, 3), tokens().ink);
    }
    const double ticks = right - bar - 6.0;
    for (const report::FamilyTick& tick : one.ticks) {
        const double y = zero - tick.standard_errors * unit;
        drawHairline(painter, QPointF(ticks - kTick, y), QPointF(ticks, y), tokens().ink, 1.5);
    }
}

void DepartureMapWidget::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    if (map_.classes.empty())
        return;
    const QRectF first = column(0);
    const QRectF last = column(table_->families()->classCount() - 1);
    const double bandLeft = std::max(first.right() - kRightMargin - kBar - kTick - 18.0, first.left());
    paintCaption(painter, QRectF(0, 0, bandLeft - space::kS, height()));
    double reach = map_.band * 1.12;
    for (const report::ClassDeparture& one : map_.classes) {
        if (one.standard_errors)
            reach = std::max(reach, std::abs(*one.standard_errors) * 1.05);
        for (const report::FamilyTick& tick : one.ticks)
            reach = std::max(reach, std::abs(tick.standard_errors) * 1.05);
    }
    const double room = height() - kLabel - 4.0;
    const double zero = room / 2.0;
    const double unit = zero / reach;
    const QRectF band(QPointF(bandLeft, zero - map_.band * unit),
                      QPointF(last.right() - kRightMargin + space::kXs, zero + map_.band * unit));
    painter.fillRect(band, tokens().paleBand);
    drawHairline(painter, band.topLeft(), band.topRight(), tokens().rule);
    drawHairline(painter, band.bottomLeft(), band.bottomRight(), tokens().rule);
    for (const report::ClassDeparture& one : map_.classes)
        paintClass(painter, one, zero, unit);
    drawHairline(painter, QPointF(band.left(), zero), QPointF(band.right(), zero), tokens().ink, 1.5);
}

bool DepartureMapWidget::event(QEvent* event) {
    if (event->type() == QEvent::ToolTip) {
        const auto* help = static_cast<QHelpEvent*>(event); // NOLINT: the type was asked for above
        for (const report::ClassDeparture& one : map_.classes) {
            if (!column(one).contains(help->pos()))
                continue;
            QStringList lines{QString::fromStdString(one.label),
                              one.standard_errors ? tr("%1 standard errors").arg(fullText(*one.standard_errors))
                                                  : say(one.standard_errors.why_not)};
            for (std::size_t i = 0; i < one.ticks.size() && i < 12; ++i)
                lines << QStringLiteral("%1  %2").arg(QString::fromStdString(one.ticks[i].label),
                                                      signedText(one.ticks[i].standard_errors, 2));
            QToolTip::showText(help->globalPos(), lines.join(u'\n'), this);
            return true;
        }
        QToolTip::hideText();
        return true;
    }
    return QWidget::event(event);
}

} // namespace filial::app
