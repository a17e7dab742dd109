// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QPointer>

#include "app/shell/desk.h"

// Terms. The Score desk: counts of families typed into a table, tested against the ratio in the blank of its head line.
// Its middle pane is the table with totals and departure map; its right column says what the counts mean.
namespace filial::app {

class ScorePane;
class ScoreView;
class MeaningColumn;

class ScoreDesk : public Desk {
    Q_OBJECT
public:
    explicit ScoreDesk(Workbook* workbook, QObject* parent = nullptr);
    ~ScoreDesk() override;

    QString name() const override;
    QWidget* middle() override;
    QWidget* right() override;
    QString verdictLine() const override;
    QList<QAction*> actions() const override;
    QString copyTable() const override;

private:
    void addActions();

    Workbook* workbook_;
    ScoreView* view_;
    QPointer<ScorePane> pane_; ///< the window that embeds the panes owns them from then on
    QPointer<MeaningColumn> meaning_;
    QList<QAction*> actions_;
};

} // namespace filial::app
