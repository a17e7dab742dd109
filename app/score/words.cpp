// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/words.h"

#include <cmath>

#include <QPainter>

namespace filial::app {

Words::Words(TextRole role, Ink ink, QWidget* parent) : QLabel(parent) {
    app::setInk(this, ink);
    setFont(app::font(role));
    setTextFormat(Qt::PlainText);
}

void Words::say(const QString& words, const QString& tip) {
    if (text() != words)
        setText(words);
    if (toolTip() != tip)
        setToolTip(tip);
    setVisible(!words.isEmpty());
}

TextButton::TextButton(const QString& words, QWidget* parent) : QPushButton(words, parent) {
    setFont(app::font(TextRole::Note));
    setCursor(Qt::PointingHandCursor);
    setFlat(true);
    setAttribute(Qt::WA_Hover);
}

QSize TextButton::sizeHint() const {
    return {fontMetrics().horizontalAdvance(text()) + 2 * space::kXs, 24};
}

QSize TextButton::minimumSizeHint() const {
    return sizeHint();
}

void TextButton::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    painter.setRenderHint(QPainter::Antialiasing);
    QFont shown = font();
    shown.setUnderline(underMouse() && isEnabled());
    shown.setBold(isChecked());
    painter.setFont(shown);
    painter.setPen(isEnabled() ? tokens().accent : tokens().muted);
    painter.drawText(rect().adjusted(space::kXs, 0, -space::kXs, 0), Qt::AlignVCenter | Qt::AlignLeft, text());
    if (hasFocus()) {
        painter.setPen(QPen(tokens().accent, 2));
        painter.drawRoundedRect(QRectF(rect()).adjusted(1, 1, -1, -1), radius::kCell, radius::kCell);
    }
}

void drawHairline(QPainter& painter, QPointF from, QPointF to, const QColor& colour, double width) {
    const double ratio = painter.device() != nullptr ? painter.device()->devicePixelRatioF() : 1.0;
    const auto snap = [ratio](double v) { return (std::round(v * ratio) + 0.5) / ratio; };
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing, false);
    QPen pen(colour, width);
    pen.setCapStyle(Qt::FlatCap);
    painter.setPen(pen);
    if (from.y() == to.y())
        painter.drawLine(QPointF(from.x(), snap(from.y())), QPointF(to.x(), snap(to.y())));
    else
        painter.drawLine(QPointF(snap(from.x()), from.y()), QPointF(snap(to.x()), to.y()));
    painter.restore();
}

} // namespace filial::app
