// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QColor>
#include <QPainter>
#include <QRectF>

#include "core/book/model.h"

// Terms. A class style is the colour and pattern by which a phenotype class is known on every desk, chart and report. A
// level whose label names a colour gets that hue; the owner's choice goes before; else the published order of Okabe &
// Ito (2008). Always with a one-pixel ink outline and a pattern, so that it never speaks by colour alone.
namespace filial::app {

enum class Pattern { Solid, Slash, Dots, Backslash, Horizontal, Vertical, Cross, Rings };

struct ClassStyle {
    QColor colour; ///< fill for the present theme
    Pattern pattern = Pattern::Solid;
};

ClassStyle classStyle(const book::Cross& cross, std::size_t phenotype);
/// Fills a rectangle with the style: colour, hatching as clipped lines, ink outline; crisp at every scale.
void paintSwatch(QPainter& painter, const QRectF& rectangle, const ClassStyle& style);

} // namespace filial::app
