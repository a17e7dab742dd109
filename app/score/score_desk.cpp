// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/score_desk.h"

#include <QAction>

#include "app/common/text.h"
#include "app/score/meaning_column.h"
#include "app/score/score_pane.h"

namespace filial::app {

ScoreDesk::ScoreDesk(Workbook* workbook, QObject* parent)
    : Desk(parent), workbook_(workbook), view_(new ScoreView(workbook, this)), pane_(new ScorePane(view_)),
      meaning_(new MeaningColumn(view_)) {
    connect(view_, &ScoreView::changed, this, &Desk::verdictLineChanged);
    connect(meaning_, &MeaningColumn::joinRequested, pane_, &ScorePane::joinClasses);
    addActions();
}

void ScoreDesk::addActions() {
    auto* choose = new QAction(tr("Choose hypothesis…"), this);
    choose->setObjectName("choose-hypothesis");
    choose->setShortcut(QKeySequence(Qt::CTRL | Qt::Key_R));
    connect(choose, &QAction::triggered, pane_, &ScorePane::chooseHypothesis);
    auto* twin = new QAction(tr("Show as table"), this);
    twin->setObjectName("show-as-table-action");
    twin->setShortcut(QKeySequence(Qt::CTRL | Qt::SHIFT | Qt::Key_T));
    connect(twin, &QAction::triggered, pane_, &ScorePane::showAsTable);
    for (QAction* action : {choose, twin}) {
        action->setShortcutContext(Qt::WindowShortcut);
        pane_->addAction(action);
    }
    actions_ = {choose, twin};
    actions_ += pane_->table()->tableActions();
}

ScoreDesk::~ScoreDesk() {
    // Panes that were put into a window go with the window.
    for (QWidget* pane : {static_cast<QWidget*>(pane_), static_cast<QWidget*>(meaning_)}) {
        if (pane != nullptr && pane->parentWidget() == nullptr)
            delete pane;
    }
}

QString ScoreDesk::name() const {
    return tr("Score");
}

QWidget* ScoreDesk::middle() {
    return pane_;
}

QWidget* ScoreDesk::right() {
    return meaning_;
}

QString ScoreDesk::verdictLine() const {
    const report::CrossAnalysis& analysis = view_->analysis();
    if (analysis.hypothesis_error)
        return say(analysis.hypothesis_error->message);
    return analysis.totals ? say(analysis.totals->verdict_sentence) : QString();
}

QList<QAction*> ScoreDesk::actions() const {
    return actions_;
}

QString ScoreDesk::copyTable() const {
    return pane_ ? pane_->table()->wholeTable() : QString();
}

} // namespace filial::app
