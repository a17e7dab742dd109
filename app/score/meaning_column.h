// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QWidget>

#include "app/common/workbook.h"

namespace filial::app {

/// The right column of the Score desk: what the counts mean.
class MeaningColumn : public QWidget {
    Q_OBJECT
public:
    explicit MeaningColumn(Workbook* workbook, QWidget* parent = nullptr);
};

} // namespace filial::app
