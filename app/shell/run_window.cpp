// SPDX-License-Identifier: GPL-3.0-or-later
#include "app/shell/run_window.h"

#include <cstdio>
#include <string_view>

#include <QApplication>
#include <QIcon>
#include <QThreadPool>

#include "app/common/focus_ring.h"
#include "app/common/version.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/help_panel.h"
#include "app/shell/theme_choice.h"
#include "app/shell/window.h"
#include "core/inheritance/catalogue.h"

namespace filial::app {
namespace {

constexpr int kWrongArguments = 2;
constexpr int kNoDisplay = 4;

/// Qt aborts without a display; a person should read why instead.
bool displayThere(int argc, char** argv) {
    for (int i = 1; i < argc; ++i)
        if (std::string_view(argv[i]).substr(0, 9) == "-platform")
            return true;
    const auto set = [](const char* name) { return !qEnvironmentVariableIsEmpty(name); };
    return set("DISPLAY") || set("WAYLAND_DISPLAY") || set("QT_QPA_PLATFORM");
}

} // namespace

int run_window(int argc, char** argv) {
    if (!displayThere(argc, argv)) {
        std::fputs("filial: there is no display here (DISPLAY and WAYLAND_DISPLAY are empty), so the window cannot "
                   "open.\nWithout one, \"filial report BOOK --out report.html\" writes a report.\n",
                   stderr);
        return kNoDisplay;
    }
    QApplication application(argc, argv);
    QCoreApplication::setApplicationName(QStringLiteral("filial"));
    QCoreApplication::setOrganizationName(QStringLiteral("filial"));
    QCoreApplication::setApplicationVersion(QString::fromLatin1(version()));
    QGuiApplication::setApplicationDisplayName(QStringLiteral("Filial"));
    QGuiApplication::setDesktopFileName(QStringLiteral("filial"));
    QApplication::setWindowIcon(QIcon(QStringLiteral(":/icons/filial.svg")));
    applyChosenTheme();
    const FocusRing ring(nullptr);
    const QStringList arguments = QCoreApplication::arguments();
    if (arguments.size() > 2) {
        std::fputs("filial: the window opens one book; name one, or none\n", stderr);
        return kWrongArguments;
    }
    // The catalogue derives its ratios once; by the time somebody asks for it, it is there.
    QThreadPool::globalInstance()->start([] { (void)inheritance::catalogue(); });
    Window window;
    if (arguments.size() == 2)
        window.openPath(arguments[1]);
    window.show();
    return QApplication::exec();
}

} // namespace filial::app
