// SPDX-License-Identifier: GPL-3.0-or-later
#include <algorithm>
#include <cmath>
#include <optional>
#include <vector>

#include "app/common/class_style.h"
#include "app/common/theme.h"

namespace filial::app {
namespace {

/// The part of a line inside a rectangle (Liang & Barsky 1984). Hatching is clipped by geometry because brush patterns
/// do not scale and an SVG export ignores clip regions.
std::optional<QLineF> clipped(const QLineF& line, const QRectF& r) {
    double from = 0.0;
    double to = 1.0;
    const auto cut = [&from, &to](double step, double room) {
        if (step == 0.0)
            return room >= 0.0;
        const double at = room / step;
        if (step < 0.0)
            from = std::max(from, at);
        else
            to = std::min(to, at);
        return from <= to;
    };
    if (!cut(-line.dx(), line.x1() - r.left()) || !cut(line.dx(), r.right() - line.x1()) ||
        !cut(-line.dy(), line.y1() - r.top()) || !cut(line.dy(), r.bottom() - line.y1()))
        return std::nullopt;
    return QLineF(line.pointAt(from), line.pointAt(to));
}

void drawClipped(QPainter& painter, const std::vector<QLineF>& lines, const QRectF& r) {
    for (const QLineF& line : lines)
        if (const auto part = clipped(line, r))
            painter.drawLine(*part);
}

std::vector<QLineF> diagonals(const QRectF& r, double step, bool rising) {
    std::vector<QLineF> lines;
    const double span = r.width() + r.height();
    for (double at = step / 2.0; at < span; at += step) {
        if (rising)
            lines.emplace_back(r.left() + at, r.top(), r.left() + at - r.height(), r.bottom());
        else
            lines.emplace_back(r.right() - at, r.top(), r.right() - at + r.height(), r.bottom());
    }
    return lines;
}

std::vector<QLineF> level(const QRectF& r, double step, bool horizontal) {
    std::vector<QLineF> lines;
    const double length = horizontal ? r.height() : r.width();
    // As many lines as fit, centred, so that a small swatch is symmetrical.
    const int count = std::max(1, static_cast<int>(std::floor((length - 1.0) / step)));
    const double first = (length - (count - 1) * step) / 2.0;
    for (int i = 0; i < count; ++i) {
        const double at = first + i * step;
        if (horizontal)
            lines.emplace_back(r.left(), r.top() + at, r.right(), r.top() + at);
        else
            lines.emplace_back(r.left() + at, r.top(), r.left() + at, r.bottom());
    }
    return lines;
}

template <class Draw> void lattice(const QRectF& r, double step, double half, Draw draw) {
    const int rows = std::max(1, static_cast<int>(std::floor((r.height() - 1.0) / step)));
    const int columns = std::max(1, static_cast<int>(std::floor((r.width() - 1.0) / step)));
    const double top = r.top() + (r.height() - (rows - 1) * step) / 2.0;
    const double left = r.left() + (r.width() - (columns - 1) * step) / 2.0;
    for (int i = 0; i < rows; ++i)
        for (int j = 0; j < columns; ++j) {
            const QPointF centre(left + j * step, top + i * step);
            if (r.adjusted(half, half, -half, -half).contains(centre))
                draw(centre);
        }
}

double luminance(const QColor& c) {
    return (0.2126 * c.red() + 0.7152 * c.green() + 0.0722 * c.blue()) / 255.0;
}

QColor lineColour(const QColor& fill) {
    if (!tokens().hues)
        return luminance(fill) > 0.12 ? tokens().background : tokens().ink;
    return luminance(fill) > 0.22 ? QColor(QStringLiteral("#14191B")) : QColor(QStringLiteral("#FFFFFF"));
}

void paintPattern(QPainter& painter, const QRectF& r, Pattern pattern, const QColor& colour) {
    const double step = std::min(r.width(), r.height()) < 16.0 ? 4.0 : 5.0;
    painter.setPen(QPen(colour, 1.0, Qt::SolidLine, Qt::FlatCap));
    switch (pattern) {
    case Pattern::Solid:
        break;
    case Pattern::Slash:
        drawClipped(painter, diagonals(r, step * 1.3, true), r);
        break;
    case Pattern::Backslash:
        drawClipped(painter, diagonals(r, step * 1.3, false), r);
        break;
    case Pattern::Horizontal:
        drawClipped(painter, level(r, step, true), r);
        break;
    case Pattern::Vertical:
        drawClipped(painter, level(r, step, false), r);
        break;
    case Pattern::Cross:
        drawClipped(painter, diagonals(r, step * 1.4, true), r);
        drawClipped(painter, diagonals(r, step * 1.4, false), r);
        break;
    case Pattern::Dots:
        painter.setPen(Qt::NoPen);
        painter.setBrush(colour);
        lattice(r, step, 0.9, [&painter](const QPointF& at) { painter.drawEllipse(at, 0.9, 0.9); });
        break;
    case Pattern::Rings:
        painter.setBrush(Qt::NoBrush);
        lattice(r, step + 2.0, 2.0, [&painter](const QPointF& at) { painter.drawEllipse(at, 1.8, 1.8); });
        break;
    }
}

/// The rectangle moved to whole device pixels, so that the outline is one even line at any scale.
QRectF snapped(const QPainter& painter, const QRectF& r) {
    const QTransform toDevice = painter.deviceTransform();
    if (toDevice.type() > QTransform::TxScale)
        return r;
    const QRectF device = toDevice.mapRect(r);
    const QPointF first(std::round(device.left()), std::round(device.top()));
    const QPointF last(std::round(device.right()), std::round(device.bottom()));
    return toDevice.inverted().mapRect(QRectF(first, last));
}

} // namespace

void paintSwatch(QPainter& painter, const QRectF& rectangle, const ClassStyle& style) {
    if (rectangle.width() < 1.0 || rectangle.height() < 1.0)
        return;
    painter.save();
    painter.setRenderHint(QPainter::Antialiasing);
    const QRectF outer = snapped(painter, rectangle);
    painter.fillRect(outer, tokens().ink);
    const double scale = std::max(1.0, painter.deviceTransform().m11());
    const double line = std::max(1.0, std::round(scale)) / scale;
    const QRectF inner = outer.adjusted(line, line, -line, -line);
    if (inner.isValid()) {
        painter.fillRect(inner, style.colour);
        paintPattern(painter, inner, style.pattern, lineColour(style.colour));
    }
    painter.restore();
}

} // namespace filial::app
