// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/common/style_parts.h"

#include <algorithm>

#include <QAbstractSpinBox>
#include <QApplication>
#include <QPainter>
#include <QPainterPath>
#include <QStyle>
#include <QStyleOption>
#include <QWidget>

#include "app/common/theme.h"

namespace filial::app::parts {
namespace {

bool has(const QWidget* widget, const char* name) {
    return widget != nullptr && widget->property(name).toBool();
}

/// A rounded frame whose one-pixel line lies on whole pixels.
void rounded(QPainter& painter, const QRectF& r, double round, const QColor& fill, const QColor& line) {
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(line.isValid() ? QPen(line, 1.0) : QPen(Qt::NoPen));
    painter.setBrush(fill.isValid() ? QBrush(fill) : QBrush(Qt::NoBrush));
    painter.drawRoundedRect(line.isValid() ? r.adjusted(0.5, 0.5, -0.5, -0.5) : r, round, round);
    painter.restore();
}

} // namespace

QColor tinted(const QColor& ground, double ink) {
    const QColor& over = tokens().ink;
    const auto part = [ink](float a, float b) { return a + (b - a) * static_cast<float>(ink); };
    return QColor::fromRgbF(part(ground.redF(), over.redF()), part(ground.greenF(), over.greenF()),
                            part(ground.blueF(), over.blueF()));
}

void buttonPanel(QPainter& painter, const QStyleOption& option, const QWidget* widget) {
    const Tokens& t = tokens();
    const bool enabled = (option.state & QStyle::State_Enabled) != 0;
    const bool hover = enabled && (option.state & QStyle::State_MouseOver) != 0;
    const bool down = enabled && (option.state & (QStyle::State_Sunken | QStyle::State_On)) != 0;
    const double ink = down ? 0.12 : hover ? 0.05 : 0.0;
    if (has(widget, look::kPrimary)) {
        // The accent is tinted towards the surface: ink on accent would hardly show.
        QColor fill = t.accent;
        if (down || hover)
            fill = t.dark ? fill.lighter(down ? 112 : 106) : fill.lighter(down ? 135 : 118);
        rounded(painter, option.rect, radius::kButton, enabled ? fill : t.rule, {});
        return;
    }
    if (has(widget, look::kQuiet)) {
        if (ink > 0.0)
            rounded(painter, option.rect, radius::kButton, tinted(t.background, ink), {});
        return;
    }
    rounded(painter, option.rect, radius::kButton, tinted(t.surface, ink), enabled ? t.controlBorder : t.rule);
}

void fieldPanel(QPainter& painter, const QStyleOption& option, const QWidget* widget) {
    const Tokens& t = tokens();
    const bool focused = (option.state & QStyle::State_HasFocus) != 0;
    const bool invalid = has(widget, look::kInvalid);
    const QColor line = invalid ? t.error : t.accent;
    if (has(widget, look::kBare)) {
        const bool hover = (option.state & QStyle::State_MouseOver) != 0;
        if (focused || hover)
            rounded(painter, option.rect, radius::kCell, focused ? t.surface : tinted(t.background, 0.05), {});
    } else {
        rounded(painter, option.rect, radius::kCell, t.surface, t.controlBorder);
    }
    if (focused || invalid) {
        QPainterPath corner;
        corner.addRoundedRect(option.rect, radius::kCell, radius::kCell);
        painter.save();
        painter.setRenderHint(QPainter::Antialiasing);
        painter.setClipPath(corner);
        painter.fillRect(QRectF(option.rect.left(), option.rect.bottom() - 1, option.rect.width(), 2.0), line);
        painter.restore();
    }
}

void focusRing(QPainter& painter, const QRectF& rectangle, double round) {
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    painter.setPen(QPen(tokens().accent, 2.0));
    painter.setBrush(Qt::NoBrush);
    painter.drawRoundedRect(rectangle.adjusted(1.0, 1.0, -1.0, -1.0), round, round);
    painter.restore();
}

void checkIndicator(QPainter& painter, const QStyleOption& option, bool round) {
    const Tokens& t = tokens();
    const bool on = (option.state & QStyle::State_On) != 0;
    const bool hover = (option.state & QStyle::State_MouseOver) != 0;
    const QRectF r = QRectF(option.rect).adjusted(1.0, 1.0, -1.0, -1.0);
    const QColor fill = on ? t.accent : tinted(t.surface, hover ? 0.05 : 0.0);
    rounded(painter, r, round ? r.width() / 2.0 : radius::kCell, fill, on ? t.accent : t.controlBorder);
    if (!on)
        return;
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    if (round) {
        painter.setPen(Qt::NoPen);
        painter.setBrush(t.onAccent);
        painter.drawEllipse(r.center(), r.width() / 5.0, r.width() / 5.0);
    } else {
        painter.setPen(QPen(t.onAccent, 2.0, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
        QPainterPath tick;
        tick.moveTo(r.left() + r.width() * 0.24, r.center().y());
        tick.lineTo(r.left() + r.width() * 0.43, r.bottom() - r.height() * 0.28);
        tick.lineTo(r.right() - r.width() * 0.22, r.top() + r.height() * 0.28);
        painter.drawPath(tick);
    }
    painter.restore();
}

void chevron(QPainter& painter, const QRect& rectangle, int degrees, const QColor& colour) {
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    painter.translate(QRectF(rectangle).center());
    painter.rotate(degrees);
    painter.setPen(QPen(colour, 1.5, Qt::SolidLine, Qt::RoundCap, Qt::RoundJoin));
    painter.drawPolyline(QPolygonF({{-4.0, -2.0}, {0.0, 2.0}, {4.0, -2.0}}));
    painter.restore();
}

void comboBox(QPainter& painter, const QStyleOptionComboBox& combo, const QWidget* widget) {
    const Tokens& t = tokens();
    const bool hover = (combo.state & QStyle::State_MouseOver) != 0;
    if (combo.editable) {
        fieldPanel(painter, combo, widget);
    } else {
        rounded(painter, combo.rect, radius::kCell, tinted(t.surface, hover ? 0.05 : 0.0), t.controlBorder);
    }
    chevron(painter, QRect(combo.rect.right() - 24, combo.rect.top(), 20, combo.rect.height()), 0, t.muted);
}

void spinBox(QPainter& painter, const QStyleOptionSpinBox& spin, const QWidget* widget) {
    const Tokens& t = tokens();
    fieldPanel(painter, spin, widget);
    const QStyle* style = widget != nullptr ? widget->style() : QApplication::style();
    for (const bool up : {true, false}) {
        const auto part = up ? QStyle::SC_SpinBoxUp : QStyle::SC_SpinBoxDown;
        const QRect r = style->subControlRect(QStyle::CC_SpinBox, &spin, part, widget);
        const bool able =
            (spin.state & QStyle::State_Enabled) != 0 &&
            spin.stepEnabled.testFlag(up ? QAbstractSpinBox::StepUpEnabled : QAbstractSpinBox::StepDownEnabled);
        if (able && spin.activeSubControls.testFlag(part))
            painter.fillRect(r, tinted(t.surface, (spin.state & QStyle::State_Sunken) != 0 ? 0.10 : 0.05));
        chevron(painter, r, up ? 180 : 0, able ? t.muted : t.controlBorder);
    }
}

void scrollBar(QPainter& painter, const QStyleOptionSlider& bar, const QRect& slider) {
    const Tokens& t = tokens();
    if (bar.maximum <= bar.minimum)
        return;
    const bool active = (bar.state & QStyle::State_MouseOver) != 0 || (bar.state & QStyle::State_Sunken) != 0;
    QRectF thumb = slider;
    const double inset = active ? 2.0 : 3.0;
    if (bar.orientation == Qt::Vertical)
        thumb.adjust(inset, 1.0, -inset, -1.0);
    else
        thumb.adjust(1.0, inset, -1.0, -inset);
    rounded(painter, thumb, std::min(thumb.width(), thumb.height()) / 2.0, active ? t.muted : t.controlBorder, {});
}

} // namespace filial::app::parts
