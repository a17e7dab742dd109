// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <QString>

namespace filial::app {

/// What the person chose: a theme, or whatever the desktop has.
enum class ThemeChoice { System, Light, Dark, DimRed };

ThemeChoice chosenTheme(); ///< from the settings; System where nothing was chosen
QString themeChoiceText(ThemeChoice choice);
void chooseTheme(ThemeChoice choice); ///< applies it and remembers it
/// Applies the remembered choice. To be called once before the first window, while the desktop's palette stands.
void applyChosenTheme();

} // namespace filial::app
