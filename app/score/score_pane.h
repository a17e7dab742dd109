// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include "app/common/workbook.h"

namespace filial::app {

/// The middle of the Score desk: head line, family table, totals, departure map.
class ScorePane : public QWidget {
    Q_OBJECT
public:
    explicit ScorePane(Workbook* workbook, QWidget* parent = nullptr);
};

} // namespace filial::app
