// SPDX-License-Identifier: GPL-3.0-or-later
#pragma once

#include <functional>
#include <memory>

#include <gtest/gtest.h>

#include <QAction>
#include <QElapsedTimer>
#include <QSettings>
#include <QTemporaryDir>
#include <QTest>

#include "app/common/ask.h"
#include "app/common/theme.h"
#include "app/common/workbook.h"
#include "app/shell/book_view.h"
#include "app/shell/help_panel.h"
#include "app/shell/window.h"

namespace filial::app {

/// Answers what a person would be asked.
class AnsweringAsk : public Ask {
public:
    struct Answers {
        QString open, save, shown;
        int choice = -1;
        int asked = 0;
    };
    explicit AnsweringAsk(Answers& answers) : answers_(answers) {}
    QString openFile(QWidget*, const QString&, const QString&) override { return answers_.open; }
    QString saveFile(QWidget*, const QString&, const QString&, const QString&) override { return answers_.save; }
    int choose(QWidget*, const QString&, const QString&, const QStringList&) override {
        ++answers_.asked;
        return answers_.choice;
    }
    void showFile(const QString& path) override { answers_.shown = path; }

private:
    Answers& answers_;
};

/// Waits on a condition while events run; false when it did not come true in five seconds.
inline bool waitFor(const std::function<bool()>& condition) {
    QElapsedTimer clock;
    clock.start();
    while (!condition()) {
        if (clock.elapsed() > 5000)
            return false;
        QTest::qWait(5);
    }
    return true;
}

class ShellTest : public testing::Test {
protected:
    ShellTest() {
        qputenv("XDG_STATE_HOME", folder_.path().toUtf8());
        QSettings().clear();
        Ask::replace(std::make_unique<AnsweringAsk>(answers_));
        Theme::instance().apply(ThemeName::Light);
    }
    ~ShellTest() override { Ask::replace(nullptr); }

    static QString sample(const char* name) {
        return QStringLiteral(FILIAL_SAMPLES "/") + QLatin1String(name) + QStringLiteral(".filial");
    }
    QString path(const char* name) const { return folder_.filePath(QLatin1String(name)); }
    static void showAt(QWidget& window, int width, int height) {
        window.resize(width, height);
        window.show();
        EXPECT_TRUE(QTest::qWaitForWindowExposed(&window));
    }
    /// Renames the current cross, as the simplest edit there is.
    static void rename(Workbook& workbook, const char* name) {
        book::Cross before = *workbook.currentCross();
        before.families.clear();
        book::Cross after = before;
        after.name = name;
        ASSERT_TRUE(workbook.perform({book::SetCross{before.id, before, after}}));
    }

    QTemporaryDir folder_;
    AnsweringAsk::Answers answers_;
};

} // namespace filial::app
