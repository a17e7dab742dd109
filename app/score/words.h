// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QLabel>
#include <QPushButton>

#include "app/common/theme.h"

namespace filial::app {

/// A line or paragraph of plain text in the type scale; its colour follows the theme.
class Words : public QLabel {
    Q_OBJECT
public:
    explicit Words(TextRole role, Ink ink = Ink::Normal, QWidget* parent = nullptr);
    /// Sets text (relayout only where it differs) and tooltip; hidden where empty.
    void say(const QString& text, const QString& toolTip = {});
};

/// A quiet button: text in accent, underlined under the pointer, ring on focus.
class TextButton : public QPushButton {
    Q_OBJECT
public:
    explicit TextButton(const QString& text, QWidget* parent = nullptr);
    QSize sizeHint() const override;
    QSize minimumSizeHint() const override;

protected:
    void paintEvent(QPaintEvent* event) override;
};

/// Hairline that snaps to the device's pixels.
void drawHairline(QPainter& painter, QPointF from, QPointF to, const QColor& colour, double width = 1.0);

} // namespace filial::app
