// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QList>

#include "app/shell/desk.h"

namespace filial::app {

/// The desks that exist, in the order of their tabs. A new desk is added here and nowhere else.
QList<Desk*> makeDesks(Workbook* workbook, QObject* parent);

} // namespace filial::app
