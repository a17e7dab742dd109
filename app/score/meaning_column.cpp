// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/meaning_column.h"

namespace filial::app {

MeaningColumn::MeaningColumn(Workbook* workbook, QWidget* parent) : QWidget(parent) {
    setObjectName("meaning-column");
    Q_UNUSED(workbook)
}

} // namespace filial::app
