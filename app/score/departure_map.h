// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include "app/score/family_table.h"
#include "app/score/score_view.h"
#include "core/report/departure.h"

namespace filial::app {

/// Each class' departure from expected in standard errors under its own column, single families as ticks.
class DepartureMapWidget : public QWidget {
    Q_OBJECT
public:
    DepartureMapWidget(ScoreView* view, FamilyTable* table, QWidget* parent = nullptr);
    const report::DepartureMap& map() const { return map_; }
    /// Header and rows for the table twin.
    std::vector<QStringList> tableRows() const;

protected:
    void paintEvent(QPaintEvent* event) override;
    bool event(QEvent* event) override;

private:
    void refresh();
    QRectF column(std::size_t phenotype) const; ///< of the table's header, in own coordinates; null where hidden
    QRectF column(const report::ClassDeparture& departure) const;
    void paintCaption(QPainter& painter, const QRectF& room) const;
    void paintClass(QPainter& painter, const report::ClassDeparture& one, double zero, double unit) const;

    ScoreView* view_;
    FamilyTable* table_;
    report::DepartureMap map_;
};

} // namespace filial::app
