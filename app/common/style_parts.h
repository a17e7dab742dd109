// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QColor>
#include <QRect>

class QPainter;
class QStyleOption;
class QStyleOptionComboBox;
class QStyleOptionHeader;
class QStyleOptionMenuItem;
class QStyleOptionSlider;
class QStyleOptionSpinBox;
class QStyleOptionTab;
class QWidget;

// The house style's brushwork, one function a part. All colours come from the tokens at the time of painting.
namespace filial::app::parts {

/// `ground` with so much ink in it: 5 % under the pointer, 10 % pressed.
QColor tinted(const QColor& ground, double ink);

void buttonPanel(QPainter& painter, const QStyleOption& option, const QWidget* widget);
void fieldPanel(QPainter& painter, const QStyleOption& option, const QWidget* widget);
void focusRing(QPainter& painter, const QRectF& rectangle, double radius);
void checkIndicator(QPainter& painter, const QStyleOption& option, bool round);
void chevron(QPainter& painter, const QRect& rectangle, int degrees, const QColor& colour);
void menuItem(QPainter& painter, const QStyleOptionMenuItem& item);
void headerSection(QPainter& painter, const QStyleOptionHeader& header);
void headerLabel(QPainter& painter, const QStyleOptionHeader& header);
void tabShape(QPainter& painter, const QStyleOptionTab& tab);
void tabLabel(QPainter& painter, const QStyleOptionTab& tab);
void comboBox(QPainter& painter, const QStyleOptionComboBox& combo, const QWidget* widget);
void spinBox(QPainter& painter, const QStyleOptionSpinBox& spin, const QWidget* widget);
void scrollBar(QPainter& painter, const QStyleOptionSlider& bar, const QRect& slider);

} // namespace filial::app::parts
