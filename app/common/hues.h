// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <optional>

#include <QColor>
#include <QString>

// Terms. A label names a hue when one of its words is a colour word: "purple", "pale green". "not green" names none.
namespace filial::app {

struct Hue {
    QString name;       ///< the family of hues: violet and purple are one
    QColor light, dark; ///< for the light and the dark theme
};

std::optional<Hue> hueNamedBy(const QString& label);

} // namespace filial::app
