// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/score_pane.h"

namespace filial::app {

ScorePane::ScorePane(Workbook* workbook, QWidget* parent) : QWidget(parent) {
    setObjectName("score-pane");
    Q_UNUSED(workbook)
}

} // namespace filial::app
