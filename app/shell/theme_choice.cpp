// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/theme_choice.h"

#include <QApplication>
#include <QCoreApplication>
#include <QPalette>
#include <QSettings>

#include "app/common/theme.h"

namespace filial::app {
namespace {

const char* const kKey = "theme";

/// Whether the desktop is dark, seen by its palette before ours is put over it.
bool& systemIsDark() {
    static bool dark = false;
    return dark;
}

QString keyOf(ThemeChoice choice) {
    switch (choice) {
    case ThemeChoice::Light:
        return QStringLiteral("light");
    case ThemeChoice::Dark:
        return QStringLiteral("dark");
    case ThemeChoice::DimRed:
        return QStringLiteral("dim-red");
    case ThemeChoice::System:
        break;
    }
    return QStringLiteral("system");
}

void apply(ThemeChoice choice) {
    ThemeName name = systemIsDark() ? ThemeName::Dark : ThemeName::Light;
    if (choice == ThemeChoice::Light)
        name = ThemeName::Light;
    else if (choice == ThemeChoice::Dark)
        name = ThemeName::Dark;
    else if (choice == ThemeChoice::DimRed)
        name = ThemeName::DimRed;
    Theme::instance().apply(name);
}

} // namespace

ThemeChoice chosenTheme() {
    const QString key = QSettings().value(QLatin1String(kKey)).toString();
    for (const ThemeChoice choice : {ThemeChoice::Light, ThemeChoice::Dark, ThemeChoice::DimRed})
        if (keyOf(choice) == key)
            return choice;
    return ThemeChoice::System;
}

QString themeChoiceText(ThemeChoice choice) {
    switch (choice) {
    case ThemeChoice::Light:
        return QCoreApplication::translate("ThemeChoice", "Light");
    case ThemeChoice::Dark:
        return QCoreApplication::translate("ThemeChoice", "Dark");
    case ThemeChoice::DimRed:
        return QCoreApplication::translate("ThemeChoice", "Dim red, for dark rooms");
    case ThemeChoice::System:
        break;
    }
    return QCoreApplication::translate("ThemeChoice", "As the desktop");
}

void chooseTheme(ThemeChoice choice) {
    QSettings().setValue(QLatin1String(kKey), keyOf(choice));
    apply(choice);
}

void applyChosenTheme() {
    systemIsDark() = QApplication::palette().color(QPalette::Window).lightness() < 128;
    apply(chosenTheme());
}

} // namespace filial::app
