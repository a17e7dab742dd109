// SPDX-License-Identifier: GPL-3.0-or-later
#include <gtest/gtest.h>

#include <QAccessible>
#include <QApplication>
#include <QSettings>
#include <QStandardPaths>
#include <QTemporaryDir>
#include <QTimer>

#include "app/common/focus_ring.h"
#include "app/common/theme.h"

/// Runs offscreen and away from the user's own settings and books, unless told otherwise.
int main(int argc, char** argv) {
    testing::InitGoogleTest(&argc, argv);
    if (qEnvironmentVariableIsEmpty("QT_QPA_PLATFORM"))
        qputenv("QT_QPA_PLATFORM", "offscreen");
    const QTemporaryDir home;
    for (const char* place : {"HOME", "XDG_STATE_HOME", "XDG_CONFIG_HOME", "XDG_DATA_HOME"})
        qputenv(place, home.path().toUtf8());
    QApplication application(argc, argv);
    QStandardPaths::setTestModeEnabled(true);
    QCoreApplication::setApplicationName(QStringLiteral("filial"));
    QCoreApplication::setOrganizationName(QStringLiteral("filial"));
    QSettings::setDefaultFormat(QSettings::IniFormat);
    QSettings::setPath(QSettings::IniFormat, QSettings::UserScope, home.path());
    QAccessible::setActive(true);
    filial::app::Theme::instance().apply(filial::app::ThemeName::Light);
    const filial::app::FocusRing ring(nullptr);
    // Inside the event loop, as the program runs: before it, Qt tells no widget of a change of palette.
    QTimer::singleShot(0, &application, [] { QCoreApplication::exit(RUN_ALL_TESTS()); });
    return QApplication::exec();
}
