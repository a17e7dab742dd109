// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/score_desk.h"

#include "app/common/text.h"
#include "app/score/meaning_column.h"
#include "app/score/score_pane.h"

namespace filial::app {

ScoreDesk::ScoreDesk(Workbook* workbook, QObject* parent)
    : Desk(parent), workbook_(workbook), pane_(new ScorePane(workbook)), meaning_(new MeaningColumn(workbook)) {
    connect(workbook_, &Workbook::analysisChanged, this, &Desk::verdictLineChanged);
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
    const report::CrossAnalysis& analysis = workbook_->analysis();
    if (analysis.hypothesis_error)
        return say(analysis.hypothesis_error->message);
    return analysis.totals ? say(analysis.totals->verdict_sentence) : QString();
}

QList<QAction*> ScoreDesk::actions() const {
    return actions_;
}

QString ScoreDesk::copyTable() const {
    return {};
}

} // namespace filial::app
