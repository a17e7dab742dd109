// SPDX-License-Identifier: GPL-3.0-or-later
// How long the window takes, offscreen, 1360×860: from main to the first paint on a book; from a key press to the end
// of the last paint it causes, 50 families × 4 classes, 1,000 keys; to open a book of 10,000 families. Prints figures;
// no absolute time decides. What a key press leaves to another thread is not in it.
#include <algorithm>
#include <cstdio>
#include <fstream>
#include <string>
#include <vector>

#include <QApplication>
#include <QElapsedTimer>
#include <QKeyEvent>
#include <QStandardPaths>
#include <QTableView>
#include <QTemporaryDir>

#include "app/common/theme.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/window.h"
#include "core/book/book_file.h"
#include "core/book/model.h"

namespace filial::app {
namespace {

/// Stamps the end of every paint of a window: an update request has then been
/// carried out.
class StampedApplication : public QApplication {
public:
    using QApplication::QApplication;
    bool notify(QObject* receiver, QEvent* event) override {
        const bool paints = event->type() == QEvent::UpdateRequest;
        const bool done = QApplication::notify(receiver, event);
        if (paints)
            last_paint = clock.nsecsElapsed();
        return done;
    }
    QElapsedTimer clock;
    qint64 last_paint = 0;
};

std::string book_text(int families) {
    book::Cross cross;
    cross.id = book::new_id();
    cross.name = "K14 × M02, F2";
    cross.traits = {{"stem", {{"purple", ""}, {"green", ""}}}, {"leaf", {{"hairy", ""}, {"smooth", ""}}}};
    cross.classes = book::product_classes(cross.traits);
    cross.hypothesis.notation = "9:3:3:1";
    for (int family = 0; family < families; ++family) {
        cross.families.push_back(book::new_family("F2-" + std::to_string(family + 1), 4));
        const std::vector<int> counts{36 + family % 5, 12 + family % 3, 12 - family % 4, 4 + family % 2};
        for (std::size_t i = 0; i < 4; ++i)
            cross.families.back().typed[i] = {book::CellState::Number, Count(counts[i])};
    }
    book::Book book;
    book.id = book::new_id();
    book.crosses.push_back(cross);
    return book::write_book(book);
}

/// Sends a key to whatever has the focus and handles events until nothing is painted any more; milliseconds.
double key(StampedApplication& application, int code, const QString& text) {
    application.processEvents();
    application.last_paint = 0;
    const qint64 begin = application.clock.nsecsElapsed();
    QWidget* focus = QApplication::focusWidget();
    QKeyEvent press(QEvent::KeyPress, code, Qt::NoModifier, text);
    QKeyEvent release(QEvent::KeyRelease, code, Qt::NoModifier, text);
    QCoreApplication::sendEvent(focus, &press);
    application.processEvents();
    QCoreApplication::sendEvent(QApplication::focusWidget(), &release);
    return static_cast<double>(std::max(application.last_paint, begin) - begin) / 1e6;
}

/// A thousand keys, as counts are typed.
bool type_keys(StampedApplication& application, Window& window) {
    auto* table = window.findChild<QTableView*>("family-table");
    window.activateWindow();
    table->setFocus();
    table->setCurrentIndex(table->model()->index(0, 1));
    std::vector<double> times;
    while (times.size() < 1000) {
        times.push_back(key(application, Qt::Key_4, "4"));
        times.push_back(key(application, Qt::Key_1, "1"));
        times.push_back(key(application, Qt::Key_Return, "\r"));
        if (table->currentIndex().row() >= 48)
            table->setCurrentIndex(table->model()->index(0, 1 + static_cast<int>(times.size()) % 4));
    }
    if (window.workbook() == nullptr || !window.workbook()->session().log().can_undo() ||
        std::count(times.begin(), times.end(), 0.0) > 10) {
        std::fputs("the keys did not reach the table\n", stderr);
        return false;
    }
    std::sort(times.begin(), times.end());
    std::printf("key to last paint: median %.2f ms, 95th percentile %.2f ms, "
                "longest %.2f ms of %zu keys\n",
                times[times.size() / 2], times[times.size() * 95 / 100], times.back(), times.size());
    return true;
}

/// From the act of opening to the first paint, and to the results.
bool open_large(StampedApplication& application, Window& window, const std::string& path) {
    if (!window.save() || !window.closeBook())
        return false;
    QElapsedTimer clock;
    clock.start();
    application.last_paint = 0;
    if (!window.openPath(QString::fromStdString(path)))
        return false;
    const qint64 open = clock.elapsed();
    while (application.last_paint == 0)
        application.processEvents(QEventLoop::WaitForMoreEvents);
    const qint64 painted = clock.elapsed();
    while (window.workbook()->analysing())
        application.processEvents(QEventLoop::WaitForMoreEvents);
    application.processEvents();
    std::printf("10,000 families: open after %lld ms, painted after %lld ms, results after %lld ms\n", open, painted,
                clock.elapsed());
    return true;
}

int run(int argc, char** argv) {
    QElapsedTimer since_main;
    since_main.start();
    QStandardPaths::setTestModeEnabled(true);
    StampedApplication application(argc, argv);
    application.clock.start();
    const QTemporaryDir folder;
    const std::string path = folder.filePath("bench.filial").toStdString();
    std::ofstream(path) << book_text(50);
    qputenv("XDG_STATE_HOME", folder.path().toUtf8());

    Theme::instance().apply(ThemeName::Light);
    Window window;
    window.resize(1360, 860);
    window.show();
    if (!window.openPath(QString::fromStdString(path))) {
        std::fputs("the book did not open\n", stderr);
        return 1;
    }
    while (application.last_paint == 0)
        application.processEvents(QEventLoop::WaitForMoreEvents);
    std::printf("main to first paint %.0f ms\n", static_cast<double>(since_main.nsecsElapsed()) / 1e6);

    const std::string large = folder.filePath("large.filial").toStdString();
    std::ofstream(large) << book_text(10'000);
    if (!type_keys(application, window) || !open_large(application, window, large))
        return 1;
    return 0;
}

} // namespace
} // namespace filial::app

int main(int argc, char** argv) {
    return filial::app::run(argc, argv);
}
