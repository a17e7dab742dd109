// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/desks.h"

#include "app/score/score_desk.h"

namespace filial::app {

QList<Desk*> makeDesks(Workbook* workbook, QObject* parent) {
    return {new ScoreDesk(workbook, parent)};
}

} // namespace filial::app
