// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QChart>

#include "app/common/theme.h"
#include "core/report/document.h"

class QAbstractAxis;
class QBarCategoryAxis;
class QValueAxis;

namespace filial::app {

/// Axis of class or family labels.
QBarCategoryAxis* labelAxis(const report::Chart& data, const Tokens& t);
/// Axis of numbers that spans the values with round ticks.
QValueAxis* numberAxis(double low, double high, const std::string& title, const Tokens& t);
void dress(QAbstractAxis& axis, const Tokens& t);
/// Least and greatest of values and intervals of all series, with 0.
std::pair<double, double> span(const report::Chart& data);

} // namespace filial::app
