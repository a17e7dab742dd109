// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/score/hypothesis_blank.h"

#include <QPainter>

#include "app/common/help_page.h"
#include "app/common/theme.h"

namespace filial::app {

HypothesisBlank::HypothesisBlank(QWidget* parent) : QPushButton(parent) {
    setObjectName("hypothesis-blank");
    setProperty(kHelpPage, "hypotheses.md");
    setFont(app::font(TextRole::Verdict));
    setCursor(Qt::PointingHandCursor);
    setAttribute(Qt::WA_Hover);
    setFlat(true);
    setToolTip(tr("Choose or type what the counts are tested against (Ctrl+R)"));
}

void HypothesisBlank::setNotation(const QString& notation) {
    const QString shown = notation.isEmpty() ? tr("choose a ratio") : notation;
    if (shown == text())
        return;
    setText(shown);
    setAccessibleName(tr("tested against %1, change").arg(shown));
    updateGeometry();
}

QSize HypothesisBlank::sizeHint() const {
    return {fontMetrics().horizontalAdvance(text()) + 2 * space::kXs + 2, 32};
}

void HypothesisBlank::paintEvent(QPaintEvent* event) {
    Q_UNUSED(event)
    QPainter painter(this);
    const Tokens& t = tokens();
    if (underMouse() || isDown())
        painter.fillRect(rect().adjusted(0, 3, 0, -3), QColor(t.ink.red(), t.ink.green(), t.ink.blue(), 13));
    painter.setPen(t.accent);
    const QString shown = fontMetrics().elidedText(text(), Qt::ElideRight, width() - 2 * space::kXs);
    painter.drawText(rect(), Qt::AlignCenter, shown);
    painter.fillRect(QRect(0, height() - 4, width(), 2), t.accent);
    if (hasFocus()) {
        painter.setRenderHint(QPainter::Antialiasing);
        painter.setPen(QPen(t.accent, 2));
        painter.drawRoundedRect(QRectF(rect()).adjusted(1, 1, -1, -1), radius::kCell, radius::kCell);
    }
}

} // namespace filial::app
